//! Every combination solved: loads onto slots, movements back, slack bars found.
use super::failure::Failure;
use super::solution::{CombinationSolution, LeftOut, MemberMovement, Solution};
use super::structure::{FREEDOMS, Loading, R1, R2, Structure, U1, U2, UM, V1, V2};
use super::system::{System, product};
use super::tension_only::{self, State};
use crate::model::MemberKind;
use std::collections::BTreeMap;
use std::rc::Rc;

/// A load on a direction without stiffness below this part of the largest load is the dust of its resolution.
const DUST: f64 = 1e-9;

/// Solves a structure for every combination.
///
/// Nothing is added to the stiffness to make a structure solvable: what cannot be solved is a failure with its reason.
/// The critical load is left out; see [`super::critical_load`].
///
/// # Errors
/// No support, a mechanism, a loaded direction without stiffness, too few digits, slack bars that never settle.
pub fn solve(structure: &Structure, loadings: &[Loading]) -> Result<Solution, Failure> {
    let fault = structure.fault().or_else(|| loadings.iter().find_map(|loading| loading.fault(structure)));
    if let Some(what) = fault {
        return Err(Failure::Inconsistent { what });
    }
    let held = |support: &crate::model::Support| {
        support.hold.contains(&true) || support.spring.iter().flatten().any(|stiffness| *stiffness > 0.0)
    };
    if !structure.supports.iter().any(held) {
        return Err(Failure::NoSupport);
    }
    let mut solver = Solver { structure, systems: BTreeMap::new() };
    let taut = solver.system(&vec![false; structure.members.len()])?;
    let mut solution = Solution {
        combinations: Vec::with_capacity(loadings.len()),
        left_out: taut.slots.left_out(),
        equations: taut.numbering.count(),
        condition: taut.condition,
    };
    for (combination, loading) in loadings.iter().enumerate() {
        let state = tension_only::settle(&mut solver, combination, loading)?;
        let system = solver.system(&state.slack)?;
        for direction in system.slots.left_out() {
            if !solution.left_out.contains(&direction) {
                solution.left_out.push(direction);
            }
        }
        solution.condition = solution.condition.max(system.condition);
        solution.combinations.push(report(structure, &system, loading, &state));
    }
    Ok(solution)
}

/// A structure with the systems of equations met so far, one for every set of slack bars.
pub(super) struct Solver<'a> {
    pub(super) structure: &'a Structure,
    systems: BTreeMap<Vec<bool>, Rc<System>>,
}

impl Solver<'_> {
    fn system(&mut self, slack: &[bool]) -> Result<Rc<System>, Failure> {
        if let Some(system) = self.systems.get(slack) {
            return Ok(Rc::clone(system));
        }
        let system = Rc::new(System::new(self.structure, slack)?);
        self.systems.insert(slack.to_vec(), Rc::clone(&system));
        Ok(system)
    }

    /// Movements under one combination with given slack bars.
    pub(super) fn attempt(&mut self, combination: usize, loading: &Loading, slack: &[bool]) -> Result<State, Failure> {
        let named = |failure: Failure| match failure {
            Failure::Mechanism { motions, slack, .. } if !slack.is_empty() => {
                Failure::Mechanism { motions, slack, combination: Some(combination) }
            }
            other => other,
        };
        let system = self.system(slack).map_err(named)?;
        let (forces, mut values) = loads(self.structure, &system, loading, slack);
        refuse_loaded_directions(self.structure, &system, loading, &forces, combination, slack)?;
        system.solve(self.structure, slack, &forces, &mut values);
        if values.iter().any(|value| !value.is_finite()) {
            return Err(Failure::Untrustworthy { condition: f64::INFINITY });
        }
        let axial = mean_axial_forces(self.structure, &system, loading, &values);
        Ok(State { slack: slack.to_vec(), values, axial })
    }
}

/// Forces on all slots, and the movements of those that supports move.
fn loads(structure: &Structure, system: &System, loading: &Loading, slack: &[bool]) -> (Vec<f64>, Vec<f64>) {
    const ALL: [usize; FREEDOMS] = [U1, V1, R1, U2, V2, R2, UM];
    let slots = &system.slots;
    let mut forces = vec![0.0; slots.state.len()];
    let mut values = vec![0.0; slots.state.len()];
    for (node, load) in loading.nodes.iter().enumerate() {
        slots.add_force(node, *load, &mut forces);
    }
    for (member, load) in loading.members.iter().enumerate() {
        let mut local = load.forces;
        if slack[member] {
            let half = 0.5 * local[UM];
            local[U1] += half;
            local[U2] += half;
            local[UM] = 0.0;
        } else {
            for (total, part) in local.iter_mut().zip(load.strains) {
                *total += part;
            }
        }
        slots.add_member_force(member, &ALL, &local, &mut forces);
    }
    for (node, movement) in &loading.settlements {
        let Some(support) = structure.supports.iter().find(|support| support.node == *node) else { continue };
        for (direction, movement) in movement.iter().enumerate() {
            let slot = 3 * node + direction;
            if support.hold[direction] {
                values[slot] += movement;
            } else {
                forces[slot] += slots.springs[slot] * movement;
            }
        }
    }
    (forces, values)
}

