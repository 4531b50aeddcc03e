//! (set out in the crate's picture)
pub mod pdf;
