//! A formula on one line, in symbols or with numbers in place. [`super::parse_symbols`] is the inverse.
//!
//! ```text
//! sum      = term { (" + " | " − ") term }
//! term     = [ "−" ] quotient
//! quotient = product [ "/" power ]
//! product  = power { "·" power }
//! power    = factor [ superscript ]
//! factor   = symbol | number | "(" sum ")" | "√(" sum ")" | "|" sum "|" | name "(" sum { ", " sum } ")"
//! ```
//! A negative number always stands in parentheses; so does a number with a unit or a power of ten
//! that is a factor, a divisor or a base.
use super::{Symbol, Tree};
use crate::units::Printed;

/// What takes a symbol's place when numbers are put in.
#[derive(Debug, Clone, PartialEq)]
pub struct Operand {
    /// The printed number.
    pub printed: Printed,
    /// The printed unit, empty for a plain number.
    pub unit: String,
}

impl Operand {
    /// Number and unit without parentheses.
    #[must_use]
    pub fn text(&self) -> String {
        if self.unit.is_empty() { self.printed.to_string() } else { format!("{} {}", self.printed, self.unit) }
    }
}

/// The formula in symbols.
#[must_use]
pub fn with_symbols(tree: &Tree) -> String {
    write(tree, Place::Alone, &|symbol, _| symbol.to_string())
}

/// The formula with every symbol replaced by its printed number and unit.
#[must_use]
pub fn with_numbers(tree: &Tree, operand: &dyn Fn(&Symbol) -> Operand) -> String {
    write(tree, Place::Alone, &|symbol, place| {
        let operand = operand(symbol);
        let compound = !operand.unit.is_empty() || operand.printed.exponent() != 0;
        let text = operand.text();
        if operand.printed.is_negative() || (compound && place != Place::Alone && place != Place::Term) {
            format!("({text})")
        } else {
            text
        }
    })
}

/// Where a part stands, which decides about its parentheses.
#[derive(Clone, Copy, PartialEq, Eq)]
enum Place {
    Alone,
    Term,
    Factor,
    Above,
    Below,
    Base,
}

fn write(tree: &Tree, place: Place, leaf: &dyn Fn(&Symbol, Place) -> String) -> String {
    let inside = |part: &Tree| write(part, Place::Alone, leaf);
    let text = match tree {
        Tree::Number(number) => number_text(*number),
        Tree::Pi => "π".into(),
        Tree::Symbol(symbol) => leaf(symbol, place),
        Tree::Negative(part) => format!("−{}", write(part, Place::Term, leaf)),
        Tree::Sum(parts) => {
            let mut text = String::new();
            for part in parts {
                let (sign, term) = match part {
                    Tree::Negative(term) => ("−", &**term),
                    Tree::Number(number) if *number < 0.0 => ("−", &Tree::Number(-number)),
                    term => ("+", term),
                };
                if !text.is_empty() {
                    text.push_str(&format!(" {sign} "));
                } else if sign == "−" {
                    text.push('−');
                }
                text.push_str(&write(term, Place::Term, leaf));
            }
            text
        }
        Tree::Product(parts) => parts.iter().map(|part| write(part, Place::Factor, leaf)).collect::<Vec<_>>().join("·"),
        Tree::Quotient(above, below) => {
            format!("{}/{}", write(above, Place::Above, leaf), write(below, Place::Below, leaf))
        }
        Tree::Power(part, exponent) => {
            format!("{}{}", write(part, Place::Base, leaf), superscript_number(i32::from(*exponent)))
        }
        Tree::Root(part) => format!("√({})", inside(part)),
        Tree::Absolute(part) => format!("|{}|", inside(part)),
        Tree::Max(parts) => format!("max({})", parts.iter().map(inside).collect::<Vec<_>>().join(", ")),
        Tree::Min(parts) => format!("min({})", parts.iter().map(inside).collect::<Vec<_>>().join(", ")),
        Tree::Sine(part) => format!("sin({})", inside(part)),
        Tree::Cosine(part) => format!("cos({})", inside(part)),
        Tree::Tangent(part) => format!("tan({})", inside(part)),
        Tree::ArcTangent(part) => format!("atan({})", inside(part)),
    };
    if needs_parentheses(tree, place) { format!("({text})") } else { text }
}

fn needs_parentheses(tree: &Tree, place: Place) -> bool {
    match (tree, place) {
        (_, Place::Alone) => false,
        (Tree::Sum(_) | Tree::Negative(_), _) => true,
        (Tree::Number(number), _) => *number < 0.0,
        (Tree::Quotient(..), place) => place != Place::Term,
        (Tree::Product(_), place) => matches!(place, Place::Below | Place::Base | Place::Factor),
        (Tree::Power(..), place) => place == Place::Base,
        _ => false,
    }
}

fn number_text(number: f64) -> String {
    format!("{number}").replace('-', "−")
}

/// A whole number in superscript digits.
#[must_use]
pub fn superscript_number(number: i32) -> String {
    let digits = number.unsigned_abs().to_string();
    let digits = digits.chars().map(|d| ['⁰', '¹', '²', '³', '⁴', '⁵', '⁶', '⁷', '⁸', '⁹'][d as usize - '0' as usize]);
    (if number < 0 { Some('⁻') } else { None }).into_iter().chain(digits).collect()
}

#[cfg(test)]
mod tests {
    use super::*;

    /// The curvature step set out in the sheet's contract.
    #[test]
    fn curvature_reads_as_in_the_contract() {
        let [l, v1, v2, p1, p2] = ["L", "v₁", "v₂", "φ₁", "φ₂"].map(Symbol::new);
        let tree = (6 / l.squared()) * (v2 - v1.tree()) - (2 / l.tree()) * (2 * p1 + p2);
        assert_eq!(with_symbols(&tree), "(6/L²)·(v₂ − v₁) − (2/L)·(2·φ₁ + φ₂)");
        let numbers = with_numbers(&tree, &|symbol| {
            let (count, place, unit) = match symbol.as_str() {
                "L" => (4000, 0, "mm"),
                "v₂" => (-3214, -3, "mm"),
                "v₁" => (-1034, -4, "mm"),
                "φ₁" => (-1102, -6, "rad"),
                _ => (4410, -7, "rad"),
            };
            Operand { printed: Printed { count, place }, unit: unit.into() }
        });
        assert_eq!(
            numbers,
            "(6/(4000 mm)²)·((−3.214 mm) − (−0.1034 mm)) − (2/(4000 mm))·(2·(−0.001102 rad) + 441.0×10⁻⁶ rad)"
        );
    }
}
