//! An angle with sharp corners: the width leg at the bottom, the depth leg rising at the left.
use super::symbol::{B, H, SY, SZ, T, YC, YV, ZC};
use super::{AREA, Ends, Given, Outline, Param, SectionKind, area, ends, length, positive, step};
use crate::formula::{Definition, Symbol, Tree, source};
use crate::units::Measure;

/// An angle.
pub(super) struct Angle;

const PARAMS: &[Param] = &[
    length("depth", H, "Length of the leg that rises, outside."),
    length("width", B, "Length of the leg that lies, outside."),
    length("thickness", T, "Thickness of both legs."),
];

impl SectionKind for Angle {
    fn name(&self) -> &'static str {
        "angle"
    }
    fn doc(&self) -> &'static str {
        "An angle with sharp corners, bent about the axis parallel to its width leg."
    }
    fn params(&self) -> &'static [Param] {
        PARAMS
    }
    fn faults(&self, given: &Given) -> Vec<(&'static str, String)> {
        let mut faults = positive(PARAMS, given);
        if let (Some(h), Some(b), Some(t)) = (given.get(&H), given.get(&B), given.get(&T))
            && t >= h.min(b)
        {
            faults.push(("thickness", "it must be less than both legs".into()));
        }
        faults
    }
    fn steps(&self, given: &Given) -> Vec<(u16, Definition)> {
        // About a side along leg `along`, from which the other leg rises by `up`.
        let first =
            |along: &Symbol, up: &Symbol| along.clone() * T.squared() / 2 + T * (up.squared() - T.squared()) / 2;
        let second = |along: &Symbol, up: &Symbol, centroid: &Symbol| {
            along.clone() * T.cubed() / 3 + T * (up.cubed() - T.cubed()) / 3 - AREA * centroid.squared()
        };
        let mut steps = vec![
            area(B * T + (H - T.tree()) * T),
            step(
                38,
                SY,
                "First moment of area about the outside of the width leg",
                Measure::AreaMoment,
                first(&B, &H),
                &source::PLANE_FIGURES,
            ),
            step(
                39,
                SZ,
                "First moment of area about the outside of the depth leg",
                Measure::AreaMoment,
                first(&H, &B),
                &source::PLANE_FIGURES,
            ),
        ];
        steps.push(step(
            41,
            YC,
            "Distance of the centroid from the outside of the width leg",
            Measure::Length,
            SY / AREA,
            &source::PLANE_FIGURES,
        ));
        steps.push(step(
            42,
            ZC,
            "Distance of the centroid from the outside of the depth leg",
            Measure::Length,
            SZ / AREA,
            &source::PLANE_FIGURES,
        ));
        let (upright, across) = (second(&B, &H, &YC), second(&H, &B, &ZC));
        let (reach, centroid, inertia, minor_inertia) =
            if given.turned { (B, ZC, across, upright) } else { (H, YC, upright, across) };
        let level = Tree::Max(vec![centroid.tree(), T.into()]);
        steps.push(step(
            59,
            YV,
            "Level of the largest shear stress above the lower side",
            Measure::Length,
            level,
            &source::SHEAR_STRESS,
        ));
        steps.extend(ends(Ends {
            top: reach.clone() - centroid.tree(),
            bottom: centroid.tree(),
            inertia,
            minor_inertia,
            shear_moment: T * (reach.clone() - YV.tree()) * (reach + YV.tree() - 2 * centroid) / 2,
            shear_width: T.into(),
            source: &source::PARALLEL_AXES,
        }));
        steps
    }
    fn outline(&self, given: &Given) -> Outline {
        let of = |symbol| given.get(&symbol).unwrap_or(0.0);
        let (h, b, t) = (of(H), of(B), of(T));
        Outline::new(vec![vec![[0.0, 0.0], [b, 0.0], [b, t], [t, t], [t, h], [0.0, h]]], given.turned)
    }
}
