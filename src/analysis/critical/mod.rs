//! The elastic critical load: the smallest factor at which the structure loses its stiffness.
//!
//! Every member is cut into short pieces and reduced to its ends at a trial factor; the number of negative eigenvalues
//! of the whole, counted exactly, is the number of critical factors below the trial (F. W. Williams, W. H. Wittrick,
//! An automatic computational procedure for calculating natural frequencies of skeletal structures, 1970; recalled).
mod axial;
mod chain;
mod mode;
mod part;

use super::failure::Failure;
use super::freedom::{Numbering, Slots, State};
use super::skyline::{Factor, Ldl, Skyline};
use super::solution::CriticalLoad;
use super::structure::Structure;
use super::system::add_member;
use axial::Axial;
use part::{Loaded, Part};

/// Compression below this part of the largest axial force, or of a member's own Euler load, is rounding.
const DUST: [f64; 2] = [1e-9, 1e-10];
/// Strain at which the search begins where no compressed member can bow.
const STRAIN: f64 = 1e-4;
/// Strain beyond which small movements say nothing any more: a structure of bars that cannot bow would be squashed
/// before it buckles.
const LIMIT: f64 = 0.05;
/// How far the search goes either way; a factor further down is 0.
const RANGE: f64 = 1e9;
/// Width of the bracket round the factor at which the search ends.
const CLOSE: f64 = 1e-8;

/// The smallest factor on all axial forces of a combination at which the structure buckles in its plane.
///
/// `axial` gives for every member points (distance from its start in m, axial force in N, tension positive) in order
/// along it, straight in between; two points at one place are a jump, one point alone a constant force. `slack` names
/// the bars that are slack. Beams have no axial force whatever is given for them.
///
/// Members buckle between their nodes too, bars as pin-ended struts where their section has a second moment of area;
/// those without are named in [`CriticalLoad::without_inertia`]. Tension stiffens. Bars in one line whose middle node
/// nothing holds sideways have a factor of 0 under compression. `None` where nothing is compressed or nothing that is
/// compressed can buckle. The error of the factor is below 0.01 %.
///
/// # Errors
/// Numbers that do not fit the structure.
pub fn critical_load(
    structure: &Structure,
    axial: &[Vec<(f64, f64)>],
    slack: &[bool],
) -> Result<Option<CriticalLoad>, Failure> {
    if let Some(what) = structure.fault().or_else(|| fault(structure, axial, slack)) {
        return Err(Failure::Inconsistent { what });
    }
    let forces: Vec<Axial> = (0..structure.members.len())
        .map(|member| {
            let carries = !slack[member] && structure.members[member].kind != crate::model::MemberKind::Beam;
            if carries { Axial::new(&axial[member]) } else { Axial::none() }
        })
        .collect();
    let compressed = compressed(structure, &forces);
    let Some(estimate) = compressed.iter().map(|(_, scale)| *scale).reduce(f64::min) else { return Ok(None) };
    let cut = |factor: f64, split: usize| Stability::new(structure, slack, &forces, factor, split);
    let mut stability = cut(4.0 * estimate, 1);
    let mut aimed_at = 4.0 * estimate;
    let mut found = stability.search(estimate, 2.0);
    for _ in 0..4 {
        let Some([_, factor]) = found else { return Ok(None) };
        if stability.fine_enough(&forces, factor) {
            break;
        }
        aimed_at = 1.2 * factor;
        stability = cut(aimed_at, 1);
        found = stability.search(factor, 1.001);
    }
    let Some([low, high]) = found else { return Ok(None) };
    let mut factor = if low > 0.0 { high } else { 0.0 };
    if low > 0.0 && structure.members.iter().any(|element| element.shear_flexibility > 0.0) {
        // With shear the error goes with the square of the length of the pieces: half as long, a quarter of it.
        if let Some([_, finer]) = cut(aimed_at, 2).search(high, 1.001) {
            factor = finer + (finer - high) / 3.0;
        }
    }
    let bows = |member: usize| structure.members[member].bending_rigidity.is_some_and(|bending| bending > 0.0);
    let without_inertia: Vec<usize> = compressed.iter().map(|(m, _)| *m).filter(|member| !bows(*member)).collect();
    let strain = |member: &usize| factor * forces[*member].compression() / structure.members[*member].axial_rigidity;
    if without_inertia.len() == compressed.len() && without_inertia.iter().map(strain).fold(0.0, f64::max) > LIMIT {
        return Ok(None);
    }
    let mode = mode::shape(&stability, if low > 0.0 { low } else { high });
    Ok(Some(CriticalLoad { factor, mode, without_inertia }))
}

fn fault(structure: &Structure, axial: &[Vec<(f64, f64)>], slack: &[bool]) -> Option<String> {
    if axial.len() != structure.members.len() || slack.len() != structure.members.len() {
        return Some("the axial forces do not cover every member once".into());
    }
    for (member, (points, element)) in axial.iter().zip(&structure.members).enumerate() {
        let sound = points.iter().all(|(place, force)| place.is_finite() && force.is_finite());
        if !sound || points.windows(2).any(|pair| pair[0].0 > pair[1].0) {
            return Some(format!("the axial force of member {} is not in order along it", member + 1));
        }
        if !element.is_bar() && element.bending_rigidity.is_none_or(|bending| bending <= 0.0) {
            return Some(format!("member {} bends but has no bending rigidity", member + 1));
        }
    }
    None
}

