//! Axial strain of a three-node bar: straight-line, from the movements of both ends and the middle.
//!
//! With ξ = x/L and movements relative to the start, u = 4ξ(1 − ξ)·e_m + ξ(2ξ − 1)·e, so that
//! u′(0) = (4·e_m − e)/L and u′(L) = (3·e − 4·e_m)/L.
use super::definitions;
use crate::catalogue::symbol::*;
use crate::formula::source;

definitions! {
    STRAIN_START_MOVEMENT: EU1, Strain, (4 * UM - U) / L, &source::QUADRATIC_BAR;
    STRAIN_END_MOVEMENT: EU2, Strain, (3 * U - 4 * UM) / L, &source::QUADRATIC_BAR;
    STRAIN_START_UNLOADED: E1, Strain, (4 * UM - U) / L, &source::QUADRATIC_BAR;
    STRAIN_END_UNLOADED: E2, Strain, (3 * U - 4 * UM) / L, &source::QUADRATIC_BAR;
    STRAIN_START: E1, Strain, EU1 + EF1, &source::FIXED_END;
    STRAIN_END: E2, Strain, EU2 + EF2, &source::FIXED_END;
    MIDDLE_BALANCE: BM, Force, FM - BA * (16 * UM - 8 * U) / (3 * L), &source::QUADRATIC_BAR;
    MIDDLE_BALANCE_UNLOADED: BM, Force, -(BA * (16 * UM - 8 * U) / (3 * L)), &source::QUADRATIC_BAR;
    MIDDLE_FORCE: FM, Force, BA * (16 * UM - 8 * U) / (3 * L), &source::QUADRATIC_BAR;
}
