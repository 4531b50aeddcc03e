//! Comparison with limits: every check, worst first, and its numbers as text.
use crate::model::Display;
use crate::sheet::Results;
use crate::units::{Measure as M, Printed};
use crate::work::Check;

/// Checks by falling utilisation, those beyond first, those not checked last; ties in file order.
#[must_use]
pub fn sorted_checks(results: &Results) -> Vec<&Check> {
    let mut checks: Vec<&Check> = results.combinations.iter().flat_map(|c| &c.checks).collect();
    let rank = |check: &Check| check.ratio.unwrap_or(-1.0);
    checks.sort_by(|a, b| rank(b).total_cmp(&rank(a)));
    checks
}

/// A utilisation, rounded up.
#[must_use]
pub fn ratio_text(ratio: f64, digits: u8) -> String {
    let leading = if ratio > 0.0 { ratio.log10().floor() as i32 } else { 0 };
    Printed::up(ratio, leading.max(-3) - i32::from(digits) + 1).to_string()
}

/// A quantity in its unit to four figures.
#[must_use]
pub fn quantity_text(display: &Display, si: f64, measure: M) -> String {
    let unit = display.unit(measure);
    let value = si / unit.scale;
    let leading = if value == 0.0 { 0 } else { value.abs().log10().floor() as i32 };
    let printed = Printed::nearest(value, (leading - 3).min(0));
    if unit.text.is_empty() { printed.to_string() } else { format!("{printed} {}", unit.text) }
}
