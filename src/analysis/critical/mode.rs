//! The shape in which a structure buckles, by inverse iteration just below its critical load.
use super::{Stability, Trial};
use crate::analysis::skyline::Factor;
use crate::analysis::spectrum::start_vector;
use crate::analysis::structure::{R1, R2, U1, U2, V1, V2};

/// Points along each member with their movement in global axes, the largest movement being 1.
pub(super) fn shape(stability: &Stability<'_>, factor: f64) -> Vec<Vec<(f64, [f64; 2])>> {
    const ROUNDS: usize = 4;
    let trial = stability.at(factor);
    let structure = stability.structure;
    let places: Vec<Vec<f64>> = (0..structure.members.len())
        .map(|member| {
            let (length, _) = structure.line(member);
            stability.parts[member].as_ref().map_or_else(|| vec![0.0, length], |part| part.places(length))
        })
        .collect();
    let mut movement = Movement {
        slots: start_vector(stability.slots.state.len(), 1),
        across: places
            .iter()
            .enumerate()
            .map(|(member, p)| pairs(start_vector(2 * p.len(), member as u64 + 2)))
            .collect(),
    };
    for _ in 0..ROUNDS {
        movement = respond(stability, &trial, &movement);
        movement.normalise(structure.size());
    }
    let mut shape: Vec<Vec<(f64, [f64; 2])>> =
        places.iter().enumerate().map(|(member, places)| points(stability, &movement, member, places)).collect();
    let size = |[x, y]: [f64; 2]| x.hypot(y);
    let largest = shape.iter().flatten().map(|(_, v)| *v).fold([0.0; 2], |a, b| if size(b) > size(a) { b } else { a });
    // The sense is free: the largest movement goes up or, level, to the right.
    let sense = if largest[1].abs() > 1e-6 * size(largest) { largest[1] } else { largest[0] }.signum();
    if size(largest) > 0.0 {
        for (_, value) in shape.iter_mut().flatten() {
            *value = value.map(|part| sense * part / size(largest));
        }
    }
    shape
}

/// A movement of the whole: slots, and every member's own places across it.
struct Movement {
    slots: Vec<f64>,
    /// Movement across and rotation at every place; those of the ends repeat the slots'.
    across: Vec<Vec<[f64; 2]>>,
}

impl Movement {
    fn normalise(&mut self, size: f64) {
        let across = self.across.iter().flatten().map(|[v, r]| v.abs().max((r * size).abs()));
        let largest = self.slots.iter().map(|value| value.abs()).chain(across).fold(0.0, f64::max);
        if largest > 0.0 {
            self.slots.iter_mut().for_each(|value| *value /= largest);
            self.across.iter_mut().flatten().flatten().for_each(|value| *value /= largest);
        }
    }
}

fn pairs(values: Vec<f64>) -> Vec<[f64; 2]> {
    values.chunks_exact(2).map(|pair| [pair[0], pair[1]]).collect()
}

/// Movement under forces equal to a movement: one round of inverse iteration.
fn respond(stability: &Stability<'_>, trial: &Trial, movement: &Movement) -> Movement {
    let slots = &stability.slots;
    let size = stability.structure.size();
    let weigh = |[v, r]: [f64; 2]| [v, r * size * size];
    let mut forces = movement.slots.clone();
    let mut carried: Vec<Vec<[f64; 2]>> = Vec::with_capacity(movement.across.len());
    for (member, across) in movement.across.iter().enumerate() {
        let mut loads: Vec<[f64; 2]> = across.iter().copied().map(weigh).collect();
        if let Some(reduced) = trial.members[member].as_ref().and_then(|[_, across]| across.reduced.as_ref()) {
            let ends = reduced.carry(&mut loads);
            slots.add_member_force(member, &[V1, R1, V2, R2], &ends, &mut forces);
        }
        carried.push(loads);
    }
    let mut right = stability.numbering.gather(&forces);
    right.iter_mut().zip(&trial.scale).for_each(|(value, scale)| *value *= scale);
    trial.factors.solve(&mut right);
    right.iter_mut().zip(&trial.scale).for_each(|(value, scale)| *value *= scale);
    let mut values = vec![0.0; slots.state.len()];
    stability.numbering.scatter(&right, &mut values);
    let across = carried
        .iter()
        .enumerate()
        .map(|(member, loads)| {
            let ends = slots.member_movement(member, &[V1, R1, V2, R2], &values);
            let ends = [ends[0], ends[1], ends[2], ends[3]];
            match trial.members[member].as_ref().and_then(|[_, across]| across.reduced.as_ref()) {
                Some(reduced) => reduced.restore(ends, loads),
                None => vec![[ends[0], ends[1]], [ends[2], ends[3]]],
            }
        })
        .collect();
    Movement { slots: values, across }
}

fn points(stability: &Stability<'_>, movement: &Movement, member: usize, places: &[f64]) -> Vec<(f64, [f64; 2])> {
    let (length, [c, s]) = stability.structure.line(member);
    let ends = stability.slots.member_movement(member, &[U1, U2], &movement.slots);
    places
        .iter()
        .zip(&movement.across[member])
        .map(|(place, [across, _])| {
            let along = ends[0] + (ends[1] - ends[0]) * place / length;
            (*place, [c * along - s * across, s * along + c * across])
        })
        .collect()
}
