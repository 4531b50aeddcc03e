//! Reads a package back from its Markdown alone and confirms every line of it.
//! Shares formula parsing, the units table and places in YAML with the rest; knows nothing of model, analysis or sheet.
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
