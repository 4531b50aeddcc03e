//! Single values: texts, words, numbers and quantities, each read or refused with what would be right.
use super::super::keys::{Sign, example};
use crate::diagnostic::{Code, Diagnostic, nearest};
use crate::input::{Raw, Shape};
use crate::units::{Dimension, Measure, UnitFault, parse_number, parse_quantity};

/// The text of a value that must be one.
pub(super) fn typed<'a>(raw: &'a Raw, what: &str) -> Result<&'a str, Diagnostic> {
    match raw.as_typed() {
        Some(text) if !text.trim().is_empty() => Ok(text.trim()),
        _ if matches!(raw.shape, Shape::Null(_) | Shape::Text(_)) => {
            Err(raw.error(Code::NoValue).message(format!("{what} has no value")).label("a value is missing"))
        }
        _ => Err(wrong_form(raw, what, "a single value")),
    }
}

pub(super) fn wrong_form(raw: &Raw, what: &str, needed: &str) -> Diagnostic {
    let fault = raw.error(Code::WrongForm).message(format!("{what} must be {needed}"));
    fault.label(format!("this is {}", raw.form()))
}

/// A text that may be blank.
pub(super) fn text(raw: &Raw, what: &str) -> Result<Option<String>, Diagnostic> {
    match &raw.shape {
        Shape::Text(text) if text.trim().is_empty() => Ok(None),
        Shape::Text(text) => Ok(Some(text.trim_end().to_owned())),
        Shape::Null(_) => Ok(None),
        _ => Err(wrong_form(raw, what, "a text")),
    }
}

