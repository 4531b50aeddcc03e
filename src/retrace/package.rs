//! A package as read: steps, tables, fingerprint, echo of the input, lines of the verdict.
use super::Finding;
use super::fingerprint::{Echo, Fingerprint};
use super::markdown::{Line, Shape, shapes, words};
use super::step::PrintedStep;
use super::table::PrintedTable;
use crate::formula::parse_printed;
use std::fmt;

/// A package read from its Markdown.
#[derive(Debug, Clone)]
pub struct Package {
    pub(super) steps: Vec<PrintedStep>,
    /// Steps whose lines could not be told apart; each has a finding.
    pub(super) unread_steps: usize,
    pub(super) tables: Vec<PrintedTable>,
    pub(super) fingerprints: Vec<Fingerprint>,
    /// The fingerprint in a line of text, the last one.
    above_input: Option<Result<Fingerprint, Finding>>,
    pub(super) echo: Option<Echo>,
    /// The first line that begins with `Governing:`, as words.
    pub(super) governing: Option<(usize, String)>,
    pub(super) faults: Vec<Finding>,
    pub(super) remarks: Vec<String>,
    pub(super) loose_numbers: usize,
}

impl Package {
    /// The steps in the order of the page.
    #[must_use]
    pub fn steps(&self) -> &[PrintedStep] {
        &self.steps
    }

    /// The tables in the order of the page, those of words included.
    #[must_use]
    pub fn tables(&self) -> &[PrintedTable] {
        &self.tables
    }

    /// The SHA-256 of the input, as printed.
    #[must_use]
    pub fn fingerprint(&self) -> Option<&str> {
        self.fingerprints.first().map(|fingerprint| fingerprint.hex.as_str())
    }

    /// The input file as printed in the package, lines ended by LF.
    #[must_use]
    pub fn echo(&self) -> Option<&str> {
        self.echo.as_ref().map(|echo| echo.text.as_str())
    }
}

/// Why a text is not a whole package.
#[derive(Debug, Clone, PartialEq, Eq)]
pub struct Refusal {
    /// The line at fault, from 1, where one line is.
    pub line: Option<usize>,
    /// What is missing.
    pub message: String,
}

impl fmt::Display for Refusal {
    fn fmt(&self, f: &mut fmt::Formatter<'_>) -> fmt::Result {
        if let Some(line) = self.line {
            write!(f, "line {line}: ")?;
        }
        f.write_str(&self.message)
    }
}

impl std::error::Error for Refusal {}

fn refuse(line: Option<usize>, message: &str) -> Result<Package, Refusal> {
    Err(Refusal { line, message: message.into() })
}

/// Reads a package. Lines may end in LF or CRLF; a byte-order mark is passed over and remarked.
///
/// # Errors
/// The text holds no step, a fence that is not closed, no fingerprint or no input: it is no package, or was cut short.
pub fn read(markdown: &str) -> Result<Package, Refusal> {
    let text = markdown.strip_prefix('\u{feff}').unwrap_or(markdown);
    let mut package = Package {
        steps: Vec::new(),
        unread_steps: 0,
        tables: Vec::new(),
        fingerprints: Vec::new(),
        above_input: None,
        echo: None,
        governing: None,
        faults: Vec::new(),
        remarks: Vec::new(),
        loose_numbers: 0,
    };
    if text.len() < markdown.len() {
        package.remarks.push("the file begins with a byte-order mark".into());
    }
    if text.contains("\r\n") {
        package.remarks.push("lines end in CR LF".into());
    }
    if !text.ends_with('\n') {
        package.remarks.push("the last line does not end: the file may have been cut short".into());
    }
    let mut verbatim: Vec<(usize, Vec<Line<'_>>)> = Vec::new();
    let mut before = "";
    for shape in shapes(text) {
        match shape {
            Shape::Fence { line, is_closed: false, .. } => {
                return refuse(Some(line), "the block that opens here is never closed: the package was cut short");
            }
            Shape::Fence { line, info, lines, .. } => match info.strip_prefix("step") {
                Some(number) if number.is_empty() || number.starts_with(' ') => {
                    match PrintedStep::read(number.trim(), line, &lines) {
                        Ok(step) => package.steps.push(step),
                        Err(finding) => {
                            package.unread_steps += 1;
                            package.faults.push(finding);
                        }
                    }
                }
                _ => verbatim.push((line, lines)),
            },
            Shape::Table { before, head, rows } => {
                for line in std::iter::once(&head).chain(&rows) {
                    package.fingerprint_in(*line);
                }
                package.tables.push(PrintedTable::read(before, head, &rows));
            }
            Shape::Text(line) => {
                package.text(line, before);
                before = line.text;
            }
        }
    }
    if package.steps.is_empty() && package.unread_steps == 0 {
        return refuse(None, "there is no step in this text: it is no calculation package, or was cut short");
    }
    match package.above_input.take() {
        Some(Ok(fingerprint)) => package.fingerprints.push(fingerprint),
        Some(Err(finding)) => package.faults.push(finding),
        None => {}
    }
    let Some(last) = package.fingerprints.iter().map(|fingerprint| fingerprint.line).max() else {
        return refuse(
            None,
            "there is no SHA-256 of the input: the package was cut short, or its fingerprint is damaged",
        );
    };
    let at = verbatim.iter().position(|(line, _)| *line > last).or(verbatim.len().checked_sub(1));
    let Some(at) = at else {
        return refuse(None, "the input file is not printed in this text: the package was cut short");
    };
    let (line, lines) = verbatim.remove(at);
    package.echo = Some(Echo::new(line, &lines));
    for (_, lines) in verbatim {
        let mut before = "";
        for line in lines {
            package.must_not_be_step(line, before);
            before = line.text;
        }
    }
    Ok(package)
}

impl Package {
    fn text(&mut self, line: Line<'_>, before: &str) {
        self.must_not_be_step(line, before);
        // The line above the input is the last of its kind; prose before it may begin alike.
        if let Some(found) = Fingerprint::read(line) {
            self.above_input = Some(found);
        }
        let text = words(line.text);
        self.loose_numbers += text
            .split_whitespace()
            .map(|token| token.trim_matches(|c: char| !c.is_alphanumeric() && c != '−'))
            .filter(|token| parse_printed(token).is_ok())
            .count();
        // The verdict stands on the cover; prose behind it may begin with the same word.
        if text.starts_with("Governing:") && self.governing.is_none() {
            self.governing = Some((line.number, text));
        }
    }

    /// A step that its fence does not hold would look confirmed and be none.
    ///
    /// Addresses follow a result, or the end of a long line of one; a line of prose may begin with the same word.
    fn must_not_be_step(&mut self, line: Line<'_>, before: &str) {
        let text = line.text.trim_start_matches(['>', ' ', '\t']);
        let bare = text.trim_start_matches(['`', '~']);
        let opens_step = bare.len() < text.len() && bare.trim_start().starts_with("step ");
        let follows_result = before.trim_start().starts_with(['=', '(']);
        if opens_step || text.starts_with("from: ") && follows_result {
            self.faults.push(Finding::at(line.number, "steps inside fences of their own", format!("`{text}`")));
        }
    }

    fn fingerprint_in(&mut self, line: Line<'_>) {
        match Fingerprint::read(line) {
            Some(Ok(fingerprint)) => self.fingerprints.push(fingerprint),
            Some(Err(finding)) => self.faults.push(finding),
            None => {}
        }
    }
}
