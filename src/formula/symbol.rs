//! Symbols: Latin or Greek letters with subscript digits or an underscored word, such as `κ₁` and `σ_top`.
use std::borrow::Cow;
use std::fmt;

/// A formula's symbol, as printed.
#[derive(Debug, Clone, PartialEq, Eq, Hash, PartialOrd, Ord)]
pub struct Symbol(Cow<'static, str>);

impl Symbol {
    /// A symbol known at compile time.
    #[must_use]
    pub const fn new(text: &'static str) -> Self {
        Self(Cow::Borrowed(text))
    }

    /// A stem with a running index, printed as subscript digits: `F` and 12 give `F₁₂`.
    #[must_use]
    pub fn indexed(stem: &str, index: usize) -> Self {
        let digits = index.to_string();
        let subscript =
            digits.chars().map(|d| ['₀', '₁', '₂', '₃', '₄', '₅', '₆', '₇', '₈', '₉'][d as usize - '0' as usize]);
        Self(Cow::Owned(stem.chars().chain(subscript).collect()))
    }

    /// A symbol read from text.
    #[must_use]
    pub const fn owned(text: String) -> Self {
        Self(Cow::Owned(text))
    }

    /// The printed form.
    #[must_use]
    pub fn as_str(&self) -> &str {
        &self.0
    }

    /// Letters before any subscript.
    #[must_use]
    pub fn stem(&self) -> &str {
        let end = self.0.find(|c: char| c == '_' || ('₀'..='₉').contains(&c)).unwrap_or(self.0.len());
        &self.0[..end]
    }

    /// The subscript without its underscore, digits written plainly: `12` for `F₁₂`, `top` for `σ_top`.
    #[must_use]
    pub fn subscript(&self) -> String {
        self.0[self.stem().len()..]
            .trim_start_matches('_')
            .chars()
            .map(|c| if ('₀'..='₉').contains(&c) { char::from(b'0' + (c as u32 - '₀' as u32) as u8) } else { c })
            .collect()
    }
}

impl fmt::Display for Symbol {
    fn fmt(&self, f: &mut fmt::Formatter<'_>) -> fmt::Result {
        f.write_str(&self.0)
    }
}
