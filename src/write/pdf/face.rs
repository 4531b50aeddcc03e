//! Faces reduced to the glyphs in use, numbered anew.
use super::{Faces, PdfFault};
use crate::cores::side_by_side;
use crate::typeset::{Face, FaceName, Fonts, Item, Pages};
use printpdf::{Codepoint, FontId, Op, ParsedFont, PdfFont, PdfFontHandle, Pt, TextItem};
use subsetter::{GlyphRemapper, subset};

/// A face in the file.
pub(super) struct EmbeddedFace {
    index: usize,
    parsed: ParsedFont,
    /// The code written for each glyph of the face.
    codes: Vec<u16>,
    /// Each code in use with the character it is read back as.
    read: Vec<(u16, char)>,
}

impl EmbeddedFace {
    /// Its name among the resources of a page.
    pub(super) fn resource(&self) -> String {
        format!("F{}", self.index)
    }

    /// Its name in the file: the mark of a subset and the face's own.
    pub(super) fn base_name(&self) -> &str {
        self.parsed.font_name.as_deref().unwrap_or_default()
    }

    pub(super) fn font(&self) -> PdfFont {
        PdfFont::new(self.parsed.clone())
    }

    /// The code written for a glyph.
    pub(super) fn code(&self, glyph: u16) -> u16 {
        self.codes.get(glyph as usize).copied().unwrap_or(0)
    }

    /// Operations that show every glyph in use once.
    pub(super) fn carrier(&self) -> Vec<Op> {
        let glyphs = self.read.iter().map(|(code, read)| Codepoint::with_cid(*code, 0.0, read.to_string())).collect();
        vec![
            Op::StartTextSection,
            Op::SetFont { font: PdfFontHandle::External(FontId(self.resource())), size: Pt(1.0) },
            Op::ShowText { items: vec![TextItem::GlyphIds(glyphs)] },
            Op::EndTextSection,
        ]
    }
}

/// The faces that the pages use.
pub(super) fn in_use(pages: &Pages, fonts: &Fonts) -> Result<Faces, PdfFault> {
    let mut used: [Vec<bool>; 6] = Default::default();
    for sheet in &pages.sheets {
        for item in &sheet.items {
            let Item::Run(run) = item else { continue };
            let marks = &mut used[run.face as usize];
            for glyph in sheet.glyphs_of(run) {
                let at = glyph.id as usize;
                if marks.len() <= at {
                    marks.resize(at + 1, false);
                }
                marks[at] = true;
            }
        }
    }
    let mut faces: Faces = Default::default();
    let names = FaceName::ALL;
    let embedded = side_by_side(
        names.len(),
        || (),
        |(), at| {
            let marks = &used[names[at] as usize];
            (!marks.is_empty()).then(|| embed(names[at] as usize, fonts.face(names[at]), marks)).transpose()
        },
    );
    for (name, face) in names.into_iter().zip(embedded) {
        faces[name as usize] = face?;
    }
    Ok(faces)
}

fn embed(index: usize, face: &Face, marks: &[bool]) -> Result<EmbeddedFace, PdfFault> {
    let fault = |reason: &str| PdfFault::Font(format!("{}: {reason}", face.name));
    let glyphs: Vec<u16> = (0..marks.len()).filter(|&at| marks[at]).map(|at| at as u16).collect();
    let mut remapper = GlyphRemapper::new_from_glyphs(&glyphs);
    let program = subset(face.program, 0, &remapper).map_err(|reason| fault(&reason.to_string()))?;
    let mut parsed =
        ParsedFont::from_bytes(&program, 0, &mut Vec::new()).ok_or_else(|| fault("the subset is not read"))?;
    parsed.font_name = Some(format!("{}+{}", tag(index, &glyphs), face.name));
    let mut codes = vec![0; marks.len()];
    let mut read = Vec::with_capacity(glyphs.len());
    for &glyph in &glyphs {
        let code = remapper.remap(glyph);
        codes[glyph as usize] = code;
        read.push((code, face.character(glyph)));
    }
    Ok(EmbeddedFace { index, parsed, codes, read })
}

/// Six capitals that mark a subset, made from the glyphs in it (ISO 32000-1, 9.6.4).
fn tag(index: usize, glyphs: &[u16]) -> String {
    let seed = 0xcbf2_9ce4_8422_2325_u64 ^ index as u64;
    let mut hash = glyphs.iter().fold(seed, |hash, &glyph| (hash ^ u64::from(glyph)).wrapping_mul(0x0100_0000_01b3));
    (0..6)
        .map(|_| {
            let letter = char::from(b'A' + (hash % 26) as u8);
            hash /= 26;
            letter
        })
        .collect()
}
