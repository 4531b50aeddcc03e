//! The fingerprint of the input and the input as printed: one must be that of the other.
use super::Finding;
use super::markdown::Line;
use super::package::Package;
use crate::units::parse_number;
use sha2::{Digest, Sha256};

/// Letters and digits of a SHA-256 in hexadecimal.
const HEX_LENGTH: usize = 64;

/// How the row of a table begins that prints the fingerprint.
const ROW: &str = "fingerprint of the input";
/// How the line above the input begins.
const LINE: &[&str] = &["sha-256:", "sha256:"];

/// A fingerprint as printed.
#[derive(Debug, Clone, PartialEq, Eq)]
pub(super) struct Fingerprint {
    pub(super) line: usize,
    pub(super) hex: String,
}

impl Fingerprint {
    /// The fingerprint in a row named so, or in a line that begins with its kind; a finding where a long word stands
    /// there that is none. Other lines may speak of fingerprints, of an earlier revision for instance.
    pub(super) fn read(line: Line<'_>) -> Option<Result<Self, Finding>> {
        let text = line.text.to_ascii_lowercase();
        let is_named = match text.strip_prefix('|') {
            Some(row) => row.trim_start().starts_with(ROW),
            None => LINE.iter().any(|beginning| text.starts_with(beginning)),
        };
        if !is_named {
            return None;
        }
        let word = text.split(|c: char| !c.is_alphanumeric()).find(|word| word.len() > HEX_LENGTH / 2)?;
        if word.len() == HEX_LENGTH && word.bytes().all(|b| b.is_ascii_hexdigit()) {
            return Some(Ok(Self { line: line.number, hex: word.to_owned() }));
        }
        Some(Err(Finding::at(line.number, "64 hexadecimal digits", format!("`{word}`"))))
    }
}

/// The input file as printed.
#[derive(Debug, Clone, PartialEq, Eq)]
pub(super) struct Echo {
    pub(super) line: usize,
    /// Lines ended by LF, the last one too.
    pub(super) text: String,
}

impl Echo {
    pub(super) fn new(line: usize, lines: &[Line<'_>]) -> Self {
        let mut text = String::new();
        for line in lines {
            text.push_str(line.text);
            text.push('\n');
        }
        Self { line, text }
    }

    /// The numbers typed in it, sorted, whatever unit follows them.
    pub(super) fn numbers(&self) -> Vec<f64> {
        let words = self.text.split(|c: char| c.is_whitespace() || "{}[],:\"'".contains(c));
        let mut numbers: Vec<f64> = words.filter_map(|word| parse_number(word).ok()).collect();
        numbers.sort_by(f64::total_cmp);
        numbers
    }

    /// The files that look like this in print. Line ends, a last line without end, a byte-order mark and characters
    /// shown by their code point do not show.
    fn readings(&self) -> impl Iterator<Item = String> + '_ {
        let unended = |text: String| {
            let bare = text.strip_suffix('\n').unwrap_or(&text).to_owned();
            [text, bare]
        };
        [self.text.clone(), with_hidden_characters(&self.text)]
            .into_iter()
            .flat_map(unended)
            .flat_map(|text| [text.replace('\n', "\r\n"), text].into_iter().rev())
            .flat_map(|text| [format!("\u{feff}{text}"), text].into_iter().rev())
    }
}

/// `⟨U+202E⟩` put back to the character it stands for.
fn with_hidden_characters(text: &str) -> String {
    let mut out = String::with_capacity(text.len());
    let mut rest = text;
    while let Some(at) = rest.find("⟨U+") {
        let (before, mark) = rest.split_at(at);
        out.push_str(before);
        let hex = mark.trim_start_matches("⟨U+").split('⟩').next().unwrap_or("");
        let length = "⟨U+".len() + hex.len() + '⟩'.len_utf8();
        let hidden = u32::from_str_radix(hex, 16).ok().and_then(char::from_u32);
        match hidden.filter(|_| (4..=6).contains(&hex.len()) && mark.len() >= length) {
            Some(c) => {
                out.push(c);
                rest = &mark[length..];
            }
            None => {
                out.push_str("⟨U+");
                rest = &mark["⟨U+".len()..];
            }
        }
    }
    out.push_str(rest);
    out
}

fn sha256(bytes: &[u8]) -> String {
    Sha256::digest(bytes).iter().map(|byte| format!("{byte:02x}")).collect()
}

/// Whether fingerprints, the printed input and the input at hand belong together.
pub(super) fn check(package: &Package, input: Option<&str>, findings: &mut Vec<Finding>) {
    let Some((first, others)) = package.fingerprints.split_first() else { return };
    for other in others.iter().filter(|other| other.hex != first.hex) {
        findings.push(Finding::at(
            other.line,
            format!("the fingerprint of line {}, {}", first.line, first.hex),
            &*other.hex,
        ));
    }
    let Some(echo) = &package.echo else { return };
    if !echo.readings().any(|reading| sha256(reading.as_bytes()) == first.hex) {
        let expected = format!("an input whose SHA-256 is {}", first.hex);
        findings.push(Finding::at(echo.line, expected, sha256(echo.text.as_bytes())));
    }
    let Some(input) = input else { return };
    let found = sha256(input.as_bytes());
    if found != first.hex {
        findings.push(Finding::at(first.line, format!("the fingerprint of the input at hand, {found}"), &*first.hex));
    }
    if !echo.readings().any(|reading| reading == input) {
        findings.push(first_difference(echo, input));
    }
}

fn first_difference(echo: &Echo, input: &str) -> Finding {
    let mut ours = input.lines();
    for (at, printed) in echo.text.lines().enumerate() {
        let expected = ours.next();
        if expected != Some(printed) {
            let expected =
                expected.map_or("the end of the input".into(), |line| format!("`{line}` as in the input at hand"));
            return Finding::at(echo.line + 1 + at, expected, format!("`{printed}`"));
        }
    }
    Finding::at(echo.line, "the whole of the input at hand", format!("{} lines of it", echo.text.lines().count()))
}
