//! One step by itself: its lines are one formula, its units agree, it closes, its verdict is true.
use super::Finding;
use super::evaluate::evaluate;
use super::step::{PrintedComparison, PrintedStep};
use super::structure::{Placed, place_numbers};
use crate::formula::{FormulaFault, PrintedNumber, Symbol, parse_numbers, parse_symbols};
use std::collections::{BTreeMap, BTreeSet};

/// A line closes within one unit of its result's last place; this share more is the dust of binary arithmetic.
const DUST: f64 = 1e-6;
/// Dust relative to the result, for results printed to nearly all digits a double holds.
const RELATIVE_DUST: f64 = 1e-13;

/// Checks a step by itself and gives the number of each of its symbols; none where its lines cannot be read.
///
/// `is_input` says whether a plain number was typed in the input: a limit other than 1 must come from there.
pub(super) fn check(
    step: &PrintedStep,
    is_input: &dyn Fn(f64) -> bool,
    findings: &mut Vec<Finding>,
) -> BTreeMap<Symbol, PrintedNumber> {
    let unread = |line: usize, text: &str, fault: &FormulaFault| {
        let at = text
            .get(fault.span.clone())
            .filter(|part| !part.is_empty())
            .map_or(String::new(), |part| format!(" at `{part}`"));
        Finding::of(&step.number, line, "a formula", format!("`{text}`: {fault}{at}"))
    };
    let (symbols_line, symbols_text) = &step.symbols;
    let (numbers_line, numbers_text) = &step.numbers;
    let symbols = parse_symbols(symbols_text);
    let numbers = parse_numbers(numbers_text);
    if let Err(fault) = &symbols {
        findings.push(unread(*symbols_line, symbols_text, fault));
    }
    if let Err(fault) = &numbers {
        findings.push(unread(*numbers_line, numbers_text, fault));
    }
    let mut operands = BTreeMap::new();
    if let (Ok(symbols), Ok(numbers)) = (&symbols, &numbers) {
        let mut placed = Vec::new();
        match place_numbers(symbols, numbers, &mut placed) {
            Err(mismatch) => {
                findings.push(Finding::of(&step.number, *numbers_line, mismatch.expected, mismatch.found));
            }
            Ok(()) => {
                check_names(step, &placed, findings);
                operands = gather(step, placed, findings);
            }
        }
    }
    if let Ok(numbers) = &numbers {
        match evaluate(numbers) {
            Err(found) => {
                findings.push(Finding::of(&step.number, *numbers_line, "dimensions that agree", found));
            }
            Ok(worked) => {
                let result = &step.result;
                match worked.dimension {
                    Some(found) if found != result.unit.dimension => {
                        let expected = format!("{found}, which the printed numbers give");
                        let found = format!("{} in `{result}`", result.unit.dimension);
                        findings.push(Finding::of(&step.number, step.result_line, expected, found));
                    }
                    _ => closes(step, worked.value / result.unit.scale, findings),
                }
            }
        }
    }
    if let Some(comparison) = &step.comparison {
        check_comparison(step, comparison, findings);
        let limit = &comparison.limit;
        let is_known =
            is_one(limit) || operands.values().any(|o| o.prints_as(limit)) || is_input(limit.printed.value());
        if !is_known {
            let expected = "the limit 1, or one that stands in the step or in the input";
            findings.push(Finding::of(&step.number, step.result_line, expected, format!("`{limit}`")));
        }
    }
    operands
}

/// `from:` names every symbol once, in order of appearance, and no others.
fn check_names(step: &PrintedStep, placed: &[Placed], findings: &mut Vec<Finding>) {
    let mut known = BTreeSet::new();
    let appear: Vec<&str> =
        placed.iter().map(|placed| placed.symbol.as_str()).filter(|symbol| known.insert(*symbol)).collect();
    let named: Vec<&str> = step.from.iter().map(|(symbol, _)| symbol.as_str()).collect();
    if appear != named {
        let list = |names: &[&str]| if names.is_empty() { "no symbol".to_owned() } else { names.join(", ") };
        let expected = format!("`from:` to name {}, in this order", list(&appear));
        findings.push(Finding::of(&step.number, step.from_line, expected, list(&named)));
    }
}

