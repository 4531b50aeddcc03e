//! One pass over the events of the YAML: every key and value with its bytes, and every fault of form.
//!
//! Depth, size and expansion are limited here, before anything else looks at the text, so that no file however made
//! can keep a later stage busy.
use super::{Address, Code, Content, Diagnostic, Diagnostics, Entry, Place};
use saphyr_parser::{Event, Marker, Parser, ScalarStyle, ScanError, Span};
use std::collections::BTreeMap;
use std::ops::Range;

/// Room for a hundred thousand members; what is read takes some hundred times the file in memory.
const LARGEST_BYTES: usize = 16 << 20;
const DEEPEST: usize = 64;
/// Values that aliases may add to a file in all.
const LARGEST_EXPANSION: usize = 10_000;

/// The places of a text, where it can be read to its end, and its faults of form.
pub(super) fn locate(text: &str) -> (Option<Place>, Diagnostics) {
    let mut faults = Diagnostics::new();
    if text.len() > LARGEST_BYTES {
        faults.push(
            whole_file(Code::TooLarge)
                .message(format!("the file has {} MiB; at most 16 MiB are read", text.len() >> 20))
                .help("a calculation package is for a small structure: split the file"),
        );
        return (None, faults);
    }
    if let Some((at, c)) = text.char_indices().find(|(_, c)| is_forbidden(*c)) {
        faults.push(
            whole_file(Code::ControlCharacter)
                .at(at..at + c.len_utf8())
                .message(format!("the file holds the control character U+{:04X}", c as u32))
                .label("not text")
                .help("save the file as plain UTF-8 text"),
        );
        return (None, faults);
    }
    let mut pass = Pass {
        text,
        bytes: ByteIndex::new(text),
        faults,
        open: Vec::new(),
        root: None,
        anchors: BTreeMap::new(),
        expanded: 0,
    };
    let mut complete = pass.run();
    let scalars = pass.root.as_ref();
    let tabs = indenting_tabs(text, scalars);
    if !tabs.is_empty() {
        if !complete {
            // A tab is the likelier cause of whatever else the parser made of the text.
            pass.faults = Diagnostics::new();
        }
        pass.faults.extend(tabs);
        complete &= pass.root.is_some();
    }
    (if complete { pass.root } else { None }, pass.faults)
}

fn whole_file(code: Code) -> Diagnostic {
    Diagnostic::error(code, Address::root())
}

/// Control characters that YAML forbids. A NUL would even end the text for some readers.
fn is_forbidden(c: char) -> bool {
    matches!(c, '\0'..='\u{8}' | '\u{b}' | '\u{c}' | '\u{e}'..='\u{1f}' | '\u{7f}'..='\u{84}' | '\u{86}'..='\u{9f}' | '\u{feff}' | '\u{fffe}' | '\u{ffff}')
}

struct Pass<'t> {
    text: &'t str,
    bytes: ByteIndex<'t>,
    faults: Diagnostics,
    open: Vec<Frame>,
    root: Option<Place>,
    /// Anchored values with the count of values in them; `None` while still open.
    anchors: BTreeMap<usize, Option<(Place, usize)>>,
    expanded: usize,
}

/// A block that has begun and not ended.
struct Frame {
    start: usize,
    anchor: usize,
    body: Body,
}

enum Body {
    List(Vec<Place>),
    Map { entries: Vec<Entry>, first: BTreeMap<String, Range<usize>>, key: Key },
}

/// What a map waits for.
enum Key {
    Awaited,
    Read(String, Range<usize>),
    /// A key that is no text: its value is read and dropped.
    Unusable,
}

