//! Rectangles stacked along y, joined to one section, all centred on the y axis.
//!
//! Plates drawn on their centre lines overlap a little; each counts in full, as is usual for thin walls.
//! Small gaps from rounded places are taken as they are; that the plates are joined is for whoever designs the welds.
use super::symbol::{SY, YC, YV};
use super::{AREA, Ends, Given, Outline, Param, Plate, SectionKind, area, ends, plate_symbols, step};
use crate::formula::{Definition, Symbol, Tree, source};
use crate::units::Measure;

/// A built-up section.
pub(super) struct Plates;

fn edges(plate: &Plate) -> (f64, f64) {
    (plate.at - plate.height / 2.0, plate.at + plate.height / 2.0)
}

impl SectionKind for Plates {
    fn name(&self) -> &'static str {
        "plates"
    }
    fn doc(&self) -> &'static str {
        "Rectangles stacked along y; `at` is the y of each centre from any one line."
    }
    fn params(&self) -> &'static [Param] {
        &[]
    }
    fn faults(&self, given: &Given) -> Vec<(&'static str, String)> {
        let plates = &given.plates;
        if plates.is_empty() {
            return vec![("plates", "there must be at least one".into())];
        }
        if plates.iter().any(|p| p.width.is_nan() || p.height.is_nan() || p.at.is_nan()) {
            return Vec::new();
        }
        if plates.iter().any(|p| p.width <= 0.0 || p.height <= 0.0) {
            return vec![("plates", "widths and heights must be above zero".into())];
        }
        Vec::new()
    }
    fn steps(&self, given: &Given) -> Vec<(u16, Definition)> {
        let all: Vec<[Symbol; 3]> = (0..given.plates.len()).map(plate_symbols).collect();
        let sum = |of: &dyn Fn(&[Symbol; 3]) -> Tree| Tree::sum(all.iter().map(of).collect());
        let mut steps = vec![area(sum(&|[b, h, _]| b.clone() * h.clone()))];
        steps.push(step(
            41,
            SY,
            "First moment of area about the line from which `at` is measured",
            Measure::AreaMoment,
            sum(&|[b, h, y]| b.clone() * h.clone() * y.clone()),
            &source::PLANE_FIGURES,
        ));
        steps.push(step(
            42,
            YC,
            "Height of the centroid above that line",
            Measure::Length,
            SY / AREA,
            &source::PLANE_FIGURES,
        ));
        let upright =
            sum(&|[b, h, y]| b.clone() * h.cubed() / 12 + b.clone() * h.clone() * (y.clone() - YC.tree()).squared());
        let across = sum(&|[b, h, _]| h.clone() * b.cubed() / 12);
        if given.turned {
            turned(given, &all, &mut steps, upright, across);
        } else {
            lying(given, &all, &mut steps, upright, across);
        }
        steps
    }
    fn outline(&self, given: &Given) -> Outline {
        let loops = given
            .plates
            .iter()
            .map(|plate| {
                let (low, high) = edges(plate);
                let half = plate.width / 2.0;
                vec![[-half, low], [half, low], [half, high], [-half, high]]
            })
            .collect();
        Outline::new(loops, given.turned)
    }
}

