//! The second reading of a file, by `serde_yaml`, compared leaf by leaf with the first.
use crate::diagnostic::{Content, Entry, Place};
use serde::de::{DeserializeSeed, Deserializer, Error, MapAccess, SeqAccess, Visitor};
use std::cell::RefCell;
use std::fmt;
use std::ops::Range;

/// Whether `serde_yaml` reads the same values; if not, the bytes of the first that differs.
///
/// Every leaf is asked for as text, which `serde_yaml` gives as typed: `1.50`, `010` and `no` stay what they are.
pub(super) fn confirm(text: &str, root: &Place) -> Result<(), Range<usize>> {
    let differs = RefCell::new(None);
    let expected = Expected { place: root, differs: &differs };
    match expected.deserialize(serde_yaml::Deserializer::from_str(text)) {
        Ok(()) => Ok(()),
        Err(error) => Err(differs.into_inner().unwrap_or_else(|| {
            let at = error.location().map_or(0, |place| place.index().min(text.len()));
            at..at
        })),
    }
}

/// What the first reading found, to be met by the second.
#[derive(Clone, Copy)]
struct Expected<'a> {
    place: &'a Place,
    /// The innermost place that differs: it is noted first and never replaced.
    differs: &'a RefCell<Option<Range<usize>>>,
}

impl<'a> Expected<'a> {
    fn differ<E: Error>(&self, span: &Range<usize>) -> E {
        self.differs.borrow_mut().get_or_insert_with(|| span.clone());
        E::custom("read differently")
    }

    fn noting<T, E: Error>(&self, result: Result<T, E>) -> Result<T, E> {
        result.map_err(|_| self.differ(&self.place.span))
    }
}

impl<'de> DeserializeSeed<'de> for Expected<'_> {
    type Value = ();

    fn deserialize<D: Deserializer<'de>>(self, deserializer: D) -> Result<(), D::Error> {
        self.noting(match &self.place.content {
            Content::Text { text, .. } => deserializer.deserialize_str(Leaf(text)),
            Content::List(_) => deserializer.deserialize_seq(self),
            Content::Map(_) => deserializer.deserialize_map(self),
        })
    }
}

impl<'de> Visitor<'de> for Expected<'_> {
    type Value = ();

    fn expecting(&self, f: &mut fmt::Formatter<'_>) -> fmt::Result {
        f.write_str("what the first reading found")
    }

    fn visit_seq<A: SeqAccess<'de>>(self, mut seq: A) -> Result<(), A::Error> {
        let Content::List(items) = &self.place.content else { return Err(self.differ(&self.place.span)) };
        for place in items {
            if seq.next_element_seed(Expected { place, ..self })?.is_none() {
                return Err(self.differ(&place.span));
            }
        }
        // One more is a difference, and asking for it ends the list properly.
        match seq.next_element::<serde::de::IgnoredAny>()? {
            None => Ok(()),
            Some(_) => Err(self.differ(&self.place.span)),
        }
    }

    fn visit_map<A: MapAccess<'de>>(self, mut map: A) -> Result<(), A::Error> {
        let Content::Map(entries) = &self.place.content else { return Err(self.differ(&self.place.span)) };
        for entry in entries {
            if self.noting_key(entry, map.next_key_seed(KeyOf(entry)))?.is_none() {
                return Err(self.differ(&entry.key_span));
            }
            map.next_value_seed(Expected { place: &entry.value, ..self })?;
        }
        match map.next_key::<serde::de::IgnoredAny>()? {
            None => Ok(()),
            Some(_) => Err(self.differ(&self.place.span)),
        }
    }
}

impl Expected<'_> {
    fn noting_key<T, E: Error>(&self, entry: &Entry, result: Result<T, E>) -> Result<T, E> {
        result.map_err(|_| self.differ(&entry.key_span))
    }
}

struct KeyOf<'a>(&'a Entry);

impl<'de> DeserializeSeed<'de> for KeyOf<'_> {
    type Value = ();

    fn deserialize<D: Deserializer<'de>>(self, deserializer: D) -> Result<(), D::Error> {
        deserializer.deserialize_str(Leaf(&self.0.key))
    }
}

/// The text of a leaf.
struct Leaf<'a>(&'a str);

impl Visitor<'_> for Leaf<'_> {
    type Value = ();

    fn expecting(&self, f: &mut fmt::Formatter<'_>) -> fmt::Result {
        write!(f, "`{}`", self.0)
    }

    fn visit_str<E: Error>(self, text: &str) -> Result<(), E> {
        if text == self.0 { Ok(()) } else { Err(E::custom("another text")) }
    }
}
