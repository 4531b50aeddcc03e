//! Runs that templates print in place of something that is not plain words. They pass through Markdown untouched,
//! being letters and digits between two characters that no text from outside can hold.
use super::visible::{CLOSE, OPEN};

/// What a run of text is made of.
#[derive(Debug, Clone, PartialEq, Eq)]
pub(super) enum Token {
    /// Plain words.
    Words(String),
    /// Prose from the input.
    Prose(String),
    /// A link to a step or a table, shown as its address.
    Link(String),
    /// A link to a step, shown as the last part of its number.
    Short(String),
}

/// The run that stands for prose.
pub(super) fn prose(text: &str) -> String {
    pack('P', text)
}

/// The run that stands for a link.
pub(super) fn link(to: &str) -> String {
    pack('L', to)
}

/// The run that stands for a link shown as the last part of an address.
pub(super) fn short(to: &str) -> String {
    pack('S', to)
}

fn pack(kind: char, text: &str) -> String {
    if text.trim().is_empty() {
        return String::new();
    }
    let coded: String = text.bytes().map(|byte| format!("{byte:02x}")).collect();
    format!("{OPEN}{kind}{coded}{CLOSE}")
}

/// The prose, if the text is that and nothing else.
pub(super) fn sole_prose(text: &str) -> Option<String> {
    match split(text.trim()).as_slice() {
        [Token::Prose(prose)] => Some(prose.clone()),
        _ => None,
    }
}

/// The parts of a text.
pub(super) fn split(text: &str) -> Vec<Token> {
    let mut tokens = Vec::new();
    let mut rest = text;
    while let Some((words, (token, after))) =
        rest.split_once(OPEN).and_then(|(words, coded)| Some((words, coded.split_once(CLOSE)?)))
    {
        if !words.is_empty() {
            tokens.push(Token::Words(words.to_string()));
        }
        tokens.extend(unpack(token));
        rest = after;
    }
    if !rest.is_empty() {
        tokens.push(Token::Words(rest.to_string()));
    }
    tokens
}

fn unpack(token: &str) -> Option<Token> {
    let coded = token.get(1..)?.as_bytes();
    let digit = |byte: u8| char::from(byte).to_digit(16);
    let bytes: Option<Vec<u8>> =
        coded.chunks(2).map(|pair| Some((digit(pair[0])? * 16 + digit(*pair.get(1)?)?) as u8)).collect();
    let text = String::from_utf8(bytes?).ok()?;
    match token.as_bytes()[0] {
        b'P' => Some(Token::Prose(text)),
        b'L' => Some(Token::Link(text)),
        b'S' => Some(Token::Short(text)),
        _ => None,
    }
}

#[cfg(test)]
mod tests {
    use super::*;

    #[test]
    fn what_was_packed_comes_back() {
        let text = format!("see {} and {}.", link("BC.C1.E03"), prose("ünd *so*"));
        assert_eq!(
            split(&text),
            [
                Token::Words("see ".into()),
                Token::Link("BC.C1.E03".into()),
                Token::Words(" and ".into()),
                Token::Prose("ünd *so*".into()),
                Token::Words(".".into())
            ]
        );
        assert_eq!(sole_prose(&prose("a")), Some("a".into()));
        assert_eq!(prose("  "), "");
    }
}
