//! Curves along members: diagrams, shapes of movement, and members weighted by their ratio.
use super::canvas::{Canvas, Clear, SIZE, along, ink, line};
use super::format::{Format, fitting};
use super::member;
use super::number::{exact, number, quantity};
use super::place::Wish;
use super::scene::{Anchor, Dash, Style};
use super::structure::node_names;
use super::support;
use super::view::{Room, View};
use super::{Figure, text};
use crate::model::Model;
use crate::units::Measure;

/// A force along every member: per member, distance from the start (m) and value (SI); a jump repeats its place.
#[derive(Debug, Clone)]
pub struct Diagram {
    /// `N`, `V` or `M`.
    pub letter: &'static str,
    /// The combination.
    pub combination: String,
    /// By member.
    pub curves: Vec<Vec<(f64, f64)>>,
}

/// Tallest ordinate, mm.
const TALLEST: f64 = 12.0;

/// A diagram on the members; `None` where nothing acts. M lies on the side in tension, N and V on the +y side where
/// they are positive.
#[must_use]
pub fn diagram(model: &Model, diagram: &Diagram) -> Option<Figure> {
    let measure = if diagram.letter == "M" { Measure::Moment } else { Measure::Force };
    let largest = diagram.curves.iter().flatten().map(|(_, v)| v.abs()).fold(0.0, f64::max);
    if !(largest > 0.0 && largest.is_finite()) {
        return None;
    }
    Some(fitting(|format| diagram_in(model, diagram, (measure, largest), format)))
}

fn diagram_in(model: &Model, diagram: &Diagram, (measure, largest): (Measure, f64), format: Format) -> Figure {
    let elsewhere = format!("Values that found no room here stand in the tables of {}", diagram.combination);
    let mut canvas = Canvas::new(format, elsewhere);
    let view = View::new(model, Room { side: 22.0, above: 15.0, below: 17.0 }, format);
    support::draw(&mut canvas, &view, 0.15);
    let sense = if diagram.letter == "M" { -1.0 } else { 1.0 };
    // Short members have little room beside them.
    let shortest = model.members.iter().map(|m| view.axes(m).0 * view.scale).fold(f64::INFINITY, f64::min);
    let tallest = (0.5 * shortest).clamp(6.0, TALLEST).round();
    let factor = sense * tallest / largest;
    for (member, curve) in model.members.iter().zip(&diagram.curves) {
        strip(&mut canvas, &view, member, curve, factor);
    }
    member::draw_plain(&mut canvas, &view, 0.45, 0.0);
    member::joints(&mut canvas, &view);
    if diagram.letter != "M" {
        for (member, curve) in model.members.iter().zip(&diagram.curves) {
            marks(&mut canvas, &view, member, curve, factor);
        }
    }
    // The largest values choose their places first.
    let mut said: Vec<(f64, Wish, String)> = Vec::new();
    for (member, curve) in model.members.iter().zip(&diagram.curves) {
        said.extend(values(&view, member, curve, factor, (measure, largest)));
    }
    said.sort_by(|a, b| b.0.total_cmp(&a.0));
    for (_, wish, words) in said {
        if !wish.anchors.first().is_some_and(|tip| canvas.said_near(&words, *tip, 3.0)) {
            canvas.label(wish, Style::Regular, words);
        }
    }
    let (word, side) = match diagram.letter {
        "N" => ("Axial force", "tension positive, on the +y side"),
        "V" => ("Shear force", "positive on the +y side"),
        _ => ("Bending moment", "on the side in tension; positive is tension on the −y side"),
    };
    let unit = model.display.unit(measure);
    let most = quantity(&model.display, measure, largest, 4);
    Figure {
        id: format!("{}.{}", diagram.combination, diagram.letter),
        title: format!(
            "{word} {} under {}, in {}: {side}. Largest {most}, drawn {tallest} mm tall. Structure {}.",
            diagram.letter,
            diagram.combination,
            unit.text,
            view.ratio()
        ),
        alternative: format!(
            "Diagram of the {} along every member under {}. {}",
            word.to_lowercase(),
            diagram.combination,
            peaks(model, diagram, measure)
        ),
        scene: canvas.finish(),
    }
}

