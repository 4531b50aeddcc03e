//! A place in the text of a formula.
use super::FormulaFault;
use std::ops::Range;

/// A place in a text, moved forward only, but for [`Self::back_to`].
#[derive(Debug, Clone)]
pub(super) struct Cursor<'a> {
    text: &'a str,
    at: usize,
}

impl<'a> Cursor<'a> {
    pub(super) fn new(text: &'a str) -> Self {
        Self { text, at: 0 }
    }

    pub(super) fn text(&self) -> &'a str {
        self.text
    }

    pub(super) fn at(&self) -> usize {
        self.at
    }

    pub(super) fn back_to(&mut self, at: usize) {
        self.at = at;
    }

    pub(super) fn rest(&self) -> &'a str {
        &self.text[self.at..]
    }

    pub(super) fn peek(&self) -> Option<char> {
        self.rest().chars().next()
    }

    /// Moves over a text if it stands here.
    pub(super) fn eat(&mut self, text: &str) -> bool {
        let found = self.rest().starts_with(text);
        if found {
            self.at += text.len();
        }
        found
    }

    /// Moves over characters while they fit and gives their bytes.
    pub(super) fn run(&mut self, mut fits: impl FnMut(char) -> bool) -> Range<usize> {
        let start = self.at;
        self.at += self.rest().find(|c| !fits(c)).unwrap_or(self.text.len() - start);
        start..self.at
    }

    /// Moves over digits with an optional decimal point and gives their bytes.
    pub(super) fn digits(&mut self) -> Result<Range<usize>, FormulaFault> {
        let start = self.at;
        if self.run(|c| c.is_ascii_digit()).is_empty() {
            return Err(self.unexpected("a number"));
        }
        let whole = &self.text[start..self.at];
        if whole.len() > 1 && whole.starts_with('0') {
            return Err(FormulaFault::new(start..self.at, format!("`{whole}` begins with a zero too many")));
        }
        if self.eat(".") && self.run(|c| c.is_ascii_digit()).is_empty() {
            return Err(FormulaFault::new(start..self.at, "digits are missing after the decimal point"));
        }
        Ok(start..self.at)
    }

    /// Moves over superscript digits with an optional minus; `None` where there are none.
    pub(super) fn superscript(&mut self) -> Result<Option<i32>, FormulaFault> {
        let start = self.at;
        let negative = self.eat("⁻");
        let mut value: i32 = 0;
        let digits = self.run(|c| match superscript_digit(c) {
            Some(digit) => {
                value = value.saturating_mul(10).saturating_add(digit);
                true
            }
            None => false,
        });
        match (negative, digits.is_empty()) {
            (false, true) => Ok(None),
            (true, true) => Err(FormulaFault::new(start..self.at, "digits are missing after the raised minus")),
            (negative, false) => Ok(Some(if negative { -value } else { value })),
        }
    }

    /// A fault at the character that stands here.
    pub(super) fn unexpected(&self, wanted: &str) -> FormulaFault {
        match self.peek() {
            Some(c) => {
                FormulaFault::new(self.at..self.at + c.len_utf8(), format!("{wanted} is expected where `{c}` stands"))
            }
            None => FormulaFault::new(self.at..self.at, format!("{wanted} is expected at the end")),
        }
    }
}

fn superscript_digit(c: char) -> Option<i32> {
    match c {
        '⁰' => Some(0),
        '¹' => Some(1),
        '²' => Some(2),
        '³' => Some(3),
        '⁴'..='⁹' => Some(4 + (c as i32 - '⁴' as i32)),
        _ => None,
    }
}
