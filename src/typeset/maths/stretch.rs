//! A glyph grown to a height: a larger drawing where the face has one, else a stack of parts.
use super::{Box2, Maths};
use crate::typeset::FaceName;
use crate::typeset::font::Growth;
use crate::typeset::frame::{Glyph, Item, Run};

/// Parts of a stack are repeated this often at most; no formula of a sheet comes near it.
const MOST: usize = 60;

impl Maths<'_, '_> {
    /// Sets a character grown to at least `target` points where the face can.
    pub(super) fn stretch(&mut self, character: char, target: f32, size: f32) -> Box2 {
        let fonts = self.setter.fonts;
        let plain = fonts.face(FaceName::Math).glyph(character);
        let growth = fonts.maths.growth(character);
        let [height, depth] = fonts.maths.extent(plain);
        if (height + depth) * size >= target {
            return self.one(plain, size);
        }
        let Some(growth) = growth else { return self.one(plain, size) };
        if let Some((glyph, _)) = growth.variants.iter().find(|(_, height)| height * size >= target) {
            return self.one(*glyph, size);
        }
        if growth.parts.is_empty() {
            let largest = growth.variants.last().map_or(plain, |(glyph, _)| *glyph);
            return self.one(largest, size);
        }
        self.stack(growth, target, size)
    }

    fn one(&mut self, glyph: u16, size: f32) -> Box2 {
        let from = self.frame.items.len();
        let width = self.place(glyph, size, 0.0);
        let [height, depth] = self.setter.fonts.maths.extent(glyph);
        Box2 { from, width, height: height * size, depth: depth * size, italic: 0.0 }
    }

    fn place(&mut self, glyph: u16, size: f32, y: f32) -> f32 {
        let width = f32::from(self.setter.fonts.face(FaceName::Math).advance(glyph)) * size / 1000.0;
        let first = self.frame.glyphs.len() as u32;
        self.frame.glyphs.push(Glyph { id: glyph, after: 0 });
        let run = Run { face: FaceName::Math, size, x: 0.0, y, width, first, count: 1, grey: 0 };
        self.frame.items.push(Item::Run(run));
        width
    }

    fn stack(&mut self, growth: &Growth, target: f32, size: f32) -> Box2 {
        let parts = |repeats: usize| {
            growth.parts.iter().flat_map(move |part| std::iter::repeat_n(part, if part.repeats { repeats } else { 1 }))
        };
        let tallest = |repeats: usize| {
            let count = parts(repeats).count();
            let sum: f32 = parts(repeats).map(|part| part.height).sum();
            (sum - growth.overlap * count.saturating_sub(1) as f32) * size
        };
        let repeats = (1..MOST).find(|&repeats| tallest(repeats) >= target).unwrap_or(MOST);
        let joints = parts(repeats).count().saturating_sub(1).max(1) as f32;
        // All joints overlap alike, by more than the least where that meets the height better.
        let excess = ((tallest(repeats) - target) / joints).max(0.0);
        let from = self.frame.items.len();
        let mut top = 0.0;
        let mut width: f32 = 0.0;
        let mut before: Option<f32> = None;
        for part in parts(repeats) {
            if let Some(end) = before {
                top -= (growth.overlap * size + excess).min(end.min(part.start).max(growth.overlap) * size);
            }
            let [_, depth] = self.setter.fonts.maths.extent(part.glyph);
            width = width.max(self.place(part.glyph, size, -(top + depth * size)));
            top += part.height * size;
            before = Some(part.end);
        }
        Box2 { from, width, height: top, depth: 0.0, italic: 0.0 }
    }
}
