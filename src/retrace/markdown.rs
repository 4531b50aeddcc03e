//! The few shapes of Markdown that a package's promises rest on: fences, tables, lines of text.

/// A line with its number, from 1.
#[derive(Debug, Clone, Copy, PartialEq, Eq)]
pub(super) struct Line<'a> {
    pub(super) number: usize,
    pub(super) text: &'a str,
}

/// A shape.
#[derive(Debug, PartialEq, Eq)]
pub(super) enum Shape<'a> {
    /// A fenced block.
    Fence { line: usize, info: &'a str, lines: Vec<Line<'a>>, is_closed: bool },
    /// A table: the line of text before it, its head and its rows.
    Table { before: Option<Line<'a>>, head: Line<'a>, rows: Vec<Line<'a>> },
    /// Any other line with something on it.
    Text(Line<'a>),
}

/// The shapes of a text in order. Lines end in LF or CRLF; a byte-order mark must have been taken off.
pub(super) fn shapes(text: &str) -> Vec<Shape<'_>> {
    let lines: Vec<Line<'_>> = text
        .split('\n')
        .enumerate()
        .map(|(at, text)| Line { number: at + 1, text: text.trim_end_matches('\r') })
        .collect();
    let mut shapes = Vec::new();
    let mut before = None;
    let mut at = 0;
    while let Some(&line) = lines.get(at) {
        at += 1;
        if let Some((mark, length, info)) = opening(line.text) {
            let start = at;
            while lines.get(at).is_some_and(|line| !closes(line.text, mark, length)) {
                at += 1;
            }
            let is_closed = at < lines.len();
            shapes.push(Shape::Fence { line: line.number, info, lines: lines[start..at].to_vec(), is_closed });
            at += 1;
            before = None;
        } else if is_row(line.text) && lines.get(at).is_some_and(|next| is_rule(next.text)) {
            at += 1;
            let start = at;
            while lines.get(at).is_some_and(|line| is_row(line.text)) {
                at += 1;
            }
            shapes.push(Shape::Table { before, head: line, rows: lines[start..at].to_vec() });
            before = None;
        } else if !line.text.trim().is_empty() {
            shapes.push(Shape::Text(line));
            before = Some(line);
        }
    }
    shapes
}

/// Mark, length and info string of a line that opens a fence.
fn opening(line: &str) -> Option<(char, usize, &str)> {
    let text = line.trim_start_matches(' ');
    let mark = text.chars().next().filter(|mark| matches!(mark, '`' | '~'))?;
    let info = text.trim_start_matches(mark);
    let length = text.len() - info.len();
    let is_fence = length >= 3 && line.len() - text.len() <= 3 && !(mark == '`' && info.contains('`'));
    is_fence.then_some((mark, length, info.trim()))
}

fn closes(line: &str, mark: char, length: usize) -> bool {
    let text = line.trim();
    line.len() - line.trim_start_matches(' ').len() <= 3 && text.len() >= length && text.chars().all(|c| c == mark)
}

fn is_row(line: &str) -> bool {
    line.trim_start().starts_with('|')
}

fn is_rule(line: &str) -> bool {
    is_row(line) && line.contains('-') && line.chars().all(|c| "|-: \t".contains(c))
}

/// The cells of a row as words.
pub(super) fn cells(row: &str) -> Vec<String> {
    let row = row.trim();
    let row = row.strip_prefix('|').unwrap_or(row);
    let mut cells = Vec::new();
    let mut start = 0;
    let mut is_escaped = false;
    for (at, c) in row.char_indices() {
        match c {
            '\\' => is_escaped = !is_escaped,
            '|' if !is_escaped => {
                cells.push(words(row[start..at].trim()));
                start = at + 1;
            }
            _ => is_escaped = false,
        }
    }
    let last = row[start..].trim();
    if !last.is_empty() {
        cells.push(words(last));
    }
    cells
}

/// A run of Markdown as its reader sees it: links by their words, without marks of emphasis and code, unescaped.
pub(super) fn words(text: &str) -> String {
    let mut out = String::with_capacity(text.len());
    let mut rest = text;
    while let Some(c) = rest.chars().next() {
        let after = &rest[c.len_utf8()..];
        rest = match c {
            '\\' if after.starts_with(|c: char| c.is_ascii_punctuation()) => {
                out.push_str(&after[..1]);
                &after[1..]
            }
            '*' | '`' | '[' => after,
            ']' => match after.strip_prefix('(').and_then(|target| target.split_once(')')) {
                Some((_, after)) => after,
                None => after,
            },
            '<' if after.starts_with("br>") => {
                out.push(' ');
                &after[3..]
            }
            _ => {
                out.push(c);
                after
            }
        };
    }
    out.trim().to_owned()
}

#[cfg(test)]
mod tests {
    use super::*;

    #[test]
    fn fences_hold_shorter_fences_and_tables_know_what_stands_before() {
        let text =
            "a\r\n\n````step X\r\n```\nb\n````\n**Table T** t\n\n| n | x, mm |\n|---|---:|\n| A | 1 |\nb\n~~~\nc";
        let shapes = shapes(text);
        let text = |number, text| Line { number, text };
        assert_eq!(
            shapes,
            [
                Shape::Text(text(1, "a")),
                Shape::Fence { line: 3, info: "step X", lines: vec![text(4, "```"), text(5, "b")], is_closed: true },
                Shape::Text(text(7, "**Table T** t")),
                Shape::Table {
                    before: Some(text(7, "**Table T** t")),
                    head: text(9, "| n | x, mm |"),
                    rows: vec![text(11, "| A | 1 |")]
                },
                Shape::Text(text(12, "b")),
                Shape::Fence { line: 13, info: "", lines: vec![text(14, "c")], is_closed: false },
            ]
        );
    }

    #[test]
    fn cells_are_read_as_they_are_seen() {
        assert_eq!(cells(r"| a\|b | **c** | [d\_e](#f) | | `g` |"), ["a|b", "c", "d_e", "", "g"]);
        assert_eq!(cells("| a | b"), ["a", "b"]);
    }
}
