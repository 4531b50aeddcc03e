//! Headings, paragraphs, lists, cautions and text as typed, each as strips for the flow.
use super::flow::Slab;
use super::frame::{Anchor, Frame};
use super::geometry::{BASELINE, Geometry, LEADING, SMALL, TEXT, TYPED};
use super::paragraph::{Paragraph, body_type};
use super::text::{Setter, Type};
use super::uses::Uses;
use super::{FaceName, contents, figure, step, table};
use crate::document::{Block, Document, Inline};
use crate::sheet::Sheet;

/// Space between paragraphs, between the items of a list, and about what is set apart.
const PARAGRAPH: f32 = 6.0;
const ITEM: f32 = 2.5;
const APART: f32 = 9.0;
/// Indent of lists and cautions.
const INDENT: f32 = 15.0;

/// Where a block stands: its left end on the sheet; and what blocks name.
#[derive(Clone, Copy)]
pub(super) struct Column<'g> {
    pub(super) left: f32,
    pub(super) geometry: &'g Geometry,
    pub(super) sheet: &'g Sheet,
    pub(super) document: &'g Document,
    pub(super) uses: &'g Uses<'g>,
}

impl Column<'_> {
    fn room(&self) -> f32 {
        self.geometry.right - self.left
    }
}

/// Sets a block as strips. What names a step, a table or a figure that the sheet lacks gives nothing.
pub(super) fn set(block: &Block, column: Column<'_>, setter: &mut Setter<'_>) -> Vec<Slab> {
    match block {
        Block::Heading { level, text, anchor } => heading(*level, text, anchor, column, setter),
        Block::Paragraph(text) => paragraph(&Paragraph::new(text, body_type()), column, setter),
        Block::List { ordered, items } => list(*ordered, items, column, setter),
        Block::Caution(blocks) => caution(blocks, column, setter),
        Block::Verbatim(text) => verbatim(text, column, setter),
        Block::Step(number) => column.sheet.step(number).map_or_else(Vec::new, |s| step::set(s, column, setter)),
        Block::Table(id) => column.sheet.table(id).map_or_else(Vec::new, |t| table::of_sheet(t, column, setter)),
        Block::Figure(id) => column.sheet.figure(id).map_or_else(Vec::new, |f| figure::set(f, setter, column.geometry)),
        Block::Grid { head, rows } => table::of_words(head, rows, column, setter),
        Block::Contents => contents::set(column.document, setter, column.geometry),
        Block::NewSheet => Vec::new(),
    }
}

fn heading(level: u8, text: &[Inline], anchor: &str, column: Column<'_>, setter: &mut Setter<'_>) -> Vec<Slab> {
    let g = column.geometry;
    let (size, left, before, after) = match level {
        1 => (21.0, g.left, 0.0, 12.0),
        2 => (14.5, g.left, 24.0, 8.0),
        3 => (11.6, g.text, 17.0, 5.0),
        _ => (TEXT, g.text, 12.0, 3.0),
    };
    let left = left.max(column.left - (g.text - g.left));
    let words = Paragraph::new(text, Type::new(FaceName::Bold, size));
    let mut slabs: Vec<Slab> = Vec::new();
    for line in words.lines(setter, g.right - left) {
        let mut frame = Frame::default();
        words.set(setter, &mut frame, line, left, size);
        slabs.push(Slab { frame, height: size * 1.24, keep: true, ..Slab::default() });
    }
    if let Some(first) = slabs.first_mut() {
        first.before = before;
        first.frame.anchors.push(Anchor { name: anchor.into(), y: 0.0 });
    }
    if let Some(last) = slabs.last_mut() {
        last.after = after;
    }
    slabs
}

/// One strip a line; the first two and the last two lines stay together.
pub(super) fn paragraph(text: &Paragraph, column: Column<'_>, setter: &mut Setter<'_>) -> Vec<Slab> {
    let lines = text.lines(setter, column.room());
    let count = lines.len();
    let mut slabs: Vec<Slab> = Vec::with_capacity(count);
    for (at, line) in lines.into_iter().enumerate() {
        let mut frame = Frame::default();
        text.set(setter, &mut frame, line, column.left, BASELINE);
        let keep = at + 1 < count && (at == 0 || at + 2 == count);
        slabs.push(Slab { frame, height: LEADING, keep, ..Slab::default() });
    }
    space(&mut slabs, PARAGRAPH, PARAGRAPH);
    slabs
}

