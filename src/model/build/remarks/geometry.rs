//! Remarks on how things lie: loose nodes, nodes at one place, members that cross without a joint.
use super::super::super::{Model, Node};
use super::address;
use crate::diagnostic::{Code, Diagnostic};
use std::collections::BTreeMap;

/// Pairs looked at before giving up: enough for any structure that is worked by hand.
const MOST_PAIRS: usize = 2_000_000;
/// Relative distance within which a point counts as lying on a line.
const NEAR: f64 = 1e-6;

pub(super) fn remarks(model: &Model) -> Vec<Diagnostic> {
    let mut list = loose(model);
    list.extend(same_place(model));
    list.extend(doubled(model));
    list.extend(crossing(model));
    list
}

fn loose(model: &Model) -> Vec<Diagnostic> {
    let mut joined = vec![false; model.nodes.len()];
    for end in model.members.iter().flat_map(|member| [member.from, member.to]) {
        joined.get_mut(end).into_iter().for_each(|joined| *joined = true);
    }
    let loose = model.nodes.iter().zip(joined).filter(|(_, joined)| !joined);
    loose
        .map(|(node, _)| {
            let warning = Diagnostic::warning(Code::LooseNode, address("nodes", &node.name));
            warning.message(format!("node `{}` belongs to no member", node.name)).label("not joined to anything")
        })
        .collect()
}

fn same_place(model: &Model) -> Vec<Diagnostic> {
    let extent = model.nodes.iter().flat_map(|node| [node.x.abs(), node.y.abs()]).fold(0.0, f64::max);
    let near = 1e-9 * extent;
    let mut order: Vec<&Node> = model.nodes.iter().collect();
    order.sort_by(|a, b| a.x.total_cmp(&b.x).then(a.y.total_cmp(&b.y)));
    let mut list = Vec::new();
    for pair in order.windows(2) {
        let [a, b] = pair else { continue };
        if (a.x - b.x).abs() <= near && (a.y - b.y).abs() <= near {
            let warning = Diagnostic::warning(Code::SamePlace, address("nodes", &b.name));
            let warning = warning.message(format!("nodes `{}` and `{}` stand at the same place", a.name, b.name));
            list.push(warning.label("not joined to each other").help("where a joint is meant, use one node for both"));
        }
    }
    list
}

fn doubled(model: &Model) -> Vec<Diagnostic> {
    let mut first: BTreeMap<(usize, usize), &str> = BTreeMap::new();
    let mut list = Vec::new();
    for member in &model.members {
        let ends = (member.from.min(member.to), member.from.max(member.to));
        if let Some(earlier) = first.get(&ends) {
            let warning = Diagnostic::warning(Code::Suspicious, address("members", &member.name));
            let warning = warning.message(format!("members `{earlier}` and `{}` join the same two nodes", member.name));
            list.push(warning.label("both carry load, side by side").help("take one out if a single member is meant"));
        } else {
            first.insert(ends, &member.name);
        }
    }
    list
}

/// A member as a line, its place in the model and its ends.
#[derive(Clone, Copy)]
struct Line {
    member: usize,
    ends: [usize; 2],
    a: [f64; 2],
    b: [f64; 2],
}

impl Line {
    fn left(&self) -> f64 {
        self.a[0].min(self.b[0])
    }

    fn right(&self) -> f64 {
        self.a[0].max(self.b[0])
    }

    fn length(&self) -> f64 {
        (self.b[0] - self.a[0]).hypot(self.b[1] - self.a[1])
    }

    /// Place along the line from 0 to 1, and distance from it as a share of its length, of a point.
    fn locate(&self, point: [f64; 2]) -> (f64, f64) {
        let (dx, dy) = (self.b[0] - self.a[0], self.b[1] - self.a[1]);
        let (px, py) = (point[0] - self.a[0], point[1] - self.a[1]);
        let square = dx * dx + dy * dy;
        ((px * dx + py * dy) / square, (dx * py - dy * px).abs() / square)
    }

    fn passes(&self, point: [f64; 2]) -> bool {
        let (along, off) = self.locate(point);
        off <= NEAR && along > NEAR && along < 1.0 - NEAR
    }

    fn crosses(&self, other: &Self) -> bool {
        let side = |from: &Self, p: [f64; 2]| {
            let (dx, dy) = (from.b[0] - from.a[0], from.b[1] - from.a[1]);
            (dx * (p[1] - from.a[1]) - dy * (p[0] - from.a[0])) / (from.length() * from.length())
        };
        let apart = |from: &Self, p: [f64; 2], q: [f64; 2]| {
            let (p, q) = (side(from, p), side(from, q));
            (p > NEAR && q < -NEAR) || (p < -NEAR && q > NEAR)
        };
        apart(self, other.a, other.b) && apart(other, self.a, self.b)
    }
}

fn crossing(model: &Model) -> Vec<Diagnostic> {
    let mut lines: Vec<Line> = Vec::new();
    for (member, found) in model.members.iter().enumerate() {
        if let (Some(a), Some(b)) = (model.nodes.get(found.from), model.nodes.get(found.to)) {
            lines.push(Line { member, ends: [found.from, found.to], a: [a.x, a.y], b: [b.x, b.y] });
        }
    }
    // Swept from left to right: only lines that overlap in x are compared.
    lines.sort_by(|a, b| a.left().total_cmp(&b.left()).then(a.member.cmp(&b.member)));
    let mut list = Vec::new();
    let mut touched = Vec::new();
    let mut pairs = 0;
    for (at, first) in lines.iter().enumerate() {
        for second in lines[at + 1..].iter().take_while(|second| second.left() <= first.right()) {
            pairs += 1;
            if pairs > MOST_PAIRS {
                return list;
            }
            if first.crosses(second) {
                let (early, late) = (first.member.min(second.member), first.member.max(second.member));
                list.push(cross(model, early, late));
            }
            for (line, other) in [(first, second), (second, first)] {
                for (end, point) in other.ends.into_iter().zip([other.a, other.b]) {
                    if !line.ends.contains(&end) && line.passes(point) {
                        touched.push((line.member, end));
                    }
                }
            }
        }
    }
    touched.sort_unstable();
    touched.dedup();
    list.extend(touched.into_iter().map(|(member, node)| on_member(model, member, node)));
    list
}

fn cross(model: &Model, early: usize, late: usize) -> Diagnostic {
    let (a, b) = (&model.members[early].name, &model.members[late].name);
    let warning = Diagnostic::warning(Code::Crossing, address("members", b));
    let warning = warning.message(format!("members `{a}` and `{b}` cross without a joint"));
    warning
        .label("no force passes where they cross")
        .help("where a joint is meant, put a node there and split both members")
}

fn on_member(model: &Model, member: usize, node: usize) -> Diagnostic {
    let (member, node) = (&model.members[member].name, &model.nodes[node].name);
    let warning = Diagnostic::warning(Code::Crossing, address("members", member));
    let warning = warning.message(format!("node `{node}` lies on member `{member}` without belonging to it"));
    warning.label("no force passes there").help("where a joint is meant, split the member at the node")
}
