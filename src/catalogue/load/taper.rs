//! A load of straight-line intensity over the whole member.
use crate::catalogue::element::definitions;
use crate::catalogue::symbol::*;
use crate::formula::source;

definitions! {
    SUM_ACROSS: J0, Force, (WY1 + WY2) * L / 2, &source::STATICS;
    FIRST_ACROSS: J1, Moment, (WY1 + 2 * WY2) * L.squared() / 6, &source::STATICS;
    SECOND_ACROSS: J2, ForceArea, (WY1 + 3 * WY2) * L.cubed() / 12, &source::STATICS;
    THIRD_ACROSS: J3, ForceVolume, (WY1 + 4 * WY2) * L.power(4) / 20, &source::STATICS;
    SUM_ALONG: H0, Force, (WX1 + WX2) * L / 2, &source::STATICS;
    FIRST_ALONG: H1, Moment, (WX1 + 2 * WX2) * L.squared() / 6, &source::STATICS;
    SECOND_ALONG: H2, ForceArea, (WX1 + 3 * WX2) * L.cubed() / 12, &source::STATICS;
}
