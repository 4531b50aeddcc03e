//! Length and direction of a member, and its rigidities.
use super::definitions;
use crate::catalogue::symbol::*;
use crate::formula::source;

definitions! {
    PROJECTION_X: LX, Span, X2 - X1, &source::TURNING;
    PROJECTION_Y: LY, Span, Y2 - Y1, &source::TURNING;
    LENGTH: L, Span, (LX.squared() + LY.squared()).root(), &source::TURNING;
    COSINE: C, Number, LX / L, &source::TURNING;
    SINE: S, Number, LY / L, &source::TURNING;
    AXIAL_RIGIDITY: BA, Force, E * A, &source::HOOKE;
    BENDING_RIGIDITY: BB, Rigidity, E * I, &source::BENDING;
    SHEAR_RIGIDITY: BV, Force, G * AV, &source::SHEAR_BEAM;
    SHEAR_FLEXIBILITY: PHI, Number, (12 * BB) / (BV * L.squared()), &source::SHEAR_BEAM;
    WEIGHT_PER_LENGTH: WG, LineLoad, RHO * GRAVITY * A, &source::STATICS;
}
