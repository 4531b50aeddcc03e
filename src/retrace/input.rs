//! The tables of the input against the input as printed: every cell says what was typed.
//!
//! Knows where the language keeps what the tables show, and nothing else of it. A cell for which nothing was typed, such
//! as a value by default, is left to the steps that draw on it.
use super::Finding;
use super::package::Package;
use super::table::PrintedTable;
use super::trace::Cell;
use super::typed::{is_same, quantity, text};
use crate::diagnostic::{Address, Content, Entry, Source};
use crate::formula::PrintedNumber;
use crate::units::{Dimension, Quantity, STANDARD_GRAVITY};
use std::collections::BTreeSet;

/// Tables whose rows are the entries of one block of the input, all of them.
const WHOLE_BLOCKS: &[(&str, &str)] =
    &[("INPUT.nodes", "nodes"), ("INPUT.members", "members"), ("INPUT.supports", "supports")];

/// Compares every table whose id begins with `INPUT`.
pub(super) fn check(
    package: &Package,
    input: Option<&Source>,
    confirmed: &mut BTreeSet<Cell>,
    findings: &mut Vec<Finding>,
) {
    let Some(input) = input.filter(|input| input.faults().is_empty()) else { return };
    for (table_at, table) in package.tables.iter().enumerate() {
        let Some(id) = table.id.as_deref() else { continue };
        let block = WHOLE_BLOCKS.iter().find(|(known, _)| *known == id);
        if let Some(entries) = block.and_then(|(_, block)| entries(input, block)) {
            check_rows(table, entries, findings);
        }
        for (row_at, row) in table.rows.iter().enumerate() {
            for (column_at, (column, _)) in table.columns.iter().enumerate() {
                let paths = paths(id, &row.name, column);
                let Some(typed) = paths.iter().find_map(|path| text(input, &Address::parse(path))) else { continue };
                let Some(cell) = row.cells.get(column_at) else { continue };
                match compare(column, cell, typed, table.number(row_at, column_at)) {
                    Compared::Same => {
                        confirmed.insert((table_at, row_at, column_at));
                    }
                    Compared::Different => {
                        let expected = format!("`{typed}` for {column}, as in the input");
                        findings.push(Finding::at(row.line, expected, format!("`{cell}`")));
                    }
                    Compared::Unknown => {}
                }
            }
        }
    }
}

/// What holding a cell against what was typed shows.
enum Compared {
    Same,
    Different,
    /// Words of another kind, or nothing where nothing need stand.
    Unknown,
}

fn compare(column: &str, cell: &str, typed: &str, number: Option<PrintedNumber>) -> Compared {
    let judged = |is_same| if is_same { Compared::Same } else { Compared::Different };
    let said = if typed == "true" { Some(ONE) } else { quantity(typed) };
    if WORDS.contains(&column) && !said.is_some_and(|said| said.has_unit) {
        return match (cell == typed, number) {
            (true, None) => Compared::Unknown,
            (is_same, _) => judged(is_same),
        };
    }
    let may_be_left_out = || {
        said.is_none_or(|said| said.value.abs() <= 0.0)
            || column.starts_with("in_plane")
            || column.starts_with("out_of_plane")
    };
    match (number, said) {
        // Places on a member may be typed as shares of its length.
        (Some(_), Some(_)) if typed.ends_with('%') => Compared::Unknown,
        (Some(number), Some(said)) => judged(is_same(&as_mass(said), &number)),
        (Some(_), None) => Compared::Different,
        (None, _) if cell.is_empty() && may_be_left_out() => Compared::Unknown,
        (None, said) => said.map_or(Compared::Unknown, |_| Compared::Different),
    }
}

/// `true` where a factor may stand.
const ONE: Quantity = Quantity { value: 1.0, dimension: Dimension::NONE, has_unit: false };

/// A density typed as a force per volume, divided by standard gravity.
fn as_mass(said: Quantity) -> Quantity {
    if said.dimension == Dimension::WEIGHT_DENSITY {
        Quantity { value: said.value / STANDARD_GRAVITY, dimension: Dimension::DENSITY, ..said }
    } else {
        said
    }
}

