//! `display:` units, digits, paper and detail.
use super::super::keys::{DISPLAY, Takes, display_keys};
use super::super::{Detail, Display, Paper};
use super::fields::Fields;
use super::leaf::typed;
use crate::diagnostic::{Code, Diagnostic, Diagnostics};
use crate::input::Raw;
use crate::units::{Measure, System, Unit, parse_number, parse_unit};
use std::borrow::Cow;

const DIGITS: u8 = 4;

pub(super) fn read(root: &Fields<'_>, faults: &mut Diagnostics) -> Display {
    let standard = Display { digits: DIGITS, ..Display::default() };
    let Some(raw) = root.get("display") else { return standard };
    let keys = display_keys();
    let Some(display) = Fields::with_keys(raw, "`display`".to_owned(), Cow::Borrowed(&keys), faults) else {
        return standard;
    };
    let system = match display.word("system", faults) {
        Some("us") => System::Us,
        _ => System::Metric,
    };
    let paper = match display.word("paper", faults) {
        Some("Letter") => Paper::Letter,
        _ => Paper::A4,
    };
    let detail = match display.word("detail", faults) {
        Some("full") => Detail::Full,
        Some("summary") => Detail::Summary,
        _ => Detail::Governing,
    };
    let digits = display.read("digits", faults, digits).unwrap_or(DIGITS);
    let units = keys.iter().skip(DISPLAY.keys.len()).filter_map(|key| match key.takes {
        Takes::Unit(measure) => Some((key.name, measure)),
        _ => None,
    });
    let overrides = units
        .filter_map(|(name, measure)| {
            Some((measure, display.read(name, faults, |raw, what| unit(raw, what, measure))?))
        })
        .collect();
    Display { system, overrides, digits, paper, detail }
}

fn digits(raw: &Raw, what: &str) -> Result<u8, Diagnostic> {
    let text = typed(raw, what)?;
    match text.parse::<u8>() {
        Ok(digits @ 3..=8) => Ok(digits),
        _ => {
            let number = parse_number(text).is_ok();
            let fault = raw.error(if number { Code::OutOfRange } else { Code::NotANumber });
            let fault = fault.message(format!("{what} must be a whole number from 3 to 8"));
            Err(fault.label(if number { "out of range" } else { "not a whole number" }))
        }
    }
}

fn unit(raw: &Raw, what: &str, measure: Measure) -> Result<Unit, Diagnostic> {
    let text = typed(raw, what)?;
    let such_as = format!("a unit such as `{}` is needed", measure.unit(System::Metric).text);
    let unit = parse_unit(text).map_err(|fault| {
        let error = raw.error(Code::NotAQuantity).message(format!("{what} is not a unit"));
        error.label(fault.message).help(fault.help)
    })?;
    if unit.dimension == measure.dimension() && !unit.text.is_empty() {
        return Ok(unit);
    }
    let fault = raw.error(Code::WrongDimension).message(format!("{what} cannot be printed in `{text}`"));
    Err(fault.label(format!("the unit of {}", unit.dimension)).help(such_as))
}
