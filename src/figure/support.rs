//! Symbols of supports, turned as the supports are.
use super::canvas::{Canvas, Clear, along, ink};
use super::scene::Stroke;
use super::view::View;
use crate::model::Support;

/// Height of a support's triangle, mm.
const TALL: f64 = 4.0;

/// Draws every support.
pub(super) fn draw(canvas: &mut Canvas, view: &View<'_>, weight: f64) {
    for support in &view.model.supports {
        one(canvas, view, support, ink(weight));
    }
}

fn one(canvas: &mut Canvas, view: &View<'_>, support: &Support, stroke: Stroke) {
    let at = view.node(support.node);
    let inward = view.inward(support.node);
    let (c, s) = (support.turned.cos(), support.turned.sin());
    // The support's own x and y on the sheet.
    let axes = [[c, -s], [-s, -c]];
    let away = |axis: [f64; 2]| {
        let into = axis[0] * inward[0] + axis[1] * inward[1];
        if into < -0.3 { axis } else { axis.map(|v| -v) }
    };
    let below = away(axes[1]);
    match support.hold {
        [true, true, true] => {
            let size = inward[0].hypot(inward[1]);
            let out = if size > 1e-6 { inward.map(|v| -v / size) } else { below };
            ground(canvas, at, out, 4.2, stroke);
        }
        [true, true, false] => {
            triangle(canvas, at, below, stroke);
            ground(canvas, along(at, below, TALL), below, 3.6, stroke);
        }
        [held_x, held_y, held_turn] => {
            let axis = match (held_x, held_y) {
                (true, _) => Some(away(axes[0])),
                (_, true) => Some(below),
                _ => None,
            };
            if let Some(out) = axis {
                roller(canvas, at, out, held_turn, stroke);
            } else if held_turn {
                let side = [-below[1], below[0]];
                let corner = |a: f64, b: f64| along(along(at, side, a), below, b);
                canvas.path(
                    vec![corner(-1.6, -1.6), corner(1.6, -1.6), corner(1.6, 1.6), corner(-1.6, 1.6)],
                    true,
                    stroke,
                    Clear::Hard,
                );
            }
        }
    }
    for (direction, axis) in axes.iter().enumerate() {
        if support.spring[direction].is_some() {
            spring(canvas, at, away(*axis), stroke);
        }
    }
    if support.spring[2].is_some() {
        spiral(canvas, at, below, stroke);
    }
}

fn triangle(canvas: &mut Canvas, at: [f64; 2], out: [f64; 2], stroke: Stroke) {
    let side = [-out[1], out[0]];
    let foot = along(at, out, TALL);
    canvas.shape(vec![at, along(foot, side, 2.4), along(foot, side, -2.4)], Some(stroke), 1.0);
}

/// A line with the ground hatched beyond it.
fn ground(canvas: &mut Canvas, at: [f64; 2], out: [f64; 2], half: f64, stroke: Stroke) {
    let side = [-out[1], out[0]];
    canvas.line(
        along(at, side, -half),
        along(at, side, half),
        Stroke { width: 1.6 * stroke.width, ..stroke },
        Clear::Hard,
    );
    let thin = Stroke { width: 0.6 * stroke.width, ..stroke };
    let count = (half / 0.6).round() as i32;
    for k in 0..count {
        let start = along(at, side, -half + 1.2 * f64::from(k) + 1.2);
        canvas.line(start, along(along(start, side, -1.2), out, 1.3), thin, Clear::Hard);
    }
}

/// A triangle on two wheels; a block on two wheels where turning is held as well.
fn roller(canvas: &mut Canvas, at: [f64; 2], out: [f64; 2], held_turn: bool, stroke: Stroke) {
    let side = [-out[1], out[0]];
    let tall = if held_turn { 1.0 } else { TALL - 1.2 };
    if held_turn {
        let foot = along(at, out, tall);
        canvas.shape(
            vec![along(at, side, 2.4), along(at, side, -2.4), along(foot, side, -2.4), along(foot, side, 2.4)],
            Some(stroke),
            0.0,
        );
    } else {
        let foot = along(at, out, tall);
        canvas.shape(vec![at, along(foot, side, 2.0), along(foot, side, -2.0)], Some(stroke), 1.0);
    }
    for by in [-1.2, 1.2] {
        canvas.circle(along(along(at, out, tall + 0.6), side, by), 0.6, Some(stroke), 1.0);
    }
    ground(canvas, along(at, out, tall + 1.3), out, 3.0, stroke);
}

fn spring(canvas: &mut Canvas, at: [f64; 2], out: [f64; 2], stroke: Stroke) {
    let side = [-out[1], out[0]];
    let mut points = vec![at, along(at, out, 1.2)];
    for k in 0..5 {
        let by = if k % 2 == 0 { 1.3 } else { -1.3 };
        points.push(along(along(at, out, 1.6 + 0.8 * f64::from(k)), side, by));
    }
    points.extend([along(at, out, 5.2), along(at, out, 6.2)]);
    canvas.path(points, false, stroke, Clear::Hard);
    ground(canvas, along(at, out, 6.2), out, 2.4, stroke);
}

fn spiral(canvas: &mut Canvas, at: [f64; 2], out: [f64; 2], stroke: Stroke) {
    let start = out[1].atan2(out[0]);
    let points: Vec<[f64; 2]> = (0..=36)
        .map(|k| f64::from(k) / 36.0)
        .map(|t| {
            let turn = start + 2.5 * std::f64::consts::TAU * t - 0.5 * std::f64::consts::TAU;
            along(at, [turn.cos(), turn.sin()], 0.6 + 2.2 * t)
        })
        .collect();
    let end = points.last().copied().unwrap_or(at);
    canvas.path(points, false, stroke, Clear::Hard);
    ground(canvas, end, out, 1.8, stroke);
}
