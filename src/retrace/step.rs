//! A step as printed: its lines told apart, nothing judged but their form.
use super::Finding;
use super::markdown::Line;
use crate::formula::{PrintedNumber, Symbol, Tree, parse_printed, parse_symbols};

/// A step as printed.
#[derive(Debug, Clone, PartialEq)]
pub struct PrintedStep {
    /// Its number.
    pub number: String,
    /// The line of its fence.
    pub line: usize,
    /// What it finds, in plain words.
    pub title: String,
    /// What the formula gives.
    pub symbol: Symbol,
    /// The formula in symbols, joined to one line, with the line where it begins.
    pub symbols: (usize, String),
    /// The formula with numbers in place, joined to one line, with the line where it begins.
    pub numbers: (usize, String),
    /// The line of the result.
    pub result_line: usize,
    /// The result.
    pub result: PrintedNumber,
    /// The comparison that follows the result.
    pub comparison: Option<PrintedComparison>,
    /// The line of the addresses; that of the fence where there is none.
    pub from_line: usize,
    /// Each symbol with the address of its number, as listed.
    pub from: Vec<(String, String)>,
    /// Method or clause; empty where nothing is said.
    pub by: String,
    /// A remark; empty where nothing is said.
    pub note: String,
}

/// A comparison as printed.
#[derive(Debug, Clone, PartialEq)]
pub struct PrintedComparison {
    /// Whether the relation is `≤`; otherwise it is `>`.
    pub is_at_most: bool,
    /// The limit.
    pub limit: PrintedNumber,
    /// Whether the verdict is `OK`; otherwise it is `NOT OK`.
    pub ok: bool,
}

impl PrintedStep {
    /// The letter of the kind of step, `E` of `BC.C1.E03`.
    #[must_use]
    pub fn letter(&self) -> Option<char> {
        self.number.rsplit('.').next().and_then(|last| last.chars().next())
    }

    pub(super) fn read(number: &str, line: usize, lines: &[Line<'_>]) -> Result<Self, Finding> {
        let fault = |line: usize, expected: &str, found: String| Finding::of(number, line, expected, found);
        let number_form = "a step number such as `BC.C1.E03`";
        if !is_step_number(number) {
            return Err(fault(line, number_form, format!("`{number}`")));
        }
        let mut lines = logical_lines(lines).into_iter();
        let Some((_, title)) = lines.next().filter(|(_, title)| !title.trim().is_empty()) else {
            return Err(fault(line, "words that say what the step finds", "nothing".into()));
        };
        let Some((symbols_line, text)) = lines.next() else {
            return Err(fault(line, "a formula in symbols", "the end of the step".into()));
        };
        let Some((symbol, symbols)) = text.split_once('=') else {
            return Err(fault(symbols_line, "`symbol = formula`", format!("`{text}`")));
        };
        let Ok(Tree::Symbol(symbol)) = parse_symbols(symbol.trim_end()) else {
            return Err(fault(symbols_line, "a symbol before the equals sign", format!("`{}`", symbol.trim_end())));
        };
        let mut right_hand_side = |what: &str| match lines.next() {
            None => Err(fault(line, what, "the end of the step".into())),
            Some((at, text)) => match text.trim_start().strip_prefix("= ") {
                Some(formula) => Ok((at, formula.to_owned())),
                None => Err(fault(at, what, format!("`{text}`"))),
            },
        };
        let numbers = right_hand_side("`= ` and the formula with numbers")?;
        let (result_line, result_text) = right_hand_side("`= ` and the result")?;
        let (result, comparison) =
            result(&result_text).map_err(|(expected, found)| fault(result_line, &expected, found))?;

        let mut step = Self {
            number: number.to_owned(),
            line,
            title: title.trim().to_owned(),
            symbol,
            symbols: (symbols_line, symbols.trim_start().to_owned()),
            numbers,
            result_line,
            result,
            comparison,
            from_line: line,
            from: Vec::new(),
            by: String::new(),
            note: String::new(),
        };
        let mut seen: Vec<String> = Vec::new();
        for (at, text) in lines {
            let Some((key, value)) = text.split_once(": ").filter(|(key, _)| ["from", "by", "note"].contains(key))
            else {
                return Err(fault(at, "`from: `, `by: ` or `note: `", format!("`{text}`")));
            };
            if seen.iter().any(|known| known == key) {
                return Err(fault(at, "each of `from:`, `by:`, `note:` once", format!("a second `{key}:`")));
            }
            seen.push(key.to_owned());
            match key {
                "by" => step.by = value.trim().to_owned(),
                "note" => step.note = value.trim().to_owned(),
                _ => {
                    step.from_line = at;
                    for entry in value.trim().split(" · ") {
                        match entry.split_once(' ') {
                            Some((symbol, address)) if !address.contains(' ') && !address.is_empty() => {
                                step.from.push((symbol.to_owned(), address.to_owned()));
                            }
                            _ => return Err(fault(at, "`symbol address` between ` · `", format!("`{entry}`"))),
                        }
                    }
                }
            }
        }
        Ok(step)
    }
}

/// `<subject>[.<combination>].<letter><nn>`; more letters may come.
pub(super) fn is_step_number(text: &str) -> bool {
    let Some((subject, last)) = text.rsplit_once('.') else { return false };
    let mut last = last.chars();
    let is_letter = last.next().is_some_and(|letter| letter.is_ascii_uppercase());
    let digits = last.as_str();
    let is_name = |name: &str| !name.is_empty() && !name.contains(char::is_whitespace);
    is_letter && digits.len() >= 2 && digits.bytes().all(|b| b.is_ascii_digit()) && subject.split('.').all(is_name)
}

/// Lines with their continuations, which are indented and do not begin with an equals sign.
fn logical_lines(lines: &[Line<'_>]) -> Vec<(usize, String)> {
    let mut joined: Vec<(usize, String)> = Vec::new();
    for line in lines {
        let text = line.text.trim();
        let continues = line.text.starts_with([' ', '\t']) && text != "=" && !text.starts_with("= ");
        match joined.last_mut() {
            Some((_, before)) if continues => {
                // Spaces belong to sums and lists; a product or a fraction goes on without.
                if !before.ends_with(['·', '/', '(', '|']) || before.ends_with(" ·") {
                    before.push(' ');
                }
                before.push_str(text);
            }
            _ => joined.push((line.number, line.text.trim_end().to_owned())),
        }
    }
    joined
}

type Outcome = (PrintedNumber, Option<PrintedComparison>);

/// A result, with its comparison if there is one; else what was expected and what was found.
fn result(text: &str) -> Result<Outcome, (String, String)> {
    let number = |text: &str| {
        parse_printed(text).map_err(|fault| ("a number with its unit".to_owned(), format!("`{text}`: {fault}")))
    };
    let Some((at, relation)) = text.char_indices().find(|(_, c)| matches!(c, '≤' | '>')) else {
        return Ok((number(text)?, None));
    };
    let bad = || ("`result ≤ limit OK`, with `>` or `NOT OK` where they apply".to_owned(), format!("`{text}`"));
    let before = text[..at].strip_suffix(' ').ok_or_else(bad)?;
    let after = text[at + relation.len_utf8()..].strip_prefix(' ').ok_or_else(bad)?;
    let (limit, ok) = match after.strip_suffix(" NOT OK") {
        Some(limit) => (limit, false),
        None => (after.strip_suffix(" OK").ok_or_else(bad)?, true),
    };
    let comparison = PrintedComparison { is_at_most: relation == '≤', limit: number(limit)?, ok };
    Ok((number(before)?, Some(comparison)))
}
