//! The index of symbols: what each stands for, its unit, the steps that find it.
use crate::catalogue::{check, section, symbol};
use crate::document::SymbolFact;
use crate::formula::Symbol;
use crate::model::Display;
use crate::sheet::{Sheet, Step};
use std::collections::{BTreeMap, BTreeSet};

/// What is known of a symbol in one unit.
#[derive(Default)]
struct Known<'s> {
    /// Letter and figure of the steps that find it.
    found: BTreeSet<(char, u16)>,
    /// The words of the first of them.
    title: Option<((char, u16), &'s str)>,
}

/// Every symbol of every formula; symbols that differ in a running index alone stand together.
pub(super) fn facts(display: &Display, sheet: &Sheet) -> Vec<SymbolFact> {
    let mut all: BTreeMap<(String, String), Known<'_>> = BTreeMap::new();
    for step in &sheet.steps {
        let unit = |id: u32| sheet.ledger.entry(id).unit.text.to_string();
        let known = all.entry((step.definition.symbol().to_string(), unit(step.result))).or_default();
        if let Some(place) = place(step) {
            known.found.insert(place);
            if known.title.is_none_or(|(before, _)| place < before) {
                known.title = Some((place, step.definition.title()));
            }
        }
        for (symbol, id) in &step.operands {
            all.entry((symbol.to_string(), unit(*id))).or_default();
        }
    }
    let mut rows: BTreeMap<(bool, String, String, String), SymbolFact> = BTreeMap::new();
    for ((text, unit), known) in all {
        let symbol = Symbol::owned(text.clone());
        let said = meaning(display, &text, &unit).or(known.title.map(|(_, words)| words));
        let running = symbol.subscript().chars().all(|c| c.is_ascii_digit()) && !symbol.subscript().is_empty();
        let (text, meaning) = match said {
            Some(words) => (text, words),
            None if running => (format!("{0}₁, {0}₂ …", symbol.stem()), family(symbol.stem())),
            None => (text, "Value that its step names"),
        };
        let found: Vec<String> = known.found.iter().map(|(letter, nn)| format!("{letter}{nn:02}")).collect();
        let greek = text.starts_with(|c: char| !c.is_ascii());
        rows.entry((greek, text.to_lowercase(), text.clone(), unit.clone())).or_insert(SymbolFact {
            symbol: text,
            meaning: meaning.trim_end_matches('.').to_owned(),
            unit,
            found: shortened(&found),
        });
    }
    rows.into_values().collect()
}

/// Letter and figure of a step's number.
fn place(step: &Step) -> Option<(char, u16)> {
    let last = step.number.rsplit('.').next()?;
    let letter = last.chars().next()?;
    Some((letter, last[letter.len_utf8()..].parse().ok()?))
}

/// The words of the tables of symbols and of the sections' dimensions.
fn meaning(display: &Display, text: &str, unit: &str) -> Option<&'static str> {
    let tables = symbol::TABLE.iter().chain(check::SYMBOLS).copied();
    let of_sections = section::ALL.iter().flat_map(|kind| kind.params());
    let dimensions =
        of_sections.filter(|param| param.symbol.as_str() == text).map(|param| (text, param.measure, param.doc));
    let mut of_text: Vec<_> = Vec::new();
    of_text.extend(tables.filter(|(symbol, ..)| *symbol == text).map(|(_, measure, words)| (measure, words)));
    of_text.extend(dimensions.map(|(_, measure, words)| (measure, words)));
    of_text.into_iter().find(|(measure, _)| *display.unit(*measure).text == *unit).map(|(_, words)| words)
}

/// What symbols with a running index stand for.
fn family(stem: &str) -> &'static str {
    match stem {
        "γ" => "Factors of the combination on the load cases",
        _ => "Terms of one sum, each named in its step",
    }
}

/// The first few, and how the rest is said.
fn shortened(found: &[String]) -> String {
    const MOST: usize = 4;
    match found {
        [] => String::new(),
        few if few.len() <= MOST => few.join(", "),
        many => format!("{} …", many[..MOST].join(", ")),
    }
}
