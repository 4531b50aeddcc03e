//! Loads and reactions of the whole structure about the global origin (steps R).
use super::factor::times_factor;
use super::node::AllLoads;
use super::{NodeBalance, factor, node_load};
use crate::formula::{Definition, Scope, Symbol, Tree, Value, Worksheet, source};
use crate::model::{Action, Combination, LoadCase, Model};
use crate::units::Measure;

/// The subject of these steps.
pub const WHOLE: &str = "structure";

const WORDS: [&str; 3] = ["in global X", "in global Y", "about the global origin"];

const fn measure(direction: usize) -> Measure {
    if direction == 2 { Measure::Moment } else { Measure::Force }
}

/// A term of a sum with the symbols it brings.
type Term = (Tree, Vec<(Symbol, Value)>);

/// What a load case asks for: its resultant and its moment about the global origin.
pub fn work_case_total(
    sheet: &mut dyn Worksheet,
    model: &Model,
    (index, case): (usize, &LoadCase),
    loads: &AllLoads,
) -> [Option<Value>; 3] {
    let mut parts: [Vec<Term>; 3] = Default::default();
    let mut count = 0;
    for of_member in loads {
        for load in &of_member[index] {
            for (direction, parts) in parts.iter_mut().enumerate() {
                if let Some(value) = load.worked.resultant[direction] {
                    count += 1;
                    let symbol = Symbol::indexed("F", count);
                    parts.push((symbol.tree(), vec![(symbol, value)]));
                }
            }
        }
    }
    for load in &case.loads {
        let Action::Node { node, forces } = &load.acts else { continue };
        let at = &model.nodes[*node];
        let mut values = [None; 3];
        for (direction, size) in forces.iter().enumerate().filter(|(_, size)| **size != 0.0) {
            let value = node_load(sheet, &case.name, load.entry, direction, *size);
            count += 1;
            let symbol = Symbol::indexed("P", count);
            parts[direction].push((symbol.tree(), vec![(symbol, value)]));
            values[direction] = Some(value);
        }
        for (direction, key, si, minus) in [(1, "x", at.x, false), (0, "y", at.y, true)] {
            if let Some(force) = values[direction]
                && si != 0.0
            {
                let arm = sheet.input(format_args!("INPUT.nodes.{}.{key}", at.name), si, Measure::Span);
                count += 1;
                let (force_symbol, arm_symbol) = (Symbol::indexed("P", count), Symbol::indexed("l", count));
                let tree = arm_symbol.clone() * force_symbol.clone();
                let tree = if minus { -tree } else { tree };
                parts[2].push((tree, vec![(force_symbol, force), (arm_symbol, arm)]));
            }
        }
    }
    let mut scope = Scope::new(sheet, WHOLE, Some(&case.name));
    let mut totals = [None; 3];
    for (direction, parts) in parts.into_iter().enumerate() {
        if parts.is_empty() {
            continue;
        }
        let mut terms = Vec::new();
        for (tree, known) in parts {
            known.iter().for_each(|(symbol, value)| scope.set(symbol, *value));
            terms.push(tree);
        }
        let symbol = Symbol::new(["A_x", "A_y", "A_m"][direction]);
        let title = format!("Load of the case, as asked for, {}", WORDS[direction]);
        let definition = Definition::new(symbol, title, measure(direction), Tree::sum(terms)).from(&source::STATICS);
        totals[direction] = Some(scope.work('R', 41 + direction as u16, &definition));
    }
    totals
}

/// What a combination asks for, what the supports return, and what is left over.
#[derive(Debug, Clone, Copy, Default)]
pub struct Balance {
    /// Loads asked for.
    pub asked: [Option<Value>; 3],
    /// Reactions.
    pub returned: [Option<Value>; 3],
    /// Their sum.
    pub left_over: [Option<Value>; 3],
}

