//! From the worked members and loads to what the solver needs, and its solution.
use super::{Prepared, work_one};
use crate::analysis::{self, Element, Failure, Loading, MemberLoading, Solution, Structure};
use crate::catalogue::between::{Field, Quantity};
use crate::catalogue::element::stiffness;
use crate::formula::Silent;
use crate::model::{Action, MemberKind, Model};

/// Numbers of the structure for the solver.
#[must_use]
pub fn structure(model: &Model, prepared: &Prepared) -> Structure {
    let members = model
        .members
        .iter()
        .zip(&prepared.bases)
        .map(|(member, base)| {
            let inertia = prepared.sections[member.section].inertia.map(|v| v.si);
            let modulus = model.materials[member.material].modulus;
            Element {
                kind: member.kind,
                from: member.from,
                to: member.to,
                hinge: member.hinge,
                tension_only: member.tension_only,
                stiffness: stiffness(member.kind, base.length, base.axial, base.bending, base.shear),
                axial_rigidity: base.axial,
                bending_rigidity: inertia.map(|i| i * modulus),
                shear_flexibility: base.shear,
            }
        })
        .collect();
    Structure { nodes: model.nodes.iter().map(|n| [n.x, n.y]).collect(), supports: model.supports.clone(), members }
}

/// Factored loads of every combination.
#[must_use]
pub fn loadings(model: &Model, prepared: &Prepared) -> Vec<Loading> {
    model
        .combinations
        .iter()
        .map(|combination| {
            let mut loading = Loading {
                nodes: vec![[0.0; 3]; model.nodes.len()],
                members: vec![MemberLoading::default(); model.members.len()],
                settlements: Vec::new(),
            };
            for (case_index, factor) in &combination.factors {
                for (at, member) in model.members.iter().enumerate() {
                    for load in &prepared.loads[at][*case_index] {
                        add_member_load(&mut loading, at, [member.from, member.to], member.kind, *factor, &load.worked);
                    }
                }
                for load in &model.cases[*case_index].loads {
                    match &load.acts {
                        Action::Node { node, forces } => {
                            for (sum, force) in loading.nodes[*node].iter_mut().zip(forces) {
                                *sum += factor * force;
                            }
                        }
                        Action::Settle { node, movement } => {
                            loading.settlements.push((*node, movement.map(|m| factor * m.unwrap_or(0.0))));
                        }
                        Action::Member { .. } => {}
                    }
                }
            }
            loading
        })
        .collect()
}

/// Equivalent loads are the fixed-end actions turned round.
fn add_member_load(
    loading: &mut Loading,
    at: usize,
    nodes: [usize; 2],
    kind: MemberKind,
    factor: f64,
    worked: &crate::catalogue::load::Worked,
) {
    let [n1, n2, v1, v2, m1, m2, middle] = worked.fixed.map(|v| factor * v.map_or(0.0, |v| v.si));
    // A three-node bar's end strains carry half of the middle's load between them (see the element).
    let share = if kind == MemberKind::Bar3 { middle / 4.0 } else { 0.0 };
    let equivalent = [n1 + share, -v1, m1, share - n2, v2, -m2, middle];
    let member = &mut loading.members[at];
    let of_kind = if worked.is_strain() { &mut member.strains } else { &mut member.forces };
    for (sum, part) in of_kind.iter_mut().zip(equivalent) {
        *sum += part;
    }
    member.fixed_axial[0] += n1;
    member.fixed_axial[1] += n2;
    for (end, node) in nodes.into_iter().enumerate() {
        for (sum, part) in loading.nodes[node].iter_mut().zip(worked.share[end]) {
            *sum += factor * part.map_or(0.0, |v| v.si);
        }
    }
}

/// Above this number of equations the critical load is worked only where it is checked: it costs far more than the
/// solution itself.
const LARGE: usize = 4000;

/// Solves every combination and finds its elastic critical load.
///
/// # Errors
/// The structure can move without resistance, a load acts where nothing resists it, slack bars do not settle, or
/// the numbers cannot be trusted.
pub fn solve(model: &Model, prepared: &Prepared) -> Result<Solution, Failure> {
    let structure = structure(model, prepared);
    let mut solution = analysis::solve(&structure, &loadings(model, prepared))?;
    if solution.equations > LARGE && model.checks.stability.is_none() {
        return Ok(solution);
    }
    for (at, combination) in model.combinations.iter().enumerate() {
        let solved = &solution.combinations[at];
        let axial: Vec<Vec<(f64, f64)>> = (0..model.members.len())
            .map(|member| {
                let (_, extremes) = work_one(&mut Silent, model, prepared, (member, solved), combination);
                extremes.field.map_or_else(Vec::new, |field| axial_force(&field))
            })
            .collect();
        let slack: Vec<bool> = solved.members.iter().map(|m| m.slack).collect();
        solution.combinations[at].critical = analysis::critical_load(&structure, &axial, &slack)?;
    }
    Ok(solution)
}

/// The axial force along a member as straight lines: exact but where an axial load varies along it. There short
/// chords stand in for the curve, each raised so that it has the curve's mean.
fn axial_force(field: &Field) -> Vec<(f64, f64)> {
    const CHORDS: usize = 16;
    let places = field.places();
    let mut points = Vec::new();
    for pair in places.windows(2) {
        let length = pair[1] - pair[0];
        let value = |x: f64, after: bool| field.at(Quantity::N, x, after);
        let bulge = |from: f64, to: f64| {
            let ends = f64::midpoint(value(from, true), value(to, false));
            value(f64::midpoint(from, to), true) - ends
        };
        let size = value(pair[0], true).abs().max(value(pair[1], false).abs());
        let straight = bulge(pair[0], pair[0] + length / 2.0).abs().max(bulge(pair[0], pair[1]).abs()) <= 1e-9 * size;
        let chords = if straight { 1 } else { CHORDS };
        for at in 0..chords {
            let from = pair[0] + length * at as f64 / chords as f64;
            // The last chord ends where the next part begins, to the last bit.
            let to = if at + 1 == chords { pair[1] } else { pair[0] + length * (at + 1) as f64 / chords as f64 };
            // A parabola lies above its chord by two thirds of its bulge on the mean.
            let raise = if straight { 0.0 } else { 2.0 / 3.0 * bulge(from, to) };
            points.push((from, value(from, true) + raise));
            points.push((to, value(to, false) + raise));
        }
    }
    points
}
