//! How wide the columns are: as they come, else smaller or with words turned over, else in several tables.
use super::Content2D;
use super::cell::{CELL, Content, Head};
use crate::typeset::frame::Frame;
use crate::typeset::text::Setter;

/// Space between columns at full size, and where room is short.
const GAP: f32 = 15.0;
const TIGHT: f32 = 10.0;
/// Scales of type that are tried.
const SCALES: [f32; 4] = [1.0, 0.93, 0.86, 0.8];
/// Width of a column left open to be written in: as is good, and at least.
const OPEN: f32 = 84.0;
const OPEN_LEAST: f32 = 40.0;
/// A single word may take this part of the room before it is cut.
const WORD: f32 = 0.4;
/// Columns of words are not wider than this where a table is parted.
const BROAD: f32 = 170.0;

/// Columns of one table on paper.
#[derive(Debug, Clone)]
pub(super) struct Layout {
    /// Type size over the usual.
    pub(super) scale: f32,
    /// Space between columns.
    pub(super) gap: f32,
    /// Whether it reaches into the column of numbers.
    pub(super) wide: bool,
    /// Columns of the content with their widths.
    pub(super) columns: Vec<Placed>,
}

impl Layout {
    /// Width of the whole table.
    pub(super) fn width(&self) -> f32 {
        let gaps = self.gap * self.columns.len().saturating_sub(1) as f32;
        gaps + self.columns.iter().map(|column| column.width).sum::<f32>()
    }
}

/// A column's width, and the widths of its numbers before the point and in all.
#[derive(Debug, Clone, Copy)]
pub(super) struct Placed {
    pub(super) index: usize,
    pub(super) width: f32,
    pub(super) before_point: f32,
    pub(super) number_width: f32,
}

/// Widths of a column at full size.
#[derive(Debug, Clone, Default)]
struct Natural {
    /// The widest on one line, and each by itself: heading first, then the cells.
    whole: f32,
    texts: Vec<f32>,
    /// What cannot be turned over: the longest word, the numbers.
    least: f32,
    before_point: f32,
    after_point: f32,
    open: bool,
}

impl Natural {
    fn placed(&self, index: usize, width: f32, scale: f32) -> Placed {
        let before_point = self.before_point * scale;
        Placed { index, width, before_point, number_width: before_point + self.after_point * scale }
    }

    /// Its width where the longest text takes about so many lines.
    fn turned(&self, lines: f32, scale: f32, room: f32) -> f32 {
        let numbers = self.before_point + self.after_point;
        let least = self.least.min((room * WORD / scale).max(numbers)).max(if self.open { OPEN_LEAST } else { 0.0 });
        (self.whole / lines).clamp(least.min(self.whole), self.whole) * scale
    }
}

/// Columns that fit into `measure`, or else into the `whole` width.
pub(super) fn fit(content: &Content2D, measure: f32, whole: f32, setter: &mut Setter<'_>) -> Vec<Layout> {
    let natural: Vec<Natural> = (0..content.heads.len()).map(|at| measured(content, at, setter)).collect();
    if let Some(layout) = turned(&natural, 1.0, GAP, measure, false).filter(|layout| is_whole(&natural, layout)) {
        return vec![layout];
    }
    let mut best: Option<(f32, Layout)> = None;
    for wide in [false, true] {
        let room = if wide { whole } else { measure };
        for scale in SCALES {
            for gap in [GAP * scale, TIGHT * scale] {
                let Some(layout) = turned(&natural, scale, gap, room, wide) else { continue };
                let cost = cost(&natural, &layout, content);
                if best.as_ref().is_none_or(|(least, _)| cost < least - 1e-3) {
                    best = Some((cost, layout));
                }
            }
        }
    }
    best.map_or_else(|| parted(&natural, whole), |(_, layout)| vec![layout])
}

/// Whether no column is narrower than its texts on one line.
fn is_whole(natural: &[Natural], layout: &Layout) -> bool {
    layout.columns.iter().all(|column| column.width >= natural[column.index].whole - 0.01)
}

