//! The grammar, over leaves of either kind. Each rule has a function of its name.
use super::cursor::Cursor;
use super::{DEEPEST, FormulaFault, Function, Parsed};
use std::ops::Range;

/// What stands at the leaves of a formula.
pub(super) trait Leaf: Sized {
    /// Reads a number; its sign has been read.
    fn number(cursor: &mut Cursor<'_>, negative: bool) -> Result<Self, FormulaFault>;
    /// Takes a name for a symbol.
    fn symbol(name: &str, span: Range<usize>) -> Result<Self, FormulaFault>;
    /// Whether it is a number without size, which stands without a sign.
    fn is_zero(&self) -> bool;
    /// Whether it must stand in parentheses beside an operator other than a sum's.
    fn is_compound(&self) -> bool;
}

/// Reads a whole text.
pub(super) fn read<L: Leaf>(text: &str) -> Result<Parsed<L>, FormulaFault> {
    let mut cursor = Cursor::new(text);
    let whole = sum(&mut cursor, 0)?;
    match cursor.peek() {
        None => Ok(whole),
        Some(_) => Err(cursor.unexpected("an operator or the end")),
    }
}

/// A part, and whether it must have parentheses where it is not a term.
struct Part<L> {
    parsed: Parsed<L>,
    /// Bytes of a number that lacks the parentheses it needs beside an operator.
    bare: Option<Range<usize>>,
    /// Whether it is a product or a fraction without parentheses around it.
    is_open: bool,
}

impl<L> Part<L> {
    fn closed(parsed: Parsed<L>) -> Self {
        Self { parsed, bare: None, is_open: false }
    }