/// Columns of words that stand in the input under a key of that name.
const WORDS: &[&str] = &["kind", "from", "to", "section", "material", "hinge", "source", "node", "dir", "per"];

fn entries<'s>(input: &'s Source, block: &str) -> Option<&'s [Entry]> {
    let Content::Map(blocks) = &input.root()?.content else { return None };
    match &blocks.iter().find(|entry| entry.key == block)?.value.content {
        Content::Map(entries) => Some(entries),
        _ => None,
    }
}

/// Every entry has its row, every row its entry.
fn check_rows(table: &PrintedTable, entries: &[Entry], findings: &mut Vec<Finding>) {
    for entry in entries.iter().filter(|entry| !table.rows.iter().any(|row| row.name == entry.key)) {
        findings.push(Finding::at(table.line, format!("a row for `{}` of the input", entry.key), "none"));
    }
    for row in table.rows.iter().filter(|row| !entries.iter().any(|entry| entry.key == row.name)) {
        findings.push(Finding::at(row.line, "a name of the input", format!("`{}`", row.name)));
    }
}

/// Where the input may hold what a cell shows, the likeliest first.
fn paths(id: &str, row: &str, column: &str) -> Vec<String> {
    let mut parts = id.split('.');
    if parts.next() != Some("INPUT") {
        return Vec::new();
    }
    // Rows of lists count from 1, places from 0; `2.BC` is what entry 2 lays on BC.
    let place = row.split('.').next().and_then(|entry| entry.parse::<usize>().ok()?.checked_sub(1));
    let limits = ["tension", "compression", "shear"];
    match (parts.next().unwrap_or_default(), parts.next(), parts.next()) {
        ("nodes", None, _) => vec![format!("nodes.{row}.{column}")],
        ("supports", None, _) => match column.strip_prefix("spring_") {
            Some(direction) => vec![format!("supports.{row}.spring.{direction}")],
            None => vec![format!("supports.{row}.{column}")],
        },
        ("members", None, _) if limits.contains(&column) => vec![format!("members.{row}.allowable.{column}")],
        ("members", None, _) => match column.trim_end_matches("_length") {
            plane @ ("in_plane" | "out_of_plane") => vec![format!("members.{row}.effective_length.{plane}")],
            _ => vec![format!("members.{row}.{column}")],
        },
        ("materials", None, _) if limits.contains(&column) || column == "source" => {
            vec![format!("materials.{row}.allowable.{column}")]
        }
        ("materials", None, _) => vec![format!("materials.{row}.{column}")],
        ("sections", Some(_), None) => vec![format!("sections.{row}.{column}")],
        ("plates", Some(section), None) => {
            place.map(|at| format!("sections.{section}.plates[{at}].{column}")).into_iter().collect()
        }
        ("gravity", None, _) => vec!["gravity".into()],
        ("combinations", None, _) if !["for", "title"].contains(&column) => {
            vec![format!("combinations.{row}.factors.{column}")]
        }
        ("checks", None, _) if column == "limit" => vec![format!("checks.{row}")],
        ("checks", None, _) => vec![format!("checks.{row}.{column}")],
        ("loads", Some(case), Some("weight")) => vec![format!("load_cases.{case}.self_weight")],
        ("loads", Some(case), Some(kind)) => {
            let Some(at) = place else { return Vec::new() };
            let keys: &[&str] = match (kind, column) {
                ("settlements", "node") => &["settle"],
                (_, "node") => &["at"],
                ("lines", "w_1") => &["w", "w[0]"],
                ("lines", "w_2") => &["w[1]"],
                ("lines", "from") => &["over[0]"],
                ("lines", "to") => &["over[1]"],
                ("warming", "top") => &["warm.top", "warm"],
                ("warming", "bottom") => &["warm.bottom", "warm"],
                (_, column) => &[column],
            };
            keys.iter().map(|key| format!("load_cases.{case}.loads[{at}].{key}")).collect()
        }
        _ => Vec::new(),
    }
}
