//! Brackets and bars that grow with what they enclose.
use super::{Box2, Filling, Maths, Place};
use crate::formula::Tree;

/// A bracket may fall short of its content by this part of its height, as hand-set brackets do.
const SHORTFALL: f32 = 0.1;
/// Space inside bars, ems.
const BAR_GAP: f32 = 0.06;

impl Maths<'_, '_> {
    /// Puts brackets about the last thing set.
    pub(super) fn enclose(&mut self, inner: Box2, left: char, right: char, size: f32) -> Box2 {
        let axis = self.setter.fonts.maths.constants.axis_height * size;
        let half = (inner.height - axis).max(inner.depth + axis);
        let gap = if left == '|' { BAR_GAP * size } else { 0.0 };
        let target = 2.0 * half * (1.0 - SHORTFALL);
        // Set after its content but read before it: the opening bracket's items are turned to the front.
        let opening = self.centred(left, target, size);
        self.frame.items[inner.from..].rotate_left(opening.from - inner.from);
        let moved = inner.from + (self.frame.items.len() - opening.from);
        self.frame.shift(moved, opening.width + gap, 0.0);
        let whole = Box2 {
            from: inner.from,
            width: opening.width + gap + inner.width + inner.italic,
            height: inner.height.max(opening.height),
            depth: inner.depth.max(opening.depth),
            italic: 0.0,
        };
        let closing = self.centred(right, target, size);
        self.join(whole, gap, closing)
    }

    /// A magnitude between bars.
    pub(super) fn absolute(&mut self, part: &Tree, filling: Filling<'_>, size: f32, depth: u8) -> Box2 {
        let inner = self.build(part, filling, Place::Alone, size, depth);
        self.enclose(inner, '|', '|', size)
    }

    /// A grown bracket, its middle on the axis.
    fn centred(&mut self, character: char, target: f32, size: f32) -> Box2 {
        let grown = self.stretch(character, target, size);
        let axis = self.setter.fonts.maths.constants.axis_height * size;
        let down = (grown.height - grown.depth) / 2.0 - axis;
        self.frame.shift(grown.from, 0.0, down);
        Box2 { height: grown.height - down, depth: grown.depth + down, ..grown }
    }
}
