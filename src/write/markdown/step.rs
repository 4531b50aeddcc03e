//! A step as a fenced block: words, formula in symbols, formula in numbers, result, addresses.
use super::formula_lines::{broken, width};
use super::longest_run;
use crate::document::visible;
use crate::formula::{Operand, Symbol, with_numbers, with_symbols};
use crate::sheet::{Ledger, Step};
use crate::units::Printed;

/// A step, exactly as the sheet's format sets it out.
pub(super) fn write(step: &Step, ledger: &Ledger) -> String {
    let definition = &step.definition;
    let symbol = definition.symbol().as_str();
    let column = width(symbol) + 1;
    let result = ledger.entry(step.result).operand().text();
    let comparison = step.comparison.map_or_else(String::new, |comparison| {
        let limit = format!("{}", comparison.limit).replace('-', "−");
        format!(" {} {limit} {}", comparison.relation(), comparison.verdict())
    });
    let numbers = with_numbers(definition.tree(), &|symbol| operand(step, ledger, symbol));

    let mut lines = vec![line(definition.title())];
    lines.push(broken(symbol, column, &with_symbols(definition.tree())));
    lines.push(broken("", column, &numbers));
    lines.push(format!("{}= {result}{comparison}", " ".repeat(column)));
    if !step.operands.is_empty() {
        let operands = step.operands.iter().map(|(symbol, id)| format!("{symbol} {}", ledger.entry(*id).address));
        lines.push(format!("from: {}", operands.collect::<Vec<_>>().join(" · ")));
    }
    let by = step.methods();
    if !by.is_empty() {
        lines.push(format!("by: {}", line(&by.join(" · "))));
    }
    if let Some(note) = &step.note {
        lines.push(format!("note: {}", line(note)));
    }

    let body = lines.join("\n");
    let fence = "`".repeat((longest_run(&body) + 1).max(3));
    format!("{fence}step {}\n{body}\n{fence}\n", step.number)
}

/// The printed number of a symbol; every symbol of a step's formula has one.
fn operand(step: &Step, ledger: &Ledger, symbol: &Symbol) -> Operand {
    step.operands.iter().find(|(known, _)| known == symbol).map_or_else(
        || Operand { printed: Printed { count: 0, place: 0 }, unit: String::new() },
        |(_, id)| ledger.entry(*id).operand(),
    )
}

/// Words on one line, with nothing in them unseen.
fn line(text: &str) -> String {
    visible(text).split_whitespace().collect::<Vec<_>>().join(" ")
}
