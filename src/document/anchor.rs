//! Anchors of headings, made of their own words.
use super::{Block, Inline, read::words_of};
use std::collections::BTreeMap;

/// Gives every heading its anchor; the second of the same words gets `-1`, the third `-2`.
///
/// # Source
/// The rule by which GitHub names the headings of a Markdown page (recalled): lower case, blanks become hyphens,
/// everything but letters, digits, hyphens and low lines falls away.
pub(super) fn set(blocks: &mut [Block]) {
    let mut taken = BTreeMap::new();
    for block in blocks {
        if let Block::Heading { text, anchor, .. } = block {
            *anchor = unique(of(text), &mut taken);
        }
    }
}

fn of(text: &[Inline]) -> String {
    words_of(text)
        .trim()
        .to_lowercase()
        .chars()
        .filter_map(|c| match c {
            ' ' => Some('-'),
            '-' | '_' => Some(c),
            c if c.is_alphanumeric() => Some(c),
            _ => None,
        })
        .collect()
}

fn unique(anchor: String, taken: &mut BTreeMap<String, usize>) -> String {
    let count = taken.entry(anchor.clone()).or_insert(0);
    *count += 1;
    if *count == 1 { anchor } else { format!("{anchor}-{}", *count - 1) }
}

#[cfg(test)]
mod tests {
    use super::*;

    #[test]
    fn anchors_are_words_and_differ() {
        let heading =
            |text: &str| Block::Heading { level: 2, text: vec![Inline::Text(text.into())], anchor: String::new() };
        let mut blocks = vec![heading("Member BC_2, combination C1"), heading("Purpose"), heading("Purpose")];
        set(&mut blocks);
        let anchors: Vec<&str> = blocks
            .iter()
            .filter_map(|block| if let Block::Heading { anchor, .. } = block { Some(anchor.as_str()) } else { None })
            .collect();
        assert_eq!(anchors, ["member-bc_2-combination-c1", "purpose", "purpose-1"]);
    }
}
