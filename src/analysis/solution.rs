//! What solving a structure gives: movements, and how far they can be trusted.

/// Movements of the whole structure under every combination.
#[derive(Debug, Clone, Default)]
pub struct Solution {
    /// One entry a combination, in the model's order.
    pub combinations: Vec<CombinationSolution>,
    /// Directions that nothing stiffens and nothing loads.
    pub left_out: Vec<LeftOut>,
    /// Number of equations.
    pub equations: usize,
    /// Estimated condition number of the scaled stiffness matrix.
    pub condition: f64,
}

/// A direction of a node that nothing stiffens and nothing loads.
#[derive(Debug, Clone, PartialEq)]
pub struct LeftOut {
    /// The node.
    pub node: usize,
    /// `None` for the rotation; else the unit vector of the direction in global axes.
    pub direction: Option<[f64; 2]>,
}

/// Movements under one combination.
#[derive(Debug, Clone, Default)]
pub struct CombinationSolution {
    /// Per node: x, y (m), rotation (rad).
    pub displacements: Vec<[f64; 3]>,
    /// Per member.
    pub members: Vec<MemberMovement>,
    /// Largest of |K·u − F| over the equations, relative to the largest force in the system.
    pub residual: f64,
    /// Elastic critical load, where it was asked for or compression exists; `None` where nothing is compressed.
    pub critical: Option<CriticalLoad>,
}

/// What a member's ends do that its nodes do not.
#[derive(Debug, Clone, Copy, Default, PartialEq)]
pub struct MemberMovement {
    /// Rotation of the member's own start and end, rad; the node's where there is no hinge.
    pub rotation: [f64; 2],
    /// Movement of a three-node bar's middle node, global x and y, m.
    pub middle: Option<[f64; 2]>,
    /// A tension-only bar that has gone slack under this combination.
    pub slack: bool,
}

/// The elastic critical load factor and the shape of buckling.
#[derive(Debug, Clone, Default)]
pub struct CriticalLoad {
    /// Factor on the whole combination.
    pub factor: f64,
    /// Per member, points along it (distance from `from`, m) with the movement in global x and y, scaled to 1 at most.
    pub mode: Vec<Vec<(f64, [f64; 2])>>,
    /// Compressed bars whose section has no second moment of area: they lean but do not bow in this factor.
    pub without_inertia: Vec<usize>,
}
