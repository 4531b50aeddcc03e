//! A couple at one place, anticlockwise.
//!
//! Its fixed-end actions follow from the rotations that the member's own end movements cause at the place.
use crate::catalogue::element::definitions;
use crate::catalogue::symbol::*;
use crate::formula::source;

definitions! {
    MOMENT_START: MF1, Moment,
        MC * (1 - 4 * PA / L + 3 * PA.squared() / L.squared() + PHI * (1 - PA / L)) / (1 + PHI), &source::SHEAR_BEAM;
    MOMENT_END: MF2, Moment,
        MC * (2 * PA / L - 3 * PA.squared() / L.squared() - PHI * PA / L) / (1 + PHI), &source::SHEAR_BEAM;
    MOMENT_START_SLENDER: MF1, Moment, MC * (1 - 4 * PA / L + 3 * PA.squared() / L.squared()), &source::FIXED_END;
    MOMENT_END_SLENDER: MF2, Moment, MC * (2 * PA / L - 3 * PA.squared() / L.squared()), &source::FIXED_END;
    SHEAR_START: VF1, Force, (MF2 - MF1 + MC) / L, &source::STATICS;
    SHEAR_END: VF2, Force, (MF2 - MF1 + MC) / L, &source::STATICS;
    JOINT_START: QY1, Force, -(MC / L), &source::STATICS;
    JOINT_END: QY2, Force, MC / L, &source::STATICS;
}
