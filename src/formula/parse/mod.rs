//! Reads a formula back from print, in symbols or with numbers in place. Grammar: see the text of a formula.
//!
//! Time is linear in the text; parentheses nested deeper than `DEEPEST` are refused, so that no text
//! exhausts the stack.
mod cursor;
mod grammar;
mod number;
#[cfg(test)]
mod tests;

pub use number::{PrintedNumber, parse_printed, parse_printed_unit};

use super::{Symbol, Tree};
use cursor::Cursor;
use grammar::Leaf;
use std::fmt;
use std::ops::Range;

/// Parentheses, bars and functions may stand this deep inside each other.
const DEEPEST: usize = 64;

/// Why a text is not a formula.
#[derive(Debug, Clone, PartialEq, Eq)]
pub struct FormulaFault {
    /// Bytes of the text that are at fault.
    pub span: Range<usize>,
    /// What is wrong.
    pub message: String,
}

impl FormulaFault {
    /// A fault at some bytes of the text.
    #[must_use]
    pub fn new(span: Range<usize>, message: impl Into<String>) -> Self {
        Self { span, message: message.into() }
    }
}

impl fmt::Display for FormulaFault {
    fn fmt(&self, f: &mut fmt::Formatter<'_>) -> fmt::Result {
        f.write_str(&self.message)
    }
}

/// Functions of the grammar. A magnitude is written `|…|`, a root `√(…)`, the others by name.
#[derive(Debug, Clone, Copy, PartialEq, Eq)]
#[allow(missing_docs, reason = "each is the function of that name")]
pub enum Function {
    Root,
    Absolute,
    Max,
    Min,
    Sine,
    Cosine,
    Tangent,
    ArcTangent,
}

impl Function {
    /// The function written by that name.
    fn named(name: &str) -> Option<Self> {
        Some(match name {
            "max" => Self::Max,
            "min" => Self::Min,
            "sin" => Self::Sine,
            "cos" => Self::Cosine,
            "tan" => Self::Tangent,
            "atan" => Self::ArcTangent,
            _ => return None,
        })
    }

    /// Whether it takes more than one argument.
    fn takes_several(self) -> bool {
        matches!(self, Self::Max | Self::Min)
    }
}

/// A formula read from print, over leaves of one kind.
#[derive(Debug, Clone, PartialEq)]
pub enum Parsed<L> {
    /// A symbol or a number.
    Leaf(L),
    /// The circle constant.
    Pi,
    /// A change of sign.
    Negative(Box<Self>),
    /// A sum; differences hold a [`Self::Negative`].
    Sum(Vec<Self>),
    /// A product.
    Product(Vec<Self>),
    /// A fraction.
    Quotient(Box<Self>, Box<Self>),
    /// A whole power.
    Power(Box<Self>, i8),
    /// A function of its arguments.
    Function(Function, Vec<Self>),
}

/// A formula with numbers in place of symbols.
pub type NumericTree = Parsed<PrintedNumber>;

/// Reads a formula in symbols: the inverse of [`super::with_symbols`].
///
/// Trees that print alike are read as one of them: `(−3)` is the number −3.
///
/// # Errors
/// The text is not a formula of the grammar, or is nested too deeply.
pub fn parse_symbols(text: &str) -> Result<Tree, FormulaFault> {
    grammar::read::<Tree>(text).map(tree)
}

/// Reads a formula with numbers in place: the inverse of [`super::with_numbers`].
///
/// A number keeps its printed digits, its unit and its place in the text.
///
/// # Errors
/// The text is not a formula of the grammar, holds a symbol or an unknown unit, a number of more than 18 digits,
/// a number with a unit or a power of ten that lacks its parentheses, or is nested too deeply.
pub fn parse_numbers(text: &str) -> Result<NumericTree, FormulaFault> {
    grammar::read::<PrintedNumber>(text)
}

fn tree(parsed: Parsed<Tree>) -> Tree {
    let all = |parts: Vec<Parsed<Tree>>| parts.into_iter().map(tree).collect();
    match parsed {
        Parsed::Leaf(leaf) => leaf,
        Parsed::Pi => Tree::Pi,
        Parsed::Negative(part) => Tree::Negative(Box::new(tree(*part))),
        Parsed::Sum(parts) => Tree::Sum(all(parts)),
        Parsed::Product(parts) => Tree::Product(all(parts)),
        Parsed::Quotient(above, below) => Tree::Quotient(Box::new(tree(*above)), Box::new(tree(*below))),
        Parsed::Power(part, exponent) => Tree::Power(Box::new(tree(*part)), exponent),
        Parsed::Function(Function::Max, parts) => Tree::Max(all(parts)),
        Parsed::Function(Function::Min, parts) => Tree::Min(all(parts)),
        Parsed::Function(function, parts) => {
            // The grammar gives these functions one argument.
            let part = Box::new(parts.into_iter().next().map_or(Tree::Number(0.0), tree));
            match function {
                Function::Root => Tree::Root(part),
                Function::Absolute => Tree::Absolute(part),
                Function::Sine => Tree::Sine(part),
                Function::Cosine => Tree::Cosine(part),
                Function::Tangent => Tree::Tangent(part),
                _ => Tree::ArcTangent(part),
            }
        }
    }
}

impl Leaf for Tree {
    fn number(cursor: &mut Cursor<'_>, negative: bool) -> Result<Self, FormulaFault> {
        let span = cursor.digits()?;
        let text = &cursor.text()[span.clone()];
        match text.parse::<f64>() {
            Ok(value) if value.is_finite() => Ok(Self::Number(if negative { -value } else { value })),
            _ => Err(FormulaFault::new(span, format!("`{text}` is not a number a calculator can hold"))),
        }
    }

    fn symbol(name: &str, _: Range<usize>) -> Result<Self, FormulaFault> {
        Ok(Self::Symbol(Symbol::owned(name.to_owned())))
    }

    fn is_zero(&self) -> bool {
        matches!(self, Self::Number(number) if *number == 0.0)
    }

    fn is_compound(&self) -> bool {
        false
    }
}
