//! Every change of one place in a step, class by class.

/// A change: bytes of a text and what takes their place.
#[derive(Debug, Clone)]
pub(super) struct Change {
    pub(super) class: &'static str,
    pub(super) at: usize,
    pub(super) length: usize,
    pub(super) to: String,
}

impl Change {
    /// The text with the change made.
    pub(super) fn made(&self, text: &str) -> String {
        format!("{}{}{}", &text[..self.at], self.to, &text[self.at + self.length..])
    }
}

const DIGITS: [&str; 3] = ["0123456789", "₀₁₂₃₄₅₆₇₈₉", "⁰¹²³⁴⁵⁶⁷⁸⁹"];

/// What takes the place of a mark, by class; an empty text takes it away.
const MARKS: &[(&str, &str, &[&str])] = &[
    ("sign", "(−", &["(", "(−−"]),
    ("sign", "= −", &["= "]),
    ("sign", "⁻", &[""]),
    ("sign", "−", &["", "-"]),
    ("operator", "·", &["/", " + ", " − ", ""]),
    ("operator", "/", &["·", " + ", " − ", ""]),
    ("operator", " + ", &[" − ", "·", "/"]),
    ("operator", " − ", &[" + ", "·", "/"]),
    ("operator", "√", &[""]),
    ("operator", "max", &["min", ""]),
    ("operator", "min", &["max", ""]),
    ("operator", "sin", &["cos", "tan"]),
    ("operator", "cos", &["sin"]),
    ("operator", "tan", &["sin"]),
    ("operator", "π", &["2", "e"]),
    ("bracket", "(", &["", "(("]),
    ("bracket", ")", &["", "))"]),
    ("bracket", "|", &["", "||"]),
    ("point", ".", &["", "..", "0.", ".0"]),
    ("verdict", "≤", &[">", "<", ""]),
    ("verdict", "> ", &["≤ "]),
    ("verdict", " NOT OK", &[" OK", ""]),
    ("verdict", " OK", &[" NOT OK", ""]),
];

/// Units that take each other's place: of one dimension, and of another.
const UNITS: &[&str] = &[
    "mm", "cm", "m", "in", "ft", "N", "kN", "MN", "lbf", "kip", "Pa", "kPa", "MPa", "GPa", "psi", "ksi", "rad", "mrad",
    "deg", "K", "degF", "kg", "t", "lb", "s",
];

/// Every change of one place in the lines of a step, which begin behind its fence.
///
/// `all` takes every digit for every other, every symbol and every address for every other of the step; else two each.
pub(super) fn changes(body: &str, others: &[&str], all: bool) -> Vec<Change> {
    let mut found = Vec::new();
    let mut start = 0;
    let mut part = 0;
    let symbols = symbols(body);
    for line in body.split_inclusive('\n') {
        let trimmed = line.trim();
        let is_continued = line.starts_with(' ') && !trimmed.starts_with("= ");
        part += usize::from(!is_continued);
        let key = trimmed.split(": ").next().unwrap_or_default();
        let is_named = part > 4 && !is_continued;
        match (part, key) {
            (1, _) => words(line, start, "words", &mut found),
            (_, "from") if is_named => addresses(line, start, &symbols, others, all, &mut found),
            (_, "by" | "note") if is_named => words(line, start, "source and remark", &mut found),
            _ if part > 4 => addresses(line, start, &symbols, others, all, &mut found),
            _ => formula(line, start, part == 2, &symbols, all, &mut found),
        }
        found.push(Change { class: "line", at: start, length: line.len(), to: String::new() });
        found.push(Change { class: "line", at: start, length: 0, to: line.to_owned() });
        start += line.len();
    }
    found
}

/// Names of the step: its own symbol and its operands.
fn symbols(body: &str) -> Vec<String> {
    let mut names: Vec<String> = body
        .lines()
        .nth(1)
        .and_then(|line| line.split_once(" = "))
        .map(|(symbol, _)| symbol.to_owned())
        .into_iter()
        .collect();
    let from = body.lines().skip_while(|line| !line.starts_with("from: "));
    for entry in from
        .take_while(|line| line.starts_with("from: ") || line.starts_with(' '))
        .flat_map(|line| line.trim_start_matches("from: ").trim().split(" · ").map(str::to_owned).collect::<Vec<_>>())
    {
        names.extend(entry.split_once(' ').map(|(symbol, _)| symbol.to_owned()));
    }
    names
}

