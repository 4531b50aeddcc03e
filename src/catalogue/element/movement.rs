//! Movements of a member's ends turned from global to member axes, relative to its start and its chord.
//!
//! Strains depend on relative movements alone; setting them out first spares the checker long differences.
use super::definitions;
use crate::catalogue::symbol::*;
use crate::formula::source;

definitions! {
    RELATIVE_X: DX, Length, XU2 - XU1, &source::TURNING;
    RELATIVE_Y: DY, Length, YU2 - YU1, &source::TURNING;
    ELONGATION: U, Length, C * DX + S * DY, &source::TURNING;
    CROSS_MOVEMENT: DV, Length, C * DY - S * DX, &source::TURNING;
    CHORD_ROTATION: PSI, Rotation, DV / L, &source::TURNING;
    START_ROTATION: T1, Rotation, P1 - PSI, &source::TURNING;
    END_ROTATION: T2, Rotation, P2 - PSI, &source::TURNING;
    MIDDLE_X: DXM, Length, XUM - XU1, &source::TURNING;
    MIDDLE_Y: DYM, Length, YUM - YU1, &source::TURNING;
    MIDDLE_MOVEMENT: UM, Length, C * DXM + S * DYM, &source::TURNING;
}
