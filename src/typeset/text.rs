//! Sets a string on a baseline: kerning, scripts, and other faces for what the wanted one lacks.
use super::flow::Slab;
use super::frame::{Frame, Glyph, Item, Run};
use super::{FaceName, Fonts};
use std::collections::{BTreeMap, BTreeSet};
use std::rc::Rc;

/// Sets text; remembers the characters that no face has.
pub(super) struct Setter<'a> {
    /// The faces.
    pub(super) fonts: &'a Fonts,
    /// Characters that no face has.
    pub(super) missing: BTreeSet<char>,
    /// Formulas in symbols, by their text: many steps begin with the same.
    pub(super) formulas: BTreeMap<String, Rc<SetFormula>>,
}

/// A formula in symbols as it was set.
pub(super) struct SetFormula {
    /// Its lines as strips.
    pub(super) slabs: Vec<Slab>,
    /// Place of its equals sign.
    pub(super) equals: f32,
}

/// Face, size and grey of a text.
#[derive(Debug, Clone, Copy, PartialEq)]
pub(super) struct Type {
    /// Face.
    pub(super) face: FaceName,
    /// Size, points.
    pub(super) size: f32,
    /// 0 black to 255 white.
    pub(super) grey: u8,
}

impl Type {
    /// Black text.
    #[must_use]
    pub(super) const fn new(face: FaceName, size: f32) -> Self {
        Self { face, size, grey: 0 }
    }
}

/// Size of scripts within a text, and how far they are raised and lowered, ems of the text.
const SCRIPT: f32 = 0.7;
const RAISE: f32 = 0.36;
const LOWER: f32 = -0.16;

/// Where one character comes from.
enum Found {
    Glyph(FaceName, u16),
    /// A digit or sign set as a real script, raised by so many ems.
    Script(char, f32),
    Nothing,
    Missing,
}

impl<'a> Setter<'a> {
    /// A setter that has met no missing character yet.
    #[must_use]
    pub(super) fn new(fonts: &'a Fonts) -> Self {
        Self { fonts, missing: BTreeSet::new(), formulas: BTreeMap::new() }
    }

    /// Advance of a text.
    #[must_use]
    pub(super) fn width(&self, text: &str, kind: Type) -> f32 {
        let face = self.fonts.face(kind.face);
        let mut width = 0_i32;
        let mut other = 0.0;
        let mut before = 0;
        for character in text.chars() {
            match self.find(character, kind.face) {
                Found::Glyph(name, glyph) if name == kind.face => {
                    width += i32::from(face.advance(glyph)) + i32::from(face.kern(before, glyph));
                    before = glyph;
                    continue;
                }
                Found::Glyph(name, glyph) => other += f32::from(self.fonts.face(name).advance(glyph)),
                Found::Script(plain, _) => other += SCRIPT * f32::from(face.advance(face.glyph(plain))),
                Found::Nothing => {}
                Found::Missing => other += 1000.0 * missing_width(character),
            }
            before = 0;
        }
        (width as f32 + other) * kind.size / 1000.0
    }

    /// Places a text with its left end at `x` on the baseline `y`; gives its advance.
    pub(super) fn set(&mut self, frame: &mut Frame, text: &str, kind: Type, x: f32, y: f32) -> f32 {
        let mut open: Option<(Run, f32)> = None;
        let mut script = String::new();
        let mut at = x;
        let mut before = 0;
        for character in text.chars() {
            let (name, glyph, size, rise) = match self.find(character, kind.face) {
                Found::Glyph(name, glyph) => (name, glyph, kind.size, 0.0),
                Found::Script(plain, rise) => {
                    (kind.face, self.fonts.face(kind.face).glyph(plain), kind.size * SCRIPT, rise * kind.size)
                }
                Found::Nothing => continue,
                Found::Missing => {
                    close(frame, open.take(), &mut script);
                    before = 0;
                    self.missing.insert(character);
                    at += self.substitute(frame, character, kind, at, y);
                    continue;
                }
            };
            let face = self.fonts.face(name);
            let same = open.is_some_and(|(run, r)| {
                run.face == name && run.size.to_bits() == size.to_bits() && r.to_bits() == rise.to_bits()
            });
            if !same {
                close(frame, open.take(), &mut script);
                before = 0;
                let first = frame.glyphs.len() as u32;
                let run = Run { face: name, size, x: at, y: y - rise, width: 0.0, first, count: 0, grey: kind.grey };
                open = Some((run, rise));
            }
            let kern = face.kern(before, glyph);
            if kern != 0
                && let Some(last) = frame.glyphs.last_mut()
            {
                last.after += kern;
            }
            if size < kind.size {
                script.push(character);
            }
            frame.glyphs.push(Glyph { id: glyph, after: 0 });
            let advance = f32::from(face.advance(glyph) + kern) * size / 1000.0;
            at += advance;
            if let Some((run, _)) = &mut open {
                run.count += 1;
                run.width += advance;
            }
            before = glyph;
        }
        close(frame, open, &mut script);
        at - x
    }