/// Mean height of a row, with what small type, narrow gaps and a reach beyond the measure are worth.
fn cost(natural: &[Natural], layout: &Layout, content: &Content2D) -> f32 {
    let rows = content.rows.len() + 1;
    // Rows to be written in are high enough for two lines in any case.
    let least = if content.open { 2.0 } else { 1.0 };
    let lines: f32 = (0..rows)
        .map(|row| {
            let of = |column: &Placed| {
                let cell = natural[column.index].texts.get(row).copied().unwrap_or(0.0) * layout.scale;
                // Words do not fill their lines.
                let loose = if cell > column.width + 0.01 { 1.12 } else { 1.0 };
                (cell * loose / column.width.max(1.0) - 0.01).ceil()
            };
            layout.columns.iter().map(of).fold(least, f32::max)
        })
        .sum();
    let narrow = if layout.gap < GAP * layout.scale { 0.08 } else { 0.0 };
    lines / rows as f32 * layout.scale + 5.0 * (1.0 - layout.scale) + narrow + if layout.wide { 0.25 } else { 0.0 }
}

/// Columns made narrower until they fit, all texts turning over about equally often; none where words forbid it.
fn turned(natural: &[Natural], scale: f32, gap: f32, room: f32, wide: bool) -> Option<Layout> {
    let gaps = gap * natural.len().saturating_sub(1) as f32;
    let widths = |lines: f32| natural.iter().map(move |column| column.turned(lines, scale, room));
    let fits = |lines: f32| widths(lines).sum::<f32>() + gaps <= room;
    let most = 60.0;
    if !fits(most) {
        return None;
    }
    let (mut low, mut high) = (1.0, most);
    if fits(low) {
        high = low;
    } else {
        for _ in 0..24 {
            let middle = (low + high) / 2.0;
            if fits(middle) {
                high = middle;
            } else {
                low = middle;
            }
        }
    }
    let columns = widths(high).enumerate().map(|(at, width)| natural[at].placed(at, width, scale)).collect();
    Some(Layout { scale, gap, wide, columns })
}

/// Several tables, the first column repeated in each.
fn parted(natural: &[Natural], room: f32) -> Vec<Layout> {
    let (scale, gap) = (0.9, GAP * 0.9);
    let width = |column: &Natural| (column.whole.min(BROAD.max(column.least)) * scale).min(room / 2.0 - gap);
    let placed = |at: usize| natural[at].placed(at, width(&natural[at]), scale);
    let mut layouts = Vec::new();
    let mut columns: Vec<Placed> = Vec::new();
    let mut used = 0.0;
    for at in 1..natural.len() {
        let next = placed(at);
        if columns.is_empty() || used + gap + next.width > room {
            if !columns.is_empty() {
                layouts.push(Layout { scale, gap, wide: true, columns: std::mem::take(&mut columns) });
            }
            columns.push(placed(0));
            used = columns[0].width;
        }
        used += gap + next.width;
        columns.push(next);
    }
    if columns.is_empty() {
        columns.push(placed(0));
    }
    layouts.push(Layout { scale, gap, wide: true, columns });
    layouts
}

fn measured(content: &Content2D, at: usize, setter: &mut Setter<'_>) -> Natural {
    let mut natural = Natural { texts: Vec::with_capacity(content.rows.len() + 1), ..Natural::default() };
    natural.texts.push(0.0);
    let mut empty = false;
    for row in &content.rows {
        let cell = match row.get(at) {
            Some(Content::Words(words)) => {
                let (whole, longest) = words.widths(setter);
                natural.least = natural.least.max(longest);
                whole
            }
            Some(Content::Number(text, split)) => {
                let [before, after] = [&text[..*split], &text[*split..]].map(|part| setter.width(part, CELL));
                natural.before_point = natural.before_point.max(before);
                natural.after_point = natural.after_point.max(after);
                before + after
            }
            _ => {
                empty = true;
                0.0
            }
        };
        natural.texts.push(cell);
    }
    let numbers = natural.before_point + natural.after_point;
    natural.open = content.open && empty;
    let (whole, longest) = match &content.heads[at] {
        Head::Words(words) => words.widths(setter),
        Head::Symbol(symbol, unit) => {
            let width = Head::set_symbol(symbol, unit, 1.0, setter, &mut Frame::default());
            (width, width)
        }
    };
    natural.texts[0] = whole;
    natural.least = natural.least.max(numbers).max(longest);
    let open = if natural.open { OPEN } else { 0.0 };
    natural.whole = natural.texts.iter().copied().fold(numbers.max(open), f32::max);
    natural
}