/// The number of each symbol, which prints the same wherever it appears in the line.
fn gather(step: &PrintedStep, placed: Vec<Placed>, findings: &mut Vec<Finding>) -> BTreeMap<Symbol, PrintedNumber> {
    let mut operands: BTreeMap<Symbol, PrintedNumber> = BTreeMap::new();
    for Placed { symbol, number } in placed {
        match operands.get(&symbol) {
            Some(known) if !known.prints_as(&number) => {
                let expected = format!("`{known}` for {symbol} as before in the line");
                findings.push(Finding::of(&step.number, step.numbers.0, expected, format!("`{number}`")));
            }
            Some(_) => {}
            None => {
                operands.insert(symbol, number);
            }
        }
    }
    operands
}

/// Whether the printed result is what the printed numbers give, within one unit of its last place.
fn closes(step: &PrintedStep, worked: f64, findings: &mut Vec<Finding>) {
    let printed = step.result.printed;
    let unit = printed.unit_of_last_place();
    let dust = DUST * unit + RELATIVE_DUST * printed.value().abs();
    let expected = || {
        let decimals = usize::try_from(2 - printed.place.min(0)).unwrap_or(2).min(20);
        if (1e-3..1e9).contains(&worked.abs()) { format!("{worked:.decimals$}") } else { format!("{worked:.9e}") }
    };
    // Not a number fails here as well.
    let is_close = (worked - printed.value()).abs() <= unit + dust;
    if !is_close {
        let expected = format!("{} {} within 1 unit of the last place", expected(), step.result.unit.text);
        findings.push(Finding::of(&step.number, step.result_line, expected, format!("`{}`", step.result)));
    } else if step.comparison.as_ref().is_some_and(|c| c.is_at_most == c.ok)
        && step.result.unit.text.is_empty()
        && printed.value() < worked - dust
    {
        let expected = format!("{}, rounded up: a utilisation must not look smaller than it is", expected());
        findings.push(Finding::of(&step.number, step.result_line, expected, format!("`{}`", step.result)));
    }
}

/// Whether the relation is true of the printed numbers and the verdict follows from it.
///
/// `≤` goes with `OK` and `>` with `NOT OK`. The other way round stands only against a limit other than 1, where the
/// step's words say `at least`: 1 is the limit of a utilisation.
fn check_comparison(step: &PrintedStep, comparison: &PrintedComparison, findings: &mut Vec<Finding>) {
    let (result, limit) = (&step.result, &comparison.limit);
    let mut find = |expected: String, found: String| {
        findings.push(Finding::of(&step.number, step.result_line, expected, found));
    };
    if result.unit.dimension != limit.unit.dimension {
        find(format!("a limit that is {}", result.unit.dimension), format!("`{limit}`"));
        return;
    }
    let is_within = result.si() <= limit.si() * (1.0 + f64::from(limit.printed.value() > 0.0) * 1e-12);
    let relation = |is_at_most| if is_at_most { '≤' } else { '>' };
    if is_within != comparison.is_at_most {
        find(
            format!("`{result} {} {limit}`", relation(is_within)),
            format!("`{result} {} {limit}`", relation(comparison.is_at_most)),
        );
    }
    let is_utilisation = limit.unit.text.is_empty() && (limit.printed.value() - 1.0).abs() <= 0.0;
    let asks_at_least =
        !is_utilisation && [&step.title, &step.by, &step.note].iter().any(|words| words.contains("at least"));
    let ok = comparison.is_at_most != asks_at_least;
    if ok != comparison.ok {
        let verdict = |ok| if ok { "OK" } else { "NOT OK" };
        find(
            format!("`{} {limit} {}`", relation(comparison.is_at_most), verdict(ok)),
            format!("`{}`", verdict(comparison.ok)),
        );
    }
}

/// Whether a limit is that of a utilisation.
pub(super) fn is_one(limit: &PrintedNumber) -> bool {
    limit.unit.text.is_empty() && limit.printed.place == 0 && limit.printed.count == 1
}
