//! (set out in the crate's picture)
