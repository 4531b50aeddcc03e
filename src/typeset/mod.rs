//! Sets a document on paper: frames of placed glyphs, rules and paths. Knows no PDF.
mod block;
mod contents;
mod figure;
#[cfg(test)]
pub(crate) mod fixture;
mod flow;
mod font;
mod frame;
mod geometry;
mod head;
mod maths;
mod paragraph;
mod step;
mod symbols;
mod table;
mod text;
mod uses;

pub use font::{Constants, Face, FaceName, Fonts, Growth, MathFont, Part};
pub use frame::{Anchor, Frame, Glyph, Item, Link, Path, Rule, Run, Slot};

use crate::cores::side_by_side;
use crate::document::{Block, Document, Inline};
use crate::model::Paper;
use crate::sheet::Sheet;
use block::Column;
use flow::{Flow, Placed};
use geometry::Geometry;
use std::collections::{BTreeMap, BTreeSet};
use std::sync::{Mutex, PoisonError};
use text::{Setter, Type};

/// A document on paper.
#[derive(Debug, Default)]
pub struct Pages {
    /// Width of a sheet, points.
    pub width: f32,
    /// Height of a sheet, points.
    pub height: f32,
    /// Sheets in order; y runs downward from the top edge.
    pub sheets: Vec<Frame>,
    /// Where links lead: steps, tables, rows of tables, figures, headings.
    pub places: BTreeMap<Box<str>, Spot>,
    /// Headings in order.
    pub outline: Vec<Bookmark>,
    /// Characters that no face has; a framed code point stands for each.
    pub missing: BTreeSet<char>,
}

/// A place on paper.
#[derive(Debug, Clone, Copy, PartialEq)]
pub struct Spot {
    /// Index of the sheet.
    pub sheet: usize,
    /// Distance from the top edge, points.
    pub y: f32,
}

/// A heading, as a reader's list of bookmarks shows it.
#[derive(Debug, Clone, PartialEq)]
pub struct Bookmark {
    /// 1 for the title, 2 for parts, 3 and 4 below.
    pub level: u8,
    /// Its words.
    pub text: String,
    /// Where it stands.
    pub spot: Spot,
}

impl Pages {
    /// Where an address leads: to the thing itself, or to the nearest thing that holds it (a cell's row, its table).
    #[must_use]
    pub fn spot(&self, address: &str) -> Option<Spot> {
        spot(&self.places, address)
    }
}

/// Sets a document on sheets of paper.
#[must_use]
pub fn typeset(document: &Document, sheet: &Sheet, paper: Paper, fonts: &Fonts) -> Pages {
    let geometry = Geometry::of(paper);
    let mut setter = Setter::new(fonts);
    let mut flow = Flow::new(geometry);
    let uses = uses::Uses::of(sheet);
    let column = Column { left: geometry.text, geometry: &geometry, sheet, document, uses: &uses };
    // Blocks are set by themselves, side by side, and poured on to the sheets in order.
    let parts = document.blocks.len().div_ceil(BLOCKS);
    let set = side_by_side(
        parts,
        || (),
        |(), part| {
            let mut setter = Setter::new(fonts);
            let blocks = (part * BLOCKS..document.blocks.len().min((part + 1) * BLOCKS))
                .map(|at| {
                    let mut slabs = block::set(&document.blocks[at], column, &mut setter);
                    if introduces(&document.blocks, at)
                        && slabs.len() <= INTRODUCTION
                        && let Some(last) = slabs.last_mut()
                    {
                        last.keep = true;
                    }
                    slabs
                })
                .collect::<Vec<_>>();
            (blocks, setter.missing)
        },
    );
    let mut blocks = document.blocks.iter();
    for (part, missing) in set {
        setter.missing.extend(missing);
        for slabs in part {
            if matches!(blocks.next(), Some(Block::NewSheet)) {
                flow.new_sheet();
            }
            slabs.into_iter().for_each(|slab| flow.push(slab));
        }
    }
    flow.settle();
    let mut sheets = flow.sheets;
    if sheets.is_empty() {
        sheets.push(Vec::new());
    }
    let places = places(&sheets);
    let count = sheets.len();
    let bodies: Vec<Mutex<Vec<Placed>>> = sheets.into_iter().map(Mutex::new).collect();
    let set = side_by_side(
        count,
        || (),
        |(), at| {
            let mut setter = Setter::new(fonts);
            let mut frame = Frame::default();
            head::set(&document.head, at + 1, count, &mut setter, &mut frame, &geometry);
            let body = std::mem::take(&mut *bodies[at].lock().unwrap_or_else(PoisonError::into_inner));
            body.into_iter().for_each(|part| frame.append(part.frame, 0.0, part.y));
            fill_slots(&mut frame, &places, &mut setter);
            (frame, setter.missing)
        },
    );
    let mut pages = Pages { width: geometry.width, height: geometry.height, places, ..Pages::default() };
    for (frame, missing) in set {
        setter.missing.extend(missing);
        pages.sheets.push(frame);
    }
    pages.outline = outline(document, &pages);
    pages.missing = setter.missing;
    pages
}

