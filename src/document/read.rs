//! Markdown to blocks. A template's Markdown is taken at its word; prose from the input is taken apart and keeps
//! only paragraphs, lists, emphasis, code and lesser headings, everything else standing as the words it is made of.
use super::token::{self, Token};
use super::visible::visible;
use super::{Block, Inline};
use pulldown_cmark::{Event, HeadingLevel, Options, Parser, Tag, TextMergeStream};

/// Runs nested deeper than this stand as plain words.
const DEEPEST: usize = 8;
/// Level of every heading that prose from the input may have.
const PROSE_HEADING: u8 = 4;

/// What a template may not contain, and where it was met.
#[derive(Debug, Clone, PartialEq, Eq)]
pub(super) struct Unreadable {
    /// What is wrong, and what would be right.
    pub(super) message: String,
    /// The words at fault.
    pub(super) words: String,
}

impl Unreadable {
    pub(super) fn new(message: impl Into<String>, words: impl Into<String>) -> Self {
        Self { message: message.into(), words: words.into() }
    }
}

/// Blocks of a template's Markdown.
///
/// # Errors
/// HTML, quotations, rules, pictures and links that lead out of the package.
pub(super) fn template(text: &str) -> Result<Vec<Block>, Unreadable> {
    let events = TextMergeStream::new(Parser::new_ext(text, Options::ENABLE_TABLES));
    Reader { events, prose: false, depth: 0 }.blocks()
}

/// Blocks of prose from the input.
pub(super) fn prose(text: &str) -> Vec<Block> {
    let events = TextMergeStream::new(Parser::new_ext(text, Options::empty()));
    // Nothing is refused in prose, so there is no fault to report.
    Reader { events, prose: true, depth: 0 }.blocks().unwrap_or_default()
}

struct Reader<'a, I: Iterator<Item = Event<'a>>> {
    events: I,
    prose: bool,
    depth: usize,
}