impl Pass<'_> {
    /// Whether the text could be read to its end.
    fn run(&mut self) -> bool {
        let mut parser = Parser::new_from_str(self.text);
        let mut documents = 0;
        while let Some(next) = parser.next_event() {
            let (event, span) = match next {
                Ok(next) => next,
                Err(error) => {
                    self.not_yaml(&error);
                    return false;
                }
            };
            let at = self.span(&span);
            match event {
                Event::Nothing | Event::StreamStart | Event::StreamEnd | Event::DocumentEnd => {}
                Event::DocumentStart(_) => {
                    documents += 1;
                    if documents > 1 {
                        self.faults.push(
                            whole_file(Code::SecondDocument)
                                .at(at)
                                .message("a second document begins here")
                                .label("one file describes one structure")
                                .help("take out the line `---`, or put what follows into a file of its own"),
                        );
                        return true;
                    }
                }
                Event::Scalar(text, style, anchor, tag) => {
                    self.refuse_tag(tag.is_some(), &at);
                    let plain = style == ScalarStyle::Plain;
                    let at = if plain { tight(self.text, &at, &text) } else { at };
                    self.close(Place { span: at, content: Content::Text { text: text.into_owned(), plain } }, anchor);
                }
                Event::Alias(anchor) => self.alias(anchor, at),
                Event::SequenceStart(anchor, tag) => {
                    self.refuse_tag(tag.is_some(), &at);
                    if !self.begin(at, anchor, Body::List(Vec::new())) {
                        return false;
                    }
                }
                Event::MappingStart(anchor, tag) => {
                    self.refuse_tag(tag.is_some(), &at);
                    let body = Body::Map { entries: Vec::new(), first: BTreeMap::new(), key: Key::Awaited };
                    if !self.begin(at, anchor, body) {
                        return false;
                    }
                }
                Event::SequenceEnd | Event::MappingEnd => self.end(&at),
            }
        }
        true
    }

    fn not_yaml(&mut self, error: &ScanError) {
        let at = self.bytes.of(error.marker());
        let info = error.info();
        if info.contains("recursion limit") {
            self.too_deep(at..at);
            return;
        }
        let help = if info.contains("mapping values are not allowed") || info.contains("invalid trailing") {
            "a text that holds `: ` is written in quotes; a key begins its own line or stands inside `{ }`"
        } else if info.contains("flow") || info.contains(']') || info.contains('}') {
            "every `[` and `{` needs its closing bracket, and commas between what they hold"
        } else if info.contains("quoted") || info.contains("unexpected end of stream") {
            "a text that begins with a quote ends with the same quote"
        } else if info.contains("anchor") {
            "an alias `*name` repeats what was marked `&name` before it"
        } else if info.contains("simple key") || info.contains("':'") {
            "each line of a block is `key: value`, indented like its neighbours"
        } else {
            "check the indentation and the punctuation of this line and the one before"
        };
        let end =
            self.text[at..].chars().next().filter(|c| !matches!(c, '\n' | '\r')).map_or(at, |c| at + c.len_utf8());
        self.faults.push(
            whole_file(Code::NotYaml)
                .at(at..end)
                .message(format!("this is not YAML: {info}"))
                .label("reading stopped here")
                .help(help),
        );
    }

    fn refuse_tag(&mut self, tagged: bool, at: &Range<usize>) {
        if tagged {
            self.faults.push(
                whole_file(Code::Tag)
                    .at(at.clone())
                    .message("a YAML tag stands before this value")
                    .label("tagged")
                    .help("take out the `!...`: every value of the input language is plain text"),
            );
        }
    }

    /// Begins a block; `false` where it lies too deep.
    fn begin(&mut self, at: Range<usize>, anchor: usize, body: Body) -> bool {
        if self.open.len() >= DEEPEST {
            self.too_deep(at);
            return false;
        }
        if anchor > 0 {
            self.anchors.insert(anchor, None);
        }
        self.open.push(Frame { start: at.start, anchor, body });
        true
    }

    fn end(&mut self, at: &Range<usize>) {
        let Some(frame) = self.open.pop() else { return };
        let content = match frame.body {
            Body::List(items) => Content::List(items),
            Body::Map { entries, .. } => Content::Map(entries),
        };
        let last = self.text[frame.start..at.end.max(frame.start)].trim_end().len();
        self.close(Place { span: frame.start..frame.start + last, content }, frame.anchor);
    }

    /// Hands a finished value to the block that holds it.
    fn close(&mut self, place: Place, anchor: usize) {
        if anchor > 0 {
            let count = count(&place);
            self.anchors.insert(anchor, Some((place.clone(), count)));
        }
        match self.open.last_mut().map(|frame| &mut frame.body) {
            None => self.root = Some(place),
            Some(Body::List(items)) => items.push(place),
            Some(Body::Map { entries, first, key }) => match std::mem::replace(key, Key::Awaited) {
                Key::Awaited => *key = read_key(place, &mut self.faults),
                Key::Unusable => {}
                Key::Read(name, key_span) => {
                    let earlier = first.get(&name).cloned();
                    if earlier.is_none() {
                        first.insert(name.clone(), key_span.clone());
                    }
                    if let Some(earlier) = &earlier {
                        self.faults.push(repeated(self.text, &name, &key_span, earlier));
                    }
                    entries.push(Entry { key: name, key_span, repeated: earlier.is_some(), value: place });
                }
            },
        }
    }

    fn alias(&mut self, anchor: usize, at: Range<usize>) {
        let fault = whole_file(Code::Alias).at(at.clone());
        let empty = Place { span: at.clone(), content: Content::Text { text: String::new(), plain: true } };
        let (place, fault) = match self.anchors.get(&anchor) {
            Some(Some((place, count))) if self.expanded + count <= LARGEST_EXPANSION => {
                self.expanded += count;
                (Place { span: at.clone(), content: place.content.clone() }, None)
            }
            Some(Some(_)) => (
                empty,
                Some(
                    fault
                        .message(format!("aliases repeat more than {LARGEST_EXPANSION} values"))
                        .label("too much is repeated here")
                        .help("write the values out, or load several members at once with `on: [A, B]`"),
                ),
            ),
            _ => (
                empty,
                Some(
                    fault
                        .message("an alias repeats a block that holds the alias itself")
                        .label("without end")
                        .help("write the values out"),
                ),
            ),
        };
        if let Some(fault) = fault {
            self.faults.push(fault);
            if let Some(Frame { body: Body::List(_), .. }) = self.open.last() {
                return;
            }
        }
        // Depth is counted where blocks begin; an alias could add more below it.
        let too_deep = self.open.len() + depth(&place) > DEEPEST;
        self.close(place, 0);
        if too_deep {
            self.too_deep(at);
        }
    }

    fn too_deep(&mut self, at: Range<usize>) {
        self.faults.push(
            whole_file(Code::TooDeep)
                .at(at)
                .message(format!("blocks lie more than {DEEPEST} deep in one another"))
                .label("too deep")
                .help("nothing in the input language is deeper than 8; look for brackets that are not closed"),
        );
    }

    fn span(&self, span: &Span) -> Range<usize> {
        let start = self.bytes.of(&span.start);
        start..self.bytes.of(&span.end).max(start)
    }
}

