//! Text from outside made safe to print: nothing in it is unseen, nothing in it reorders what is seen.
use std::borrow::Cow;

/// Opens a run that stands for something else; cannot occur in a text that went through [`visible`].
pub(super) const OPEN: char = '\u{F8F0}';
/// Closes it.
pub(super) const CLOSE: char = '\u{F8F1}';

/// The text with every character that cannot be seen, or that changes the order of others, shown by its code point:
/// `⟨U+202E⟩`. Line ends and tabs stay.
#[must_use]
pub fn visible(text: &str) -> Cow<'_, str> {
    if !text.chars().any(is_hidden) {
        return Cow::Borrowed(text);
    }
    let mut shown = String::with_capacity(text.len() + 16);
    for c in text.replace("\r\n", "\n").chars() {
        if is_hidden(c) { shown.push_str(&format!("⟨U+{:04X}⟩", c as u32)) } else { shown.push(c) }
    }
    Cow::Owned(shown)
}

/// The same on one line: runs of blanks and line ends become one blank.
pub(super) fn visible_line(text: &str) -> String {
    visible(text).split_whitespace().collect::<Vec<_>>().join(" ")
}

fn is_hidden(c: char) -> bool {
    match c {
        '\n' | '\t' => false,
        OPEN | CLOSE => true,
        _ => {
            c.is_control()
                || matches!(u32::from(c),
                    0x00AD | 0x034F | 0x061C | 0x115F | 0x1160 | 0x17B4 | 0x17B5 | 0x180B..=0x180F
                    | 0x200B..=0x200F | 0x2028..=0x202E | 0x2060..=0x206F | 0x3164 | 0xFE00..=0xFE0F | 0xFEFF | 0xFFA0
                    | 0xFFF0..=0xFFFB | 0x1D173..=0x1D17A | 0xE0000..=0xE0FFF)
        }
    }
}

/// The text with every mark that Markdown could read meant as itself, on one line.
pub(super) fn escaped(text: &str) -> String {
    let mut escaped = String::with_capacity(text.len());
    for c in visible_line(text).chars() {
        if c.is_ascii_punctuation() {
            escaped.push('\\');
        }
        escaped.push(c);
    }
    escaped
}

/// What [`escaped`] was made of.
pub(super) fn unescaped(text: &str) -> String {
    let mut plain = String::with_capacity(text.len());
    let mut chars = text.chars().peekable();
    while let Some(c) = chars.next() {
        match chars.peek() {
            Some(next) if c == '\\' && next.is_ascii_punctuation() => plain.extend(chars.next()),
            _ => plain.push(c),
        }
    }
    plain
}

#[cfg(test)]
mod tests {
    use super::*;

    #[test]
    fn what_cannot_be_seen_is_shown() {
        assert_eq!(visible("a\u{202E}b\u{200B}c\u{7}"), "a⟨U+202E⟩b⟨U+200B⟩c⟨U+0007⟩");
        assert_eq!(visible("\u{F8F0}P41\u{F8F1}"), "⟨U+F8F0⟩P41⟨U+F8F1⟩");
        assert_eq!(visible("plain\ttext\n"), "plain\ttext\n");
    }

    #[test]
    fn escaping_keeps_one_line_and_comes_back() {
        let text = ":: step A.G01 {{ x }} | `a` \\ *b*";
        assert_eq!(unescaped(&escaped(text)), text);
        assert_eq!(escaped("a\n\n:: end"), "a \\:\\: end");
    }
}
