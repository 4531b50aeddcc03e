//! A drawing: lines, fills and text placed in millimetres, x to the right, y downward from the top left corner.

/// A drawing of a given size.
#[derive(Debug, Clone, Default, PartialEq)]
pub struct Scene {
    /// Width, mm.
    pub width: f64,
    /// Height, mm.
    pub height: f64,
    /// What is drawn, back to front.
    pub items: Vec<Item>,
    /// Labels that looked for room.
    pub labels: usize,
    /// Those of them that found none and stand in the key below, or elsewhere.
    pub keyed: usize,
    /// Those of them that have no number in the drawing either.
    pub lost: usize,
}

/// One thing drawn.
#[derive(Debug, Clone, PartialEq)]
pub enum Item {
    /// Straight lines from point to point.
    Path {
        /// Points, mm.
        points: Vec<[f64; 2]>,
        /// Whether the last point is joined to the first.
        closed: bool,
        /// The line, if drawn.
        stroke: Option<Stroke>,
        /// Grey of the inside, 0 black to 1 white, if filled.
        fill: Option<f64>,
    },
    /// A short text.
    Text(TextItem),
}

/// A line's weight, dash and grey.
#[derive(Debug, Clone, Copy, PartialEq)]
pub struct Stroke {
    /// Width, mm.
    pub width: f64,
    /// Dash.
    pub dash: Dash,
    /// 0 black to 1 white.
    pub grey: f64,
}

/// Dash of a line.
#[derive(Debug, Clone, Copy, PartialEq, Eq)]
pub enum Dash {
    /// Unbroken.
    Solid,
    /// Dashed.
    Dashed,
    /// Dotted.
    Dotted,
    /// Long and short in turn, for axes.
    Chain,
}

/// A short text.
#[derive(Debug, Clone, PartialEq)]
pub struct TextItem {
    /// Where its anchor lies on the baseline, mm.
    pub at: [f64; 2],
    /// Which end of the text lies there.
    pub anchor: Anchor,
    /// Size, points.
    pub size: f64,
    /// Face.
    pub style: Style,
    /// The text.
    pub text: String,
    /// Whether the paper is cleared behind it.
    pub halo: bool,
}

/// Which end of a text lies at its place.
#[derive(Debug, Clone, Copy, PartialEq, Eq)]
pub enum Anchor {
    /// Its beginning.
    Start,
    /// Its middle.
    Middle,
    /// Its end.
    End,
}

/// Face of a text.
#[derive(Debug, Clone, Copy, PartialEq, Eq, Hash)]
pub enum Style {
    /// Upright.
    Regular,
    /// Italic.
    Italic,
    /// Bold.
    Bold,
}
