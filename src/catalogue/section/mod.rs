//! Section shapes: their parameters, their properties in worked steps, their outline.
//!
//! Step numbers are the same for every shape: P01 to P39 parts of the shape, P40 area, P41 first moment about the
//! base, P42 height of the centroid, P43 and P44 distances of the fibres, P50 and P51 second moments, P52 and P53
//! radii of gyration, P60 and P61 first moment and breadth where the shear stress is largest.
mod angle;
mod arc;
mod box_section;
mod channel;
mod given;
mod i_section;
mod plates;
mod rectangle;
mod round;
mod tee;
mod tube;
mod worked;

#[cfg(test)]
mod tests;

pub use worked::{Properties, input_symbols, plate_symbols, silent_inputs, work};

use crate::formula::{Definition, Source, Symbol, Tree};
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
    /// Whether it may lie turned by 90°.
    fn may_turn(&self) -> bool {
        true
    }
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

/// Radius of gyration about the axis of bending.
pub const RADIUS: Symbol = Symbol::new("i_y");
/// Radius of gyration about the other axis.
pub const MINOR_RADIUS: Symbol = Symbol::new("i_z");

/// Symbols of dimensions and of parts, one meaning each in every shape.
mod symbol {
    use crate::formula::Symbol;
    pub(super) const H: Symbol = Symbol::new("h");
    pub(super) const B: Symbol = Symbol::new("b");
    pub(super) const D: Symbol = Symbol::new("d");
    pub(super) const DI: Symbol = Symbol::new("d_i");
    pub(super) const T: Symbol = Symbol::new("t");
    pub(super) const TW: Symbol = Symbol::new("t_w");
    pub(super) const TF: Symbol = Symbol::new("t_f");
    pub(super) const R: Symbol = Symbol::new("r");
    pub(super) const RO: Symbol = Symbol::new("r_o");
    pub(super) const RI: Symbol = Symbol::new("r_i");
    pub(super) const HI: Symbol = Symbol::new("h_i");
    pub(super) const BI: Symbol = Symbol::new("b_i");
    /// Area of a corner: a square less a quarter circle.
    pub(super) const AR: Symbol = Symbol::new("A_r");
    /// Distance of that corner's centroid from its sides.
    pub(super) const CR: Symbol = Symbol::new("c_r");
    /// Second moment of that corner about its own centroid.
    pub(super) const IR: Symbol = Symbol::new("I_r");
    pub(super) const ARO: Symbol = Symbol::new("A_ro");
    pub(super) const CRO: Symbol = Symbol::new("c_ro");
    pub(super) const IRO: Symbol = Symbol::new("I_ro");
    pub(super) const ARI: Symbol = Symbol::new("A_ri");
    pub(super) const CRI: Symbol = Symbol::new("c_ri");
    pub(super) const IRI: Symbol = Symbol::new("I_ri");
    /// First moment about the base, height of the centroid above it.
    pub(super) const SY: Symbol = Symbol::new("S_y");
    pub(super) const YC: Symbol = Symbol::new("y_c");
    /// First moment about the left side, distance of the centroid from it.
    pub(super) const SZ: Symbol = Symbol::new("S_z");
    pub(super) const ZC: Symbol = Symbol::new("z_c");
    /// Level where the shear stress is largest.
    pub(super) const YV: Symbol = Symbol::new("y_v");
}

/// A step of a section: its number, what it finds, its formula, where that is published.
fn step(
    nn: u16,
    symbol: Symbol,
    title: &str,
    measure: Measure,
    tree: impl Into<Tree>,
    source: &'static Source,
) -> (u16, Definition) {
    (nn, Definition::new(symbol, title, measure, tree).from(source))
}

/// Area, fibre distances, both second moments, radii, and the place of the largest shear stress, each in its words.
struct Ends {
    top: Tree,
    bottom: Tree,
    inertia: Tree,
    minor_inertia: Tree,
    shear_moment: Tree,
    shear_width: Tree,
    source: &'static Source,
}

/// The steps that end every worked shape.
fn ends(ends: Ends) -> Vec<(u16, Definition)> {
    use crate::formula::source::{PLANE_FIGURES, SHEAR_STRESS};
    let Ends { top, bottom, inertia, minor_inertia, shear_moment, shear_width, source } = ends;
    vec![
        step(43, TOP, "Distance of the top fibre from the centroid", Measure::Length, top, source),
        step(44, BOTTOM, "Distance of the bottom fibre from the centroid", Measure::Length, bottom, source),
        step(50, INERTIA, "Second moment of area about the axis of bending", Measure::Inertia, inertia, source),
        step(51, MINOR_INERTIA, "Second moment of area about the other axis", Measure::Inertia, minor_inertia, source),
        step(
            52,
            RADIUS,
            "Radius of gyration about the axis of bending",
            Measure::Length,
            (INERTIA / AREA).root(),
            &PLANE_FIGURES,
        ),
        step(
            53,
            MINOR_RADIUS,
            "Radius of gyration about the other axis",
            Measure::Length,
            (MINOR_INERTIA / AREA).root(),
            &PLANE_FIGURES,
        ),
        step(
            60,
            SHEAR_MOMENT,
            "First moment of area beyond the level of the largest shear stress",
            Measure::AreaMoment,
            shear_moment,
            &SHEAR_STRESS,
        ),
        step(61, SHEAR_WIDTH, "Breadth at that level", Measure::Length, shear_width, &SHEAR_STRESS),
    ]
}

/// The step that adds up the area.
fn area(tree: impl Into<Tree>) -> (u16, Definition) {
    step(40, AREA, "Cross-sectional area", Measure::Area, tree, &crate::formula::source::PLANE_FIGURES)
}

const fn length(key: &'static str, symbol: Symbol, doc: &'static str) -> Param {
    Param { key, symbol, measure: Measure::Length, default: None, doc }
}

const fn optional(key: &'static str, symbol: Symbol, doc: &'static str) -> Param {
    Param { key, symbol, measure: Measure::Length, default: Some(0.0), doc }
}

/// Faults that every shape shares: dimensions that are not above zero, optional ones below it.
fn positive(params: &[Param], given: &Given) -> Vec<(&'static str, String)> {
    params
        .iter()
        .filter_map(|param| {
            let value = given.get(&param.symbol)?;
            let allowed = if param.default.is_some() { value >= 0.0 } else { value > 0.0 };
            (!allowed && !value.is_nan()).then(|| (param.key, "it must be above zero".to_owned()))
        })
        .collect()
}

/// Every shape.
pub static ALL: &[&dyn SectionKind] = &[
    &rectangle::Rectangle,
    &round::Round,
    &tube::Tube,
    &box_section::BoxSection,
    &i_section::ISection,
    &channel::Channel,
    &tee::Tee,
    &angle::Angle,
    &plates::Plates,
    &given::GivenSection,
];

/// The shape with a name.
#[must_use]
pub fn find(name: &str) -> Option<&'static dyn SectionKind> {
    ALL.iter().copied().find(|kind| kind.name() == name)
}
