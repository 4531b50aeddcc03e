//! Things of which more will come, one file each: section shapes, member kinds, loads, checks.
pub mod between;
pub mod check;
pub mod element;
pub mod load;
pub mod section;
pub mod symbol;

use crate::formula::Symbol;

/// What a symbol of the table stands for, in plain words.
#[must_use]
pub fn meaning(symbol: &Symbol) -> &'static str {
    symbol::TABLE.iter().chain(check::SYMBOLS).find(|(text, ..)| *text == symbol.as_str()).map_or("", |(_, _, words)| words)
}
