//! A sheet under way: what is drawn, what must stay clear, which labels wait for room.
use super::format::Format;
use super::place::{self, Area, Wish};
use super::scene::{Anchor, Dash, Item, Scene, Stroke, Style, TextItem};
use super::taken::Taken;
use super::text;

/// Width of every drawing, mm.
pub(super) const WIDTH: f64 = 160.0;
/// Size of labels where there is room, points.
pub(super) const SIZE: f64 = 7.5;
/// Labels in the key of a drawing at most; more are not read, and stand in tables.
const KEY: usize = 24;
/// Labels without room after which no more is looked for.
const VAIN: usize = 300;
/// Blank edge, mm.
const EDGE: f64 = 1.5;

/// Black line of a width in mm.
pub(super) const fn ink(width: f64) -> Stroke {
    Stroke { width, dash: Dash::Solid, grey: 0.0 }
}

/// Line of a width in mm, a dash and a grey.
pub(super) const fn line(width: f64, dash: Dash, grey: f64) -> Stroke {
    Stroke { width, dash, grey }
}

/// How labels keep clear of a line.
#[derive(Debug, Clone, Copy, PartialEq, Eq)]
pub(super) enum Clear {
    /// Never cross it.
    Hard,
    /// Cross it unwillingly.
    Soft,
}

struct Waiting {
    wish: Wish,
    text: String,
    style: Style,
}

/// A sheet under way.
#[derive(Default)]
pub(super) struct Canvas {
    items: Vec<Item>,
    taken: Taken,
    waiting: Vec<Waiting>,
    notes: Vec<String>,
    /// Where labels that find no room can be read.
    elsewhere: String,
    format: Format,
}

impl Canvas {
    /// A blank sheet; `elsewhere` says where labels that find no room can be read.
    pub(super) fn new(format: Format, elsewhere: impl Into<String>) -> Self {
        Self { format, elsewhere: elsewhere.into(), ..Self::default() }
    }

    /// Size of labels, points.
    pub(super) fn size(&self) -> f64 {
        self.format.size
    }

    /// Size of marks on members, compared with the usual.
    pub(super) fn marks(&self) -> f64 {
        self.format.marks
    }

    /// Straight lines from point to point.
    pub(super) fn path(&mut self, points: Vec<[f64; 2]>, closed: bool, stroke: Stroke, clear: Clear) {
        self.keep_clear(&points, closed, clear);
        self.items.push(Item::Path { points, closed, stroke: Some(stroke), fill: None });
    }

    /// One straight line.
    pub(super) fn line(&mut self, a: [f64; 2], b: [f64; 2], stroke: Stroke, clear: Clear) {
        self.path(vec![a, b], false, stroke, clear);
    }

    /// A filled shape, outlined if there is a stroke. Labels keep off it.
    pub(super) fn shape(&mut self, points: Vec<[f64; 2]>, stroke: Option<Stroke>, fill: f64) {
        self.keep_clear(&points, true, Clear::Hard);
        self.items.push(Item::Path { points, closed: true, stroke, fill: Some(fill) });
    }

    /// A circle.
    pub(super) fn circle(&mut self, centre: [f64; 2], radius: f64, stroke: Option<Stroke>, fill: f64) {
        self.taken.area(Area::about(centre, [radius; 2]));
        self.items.push(Item::Path { points: ring(centre, radius, 20), closed: true, stroke, fill: Some(fill) });
    }

    /// A filled arrow head with its tip at a point.
    pub(super) fn head(&mut self, tip: [f64; 2], direction: [f64; 2], length: f64) {
        let half = 0.32 * length;
        let normal = [-direction[1], direction[0]];
        let back = along(tip, direction, -length);
        self.shape(vec![tip, along(back, normal, half), along(back, normal, -half)], None, 0.0);
    }

    /// An arrow.
    pub(super) fn arrow(&mut self, tail: [f64; 2], tip: [f64; 2], stroke: Stroke, clear: Clear) {
        let run = [tip[0] - tail[0], tip[1] - tail[1]];
        let length = run[0].hypot(run[1]);
        if length < 1e-9 {
            return;
        }
        let direction = [run[0] / length, run[1] / length];
        let size = 2.0_f64.min(0.6 * length);
        self.line(tail, along(tip, direction, -0.8 * size), stroke, clear);
        self.head(tip, direction, size);
    }

