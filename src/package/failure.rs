//! Why a structure could not be solved, and what to be careful about where it could, in the user's words.
use crate::analysis::{Failure, Names, Solution};
use crate::diagnostic::{Address, Code, Diagnostic};
use crate::formula::source;
use crate::model::Model;

/// What a failure says of the input: each a fault with its place and its remedy.
pub(super) fn diagnose(model: &Model, failure: &Failure) -> Vec<Diagnostic> {
    let nodes: Vec<String> = model.nodes.iter().map(|n| n.name.clone()).collect();
    let members: Vec<String> = model.members.iter().map(|m| m.name.clone()).collect();
    let combinations: Vec<String> = model.combinations.iter().map(|c| c.name.clone()).collect();
    let names = Names { nodes: &nodes, members: &members, combinations: &combinations };
    let code = match failure {
        Failure::LoadedFreeDirection { .. } => Code::NoStiffness,
        Failure::Untrustworthy { .. } | Failure::Inconsistent { .. } => Code::BeyondArithmetic,
        _ => Code::Mechanism,
    };
    let address = match failure {
        Failure::LoadedFreeDirection { node, .. } => Address::parse(&format!("nodes.{}", nodes[*node])),
        Failure::NoSupport => Address::parse("nodes"),
        _ => Address::parse("supports"),
    };
    // The first sentence says what is so, the last what usually mends it, lines between what else is known.
    let mut sentences: Vec<String> = failure.describe(&names).iter().flat_map(|line| sentences(line)).collect();
    let message = if sentences.is_empty() { String::new() } else { sentences.remove(0) };
    let mut diagnostic = Diagnostic::error(code, address).message(message);
    if let Some(help) = sentences.pop() {
        for note in sentences {
            diagnostic = diagnostic.note(note);
        }
        diagnostic = diagnostic.help(help);
    }
    vec![diagnostic]
}

/// A node that moves further than this, in m, belongs to no structure; forces that go with it could not be printed.
const FURTHEST: f64 = 1e6;

/// The node that moves beyond all measure, if one does.
pub(super) fn out_of_this_world(model: &Model, solution: &Solution) -> Option<Diagnostic> {
    let moves = |movement: &[f64; 3]| movement.iter().any(|part| part.abs() > FURTHEST);
    let (combination, node) = solution
        .combinations
        .iter()
        .enumerate()
        .find_map(|(at, solved)| Some((at, solved.displacements.iter().position(moves)?)))?;
    let (node, combination) = (&model.nodes[node].name, &model.combinations[combination].name);
    let fault = Diagnostic::error(Code::BeyondArithmetic, Address::parse(&format!("nodes.{node}"))).message(format!(
        "node `{node}` would move by more than a thousand kilometres under combination {combination}"
    ));
    Some(fault.label("moves beyond all measure").help("check the loads, the stiffness and the units"))
}

/// Sentences of a text, without the stop at their end.
fn sentences(text: &str) -> Vec<String> {
    text.split(". ")
        .map(|sentence| sentence.trim().trim_end_matches('.').to_owned())
        .filter(|s| !s.is_empty())
        .collect()
}

/// Below this elastic critical load factor first-order results are not enough by themselves.
const FIRST_ORDER_LIMIT: f64 = 10.0;
/// Digits of double precision.
const DIGITS: f64 = 15.95;

/// Cautions about this structure and its solution, worst first.
pub(super) fn cautions(model: &Model, solution: &Solution) -> Vec<String> {
    let mut cautions = Vec::new();
    for (combination, solved) in model.combinations.iter().zip(&solution.combinations) {
        let Some(critical) = &solved.critical else { continue };
        let name = &combination.name;
        if critical.factor <= 1.0 {
            cautions.push(format!(
                "Combination {name}: the elastic critical load factor is {:.3}: the structure buckles before the load is reached. No first-order result of this combination may be used.",
                critical.factor
            ));
        } else if critical.factor < FIRST_ORDER_LIMIT {
            cautions.push(format!(
                "Combination {name}: the elastic critical load factor is {:.2}, below {FIRST_ORDER_LIMIT:.0}. First-order results understate movements and moments; a second-order analysis is needed ({}{}).",
                (critical.factor * 100.0).floor() / 100.0,
                source::FIRST_ORDER.full,
                if source::FIRST_ORDER.recalled { "; recalled" } else { "" },
            ));
        }
    }
    let lost = solution.condition.max(1.0).log10();
    if lost > 8.0 {
        cautions.push(format!(
            "The stiffnesses differ so much that about {lost:.0} of {DIGITS:.0} digits are lost in solving; compare the balances of nodes with care."
        ));
    }
    cautions
}
