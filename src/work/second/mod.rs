//! Second answers by another theory: work and energy, simple-span bounds, unit loads.
//!
//! They use statics, energy and beam tables where the first answer used stiffness, so that they catch what working
//! the same formulas again cannot.
mod bound;
mod energy;
mod unit_load;
mod virtual_work;

pub use bound::work_bound;
pub use energy::{Energy, energy, work_energy};
pub use unit_load::work_unit_load;
pub use virtual_work::{SUPPORTS, support_share, virtual_work, work_virtual};
