//! Whether the terms of a formula can be added, and what the whole measures.
use super::{Symbol, Tree};
use crate::units::Dimension;
use std::fmt;

/// Two dimensions that ought to agree and do not.
#[derive(Debug, Clone, Copy, PartialEq, Eq)]
pub struct DimensionFault {
    expected: Dimension,
    found: Dimension,
}

impl DimensionFault {
    /// A disagreement of two dimensions.
    #[must_use]
    pub const fn new(expected: Dimension, found: Dimension) -> Self {
        Self { expected, found }
    }
}

impl fmt::Display for DimensionFault {
    fn fmt(&self, f: &mut fmt::Formatter<'_>) -> fmt::Result {
        write!(f, "{} stands where {} is needed", self.found, self.expected)
    }
}

/// The dimension of a formula; `None` for a bare zero, which fits anywhere.
///
/// # Errors
/// Terms of unlike dimension are added or compared, or a function is given what is not a plain number.
pub fn dimension_of(tree: &Tree, of: &dyn Fn(&Symbol) -> Dimension) -> Result<Option<Dimension>, DimensionFault> {
    let walk = |part: &Tree| dimension_of(part, of);
    Ok(match tree {
        Tree::Number(number) if *number == 0.0 => None,
        Tree::Number(_) | Tree::Pi => Some(Dimension::NONE),
        Tree::Symbol(symbol) => Some(of(symbol)),
        Tree::Negative(part) | Tree::Absolute(part) => walk(part)?,
        Tree::Sum(parts) | Tree::Max(parts) | Tree::Min(parts) => {
            let mut whole: Option<Dimension> = None;
            for part in parts {
                match (whole, walk(part)?) {
                    (Some(expected), Some(found)) if expected != found => {
                        return Err(DimensionFault::new(expected, found));
                    }
                    (before, found) => whole = before.or(found),
                }
            }
            whole
        }
        Tree::Product(parts) => {
            let mut whole = Dimension::NONE;
            for part in parts {
                whole = whole * walk(part)?.unwrap_or(Dimension::NONE);
            }
            Some(whole)
        }
        Tree::Quotient(above, below) => {
            Some(walk(above)?.unwrap_or(Dimension::NONE) / walk(below)?.unwrap_or(Dimension::NONE))
        }
        Tree::Power(part, exponent) => walk(part)?.map(|d| d.power(*exponent)),
        Tree::Root(part) => match walk(part)? {
            None => None,
            Some(found) => Some(found.root().ok_or_else(|| DimensionFault::new(Dimension::NONE, found))?),
        },
        Tree::Sine(part) | Tree::Cosine(part) | Tree::Tangent(part) | Tree::ArcTangent(part) => match walk(part)? {
            Some(found) if found != Dimension::NONE => return Err(DimensionFault::new(Dimension::NONE, found)),
            _ => Some(Dimension::NONE),
        },
    })
}
