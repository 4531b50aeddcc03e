//! The equations of one structure with one set of slack bars: assembled, factorised, judged, solved.
use super::failure::Failure;
use super::freedom::{Numbering, Slots};
use super::mechanism;
use super::skyline::{Factor, Ldl, Skyline};
use super::spectrum::{smallest_eigenvalue, softest_modes};
use super::structure::Structure;
use super::twofold::Twofold;

/// A scaled pivot below this raises the suspicion of a mechanism; the softest modes then decide.
const SUSPICIOUS_PIVOT: f64 = 1e-10;
/// Condition number above which fewer than four digits of sixteen survive.
const WORST_CONDITION: f64 = 1e12;

/// Equations ready to be solved.
#[derive(Debug, Clone)]
pub(super) struct System {
    pub(super) slots: Slots,
    pub(super) numbering: Numbering,
    /// Estimated condition number of the scaled matrix.
    pub(super) condition: f64,
    scale: Vec<f64>,
    factor: Ldl,
}

impl System {
    /// Numbers, assembles and factorises, the members in `slack` taken out.
    ///
    /// # Errors
    /// A mechanism with its motions, equations too close to singular, a stiffness that is not positive.
    pub(super) fn new(structure: &Structure, slack: &[bool]) -> Result<Self, Failure> {
        let slack_list = || (0..slack.len()).filter(|member| slack[*member]).collect::<Vec<usize>>();
        let mechanism = |motions| Failure::Mechanism { motions, combination: None, slack: slack_list() };
        let floating = mechanism::floating(structure, slack);
        if !floating.is_empty() {
            return Err(mechanism(floating));
        }
        let slots = Slots::new(structure, slack);
        let freedoms: Vec<&[usize]> = (0..structure.members.len())
            .map(|member| if slack[member] { &[][..] } else { structure.members[member].freedoms() })
            .collect();
        let numbering = slots.number(&freedoms);
        let mut stiffness = Skyline::new(numbering.first.clone());
        for (member, freedoms) in freedoms.iter().enumerate() {
            add_member(&slots, &numbering, member, freedoms, &structure.members[member].stiffness, &mut stiffness);
        }
        for (spring, equation) in slots.springs.iter().zip(&numbering.equation) {
            if let Some(equation) = equation {
                stiffness.add(*equation, *equation, *spring);
            }
        }
        let diagonal = stiffness.diagonal();
        if let Some(equation) = diagonal.iter().position(|k| *k <= 0.0) {
            let slot = numbering.equation.iter().position(|e| *e == Some(equation));
            let place = slot.and_then(|slot| slots.place(slot));
            let node = place.map_or_else(String::new, |place| format!(" at node {}", place.node + 1));
            return Err(Failure::Inconsistent { what: format!("a stiffness{node} is not positive") });
        }
        let scale: Vec<f64> = diagonal.iter().map(|k| 1.0 / k.sqrt()).collect();
        let scaled = stiffness.scaled(&scale);
        let factor = scaled.clone().factorise();
        if factor.smallest < SUSPICIOUS_PIVOT {
            let unscale = |mode: &[f64]| {
                let movement: Vec<f64> = mode.iter().zip(&scale).map(|(m, s)| m * s).collect();
                let mut values = vec![0.0; slots.state.len()];
                numbering.scatter(&movement, &mut values);
                values
            };
            let modes = softest_modes(&scaled, 8)
                .into_iter()
                .filter(|(eigenvalue, _)| *eigenvalue < SUSPICIOUS_PIVOT)
                .map(|(_, mode)| unscale(&mode))
                .filter(|values| mechanism::is_strainless(structure, slack, &slots, values))
                .collect();
            let motions = mechanism::motions(structure, slack, &slots, modes);
            if !motions.is_empty() {
                return Err(mechanism(motions));
            }
        }
        let condition = match numbering.count() {
            0 => 1.0,
            _ if factor.smallest <= 0.0 => f64::INFINITY,
            size => scaled.largest_row_sum() / smallest_eigenvalue(&factor, size),
        };
        if condition.is_nan() || !(0.0..=WORST_CONDITION).contains(&condition) {
            return Err(Failure::Untrustworthy { condition: condition.abs() });
        }
        Ok(Self { slots, numbering, condition, scale, factor })
    }

