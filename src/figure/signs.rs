//! What is positive: axes, section forces on a cut piece, faces.
use super::Figure;
use super::canvas::{Canvas, Clear, SIZE, along, ink, line};
use super::scene::{Anchor, Dash, Style};

/// The figure `signs`.
#[must_use]
pub fn signs() -> Figure {
    let mut canvas = Canvas::default();
    global(&mut canvas, [10.0, 30.0]);
    own(&mut canvas, [46.0, 30.0], [70.0, 15.0]);
    piece(&mut canvas, [104.0, 22.0]);
    let heads = [(18.0, "Global axes"), (60.0, "A member's own axes"), (122.0, "Positive N, V and M")];
    for (x, words) in heads {
        canvas.fixed([x, 42.0], Anchor::Middle, SIZE, Style::Bold, words);
    }
    Figure {
        id: "signs".into(),
        title: "Axes and signs. Movements and loads are positive along X and Y, couples and rotations anticlockwise.".into(),
        alternative: "Global X to the right and Y upward; couples anticlockwise. A member's x runs from its start to its \
                      end, y to its left; its top is the +y face. On the cut at the end of a piece N pulls along +x, V \
                      acts along −y and M turns anticlockwise, which stretches the bottom fibre; on the cut at its start \
                      all three are opposite."
            .into(),
        scene: canvas.finish(),
    }
}

fn global(canvas: &mut Canvas, at: [f64; 2]) {
    canvas.arrow(at, [at[0] + 15.0, at[1]], ink(0.3), Clear::Hard);
    canvas.arrow(at, [at[0], at[1] - 15.0], ink(0.3), Clear::Hard);
    canvas.fixed([at[0] + 15.8, at[1] + 0.9], Anchor::Start, SIZE, Style::Italic, "X");
    canvas.fixed([at[0] - 0.8, at[1] - 16.0], Anchor::Start, SIZE, Style::Italic, "Y");
    canvas.turning([at[0] + 9.0, at[1] - 9.0], 3.0, true, ink(0.3));
}

fn own(canvas: &mut Canvas, from: [f64; 2], to: [f64; 2]) {
    let run = [to[0] - from[0], to[1] - from[1]];
    let length = run[0].hypot(run[1]);
    let axis = run.map(|v| v / length);
    let normal = [axis[1], -axis[0]];
    canvas.line(from, to, ink(0.7), Clear::Hard);
    canvas.circle(from, 0.7, None, 0.0);
    canvas.circle(to, 0.7, None, 0.0);
    canvas.fixed([from[0], from[1] + 4.2], Anchor::Middle, SIZE, Style::Regular, "start");
    canvas.fixed([to[0] + 1.6, to[1] + 3.6], Anchor::Start, SIZE, Style::Regular, "end");
    let middle = along(from, axis, 0.4 * length);
    canvas.arrow(middle, along(middle, normal, 10.0), ink(0.3), Clear::Hard);
    let tip = along(middle, normal, 11.5);
    canvas.fixed([tip[0] - 0.6, tip[1]], Anchor::End, SIZE, Style::Italic, "y");
    canvas.arrow(along(to, axis, 1.4), along(to, axis, 9.0), ink(0.3), Clear::Hard);
    let tip = along(to, axis, 10.0);
    canvas.fixed([tip[0], tip[1]], Anchor::Start, SIZE, Style::Italic, "x");
}

fn piece(canvas: &mut Canvas, left: [f64; 2]) {
    let (long, half) = (36.0, 5.0);
    let right = left[0] + long;
    let y = left[1];
    canvas.shape(
        vec![[left[0], y - half], [right, y - half], [right, y + half], [left[0], y + half]],
        Some(ink(0.35)),
        0.92,
    );
    canvas.line([left[0] - 2.0, y], [right + 2.0, y], line(0.13, Dash::Chain, 0.0), Clear::Hard);
    canvas.fixed([left[0] + long / 2.0, y - 1.8], Anchor::Middle, SIZE, Style::Regular, "top (+y face)");
    canvas.fixed([left[0] + long / 2.0, y + 3.8], Anchor::Middle, SIZE, Style::Regular, "bottom (−y face)");
    let force = ink(0.4);
    canvas.arrow([right + 1.0, y], [right + 13.0, y], force, Clear::Hard);
    canvas.fixed([right + 13.6, y + 0.9], Anchor::Start, SIZE, Style::Italic, "N");
    canvas.arrow([left[0] - 1.0, y], [left[0] - 13.0, y], force, Clear::Hard);
    canvas.fixed([left[0] - 13.6, y + 0.9], Anchor::End, SIZE, Style::Italic, "N");
    canvas.arrow([right + 2.0, y - 4.0], [right + 2.0, y + 9.0], force, Clear::Hard);
    canvas.fixed([right + 2.0, y + 12.4], Anchor::Middle, SIZE, Style::Italic, "V");
    canvas.arrow([left[0] - 2.0, y + 4.0], [left[0] - 2.0, y - 9.0], force, Clear::Hard);
    canvas.fixed([left[0] - 2.0, y - 10.2], Anchor::Middle, SIZE, Style::Italic, "V");
    arc(canvas, [right - 1.0, y], 9.5, true);
    canvas.fixed([right + 8.4, y - 6.4], Anchor::Start, SIZE, Style::Italic, "M");
    arc(canvas, [left[0] + 1.0, y], 9.5, false);
    canvas.fixed([left[0] - 8.4, y - 6.4], Anchor::End, SIZE, Style::Italic, "M");
}

/// A bow about a cut with its head above: anticlockwise right of it, clockwise left of it.
fn arc(canvas: &mut Canvas, centre: [f64; 2], radius: f64, right: bool) {
    let sense = if right { 1.0 } else { -1.0 };
    let at = |turn: f64| [centre[0] + sense * radius * turn.cos(), centre[1] - radius * turn.sin()];
    let points = (0..=16).map(|k| at(-0.9 + 1.75 * f64::from(k) / 16.0)).collect();
    canvas.path(points, false, ink(0.4), Clear::Hard);
    let (tip, from) = (at(1.02), at(0.8));
    let run = [tip[0] - from[0], tip[1] - from[1]];
    let length = run[0].hypot(run[1]).max(1e-9);
    canvas.head(tip, run.map(|v| v / length), 2.0);
}
