//! Symbols: italic letters, an index of upright words and digits or of an italic axis.
use super::{Box2, Maths};
use crate::formula::Symbol;
use crate::typeset::font::italic_greek;

impl Maths<'_, '_> {
    /// A symbol, raised to a power where one is given.
    pub(in crate::typeset) fn symbol(&mut self, symbol: &Symbol, exponent: Option<i8>, size: f32) -> Box2 {
        let base = self.characters(symbol.stem().chars().map(italic), size);
        let index = symbol.subscript();
        if index.is_empty() {
            return match exponent {
                Some(exponent) => self.superscript(base, i32::from(exponent), size),
                None => base,
            };
        }
        let small = size * self.setter.fonts.maths.constants.script_scale;
        // A single running letter (an axis, a count) is a quantity itself and so italic; words are upright.
        let running = matches!(index.as_bytes(), [b'x' | b'y' | b'z' | b'i' | b'j' | b'n']);
        let script = if running {
            self.characters(index.chars().map(italic), small)
        } else {
            self.characters(index.chars().map(|c| if c == '_' { ' ' } else { c }), small)
        };
        let Some(exponent) = exponent else { return self.subscript(base, script, size) };
        // Index and power stand one above the other.
        let indexed = self.subscript(base, script, size);
        let stacked = self.superscript(Box2 { from: base.from, ..base }, i32::from(exponent), size);
        Box2 { width: stacked.width.max(indexed.width), depth: stacked.depth.max(indexed.depth), ..stacked }
    }
}

/// The letter of the maths alphabet that stands for a variable.
pub(super) fn italic(letter: char) -> char {
    let code = match letter {
        'h' => Some(0x210e),
        'A'..='Z' => Some(0x1d434 + (letter as u32 - 'A' as u32)),
        'a'..='z' => Some(0x1d44e + (letter as u32 - 'a' as u32)),
        // Capital Greek differences and sums are operators' signs and stay upright.
        'Δ' | 'Σ' => None,
        other => italic_greek(other),
    };
    code.and_then(char::from_u32).unwrap_or(letter)
}
