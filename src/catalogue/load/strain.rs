//! Warming and lack of fit: strains that are not caused by stress.
//!
//! # Sign convention
//! Warming lengthens; a top warmer than the bottom bows the member upward, a negative free curvature.
use crate::catalogue::element::definitions;
use crate::catalogue::symbol::*;
use crate::formula::source;

definitions! {
    CENTROID_WARMING: TC, Temperature, TB + (TT - TB) * YB / (YT + YB), &source::HOOKE;
    FREE_CURVATURE: KT, Curvature, -(ALPHA * (TT - TB) / (YT + YB)), &source::BENDING;
    AXIAL_START: NF1, Force, -(BA * ALPHA * TC), &source::HOOKE;
    AXIAL_END: NF2, Force, -(BA * ALPHA * TC), &source::HOOKE;
    MOMENT_START: MF1, Moment, -(BB * KT), &source::BENDING;
    MOMENT_END: MF2, Moment, -(BB * KT), &source::BENDING;
    MISFIT_START: NF1, Force, -(BA * TL / L), &source::HOOKE;
    MISFIT_END: NF2, Force, -(BA * TL / L), &source::HOOKE;
}