/// Blocks set at a time.
const BLOCKS: usize = 32;

/// Lines of a paragraph that stays with what it introduces.
const INTRODUCTION: usize = 3;

/// Whether a paragraph stands between a heading and what it introduces.
fn introduces(blocks: &[Block], at: usize) -> bool {
    let set_apart = |block: &Block| {
        matches!(block, Block::Step(_) | Block::Table(_) | Block::Figure(_) | Block::Grid { .. } | Block::List { .. })
    };
    matches!(blocks[at], Block::Paragraph(_))
        && at.checked_sub(1).is_some_and(|before| matches!(blocks[before], Block::Heading { .. }))
        && blocks.get(at + 1).is_some_and(set_apart)
}

/// Where links lead; of two places of one name the first counts.
fn places(sheets: &[Vec<Placed>]) -> BTreeMap<Box<str>, Spot> {
    let mut places = BTreeMap::new();
    for (sheet, parts) in sheets.iter().enumerate() {
        for part in parts {
            for anchor in &part.frame.anchors {
                places.entry(anchor.name.clone()).or_insert(Spot { sheet, y: part.y + anchor.y });
            }
        }
    }
    places
}

/// The nearest place that an address leads to: the thing itself, or what holds it (a cell's row, its table).
fn spot(places: &BTreeMap<Box<str>, Spot>, address: &str) -> Option<Spot> {
    let mut name = address;
    loop {
        if let Some(spot) = places.get(name) {
            return Some(*spot);
        }
        name = &name[..name.rfind('.')?];
    }
}

/// Puts the numbers of sheets where they are read: after the words they belong to.
fn fill_slots(frame: &mut Frame, places: &BTreeMap<Box<str>, Spot>, setter: &mut Setter<'_>) {
    for slot in std::mem::take(&mut frame.slots).into_iter().rev() {
        if let Some(spot) = spot(places, &slot.to) {
            let number = (spot.sheet + 1).to_string();
            let kind = Type::new(FaceName::Regular, slot.size);
            let width = setter.width(&number, kind);
            let end = frame.items.len();
            setter.set(frame, &number, kind, slot.right - width, slot.y);
            let set = frame.items.split_off(end);
            frame.items.splice(slot.item..slot.item, set);
        }
    }
}

fn outline(document: &Document, pages: &Pages) -> Vec<Bookmark> {
    let headings = document.blocks.iter().filter_map(|block| match block {
        Block::Heading { level, text, anchor } => Some((*level, text, anchor)),
        _ => None,
    });
    headings
        .filter_map(|(level, text, anchor)| {
            Some(Bookmark { level, text: words(text), spot: pages.places.get(anchor.as_str()).copied()? })
        })
        .collect()
}

/// The words of inline text, without its styles.
fn words(inlines: &[Inline]) -> String {
    let mut text = String::new();
    for inline in inlines {
        match inline {
            Inline::Text(words) | Inline::Code(words) => text.push_str(words),
            Inline::Strong(inner) | Inline::Emphasis(inner) | Inline::Link { text: inner, .. } => {
                text.push_str(&words(inner));
            }
            Inline::Break => text.push(' '),
        }
    }
    text
}

#[cfg(test)]
mod tests;
