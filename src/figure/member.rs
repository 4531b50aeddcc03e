//! Members as lines: each kind by a line of its own, hinges as open circles, axes as arrows.
use super::canvas::{Canvas, Clear, SIZE, along, ink, line};
use super::place::Wish;
use super::scene::{Anchor, Dash, Style};
use super::view::View;
use crate::model::{Member, MemberKind};

/// A kind of line: of which members, and its name in the legend.
#[derive(Debug, Clone, Copy, PartialEq, Eq, PartialOrd, Ord)]
enum Look {
    Frame,
    Beam,
    Bar,
    Bar3,
    Slack,
}

impl Look {
    const ALL: [Self; 5] = [Self::Frame, Self::Beam, Self::Bar, Self::Bar3, Self::Slack];

    fn of(member: &Member) -> Self {
        match member.kind {
            _ if member.tension_only => Self::Slack,
            MemberKind::Frame => Self::Frame,
            MemberKind::Beam => Self::Beam,
            MemberKind::Bar => Self::Bar,
            MemberKind::Bar3 => Self::Bar3,
        }
    }

    const fn word(self) -> &'static str {
        match self {
            Self::Frame => "frame member",
            Self::Beam => "beam",
            Self::Bar => "bar",
            Self::Bar3 => "three-node bar",
            Self::Slack => "bar, tension only",
        }
    }

    fn draw(self, canvas: &mut Canvas, a: [f64; 2], b: [f64; 2]) {
        let marks = canvas.marks();
        let ink = |width: f64| ink(width * marks);
        match self {
            Self::Frame => canvas.line(a, b, ink(0.7), Clear::Hard),
            Self::Beam => {
                canvas.line(a, b, ink(1.1), Clear::Hard);
                canvas.line(a, b, line(0.5, Dash::Solid, 1.0), Clear::Hard);
            }
            Self::Bar => canvas.line(a, b, ink(0.3), Clear::Hard),
            Self::Bar3 => {
                canvas.line(a, b, ink(0.3), Clear::Hard);
                let middle = [(a[0] + b[0]) / 2.0, (a[1] + b[1]) / 2.0];
                let length = (b[0] - a[0]).hypot(b[1] - a[1]).max(1e-9);
                let side = [-(b[1] - a[1]) / length, (b[0] - a[0]) / length];
                canvas.line(along(middle, side, -1.4), along(middle, side, 1.4), ink(0.5), Clear::Hard);
            }
            Self::Slack => canvas.line(a, b, line(0.3, Dash::Dashed, 0.0), Clear::Hard),
        }
    }
}

/// Every member in the line of its kind, with hinges and nodes.
pub(super) fn draw(canvas: &mut Canvas, view: &View<'_>) {
    for member in &view.model.members {
        let [a, b] = view.ends(member);
        Look::of(member).draw(canvas, a, b);
    }
    joints(canvas, view);
}

/// Every member in one line, for drawings about something else.
pub(super) fn draw_plain(canvas: &mut Canvas, view: &View<'_>, width: f64, grey: f64) {
    for member in &view.model.members {
        let [a, b] = view.ends(member);
        let dash = if member.tension_only { Dash::Dashed } else { Dash::Solid };
        canvas.line(a, b, line(width, dash, grey), Clear::Hard);
    }
}

/// Nodes as dots, or open circles where every member is pinned; hinges as open circles beside the node.
pub(super) fn joints(canvas: &mut Canvas, view: &View<'_>) {
    let model = view.model;
    let is_bar = |m: &Member| matches!(m.kind, MemberKind::Bar | MemberKind::Bar3);
    for node in 0..model.nodes.len() {
        let mut joined = model.members.iter().filter(|m| m.from == node || m.to == node);
        let pinned = joined.all(is_bar);
        let radius = if pinned { 0.8 } else { 0.6 } * canvas.marks();
        canvas.circle(view.node(node), radius, Some(ink(0.25)), if pinned { 1.0 } else { 0.0 });
    }
    for member in &model.members {
        let (length, axis, _) = view.axes(member);
        let ends = view.ends(member);
        for (end, node) in [member.from, member.to].into_iter().enumerate() {
            let meets_rigid = model.members.iter().any(|m| (m.from == node || m.to == node) && !is_bar(m));
            if member.hinge[end] || is_bar(member) && meets_rigid {
                let by = 2.0_f64.min(0.25 * length * view.scale) * if end == 0 { 1.0 } else { -1.0 };
                canvas.circle(along(ends[end], axis, by), 0.75, Some(ink(0.25)), 1.0);
            }
        }
    }
}

/// Places along a member, as shares of its length, in order of preference.
const PLACES: [f64; 9] = [0.5, 0.42, 0.58, 0.35, 0.65, 0.28, 0.72, 0.2, 0.8];

/// A member's name waits for room beside it.
pub(super) fn name(canvas: &mut Canvas, view: &View<'_>, member: &Member, style: Style, text: &str) {
    let (length, _, normal) = view.axes(member);
    // Above what lies flat, to the left of what stands.
    let up = if normal[1] > 0.3 || normal[1].abs() <= 0.3 && normal[0] > 0.0 { normal.map(|v| -v) } else { normal };
    let anchors = PLACES.iter().map(|t| view.on(member, t * length, 0.0)).collect();
    canvas.label(Wish { anchors, toward: Some(up), gap: 1.3, far: false }, style, text);
}

/// Arrow along the axis from start to end with a tick toward local y, clear of other members.
pub(super) fn axis(canvas: &mut Canvas, view: &View<'_>, member: &Member) {
    let (length, axis, normal) = view.axes(member);
    let places = if member.kind == MemberKind::Bar3 { &PLACES[3..] } else { &PLACES[..] };
    let clear = |t: &&f64| {
        let at = view.on(member, **t * length, 0.0);
        view.model.members.iter().filter(|m| !std::ptr::eq(*m, member)).all(|m| distance(at, view.ends(m)) > 3.0)
    };
    let share = places.iter().find(clear).or_else(|| places.first()).copied().unwrap_or(0.5);
    let at = view.on(member, share * length, 0.0);
    let size = canvas.marks();
    canvas.head(along(at, axis, 1.1 * size), axis, 2.2 * size);
    let foot = along(at, axis, -1.1 * size);
    canvas.line(foot, along(foot, normal, 1.9 * size), ink(0.25), Clear::Hard);
}

/// Distance of a point from a stretch.
fn distance(at: [f64; 2], [a, b]: [[f64; 2]; 2]) -> f64 {
    let run = [b[0] - a[0], b[1] - a[1]];
    let square = (run[0] * run[0] + run[1] * run[1]).max(1e-12);
    let t = (((at[0] - a[0]) * run[0] + (at[1] - a[1]) * run[1]) / square).clamp(0.0, 1.0);
    (a[0] + t * run[0] - at[0]).hypot(a[1] + t * run[1] - at[1])
}

/// A row that names the lines in use, from a corner on.
pub(super) fn legend(canvas: &mut Canvas, view: &View<'_>, corner: [f64; 2]) {
    let mut x = corner[0];
    for look in Look::ALL {
        if !view.model.members.iter().any(|m| Look::of(m) == look) {
            continue;
        }
        look.draw(canvas, [x, corner[1]], [x + 9.0, corner[1]]);
        canvas.fixed([x + 10.5, corner[1] + 0.9], Anchor::Start, SIZE, Style::Regular, look.word());
        x += 15.0 + super::text::width(look.word(), SIZE);
    }
}
