//! The table of contents, made from the headings; numbers of sheets are filled in when all are set.
use super::FaceName;
use super::flow::Slab;
use super::frame::{Frame, Item, Link, Path, Slot};
use super::geometry::{Geometry, TEXT};
use super::paragraph::Paragraph;
use super::text::{Setter, Type};
use crate::document::{Block, Document};

/// Room for the number of a sheet.
const NUMBER: f32 = 26.0;
/// Distance between the dots of a leader.
const DOTS: f32 = 4.4;

/// Sets a line for each heading of a part, and for those below it.
pub(super) fn set(document: &Document, setter: &mut Setter<'_>, g: &Geometry) -> Vec<Slab> {
    let mut slabs = Vec::new();
    for (at, block) in document.blocks.iter().enumerate() {
        let Block::Heading { level, text, anchor } = block else { continue };
        // The table does not list its own heading.
        if matches!(document.blocks.get(at + 1), Some(Block::Contents)) {
            continue;
        }
        let (left, kind, before) = match level {
            2 => (g.text, Type::new(FaceName::Bold, TEXT), 4.5),
            3 => (g.text + 14.0, Type::new(FaceName::Regular, TEXT - 1.0), 0.0),
            _ => continue,
        };
        let leading = kind.size * 1.3;
        let baseline = kind.size;
        let words = Paragraph::new(text, kind);
        let lines = words.lines(setter, g.right - left - NUMBER - 12.0);
        let count = lines.len();
        for (at, line) in lines.into_iter().enumerate() {
            let mut frame = Frame::default();
            let end = left + line.width;
            words.set(setter, &mut frame, line, left, baseline);
            if at + 1 == count {
                leader(&mut frame, end + 5.0, g.right - NUMBER, baseline - 0.5);
                let item = frame.items.len();
                frame.slots.push(Slot {
                    right: g.right,
                    y: baseline,
                    size: kind.size,
                    to: anchor.as_str().into(),
                    item,
                });
            }
            let (y, height) = (baseline - kind.size * 0.85, leading);
            frame.links.push(Link { x: left, y, width: g.right - left, height, to: anchor.as_str().into() });
            let before = if at == 0 { before } else { 0.0 };
            slabs.push(Slab { frame, height: leading, before, keep: at + 1 < count, ..Slab::default() });
        }
    }
    slabs
}

/// Dots on a grid common to all lines, drawn rather than set so that they are not read out.
fn leader(frame: &mut Frame, from: f32, to: f32, y: f32) {
    let start = to - ((to - from) / DOTS).floor() * DOTS;
    if to - start > 2.0 * DOTS {
        let points = vec![[start, y], [to, y]];
        let stroke = Some((0.8, &[0.8_f32, DOTS - 0.8] as &[f32], 90));
        frame.items.push(Item::Path(Box::new(Path { points, closed: false, stroke, fill: None })));
    }
}
