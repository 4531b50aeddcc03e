//! Checks: what is demanded against what is allowed.
pub mod deflection;
pub mod euler;
pub mod shear;
pub mod slenderness;
pub mod stability;
pub mod stress;

use crate::formula::Definition;
use crate::units::Measure;

macro_rules! check_symbols {
    ($($name:ident $text:literal $measure:ident $doc:literal)*) => {
        $(#[doc = $doc] pub const $name: crate::formula::Symbol = crate::formula::Symbol::new($text);)*
        /// Symbol, kind of quantity, meaning.
        pub const SYMBOLS: &[(&str, Measure, &str)] = &[$(($text, Measure::$measure, $doc)),*];
    };
}
check_symbols! {
    SIGMA "σ_x" Stress "Largest stress in the member"
    TENSION_LIMIT "f_t" Stress "Allowable tensile stress"
    COMPRESSION_LIMIT "f_c" Stress "Allowable compressive stress"
    SHEAR_LIMIT "f_v" Stress "Allowable shear stress"
    TAU "τ" Stress "Largest shear stress"
    VMAX "V_max" Force "Shear force of largest size"
    Q "Q" AreaMoment "First moment of area beyond the level of the largest shear stress"
    BW "b_v" Length "Breadth at the level of the largest shear stress"
    ETA "η" Ratio "Utilisation: demand over limit"
    DELTA "v_x" Length "Largest deflection from the chord"
    DELTA_LIMIT "v_lim" Length "Limit of deflection"
    ROTATION "r" Rotation "Rotation of the node"
    ROTATION_LIMIT "r_lim" Rotation "Limit of rotation"
    SPAN_DIVISOR "n" Number "Divisor of the length"
    K_IN "K_y" Number "Effective length factor in the plane"
    K_OUT "K_z" Number "Effective length factor out of the plane"
    L_IN "L_y" Span "Effective length in the plane"
    L_OUT "L_z" Span "Effective length out of the plane"
    P_IN "P_Ey" Force "Euler load in the plane"
    P_OUT "P_Ez" Force "Euler load out of the plane"
    SAFETY "γ_b" Number "Safety factor on the Euler load"
    P_LIMIT "P_lim" Force "Allowable compression"
    N_LEAST "N_c" Force "Axial force of largest compression"
    LAMBDA_IN "λ_y" Number "Slenderness in the plane"
    LAMBDA_OUT "λ_z" Number "Slenderness out of the plane"
    LAMBDA_LIMIT "λ_lim" Number "Limit of slenderness"
    ALPHA_CR "α_cr" Number "Elastic critical load factor"
    ALPHA_LEAST "α_min" Number "Smallest critical load factor allowed"
}

/// Every definition of every check.
pub fn all() -> impl Iterator<Item = &'static Definition> {
    [deflection::ALL, euler::ALL, shear::ALL, slenderness::ALL, stability::ALL, stress::ALL]
        .into_iter()
        .flatten()
        .map(|d| &***d)
}
