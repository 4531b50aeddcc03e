//! Faults as text: message, place, source line with a caret, help.
use super::{Diagnostic, Diagnostics, Severity, Source};
use annotate_snippets::{Annotation, AnnotationKind, Level, Origin, Renderer, Snippet};
use std::ops::Range;

/// Whether the text carries colour for a terminal.
#[derive(Debug, Clone, Copy, PartialEq, Eq)]
pub enum Colour {
    /// Plain text.
    Never,
    /// ANSI escapes.
    Always,
}

/// Most characters of a source line that are shown.
const WIDEST: usize = 100;

impl Diagnostics {
    /// All of them as text, in the order of the file, an empty line between two.
    #[must_use]
    pub fn render(&self, source: &Source, file: &str, colour: Colour) -> String {
        let renderer = match colour {
            Colour::Never => Renderer::plain(),
            Colour::Always => Renderer::styled(),
        }
        .term_width(usize::from(u16::MAX));
        let file = visible(file);
        let reports: Vec<String> = self
            .clone()
            .placed(source)
            .iter()
            .map(|diagnostic| render_one(diagnostic, source, &file, &renderer))
            .collect();
        reports.join("\n")
    }
}

fn render_one(diagnostic: &Diagnostic, source: &Source, file: &str, renderer: &Renderer) -> String {
    let level = match diagnostic.severity {
        Severity::Error => Level::ERROR,
        Severity::Warning => Level::WARNING,
    };
    let title = level.primary_title(visible(&diagnostic.message)).id(diagnostic.code.id());
    let span = diagnostic.span.clone();
    let mut group = match &span {
        Some(span) => {
            let (line, column) = source.line_column(span.start);
            let shown = shown_line(source, span);
            let label = visible(&diagnostic.label);
            let mark: Annotation<'_> = AnnotationKind::Primary.span(shown.span).label(label);
            title
                .element(Origin::path(file.to_owned()).line(line).char_column(column))
                .element(Snippet::source(shown.text).line_start(line).annotation(mark))
        }
        None => title.element(Origin::path(file.to_owned())),
    };
    for note in &diagnostic.notes {
        group = group.element(Level::NOTE.message(visible(note)));
    }
    let mut report = renderer.render(&[group]);
    report = report.lines().filter(|line| !is_bare_gutter(line)).collect::<Vec<_>>().join("\n");
    report.push('\n');
    for help in &diagnostic.help {
        let line = renderer.render(&[annotate_snippets::Group::with_title(Level::HELP.secondary_title(visible(help)))]);
        report.push_str(line.trim_end());
        report.push('\n');
    }
    report
}

/// Whether a line holds nothing but the bar between line numbers and source, or the sign that lines are left out.
fn is_bare_gutter(line: &str) -> bool {
    let mut rest = line;
    let mut bare = String::new();
    while let Some(start) = rest.find('\u{1b}') {
        bare.push_str(&rest[..start]);
        rest = rest[start..].find('m').map_or("", |end| &rest[start + end + 1..]);
    }
    bare.push_str(rest);
    matches!(bare.trim(), "|" | ":::")
}

/// A source line ready to be shown, and the part of it at fault.
struct Shown {
    text: String,
    span: Range<usize>,
}

/// Takes the first line of the fault, shows what does not print, and cuts it around the caret where it is long.
fn shown_line(source: &Source, fault: &Range<usize>) -> Shown {
    let line = source.line_span(fault.start);
    let start = fault.start.clamp(line.start, line.end);
    let end = fault.end.clamp(start, line.end);
    let text = source.text();
    let before: Vec<char> = text[line.start..start].chars().collect();
    // Blanks at the end of a value are no part of it; a tab may be the fault itself.
    let marked: Vec<char> = text[start..end].trim_end_matches([' ', '\r', '\n']).chars().collect();
    let after: Vec<char> = text[line.start..line.end][end - line.start..].chars().collect();
    let mark_room = marked.len().min(WIDEST / 2);
    let after_room = after.len().min(WIDEST / 4);
    let before_room = WIDEST - mark_room - after_room;
    let after_room = WIDEST - mark_room - before.len().min(before_room);
    let mut shown = String::new();
    if before.len() > before_room {
        shown.push_str("...");
    }
    push_visible(&mut shown, &before[before.len().saturating_sub(before_room)..]);
    let from = shown.len();
    push_visible(&mut shown, &marked[..mark_room]);
    let to = shown.len();
    if marked.len() > mark_room {
        shown.push_str("...");
    } else {
        // Blanks trimmed off the marked part stand before what follows it.
        let trimmed = text[start..end].chars().count() - marked.len();
        shown.push_str(&" ".repeat(trimmed.min(WIDEST)));
        push_visible(&mut shown, &after[..after.len().min(after_room)]);
        if after.len() > after_room {
            shown.push_str("...");
        }
    }
    Shown { text: shown, span: from..to }
}

/// A text with everything that does not print, or that turns the direction of print, written as an escape.
fn visible(text: &str) -> String {
    let mut shown = String::with_capacity(text.len());
    push_visible(&mut shown, &text.chars().collect::<Vec<_>>());
    shown
}

fn push_visible(shown: &mut String, text: &[char]) {
    for c in text {
        let turns = matches!(*c, '\u{61c}' | '\u{200b}'..='\u{200f}' | '\u{2028}'..='\u{202e}' | '\u{2060}'..='\u{206f}' | '\u{feff}');
        if c.is_control() || turns {
            shown.extend(c.escape_default());
        } else {
            shown.push(*c);
        }
    }
}

#[cfg(test)]
mod tests {
    use super::super::{Address, Code};
    use super::*;

    #[track_caller]
    fn check(text: &str, diagnostic: Diagnostic, expected: &str) {
        let source = Source::new(text);
        let list: Diagnostics = [diagnostic].into_iter().collect();
        assert_eq!(list.render(&source, "portal.yaml", Colour::Never), expected);
        let coloured = list.render(&source, "portal.yaml", Colour::Always);
        assert!(coloured.contains('\u{1b}'));
        assert_eq!(coloured.lines().count(), expected.lines().count());
    }

    #[test]
    fn message_place_caret_and_help() {
        let fault = Diagnostic::error(Code::UnknownReference, Address::parse("members.M3.to"))
            .message("member `M3` ends at a node that does not exist")
            .label("no node is called `N9`")
            .help("the nearest name is `N4`");
        check(
            "members:\n  M3:\n    to: N9\n",
            fault,
            "error[E021]: member `M3` ends at a node that does not exist\n --> portal.yaml:3:9\n3 |     to: N9\n  |         ^^ no node is called `N9`\nhelp: the nearest name is `N4`\n",
        );
    }

    #[test]
    fn what_does_not_print_is_shown_and_long_lines_are_cut() {
        let text = format!("{}: \u{202e}bad{}", "k".repeat(300), "z".repeat(300));
        let at = text.find('\u{202e}').expect("it is there");
        let fault = Diagnostic::error(Code::BadName, Address::root()).at(at..at + 6).message("m\u{1b}[0m").label("l");
        let kept = "k".repeat(69);
        let after = "z".repeat(25);
        let blank = " ".repeat(74);
        check(
            &text,
            fault,
            &format!(
                "error[E020]: m\\u{{1b}}[0m\n --> portal.yaml:1:303\n1 | ...{kept}: \\u{{202e}}bad{after}...\n  | {blank}^^^^^^^^^^^ l\n"
            ),
        );
    }
}
