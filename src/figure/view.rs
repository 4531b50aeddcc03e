//! The structure to scale on the sheet.
use super::canvas::{WIDTH, along};
use super::format::Format;
use crate::model::{Member, Model};

/// Blank room around the structure: left and right, above, below, mm.
#[derive(Debug, Clone, Copy)]
pub(super) struct Room {
    /// Left and right.
    pub side: f64,
    /// Above.
    pub above: f64,
    /// Below.
    pub below: f64,
}

/// The structure to scale on the sheet.
pub(super) struct View<'a> {
    /// What is drawn.
    pub model: &'a Model,
    /// Millimetres a metre.
    pub scale: f64,
    corner: [f64; 2],
    low: [f64; 2],
}

/// Steps of drawing scales within a power of ten.
const STEPS: [f64; 8] = [1.0, 1.25, 1.5, 2.0, 2.5, 4.0, 5.0, 7.5];

impl<'a> View<'a> {
    /// The largest of the usual scales that leaves the wanted room.
    pub(super) fn new(model: &'a Model, room: Room, format: Format) -> Self {
        let bound = |pick: &dyn Fn(&crate::model::Node) -> f64| {
            let all = model.nodes.iter().map(pick);
            (all.clone().fold(f64::INFINITY, f64::min), all.fold(f64::NEG_INFINITY, f64::max))
        };
        let ((left, right), (low, high)) = (bound(&|n| n.x), bound(&|n| n.y));
        // Where labels are small their margins are small as well.
        let blank = format.marks.max(0.75);
        let free = [WIDTH - 2.0 * room.side, format.height - 8.0 - (room.above + room.below) * blank];
        let size = [right - left, high - low];
        let most = (0..2).map(|i| free[i] / size[i].max(1e-9)).fold(f64::INFINITY, f64::min);
        let least = 1000.0 / most.max(1e-9);
        let ten = 10_f64.powf(least.log10().floor());
        let ratio = STEPS.iter().map(|s| s * ten).find(|r| *r >= least * (1.0 - 1e-9)).unwrap_or(10.0 * ten);
        let scale = 1000.0 / ratio;
        let corner = [(WIDTH - scale * size[0]) / 2.0, room.above * blank + scale * size[1]];
        Self { model, scale, corner, low: [left, low] }
    }

    /// The scale as a ratio, such as `1 : 50`.
    pub(super) fn ratio(&self) -> String {
        format!("1 : {}", super::number::number(1000.0 / self.scale, 4))
    }

    /// A point on the sheet.
    pub(super) fn point(&self, at: [f64; 2]) -> [f64; 2] {
        [self.corner[0] + self.scale * (at[0] - self.low[0]), self.corner[1] - self.scale * (at[1] - self.low[1])]
    }

    /// A node on the sheet.
    pub(super) fn node(&self, at: usize) -> [f64; 2] {
        let node = &self.model.nodes[at];
        self.point([node.x, node.y])
    }

    /// Start and end of a member on the sheet.
    pub(super) fn ends(&self, member: &Member) -> [[f64; 2]; 2] {
        [self.node(member.from), self.node(member.to)]
    }

    /// Length in m, direction and direction of local y on the sheet.
    pub(super) fn axes(&self, member: &Member) -> (f64, [f64; 2], [f64; 2]) {
        let (a, b) = (&self.model.nodes[member.from], &self.model.nodes[member.to]);
        let (dx, dy) = (b.x - a.x, b.y - a.y);
        let length = dx.hypot(dy).max(1e-12);
        let (c, s) = (dx / length, dy / length);
        (length, [c, -s], [-s, -c])
    }

    /// A point so far along a member (m) and so far toward its local y (mm).
    pub(super) fn on(&self, member: &Member, x: f64, out: f64) -> [f64; 2] {
        let (_, axis, normal) = self.axes(member);
        along(along(self.node(member.from), axis, x * self.scale), normal, out)
    }

    /// Mean direction on the sheet from a node into its members; zero where they balance.
    pub(super) fn inward(&self, node: usize) -> [f64; 2] {
        let mut sum = [0.0; 2];
        for member in &self.model.members {
            let sign = match (member.from == node, member.to == node) {
                (true, _) => 1.0,
                (_, true) => -1.0,
                _ => continue,
            };
            let (_, axis, _) = self.axes(member);
            sum = along(sum, axis, sign);
        }
        sum.map(|v| if v.abs() < 1e-6 { 0.0 } else { v })
    }
}
