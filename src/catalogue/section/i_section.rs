//! A doubly symmetric I or H section with root fillets.
use super::arc::{corner, quarter};
use super::symbol::{AR, B, CR, H, IR, R, TF, TW, YV};
use super::{Ends, Given, Outline, Param, SectionKind, area, ends, length, optional, positive, step};
use crate::formula::{Definition, Tree, source};
use crate::units::Measure;

/// A doubly symmetric I or H section.
pub(super) struct ISection;

const PARAMS: &[Param] = &[
    length("depth", H, "Height over both flanges."),
    length("width", B, "Breadth of the flanges."),
    length("web", TW, "Web thickness."),
    length("flange", TF, "Flange thickness."),
    optional("fillet", R, "Root radius between web and flange; sharp where left out."),
];

/// Whether there is a fillet.
pub(super) fn has_fillet(given: &Given) -> bool {
    given.get(&R).is_some_and(|r| r > 0.0)
}

/// Faults of web, flange and fillet, for shapes with `flanges` flanges on a web of which `sides` sides carry them.
pub(super) fn web_and_flange_faults(
    params: &'static [Param],
    given: &Given,
    flanges: f64,
    sides: f64,
) -> Vec<(&'static str, String)> {
    let mut faults = positive(params, given);
    if let (Some(h), Some(b), Some(tw), Some(tf)) = (given.get(&H), given.get(&B), given.get(&TW), given.get(&TF)) {
        let r = given.get(&R).unwrap_or(0.0);
        if flanges * tf >= h {
            faults.push(("flange", "the flanges fill the whole depth".into()));
        } else if tw >= b {
            faults.push(("web", "it must be thinner than the flange is wide".into()));
        } else {
            if flanges * (tf + r) > h {
                faults.push(("fillet", "it is too large for the depth between the flanges".into()));
            }
            if tw + sides * r > b {
                faults.push(("fillet", "it is too large for the flange's outstand".into()));
            }
        }
    }
    faults
}

impl SectionKind for ISection {
    fn name(&self) -> &'static str {
        "i"
    }
    fn doc(&self) -> &'static str {
        "A doubly symmetric I or H section with parallel flanges."
    }
    fn params(&self) -> &'static [Param] {
        PARAMS
    }
    fn faults(&self, given: &Given) -> Vec<(&'static str, String)> {
        web_and_flange_faults(PARAMS, given, 2.0, 2.0)
    }
    fn steps(&self, given: &Given) -> Vec<(u16, Definition)> {
        let fillet = has_fillet(given);
        let mut steps = if fillet { corner(1, &R, &AR, &CR, &IR, "fillet") } else { Vec::new() };
        let clear = || H - 2 * TF;
        let with = |whole: Tree, part: Tree| if fillet { whole + part } else { whole };
        steps.push(area(with(2 * (B * TF) + clear() * TW, 4 * AR)));
        let strong = with(
            B * H.cubed() / 12 - (B - TW.tree()) * clear().cubed() / 12,
            4 * (IR + AR * (H / 2 - TF - CR).squared()),
        );
        let weak = with(TF * B.cubed() / 6 + clear() * TW.cubed() / 12, 4 * (IR + AR * (TW / 2 + CR).squared()));
        if given.turned {
            // The stress peaks at the axis, where the breadth is the whole depth, or in the flanges where the fillets end.
            let of = |symbol| given.get(&symbol).unwrap_or(0.0);
            let (h, b, tw, tf, r) = (of(H), of(B), of(TW), of(TF), of(R));
            let beside = (b * b / 4.0 - (tw / 2.0 + r).powi(2)) / 2.0;
            let at_axis = (tf * b * b / 4.0 + (h - 2.0 * tf) * tw * tw / 8.0) / h;
            let (moment, width) = if at_axis > beside {
                let half = TF * B.squared() / 4 + clear() * TW.squared() / 8;
                (with(half, 2 * (AR * (TW / 2 + CR))), H.tree())
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
                (TF * (B.squared() / 4 - YV.squared()), 2 * TF)
            };
            steps.extend(ends(Ends {
                top: B / 2,
                bottom: B / 2,
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
                shear_moment: with(half, 2 * (AR * (H / 2 - TF - CR))),
                shear_width: TW.into(),
                source: &source::PARALLEL_AXES,
            }));
        }
        steps
    }
    fn outline(&self, given: &Given) -> Outline {
        let of = |symbol| given.get(&symbol).unwrap_or(0.0);
        let (h, b, tw, tf, r) = (of(H), of(B), of(TW), of(TF), of(R));
        let (x, y) = (tw / 2.0 + r, h / 2.0 - tf - r);
        let mut points = vec![[-b / 2.0, -h / 2.0], [b / 2.0, -h / 2.0], [b / 2.0, tf - h / 2.0]];
        points.extend(quarter([x, -y], r, 270.0, 180.0));
        points.extend(quarter([x, y], r, 180.0, 90.0));
        points.extend([[b / 2.0, h / 2.0 - tf], [b / 2.0, h / 2.0], [-b / 2.0, h / 2.0], [-b / 2.0, h / 2.0 - tf]]);
        points.extend(quarter([-x, y], r, 90.0, 0.0));
        points.extend(quarter([-x, -y], r, 0.0, -90.0));
        points.push([-b / 2.0, tf - h / 2.0]);
        Outline::new(vec![points], given.turned)
    }
}
