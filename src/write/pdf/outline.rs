//! Bookmarks: the headings as a tree; deeper levels start closed (ISO 32000-1, 12.3.3).
use super::file::{File, Number};
use super::ink::Ink;
use crate::typeset::{Bookmark, Spot};
use std::ops::Range;

/// What lies a little above a place: where a link or a bookmark leads.
pub(super) fn destination(ink: &mut Ink, spot: Spot, pages: &Range<Number>, height: f32) {
    ink.raw(b"[");
    ink.to(pages.start + spot.sheet as Number);
    ink.raw(b"/XYZ null ");
    ink.length(height - spot.y + 6.0);
    ink.raw(b"null]");
}

/// Writes the tree and gives the number of its root.
pub(super) fn write(file: &mut File, outline: &[Bookmark], pages: &Range<Number>, height: f32) -> Option<Number> {
    if outline.is_empty() {
        return None;
    }
    let root = file.number();
    let first = file.numbers(outline.len()).start;
    let number = |at: usize| first + at as Number;
    // The nearest earlier heading of a higher rank is the parent.
    let mut above: Vec<usize> = Vec::new();
    let mut parents: Vec<Option<usize>> = Vec::with_capacity(outline.len());
    for (at, bookmark) in outline.iter().enumerate() {
        while above.last().is_some_and(|&last| outline[last].level >= bookmark.level) {
            above.pop();
        }
        parents.push(above.last().copied());
        above.push(at);
    }
    let mut children: Vec<Vec<usize>> = vec![Vec::new(); outline.len() + 1];
    for (at, parent) in parents.iter().enumerate() {
        children[parent.map_or(0, |parent| parent + 1)].push(at);
    }
    let link = |ink: &mut Ink, key: &str, to: Option<usize>| {
        if let Some(to) = to {
            ink.raw(key);
            ink.to(number(to));
        }
    };
    let ends = |ink: &mut Ink, family: &[usize]| {
        link(ink, "/First ", family.first().copied());
        link(ink, "/Last ", family.last().copied());
    };
    for family in &children {
        for (place, &at) in family.iter().enumerate() {
            let bookmark = &outline[at];
            let mut ink = Ink::default();
            ink.raw(b"<</Title");
            ink.text(&bookmark.text);
            ink.raw(b"/Parent ");
            ink.to(parents[at].map_or(root, number));
            ink.raw(b"/Dest");
            destination(&mut ink, bookmark.spot, pages, height);
            link(&mut ink, "/Prev ", place.checked_sub(1).and_then(|before| family.get(before)).copied());
            link(&mut ink, "/Next ", family.get(place + 1).copied());
            let own = &children[at + 1];
            ends(&mut ink, own);
            if !own.is_empty() {
                let count = own.len() as i64;
                ink.raw(b"/Count ");
                ink.integer(if bookmark.level == 1 { count } else { -count });
            }
            ink.raw(b">>");
            file.object(number(at), &ink.0);
        }
    }
    let open: usize =
        children[0].iter().map(|&at| 1 + if outline[at].level == 1 { children[at + 1].len() } else { 0 }).sum();
    let mut ink = Ink::default();
    ink.raw(format!("<</Type/Outlines/Count {open}"));
    ends(&mut ink, &children[0]);
    ink.raw(b">>");
    file.object(root, &ink.0);
    Some(root)
}
