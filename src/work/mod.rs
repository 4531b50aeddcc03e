//! The chain of formulas from input to end forces, written once and worked on any worksheet: silently to fill
//! results, or on the sheet to write every step down.
mod all;
mod check;
mod combination;
mod depth;
mod extreme;
mod factor;
mod loads;
mod member;
mod movement;
mod node;
mod relative;
mod second;
mod structure;
mod unit;
mod whole;

pub use all::{
    CombinationWork, Prepared, factored, largest_axial, node_movement, prepare, work_all, work_one, work_section,
};
pub use check::{Check, carries_shear, work_member_checks, work_node_checks, work_stability_check};
pub use combination::{FactoredLoad, MemberForces, Movements, work_member};
pub use depth::{section_of_largest_stress, work_depth};
pub use extreme::{Extreme, Extremes, Fibre, work_extremes};
pub use factor::factor;
pub use loads::{CaseLoad, load_inputs, work_case_loads};
pub use member::{MemberBase, SectionValues, work_base};
pub use movement::movements;
pub use node::{AllLoads, NodeBalance, node_load, work_node};
pub use relative::relative_movements;
pub use second::{
    Energy, SUPPORTS, energy, support_share, virtual_work, work_bound, work_energy, work_unit_load, work_virtual,
};
pub use structure::{loadings, solve, structure};
pub use unit::unit_response;
pub use whole::{Balance, WHOLE, work_case_total, work_whole};
