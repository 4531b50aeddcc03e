//! The README's example is an input that works, and its excerpt stands in the package it names.
use crate::packages::{pack, pack_file};
use calcsheaf::retrace;
use std::path::Path;

const README: &str = include_str!("../../README.md");

fn between<'t>(text: &'t str, from: &str, to: &str) -> &'t str {
    let start = text.find(from).expect("beginning") + from.len();
    &text[start..start + text[start..].find(to).expect("end")]
}

#[test]
fn the_example_of_the_language_can_be_packed_and_confirmed() {
    let input = between(README, "```yaml\n", "```\n");
    let package = pack(input, "example.yaml");
    let read = retrace::read(&package.markdown).expect("a package");
    let report = retrace::confirm(&read, Some(input));
    assert!(report.ok(), "{report}");
}

#[test]
fn the_excerpt_is_what_the_portal_prints() {
    let (_, package) = pack_file(&Path::new(env!("CARGO_MANIFEST_DIR")).join("demo-inputs/pipe-support-portal.yaml"));
    let excerpt = between(README, "````\n", "````\n");
    for block in excerpt.split("\n\n").filter(|block| block.starts_with("```step")) {
        assert!(package.markdown.contains(block.trim_end()), "the package does not print:\n{block}");
    }
}
