//! The maths face: the constants of its MATH table and the outlines' heights.
use super::{Face, Growth};
use ttf_parser::GlyphId;

/// Lengths of the MATH table, in ems.
///
/// # Source
/// OpenType specification, MATH table, MathConstants; the names are the table's own, shortened.
#[derive(Debug, Clone, Copy, Default)]
#[allow(missing_docs, reason = "the fields carry the names of the OpenType table")]
pub struct Constants {
    pub script_scale: f32,
    pub axis_height: f32,
    pub subscript_shift_down: f32,
    pub subscript_top_max: f32,
    pub superscript_shift_up: f32,
    pub superscript_bottom_min: f32,
    pub superscript_baseline_drop_max: f32,
    pub space_after_script: f32,
    pub numerator_shift_up: f32,
    pub numerator_gap: f32,
    pub denominator_shift_down: f32,
    pub denominator_gap: f32,
    pub fraction_rule: f32,
    pub radical_gap: f32,
    pub radical_rule: f32,
    pub radical_extra_ascender: f32,
}

/// What the maths face says about setting formulas.
#[derive(Debug, Default)]
pub struct MathFont {
    /// Lengths of the MATH table.
    pub constants: Constants,
    /// Height above and depth below the baseline of each glyph, ems.
    extents: Vec<[f32; 2]>,
    /// Slant at the upper right of each glyph, ems.
    italic: Vec<f32>,
    growing: Vec<(char, Growth)>,
}

/// Characters that grow with what they enclose.
const GROWING: [char; 4] = ['(', ')', '|', '√'];
/// Extent of a glyph that no formula was expected to use: a capital with descender.
const USUAL: [f32; 2] = [0.7, 0.22];

impl MathFont {
    pub(super) fn read(face: &mut Face) -> Self {
        read_back_plainly(face);
        let Ok(parsed) = ttf_parser::Face::parse(face.program, 0) else { return Self::default() };
        let Some(table) = parsed.tables().math else { return Self::default() };
        let em = face.units_per_em;
        let mut font = Self {
            constants: table.constants.map(|constants| read_constants(&constants, em)).unwrap_or_default(),
            extents: vec![USUAL; parsed.number_of_glyphs() as usize],
            italic: vec![0.0; parsed.number_of_glyphs() as usize],
            growing: GROWING.iter().map(|&c| (c, Growth::read(&table, face, c))).collect(),
        };
        let corrections = table.glyph_info.and_then(|info| info.italic_corrections);
        let grown: Vec<u16> = font
            .growing
            .iter()
            .flat_map(|(_, growth)| {
                growth.variants.iter().map(|v| v.0).chain(growth.parts.iter().map(|p| p.glyph)).collect::<Vec<_>>()
            })
            .collect();
        for glyph in expected().map(|c| face.glyph(c)).chain(grown).filter(|&glyph| glyph != 0) {
            if let Some(bounds) = parsed.glyph_bounding_box(GlyphId(glyph)) {
                font.extents[glyph as usize] = [f32::from(bounds.y_max) / em, -f32::from(bounds.y_min) / em];
            }
            if let Some(correction) = corrections.and_then(|values| values.get(GlyphId(glyph))) {
                font.italic[glyph as usize] = f32::from(correction.value) / em;
            }
        }
        font
    }

    /// Height above and depth below the baseline of a glyph, ems.
    #[must_use]
    pub fn extent(&self, glyph: u16) -> [f32; 2] {
        self.extents.get(glyph as usize).copied().unwrap_or(USUAL)
    }

    /// How far a glyph leans out at its upper right, ems.
    #[must_use]
    pub fn italic(&self, glyph: u16) -> f32 {
        self.italic.get(glyph as usize).copied().unwrap_or(0.0)
    }

    /// The larger forms of a character.
    #[must_use]
    pub fn growth(&self, character: char) -> Option<&Growth> {
        self.growing.iter().find(|(c, _)| *c == character).map(|(_, growth)| growth)
    }
}

