//! What was typed in the input, and whether a printed number is it.
use crate::diagnostic::{Address, Source};
use crate::formula::PrintedNumber;
use crate::units::{Dimension, Quantity, parse_number, parse_quantity};

/// The text of a leaf of the input, quotes taken off; none where the path leads to no leaf.
pub(super) fn text<'s>(input: &'s Source, path: &Address) -> Option<&'s str> {
    let found = input.find(path).filter(|found| found.is_text)?;
    Some(input.text().get(found.value)?.trim_matches(['"', '\'']))
}

/// What a typed text says; a percentage is a plain number.
pub(super) fn quantity(typed: &str) -> Option<Quantity> {
    match (parse_quantity(typed), typed.strip_suffix('%')) {
        (Ok(quantity), _) => Some(quantity),
        (Err(_), Some(percent)) => {
            let value = parse_number(percent).ok()? / 100.0;
            Some(Quantity { value, dimension: Dimension::NONE, has_unit: false })
        }
        (Err(_), None) => None,
    }
}

/// Whether a printed number says what was typed, though perhaps in another unit.
pub(super) fn is_same(typed: &Quantity, number: &PrintedNumber) -> bool {
    let unit = number.printed.unit_of_last_place();
    let is_zero = number.printed.count == 0 && typed.value.abs() <= 0.0;
    (typed.dimension == number.unit.dimension || is_zero)
        && (typed.value / number.unit.scale - number.printed.value()).abs() <= unit * (0.5 + 1e-6)
}
