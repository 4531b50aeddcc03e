//! Which words of a text are symbols of formulas, and are set as such.
use crate::formula::Symbol;
use std::ops::Range;

/// Whether a stem is a symbol's: one letter, or two of which the first is a capital or Greek (`Fx`, `Δx`); other
/// pairs are words (`to`, `in`).
pub(super) fn is_stem(stem: &str) -> bool {
    let mut letters = stem.chars();
    match (letters.next(), letters.next(), letters.next()) {
        (Some(letter), None, _) => letter.is_alphabetic(),
        (Some(first), Some(second), None) => {
            second.is_alphabetic() && (first.is_uppercase() || ('α'..='ω').contains(&first))
        }
        _ => false,
    }
}

/// The symbols with an index among the words of a text, such as `N_start` and `κ₁`.
pub(super) fn within(text: &str) -> Vec<Range<usize>> {
    let mut found = Vec::new();
    if !text.contains(is_index) {
        return found;
    }
    let mut start = None;
    for (at, character) in text.char_indices().chain([(text.len(), ' ')]) {
        let joined = character.is_alphanumeric() || is_index(character);
        match (joined, start) {
            (true, None) => start = Some(at),
            (false, Some(from)) => {
                if is_indexed(&text[from..at]) {
                    found.push(from..at);
                }
                start = None;
            }
            _ => {}
        }
    }
    found
}

fn is_index(character: char) -> bool {
    character == '_' || ('₀'..='₉').contains(&character)
}

fn is_indexed(word: &str) -> bool {
    let symbol = Symbol::owned(word.to_string());
    let index = symbol.subscript();
    is_stem(symbol.stem()) && !index.is_empty() && index.chars().all(char::is_alphanumeric)
}

#[cfg(test)]
mod tests {
    use super::*;

    #[test]
    fn indexed_symbols_are_found_and_names_are_not() {
        let text = "M_1 and −M_2, σ_top at κ₁; in_plane, shear_area, A_, m², (N_Ed) x_v.";
        let words: Vec<&str> = within(text).into_iter().map(|range| &text[range]).collect();
        assert_eq!(words, ["M_1", "M_2", "σ_top", "κ₁", "N_Ed", "x_v"]);
    }
}
