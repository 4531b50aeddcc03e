//! Things of which more will come, one file each: section shapes, member kinds, loads, checks.
pub mod section;
