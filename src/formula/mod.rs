//! Formulas as data: written once, then evaluated, differentiated, checked for dimensions, printed and read back.
mod definition;
mod dimensions;
mod parse;
mod program;
pub mod source;
mod symbol;
mod text;
mod tree;
mod worksheet;

pub use definition::Definition;
pub use dimensions::{DimensionFault, dimension_of};
pub use parse::{
    FormulaFault, Function, NumericTree, Parsed, PrintedNumber, parse_numbers, parse_printed, parse_printed_unit,
    parse_symbols,
};
pub use program::Program;
pub use source::Source;
pub use symbol::Symbol;
pub use text::{Operand, superscript_number, with_numbers, with_symbols};
pub use tree::Tree;
pub use worksheet::{Scope, Silent, StepNumber, Value, Worksheet};
