//! Drawings of a package.
use crate::analysis::Solution;
use crate::figure::Figure;
use crate::model::Model;
use crate::sheet::Results;

/// Every drawing.
pub(super) fn draw(_model: &Model, _solution: &Solution, _results: &Results) -> Vec<Figure> {
    Vec::new()
}
