//! Corners: a square of side r less a quarter circle, as it fills a fillet or is cut from a rounded corner.
use super::step;
use crate::formula::{Definition, Symbol, Tree, source};
use crate::units::Measure;

/// Area, distance of the centroid from both sides, and own second moment of a corner of radius `r`.
///
/// # Source
/// The square r² less the quarter circle πr²/4: first moment r³(10 − 3π)/12, second moment about a side
/// r⁴(1 − 5π/16), from [`source::PLANE_FIGURES`].
pub(super) fn corner(
    nn: u16,
    r: &Symbol,
    area: &Symbol,
    centroid: &Symbol,
    inertia: &Symbol,
    what: &str,
) -> Vec<(u16, Definition)> {
    let pi = || Tree::Pi;
    vec![
        step(
            nn,
            area.clone(),
            &format!("Area of one {what}"),
            Measure::Area,
            (Tree::from(1) - pi() / 4) * r.squared(),
            &source::PLANE_FIGURES,
        ),
        step(
            nn + 1,
            centroid.clone(),
            &format!("Distance of the centroid of one {what} from its sides"),
            Measure::Length,
            (Tree::from(10) - 3 * pi()) * r.tree() / (3 * (4 - pi())),
            &source::PLANE_FIGURES,
        ),
        step(
            nn + 2,
            inertia.clone(),
            &format!("Second moment of one {what} about its own centroid"),
            Measure::Inertia,
            (Tree::from(1) - 5 * pi() / 16) * r.power(4) - area.tree() * centroid.squared(),
            &source::PLANE_FIGURES,
        ),
    ]
}

/// Points of a quarter circle from one angle to another, in chords.
pub(super) fn quarter(centre: [f64; 2], radius: f64, from_degrees: f64, to_degrees: f64) -> Vec<[f64; 2]> {
    const CHORDS: u32 = 16;
    (0..=CHORDS)
        .map(|at| {
            let part = f64::from(at) / f64::from(CHORDS);
            let angle = (from_degrees + part * (to_degrees - from_degrees)).to_radians();
            [centre[0] + radius * angle.cos(), centre[1] + radius * angle.sin()]
        })
        .collect()
}
