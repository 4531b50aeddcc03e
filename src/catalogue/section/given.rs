//! A section read from a published table: its properties are inputs.
use super::{
    AREA, BOTTOM, Given, INERTIA, MINOR_INERTIA, MINOR_RADIUS, Outline, Param, RADIUS, SectionKind, TOP, positive, step,
};
use crate::formula::{Definition, source};
use crate::units::Measure;

/// A section whose properties are given.
pub(super) struct GivenSection;

const PARAMS: &[Param] = &[
    Param { key: "area", symbol: AREA, measure: Measure::Area, default: None, doc: "Cross-sectional area." },
    Param {
        key: "inertia",
        symbol: INERTIA,
        measure: Measure::Inertia,
        default: None,
        doc: "Second moment of area about the axis of bending.",
    },
    Param {
        key: "top",
        symbol: TOP,
        measure: Measure::Length,
        default: None,
        doc: "Distance of the top fibre from the centroid.",
    },
    Param {
        key: "bottom",
        symbol: BOTTOM,
        measure: Measure::Length,
        default: None,
        doc: "Distance of the bottom fibre from the centroid.",
    },
    Param {
        key: "minor_inertia",
        symbol: MINOR_INERTIA,
        measure: Measure::Inertia,
        default: None,
        doc: "Second moment of area about the other axis.",
    },
];

impl SectionKind for GivenSection {
    fn name(&self) -> &'static str {
        "given"
    }
    fn doc(&self) -> &'static str {
        "A section read from a published table; all but its area may be left out where nothing needs it."
    }
    fn params(&self) -> &'static [Param] {
        PARAMS
    }
    fn faults(&self, given: &Given) -> Vec<(&'static str, String)> {
        positive(PARAMS, given)
    }
    fn steps(&self, given: &Given) -> Vec<(u16, Definition)> {
        let mut steps = Vec::new();
        if given.get(&INERTIA).is_some() {
            steps.push(step(
                52,
                RADIUS,
                "Radius of gyration about the axis of bending",
                Measure::Length,
                (INERTIA / AREA).root(),
                &source::PLANE_FIGURES,
            ));
        }
        if given.get(&MINOR_INERTIA).is_some() {
            steps.push(step(
                53,
                MINOR_RADIUS,
                "Radius of gyration about the other axis",
                Measure::Length,
                (MINOR_INERTIA / AREA).root(),
                &source::PLANE_FIGURES,
            ));
        }
        steps
    }
    fn outline(&self, _: &Given) -> Outline {
        Outline::default()
    }
    fn may_turn(&self) -> bool {
        false
    }
}
