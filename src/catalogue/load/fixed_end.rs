//! Fixed-end actions from a load's sums, for any member kind.
//!
//! # Sign convention
//! Section forces at the member's ends, as everywhere: N tension, V = dM/dx, M sagging.
//! # Source
//! The work of the load on the movements that each end movement alone causes in the member.
use crate::catalogue::element::definitions;
use crate::catalogue::symbol::*;
use crate::formula::source;

definitions! {
    MOMENT_START: MF1, Moment,
        (J1 - 2 * J2 / L + J3 / L.squared() + PHI * (J1 - J2 / L) / 2) / (1 + PHI), &source::SHEAR_BEAM;
    MOMENT_END: MF2, Moment,
        (J2 / L - J3 / L.squared() + PHI * (J1 - J2 / L) / 2) / (1 + PHI), &source::SHEAR_BEAM;
    MOMENT_START_SLENDER: MF1, Moment, J1 - 2 * J2 / L + J3 / L.squared(), &source::FIXED_END;
    MOMENT_END_SLENDER: MF2, Moment, J2 / L - J3 / L.squared(), &source::FIXED_END;
    SHEAR_START: VF1, Force, (MF2 - MF1 + J1) / L - J0, &source::STATICS;
    SHEAR_END: VF2, Force, VF1 + J0, &source::STATICS;
    AXIAL_START: NF1, Force, H0 - H1 / L, &source::FIXED_END;
    AXIAL_END: NF2, Force, -(H1 / L), &source::FIXED_END;
    THREE_NODE_START: NF1, Force, H0 - 4 * H1 / L + 3 * H2 / L.squared(), &source::QUADRATIC_BAR;
    THREE_NODE_END: NF2, Force, 2 * H1 / L - 3 * H2 / L.squared(), &source::QUADRATIC_BAR;
    THREE_NODE_MIDDLE: FM, Force, 4 * H1 / L - 4 * H2 / L.squared(), &source::QUADRATIC_BAR;
    JOINT_ALONG_START: QX1, Force, H0 - H1 / L, &source::STATICS;
    JOINT_ALONG_END: QX2, Force, H1 / L, &source::STATICS;
    JOINT_ACROSS_START: QY1, Force, J0 - J1 / L, &source::STATICS;
    JOINT_ACROSS_END: QY2, Force, J1 / L, &source::STATICS;
}
