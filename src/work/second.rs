//! Second answers by another theory: work and energy, simple-span bounds, unit loads.
//!
//! They use statics, energy and beam tables where the first answer used stiffness, so that they catch what working
//! the same formulas again cannot.
use super::extreme::Extremes;
use super::{MemberBase, MemberForces, NodeBalance, Prepared};
use crate::analysis::CombinationSolution;
use crate::catalogue::between::{Field, Quantity};
use crate::catalogue::load::Local;
use crate::catalogue::symbol::{BB, BV, L, M1, M2};
use crate::formula::{Definition, Scope, Symbol, Tree, Value, Worksheet, source};
use crate::model::{Action, Combination, Member, Model};
use crate::units::Measure;

/// Half the work of loads and reactions, strain energy, half the work on free strains, N·m.
#[derive(Debug, Clone, Copy, Default, PartialEq)]
pub struct Energy {
    /// ½·Σ force·movement of loads and reactions.
    pub external: f64,
    /// ½·∫(N²/EA + M²/EI + V²/GA_v).
    pub strain: f64,
    /// ½·∫(N·ε_free + M·κ_free): warming and lack of fit.
    pub free: f64,
}

/// Works the energy of a combination from movements on one side and from section forces on the other.
#[must_use]
pub fn energy(
    model: &Model,
    prepared: &Prepared,
    combination: &Combination,
    solution: &CombinationSolution,
    (forces, extremes, nodes): (&[MemberForces], &[Extremes], &[NodeBalance]),
) -> Energy {
    let mut energy = Energy::default();
    for (node, balance) in nodes.iter().enumerate() {
        for direction in 0..3 {
            energy.external +=
                balance.reaction[direction].map_or(0.0, |r| r.si) * solution.displacements[node][direction] / 2.0;
        }
    }
    for (case, factor) in &combination.factors {
        for load in &model.cases[*case].loads {
            if let Action::Node { node, forces } = &load.acts {
                energy.external += factor * dot(forces, &solution.displacements[*node]) / 2.0;
            }
        }
        for (at, member) in model.members.iter().enumerate() {
            for load in &prepared.loads[at][*case] {
                for (end, node) in [member.from, member.to].into_iter().enumerate() {
                    let share = load.worked.share[end].map(|v| v.map_or(0.0, |v| v.si));
                    energy.external += factor * dot(&share, &solution.displacements[node]) / 2.0;
                }
            }
        }
    }
    for (at, member) in model.members.iter().enumerate() {
        if let Some(field) = &extremes[at].field
            && !solution.members[at].slack
        {
            of_member(&mut energy, prepared, combination, solution, (at, member), &forces[at], field);
        }
    }
    energy
}

fn dot(a: &[f64; 3], b: &[f64; 3]) -> f64 {
    a.iter().zip(b).map(|(a, b)| a * b).sum()
}

