//! Pages as objects: their tree, their size, their links.
use super::file::Number;
use super::ink::Ink;
use super::outline::destination;
use crate::typeset::Pages;
use std::ops::Range;

/// The page that shows the sheet at an index.
///
/// Each link leads a little above the place it names (ISO 32000-1, 12.5.6.5 and 12.3.2). The print flag belongs to
/// links that are part of the page rather than of the screen (12.5.3).
pub(super) fn object(pages: &Pages, at: usize, tree: Number, sheets: &Range<Number>, content: Number) -> Vec<u8> {
    let mut ink = Ink::default();
    ink.raw(b"<</Type/Page/Parent ");
    ink.to(tree);
    ink.raw(b"/Contents ");
    ink.to(content);
    let links = pages.sheets[at].links.iter().filter_map(|link| Some((link, pages.spot(&link.to)?)));
    for (place, (link, spot)) in links.clone().enumerate() {
        ink.raw(if place == 0 { &b"/Annots["[..] } else { b"" });
        ink.raw(b"<</Type/Annot/Subtype/Link/Border[0 0 0]/F 4/Rect[");
        let bottom = pages.height - link.y - link.height;
        for side in [link.x, bottom, link.x + link.width, bottom + link.height] {
            ink.length(side);
        }
        ink.raw(b"]/Dest");
        destination(&mut ink, spot, sheets, pages.height);
        ink.raw(b">>");
    }
    ink.raw(if links.count() > 0 { &b"]>>"[..] } else { b">>" });
    ink.0
}

/// The tree of pages; what all have in common stands here (7.7.3.4).
pub(super) fn tree(pages: &Pages, sheets: &Range<Number>, resources: Number) -> Vec<u8> {
    let mut ink = Ink::default();
    ink.raw(format!("<</Type/Pages/Count {}/MediaBox[0 0 ", sheets.len()));
    ink.length(pages.width);
    ink.length(pages.height);
    ink.raw(b"]/Resources ");
    ink.to(resources);
    ink.raw(b"/Kids[");
    for sheet in sheets.clone() {
        ink.to(sheet);
        ink.raw(b" ");
    }
    ink.raw(b"]>>");
    ink.0
}

/// What the streams draw on: the fonts, and grey tied to a white and a gamma, so that it does not depend on the
/// device (8.6.5.2, 8.6.5.6).
pub(super) fn resources(fonts: &[u8]) -> Vec<u8> {
    let grey = b"/ColorSpace<</DefaultGray[/CalGray<</WhitePoint[.9505 1 1.089]/Gamma 2.2>>]>>";
    [b"<</Font<<", fonts, b">>", grey, b">>"].concat()
}
