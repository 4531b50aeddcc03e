//! Numbers with powers of ten and units: real superscripts, thin spaces, upright letters.
use super::{Box2, Maths, Place};
use crate::typeset::frame::Item;
use crate::units::Printed;

/// Space between a number and its unit, ems.
pub(super) const BEFORE_UNIT: f32 = 0.17;

impl Maths<'_, '_> {
    /// A number that belongs to the formula itself.
    pub(super) fn plain_number(&mut self, number: f64, size: f32) -> Box2 {
        let text = format!("{number}");
        self.characters(text.chars().map(|c| if c == '-' { '−' } else { c }), size)
    }

    /// A printed quantity in the place of its symbol, bracketed where it would be misread.
    pub(super) fn operand(&mut self, printed: Printed, unit: &str, place: Place, size: f32) -> Box2 {
        let compound = !unit.is_empty() || printed.exponent() != 0;
        let bracketed = printed.is_negative() || (compound && matches!(place, Place::Factor | Place::Base));
        let set = self.quantity(printed, unit, size);
        if bracketed { self.enclose(set, '(', ')', size) } else { set }
    }

    /// A printed number and its unit.
    pub(super) fn quantity(&mut self, printed: Printed, unit: &str, size: f32) -> Box2 {
        let mut set = self.text(&printed.digits(), size);
        let exponent = printed.exponent();
        if exponent != 0 {
            let ten = self.text("×10", size);
            set = self.join(set, 0.0, ten);
            set = self.superscript(set, exponent, size);
        }
        if unit.is_empty() {
            return set;
        }
        // A real space is set, so that the words stay apart when they are copied.
        let space = self.text(" ", size);
        let width = BEFORE_UNIT * size;
        if let (Some(glyph), Some(Item::Run(run))) = (self.frame.glyphs.last_mut(), self.frame.items.last_mut()) {
            glyph.after = ((width - space.width) * 1000.0 / size) as i16;
            run.width = width;
        }
        set = self.join(set, 0.0, Box2 { width, ..space });
        let unit = self.unit(unit, size);
        self.join(set, 0.0, unit)
    }

    /// A unit: letters upright, powers as superscripts.
    pub(super) fn unit(&mut self, unit: &str, size: f32) -> Box2 {
        let mut set = self.nothing();
        let mut rest = unit;
        while !rest.is_empty() {
            let end = rest.find(is_superscript).unwrap_or(rest.len());
            let letters = self.text(&rest[..end], size);
            set = self.join(set, 0.0, letters);
            let after = &rest[end..];
            let script_end = after.find(|c| !is_superscript(c)).unwrap_or(after.len());
            if script_end > 0 {
                set = self.superscript_text(set, after[..script_end].chars().map(plain), size);
            }
            rest = &after[script_end..];
        }
        set
    }
}

fn is_superscript(c: char) -> bool {
    matches!(c, '²' | '³' | '¹' | '⁰' | '⁴'..='⁹' | '⁻')
}

fn plain(c: char) -> char {
    match c {
        '¹' => '1',
        '²' => '2',
        '³' => '3',
        '⁻' => '−',
        '⁰' => '0',
        '⁴'..='⁹' => char::from(b'4' + (c as u32 - '⁴' as u32) as u8),
        other => other,
    }
}