impl<'a, I: Iterator<Item = Event<'a>>> Reader<'a, I> {
    /// Blocks up to the end of what encloses them.
    fn blocks(&mut self) -> Result<Vec<Block>, Unreadable> {
        let mut blocks = Vec::new();
        let mut loose = Vec::new();
        while let Some(event) = self.events.next() {
            match event {
                Event::End(_) => break,
                Event::Start(tag) if !is_inline(&tag) => {
                    self.close(&mut loose, &mut blocks);
                    self.block(tag, &mut blocks)?;
                }
                Event::Rule => {
                    self.close(&mut loose, &mut blocks);
                    if !self.prose {
                        return Err(Unreadable::new("a rule across the page is not known; use `:: new sheet`", "---"));
                    }
                }
                event => self.inline(event, &mut loose)?,
            }
        }
        self.close(&mut loose, &mut blocks);
        Ok(blocks)
    }

    /// Ends a paragraph that has no mark of its own, as in a list without blank lines.
    fn close(&self, loose: &mut Vec<Inline>, blocks: &mut Vec<Block>) {
        let inlines = std::mem::take(loose);
        if !inlines.is_empty() {
            blocks.extend(self.paragraph(inlines));
        }
    }

    fn paragraph(&self, inlines: Vec<Inline>) -> Vec<Block> {
        if !self.prose
            && let [Inline::Text(text)] = inlines.as_slice()
            && let Some(prose_text) = token::sole_prose(text)
        {
            return prose(&prose_text);
        }
        vec![Block::Paragraph(self.settle(inlines))]
    }

    fn block(&mut self, tag: Tag<'a>, blocks: &mut Vec<Block>) -> Result<(), Unreadable> {
        if self.depth >= DEEPEST {
            let words = self.words();
            if !words.is_empty() {
                blocks.push(Block::Paragraph(vec![Inline::Text(words)]));
            }
            return Ok(());
        }
        self.depth += 1;
        match tag {
            Tag::Paragraph => {
                let inlines = self.inlines()?;
                blocks.extend(self.paragraph(inlines));
            }
            Tag::Heading { level, .. } => {
                let inlines = self.inlines()?;
                let level = if self.prose { PROSE_HEADING } else { depth_of(level) };
                blocks.push(Block::Heading { level, text: self.settle(inlines), anchor: String::new() });
            }
            Tag::List(first) => self.list(first, blocks)?,
            Tag::CodeBlock(_) => {
                let text = self.words();
                blocks.push(if self.prose { code_lines(&text) } else { Block::Verbatim(text) });
            }
            Tag::Table(_) => blocks.push(self.grid()?),
            Tag::BlockQuote(_) if !self.prose => {
                return Err(Unreadable::new("a quotation is not known; use `:: caution` and `:: end`", ">"));
            }
            Tag::HtmlBlock if !self.prose => {
                let words = self.words();
                return Err(Unreadable::new("HTML is not known in templates", words.trim()));
            }
            Tag::HtmlBlock => {
                let words = self.words();
                blocks.push(Block::Paragraph(vec![Inline::Text(words.trim().to_string())]));
            }
            // Quotations in prose, and whatever the parser may learn later: what they hold, without their frame.
            _ => blocks.extend(self.blocks()?),
        }
        self.depth -= 1;
        Ok(())
    }

    fn list(&mut self, first: Option<u64>, blocks: &mut Vec<Block>) -> Result<(), Unreadable> {
        let mut items = Vec::new();
        while let Some(Event::Start(Tag::Item)) = self.events.next() {
            items.push(self.blocks()?);
        }
        match first {
            // A line such as `2026. Survey of the site` is no list to its writer.
            Some(first) if first != 1 => {
                for (number, item) in (first..).zip(items) {
                    let mut item = item.into_iter();
                    let mut lead = vec![Inline::Text(format!("{number}. "))];
                    match item.next() {
                        Some(Block::Paragraph(inlines)) => lead.extend(inlines),
                        Some(other) => {
                            blocks.push(Block::Paragraph(std::mem::take(&mut lead)));
                            blocks.push(other);
                        }
                        None => {}
                    }
                    if !lead.is_empty() {
                        blocks.push(Block::Paragraph(lead));
                    }
                    blocks.extend(item);
                }
            }
            first => blocks.push(Block::List { ordered: first.is_some(), items }),
        }
        Ok(())
    }

    fn grid(&mut self) -> Result<Block, Unreadable> {
        let mut head = Vec::new();
        let mut rows: Vec<Vec<Vec<Inline>>> = Vec::new();
        let mut in_head = true;
        let mut open = 1;
        while open > 0 {
            match self.events.next() {
                Some(Event::Start(Tag::TableCell)) => {
                    let inlines = self.inlines()?;
                    let cell = self.settle(inlines);
                    match rows.last_mut() {
                        Some(row) if !in_head => row.push(cell),
                        _ => head.push(cell),
                    }
                }
                Some(Event::Start(Tag::TableRow)) => {
                    in_head = false;
                    open += 1;
                    rows.push(Vec::new());
                }
                Some(Event::Start(_)) => open += 1,
                Some(Event::End(_)) => open -= 1,
                Some(_) => {}
                None => break,
            }
        }
        Ok(Block::Grid { head, rows })
    }

    /// Runs of text up to the end of what encloses them.
    fn inlines(&mut self) -> Result<Vec<Inline>, Unreadable> {
        let mut inlines = Vec::new();
        while let Some(event) = self.events.next() {
            if let Event::End(_) = event {
                break;
            }
            self.inline(event, &mut inlines)?;
        }
        Ok(inlines)
    }

    fn inline(&mut self, event: Event<'a>, inlines: &mut Vec<Inline>) -> Result<(), Unreadable> {
        match event {
            Event::Start(_) if self.depth >= DEEPEST => push_text(inlines, &self.words()),
            Event::Start(tag) => {
                self.depth += 1;
                self.inline_tag(tag, inlines)?;
                self.depth -= 1;
            }
            Event::Code(text) => inlines.push(Inline::Code(self.seen(&text))),
            Event::SoftBreak => push_text(inlines, " "),
            Event::HardBreak => inlines.push(Inline::Break),
            Event::Html(text) | Event::InlineHtml(text) if !self.prose => {
                return Err(Unreadable::new("HTML is not known in templates", text.trim()));
            }
            Event::Text(text)
            | Event::Html(text)
            | Event::InlineHtml(text)
            | Event::InlineMath(text)
            | Event::DisplayMath(text)
            | Event::FootnoteReference(text) => {
                let text = self.seen(&text);
                push_text(inlines, &text);
            }
            Event::Rule | Event::TaskListMarker(_) | Event::End(_) => {}
        }
        Ok(())
    }

    fn inline_tag(&mut self, tag: Tag<'a>, inlines: &mut Vec<Inline>) -> Result<(), Unreadable> {
        match tag {
            Tag::Strong => inlines.push(Inline::Strong(self.inlines()?)),
            Tag::Emphasis => inlines.push(Inline::Emphasis(self.inlines()?)),
            Tag::Link { dest_url, .. } | Tag::Image { dest_url, .. } if self.prose => {
                let text = self.inlines()?;
                let same = words_of(&text) == *dest_url;
                inlines.extend(text);
                if !same && !dest_url.is_empty() {
                    push_text(inlines, &visible(&format!(" ({dest_url})")));
                }
            }
            Tag::Link { dest_url, .. } => match dest_url.strip_prefix('#') {
                Some(anchor) => inlines.push(Inline::Link { to: anchor.to_string(), text: self.inlines()? }),
                None => {
                    return Err(Unreadable::new(
                        "this link leads out of the package; a link leads to `#` and a heading's anchor",
                        dest_url.to_string(),
                    ));
                }
            },
            Tag::Image { dest_url, .. } => {
                return Err(Unreadable::new(
                    "a picture is not known in templates; use `:: figure`",
                    dest_url.to_string(),
                ));
            }
            _ => inlines.extend(self.inlines()?),
        }
        Ok(())
    }

    /// The bare words up to the end of what encloses them, however deep.
    fn words(&mut self) -> String {
        let mut words = String::new();
        let mut open = 1;
        while open > 0 {
            match self.events.next() {
                Some(Event::Start(_)) => open += 1,
                Some(Event::End(_)) => open -= 1,
                Some(Event::Text(text) | Event::Code(text) | Event::Html(text) | Event::InlineHtml(text)) => {
                    words.push_str(&self.seen(&text));
                }
                Some(Event::SoftBreak | Event::HardBreak) => words.push(' '),
                Some(_) => {}
                None => break,
            }
        }
        words
    }

    /// Characters may also have come as entities, so what is unseen is shown after parsing.
    fn seen(&self, text: &str) -> String {
        if self.prose { visible(text).into_owned() } else { text.to_string() }
    }

    /// Puts in the place of tokens what they stand for.
    fn settle(&self, inlines: Vec<Inline>) -> Vec<Inline> {
        if self.prose { inlines } else { inlines.into_iter().flat_map(settled).collect() }
    }
}

