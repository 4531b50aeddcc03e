//! Numbers that stand a second time: results quoted in tables, totals of columns. And zeros with a sign.
use super::Finding;
use super::package::Package;
use super::report::Coverage;
use super::step::{PrintedStep, is_step_number};
use super::table::PrintedTable;
use super::trace::Cell;
use super::verdict::{Said, said};
use crate::formula::PrintedNumber;
use std::collections::{BTreeMap, BTreeSet};

/// Headings of columns that quote the result of the step a row names.
const QUOTING: &[&str] = &["ratio", "η", "utilisation", "result"];
/// A total is added up again to within one unit of the coarsest last place; this much more is binary dust.
const DUST: f64 = 1e-6;

/// Looks at every table.
pub(super) fn check(
    package: &Package,
    confirmed: &mut BTreeSet<Cell>,
    findings: &mut Vec<Finding>,
    coverage: &mut Coverage,
) {
    let steps: BTreeMap<&str, &PrintedStep> = package.steps.iter().map(|step| (step.number.as_str(), step)).collect();
    for (at, table) in package.tables.iter().enumerate() {
        let mut here = BTreeSet::new();
        if table.id.is_some() {
            coverage.tables += 1;
        }
        check_cells(table, findings, coverage);
        check_quotes(table, &steps, &mut here, findings, coverage);
        check_totals(table, &mut here, findings);
        if table.id.is_some() {
            confirmed.extend(here.into_iter().map(|(row, column)| (at, row, column)));
        }
    }
}

/// Every row is complete; what begins like a number is one; zero has no sign.
fn check_cells(table: &PrintedTable, findings: &mut Vec<Finding>, coverage: &mut Coverage) {
    for (row_at, row) in table.rows.iter().enumerate() {
        if row.cells.len() != table.columns.len() {
            let expected = format!("{} cells as in the head of the table", table.columns.len() + 1);
            findings.push(Finding::at(row.line, expected, format!("{}", row.cells.len() + 1)));
        }
        for (column_at, cell) in row.cells.iter().enumerate() {
            if table.number(row_at, column_at).is_some() {
                if table.id.is_some() {
                    coverage.table_numbers += 1;
                } else {
                    coverage.loose_numbers += 1;
                }
                continue;
            }
            let digits = cell.trim_start_matches('−');
            let is_numeric = table.columns.get(column_at).is_some_and(|(symbol, unit)| {
                !unit.text.is_empty() || ["demand", "limit"].contains(&symbol.to_lowercase().as_str())
            });
            let is_signed_zero = digits.len() < cell.len()
                && digits.contains('0')
                && digits.split(['×', ' ']).next().is_some_and(|digits| digits.chars().all(|c| c == '0' || c == '.'));
            if is_signed_zero {
                findings.push(Finding::at(row.line, "a zero without a minus sign", format!("`{cell}`")));
            } else if is_numeric && digits.starts_with(|c: char| c.is_ascii_digit() || c == '-' || c == '.') {
                findings.push(Finding::at(row.line, "a number in its printed form", format!("`{cell}`")));
            }
        }
    }
}

