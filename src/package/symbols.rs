//! The index of symbols: what each stands for, its unit, the first step that finds it.
use crate::catalogue::{check, section, symbol};
use crate::document::SymbolFact;
use crate::model::Display;
use crate::sheet::{Sheet, Step};
use std::collections::{BTreeMap, BTreeSet};

/// Words, symbol and method of a step: what `retrace` holds every step of the package against.
pub(super) fn what_it_is(step: &Step) -> String {
    let (title, symbol) = (step.definition.title(), step.definition.symbol());
    match step.methods().join(" · ") {
        by if by.is_empty() => format!("{title}, {symbol}"),
        by => format!("{title}, {symbol} ({by})"),
    }
}

/// Every symbol that a step finds, once for each thing it stands for, and every other symbol of the formulas.
///
/// Symbols that differ in a running index alone stand together.
pub(super) fn facts(display: &Display, sheet: &Sheet) -> (Vec<SymbolFact>, Vec<SymbolFact>) {
    let mut found: BTreeMap<Order, SymbolFact> = BTreeMap::new();
    let mut read: BTreeMap<Order, SymbolFact> = BTreeMap::new();
    let unit = |id: u32| sheet.ledger.entry(id).unit.text.to_string();
    let results: BTreeSet<(&str, String)> =
        sheet.steps.iter().map(|step| (step.definition.symbol().as_str(), unit(step.result))).collect();
    for step in &sheet.steps {
        let symbol = step.definition.symbol().to_string();
        let what = what_it_is(step);
        found.entry(order(&symbol, &what)).or_insert_with(|| SymbolFact {
            address: step.number.clone(),
            symbol,
            meaning: what,
            unit: unit(step.result),
        });
        for (symbol, id) in &step.operands {
            let unit = unit(*id);
            if results.contains(&(symbol.as_str(), unit.clone())) {
                continue;
            }
            let running = !symbol.subscript().is_empty() && symbol.subscript().chars().all(|c| c.is_ascii_digit());
            let (text, meaning) = match meaning(display, symbol.as_str(), &unit) {
                Some(words) => (symbol.to_string(), words),
                None if running => (format!("{0}₁, {0}₂ …", symbol.stem()), family(symbol.stem())),
                None => (symbol.to_string(), "Value that its step names"),
            };
            let meaning = meaning.trim_end_matches('.').to_owned();
            read.entry(order(&text, &unit)).or_insert(SymbolFact {
                address: String::new(),
                symbol: text,
                meaning,
                unit,
            });
        }
    }
    (found.into_values().collect(), read.into_values().collect())
}

/// Latin before Greek, capitals beside small letters; what else tells two apart comes last.
type Order = (bool, String, String, String);

fn order(symbol: &str, other: &str) -> Order {
    let greek = symbol.starts_with(|c: char| !c.is_ascii());
    (greek, symbol.to_lowercase(), symbol.to_owned(), other.to_owned())
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