fn read_key(place: Place, faults: &mut Diagnostics) -> Key {
    let fault = |code| whole_file(code).at(place.span.clone());
    match place.content {
        Content::Text { text, plain: true } if text == "<<" => {
            faults.push(
                fault(Code::MergeKey)
                    .message("`<<` would merge another block into this one")
                    .label("merge key")
                    .help("write the keys out: a checker must find every value where it counts"),
            );
            Key::Unusable
        }
        Content::Text { text, .. } if !text.is_empty() => Key::Read(text, place.span),
        _ => {
            faults.push(
                fault(Code::KeyNotText)
                    .message("this key is no single text")
                    .label("not a key")
                    .help("a key is one word and a colon, such as `nodes:`"),
            );
            Key::Unusable
        }
    }
}

fn repeated(text: &str, name: &str, again: &Range<usize>, earlier: &Range<usize>) -> Diagnostic {
    let before = &text[..earlier.start];
    let line = 1 + before.matches('\n').count();
    let column = 1 + before.rsplit('\n').next().unwrap_or("").chars().count();
    whole_file(Code::DuplicateKey)
        .at(again.clone())
        .message(format!("`{name}` is given twice"))
        .label(format!("first given on line {line}, column {column}"))
        .help("keep one of them, or give this one another name")
}

fn count(place: &Place) -> usize {
    1 + match &place.content {
        Content::Text { .. } => 0,
        Content::List(items) => items.iter().map(count).sum(),
        Content::Map(entries) => entries.iter().map(|e| 1 + count(&e.value)).sum(),
    }
}

fn depth(place: &Place) -> usize {
    match &place.content {
        Content::Text { .. } => 0,
        Content::List(items) => 1 + items.iter().map(depth).max().unwrap_or(0),
        Content::Map(entries) => 1 + entries.iter().map(|e| depth(&e.value)).max().unwrap_or(0),
    }
}

/// The bytes of an unquoted text alone, without blanks or a comment that the parser may count in.
fn tight(text: &str, at: &Range<usize>, value: &str) -> Range<usize> {
    if text[at.start..].starts_with(value) {
        return at.start..at.start + value.len();
    }
    at.start..at.start + text[at.clone()].trim_end().len()
}