/// Characters whose outlines are measured when the face is read.
fn expected() -> impl Iterator<Item = char> {
    [0x20..=0xff, 0x370..=0x3ff, 0x2200..=0x22ff, 0x1d434..=0x1d467, 0x1d6e2..=0x1d71b]
        .into_iter()
        .flatten()
        .chain([0x210e])
        .filter_map(char::from_u32)
}

/// Italic letters of the maths alphabets are read back as the letters they stand for.
fn read_back_plainly(face: &mut Face) {
    let latin = ('A'..='Z').chain('a'..='z').zip(0x1d434_u32..);
    let greek = (0x391_u32..=0x3c9).filter_map(char::from_u32).filter_map(|c| Some((c, italic_greek(c)?)));
    for (plain, code) in latin.chain(greek).chain([('h', 0x210e)]) {
        let glyph = char::from_u32(code).map_or(0, |c| face.glyph(c));
        if glyph != 0
            && let Some(read) = face.characters.get_mut(glyph as usize)
        {
            *read = plain;
        }
    }
}

/// The code point of an italic Greek letter.
pub(in crate::typeset) fn italic_greek(plain: char) -> Option<u32> {
    match plain {
        'Α'..='Ω' => Some(0x1d6e2 + (plain as u32 - 'Α' as u32)),
        'α'..='ω' => Some(0x1d6fc + (plain as u32 - 'α' as u32)),
        _ => None,
    }
}

fn read_constants(table: &ttf_parser::math::Constants<'_>, em: f32) -> Constants {
    let ems = |value: ttf_parser::math::MathValue<'_>| f32::from(value.value) / em;
    Constants {
        script_scale: f32::from(table.script_percent_scale_down()) / 100.0,
        axis_height: ems(table.axis_height()),
        subscript_shift_down: ems(table.subscript_shift_down()),
        subscript_top_max: ems(table.subscript_top_max()),
        superscript_shift_up: ems(table.superscript_shift_up()),
        superscript_bottom_min: ems(table.superscript_bottom_min()),
        superscript_baseline_drop_max: ems(table.superscript_baseline_drop_max()),
        space_after_script: ems(table.space_after_script()),
        numerator_shift_up: ems(table.fraction_numerator_shift_up()),
        numerator_gap: ems(table.fraction_numerator_gap_min()),
        denominator_shift_down: ems(table.fraction_denominator_shift_down()),
        denominator_gap: ems(table.fraction_denominator_gap_min()),
        fraction_rule: ems(table.fraction_rule_thickness()),
        radical_gap: ems(table.radical_vertical_gap()),
        radical_rule: ems(table.radical_rule_thickness()),
        radical_extra_ascender: ems(table.radical_extra_ascender()),
    }
}

#[cfg(test)]
mod tests {
    use crate::typeset::{FaceName, fixture};

    /// The MATH table of TeX Gyre Pagella Math has its axis at 250 and fraction rules of 60 units of 1000.
    #[test]
    fn constants_are_those_of_the_face() {
        let fonts = fixture::fonts();
        assert!((fonts.maths.constants.axis_height - 0.25).abs() < 1e-6);
        assert!((fonts.maths.constants.fraction_rule - 0.06).abs() < 1e-6);
        let face = fonts.face(FaceName::Math);
        let [height, depth] = fonts.maths.extent(face.glyph('𝑦'));
        assert!((0.4..0.6).contains(&height) && (0.15..0.35).contains(&depth), "{height} {depth}");
    }

    #[test]
    fn brackets_and_the_root_grow() {
        let fonts = fixture::fonts();
        for character in ['(', ')', '|', '√'] {
            let growth = fonts.maths.growth(character).cloned().unwrap_or_default();
            assert!(growth.variants.len() > 1, "{character}");
            assert!(growth.parts.iter().any(|part| part.repeats), "{character}");
        }
    }
}
