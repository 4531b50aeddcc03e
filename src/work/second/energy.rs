//! External work against strain energy.
use crate::analysis::CombinationSolution;
use crate::catalogue::between::{Field, Quantity};
use crate::catalogue::load::Local;
use crate::catalogue::symbol::{EEXT, EFREE, ESTR};
use crate::formula::{Definition, Scope, Symbol, Value, Worksheet, source};
use crate::model::{Action, Combination, Member, Model};
use crate::units::Measure;
use crate::work::{Extremes, MemberBase, MemberForces, NodeBalance, Prepared, WHOLE};

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

pub(super) fn dot(a: &[f64; 3], b: &[f64; 3]) -> f64 {
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
pub(super) fn free_strains(prepared: &Prepared, at: usize, combination: &Combination, base: &MemberBase) -> (f64, f64) {
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
pub(super) fn integral(from: f64, to: f64, field: &Field, of: &dyn Fn(f64) -> f64) -> f64 {
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
    let [external, strain, free] = [EEXT, ESTR, EFREE];
    let tree = external.clone() - strain.tree() - free.tree();
    let definition = Definition::new(
        Symbol::new("B_E"),
        "External work less strain energy and work on free strains",
        Measure::Energy,
        tree,
    )
    .from(&source::UNIT_LOAD);
    let mut scope = Scope::new(sheet, WHOLE, Some(combination));
    for (symbol, value) in [(&external, stated[0]), (&strain, stated[1]), (&free, stated[2])] {
        scope.set(symbol, value);
    }
    let left_over = scope.balance('R', 31, &definition);
    [stated[0], stated[1], stated[2], left_over]
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