fn digits(line: &str, start: usize, class: impl Fn(usize) -> &'static str, all: bool, found: &mut Vec<Change>) {
    for (at, c) in line.char_indices() {
        let Some(alphabet) = DIGITS.iter().find(|alphabet| alphabet.contains(c)) else { continue };
        let alphabet: Vec<char> = alphabet.chars().collect();
        let digit = alphabet.iter().position(|other| *other == c).unwrap_or(0);
        let steps: &[usize] = if all { &[1, 2, 3, 4, 5, 6, 7, 8, 9] } else { &[1, 9] };
        let mut to = |to: String| {
            found.push(Change { class: class(at), at: start + at, length: c.len_utf8(), to });
        };
        steps.iter().for_each(|by| to(alphabet[(digit + by) % 10].to_string()));
        to(String::new());
        to(format!("{c}{c}"));
    }
}

fn formula(line: &str, start: usize, is_symbolic: bool, symbols: &[String], all: bool, found: &mut Vec<Change>) {
    let class = |at: usize| match line[at..].chars().next() {
        Some(c) if DIGITS[2].contains(c) => "superscript",
        Some(c) if DIGITS[1].contains(c) => "symbol",
        _ => "digit",
    };
    digits(line, start, class, all, found);
    for (at, _) in line.char_indices() {
        for (class, from, others) in MARKS {
            // A minus between spaces is an operator, which has its own row.
            let is_between = *from == "−" && line[..at].ends_with(' ') && line[at..].starts_with("− ");
            if line[at..].starts_with(from) && !is_between {
                let mut to = |to: &str| {
                    found.push(Change { class, at: start + at, length: from.len(), to: to.to_owned() });
                };
                others.iter().for_each(|other| to(other));
            }
        }
    }
    for (at, word) in runs(line, |c| c.is_alphabetic() || c == '_' || c == '′' || DIGITS[1].contains(c)) {
        if UNITS.contains(&word) && !is_symbolic {
            let others = UNITS.iter().filter(|other| **other != word);
            let here = others.enumerate().filter(|(n, _)| all || (n + at) % 6 == 0);
            found.extend(here.map(|(_, to)| Change {
                class: "unit",
                at: start + at,
                length: word.len(),
                to: (*to).to_owned(),
            }));
            found.push(Change { class: "unit", at: start + at, length: word.len(), to: String::new() });
        } else if is_symbolic {
            let is_own = line[at..].starts_with(&format!("{word} = ")) && at == 0;
            let class = if is_own { "own symbol" } else { "symbol" };
            let others = symbols.iter().map(String::as_str).chain(["z", "σ"]).filter(|other| *other != word);
            let mut to = |to: String| found.push(Change { class, at: start + at, length: word.len(), to });
            others.take(if all { 9 } else { 3 }).for_each(|other| to(other.to_owned()));
            to(String::new());
            to(format!("{word}₂"));
        }
    }
}

fn addresses(line: &str, start: usize, symbols: &[String], others: &[&str], all: bool, found: &mut Vec<Change>) {
    let skip = if line.starts_with("from: ") { 6 } else { 0 };
    digits(&line[skip..], start + skip, |_| "address", false, found);
    for (at, word) in runs(&line[skip..], |c| c != ' ' && c != '\n' && c != '·') {
        let at = start + skip + at;
        let mut to = |class, length, to: &str| found.push(Change { class, at, length, to: to.to_owned() });
        if symbols.iter().any(|symbol| symbol == word) {
            symbols
                .iter()
                .filter(|other| *other != word)
                .take(if all { 9 } else { 2 })
                .for_each(|other| to("symbol", word.len(), other));
            to("symbol", word.len(), "z");
        } else {
            others
                .iter()
                .filter(|other| **other != word)
                .take(if all { 9 } else { 3 })
                .for_each(|other| to("address", word.len(), other));
            to("address", word.len(), "");
            to("address", 1, if word.starts_with('Z') { "Y" } else { "Z" });
        }
    }
}

/// One letter after another, and one word after another.
fn words(line: &str, start: usize, class: &'static str, found: &mut Vec<Change>) {
    for (at, word) in runs(line.trim_end(), |c| c.is_alphanumeric()) {
        let mut to = |to: String| found.push(Change { class, at: start + at, length: word.len(), to });
        to(String::new());
        to(format!("{word}x"));
        to(match word {
            "start" => "end".into(),
            "end" => "start".into(),
            "X" => "Y".into(),
            "tension" => "compression".into(),
            "top" => "bottom".into(),
            _ => "not".into(),
        });
    }
}

/// Runs of characters with their places.
fn runs(line: &str, fits: impl Fn(char) -> bool) -> Vec<(usize, &str)> {
    let mut found = Vec::new();
    let mut rest = 0;
    while let Some(at) = line[rest..].find(&fits) {
        let at = rest + at;
        let length = line[at..].find(|c| !fits(c)).unwrap_or(line.len() - at);
        found.push((at, &line[at..at + length]));
        rest = at + length;
    }
    found
}
