//! One fault: what is wrong, where, and what would be right.
use super::{Address, Code, nearest};
use std::ops::Range;

/// Whether the input can still be used.
#[derive(Debug, Clone, Copy, PartialEq, Eq)]
pub enum Severity {
    /// It cannot.
    Error,
    /// It can, but a reader should know.
    Warning,
}

/// One fault of the input.
///
/// The message states the fact, the label stands at the caret, help says what to type.
#[derive(Debug, Clone, PartialEq, Eq)]
pub struct Diagnostic {
    /// Row of the table of codes.
    pub code: Code,
    /// Whether the input can still be used.
    pub severity: Severity,
    /// The value at fault.
    pub address: Address,
    /// Bytes at fault, where they are narrower than the value or it has no address.
    pub span: Option<Range<usize>>,
    /// What is wrong.
    pub message: Box<str>,
    /// A few words at the caret.
    pub label: Box<str>,
    /// What would be right.
    pub help: Vec<String>,
    /// What else bears on it.
    pub notes: Vec<String>,
}

impl Diagnostic {
    /// A fault that makes the input unusable.
    #[must_use]
    pub fn error(code: Code, address: Address) -> Self {
        Self {
            code,
            severity: Severity::Error,
            address,
            span: None,
            message: code.title().into(),
            label: "".into(),
            help: Vec::new(),
            notes: Vec::new(),
        }
    }

    /// Something a reader should know.
    #[must_use]
    pub fn warning(code: Code, address: Address) -> Self {
        Self { severity: Severity::Warning, ..Self::error(code, address) }
    }

    /// Points at these bytes of the text instead of the whole value.
    #[must_use]
    pub fn at(mut self, span: Range<usize>) -> Self {
        self.span = Some(span);
        self
    }

    /// Says what is wrong.
    #[must_use]
    pub fn message(mut self, message: impl Into<String>) -> Self {
        self.message = message.into().into_boxed_str();
        self
    }

    /// Says a few words at the caret.
    #[must_use]
    pub fn label(mut self, label: impl Into<String>) -> Self {
        self.label = label.into().into_boxed_str();
        self
    }

    /// Says what would be right.
    #[must_use]
    pub fn help(mut self, help: impl Into<String>) -> Self {
        self.help.push(help.into());
        self
    }

    /// Says what else bears on it.
    #[must_use]
    pub fn note(mut self, note: impl Into<String>) -> Self {
        self.notes.push(note.into());
        self
    }

    /// Offers the nearest of the names that would have been right, where one is near.
    #[must_use]
    pub fn nearest<'a>(self, name: &str, candidates: impl IntoIterator<Item = &'a str>) -> Self {
        match nearest(name, candidates) {
            Some(near) => self.help(format!("the nearest name is `{near}`")),
            None => self,
        }
    }
}
