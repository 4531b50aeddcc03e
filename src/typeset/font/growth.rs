//! How brackets, bars and the root sign grow: larger drawings of the glyph first, then a stack of parts.
use super::Face;
use ttf_parser::GlyphId;
use ttf_parser::math::Table;

/// A glyph that grows upward, and its larger forms.
#[derive(Debug, Clone, Default)]
pub struct Growth {
    /// Larger drawings with their heights in ems, smallest first.
    pub variants: Vec<(u16, f32)>,
    /// Parts of a stack, bottom first; empty where the face has none.
    pub parts: Vec<Part>,
    /// Least overlap of neighbouring parts, ems.
    pub overlap: f32,
}

/// A part of a stack. Lengths in ems.
#[derive(Debug, Clone, Copy)]
pub struct Part {
    /// The glyph.
    pub glyph: u16,
    /// Whether it may be repeated or left out.
    pub repeats: bool,
    /// Its whole height.
    pub height: f32,
    /// How far its lower end may overlap the part below.
    pub start: f32,
    /// How far its upper end may overlap the part above.
    pub end: f32,
}

impl Growth {
    pub(super) fn read(table: &Table<'_>, face: &mut Face, character: char) -> Self {
        let em = face.units_per_em;
        let Some(variants) = &table.variants else { return Self::default() };
        let Some(construction) = variants.vertical_constructions.get(GlyphId(face.glyph(character))) else {
            return Self::default();
        };
        let growth = Self {
            variants: construction
                .variants
                .into_iter()
                .map(|variant| (variant.variant_glyph.0, f32::from(variant.advance_measurement) / em))
                .collect(),
            parts: construction
                .assembly
                .into_iter()
                .flat_map(|assembly| assembly.parts)
                .map(|part| Part {
                    glyph: part.glyph_id.0,
                    repeats: part.part_flags.extender(),
                    height: f32::from(part.full_advance) / em,
                    start: f32::from(part.start_connector_length) / em,
                    end: f32::from(part.end_connector_length) / em,
                })
                .collect(),
            overlap: f32::from(variants.min_connector_overlap) / em,
        };
        let larger = growth.variants.iter().map(|(glyph, _)| *glyph);
        for glyph in larger.chain(growth.parts.iter().map(|part| part.glyph)) {
            if let Some(read) = face.characters.get_mut(glyph as usize)
                && *read == '\u{fffd}'
            {
                *read = character;
            }
        }
        growth
    }
}
