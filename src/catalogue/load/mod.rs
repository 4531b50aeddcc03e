//! Loads on members: parts along and across, fixed-end actions, shares carried to the joints, resultant.
mod bench;
pub mod component;
pub mod couple;
pub mod fixed_end;
pub mod line;
pub mod point;
pub mod resultant;
pub mod share;
pub mod strain;
pub mod taper;
pub mod uniform;
pub mod weight;
mod worked;

pub use worked::{LoadInputs, Local, Worked, work, work_self_weight};

use crate::formula::Definition;

/// Every definition of every load.
pub fn all() -> impl Iterator<Item = &'static Definition> {
    [
        component::ALL,
        couple::ALL,
        fixed_end::ALL,
        line::ALL,
        point::ALL,
        resultant::ALL,
        share::ALL,
        strain::ALL,
        taper::ALL,
        uniform::ALL,
        weight::ALL,
    ]
    .into_iter()
    .flatten()
    .map(|d| &***d)
}
