//! A formula on as many lines as the measure asks for, broken after operators.
use super::function::AFTER_COMMA;
use super::row::{DOT_GAP, signed};
use super::{Box2, Filling, Maths, Place, needs_brackets};
use crate::formula::Tree;

/// Sizes tried before a bracket is broken.
const SMALLER: [f32; 3] = [1.0, 0.92, 0.84];

/// A line of a formula: the frame's items from `from` to `to`, its left end at x = 0, its baseline y = 0.
#[derive(Debug, Clone, Copy)]
pub(in crate::typeset) struct Line {
    pub(in crate::typeset) from: usize,
    pub(in crate::typeset) to: usize,
    pub(in crate::typeset) width: f32,
    pub(in crate::typeset) height: f32,
    pub(in crate::typeset) depth: f32,
}

impl Maths<'_, '_> {
    /// Sets a formula within `width`, lines after the first indented by `indent`.
    pub(in crate::typeset) fn lines(
        &mut self,
        tree: &Tree,
        filling: Filling<'_>,
        size: f32,
        width: f32,
        indent: f32,
    ) -> Vec<Line> {
        let (items, glyphs) = (self.frame.items.len(), self.frame.glyphs.len());
        // Somewhat smaller type is easier to read than brackets that open on one line and close on the next.
        for scale in SMALLER {
            let (pieces, broken) = self.pieces(tree, filling, size * scale, width, indent);
            if broken == 0 {
                return self.fill(&pieces, width, indent);
            }
            self.frame.items.truncate(items);
            self.frame.glyphs.truncate(glyphs);
        }
        let (pieces, _) = self.pieces(tree, filling, size, width, indent);
        self.fill(&pieces, width, indent)
    }

    /// Sets a formula in pieces that each fit a line; counts the brackets that are broken.
    fn pieces(&mut self, tree: &Tree, filling: Filling<'_>, size: f32, width: f32, indent: f32) -> (Vec<Box2>, usize) {
        let mut pieces = Vec::new();
        let mut breaker = Breaker { maths: self, filling, size, rest: width - indent, broken: 0 };
        breaker.split(tree, Place::Alone, width, &mut pieces);
        let broken = breaker.broken;
        (pieces, broken)
    }

    /// Puts pieces side by side on as few lines as hold them.
    fn fill(&mut self, pieces: &[Box2], width: f32, indent: f32) -> Vec<Line> {
        let mut lines: Vec<Line> = Vec::new();
        for (at, piece) in pieces.iter().enumerate() {
            let to = pieces.get(at + 1).map_or(self.frame.items.len(), |next| next.from);
            let left = if lines.len() < 2 { 0.0 } else { indent };
            let mut piece = *piece;
            let room = width - indent;
            if piece.width > room && (at > 0 || piece.width > width) {
                // The last resort for what no operator parts.
                let factor = room / piece.width;
                self.frame.scale(piece.from..to, 0.0, factor);
                piece.width *= factor;
            }
            let after = match lines.last_mut() {
                Some(line) if left + line.width + piece.width <= width + 0.01 => {
                    let x = line.width;
                    line.to = to;
                    line.width += piece.width;
                    line.height = line.height.max(piece.height);
                    line.depth = line.depth.max(piece.depth);
                    x
                }
                _ => {
                    let Box2 { from, width, height, depth, .. } = piece;
                    lines.push(Line { from, to, width, height, depth });
                    0.0
                }
            };
            for item in piece.from..to {
                // Only this piece is moved, not what was built after it.
                self.frame.shift_one(item, after, 0.0);
            }
        }
        lines
    }
}

struct Breaker<'b, 'm, 'f, 'a> {
    maths: &'b mut Maths<'m, 'f>,
    filling: Filling<'a>,
    size: f32,
    rest: f32,
    broken: usize,
}

impl Breaker<'_, '_, '_, '_> {
    /// Sets a part in one piece where it fits into `room`, else in pieces that each do.
    fn split(&mut self, tree: &Tree, place: Place, room: f32, out: &mut Vec<Box2>) {
        let (items, glyphs) = (self.maths.frame.items.len(), self.maths.frame.glyphs.len());
        let whole = self.maths.build(tree, self.filling, place, self.size, 0);
        if whole.width <= room {
            out.push(whole);
            return;
        }
        self.maths.frame.items.truncate(items);
        self.maths.frame.glyphs.truncate(glyphs);
        let first = out.len();
        if needs_brackets(tree, place) {
            self.broken += 1;
            let opening = self.maths.text("(", self.size);
            self.parts(tree, out);
            self.before(opening, first, out);
            self.after(")", 0.0, out);
        } else {
            self.parts(tree, out);
        }
    }

