//! Movements of nodes again by virtual work.
use super::energy::{dot, free_strains, integral};
use crate::analysis::CombinationSolution;
use crate::catalogue::between::Quantity;
use crate::catalogue::symbol::UNODE;
use crate::formula::{Definition, Scope, Symbol, Tree, Value, Worksheet, source};
use crate::model::{Combination, Model};
use crate::units::Measure;
use crate::work::{Extremes, MemberForces, Prepared};

/// Work of the unit force's reactions on movements of supports that settle or give, with its sign turned: what has to
/// be added to the members' shares.
#[must_use]
pub fn support_share(
    model: &Model,
    solution: &CombinationSolution,
    unit: &[MemberForces],
    node: usize,
    direction: usize,
) -> f64 {
    let mut share = 0.0;
    for support in &model.supports {
        let mut reaction = [0.0; 3];
        if support.node == node {
            reaction[direction] -= 1.0;
        }
        for (member, forces) in model.members.iter().zip(unit) {
            for (end, at) in [member.from, member.to].into_iter().enumerate() {
                if at == support.node {
                    for (sum, force) in reaction.iter_mut().zip(forces.on_joint[end]) {
                        *sum -= force.map_or(0.0, |f| f.si);
                    }
                    if !member.hinge[end] {
                        reaction[2] -= forces.m[end].map_or(0.0, |m| if end == 0 { m.si } else { -m.si });
                    }
                }
            }
        }
        share -= dot(&reaction, &solution.displacements[support.node]);
    }
    share
}

/// Work of the section forces of a combination on the strains of a unit force, member by member: the movement of a
/// node by virtual work.
#[must_use]
pub fn virtual_work(
    prepared: &Prepared,
    model: &Model,
    combination: &Combination,
    real: (&[MemberForces], &[Extremes]),
    unit: (&[MemberForces], &[Extremes]),
) -> Vec<f64> {
    (0..model.members.len())
        .map(|at| {
            let base = &prepared.bases[at];
            let (Some(field), Some(virtual_field)) = (&real.1[at].field, &unit.1[at].field) else { return 0.0 };
            let (free_strain, free_curvature) = free_strains(prepared, at, combination, base);
            let mut work = 0.0;
            if base.axial > 0.0 {
                work += integral(0.0, base.length, field, &|x| {
                    virtual_field.at(Quantity::N, x, true) * (field.at(Quantity::N, x, true) / base.axial + free_strain)
                });
            }
            if base.bending > 0.0 && real.0[at].m[0].is_some() {
                work += integral(0.0, base.length, field, &|x| {
                    virtual_field.at(Quantity::M, x, true)
                        * (field.at(Quantity::M, x, true) / base.bending + free_curvature)
                        + virtual_field.at(Quantity::V, x, true) * field.at(Quantity::V, x, true) / base.shear_rigidity
                });
            }
            work
        })
        .collect()
}

/// Row of the supports' share, beside the members' rows; a member's name holds no such character.
pub const SUPPORTS: &str = "(supports)";

/// The movement of a node by virtual work: each member's share, their sum, and its difference from the movement
/// found first (table `<combination>.K.<node>.<direction>`, steps N91 to N96).
pub fn work_virtual(
    sheet: &mut dyn Worksheet,
    model: &Model,
    combination: &Combination,
    (node, direction): (usize, usize),
    (shares, supports): (&[f64], f64),
    moved: Value,
) {
    let name = &model.nodes[node].name;
    let word = ["x", "y", "r"][direction];
    let measure = if direction == 2 { Measure::Rotation } else { Measure::Length };
    let size = shares.iter().fold(0.0_f64, |most, share| most.max(share.abs()));
    // Members that the unit force does not reach have no share.
    let rows =
        model.members.iter().map(|m| m.name.as_str()).zip(shares.iter().copied()).filter(|(_, share)| *share != 0.0);
    let rows = rows.chain((supports.abs() > 1e-12 * size).then_some((SUPPORTS, supports)));
    let stated: Vec<Value> = rows
        .map(|(row, share)| {
            sheet.stated(format_args!("{}.K.{name}.{word}.{row}.w", combination.name), share, size, measure)
        })
        .collect();
    let mut scope = Scope::new(sheet, name, Some(&combination.name));
    let terms = stated
        .iter()
        .enumerate()
        .map(|(at, value)| {
            let symbol = Symbol::indexed("w", at + 1);
            scope.set(&symbol, *value);
            symbol.tree()
        })
        .collect();
    let symbol = Symbol::new("u_v");
    let title = format!("Movement of the node in {word} by virtual work, members added");
    scope.work(
        'N',
        91 + direction as u16,
        &Definition::new(symbol.clone(), title, measure, Tree::sum(terms)).from(&source::UNIT_LOAD),
    );
    let first = UNODE;
    scope.set(&first, moved);
    let title = format!("Difference of the two movements in {word}");
    let difference =
        Definition::new(Symbol::new("B_u"), title, measure, symbol - first.tree()).from(&source::UNIT_LOAD);
    scope.balance('N', 94 + direction as u16, &difference);
}
