//! What a formula with numbers in place gives, with its dimension.
use crate::formula::{Function, NumericTree, Parsed};
use crate::units::Dimension;

/// A value in SI base units; a bare zero has no dimension of its own and fits anywhere.
#[derive(Debug, Clone, Copy)]
pub(super) struct Worked {
    pub(super) value: f64,
    pub(super) dimension: Option<Dimension>,
}

/// Evaluates a formula from its printed numbers.
///
/// # Errors
/// Says in words where dimensions do not agree. Angles and strains are plain numbers.
pub(super) fn evaluate(tree: &NumericTree) -> Result<Worked, String> {
    Ok(match tree {
        Parsed::Leaf(number) => {
            let is_bare_zero = number.printed.count == 0 && number.unit.text.is_empty();
            Worked { value: number.si(), dimension: (!is_bare_zero).then_some(number.unit.dimension) }
        }
        Parsed::Pi => plain(std::f64::consts::PI),
        Parsed::Negative(part) => {
            let part = evaluate(part)?;
            Worked { value: -part.value, ..part }
        }
        Parsed::Sum(parts) => fold(parts, |a, b| a + b)?,
        Parsed::Product(parts) => {
            let mut whole = plain(1.0);
            for part in parts {
                let part = evaluate(part)?;
                whole = Worked { value: whole.value * part.value, dimension: Some(product(&whole, &part, 1)?) };
            }
            whole
        }
        Parsed::Quotient(above, below) => {
            let (above, below) = (evaluate(above)?, evaluate(below)?);
            Worked { value: above.value / below.value, dimension: Some(product(&above, &below, -1)?) }
        }
        Parsed::Power(base, exponent) => {
            let base = evaluate(base)?;
            let dimension = product(&plain(1.0), &base, i16::from(*exponent))?;
            Worked { value: base.value.powi(i32::from(*exponent)), dimension: Some(dimension) }
        }
        Parsed::Function(Function::Max, parts) => fold(parts, f64::max)?,
        Parsed::Function(Function::Min, parts) => fold(parts, f64::min)?,
        Parsed::Function(function, parts) => {
            let Some(part) = parts.first() else { return Err("a function without an argument".into()) };
            apply(*function, evaluate(part)?)?
        }
    })
}

fn apply(function: Function, part: Worked) -> Result<Worked, String> {
    let Worked { value, dimension } = part;
    let of_angle = |result: f64| match dimension {
        Some(found) if found != Dimension::NONE => Err(format!("a function of angle or ratio takes {found}")),
        _ => Ok(plain(result)),
    };
    match function {
        Function::Root => {
            let dimension = match dimension {
                None => None,
                Some(found) => Some(found.root().ok_or_else(|| format!("the root of {found} has no dimension"))?),
            };
            Ok(Worked { value: value.sqrt(), dimension })
        }
        Function::Sine => of_angle(value.sin()),
        Function::Cosine => of_angle(value.cos()),
        Function::Tangent => of_angle(value.tan()),
        Function::ArcTangent => of_angle(value.atan()),
        Function::Absolute | Function::Max | Function::Min => Ok(Worked { value: value.abs(), dimension }),
    }
}

fn plain(value: f64) -> Worked {
    Worked { value, dimension: Some(Dimension::NONE) }
}

fn fold(parts: &[NumericTree], join: fn(f64, f64) -> f64) -> Result<Worked, String> {
    let mut whole: Option<Worked> = None;
    for part in parts {
        let part = evaluate(part)?;
        whole = Some(match whole {
            None => part,
            Some(before) => {
                let dimension = match (before.dimension, part.dimension) {
                    (Some(a), Some(b)) if a != b => return Err(format!("{b} is put together with {a}")),
                    (a, b) => a.or(b),
                };
                Worked { value: join(before.value, part.value), dimension }
            }
        });
    }
    whole.ok_or_else(|| "a sum without terms".into())
}

/// The dimension of `a` times `b` raised to a power, refused where its exponents outgrow any formula.
fn product(a: &Worked, b: &Worked, power: i16) -> Result<Dimension, String> {
    let (a, b) = (a.dimension.unwrap_or_default(), b.dimension.unwrap_or_default());
    let exponent = |a: i8, b: i8| i8::try_from(i16::from(a) + i16::from(b) * power).ok();
    let found = || {
        Some(Dimension {
            length: exponent(a.length, b.length)?,
            mass: exponent(a.mass, b.mass)?,
            time: exponent(a.time, b.time)?,
            temperature: exponent(a.temperature, b.temperature)?,
        })
    };
    found().ok_or_else(|| "a dimension greater than any formula needs".into())
}
