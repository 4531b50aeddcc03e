//! Tables: numbers aligned on their points, rules only where they divide, heads repeated on the next sheet.
mod cell;
mod columns;
mod rows;

use cell::{Content, Head};
use columns::{Layout, fit};

use super::FaceName;
use super::block::{Column, space};
use super::flow::Slab;
use super::frame::Anchor;
use super::geometry::{FINE, SMALL};
use super::paragraph::Paragraph;
use super::step::{labelled, numbered};
use super::text::{Setter, Type};
use crate::document::Inline;
use crate::sheet::Table;

const APART: f32 = 11.0;

/// A table ready to be laid out: everything measured at [`SMALL`].
struct Content2D {
    /// Id, printed where the table goes on.
    id: Option<String>,
    heads: Vec<Head>,
    rows: Vec<Vec<Content>>,
    /// Where each row's cells are addressed, if they are.
    anchors: Vec<Option<String>>,
    /// Whether cells are left open to be written in.
    open: bool,
}

/// A table that steps may draw on.
pub(super) fn of_sheet(table: &Table, column: Column<'_>, setter: &mut Setter<'_>) -> Vec<Slab> {
    let g = column.geometry;
    let content = Content2D {
        id: Some(table.id.clone()),
        heads: std::iter::once(Head::words(&table.head)).chain(table.columns.iter().map(Head::of)).collect(),
        rows: table
            .rows
            .iter()
            .map(|row| {
                let name = std::iter::once(Content::name(&row.name));
                name.chain(row.cells.iter().map(|cell| Content::of(cell, column.sheet))).collect()
            })
            .collect(),
        anchors: table.rows.iter().map(|row| Some(format!("{}.{}", table.id, row.name))).collect(),
        open: false,
    };
    let title = Paragraph::plain(&table.title, Type::new(FaceName::Regular, SMALL + 1.0));
    let mut slabs = numbered(&table.id, &title, setter, g);
    slabs.iter_mut().for_each(|slab| slab.keep = true);
    if let Some(first) = slabs.first_mut() {
        first.frame.anchors.push(Anchor { name: table.id.as_str().into(), y: 0.0 });
    }
    if let Some(last) = slabs.last_mut() {
        last.after = 3.0;
    }
    slabs.extend(laid_out(&content, g.left, column, setter));
    if let Some(note) = &table.note {
        if let Some(last) = slabs.last_mut() {
            last.keep = true;
        }
        slabs.extend(remark(note, column, setter));
    }
    space(&mut slabs, APART, APART);
    slabs
}

/// A table of words alone.
pub(super) fn of_words(
    head: &[Vec<Inline>],
    rows: &[Vec<Vec<Inline>>],
    column: Column<'_>,
    setter: &mut Setter<'_>,
) -> Vec<Slab> {
    let width = rows.iter().map(Vec::len).chain([head.len()]).max().unwrap_or(0);
    if width == 0 {
        return Vec::new();
    }
    let cell = |row: &[Vec<Inline>], at: usize| row.get(at).map_or(Content::Empty, |words| Content::inline(words));
    let content = Content2D {
        id: None,
        heads: (0..width).map(|at| Head::inline(head.get(at).map_or(&[], Vec::as_slice))).collect(),
        rows: rows.iter().map(|row| (0..width).map(|at| cell(row, at)).collect()).collect(),
        anchors: vec![None; rows.len()],
        // A column with a heading and nothing else is there to be written in.
        open: !rows.is_empty()
            && (0..width)
                .any(|at| rows.iter().all(|row| row.get(at).is_none_or(|words| Content::inline(words).is_empty()))),
    };
    let widest_left = if column.left > column.geometry.text { column.left } else { column.geometry.left };
    let mut slabs = laid_out(&content, widest_left, column, setter);
    space(&mut slabs, APART, APART);
    slabs
}

/// Finds a layout and sets the rows; a table too wide for any becomes several, one below the other.
fn laid_out(content: &Content2D, widest_left: f32, column: Column<'_>, setter: &mut Setter<'_>) -> Vec<Slab> {
    let g = column.geometry;
    let layouts: Vec<Layout> = fit(content, g.right - column.left, g.right - widest_left, setter);
    let mut slabs = Vec::new();
    for (part, layout) in layouts.iter().enumerate() {
        let left = if layout.wide { widest_left } else { column.left };
        let mut rows = rows::set(content, layout, left, setter, g);
        if part > 0 {
            space(&mut rows, APART, 0.0);
        }
        slabs.append(&mut rows);
    }
    slabs
}

fn remark(note: &str, column: Column<'_>, setter: &mut Setter<'_>) -> Vec<Slab> {
    let words = Paragraph::plain(note, Type::new(FaceName::Regular, FINE));
    let mut slabs = labelled("note", &words, setter, column.geometry);
    space(&mut slabs, 4.0, 0.0);
    slabs
}
