//! Drawings of a package.
use crate::analysis::Solution;
use crate::figure::{self, Figure};
use crate::model::Model;
use crate::sheet::Results;

/// Every drawing.
pub(super) fn draw(model: &Model, _solution: &Solution, _results: &Results) -> Vec<Figure> {
    vec![figure::structure(model)]
}
