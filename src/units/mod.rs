//! Units of measurement: the table, what may be typed, and how a number is printed. Imports nothing.
//!
//! ```
//! use calcsheaf::units::parse_quantity;
//! let length = parse_quantity("8 ft 6 in").unwrap();
//! assert!((length.value - 2.5908).abs() < 1e-12);
//! ```
mod dimension;
mod measure;
mod parse;
mod printed;
mod unit;

pub use dimension::Dimension;
pub use measure::{Measure, System};
pub use parse::{Quantity, UnitFault, parse_number, parse_quantity, parse_unit};
pub use printed::Printed;
pub use unit::{STANDARD_GRAVITY, UNITS, Unit, UnitRow};