/// Bent about the axis across the stack.
fn lying(given: &Given, all: &[[Symbol; 3]], steps: &mut Vec<(u16, Definition)>, upright: Tree, across: Tree) {
    let plates = &given.plates;
    let total: f64 = plates.iter().map(|p| p.width * p.height).sum();
    let centroid = plates.iter().map(|p| p.width * p.height * p.at).sum::<f64>() / total;
    let upper_edge = |at: usize| all[at][2].clone() + all[at][1].clone() / 2;
    let lower_edge = |at: usize| all[at][2].clone() - all[at][1].clone() / 2;
    let last = (0..plates.len()).max_by(|a, b| edges(&plates[*a]).1.total_cmp(&edges(&plates[*b]).1)).unwrap_or(0);
    let first = (0..plates.len()).min_by(|a, b| edges(&plates[*a]).0.total_cmp(&edges(&plates[*b]).0)).unwrap_or(0);
    // The shear stress can peak at the centroid or where the breadth changes, on the narrower side.
    let moment_above = |level: f64| -> f64 {
        plates
            .iter()
            .map(|p| {
                let (low, high) = edges(p);
                let low = low.max(level);
                if high > low { p.width * (high - low) * (f64::midpoint(high, low) - centroid) } else { 0.0 }
            })
            .sum()
    };
    let mut best = (f64::NEG_INFINITY, 0, 0);
    for (at, plate) in plates.iter().enumerate() {
        let (low, high) = edges(plate);
        for (kind, level) in [(0, centroid), (1, low), (2, high)] {
            let inside = level >= low - 1e-12 && level <= high + 1e-12;
            let stress = moment_above(level) / plate.width;
            if inside && stress > best.0 * (1.0 + 1e-12) {
                best = (stress, at, kind);
            }
        }
    }
    let (_, plate, kind) = best;
    let level = match kind {
        0 => YC.tree(),
        1 => lower_edge(plate),
        _ => upper_edge(plate),
    };
    let at_level = match kind {
        0 => centroid,
        1 => edges(&plates[plate]).0,
        _ => edges(&plates[plate]).1,
    };
    steps.push(step(59, YV, "Level of the largest shear stress", Measure::Length, level, &source::SHEAR_STRESS));
    let mut terms = Vec::new();
    for (at, p) in plates.iter().enumerate() {
        let (low, high) = edges(p);
        let [b, h, y] = &all[at];
        if low >= at_level - 1e-12 {
            terms.push(b.clone() * h.clone() * (y.clone() - YC.tree()));
        } else if high > at_level + 1e-12 {
            let reach = || upper_edge(at) - YV;
            terms.push(b.clone() * reach() * ((upper_edge(at) + YV) / 2 - YC));
        }
    }
    steps.extend(ends(Ends {
        top: upper_edge(last) - YC,
        bottom: YC - lower_edge(first),
        inertia: upright,
        minor_inertia: across,
        shear_moment: Tree::sum(terms),
        shear_width: all[plate][0].clone().into(),
        source: &source::PARALLEL_AXES,
    }));
}

/// Bent about the axis along the stack: every plate is centred on it.
fn turned(given: &Given, all: &[[Symbol; 3]], steps: &mut Vec<(u16, Definition)>, upright: Tree, across: Tree) {
    let plates = &given.plates;
    let widest = (0..plates.len()).max_by(|a, b| plates[*a].width.total_cmp(&plates[*b].width)).unwrap_or(0);
    // Just beyond the edge of a narrower plate the breadth drops: the stress can peak there or at the axis.
    let wider = |level: f64| (0..plates.len()).filter(move |at| plates[*at].width / 2.0 > level + 1e-12);
    let stress = |level: f64| {
        let moment: f64 =
            wider(level).map(|at| plates[at].height * (plates[at].width.powi(2) / 4.0 - level * level) / 2.0).sum();
        moment / wider(level).map(|at| plates[at].height).sum::<f64>()
    };
    let mut best = (stress(0.0), None);
    for (at, plate) in plates.iter().enumerate() {
        let level = plate.width / 2.0;
        if at != widest && wider(level).next().is_some() && stress(level) > best.0 * (1.0 + 1e-12) {
            best = (stress(level), Some(at));
        }
    }
    let level = best.1.map_or(0.0, |at| plates[at].width / 2.0);
    if let Some(at) = best.1 {
        steps.push(step(
            59,
            YV,
            "Level of the largest shear stress, beside a narrower plate",
            Measure::Length,
            all[at][0].clone() / 2,
            &source::SHEAR_STRESS,
        ));
    }
    let chosen: Vec<usize> = wider(level).collect();
    let moment = chosen
        .iter()
        .map(|at| {
            let [b, h, _] = &all[*at];
            match best.1 {
                None => h.clone() * b.squared() / 8,
                Some(_) => h.clone() * (b.squared() / 4 - YV.squared()) / 2,
            }
        })
        .collect();
    let half = || all[widest][0].clone() / 2;
    steps.extend(ends(Ends {
        top: half(),
        bottom: half(),
        inertia: across,
        minor_inertia: upright,
        shear_moment: Tree::sum(moment),
        shear_width: Tree::sum(chosen.iter().map(|at| all[*at][1].tree()).collect()),
        source: &source::PARALLEL_AXES,
    }));
}
