//! The confirmation of a whole package.
use super::package::Package;
use super::report::{Coverage, Report};
use super::table::PrintedTable;
use super::trace::{Addresses, Cell};
use super::{closing, fingerprint, input, listed, matrix, naming, quote, results, verdict};
use crate::diagnostic::Source;
use std::collections::BTreeSet;

/// Confirms every line of a package; with the input at hand also that the package belongs to it.
///
/// A step closes when its printed operands, with their units, give the printed result within 1 unit of its last place;
/// a millionth of that unit and 1e-13 of the result are left to binary arithmetic. What cannot be confirmed is a
/// finding: nothing is passed over in silence but prose, whose numbers are counted.
#[must_use]
pub fn confirm(package: &Package, input_at_hand: Option<&str>) -> Report {
    let mut findings = package.faults.clone();
    let mut remarks = package.remarks.clone();
    let mut coverage = Coverage {
        steps: package.steps.len() + package.unread_steps,
        loose_numbers: package.loose_numbers,
        ..Coverage::default()
    };
    let source = package.echo.as_ref().map(|echo| Source::new(&echo.text));
    let mut addresses = Addresses::new(package, source.as_ref(), &mut findings);
    let typed = package.echo.as_ref().map_or(Vec::new(), |echo| echo.numbers());
    let is_input = |number: f64| typed.binary_search_by(|known| known.total_cmp(&number)).is_ok();
    for step in &package.steps {
        let operands = closing::check(step, &is_input, &mut findings);
        coverage.operands += step.from.len();
        coverage.operands_traced += addresses.trace(step, &operands, &mut findings);
    }
    addresses.chains(&mut findings, &mut coverage);
    let mut confirmed = addresses.drawn_cells().clone();
    listed::check(package, &mut findings);
    naming::check_symbols(package, &mut findings);
    naming::check_combinations(package, &mut findings);
    naming::check_cells(package, &mut confirmed, &mut findings);
    input::check(package, source.as_ref(), &mut confirmed, &mut findings);
    matrix::check(package, &mut findings);
    results::check(package, &mut confirmed, &mut findings);
    quote::check(package, &mut confirmed, &mut findings, &mut coverage);
    coverage.table_numbers_confirmed = confirmed.len();
    coverage.open_tables = open_tables(package, &confirmed);
    verdict::check(package, &mut findings, &mut remarks, &mut coverage);
    fingerprint::check(package, input_at_hand, &mut findings);
    findings.sort();
    findings.dedup();
    let faulty: BTreeSet<&str> = findings.iter().filter_map(|finding| finding.step.as_deref()).collect();
    coverage.steps_confirmed = package.steps.iter().filter(|step| !faulty.contains(step.number.as_str())).count();
    Report { findings, remarks, coverage }
}

/// Tables with an id that hold numbers which nothing confirmed, with how many.
fn open_tables(package: &Package, confirmed: &BTreeSet<Cell>) -> Vec<(String, usize)> {
    let open = |at: usize, table: &PrintedTable| {
        let cells = (0..table.rows.len()).flat_map(|row| (0..table.columns.len()).map(move |column| (row, column)));
        cells
            .filter(|&(row, column)| table.number(row, column).is_some() && !confirmed.contains(&(at, row, column)))
            .count()
    };
    let tables = package.tables.iter().enumerate();
    tables
        .filter_map(|(at, table)| Some((table.id.clone()?, open(at, table))))
        .filter(|(_, count)| *count > 0)
        .collect()
}
