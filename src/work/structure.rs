//! From the worked members and loads to what the solver needs, and its solution.
use super::Prepared;
use crate::analysis::{self, Element, Failure, Loading, MemberLoading, Solution, Structure};
use crate::catalogue::element::stiffness;
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

/// Solves every combination.
///
/// # Errors
/// The structure can move without resistance, a load acts where nothing resists it, slack bars do not settle, or
/// the numbers cannot be trusted.
pub fn solve(model: &Model, prepared: &Prepared) -> Result<Solution, Failure> {
    analysis::solve(&structure(model, prepared), &loadings(model, prepared))
}