    /// Movements of all slots from the forces on them, `values` holding what supports impose.
    ///
    /// Solved by correction: what the members and springs leave unbalanced is found from the movements themselves in
    /// twice the precision and solved for again, so that the rounding of the assembled matrix does not stay in the
    /// result and imposed movements need no equations of their own.
    pub(super) fn solve(&self, structure: &Structure, slack: &[bool], forces: &[f64], values: &mut [f64]) {
        const CORRECTIONS: usize = 8;
        let mut solution = vec![0.0; self.numbering.count()];
        for _ in 0..CORRECTIONS {
            let mut change = self.numbering.gather(&self.unbalanced(structure, slack, forces, values));
            self.solve_scaled(&mut change);
            let size = |vector: &[f64]| {
                vector.iter().zip(&self.scale).map(|(value, scale)| (value / scale).abs()).fold(0.0, f64::max)
            };
            for (value, change) in solution.iter_mut().zip(&change) {
                *value += change;
            }
            self.numbering.scatter(&solution, values);
            if size(&change) <= 4.0 * f64::EPSILON * size(&solution) {
                break;
            }
        }
    }

    /// Forces on all slots less what members and springs take up at these movements.
    pub(super) fn unbalanced(&self, structure: &Structure, slack: &[bool], forces: &[f64], values: &[f64]) -> Vec<f64> {
        let mut rest: Vec<Twofold> = forces.iter().map(|force| Twofold::new(*force)).collect();
        for (member, element) in structure.members.iter().enumerate().filter(|(member, _)| !slack[*member]) {
            let freedoms = element.freedoms();
            let terms = &self.slots.members[member];
            let movement: Vec<Twofold> = freedoms
                .iter()
                .map(|freedom| {
                    let mut sum = Twofold::default();
                    for (slot, factor) in terms[*freedom] {
                        sum.add_product(factor, Twofold::new(values[slot]));
                    }
                    sum
                })
                .collect();
            for (freedom, row) in freedoms.iter().zip(element.stiffness.chunks(freedoms.len())) {
                let mut force = Twofold::default();
                for (stiffness, movement) in row.iter().zip(&movement) {
                    force.add_product(*stiffness, *movement);
                }
                for (slot, factor) in terms[*freedom] {
                    rest[slot].add_product(-factor, force);
                }
            }
        }
        for ((rest, spring), value) in rest.iter_mut().zip(&self.slots.springs).zip(values) {
            rest.add_product(-spring, Twofold::new(*value));
        }
        rest.into_iter().map(Twofold::value).collect()
    }

    fn solve_scaled(&self, right: &mut [f64]) {
        for (value, scale) in right.iter_mut().zip(&self.scale) {
            *value *= scale;
        }
        self.factor.solve(right);
        for (value, scale) in right.iter_mut().zip(&self.scale) {
            *value *= scale;
        }
    }
}

/// Adds the stiffness of a member, given in its own freedoms, to the matrix of the structure.
pub(super) fn add_member(
    slots: &Slots,
    numbering: &Numbering,
    member: usize,
    freedoms: &[usize],
    stiffness: &[f64],
    matrix: &mut Skyline,
) {
    let terms = &slots.members[member];
    let numbered = |freedom: usize| {
        terms[freedom]
            .into_iter()
            .filter(|(_, factor)| factor.abs() > 0.0)
            .filter_map(|(slot, factor)| numbering.equation[slot].map(|equation| (equation, factor)))
    };
    for (i, row) in freedoms.iter().enumerate() {
        for (j, column) in freedoms.iter().enumerate() {
            // The mean of both halves: a stiffness that is symmetric but for its last digit stays symmetric.
            let entry = 0.5 * (stiffness[i * freedoms.len() + j] + stiffness[j * freedoms.len() + i]);
            for (a, factor_a) in numbered(*row) {
                for (b, factor_b) in numbered(*column).filter(|(b, _)| *b <= a) {
                    matrix.add(a, b, factor_a * factor_b * entry);
                }
            }
        }
    }
}

/// Matrix times vector, the matrix row by row.
pub(super) fn product(matrix: &[f64], vector: &[f64]) -> Vec<f64> {
    matrix.chunks(vector.len().max(1)).map(|row| row.iter().zip(vector).map(|(a, b)| a * b).sum()).collect()
}
