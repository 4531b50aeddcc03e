//! A file's values before anything is understood: maps, lists, texts, each with its address and its bytes.
use crate::diagnostic::{Address, Code, Content, Diagnostic, Place};
use std::ops::Range;

/// A value as typed.
#[derive(Debug, Clone, PartialEq)]
pub struct Raw {
    /// Its address.
    pub address: Address,
    /// Its bytes.
    pub span: Range<usize>,
    /// Bytes of the key it stands under.
    pub key: Option<Range<usize>>,
    /// What it is.
    pub shape: Shape,
}

/// What a value is.
#[derive(Debug, Clone, PartialEq)]
pub enum Shape {
    /// A text, as typed.
    Text(String),
    /// No value: nothing, `~` or a plain `null`, as typed.
    Null(String),
    /// A list.
    List(Vec<Raw>),
    /// A map in the order of the file; of repeated keys the first.
    Map(Vec<Field>),
}

/// A key and its value.
#[derive(Debug, Clone, PartialEq)]
pub struct Field {
    /// The key as typed.
    pub key: String,
    /// Bytes of the key.
    pub key_span: Range<usize>,
    /// Its value.
    pub value: Raw,
}

impl Raw {
    pub(super) fn of(place: &Place) -> Self {
        build(place, Address::root(), None)
    }

    /// The bytes to point at: a text itself, otherwise the key it stands under, otherwise its beginning.
    #[must_use]
    pub fn pointer(&self) -> Range<usize> {
        match (&self.shape, &self.key) {
            (Shape::Text(text), _) if !text.is_empty() => self.span.clone(),
            (_, Some(key)) => key.clone(),
            (Shape::Map(fields), None) => fields.first().map_or(self.span.clone(), |first| first.key_span.clone()),
            _ => self.span.clone(),
        }
    }

    /// A fault of this value.
    #[must_use]
    pub fn error(&self, code: Code) -> Diagnostic {
        Diagnostic::error(code, self.address.clone()).at(self.pointer())
    }

    /// A remark on this value.
    #[must_use]
    pub fn warning(&self, code: Code) -> Diagnostic {
        Diagnostic::warning(code, self.address.clone()).at(self.pointer())
    }

    /// The text, where it is one; a plain `null` may be a name and counts as typed.
    #[must_use]
    pub fn as_typed(&self) -> Option<&str> {
        match &self.shape {
            Shape::Text(text) => Some(text),
            Shape::Null(typed) if !typed.is_empty() => Some(typed),
            _ => None,
        }
    }

    /// The value under a key, where this is a map that has it.
    #[must_use]
    pub fn field(&self, key: &str) -> Option<&Self> {
        match &self.shape {
            Shape::Map(fields) => fields.iter().find(|field| field.key == key).map(|field| &field.value),
            _ => None,
        }
    }

    /// The items of a list; none where it is no list.
    #[must_use]
    pub fn items(&self) -> &[Self] {
        match &self.shape {
            Shape::List(items) => items,
            _ => &[],
        }
    }

    /// Whether there is no value.
    #[must_use]
    pub const fn is_null(&self) -> bool {
        matches!(self.shape, Shape::Null(_))
    }

    /// What it is, in words.
    #[must_use]
    pub const fn form(&self) -> &'static str {
        match self.shape {
            Shape::Text(_) => "a single value",
            Shape::Null(_) => "nothing",
            Shape::List(_) => "a list",
            Shape::Map(_) => "a block of keys",
        }
    }
}

fn build(place: &Place, address: Address, key: Option<Range<usize>>) -> Raw {
    let shape = match &place.content {
        Content::Text { text, plain: true } if matches!(text.as_str(), "" | "~" | "null" | "Null" | "NULL") => {
            Shape::Null(text.clone())
        }
        Content::Text { text, .. } => Shape::Text(text.clone()),
        Content::List(items) => {
            Shape::List(items.iter().enumerate().map(|(i, item)| build(item, address.index(i), None)).collect())
        }
        Content::Map(entries) => Shape::Map(
            entries
                .iter()
                .filter(|entry| !entry.repeated)
                .map(|entry| Field {
                    key: entry.key.clone(),
                    key_span: entry.key_span.clone(),
                    value: build(&entry.value, address.key(&entry.key), Some(entry.key_span.clone())),
                })
                .collect(),
        ),
    };
    Raw { address, span: place.span.clone(), key, shape }
}
