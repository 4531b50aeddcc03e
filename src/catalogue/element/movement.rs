//! Movements of a member's ends turned from global to member axes, relative to its start and its chord.
//!
//! Strains depend on relative movements alone; setting them out first spares the checker long differences. Where a
//! relative movement is much smaller than the movements it is the difference of, it is stated as well, and what the
//! movements leave of it, the gap, is shown to vanish.
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
    ELONGATION_MOVED: UU, Length, C * DX + S * DY, &source::TURNING;
    START_ROTATION_MOVED: TU1, Rotation, P1 - PSI, &source::TURNING;
    END_ROTATION_MOVED: TU2, Rotation, P2 - PSI, &source::TURNING;
    MIDDLE_MOVEMENT_MOVED: UMU, Length, C * DXM + S * DYM, &source::TURNING;
    ELONGATION_GAP: GE, Length, UU - U, &source::TURNING;
    START_ROTATION_GAP: GT1, Rotation, TU1 - T1, &source::TURNING;
    END_ROTATION_GAP: GT2, Rotation, TU2 - T2, &source::TURNING;
    MIDDLE_MOVEMENT_GAP: GM, Length, UMU - UM, &source::TURNING;
}
