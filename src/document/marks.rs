//! Mark lines: what in a template is not words. A mark stands alone on a line that begins with `::`.
//!
//! ```text
//! :: step <number>      the step of that number
//! :: table <id>         the table of that id
//! :: figure <id>        the figure of that id
//! :: contents           the table of contents
//! :: new sheet          what follows begins a new sheet of paper
//! :: input              the input file in full
//! :: caution            opens a caution
//! :: end                closes it
//! ```
//! Everything else is Markdown. Text from the input cannot make a mark: escaping puts it on one line and a backslash
//! before each of its colons.
use super::read::{self, Unreadable};
use super::visible::{unescaped, visible};
use super::{Block, Facts};

/// Blocks of a chapter, as its template printed it.
///
/// # Errors
/// A mark that is not known or wants a name, a caution left open or closed twice, Markdown beyond the subset.
pub(super) fn blocks(text: &str, facts: &Facts) -> Result<Vec<Block>, Unreadable> {
    let mut blocks = Vec::new();
    let mut outside = None;
    let mut words = String::new();
    for line in text.lines() {
        let Some(mark) = line.strip_prefix("::") else {
            words.push_str(line);
            words.push('\n');
            continue;
        };
        flush(&mut words, &mut blocks)?;
        let mark = mark.trim();
        let (kind, name) = mark.split_once(' ').map_or((mark, ""), |(kind, name)| (kind, name.trim()));
        match (kind, name) {
            ("step", name) if !name.is_empty() => blocks.push(Block::Step(unescaped(name))),
            ("table", name) if !name.is_empty() => blocks.push(Block::Table(unescaped(name))),
            ("figure", name) if !name.is_empty() => blocks.push(Block::Figure(unescaped(name))),
            ("contents", "") => blocks.push(Block::Contents),
            ("new", "sheet") => blocks.push(Block::NewSheet),
            ("input", "") => blocks.push(Block::Verbatim(visible(&facts.input.text).into_owned())),
            ("caution", "") if outside.is_none() => outside = Some(std::mem::take(&mut blocks)),
            ("end", "") => match outside.take() {
                Some(before) => {
                    let inside = std::mem::replace(&mut blocks, before);
                    // A caution with nothing to say does not stand.
                    if !inside.is_empty() {
                        blocks.push(Block::Caution(inside));
                    }
                }
                None => return Err(Unreadable::new("`:: end` closes no caution", line)),
            },
            ("caution", "") => return Err(Unreadable::new("a caution cannot stand in a caution", line)),
            ("step" | "table" | "figure", _) => {
                return Err(Unreadable::new(format!("`:: {kind}` wants the name of a {kind}"), line));
            }
            _ => {
                return Err(Unreadable::new(
                    format!(
                        "`:: {mark}` is no mark; marks are step, table, figure, contents, new sheet, input, caution, end"
                    ),
                    line,
                ));
            }
        }
    }
    flush(&mut words, &mut blocks)?;
    if outside.is_some() {
        return Err(Unreadable::new("this caution is not closed; `:: end` is missing", ":: caution"));
    }
    Ok(blocks)
}

fn flush(words: &mut String, blocks: &mut Vec<Block>) -> Result<(), Unreadable> {
    if !words.trim().is_empty() {
        blocks.extend(read::template(words)?);
    }
    words.clear();
    Ok(())
}
