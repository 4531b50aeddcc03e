//! Running text: inline styles, line breaking over the whole paragraph, links.
use super::frame::{Frame, Link};
use super::maths::Maths;
use super::text::{Setter, Type};
use super::{FaceName, geometry, symbols};
use crate::document::Inline;
use crate::formula::Symbol;
use std::borrow::Cow;

/// A paragraph with its styles, ready to be measured and broken.
#[derive(Debug, Clone, Default)]
pub(super) struct Paragraph {
    text: String,
    spans: Vec<Span>,
    links: Vec<Box<str>>,
}

#[derive(Debug, Clone, Copy, PartialEq)]
struct Span {
    end: usize,
    kind: Type,
    link: Option<usize>,
    /// Whether it is a symbol of a formula.
    symbol: bool,
}

/// A word or a part of one: bytes of the text, its width, the space that follows it on the same line.
#[derive(Debug, Clone, Copy)]
struct Token {
    start: usize,
    end: usize,
    width: f32,
    space: f32,
    ends_line: bool,
}

/// A broken line: bytes of the text, and its width.
#[derive(Debug, Clone, Copy)]
pub(super) struct TextLine {
    start: usize,
    end: usize,
    pub(super) width: f32,
}

impl Paragraph {
    /// A paragraph of inline text set in `base` where nothing else is asked for.
    pub(super) fn new(inlines: &[Inline], base: Type) -> Self {
        let mut paragraph = Self::default();
        paragraph.push_all(inlines, base, None);
        while paragraph.text.ends_with([' ', '\n']) {
            paragraph.text.pop();
        }
        let end = paragraph.text.len();
        paragraph.spans.iter_mut().for_each(|span| span.end = span.end.min(end));
        paragraph
    }

    /// A paragraph of plain words.
    pub(super) fn plain(text: &str, kind: Type) -> Self {
        let mut paragraph = Self::default();
        paragraph.push(text, kind, None);
        paragraph
    }

    /// Adds plain words in a style, leading to an address where one is given.
    pub(super) fn add(&mut self, text: &str, kind: Type, to: Option<&str>) {
        let link = to.map(|to| {
            self.links.push(to.into());
            self.links.len() - 1
        });
        self.push(text, kind, link);
    }

