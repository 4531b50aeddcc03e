//! How wide the columns are: as they come, then smaller, then with words turned over, then in several tables.
use super::Content2D;
use super::cell::{Content, Head};
use crate::typeset::frame::Frame;
use crate::typeset::geometry::SMALL;
use crate::typeset::text::{Setter, Type};

/// Space between columns, and the least scale of type.
pub(super) const GAP: f32 = 15.0;
const LEAST: f32 = 0.8;
/// A column of words is not made narrower than this before the table is parted.
const NARROW: f32 = 58.0;
/// Nor wider than this where a table is parted.
const BROAD: f32 = 170.0;

/// Columns of one table on paper.
#[derive(Debug, Clone)]
pub(super) struct Layout {
    /// Type size over the usual.
    pub(super) scale: f32,
    /// Whether it reaches into the column of numbers.
    pub(super) wide: bool,
    /// Columns of the content, each with its width and, for numbers, the width before the point.
    pub(super) columns: Vec<Placed>,
}

#[derive(Debug, Clone, Copy)]
pub(super) struct Placed {
    pub(super) index: usize,
    pub(super) width: f32,
    pub(super) before_point: f32,
    pub(super) number_width: f32,
}

/// Widths of a column at full size.
#[derive(Debug, Clone, Copy, Default)]
struct Natural {
    whole: f32,
    longest_word: f32,
    before_point: f32,
    after_point: f32,
    has_words: bool,
}

impl Natural {
    fn placed(&self, index: usize, width: f32, scale: f32) -> Placed {
        let before_point = self.before_point * scale;
        Placed { index, width, before_point, number_width: before_point + self.after_point * scale }
    }
}

/// Columns that fit into `measure`, or else into the `whole` width.
pub(super) fn fit(content: &Content2D, measure: f32, whole: f32, setter: &mut Setter<'_>) -> Vec<Layout> {
    let natural: Vec<Natural> = (0..content.heads.len()).map(|at| measured(content, at, setter)).collect();
    let total = |scale: f32| {
        natural.iter().map(|column| column.whole * scale).sum::<f32>()
            + GAP * scale * natural.len().saturating_sub(1) as f32
    };
    let all = |scale: f32, wide: bool| {
        let columns = natural.iter().enumerate().map(|(at, n)| n.placed(at, n.whole * scale, scale)).collect();
        vec![Layout { scale, wide, columns }]
    };
    if total(1.0) <= measure {
        return all(1.0, false);
    }
    let numbers = natural.iter().any(|column| !column.has_words);
    if numbers && total(1.0) <= whole {
        return all(1.0, true);
    }
    if numbers && total(LEAST) <= whole {
        return all(((whole / total(1.0)) * 0.999).max(LEAST), true);
    }
    for (scale, wide) in [(1.0, false), (0.9, false), (1.0, true), (0.9, true), (LEAST, true)] {
        let room = if wide { whole } else { measure };
        if let Some(columns) = turned(&natural, scale, room) {
            return vec![Layout { scale, wide, columns }];
        }
    }
    parted(&natural, whole)
}

/// Columns of words made narrower so that their words turn over; none where even that is too wide.
fn turned(natural: &[Natural], scale: f32, room: f32) -> Option<Vec<Placed>> {
    let gaps = GAP * scale * natural.len().saturating_sub(1) as f32;
    let least = |column: &Natural| {
        if column.has_words { column.whole.min(column.longest_word.max(NARROW)) * scale } else { column.whole * scale }
    };
    let floor: f32 = natural.iter().map(least).sum();
    let spare = room - gaps - floor;
    if spare < 0.0 {
        return None;
    }
    // What is left over goes to the columns that lack most, in proportion to what they lack.
    let lack: f32 = natural.iter().map(|column| column.whole * scale - least(column)).sum();
    let part = if lack > 0.0 { (spare / lack).min(1.0) } else { 0.0 };
    let width = |column: &Natural| least(column) + (column.whole * scale - least(column)) * part;
    Some(natural.iter().enumerate().map(|(at, column)| column.placed(at, width(column), scale)).collect())
}

/// Several tables, the first column repeated in each.
fn parted(natural: &[Natural], room: f32) -> Vec<Layout> {
    let scale = 0.9;
    let width = |column: &Natural| {
        let widest = if column.has_words { column.whole.min(BROAD) } else { column.whole };
        (widest * scale).min(room / 2.0 - GAP)
    };
    let placed = |at: usize| natural[at].placed(at, width(&natural[at]), scale);
    let mut layouts = Vec::new();
    let mut columns: Vec<Placed> = Vec::new();
    let mut used = 0.0;
    for at in 1..natural.len() {
        let next = placed(at);
        if columns.is_empty() || used + GAP * scale + next.width > room {
            if !columns.is_empty() {
                layouts.push(Layout { scale, wide: true, columns: std::mem::take(&mut columns) });
            }
            columns.push(placed(0));
            used = columns[0].width;
        }
        used += GAP * scale + next.width;
        columns.push(next);
    }
    if columns.is_empty() {
        columns.push(placed(0));
    }
    layouts.push(Layout { scale, wide: true, columns });
    layouts
}

fn measured(content: &Content2D, at: usize, setter: &mut Setter<'_>) -> Natural {
    let mut natural = Natural::default();
    match &content.heads[at] {
        Head::Words(words) => {
            let (whole, longest) = words.widths(setter);
            (natural.whole, natural.longest_word) = (whole, longest);
        }
        Head::Symbol(symbol, unit) => {
            natural.whole = Head::set_symbol(symbol, unit, 1.0, setter, &mut Frame::default());
            natural.longest_word = natural.whole;
        }
    }
    let kind = Type { size: SMALL, ..super::cell::CELL };
    for row in &content.rows {
        match row.get(at) {
            Some(Content::Words(words)) => {
                let (whole, longest) = words.widths(setter);
                natural.whole = natural.whole.max(whole);
                natural.longest_word = natural.longest_word.max(longest);
                natural.has_words = true;
            }
            Some(Content::Number(text, split)) => {
                natural.before_point = natural.before_point.max(setter.width(&text[..*split], kind));
                natural.after_point = natural.after_point.max(setter.width(&text[*split..], kind));
            }
            _ => {}
        }
    }
    natural.whole = natural.whole.max(natural.before_point + natural.after_point);
    if content.open && natural.whole < NARROW {
        natural.whole = NARROW;
    }
    natural
}
