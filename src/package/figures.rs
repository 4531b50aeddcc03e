//! Drawings of a package: plain curves handed over to the figure room.
use crate::analysis::{CombinationSolution, Solution};
use crate::catalogue::between::{Field, Quantity};
use crate::figure::{self, Diagram, Figure, Shape, Usage};
use crate::model::{MemberKind, Model};
use crate::sheet::{Results, ratio_text};
use crate::work::{CombinationWork, carries_shear};

pub(super) mod depth;

/// Parts of a member's length at which curves are read.
const PARTS: usize = 24;

/// Every drawing.
pub(super) fn draw(model: &Model, solution: &Solution, results: &Results) -> Vec<Figure> {
    let mut figures = vec![figure::signs(), figure::structure(model)];
    figures.extend(model.sections.iter().filter_map(|section| figure::section(&model.display, section)));
    figures.extend(model.cases.iter().map(|case| figure::load_case(model, case)));
    let axial = model.members.iter().any(|m| m.kind != MemberKind::Beam);
    let bends = model.members.iter().any(|m| carries_shear(m.kind));
    for (at, combination) in model.combinations.iter().enumerate() {
        let (Some(solved), Some(work)) = (solution.combinations.get(at), results.combinations.get(at)) else {
            continue;
        };
        let name = &combination.name;
        let moved = Shape {
            id: format!("{name}.deflected"),
            title: format!("Movement under {name}"),
            metres: true,
            points: movements(model, solved, work),
        };
        figures.extend(figure::shape(model, &moved));
        if results.governing.contains(&at) {
            for (letter, quantity, wanted) in
                [("N", Quantity::N, axial), ("V", Quantity::V, bends), ("M", Quantity::M, bends)]
            {
                if wanted {
                    let curves = (0..model.members.len()).map(|m| forces(model, work, m, quantity)).collect();
                    figures.extend(figure::diagram(model, &Diagram { letter, combination: name.clone(), curves }));
                }
            }
        }
        if let (Some(critical), Some(_)) = (&solved.critical, model.checks.stability) {
            let mode = Shape {
                id: format!("{name}.buckling"),
                title: format!(
                    "Shape of buckling under {name} at {} times the combination; its size has no meaning",
                    crate::units::Printed::nearest(
                        critical.factor,
                        critical.factor.abs().max(1e-9).log10().floor() as i32 - 2
                    )
                ),
                metres: false,
                points: critical.mode.clone(),
            };
            figures.extend(figure::shape(model, &mode));
        }
    }
    figures.push(figure::utilisation(model, &usage(model, results)));
    figures
}

/// Places to read: equal parts, and both sides of every place where the load changes.
fn places(field: &Field, length: f64) -> Vec<(f64, bool)> {
    let mut places: Vec<(f64, bool)> = (1..PARTS).map(|k| (length * k as f64 / PARTS as f64, true)).collect();
    let breaks = field.places();
    for (k, x) in breaks.iter().enumerate() {
        places.retain(|(other, _)| (other - x).abs() > 1e-9 * length);
        if k > 0 {
            places.push((*x, false));
        }
        if k + 1 < breaks.len() {
            places.push((*x, true));
        }
    }
    places.sort_by(|a, b| a.0.total_cmp(&b.0).then(a.1.cmp(&b.1)));
    places
}

fn length(model: &Model, member: usize) -> f64 {
    let (a, b) = (&model.nodes[model.members[member].from], &model.nodes[model.members[member].to]);
    (b.x - a.x).hypot(b.y - a.y)
}

fn forces(model: &Model, work: &CombinationWork, member: usize, quantity: Quantity) -> Vec<(f64, f64)> {
    let bends = carries_shear(model.members[member].kind);
    let length = length(model, member);
    match (quantity, work.extremes.get(member).and_then(|e| e.field.as_ref())) {
        (Quantity::V | Quantity::M, _) if !bends => Vec::new(),
        (Quantity::N, _) if model.members[member].kind == MemberKind::Beam => Vec::new(),
        (quantity, Some(field)) => {
            let extreme = work.extremes.get(member).and_then(|e| match quantity {
                Quantity::M => e.moment.as_ref().map(|e| e.x),
                _ => None,
            });
            let mut places = places(field, length);
            if let Some(x) = extreme
                && places.iter().all(|(other, _)| (other - x).abs() > 1e-6 * length)
            {
                places.push((x, true));
                places.sort_by(|a, b| a.0.total_cmp(&b.0).then(a.1.cmp(&b.1)));
            }
            places.into_iter().map(|(x, after)| (x, field.at(quantity, x, after))).collect()
        }
        (Quantity::N, None) => work.forces.get(member).map_or_else(Vec::new, |forces| {
            let value = |end: usize| forces.n[end].map_or(0.0, |n| n.si);
            vec![(0.0, value(0)), (length, value(1))]
        }),
        _ => Vec::new(),
    }
}

/// Movement of every member: its ends straight, and what it bends between them.
fn movements(model: &Model, solved: &CombinationSolution, work: &CombinationWork) -> Vec<Vec<(f64, [f64; 2])>> {
    (0..model.members.len())
        .map(|at| {
            let member = &model.members[at];
            let length = length(model, at).max(1e-12);
            let (Some(a), Some(b)) = (solved.displacements.get(member.from), solved.displacements.get(member.to))
            else {
                return Vec::new();
            };
            let (from, to) = (&model.nodes[member.from], &model.nodes[member.to]);
            let normal = [-(to.y - from.y) / length, (to.x - from.x) / length];
            let straight = |t: f64| [a[0] + t * (b[0] - a[0]), a[1] + t * (b[1] - a[1])];
            let field = work.extremes.get(at).and_then(|e| e.field.as_ref()).filter(|_| carries_shear(member.kind));
            match (field, solved.members.get(at).and_then(|m| m.middle)) {
                (Some(field), _) => places(field, length)
                    .into_iter()
                    .map(|(x, after)| {
                        let bow = field.at(Quantity::Deflection, x, after);
                        let u = straight(x / length);
                        (x, [u[0] + bow * normal[0], u[1] + bow * normal[1]])
                    })
                    .collect(),
                (None, Some(middle)) => vec![(0.0, straight(0.0)), (length / 2.0, middle), (length, straight(1.0))],
                (None, None) => vec![(0.0, straight(0.0)), (length, straight(1.0))],
            }
        })
        .collect()
}

fn usage(model: &Model, results: &Results) -> Vec<Usage> {
    model
        .members
        .iter()
        .map(|member| {
            let checks = || {
                results
                    .combinations
                    .iter()
                    .flat_map(|work| &work.checks)
                    .filter(|c| c.subject == member.name && !c.kind.starts_with("deflection."))
            };
            let ratio = checks().filter_map(|c| c.ratio).reduce(f64::max);
            let printed = ratio.map_or(String::new(), |ratio| ratio_text(ratio, 3));
            Usage { ratio, printed, unchecked: checks().any(|c| c.ok().is_none()) }
        })
        .collect()
}

#[cfg(test)]
mod tests;
