//! One change at a time, everywhere: what is not seen lies below the closure of a line.
use super::{SAMPLE, report};
use crate::retrace::{confirm, read};

/// A change: bytes of the sample and what takes their place.
struct Change {
    at: usize,
    length: usize,
    to: String,
}

/// The kinds of character a change keeps within.
const ALPHABETS: &[&str] = &["0123456789", "₀₁₂₃₄₅₆₇₈₉", "⁰¹²³⁴⁵⁶⁷⁸⁹"];
/// Texts that may take each other's place.
const EXCHANGES: &[(&str, &[&str])] = &[
    ("·", &["/", " + ", " − "]),
    ("/", &["·", " + "]),
    (" + ", &[" − ", "·"]),
    (" − ", &[" + ", "/"]),
    ("(−", &["("]),
    ("⁻", &[""]),
    ("√", &[""]),
    ("max", &["min"]),
    ("≤", &[">"]),
    (" OK", &[" NOT OK"]),
    ("mm", &["m", "cm", "in"]),
    ("kN", &["N", "MN"]),
    ("MPa", &["kPa", "GPa"]),
    ("GPa", &["MPa"]),
    (" m", &[" mm"]),
    ("| −", &["| "]),
    ("= −", &["= "]),
    (".", &["", "0."]),
];

/// Every change to one line: digits, signs, operators, units, verdicts; letters of symbols and addresses.
fn changes(line: &str, offset: usize) -> Vec<Change> {
    let mut found = Vec::new();
    for (at, c) in line.char_indices() {
        let mut to = |length: usize, to: String| found.push(Change { at: offset + at, length, to });
        if let Some(alphabet) = ALPHABETS.iter().find(|alphabet| alphabet.contains(c)) {
            let digits: Vec<char> = alphabet.chars().collect();
            let digit = digits.iter().position(|other| *other == c).unwrap_or(0);
            [1, 5, 9].iter().for_each(|by| to(c.len_utf8(), digits[(digit + by) % 10].to_string()));
        }
        if c.is_alphabetic() {
            to(c.len_utf8(), if c == 'z' { "w" } else { "z" }.into());
        }
        for (from, others) in EXCHANGES {
            if line[at..].starts_with(from) {
                others.iter().for_each(|other| to(from.len(), (*other).to_string()));
            }
        }
    }
    found
}

/// The lines on which the promises rest: all of the steps but words, numbers of tables, fingerprints, with their places.
fn bearing_lines() -> Vec<(usize, &'static str)> {
    let mut offset = 0;
    let mut found = Vec::new();
    let mut in_step = false;
    let mut is_title = false;
    for line in SAMPLE.split_inclusive('\n') {
        in_step = if line.starts_with("```") { line.starts_with("```step") } else { in_step };
        let is_words = line.starts_with("by:") || line.starts_with("note:") || is_title;
        is_title = line.starts_with("```step");
        if in_step && (line.starts_with("```") || !is_words) {
            found.push((offset, line));
        } else if let Some(at) = line.find("SHA-256") {
            found.push((offset + at + 7, line[at + 7..].trim_end_matches(['.', '\n'])));
        } else if line.starts_with("| ") && line.contains(|c: char| c.is_ascii_digit()) && !line.contains("Revision") {
            // The name of a row is a word; where steps draw on the row it is part of an address.
            let is_drawn_on =
                ["| A | 0", "| B |", "| RS |", "| K1 | 2", "| start", "| end"].iter().any(|row| line.starts_with(row));
            let at = if is_drawn_on { 0 } else { line[2..].find("| ").map_or(0, |at| at + 2) };
            found.push((offset + at, &line[at..]));
        }
        offset += line.len();
    }
    found
}

/// Whether a change touches only what nobody can confirm from the package: the name that a line gives its own result, or
/// the number of a step on which nothing draws, or words in a cell; or whether it lies below the closure of a line.
fn cannot_show(line: &str, change: &Change) -> bool {
    let is_part_of = |text: &str| line.find(text).is_some_and(|at| (at..at + text.len()).contains(&change.at));
    let own_name = !line.starts_with("from:") && line.find(" = ").is_some_and(|at| change.at < at);
    let is_last_of_chain = line.contains("B.C1.N01");
    let words = [r"a\|b", "NOT CHECKED: no limit given", "(#member-t1)"].iter().any(|text| is_part_of(text));
    // One unit of the last place of a demand or a limit, under a ratio printed to four digits.
    let quoted = ["150.0 MPa |", "165.0 MPa |", "12.50 MPa |"].iter().any(|text| is_part_of(text)) && change.to == "1";
    // A zero is zero in every unit, and within 0.01 of 0.01.
    let zero = line.contains("= 0.00 kN") && (change.to == "1" || is_part_of("kN"));
    // One unit of the last place, in a total and what it is made of.
    let total = ["−30.00", "50.0 |", "0.00 |", "40.00", "4.00", "44.00"].iter().any(|text| is_part_of(text))
        && change.to == "1";
    own_name || is_last_of_chain || words || quoted || zero || total
}

#[test]
fn one_change_is_seen_wherever_it_falls() {
    let (mut total, mut excused) = (0, 0);
    let mut unseen = Vec::new();
    for (offset, line) in bearing_lines() {
        for change in changes(line, offset) {
            total += 1;
            let text = format!("{}{}{}", &SAMPLE[..change.at], change.to, &SAMPLE[change.at + change.length..]);
            let is_seen = read(&text).map_or(true, |package| !confirm(&package, None).ok());
            let within = Change { at: change.at - offset, ..change };
            if is_seen {
                continue;
            }
            if cannot_show(line, &within) {
                excused += 1;
            } else {
                let after = format!("{}{}{}", &line[..within.at], within.to, &line[within.at + within.length..]);
                unseen.push(format!("{}    {}", line, after.trim_end()));
            }
        }
    }
    assert!(total > 2000, "{total} changes");
    assert!(excused * 25 < total, "{excused} of {total} changes excused");
    assert!(unseen.is_empty(), "{} of {total} changes not seen:\n{}", unseen.len(), unseen.join("\n"));
}

#[test]
fn the_input_is_held_by_its_fingerprint() {
    let start = SAMPLE.rfind("calcsheaf: 1").expect("the input");
    for (at, c) in SAMPLE[start..].char_indices().take_while(|(_, c)| *c != '#') {
        if c.is_alphanumeric() {
            let at = start + at;
            let text = format!("{}Q{}", &SAMPLE[..at], &SAMPLE[at + c.len_utf8()..]);
            assert!(!report(&text).ok(), "byte {at}");
        }
    }
}
