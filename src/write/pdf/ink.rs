//! The small marks that a PDF is written with: numbers, strings, names (ISO 32000-1, 7.3).

/// Bytes of a PDF in the making. Lengths are whole hundredths of a point, so that nothing accumulates.
#[derive(Default)]
pub(super) struct Ink(pub(super) Vec<u8>);

impl Ink {
    pub(super) fn raw(&mut self, bytes: impl AsRef<[u8]>) {
        self.0.extend_from_slice(bytes.as_ref());
    }

    /// A number of hundredths and a space.
    pub(super) fn hundredth(&mut self, number: i64) {
        if number < 0 {
            self.0.push(b'-');
        }
        let size = number.abs();
        if size >= 100 {
            self.integer(size / 100);
        }
        let rest = (size % 100) as u8;
        if rest != 0 {
            self.0.push(b'.');
            self.0.push(b'0' + rest / 10);
            if !rest.is_multiple_of(10) {
                self.0.push(b'0' + rest % 10);
            }
        } else if size == 0 {
            self.0.push(b'0');
        }
        self.0.push(b' ');
    }

    /// A length in points and a space.
    pub(super) fn length(&mut self, points: f32) {
        self.hundredth(hundredths(points));
    }

    pub(super) fn integer(&mut self, number: i64) {
        if number < 0 {
            self.0.push(b'-');
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
        self.raw(&digits[first..]);
    }

    /// A reference to an object.
    pub(super) fn to(&mut self, number: super::file::Number) {
        self.integer(i64::from(number));
        self.raw(b" 0 R");
    }

    /// A text string: UTF-16 with its mark, which every character has a form in.
    pub(super) fn text(&mut self, text: &str) {
        self.raw(b"(\xfe\xff");
        for unit in text.encode_utf16() {
            let [high, low] = unit.to_be_bytes();
            self.escaped(high);
            self.escaped(low);
        }
        self.0.push(b')');
    }

    /// A string of bytes.
    pub(super) fn string(&mut self, bytes: &[u8]) {
        self.0.push(b'(');
        bytes.iter().for_each(|byte| self.escaped(*byte));
        self.0.push(b')');
    }

    /// A name, with what is no regular character as its number.
    pub(super) fn name(&mut self, name: &[u8]) {
        self.0.push(b'/');
        for &byte in name {
            if byte.is_ascii_graphic() && !b"()<>[]{}/%#".contains(&byte) {
                self.0.push(byte);
            } else {
                self.raw(format!("#{byte:02x}"));
            }
        }
    }

    /// A byte of a literal string.
    pub(super) fn escaped(&mut self, byte: u8) {
        match byte {
            b'(' | b')' | b'\\' => self.raw([b'\\', byte]),
            b'\r' => self.raw(b"\\r"),
            _ => self.0.push(byte),
        }
    }
}

/// Points as whole hundredths.
pub(super) fn hundredths(length: f32) -> i64 {
    (length * 100.0).round() as i64
}
