//! The text of a file with the place of every key and value in it.
use super::events;
use super::{Address, Code, Diagnostic, Diagnostics, Segment};
use std::ops::Range;

/// The text of a file, its byte-order mark taken off, and the place of every key and value.
#[derive(Debug, Clone)]
pub struct Source {
    text: String,
    line_starts: Vec<usize>,
    root: Option<Place>,
    faults: Diagnostics,
}

/// A value and its bytes.
#[derive(Debug, Clone, PartialEq)]
pub struct Place {
    /// Bytes of the value; for a block over several lines, from its first byte to its last.
    pub span: Range<usize>,
    /// What stands there.
    pub content: Content,
}

/// What stands at a place.
#[derive(Debug, Clone, PartialEq)]
pub enum Content {
    /// A leaf, as typed.
    Text {
        /// The text, quotes taken off.
        text: String,
        /// Whether it was written without quotes and not as a block.
        plain: bool,
    },
    /// A list.
    List(Vec<Place>),
    /// A map in the order of the file, repeated keys included.
    Map(Vec<Entry>),
}

/// A key and its value.
#[derive(Debug, Clone, PartialEq)]
pub struct Entry {
    /// The key as typed.
    pub key: String,
    /// Bytes of the key.
    pub key_span: Range<usize>,
    /// Whether an earlier key of the same map is spelt the same.
    pub repeated: bool,
    /// The value.
    pub value: Place,
}

/// Where an address leads.
#[derive(Debug, Clone, PartialEq, Eq)]
pub struct Found {
    /// Bytes of the key, where the value stands under one.
    pub key: Option<Range<usize>>,
    /// Bytes of the value.
    pub value: Range<usize>,
    /// Whether the value is a leaf with something in it.
    pub is_text: bool,
}

impl Found {
    /// The bytes to point at: a leaf itself, otherwise the key that holds the block.
    #[must_use]
    pub fn pointer(&self) -> Range<usize> {
        match &self.key {
            Some(key) if !self.is_text => key.clone(),
            _ => self.value.clone(),
        }
    }
}

impl Source {
    /// Reads the places of a text. Faults of form are collected, not returned: a fault must be shown in this text.
    #[must_use]
    pub fn new(text: &str) -> Self {
        let text = text.strip_prefix('\u{feff}').unwrap_or(text);
        let (root, faults) = events::locate(text);
        Self { text: text.to_owned(), line_starts: line_starts(text), root, faults }
    }

    /// Reads the places of a file as it lies on disk. Bytes that are not UTF-8 are a fault of form.
    #[must_use]
    pub fn from_bytes(bytes: &[u8]) -> Self {
        let fault = match std::str::from_utf8(bytes) {
            Ok(text) => return Self::new(text),
            Err(error) => error,
        };
        let text = String::from_utf8_lossy(bytes).into_owned();
        let at = fault.valid_up_to();
        let mark = text[at..].chars().next().map_or(at, |c| at + c.len_utf8());
        let fault = Diagnostic::error(Code::NotUtf8, Address::root()).at(at..mark);
        let fault = fault.message("the file is not text in UTF-8").label("not a character");
        let faults = [fault.help("save the file as UTF-8, without a password or compression")].into_iter().collect();
        Self { line_starts: line_starts(&text), text, root: None, faults }
    }

    /// The text without its byte-order mark; every span counts in its bytes.
    #[must_use]
    pub fn text(&self) -> &str {
        &self.text
    }

    /// The outermost value, where the text could be read to its end.
    #[must_use]
    pub fn root(&self) -> Option<&Place> {
        self.root.as_ref()
    }

    /// Faults of form: bad YAML, repeated keys, and whatever YAML allows and the language does not.
    #[must_use]
    pub fn faults(&self) -> &Diagnostics {
        &self.faults
    }

    /// Where an address leads; `None` where it leads nowhere.
    #[must_use]
    pub fn find(&self, address: &Address) -> Option<Found> {
        let mut place = self.root.as_ref()?;
        let mut key = None;
        for segment in address.segments() {
            match (segment, &place.content) {
                (Segment::Key(name), Content::Map(entries)) => {
                    let entry = entries.iter().find(|e| e.key == *name)?;
                    key = Some(entry.key_span.clone());
                    place = &entry.value;
                }
                (Segment::Index(index), Content::List(items)) => {
                    key = None;
                    place = items.get(*index)?;
                }
                _ => return None,
            }
        }
        let is_text = matches!(&place.content, Content::Text { text, .. } if !text.is_empty());
        Some(Found { key, value: place.span.clone(), is_text })
    }

