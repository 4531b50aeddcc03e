//! Reads quantities as engineers type them.
//!
//! ```text
//! quantity = number unit { number unit }        8 ft 6 in, −12.5 kN, 210 GPa, 0
//! unit     = factor { ("·" | "." | "*" | " " | "/") factor } | "/" unit
//! factor   = name [ power ] | "1"               mm2 mm^2 mm² m-2 kNm
//! ```
//! Division binds to the next factor alone: `kN/m·s` is (kN/m)·s; parentheses are not read.
use super::Dimension;
use super::unit::{UNITS, Unit, UnitRow};
use std::ops::Range;
use std::sync::Arc;

/// A value in SI base units together with what it measures.
#[derive(Debug, Clone, Copy, PartialEq)]
pub struct Quantity {
    /// Value in SI base units.
    pub value: f64,
    /// What it measures.
    pub dimension: Dimension,
    /// Whether a unit was written; a bare number has none.
    pub has_unit: bool,
}

/// Why a text is not a quantity or a unit, and which part of it is at fault.
#[derive(Debug, Clone, PartialEq, Eq)]
pub struct UnitFault {
    /// Bytes of the text that are wrong.
    pub span: Range<usize>,
    /// What is wrong.
    pub message: String,
    /// What would be right.
    pub help: String,
}

fn fault<T>(span: Range<usize>, message: impl Into<String>, help: impl Into<String>) -> Result<T, UnitFault> {
    Err(UnitFault { span, message: message.into(), help: help.into() })
}

/// Reads a number as typed: decimal point, `e` exponent, ASCII or typographic minus.
///
/// # Errors
/// The text is not a finite decimal number.
pub fn parse_number(text: &str) -> Result<f64, UnitFault> {
    let trimmed = text.trim();
    let end = number_length(trimmed);
    if end == 0 || end != trimmed.len() {
        return fault(
            0..text.len(),
            format!("`{trimmed}` is not a number"),
            "write digits with a decimal point, such as `1.35`",
        );
    }
    finite(&trimmed[..end], 0..text.len())
}

fn finite(digits: &str, span: Range<usize>) -> Result<f64, UnitFault> {
    match digits.replace('−', "-").parse::<f64>() {
        Ok(value) if value.is_finite() => Ok(value),
        _ => fault(span, format!("`{digits}` is not a finite number"), "write a number that a calculator can hold"),
    }
}

/// Bytes of the longest decimal number at the start of the text.
fn number_length(text: &str) -> usize {
    let mut seen_digit = false;
    let mut seen_point = false;
    let mut end = 0;
    for (at, c) in text.char_indices() {
        match c {
            '+' | '-' | '−' if at == 0 => {}
            '0'..='9' => seen_digit = true,
            '.' if !seen_point => seen_point = true,
            _ => break,
        }
        end = at + c.len_utf8();
    }
    if !seen_digit {
        return 0;
    }
    let rest = &text[end..];
    if let Some(exponent) = rest.strip_prefix(['e', 'E']) {
        let sign = exponent.chars().next().filter(|c| "+-−".contains(*c)).map_or(0, char::len_utf8);
        let digits = exponent[sign..].bytes().take_while(u8::is_ascii_digit).count();
        if digits > 0 {
            return end + 1 + sign + digits;
        }
    }
    end
}

/// Reads a quantity with its unit. A bare number comes back with `has_unit: false`.
///
/// # Errors
/// No number at the start, an unknown unit, a value that is not finite, or parts of different dimension.
pub fn parse_quantity(text: &str) -> Result<Quantity, UnitFault> {
    let mut at = text.len() - text.trim_start().len();
    let end = text.trim_end().len();
    let mut total: Option<Quantity> = None;
    let mut sign = 1.0;
    while at < end {
        let rest = &text[at..end];
        let length = number_length(rest);
        if length == 0 {
            return fault(
                at..end,
                format!("expected a number, found `{rest}`"),
                "a quantity is a number and its unit, such as `12.5 kN`",
            );
        }
        let number = finite(&rest[..length], at..at + length)?;
        let number_start = at;
        at += length;
        let gap = text[at..end].len() - text[at..end].trim_start().len();
        let unit_start = at + gap;
        let unit_end = unit_start + unit_length(&text[unit_start..end]);
        let unit = parse_unit_at(&text[unit_start..unit_end], unit_start)?;
        let has_unit = unit_end > unit_start;
        let part = Quantity { value: number.abs() * unit.scale, dimension: unit.dimension, has_unit };
        total = Some(match total {
            None => {
                sign = if number.is_sign_negative() { -1.0 } else { 1.0 };
                part
            }
            Some(before)
                if before.dimension == part.dimension
                    && has_unit
                    && before.has_unit
                    && !rest.starts_with(['-', '−', '+']) =>
            {
                Quantity { value: before.value + part.value, ..part }
            }
            Some(_) => {
                return fault(
                    number_start..unit_end,
                    format!("`{}` does not continue the quantity before it", &text[number_start..unit_end]),
                    "parts of one quantity are of one kind, such as `8 ft 6 in`",
                );
            }
        });
        at = unit_end + (text[unit_end..end].len() - text[unit_end..end].trim_start().len());
    }
    match total {
        Some(quantity) if (sign * quantity.value).is_finite() => {
            Ok(Quantity { value: sign * quantity.value, ..quantity })
        }
        Some(_) => fault(
            0..text.len(),
            "the value is beyond what can be computed with",
            "write a number that a calculator can hold",
        ),
        None => fault(
            0..text.len(),
            "expected a quantity, found nothing",
            "a quantity is a number and its unit, such as `12.5 kN`",
        ),
    }
}

