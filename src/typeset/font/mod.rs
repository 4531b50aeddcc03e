//! The faces a package is set in, with what typesetting asks of them laid out in flat arrays.
mod growth;
mod kerning;
mod maths;

pub use growth::{Growth, Part};
pub(in crate::typeset) use maths::italic_greek;
pub use maths::{Constants, MathFont};

use ttf_parser::GlyphId;

/// The faces, in the order of [`Fonts`].
#[derive(Debug, Clone, Copy, PartialEq, Eq, PartialOrd, Ord, Hash)]
pub enum FaceName {
    /// Upright text.
    Regular,
    /// Italic text.
    Italic,
    /// Bold text.
    Bold,
    /// Formulas.
    Math,
    /// Characters that the others lack.
    Fallback,
    /// Text as typed.
    Mono,
}

impl FaceName {
    /// Every face, in the order of the enum.
    pub const ALL: [Self; 6] = [Self::Regular, Self::Italic, Self::Bold, Self::Math, Self::Fallback, Self::Mono];
}

/// A face: its font program and the metrics of its glyphs.
#[derive(Debug)]
pub struct Face {
    /// PostScript name.
    pub name: &'static str,
    /// The font program.
    pub program: &'static [u8],
    /// Font units to the em.
    pub units_per_em: f32,
    /// Advance of each glyph in thousandths of the em, as a PDF's width table has it.
    advances: Vec<i16>,
    /// The character each glyph is read back as.
    characters: Vec<char>,
    /// Glyphs by character, in blocks of 256.
    blocks: Vec<Option<Box<[u16; 256]>>>,
    kerning: kerning::Kerning,
}

impl Face {
    fn read(name: &'static str, program: &'static [u8]) -> Self {
        let mut face = Self {
            name,
            program,
            units_per_em: 1000.0,
            advances: vec![500],
            characters: vec!['\u{fffd}'],
            blocks: Vec::new(),
            kerning: kerning::Kerning::default(),
        };
        let Ok(parsed) = ttf_parser::Face::parse(program, 0) else { return face };
        let units = i32::from(parsed.units_per_em()).max(1);
        face.units_per_em = units as f32;
        face.advances = (0..parsed.number_of_glyphs())
            .map(|id| (i32::from(parsed.glyph_hor_advance(GlyphId(id)).unwrap_or(0)) * 1000 / units) as i16)
            .collect();
        face.characters = vec!['\u{fffd}'; face.advances.len()];
        face.read_characters(&parsed);
        face.kerning = kerning::Kerning::read(&parsed, &|c| face.glyph(c));
        face
    }

    fn read_characters(&mut self, parsed: &ttf_parser::Face<'_>) {
        let subtables = parsed.tables().cmap.into_iter().flat_map(|cmap| cmap.subtables);
        for subtable in subtables.filter(ttf_parser::cmap::Subtable::is_unicode) {
            subtable.codepoints(|code| {
                let Some(character) = char::from_u32(code) else { return };
                let Some(glyph) = subtable.glyph_index(code).filter(|glyph| glyph.0 != 0) else { return };
                let block = (code >> 8) as usize;
                if self.blocks.len() <= block {
                    self.blocks.resize_with(block + 1, || None);
                }
                let block = self.blocks[block].get_or_insert_with(|| Box::new([0; 256]));
                block[(code & 255) as usize] = glyph.0;
                if let Some(known) = self.characters.get_mut(glyph.0 as usize)
                    && (*known == '\u{fffd}' || character < *known)
                {
                    *known = character;
                }
            });
        }
    }

    /// The glyph of a character; 0 where the face has none.
    #[must_use]
    pub fn glyph(&self, character: char) -> u16 {
        let code = character as u32;
        match self.blocks.get((code >> 8) as usize) {
            Some(Some(block)) => block[(code & 255) as usize],
            _ => 0,
        }
    }

