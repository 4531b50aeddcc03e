//! Finds free room for labels: places around an anchor, scored against what already stands on the sheet.
use super::taken::Taken;

/// An upright rectangle: left, top, right, bottom, mm.
#[derive(Debug, Clone, Copy, PartialEq)]
pub(super) struct Area {
    /// Left and top.
    pub low: [f64; 2],
    /// Right and bottom.
    pub high: [f64; 2],
}

impl Area {
    /// The rectangle about a centre.
    pub(super) fn about(centre: [f64; 2], half: [f64; 2]) -> Self {
        Self { low: [centre[0] - half[0], centre[1] - half[1]], high: [centre[0] + half[0], centre[1] + half[1]] }
    }

    /// Whether two rectangles share more than an edge.
    pub(super) fn meets(&self, other: &Self) -> bool {
        (0..2).all(|i| self.low[i] < other.high[i] && other.low[i] < self.high[i])
    }

    /// The rectangle with that much more on every side.
    pub(super) fn grown(&self, by: f64) -> Self {
        Self { low: self.low.map(|v| v - by), high: self.high.map(|v| v + by) }
    }

    /// Whether a straight line passes through it.
    pub(super) fn crossed(&self, line: &[[f64; 2]; 2]) -> bool {
        let [a, b] = line;
        let (mut enter, mut leave) = (0.0_f64, 1.0_f64);
        for i in 0..2 {
            let run = b[i] - a[i];
            if run.abs() < 1e-12 {
                if a[i] <= self.low[i] || a[i] >= self.high[i] {
                    return false;
                }
                continue;
            }
            let (first, second) = ((self.low[i] - a[i]) / run, (self.high[i] - a[i]) / run);
            enter = enter.max(first.min(second));
            leave = leave.min(first.max(second));
        }
        enter < leave
    }
}

/// Where a label may stand: anchors in order of preference, and the direction in which it should lie from them.
#[derive(Debug, Clone, Default)]
pub(super) struct Wish {
    /// Anchors, the best first.
    pub anchors: Vec<[f64; 2]>,
    /// Preferred direction from the anchor, if any.
    pub toward: Option<[f64; 2]>,
    /// Least distance from the anchor.
    pub gap: f64,
    /// How far beyond the usual a label may go, with a line to its anchor.
    pub far: bool,
}

/// Distances tried, beyond the least.
const REACH: [f64; 10] = [0.0, 1.0, 2.2, 3.8, 6.0, 9.0, 13.0, 18.0, 25.0, 34.0];
/// How many of them are usual.
const USUAL: usize = 7;
/// Distance beyond which a label needs a line to its anchor.
pub(super) const LEADER: f64 = 3.4;
/// Directions tried.
const ROUND: usize = 16;

/// The free place of lowest cost: centre, the anchor it belongs to, and its distance from it.
///
/// `near` is the distance of labels from what they name, compared with the usual.
pub(super) fn find(
    wish: &Wish,
    half: [f64; 2],
    (sheet, taken, near): (&Area, &Taken, f64),
) -> Option<([f64; 2], [f64; 2], f64)> {
    let mut candidates = Vec::new();
    for (rank, anchor) in wish.anchors.iter().enumerate() {
        for reach in REACH.into_iter().take(if wish.far { REACH.len() } else { USUAL }).map(|reach| reach * near) {
            for step in 0..ROUND {
                let turn = step as f64 / ROUND as f64 * std::f64::consts::TAU;
                let u = [turn.cos(), turn.sin()];
                let out = wish.gap * near + reach;
                let centre: [f64; 2] =
                    std::array::from_fn(|i| anchor[i] + u[i] * out + half[i] * (1.6 * u[i]).clamp(-1.0, 1.0));
                let away = wish.toward.map_or(0.0, |t| 1.0 - (t[0] * u[0] + t[1] * u[1]));
                let slanted = if step % (ROUND / 8) == 0 { 0.0 } else { 0.15 };
                let cost = reach + 1.3 * away + 0.8 * rank as f64 + slanted + if reach > LEADER { 2.0 } else { 0.0 };
                candidates.push((cost, centre, *anchor, reach));
            }
        }
    }
    candidates.sort_by(|a, b| a.0.total_cmp(&b.0));
    let mut best: Option<(f64, [f64; 2], [f64; 2], f64)> = None;
    for (cost, centre, anchor, reach) in candidates {
        if best.as_ref().is_some_and(|b| b.0 <= cost) {
            break;
        }
        let area = Area::about(centre, half);
        let inside = (0..2).all(|i| area.low[i] >= sheet.low[i] && area.high[i] <= sheet.high[i]);
        let wide = area.grown(0.35 * near);
        if !inside || taken.covers(&wide) {
            continue;
        }
        let mut cost = cost + 1.1 * taken.soft_across(&area) as f64;
        if reach > LEADER {
            cost += 2.5 * taken.areas_across(&[anchor, centre]) as f64;
            // A line to its anchor over other members leads the eye astray.
            if taken.hard_across(&[along(anchor, centre, 0.6), centre]) > 1 {
                continue;
            }
        }
        if best.as_ref().is_none_or(|b| cost < b.0) {
            best = Some((cost, centre, anchor, reach));
        }
    }
    best.map(|(_, centre, anchor, reach)| (centre, anchor, reach))
}

/// The point so far (mm) from one point toward another.
fn along(from: [f64; 2], to: [f64; 2], by: f64) -> [f64; 2] {
    let length = (to[0] - from[0]).hypot(to[1] - from[1]).max(1e-9);
    std::array::from_fn(|i| from[i] + (to[i] - from[i]) * by / length)
}