    /// The same paragraph in type of another size.
    pub(super) fn scaled(&self, scale: f32) -> Cow<'_, Self> {
        if (scale - 1.0).abs() < 1e-4 {
            return Cow::Borrowed(self);
        }
        let mut scaled = self.clone();
        scaled.spans.iter_mut().for_each(|span| span.kind.size *= scale);
        Cow::Owned(scaled)
    }

    pub(super) fn is_empty(&self) -> bool {
        self.text.is_empty()
    }

    fn push_all(&mut self, inlines: &[Inline], kind: Type, link: Option<usize>) {
        for inline in inlines {
            match inline {
                Inline::Text(text) => self.push(text, kind, link),
                Inline::Strong(inner) => self.push_all(inner, Type { face: FaceName::Bold, ..kind }, link),
                Inline::Emphasis(inner) => {
                    let face = if kind.face == FaceName::Bold { FaceName::Bold } else { FaceName::Italic };
                    self.push_all(inner, Type { face, ..kind }, link);
                }
                Inline::Code(text) => {
                    self.push(text, Type { face: FaceName::Mono, size: kind.size * 0.84, ..kind }, link);
                }
                Inline::Link { to, text } => {
                    self.links.push(to.trim_start_matches('#').into());
                    let link = Some(self.links.len() - 1);
                    self.push_all(text, kind, link);
                }
                Inline::Break => self.text.push('\n'),
            }
        }
    }

    /// Adds words; white space of any length becomes one space.
    fn push(&mut self, text: &str, kind: Type, link: Option<usize>) {
        let mut from = 0;
        // Symbols are set as in formulas, but not where text is bold or as typed.
        if matches!(kind.face, FaceName::Regular | FaceName::Italic) && link.is_none() {
            for symbol in symbols::within(text) {
                self.push_words(&text[from..symbol.start], kind, link);
                self.text.push_str(&text[symbol.clone()]);
                self.spans.push(Span { end: self.text.len(), kind, link, symbol: true });
                from = symbol.end;
            }
        }
        self.push_words(&text[from..], kind, link);
    }

    fn push_words(&mut self, text: &str, kind: Type, link: Option<usize>) {
        for character in text.chars() {
            let white = character.is_whitespace() && !matches!(character, '\u{a0}' | '\u{202f}' | '\u{2007}');
            if !white {
                self.text.push(character);
            } else if !self.text.is_empty() && !self.text.ends_with([' ', '\n']) {
                self.text.push(' ');
            }
        }
        self.spans.push(Span { end: self.text.len(), kind, link, symbol: false });
    }

    /// The parts of a stretch of text that share a style.
    fn pieces(&self, start: usize, end: usize) -> impl Iterator<Item = (&str, Span)> {
        let first = self.spans.partition_point(|span| span.end <= start);
        let mut at = start;
        // Spans may be empty, where white space met white space.
        self.spans[first..].iter().map_while(move |span| {
            if at >= end {
                return None;
            }
            let from = at;
            at = span.end.min(end).max(at);
            Some((&self.text[from..at], *span))
        })
    }

    fn measure(&self, setter: &Setter<'_>, start: usize, end: usize) -> f32 {
        self.pieces(start, end).map(|(text, span)| width_of(setter, text, span)).sum()
    }

    /// Width on one line, and the width of the longest word.
    pub(super) fn widths(&self, setter: &Setter<'_>) -> (f32, f32) {
        let tokens = self.tokens(setter, f32::INFINITY);
        let (mut widest, mut line, mut longest) = (0.0_f32, 0.0_f32, 0.0_f32);
        for token in &tokens {
            longest = longest.max(token.width);
            line += token.width;
            widest = widest.max(line);
            line = if token.ends_line { 0.0 } else { line + token.space };
        }
        (widest, longest)
    }

    /// Words, cut at hyphens and slashes, and anywhere where a word alone is wider than the line.
    fn tokens(&self, setter: &Setter<'_>, room: f32) -> Vec<Token> {
        let mut tokens = Vec::with_capacity(self.text.len() / 6 + 1);
        let bytes = self.text.as_bytes();
        let mut start = 0;
        while start < bytes.len() {
            let mut end = start;
            let mut before = ' ';
            for character in self.text[start..].chars() {
                if matches!(character, ' ' | '\n') {
                    break;
                }
                let next = end + character.len_utf8();
                if matches!(before, '-' | '/' | '–' | '—') && character.is_alphabetic() && end > start + 2 {
                    break;
                }
                before = character;
                end = next;
            }
            let width = self.measure(setter, start, end);
            let follows = bytes.get(end).copied();
            let white = matches!(follows, Some(b' ' | b'\n'));
            let space = if follows == Some(b' ') { self.measure(setter, end, end + 1) } else { 0.0 };
            let ends_line = follows == Some(b'\n');
            if width > room {
                self.cut(setter, start, end, room, &mut tokens);
                if let Some(last) = tokens.last_mut() {
                    (last.space, last.ends_line) = (space, ends_line);
                }
            } else {
                tokens.push(Token { start, end, width, space, ends_line });
            }
            start = if white { end + 1 } else { end };
        }
        tokens
    }

    fn cut(&self, setter: &Setter<'_>, start: usize, end: usize, room: f32, tokens: &mut Vec<Token>) {
        let mut from = start;
        let mut width = 0.0;
        for (at, character) in self.text[start..end].char_indices() {
            let here = start + at;
            let next = here + character.len_utf8();
            let advance = self.measure(setter, here, next);
            if width + advance > room && here > from {
                let whole = self.measure(setter, from, here);
                tokens.push(Token { start: from, end: here, width: whole, space: 0.0, ends_line: false });
                from = here;
                width = 0.0;
            }
            width += advance;
        }
        let width = self.measure(setter, from, end);
        tokens.push(Token { start: from, end, width, space: 0.0, ends_line: false });
    }

    /// Breaks the paragraph into lines of at most `room`, all lines but the last as even as may be.
    pub(super) fn lines(&self, setter: &Setter<'_>, room: f32) -> Vec<TextLine> {
        let tokens = self.tokens(setter, room);
        let count = tokens.len();
        // best[i]: least cost of setting the tokens from i on, and where the first of those lines ends.
        let mut best: Vec<(f32, usize)> = vec![(0.0, count); count + 1];
        for from in (0..count).rev() {
            let mut width = 0.0;
            let mut choice = (f32::INFINITY, from + 1);
            for (to, token) in tokens.iter().enumerate().skip(from) {
                width += token.width;
                if width > room + 0.01 && to > from {
                    break;
                }
                let slack = ((room - width) / room).max(0.0);
                let free = to + 1 == count || token.ends_line;
                // The constant keeps the number of lines least; the square keeps them even.
                // A last line of a word or so is avoided where the lines above can spare another.
                let short = to + 1 == count && from > 0 && width < 0.16 * room;
                let own = if free { 1.0 + if short { 0.3 } else { 0.0 } } else { 1.0 + 4.0 * slack * slack };
                let cost = best[to + 1].0 + own;
                if cost < choice.0 {
                    choice = (cost, to + 1);
                }
                if token.ends_line {
                    break;
                }
                width += token.space;
            }
            best[from] = choice;
        }
        let mut lines = Vec::new();
        let mut from = 0;
        while from < count {
            let to = best[from].1;
            let (start, end) = (tokens[from].start, tokens[to - 1].end);
            let spaces: f32 = tokens[from..to - 1].iter().map(|token| token.space).sum();
            let width = spaces + tokens[from..to].iter().map(|token| token.width).sum::<f32>();
            lines.push(TextLine { start, end, width });
            from = to;
        }
        lines
    }

    /// Places a line with its left end at `x` on the baseline `y`.
    pub(super) fn set(&self, setter: &mut Setter<'_>, frame: &mut Frame, line: TextLine, x: f32, y: f32) {
        let mut at = x;
        for (text, span) in self.pieces(line.start, line.end) {
            let width = if span.symbol {
                set_symbol(setter, frame, text, span, at, y)
            } else {
                setter.set(frame, text, span.kind, at, y)
            };
            if let Some(to) = span.link.and_then(|link| self.links.get(link)) {
                let height = span.kind.size * 1.1;
                frame.links.push(Link { x: at, y: y - span.kind.size * 0.82, width, height, to: to.clone() });
            }
            at += width;
        }
    }
}

