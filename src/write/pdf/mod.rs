//! Pages as PDF: printpdf writes the fonts, everything else is written straight into the file.
mod content;
mod face;
mod facts;
mod file;
mod fonts;
mod ink;
mod outline;
mod page;

use crate::cores::side_by_side;
use crate::document::RunningHead;
use crate::typeset::{Fonts, Pages};
use face::EmbeddedFace;
use file::{File, Number, Packer};
use sha2::{Digest, Sha256};
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

    /// Year, month and day of the date; nothing where it is not written `YYYY-MM-DD`.
    fn day(&self) -> Option<[&str; 3]> {
        let mut parts = self.date.splitn(3, '-');
        let day = [parts.next()?, parts.next()?, parts.next()?];
        let whole = |part: &str, digits| part.len() == digits && part.bytes().all(|byte| byte.is_ascii_digit());
        (whole(day[0], 4) && whole(day[1], 2) && whole(day[2], 2)).then_some(day)
    }
}

/// Why no PDF could be written.
#[derive(Debug, Clone, PartialEq, Eq)]
pub enum PdfFault {
    /// A font could not be reduced to the glyphs in use.
    Font(String),
}

impl fmt::Display for PdfFault {
    fn fmt(&self, f: &mut fmt::Formatter<'_>) -> fmt::Result {
        match self {
            Self::Font(reason) => write!(f, "a font could not be embedded: {reason}"),
        }
    }
}

impl std::error::Error for PdfFault {}

/// Writes pages as PDF 1.7. The same pages give the same bytes.
///
/// # Errors
/// A font cannot be subset; this does not happen with the built-in fonts.
pub fn write(pages: &Pages, fonts: &Fonts, facts: &Facts) -> Result<Vec<u8>, PdfFault> {
    let faces = face::in_use(pages, fonts)?;
    let mut file = File::new();
    let [catalog, tree, resources, info, metadata] = std::array::from_fn(|_| file.number());
    let sheets = file.numbers(pages.sheets.len());
    let contents = file.numbers(pages.sheets.len());
    let fonts = fonts::embed(&faces, &mut file);
    let drawn = side_by_side(pages.sheets.len(), Packer::new, |packer, at| {
        let content = content::stream(&pages.sheets[at], pages.height, &faces);
        (packer.pack(&content), page::object(pages, at, tree, &sheets, contents.start + at as Number))
    });
    let mut identity = Sha256::new();
    for ((content, object), at) in drawn.into_iter().zip(0..) {
        identity.update(&content);
        identity.update(&object);
        file.stream(contents.start + at, String::new(), content);
        file.object(sheets.start + at, &object);
    }
    file.object(tree, &page::tree(pages, &sheets, resources));
    file.object(resources, &page::resources(&fonts));
    let outline = outline::write(&mut file, &pages.outline, &sheets, pages.height);
    file.object(catalog, &facts::catalog(tree, metadata, outline));
    let information = facts::information(facts);
    identity.update(&information);
    file.object(info, &information);
    file.plain_stream(metadata, "/Type/Metadata/Subtype/XML".into(), facts::metadata(facts).into_bytes());
    let digest: [u8; 32] = identity.finalize().into();
    let mut short = [0; 16];
    short.copy_from_slice(&digest[..16]);
    Ok(file.finish(catalog, info, &short))
}

type Faces = [Option<EmbeddedFace>; 6];

#[cfg(test)]
mod tests;
