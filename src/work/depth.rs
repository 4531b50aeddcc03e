//! Stress over the depth at a member's section of largest stress (steps S21 to S25).
use super::{Check, Extreme, Extremes, MemberForces};
use crate::catalogue::element::depth;
use crate::catalogue::symbol::{I, MG, NG, YB, YT};
use crate::formula::{Scope, Worksheet};
use crate::model::{Combination, Member};

/// The extreme at the section of largest stress: where the comparison is worst, without one where the stress is largest.
#[must_use]
pub fn section_of_largest_stress(extremes: &Extremes, check: Option<&Check>) -> Option<Extreme> {
    let (tension, compression) = (extremes.tension?, extremes.compression?);
    let at_check = |extreme: &Extreme| {
        check.and_then(|check| check.place).is_some_and(|place| (place - extreme.x).abs() <= 1e-9 * extreme.x.abs())
    };
    let larger = if tension.value.si.abs() >= compression.value.si.abs() { tension } else { compression };
    [larger, tension, compression].into_iter().find(at_check).or(Some(larger))
}

/// Works the parts of the stress of both fibres at one section, and their sums. Nothing for what does not bend.
pub fn work_depth(
    sheet: &mut dyn Worksheet,
    member: &Member,
    combination: &Combination,
    forces: &MemberForces,
    section: &Extreme,
) {
    let Some(moment) = section.moment else { return };
    let mut scope = Scope::new(sheet, &member.name, Some(&combination.name));
    scope.inherit(&forces.known);
    if [I, YT, YB].iter().any(|symbol| scope.get(symbol).is_none()) || moment.si == 0.0 {
        return;
    }
    scope.set(&MG, moment);
    if let Some(axial) = section.axial {
        scope.set(&NG, axial);
        scope.work('S', 21, &depth::AXIAL);
    }
    scope.work('S', 22, &depth::BENDING_TOP);
    scope.work('S', 23, &depth::BENDING_BOTTOM);
    if section.axial.is_some() {
        scope.work('S', 24, &depth::TOP);
        scope.work('S', 25, &depth::BOTTOM);
    }
}
