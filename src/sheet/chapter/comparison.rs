//! Comparison with limits: every check, worst first.
use super::{Builder, Cell, words};
use crate::model::Model;
use crate::sheet::{Recording, Results, Table};
use crate::units::{Measure as M, Printed};
use crate::work::Check;

/// The table of all checks.
pub(super) fn tables(model: &Model, results: &Results, sheet: &mut Recording<'_>) -> Vec<Table> {
    let mut table = Builder::new("checks", "Comparison with limits, highest utilisation first", "check")
        .words("demand")
        .words("limit")
        .column("η", M::Ratio)
        .words("verdict")
        .words("step");
    for check in sorted(results) {
        let step = check.step.clone().filter(|number| sheet.sheet.step(number).is_some());
        let ratio = match (check.ratio, &step) {
            (None, _) => words("—"),
            (Some(_), Some(number)) => sheet.sheet.step(number).map_or(Cell::Empty, |step| Cell::Quantity(step.result)),
            (Some(ratio), None) => words(ratio_text(ratio, model.display.digits)),
        };
        let cells = vec![
            words(quantity_text(sheet, check.demand, check.measure)),
            words(quantity_text(sheet, check.limit, check.measure)),
            ratio,
            words(verdict(check)),
            step.map_or(words(if check.ratio.is_some() { "table" } else { "" }), Cell::Address),
        ];
        table.row(&check.id, cells);
    }
    table.build(sheet).into_iter().collect()
}

/// Checks by falling utilisation, those beyond first, those not checked last; ties in file order.
#[must_use]
pub(crate) fn sorted(results: &Results) -> Vec<&Check> {
    let mut checks: Vec<&Check> = results.combinations.iter().flat_map(|c| &c.checks).collect();
    checks.sort_by(|a, b| b.ratio.unwrap_or(-1.0).total_cmp(&a.ratio.unwrap_or(-1.0)));
    checks
}

/// The verdict in words.
#[must_use]
pub(crate) fn verdict(check: &Check) -> String {
    match (check.ok(), &check.why) {
        (Some(true), _) => "within".into(),
        (Some(false), _) => "BEYOND LIMIT".into(),
        (None, Some(why)) => format!("NOT CHECKED: {why}"),
        (None, None) => "NOT CHECKED".into(),
    }
}

/// A utilisation, rounded up.
#[must_use]
pub(crate) fn ratio_text(ratio: f64, digits: u8) -> String {
    let leading = if ratio > 0.0 { ratio.log10().floor() as i32 } else { 0 };
    Printed::up(ratio, leading.max(-3) - i32::from(digits) + 1).to_string()
}

/// A quantity in its unit to four figures.
fn quantity_text(sheet: &Recording<'_>, si: Option<f64>, measure: M) -> String {
    let Some(si) = si else { return String::new() };
    let unit = sheet.unit(measure);
    let value = si / unit.scale;
    let leading = if value == 0.0 { 0 } else { value.abs().log10().floor() as i32 };
    let printed = Printed::nearest(value, (leading - 3).min(0));
    if unit.text.is_empty() { printed.to_string() } else { format!("{printed} {}", unit.text) }
}