/// Bytes of the unit at the start of the text: it ends where a new number follows a space.
fn unit_length(text: &str) -> usize {
    let mut after_space = false;
    for (at, c) in text.char_indices() {
        let starts_number = c.is_ascii_digit()
            || matches!(c, '-' | '−' | '+')
            || (c == '.' && text[at + 1..].starts_with(|d: char| d.is_ascii_digit()));
        if after_space && starts_number {
            return text[..at].trim_end().len();
        }
        after_space = c.is_whitespace();
    }
    text.trim_end().len()
}

/// Most names in one unit; what is longer is no unit of engineering, and its powers could not be counted.
const MOST_FACTORS: usize = 5;

/// Reads a unit: `kN·m`, `N/mm2`, `1/m`, `/K`, `kNm`. Empty text is a plain number.
///
/// # Errors
/// A name that is in no row of the table, or a power that is not a whole number.
pub fn parse_unit(text: &str) -> Result<Unit, UnitFault> {
    parse_unit_at(text, 0)
}

fn parse_unit_at(text: &str, offset: usize) -> Result<Unit, UnitFault> {
    let mut dimension = Dimension::NONE;
    let mut scale = 1.0;
    let mut printed = String::new();
    let mut factors_read = 0;
    let mut divide = false;
    let mut at = 0;
    let mut expects_factor = false;
    while at < text.len() {
        let Some(c) = text[at..].chars().next() else { break };
        match c {
            '·' | '.' | '*' | '×' => {
                at += c.len_utf8();
                expects_factor = true;
                continue;
            }
            c if c.is_whitespace() => {
                at += c.len_utf8();
                continue;
            }
            '/' => {
                at += 1;
                divide = true;
                expects_factor = true;
                continue;
            }
            _ => {}
        }
        let length = text[at..].find(|c: char| "·.*×/".contains(c) || c.is_whitespace()).unwrap_or(text.len() - at);
        let token = &text[at..at + length];
        let span = offset + at..offset + at + length;
        if token != "1" {
            for (unit, power) in factors(token, &span)? {
                let power = if divide { -power } else { power };
                factors_read += 1;
                if factors_read > MOST_FACTORS {
                    return fault(
                        span,
                        "the unit has too many factors",
                        "a unit is a product of a few names, such as `kN·m/rad`",
                    );
                }
                dimension = dimension * unit.dimension.power(power);
                scale *= unit.scale.powi(i32::from(power));
                print_factor(&mut printed, unit.symbol, power);
            }
        }
        divide = false;
        expects_factor = false;
        at += length;
    }
    if expects_factor {
        return fault(
            offset..offset + text.len(),
            format!("the unit `{text}` stops short"),
            "a unit follows each `/` and `·`, such as `kN/m`",
        );
    }
    Ok(Unit { text: Arc::from(printed), dimension, scale })
}

fn print_factor(printed: &mut String, symbol: &str, power: i8) {
    if power < 0 {
        printed.push_str(if printed.is_empty() { "1/" } else { "/" });
    } else if !printed.is_empty() {
        printed.push('·');
    }
    printed.push_str(symbol);
    match power.unsigned_abs() {
        1 => {}
        n => n.to_string().chars().for_each(|d| printed.push(superscript(d))),
    }
}

