//! Drawings made from the solved data: scenes of lines, fills and text in millimetres on paper.
mod canvas;
mod curve;
mod depth;
mod format;
mod loads;
mod member;
mod number;
mod place;
mod scene;
mod section;
mod signs;
mod structure;
mod support;
mod taken;
mod text;
mod view;

pub use curve::{Diagram, Shape, Usage, diagram, shape, utilisation};
pub use depth::{Depth, Fibres, depth};
pub use loads::load_case;
pub use scene::{Anchor, Dash, Item, Scene, Stroke, Style, TextItem};
pub use section::section;
pub use signs::signs;
pub use structure::structure;

/// A drawing with its caption.
#[derive(Debug, Clone, PartialEq)]
pub struct Figure {
    /// Its id, such as `structure` or `C1.M`; also the stem of its file.
    pub id: String,
    /// Its caption.
    pub title: String,
    /// What it shows, in words.
    pub alternative: String,
    /// The drawing.
    pub scene: Scene,
}

impl TextItem {
    /// The rectangle that it fills in the widest usual serif face: left, top, right, bottom, mm.
    #[must_use]
    pub fn extent(&self) -> [f64; 4] {
        let area = canvas::extent(self.at, self.anchor, self.size, &self.text);
        [area.low[0], area.low[1], area.high[0], area.high[1]]
    }
}

#[cfg(test)]
mod tests;
