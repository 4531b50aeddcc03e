//! Stress over the depth of one section: what the axial force gives, what the moment gives, both together.
//!
//! At a member's end it says again what the strains say there, by the forces in place of the movements.
use super::definitions;
use crate::catalogue::symbol::*;
use crate::formula::source;

definitions! {
    AXIAL: SN, Stress, NG / A, &source::BENDING;
    BENDING_TOP: SMT, Stress, -(MG * YT / I), &source::BENDING;
    BENDING_BOTTOM: SMB, Stress, MG * YB / I, &source::BENDING;
    TOP: STOP, Stress, SN + SMT, &source::BENDING;
    BOTTOM: SBOT, Stress, SN + SMB, &source::BENDING;
}