/// Integrates one member between its ends, load by load, by Gauss points that are exact for its polynomials.
#[allow(clippy::too_many_arguments, reason = "one member's share of every part of the energy")]
fn of_member(
    energy: &mut Energy,
    prepared: &Prepared,
    combination: &Combination,
    solution: &CombinationSolution,
    (at, member): (usize, &Member),
    forces: &MemberForces,
    field: &Field,
) {
    let base = &prepared.bases[at];
    let [c, s] = base.direction;
    let start = solution.displacements[member.from];
    let end = solution.displacements[member.to];
    let (u1, v1) = (c * start[0] + s * start[1], c * start[1] - s * start[0]);
    let v2 = c * end[1] - s * end[0];
    let chord = (v2 - v1) / base.length;
    let bends = base.bending > 0.0 && forces.m[0].is_some();
    let (free_strain, free_curvature) = free_strains(prepared, at, combination, base);
    let stretches_itself = base.axial > 0.0;
    let axial_strain = |x: f64| if stretches_itself { field.at(Quantity::N, x, true) / base.axial } else { 0.0 };
    // Movement along the member from its start: the strain summed.
    let along = |x: f64| u1 + integral(0.0, x, field, &|x| axial_strain(x) + free_strain);
    let across = |x: f64| v1 + chord * x + if bends { field.at(Quantity::Deflection, x, true) } else { 0.0 };
    let turned = |x: f64| {
        let start_turn = forces.start_rotation.map_or(0.0, |t| t.si) + chord;
        start_turn + integral(0.0, x, field, &|x| field.at(Quantity::M, x, true) / base.bending + free_curvature)
    };
    for (case, factor) in &combination.factors {
        for load in &prepared.loads[at][*case] {
            let half = factor / 2.0;
            match &load.worked.local {
                Some(Local::Line { a, b, along: wx, across: wy }) => {
                    let (a, b) = (a.map_or(0.0, |v| v.si), b.map_or(base.length, |v| v.si));
                    let intensity =
                        |pair: &[Value; 2], x: f64| pair[0].si + (pair[1].si - pair[0].si) * (x - a) / (b - a);
                    if let Some(pair) = wy {
                        energy.external += half * integral(a, b, field, &|x| intensity(pair, x) * across(x));
                    }
                    if let Some(pair) = wx {
                        energy.external += half * integral(a, b, field, &|x| intensity(pair, x) * along(x));
                    }
                }
                Some(Local::Point { a, along: px, across: py }) => {
                    energy.external += half * py.map_or(0.0, |p| p.si * across(a.si));
                    energy.external += half * px.map_or(0.0, |p| p.si * along(a.si));
                }
                Some(Local::Couple { a, m }) => energy.external += half * m.si * turned(a.si),
                Some(Local::Curvature(_)) | None => {}
            }
        }
    }
    if stretches_itself {
        energy.strain +=
            integral(0.0, base.length, field, &|x| field.at(Quantity::N, x, true).powi(2)) / base.axial / 2.0;
        energy.free += integral(0.0, base.length, field, &|x| field.at(Quantity::N, x, true)) * free_strain / 2.0;
    }
    if bends {
        energy.strain +=
            integral(0.0, base.length, field, &|x| field.at(Quantity::M, x, true).powi(2)) / base.bending / 2.0;
        energy.free += integral(0.0, base.length, field, &|x| field.at(Quantity::M, x, true)) * free_curvature / 2.0;
        if base.shear_rigidity.is_finite() {
            energy.strain += integral(0.0, base.length, field, &|x| field.at(Quantity::V, x, true).powi(2))
                / base.shear_rigidity
                / 2.0;
        }
    }
}

/// Uniform free strain and free curvature of a member under a combination.
fn free_strains(prepared: &Prepared, at: usize, combination: &Combination, base: &MemberBase) -> (f64, f64) {
    let (mut strain, mut curvature) = (0.0, 0.0);
    for (case, factor) in &combination.factors {
        for load in &prepared.loads[at][*case] {
            if load.worked.is_strain() {
                strain -= factor * load.worked.fixed[0].map_or(0.0, |n| n.si) / base.axial.max(f64::MIN_POSITIVE);
                if let Some(Local::Curvature(free)) = &load.worked.local {
                    curvature += factor * free.si;
                }
            }
        }
    }
    (strain, curvature)
}

/// An integral over part of a member, stretch by stretch, exact for polynomials up to the eleventh power.
fn integral(from: f64, to: f64, field: &Field, of: &dyn Fn(f64) -> f64) -> f64 {
    // Gauss–Legendre, six points (M. Abramowitz, I. Stegun, Handbook of Mathematical Functions, Table 25.4; recalled).
    const POINTS: [(f64, f64); 3] = [
        (0.238_619_186_083_196_9, 0.467_913_934_572_691_05),
        (0.661_209_386_466_264_5, 0.360_761_573_048_138_6),
        (0.932_469_514_203_152, 0.171_324_492_379_170_36),
    ];
    let mut places: Vec<f64> = field.places().into_iter().filter(|x| *x > from && *x < to).collect();
    places.insert(0, from);
    places.push(to);
    places
        .windows(2)
        .map(|pair| {
            let (middle, half) = (f64::midpoint(pair[0], pair[1]), (pair[1] - pair[0]) / 2.0);
            half * POINTS
                .iter()
                .map(|(x, weight)| weight * (of(middle - half * x) + of(middle + half * x)))
                .sum::<f64>()
        })
        .sum()
}

/// Writes the energy of a combination down (step R31).
pub fn work_energy(sheet: &mut dyn Worksheet, combination: &str, energy: &Energy) -> [Value; 4] {
    let size = energy.external.abs().max(energy.strain.abs()).max(energy.free.abs());
    let mut state =
        |row: &str, si: f64| sheet.stated(format_args!("{combination}.W.{row}.E"), si, size, Measure::Energy);
    let stated = [state("external", energy.external), state("strain", energy.strain), state("free", energy.free)];
    let [external, strain, free] = ["E_e", "E_s", "E_f"].map(Symbol::new);
    let tree = external.clone() - strain.tree() - free.tree();
    let definition = Definition::new(
        Symbol::new("B_E"),
        "External work less strain energy and work on free strains",
        Measure::Energy,
        tree,
    )
    .from(&source::UNIT_LOAD);
    let mut scope = Scope::new(sheet, super::WHOLE, Some(combination));
    for (symbol, value) in [(&external, stated[0]), (&strain, stated[1]), (&free, stated[2])] {
        scope.set(symbol, value);
    }
    let left_over = scope.balance('R', 31, &definition);
    [stated[0], stated[1], stated[2], left_over]
}