/// The superscript form of a digit; other characters are kept.
fn superscript(digit: char) -> char {
    const UP: [char; 10] = ['⁰', '¹', '²', '³', '⁴', '⁵', '⁶', '⁷', '⁸', '⁹'];
    digit.to_digit(10).map_or(digit, |d| UP[d as usize])
}

/// One typed factor: a unit with its power, or two units run together as in `kNm`.
fn factors(token: &str, span: &Range<usize>) -> Result<Vec<(&'static UnitRow, i8)>, UnitFault> {
    let name_end = token.find(|c: char| c.is_ascii_digit() || "^-−⁻⁰¹²³⁴⁵⁶⁷⁸⁹".contains(c)).unwrap_or(token.len());
    let (name, power) = token.split_at(name_end);
    let power = if power.is_empty() { 1 } else { read_power(power, span)? };
    if let Some(row) = find_unit(name) {
        return Ok(vec![(row, power)]);
    }
    for (at, _) in name.char_indices().skip(1) {
        if let (Some(first), Some(second)) = (find_unit(&name[..at]), find_unit(&name[at..])) {
            return Ok(vec![(first, 1), (second, power)]);
        }
    }
    let known = UNITS.iter().map(|u| u.symbol).collect::<Vec<_>>().join(" ");
    fault(
        span.clone(),
        format!("no unit is called `{token}`"),
        format!("units are {known}, and products and powers of them"),
    )
}

fn find_unit(name: &str) -> Option<&'static UnitRow> {
    UNITS.iter().find(|unit| unit.symbol == name || unit.also.contains(&name))
}

fn read_power(text: &str, span: &Range<usize>) -> Result<i8, UnitFault> {
    let plain: String = text
        .trim_start_matches('^')
        .chars()
        .map(|c| match c {
            '−' | '⁻' => '-',
            '⁰' => '0',
            '¹' => '1',
            '²' => '2',
            '³' => '3',
            '⁴'..='⁹' => char::from(b'4' + (c as u32 - '⁴' as u32) as u8),
            other => other,
        })
        .collect();
    match plain.parse::<i8>() {
        Ok(power) if power != 0 && (-9..=9).contains(&power) => Ok(power),
        _ => fault(
            span.clone(),
            format!("`{text}` is not a power"),
            "powers are whole numbers, such as mm4, mm^4 or mm⁴",
        ),
    }
}

#[cfg(test)]
mod tests {
    use super::*;

    #[track_caller]
    fn check(text: &str, value: f64, dimension: Dimension) {
        let quantity = parse_quantity(text).unwrap_or_else(|f| panic!("{text}: {f:?}"));
        assert_eq!(quantity.dimension, dimension, "{text}");
        assert!((quantity.value - value).abs() <= 1e-13 * value.abs(), "{text}: {} against {value}", quantity.value);
    }

    /// Spellings that the input contract names as equal.
    #[test]
    fn spellings_of_one_unit_agree() {
        for text in ["1943 cm4", "1943 cm^4", "1943 cm⁴", "1943cm4"] {
            check(text, 1943e-8, Dimension::INERTIA);
        }
        for text in ["3 kN.m", "3 kN·m", "3 kN*m", "3 kNm", "3 kN m"] {
            check(text, 3000.0, Dimension::MOMENT);
        }
        check("12e-6 /K", 12e-6, Dimension::EXPANSION);
        check("12e-6 1/K", 12e-6, Dimension::EXPANSION);
        check("500 kN·m/rad", 5e5, Dimension::MOMENT);
        check("12 kN/mm", 1.2e7, Dimension::LINE_LOAD);
        check("−8 ft 6 in", -2.5908, Dimension::LENGTH);
        check("30 deg", std::f64::consts::PI / 6.0, Dimension::NONE);
    }

    #[test]
    fn faults_say_where() {
        for (text, span) in [
            ("12 kM", 3..5),
            ("abc", 0..3),
            ("5 kN 3 m", 5..8),
            ("1e999 kN", 0..5),
            ("nan", 0..3),
            ("3 kN/", 2..5),
            ("3 m-128", 2..7),
            ("3 m·m·m·m·m·m", 17..18),
        ] {
            let fault = parse_quantity(text).expect_err(text);
            assert_eq!(fault.span, span, "{text}: {fault:?}");
            assert!(!fault.help.is_empty());
        }
    }

    #[test]
    fn printed_units_read_back() {
        for text in ["kN·m", "N/mm²", "1/m", "kN·m/rad", "mm⁴", "kg/m³"] {
            assert_eq!(&*parse_unit(text).expect(text).text, text);
        }
    }
}
