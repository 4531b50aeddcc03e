//! Tables whose cells can be drawn on by steps.
use crate::units::Unit;

/// A table.
#[derive(Debug, Clone, PartialEq)]
pub struct Table {
    /// Its id, such as `C1.U`; a cell's address is `<id>.<row>.<column>`.
    pub id: String,
    /// Its title.
    pub title: String,
    /// Heading of the first column, which holds the rows' names.
    pub head: String,
    /// The other columns.
    pub columns: Vec<Column>,
    /// Its rows.
    pub rows: Vec<Row>,
    /// A remark or a caution printed below it.
    pub note: Option<String>,
}

/// A column's heading.
#[derive(Debug, Clone, PartialEq)]
pub struct Column {
    /// The symbol, which is the last part of a cell's address.
    pub symbol: String,
    /// The unit of its numbers; none for text.
    pub unit: Option<Unit>,
}

impl Column {
    /// The heading as printed: `x, mm`.
    #[must_use]
    pub fn heading(&self) -> String {
        match &self.unit {
            Some(unit) if !unit.text.is_empty() => format!("{}, {}", self.symbol, unit.text),
            _ => self.symbol.clone(),
        }
    }
}

/// A row.
#[derive(Debug, Clone, PartialEq)]
pub struct Row {
    /// Its name, the first cell.
    pub name: String,
    /// The other cells, one a column.
    pub cells: Vec<Cell>,
}

/// A cell.
#[derive(Debug, Clone, PartialEq)]
pub enum Cell {
    /// Nothing.
    Empty,
    /// Words.
    Text(String),
    /// A ledger entry, printed in its own digits; its unit is the column's.
    Quantity(u32),
    /// A step's number or a table's id, printed as an address.
    Address(String),
}
