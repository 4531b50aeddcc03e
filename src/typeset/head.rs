//! What stands on every sheet: the title block at its head, the checker's column at its outer edge.
use super::FaceName;
use super::frame::Frame;
use super::geometry::Geometry;
use super::text::{Setter, Type};
use crate::document::RunningHead;

/// Sizes of the title, of labels, of what they label.
const TITLE: f32 = 10.5;
const LABEL: f32 = 6.2;
const VALUE: f32 = 8.4;
/// Type of the marks that a sheet must not be taken without.
const MARK: Type = Type { face: FaceName::Bold, size: 8.0, grey: 255 };

/// Places head and checker's column on a sheet.
pub(super) fn set(
    head: &RunningHead,
    number: usize,
    count: usize,
    setter: &mut Setter<'_>,
    frame: &mut Frame,
    g: &Geometry,
) {
    let top = g.head;
    frame.rule(g.left, top, g.edge - g.left, 1.1);
    let sheet = format!("Sheet {number} of {count}");
    let bold = Type::new(FaceName::Bold, TITLE);
    let sheet_width = setter.width(&sheet, bold);
    let baseline = top + 14.5;
    let marks: Vec<&str> = [(head.preliminary, "PRELIMINARY"), (head.beyond_limit, "BEYOND LIMIT")]
        .into_iter()
        .filter_map(|(shown, words)| shown.then_some(words))
        .collect();
    let marks_width: f32 = marks.iter().map(|words| setter.width(words, MARK) + 10.0 + 12.0).sum();
    let right = g.edge - sheet_width;
    fitted(&head.title, bold, right - marks_width - 14.0 - g.left, setter, frame, [g.left, baseline]);
    let mut x = right - marks_width;
    for words in marks {
        x = mark(words, setter, frame, x, baseline) + 12.0;
    }
    setter.set(frame, &sheet, bold, right, baseline);

    let cells = [
        ("part", head.part.as_str(), 0.30),
        ("package no.", head.number.as_str(), 0.16),
        ("rev.", head.revision.as_str(), 0.07),
        ("status", head.status.as_str(), 0.15),
        ("prepared", head.prepared.as_str(), 0.16),
        ("checked", head.checked.as_str(), 0.16),
    ];
    let whole = g.edge - g.left;
    let mut x = g.left;
    for (label, value, share) in cells {
        let room = whole * share - 8.0;
        setter.set(frame, label, Type { grey: 70, ..Type::new(FaceName::Regular, LABEL) }, x, baseline + 13.0);
        fitted(value, Type::new(FaceName::Regular, VALUE), room, setter, frame, [x, baseline + 23.0]);
        x += whole * share;
    }
    frame.rule(g.left, baseline + 29.0, whole, 0.4);
    checker(setter, frame, g, baseline + 29.0);
}

/// White on black, from `left` on; gives its right end.
fn mark(words: &str, setter: &mut Setter<'_>, frame: &mut Frame, left: f32, baseline: f32) -> f32 {
    let width = setter.width(words, MARK) + 10.0;
    frame.rule(left, baseline - 9.0, width, 12.0);
    setter.set(frame, words, MARK, left + 5.0, baseline - 0.4);
    left + width
}

/// The column in which a checker ticks and signs, and the line on which the sheet is signed.
fn checker(setter: &mut Setter<'_>, frame: &mut Frame, g: &Geometry, top: f32) {
    let label = Type { grey: 70, ..Type::new(FaceName::Regular, LABEL) };
    frame.rule(g.check, top, 0.3, g.bottom + 22.0 - top);
    setter.set(frame, "checker", label, g.check + 8.0, top + 9.0);
    let foot = g.bottom + 20.0;
    setter.set(frame, "sheet", label, g.check + 8.0, foot - 2.0);
    frame.rule(g.check + 26.0, foot, g.edge - g.check - 26.0, 0.4);
}

/// Sets a text within a width: smaller where it must be, cut with a mark where even that is too wide.
pub(super) fn fitted(text: &str, kind: Type, room: f32, setter: &mut Setter<'_>, frame: &mut Frame, [x, y]: [f32; 2]) {
    let line = text.split_whitespace().collect::<Vec<_>>().join(" ");
    let width = setter.width(&line, kind);
    let scale = if width > room { (room / width).max(0.78) } else { 1.0 };
    let kind = Type { size: kind.size * scale, ..kind };
    if width * scale <= room + 0.01 {
        setter.set(frame, &line, kind, x, y);
        return;
    }
    // Halved again and again: a title may be of any length, and stands at the head of every sheet.
    let ends: Vec<usize> = line.char_indices().map(|(at, _)| at).collect();
    let mark = setter.width("…", kind);
    let fitting = ends.partition_point(|&end| setter.width(&line[..end], kind) + mark <= room);
    let cut = fitting.checked_sub(1).map_or(0, |last| ends[last]);
    setter.set(frame, &format!("{}…", line[..cut].trim_end()), kind, x, y);
}
