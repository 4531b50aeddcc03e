//! Axial strain of a two-node bar: constant, from the elongation alone.
use super::definitions;
use crate::catalogue::symbol::*;
use crate::formula::source;

definitions! {
    STRAIN: EU, Strain, U / L, &source::HOOKE;
    STRAIN_UNLOADED: E1, Strain, U / L, &source::HOOKE;
    LOAD_STRAIN_START: EF1, Strain, NF1 / BA, &source::HOOKE;
    LOAD_STRAIN_END: EF2, Strain, NF2 / BA, &source::HOOKE;
    STRAIN_START: E1, Strain, EU + EF1, &source::FIXED_END;
    STRAIN_END: E2, Strain, EU + EF2, &source::FIXED_END;
    STRESS_START: ST1, Stress, E * E1, &source::HOOKE;
    STRESS_END: ST2, Stress, E * E2, &source::HOOKE;
    FORCE_START: N1, Force, BA * E1, &source::HOOKE;
    FORCE_END: N2, Force, BA * E2, &source::HOOKE;
    FORCE_IF_TAUT: NS, Force, BA * U / L + (NS1 + NS2) / 2, &source::HOOKE;
    FORCE_IF_TAUT_UNLOADED: NS, Force, BA * U / L, &source::HOOKE;
}