    fn parts(&mut self, tree: &Tree, out: &mut Vec<Box2>) {
        let first = out.len();
        let room = self.rest - self.size * 1.5;
        match tree {
            Tree::Sum(parts) => {
                for (at, part) in parts.iter().enumerate() {
                    let (negative, number, term) = signed(part);
                    let here = out.len();
                    if at == 0 && negative {
                        let sign = self.maths.text("−", self.size);
                        self.term(number, term, room, out);
                        self.before(sign, here, out);
                    } else {
                        self.term(number, term, room, out);
                    }
                    if let Some(next) = parts.get(at + 1) {
                        self.after(if signed(next).0 { " − " } else { " + " }, 0.0, out);
                    }
                }
            }
            Tree::Product(parts) => {
                for (at, part) in parts.iter().enumerate() {
                    self.split(part, Place::Factor, room, out);
                    if at + 1 < parts.len() {
                        self.after("·", DOT_GAP * self.size, out);
                        self.widen(DOT_GAP * self.size, out);
                    }
                }
            }
            Tree::Quotient(above, below) => {
                self.broken += 1;
                self.split(above, Place::Factor, room, out);
                self.after("/", 0.0, out);
                self.split(below, Place::Base, room, out);
            }
            Tree::Power(part, exponent) => {
                self.split(part, Place::Base, room, out);
                if let Some(last) = out.last_mut() {
                    *last = self.maths.superscript(*last, i32::from(*exponent), self.size);
                }
            }
            Tree::Negative(part) => {
                let sign = self.maths.text("−", self.size);
                self.split(part, Place::Term, room, out);
                self.before(sign, first, out);
            }
            Tree::Root(part) => self.listed("√(", std::slice::from_ref(&**part), ")", out),
            Tree::Absolute(part) => self.listed("|", std::slice::from_ref(&**part), "|", out),
            Tree::Max(parts) => self.listed("max(", parts, ")", out),
            Tree::Min(parts) => self.listed("min(", parts, ")", out),
            Tree::Sine(part) => self.listed("sin(", std::slice::from_ref(&**part), ")", out),
            Tree::Cosine(part) => self.listed("cos(", std::slice::from_ref(&**part), ")", out),
            Tree::Tangent(part) => self.listed("tan(", std::slice::from_ref(&**part), ")", out),
            Tree::ArcTangent(part) => self.listed("atan(", std::slice::from_ref(&**part), ")", out),
            // What is left cannot be parted; it is made smaller where the lines are filled.
            Tree::Number(_) | Tree::Pi | Tree::Symbol(_) => {
                let set = self.maths.build(tree, self.filling, Place::Alone, self.size, 0);
                out.push(set);
            }
        }
    }

    fn term(&mut self, number: Option<f64>, term: &Tree, room: f32, out: &mut Vec<Box2>) {
        match number {
            Some(number) => {
                let set = self.maths.plain_number(number, self.size);
                out.push(set);
            }
            None => self.split(term, Place::Term, room, out),
        }
    }

    fn listed(&mut self, opening: &str, parts: &[Tree], closing: &str, out: &mut Vec<Box2>) {
        self.broken += 1;
        let first = out.len();
        let opening = self.maths.text(opening, self.size);
        for (at, part) in parts.iter().enumerate() {
            self.split(part, Place::Alone, self.rest - self.size * 3.0, out);
            if at + 1 < parts.len() {
                self.after(",", 0.0, out);
                self.widen(AFTER_COMMA * self.size, out);
            }
        }
        self.before(opening, first, out);
        self.after(closing, 0.0, out);
    }

    /// Joins something set just before the piece at `first` to it.
    fn before(&mut self, opening: Box2, first: usize, out: &mut [Box2]) {
        let end = out.get(first + 1).map_or(self.maths.frame.items.len(), |next| next.from);
        if let Some(piece) = out.get_mut(first) {
            for item in piece.from..end {
                self.maths.frame.shift_one(item, opening.width, 0.0);
            }
            piece.from = opening.from;
            piece.width += opening.width;
            piece.height = piece.height.max(opening.height);
            piece.depth = piece.depth.max(opening.depth);
        }
    }

    /// Joins text to the last piece.
    fn after(&mut self, text: &str, gap: f32, out: &mut [Box2]) {
        let next = self.maths.text(text, self.size);
        if let Some(last) = out.last_mut() {
            *last = self.maths.join(*last, gap, next);
        }
    }

    fn widen(&mut self, by: f32, out: &mut [Box2]) {
        if let Some(last) = out.last_mut() {
            last.width += by;
        }
    }
}
