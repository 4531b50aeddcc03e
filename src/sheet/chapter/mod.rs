//! Tables of the sheet, one file a chapter.
mod blank;
mod comparison;
mod input;
mod result;

pub use comparison::{quantity_text, ratio_text, sorted_checks};
pub use input::kind_word;

use super::{Cell, Column, Recording, Results, Row, Table};
use crate::analysis::Solution;
use crate::formula::{Value, Worksheet};
use crate::model::Model;
use crate::units::Measure;
use crate::work::CombinationWork;
use std::fmt;

/// Every table, in the order of the package.
pub(super) fn tables(
    model: &Model,
    solution: &Solution,
    results: &Results,
    worked: &[CombinationWork],
    sheet: &mut Recording<'_>,
) -> Vec<Table> {
    let mut tables = input::tables(model, sheet);
    tables.extend(result::tables(model, solution, results, worked, sheet));
    tables
}

/// The input's tables and blank tables of results.
pub(super) fn brief_tables(model: &Model, sheet: &mut Recording<'_>) -> Vec<Table> {
    let mut tables = input::tables(model, sheet);
    tables.extend(blank::tables(model, sheet));
    tables
}

/// A table under construction: columns that turn out empty are left away.
struct Builder {
    id: String,
    title: String,
    head: &'static str,
    columns: Vec<(String, Option<Measure>)>,
    rows: Vec<Row>,
    note: Option<String>,
}

impl Builder {
    fn new(id: impl Into<String>, title: impl Into<String>, head: &'static str) -> Self {
        Self { id: id.into(), title: title.into(), head, columns: Vec::new(), rows: Vec::new(), note: None }
    }

    fn column(mut self, symbol: impl Into<String>, measure: Measure) -> Self {
        self.columns.push((symbol.into(), Some(measure)));
        self
    }

    fn words(mut self, heading: impl Into<String>) -> Self {
        self.columns.push((heading.into(), None));
        self
    }

    fn note(mut self, note: impl Into<String>) -> Self {
        self.note = Some(note.into());
        self
    }

    fn row(&mut self, name: impl Into<String>, cells: Vec<Cell>) {
        self.rows.push(Row { name: name.into(), cells });
    }

    /// The table, or none where it has no rows.
    fn build(self, sheet: &Recording<'_>) -> Option<Table> {
        if self.rows.is_empty() {
            return None;
        }
        let used: Vec<bool> = (0..self.columns.len())
            .map(|at| self.rows.iter().any(|row| row.cells.get(at).is_some_and(|c| *c != Cell::Empty)))
            .collect();
        let columns = self
            .columns
            .into_iter()
            .zip(&used)
            .filter(|(_, used)| **used)
            .map(|((symbol, measure), _)| Column { symbol, unit: measure.map(|m| sheet.unit(m)) })
            .collect();
        let rows = self
            .rows
            .into_iter()
            .map(|row| Row {
                name: row.name,
                cells: row.cells.into_iter().zip(&used).filter(|(_, used)| **used).map(|(cell, _)| cell).collect(),
            })
            .collect();
        Some(Table { id: self.id, title: self.title, head: self.head.into(), columns, rows, note: self.note })
    }
}

fn typed(sheet: &mut Recording<'_>, address: fmt::Arguments<'_>, si: Option<f64>, measure: Measure) -> Cell {
    si.map_or(Cell::Empty, |si| Cell::Quantity(sheet.input(address, si, measure).id))
}

fn words(text: impl Into<String>) -> Cell {
    let text = text.into();
    if text.is_empty() { Cell::Empty } else { Cell::Text(text) }
}

/// A worked or stated value; what was never written down is zero.
fn quantity(value: Option<Value>) -> Cell {
    match value {
        None => Cell::Empty,
        Some(value) if value.id == u32::MAX => Cell::Text("0".into()),
        Some(value) => Cell::Quantity(value.id),
    }
}
