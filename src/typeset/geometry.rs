//! Where things stand on a sheet, and the sizes of type. Lengths in points.
use crate::model::Paper;

/// Size of running text and its distance from line to line.
pub(super) const TEXT: f32 = 10.0;
pub(super) const LEADING: f32 = 13.6;
/// Baseline of a line of running text below its top.
pub(super) const BASELINE: f32 = 10.2;
/// Size of step numbers, table text and captions.
pub(super) const SMALL: f32 = 8.5;
/// Size of addresses.
pub(super) const FINE: f32 = 7.6;
/// Size of text as typed.
pub(super) const TYPED: f32 = 7.4;

/// A sheet of paper: a column for numbers at the left, one measure of text, a checker's column at the outer edge.
#[derive(Debug, Clone, Copy, PartialEq)]
pub(super) struct Geometry {
    pub(super) width: f32,
    pub(super) height: f32,
    /// Left end of the column of numbers.
    pub(super) left: f32,
    /// Left end of the text.
    pub(super) text: f32,
    /// Right end of the text.
    pub(super) right: f32,
    /// Left end of the checker's column.
    pub(super) check: f32,
    /// Right end of everything.
    pub(super) edge: f32,
    /// Top of the running head.
    pub(super) head: f32,
    /// Top and bottom of what stands between head and foot.
    pub(super) top: f32,
    pub(super) bottom: f32,
}

impl Geometry {
    pub(super) fn of(paper: Paper) -> Self {
        let (width, height) = match paper {
            Paper::A4 => (210.0 / 25.4 * 72.0, 297.0 / 25.4 * 72.0),
            Paper::Letter => (612.0, 792.0),
        };
        let edge = width - 36.0;
        let check = edge - 52.0;
        Self {
            width,
            height,
            left: 48.0,
            text: 124.0,
            right: check - 14.0,
            check,
            edge,
            head: 30.0,
            top: 98.0,
            bottom: height - 44.0,
        }
    }

    /// Height between head and foot.
    pub(super) fn body(&self) -> f32 {
        self.bottom - self.top
    }
}
