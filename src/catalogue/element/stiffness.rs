//! Stiffness of a member in its own axes, read off the same definitions that reach paper.
use super::{bar3, bending, movement};
use crate::catalogue::symbol::*;
use crate::formula::{Definition, Scope, Silent, Symbol, Value};
use crate::model::MemberKind;

/// Stiffness by rows, each freedom moved by one unit in turn.
///
/// Freedoms: bar u₁ u₂; bar3 u₁ u_m u₂; beam v₁ φ₁ v₂ φ₂; frame u₁ v₁ φ₁ u₂ v₂ φ₂.
/// # Units
/// `length` m, `axial` E·A in N, `bending` E·I in N·m², `shear` Φ without dimension.
/// # Sign convention
/// Forces on the member's ends along local x and y, couples anticlockwise.
/// # Source
/// The definitions of [`super::bar`], [`super::bar3`] and [`super::bending`].
#[must_use]
pub fn stiffness(kind: MemberKind, length: f64, axial: f64, bending_rigidity: f64, shear: f64) -> Vec<f64> {
    let evaluate = |definition: &'static Definition, known: &[(Symbol, f64)]| {
        let mut silent = Silent;
        let mut scope = Scope::new(&mut silent, "", None);
        known.iter().for_each(|(symbol, value)| scope.set(symbol, Value::silent(*value)));
        scope.work('K', 0, definition).si
    };
    let n = match kind {
        MemberKind::Bar => 2,
        MemberKind::Bar3 => 3,
        MemberKind::Beam => 4,
        MemberKind::Frame => 6,
    };
    let mut matrix = vec![0.0; n * n];
    for column in 0..n {
        let mut moved = [0.0; 6];
        moved[column] = 1.0;
        let forces: Vec<f64> = match kind {
            MemberKind::Bar => {
                axial_ends(axial * evaluate(&super::bar::STRAIN, &[(U, moved[1] - moved[0]), (L, length)])).to_vec()
            }
            MemberKind::Bar3 => {
                let known = [(U, moved[2] - moved[0]), (UM, moved[1] - moved[0]), (L, length), (BA, axial)];
                let start = axial * evaluate(&bar3::STRAIN_START_MOVEMENT, &known);
                let end = axial * evaluate(&bar3::STRAIN_END_MOVEMENT, &known);
                let middle = evaluate(&bar3::MIDDLE_FORCE, &known);
                // End forces are those of the end strains less a quarter of the middle's: the force in the bar
                // changes along it where its middle is held.
                vec![middle / 4.0 - start, middle, middle / 4.0 + end]
            }
            MemberKind::Beam => {
                bending_ends(&evaluate, length, bending_rigidity, shear, [moved[0], moved[1], moved[2], moved[3]])
                    .to_vec()
            }
            MemberKind::Frame => {
                let [start, end] =
                    axial_ends(axial * evaluate(&super::bar::STRAIN, &[(U, moved[3] - moved[0]), (L, length)]));
                let b =
                    bending_ends(&evaluate, length, bending_rigidity, shear, [moved[1], moved[2], moved[4], moved[5]]);
                vec![start, b[0], b[1], end, b[2], b[3]]
            }
        };
        for (row, force) in forces.into_iter().enumerate() {
            matrix[row * n + column] = force;
        }
    }
    // Equal by Maxwell's theorem; the halves differ by rounding alone.
    for row in 0..n {
        for column in 0..row {
            let mean = f64::midpoint(matrix[row * n + column], matrix[column * n + row]);
            matrix[row * n + column] = mean;
            matrix[column * n + row] = mean;
        }
    }
    matrix
}

const fn axial_ends(force: f64) -> [f64; 2] {
    [-force, force]
}

/// Works one definition from the values of its symbols.
type Evaluate<'a> = dyn Fn(&'static Definition, &[(Symbol, f64)]) -> f64 + 'a;

fn bending_ends(
    evaluate: &Evaluate<'_>,
    length: f64,
    rigidity: f64,
    shear: f64,
    [v1, p1, v2, p2]: [f64; 4],
) -> [f64; 4] {
    let chord = evaluate(&movement::CHORD_ROTATION, &[(DV, v2 - v1), (L, length)]);
    let known = [(T1, p1 - chord), (T2, p2 - chord), (L, length), (PHI, shear)];
    let k1 = evaluate(&bending::CURVATURE_START_MOVEMENT_SHEAR, &known);
    let k2 = evaluate(&bending::CURVATURE_END_MOVEMENT_SHEAR, &known);
    let v = evaluate(&bending::SHEAR_START_UNLOADED, &[(BB, rigidity), (KU1, k1), (KU2, k2), (L, length)]);
    [v, -rigidity * k1, -v, rigidity * k2]
}
