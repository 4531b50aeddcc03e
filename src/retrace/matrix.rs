//! The overview of what was compared against the list of comparisons: the worst ratio of each kind, and its verdict.
use super::Finding;
use super::package::Package;
use super::table::PrintedTable;
use super::verdict::{Said, said};
use crate::formula::{PrintedNumber, parse_printed};

/// Heading of the first column of the overview.
const HEAD: &str = "subject, combination";
/// This share of a last place is binary dust.
const DUST: f64 = 1e-6;

/// A row of the list of comparisons.
struct Listed<'p> {
    subject: &'p str,
    check: &'p str,
    combination: &'p str,
    ratio: Option<PrintedNumber>,
    said: Option<Said>,
}

/// Compares the overview with the list, where the package holds both.
pub(super) fn check(package: &Package, findings: &mut Vec<Finding>) {
    let Some(listed) = package.tables.iter().find_map(list) else { return };
    for table in package.tables.iter().filter(|table| table.head.to_lowercase() == HEAD) {
        for row in &table.rows {
            let Some((subject, combination)) = row.name.rsplit_once(", ") else {
                findings.push(Finding::at(row.line, "a subject and a combination", format!("`{}`", row.name)));
                continue;
            };
            for ((kind, _), cell) in table.columns.iter().zip(&row.cells) {
                let here = listed.iter().filter(|listed| {
                    let is_kind = listed.check == kind || listed.check.starts_with(&format!("{kind}."));
                    is_kind && listed.subject == subject && listed.combination == combination
                });
                let here: Vec<&Listed<'_>> = here.collect();
                if let Some(expected) = contradicts(cell, &here) {
                    findings.push(Finding::at(
                        row.line,
                        format!("{expected} for {kind}, as in the list"),
                        format!("`{cell}`"),
                    ));
                }
            }
        }
        let is_missing = |listed: &&Listed<'_>| {
            let name = format!("{}, {}", listed.subject, listed.combination);
            !table.rows.iter().any(|row| row.name == name)
        };
        if let Some(missing) = listed.iter().find(is_missing) {
            let expected = format!("a row for {}, {}, which the list compares", missing.subject, missing.combination);
            findings.push(Finding::at(table.line, expected, "none"));
        }
    }
}

fn list(table: &PrintedTable) -> Option<Vec<Listed<'_>>> {
    let column = |name: &str| table.columns.iter().position(|(symbol, _)| symbol.to_lowercase() == name);
    let (check, combination, ratio, verdict) =
        (column("check")?, column("combination")?, column("ratio")?, column("verdict")?);
    let rows = table.rows.iter().enumerate().filter_map(|(at, row)| {
        Some(Listed {
            subject: &row.name,
            check: row.cells.get(check)?,
            combination: row.cells.get(combination)?,
            ratio: table.number(at, ratio),
            said: said(row.cells.get(verdict)?),
        })
    });
    Some(rows.collect())
}

/// What a cell should say, where it says something else.
fn contradicts(cell: &str, listed: &[&Listed<'_>]) -> Option<String> {
    let number = cell.split(' ').next().and_then(|word| parse_printed(word).ok());
    let verdict = said(cell);
    if listed.is_empty() {
        let is_compared = number.is_some() || matches!(verdict, Some(Said::Within | Said::Beyond));
        return is_compared.then(|| "no comparison".into());
    }
    let ratios = listed.iter().filter_map(|listed| listed.ratio.as_ref());
    let worst = ratios.max_by(|a, b| a.si().total_cmp(&b.si()));
    let agrees = match (&number, worst) {
        // Both are rounded up, so either may be the greater by less than a unit of its last place.
        (Some(number), Some(worst)) => {
            let (unit, unit_of_worst) = (number.printed.unit_of_last_place(), worst.printed.unit_of_last_place());
            let above = number.si() - worst.si();
            -unit_of_worst * (1.0 + DUST) < above && above < unit * (1.0 + DUST)
        }
        (None, None) => true,
        _ => false,
    };
    let is_beyond = listed.iter().any(|listed| listed.said == Some(Said::Beyond));
    let is_said = listed.iter().any(|listed| listed.said == verdict) && (!is_beyond || verdict == Some(Said::Beyond));
    if agrees && is_said {
        return None;
    }
    let worst = worst.map_or("no ratio".into(), |worst| worst.to_string());
    let words: Vec<&str> = listed.iter().map(|listed| listed.said.map_or("nothing", Said::words)).collect();
    Some(format!("{worst} and {}", words.join(", ")))
}
