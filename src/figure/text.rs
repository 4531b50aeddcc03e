//! Conservative widths of text, so that what finds room here finds room in any serif face.

/// Height of a line of text over its size.
const LINE: f64 = 1.15;
/// Millimetres in a point.
const POINT: f64 = 25.4 / 72.0;

/// Width of a text at a size in points, mm. Rather too wide than too narrow.
#[must_use]
pub(super) fn width(text: &str, size: f64) -> f64 {
    let em: f64 = text.chars().map(of).sum();
    em * size * POINT
}

/// Height of a line of text at a size in points, mm.
#[must_use]
pub(super) fn height(size: f64) -> f64 {
    size * POINT * LINE
}

/// How far below the top of its line a text's baseline lies, mm.
#[must_use]
pub(super) fn ascent(size: f64) -> f64 {
    size * POINT * 0.86
}

/// Width of a character in ems.
fn of(character: char) -> f64 {
    match character {
        'i' | 'j' | 'l' | '.' | ',' | ':' | ';' | '\'' | '|' | '!' => 0.31,
        'f' | 't' | 'r' | 'I' | 'J' | '(' | ')' | '/' | ' ' | '·' | '[' | ']' | '-' => 0.42,
        '0'..='9' | 'a' | 'c' | 'e' | 's' | 'z' => 0.54,
        '²' | '³' | '⁻' | '°' => 0.40,
        'm' | 'w' | 'M' | 'W' | '—' | '%' => 0.96,
        'b' | 'd' | 'g' | 'h' | 'k' | 'n' | 'o' | 'p' | 'q' | 'u' | 'v' | 'x' | 'y' => 0.59,
        'A'..='Z' | '+' | '−' | '×' | '=' | '<' | '>' | '≤' | '–' | 'Δ' => 0.76,
        other if other.is_ascii() => 0.62,
        _ => 1.0,
    }
}