/// A row that names one step prints the step's result in its own digits, and its verdict; a ratio is that of the demand
/// and the limit beside it.
fn check_quotes(
    table: &PrintedTable,
    steps: &BTreeMap<&str, &PrintedStep>,
    confirmed: &mut BTreeSet<(usize, usize)>,
    findings: &mut Vec<Finding>,
    coverage: &mut Coverage,
) {
    let headings: Vec<String> = table.columns.iter().map(|(symbol, _)| symbol.to_lowercase()).collect();
    let heading = |at: usize| headings.get(at).map_or("", String::as_str);
    let speaks_of_steps = table.head.to_lowercase().contains("step") || headings.iter().any(|h| h.contains("step"));
    for (row_at, row) in table.rows.iter().enumerate() {
        let mut find = |expected: String, found: String| findings.push(Finding::at(row.line, expected, found));
        for (at, cell) in std::iter::once(&row.name).chain(&row.cells).enumerate() {
            // The first of these is the name of the row.
            let is_address = at.checked_sub(1).is_some_and(|at| heading(at) == "step") && cell.contains('.');
            if (is_address || speaks_of_steps && is_step_number(cell)) && !steps.contains_key(cell.as_str()) {
                find("a step of this package".into(), format!("`{cell}`"));
            }
        }
        let named = row.cells.iter().find_map(|cell| steps.get(cell.as_str()).copied());
        let numbers: Vec<(usize, PrintedNumber)> =
            (0..row.cells.len()).filter_map(|at| Some((at, table.number(row_at, at)?))).collect();
        let quoting: Vec<_> = numbers.iter().filter(|(at, _)| QUOTING.contains(&heading(*at))).collect();
        let under = |words: &str| numbers.iter().find(|(at, _)| heading(*at) == words);
        if let ([(_, ratio)], Some((at, demand)), Some((limit_at, limit))) =
            (quoting.as_slice(), under("demand"), under("limit"))
        {
            if is_ratio_of(ratio, demand, limit) {
                confirmed.extend([(row_at, *at), (row_at, *limit_at)]);
            } else {
                find(format!("the ratio of {demand} and {limit}"), format!("`{ratio}`"));
            }
        }
        let verdict = (0..row.cells.len()).find(|at| heading(*at) == "verdict").and_then(|at| said(&row.cells[at]));
        // What was not checked as a whole has no ratio, though a part of it was worked.
        let has_no_ratio = verdict == Some(Said::NotChecked) && quoting.is_empty();
        if let Some(step) = named
            && !numbers.is_empty()
            && !has_no_ratio
        {
            let same = |(_, number): &(usize, PrintedNumber)| number.prints_as(&step.result);
            let is_quoted = if quoting.is_empty() { numbers.iter().any(same) } else { quoting.iter().all(|n| same(n)) };
            if is_quoted {
                coverage.quotes += 1;
                confirmed.extend(numbers.iter().filter(|n| same(n)).map(|(at, _)| (row_at, *at)));
            } else {
                let found = quoting.first().map_or("none of that kind".into(), |(_, number)| format!("`{number}`"));
                find(format!("`{}`, the result of step {}", step.result, step.number), found);
            }
        }
        let Some(verdict) = verdict else { continue };
        match (named.and_then(|step| step.comparison.as_ref().map(|c| (step, c))), quoting.as_slice()) {
            (Some((step, comparison)), _) if !verdict.suits(comparison.ok) => {
                find(format!("the verdict of step {}", step.number), format!("`{}`", verdict.words()));
            }
            (None, [(_, ratio)]) if ratio.unit.text.is_empty() && !verdict.suits(ratio.printed.value() <= 1.0) => {
                find(format!("the verdict that {ratio} has"), format!("`{}`", verdict.words()));
            }
            _ => {}
        }
    }
}

/// Whether a ratio is that of demand to limit, or of limit to demand where the limit must be reached, as far as the
/// rounding of the three allows.
fn is_ratio_of(ratio: &PrintedNumber, demand: &PrintedNumber, limit: &PrintedNumber) -> bool {
    let is_signed = [ratio, demand, limit].iter().any(|number| number.printed.is_negative());
    if is_signed || demand.unit.dimension != limit.unit.dimension {
        return false;
    }
    let rounding = |number: &PrintedNumber| {
        let half = 0.5 * number.printed.unit_of_last_place();
        half / number.printed.value().abs().max(half)
    };
    let found = ratio.printed.value();
    let slack = (rounding(demand) + rounding(limit)) * (1.0 + rounding(demand) + rounding(limit));
    let agrees = |quotient: f64| {
        (quotient.abs() - found).abs() <= quotient.abs() * slack + ratio.printed.unit_of_last_place() * (1.0 + DUST)
    };
    agrees(demand.si() / limit.si()) || agrees(limit.si() / demand.si())
}

/// A row named `total` or `sum` is the sum of the rows above it, down from the total before.
fn check_totals(table: &PrintedTable, confirmed: &mut BTreeSet<(usize, usize)>, findings: &mut Vec<Finding>) {
    let mut start = 0;
    for (row_at, row) in table.rows.iter().enumerate() {
        if !["total", "sum"].contains(&row.name.to_lowercase().as_str()) {
            continue;
        }
        for column_at in 0..row.cells.len() {
            let Some(total) = table.number(row_at, column_at) else { continue };
            let above = start..row_at;
            let parts: Vec<_> = above.clone().filter_map(|at| table.number(at, column_at)).collect();
            let blank = above.filter(|at| table.rows[*at].cells.get(column_at).is_none_or(String::is_empty)).count();
            if parts.is_empty() || parts.len() + blank < row_at - start {
                continue;
            }
            let sum: f64 = parts.iter().map(|part| part.printed.value()).sum();
            let unit = parts.iter().chain([&total]).map(|n| n.printed.unit_of_last_place()).fold(0.0, f64::max);
            // Not a number fails here as well.
            let is_close = (sum - total.printed.value()).abs() <= unit * (1.0 + DUST);
            if is_close {
                confirmed.extend(
                    (start..=row_at).map(|at| (at, column_at)).filter(|(at, _)| table.number(*at, column_at).is_some()),
                );
            } else {
                let symbol = &table.columns.get(column_at).map_or("", |(symbol, _)| symbol);
                let expected = format!("{sum} for the {} of {symbol}", row.name);
                findings.push(Finding::at(row.line, expected, format!("`{total}`")));
            }
        }
        start = row_at + 1;
    }
}
