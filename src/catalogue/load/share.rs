//! What a member does not carry itself and hands to the joints at its ends, in global axes.
use crate::catalogue::element::definitions;
use crate::catalogue::symbol::*;
use crate::formula::source;

definitions! {
    START_X: SX1, Force, C * QX1 - S * QY1, &source::TURNING;
    START_Y: SY1, Force, S * QX1 + C * QY1, &source::TURNING;
    END_X: SX2, Force, C * QX2 - S * QY2, &source::TURNING;
    END_Y: SY2, Force, S * QX2 + C * QY2, &source::TURNING;
    START_X_ALONG: SX1, Force, C * QX1, &source::TURNING;
    START_Y_ALONG: SY1, Force, S * QX1, &source::TURNING;
    END_X_ALONG: SX2, Force, C * QX2, &source::TURNING;
    END_Y_ALONG: SY2, Force, S * QX2, &source::TURNING;
    START_X_ACROSS: SX1, Force, -(S * QY1), &source::TURNING;
    START_Y_ACROSS: SY1, Force, C * QY1, &source::TURNING;
    END_X_ACROSS: SX2, Force, -(S * QY2), &source::TURNING;
    END_Y_ACROSS: SY2, Force, C * QY2, &source::TURNING;
}
