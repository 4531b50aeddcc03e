//! Tables: the line that names them, then one row to a line.
use super::words;
use crate::sheet::{Cell, Ledger, Table};

/// A table of the sheet. Its name stands on the line directly before its head, which a table may interrupt.
pub(super) fn write(table: &Table, ledger: &Ledger) -> String {
    let mut text = format!("**Table {}** {}\n", table.id, words::escaped(&table.title));
    let heads = std::iter::once(table.head.clone()).chain(table.columns.iter().map(crate::sheet::Column::heading));
    text.push_str(&row(&heads.map(|head| words::escaped(&head)).collect::<Vec<_>>()));
    text.push_str(&rule(std::iter::once(false).chain((0..table.columns.len()).map(|at| is_numeric(table, at)))));
    for line in &table.rows {
        let cells = line.cells.iter().map(|cell| match cell {
            Cell::Empty => String::new(),
            Cell::Text(text) | Cell::Address(text) => words::escaped(text),
            Cell::Quantity(id) => ledger.entry(*id).printed.to_string(),
        });
        text.push_str(&row(&std::iter::once(words::escaped(&line.name)).chain(cells).collect::<Vec<_>>()));
    }
    if let Some(note) = &table.note {
        text.push_str(&format!("\n{}\n", words::escaped(note)));
    }
    text
}

fn is_numeric(table: &Table, at: usize) -> bool {
    table.rows.iter().any(|row| matches!(row.cells.get(at), Some(Cell::Quantity(_))))
}

/// A row of cells.
pub(super) fn row(cells: &[String]) -> String {
    let mut text = String::from("|");
    for cell in cells {
        text.push_str(&if cell.is_empty() { " |".to_string() } else { format!(" {cell} |") });
    }
    text.push('\n');
    text
}

/// The rule below the head; columns of numbers stand to the right.
pub(super) fn rule(numeric: impl Iterator<Item = bool>) -> String {
    let mut text = String::from("|");
    for numeric in numeric {
        text.push_str(if numeric { "---:|" } else { "---|" });
    }
    text.push('\n');
    text
}
