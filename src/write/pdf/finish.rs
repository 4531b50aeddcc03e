//! The last pass over the file: the streams put in their places, bookmarks, language, dates, identity.
use super::{Facts, PdfFault, tidy};
use crate::typeset::{Bookmark, Frame, Pages};
use flate2::Compression;
use flate2::write::ZlibEncoder;
use lopdf::{Dictionary, Document, Object, ObjectId, SaveOptions, Stream, StringFormat, dictionary};
use sha2::{Digest, Sha256};
use std::io::Write;

/// Puts the streams in place and gives the file's bytes.
pub(super) fn finish(
    mut document: Document,
    streams: impl Iterator<Item = Vec<u8>>,
    pages: &Pages,
    facts: &Facts,
) -> Result<Vec<u8>, PdfFault> {
    let fault = |reason: lopdf::Error| PdfFault::File(reason.to_string());
    document.version = "1.7".into();
    let page_ids: Vec<ObjectId> = document.get_pages().into_values().collect();
    let mut identity = Sha256::new();
    let contents: Vec<Vec<u8>> = streams.collect();
    let filled = page_ids.iter().zip(&pages.sheets).zip(&contents).zip(packed(&contents));
    for (((page, sheet), content), packed) in filled {
        identity.update(content);
        let page = document.get_dictionary_mut(*page).map_err(fault)?;
        page.remove(b"Annots");
        let links = links(sheet, pages, &page_ids);
        if !links.is_empty() {
            page.set("Annots", links);
        }
        let place = page.get(b"Contents").and_then(Object::as_reference).map_err(fault)?;
        let dictionary = dictionary! { "Filter" => Object::Name(b"FlateDecode".to_vec()) };
        document.set_object(place, Stream::new(dictionary, packed).with_compression(false));
    }
    let outline = bookmarks(&mut document, &pages.outline, &page_ids, pages.height);
    let catalog = document.catalog_mut().map_err(fault)?;
    catalog.set("Lang", Object::string_literal("en"));
    catalog.set("PageLayout", Object::Name(b"SinglePage".to_vec()));
    catalog.set("ViewerPreferences", dictionary! { "DisplayDocTitle" => true });
    if let Some(outline) = outline {
        catalog.set("Outlines", outline);
        catalog.set("PageMode", Object::Name(b"UseOutlines".to_vec()));
    }
    let info = information(facts);
    for (key, value) in &info {
        identity.update(key);
        identity.update(value.as_str().unwrap_or_default());
    }
    let info = document.add_object(info);
    if let Ok(old) = document.trailer.get(b"Info").and_then(Object::as_reference) {
        document.objects.remove(&old);
    }
    document.trailer.set("Info", info);
    let id = Object::String(identity.finalize()[..16].to_vec(), StringFormat::Hexadecimal);
    document.trailer.set("ID", vec![id.clone(), id]);
    document.compress();
    let mut bytes = Vec::new();
    let options =
        SaveOptions::builder().use_object_streams(true).use_xref_streams(true).compression_level(LEVEL).build();
    document.save_with_options(&mut bytes, options).map_err(|reason| PdfFault::File(reason.to_string()))?;
    Ok(bytes)
}

/// Level of compression: higher ones take twice the time for a few hundredths of the size.
const LEVEL: u32 = 3;

/// Every stream compressed, in order, on as many cores as there are.
fn packed(contents: &[Vec<u8>]) -> Vec<Vec<u8>> {
    let pack = |content: &Vec<u8>| {
        let mut encoder = ZlibEncoder::new(Vec::with_capacity(content.len() / 4), Compression::new(LEVEL));
        // Writing to memory does not fail.
        encoder.write_all(content).and_then(|()| encoder.finish()).unwrap_or_default()
    };
    let cores = std::thread::available_parallelism().map_or(1, usize::from).min(8);
    let share = contents.len().div_ceil(cores).max(1);
    std::thread::scope(|scope| {
        let parts: Vec<_> =
            contents.chunks(share).map(|part| scope.spawn(move || part.iter().map(pack).collect::<Vec<_>>())).collect();
        parts.into_iter().flat_map(|part| part.join().unwrap_or_default()).collect()
    })
}

