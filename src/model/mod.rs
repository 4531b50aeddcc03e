//! The structure as understood: every name resolved, every value in SI base units, nothing left to doubt.
//!
//! Indices (`usize`) point into the vectors of [`Model`], which keep the order of the file.
mod build;
mod keys;

pub use build::{build, read, read_source};
pub use keys::{Block, Key, Presence, Sign, Takes, blocks, shape_keys};

use crate::catalogue::section::{Given, SectionKind};
use crate::diagnostic::{Diagnostics, Source};
use crate::units::{Measure, System, Unit};

/// A file that can be used.
#[derive(Clone)]
pub struct Reading {
    /// What it says.
    pub model: Model,
    /// What a reader should know, sorted by place.
    pub warnings: Diagnostics,
    /// Its text with the place of every value.
    pub source: Source,
}

/// One structure with its loads, checks and paperwork.
#[derive(Clone)]
pub struct Model {
    /// Titles, people, revisions and prose.
    pub project: Project,
    /// Units, digits, paper and detail of what is printed.
    pub display: Display,
    /// Acceleration of self-weight, m/s².
    pub gravity: f64,
    /// Materials in file order.
    pub materials: Vec<Material>,
    /// Sections in file order.
    pub sections: Vec<Section>,
    /// Nodes in file order.
    pub nodes: Vec<Node>,
    /// Supports in file order.
    pub supports: Vec<Support>,
    /// Members in file order.
    pub members: Vec<Member>,
    /// Load cases in file order.
    pub cases: Vec<LoadCase>,
    /// Combinations in file order; each case by itself where none are given.
    pub combinations: Vec<Combination>,
    /// What is checked.
    pub checks: Checks,
}

/// Titles, people, revisions and prose. Texts are as typed.
#[derive(Debug, Clone, Default)]
#[allow(missing_docs, reason = "the fields carry the names of the input language")]
pub struct Project {
    pub title: String,
    pub number: Option<String>,
    pub part: Option<String>,
    pub client: Option<String>,
    pub prepared_by: Person,
    pub checked_by: Person,
    pub approved_by: Person,
    pub revision: Option<String>,
    pub status: Option<String>,
    pub revisions: Vec<Revision>,
    pub purpose: Option<String>,
    pub basis: Vec<Basis>,
    pub assumptions: Vec<Assumption>,
    pub notes: Option<String>,
}

/// Who did something, and when.
#[derive(Debug, Clone, Default)]
#[allow(missing_docs, reason = "the fields carry the names of the input language")]
pub struct Person {
    pub name: Option<String>,
    pub date: Option<String>,
}

/// One row of the revision table.
#[derive(Debug, Clone, Default)]
#[allow(missing_docs, reason = "the fields carry the names of the input language")]
pub struct Revision {
    pub mark: String,
    pub date: Option<String>,
    pub by: Option<String>,
    pub text: Option<String>,
    pub affects: Vec<String>,
}

/// A document that the numbers rest on.
#[derive(Debug, Clone, Default)]
#[allow(missing_docs, reason = "the fields carry the names of the input language")]
pub struct Basis {
    pub mark: String,
    pub text: String,
}

/// An assumption, and whether it has to be confirmed before use.
#[derive(Debug, Clone, Default)]
#[allow(missing_docs, reason = "the fields carry the names of the input language")]
pub struct Assumption {
    pub text: String,
    pub confirm: bool,
}

/// Paper size.
#[derive(Debug, Clone, Copy, PartialEq, Eq, Default)]
pub enum Paper {
    /// 210 × 297 mm.
    #[default]
    A4,
    /// 8.5 × 11 in.
    Letter,
}

/// Which member sheets are worked line by line.
#[derive(Debug, Clone, Copy, PartialEq, Eq, Default)]
pub enum Detail {
    /// Each member for its governing combination.
    #[default]
    Governing,
    /// Each member for each combination.
    Full,
    /// Tables alone.
    Summary,
}

/// Units, digits, paper and detail of what is printed.
#[derive(Debug, Clone, Default)]
pub struct Display {
    /// The family of units.
    pub system: System,
    /// Units that replace the family's.
    pub overrides: Vec<(Measure, Unit)>,
    /// Significant digits of a result, 3 to 8.
    pub digits: u8,
    /// Paper size.
    pub paper: Paper,
    /// Which member sheets are worked line by line.
    pub detail: Detail,
}

