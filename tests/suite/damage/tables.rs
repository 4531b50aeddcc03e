//! Changes in tables: what `retrace` does not see, it names as unconfirmed.
use super::change::Change;
use calcsheaf::retrace;
use std::collections::BTreeMap;

/// A cell of a table: its table, the head of its column, its bytes.
struct Cell<'t> {
    table: &'t str,
    column: &'t str,
    at: usize,
    text: &'t str,
}

/// Columns without a promise: words and places beside what is promised.
const WORDS: &[&str] = &[
    "Place",
    "Source of the limit",
    "Why it is here",
    "Checker's value",
    "Difference",
    "Agreed",
    "Initials",
    // A list of where to look, not of numbers: a step that is not there is missed by whoever looks for it.
    "Steps to confirm",
    "source",
    "for",
    "title",
    "remark",
    "lies",
    "held",
    "fibre of tension",
    "fibre of compression",
    "worked",
];
/// Tables without an id that say again what steps and lists say, by the head of their first column.
const SAID_AGAIN: &[&str] = &["Comparisons", "Subject", "Subject, combination", "Step or table", "This package holds"];

fn cells(text: &str) -> Vec<Cell<'_>> {
    let mut found = Vec::new();
    let (mut id, mut head, mut offset) = ("", Vec::new(), 0);
    for line in text.split_inclusive('\n') {
        let start = offset;
        offset += line.len();
        if let Some(rest) = line.strip_prefix("**Table ") {
            id = rest.split("**").next().unwrap_or_default();
        }
        if !line.starts_with('|') {
            if !line.trim().is_empty() && !line.starts_with("**Table ") {
                id = "";
            }
            head.clear();
            continue;
        }
        let mut at = start + 1;
        let parts: Vec<(usize, &str)> = line[1..]
            .trim_end()
            .trim_end_matches('|')
            .split(" |")
            .map(|part| {
                let here = at + (part.len() - part.trim_start().len());
                at += part.len() + 2;
                (here, part.trim())
            })
            .collect();
        if head.is_empty() {
            head = parts.iter().map(|(_, part)| *part).collect();
        } else if !line.starts_with("|-") {
            let table = if id.is_empty() { head[0] } else { id };
            if !id.is_empty() || SAID_AGAIN.contains(&table) {
                for ((at, text), column) in
                    parts.into_iter().zip(&head).skip(1).filter(|((_, text), _)| !text.is_empty())
                {
                    found.push(Cell { table, column, at, text });
                }
            }
        }
    }
    found
}

/// Changes of a cell by more than a rounding: leading digits, the last by half a place of the one before, signs, words.
fn changes(cell: &Cell<'_>) -> Vec<Change> {
    let mut found = Vec::new();
    let mut to = |at: usize, length: usize, to: String| {
        found.push(Change { class: "table", at: cell.at + at, length, to });
    };
    if cell.text.starts_with('[') {
        let label = cell.text.find(']').unwrap_or(1);
        let digit = cell.text[..label].rfind(|c: char| c.is_ascii_digit()).unwrap_or(1);
        to(digit, 1, if &cell.text[digit..=digit] == "7" { "8".into() } else { "7".into() });
        return found;
    }
    let number = cell.text.trim_start_matches('−');
    if !number.starts_with(|c: char| c.is_ascii_digit()) {
        to(0, cell.text.len(), if cell.text == "OK" { "NOT OK".into() } else { "other".into() });
        return found;
    }
    let digits = number.split([' ', '×']).next().unwrap_or_default();
    let start = cell.text.len() - number.len();
    for (at, c) in digits.char_indices().filter(|(_, c)| c.is_ascii_digit()) {
        let digit = u32::from(c) - u32::from('0');
        let other = char::from_digit((digit + if digit == 9 { 9 } else { 5 }) % 10, 10).unwrap_or('1');
        to(start + at, 1, other.to_string());
    }
    if start > 0 {
        to(0, start, String::new());
    } else if digits.contains(|c: char| ('1'..='9').contains(&c)) {
        to(0, 0, "−".into());
    }
    to(0, cell.text.len(), String::new());
    found
}

/// Seen and made, by kind of table; changes neither seen nor in a table that is named as unconfirmed.
pub(super) fn count(text: &str, stride: usize) -> (BTreeMap<String, (usize, usize)>, Vec<String>) {
    let open = retrace::confirm(&retrace::read(text).expect("a package"), None).coverage.open_tables;
    let mut counts: BTreeMap<String, (usize, usize)> = BTreeMap::new();
    let mut unseen = Vec::new();
    let cells = cells(text);
    // Reasons in the overview are words.
    let is_reason = |text: &str| text.starts_with(['–', 'N']) && text != "NOT OK";
    let promised = cells.iter().filter(|cell| !WORDS.contains(&cell.column) && !is_reason(cell.text));
    let all = promised.flat_map(|cell| changes(cell).into_iter().map(move |change| (cell, change)));
    for (cell, change) in all.step_by(stride) {
        let is_seen = retrace::read(&change.made(text)).map_or(true, |package| !retrace::confirm(&package, None).ok());
        let kind = match cell.table.rsplit_once('.') {
            Some((combination, last)) if combination != "INPUT" && !combination.starts_with("INPUT.") => {
                format!("*.{last}")
            }
            _ => cell.table.to_owned(),
        };
        let count = counts.entry(kind).or_default();
        count.0 += usize::from(is_seen);
        count.1 += 1;
        if !is_seen && !open.iter().any(|(id, _)| id == cell.table) {
            unseen.push(format!(
                "{}, {}: `{}` with `{}` at {}",
                cell.table,
                cell.column,
                cell.text,
                change.to,
                change.at - cell.at
            ));
        }
    }
    (counts, unseen)
}
