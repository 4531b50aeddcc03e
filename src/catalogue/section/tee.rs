//! A tee, flange on the +y side.
use super::arc::{corner, quarter};
use super::i_section::{has_fillet, web_and_flange_faults};
use super::symbol::{AR, B, CR, H, IR, R, SY, TF, TW, YC, YV};
use super::{AREA, Ends, Given, Outline, Param, SectionKind, area, ends, length, optional, step};
use crate::formula::{Definition, Tree, source};
use crate::units::Measure;

/// A tee.
pub(super) struct Tee;

const PARAMS: &[Param] = &[
    length("depth", H, "Height over flange and web."),
    length("width", B, "Breadth of the flange."),
    length("web", TW, "Web thickness."),
    length("flange", TF, "Flange thickness."),
    optional("fillet", R, "Root radius between web and flange; sharp where left out."),
];

impl SectionKind for Tee {
    fn name(&self) -> &'static str {
        "tee"
    }
    fn doc(&self) -> &'static str {
        "A tee, its flange on the +y side."
    }
    fn params(&self) -> &'static [Param] {
        PARAMS
    }
    fn faults(&self, given: &Given) -> Vec<(&'static str, String)> {
        web_and_flange_faults(PARAMS, given, 1.0, 2.0)
    }
    fn steps(&self, given: &Given) -> Vec<(u16, Definition)> {
        let fillet = has_fillet(given);
        let mut steps = if fillet { corner(1, &R, &AR, &CR, &IR, "fillet") } else { Vec::new() };
        let stem = || H - TF.tree();
        let with = |whole: Tree, part: Tree| if fillet { whole + part } else { whole };
        steps.push(area(with(B * TF + stem() * TW, 2 * AR)));
        let first = with(B * TF * (H - TF / 2) + TW * stem().squared() / 2, 2 * (AR * (H - TF.tree() - CR)));
        steps.push(step(
            41,
            SY,
            "First moment of area about the foot of the web",
            Measure::AreaMoment,
            first,
            &source::PLANE_FIGURES,
        ));
        steps.push(step(
            42,
            YC,
            "Height of the centroid above the foot of the web",
            Measure::Length,
            SY / AREA,
            &source::PLANE_FIGURES,
        ));
        let about_foot = with(
            (B * H.cubed() - (B - TW.tree()) * stem().cubed()) / 3,
            2 * (IR + AR * (H - TF.tree() - CR).squared()),
        );
        let upright = about_foot - AREA * YC.squared();
        let across = with(TF * B.cubed() / 12 + stem() * TW.cubed() / 12, 2 * (IR + AR * (TW / 2 + CR).squared()));
        if given.turned {
            let level = with(TW / 2, R.into());
            steps.push(step(
                59,
                YV,
                "Level of the largest shear stress, beside the web",
                Measure::Length,
                level,
                &source::SHEAR_STRESS,
            ));
            steps.extend(ends(Ends {
                top: B / 2,
                bottom: B / 2,
                inertia: across,
                minor_inertia: upright,
                shear_moment: TF * (B.squared() / 4 - YV.squared()) / 2,
                shear_width: TF.into(),
                source: &source::PARALLEL_AXES,
            }));
        } else {
            let root = if fillet { H - TF.tree() - R } else { stem() };
            let level = Tree::Min(vec![YC.into(), root]);
            steps.push(step(
                59,
                YV,
                "Level of the largest shear stress above the foot of the web",
                Measure::Length,
                level,
                &source::SHEAR_STRESS,
            ));
            steps.extend(ends(Ends {
                top: H - YC.tree(),
                bottom: YC.into(),
                inertia: upright,
                minor_inertia: across,
                shear_moment: TW * YV * (YC - YV / 2),
                shear_width: TW.into(),
                source: &source::PARALLEL_AXES,
            }));
        }
        steps
    }
    fn outline(&self, given: &Given) -> Outline {
        let of = |symbol| given.get(&symbol).unwrap_or(0.0);
        let (h, b, tw, tf, r) = (of(H), of(B), of(TW), of(TF), of(R));
        let y = h - tf - r;
        let mut points = vec![[-tw / 2.0, 0.0], [tw / 2.0, 0.0]];
        points.extend(quarter([tw / 2.0 + r, y], r, 180.0, 90.0));
        points.extend([[b / 2.0, h - tf], [b / 2.0, h], [-b / 2.0, h], [-b / 2.0, h - tf]]);
        points.extend(quarter([-tw / 2.0 - r, y], r, 90.0, 0.0));
        Outline::new(vec![points], given.turned)
    }
}