    fn find(&self, character: char, wanted: FaceName) -> Found {
        if wanted != FaceName::Mono
            && let Some(found) = script(character)
        {
            return found;
        }
        let glyph = self.fonts.face(wanted).glyph(character);
        if glyph != 0 {
            return Found::Glyph(wanted, glyph);
        }
        match character {
            '\t' | '\u{a0}' | '\u{2000}'..='\u{200a}' | '\u{202f}' | '\u{205f}' => {
                return Found::Glyph(wanted, self.fonts.face(wanted).glyph(' '));
            }
            '\u{ad}' | '\u{200b}'..='\u{200f}' | '\u{2060}' | '\u{fe00}'..='\u{fe0f}' | '\u{feff}' => {
                return Found::Nothing;
            }
            _ if character.is_control() => return Found::Nothing,
            _ => {}
        }
        [FaceName::Math, FaceName::Regular, FaceName::Fallback, FaceName::Mono]
            .into_iter()
            .find_map(|name| {
                let glyph = self.fonts.face(name).glyph(character);
                (glyph != 0).then_some(Found::Glyph(name, glyph))
            })
            .unwrap_or(Found::Missing)
    }

    /// A framed code point, read back as the character it stands for.
    fn substitute(&mut self, frame: &mut Frame, character: char, kind: Type, x: f32, y: f32) -> f32 {
        let code = format!("{:04X}", character as u32);
        let (upper, lower) = code.split_at(code.len() / 2);
        let width = missing_width(character) * kind.size;
        frame.speak(character.encode_utf8(&mut [0; 4]));
        let small = Type { face: FaceName::Mono, size: kind.size * 0.36, grey: kind.grey };
        for (text, drop) in [(upper, 0.42), (lower, 0.06)] {
            let left = x + (width - self.width(text, small)) / 2.0;
            self.set(frame, text, small, left, y - drop * kind.size);
        }
        let inset = 0.06 * kind.size;
        frame.outline(x + inset, y - 0.76 * kind.size, width - 2.0 * inset, 0.8 * kind.size, 0.04 * kind.size);
        frame.end_speech();
        width
    }
}

/// Ems taken by the substitute of a missing character.
fn missing_width(character: char) -> f32 {
    if character as u32 > 0xffff { 0.88 } else { 0.66 }
}

/// Places a run that is complete; scripts are read back as the characters they were written with.
fn close(frame: &mut Frame, run: Option<(Run, f32)>, script: &mut String) {
    let Some((run, _)) = run else { return };
    if script.is_empty() {
        frame.items.push(Item::Run(run));
    } else {
        frame.speak(script);
        frame.items.push(Item::Run(run));
        frame.end_speech();
        script.clear();
    }
}

fn script(character: char) -> Option<Found> {
    let (plain, rise) = match character {
        '⁰' => ('0', RAISE),
        '¹' => ('1', RAISE),
        '²' => ('2', RAISE),
        '³' => ('3', RAISE),
        '⁴'..='⁹' => (char::from(b'4' + (character as u32 - '⁴' as u32) as u8), RAISE),
        '⁺' => ('+', RAISE),
        '⁻' => ('−', RAISE),
        '₀'..='₉' => (char::from(b'0' + (character as u32 - '₀' as u32) as u8), LOWER),
        _ => return None,
    };
    Some(Found::Script(plain, rise))
}

#[cfg(test)]
mod tests {
    use super::*;
    use crate::typeset::fixture;

    #[test]
    fn measured_and_placed_widths_agree() {
        let fonts = fixture::fonts();
        let mut setter = Setter::new(fonts);
        for text in ["AVATAR To", "10⁻³ m²", "Größe Żółć Ωμέγα Привет", "κ₁ ≤ 0.5", "日本", "a\u{ad}b"]
        {
            let kind = Type::new(FaceName::Regular, 10.0);
            let mut frame = Frame::default();
            let placed = setter.set(&mut frame, text, kind, 3.0, 4.0);
            assert!((placed - setter.width(text, kind)).abs() < 1e-3, "{text}");
        }
        assert_eq!(setter.missing.iter().collect::<String>(), "日本");
    }

    #[test]
    fn superscripts_are_small_and_raised() {
        let fonts = fixture::fonts();
        let mut frame = Frame::default();
        Setter::new(fonts).set(&mut frame, "m⁻³", Type::new(FaceName::Bold, 10.0), 0.0, 0.0);
        let runs: Vec<&Run> =
            frame.items.iter().filter_map(|item| if let Item::Run(run) = item { Some(run) } else { None }).collect();
        assert_eq!(runs.len(), 2);
        assert!(runs[1].y < -3.0 && runs[1].size < 8.0 && runs[1].count == 2);
    }
}