fn list(ordered: bool, items: &[Vec<Block>], column: Column<'_>, setter: &mut Setter<'_>) -> Vec<Slab> {
    let mut slabs = Vec::new();
    let inner = Column { left: column.left + INDENT + if items.len() > 99 { 6.0 } else { 0.0 }, ..column };
    for (at, item) in items.iter().enumerate() {
        let mut set_item: Vec<Slab> = item.iter().flat_map(|block| set(block, inner, setter)).collect();
        if set_item.is_empty() {
            set_item.push(Slab { height: LEADING, ..Slab::default() });
        }
        if let Some(first) = set_item.first_mut() {
            let mark = if ordered { format!("{}.", at + 1) } else { "–".to_string() };
            let mut frame = Frame::default();
            setter.set(&mut frame, &mark, body_type(), column.left, BASELINE);
            // The mark is read before the words it belongs to.
            frame.append(std::mem::take(&mut first.frame), 0.0, 0.0);
            first.frame = frame;
        }
        space(&mut set_item, ITEM, ITEM);
        slabs.extend(set_item);
    }
    space(&mut slabs, PARAGRAPH, PARAGRAPH);
    slabs
}

/// Set apart by a bar at its side and a bold word in the column of numbers.
fn caution(blocks: &[Block], column: Column<'_>, setter: &mut Setter<'_>) -> Vec<Slab> {
    let inner = Column { left: column.left + INDENT, ..column };
    let mut slabs: Vec<Slab> = blocks.iter().flat_map(|block| set(block, inner, setter)).collect();
    let mut below = 0.0_f32;
    for (at, slab) in slabs.iter_mut().enumerate() {
        // Spaces become part of the strips, so that the bar runs through.
        let above = if at == 0 { 0.0 } else { slab.before.max(below) };
        let mut frame = Frame::default();
        if at == 0 {
            let kind = Type::new(FaceName::Bold, SMALL);
            let x = if column.left > column.geometry.text { column.left } else { column.geometry.left };
            if x < column.left {
                setter.set(&mut frame, "CAUTION", kind, x, BASELINE);
            }
        }
        frame.rule(column.left, 0.0, 2.2, above + slab.height);
        frame.append(std::mem::take(&mut slab.frame), 0.0, above);
        slab.frame = frame;
        slab.height += above;
        below = slab.after;
        (slab.before, slab.after) = (0.0, 0.0);
    }
    space(&mut slabs, APART, APART);
    slabs
}

/// Text as typed; a line too long for the measure goes on below a mark.
fn verbatim(text: &str, column: Column<'_>, setter: &mut Setter<'_>) -> Vec<Slab> {
    let kind = Type::new(FaceName::Mono, TYPED);
    let leading = TYPED * 1.36;
    let left = if column.left > column.geometry.text { column.left } else { column.geometry.left };
    let advance = setter.width("0", kind);
    let room = (((column.geometry.right - left) / advance) as usize).max(12);
    let mut slabs = Vec::new();
    for line in text.trim_end_matches(['\n', '\r']).split('\n') {
        let mut rest = line.trim_end();
        let mut continued = false;
        loop {
            let room = if continued { room - 3 } else { room };
            let cut = cut_at(rest, room);
            let mut frame = Frame::default();
            let mut x = left;
            if continued {
                setter.set(&mut frame, "↪", Type { grey: 90, ..kind }, left + advance, TYPED);
                x += 3.0 * advance;
            }
            set_typed(&rest[..cut], kind, &mut frame, x, setter);
            slabs.push(Slab { frame, height: leading, ..Slab::default() });
            rest = &rest[cut..];
            continued = true;
            if rest.is_empty() {
                break;
            }
        }
    }
    space(&mut slabs, APART, APART);
    slabs
}

/// Sets a line, tabulators as spaces; what the typed face lacks may be wider and is squeezed by the caller's cut.
fn set_typed(text: &str, kind: Type, frame: &mut Frame, x: f32, setter: &mut Setter<'_>) {
    if text.contains('\t') {
        setter.set(frame, &text.replace('\t', "    "), kind, x, TYPED);
    } else if !text.is_empty() {
        setter.set(frame, text, kind, x, TYPED);
    }
}

/// Bytes of a text that fill so many cells; wide scripts take two.
fn cut_at(text: &str, room: usize) -> usize {
    let mut cells = 0;
    let mut blank = None;
    for (at, character) in text.char_indices() {
        cells += match character {
            '\t' => 4,
            c if (c as u32) < 0x1100 => 1,
            _ => 2,
        };
        if cells > room {
            // Cut at the last blank where there is one in the latter half.
            return blank.filter(|&blank| blank > at / 2).unwrap_or(at).max(1);
        }
        if character == ' ' {
            blank = Some(at + 1);
        }
    }
    text.len()
}

/// Asks for space above the first strip and below the last.
pub(super) fn space(slabs: &mut [Slab], before: f32, after: f32) {
    if let Some(first) = slabs.first_mut() {
        first.before = before;
    }
    if let Some(last) = slabs.last_mut() {
        last.after = after;
    }
}
