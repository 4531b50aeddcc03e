//! Loads along a member as combs of arrows, one upon another where several act on a part.
use crate::figure::canvas::{Canvas, Clear, along, ink};
use crate::figure::number::quantity;
use crate::figure::place::Wish;
use crate::figure::scene::Style;
use crate::figure::view::View;
use crate::model::{Action, Direction, LoadCase, MemberLoad};
use crate::units::Measure;

/// Tallest arrow, mm.
const TALL: f64 = 7.0;
/// Distance of the arrows, mm.
const PITCH: f64 = 3.2;

/// What already stands on each member: side, part and height.
pub(super) struct Stack {
    placed: Vec<(usize, [i8; 2], [f64; 2], f64)>,
    largest: f64,
}

impl Stack {
    pub(super) fn new(case: &LoadCase) -> Self {
        let largest = case.loads.iter().filter_map(|load| match &load.acts {
            Action::Member { load: MemberLoad::Line { start, end, .. }, .. } => Some(start.abs().max(end.abs())),
            _ => None,
        });
        Self { placed: Vec::new(), largest: largest.fold(0.0, f64::max) }
    }

    /// The height from which a load on that part may stand, and the note of what it fills.
    fn raise(&mut self, member: usize, side: [f64; 2], part: [f64; 2], height: f64) -> f64 {
        let side = side.map(|v| (v * 10.0).round() as i8);
        let over = |p: &&(usize, [i8; 2], [f64; 2], f64)| {
            p.0 == member && p.1 == side && p.2[0] < part[1] - 1e-9 && part[0] < p.2[1] - 1e-9
        };
        let base = self.placed.iter().filter(over).map(|p| p.3 + 0.8).fold(0.9, f64::max);
        self.placed.push((member, side, part, base + height));
        base
    }
}

/// Draws a load along a member.
pub(super) fn draw(canvas: &mut Canvas, view: &View<'_>, stack: &mut Stack, at: usize, load: &MemberLoad) {
    let MemberLoad::Line { direction, start, end, over, per_plan } = load else { return };
    let member = &view.model.members[at];
    let (length, axis, normal) = view.axes(member);
    let part = over.unwrap_or([0.0, length]);
    let largest = start.abs().max(end.abs());
    if largest == 0.0 || stack.largest == 0.0 {
        return;
    }
    let positive = match direction {
        Direction::GlobalX => [1.0, 0.0],
        Direction::GlobalY => [0.0, -1.0],
        Direction::LocalX => axis,
        Direction::LocalY => normal,
    };
    let sense = if start.abs() >= end.abs() { start.signum() } else { end.signum() };
    let pointing = positive.map(|v| v * sense);
    let words = |w: f64| {
        let plan = if *per_plan { " on plan" } else { "" };
        format!("{}{plan}", quantity(&view.model.display, Measure::LineLoad, w.abs(), 4))
    };
    let feet = [view.on(member, part[0], 0.0), view.on(member, part[1], 0.0)];
    let even = (start - end).abs() <= 1e-12 * largest;
    let lies_along = (pointing[0] * axis[0] + pointing[1] * axis[1]).abs() > 0.98;
    if lies_along {
        let base = stack.raise(at, normal, part, 1.6) + 0.9;
        let run = (part[1] - part[0]) * view.scale;
        let count = (run / 7.0).round().max(1.0) as usize;
        for k in 0..count {
            let middle = along(along(feet[0], axis, run * (k as f64 + 0.5) / count as f64), normal, base);
            canvas.arrow(along(middle, pointing, -2.2), along(middle, pointing, 2.2), ink(0.2), Clear::Hard);
        }
        let anchor = along(view.on(member, (part[0] + part[1]) / 2.0, 0.0), normal, base);
        let said = if even { words(*start) } else { format!("{} to {}", words(*start), words(*end)) };
        canvas.label(Wish { anchors: vec![anchor], toward: Some(normal), gap: 1.2, far: false }, Style::Regular, said);
        return;
    }
    let back = pointing.map(|v| -v);
    let tall = |w: f64| TALL * (0.35 + 0.65 * largest / stack.largest) * w * sense / largest;
    let heights = [tall(*start), tall(*end)];
    let top = heights[0].max(heights[1]);
    let base = stack.raise(at, back, part, top);
    // A load per plan length stands on a level line clear of the member.
    let ground: [[f64; 2]; 2] = if *per_plan {
        let flat = usize::from(pointing[0].abs() < 0.5);
        let outermost =
            if back[flat] < 0.0 { feet[0][flat].min(feet[1][flat]) } else { feet[0][flat].max(feet[1][flat]) };
        feet.map(|mut foot| {
            foot[flat] = outermost;
            along(foot, back, base + 0.8)
        })
    } else {
        feet.map(|foot| along(foot, back, base))
    };
    let tops = [along(ground[0], back, heights[0]), along(ground[1], back, heights[1])];
    canvas.line(ground[0], ground[1], ink(0.13), Clear::Hard);
    canvas.line(tops[0], tops[1], ink(0.2), Clear::Hard);
    let run = (ground[1][0] - ground[0][0]).hypot(ground[1][1] - ground[0][1]);
    let count = (run / PITCH).round().max(2.0) as usize;
    for k in 0..=count {
        let t = k as f64 / count as f64;
        let foot: [f64; 2] = std::array::from_fn(|i| ground[0][i] + t * (ground[1][i] - ground[0][i]));
        let height = heights[0] + t * (heights[1] - heights[0]);
        if height.abs() > 0.4 {
            comb_arrow(canvas, along(foot, back, height), foot);
        }
    }
    let middle: [f64; 2] = std::array::from_fn(|i| (tops[0][i] + tops[1][i]) / 2.0);
    let between = |t: f64| -> [f64; 2] { std::array::from_fn(|i| tops[0][i] + t * (tops[1][i] - tops[0][i])) };
    if even {
        let anchors = vec![middle, between(0.3), between(0.7)];
        canvas.label(Wish { anchors, toward: Some(back), gap: 0.6, far: false }, Style::Regular, words(*start));
    } else {
        for (top, w) in tops.iter().zip([*start, *end]) {
            if w != 0.0 {
                canvas.label(
                    Wish { anchors: vec![*top], toward: Some(back), gap: 0.6, far: false },
                    Style::Regular,
                    words(w),
                );
            }
        }
    }
}

fn comb_arrow(canvas: &mut Canvas, tail: [f64; 2], tip: [f64; 2]) {
    let run = [tip[0] - tail[0], tip[1] - tail[1]];
    let length = run[0].hypot(run[1]).max(1e-9);
    let direction = run.map(|v| v / length);
    let size = 1.3_f64.min(0.6 * length);
    canvas.line(tail, along(tip, direction, -0.8 * size), ink(0.15), Clear::Hard);
    canvas.head(tip, direction, size);
}