fn peaks(model: &Model, diagram: &Diagram, measure: Measure) -> String {
    let said: Vec<String> = model
        .members
        .iter()
        .zip(&diagram.curves)
        .filter_map(|(member, curve)| {
            let peak = curve.iter().map(|(_, v)| *v).reduce(|a, b| if b.abs() > a.abs() { b } else { a })?;
            Some(format!("{} {}", member.name, quantity(&model.display, measure, peak, 4)))
        })
        .collect();
    format!("Largest in each member: {}.", said.join("; "))
}

fn strip(canvas: &mut Canvas, view: &View<'_>, member: &crate::model::Member, curve: &[(f64, f64)], factor: f64) {
    let (Some(first), Some(last)) = (curve.first(), curve.last()) else { return };
    if curve.iter().all(|(_, v)| (v * factor).abs() < 0.02) {
        return;
    }
    let points: Vec<[f64; 2]> = curve.iter().map(|(x, v)| view.on(member, *x, v * factor)).collect();
    let mut outline = vec![view.on(member, first.0, 0.0)];
    outline.extend(points);
    outline.push(view.on(member, last.0, 0.0));
    let length = (last.0 - first.0).max(1e-12);
    let count = (length * view.scale / 2.5).round().max(2.0) as usize;
    for k in 1..count {
        let x = first.0 + length * k as f64 / count as f64;
        let out = at(curve, x) * factor;
        if out.abs() > 0.3 {
            canvas.line(view.on(member, x, 0.0), view.on(member, x, out), line(0.1, Dash::Solid, 0.55), Clear::Soft);
        }
    }
    canvas.path(outline, false, ink(0.3), Clear::Hard);
}

/// The curve's value at a place, straight between its points.
fn at(curve: &[(f64, f64)], x: f64) -> f64 {
    curve
        .windows(2)
        .find(|w| w[0].0 <= x && x <= w[1].0 && w[1].0 > w[0].0)
        .map_or(0.0, |w| w[0].1 + (w[1].1 - w[0].1) * (x - w[0].0) / (w[1].0 - w[0].0))
}

/// A circled plus or minus inside each part of one sign that has room for it.
fn marks(canvas: &mut Canvas, view: &View<'_>, member: &crate::model::Member, curve: &[(f64, f64)], factor: f64) {
    let mut from = 0;
    while from < curve.len() {
        let positive = curve[from].1 > 0.0;
        let mut to = from;
        while to + 1 < curve.len() && (curve[to + 1].1 > 0.0) == positive {
            to += 1;
        }
        let widest = (from..=to).max_by(|a, b| {
            // A place inside the part, not at its very end.
            let worth = |k: usize| {
                let inset = (curve[k].0 - curve[from].0).min(curve[to].0 - curve[k].0) * view.scale;
                (curve[k].1 * factor).abs().min(5.0) + inset.min(6.0)
            };
            worth(*a).total_cmp(&worth(*b))
        });
        if let Some(k) = widest {
            let (x, v) = curve[k];
            let inset = (x - curve[from].0).min(curve[to].0 - x) * view.scale;
            if (v * factor).abs() > 3.0 && inset > 1.4 && canvas.is_free(view.on(member, x, v * factor / 2.0), 1.2) {
                let centre = view.on(member, x, v * factor / 2.0);
                canvas.circle(centre, 1.1, Some(ink(0.15)), 1.0);
                canvas.line(along(centre, [1.0, 0.0], -0.7), along(centre, [1.0, 0.0], 0.7), ink(0.15), Clear::Hard);
                if positive {
                    canvas.line(
                        along(centre, [0.0, 1.0], -0.7),
                        along(centre, [0.0, 1.0], 0.7),
                        ink(0.15),
                        Clear::Hard,
                    );
                }
            }
        }
        from = to + 1;
    }
}