/// Moment of a member against the sum of what each load would give on a simple span (steps X61, X62).
///
/// Where every load spans the member or is a point force the sum is of w·L²/8 and P·a·b/L; any other load counts as
/// if it stood at mid-span, W·L/4. The sum is an upper bound of the simple-span moment.
pub fn work_bound(
    sheet: &mut dyn Worksheet,
    member: &Member,
    combination: &Combination,
    loads: &[super::FactoredLoad<'_>],
    forces: &MemberForces,
    extremes: &Extremes,
) {
    let Some(peak) = extremes.moment.filter(|peak| peak.value.si != 0.0) else { return };
    let mut scope = Scope::new(sheet, &member.name, Some(&combination.name));
    scope.inherit(&forces.known);
    let mut terms = Vec::new();
    for (gamma, size, load) in loads {
        let Some(local) = load.worked.local.filter(|_| *size != 0.0) else { continue };
        let at = terms.len() + 1;
        let mut known = |stem: &str, value: Value| {
            let symbol = Symbol::indexed(stem, at);
            scope.set(&symbol, value);
            symbol
        };
        let term = match local {
            Local::Line { a: None, b: None, across: Some([first, last]), .. } if first == last => {
                Some(known("p", first).tree().absolute() * L.squared() / 8)
            }
            Local::Line { across: Some([first, last]), a, b, .. } => {
                let (first, last) = (known("p", first), known("q", last));
                let reach = match (a, b) {
                    (Some(a), Some(b)) => {
                        let (a, b) = (known("a", a), known("b", b));
                        b - a.tree()
                    }
                    _ => L.tree(),
                };
                let largest = Tree::Max(vec![first.tree().absolute(), last.tree().absolute()]);
                Some(largest * reach * L / 4)
            }
            Local::Point { a, across: Some(p), .. } => {
                let (p, a) = (known("P", p), known("a", a));
                Some(p.tree().absolute() * a.clone() * (L - a.tree()) / L)
            }
            _ => None,
        };
        let Some(term) = term else { continue };
        terms.push(match gamma {
            Some(gamma) => {
                let symbol = Symbol::indexed("γ", at);
                scope.set(&symbol, *gamma);
                symbol.tree().absolute() * term
            }
            None => term,
        });
    }
    if terms.is_empty() {
        return;
    }
    let bound = Symbol::new("M_o");
    let title = "Order of magnitude: simple-span moments of the loads one by one, added";
    scope.work(
        'X',
        61,
        &Definition::new(bound.clone(), title, Measure::Moment, Tree::sum(terms)).from(&source::STATICS),
    );
    let largest = Symbol::new("M_max");
    scope.set(&largest, peak.value);
    let title = "Largest moment over that order of magnitude";
    let ratio = scope.work(
        'X',
        62,
        &Definition::new(Symbol::new("ρ_M"), title, Measure::Number, largest.tree().absolute() / bound)
            .from(&source::STATICS),
    );
    if ratio.si > 1.0 {
        scope.sheet().remark(None, Some("Above 1: the moment comes from the ends, not from the loads between them; see that sway or overhang explains it."));
    } else if ratio.si < 0.5 {
        scope.sheet().remark(
            None,
            Some("Below 0.5: the ends take most of the load's moment, or loads of both senses stand on the member."),
        );
    }
}

/// The deflection again by unit load on a simple span, from the end moments and the loads (steps X71, X72).
///
/// # Source
/// With the unit force at x of a simple span L, b = L − x: ∫m·M gives x·b·(L + b)/(6L) for M₁, x·b·(L + x)/(6L) for
/// M₂; a uniform load gives x(L³ − 2Lx² + x³)/24, a force at a, beyond x, x(L − a)(L² − (L − a)² − x²)/(6L).
pub fn work_unit_load(
    sheet: &mut dyn Worksheet,
    member: &Member,
    combination: &Combination,
    loads: &[super::FactoredLoad<'_>],
    forces: &MemberForces,
    extremes: &Extremes,
) {
    let Some(peak) = extremes.deflection.filter(|peak| peak.value.si != 0.0 && peak.value.id != u32::MAX) else {
        return;
    };
    let mut scope = Scope::new(sheet, &member.name, Some(&combination.name));
    scope.inherit(&forces.known);
    if scope.get(&BV).is_some() {
        // The simple-span formulas know no shear deformation.
        return;
    }
    let x = Symbol::new("x_v");
    let Some(place) = extremes.deflection_place else { return };
    scope.set(&x, place);
    let x = || x.tree();
    let rest = || L - x();
    let mut terms = vec![-(M1 * x() * rest() * (L + rest()) / (6 * L)), -(M2 * x() * rest() * (L + x()) / (6 * L))];
    let mut free = Vec::new();
    for (at, (gamma, size, load)) in loads.iter().enumerate() {
        let Some(local) = load.worked.local.filter(|_| *size != 0.0) else { continue };
        let index = at + 1;
        let mut known = |stem: &str, value: Value| {
            let symbol = Symbol::indexed(stem, index);
            scope.set(&symbol, value);
            symbol
        };
        let (term, is_free) = match local {
            Local::Line { a: None, b: None, across: Some([first, last]), .. } if first == last => {
                (known("p", first) * x() * (L.cubed() - 2 * L * x().squared() + x().cubed()) / 24, false)
            }
            Local::Point { a, across: Some(p), .. } => {
                let beyond = a.si >= place.si;
                let (p, a) = (known("P", p), known("a", a));
                let back = || L - a.tree();
                let term = if beyond {
                    p * x() * back() * (L.squared() - back().squared() - x().squared()) / (6 * L)
                } else {
                    p * rest() * a.clone() * (L.squared() - a.squared() - rest().squared()) / (6 * L)
                };
                (term, false)
            }
            Local::Curvature(curvature) => (-(known("κ_T", curvature) * x() * rest() / 2), true),
            Local::Line { across: None, .. } | Local::Point { across: None, .. } => continue,
            // Loads over a part and couples have no short formula here.
            _ => return,
        };
        let term = match gamma {
            Some(gamma) => {
                let symbol = Symbol::indexed("γ", index);
                scope.set(&symbol, *gamma);
                symbol * term
            }
            None => term,
        };
        if is_free { free.push(term) } else { terms.push(term) }
    }
    let mut all = vec![Tree::sum(terms) / BB];
    all.extend(free);
    let symbol = Symbol::new("v_u");
    let title = "The same deflection by a unit load on a simple span";
    scope.work(
        'X',
        71,
        &Definition::new(symbol.clone(), title, Measure::Length, Tree::sum(all)).from(&source::UNIT_LOAD),
    );
    let first = Symbol::new("v_x");
    scope.set(&first, peak.value);
    let difference = Definition::new(
        Symbol::new("B_v"),
        "Difference of the two deflections",
        Measure::Length,
        symbol - first.tree(),
    )
    .from(&source::UNIT_LOAD);
    scope.balance('X', 72, &difference);
}

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
                    for axis in 0..2 {
                        reaction[axis] -= forces.on_joint[end][axis].map_or(0.0, |f| f.si);
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
    shares: &[f64],
    moved: Value,
) {
    let name = &model.nodes[node].name;
    let word = ["x", "y", "r"][direction];
    let measure = if direction == 2 { Measure::Rotation } else { Measure::Length };
    let size = shares.iter().fold(0.0_f64, |most, share| most.max(share.abs()));
    let stated: Vec<Value> = model
        .members
        .iter()
        .zip(shares)
        .map(|(member, share)| {
            sheet.stated(format_args!("{}.K.{name}.{word}.{}.w", combination.name, member.name), *share, size, measure)
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
    let first = Symbol::new("u");
    scope.set(&first, moved);
    let title = format!("Difference of the two movements in {word}");
    let difference =
        Definition::new(Symbol::new("B_u"), title, measure, symbol - first.tree()).from(&source::UNIT_LOAD);
    scope.balance('N', 94 + direction as u16, &difference);
}

#[cfg(test)]
mod tests {
    use super::*;
    use crate::catalogue::between::Ends;

    /// ∫₀² x⁵ dx = 64/6, by hand.
    #[test]
    fn integration_is_exact_for_polynomials() {
        let field = Field::new(&Ends { length: 2.0, ..Ends::default() }, &[]);
        assert!((integral(0.0, 2.0, &field, &|x| x.powi(5)) - 64.0 / 6.0).abs() < 1e-12);
    }
}