/// Works the balance of the whole under a combination.
pub fn work_whole(
    sheet: &mut dyn Worksheet,
    model: &Model,
    combination: &Combination,
    totals: &[[Option<Value>; 3]],
    nodes: &[NodeBalance],
) -> Balance {
    let factors: Vec<_> = combination
        .factors
        .iter()
        .filter(|(_, size)| *size != 0.0)
        .map(|(case, size)| (*case, factor(sheet, model, combination, *case, *size)))
        .collect();
    let arms: Vec<[Option<Value>; 2]> = model
        .nodes
        .iter()
        .zip(nodes)
        .map(|(node, balance)| {
            let mut arm = |has: bool, key: &str, si: f64| {
                (has && si != 0.0)
                    .then(|| sheet.input(format_args!("INPUT.nodes.{}.{key}", node.name), si, Measure::Span))
            };
            [arm(balance.reaction[1].is_some(), "x", node.x), arm(balance.reaction[0].is_some(), "y", node.y)]
        })
        .collect();
    let mut scope = Scope::new(sheet, WHOLE, Some(&combination.name));
    let mut out = Balance::default();
    for direction in 0..3 {
        let mut terms = Vec::new();
        for (at, (case, gamma)) in factors.iter().enumerate() {
            let Some(total) = totals[*case][direction] else { continue };
            let part = Symbol::indexed("A", at + 1);
            scope.set(&part, total);
            terms.push(times_factor(&mut scope, at + 1, *gamma, part));
        }
        let symbols =
            [["A_x", "A_y", "A_m"], ["R_X", "R_Y", "R_M"], ["B_X", "B_Y", "B_M"]].map(|s| Symbol::new(s[direction]));
        if !terms.is_empty() {
            let title = format!("Loads of the combination, as asked for, {}", WORDS[direction]);
            let definition =
                Definition::new(symbols[0].clone(), title, measure(direction), Tree::sum(terms)).from(&source::STATICS);
            out.asked[direction] = Some(scope.work('R', 1 + direction as u16, &definition));
        }
        let terms = reaction_terms(&mut scope, nodes, &arms, direction);
        if !terms.is_empty() {
            let title = format!("Reactions {}", WORDS[direction]);
            let definition =
                Definition::new(symbols[1].clone(), title, measure(direction), Tree::sum(terms)).from(&source::STATICS);
            out.returned[direction] = Some(scope.work('R', 11 + direction as u16, &definition));
        }
        let parts: Vec<Tree> = [(out.asked[direction], &symbols[0]), (out.returned[direction], &symbols[1])]
            .into_iter()
            .filter_map(|(value, symbol)| value.map(|_| symbol.tree()))
            .collect();
        if !parts.is_empty() {
            let title = format!("Loads and reactions together {}", WORDS[direction]);
            let definition =
                Definition::new(symbols[2].clone(), title, measure(direction), Tree::sum(parts)).from(&source::STATICS);
            out.left_over[direction] = Some(scope.balance('R', 21 + direction as u16, &definition));
        }
    }
    out
}

fn reaction_terms(
    scope: &mut Scope<'_>,
    nodes: &[NodeBalance],
    arms: &[[Option<Value>; 2]],
    direction: usize,
) -> Vec<Tree> {
    let mut terms = Vec::new();
    for (at, balance) in nodes.iter().enumerate() {
        if let Some(value) = balance.reaction[direction] {
            let symbol = Symbol::indexed("R", at + 1);
            let symbol = if direction == 2 { Symbol::indexed("C", at + 1) } else { symbol };
            scope.set(&symbol, value);
            terms.push(symbol.tree());
        }
        if direction == 2 {
            for (force, arm, stems, minus) in [
                (balance.reaction[1], arms[at][0], ["V", "x"], false),
                (balance.reaction[0], arms[at][1], ["H", "y"], true),
            ] {
                if let (Some(force), Some(arm)) = (force, arm) {
                    let (force_symbol, arm_symbol) =
                        (Symbol::indexed(stems[0], at + 1), Symbol::indexed(stems[1], at + 1));
                    scope.set(&force_symbol, force);
                    scope.set(&arm_symbol, arm);
                    let tree = arm_symbol * force_symbol.tree();
                    terms.push(if minus { -tree } else { tree });
                }
            }
        }
    }
    terms
}
