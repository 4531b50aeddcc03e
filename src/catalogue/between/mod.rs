//! What happens between a member's ends: exact piecewise polynomials, their extremes, and the formulas that print them.
mod field;
mod macaulay;
mod polynomial;

pub use field::{Ends, Field, Peak, Quantity};
pub use macaulay::{At, Between, place_of_zero_shear};
pub use polynomial::Polynomial;
