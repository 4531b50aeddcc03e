//! Tests of the file: what a reader program finds in it.
#![allow(clippy::unwrap_used, reason = "a test may fail loudly")]
use super::*;
use crate::model::Paper;
use crate::typeset::{fixture, typeset};
use lopdf::{Dictionary, Document, Object};

fn bytes() -> Vec<u8> {
    let sheet = fixture::sheet(2);
    let document = fixture::document(&sheet);
    let fonts = fixture::fonts();
    let pages = typeset(&document, &sheet, Paper::A4, fonts);
    write(&pages, fonts, &Facts::of(&document.head)).unwrap()
}

fn resolve<'d>(document: &'d Document, dict: &'d Dictionary, key: &[u8]) -> &'d Object {
    document.dereference(dict.get(key).unwrap()).unwrap().1
}

#[test]
fn the_same_pages_give_the_same_bytes() {
    assert!(bytes() == bytes());
}

#[test]
fn every_page_draws_and_every_link_leads_to_a_page() {
    let document = Document::load_mem(&bytes()).unwrap();
    let pages: Vec<_> = document.get_pages().into_values().collect();
    assert!(pages.len() > 4);
    let mut links = 0;
    for page in &pages {
        let content = document.get_page_content(*page);
        assert!(content.starts_with(b"0 g") && content.trim_ascii_end().ends_with(b"ET"));
        let page = document.get_dictionary(*page).unwrap();
        let Ok(annotations) = page.get(b"Annots").and_then(Object::as_array) else { continue };
        for link in annotations {
            let to =
                link.as_dict().unwrap().get(b"Dest").and_then(Object::as_array).unwrap()[0].as_reference().unwrap();
            assert!(pages.contains(&to));
            links += 1;
        }
    }
    assert!(links > 30);
}

#[test]
fn fonts_are_embedded_subsets_that_read_back() {
    let document = Document::load_mem(&bytes()).unwrap();
    let page = *document.get_pages().values().next().unwrap();
    let fonts = document.get_page_fonts(page).unwrap();
    assert_eq!(fonts.len(), 6);
    for font in fonts.values() {
        let name = String::from_utf8_lossy(font.get(b"BaseFont").and_then(Object::as_name).unwrap()).into_owned();
        assert!(name.chars().take(6).all(|c| c.is_ascii_uppercase()) && name.as_bytes()[6] == b'+', "{name}");
        assert!(font.has(b"ToUnicode"));
        let descendant = resolve(&document, font, b"DescendantFonts").as_array().unwrap()[0].as_dict().unwrap();
        let descriptor = resolve(&document, descendant, b"FontDescriptor").as_dict().unwrap();
        assert!(descriptor.has(b"FontFile2") || descriptor.has(b"FontFile3"), "{name}");
    }
}

#[test]
fn facts_and_dates_come_from_the_input() {
    let document = Document::load_mem(&bytes()).unwrap();
    let info = resolve(&document, &document.trailer, b"Info").as_dict().unwrap();
    assert_eq!(info.get(b"CreationDate").unwrap().as_str().unwrap(), b"D:20261130000000Z");
    assert_eq!(lopdf::decode_text_string(info.get(b"Title").unwrap()).unwrap(), "Pump-house pipe support");
    assert!(!info.has(b"GTS_PDFXVersion"));
    let catalog = document.catalog().unwrap();
    assert_eq!(catalog.get(b"Lang").unwrap().as_str().unwrap(), b"en");
    assert_eq!(document.version, "1.7");
}

#[test]
fn bookmarks_hold_every_heading_in_order() {
    let document = Document::load_mem(&bytes()).unwrap();
    let catalog = document.catalog().unwrap();
    let mut titles = Vec::new();
    let mut waiting = vec![resolve(&document, catalog, b"Outlines").as_dict().unwrap()];
    while let Some(dict) = waiting.pop() {
        if let Ok(title) = dict.get(b"Title") {
            titles.push(lopdf::decode_text_string(title).unwrap());
        }
        for key in [b"Next".as_slice(), b"First"] {
            if dict.has(key) {
                waiting.push(resolve(&document, dict, key).as_dict().unwrap());
            }
        }
    }
    assert_eq!(titles[..3], ["Pump-house pipe support", "Contents", "How to check this package"]);
    assert_eq!(titles.last().map(String::as_str), Some("Input file"));
    assert_eq!(titles.len(), 9);
}
