//! Equation numbers, assembly, solution, diagnosis of mechanisms, residuals, critical load. Only user of nalgebra.
mod solution;

pub use solution::{CombinationSolution, CriticalLoad, LeftOut, MemberMovement, Solution};