/// Values at the ends, at jumps and at peaks.
fn values(
    view: &View<'_>,
    member: &crate::model::Member,
    curve: &[(f64, f64)],
    factor: f64,
    (measure, largest): (Measure, f64),
) -> Vec<(f64, Wish, String)> {
    let unit = view.model.display.unit(measure).scale;
    let (length, _, normal) = view.axes(member);
    let small = 0.004 * largest;
    let count = curve.len();
    let steady = curve.iter().all(|(_, v)| (v - curve[0].1).abs() < small);
    let mut said: Vec<usize> = Vec::new();
    if steady {
        said.extend((count > 0).then_some(count / 2));
    } else {
        for k in 0..count {
            let here = curve[k];
            let same = |other: &(f64, f64)| (other.0 - here.0).abs() < 1e-9 * length;
            let before = curve[..k].iter().rev().find(|p| !same(p));
            let after = curve[k + 1..].iter().find(|p| !same(p));
            let jump = curve.iter().any(|p| same(p) && (p.1 - here.1).abs() > small);
            let peak = match (before, after) {
                (Some(a), Some(b)) => here.1.abs() >= a.1.abs() && here.1.abs() > b.1.abs(),
                _ => true,
            };
            if peak || jump && here.1.abs() > 0.1 * largest {
                said.push(k);
            }
        }
    }
    let mut labels = Vec::new();
    for k in said {
        let (x, v) = curve[k];
        if v.abs() <= small {
            continue;
        }
        let tip = view.on(member, x, v * factor);
        let words = exact(v / unit, 3);
        let out = if v * factor >= 0.0 { normal } else { normal.map(|c| -c) };
        let mut anchors = vec![tip];
        if steady {
            anchors.extend([0.4, 0.6, 0.3, 0.7, 0.2, 0.8].map(|t| view.on(member, t * length, v * factor)));
        }
        labels.push((v.abs(), Wish { anchors, toward: Some(out), gap: 0.7, far: false }, words));
    }
    labels
}

/// A shape of movement: per member, distance from the start (m) and movement in global x and y.
#[derive(Debug, Clone)]
pub struct Shape {
    /// The figure's id, such as `C1.deflected`.
    pub id: String,
    /// The beginning of its caption, such as `Movement under C1`.
    pub title: String,
    /// Whether the movements are in metres and their largest is told; else they are relative, and nothing is told.
    pub metres: bool,
    /// By member.
    pub points: Vec<Vec<(f64, [f64; 2])>>,
}

/// The undeformed structure thin, the moved one thick; `None` where nothing moves.
#[must_use]
pub fn shape(model: &Model, shape: &Shape) -> Option<Figure> {
    let mut most = (0.0_f64, 0, 0.0, [0.0; 2]);
    for (at, points) in shape.points.iter().enumerate() {
        for (x, u) in points {
            let size = u[0].hypot(u[1]);
            if size > most.0 * (1.0 + 1e-9) {
                most = (size, at, *x, *u);
            }
        }
    }
    if !(most.0 > 1e-12 && most.0.is_finite()) {
        return None;
    }
    Some(fitting(|format| shape_in(model, shape, most, format)))
}

/// `most` is the largest movement: its size, the member, the place and the movement itself.
fn shape_in(model: &Model, shape: &Shape, most: (f64, usize, f64, [f64; 2]), format: Format) -> Figure {
    let mut canvas = Canvas::new(format, "Names of the other nodes stand in the drawing of the structure");
    let view = View::new(model, Room { side: 22.0, above: 13.0, below: 16.0 }, format);
    let wanted = 9.0 / (view.scale * most.0);
    let ten = 10_f64.powf(wanted.log10().floor());
    let factor = [5.0, 2.0, 1.0].iter().map(|s| s * ten).find(|f| *f <= wanted * 1.0001).unwrap_or(ten);
    let factor = if shape.metres { factor } else { wanted };
    support::draw(&mut canvas, &view, 0.15);
    member::draw_plain(&mut canvas, &view, 0.15, 0.3);
    member::joints(&mut canvas, &view);
    let moved = |at: usize, x: f64, u: [f64; 2]| {
        let on = view.on(&model.members[at], x, 0.0);
        [on[0] + factor * u[0] * view.scale, on[1] - factor * u[1] * view.scale]
    };
    for (at, points) in shape.points.iter().enumerate() {
        let line_ = points.iter().map(|(x, u)| moved(at, *x, *u)).collect();
        canvas.path(line_, false, ink(0.6), Clear::Hard);
    }
    let peak = moved(most.1, most.2, most.3);
    let member = &model.members[most.1];
    let largest = quantity(&model.display, Measure::Length, most.0, 3);
    if shape.metres {
        canvas.circle(peak, 0.8, None, 0.0);
        let from = view.on(member, most.2, 0.0);
        canvas.line(from, peak, line(0.15, Dash::Dotted, 0.0), Clear::Soft);
        let out = [peak[0] - from[0], peak[1] - from[1]];
        let size = out[0].hypot(out[1]).max(1e-9);
        canvas.label(
            Wish { anchors: vec![peak], toward: Some(out.map(|v| v / size)), gap: 1.2, far: false },
            Style::Bold,
            largest.clone(),
        );
    }
    node_names(&mut canvas, &view, Style::Regular);
    let place = quantity(&model.display, Measure::Span, most.2, 4);
    let rest = if shape.metres {
        format!(", enlarged {} times; the largest movement is {largest}", number(factor, 3))
    } else {
        String::new()
    };
    Figure {
        id: shape.id.clone(),
        title: format!("{}{rest}. Structure {}.", shape.title, view.ratio()),
        alternative: format!(
            "{}: thin line as drawn, thick line as moved. The largest movement is in member {} at {place} from its start{}.",
            shape.title,
            member.name,
            if shape.metres { format!(", {largest}") } else { String::new() }
        ),
        scene: canvas.finish(),
    }
}