    /// Three quarters of a circle with a head, turning anticlockwise or clockwise.
    pub(super) fn turning(&mut self, centre: [f64; 2], radius: f64, anticlockwise: bool, stroke: Stroke) {
        let sense = if anticlockwise { -1.0 } else { 1.0 };
        let start = std::f64::consts::FRAC_PI_2 - sense * std::f64::consts::FRAC_PI_4;
        let sweep = 1.5 * std::f64::consts::PI * sense;
        let at = |turn: f64| [centre[0] + radius * turn.cos(), centre[1] + radius * turn.sin()];
        let points = (0..=24).map(|k| at(start + sweep * f64::from(k) / 24.0)).collect();
        self.path(points, false, stroke, Clear::Hard);
        let end = start + sweep + 0.25 * sense;
        let before = start + sweep - 0.25 * sense;
        let (tip, from) = (at(end), at(before));
        let run = [tip[0] - from[0], tip[1] - from[1]];
        let length = run[0].hypot(run[1]).max(1e-9);
        self.head(tip, [run[0] / length, run[1] / length], 2.0);
    }

    /// Text at a fixed place: its anchor on the baseline.
    pub(super) fn fixed(&mut self, at: [f64; 2], anchor: Anchor, size: f64, style: Style, text: &str) {
        self.taken.area(extent(at, anchor, size, text));
        self.items.push(Item::Text(TextItem { at, anchor, size, style, text: text.to_owned(), halo: false }));
    }

    /// A label that waits for room.
    pub(super) fn label(&mut self, wish: Wish, style: Style, text: impl Into<String>) {
        self.waiting.push(Waiting { wish, text: text.into(), style });
    }

    /// Whether a label of that text already waits near a point.
    pub(super) fn said_near(&self, text: &str, at: [f64; 2], within: f64) -> bool {
        self.waiting
            .iter()
            .any(|w| w.text == text && w.wish.anchors.iter().any(|a| (a[0] - at[0]).hypot(a[1] - at[1]) < within))
    }

    /// A line of text below the drawing.
    pub(super) fn note(&mut self, text: impl Into<String>) {
        self.notes.push(text.into());
    }

    /// Whether nothing that labels keep off stands within so much of a point.
    pub(super) fn is_free(&self, at: [f64; 2], around: f64) -> bool {
        !self.taken.covers(&Area::about(at, [around; 2]))
    }

    fn keep_clear(&mut self, points: &[[f64; 2]], closed: bool, clear: Clear) {
        let mut keep = |line| match clear {
            Clear::Hard => self.taken.hard(line),
            Clear::Soft => self.taken.soft(line),
        };
        points.windows(2).for_each(|w| keep([w[0], w[1]]));
        if let (true, Some(first), Some(last)) = (closed, points.first(), points.last()) {
            keep([*last, *first]);
        }
    }

    fn write(&mut self, centre: [f64; 2], half: [f64; 2], style: Style, text: String) {
        self.taken.area(Area::about(centre, half));
        let size = self.size();
        let at = [centre[0], centre[1] - half[1] + text::ascent(size)];
        self.items.push(Item::Text(TextItem { at, anchor: Anchor::Middle, size, style, text, halo: true }));
    }

    /// Places the labels and cuts the sheet to what is drawn. Labels without room get a number and stand in a key
    /// below; where they are too many, the drawing says where they can be read.
    pub(super) fn finish(mut self) -> Scene {
        let height = self.format.height;
        let sheet = Area { low: [EDGE, EDGE - 20.0], high: [WIDTH - EDGE, height + 20.0] };
        let sheet = self.extent().map_or(sheet, |drawn| {
            let spare = (height - 6.0 - (drawn.high[1] - drawn.low[1])).clamp(0.0, 24.0);
            // What stands too far left moves right in the end, and the labels with it.
            let left = drawn.low[0].min(EDGE);
            Area {
                low: [left, drawn.low[1] - spare / 2.0],
                high: [left + WIDTH - 2.0 * EDGE, drawn.high[1] + spare / 2.0],
            }
        });
        let waiting = std::mem::take(&mut self.waiting);
        let labels = waiting.len();
        let mut without = Vec::new();
        for label in waiting {
            if without.len() >= VAIN || !self.place(&label.wish, &label.text, label.style, &sheet) {
                without.push(label);
            }
        }
        let keyed = without.len();
        let mut lost = if keyed > KEY { keyed } else { 0 };
        if lost == 0 {
            for (at, label) in without.into_iter().enumerate() {
                let mark = format!("({})", at + 1);
                let wish = Wish { far: true, ..label.wish };
                if self.place(&wish, &mark, Style::Bold, &sheet) {
                    self.notes.push(format!("{mark} {}", label.text));
                } else {
                    lost += 1;
                }
            }
        }
        if lost > 0 {
            self.notes.push(std::mem::take(&mut self.elsewhere));
        }
        Scene { labels, keyed, lost, ..self.close() }
    }

