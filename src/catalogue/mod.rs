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
    symbol::TABLE
        .iter()
        .chain(check::SYMBOLS)
        .find(|(text, ..)| *text == symbol.as_str())
        .map_or("", |(_, _, words)| words)
}

#[cfg(test)]
mod tests {
    use super::*;
    use crate::formula::Definition;
    use crate::units::{Dimension, Measure};

    fn all() -> impl Iterator<Item = &'static Definition> {
        element::all().chain(load::all()).chain(check::all())
    }

    fn measure(symbol: &Symbol) -> Measure {
        symbol::TABLE
            .iter()
            .chain(check::SYMBOLS)
            .find(|(text, ..)| *text == symbol.as_str())
            .unwrap_or_else(|| panic!("{symbol} is in no table"))
            .1
    }

    #[test]
    fn every_formula_agrees_in_dimension() {
        for definition in all() {
            let of = |symbol: &Symbol| -> Dimension { measure(symbol).dimension() };
            definition.check_dimensions(&of).unwrap_or_else(|fault| {
                panic!("{} = {}: {fault}", definition.symbol(), crate::formula::with_symbols(definition.tree()))
            });
        }
    }

    #[test]
    fn every_formula_says_what_it_finds_and_where_it_comes_from() {
        for definition in all() {
            assert!(!definition.title().is_empty(), "{}", definition.symbol());
            assert!(definition.source().is_some(), "{}", definition.symbol());
        }
    }

    #[test]
    fn a_symbol_has_one_meaning() {
        let mut seen: Vec<&str> = Vec::new();
        for (text, ..) in symbol::TABLE.iter().chain(check::SYMBOLS) {
            assert!(!seen.contains(text), "{text} stands twice in the tables");
            seen.push(text);
        }
    }
}
