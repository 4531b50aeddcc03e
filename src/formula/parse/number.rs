//! Numbers as printed: digits, a power of ten, a unit.
use super::cursor::Cursor;
use super::grammar::Leaf;
use super::{FormulaFault, Symbol};
use crate::units::{Printed, Unit, parse_unit};
use std::fmt;
use std::ops::Range;

/// Longest count that is read, digits; an `i64` holds it.
const MOST_DIGITS: usize = 18;
/// Powers of ten beyond this are outside what a calculator or a double holds.
const LARGEST_EXPONENT: i32 = 300;
/// Factors of a printed unit; the exponents of a longer one could outgrow a dimension.
const MOST_FACTORS: usize = 5;

/// A number read from print.
#[derive(Debug, Clone, PartialEq)]
pub struct PrintedNumber {
    /// Its digits: how many units of which place.
    pub printed: Printed,
    /// Its unit as printed; none for a plain number.
    pub unit: Unit,
    /// Its bytes in the text, a minus in the same parentheses and the unit included.
    pub span: Range<usize>,
    /// Whether a power of ten was written.
    pub has_exponent: bool,
}

impl PrintedNumber {
    /// Value in SI base units.
    #[must_use]
    pub fn si(&self) -> f64 {
        self.printed.value() * self.unit.scale
    }

    /// Whether two numbers print the same digits and the same unit.
    #[must_use]
    pub fn prints_as(&self, other: &Self) -> bool {
        self.printed == other.printed && self.unit.text == other.unit.text
    }
}

impl fmt::Display for PrintedNumber {
    fn fmt(&self, f: &mut fmt::Formatter<'_>) -> fmt::Result {
        write!(f, "{}", self.printed)?;
        if self.unit.text.is_empty() { Ok(()) } else { write!(f, " {}", self.unit.text) }
    }
}

/// Reads a number with its unit that stands by itself, as a result does: `−0.2847×10⁻⁶ rad/mm`.
///
/// # Errors
/// The text is anything else, or a zero with a minus sign.
pub fn parse_printed(text: &str) -> Result<PrintedNumber, FormulaFault> {
    let mut cursor = Cursor::new(text);
    let negative = cursor.eat("−");
    let number = PrintedNumber::number(&mut cursor, negative)?;
    if cursor.peek().is_some() {
        return Err(cursor.unexpected("the end"));
    }
    if negative && number.printed.count == 0 {
        return Err(FormulaFault::new(0..text.len(), "a zero stands without a minus sign"));
    }
    Ok(number)
}

impl Leaf for PrintedNumber {
    fn number(cursor: &mut Cursor<'_>, negative: bool) -> Result<Self, FormulaFault> {
        let digits = cursor.digits()?;
        let start = if negative { digits.start - '−'.len_utf8() } else { digits.start };
        let text = &cursor.text()[digits.clone()];
        let (whole, fraction) = text.split_once('.').unwrap_or((text, ""));
        let count = whole.chars().chain(fraction.chars()).skip_while(|c| *c == '0').collect::<String>();
        if count.len() > MOST_DIGITS {
            return Err(FormulaFault::new(digits, format!("`{text}` has more than {MOST_DIGITS} digits")));
        }
        let count = count.parse::<i64>().unwrap_or(0);
        let exponent = power_of_ten(cursor)?;
        let place = exponent.unwrap_or(0) - i32::try_from(fraction.len()).unwrap_or(i32::MAX / 2);
        let unit = unit(cursor)?;
        let printed = Printed { count: if negative { -count } else { count }, place };
        Ok(Self { printed, unit, span: start..cursor.at(), has_exponent: exponent.is_some() })
    }

    fn symbol(name: &str, span: Range<usize>) -> Result<Self, FormulaFault> {
        Err(FormulaFault::new(span, format!("the symbol {} stands among numbers", Symbol::owned(name.to_owned()))))
    }

    fn is_zero(&self) -> bool {
        self.printed.count == 0
    }

    fn is_compound(&self) -> bool {
        self.has_exponent || !self.unit.text.is_empty()
    }
}

fn power_of_ten(cursor: &mut Cursor<'_>) -> Result<Option<i32>, FormulaFault> {
    let start = cursor.at();
    if !cursor.eat("×10") {
        return Ok(None);
    }
    match cursor.superscript()? {
        Some(exponent) if exponent.abs() <= LARGEST_EXPONENT => Ok(Some(exponent)),
        _ => Err(FormulaFault::new(start..cursor.at(), "`×10` needs a raised power that a calculator can hold")),
    }
}

/// A unit: it follows one space and runs to the next space, closing mark, comma or the end.
fn unit(cursor: &mut Cursor<'_>) -> Result<Unit, FormulaFault> {
    let after = cursor.rest().strip_prefix(' ').unwrap_or("");
    if !(after.starts_with(|c: char| c.is_alphabetic() || c == '°') || after.starts_with("1/")) {
        return Ok(Unit::none());
    }
    cursor.eat(" ");
    let span = cursor.run(|c| !" ),|".contains(c));
    let text = &cursor.text()[span.clone()];
    read_unit(text).map_err(|message| FormulaFault::new(span, message))
}

/// Reads a unit in its printed spelling alone.
fn read_unit(text: &str) -> Result<Unit, String> {
    let factors = text.matches(['·', '/']).count() + 1;
    let rest = text.strip_prefix('1').unwrap_or(text);
    let is_spelt = |c: char| c.is_alphabetic() || "°·/²³⁴⁵⁶⁷⁸⁹".contains(c);
    if factors > MOST_FACTORS || !rest.chars().all(is_spelt) {
        return Err(format!("`{text}` is not a unit as printed"));
    }
    match parse_unit(text) {
        Ok(unit) if &*unit.text == text => Ok(unit),
        Ok(unit) => Err(format!("the unit `{text}` is printed `{}`", unit.text)),
        Err(fault) => Err(fault.message),
    }
}

/// Reads a unit in its printed spelling; empty text is a plain number.
///
/// # Errors
/// The text is no unit, or not in its printed spelling.
pub fn parse_printed_unit(text: &str) -> Result<Unit, FormulaFault> {
    read_unit(text).map_err(|message| FormulaFault::new(0..text.len(), message))
}