impl Display {
    /// The unit in which a kind of quantity is printed.
    #[must_use]
    pub fn unit(&self, measure: Measure) -> Unit {
        self.overrides
            .iter()
            .rev()
            .find(|(m, _)| *m == measure)
            .map_or_else(|| measure.unit(self.system), |(_, unit)| unit.clone())
    }
}

/// Stress limits, each optional, Pa.
#[derive(Debug, Clone, Default, PartialEq)]
pub struct Allowable {
    /// Largest tensile stress.
    pub tension: Option<f64>,
    /// Largest compressive stress, a magnitude.
    pub compression: Option<f64>,
    /// Largest shear stress.
    pub shear: Option<f64>,
    /// Where they come from: a basis mark or plain text.
    pub source: Option<String>,
}

/// A material.
#[derive(Debug, Clone)]
pub struct Material {
    /// Its name.
    pub name: String,
    /// Modulus of elasticity, Pa.
    pub modulus: f64,
    /// Shear modulus, Pa.
    pub shear_modulus: Option<f64>,
    /// Density, kg/m³.
    pub density: Option<f64>,
    /// Thermal expansion, 1/K.
    pub expansion: Option<f64>,
    /// Stress limits.
    pub allowable: Allowable,
}

/// A cross-section.
#[derive(Clone)]
pub struct Section {
    /// Its name.
    pub name: String,
    /// Its shape.
    pub kind: &'static dyn SectionKind,
    /// What was given for it.
    pub given: Given,
    /// Area that carries shear, m²; counts for deformation where the material has a shear modulus.
    pub shear_area: Option<f64>,
    /// Where its dimensions come from.
    pub source: Option<String>,
}

/// A node, m.
#[derive(Debug, Clone)]
#[allow(missing_docs, reason = "plain coordinates")]
pub struct Node {
    pub name: String,
    pub x: f64,
    pub y: f64,
}

/// What holds a node. Directions are x, y, rotation, in that order, turned by `turned`.
#[derive(Debug, Clone)]
pub struct Support {
    /// The node.
    pub node: usize,
    /// Held directions.
    pub hold: [bool; 3],
    /// Spring stiffnesses, N/m and N·m/rad.
    pub spring: [Option<f64>; 3],
    /// Anticlockwise turn of the held directions, rad.
    pub turned: f64,
}

/// Member kinds.
#[derive(Debug, Clone, Copy, PartialEq, Eq, Hash)]
pub enum MemberKind {
    /// Two-node axial bar.
    Bar,
    /// Three-node axial bar.
    Bar3,
    /// Bending alone.
    Beam,
    /// Axial force and bending.
    Frame,
}

/// An effective length: a factor on the member's length, or a length.
#[derive(Debug, Clone, Copy, PartialEq)]
pub enum EffectiveLength {
    /// K.
    Factor(f64),
    /// A length, m.
    Length(f64),
}

/// A member.
#[derive(Debug, Clone)]
pub struct Member {
    /// Its name.
    pub name: String,
    /// Its kind.
    pub kind: MemberKind,
    /// Start node.
    pub from: usize,
    /// End node.
    pub to: usize,
    /// Section.
    pub section: usize,
    /// Material.
    pub material: usize,
    /// Hinge at start, at end.
    pub hinge: [bool; 2],
    /// Stress limits: the member's own where given, else the material's.
    pub allowable: Allowable,
    /// YAML path of each limit: tension, compression, shear.
    pub allowable_path: [String; 3],
    /// Effective length in the plane; K = 1 where left out.
    pub in_plane: Option<EffectiveLength>,
    /// Effective length out of the plane.
    pub out_of_plane: Option<EffectiveLength>,
    /// Carries no compression.
    pub tension_only: bool,
    /// A remark.
    pub note: Option<String>,
}

/// Direction of a load.
#[derive(Debug, Clone, Copy, PartialEq, Eq)]
pub enum Direction {
    /// Global X.
    GlobalX,
    /// Global Y.
    GlobalY,
    /// Along the member.
    LocalX,
    /// Across the member.
    LocalY,
}

/// A load on a member. Places are distances from `from`, m.
#[derive(Debug, Clone, PartialEq)]
pub enum MemberLoad {
    /// Force per length, straight from `start` to `end` over the loaded part, N/m.
    Line {
        /// Direction.
        direction: Direction,
        /// Intensity at the beginning of the loaded part.
        start: f64,
        /// Intensity at its end.
        end: f64,
        /// The loaded part; the whole member where left out.
        over: Option<[f64; 2]>,
        /// Whether the intensity is per projected length.
        per_plan: bool,
    },
    /// A force, N.
    Point {
        /// Direction.
        direction: Direction,
        /// Force.
        force: f64,
        /// Place.
        at: f64,
    },
    /// A couple, N·m, anticlockwise.
    Moment {
        /// Couple.
        moment: f64,
        /// Place.
        at: f64,
    },
    /// Warming of the top and the bottom fibre, K; equal where uniform.
    Warm {
        /// Top fibre.
        top: f64,
        /// Bottom fibre.
        bottom: f64,
    },
    /// Made too long by this much, m.
    TooLong {
        /// Excess of length.
        by: f64,
    },
}

