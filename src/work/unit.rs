//! The structure under a single unit force: the virtual state of the unit-load method.
use super::structure::structure;
use super::{CaseLoad, Extremes, MemberForces, Prepared, work_one};
use crate::analysis::{self, Loading, MemberLoading};
use crate::formula::Silent;
use crate::model::{Combination, Model};

/// End forces and forces along every member under a unit force (or couple) on a node; none where it cannot be solved.
///
/// All bars act in both senses: the method holds for the members that carry under the real loads, so it is used only
/// where none is slack.
#[must_use]
pub fn unit_response(
    model: &Model,
    prepared: &Prepared,
    node: usize,
    direction: usize,
) -> Option<(Vec<MemberForces>, Vec<Extremes>)> {
    let mut structure = structure(model, prepared);
    structure.members.iter_mut().for_each(|member| member.tension_only = false);
    let mut loading = Loading {
        nodes: vec![[0.0; 3]; model.nodes.len()],
        members: vec![MemberLoading::default(); model.members.len()],
        settlements: Vec::new(),
    };
    loading.nodes[node][direction] = 1.0;
    let solution = analysis::solve(&structure, &[loading]).ok()?;
    let solved = solution.combinations.first()?;
    let nothing = Combination { name: String::new(), title: None, factors: Vec::new(), purposes: None, implied: true };
    let unloaded = Prepared {
        loads: vec![vec![Vec::<CaseLoad>::new(); model.cases.len()]; model.members.len()],
        ..prepared.clone()
    };
    Some((0..model.members.len()).map(|at| work_one(&mut Silent, model, &unloaded, (at, solved), &nothing)).unzip())
}
