//! Equation numbers, assembly, solution, diagnosis of mechanisms, residuals, critical load. Only user of nalgebra.
mod critical;
mod failure;
mod freedom;
mod mechanism;
mod ordering;
mod skyline;
mod solution;
mod solve;
mod spectrum;
mod structure;
mod system;
mod tension_only;
#[cfg(test)]
mod tests;
mod twofold;

pub use critical::critical_load;
pub use failure::{Failure, Names};
pub use mechanism::{Motion, describe};
pub use solution::{CombinationSolution, CriticalLoad, LeftOut, MemberMovement, Solution};
pub use solve::solve;
pub use structure::{Element, Loading, MemberLoading, Structure};
