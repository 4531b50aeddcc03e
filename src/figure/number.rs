//! Numbers as drawings print them.
use crate::model::Display;
use crate::units::{Measure, Printed};

/// A value in its unit to that many significant digits, zeros at the end of a fraction left away.
#[must_use]
pub(super) fn number(value: f64, digits: i32) -> String {
    let mut printed = rounded(value, digits);
    while printed.count != 0 && printed.count % 10 == 0 && printed.place < 0 {
        printed = Printed { count: printed.count / 10, place: printed.place + 1 };
    }
    printed.to_string()
}

/// A value in its unit to that many significant digits, each of them printed.
#[must_use]
pub(super) fn exact(value: f64, digits: i32) -> String {
    rounded(value, digits).to_string()
}

fn rounded(value: f64, digits: i32) -> Printed {
    if value == 0.0 || !value.is_finite() {
        return Printed { count: 0, place: 0 };
    }
    let leading = value.abs().log10().floor() as i32;
    let place = (leading - digits + 1).clamp(-12, 12);
    // Whole numbers of a handy size are read more easily than powers of ten.
    Printed::nearest(value, if place > 0 && leading < 6 { 0 } else { place })
}

/// A value in SI, printed without its unit.
#[must_use]
pub(super) fn bare(display: &Display, measure: Measure, value: f64, digits: i32) -> String {
    number(value / display.unit(measure).scale, digits)
}

/// A value in SI, printed with its unit.
#[must_use]
pub(super) fn quantity(display: &Display, measure: Measure, value: f64, digits: i32) -> String {
    let unit = display.unit(measure);
    let gap =
        if unit.text.is_empty() || unit.text.starts_with('°') && unit.text.chars().count() == 1 { "" } else { " " };
    format!("{}{gap}{}", number(value / unit.scale, digits), unit.text)
}
