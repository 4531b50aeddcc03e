//! calcsheaf: one YAML file in, a calculation package out that can be checked with a pocket calculator.
//!
//! ```text
//! YAML ─input→ Raw ─model→ Model ─analysis→ Solution ─sheet→ Sheet ─document→ Document ─┬─write→ .md ──retrace→ verdict
//!                                                                                      └─typeset→ Pages ─write→ .pdf
//! ```
pub mod analysis;
pub mod catalogue;
pub mod diagnostic;
pub mod document;
pub mod figure;
pub mod formula;
pub mod input;
pub mod model;
pub mod retrace;
pub mod sheet;
pub mod typeset;
pub mod units;
pub mod work;
pub mod write;
