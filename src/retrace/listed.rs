//! What the package says of its own steps: words, symbol and method of each kind in the list of what to look at, and how
//! many steps and tables there are.
//!
//! No arithmetic shows a changed word, a renamed result or a step that is gone, so the package says these twice.
use super::Finding;
use super::package::Package;
use super::step::PrintedStep;
use super::table::PrintedTable;
use std::collections::{BTreeMap, BTreeSet};

/// Heading of the column that says what a listed step is.
const WHAT: &str = "what it is";

/// Heading of the column that lists steps by their subject.
const LISTED: &str = "steps to confirm";

/// Compares the steps with what is said of them.
pub(super) fn check(package: &Package, findings: &mut Vec<Finding>) {
    let steps: BTreeMap<&str, &PrintedStep> = package.steps.iter().map(|step| (step.number.as_str(), step)).collect();
    let mut listed = BTreeSet::new();
    for table in &package.tables {
        let Some(column) = table.columns.iter().position(|(symbol, _)| symbol.to_lowercase() == WHAT) else { continue };
        for row in &table.rows {
            let (Some(step), Some(said)) = (steps.get(row.name.as_str()), row.cells.get(column)) else { continue };
            let expected = what_it_is(step);
            if *said != expected {
                findings.push(Finding::at(
                    row.line,
                    format!("`{expected}`, as in step {}", step.number),
                    format!("`{said}`"),
                ));
            }
            listed.insert(said.as_str());
        }
    }
    if !listed.is_empty() {
        for step in &package.steps {
            let what = what_it_is(step);
            if !listed.contains(what.as_str()) {
                let expected = "words, symbol and method of a kind of step in the list of what to look at";
                findings.push(Finding::of(&step.number, step.line, expected, format!("`{what}`")));
            }
        }
    }
    for table in &package.tables {
        check_subjects(&steps, table, findings);
    }
    for table in package.tables.iter().filter(|table| table.head.to_lowercase().ends_with("package holds")) {
        check_counts(package, table, findings);
    }
}

/// Steps listed by subject: every number with its subject is a step.
fn check_subjects(steps: &BTreeMap<&str, &PrintedStep>, table: &PrintedTable, findings: &mut Vec<Finding>) {
    let Some(column) = table.columns.iter().position(|(symbol, _)| symbol.to_lowercase() == LISTED) else { return };
    for row in &table.rows {
        let cell = row.cells.get(column).map_or("", String::as_str);
        for entry in cell.split(" · ") {
            let number = entry.strip_prefix('[').and_then(|entry| entry.split(']').next()).unwrap_or(entry);
            if !steps.contains_key(format!("{}.{number}", row.name).as_str()) {
                let expected = format!("steps of {} that stand in the package", row.name);
                findings.push(Finding::at(row.line, expected, format!("`{number}`")));
            }
        }
    }
}

/// Words, symbol and method in one cell.
fn what_it_is(step: &PrintedStep) -> String {
    let by = if step.by.is_empty() { String::new() } else { format!(" ({})", step.by) };
    format!("{}, {}{by}", step.title, step.symbol.as_str())
}

/// A table `This package holds` counts steps and tables.
fn check_counts(package: &Package, table: &PrintedTable, findings: &mut Vec<Finding>) {
    for (row_at, row) in table.rows.iter().enumerate() {
        let name = row.name.to_lowercase();
        let there = if name.starts_with("step") {
            package.steps.len() + package.unread_steps
        } else if name.starts_with("table") {
            package.tables.iter().filter(|table| table.id.is_some()).count()
        } else {
            continue;
        };
        let said = table.number(row_at, 0).map(|number| number.to_string());
        if said.as_deref() != Some(there.to_string().as_str()) {
            let found = said.unwrap_or_else(|| row.cells.join(" "));
            findings.push(Finding::at(
                row.line,
                format!("{there} for `{}`, so many there are", row.name),
                format!("`{found}`"),
            ));
        }
    }
}
