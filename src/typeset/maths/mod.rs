//! Formulas in two dimensions, set from their trees: one file for each shape.
mod bracket;
mod fraction;
mod function;
mod line;
mod number;
mod radical;
mod row;
mod script;
mod stretch;
mod symbol;

pub(super) use line::Line;

use super::frame::{Frame, Glyph, Item, Run};
use super::{FaceName, Setter};
use crate::formula::{Symbol, Tree};
use crate::units::Printed;

/// What stands for a symbol.
#[derive(Clone, Copy)]
pub(super) enum Filling<'a> {
    /// The symbol itself.
    Symbols,
    /// Its printed number and unit; the symbol itself where none is known.
    Numbers(&'a dyn Fn(&Symbol) -> Option<(Printed, &'a str)>),
}

/// Sets formulas into a frame. Every box is built with its left end at x = 0 on the baseline y = 0.
pub(super) struct Maths<'m, 'f> {
    pub(super) setter: &'m mut Setter<'f>,
    pub(super) frame: &'m mut Frame,
}

/// Something set: the frame's items from `from` on, and their extent about the baseline.
#[derive(Debug, Clone, Copy)]
pub(super) struct Box2 {
    pub(super) from: usize,
    pub(super) width: f32,
    pub(super) height: f32,
    pub(super) depth: f32,
    /// How far the last glyph leans out at its upper right.
    pub(super) italic: f32,
}

/// Where a part stands, which decides about its brackets.
#[derive(Debug, Clone, Copy, PartialEq, Eq)]
pub(super) enum Place {
    /// By itself: on a line, in brackets, above or below a fraction's rule.
    Alone,
    /// A term of a sum.
    Term,
    /// A factor of a product.
    Factor,
    /// The base of a power.
    Base,
}

/// Size of a fraction within a fraction.
const NESTED: f32 = 0.84;

impl Maths<'_, '_> {
    /// Sets a formula. `depth` counts the fractions it stands in.
    pub(super) fn build(&mut self, tree: &Tree, filling: Filling<'_>, place: Place, size: f32, depth: u8) -> Box2 {
        let bracketed = needs_brackets(tree, place);
        let inner = if bracketed { Place::Alone } else { place };
        let set = match tree {
            Tree::Number(number) => self.plain_number(*number, size),
            Tree::Pi => self.text("π", size),
            Tree::Symbol(symbol) => self.leaf(symbol, filling, inner, size),
            Tree::Negative(part) => self.negative(part, filling, size, depth),
            Tree::Sum(parts) => self.sum(parts, filling, size, depth),
            Tree::Product(parts) => self.product(parts, filling, size, depth),
            Tree::Quotient(above, below) => self.fraction(above, below, filling, size, depth),
            Tree::Power(part, exponent) => self.power(part, *exponent, filling, size, depth),
            Tree::Root(part) => self.radical(part, filling, size, depth),
            Tree::Absolute(part) => self.absolute(part, filling, size, depth),
            Tree::Max(parts) => self.function("max", parts, filling, size, depth),
            Tree::Min(parts) => self.function("min", parts, filling, size, depth),
            Tree::Sine(part) => self.function("sin", std::slice::from_ref(part), filling, size, depth),
            Tree::Cosine(part) => self.function("cos", std::slice::from_ref(part), filling, size, depth),
            Tree::Tangent(part) => self.function("tan", std::slice::from_ref(part), filling, size, depth),
            Tree::ArcTangent(part) => self.function("atan", std::slice::from_ref(part), filling, size, depth),
        };
        if bracketed { self.enclose(set, '(', ')', size) } else { set }
    }

    fn leaf(&mut self, symbol: &Symbol, filling: Filling<'_>, place: Place, size: f32) -> Box2 {
        match filling {
            Filling::Symbols => self.symbol(symbol, None, size),
            Filling::Numbers(number) => match number(symbol) {
                Some((printed, unit)) => self.operand(printed, unit, place, size),
                None => self.symbol(symbol, None, size),
            },
        }
    }

    /// Sets characters of the maths face.
    pub(super) fn text(&mut self, text: &str, size: f32) -> Box2 {
        self.characters(text.chars(), size)
    }

    pub(super) fn characters(&mut self, text: impl Iterator<Item = char>, size: f32) -> Box2 {
        let from = self.frame.items.len();
        let face = self.setter.fonts.face(FaceName::Math);
        let maths = &self.setter.fonts.maths;
        let mut set = Box2 { from, width: 0.0, height: 0.0, depth: 0.0, italic: 0.0 };
        let mut first = self.frame.glyphs.len() as u32;
        let mut start = 0.0;
        for character in text {
            let glyph = face.glyph(character);
            if glyph == 0 {
                // Letters that the maths face lacks come from the text faces.
                self.close(first, start, set.width, size);
                let mut buffer = [0; 4];
                let kind = super::Type::new(FaceName::Regular, size);
                set.width += self.setter.set(self.frame, character.encode_utf8(&mut buffer), kind, set.width, 0.0);
                set.height = set.height.max(0.7 * size);
                set.depth = set.depth.max(0.2 * size);
                first = self.frame.glyphs.len() as u32;
                start = set.width;
                continue;
            }
            let [height, depth] = maths.extent(glyph);
            set.height = set.height.max(height * size);
            set.depth = set.depth.max(depth * size);
            set.italic = maths.italic(glyph) * size;
            set.width += f32::from(face.advance(glyph)) * size / 1000.0;
            self.frame.glyphs.push(Glyph { id: glyph, after: 0 });
        }
        self.close(first, start, set.width, size);
        set
    }

    fn close(&mut self, first: u32, start: f32, end: f32, size: f32) {
        let count = self.frame.glyphs.len() as u32 - first;
        if count > 0 {
            let run = Run { face: FaceName::Math, size, x: start, y: 0.0, width: end - start, first, count, grey: 0 };
            self.frame.items.push(Item::Run(run));
        }
    }

    /// Puts `next`, built after `before`, to its right.
    pub(super) fn join(&mut self, before: Box2, gap: f32, next: Box2) -> Box2 {
        self.frame.shift(next.from, before.width + gap, 0.0);
        Box2 {
            from: before.from,
            width: before.width + gap + next.width,
            height: before.height.max(next.height),
            depth: before.depth.max(next.depth),
            italic: next.italic,
        }
    }

    /// An empty box at the present end of the frame.
    pub(super) fn nothing(&self) -> Box2 {
        Box2 { from: self.frame.items.len(), width: 0.0, height: 0.0, depth: 0.0, italic: 0.0 }
    }
}

fn needs_brackets(tree: &Tree, place: Place) -> bool {
    match tree {
        _ if place == Place::Alone => false,
        Tree::Sum(_) | Tree::Negative(_) => true,
        Tree::Number(number) => *number < 0.0,
        Tree::Product(_) => matches!(place, Place::Base | Place::Factor),
        Tree::Quotient(..) | Tree::Power(..) => place == Place::Base,
        _ => false,
    }
}

#[cfg(test)]
mod tests;
