//! The document as GitHub-flavoured Markdown: one sentence or one row of a table to a line, nothing padded, so that
//! a small change of the input is a small change of the text.
mod formula_lines;
mod step;
mod table;
mod words;

use crate::document::{Block, Document, Inline};
use crate::sheet::Sheet;
use std::collections::BTreeMap;

/// Writes a document. `stem` is the package's file name without ending; figures are linked as
/// `<stem>.figures/<id>.svg`.
///
/// A step, table or figure that the document names and the sheet does not hold is said to be missing where it
/// would stand.
#[must_use]
pub fn write(document: &Document, sheet: &Sheet, stem: &str) -> String {
    let writer = Writer { sheet, stem, homes: homes(&document.blocks), blocks: &document.blocks };
    writer.blocks(&document.blocks)
}

struct Writer<'a> {
    sheet: &'a Sheet,
    stem: &'a str,
    /// The heading under which each step, table or figure stands, by what links call them.
    homes: BTreeMap<&'a str, &'a str>,
    blocks: &'a [Block],
}

/// Where a link leads: Markdown knows headings alone, so a step is found under its heading.
fn homes(blocks: &[Block]) -> BTreeMap<&str, &str> {
    let mut homes = BTreeMap::new();
    let mut here = "";
    for block in blocks {
        match block {
            Block::Heading { anchor, level, .. } => {
                // Below level 3 the same words recur, and their anchors count: a link must not shift with them.
                if *level <= 3 {
                    here = anchor;
                }
                homes.entry(anchor.as_str()).or_insert(anchor.as_str());
            }
            Block::Step(name) | Block::Table(name) | Block::Figure(name) => {
                homes.entry(name.as_str()).or_insert(here);
            }
            _ => {}
        }
    }
    homes
}

impl Writer<'_> {
    fn blocks(&self, blocks: &[Block]) -> String {
        let mut text = String::new();
        let mut list_before = false;
        for block in blocks {
            let part = self.block(block);
            if part.is_empty() {
                continue;
            }
            if !text.is_empty() {
                text.push('\n');
            }
            let list = matches!(block, Block::List { .. });
            // Two lists in a row would read as one.
            if list && list_before {
                text.push_str("<!-- -->\n\n");
            }
            list_before = list;
            text.push_str(&part);
        }
        text
    }

    /// A block with the line end of its last line; empty where Markdown has nothing for it.
    fn block(&self, block: &Block) -> String {
        match block {
            Block::Heading { level, text, .. } => {
                let words = self.words(text, words::Place::Line);
                format!("{} {}\n", "#".repeat((*level).clamp(1, 6).into()), words::heading(&words))
            }
            Block::Paragraph(text) => paragraph(&self.words(text, words::Place::Running)),
            Block::List { ordered, items } => self.list(*ordered, items),
            Block::Caution(inner) => quoted(&format!("**Caution**\n\n{}", self.blocks(inner))),
            Block::Verbatim(text) => verbatim(text),
            Block::Step(number) => self
                .sheet
                .step(number)
                .map_or_else(|| missing("step", number), |found| step::write(found, &self.sheet.ledger)),
            Block::Table(id) => self
                .sheet
                .table(id)
                .map_or_else(|| missing("table", id), |found| table::write(found, &self.sheet.ledger)),
            Block::Figure(id) => self.sheet.figure(id).map_or_else(
                || missing("figure", id),
                |figure| {
                    let path = words::address(&format!("{}.figures/{}.svg", self.stem, figure.id));
                    let alternative = words::escaped(&figure.alternative);
                    let title = words::escaped(&figure.title);
                    format!("![{alternative}]({path})\n\n**Figure {}** {title}\n", words::escaped(&figure.id))
                },
            ),
            Block::Grid { head, rows } => {
                let row = |cells: &[Vec<Inline>]| {
                    cells.iter().map(|cell| self.words(cell, words::Place::Cell)).collect::<Vec<_>>()
                };
                let mut text = table::row(&row(head));
                text.push_str(&table::rule(head.iter().map(|_| false)));
                rows.iter().for_each(|cells| text.push_str(&table::row(&row(cells))));
                text
            }
            Block::Contents => self.contents(),
            Block::NewSheet => String::new(),
        }
    }

    fn words(&self, inlines: &[Inline], place: words::Place) -> String {
        words::write(inlines, place, &|to| self.homes.get(to).copied())
    }

    fn list(&self, ordered: bool, items: &[Vec<Block>]) -> String {
        let mut text = String::new();
        for (at, item) in items.iter().enumerate() {
            let mark = if ordered { format!("{}. ", at + 1) } else { "- ".to_string() };
            let inner = self.blocks(item);
            let mut lines = inner.lines();
            text.push_str(format!("{mark}{}", lines.next().unwrap_or_default()).trim_end());
            text.push('\n');
            for line in lines {
                if !line.is_empty() {
                    text.push_str(&" ".repeat(mark.len()));
                    text.push_str(line);
                }
                text.push('\n');
            }
        }
        text
    }

    fn contents(&self) -> String {
        let mut text = String::new();
        for block in self.blocks {
            if let Block::Heading { level: level @ (2 | 3), text: words, anchor } = block {
                let words = words::write(words, words::Place::Line, &|_| None);
                let indent = if *level == 2 { "" } else { "  " };
                text.push_str(&format!("{indent}- [{words}](#{})\n", words::address(anchor)));
            }
        }
        text
    }
}

fn paragraph(words: &str) -> String {
    if words.is_empty() { String::new() } else { format!("{words}\n") }
}

fn quoted(text: &str) -> String {
    text.lines().map(|line| if line.is_empty() { ">\n".to_string() } else { format!("> {line}\n") }).collect()
}

fn missing(kind: &str, name: &str) -> String {
    format!("**The {kind} {} is missing from this package.**\n", words::escaped(name))
}

/// A fence longer than any run of backticks inside.
fn verbatim(text: &str) -> String {
    let fence = "`".repeat((longest_run(text) + 1).max(3));
    let end = if text.is_empty() || text.ends_with('\n') { "" } else { "\n" };
    format!("{fence}text\n{text}{end}{fence}\n")
}

/// The longest run of backticks in a text.
fn longest_run(text: &str) -> usize {
    text.split(|c| c != '`').map(str::len).max().unwrap_or(0)
}

#[cfg(test)]
mod tests;
