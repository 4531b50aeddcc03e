//! The calculation sheet as data: numbered steps, tables and figures, every operand with an address.
//! It knows no Markdown and no PDF.
mod chapter;
mod compose;
pub mod digits;
mod ledger;
mod recording;
mod step;
mod table;

pub use chapter::{kind_word, quantity_text, ratio_text, sorted_checks};
pub use compose::{Results, VirtualMovement, brief, compose, is_worked, results};
pub use ledger::{Entry, Ledger, Rule};
pub use recording::{Recording, within};
pub use step::{Comparison, Step};
pub use table::{Cell, Column, Row, Table};

use crate::figure::Figure;
use std::collections::BTreeMap;

/// Everything a package says with numbers.
#[derive(Debug, Default)]
pub struct Sheet {
    /// Every printed quantity.
    pub ledger: Ledger,
    /// Steps in the order they were worked.
    pub steps: Vec<Step>,
    /// Tables in the order they were made.
    pub tables: Vec<Table>,
    /// Figures.
    pub figures: Vec<Figure>,
    step_at: BTreeMap<String, usize>,
    table_at: BTreeMap<String, usize>,
}

impl Sheet {
    /// Adds a step. Its number must be new.
    pub fn push_step(&mut self, step: Step) {
        self.step_at.insert(step.number.clone(), self.steps.len());
        self.steps.push(step);
    }

    /// Adds a table. Its id must be new.
    pub fn push_table(&mut self, table: Table) {
        self.table_at.insert(table.id.clone(), self.tables.len());
        self.tables.push(table);
    }

    /// The step of that number.
    #[must_use]
    pub fn step(&self, number: &str) -> Option<&Step> {
        self.step_at.get(number).map(|&at| &self.steps[at])
    }

    /// The table of that id.
    #[must_use]
    pub fn table(&self, id: &str) -> Option<&Table> {
        self.table_at.get(id).map(|&at| &self.tables[at])
    }

    /// The figure of that id.
    #[must_use]
    pub fn figure(&self, id: &str) -> Option<&Figure> {
        self.figures.iter().find(|figure| figure.id == id)
    }
}