    /// The part beside an operator.
    fn enclosed(self) -> Result<Parsed<L>, FormulaFault> {
        match self.bare {
            None => Ok(self.parsed),
            Some(span) => Err(FormulaFault::new(span, "a number with a unit or a power of ten needs parentheses here")),
        }
    }
}

fn sum<L: Leaf>(cursor: &mut Cursor<'_>, depth: usize) -> Result<Parsed<L>, FormulaFault> {
    if depth > DEEPEST {
        return Err(FormulaFault::new(
            cursor.at()..cursor.at(),
            format!("parentheses are nested deeper than {DEEPEST}"),
        ));
    }
    let mut terms = Vec::new();
    let first_is_negative = cursor.eat("−");
    let first = quotient(cursor, depth)?;
    let first_is_open = first.is_open;
    terms.push(if first_is_negative { Parsed::Negative(Box::new(first.parsed)) } else { first.parsed });
    loop {
        if cursor.eat(" + ") {
            terms.push(quotient(cursor, depth)?.parsed);
        } else if cursor.eat(" − ") {
            terms.push(Parsed::Negative(Box::new(quotient(cursor, depth)?.parsed)));
        } else {
            break;
        }
    }
    // `−a·b` by itself is a sum of one term; the negative of a product is printed `−(a·b)`.
    if terms.len() == 1 && !(first_is_negative && first_is_open) {
        return Ok(terms.remove(0));
    }
    Ok(Parsed::Sum(terms))
}

fn quotient<L: Leaf>(cursor: &mut Cursor<'_>, depth: usize) -> Result<Part<L>, FormulaFault> {
    let above = product(cursor, depth)?;
    if !cursor.eat("/") {
        return Ok(above);
    }
    let above = above.enclosed()?;
    let below = power(cursor, depth)?.enclosed()?;
    let parsed = Parsed::Quotient(Box::new(above), Box::new(below));
    Ok(Part { parsed, bare: None, is_open: true })
}

fn product<L: Leaf>(cursor: &mut Cursor<'_>, depth: usize) -> Result<Part<L>, FormulaFault> {
    let first = power(cursor, depth)?;
    if !cursor.rest().starts_with('·') {
        return Ok(first);
    }
    let mut factors = vec![first.enclosed()?];
    while cursor.eat("·") {
        factors.push(power(cursor, depth)?.enclosed()?);
    }
    Ok(Part { parsed: Parsed::Product(factors), bare: None, is_open: true })
}

fn power<L: Leaf>(cursor: &mut Cursor<'_>, depth: usize) -> Result<Part<L>, FormulaFault> {
    let base = factor(cursor, depth)?;
    let start = cursor.at();
    let Some(exponent) = cursor.superscript()? else { return Ok(base) };
    let exponent = i8::try_from(exponent)
        .map_err(|_| FormulaFault::new(start..cursor.at(), "the power is greater than any formula needs"))?;
    Ok(Part::closed(Parsed::Power(Box::new(base.enclosed()?), exponent)))
}

fn factor<L: Leaf>(cursor: &mut Cursor<'_>, depth: usize) -> Result<Part<L>, FormulaFault> {
    let start = cursor.at();
    match cursor.peek() {
        Some('(') => {
            cursor.eat("(");
            let inside = match negative_number(cursor) {
                Some(number) => number,
                None => sum(cursor, depth + 1)?,
            };
            close(cursor, ")")?;
            Ok(Part::closed(inside))
        }
        Some('|') => {
            cursor.eat("|");
            let inside = sum(cursor, depth + 1)?;
            close(cursor, "|")?;
            Ok(Part::closed(Parsed::Function(Function::Absolute, vec![inside])))
        }
        Some('√') => {
            cursor.eat("√");
            let inside = arguments(cursor, depth, Function::Root)?;
            Ok(Part::closed(inside))
        }
        Some(c) if c.is_ascii_digit() => {
            let leaf = L::number(cursor, false)?;
            let bare = leaf.is_compound().then(|| start..cursor.at());
            Ok(Part { parsed: Parsed::Leaf(leaf), bare, is_open: false })
        }
        Some(c) if c.is_alphabetic() => name(cursor, depth),
        _ => Err(cursor.unexpected("a symbol, a number or a parenthesis")),
    }
}

/// A negative number directly inside parentheses, which is one leaf; zero carries no sign.
fn negative_number<L: Leaf>(cursor: &mut Cursor<'_>) -> Option<Parsed<L>> {
    let start = cursor.at();
    if cursor.eat("−")
        && cursor.peek().is_some_and(|c| c.is_ascii_digit())
        && let Ok(leaf) = L::number(cursor, true)
        && !leaf.is_zero()
        && cursor.rest().starts_with(')')
    {
        return Some(Parsed::Leaf(leaf));
    }
    // Read again by the rule for sums, which also finds the words for a fault.
    cursor.back_to(start);
    None
}

fn name<L: Leaf>(cursor: &mut Cursor<'_>, depth: usize) -> Result<Part<L>, FormulaFault> {
    let mut in_word = false;
    let span = cursor.run(|c| {
        in_word |= c == '_';
        c.is_alphabetic() || matches!(c, '₀'..='₉' | '_' | '′') || (in_word && c.is_ascii_digit())
    });
    let name = &cursor.text()[span.clone()];
    if cursor.rest().starts_with('(') {
        let Some(function) = Function::named(name) else {
            return Err(FormulaFault::new(span, format!("no function is called `{name}`")));
        };
        return Ok(Part::closed(arguments(cursor, depth, function)?));
    }
    Ok(Part::closed(if name == "π" { Parsed::Pi } else { Parsed::Leaf(L::symbol(name, span)?) }))
}

fn arguments<L: Leaf>(cursor: &mut Cursor<'_>, depth: usize, function: Function) -> Result<Parsed<L>, FormulaFault> {
    if !cursor.eat("(") {
        return Err(cursor.unexpected("a parenthesis"));
    }
    let mut arguments = vec![sum(cursor, depth + 1)?];
    while function.takes_several() && cursor.eat(", ") {
        arguments.push(sum(cursor, depth + 1)?);
    }
    close(cursor, ")")?;
    Ok(Parsed::Function(function, arguments))
}

fn close(cursor: &mut Cursor<'_>, mark: &str) -> Result<(), FormulaFault> {
    if cursor.eat(mark) { Ok(()) } else { Err(cursor.unexpected(&format!("an operator or `{mark}`"))) }
}
