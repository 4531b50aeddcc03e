//! Rows: sums, products and changes of sign.
use super::{Box2, Filling, Maths, Place};
use crate::formula::Tree;

/// Space on both sides of a product's dot, ems.
pub(super) const DOT_GAP: f32 = 0.1;

impl Maths<'_, '_> {
    pub(super) fn sum(&mut self, parts: &[Tree], filling: Filling<'_>, size: f32, depth: u8) -> Box2 {
        let mut row = self.nothing();
        for (at, part) in parts.iter().enumerate() {
            let (negative, number, term) = signed(part);
            match (at, negative) {
                (0, false) => {}
                (0, true) => row = self.text("−", size),
                (_, negative) => {
                    let sign = self.text(if negative { " − " } else { " + " }, size);
                    row = self.join(row, 0.0, sign);
                }
            }
            let set = match number {
                Some(number) => self.plain_number(number, size),
                None => self.build(term, filling, Place::Term, size, depth),
            };
            row = self.join(row, 0.0, set);
        }
        row
    }

    pub(super) fn product(&mut self, parts: &[Tree], filling: Filling<'_>, size: f32, depth: u8) -> Box2 {
        let mut row = self.nothing();
        for (at, part) in parts.iter().enumerate() {
            if at > 0 {
                let dot = self.text("·", size);
                row = self.join(row, DOT_GAP * size + row.italic * 0.5, dot);
            }
            let set = self.build(part, filling, Place::Factor, size, depth);
            row = self.join(row, if at == 0 { 0.0 } else { DOT_GAP * size }, set);
        }
        row
    }

    pub(super) fn negative(&mut self, part: &Tree, filling: Filling<'_>, size: f32, depth: u8) -> Box2 {
        let sign = self.text("−", size);
        let set = self.build(part, filling, Place::Term, size, depth);
        self.join(sign, 0.0, set)
    }
}

/// Whether a term is taken away, its magnitude where it is a negative number, and the term itself.
pub(super) fn signed(part: &Tree) -> (bool, Option<f64>, &Tree) {
    match part {
        Tree::Negative(term) => (true, None, term),
        Tree::Number(number) if *number < 0.0 => (true, Some(-number), part),
        term => (false, None, term),
    }
}
