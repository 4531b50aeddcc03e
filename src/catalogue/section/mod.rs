//! Section shapes: their parameters, their properties in worked steps, their outline.
use crate::formula::{Definition, Symbol};
use crate::units::Measure;

/// One thing the user writes about a shape: the key, the symbol used in formulas, the kind of quantity.
#[derive(Debug, Clone)]
pub struct Param {
    /// The key in the YAML.
    pub key: &'static str,
    /// The symbol in formulas.
    pub symbol: Symbol,
    /// What it measures and how it is printed.
    pub measure: Measure,
    /// Whether it may be left out, and the value it then has.
    pub default: Option<f64>,
    /// One sentence for help texts.
    pub doc: &'static str,
}

/// One rectangle of a built-up section.
#[derive(Debug, Clone, Copy, PartialEq)]
pub struct Plate {
    /// Breadth across the plane of bending, m.
    pub width: f64,
    /// Height along local y, m.
    pub height: f64,
    /// y of its centre, m, from any one reference line.
    pub at: f64,
}

/// What the user gave for one section, in SI units.
#[derive(Debug, Clone, Default)]
pub struct Given {
    /// Values of the shape's parameters that were given or have a default.
    pub values: Vec<(Symbol, f64)>,
    /// Plates of a built-up section.
    pub plates: Vec<Plate>,
    /// Whether the shape is turned by 90° anticlockwise.
    pub turned: bool,
}

impl Given {
    /// The value of a parameter, where there is one.
    #[must_use]
    pub fn get(&self, symbol: &Symbol) -> Option<f64> {
        self.values.iter().find(|(s, _)| s == symbol).map(|(_, v)| *v)
    }
}

/// Closed outlines of a section about its centroid, local z to the right (m) and local y up (m).
#[derive(Debug, Clone, Default, PartialEq)]
pub struct Outline {
    /// Outer edge first, then holes.
    pub loops: Vec<Vec<[f64; 2]>>,
}

/// A section shape.
///
/// The steps end with these symbols known, for the shape as it lies (turned or not): [`AREA`], [`INERTIA`],
/// [`TOP`], [`BOTTOM`], [`MINOR_INERTIA`] (about the other axis), [`SHEAR_MOMENT`] and [`SHEAR_WIDTH`]
/// (first moment and breadth where V·Q/(I·b) is largest). `given` may lack all but the area.
pub trait SectionKind: Sync {
    /// The word after `shape:`.
    fn name(&self) -> &'static str;
    /// One sentence for help texts.
    fn doc(&self) -> &'static str;
    /// Its parameters.
    fn params(&self) -> &'static [Param];
    /// Why these values make no section, key and reason each; empty where they do.
    fn faults(&self, given: &Given) -> Vec<(&'static str, String)>;
    /// The worked steps, each with its fixed number after the letter P.
    fn steps(&self, given: &Given) -> Vec<(u16, Definition)>;
    /// Its outline for figures.
    fn outline(&self, given: &Given) -> Outline;
}

/// Cross-sectional area.
pub const AREA: Symbol = Symbol::new("A");
/// Second moment of area about the axis of bending.
pub const INERTIA: Symbol = Symbol::new("I");
/// Distance of the top fibre from the centroid.
pub const TOP: Symbol = Symbol::new("y_top");
/// Distance of the bottom fibre from the centroid.
pub const BOTTOM: Symbol = Symbol::new("y_bot");
/// Second moment of area about the other axis.
pub const MINOR_INERTIA: Symbol = Symbol::new("I_z");
/// First moment of area beyond the level of the largest shear stress.
pub const SHEAR_MOMENT: Symbol = Symbol::new("Q");
/// Breadth at the level of the largest shear stress.
pub const SHEAR_WIDTH: Symbol = Symbol::new("b_v");

/// Every shape.
pub static ALL: &[&dyn SectionKind] = &[];

/// The shape with a name.
#[must_use]
pub fn find(name: &str) -> Option<&'static dyn SectionKind> {
    ALL.iter().copied().find(|kind| kind.name() == name)
}