    /// Advance of a glyph in thousandths of the em.
    #[must_use]
    pub fn advance(&self, glyph: u16) -> i16 {
        self.advances.get(glyph as usize).copied().unwrap_or(0)
    }

    /// Space to add between two neighbours, in thousandths of the em.
    #[must_use]
    pub fn kern(&self, left: u16, right: u16) -> i16 {
        self.kerning.between(left, right)
    }

    /// The character a glyph is read back as when the page is searched or copied.
    #[must_use]
    pub fn character(&self, glyph: u16) -> char {
        self.characters.get(glyph as usize).copied().unwrap_or('\u{fffd}')
    }
}

/// The faces of a package.
#[derive(Debug)]
pub struct Fonts {
    faces: Vec<Face>,
    /// What the maths face says about setting formulas.
    pub maths: MathFont,
}

impl Fonts {
    /// The faces that come with the program.
    #[must_use]
    pub fn built_in() -> Self {
        let mut faces = vec![
            Face::read("TeXGyrePagella-Regular", include_bytes!("../../../templates/fonts/texgyrepagella-regular.otf")),
            Face::read("TeXGyrePagella-Italic", include_bytes!("../../../templates/fonts/texgyrepagella-italic.otf")),
            Face::read("TeXGyrePagella-Bold", include_bytes!("../../../templates/fonts/texgyrepagella-bold.otf")),
            Face::read(
                "TeXGyrePagellaMath-Regular",
                include_bytes!("../../../templates/fonts/texgyrepagella-math.otf"),
            ),
            Face::read("DejaVuSerif", include_bytes!("../../../templates/fonts/DejaVuSerif.ttf")),
            Face::read("DejaVuSansMono", include_bytes!("../../../templates/fonts/DejaVuSansMono.ttf")),
        ];
        let maths = MathFont::read(&mut faces[FaceName::Math as usize]);
        Self { faces, maths }
    }

    /// One of the faces.
    #[must_use]
    pub fn face(&self, name: FaceName) -> &Face {
        &self.faces[name as usize]
    }
}

#[cfg(test)]
mod tests {
    use super::*;
    use crate::typeset::fixture;

    /// The package's own metric files: in TeX Gyre Pagella a digit is 500 wide, `a` 500, `m` 883 of 1000.
    #[test]
    fn advances_are_those_of_the_face() {
        let fonts = fixture::fonts();
        let regular = fonts.face(FaceName::Regular);
        assert_eq!(regular.advance(regular.glyph('7')), 500);
        assert_eq!(regular.advance(regular.glyph('a')), 500);
        assert_eq!(regular.advance(regular.glyph('m')), 883);
        assert_eq!(regular.glyph('\u{4e00}'), 0);
    }

    /// Italic letters of formulas are read back as plain letters, so that a search for `L` finds them.
    #[test]
    fn formula_letters_read_back_plainly() {
        let fonts = fixture::fonts();
        let maths = fonts.face(FaceName::Math);
        for (set, read) in [('𝐿', 'L'), ('𝜅', 'κ'), ('𝜎', 'σ'), ('ℎ', 'h'), ('−', '−'), ('√', '√')]
        {
            assert_ne!(maths.glyph(set), 0, "{set}");
            assert_eq!(maths.character(maths.glyph(set)), read, "{set}");
        }
    }

    #[test]
    fn every_face_has_the_letters_and_a_space() {
        let fonts = fixture::fonts();
        for name in FaceName::ALL {
            let face = fonts.face(name);
            for character in ('0'..='9').chain('A'..='Z').chain('a'..='z').chain([' ', '.', ',', '(', ')']) {
                assert_ne!(face.glyph(character), 0, "{name:?} {character}");
            }
        }
    }

    #[test]
    fn capitals_are_kerned() {
        let fonts = fixture::fonts();
        let face = fonts.face(FaceName::Regular);
        assert!(face.kern(face.glyph('A'), face.glyph('V')) < -50);
        assert_eq!(face.kern(face.glyph('n'), face.glyph('n')), 0);
    }
}
