//! The stream that draws a sheet: rules and paths first, then the text in the order in which it is read.
use super::Faces;
use super::ink::{Ink, hundredths};
use crate::typeset::{Frame, Item, Path, Rule, Run};

/// Writes operators.
struct Stream {
    ink: Ink,
    fill: Option<u8>,
    stroke: Option<u8>,
    height: f32,
}

pub(super) fn stream(sheet: &Frame, height: f32, faces: &Faces) -> Vec<u8> {
    let bytes = Vec::with_capacity(sheet.glyphs.len() * 4 + sheet.items.len() * 12 + 64);
    let mut stream = Stream { ink: Ink(bytes), fill: None, stroke: None, height };
    for item in &sheet.items {
        match item {
            Item::Rule(rule) => stream.rule(rule),
            Item::Path(path) => stream.path(path),
            Item::Run(_) | Item::Spoken(_) | Item::SpokenEnd => {}
        }
    }
    stream.text(sheet, faces);
    stream.ink.0
}

impl Stream {
    fn text(&mut self, sheet: &Frame, faces: &Faces) {
        self.ink.raw(b"BT\n");
        let mut at = [0, 0];
        let mut font = None;
        for item in &sheet.items {
            match item {
                Item::Run(run) => {
                    let wanted = (run.face, hundredths(run.size));
                    if font != Some(wanted) {
                        self.ink.raw(b"/F");
                        self.ink.integer(run.face as i64);
                        self.ink.0.push(b' ');
                        self.ink.hundredth(wanted.1);
                        self.ink.raw(b"Tf\n");
                        font = Some(wanted);
                    }
                    self.grey(run.grey);
                    self.run(run, sheet, faces, &mut at);
                }
                Item::Spoken(text) => {
                    self.ink.raw(b"/Span<</ActualText");
                    self.ink.text(text);
                    self.ink.raw(b">>BDC\n");
                }
                Item::SpokenEnd => self.ink.raw(b"EMC\n"),
                Item::Rule(_) | Item::Path(_) => {}
            }
        }
        self.ink.raw(b"ET\n");
    }

    fn run(&mut self, run: &Run, sheet: &Frame, faces: &Faces, at: &mut [i64; 2]) {
        let to = [hundredths(run.x), hundredths(self.height - run.y)];
        self.ink.hundredth(to[0] - at[0]);
        self.ink.hundredth(to[1] - at[1]);
        self.ink.raw(b"Td");
        *at = to;
        let Some(face) = &faces[run.face as usize] else { return };
        let glyphs = sheet.glyphs_of(run);
        let spaced = glyphs.iter().rev().skip(1).any(|glyph| glyph.after != 0);
        self.ink.raw(if spaced { &b"[("[..] } else { b"(" });
        for (place, glyph) in glyphs.iter().enumerate() {
            let [high, low] = face.code(glyph.id).to_be_bytes();
            self.ink.escaped(high);
            self.ink.escaped(low);
            if glyph.after != 0 && place + 1 < glyphs.len() {
                self.ink.0.push(b')');
                self.ink.integer(-i64::from(glyph.after));
                self.ink.0.push(b'(');
            }
        }
        self.ink.raw(if spaced { &b")]TJ\n"[..] } else { b")Tj\n" });
    }

    fn rule(&mut self, rule: &Rule) {
        self.grey(rule.grey);
        self.ink.hundredth(hundredths(rule.x));
        self.ink.hundredth(hundredths(self.height - rule.y - rule.height));
        self.ink.hundredth(hundredths(rule.width).max(1));
        self.ink.hundredth(hundredths(rule.height).max(1));
        self.ink.raw(b"re f\n");
    }

    fn path(&mut self, path: &Path) {
        if let Some((width, dash, grey)) = path.stroke {
            if self.stroke != Some(grey) {
                self.stroke = Some(grey);
                self.level(grey);
                self.ink.raw(b"G\n");
            }
            self.ink.hundredth(hundredths(width));
            self.ink.raw(b"w[");
            for length in dash {
                self.ink.hundredth(hundredths(*length));
            }
            self.ink.raw(b"]0 d\n");
        }
        if let Some(grey) = path.fill {
            self.grey(grey);
        }
        for (place, [x, y]) in path.points.iter().enumerate() {
            self.ink.hundredth(hundredths(*x));
            self.ink.hundredth(hundredths(self.height - y));
            self.ink.0.push(if place == 0 { b'm' } else { b'l' });
            self.ink.0.push(b'\n');
        }
        let paint: &[u8] = match (path.fill.is_some(), path.stroke.is_some(), path.closed) {
            (true, true, true) => b"b\n",
            (true, true, false) => b"B\n",
            (true, false, _) => b"f\n",
            (false, true, true) => b"s\n",
            (false, true, false) => b"S\n",
            (false, false, _) => b"n\n",
        };
        self.ink.raw(paint);
    }

    fn grey(&mut self, grey: u8) {
        if self.fill != Some(grey) {
            self.fill = Some(grey);
            self.level(grey);
            self.ink.raw(b"g\n");
        }
    }

    /// A grey from 0 to 255 as a part of one, to a hundredth.
    fn level(&mut self, grey: u8) {
        self.ink.hundredth((i64::from(grey) * 100 + 127) / 255);
    }
}