/// The links of a sheet: each leads a little above the place it names (ISO 32000-1, 12.5.6.5 and 12.3.2).
///
/// The print flag belongs to links that are part of the page rather than of the screen (12.5.3).
fn links(sheet: &Frame, pages: &Pages, page_ids: &[ObjectId]) -> Vec<Object> {
    let real = |length: f32| Object::Real(tidy(length));
    sheet
        .links
        .iter()
        .filter_map(|link| {
            let spot = pages.spot(&link.to)?;
            let page = page_ids.get(spot.sheet)?;
            let bottom = pages.height - link.y - link.height;
            let rectangle = vec![real(link.x), real(bottom), real(link.x + link.width), real(bottom + link.height)];
            let place: Vec<Object> =
                vec![(*page).into(), "XYZ".into(), Object::Null, real(pages.height - spot.y + 6.0), Object::Null];
            Some(Object::Dictionary(dictionary! {
                "Type" => "Annot",
                "Subtype" => "Link",
                "Rect" => rectangle,
                "Border" => vec![0.into(), 0.into(), 0.into()],
                "F" => 4,
                "Dest" => place,
            }))
        })
        .collect()
}

fn information(facts: &Facts) -> Dictionary {
    let mut info = Dictionary::new();
    let texts = [
        ("Title", &facts.title),
        ("Author", &facts.author),
        ("Subject", &facts.subject),
        ("Creator", &facts.producer),
        ("Producer", &facts.producer),
    ];
    for (key, text) in texts {
        if !text.is_empty() {
            info.set(key, lopdf::text_string(text));
        }
    }
    let digits: String = facts.date.chars().filter(char::is_ascii_digit).collect();
    if digits.len() == 8 {
        for key in ["CreationDate", "ModDate"] {
            info.set(key, Object::string_literal(format!("D:{digits}000000Z")));
        }
    }
    info
}

/// The headings as a tree of bookmarks; deeper levels start closed.
fn bookmarks(document: &mut Document, outline: &[Bookmark], page_ids: &[ObjectId], height: f32) -> Option<Object> {
    if outline.is_empty() {
        return None;
    }
    let root = document.new_object_id();
    let ids: Vec<ObjectId> = outline.iter().map(|_| document.new_object_id()).collect();
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
    let link = |dict: &mut Dictionary, key: &str, to: Option<usize>| {
        if let Some(to) = to {
            dict.set(key, ids[to]);
        }
    };
    for family in &children {
        for (place, &at) in family.iter().enumerate() {
            let bookmark = &outline[at];
            let top = super::tidy(height - bookmark.spot.y + 6.0);
            let page = page_ids.get(bookmark.spot.sheet).copied().map_or(Object::Null, Object::Reference);
            let mut dict = dictionary! {
                "Title" => lopdf::text_string(&bookmark.text),
                "Parent" => parents[at].map_or(root, |parent| ids[parent]),
                "Dest" => vec![page, "XYZ".into(), Object::Null, top.into(), Object::Null],
            };
            link(&mut dict, "Prev", place.checked_sub(1).and_then(|before| family.get(before)).copied());
            link(&mut dict, "Next", family.get(place + 1).copied());
            let own = &children[at + 1];
            link(&mut dict, "First", own.first().copied());
            link(&mut dict, "Last", own.last().copied());
            if !own.is_empty() {
                dict.set("Count", if bookmark.level == 1 { own.len() as i64 } else { -(own.len() as i64) });
            }
            document.set_object(ids[at], dict);
        }
    }
    let open: usize =
        children[0].iter().map(|&at| 1 + if outline[at].level == 1 { children[at + 1].len() } else { 0 }).sum();
    let mut dict = dictionary! { "Type" => "Outlines", "Count" => open as i64 };
    link(&mut dict, "First", children[0].first().copied());
    link(&mut dict, "Last", children[0].last().copied());
    document.set_object(root, dict);
    Some(Object::Reference(root))
}
