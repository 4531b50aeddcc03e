//! calcsheaf: one YAML file in, a calculation package out that can be checked with a pocket calculator.
//!
//! ```text
//! YAML ─input→ Raw ─model→ Model ─analysis→ Solution ─sheet→ Sheet ─document→ Document ─┬─write→ .md ──retrace→ verdict
//!                            └──────work (the chain of formulas)──────┘               └─typeset→ Pages ─write→ .pdf
//! ```
//!
//! Every arrow is one function of values: no files, no clock, no globals. [`cli`] alone reads, writes and prints;
//! [`package`] joins the arrows; [`work`] holds the chain of formulas that both results and sheet come from.
pub mod analysis;
pub mod catalogue;
pub mod cli;
mod cores;
pub mod diagnostic;
pub mod document;
pub mod figure;
pub mod formula;
pub mod input;
pub mod model;
pub mod package;
pub mod retrace;
pub mod sheet;
pub mod typeset;
pub mod units;
pub mod work;
pub mod write;
