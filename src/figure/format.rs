//! How large a drawing of the structure is: as large as its labels need, and no larger.
use super::Figure;
use super::canvas::SIZE;

/// Height of a drawing and size of what is written on it.
#[derive(Debug, Clone, Copy, PartialEq)]
pub(super) struct Format {
    /// Greatest height, mm.
    pub height: f64,
    /// Size of labels, points.
    pub size: f64,
    /// Size of marks on members, compared with the usual.
    pub marks: f64,
}

impl Default for Format {
    fn default() -> Self {
        FORMATS[0]
    }
}

/// From a part of a sheet to a whole one with small labels, which leaves room for the caption alone.
const FORMATS: [Format; 4] = [
    Format { height: 115.0, size: SIZE, marks: 1.0 },
    Format { height: 185.0, size: SIZE, marks: 0.8 },
    Format { height: 185.0, size: 5.6, marks: 0.55 },
    Format { height: 203.0, size: 5.6, marks: 0.55 },
];

/// Of one label in so many it is no matter that it stands in the key.
const FEW: usize = 16;

/// Labels without room that no format but the last could bring near.
const MANY: usize = 400;

/// Draws in the smallest format in which nearly every label finds room; else in the one in which most do.
pub(super) fn fitting(draw: impl Fn(Format) -> Figure) -> Figure {
    let mut best: Option<Figure> = None;
    let mut hopeless = false;
    for (at, format) in FORMATS.into_iter().enumerate() {
        if hopeless && at + 1 < FORMATS.len() {
            continue;
        }
        let figure = draw(format);
        hopeless = figure.scene.keyed > MANY;
        let enough = figure.scene.keyed * FEW <= figure.scene.labels && figure.scene.lost == 0;
        let without = |figure: &Figure| (figure.scene.lost, figure.scene.keyed);
        if best.as_ref().is_none_or(|before| without(&figure) < without(before)) {
            best = Some(figure);
        }
        if enough {
            break;
        }
    }
    best.unwrap_or_else(|| draw(Format::default()))
}
