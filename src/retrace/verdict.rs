//! The verdict on the cover against the comparisons: the governing ratio, the counts.
use super::Finding;
use super::closing::is_one;
use super::package::Package;
use super::report::Coverage;
use super::step::PrintedStep;
use super::table::PrintedTable;
use crate::formula::{PrintedNumber, parse_printed};
use std::collections::{BTreeMap, BTreeSet};

/// What words say of a comparison.
#[derive(Debug, Clone, Copy, PartialEq, Eq)]
pub(super) enum Said {
    Within,
    Beyond,
    NotChecked,
}

impl Said {
    /// Whether it may be said of a step with that verdict: a limit kept may be called not checked, as where it is one
    /// part of a check; one not kept may not.
    pub(super) fn suits(self, ok: bool) -> bool {
        match self {
            Self::Within => ok,
            Self::Beyond => !ok,
            Self::NotChecked => ok,
        }
    }

    /// In words.
    pub(super) fn words(self) -> &'static str {
        match self {
            Self::Within => "OK",
            Self::Beyond => "NOT OK",
            Self::NotChecked => "NOT CHECKED",
        }
    }
}

/// What is said first in some words of a limit being kept; `None` where nothing is.
pub(super) fn said(text: &str) -> Option<Said> {
    let text = text.to_lowercase();
    let mut words = text.split(|c: char| !c.is_alphanumeric()).filter(|word| !word.is_empty()).peekable();
    while let Some(word) = words.next() {
        match (word, words.peek()) {
            ("not", Some(&"ok")) | ("beyond", _) => return Some(Said::Beyond),
            ("not", Some(&"checked")) => return Some(Said::NotChecked),
            ("ok" | "within", _) => return Some(Said::Within),
            _ => {}
        }
    }
    None
}

/// Compares the verdict with the steps and with the tables of comparisons.
pub(super) fn check(
    package: &Package,
    findings: &mut Vec<Finding>,
    remarks: &mut Vec<String>,
    coverage: &mut Coverage,
) {
    if package.governing.is_none() && package.steps.iter().any(|step| step.comparison.is_some()) {
        remarks.push("no line begins with `Governing:`, so the verdict was not compared with the steps".into());
    }
    let summary = package.tables.iter().filter(|table| verdict_column(table).is_some()).max_by_key(|t| t.rows.len());
    check_governing(package, findings, coverage);
    check_counts(package, summary, findings);
}

fn verdict_column(table: &PrintedTable) -> Option<usize> {
    table.columns.iter().position(|(symbol, _)| symbol.to_lowercase() == "verdict")
}

/// A line `Governing:` prints the ratio and the verdict of the step it names, and none is greater.
fn check_governing(package: &Package, findings: &mut Vec<Finding>, coverage: &mut Coverage) {
    let compared: BTreeMap<&str, &PrintedStep> = package
        .steps
        .iter()
        .filter(|step| step.comparison.is_some())
        .map(|step| (step.number.as_str(), step))
        .collect();
    let parts = parts_of_unchecked(package);
    let utilisations = package.steps.iter().filter(|step| {
        step.comparison.as_ref().is_some_and(|c| c.is_at_most == c.ok && is_one(&c.limit))
            && !parts.contains(step.number.as_str())
    });
    let largest = utilisations.max_by(|a, b| a.result.si().total_cmp(&b.result.si()));
    if let Some((line, text)) = &package.governing {
        let tokens = || text.split_whitespace().map(|t| t.trim_matches(|c: char| !c.is_alphanumeric() && c != '−'));
        let numbers: Vec<PrintedNumber> = tokens().filter_map(|token| parse_printed(token).ok()).collect();
        let named = tokens().find_map(|token| compared.get(token).copied());
        let Some(step) = named else {
            // Without a step the ratio is that of a member that stands in the tables: none that is worked may be greater.
            if let Some(largest) = largest
                && !numbers.iter().any(|number| number.si() >= largest.result.si())
            {
                let expected =
                    format!("`{}` of step {}, the largest, or a greater one", largest.result, largest.number);
                let found = numbers.last().map_or("no number".into(), |number| format!("`{number}`"));
                findings.push(Finding::at(*line, expected, found));
            }
            return;
        };
        if !numbers.iter().any(|number| number.prints_as(&step.result)) {
            let found = numbers.last().map_or("no number".into(), |number| format!("`{number}`"));
            findings.push(Finding::at(*line, format!("`{}`, the result of step {}", step.result, step.number), found));
        } else {
            coverage.quotes += 1;
        }
        let ok = step.comparison.as_ref().is_none_or(|comparison| comparison.ok);
        let after = text.split_once(',').map_or("", |(_, after)| after);
        match said(after) {
            Some(said) if said.suits(ok) => {}
            found => {
                let found = found.map_or("no verdict", Said::words);
                findings.push(Finding::at(*line, if ok { "`OK`" } else { "`NOT OK`" }, found));
            }
        }
        if let Some(largest) = largest
            && largest.result.si() > step.result.si()
        {
            let expected = format!("`{}` of step {}, the largest", largest.result, largest.number);
            findings.push(Finding::at(*line, expected, format!("`{}`", step.result)));
        }
    }
}

