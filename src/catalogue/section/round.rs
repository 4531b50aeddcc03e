//! A solid circle.
use super::arc::quarter;
use super::symbol::D;
use super::{Ends, Given, Outline, Param, SectionKind, area, ends, length, positive};
use crate::formula::{Definition, Tree, source};

/// A solid circle.
pub(super) struct Round;

const PARAMS: &[Param] = &[length("diameter", D, "Diameter.")];

impl SectionKind for Round {
    fn name(&self) -> &'static str {
        "round"
    }
    fn doc(&self) -> &'static str {
        "A solid round bar."
    }
    fn params(&self) -> &'static [Param] {
        PARAMS
    }
    fn faults(&self, given: &Given) -> Vec<(&'static str, String)> {
        positive(PARAMS, given)
    }
    fn steps(&self, _: &Given) -> Vec<(u16, Definition)> {
        let mut steps = vec![area(Tree::Pi * D.squared() / 4)];
        steps.extend(ends(Ends {
            top: D / 2,
            bottom: D / 2,
            inertia: Tree::Pi * D.power(4) / 64,
            minor_inertia: Tree::Pi * D.power(4) / 64,
            shear_moment: D.cubed() / 12,
            shear_width: D.into(),
            source: &source::PLANE_FIGURES,
        }));
        steps
    }
    fn outline(&self, given: &Given) -> Outline {
        let radius = given.get(&D).unwrap_or(0.0) / 2.0;
        Outline { loops: vec![circle(radius)] }
    }
}

/// A full circle about the origin, in chords.
pub(super) fn circle(radius: f64) -> Vec<[f64; 2]> {
    let mut points: Vec<[f64; 2]> = [0.0, 90.0, 180.0, 270.0]
        .into_iter()
        .flat_map(|start| quarter([0.0, 0.0], radius, start, start + 90.0).into_iter().skip(1))
        .collect();
    points.rotate_right(1);
    points
}