/// A load of a case. `entry` counts the case's list from 0; several members of one entry share it.
#[derive(Debug, Clone, PartialEq)]
pub struct Load {
    /// Place in the case's list.
    pub entry: usize,
    /// What it acts on, and how.
    pub acts: Action,
}

/// What a load acts on, and how.
#[derive(Debug, Clone, PartialEq)]
pub enum Action {
    /// Forces and a couple on a node, N and N·m.
    Node {
        /// The node.
        node: usize,
        /// Force in X, force in Y, couple.
        forces: [f64; 3],
    },
    /// A load on a member.
    Member {
        /// The member.
        member: usize,
        /// The load.
        load: MemberLoad,
    },
    /// Imposed movement of held or sprung directions, m and rad.
    Settle {
        /// The node.
        node: usize,
        /// Movement in x, y, rotation, in the support's axes.
        movement: [Option<f64>; 3],
    },
}

/// A load case.
#[derive(Debug, Clone)]
pub struct LoadCase {
    /// Its name.
    pub name: String,
    /// Its title.
    pub title: Option<String>,
    /// Factor on self-weight; 0 where it has none.
    pub self_weight: f64,
    /// Its loads in file order.
    pub loads: Vec<Load>,
}

/// What a combination is for.
#[derive(Debug, Clone, Copy, PartialEq, Eq, Hash)]
pub enum Purpose {
    /// Stress.
    Stress,
    /// Shear stress.
    Shear,
    /// Deflection.
    Deflection,
    /// Buckling.
    Buckling,
    /// Slenderness.
    Slenderness,
    /// Critical load factor of the whole.
    Stability,
}

/// A combination of load cases.
#[derive(Debug, Clone)]
pub struct Combination {
    /// Its name.
    pub name: String,
    /// Its title.
    pub title: Option<String>,
    /// Load case and factor.
    pub factors: Vec<(usize, f64)>,
    /// What it is for; `None` is everything.
    pub purposes: Option<Vec<Purpose>>,
    /// Made from a load case because the file has no combinations.
    pub implied: bool,
}

impl Combination {
    /// Whether it counts for a kind of check.
    #[must_use]
    pub fn is_for(&self, purpose: Purpose) -> bool {
        self.purposes.as_ref().is_none_or(|list| list.contains(&purpose))
    }
}

/// Which members a check covers.
#[derive(Debug, Clone, PartialEq, Eq, Default)]
pub enum Selection {
    /// All members.
    #[default]
    All,
    /// None.
    Off,
    /// These members.
    Members(Vec<usize>),
}

impl Selection {
    /// Whether a member is covered.
    #[must_use]
    pub fn covers(&self, member: usize) -> bool {
        match self {
            Self::All => true,
            Self::Off => false,
            Self::Members(list) => list.contains(&member),
        }
    }
}

/// A limit on movement.
#[derive(Debug, Clone, Copy, PartialEq)]
pub enum DeflectionLimit {
    /// L/n.
    SpanOver(f64),
    /// A length or a rotation.
    Absolute(f64),
}

/// A check of movement.
#[derive(Debug, Clone, Copy, PartialEq)]
pub enum DeflectionCheck {
    /// Of a member, from the chord between its ends.
    Member {
        /// The member.
        member: usize,
        /// The limit.
        limit: DeflectionLimit,
    },
    /// Of a node.
    Node {
        /// The node.
        node: usize,
        /// 0 for x, 1 for y, 2 for rotation.
        direction: usize,
        /// Limit, m or rad.
        limit: f64,
    },
}

/// What is checked.
#[derive(Debug, Clone, Default)]
pub struct Checks {
    /// Fibre stress.
    pub stress: Selection,
    /// Shear stress.
    pub shear: Selection,
    /// Movements.
    pub deflection: Vec<DeflectionCheck>,
    /// Safety factor on the Euler load.
    pub buckling: Option<f64>,
    /// Largest K·L/r.
    pub slenderness: Option<f64>,
    /// Smallest critical load factor of the whole.
    pub stability: Option<f64>,
}
