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
    let mut right = g.edge - sheet_width;
    setter.set(frame, &sheet, bold, right, baseline);
    for (shown, words) in [(head.preliminary, "PRELIMINARY"), (head.beyond_limit, "BEYOND LIMIT")] {
        if shown {
            right = mark(words, setter, frame, right - 12.0, baseline);
        }
    }
    fitted(&head.title, bold, right - 14.0 - g.left, setter, frame, [g.left, baseline]);

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

/// White on black, ending at `right`; gives its left end.
fn mark(words: &str, setter: &mut Setter<'_>, frame: &mut Frame, right: f32, baseline: f32) -> f32 {
    let kind = Type { grey: 255, ..Type::new(FaceName::Bold, 8.0) };
    let width = setter.width(words, kind) + 10.0;
    frame.rule(right - width, baseline - 9.0, width, 12.0);
    setter.set(frame, words, kind, right - width + 5.0, baseline - 0.4);
    right - width
}

/// The column in which a checker ticks and signs, and the line on which the sheet is signed.
fn checker(setter: &mut Setter<'_>, frame: &mut Frame, g: &Geometry, top: f32) {
    let label = Type { grey: 70, ..Type::new(FaceName::Regular, LABEL) };
    frame.rule(g.check, top, 0.4, g.bottom + 22.0 - top);
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
    let mut cut = line.len();
    while cut > 0 && setter.width(&line[..cut], kind) + setter.width("…", kind) > room {
        cut = line[..cut].char_indices().next_back().map_or(0, |(at, _)| at);
    }
    setter.set(frame, &format!("{}…", line[..cut].trim_end()), kind, x, y);
}
