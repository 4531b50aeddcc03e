//! A circular hollow section.
use super::round::circle;
use super::symbol::{D, DI, T};
use super::{Ends, Given, Outline, Param, SectionKind, area, ends, length, positive, step};
use crate::formula::{Definition, Tree, source};
use crate::units::Measure;

/// A circular hollow section.
pub(super) struct Tube;

const PARAMS: &[Param] = &[length("diameter", D, "Outside diameter."), length("wall", T, "Wall thickness.")];

impl SectionKind for Tube {
    fn name(&self) -> &'static str {
        "tube"
    }
    fn doc(&self) -> &'static str {
        "A circular hollow section."
    }
    fn params(&self) -> &'static [Param] {
        PARAMS
    }
    fn faults(&self, given: &Given) -> Vec<(&'static str, String)> {
        let mut faults = positive(PARAMS, given);
        if let (Some(d), Some(t)) = (given.get(&D), given.get(&T))
            && t >= d / 2.0
        {
            faults.push(("wall", "it must be less than half the diameter; a solid bar is `shape: round`".into()));
        }
        faults
    }
    fn steps(&self, _: &Given) -> Vec<(u16, Definition)> {
        let mut steps = vec![
            step(1, DI, "Inside diameter", Measure::Length, D - 2 * T, &source::PLANE_FIGURES),
            area(Tree::Pi * (D.squared() - DI.squared()) / 4),
        ];
        let inertia = || Tree::Pi * (D.power(4) - DI.power(4)) / 64;
        steps.extend(ends(Ends {
            top: D / 2,
            bottom: D / 2,
            inertia: inertia(),
            minor_inertia: inertia(),
            shear_moment: (D.cubed() - DI.cubed()) / 12,
            shear_width: 2 * T,
            source: &source::PLANE_FIGURES,
        }));
        steps
    }
    fn outline(&self, given: &Given) -> Outline {
        let (d, t) = (given.get(&D).unwrap_or(0.0), given.get(&T).unwrap_or(0.0));
        Outline { loops: vec![circle(d / 2.0), circle(d / 2.0 - t)] }
    }
}