/// Steps in rows that say a check was not made as a whole: they cannot govern.
fn parts_of_unchecked(package: &Package) -> BTreeSet<&str> {
    let mut parts = BTreeSet::new();
    for table in &package.tables {
        let Some(column) = verdict_column(table) else { continue };
        let open =
            table.rows.iter().filter(|row| row.cells.get(column).is_some_and(|c| said(c) == Some(Said::NotChecked)));
        parts.extend(open.flat_map(|row| &row.cells).map(String::as_str));
    }
    parts
}

/// Counts `Within …`, `Beyond …`, `Not checked` in a table against the rows of the largest table with a verdict, or
/// against the steps where there is none.
fn check_counts(package: &Package, summary: Option<&PrintedTable>, findings: &mut Vec<Finding>) {
    let (mut within, mut beyond, mut not_checked) = (0_i64, 0_i64, None);
    match summary.and_then(|table| verdict_column(table).map(|column| (table, column))) {
        Some((table, column)) => {
            let mut open = 0_i64;
            for cell in table.rows.iter().filter_map(|row| row.cells.get(column)) {
                match said(cell) {
                    Some(Said::Within) => within += 1,
                    Some(Said::Beyond) => beyond += 1,
                    Some(Said::NotChecked) | None => open += 1,
                }
            }
            not_checked = Some(open);
        }
        None => {
            for comparison in package.steps.iter().filter_map(|step| step.comparison.as_ref()) {
                *(if comparison.ok { &mut within } else { &mut beyond }) += 1;
            }
        }
    }
    let any_step_beyond = package.steps.iter().any(|step| step.comparison.as_ref().is_some_and(|c| !c.ok));
    for table in package.tables.iter().filter(|table| table.columns.len() == 1) {
        for (row_at, row) in table.rows.iter().enumerate() {
            let name = row.name.to_lowercase();
            let Some(count) = table.number(row_at, 0).filter(|n| n.printed.place == 0 && n.unit.text.is_empty()) else {
                continue;
            };
            let count = count.printed.count;
            let expected = if name.starts_with("within") {
                Some(within)
            } else if name.starts_with("beyond") {
                Some(beyond)
            } else if name.starts_with("not checked") {
                not_checked
            } else {
                None
            };
            if let Some(expected) = expected.filter(|expected| *expected != count) {
                findings.push(Finding::at(row.line, format!("{expected} for `{}`", row.name), count.to_string()));
            }
            if name.starts_with("beyond") && any_step_beyond && count == 0 {
                findings.push(Finding::at(
                    row.line,
                    "a count of what is beyond its limit",
                    "0, though a step says NOT OK",
                ));
            }
        }
    }
}
