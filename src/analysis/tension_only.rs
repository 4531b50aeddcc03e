//! Bars that carry no compression: which of them are slack under a combination.
use super::failure::Failure;
use super::solve::Solver;
use super::structure::Loading;
use std::collections::BTreeSet;

/// Compression below this part of the largest force counts as none.
const TOLERANCE: f64 = 1e-9;

/// Movements with one set of slack bars.
#[derive(Debug, Clone)]
pub(super) struct State {
    /// Per member.
    pub(super) slack: Vec<bool>,
    /// Movements of all slots.
    pub(super) values: Vec<f64>,
    /// Mean axial force of each tension-only bar as if it were taut.
    pub(super) axial: Vec<f64>,
}

/// Finds the set of slack bars that agrees with itself, beginning with all bars taut.
///
/// Every bar that contradicts its state is changed at once; where that leaves a mechanism, the worst one that can be
/// changed. If a set comes back, only the first contradicting bar is changed from then on: the least-index rule, which
/// cannot go round in circles while the structure stays stable.
///
/// # Source
/// K. G. Murty, Linear Complementarity, Linear and Nonlinear Programming, chapter on principal pivoting (recalled).
pub(super) fn settle(solver: &mut Solver<'_>, combination: usize, loading: &Loading) -> Result<State, Failure> {
    let bars: Vec<usize> = (0..solver.structure.members.len())
        .filter(|member| solver.structure.members[*member].tension_only && solver.structure.members[*member].is_bar())
        .collect();
    let mut state = solver.attempt(combination, loading, &vec![false; solver.structure.members.len()])?;
    let mut met = BTreeSet::from([state.slack.clone()]);
    let mut one_by_one = false;
    for _ in 0..20 + 10 * bars.len() {
        let mut wrong = contradictions(&state, &bars, loading);
        if wrong.is_empty() {
            return Ok(state);
        }
        if one_by_one {
            state = change_one(solver, combination, loading, &state, &wrong)?;
            continue;
        }
        let together = changed(&state.slack, &wrong);
        let next = match solver.attempt(combination, loading, &together) {
            Ok(next) => next,
            Err(_) => {
                wrong.sort_by(|a, b| state.axial[*b].abs().total_cmp(&state.axial[*a].abs()).then(a.cmp(b)));
                change_one(solver, combination, loading, &state, &wrong)?
            }
        };
        one_by_one = !met.insert(next.slack.clone());
        state = next;
    }
    Err(Failure::TensionOnlyUnsettled { combination, members: contradictions(&state, &bars, loading) })
}

/// Taut bars in compression and slack bars that would be in tension.
fn contradictions(state: &State, bars: &[usize], loading: &Loading) -> Vec<usize> {
    let largest_load = loading.nodes.iter().flatten().fold(0.0, |most: f64, value| most.max(value.abs()));
    let fixed = bars.iter().flat_map(|bar| loading.members[*bar].fixed_axial);
    let largest = fixed.chain(state.axial.iter().copied()).fold(largest_load, |most, value| most.max(value.abs()));
    let contradicts = |bar: &usize| {
        let force = state.axial[*bar];
        if state.slack[*bar] { force > TOLERANCE * largest } else { force < -TOLERANCE * largest }
    };
    bars.iter().copied().filter(contradicts).collect()
}

/// Changes the first bar of the list whose change leaves a structure that can be solved.
fn change_one(
    solver: &mut Solver<'_>,
    combination: usize,
    loading: &Loading,
    state: &State,
    wrong: &[usize],
) -> Result<State, Failure> {
    let mut first_failure = None;
    for bar in wrong {
        match solver.attempt(combination, loading, &changed(&state.slack, &[*bar])) {
            Ok(next) => return Ok(next),
            Err(failure) => {
                first_failure.get_or_insert(failure);
            }
        }
    }
    Err(first_failure.unwrap_or(Failure::TensionOnlyUnsettled { combination, members: wrong.to_vec() }))
}

fn changed(slack: &[bool], bars: &[usize]) -> Vec<bool> {
    let mut changed = slack.to_vec();
    for bar in bars {
        changed[*bar] = !changed[*bar];
    }
    changed
}
