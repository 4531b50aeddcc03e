//! A force at one place: its sums with powers of its distance from the start.
use crate::catalogue::element::definitions;
use crate::catalogue::symbol::*;
use crate::formula::source;

definitions! {
    BACK_DISTANCE: BACK, Span, L - PA, &source::STATICS;
    MOMENT_START: MF1, Moment, PY * PA * BACK.squared() / L.squared(), &source::FIXED_END;
    MOMENT_END: MF2, Moment, PY * PA.squared() * BACK / L.squared(), &source::FIXED_END;
    SHEAR_START: VF1, Force, -(PY * BACK.squared() * (3 * PA + BACK) / L.cubed()), &source::FIXED_END;
    SHEAR_END: VF2, Force, PY * PA.squared() * (PA + 3 * BACK) / L.cubed(), &source::FIXED_END;
    AXIAL_START: NF1, Force, PX * BACK / L, &source::FIXED_END;
    AXIAL_END: NF2, Force, -(PX * PA / L), &source::FIXED_END;
    SUM_ACROSS: J0, Force, PY, &source::STATICS;
    FIRST_ACROSS: J1, Moment, PY * PA, &source::STATICS;
    SECOND_ACROSS: J2, ForceArea, PY * PA.squared(), &source::STATICS;
    THIRD_ACROSS: J3, ForceVolume, PY * PA.cubed(), &source::STATICS;
    SUM_ALONG: H0, Force, PX, &source::STATICS;
    FIRST_ALONG: H1, Moment, PX * PA, &source::STATICS;
    SECOND_ALONG: H2, ForceArea, PX * PA.squared(), &source::STATICS;
}
