//! A rectangular hollow section, corners rounded or sharp.
use super::arc::{corner, quarter};
use super::symbol::{ARI, ARO, B, BI, CRI, CRO, H, HI, IRI, IRO, RI, RO, T};
use super::{Ends, Given, Outline, Param, SectionKind, area, ends, length, optional, positive, step};
use crate::formula::{Definition, Symbol, Tree, source};
use crate::units::Measure;

/// A rectangular hollow section.
pub(super) struct BoxSection;

const PARAMS: &[Param] = &[
    length("depth", H, "Outside height in the plane of bending."),
    length("width", B, "Outside breadth across it."),
    length("wall", T, "Wall thickness."),
    optional("outer_radius", RO, "Outside corner radius; sharp where left out."),
    optional("inner_radius", RI, "Inside corner radius; sharp where left out."),
];

/// Whether a radius is more than a sharp corner.
fn is_rounded(given: &Given, radius: &Symbol) -> bool {
    given.get(radius).is_some_and(|r| r > 0.0)
}

/// A sum less four corners, where there are any.
fn less_corners(whole: Tree, corners: Option<Tree>) -> Tree {
    match corners {
        Some(corners) => whole - 4 * corners,
        None => whole,
    }
}

impl SectionKind for BoxSection {
    fn name(&self) -> &'static str {
        "box"
    }
    fn doc(&self) -> &'static str {
        "A square or rectangular hollow section."
    }
    fn params(&self) -> &'static [Param] {
        PARAMS
    }
    fn faults(&self, given: &Given) -> Vec<(&'static str, String)> {
        let mut faults = positive(PARAMS, given);
        if let (Some(h), Some(b), Some(t)) = (given.get(&H), given.get(&B), given.get(&T)) {
            let least = h.min(b);
            if t >= least / 2.0 {
                faults.push((
                    "wall",
                    "it must be less than half the depth and half the width; a solid is `shape: rectangle`".into(),
                ));
            }
            if given.get(&RO).is_some_and(|r| r > least / 2.0) {
                faults.push(("outer_radius", "it must not be more than half the smaller side".into()));
            }
            if given.get(&RI).is_some_and(|r| r > (least / 2.0 - t).max(0.0)) {
                faults.push(("inner_radius", "it must not be more than half the smaller inside width".into()));
            }
            if let (Some(outer), Some(inner)) = (given.get(&RO), given.get(&RI))
                && outer - inner >= t * std::f64::consts::SQRT_2 / (std::f64::consts::SQRT_2 - 1.0)
            {
                faults.push((
                    "outer_radius",
                    "with so small an inner radius it cuts through the wall at the corners".into(),
                ));
            }
        }
        faults
    }
    fn steps(&self, given: &Given) -> Vec<(u16, Definition)> {
        let [h, b, hi, bi] = if given.turned { [B, H, BI, HI] } else { [H, B, HI, BI] };
        let (outer, inner) = (is_rounded(given, &RO), is_rounded(given, &RI));
        let mut steps = vec![
            step(1, HI, "Inside height", Measure::Length, H - 2 * T, &source::PLANE_FIGURES),
            step(2, BI, "Inside breadth", Measure::Length, B - 2 * T, &source::PLANE_FIGURES),
        ];
        if outer {
            steps.extend(corner(3, &RO, &ARO, &CRO, &IRO, "outside corner"));
        }
        if inner {
            steps.extend(corner(6, &RI, &ARI, &CRI, &IRI, "inside corner"));
        }
        let mut whole = less_corners(B * H - BI * HI, outer.then(|| ARO.tree()));
        if inner {
            whole = whole + 4 * ARI;
        }
        steps.push(area(whole));
        let inertia = |b: &Symbol, h: &Symbol, bi: &Symbol, hi: &Symbol| {
            let own = |i: Symbol, a: Symbol, c: Symbol, height: &Symbol| i + a * (height.clone() / 2 - c).squared();
            let mut sum = less_corners(
                b.clone() * h.cubed() / 12 - bi.clone() * hi.cubed() / 12,
                outer.then(|| own(IRO, ARO, CRO, h)),
            );
            if inner {
                sum = sum + 4 * own(IRI, ARI, CRI, hi);
            }
            sum
        };
        let mut moment = (b.clone() * h.squared() - bi.clone() * hi.squared()) / 8;
        if outer {
            moment = moment - 2 * (ARO * (h.clone() / 2 - CRO));
        }
        if inner {
            moment = moment + 2 * (ARI * (hi.clone() / 2 - CRI));
        }
        steps.extend(ends(Ends {
            top: h.clone() / 2,
            bottom: h.clone() / 2,
            inertia: inertia(&b, &h, &bi, &hi),
            minor_inertia: inertia(&h, &b, &hi, &bi),
            shear_moment: moment,
            shear_width: 2 * T,
            source: &source::PARALLEL_AXES,
        }));
        steps
    }
    fn outline(&self, given: &Given) -> Outline {
        let of = |symbol: &Symbol| given.get(symbol).unwrap_or(0.0);
        let (b, h, t) = (of(&B), of(&H), of(&T));
        Outline::new(vec![rounded(b, h, of(&RO)), rounded(b - 2.0 * t, h - 2.0 * t, of(&RI))], given.turned)
    }
}

/// A rectangle about the origin with rounded corners.
fn rounded(width: f64, height: f64, radius: f64) -> Vec<[f64; 2]> {
    if radius <= 0.0 {
        return Outline::rectangle(width, height);
    }
    let (x, y) = (width / 2.0 - radius, height / 2.0 - radius);
    [([x, y], 0.0), ([-x, y], 90.0), ([-x, -y], 180.0), ([x, -y], 270.0)]
        .into_iter()
        .flat_map(|(centre, start)| quarter(centre, radius, start, start + 90.0))
        .collect()
}
