//! What stands in a cell, and how wide it is.
use crate::document::Inline;
use crate::formula::Symbol;
use crate::sheet::{Cell, Column, Sheet};
use crate::typeset::FaceName;
use crate::typeset::frame::Frame;
use crate::typeset::geometry::SMALL;
use crate::typeset::maths::Maths;
use crate::typeset::paragraph::Paragraph;
use crate::typeset::symbols::is_stem;
use crate::typeset::text::{Setter, Type};

/// Regular and bold text of a table at its full size.
pub(super) const CELL: Type = Type::new(FaceName::Regular, SMALL);
const HEAD: Type = Type::new(FaceName::Bold, SMALL);

/// What stands in a cell.
pub(super) enum Content {
    Empty,
    Words(Paragraph),
    /// A printed number: its text and the byte at which its fraction begins.
    Number(String, usize),
}

impl Content {
    pub(super) fn of(cell: &Cell, sheet: &Sheet) -> Self {
        match cell {
            Cell::Empty => Self::Empty,
            Cell::Text(text) if text.is_empty() => Self::Empty,
            Cell::Text(text) => Self::Words(Paragraph::plain(text, CELL)),
            Cell::Quantity(id) => {
                let text = sheet.ledger.entry(*id).printed.to_string();
                let split = text.find(['.', '×']).unwrap_or(text.len());
                Self::Number(text, split)
            }
            Cell::Address(address) => {
                let mut paragraph = Paragraph::default();
                paragraph.add(address, CELL, Some(address));
                Self::Words(paragraph)
            }
        }
    }

    pub(super) fn is_empty(&self) -> bool {
        matches!(self, Self::Empty)
    }

    /// A row's name.
    pub(super) fn name(name: &str) -> Self {
        Self::Words(Paragraph::plain(name, CELL))
    }

    pub(super) fn inline(words: &[Inline]) -> Self {
        let paragraph = Paragraph::new(words, CELL);
        if paragraph.is_empty() { Self::Empty } else { Self::Words(paragraph) }
    }
}

/// A column's heading.
pub(super) enum Head {
    Words(Paragraph),
    /// A symbol and the unit of the column's numbers.
    Symbol(Symbol, String),
}

impl Head {
    pub(super) fn words(text: &str) -> Self {
        Self::Words(Paragraph::plain(text, HEAD))
    }

    pub(super) fn inline(words: &[Inline]) -> Self {
        Self::Words(Paragraph::new(words, HEAD))
    }

    pub(super) fn of(column: &Column) -> Self {
        let symbol = Symbol::owned(column.symbol.clone());
        // Headings of more letters than a symbol has are words.
        if is_stem(symbol.stem()) {
            let unit = column.unit.as_ref().map_or(String::new(), |unit| unit.text.to_string());
            Self::Symbol(symbol, unit)
        } else {
            // Joiners keep a unit's fraction on one line.
            Self::words(&column.heading().replace('/', "/\u{2060}"))
        }
    }

    /// Sets a symbol's heading at the left end; gives its width.
    pub(super) fn set_symbol(
        symbol: &Symbol,
        unit: &str,
        scale: f32,
        setter: &mut Setter<'_>,
        frame: &mut Frame,
    ) -> f32 {
        frame.speak(symbol.as_str());
        let width = Maths { setter, frame }.symbol(symbol, None, SMALL * scale * 1.04).width;
        frame.end_speech();
        if unit.is_empty() {
            return width;
        }
        let kind = Type { size: SMALL * scale, ..CELL };
        width + setter.set(frame, &format!(", {unit}"), kind, width, 0.0)
    }
}
