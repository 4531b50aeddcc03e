//! A channel with parallel flanges, web at the left.
use super::arc::{corner, quarter};
use super::i_section::{has_fillet, web_and_flange_faults};
use super::symbol::{AR, B, CR, H, IR, R, SZ, TF, TW, YV, ZC};
use super::{AREA, Ends, Given, Outline, Param, SectionKind, area, ends, length, optional, step};
use crate::formula::{Definition, Tree, source};
use crate::units::Measure;

/// A channel.
pub(super) struct Channel;

const PARAMS: &[Param] = &[
    length("depth", H, "Height over both flanges."),
    length("width", B, "Breadth of the flanges, web included."),
    length("web", TW, "Web thickness."),
    length("flange", TF, "Flange thickness."),
    optional("fillet", R, "Root radius between web and flange; sharp where left out."),
];

impl SectionKind for Channel {
    fn name(&self) -> &'static str {
        "channel"
    }
    fn doc(&self) -> &'static str {
        "A channel with parallel flanges, its web at the left."
    }
    fn params(&self) -> &'static [Param] {
        PARAMS
    }
    fn faults(&self, given: &Given) -> Vec<(&'static str, String)> {
        web_and_flange_faults(PARAMS, given, 2.0, 1.0)
    }
    fn steps(&self, given: &Given) -> Vec<(u16, Definition)> {
        let fillet = has_fillet(given);
        let mut steps = if fillet { corner(1, &R, &AR, &CR, &IR, "fillet") } else { Vec::new() };
        let clear = || H - 2 * TF;
        let with = |whole: Tree, part: Tree| if fillet { whole + part } else { whole };
        steps.push(area(with(2 * (B * TF) + clear() * TW, 2 * AR)));
        let first = with(H * TW.squared() / 2 + TF * (B.squared() - TW.squared()), 2 * (AR * (TW + CR)));
        steps.push(step(
            41,
            SZ,
            "First moment of area about the back of the web",
            Measure::AreaMoment,
            first,
            &source::PLANE_FIGURES,
        ));
        steps.push(step(
            42,
            ZC,
            "Distance of the centroid from the back of the web",
            Measure::Length,
            SZ / AREA,
            &source::PLANE_FIGURES,
        ));
        let strong = with(
            B * H.cubed() / 12 - (B - TW.tree()) * clear().cubed() / 12,
            2 * (IR + AR * (H / 2 - TF - CR).squared()),
        );
        let about_back =
            with(H * TW.cubed() / 3 + 2 * (TF * (B.cubed() - TW.cubed())) / 3, 2 * (IR + AR * (TW + CR).squared()));
        let weak = about_back - AREA * ZC.squared();
        if given.turned {
            let of = |symbol| given.get(&symbol).unwrap_or(0.0);
            let (h, b, tw, tf, r) = (of(H), of(B), of(TW), of(TF), of(R));
            let area = 2.0 * b * tf + (h - 2.0 * tf) * tw;
            let centroid = (h * tw * tw / 2.0 + tf * (b * b - tw * tw)) / area;
            let level = centroid.max(tw + r);
            let in_flanges = (b - level) * (b + level - 2.0 * centroid) / 2.0;
            let (moment, width) = if centroid < tw && centroid * centroid / 2.0 > in_flanges {
                (H * ZC.squared() / 2, H.tree())
            } else {
                let level = Tree::Max(vec![ZC.into(), with(TW.tree(), R.into())]);
                let title = "Level of the largest shear stress above the back of the web";
                steps.push(step(59, YV, title, Measure::Length, level, &source::SHEAR_STRESS));
                (TF * (B - YV.tree()) * (B + YV.tree() - 2 * ZC), 2 * TF)
            };
            steps.extend(ends(Ends {
                top: B - ZC.tree(),
                bottom: ZC.into(),
                inertia: weak,
                minor_inertia: strong,
                shear_moment: moment,
                shear_width: width,
                source: &source::PARALLEL_AXES,
            }));
        } else {
            let half = B * TF * (H - TF.tree()) / 2 + TW * (H / 2 - TF).squared() / 2;
            steps.extend(ends(Ends {
                top: H / 2,
                bottom: H / 2,
                inertia: strong,
                minor_inertia: weak,
                shear_moment: with(half, AR * (H / 2 - TF - CR)),
                shear_width: TW.into(),
                source: &source::PARALLEL_AXES,
            }));
        }
        steps
    }
    fn outline(&self, given: &Given) -> Outline {
        let of = |symbol| given.get(&symbol).unwrap_or(0.0);
        let (h, b, tw, tf, r) = (of(H), of(B), of(TW), of(TF), of(R));
        let mut points = vec![[0.0, -h / 2.0], [b, -h / 2.0], [b, tf - h / 2.0]];
        points.extend(quarter([tw + r, tf + r - h / 2.0], r, 270.0, 180.0));
        points.extend(quarter([tw + r, h / 2.0 - tf - r], r, 180.0, 90.0));
        points.extend([[b, h / 2.0 - tf], [b, h / 2.0], [0.0, h / 2.0]]);
        Outline::new(vec![points], given.turned)
    }
}
