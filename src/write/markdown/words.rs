//! Runs of text in Markdown, escaped no more than it takes to be read back as they are.
use super::longest_run;
use crate::document::Inline;

/// Where a run of text stands.
#[derive(Debug, Clone, Copy, PartialEq, Eq)]
pub(super) enum Place {
    /// In a paragraph: each sentence begins a line.
    Running,
    /// In a heading or the words of a link: one line.
    Line,
    /// In the cell of a table: one line, and a bar ends it.
    Cell,
}

/// Writes runs of text. `home` gives the anchor of the heading to which a link leads.
pub(super) fn write<'h>(inlines: &[Inline], place: Place, home: &dyn Fn(&str) -> Option<&'h str>) -> String {
    let mut out = String::new();
    run(inlines, place, Dress::default(), home, None, &mut out);
    // A break at the end breaks nothing.
    while let Some(kept) = out.trim_end_matches(' ').strip_suffix("\\\n") {
        out.truncate(kept.len());
    }
    let lines: Vec<String> = out.split('\n').map(|line| guarded(line.trim())).collect();
    lines.join("\n")
}

/// A text of which every character means itself, on one line.
pub(super) fn escaped(text: &str) -> String {
    write(&[Inline::Text(text.to_string())], Place::Line, &|_| None)
}

/// Words of a heading: hashes at its end would be taken for its close.
pub(super) fn heading(words: &str) -> String {
    let kept = words.trim_end_matches('#');
    let hashes = words.len() - kept.len();
    if hashes == 0 {
        return words.to_string();
    }
    // One that is escaped already stays so.
    let kept = kept.strip_suffix('\\').filter(|bare| !bare.ends_with('\\')).unwrap_or(kept);
    format!("{kept}{}", "\\#".repeat(hashes))
}

/// A path or an anchor as it may stand in a link.
pub(super) fn address(text: &str) -> String {
    let mut address = String::with_capacity(text.len());
    for c in text.chars() {
        if c.is_ascii_alphanumeric() || "-_./".contains(c) || !(c.is_ascii() || c.is_whitespace()) {
            address.push(c);
        } else {
            let mut bytes = [0; 4];
            c.encode_utf8(&mut bytes).bytes().for_each(|byte| address.push_str(&format!("%{byte:02X}")));
        }
    }
    address
}

/// What encloses a run.
#[derive(Debug, Clone, Copy, Default)]
struct Dress {
    strong: bool,
    emphasis: bool,
    link: bool,
}

fn run<'h>(
    inlines: &[Inline],
    place: Place,
    dress: Dress,
    home: &dyn Fn(&str) -> Option<&'h str>,
    after: Option<char>,
    out: &mut String,
) {
    for (at, inline) in inlines.iter().enumerate() {
        let next = inlines[at + 1..].iter().find_map(first_char).or(after);
        match inline {
            Inline::Text(text) => push_text(text, place, dress, next, out),
            Inline::Strong(inner) if !dress.strong => {
                let dress = Dress { strong: true, ..dress };
                marked("**", inner, place, dress, home, next, out);
            }
            Inline::Emphasis(inner) if !dress.emphasis => {
                let dress = Dress { emphasis: true, ..dress };
                marked("*", inner, place, dress, home, next, out);
            }
            Inline::Strong(inner) | Inline::Emphasis(inner) => run(inner, place, dress, home, next, out),
            Inline::Code(text) => push_code(text, place, out),
            Inline::Link { to, text } => match home(to).filter(|anchor| !anchor.is_empty() && !dress.link) {
                Some(anchor) => {
                    let dress = Dress { link: true, ..dress };
                    out.push('[');
                    let place = if place == Place::Cell { place } else { Place::Line };
                    run(text, place, dress, home, Some(']'), out);
                    out.push_str(&format!("](#{})", address(anchor)));
                }
                None => run(text, place, dress, home, next, out),
            },
            // Within other runs a break would part the marks from their words.
            Inline::Break if dress.strong || dress.emphasis || dress.link => out.push(' '),
            Inline::Break if place == Place::Running => {
                let kept = out.trim_end_matches(' ').len();
                out.truncate(kept);
                // A break at the very beginning, or after another, breaks nothing.
                if !out.is_empty() && !out.ends_with('\n') {
                    out.push_str("\\\n");
                }
            }
            Inline::Break => out.push_str(if place == Place::Cell { "<br>" } else { " " }),
        }
    }
}

