//! A load's parts along and across the member.
//!
//! # Sign convention
//! c and s are the member's direction cosines; local y is local x turned 90° anticlockwise.
use crate::catalogue::element::definitions;
use crate::catalogue::symbol::*;
use crate::formula::source;

definitions! {
    LINE_Y_ALONG_1: WX1, LineLoad, W1 * S, &source::TURNING;
    LINE_Y_ACROSS_1: WY1, LineLoad, W1 * C, &source::TURNING;
    LINE_Y_ALONG_2: WX2, LineLoad, W2 * S, &source::TURNING;
    LINE_Y_ACROSS_2: WY2, LineLoad, W2 * C, &source::TURNING;
    LINE_X_ALONG_1: WX1, LineLoad, W1 * C, &source::TURNING;
    LINE_X_ACROSS_1: WY1, LineLoad, -(W1 * S), &source::TURNING;
    LINE_X_ALONG_2: WX2, LineLoad, W2 * C, &source::TURNING;
    LINE_X_ACROSS_2: WY2, LineLoad, -(W2 * S), &source::TURNING;
    PLAN_Y_ALONG_1: WX1, LineLoad, W1 * C.tree().absolute() * S, &source::TURNING;
    PLAN_Y_ACROSS_1: WY1, LineLoad, W1 * C.tree().absolute() * C, &source::TURNING;
    PLAN_Y_ALONG_2: WX2, LineLoad, W2 * C.tree().absolute() * S, &source::TURNING;
    PLAN_Y_ACROSS_2: WY2, LineLoad, W2 * C.tree().absolute() * C, &source::TURNING;
    PLAN_X_ALONG_1: WX1, LineLoad, W1 * S.tree().absolute() * C, &source::TURNING;
    PLAN_X_ACROSS_1: WY1, LineLoad, -(W1 * S.tree().absolute() * S), &source::TURNING;
    PLAN_X_ALONG_2: WX2, LineLoad, W2 * S.tree().absolute() * C, &source::TURNING;
    PLAN_X_ACROSS_2: WY2, LineLoad, -(W2 * S.tree().absolute() * S), &source::TURNING;
    OWN_ALONG_1: WX1, LineLoad, W1, &source::TURNING;
    OWN_ALONG_2: WX2, LineLoad, W2, &source::TURNING;
    OWN_ACROSS_1: WY1, LineLoad, W1, &source::TURNING;
    OWN_ACROSS_2: WY2, LineLoad, W2, &source::TURNING;
    WEIGHT_ALONG: WX1, LineLoad, -(WG * S), &source::TURNING;
    WEIGHT_ACROSS: WY1, LineLoad, -(WG * C), &source::TURNING;
    POINT_Y_ALONG: PX, Force, P * S, &source::TURNING;
    POINT_Y_ACROSS: PY, Force, P * C, &source::TURNING;
    POINT_X_ALONG: PX, Force, P * C, &source::TURNING;
    POINT_X_ACROSS: PY, Force, -(P * S), &source::TURNING;
    POINT_OWN_ALONG: PX, Force, P, &source::TURNING;
    POINT_OWN_ACROSS: PY, Force, P, &source::TURNING;
}
