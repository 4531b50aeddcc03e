//! Fractions: one part above a rule on the axis, the other below it.
use super::{Box2, Filling, Maths, NESTED, Place};
use crate::formula::Tree;

/// How far the rule reaches past the wider part, and the space outside it, ems.
const OVERHANG: f32 = 0.08;
const OUTSIDE: f32 = 0.1;
/// Least air above and below the rule, ems; the face's own least is for fractions within running text.
const AIR: f32 = 0.16;

impl Maths<'_, '_> {
    pub(super) fn fraction(&mut self, above: &Tree, below: &Tree, filling: Filling<'_>, size: f32, depth: u8) -> Box2 {
        let inner = if depth > 0 { size * NESTED } else { size };
        let from = self.frame.items.len();
        let upper = self.build(above, filling, Place::Alone, inner, depth + 1);
        let lower = self.build(below, filling, Place::Alone, inner, depth + 1);
        let c = self.setter.fonts.maths.constants;
        let axis = c.axis_height * size;
        let rule = c.fraction_rule * size * 0.75;
        let gap = |least: f32| rule / 2.0 + least.max(AIR) * size;
        let up = (c.numerator_shift_up * size).max(axis + gap(c.numerator_gap) + upper.depth);
        let down = (c.denominator_shift_down * size).max(lower.height + gap(c.denominator_gap) - axis);
        let length = upper.width.max(lower.width) + 2.0 * OVERHANG * size;
        let left = OUTSIDE * size;
        let middle = |part: Box2| left + (length - part.width) / 2.0;
        // The lower part was built last, so that it alone lies from `lower.from` on.
        self.frame.shift(lower.from, middle(lower) - middle(upper), down + up);
        self.frame.shift(from, middle(upper), -up);
        self.frame.rule(left, -axis - rule / 2.0, length, rule);
        Box2 { from, width: length + 2.0 * left, height: up + upper.height, depth: down + lower.depth, italic: 0.0 }
    }
}
