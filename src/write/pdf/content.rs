//! The stream that draws a sheet: rules and paths first, then the text in the order in which it is read.
use super::Faces;
use crate::typeset::{Frame, Item, Path, Rule, Run};

/// Writes operators; lengths are kept in whole hundredths of a point so that nothing accumulates.
struct Stream {
    bytes: Vec<u8>,
    fill: Option<u8>,
    stroke: Option<u8>,
    height: f32,
}

pub(super) fn stream(sheet: &Frame, height: f32, faces: &Faces) -> Vec<u8> {
    let bytes = Vec::with_capacity(sheet.glyphs.len() * 4 + sheet.items.len() * 12 + 64);
    let mut stream = Stream { bytes, fill: None, stroke: None, height };
    for item in &sheet.items {
        match item {
            Item::Rule(rule) => stream.rule(rule),
            Item::Path(path) => stream.path(path),
            Item::Run(_) | Item::Spoken(_) | Item::SpokenEnd => {}
        }
    }
    stream.text(sheet, faces);
    stream.bytes
}

impl Stream {
    fn text(&mut self, sheet: &Frame, faces: &Faces) {
        self.bytes.extend_from_slice(b"BT\n");
        let mut at = [0, 0];
        let mut font = None;
        for item in &sheet.items {
            match item {
                Item::Run(run) => {
                    let wanted = (run.face, hundredths(run.size));
                    if font != Some(wanted) {
                        self.bytes.extend_from_slice(b"/F");
                        self.integer(run.face as i64);
                        self.bytes.push(b' ');
                        self.hundredth(wanted.1);
                        self.bytes.extend_from_slice(b"Tf\n");
                        font = Some(wanted);
                    }
                    self.grey(run.grey);
                    self.run(run, sheet, faces, &mut at);
                }
                Item::Spoken(text) => {
                    self.bytes.extend_from_slice(b"/Span<</ActualText(");
                    self.utf16(text);
                    self.bytes.extend_from_slice(b")>>BDC\n");
                }
                Item::SpokenEnd => self.bytes.extend_from_slice(b"EMC\n"),
                Item::Rule(_) | Item::Path(_) => {}
            }
        }
        self.bytes.extend_from_slice(b"ET\n");
    }

    fn run(&mut self, run: &Run, sheet: &Frame, faces: &Faces, at: &mut [i64; 2]) {
        let to = [hundredths(run.x), hundredths(self.height - run.y)];
        self.hundredth(to[0] - at[0]);
        self.hundredth(to[1] - at[1]);
        self.bytes.extend_from_slice(b"Td");
        *at = to;
        let Some(face) = &faces[run.face as usize] else { return };
        let glyphs = sheet.glyphs_of(run);
        let spaced = glyphs.iter().rev().skip(1).any(|glyph| glyph.after != 0);
        self.bytes.extend_from_slice(if spaced { b"[(" } else { b"(" });
        for (place, glyph) in glyphs.iter().enumerate() {
            let [high, low] = face.code(glyph.id).to_be_bytes();
            self.escaped(high);
            self.escaped(low);
            if glyph.after != 0 && place + 1 < glyphs.len() {
                self.bytes.push(b')');
                self.integer(-i64::from(glyph.after));
                self.bytes.push(b'(');
            }
        }
        self.bytes.extend_from_slice(if spaced { b")]TJ\n" } else { b")Tj\n" });
    }

    fn rule(&mut self, rule: &Rule) {
        self.grey(rule.grey);
        self.hundredth(hundredths(rule.x));
        self.hundredth(hundredths(self.height - rule.y - rule.height));
        self.hundredth(hundredths(rule.width).max(1));
        self.hundredth(hundredths(rule.height).max(1));
        self.bytes.extend_from_slice(b"re f\n");
    }

    fn path(&mut self, path: &Path) {
        if let Some((width, dash, grey)) = path.stroke {
            if self.stroke != Some(grey) {
                self.stroke = Some(grey);
                self.level(grey);
                self.bytes.extend_from_slice(b"G\n");
            }
            self.hundredth(hundredths(width));
            self.bytes.extend_from_slice(b"w[");
            for length in dash {
                self.hundredth(hundredths(*length));
            }
            self.bytes.extend_from_slice(b"]0 d\n");
        }
        if let Some(grey) = path.fill {
            self.grey(grey);
        }
        for (place, [x, y]) in path.points.iter().enumerate() {
            self.hundredth(hundredths(*x));
            self.hundredth(hundredths(self.height - y));
            self.bytes.push(if place == 0 { b'm' } else { b'l' });
            self.bytes.push(b'\n');
        }
        let paint: &[u8] = match (path.fill.is_some(), path.stroke.is_some(), path.closed) {
            (true, true, true) => b"b\n",
            (true, true, false) => b"B\n",
            (true, false, _) => b"f\n",
            (false, true, true) => b"s\n",
            (false, true, false) => b"S\n",
            (false, false, _) => b"n\n",
        };
        self.bytes.extend_from_slice(paint);
    }

    fn grey(&mut self, grey: u8) {
        if self.fill != Some(grey) {
            self.fill = Some(grey);
            self.level(grey);
            self.bytes.extend_from_slice(b"g\n");
        }
    }

    /// A grey from 0 to 255 as a part of one, to a hundredth.
    fn level(&mut self, grey: u8) {
        self.hundredth((i64::from(grey) * 100 + 127) / 255);
    }

    /// A number of hundredths and a space.
    fn hundredth(&mut self, number: i64) {
        if number < 0 {
            self.bytes.push(b'-');
        }
        let size = number.abs();
        if size >= 100 {
            self.integer(size / 100);
        }
        let rest = (size % 100) as u8;
        if rest != 0 {
            self.bytes.push(b'.');
            self.bytes.push(b'0' + rest / 10);
            if !rest.is_multiple_of(10) {
                self.bytes.push(b'0' + rest % 10);
            }
        } else if size == 0 {
            self.bytes.push(b'0');
        }
        self.bytes.push(b' ');
    }

    fn integer(&mut self, number: i64) {
        if number < 0 {
            self.bytes.push(b'-');
        }
        let mut digits = [0; 20];
        let mut rest = number.unsigned_abs();
        let mut first = digits.len();
        loop {
            first -= 1;
            digits[first] = b'0' + (rest % 10) as u8;
            rest /= 10;
            if rest == 0 {
                break;
            }
        }
        self.bytes.extend_from_slice(&digits[first..]);
    }

    fn utf16(&mut self, text: &str) {
        self.bytes.extend_from_slice(&[0xfe, 0xff]);
        for unit in text.encode_utf16() {
            let [high, low] = unit.to_be_bytes();
            self.escaped(high);
            self.escaped(low);
        }
    }

    /// A byte of a literal string.
    fn escaped(&mut self, byte: u8) {
        match byte {
            b'(' | b')' | b'\\' => self.bytes.extend_from_slice(&[b'\\', byte]),
            b'\r' => self.bytes.extend_from_slice(b"\\r"),
            _ => self.bytes.push(byte),
        }
    }
}

fn hundredths(length: f32) -> i64 {
    (length * 100.0).round() as i64
}
