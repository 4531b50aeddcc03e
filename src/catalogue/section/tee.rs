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
        let of = |symbol| given.get(&symbol).unwrap_or(0.0);
        let (h, b, tw, tf, r) = (of(H), of(B), of(TW), of(TF), of(R));
        if given.turned {
            let beside = (b * b / 4.0 - (tw / 2.0 + r).powi(2)) / 2.0;
            let at_axis = (tf * b * b / 8.0 + (h - tf) * tw * tw / 8.0) / h;
            let (moment, width) = if at_axis > beside {
                (with(TF * B.squared() / 8 + stem() * TW.squared() / 8, AR * (TW / 2 + CR)), H.tree())
            } else {
                let level = with(TW / 2, R.into());
                steps.push(step(
                    59,
                    YV,
                    "Level of the largest shear stress, beside the web",
                    Measure::Length,
                    level,
                    &source::SHEAR_STRESS,
                ));
                (TF * (B.squared() / 4 - YV.squared()) / 2, TF.tree())
            };
            steps.extend(ends(Ends {
                top: B / 2,
                bottom: B / 2,
                inertia: across,
                minor_inertia: upright,
                shear_moment: moment,
                shear_width: width,
                source: &source::PARALLEL_AXES,
            }));
        } else {
            let area = b * tf + (h - tf) * tw;
            let centroid = (b * tf * (h - tf / 2.0) + tw * (h - tf).powi(2) / 2.0) / area;
            let root = h - tf - r;
            let at_root = root.min(centroid) * (centroid - root.min(centroid) / 2.0);
            let in_flange = (h - centroid).powi(2) / 2.0;
            let (moment, width) = if centroid > h - tf && in_flange > at_root {
                (B * (H - YC.tree()).squared() / 2, B.tree())
            } else {
                let root = if fillet { H - TF.tree() - R } else { stem() };
                let level = Tree::Min(vec![YC.into(), root]);
                let title = "Level of the largest shear stress above the foot of the web";
                steps.push(step(59, YV, title, Measure::Length, level, &source::SHEAR_STRESS));
                (TW * YV * (YC - YV / 2), TW.tree())
            };
            steps.extend(ends(Ends {
                top: H - YC.tree(),
                bottom: YC.into(),
                inertia: upright,
                minor_inertia: across,
                shear_moment: moment,
                shear_width: width,
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