/// One of a few words, spelt as listed.
pub(super) fn word(raw: &Raw, what: &str, words: &[&'static str]) -> Result<&'static str, Diagnostic> {
    let text = typed(raw, what)?;
    if let Some(word) = words.iter().find(|word| **word == text) {
        return Ok(word);
    }
    let fault =
        raw.error(Code::UnknownWord).message(format!("{what} cannot be `{text}`")).label("not one of the words");
    let listed = listed(words.iter().copied(), "or");
    Err(match nearest(text, words.iter().copied()) {
        Some(near) if words.len() > 1 => fault.help(format!("the nearest word is `{near}`; it can be {listed}")),
        _ => fault.help(format!("it can be {listed}")),
    })
}

/// Words in backticks with commas, the last joined by `or` or `and`.
pub(super) fn listed<'a>(words: impl IntoIterator<Item = &'a str>, last: &str) -> String {
    let words: Vec<String> = words.into_iter().map(|word| format!("`{word}`")).collect();
    match words.split_last() {
        Some((end, rest)) if !rest.is_empty() => format!("{} {last} {end}", rest.join(", ")),
        Some((end, _)) => end.clone(),
        None => String::new(),
    }
}

/// `true` or `false`; `yes` and `no` are as clear.
pub(super) fn flag(raw: &Raw, what: &str) -> Result<bool, Diagnostic> {
    let text = typed(raw, what)?;
    read_flag(text).ok_or_else(|| {
        let fault = raw.error(Code::UnknownWord).message(format!("{what} cannot be `{text}`"));
        fault.label("neither true nor false").help("it can be `true` or `false`")
    })
}

pub(super) fn read_flag(text: &str) -> Option<bool> {
    match text.to_ascii_lowercase().as_str() {
        "true" | "yes" => Some(true),
        "false" | "no" => Some(false),
        _ => None,
    }
}

/// A plain number without a unit.
pub(super) fn number(raw: &Raw, what: &str, sign: Sign) -> Result<f64, Diagnostic> {
    let text = typed(raw, what)?;
    let value = parse_number(text).map_err(|fault| {
        let error = raw.error(Code::NotANumber).message(format!("{what} must be a plain number"));
        error.label(fault.message).help(fault.help)
    })?;
    signed(raw, what, value, sign)
}

/// A quantity of this kind, in SI units.
pub(super) fn quantity(raw: &Raw, what: &str, measure: Measure, sign: Sign) -> Result<f64, Diagnostic> {
    quantity_of(raw, what, measure, &[measure.dimension()], sign).map(|(value, _)| value)
}

/// A quantity of one of these dimensions, in SI units, and its dimension. The first is the usual one.
pub(super) fn quantity_of(
    raw: &Raw,
    what: &str,
    measure: Measure,
    dimensions: &[Dimension],
    sign: Sign,
) -> Result<(f64, Dimension), Diagnostic> {
    let text = typed(raw, what)?;
    let needed = dimensions.first().copied().unwrap_or(Dimension::NONE);
    let named = noun(measure, needed);
    let quantity = parse_quantity(text).map_err(|fault| not_a_quantity(raw, what, text, &fault))?;
    if quantity.has_unit && !dimensions.contains(&quantity.dimension) {
        let fault = raw.error(Code::WrongDimension).message(format!("{what} must be {named}"));
        let such_as = example(measure);
        return Err(fault.label(format!("`{text}` is {}; {named} is needed, such as `{such_as}`", quantity.dimension)));
    }
    // Zero is the same in every unit.
    if !quantity.has_unit && !dimensions.contains(&Dimension::NONE) && quantity.value.abs() > 0.0 {
        let fault = raw.error(Code::MissingUnit).message(format!("{what} has no unit"));
        let fault = fault.label(format!("{named} is needed, such as `{}`", example(measure)));
        return Err(fault.help("write the unit behind the number; only 0 may stand without one"));
    }
    signed(raw, what, quantity.value, sign)
        .map(|value| (value, if quantity.has_unit { quantity.dimension } else { needed }))
}

/// What is needed, in words. An angle is a plain number to the units, but not to the reader.
fn noun(measure: Measure, dimension: Dimension) -> String {
    match measure {
        Measure::Angle | Measure::Rotation => "an angle".to_owned(),
        Measure::RotationalSpring => "a moment per angle".to_owned(),
        _ => dimension.to_string(),
    }
}

/// Sizes in SI units between which quantities of engineering lie. What is worked from others could not be printed.
const SIZES: std::ops::RangeInclusive<f64> = 1e-15..=1e15;

fn signed(raw: &Raw, what: &str, value: f64, sign: Sign) -> Result<f64, Diagnostic> {
    let size = value.abs();
    if size > 0.0 && !SIZES.contains(&size) {
        let (than, label) = if size < 1.0 { ("smaller", "next to nothing") } else { ("greater", "far too much") };
        let fault = raw.error(Code::OutOfRange).message(format!("{what} is {than} than any structure knows"));
        return Err(fault.label(label).help("write 0 for nothing, and check the power of ten and the unit"));
    }
    if sign == Sign::Positive && value <= 0.0 {
        let fault = raw.error(Code::OutOfRange).message(format!("{what} must be above zero"));
        return Err(fault.label("not above zero"));
    }
    if sign == Sign::NotNegative && value < 0.0 {
        let fault = raw.error(Code::OutOfRange).message(format!("{what} must not be below zero"));
        return Err(fault.label("below zero"));
    }
    Ok(value)
}

fn not_a_quantity(raw: &Raw, what: &str, text: &str, fault: &UnitFault) -> Diagnostic {
    let error = raw.error(Code::NotAQuantity).message(format!("{what} is not a quantity"));
    let error = error.label(fault.message.clone()).help(fault.help.clone());
    // Only where the text stands in the file as it is can a part of it be pointed at.
    if raw.span.len() == text.len() && fault.span.end <= text.len() && !fault.span.is_empty() {
        return error.at(raw.span.start + fault.span.start..raw.span.start + fault.span.end);
    }
    error
}

/// A length for a message: at most six digits, in metres or feet.
pub(super) fn shown_length(length_m: f64, display: &super::super::Display) -> String {
    let unit = display.unit(Measure::Span);
    let value = length_m / unit.scale;
    let whole_digits = if value.abs() >= 1.0 { value.abs().log10().floor() as usize + 1 } else { 1 };
    let text = format!("{value:.*}", 6_usize.saturating_sub(whole_digits));
    let text = if text.contains('.') { text.trim_end_matches('0').trim_end_matches('.') } else { &text };
    format!("{text} {}", unit.text)
}