fn width_of(setter: &Setter<'_>, text: &str, span: Span) -> f32 {
    if span.symbol {
        set_symbol(&mut Setter::new(setter.fonts), &mut Frame::default(), text, span, 0.0, 0.0)
    } else {
        setter.width(text, span.kind)
    }
}

fn set_symbol(setter: &mut Setter<'_>, frame: &mut Frame, text: &str, span: Span, x: f32, y: f32) -> f32 {
    let from = frame.items.len();
    frame.speak(text);
    let symbol = Symbol::owned(text.to_string());
    let width = Maths { setter, frame }.symbol(&symbol, None, span.kind.size).width;
    frame.end_speech();
    frame.shift(from, x, y);
    width
}

/// Running text.
pub(super) const fn body_type() -> Type {
    Type::new(FaceName::Regular, geometry::TEXT)
}

#[cfg(test)]
mod tests {
    use super::*;
    use crate::typeset::fixture;

    fn set_lines(text: &str, room: f32) -> (Vec<TextLine>, Vec<String>) {
        let fonts = fixture::fonts();
        let setter = Setter::new(fonts);
        let paragraph = Paragraph::plain(text, body_type());
        let lines = paragraph.lines(&setter, room);
        let words = lines.iter().map(|line| paragraph.text[line.start..line.end].to_string()).collect();
        (lines, words)
    }

    #[test]
    fn no_line_is_wider_than_the_measure() {
        let text = "The movements fit together, obey the law of each member and balance at every node, \
                    so they are the solution; 0123456789abcdef0123456789abcdef0123456789abcdef0123456789abcdef is its \
                    fingerprint, and well-known words break at their hyphens.";
        for room in [40.0, 90.0, 200.0, 380.0] {
            let (lines, words) = set_lines(text, room);
            assert!(lines.iter().all(|line| line.width <= room + 0.01), "{room}");
            let joined: String = words.concat();
            assert_eq!(joined.replace(' ', ""), text.replace(' ', ""));
        }
    }

    #[test]
    fn lines_are_even_rather_than_greedy() {
        let (lines, _) = set_lines("aaaa bbbb cccc dddd eeee ffff gggg", 75.0);
        assert!(lines.len() >= 2);
        assert!(lines[0].width > 40.0);
    }
}
