//! Sets the head and the rows of a table as strips.
use super::Content2D;
use super::cell::{CELL, Content, Head};
use super::columns::{Layout, Placed};
use crate::typeset::FaceName;
use crate::typeset::flow::Slab;
use crate::typeset::frame::{Anchor, Frame, Item, Rule};
use crate::typeset::geometry::{Geometry, SMALL};
use crate::typeset::text::{Setter, Type};
use std::sync::Arc;

/// Distance from row to row over the size of type, and of rows left open for writing.
const LEADING: f32 = 1.46;
const OPEN: f32 = 2.6;
/// A row of more lines than this is not kept in one piece.
const MANY: usize = 24;
/// A table of less than this part of a sheet's height is not parted.
const WHOLE: f32 = 0.3;
/// A little space after so many rows guides the eye along long tables.
const GROUP: usize = 5;

pub(super) fn set(content: &Content2D, layout: &Layout, left: f32, setter: &mut Setter<'_>, g: &Geometry) -> Vec<Slab> {
    // Rules may not reach past the text even where a column was rounded up.
    let width = layout.width().min(g.right - left);
    let count = content.rows.len();
    let mut head = head(content, layout, left, width, setter);
    let mut slabs = vec![Slab { frame: head.frame.clone(), height: head.height, keep: count > 0, ..Slab::default() }];
    if let Some(id) = &content.id {
        head = continued(id, head, setter, g);
    }
    // A head that would fill the next sheet is not repeated.
    let repeated = (head.height < WHOLE * g.body()).then(|| Arc::new(head));
    for at in 0..count {
        let mut lines = row(content, at, layout, left, setter);
        let Some(mut slab) = lines.pop() else { continue };
        for mut line in lines {
            line.head = repeated.clone();
            slabs.push(line);
        }
        slab.head = repeated.clone();
        // A single last row does not stand alone on the next sheet.
        slab.keep = at + 1 < count && (at == 0 || at + 2 == count);
        if content.open && at + 1 < count {
            thin(&mut slab.frame, left, slab.height, width, 0.3);
        }
        if count > GROUP + 3 && at % GROUP == GROUP - 1 && at + 1 < count {
            slab.height += 3.0;
        }
        if at + 1 == count {
            thin(&mut slab.frame, left, slab.height + 1.0, width, 0.4);
            slab.height += 1.4;
        }
        slabs.push(slab);
    }
    let height: f32 = slabs.iter().map(|slab| slab.height).sum();
    if height < WHOLE * g.body() {
        slabs.iter_mut().take(count).for_each(|slab| slab.keep = true);
    }
    slabs
}

/// The head as it is repeated on the next sheet, with the table's id where the eye starts.
fn continued(id: &str, head: Slab, setter: &mut Setter<'_>, g: &Geometry) -> Slab {
    let mut frame = Frame::default();
    let size = SMALL;
    let width = setter.set(&mut frame, id, Type::new(FaceName::Bold, size), g.left, size);
    let words = Type::new(FaceName::Italic, size);
    setter.set(&mut frame, "continued", words, g.text.max(g.left + width + 8.0), size);
    let above = size * 1.6;
    frame.append(head.frame, 0.0, above);
    Slab { frame, height: head.height + above, ..Slab::default() }
}

fn thin(frame: &mut Frame, x: f32, y: f32, width: f32, height: f32) {
    frame.items.push(Item::Rule(Rule { x, y, width, height, grey: 0 }));
}

fn head(content: &Content2D, layout: &Layout, left: f32, width: f32, setter: &mut Setter<'_>) -> Slab {
    let size = SMALL * layout.scale;
    let leading = size * 1.25;
    let mut frame = Frame::default();
    let mut lines = 1;
    for column in &layout.columns {
        if let Head::Words(words) = &content.heads[column.index] {
            lines = lines.max(words.scaled(layout.scale).lines(setter, column.width + 0.02).len());
        }
    }
    let mut x = left;
    for column in &layout.columns {
        let right = numeric(content, column.index);
        // Headings stand on the rule: short ones share the last line of long ones.
        match &content.heads[column.index] {
            Head::Words(words) => {
                let words = words.scaled(layout.scale);
                let set = words.lines(setter, column.width + 0.02);
                let first = lines - set.len();
                for (at, line) in set.into_iter().enumerate() {
                    let shift = if right { column.width - line.width } else { 0.0 };
                    let y = size + leading * (first + at) as f32;
                    words.set(setter, &mut frame, line, x + shift, y);
                }
            }
            Head::Symbol(symbol, unit) => {
                let from = frame.items.len();
                let width = Head::set_symbol(symbol, unit, layout.scale, setter, &mut frame);
                let shift = if right { column.width - width } else { 0.0 };
                frame.shift(from, x + shift, size + leading * (lines - 1) as f32);
            }
        }
        x += column.width + layout.gap;
    }
    let height = leading * lines as f32 + 0.35 * size;
    thin(&mut frame, left, height, width, 0.7);
    Slab { frame, height: height + 3.0, keep: true, ..Slab::default() }
}

/// Whether a column's headings stand over numbers, at the right.
fn numeric(content: &Content2D, index: usize) -> bool {
    content.rows.iter().any(|row| matches!(row.get(index), Some(Content::Number(..))))
}

/// A row as one strip; one of very many lines as a strip a line, so that it can go on over the next sheet.
fn row(content: &Content2D, at: usize, layout: &Layout, left: f32, setter: &mut Setter<'_>) -> Vec<Slab> {
    let size = SMALL * layout.scale;
    let leading = size * 1.25;
    let mut lines = vec![Frame::default()];
    if let Some(name) = &content.anchors[at] {
        lines[0].anchors.push(Anchor { name: name.as_str().into(), y: 0.0 });
    }
    let mut x = left;
    for column in &layout.columns {
        match content.rows[at].get(column.index) {
            Some(Content::Words(words)) => {
                let words = words.scaled(layout.scale);
                for (line_at, line) in words.lines(setter, column.width + 0.02).into_iter().enumerate() {
                    if lines.len() <= line_at {
                        lines.push(Frame::default());
                    }
                    words.set(setter, &mut lines[line_at], line, x, size * 1.04);
                }
            }
            Some(Content::Number(text, split)) => {
                number(text, *split, *column, layout.scale, x, setter, &mut lines[0]);
            }
            _ => {}
        }
        x += column.width + layout.gap;
    }
    if lines.len() > MANY {
        return lines.into_iter().map(|frame| Slab { frame, height: leading, ..Slab::default() }).collect();
    }
    let height = size * LEADING + leading * (lines.len() - 1) as f32;
    // Where cells are left open, words stand low, on the line that is left to write on.
    let above = if content.open { (size * OPEN - height).max(size * 0.5) } else { 0.0 };
    let mut frame = Frame::default();
    for (line_at, line) in lines.into_iter().enumerate() {
        frame.append(line, 0.0, above + leading * line_at as f32);
    }
    vec![Slab { frame, height: height + above, ..Slab::default() }]
}

fn number(text: &str, split: usize, column: Placed, scale: f32, x: f32, setter: &mut Setter<'_>, frame: &mut Frame) {
    let kind = Type { size: SMALL * scale, ..CELL };
    let before = setter.width(&text[..split], kind);
    // Numbers stand at the right end of the column as a block, their points in one line.
    let left = x + column.width - column.number_width + column.before_point - before;
    setter.set(frame, text, kind, left, kind.size * 1.04);
}