/// Members in compression, each with the factor at which it would buckle pin-ended; for a bar without second moment of
/// area a factor to begin the search with.
fn compressed(structure: &Structure, forces: &[Axial]) -> Vec<(usize, f64)> {
    let largest = forces.iter().map(Axial::largest).fold(0.0, f64::max);
    let mut list = Vec::new();
    for (member, element) in structure.members.iter().enumerate() {
        let (length, _) = structure.line(member);
        let limit = match element.bending_rigidity {
            Some(bending) if bending > 0.0 => std::f64::consts::PI.powi(2) * bending / (length * length),
            _ => STRAIN * element.axial_rigidity,
        };
        let compression = forces[member].compression();
        if compression > (DUST[0] * largest).max(DUST[1] * limit) {
            list.push((member, limit / compression));
        }
    }
    list
}

/// The structure in the search for its critical load.
struct Stability<'a> {
    structure: &'a Structure,
    slots: Slots,
    numbering: Numbering,
    /// `None` for slack bars.
    parts: Vec<Option<Part>>,
}

/// The structure at one load factor.
struct Trial {
    /// How many critical factors lie below.
    below: usize,
    factors: Ldl,
    scale: Vec<f64>,
    /// Along and across, per member.
    members: Vec<Option<[Loaded; 2]>>,
}

impl<'a> Stability<'a> {
    fn new(structure: &'a Structure, slack: &[bool], forces: &[Axial], factor: f64, split: usize) -> Self {
        let mut slots = Slots::new(structure, slack);
        let largest = forces.iter().map(Axial::largest).fold(0.0, f64::max);
        for (element, _) in structure.members.iter().zip(forces).filter(|(_, f)| f.largest() > DUST[0] * largest) {
            // A direction that nothing stiffens elastically is stiffened or unsettled by axial forces across it.
            for slot in [element.from, element.to].into_iter().flat_map(|node| [3 * node, 3 * node + 1]) {
                if slots.state[slot] == State::LeftOut {
                    slots.state[slot] = State::Free;
                }
            }
        }
        let freedoms: Vec<&[usize]> = (0..structure.members.len())
            .map(|member| if slack[member] { &[][..] } else { Part::freedoms(&structure.members[member]) })
            .collect();
        let numbering = slots.number(&freedoms);
        let parts = (0..structure.members.len())
            .map(|member| {
                let (length, _) = structure.line(member);
                (!slack[member]).then(|| Part::new(&structure.members[member], length, &forces[member], factor, split))
            })
            .collect();
        Self { structure, slots, numbering, parts }
    }

    fn fine_enough(&self, forces: &[Axial], factor: f64) -> bool {
        self.parts.iter().enumerate().all(|(member, part)| {
            let (length, _) = self.structure.line(member);
            let element = &self.structure.members[member];
            part.as_ref().is_none_or(|part| part.fine_enough(element, length, &forces[member], factor))
        })
    }

    fn at(&self, factor: f64) -> Trial {
        let members: Vec<Option<[Loaded; 2]>> =
            self.parts.iter().map(|part| part.as_ref().map(|part| part.at(factor))).collect();
        let mut matrix = Skyline::new(self.numbering.first.clone());
        let mut below = 0;
        for (member, loaded) in members.iter().enumerate() {
            for loaded in loaded.iter().flatten() {
                add_member(&self.slots, &self.numbering, member, loaded.freedoms, &loaded.stiffness, &mut matrix);
                below += loaded.reduced.as_ref().map_or(0, |reduced| reduced.negatives);
            }
        }
        for (spring, equation) in self.slots.springs.iter().zip(&self.numbering.equation) {
            if let Some(equation) = equation {
                matrix.add(*equation, *equation, *spring);
            }
        }
        let unit = |k: &f64| if k.abs() > 0.0 { 1.0 / k.abs().sqrt() } else { 1.0 };
        let scale: Vec<f64> = matrix.diagonal().iter().map(unit).collect();
        let factors = matrix.scaled(&scale).factorise();
        below += factors.pivots().iter().filter(|pivot| **pivot < 0.0).count();
        Trial { below, factors, scale, members }
    }

    /// A bracket round the smallest factor, its lower end 0 where any factor at all is too much.
    ///
    /// Goes out from `start` by `step`, then by its square and so on, at most twofold.
    fn search(&self, start: f64, mut step: f64) -> Option<[f64; 2]> {
        let too_much = |factor: f64| self.at(factor).below > 0;
        let (mut low, mut high) = (start, start);
        if too_much(start) {
            while too_much(low) {
                high = low;
                low /= step;
                step = (step * step).min(2.0);
                if low < start / RANGE {
                    return Some([0.0, high]);
                }
            }
        } else {
            while !too_much(high) {
                low = high;
                high *= step;
                step = (step * step).min(2.0);
                if high > start * RANGE {
                    return None;
                }
            }
        }
        while high - low > CLOSE * high {
            let middle = 0.5 * (low + high);
            if too_much(middle) {
                high = middle;
            } else {
                low = middle;
            }
        }
        Some([low, high])
    }
}
