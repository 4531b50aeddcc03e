//! Curvature, moment and shear of a two-node member in bending, from its end rotations relative to the chord.
//!
//! The deflected axis is the cubic through both ends. With shear deformation (Φ) it is the exact line of a
//! member that bends and shears; Φ = 0 gives the slender member back.
//! # Sign convention
//! Rotations anticlockwise; positive curvature sags, M = E·I·κ stretches the −y side, V = dM/dx.
use super::definitions;
use crate::catalogue::symbol::*;
use crate::formula::source;

definitions! {
    CURVATURE_START_MOVEMENT: KU1, Curvature, -((4 * T1 + 2 * T2) / L), &source::CUBIC_BEAM;
    CURVATURE_END_MOVEMENT: KU2, Curvature, (2 * T1 + 4 * T2) / L, &source::CUBIC_BEAM;
    CURVATURE_START_MOVEMENT_SHEAR: KU1, Curvature,
        -(((4 + PHI) * T1 + (2 - PHI) * T2) / (L * (1 + PHI))), &source::SHEAR_BEAM;
    CURVATURE_END_MOVEMENT_SHEAR: KU2, Curvature,
        ((2 - PHI) * T1 + (4 + PHI) * T2) / (L * (1 + PHI)), &source::SHEAR_BEAM;
    LOAD_CURVATURE_START: KF1, Curvature, MF1 / BB, &source::FIXED_END;
    LOAD_CURVATURE_END: KF2, Curvature, MF2 / BB, &source::FIXED_END;
    CURVATURE_START: K1, Curvature, KU1 + KF1, &source::FIXED_END;
    CURVATURE_END: K2, Curvature, KU2 + KF2, &source::FIXED_END;
    STRESS_TOP_START: ST1, Stress, E * (E1 - K1 * YT), &source::BENDING;
    STRESS_BOTTOM_START: SB1, Stress, E * (E1 + K1 * YB), &source::BENDING;
    STRESS_TOP_END: ST2, Stress, E * (E2 - K2 * YT), &source::BENDING;
    STRESS_BOTTOM_END: SB2, Stress, E * (E2 + K2 * YB), &source::BENDING;
    BENDING_STRESS_TOP_START: ST1, Stress, -(E * K1 * YT), &source::BENDING;
    BENDING_STRESS_BOTTOM_START: SB1, Stress, E * K1 * YB, &source::BENDING;
    BENDING_STRESS_TOP_END: ST2, Stress, -(E * K2 * YT), &source::BENDING;
    BENDING_STRESS_BOTTOM_END: SB2, Stress, E * K2 * YB, &source::BENDING;
    MOMENT_START: M1, Moment, BB * K1, &source::BENDING;
    MOMENT_END: M2, Moment, BB * K2, &source::BENDING;
    SHEAR_START_UNLOADED: V1, Force, BB * (KU2 - KU1) / L, &source::STATICS;
    SHEAR_START: V1, Force, BB * (KU2 - KU1) / L + VF1, &source::STATICS;
    SHEAR_END_UNLOADED: V2, Force, BB * (KU2 - KU1) / L, &source::STATICS;
    SHEAR_END: V2, Force, BB * (KU2 - KU1) / L + VF2, &source::STATICS;
}
