//! A solid rectangle.
use super::symbol::{B, H};
use super::{Ends, Given, Outline, Param, SectionKind, area, ends, length, positive};
use crate::formula::{Definition, source};

/// A solid rectangle.
pub(super) struct Rectangle;

const PARAMS: &[Param] = &[
    length("depth", H, "Height in the plane of bending."),
    length("width", B, "Breadth across the plane of bending."),
];

impl SectionKind for Rectangle {
    fn name(&self) -> &'static str {
        "rectangle"
    }
    fn doc(&self) -> &'static str {
        "A solid rectangle, depth along local y."
    }
    fn params(&self) -> &'static [Param] {
        PARAMS
    }
    fn faults(&self, given: &Given) -> Vec<(&'static str, String)> {
        positive(PARAMS, given)
    }
    fn steps(&self, given: &Given) -> Vec<(u16, Definition)> {
        let [h, b] = if given.turned { [B, H] } else { [H, B] };
        let mut steps = vec![area(B * H)];
        steps.extend(ends(Ends {
            top: h.clone() / 2,
            bottom: h.clone() / 2,
            inertia: b.clone() * h.cubed() / 12,
            minor_inertia: h.clone() * b.cubed() / 12,
            shear_moment: b.clone() * h.squared() / 8,
            shear_width: b.into(),
            source: &source::PLANE_FIGURES,
        }));
        steps
    }
    fn outline(&self, given: &Given) -> Outline {
        let (b, h) = (given.get(&B).unwrap_or(0.0), given.get(&H).unwrap_or(0.0));
        Outline::new(vec![Outline::rectangle(b, h)], given.turned)
    }
}
