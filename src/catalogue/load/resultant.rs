//! A member load as the supports must feel it: its resultant in global axes and its moment about the origin.
use crate::catalogue::element::definitions;
use crate::catalogue::symbol::*;
use crate::formula::source;

definitions! {
    BOTH_X: FGX, Force, C * H0 - S * J0, &source::TURNING;
    BOTH_Y: FGY, Force, S * H0 + C * J0, &source::TURNING;
    ALONG_X: FGX, Force, C * H0, &source::TURNING;
    ALONG_Y: FGY, Force, S * H0, &source::TURNING;
    ACROSS_X: FGX, Force, -(S * J0), &source::TURNING;
    ACROSS_Y: FGY, Force, C * J0, &source::TURNING;
    ORIGIN_ACROSS: MO, Moment, X1 * FGY - Y1 * FGX + J1, &source::STATICS;
    ORIGIN_ALONG: MO, Moment, X1 * FGY - Y1 * FGX, &source::STATICS;
    ORIGIN_Y_ACROSS: MO, Moment, X1 * FGY + J1, &source::STATICS;
    ORIGIN_Y_ALONG: MO, Moment, X1 * FGY, &source::STATICS;
    ORIGIN_X_ACROSS: MO, Moment, J1 - Y1 * FGX, &source::STATICS;
    ORIGIN_X_ALONG: MO, Moment, -(Y1 * FGX), &source::STATICS;
}

/// The moment of the resultant about the global origin, for the parts the load has; none where it has none.
#[must_use]
pub fn about_origin(
    has_x: bool,
    has_y: bool,
    across: bool,
) -> Option<&'static std::sync::LazyLock<crate::formula::Definition>> {
    match (has_x, has_y, across) {
        (true, true, true) => Some(&ORIGIN_ACROSS),
        (true, true, false) => Some(&ORIGIN_ALONG),
        (false, true, true) => Some(&ORIGIN_Y_ACROSS),
        (false, true, false) => Some(&ORIGIN_Y_ALONG),
        (true, false, true) => Some(&ORIGIN_X_ACROSS),
        (true, false, false) => Some(&ORIGIN_X_ALONG),
        (false, false, _) => None,
    }
}
