//! One numbered step: a formula, its operands with their addresses, its result.
use crate::formula::{Definition, Symbol};

/// A step of the sheet.
#[derive(Debug, Clone)]
pub struct Step {
    /// `subject[.combination].<letter><nn>`.
    pub number: String,
    /// The formula, with its symbol, plain words and source.
    pub definition: Definition,
    /// Each symbol of the formula with the ledger entry it stands for, in order of first appearance.
    pub operands: Vec<(Symbol, u32)>,
    /// The ledger entry of the result.
    pub result: u32,
    /// A comparison that follows the result.
    pub comparison: Option<Comparison>,
    /// Method or clause beyond the definition's source, such as a basis mark.
    pub by: Option<String>,
    /// A remark or a caution.
    pub note: Option<String>,
}

impl Step {
    /// The published source of the formula, then the method or clause of the step; empty where neither is stated.
    #[must_use]
    pub fn methods(&self) -> Vec<&str> {
        self.definition.source().map(|source| source.short).into_iter().chain(self.by.as_deref()).collect()
    }
}

/// What a result is compared with.
#[derive(Debug, Clone, Copy, PartialEq)]
pub struct Comparison {
    /// The bound as printed: a plain number.
    pub limit: f64,
    /// Whether the result must not be greater than the bound; otherwise it must be greater.
    pub at_most: bool,
    /// Whether it is kept.
    pub ok: bool,
}

impl Comparison {
    /// The relation that holds: `≤` or `>`.
    #[must_use]
    pub fn relation(&self) -> char {
        if self.at_most == self.ok { '≤' } else { '>' }
    }

    /// The verdict as printed.
    #[must_use]
    pub fn verdict(&self) -> &'static str {
        if self.ok { "OK" } else { "NOT OK" }
    }
}