    /// Writes a label where there is room for it; whether there was.
    fn place(&mut self, wish: &Wish, text: &str, style: Style, sheet: &Area) -> bool {
        let half = [text::width(text, self.size()) / 2.0, text::height(self.size()) / 2.0];
        let Some((centre, anchor, reach)) = place::find(wish, half, (sheet, &self.taken, self.marks())) else {
            return false;
        };
        if reach > place::LEADER {
            let from = leave(centre, half, anchor);
            self.line(anchor, from, line(0.12, Dash::Solid, 0.45), Clear::Soft);
        }
        self.write(centre, half, style, text.to_owned());
        true
    }

    /// Writes the notes below in lines as full as they go, and cuts the sheet.
    fn close(mut self) -> Scene {
        let drawn = self.extent().unwrap_or(Area { low: [0.0; 2], high: [WIDTH, 1.0] });
        let mut lines: Vec<String> = Vec::new();
        for note in &self.notes {
            let longer = lines.last().map(|last| format!("{last};  {note}"));
            match (lines.last_mut(), longer) {
                (Some(last), Some(longer)) if text::width(&longer, SIZE) < WIDTH - 4.0 => *last = longer,
                _ => lines.push(note.clone()),
            }
        }
        let mut y = drawn.high[1] + if lines.is_empty() { 0.0 } else { 2.0 };
        for text in lines {
            let at = [drawn.low[0].min(EDGE) + 0.5, y + text::ascent(SIZE)];
            self.fixed(at, Anchor::Start, SIZE, Style::Regular, &text);
            y += text::height(SIZE) + 0.6;
        }
        let up = drawn.low[1] - EDGE;
        let left = drawn.low[0].min(EDGE) - EDGE;
        let height = (y - up + EDGE).ceil();
        for item in &mut self.items {
            match item {
                Item::Path { points, .. } => points.iter_mut().for_each(|p| *p = [p[0] - left, p[1] - up]),
                Item::Text(text) => text.at = [text.at[0] - left, text.at[1] - up],
            }
        }
        Scene { width: WIDTH, height, items: self.items, ..Scene::default() }
    }

    /// The rectangle about everything drawn.
    fn extent(&self) -> Option<Area> {
        let mut all: Option<Area> = None;
        let mut add = |area: Area| {
            all = Some(all.map_or(area, |a| Area {
                low: std::array::from_fn(|i| a.low[i].min(area.low[i])),
                high: std::array::from_fn(|i| a.high[i].max(area.high[i])),
            }));
        };
        for item in &self.items {
            match item {
                Item::Path { points, .. } => points.iter().for_each(|p| add(Area { low: *p, high: *p })),
                Item::Text(t) => add(extent(t.at, t.anchor, t.size, &t.text)),
            }
        }
        all
    }
}

/// The point on a label's edge from which a line to its anchor starts.
fn leave(centre: [f64; 2], half: [f64; 2], anchor: [f64; 2]) -> [f64; 2] {
    let run = [anchor[0] - centre[0], anchor[1] - centre[1]];
    let fit = (0..2).map(|i| half[i] / run[i].abs().max(1e-9)).fold(1.0, f64::min);
    [centre[0] + fit * run[0], centre[1] + fit * run[1]]
}

/// The rectangle that a text fills.
#[must_use]
pub(super) fn extent(at: [f64; 2], anchor: Anchor, size: f64, text: &str) -> Area {
    let width = text::width(text, size);
    let left = match anchor {
        Anchor::Start => at[0],
        Anchor::Middle => at[0] - width / 2.0,
        Anchor::End => at[0] - width,
    };
    let top = at[1] - text::ascent(size);
    Area { low: [left, top], high: [left + width, top + text::height(size)] }
}

/// A point so far from another in a direction.
#[must_use]
pub(super) fn along(from: [f64; 2], direction: [f64; 2], by: f64) -> [f64; 2] {
    [from[0] + by * direction[0], from[1] + by * direction[1]]
}

/// Points of a circle.
#[must_use]
pub(super) fn ring(centre: [f64; 2], radius: f64, count: usize) -> Vec<[f64; 2]> {
    (0..count)
        .map(|k| k as f64 / count as f64 * std::f64::consts::TAU)
        .map(|turn| [centre[0] + radius * turn.cos(), centre[1] + radius * turn.sin()])
        .collect()
}
