//! A load of one intensity over the whole member.
use crate::catalogue::element::definitions;
use crate::catalogue::symbol::*;
use crate::formula::source;

definitions! {
    MOMENT_START: MF1, Moment, WY1 * L.squared() / 12, &source::FIXED_END;
    MOMENT_END: MF2, Moment, WY1 * L.squared() / 12, &source::FIXED_END;
    SHEAR_START: VF1, Force, -(WY1 * L / 2), &source::FIXED_END;
    SHEAR_END: VF2, Force, WY1 * L / 2, &source::FIXED_END;
    AXIAL_START: NF1, Force, WX1 * L / 2, &source::FIXED_END;
    AXIAL_END: NF2, Force, -(WX1 * L / 2), &source::FIXED_END;
    SUM_ACROSS: J0, Force, WY1 * L, &source::STATICS;
    SUM_ALONG: H0, Force, WX1 * L, &source::STATICS;
    FIRST_ACROSS: J1, Moment, WY1 * L.squared() / 2, &source::STATICS;
    FIRST_ALONG: H1, Moment, WX1 * L.squared() / 2, &source::STATICS;
    SECOND_ALONG: H2, ForceArea, WX1 * L.cubed() / 3, &source::STATICS;
}
