//! Square roots: a sign that grows, and a rule over what it covers.
use super::{Box2, Filling, Maths, Place};
use crate::formula::Tree;

/// How far the rule reaches past the content, ems.
const OVERHANG: f32 = 0.06;

impl Maths<'_, '_> {
    pub(super) fn radical(&mut self, part: &Tree, filling: Filling<'_>, size: f32, depth: u8) -> Box2 {
        let inner = self.build(part, filling, Place::Alone, size, depth);
        let c = self.setter.fonts.maths.constants;
        let rule = c.radical_rule * size * 0.75;
        let least = inner.height + inner.depth + c.radical_gap * size + rule;
        let sign = self.stretch('√', least, size);
        let whole = sign.height + sign.depth;
        let gap = c.radical_gap * size + ((whole - least) / 2.0).max(0.0);
        let top = inner.height + gap + rule;
        // The sign's upper end meets the rule's upper edge.
        self.frame.shift(sign.from, 0.0, sign.height - top);
        self.frame.items[inner.from..].rotate_left(sign.from - inner.from);
        let content = inner.from + (self.frame.items.len() - sign.from);
        self.frame.shift(content, sign.width, 0.0);
        let length = inner.width + inner.italic + OVERHANG * size;
        self.frame.rule(sign.width - 0.02 * size, -top, length + 0.02 * size, rule);
        Box2 {
            from: inner.from,
            width: sign.width + length,
            height: top + c.radical_extra_ascender * size,
            depth: inner.depth.max(whole - top),
            italic: 0.0,
        }
    }
}
