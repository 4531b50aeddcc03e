//! Cross-sections: outline, axes through the centroid, dimensions.
use super::Figure;
use super::canvas::{Canvas, Clear, SIZE, along, ink, line};
use super::number::{bare, number, quantity};
use super::scene::{Anchor, Dash, Style};
use crate::catalogue::section::Outline;
use crate::model::{Display, Section};
use crate::units::Measure;

/// Largest size of the outline, mm.
const ROOM: [f64; 2] = [46.0, 34.0];

/// The figure `section.<name>`; `None` where the shape has no outline.
#[must_use]
pub fn section(display: &Display, section: &Section) -> Option<Figure> {
    let outline = section.kind.outline(&section.given);
    let points: Vec<[f64; 2]> = outline.loops.iter().flatten().copied().collect();
    let bound = |i: usize| {
        let all = points.iter().map(|p| p[i]);
        (all.clone().fold(f64::INFINITY, f64::min), all.fold(f64::NEG_INFINITY, f64::max))
    };
    let ((left, right), (low, high)) = (bound(0), bound(1));
    let size = [right - left, high - low];
    if !size.iter().all(|s| s.is_finite() && *s > 0.0) {
        return None;
    }
    let scale = (ROOM[0] / size[0]).min(ROOM[1] / size[1]);
    let centre = [58.0, 8.0 + scale * high];
    let at = |p: [f64; 2]| [centre[0] + scale * p[0], centre[1] - scale * p[1]];
    let mut canvas = Canvas::default();
    self::outline(&mut canvas, &outline, &at);
    let chain = line(0.15, Dash::Chain, 0.0);
    let (west, east) = (at([left, 0.0]), at([right, 0.0]));
    let (north, south) = (at([0.0, high]), at([0.0, low]));
    canvas.line([west[0] - 4.0, west[1]], [east[0] + 5.0, east[1]], chain, Clear::Hard);
    canvas.line([north[0], north[1] - 5.0], [south[0], south[1] + 4.0], chain, Clear::Hard);
    canvas.fixed([east[0] + 5.8, east[1] + 0.9], Anchor::Start, SIZE, Style::Italic, "z");
    canvas.fixed([north[0] + 1.0, north[1] - 3.2], Anchor::Start, SIZE, Style::Italic, "y");
    let corner = [at([left, low])[0], at([left, low])[1]];
    span(&mut canvas, [corner[0], corner[1] + 8.0], [at([right, low])[0], corner[1] + 8.0]);
    let say = |v: f64| bare(display, Measure::Length, v, 4);
    canvas.fixed([(west[0] + east[0]) / 2.0, corner[1] + 11.6], Anchor::Middle, SIZE, Style::Regular, &say(size[0]));
    let x = west[0] - 8.0;
    span(&mut canvas, [x, corner[1]], [x, centre[1]]);
    span(&mut canvas, [x, centre[1]], [x, north[1]]);
    canvas.fixed([x - 1.0, (corner[1] + centre[1]) / 2.0 + 0.9], Anchor::End, SIZE, Style::Regular, &say(-low));
    canvas.fixed([x - 1.0, (north[1] + centre[1]) / 2.0 + 0.9], Anchor::End, SIZE, Style::Regular, &say(high));
    let outer = x - 11.0;
    span(&mut canvas, [outer, corner[1]], [outer, north[1]]);
    canvas.fixed([outer - 1.0, (north[1] + corner[1]) / 2.0 + 0.9], Anchor::End, SIZE, Style::Regular, &say(size[1]));
    let listed = given(display, section);
    let mut y = 9.0;
    for row in &listed {
        canvas.fixed([104.0, y], Anchor::Start, SIZE, Style::Regular, row);
        y += 3.8;
    }
    let unit = display.unit(Measure::Length);
    let name = &section.name;
    Some(Figure {
        id: format!("section.{name}"),
        title: format!(
            "Section {name}, scale 1 : {}. Dimensions in {}; y upward is the member's +y face.",
            number(1000.0 / scale, 3),
            unit.text
        ),
        alternative: format!(
            "Outline of section {name} ({}): {} wide, {} deep, centroid {} above the bottom. {}",
            section.kind.name(),
            quantity(display, Measure::Length, size[0], 4),
            quantity(display, Measure::Length, size[1], 4),
            quantity(display, Measure::Length, -low, 4),
            listed.join("; ")
        ),
        scene: canvas.finish(),
    })
}

/// The outline filled, its holes left white.
pub(super) fn outline(canvas: &mut Canvas, outline: &Outline, at: &dyn Fn([f64; 2]) -> [f64; 2]) {
    for (k, edge) in outline.loops.iter().enumerate() {
        let hole = k > 0 && inside(edge.first().copied().unwrap_or_default(), &outline.loops[0]);
        canvas.shape(edge.iter().map(|p| at(*p)).collect(), Some(ink(0.35)), if hole { 1.0 } else { 0.85 });
    }
}

/// What was typed for the section, a row each.
fn given(display: &Display, section: &Section) -> Vec<String> {
    let mut rows = Vec::new();
    for param in section.kind.params() {
        if let Some(value) = section.given.get(&param.symbol) {
            rows.push(format!("{} {}", param.key.replace('_', " "), quantity(display, param.measure, value, 4)));
        }
    }
    let say = |v: f64| bare(display, Measure::Length, v, 4);
    for plate in &section.given.plates {
        rows.push(format!("plate {} × {} at {}", say(plate.width), say(plate.height), say(plate.at)));
    }
    if section.given.turned {
        rows.push("turned by 90°".into());
    }
    rows
}

/// A dimension line with its ticks.
fn span(canvas: &mut Canvas, a: [f64; 2], b: [f64; 2]) {
    canvas.line(a, b, ink(0.13), Clear::Hard);
    for end in [a, b] {
        canvas.line(along(end, [0.7, -0.7], -1.0), along(end, [0.7, -0.7], 1.0), ink(0.35), Clear::Hard);
    }
}

/// Whether a point lies inside a closed line.
fn inside(p: [f64; 2], edge: &[[f64; 2]]) -> bool {
    let mut odd = false;
    for k in 0..edge.len() {
        let (a, b) = (edge[k], edge[(k + 1) % edge.len()]);
        if (a[1] > p[1]) != (b[1] > p[1]) && p[0] < a[0] + (p[1] - a[1]) / (b[1] - a[1]) * (b[0] - a[0]) {
            odd = !odd;
        }
    }
    odd
}
