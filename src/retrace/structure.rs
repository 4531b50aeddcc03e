//! Two lines of a step held against each other: the same formula, in symbols and with numbers in place.
use crate::formula::{Function, NumericTree, Parsed, PrintedNumber, Symbol, Tree};
use crate::units::Printed;

/// A symbol and the number that stands in its place.
pub(super) struct Placed {
    pub(super) symbol: Symbol,
    pub(super) number: PrintedNumber,
}

/// Where the two lines part: what the symbols ask for, what the numbers hold.
pub(super) struct Mismatch {
    pub(super) expected: String,
    pub(super) found: String,
}

/// Every symbol with its number, in order of appearance, one entry an appearance.
///
/// `(−3)` among numbers is a negative operand where a symbol stands, and the negative of 3 where `−` and a symbol do.
pub(super) fn place_numbers(symbols: &Tree, numbers: &NumericTree, placed: &mut Vec<Placed>) -> Result<(), Mismatch> {
    match (symbols, numbers) {
        (Tree::Symbol(symbol), Parsed::Leaf(number)) => {
            placed.push(Placed { symbol: symbol.clone(), number: number.clone() });
            Ok(())
        }
        (Tree::Number(constant), Parsed::Leaf(number)) => {
            let is_plain = number.unit.text.is_empty() && !number.has_exponent;
            if is_plain && number.printed.value().to_bits() == constant.to_bits() {
                Ok(())
            } else {
                Err(mismatch(symbols, numbers))
            }
        }
        (Tree::Pi, Parsed::Pi) => Ok(()),
        (Tree::Negative(part), Parsed::Leaf(number)) if number.printed.is_negative() => {
            place_numbers(part, &Parsed::Leaf(opposite(number)), placed)
        }
        (Tree::Negative(part), Parsed::Negative(numbers)) => place_numbers(part, numbers, placed),
        (Tree::Sum(parts), Parsed::Sum(numbers)) | (Tree::Product(parts), Parsed::Product(numbers))
            if parts.len() == numbers.len() =>
        {
            place_all(parts.iter(), numbers, placed)
        }
        (Tree::Quotient(above, below), Parsed::Quotient(numbers_above, numbers_below)) => {
            place_numbers(above, numbers_above, placed)?;
            place_numbers(below, numbers_below, placed)
        }
        (Tree::Power(base, exponent), Parsed::Power(numbers, found)) if exponent == found => {
            place_numbers(base, numbers, placed)
        }
        (_, Parsed::Function(function, numbers))
            if function_of(symbols) == Some(*function) && symbols.parts().len() == numbers.len() =>
        {
            place_all(symbols.parts().into_iter(), numbers, placed)
        }
        _ => Err(mismatch(symbols, numbers)),
    }
}

fn place_all<'t>(
    parts: impl Iterator<Item = &'t Tree>,
    numbers: &[NumericTree],
    placed: &mut Vec<Placed>,
) -> Result<(), Mismatch> {
    parts.zip(numbers).try_for_each(|(part, numbers)| place_numbers(part, numbers, placed))
}

fn opposite(number: &PrintedNumber) -> PrintedNumber {
    let Printed { count, place } = number.printed;
    PrintedNumber { printed: Printed { count: -count, place }, ..number.clone() }
}

fn function_of(tree: &Tree) -> Option<Function> {
    Some(match tree {
        Tree::Root(_) => Function::Root,
        Tree::Absolute(_) => Function::Absolute,
        Tree::Max(_) => Function::Max,
        Tree::Min(_) => Function::Min,
        Tree::Sine(_) => Function::Sine,
        Tree::Cosine(_) => Function::Cosine,
        Tree::Tangent(_) => Function::Tangent,
        Tree::ArcTangent(_) => Function::ArcTangent,
        _ => return None,
    })
}

fn mismatch(symbols: &Tree, numbers: &NumericTree) -> Mismatch {
    let symbols = match symbols {
        Tree::Number(number) => format!("the number {number}"),
        Tree::Pi => "π".into(),
        Tree::Symbol(symbol) => format!("a number for {symbol}"),
        Tree::Negative(_) => "a change of sign".into(),
        Tree::Sum(parts) => format!("a sum of {} terms", parts.len()),
        Tree::Product(parts) => format!("a product of {} factors", parts.len()),
        Tree::Quotient(..) => "a fraction".into(),
        Tree::Power(_, exponent) => format!("a power of {exponent}"),
        other => format!("{:?} of {} arguments", function_of(other), other.parts().len()),
    };
    let found = match numbers {
        Parsed::Leaf(number) => format!("the number {number}"),
        Parsed::Pi => "π".into(),
        Parsed::Negative(_) => "a change of sign".into(),
        Parsed::Sum(parts) => format!("a sum of {} terms", parts.len()),
        Parsed::Product(parts) => format!("a product of {} factors", parts.len()),
        Parsed::Quotient(..) => "a fraction".into(),
        Parsed::Power(_, exponent) => format!("a power of {exponent}"),
        Parsed::Function(function, parts) => format!("{function:?} of {} arguments", parts.len()),
    };
    Mismatch { expected: format!("{symbols}, as in the line of symbols"), found }
}
