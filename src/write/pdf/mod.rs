//! Pages as PDF: printpdf writes fonts, pages and links; the glyphs are placed by streams of our own.
mod content;
mod face;
mod finish;

use crate::document::RunningHead;
use crate::typeset::{Fonts, Pages};
use face::EmbeddedFace;
use printpdf::{FontId, PdfDocument, PdfPage, PdfSaveOptions, Pt, Rect};
use std::fmt;

/// What the file says about itself.
#[derive(Debug, Clone, Default, PartialEq, Eq)]
pub struct Facts {
    /// Title.
    pub title: String,
    /// Author.
    pub author: String,
    /// What it is about.
    pub subject: String,
    /// Date that stands for the package, `YYYY-MM-DD`; no date is written where it is empty.
    pub date: String,
    /// Name and version of the program.
    pub producer: String,
}

impl Facts {
    /// The facts that a package's running head gives.
    #[must_use]
    pub fn of(head: &RunningHead) -> Self {
        let parts = [&head.part, &head.number, &head.revision, &head.status];
        let named = ["", "package ", "revision ", ""].iter().zip(parts).filter(|(_, part)| !part.is_empty());
        Self {
            title: head.title.clone(),
            author: head.prepared.clone(),
            subject: named.map(|(word, part)| format!("{word}{part}")).collect::<Vec<_>>().join(", "),
            date: head.date.clone(),
            producer: concat!("calcsheaf ", env!("CARGO_PKG_VERSION")).into(),
        }
    }
}

/// Why no PDF could be written.
#[derive(Debug, Clone, PartialEq, Eq)]
pub enum PdfFault {
    /// A font could not be reduced to the glyphs in use.
    Font(String),
    /// The file could not be put together.
    File(String),
}

impl fmt::Display for PdfFault {
    fn fmt(&self, f: &mut fmt::Formatter<'_>) -> fmt::Result {
        match self {
            Self::Font(reason) => write!(f, "a font could not be embedded: {reason}"),
            Self::File(reason) => write!(f, "the PDF could not be put together: {reason}"),
        }
    }
}

impl std::error::Error for PdfFault {}

/// Writes pages as PDF 1.7. The same pages give the same bytes.
///
/// # Errors
/// A font cannot be subset, or the file cannot be put together; neither happens with the built-in fonts.
pub fn write(pages: &Pages, fonts: &Fonts, facts: &Facts) -> Result<Vec<u8>, PdfFault> {
    let faces = face::in_use(pages, fonts)?;
    let mut pdf = PdfDocument::new(&facts.title);
    let mut carriers = Vec::new();
    for face in faces.iter().flatten() {
        pdf.resources.fonts.map.insert(FontId(face.resource()), face.font());
        carriers.extend(face.carrier());
    }
    pdf.pages = pages.sheets.iter().map(|_| page(pages)).collect();
    if let Some(first) = pdf.pages.first_mut() {
        // printpdf embeds what the pages show: these operations name every glyph in use, and the stream they
        // make is replaced with the others.
        first.ops.extend(carriers);
    }
    let options = PdfSaveOptions { optimize: false, subset_fonts: false, ..PdfSaveOptions::default() };
    let document = pdf.to_lopdf_document(&options, &mut Vec::new());
    let streams = pages.sheets.iter().map(|sheet| content::stream(sheet, pages.height, &faces));
    finish::finish(document, streams, pages, facts)
}

/// An empty page of the size of a sheet; its stream and links are put in at the end.
fn page(pages: &Pages) -> PdfPage {
    let mut page = PdfPage::new(printpdf::Mm(0.0), printpdf::Mm(0.0), Vec::new());
    let whole = Rect::from_xywh(Pt(0.0), Pt(0.0), Pt(tidy(pages.width)), Pt(tidy(pages.height)));
    (page.media_box, page.trim_box, page.crop_box) = (whole.clone(), whole.clone(), whole);
    page
}

/// A length to a hundredth of a point, as it is written.
fn tidy(length: f32) -> f32 {
    (length * 100.0).round() / 100.0
}

type Faces = [Option<EmbeddedFace>; 6];

#[cfg(test)]
mod tests;
