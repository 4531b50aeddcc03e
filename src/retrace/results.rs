//! Tables of results against the steps that give them: reactions, audit of loads, largest stresses.
//!
//! Cells for which no step of the package speaks, as of members that are not worked, stay unconfirmed.
use super::Finding;
use super::package::Package;
use super::step::PrintedStep;
use super::table::PrintedTable;
use super::trace::Cell;
use crate::formula::PrintedNumber;
use crate::units::Dimension;
use std::collections::{BTreeMap, BTreeSet};

/// Two printed values agree within one unit of the coarser last place; this much more is binary dust.
const DUST: f64 = 1e-6;
/// Rows of the audit of loads and the first number of their steps, which run through x, y and moment.
const AUDIT: &[(&str, usize)] = &[("asked", 1), ("returned", 11), ("left over", 21)];

/// Compares the tables `<combination>.R`, `.A` and `.Q`.
pub(super) fn check(package: &Package, confirmed: &mut BTreeSet<Cell>, findings: &mut Vec<Finding>) {
    let mut steps: BTreeMap<&str, Vec<&PrintedStep>> = BTreeMap::new();
    for step in &package.steps {
        steps.entry(step.number.rsplit_once('.').map_or("", |(owner, _)| owner)).or_default().push(step);
    }
    for (table_at, table) in package.tables.iter().enumerate() {
        let Some((combination, kind)) = table.id.as_deref().and_then(|id| id.rsplit_once('.')) else { continue };
        let of = |subject: &str| steps.get(format!("{subject}.{combination}").as_str()).map_or(&[][..], Vec::as_slice);
        for (row_at, row) in table.rows.iter().enumerate() {
            for (column_at, (column, _)) in table.columns.iter().enumerate() {
                let number = table.number(row_at, column_at);
                let there = match kind {
                    "R" => named(of(&row.name), &format!("R_{column}")),
                    "A" => audited(of("structure"), &row.name, column),
                    "Q" => largest(of(&row.name), table, row_at, column),
                    _ => None,
                };
                let Some(step) = there else { continue };
                if number.is_some_and(|number| agree(&step.result, &number)) {
                    confirmed.insert((table_at, row_at, column_at));
                } else {
                    let expected = format!("`{}`, {column} of step {}", step.result, step.number);
                    let found = row.cells.get(column_at).map_or("", String::as_str);
                    findings.push(Finding::at(row.line, expected, format!("`{found}`")));
                }
            }
        }
    }
}

fn named<'p>(steps: &[&'p PrintedStep], symbol: &str) -> Option<&'p PrintedStep> {
    steps.iter().copied().find(|step| step.symbol.as_str() == symbol)
}

fn audited<'p>(steps: &[&'p PrintedStep], row: &str, column: &str) -> Option<&'p PrintedStep> {
    let (_, first) = AUDIT.iter().find(|(known, _)| *known == row)?;
    let direction = ["x", "y", "m"].iter().position(|known| column.rsplit('_').next() == Some(known))?;
    let last = format!(".R{:02}", first + direction);
    steps.iter().copied().find(|step| step.number.ends_with(&last))
}

/// The step of a whole stress, at an end or between, with the algebraically largest, or smallest, stress along a member that is worked.
fn largest<'p>(steps: &[&'p PrintedStep], table: &PrintedTable, row: usize, column: &str) -> Option<&'p PrintedStep> {
    let worked = table.columns.iter().position(|(symbol, _)| symbol == "worked")?;
    table.rows[row].cells.get(worked).filter(|word| *word == "yes")?;
    let stresses = steps.iter().copied().filter(|step| {
        step.result.unit.dimension == Dimension::STRESS
            && step.symbol.as_str().starts_with('σ')
            && step.number.rsplit('.').next().is_some_and(|last| last.starts_with("S0") || last.starts_with('X'))
    });
    let by_size = |a: &&PrintedStep, b: &&PrintedStep| a.result.si().total_cmp(&b.result.si());
    match column {
        "σ_ten" => stresses.max_by(by_size),
        "σ_com" => stresses.min_by(by_size),
        _ => None,
    }
}

/// Whether two printed values agree within one unit of the coarser last place.
pub(super) fn agree(one: &PrintedNumber, other: &PrintedNumber) -> bool {
    let size = |n: &PrintedNumber| n.printed.unit_of_last_place() * n.unit.scale;
    one.unit.dimension == other.unit.dimension
        && (one.si() - other.si()).abs() <= size(one).max(size(other)) * (1.0 + DUST)
}
