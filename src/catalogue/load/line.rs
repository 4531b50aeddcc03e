//! A load of straight-line intensity over the whole member or a part of it.
//!
//! Its sums with powers of the distance from the start give every fixed-end action:
//! the shape functions of the member are polynomials in that distance.
use crate::catalogue::element::definitions;
use crate::catalogue::symbol::*;
use crate::formula::source;

definitions! {
    SLOPE_ACROSS: QS, LoadSlope, (WY2 - WY1) / (PB - PA.tree()), &source::STATICS;
    BASE_ACROSS: QP, LineLoad, WY1 - QS * PA, &source::STATICS;
    SUM_ACROSS: J0, Force, QP * (PB - PA.tree()) + QS * (PB.squared() - PA.squared()) / 2, &source::STATICS;
    FIRST_ACROSS: J1, Moment, QP * (PB.squared() - PA.squared()) / 2 + QS * (PB.cubed() - PA.cubed()) / 3, &source::STATICS;
    SECOND_ACROSS: J2, ForceArea, QP * (PB.cubed() - PA.cubed()) / 3 + QS * (PB.power(4) - PA.power(4)) / 4, &source::STATICS;
    THIRD_ACROSS: J3, ForceVolume, QP * (PB.power(4) - PA.power(4)) / 4 + QS * (PB.power(5) - PA.power(5)) / 5, &source::STATICS;
    SLOPE_ALONG: QSX, LoadSlope, (WX2 - WX1) / (PB - PA.tree()), &source::STATICS;
    BASE_ALONG: QPX, LineLoad, WX1 - QSX * PA, &source::STATICS;
    SUM_ALONG: H0, Force, QPX * (PB - PA.tree()) + QSX * (PB.squared() - PA.squared()) / 2, &source::STATICS;
    FIRST_ALONG: H1, Moment, QPX * (PB.squared() - PA.squared()) / 2 + QSX * (PB.cubed() - PA.cubed()) / 3, &source::STATICS;
    SECOND_ALONG: H2, ForceArea, QPX * (PB.cubed() - PA.cubed()) / 3 + QSX * (PB.power(4) - PA.power(4)) / 4, &source::STATICS;
}
