//! A section's properties worked on a worksheet, and what has to be written down for it as input.
use super::{
    AREA, BOTTOM, Given, INERTIA, MINOR_INERTIA, MINOR_RADIUS, Outline, RADIUS, SHEAR_MOMENT, SHEAR_WIDTH, SectionKind,
    TOP,
};
use crate::formula::{Scope, Symbol, Value, Worksheet};
use crate::units::Measure;

/// Properties of a section; `None` where nothing was given from which they follow.
#[derive(Debug, Clone, Copy)]
#[allow(missing_docs, reason = "named as the symbols of the same words")]
pub struct Properties {
    pub area: Value,
    pub inertia: Option<Value>,
    pub top: Option<Value>,
    pub bottom: Option<Value>,
    pub minor_inertia: Option<Value>,
    pub radius: Option<Value>,
    pub minor_radius: Option<Value>,
    pub shear_moment: Option<Value>,
    pub shear_width: Option<Value>,
}

/// Works a section. `inputs` holds its dimensions under the symbols of [`input_symbols`].
pub fn work(
    kind: &dyn SectionKind,
    given: &Given,
    inputs: &[(Symbol, Value)],
    name: &str,
    sheet: &mut dyn Worksheet,
) -> Properties {
    let mut scope = Scope::new(sheet, name, None);
    scope.inherit(inputs);
    for (nn, definition) in kind.steps(given) {
        scope.work('P', nn, &definition);
    }
    Properties {
        area: scope.get(&AREA).unwrap_or(Value::silent(f64::NAN)),
        inertia: scope.get(&INERTIA),
        top: scope.get(&TOP),
        bottom: scope.get(&BOTTOM),
        minor_inertia: scope.get(&MINOR_INERTIA),
        radius: scope.get(&RADIUS),
        minor_radius: scope.get(&MINOR_RADIUS),
        shear_moment: scope.get(&SHEAR_MOMENT),
        shear_width: scope.get(&SHEAR_WIDTH),
    }
}

/// Symbols of a plate, counted from 0: width, height, place.
#[must_use]
pub fn plate_symbols(index: usize) -> [Symbol; 3] {
    ["b", "h", "y"].map(|stem| Symbol::indexed(stem, index + 1))
}

/// What has to be written down as input: key, symbol, kind of quantity, value. Dimensions that are zero because they
/// were left out are not listed; a plate's keys are `plates.<n>.width` and so on, from 1.
#[must_use]
pub fn input_symbols(kind: &dyn SectionKind, given: &Given) -> Vec<(String, Symbol, Measure, f64)> {
    let mut inputs: Vec<(String, Symbol, Measure, f64)> = kind
        .params()
        .iter()
        .filter_map(|param| {
            let value = given.get(&param.symbol)?;
            (param.default != Some(value)).then(|| (param.key.to_owned(), param.symbol.clone(), param.measure, value))
        })
        .collect();
    for (at, plate) in given.plates.iter().enumerate() {
        let [width, height, place] = plate_symbols(at);
        for (key, symbol, value) in
            [("width", width, plate.width), ("height", height, plate.height), ("at", place, plate.at)]
        {
            inputs.push((format!("plates.{}.{key}", at + 1), symbol, Measure::Length, value));
        }
    }
    inputs
}

/// The same inputs for a silent worksheet.
#[must_use]
pub fn silent_inputs(kind: &dyn SectionKind, given: &Given) -> Vec<(Symbol, Value)> {
    input_symbols(kind, given).into_iter().map(|(_, symbol, _, si)| (symbol, Value::silent(si))).collect()
}

impl Outline {
    /// A rectangle about the origin, anticlockwise.
    #[must_use]
    pub fn rectangle(width: f64, height: f64) -> Vec<[f64; 2]> {
        let (x, y) = (width / 2.0, height / 2.0);
        vec![[-x, -y], [x, -y], [x, y], [-x, y]]
    }

    /// Loops moved to their common centroid, holes after the outer edge, turned by 90° anticlockwise if asked.
    ///
    /// Loops that lie inside the first are holes; loops beside it add to it.
    #[must_use]
    pub fn new(loops: Vec<Vec<[f64; 2]>>, turned: bool) -> Self {
        let mut area = 0.0;
        let mut first = [0.0, 0.0];
        for (at, points) in loops.iter().enumerate() {
            let hole = at > 0 && points.iter().all(|p| encloses(&loops[0], *p));
            let sign = if hole { -1.0 } else { 1.0 };
            for (a, b) in points.iter().zip(points.iter().cycle().skip(1)) {
                let cross = a[0] * b[1] - b[0] * a[1];
                area += sign * cross / 2.0;
                first[0] += sign * (a[0] + b[0]) * cross / 6.0;
                first[1] += sign * (a[1] + b[1]) * cross / 6.0;
            }
        }
        let centroid = if area == 0.0 { [0.0, 0.0] } else { [first[0] / area, first[1] / area] };
        let moved = |p: &[f64; 2]| {
            let [z, y] = [p[0] - centroid[0], p[1] - centroid[1]];
            if turned { [-y, z] } else { [z, y] }
        };
        Self { loops: loops.iter().map(|points| points.iter().map(moved).collect()).collect() }
    }
}

/// Whether a point lies strictly inside a closed line.
fn encloses(points: &[[f64; 2]], [x, y]: [f64; 2]) -> bool {
    let mut inside = false;
    for (a, b) in points.iter().zip(points.iter().cycle().skip(1)) {
        if (a[1] > y) != (b[1] > y) && x < a[0] + (y - a[1]) / (b[1] - a[1]) * (b[0] - a[0]) {
            inside = !inside;
        }
    }
    inside
}