    /// The line an address stands on, from 1: its key's, or its value's where it has none.
    #[must_use]
    pub fn line_of(&self, address: &Address) -> Option<usize> {
        let found = self.find(address)?;
        Some(self.line_column(found.key.unwrap_or(found.value).start).0)
    }

    /// Line and column of a byte, both from 1; columns count characters.
    #[must_use]
    pub fn line_column(&self, byte: usize) -> (usize, usize) {
        let byte = byte.min(self.text.len());
        let line = self.line_starts.partition_point(|start| *start <= byte).max(1);
        let start = self.line_starts.get(line - 1).copied().unwrap_or(0);
        let column = self.text.get(start..byte).map_or(0, |before| before.chars().count());
        (line, column + 1)
    }

    /// The bytes of the line that holds a byte, its line break left off.
    #[must_use]
    pub fn line_span(&self, byte: usize) -> Range<usize> {
        let line = self.line_starts.partition_point(|start| *start <= byte.min(self.text.len())).max(1);
        let start = self.line_starts.get(line - 1).copied().unwrap_or(0);
        let end = self.line_starts.get(line).copied().unwrap_or(self.text.len());
        start..start + self.text[start..end].trim_end_matches(['\n', '\r']).len()
    }
}

/// First byte of every line; a line ends at LF, CR LF or a lone CR, as YAML has it.
fn line_starts(text: &str) -> Vec<usize> {
    let bytes = text.as_bytes();
    let mut starts = vec![0];
    for (at, byte) in bytes.iter().enumerate() {
        if *byte == b'\n' || (*byte == b'\r' && bytes.get(at + 1) != Some(&b'\n')) {
            starts.push(at + 1);
        }
    }
    starts
}

#[cfg(test)]
mod tests {
    use super::*;

    #[track_caller]
    fn check(text: &str, address: &str, key: Option<&str>, value: &str) {
        let source = Source::new(text);
        assert!(source.faults().is_empty(), "{:?}", source.faults());
        let found = source.find(&Address::parse(address)).unwrap_or_else(|| panic!("{address} leads nowhere"));
        assert_eq!(found.key.map(|span| &source.text()[span]), key);
        assert_eq!(&source.text()[found.value], value);
    }

    #[test]
    fn keys_and_values_are_found_by_address() {
        let text = "\u{feff}nodes:\r\n  1: {x: 0 m, y: -2.50 m}\r\n  Ä: {x: \"1 m\"} # é\r\nlist:\r\n- a b  \r\n- [no, 'on']\r\ny: |\r\n  prose\r\nlast: 1e3";
        check(text, "nodes.1.y", Some("y"), "-2.50 m");
        check(text, "nodes.Ä.x", Some("x"), "\"1 m\"");
        check(text, "list[0]", None, "a b");
        check(text, "list[1][0]", None, "no");
        check(text, "list[1][1]", None, "'on'");
        check(text, "last", Some("last"), "1e3");
        let source = Source::new(text);
        assert_eq!(source.line_of(&Address::parse("list[1][1]")), Some(6));
        assert_eq!(source.line_of(&Address::parse("last")), Some(9));
        assert_eq!(source.find(&Address::parse("nodes.2")), None);
    }

    #[test]
    fn bytes_that_are_no_text_are_refused_where_they_stand() {
        let source = Source::from_bytes(b"a: 1\nb: \xff\xfe");
        assert!(source.root().is_none());
        let found: Vec<_> = source.faults().iter().map(|d| (d.code, d.span.clone())).collect();
        assert_eq!(found, [(Code::NotUtf8, Some(8..11))]);
        assert!(Source::from_bytes("\u{feff}a: ü".as_bytes()).faults().is_empty());
    }

    #[test]
    fn columns_count_characters() {
        let source = Source::new("a: äöü x");
        assert_eq!(source.line_column(source.text().find('x').expect("it is there")), (1, 8));
    }
}
