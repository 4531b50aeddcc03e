//! Reads a package back from its Markdown alone and confirms every line of it.
//! Shares formula parsing, the units table and places in YAML with the rest; knows nothing of model, analysis or sheet.
//!
//! One change of a digit, sign, unit, operator, symbol, address, verdict or word in a step is seen wherever it makes the
//! step wrong by more than its closure; `tests/suite/damage` makes every such change, judges it by a reader of its own
//! and counts. A step or table that is gone is missed by the count at the end of the package.
//!
//! Not seen, for want of anything in the package to hold it against:
//! - a change below the closure, such as a zero in another unit;
//! - two changes that fit each other, such as a symbol renamed in the formula and in `from:`, where it is only a name;
//! - cells of results that no worked step gives or draws on, such as movements and forces of members not worked and the
//!   places of extremes: the report names their tables and counts them;
//! - numbers in prose and captions but the verdict's: the report counts them;
//! - words and places in the list of comparisons, and the list of further steps to look at.
//!
//! ```
//! use calcsheaf::retrace;
//! let refusal = retrace::read("# A letter\n").unwrap_err();
//! assert!(refusal.to_string().contains("no step"));
//! ```
mod closing;
mod confirm;
mod evaluate;
mod fingerprint;
mod input;
mod listed;
mod markdown;
mod matrix;
mod naming;
mod package;
mod quote;
mod report;
mod results;
mod step;
mod structure;
mod table;
#[cfg(test)]
mod tests;
mod trace;
mod typed;
mod verdict;

pub use confirm::confirm;
pub use package::{Package, Refusal, read};
pub use report::{Coverage, Finding, Report};
pub use step::PrintedStep;
pub use table::{PrintedRow, PrintedTable};
