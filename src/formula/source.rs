//! THE table of published sources.

/// A published place that a formula or a rule rests on.
#[derive(Debug, Clone, Copy, PartialEq, Eq)]
pub struct Source {
    /// Short form, printed beside a step.
    pub short: &'static str,
    /// Work, edition and place.
    pub full: &'static str,
    /// Whether the place was read or is cited from memory.
    pub recalled: bool,
}

const fn recalled(short: &'static str, full: &'static str) -> Source {
    Source { short, full, recalled: true }
}

/// Hooke's law and the strain of a straight bar.
pub const HOOKE: Source =
    recalled("bar law", "S. P. Timoshenko, J. M. Gere, Mechanics of Materials, axially loaded members");
/// Bending stress and curvature of a slender beam.
pub const BENDING: Source =
    recalled("beam law", "S. P. Timoshenko, J. M. Gere, Mechanics of Materials, stresses in beams");
/// End moments of a beam from its end movements.
pub const CUBIC_BEAM: Source =
    recalled("slope-deflection", "W. Weaver, J. M. Gere, Matrix Analysis of Framed Structures, member stiffnesses");
/// Beam with shear deformation.
pub const SHEAR_BEAM: Source = recalled(
    "beam with shear",
    "J. S. Przemieniecki, Theory of Matrix Structural Analysis, chapter 5, beam element with shear",
);
/// Fixed-end actions of loads on a member.
pub const FIXED_END: Source =
    recalled("fixed-end actions", "W. Weaver, J. M. Gere, Matrix Analysis of Framed Structures, Appendix B");
/// Three-node bar.
pub const QUADRATIC_BAR: Source = recalled(
    "three-node bar",
    "R. D. Cook et al., Concepts and Applications of Finite Element Analysis, quadratic bar element",
);
/// Balance of forces and moments.
pub const STATICS: Source =
    recalled("statics", "J. L. Meriam, L. G. Kraige, Engineering Mechanics: Statics, equilibrium");
/// Movements turned from global to member axes.
pub const TURNING: Source = recalled(
    "turning of axes",
    "W. Weaver, J. M. Gere, Matrix Analysis of Framed Structures, rotation of axes in two dimensions",
);
/// Section properties of plane figures.
pub const PLANE_FIGURES: Source = recalled(
    "plane figures",
    "W. C. Young, R. G. Budynas, Roark's Formulas for Stress and Strain, Table A.1 properties of sections",
);
/// Axes moved parallel to themselves.
pub const PARALLEL_AXES: Source = recalled(
    "parallel axes",
    "S. P. Timoshenko, J. M. Gere, Mechanics of Materials, review of centroids and moments of inertia",
);
/// Shear stress in a beam.
pub const SHEAR_STRESS: Source =
    recalled("V·Q/(I·b)", "S. P. Timoshenko, J. M. Gere, Mechanics of Materials, shear stresses in beams");
/// Euler's critical load.
pub const EULER: Source = recalled("Euler", "S. P. Timoshenko, J. M. Gere, Theory of Elastic Stability, chapter 2");
/// Virtual work.
pub const UNIT_LOAD: Source =
    recalled("unit load", "S. P. Timoshenko, J. M. Gere, Mechanics of Materials, unit-load method");
/// Limits on first-order analysis.
pub const FIRST_ORDER: Source =
    recalled("EN 1993-1-1", "EN 1993-1-1:2005, 5.2.1(3), limit of first-order elastic analysis");

/// Comparison of a demand with a limit that the user took from the governing code.
pub const ALLOWABLE: Source = Source {
    short: "limit of the input",
    full: "Allowable-stress and serviceability comparison, demand over limit; common practice, the limit is the user's",
    recalled: false,
};

/// Every row of the table.
pub const ALL: &[&Source] = &[
    &HOOKE,
    &BENDING,
    &CUBIC_BEAM,
    &SHEAR_BEAM,
    &FIXED_END,
    &QUADRATIC_BAR,
    &STATICS,
    &TURNING,
    &PLANE_FIGURES,
    &PARALLEL_AXES,
    &SHEAR_STRESS,
    &EULER,
    &UNIT_LOAD,
    &FIRST_ORDER,
];