/// Emphasis, where Markdown can see its bounds; otherwise the words alone.
fn marked<'h>(
    mark: &str,
    inner: &[Inline],
    place: Place,
    dress: Dress,
    home: &dyn Fn(&str) -> Option<&'h str>,
    next: Option<char>,
    out: &mut String,
) {
    let mut words = String::new();
    run(inner, place, dress, home, Some('*'), &mut words);
    let bare = words.trim();
    let lead = &words[..words.len() - words.trim_start().len()];
    let tail = &words[words.trim_end().len()..];
    let before = if lead.is_empty() { out.chars().last() } else { Some(' ') };
    let next = if tail.is_empty() { next } else { Some(' ') };
    let first = bare.chars().next();
    let last = bare.chars().last();
    let free = |c: Option<char>| c.is_none_or(|c| c.is_whitespace() || (!c.is_alphanumeric() && c != '*'));
    let opens = before != Some('*') && (free(before) || first.is_some_and(char::is_alphanumeric));
    let closes = next != Some('*') && (free(next) || last.is_some_and(char::is_alphanumeric));
    // Inside other emphasis the marks run together; only whole words are marked there.
    let nested = dress.strong && dress.emphasis;
    let apart = !nested || (before == Some(' ') && next == Some(' '));
    out.push_str(lead);
    // Backticks of two runs of code must not touch.
    if out.ends_with('`') && bare.starts_with('`') {
        out.push(' ');
    }
    if opens && closes && apart && !bare.is_empty() {
        out.push_str(&format!("{mark}{bare}{mark}"));
    } else {
        out.push_str(bare);
    }
    out.push_str(tail);
}

fn first_char(inline: &Inline) -> Option<char> {
    match inline {
        Inline::Text(text) => text.chars().next(),
        Inline::Code(text) => (!text.trim().is_empty()).then_some('`'),
        Inline::Strong(_) | Inline::Emphasis(_) => Some('*'),
        Inline::Link { .. } => Some('['),
        Inline::Break => Some(' '),
    }
}

fn push_text(text: &str, place: Place, dress: Dress, next: Option<char>, out: &mut String) {
    let plain = !(dress.strong || dress.emphasis || dress.link);
    let chars: Vec<char> = text.chars().map(|c| if c.is_whitespace() && c != '\u{A0}' { ' ' } else { c }).collect();
    for (at, &c) in chars.iter().enumerate() {
        let before = at.checked_sub(1).map_or_else(|| out.chars().last(), |at| Some(chars[at]));
        let after = chars.get(at + 1).copied().or(next);
        if c == ' ' {
            if out.ends_with([' ', '\n']) {
                continue;
            }
            let begins = plain && place == Place::Running && ends_sentence(&before_here(&chars[..at], out));
            out.push(if begins && after.is_some_and(char::is_uppercase) { '\n' } else { ' ' });
            continue;
        }
        if needs_escape(c, before, after, &chars[at..]) {
            out.push('\\');
        }
        out.push(c);
    }
}

/// The last few characters before a place, without the marks of emphasis and code.
fn before_here(chars: &[char], out: &str) -> Vec<char> {
    if chars.len() >= 3 {
        return chars[chars.len() - 3..].to_vec();
    }
    let mut last: Vec<char> = out.chars().rev().filter(|c| !"*`".contains(*c)).take(3).collect();
    last.reverse();
    last
}

/// Whether a sentence ends here: not after a single letter, as in `A. Person`.
fn ends_sentence(before: &[char]) -> bool {
    match before {
        [.., _, ')', '.'] => true,
        [.., two, one, '.'] => one.is_alphanumeric() && (two.is_alphanumeric() || !one.is_uppercase()),
        [.., '?' | '!'] => true,
        _ => false,
    }
}

fn needs_escape(c: char, before: Option<char>, after: Option<char>, from_here: &[char]) -> bool {
    match c {
        '\\' | '`' | '*' | '[' | ']' | '<' | '|' | '~' | '$' => true,
        // Within a word it is a letter like others.
        '_' => !(before.is_some_and(char::is_alphanumeric) && after.is_some_and(char::is_alphanumeric)),
        '&' => after.is_some_and(|next| next.is_ascii_alphanumeric() || next == '#'),
        // Addresses of the web would become links by themselves.
        ':' => matches!(from_here, [_, '/', '/', ..]),
        '.' => before == Some('w') && after.is_some_and(|next| !next.is_whitespace()),
        _ => false,
    }
}

fn push_code(text: &str, place: Place, out: &mut String) {
    let text: String = text.chars().map(|c| if c.is_whitespace() && c != '\u{A0}' { ' ' } else { c }).collect();
    if text.trim().is_empty() {
        return;
    }
    // A bar ends the cell of a table even in code.
    let text = if place == Place::Cell { text.replace('|', "\\|") } else { text };
    let fence = "`".repeat(longest_run(&text) + 1);
    let padded = text.starts_with('`') || text.ends_with('`') || (text.starts_with(' ') && text.ends_with(' '));
    let pad = if padded { " " } else { "" };
    // Backticks of two runs of code must not touch.
    if out.ends_with('`') {
        out.push(' ');
    }
    out.push_str(&format!("{fence}{pad}{text}{pad}{fence}"));
}

/// A line whose beginning cannot be taken for the mark of a block.
fn guarded(line: &str) -> String {
    let digits = line.bytes().take_while(u8::is_ascii_digit).count();
    let mut after = line[digits..].chars();
    let marked = matches!(after.next(), Some('.' | ')')) && after.next().is_none_or(char::is_whitespace);
    if (1..=9).contains(&digits) && marked {
        return format!("{}\\{}", &line[..digits], &line[digits..]);
    }
    if line.starts_with(['#', '+', '-', '=', '>']) { format!("\\{line}") } else { line.to_string() }
}
