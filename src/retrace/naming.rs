//! What ties lines together by name: steps of one kind give one symbol, a cell named like a step's result agrees with it.
use super::Finding;
use super::package::Package;
use super::results::agree;
use super::step::PrintedStep;
use super::trace::Cell;
use std::collections::{BTreeMap, BTreeSet};

/// Tables that state every force for which there is a step; others may leave cells blank.
const COMPLETE: &[&str] = &["F", "J"];

/// Steps whose number ends alike and whose words are the same are one kind, and give the same symbol.
pub(super) fn check_symbols(package: &Package, findings: &mut Vec<Finding>) {
    let mut kinds: BTreeMap<(&str, &str), BTreeMap<&str, Vec<&PrintedStep>>> = BTreeMap::new();
    for step in &package.steps {
        let kind = step.number.rsplit('.').next().unwrap_or_default();
        let by_symbol = kinds.entry((kind, &step.title)).or_default();
        by_symbol.entry(step.symbol.as_str()).or_default().push(step);
    }
    for by_symbol in kinds.values().filter(|by_symbol| by_symbol.len() > 1) {
        let Some(usual) = by_symbol.iter().max_by_key(|(_, steps)| steps.len()).map(|(symbol, _)| *symbol) else {
            continue;
        };
        for step in by_symbol.iter().filter(|(symbol, _)| **symbol != usual).flat_map(|(_, steps)| steps) {
            let expected = format!("{usual}, as in other steps of this kind");
            findings.push(Finding::of(&step.number, step.symbols.0, expected, step.symbol.as_str()));
        }
    }
}

/// A step of one combination draws on no other combination, though its numbers may print alike.
///
/// Combinations are known by their tables of displacements, `<combination>.U`.
pub(super) fn check_combinations(package: &Package, findings: &mut Vec<Finding>) {
    let ids = package.tables.iter().filter_map(|table| table.id.as_deref());
    let combinations: Vec<&str> = ids.filter_map(|id| id.strip_suffix(".U")).collect();
    let known = |name: &str| combinations.iter().position(|known| *known == name);
    let of_step = |number: &str| match number.split('.').collect::<Vec<_>>().as_slice() {
        [_, combination, _] => known(combination),
        _ => None,
    };
    for step in &package.steps {
        let Some(own) = of_step(&step.number) else { continue };
        for (symbol, address) in &step.from {
            let of_cell = || match address.split('.').collect::<Vec<_>>().as_slice() {
                [combination, _, _, _] => known(combination),
                _ => None,
            };
            if let Some(other) = of_step(address).or_else(of_cell).filter(|other| *other != own) {
                let expected = format!("operands of combination {}", combinations[own]);
                let found = format!("{symbol} of combination {}, {address}", combinations[other]);
                findings.push(Finding::of(&step.number, step.from_line, expected, found));
            }
        }
    }
}

/// A cell `<combination>.<id>.<subject>.<symbol>` agrees with a step of that subject and combination that gives that
/// symbol, where there are such steps.
pub(super) fn check_cells(package: &Package, confirmed: &mut BTreeSet<Cell>, findings: &mut Vec<Finding>) {
    let mut results: BTreeMap<(&str, String), Vec<&PrintedStep>> = BTreeMap::new();
    for step in &package.steps {
        if let Some((owner, _)) = step.number.rsplit_once('.') {
            results.entry((owner, plain(step.symbol.as_str()))).or_default().push(step);
        }
    }
    for (table_at, table) in package.tables.iter().enumerate() {
        let Some((combination, kind)) = table.id.as_deref().and_then(|id| id.rsplit_once('.')) else { continue };
        for (row_at, row) in table.rows.iter().enumerate() {
            let owner = format!("{}.{combination}", row.name);
            for (column_at, (symbol, _)) in table.columns.iter().enumerate() {
                let Some(steps) = results.get(&(owner.as_str(), symbol.clone())) else { continue };
                let number = table.number(row_at, column_at);
                if number.is_none() && !COMPLETE.contains(&kind) {
                    continue;
                }
                let agrees = |step: &&&PrintedStep| number.as_ref().is_some_and(|number| agree(&step.result, number));
                match (steps.iter().find(agrees), steps.first()) {
                    (Some(_), _) => {
                        confirmed.insert((table_at, row_at, column_at));
                    }
                    (None, Some(step)) => {
                        let expected = format!("`{}`, {symbol} of step {}", step.result, step.number);
                        let found = row.cells.get(column_at).map_or("", String::as_str);
                        findings.push(Finding::at(row.line, expected, format!("`{found}`")));
                    }
                    (None, None) => {}
                }
            }
        }
    }
}

/// A symbol as a heading writes it: subscript digits behind an underscore, `N_1` for `N₁`.
fn plain(symbol: &str) -> String {
    let mut plain = String::with_capacity(symbol.len());
    for c in symbol.chars() {
        match c {
            '₀'..='₉' => {
                if !plain.contains('_') {
                    plain.push('_');
                }
                plain.push(char::from(b'0' + (c as u32 - '₀' as u32) as u8));
            }
            _ => plain.push(c),
        }
    }
    plain
}
