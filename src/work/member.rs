//! What belongs to a member whatever is loaded: geometry, rigidities, weight.
use crate::catalogue::element::geometry;
use crate::catalogue::symbol::*;
use crate::formula::{Scope, Symbol, Value, Worksheet};
use crate::model::{Member, MemberKind, Model};
use crate::units::Measure;

/// Properties of a section, worked or given; `None` where the user gave none.
#[derive(Debug, Clone, Copy, Default)]
#[allow(missing_docs, reason = "the names of the section's own symbols")]
pub struct SectionValues {
    pub area: Option<Value>,
    pub inertia: Option<Value>,
    pub top: Option<Value>,
    pub bottom: Option<Value>,
    pub minor_inertia: Option<Value>,
    pub radius: Option<Value>,
    pub minor_radius: Option<Value>,
    pub shear_moment: Option<Value>,
    pub shear_width: Option<Value>,
    pub shear_area: Option<Value>,
}

/// A member's constants with every symbol they are known by.
#[derive(Debug, Clone)]
pub struct MemberBase {
    /// Symbols for the steps that follow.
    pub known: Vec<(Symbol, Value)>,
    /// Length, m.
    pub length: f64,
    /// Direction cosines.
    pub direction: [f64; 2],
    /// E·A, N.
    pub axial: f64,
    /// E·I, N·m²; zero where the member does not bend.
    pub bending: f64,
    /// Φ; zero without shear deformation.
    pub shear: f64,
    /// G·A_v, N; infinite without shear deformation.
    pub shear_rigidity: f64,
}

impl MemberBase {
    /// The value of a symbol, where it is known.
    #[must_use]
    pub fn get(&self, symbol: &Symbol) -> Option<Value> {
        self.known.iter().rev().find(|(s, _)| s == symbol).map(|(_, v)| *v)
    }
}

/// Works a member's geometry and constants (steps G).
pub fn work_base(sheet: &mut dyn Worksheet, model: &Model, member: &Member, section: &SectionValues) -> MemberBase {
    let mut inputs = Vec::new();
    for (node, x, y) in [(member.from, X1, Y1), (member.to, X2, Y2)] {
        let node = &model.nodes[node];
        inputs.push((x, sheet.input(format_args!("INPUT.nodes.{}.x", node.name), node.x, Measure::Span)));
        inputs.push((y, sheet.input(format_args!("INPUT.nodes.{}.y", node.name), node.y, Measure::Span)));
    }
    let material = &model.materials[member.material];
    let mut of_material = |key: &str, value: f64, measure| {
        sheet.input(format_args!("INPUT.materials.{}.{key}", material.name), value, measure)
    };
    inputs.push((E, of_material("E", material.modulus, Measure::Stress)));
    for (symbol, key, value, measure) in [
        (G, "G", material.shear_modulus, Measure::Stress),
        (RHO, "density", material.density, Measure::Density),
        (ALPHA, "expansion", material.expansion, Measure::Expansion),
    ] {
        if let Some(value) = value {
            inputs.push((symbol, of_material(key, value, measure)));
        }
    }
    for (symbol, value) in [
        (A, section.area),
        (I, section.inertia),
        (IZ, section.minor_inertia),
        (YT, section.top),
        (YB, section.bottom),
        (RI, section.radius),
        (RZ, section.minor_radius),
        (AV, section.shear_area),
    ] {
        if let Some(value) = value {
            inputs.push((symbol, value));
        }
    }
    let weighs = model.cases.iter().any(|case| case.self_weight != 0.0);
    if weighs && material.density.is_some() {
        inputs
            .push((GRAVITY, sheet.input(format_args!("INPUT.gravity.g.value"), model.gravity, Measure::Acceleration)));
    }

    let mut scope = Scope::new(sheet, &member.name, None);
    scope.inherit(&inputs);
    let mut step = |nn, definition| scope.work('G', nn, definition).si;
    step(1, &geometry::PROJECTION_X);
    step(2, &geometry::PROJECTION_Y);
    let length = step(3, &geometry::LENGTH);
    let direction = [step(4, &geometry::COSINE), step(5, &geometry::SINE)];
    let axial = if member.kind == MemberKind::Beam { 0.0 } else { step(6, &geometry::AXIAL_RIGIDITY) };
    let bends = matches!(member.kind, MemberKind::Beam | MemberKind::Frame) && section.inertia.is_some();
    let bending = if bends { step(7, &geometry::BENDING_RIGIDITY) } else { 0.0 };
    let (shear_rigidity, shear) = if bends && material.shear_modulus.is_some() && section.shear_area.is_some() {
        (step(8, &geometry::SHEAR_RIGIDITY), step(9, &geometry::SHEAR_FLEXIBILITY))
    } else {
        (f64::INFINITY, 0.0)
    };
    if weighs && material.density.is_some() {
        step(10, &geometry::WEIGHT_PER_LENGTH);
    }
    let known = scope.known().to_vec();
    MemberBase { known, length, direction, axial, bending, shear, shear_rigidity }
}