/// A member's largest ratio, where anything of it was compared.
#[derive(Debug, Clone)]
pub struct Usage {
    /// The largest ratio.
    pub ratio: Option<f64>,
    /// As printed.
    pub printed: String,
    /// Whether something was not checked.
    pub unchecked: bool,
}

const BANDS: [(f64, f64, &str); 4] =
    [(0.5, 0.3, "up to 0.5"), (0.8, 0.7, "up to 0.8"), (1.0, 1.2, "up to 1"), (f64::INFINITY, 2.0, "beyond its limit")];

/// Each member's largest ratio beside it; its line grows with it, dashed where something was not checked.
#[must_use]
pub fn utilisation(model: &Model, usage: &[Usage]) -> Figure {
    fitting(|format| utilisation_in(model, usage, format))
}

fn utilisation_in(model: &Model, usage: &[Usage], format: Format) -> Figure {
    let mut canvas = Canvas::new(format, "Ratios that found no room here stand in the comparison with limits");
    let view = View::new(model, Room { side: 20.0, above: 8.0, below: 16.0 }, format);
    support::draw(&mut canvas, &view, 0.15);
    for (member, usage) in model.members.iter().zip(usage) {
        let [a, b] = view.ends(member);
        let width = usage.ratio.map_or(0.3, |r| BANDS.iter().find(|band| r <= band.0).map_or(2.0, |band| band.1));
        let dash = if usage.ratio.is_none() || usage.unchecked { Dash::Dashed } else { Dash::Solid };
        canvas.line(a, b, line(width, dash, 0.0), Clear::Hard);
    }
    member::joints(&mut canvas, &view);
    for (member, usage) in model.members.iter().zip(usage) {
        let beyond = usage.ratio.is_some_and(|r| r > 1.0);
        let said = match usage.ratio {
            Some(_) => format!("{} {}{}", member.name, usage.printed, if usage.unchecked { "*" } else { "" }),
            None => format!("{} –", member.name),
        };
        member::name(&mut canvas, &view, member, if beyond { Style::Bold } else { Style::Regular }, &said);
    }
    let y = view.point([0.0, model.nodes.iter().map(|n| n.y).fold(f64::INFINITY, f64::min)])[1] + 14.0;
    let mut x = 3.0;
    for (_, width, words) in BANDS {
        canvas.line([x, y], [x + 7.0, y], ink(width), Clear::Hard);
        canvas.fixed([x + 8.5, y + 0.9], Anchor::Start, SIZE, Style::Regular, words);
        x += 10.5 + text::width(words, SIZE);
    }
    if usage.iter().any(|u| u.ratio.is_none() || u.unchecked) {
        canvas.line([x, y], [x + 7.0, y], line(0.3, Dash::Dashed, 0.0), Clear::Hard);
        canvas.fixed([x + 8.5, y + 0.9], Anchor::Start, SIZE, Style::Regular, "* NOT CHECKED in part or whole");
    }
    let said: Vec<String> = model
        .members
        .iter()
        .zip(usage)
        .map(|(m, u)| format!("{} {}", m.name, if u.ratio.is_some() { &u.printed } else { "not checked" }))
        .collect();
    Figure {
        id: "utilisation".into(),
        title: "Largest ratio of demand to limit of each member, all checks and combinations; heavier lines are used \
                further."
            .into(),
        alternative: format!("Largest ratio in each member: {}.", said.join("; ")),
        scene: canvas.finish(),
    }
}
