//! The structure as understood: members, supports, hinges, names, dimensions.
use super::canvas::{Canvas, Clear, SIZE, along, ink};
use super::format::{Format, fitting};
use super::number::bare;
use super::place::Wish;
use super::scene::{Anchor, Style};
use super::view::{Room, View};
use super::{Figure, member, support, text};
use crate::model::{MemberKind, Model};
use crate::units::Measure;

/// The figure `structure`.
#[must_use]
pub fn structure(model: &Model) -> Figure {
    fitting(|format| drawn(model, format))
}

fn drawn(model: &Model, format: Format) -> Figure {
    let elsewhere = "Names that found no room here stand with their coordinates and ends in the tables";
    let mut canvas = Canvas::new(format, elsewhere);
    let view = View::new(model, Room { side: 24.0, above: 8.0, below: 22.0 }, format);
    support::draw(&mut canvas, &view, 0.25);
    member::draw(&mut canvas, &view);
    for m in &model.members {
        member::axis(&mut canvas, &view, m);
    }
    let lowest = chains(&mut canvas, &view);
    global_axes(&mut canvas, [6.0, lowest + 2.0]);
    member::legend(&mut canvas, &view, [22.0, lowest + 1.0]);
    node_names(&mut canvas, &view, Style::Bold);
    for m in &model.members {
        member::name(&mut canvas, &view, m, Style::Italic, &m.name);
    }
    let unit = model.display.unit(Measure::Span);
    Figure {
        id: "structure".into(),
        title: format!(
            "The structure as understood, scale {}. Dimensions in {}. An arrow on a member runs from its start to its \
             end; the tick beside it points toward its +y face.",
            view.ratio(),
            unit.text
        ),
        alternative: alternative(model),
        scene: canvas.finish(),
    }
}

/// Names of all nodes wait for room, away from the members.
pub(super) fn node_names(canvas: &mut Canvas, view: &View<'_>, style: Style) {
    for (at, node) in view.model.nodes.iter().enumerate() {
        let inward = view.inward(at);
        let size = inward[0].hypot(inward[1]);
        let toward = if size > 0.2 { inward.map(|v| -v / size) } else { [-0.7, -0.7] };
        canvas.label(
            Wish { anchors: vec![view.node(at)], toward: Some(toward), gap: 1.1, far: false },
            style,
            &node.name,
        );
    }
}

/// Dimension chains below and to the left; how far down they reach.
fn chains(canvas: &mut Canvas, view: &View<'_>) -> f64 {
    let model = view.model;
    let distinct = |pick: &dyn Fn(usize) -> f64| {
        let mut all: Vec<f64> = (0..model.nodes.len()).map(pick).collect();
        all.sort_by(f64::total_cmp);
        all.dedup_by(|a, b| (*a - *b).abs() < 1e-6);
        all
    };
    let xs = distinct(&|n| model.nodes[n].x);
    let ys = distinct(&|n| model.nodes[n].y);
    let (left, low) = (xs.first().copied().unwrap_or(0.0), ys.first().copied().unwrap_or(0.0));
    let corner = view.point([left, low]);
    let mut down = corner[1] + 11.0;
    if xs.len() > 1 {
        down = chain(canvas, view, &xs, down, true) + 2.5;
    }
    if ys.len() > 1 {
        chain(canvas, view, &ys, corner[0] - 11.0, false);
    }
    down + 5.0
}

/// One chain at a line of the sheet; a second with the whole where there are several parts. Gives the outer line.
fn chain(canvas: &mut Canvas, view: &View<'_>, stops: &[f64], line: f64, flat: bool) -> f64 {
    let place = |stop: f64, line: f64| {
        let p = view.point([stop, stop]);
        if flat { [p[0], line] } else { [line, p[1]] }
    };
    let (display, size) = (&view.model.display, canvas.size());
    // A stair of lines where parts are too narrow for their figures.
    let dimension = |canvas: &mut Canvas, from: f64, to: f64, line: f64| {
        let (a, b) = (place(from, line), place(to, line));
        let (along_line, across) = if flat { ([1.0, 0.0], [0.0, 1.0]) } else { ([0.0, -1.0], [1.0, 0.0]) };
        canvas.line(along(a, along_line, -1.0), along(b, along_line, 1.0), ink(0.13), Clear::Hard);
        for end in [a, b] {
            let tick = |by: f64| along(along(end, along_line, by), across, -by);
            canvas.line(tick(-0.7), tick(0.7), ink(0.35), Clear::Hard);
            canvas.line(along(end, across, -1.6), along(end, across, 1.0), ink(0.13), Clear::Hard);
        }
        let said = bare(display, Measure::Span, to - from, 5);
        let middle = [(a[0] + b[0]) / 2.0, (a[1] + b[1]) / 2.0];
        let room = (b[0] - a[0]).hypot(b[1] - a[1]);
        if flat && text::width(&said, size) < room - 2.0 {
            canvas.fixed([middle[0], middle[1] - 0.8], Anchor::Middle, size, Style::Regular, &said);
        } else if !flat && text::height(size) < room - 0.6 {
            canvas.fixed([middle[0] - 1.0, middle[1] + 0.9], Anchor::End, size, Style::Regular, &said);
        } else {
            let toward = if flat { [0.0, 1.0] } else { [-1.0, 0.0] };
            canvas.label(
                Wish { anchors: vec![middle], toward: Some(toward), gap: 0.6, far: false },
                Style::Regular,
                said,
            );
        }
    };
    for pair in stops.windows(2) {
        dimension(canvas, pair[0], pair[1], line);
    }
    if let ([first, .., last], true) = (stops, stops.len() > 2) {
        let said =
            |pair: &[f64]| text::width(&bare(&view.model.display, Measure::Span, pair[1] - pair[0], 5), canvas.size());
        let widest = stops.windows(2).map(said).fold(6.0, f64::max);
        let outer = if flat { line + 5.0 } else { line - widest - 3.0 };
        dimension(canvas, *first, *last, outer);
        return outer;
    }
    line
}

fn global_axes(canvas: &mut Canvas, at: [f64; 2]) {
    canvas.arrow(at, [at[0] + 7.0, at[1]], ink(0.25), Clear::Hard);
    canvas.arrow(at, [at[0], at[1] - 7.0], ink(0.25), Clear::Hard);
    canvas.fixed([at[0] + 7.6, at[1] + 0.9], Anchor::Start, SIZE, Style::Italic, "X");
    canvas.fixed([at[0] + 0.9, at[1] - 6.0], Anchor::Start, SIZE, Style::Italic, "Y");
}

fn alternative(model: &Model) -> String {
    let count = |kind: MemberKind| model.members.iter().filter(|m| m.kind == kind).count();
    let kinds = [
        (count(MemberKind::Frame), "frame members"),
        (count(MemberKind::Beam), "beams"),
        (count(MemberKind::Bar), "bars"),
        (count(MemberKind::Bar3), "three-node bars"),
    ];
    let kinds: Vec<String> = kinds.iter().filter(|(n, _)| *n > 0).map(|(n, word)| format!("{n} {word}")).collect();
    let held: Vec<&str> = model.supports.iter().map(|s| model.nodes[s.node].name.as_str()).collect();
    format!(
        "Elevation of the structure to scale: {} nodes, {}; supports at {}. Coordinates and members stand in the tables.",
        model.nodes.len(),
        kinds.join(", "),
        held.join(", ")
    )
}