fn settled(inline: Inline) -> Vec<Inline> {
    let all = |inlines: Vec<Inline>| inlines.into_iter().flat_map(settled).collect();
    match inline {
        Inline::Text(text) => token::split(&text)
            .into_iter()
            .flat_map(|part| match part {
                Token::Words(words) => vec![Inline::Text(words)],
                Token::Link(to) => vec![Inline::Link { text: vec![Inline::Text(to.clone())], to }],
                Token::Short(to) => {
                    let last = to.rsplit('.').next().unwrap_or_default().to_owned();
                    vec![Inline::Link { text: vec![Inline::Text(last)], to }]
                }
                Token::Prose(text) => flattened(prose(&text)),
            })
            .collect(),
        Inline::Strong(inlines) => vec![Inline::Strong(all(inlines))],
        Inline::Emphasis(inlines) => vec![Inline::Emphasis(all(inlines))],
        Inline::Link { to, text } => vec![Inline::Link { to, text: all(text) }],
        other => vec![other],
    }
}

/// Prose on the lines of a table's cell: each paragraph and item on a line of its own.
fn flattened(blocks: Vec<Block>) -> Vec<Inline> {
    let mut inlines = Vec::new();
    for block in blocks {
        let part = match block {
            Block::Paragraph(text) | Block::Heading { text, .. } => text,
            Block::List { items, .. } => flattened(items.into_iter().flatten().collect()),
            _ => Vec::new(),
        };
        if !inlines.is_empty() && !part.is_empty() {
            inlines.push(Inline::Break);
        }
        inlines.extend(part);
    }
    inlines
}

/// The words of runs of text, without their dress.
pub(super) fn words_of(inlines: &[Inline]) -> String {
    let mut words = String::new();
    for inline in inlines {
        match inline {
            Inline::Text(text) | Inline::Code(text) => words.push_str(text),
            Inline::Strong(inner) | Inline::Emphasis(inner) | Inline::Link { text: inner, .. } => {
                words.push_str(&words_of(inner));
            }
            Inline::Break => words.push(' '),
        }
    }
    words
}

fn code_lines(text: &str) -> Block {
    let mut inlines = Vec::new();
    for line in text.lines().filter(|line| !line.trim().is_empty()) {
        if !inlines.is_empty() {
            inlines.push(Inline::Break);
        }
        inlines.push(Inline::Code(line.to_string()));
    }
    Block::Paragraph(inlines)
}

fn push_text(inlines: &mut Vec<Inline>, text: &str) {
    if let Some(Inline::Text(before)) = inlines.last_mut() {
        before.push_str(text);
    } else if !text.is_empty() {
        inlines.push(Inline::Text(text.to_string()));
    }
}

const fn is_inline(tag: &Tag<'_>) -> bool {
    matches!(
        tag,
        Tag::Emphasis
            | Tag::Strong
            | Tag::Strikethrough
            | Tag::Superscript
            | Tag::Subscript
            | Tag::Link { .. }
            | Tag::Image { .. }
    )
}

const fn depth_of(level: HeadingLevel) -> u8 {
    match level {
        HeadingLevel::H1 => 1,
        HeadingLevel::H2 => 2,
        HeadingLevel::H3 => 3,
        _ => 4,
    }
}
