//! Powers and indices.
use super::{Box2, Filling, Maths, Place};
use crate::formula::Tree;

impl Maths<'_, '_> {
    pub(super) fn power(&mut self, part: &Tree, exponent: i8, filling: Filling<'_>, size: f32, depth: u8) -> Box2 {
        if let (Tree::Symbol(symbol), Filling::Symbols) = (part, filling) {
            return self.symbol(symbol, Some(exponent), size);
        }
        let base = self.build(part, filling, Place::Base, size, depth);
        self.superscript(base, i32::from(exponent), size)
    }

    /// Puts a whole number to the upper right of the last thing set.
    pub(super) fn superscript(&mut self, base: Box2, exponent: i32, size: f32) -> Box2 {
        let digits = exponent.unsigned_abs().to_string();
        let sign = (exponent < 0).then_some('−');
        self.superscript_text(base, sign.into_iter().chain(digits.chars()), size)
    }

    pub(super) fn superscript_text(&mut self, base: Box2, text: impl Iterator<Item = char>, size: f32) -> Box2 {
        let c = self.setter.fonts.maths.constants;
        let script = self.characters(text, size * c.script_scale);
        let up = (c.superscript_shift_up * size)
            .max(base.height - c.superscript_baseline_drop_max * size)
            .max(script.depth + c.superscript_bottom_min * size);
        self.attach(base, script, base.italic, -up, size)
    }

    /// Puts an index to the lower right of the last thing set.
    pub(super) fn subscript(&mut self, base: Box2, script: Box2, size: f32) -> Box2 {
        let down = self.subscript_drop(script, size);
        self.attach(base, script, 0.0, down, size)
    }

    pub(super) fn subscript_drop(&self, script: Box2, size: f32) -> f32 {
        let c = self.setter.fonts.maths.constants;
        (c.subscript_shift_down * size).max(script.height - c.subscript_top_max * size)
    }

    fn attach(&mut self, base: Box2, script: Box2, gap: f32, down: f32, size: f32) -> Box2 {
        let after = self.setter.fonts.maths.constants.space_after_script * size;
        self.frame.shift(script.from, base.width + gap, down);
        Box2 {
            from: base.from,
            width: base.width + gap + script.width + after,
            height: base.height.max(script.height - down),
            depth: base.depth.max(script.depth + down),
            italic: 0.0,
        }
    }
}