/// A fault for every line indented with a tab. Inside quotes and prose blocks a tab is text.
fn indenting_tabs(text: &str, root: Option<&Place>) -> Vec<Diagnostic> {
    if !text.contains('\t') {
        return Vec::new();
    }
    let mut texts = Vec::new();
    if let Some(root) = root {
        text_spans(root, &mut texts);
    }
    texts.sort_by_key(|span| span.start);
    let mut faults = Vec::new();
    let mut start = 0;
    for line in text.split_inclusive('\n') {
        let indent = line.len() - line.trim_start_matches([' ', '\t']).len();
        let rest = line[indent..].trim_end();
        if let Some(tab) = line[..indent].find('\t')
            && !rest.is_empty()
            && !rest.starts_with('#')
        {
            let at = start + tab;
            let inside = texts.partition_point(|span| span.start <= at).checked_sub(1).and_then(|i| texts.get(i));
            if inside.is_none_or(|span| at >= span.end) {
                faults.push(
                    whole_file(Code::Tab)
                        .at(at..at + 1)
                        .message("this line is indented with a tab")
                        .label("tab")
                        .help("indent with spaces: how wide a tab is, YAML does not say"),
                );
            }
        }
        start += line.len();
    }
    faults
}

fn text_spans(place: &Place, found: &mut Vec<Range<usize>>) {
    match &place.content {
        Content::Text { plain, .. } => {
            if !plain {
                found.push(place.span.clone());
            }
        }
        Content::List(items) => items.iter().for_each(|item| text_spans(item, found)),
        Content::Map(entries) => entries.iter().for_each(|entry| text_spans(&entry.value, found)),
    }
}

/// Bytes from the parser's count of characters: one landmark every so many characters, then a short walk.
struct ByteIndex<'t> {
    text: &'t str,
    landmarks: Vec<usize>,
}

const STRIDE: usize = 64;

impl<'t> ByteIndex<'t> {
    fn new(text: &'t str) -> Self {
        Self { text, landmarks: text.char_indices().step_by(STRIDE).map(|(at, _)| at).collect() }
    }

    fn of(&self, marker: &Marker) -> usize {
        let stretch = marker.index() / STRIDE;
        let Some(start) = self.landmarks.get(stretch) else { return self.text.len() };
        // Where every character of the stretch is one byte, no walk is needed.
        if self.landmarks.get(stretch + 1) == Some(&(start + STRIDE)) {
            return start + marker.index() % STRIDE;
        }
        self.text[*start..].char_indices().nth(marker.index() % STRIDE).map_or(self.text.len(), |(at, _)| start + at)
    }
}

#[cfg(test)]
mod tests {
    use super::super::Source;
    use super::*;

    #[track_caller]
    fn check(text: &str, expected: &[Code]) {
        let codes: Vec<Code> = Source::new(text).faults().iter().map(|d| d.code).collect();
        assert_eq!(codes, expected, "{text:.80}");
    }

    #[test]
    fn what_yaml_allows_and_the_language_does_not() {
        check("a: 1\n---\nb: 2\n", &[Code::SecondDocument]);
        check("a: &x {b: 1}\nc: {<<: *x}\n", &[Code::MergeKey]);
        check("a: !!int 3\n", &[Code::Tag]);
        check("? [a, b]\n: 1\nc: 2\n", &[Code::KeyNotText]);
        check("a: 1\nb: 2\na: 3\n", &[Code::DuplicateKey]);
        check("a:\n\tb: 1\n", &[Code::Tab]);
        check("a: \"\tx\"\nb: |\n  \ttext\nc: 1\t# blank\n", &[]);
        check("a: b\0c\n", &[Code::ControlCharacter]);
        check("a: [1, 2\nb: 3", &[Code::NotYaml]);
        check("a: &x [1, 2]\nb: *x\n", &[]);
        check("a: &x [1, *x]\n", &[Code::Alias]);
        check("a: *y\n", &[Code::NotYaml]);
    }

    #[test]
    fn files_made_to_keep_a_reader_busy_are_refused_at_once() {
        check(&"[".repeat(100_000), &[Code::TooDeep]);
        check(&"{a: ".repeat(30_000), &[Code::TooDeep]);
        check(&"- ".repeat(50_000), &[Code::TooDeep]);
        check(&"? ".repeat(50_000), &[Code::TooDeep]);
        let mut bomb = String::from("a0: &a0 [x, x, x, x, x, x, x, x, x]\n");
        for level in 1..10 {
            let row = vec![format!("*a{}", level - 1); 9].join(", ");
            bomb.push_str(&format!("a{level}: &a{level} [{row}]\n"));
        }
        let faults = Source::new(&bomb).faults().clone();
        assert!(faults.iter().all(|d| d.code == Code::Alias) && !faults.is_empty());
    }

    #[test]
    fn a_file_beyond_the_largest_size_is_not_read() {
        check(&" ".repeat(LARGEST_BYTES + 1), &[Code::TooLarge]);
    }
}
