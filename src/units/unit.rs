//! THE table of units, and units made of them by multiplication, division and powers.
use super::Dimension;
use std::sync::Arc;

/// One row of the table: how a unit may be typed, what it measures, its size in SI.
#[derive(Debug, Clone, Copy)]
pub struct UnitRow {
    /// The spelling used in print.
    pub symbol: &'static str,
    /// Other accepted spellings.
    pub also: &'static [&'static str],
    /// What the unit measures.
    pub dimension: Dimension,
    /// Size of one unit in SI base units; exact by definition.
    pub scale: f64,
}

const POUND_KG: f64 = 0.453_592_37;
const INCH_M: f64 = 0.0254;
/// Standard acceleration of free fall (3rd CGPM, 1901), m/s².
pub const STANDARD_GRAVITY: f64 = 9.806_65;
const POUND_FORCE_N: f64 = POUND_KG * STANDARD_GRAVITY;
const PSI_PA: f64 = POUND_FORCE_N / (INCH_M * INCH_M);

const fn row(symbol: &'static str, also: &'static [&'static str], dimension: Dimension, scale: f64) -> UnitRow {
    UnitRow { symbol, also, dimension, scale }
}

/// Every unit the language understands.
///
/// # Source
/// SI brochure; international yard and pound agreement of 1959 (in = 25.4 mm, lb = 0.45359237 kg).
pub const UNITS: &[UnitRow] = &[
    row("mm", &[], Dimension::LENGTH, 1e-3),
    row("cm", &[], Dimension::LENGTH, 1e-2),
    row("m", &[], Dimension::LENGTH, 1.0),
    row("km", &[], Dimension::LENGTH, 1e3),
    row("in", &["inch"], Dimension::LENGTH, INCH_M),
    row("ft", &["foot"], Dimension::LENGTH, 12.0 * INCH_M),
    row("N", &[], Dimension::FORCE, 1.0),
    row("kN", &[], Dimension::FORCE, 1e3),
    row("MN", &[], Dimension::FORCE, 1e6),
    row("lbf", &[], Dimension::FORCE, POUND_FORCE_N),
    row("kip", &["kips"], Dimension::FORCE, 1e3 * POUND_FORCE_N),
    row("g", &[], Dimension::MASS, 1e-3),
    row("kg", &[], Dimension::MASS, 1.0),
    row("t", &[], Dimension::MASS, 1e3),
    row("lb", &[], Dimension::MASS, POUND_KG),
    row("s", &[], Dimension::TIME, 1.0),
    row("Pa", &[], Dimension::STRESS, 1.0),
    row("kPa", &[], Dimension::STRESS, 1e3),
    row("MPa", &[], Dimension::STRESS, 1e6),
    row("GPa", &[], Dimension::STRESS, 1e9),
    row("psi", &[], Dimension::STRESS, PSI_PA),
    row("ksi", &[], Dimension::STRESS, 1e3 * PSI_PA),
    row("psf", &[], Dimension::STRESS, PSI_PA / 144.0),
    row("K", &["degC", "°C"], Dimension::TEMPERATURE, 1.0),
    row("degF", &["°F"], Dimension::TEMPERATURE, 5.0 / 9.0),
    row("rad", &[], Dimension::NONE, 1.0),
    row("mrad", &[], Dimension::NONE, 1e-3),
    row("deg", &["°"], Dimension::NONE, std::f64::consts::PI / 180.0),
];

/// A unit as it is printed: its text, what it measures and its size in SI.
///
/// `text` is empty for a plain number.
#[derive(Debug, Clone, PartialEq)]
pub struct Unit {
    /// Printed form, such as `kN·m`, `N/mm²`, `1/m`.
    pub text: Arc<str>,
    /// What it measures.
    pub dimension: Dimension,
    /// Size of one unit in SI base units.
    pub scale: f64,
}

impl Unit {
    /// No unit: a plain number.
    #[must_use]
    pub fn none() -> Self {
        Self { text: Arc::from(""), dimension: Dimension::NONE, scale: 1.0 }
    }
}