fn refuse_loaded_directions(
    structure: &Structure,
    system: &System,
    loading: &Loading,
    forces: &[f64],
    combination: usize,
    slack: &[bool],
) -> Result<(), Failure> {
    let largest = |values: &mut dyn Iterator<Item = f64>| values.fold(0.0, |most: f64, v| most.max(v.abs()));
    let members = || loading.members.iter().flat_map(|load| [load.forces, load.strains]);
    let force = largest(&mut loading.nodes.iter().flat_map(|[x, y, _]| [*x, *y]))
        .max(largest(&mut members().flat_map(|load| [U1, V1, U2, V2, UM].map(|place| load[place]))));
    let couple = largest(&mut loading.nodes.iter().map(|[_, _, couple]| *couple))
        .max(largest(&mut members().flat_map(|load| [R1, R2].map(|place| load[place]))));
    for slot in system.slots.left_out_slots() {
        let Some(LeftOut { node, direction }) = system.slots.place(slot) else { continue };
        let load = forces[slot];
        let dust = match direction {
            Some(_) => DUST * force,
            None => DUST * couple.max(force * structure.size()),
        };
        if load.abs() > dust {
            let slack = (0..slack.len()).filter(|member| slack[*member]).collect();
            return Err(Failure::LoadedFreeDirection { combination, node, direction, load, slack });
        }
    }
    Ok(())
}

/// Mean axial force of every tension-only bar as if it were taut; 0 for the others.
///
/// The mean is what stretches the bar: E·A·(u2 − u1)/L plus what its loads and strains add.
fn mean_axial_forces(structure: &Structure, system: &System, loading: &Loading, values: &[f64]) -> Vec<f64> {
    let mean = |member: usize| {
        let element = &structure.members[member];
        if !element.tension_only || !element.is_bar() {
            return 0.0;
        }
        let movement = system.slots.member_movement(member, element.freedoms(), values);
        let ends = product(&element.stiffness, &movement);
        let (first, last) = (ends.first().copied().unwrap_or(0.0), ends.last().copied().unwrap_or(0.0));
        let [start, end] = loading.members[member].fixed_axial;
        0.5 * (last - first + start + end)
    };
    (0..structure.members.len()).map(mean).collect()
}

fn report(structure: &Structure, system: &System, loading: &Loading, state: &State) -> CombinationSolution {
    let slots = &system.slots;
    let members = (0..structure.members.len())
        .map(|member| {
            let element = &structure.members[member];
            let rotation = slots.member_movement(member, &[R1, R2], &state.values);
            let middle = (element.kind == MemberKind::Bar3).then(|| {
                let (_, [c, s]) = structure.line(member);
                let [u1, v1, u2, v2, um] =
                    [U1, V1, U2, V2, UM].map(|freedom| slots.member_movement(member, &[freedom], &state.values)[0]);
                let along = if state.slack[member] { 0.5 * (u1 + u2) } else { um };
                let across = 0.5 * (v1 + v2);
                [c * along - s * across, s * along + c * across]
            });
            MemberMovement { rotation: [rotation[0], rotation[1]], middle, slack: state.slack[member] }
        })
        .collect();
    CombinationSolution {
        displacements: (0..structure.nodes.len()).map(|node| slots.movement(node, &state.values)).collect(),
        members,
        residual: residual(structure, system, loading, state),
        critical: None,
    }
}

/// Largest |K·u − F| over the equations, relative to the largest force that acts in them.
///
/// Built up anew from the members, not from the assembled matrix, so that it checks the assembly too.
fn residual(structure: &Structure, system: &System, loading: &Loading, state: &State) -> f64 {
    let most = |values: &[f64]| values.iter().fold(0.0, |most: f64, value| most.max(value.abs()));
    let (forces, _) = loads(structure, system, loading, &state.slack);
    let unbalanced = system.unbalanced(structure, &state.slack, &forces, &state.values);
    let largest = (0..structure.members.len())
        .filter(|member| !state.slack[*member])
        .map(|member| {
            let element = &structure.members[member];
            let movement = system.slots.member_movement(member, element.freedoms(), &state.values);
            most(&product(&element.stiffness, &movement))
        })
        .fold(most(&forces), f64::max);
    if largest > 0.0 { most(&system.numbering.gather(&unbalanced)) / largest } else { 0.0 }
}
