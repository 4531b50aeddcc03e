//! A table as printed.
use super::markdown::{Line, cells, words};
use crate::formula::{PrintedNumber, parse_printed, parse_printed_unit};
use crate::units::Unit;

/// A table as printed.
#[derive(Debug, Clone, PartialEq)]
pub struct PrintedTable {
    /// Its id, where a line `Table <id>` stands before it.
    pub id: Option<String>,
    /// The line of its head.
    pub line: usize,
    /// Heading of the first column.
    pub head: String,
    /// Symbol and unit of each column but the first; a column of words has no unit either.
    pub columns: Vec<(String, Unit)>,
    /// Its rows.
    pub rows: Vec<PrintedRow>,
}

/// A row.
#[derive(Debug, Clone, PartialEq)]
pub struct PrintedRow {
    /// Its line.
    pub line: usize,
    /// Its name, the first cell.
    pub name: String,
    /// The other cells as words, one a column where the row is complete.
    pub cells: Vec<String>,
}

impl PrintedTable {
    pub(super) fn read(before: Option<Line<'_>>, head: Line<'_>, rows: &[Line<'_>]) -> Self {
        let mut headings = cells(head.text).into_iter();
        let first = headings.next().unwrap_or_default();
        let columns = headings.map(|heading| column(&heading)).collect();
        let rows = rows
            .iter()
            .map(|line| {
                let mut cells = cells(line.text).into_iter();
                PrintedRow { line: line.number, name: cells.next().unwrap_or_default(), cells: cells.collect() }
            })
            .collect();
        Self { id: before.and_then(|line| id(line.text)), line: head.number, head: first, columns, rows }
    }

    /// The number in a cell, with its own unit or the column's; `None` where no number stands.
    #[must_use]
    pub fn number(&self, row: usize, column: usize) -> Option<PrintedNumber> {
        let number = parse_printed(self.rows.get(row)?.cells.get(column)?).ok()?;
        let (_, unit) = self.columns.get(column)?;
        Some(if number.unit.text.is_empty() { PrintedNumber { unit: unit.clone(), ..number } } else { number })
    }
}

/// The id in a line such as `**Table C1.U** Node displacements`.
fn id(line: &str) -> Option<String> {
    let line = words(line);
    let mut parts = line.split_whitespace();
    (parts.next() == Some("Table")).then(|| parts.next().map(str::to_owned)).flatten()
}

fn column(heading: &str) -> (String, Unit) {
    match heading.rsplit_once(", ").map(|(symbol, unit)| (symbol, parse_printed_unit(unit))) {
        Some((symbol, Ok(unit))) => (symbol.to_owned(), unit),
        _ => (heading.to_owned(), Unit::none()),
    }
}
