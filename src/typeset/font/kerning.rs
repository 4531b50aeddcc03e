//! Space between neighbouring letters, from the face's GPOS table, for the characters of plain English.
use ttf_parser::gpos::{PairAdjustment, PositioningSubtable};
use ttf_parser::{Face, GlyphId};

/// Pairs of printable ASCII characters; other pairs stand as they are.
#[derive(Debug, Default)]
pub(super) struct Kerning {
    /// Row and column of each glyph, 0 for none.
    slots: Vec<u8>,
    /// Thousandths of the em, row by row.
    amounts: Vec<i16>,
}

const FIRST: u8 = b'!';
const LAST: u8 = b'~';
const SIDE: usize = (LAST - FIRST) as usize + 2;

impl Kerning {
    pub(super) fn read(face: &Face<'_>, glyph: &dyn Fn(char) -> u16) -> Self {
        let Some(gpos) = face.tables().gpos else { return Self::default() };
        let adjustments: Vec<PairAdjustment<'_>> = gpos
            .lookups
            .into_iter()
            .flat_map(|lookup| lookup.subtables.into_iter::<PositioningSubtable<'_>>())
            .filter_map(|subtable| if let PositioningSubtable::Pair(pair) = subtable { Some(pair) } else { None })
            .collect();
        let units = i32::from(face.units_per_em()).max(1);
        let mut kerning = Self { slots: vec![0; face.number_of_glyphs() as usize], amounts: vec![0; SIDE * SIDE] };
        let glyphs: Vec<u16> = (FIRST..=LAST).map(|byte| glyph(byte as char)).collect();
        for (row, &left) in glyphs.iter().enumerate() {
            if let Some(slot) = kerning.slots.get_mut(left as usize) {
                *slot = row as u8 + 1;
            }
            let here: Vec<&PairAdjustment<'_>> =
                adjustments.iter().filter(|pair| pair.coverage().get(GlyphId(left)).is_some()).collect();
            for (column, &right) in glyphs.iter().enumerate() {
                let amount = here.iter().find_map(|pair| advance_of(pair, left, right)).unwrap_or(0);
                kerning.amounts[(row + 1) * SIDE + column + 1] = (i32::from(amount) * 1000 / units) as i16;
            }
        }
        kerning
    }

    pub(super) fn between(&self, left: u16, right: u16) -> i16 {
        let slot = |glyph: u16| self.slots.get(glyph as usize).copied().unwrap_or(0) as usize;
        match (slot(left), slot(right)) {
            (0, _) | (_, 0) => 0,
            (row, column) => self.amounts[row * SIDE + column],
        }
    }
}

fn advance_of(pair: &PairAdjustment<'_>, left: u16, right: u16) -> Option<i16> {
    let (left, right) = (GlyphId(left), GlyphId(right));
    match pair {
        PairAdjustment::Format1 { coverage, sets } => Some(sets.get(coverage.get(left)?)?.get(right)?.0.x_advance),
        PairAdjustment::Format2 { classes, matrix, .. } => {
            Some(matrix.get((classes.0.get(left), classes.1.get(right)))?.0.x_advance)
        }
    }
}
