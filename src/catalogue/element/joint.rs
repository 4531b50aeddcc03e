//! Forces of a member on the joints at its ends, in global axes.
//!
//! # Sign convention
//! A slack three-node bar hands the load along it to its joints by statics.
//! N pulls its joints together; V at the start presses the start joint down (−y) when positive, at the end up.
use super::definitions;
use crate::catalogue::symbol::*;
use crate::formula::source;

definitions! {
    START_X: FX1, Force, C * N1 + S * V1, &source::TURNING;
    START_Y: FY1, Force, S * N1 - C * V1, &source::TURNING;
    END_X: FX2, Force, -(C * N2) - S * V2, &source::TURNING;
    END_Y: FY2, Force, C * V2 - S * N2, &source::TURNING;
    BAR_START_X: FX1, Force, C * N1, &source::TURNING;
    BAR_START_Y: FY1, Force, S * N1, &source::TURNING;
    BAR_END_X: FX2, Force, -(C * N2), &source::TURNING;
    BAR_END_Y: FY2, Force, -(S * N2), &source::TURNING;
    SLACK_START_X: FX1, Force, C * (NF1 + 3 * FM / 4), &source::STATICS;
    SLACK_START_Y: FY1, Force, S * (NF1 + 3 * FM / 4), &source::STATICS;
    SLACK_END_X: FX2, Force, C * (3 * FM / 4 - NF2), &source::STATICS;
    SLACK_END_Y: FY2, Force, S * (3 * FM / 4 - NF2), &source::STATICS;
    SLACK_EVEN_START_X: FX1, Force, C * (3 * FM / 4), &source::STATICS;
    SLACK_EVEN_START_Y: FY1, Force, S * (3 * FM / 4), &source::STATICS;
    SLACK_EVEN_END_X: FX2, Force, C * (3 * FM / 4), &source::STATICS;
    SLACK_EVEN_END_Y: FY2, Force, S * (3 * FM / 4), &source::STATICS;
    BEAM_START_X: FX1, Force, S * V1, &source::TURNING;
    BEAM_START_Y: FY1, Force, -(C * V1), &source::TURNING;
    BEAM_END_X: FX2, Force, -(S * V2), &source::TURNING;
    BEAM_END_Y: FY2, Force, C * V2, &source::TURNING;
}
