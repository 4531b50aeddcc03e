//! What the solver needs of a structure and of its loads: numbers only, SI.
use crate::model::{MemberKind, Support};

/// A structure as the solver sees it.
///
/// # Units
/// m, N, N·m, rad throughout.
#[derive(Debug, Clone, Default)]
pub struct Structure {
    /// Places of the nodes.
    pub nodes: Vec<[f64; 2]>,
    /// What holds them: at most one entry a node.
    pub supports: Vec<Support>,
    /// The members.
    pub members: Vec<Element>,
}

/// A member as the solver sees it.
#[derive(Debug, Clone)]
pub struct Element {
    /// Its kind, which says what freedoms `stiffness` has.
    pub kind: MemberKind,
    /// Start node.
    pub from: usize,
    /// End node.
    pub to: usize,
    /// Hinge at start, at end; without meaning for bars.
    pub hinge: [bool; 2],
    /// Goes slack rather than carry compression; bars alone.
    pub tension_only: bool,
    /// Stiffness in member axes, row by row, as if without hinges.
    ///
    /// Order of the freedoms: bar `u1 u2`; bar3 `u1 um u2`; beam `v1 φ1 v2 φ2`; frame `u1 v1 φ1 u2 v2 φ2`.
    pub stiffness: Vec<f64>,
    /// E·A, N.
    pub axial_rigidity: f64,
    /// E·I, N·m²; `None` for a bar whose section has no second moment of area.
    pub bending_rigidity: Option<f64>,
    /// 12·E·I/(G·As·L²), 0 where shear does not count.
    pub shear_flexibility: f64,
}

/// The loads of one combination, factors included.
#[derive(Debug, Clone, Default)]
pub struct Loading {
    /// Force in X, force in Y and couple on every node, global axes.
    pub nodes: Vec<[f64; 3]>,
    /// What acts on every member between its ends.
    pub members: Vec<MemberLoading>,
    /// Imposed movement of nodes in their supports' axes; 0 where a direction is not moved.
    pub settlements: Vec<(usize, [f64; 3])>,
}

/// What acts on a member between its ends, as loads on its own freedoms.
///
/// All in member axes, in the order `X1 Y1 M1 X2 Y2 M2 XM` (`XM` on the middle of a bar3): the fixed-end actions
/// reversed. A moment at a hinged end acts on the end's own rotation, not on the node's.
#[derive(Debug, Clone, Copy, Default, PartialEq)]
pub struct MemberLoading {
    /// From forces and couples. They stay when a bar goes slack, half of `XM` at each end.
    pub forces: [f64; 7],
    /// From warming and lack of fit. They vanish when a bar goes slack.
    pub strains: [f64; 7],
    /// Axial force at start and end while all movements are zero, tension positive. Decides about slackness only.
    pub fixed_axial: [f64; 2],
}

/// Places of a member's freedoms: along, across, rotation at the start, the same at the end, along in the middle.
pub(super) const FREEDOMS: usize = 7;
/// Freedom along the member at its start.
pub(super) const U1: usize = 0;
/// Freedom across the member at its start.
pub(super) const V1: usize = 1;
/// Rotation at the start.
pub(super) const R1: usize = 2;
/// Freedom along the member at its end.
pub(super) const U2: usize = 3;
/// Freedom across the member at its end.
pub(super) const V2: usize = 4;
/// Rotation at the end.
pub(super) const R2: usize = 5;
/// Freedom along a bar3 at its middle.
pub(super) const UM: usize = 6;

impl Element {
    /// The freedoms in the order of `stiffness`.
    pub(super) fn freedoms(&self) -> &'static [usize] {
        match self.kind {
            MemberKind::Bar => &[U1, U2],
            MemberKind::Bar3 => &[U1, UM, U2],
            MemberKind::Beam => &[V1, R1, V2, R2],
            MemberKind::Frame => &[U1, V1, R1, U2, V2, R2],
        }
    }

    /// Whether it carries axial force alone.
    pub(super) fn is_bar(&self) -> bool {
        matches!(self.kind, MemberKind::Bar | MemberKind::Bar3)
    }

    /// Whether its end (0 or 1) turns apart from the node.
    pub(super) fn hinged(&self, end: usize) -> bool {
        !self.is_bar() && self.hinge[end]
    }
}

impl Structure {
    /// Length of a member and the unit vector from its start to its end.
    pub(super) fn line(&self, member: usize) -> (f64, [f64; 2]) {
        let element = &self.members[member];
        let ([x1, y1], [x2, y2]) = (self.nodes[element.from], self.nodes[element.to]);
        let (dx, dy) = (x2 - x1, y2 - y1);
        let length = dx.hypot(dy);
        (length, [dx / length, dy / length])
    }

    /// The longer side of the box round all nodes: turns rotations into movements that can be compared.
    pub(super) fn size(&self) -> f64 {
        let side = |axis: usize| {
            let places = self.nodes.iter().map(|node| node[axis]);
            let (low, high) = places.fold((f64::INFINITY, f64::NEG_INFINITY), |(l, h), v| (l.min(v), h.max(v)));
            if high > low { high - low } else { 0.0 }
        };
        let size = side(0).max(side(1));
        if size > 0.0 { size } else { 1.0 }
    }

    /// What is wrong with the numbers themselves, if anything: places that do not exist, sizes that do not fit.
    pub(super) fn fault(&self) -> Option<String> {
        let nodes = self.nodes.len();
        if self.nodes.iter().flatten().any(|v| !v.is_finite()) {
            return Some("a node has a coordinate that is not a number".into());
        }
        for (place, support) in self.supports.iter().enumerate() {
            if support.node >= nodes {
                return Some(format!("support {} is at a node that does not exist", place + 1));
            }
            if self.supports[..place].iter().any(|other| other.node == support.node) {
                return Some(format!("node {} has two supports", support.node + 1));
            }
            let sound = support.spring.iter().flatten().all(|k| k.is_finite() && *k >= 0.0);
            if !sound || !support.turned.is_finite() {
                return Some(format!("support {} has a spring or an angle that cannot be used", place + 1));
            }
        }
        for (place, element) in self.members.iter().enumerate() {
            let number = place + 1;
            if element.from >= nodes || element.to >= nodes {
                return Some(format!("member {number} ends at a node that does not exist"));
            }
            let size = element.freedoms().len();
            if element.stiffness.len() != size * size || element.stiffness.iter().any(|k| !k.is_finite()) {
                return Some(format!("member {number} has a stiffness that cannot be used"));
            }
            let (length, _) = self.line(place);
            if !length.is_finite() || length <= 0.0 {
                return Some(format!("member {number} has no length"));
            }
        }
        None
    }
}

impl Loading {
    /// What is wrong with the numbers themselves, if anything.
    pub(super) fn fault(&self, structure: &Structure) -> Option<String> {
        if self.nodes.len() != structure.nodes.len() || self.members.len() != structure.members.len() {
            return Some("the loads do not cover every node and member once".into());
        }
        let members = self.members.iter().flat_map(|m| m.forces.iter().chain(&m.strains).chain(&m.fixed_axial));
        let settled = self.settlements.iter().flat_map(|(_, movement)| movement);
        if self.nodes.iter().flatten().chain(members).chain(settled).any(|v| !v.is_finite()) {
            return Some("a load is not a number".into());
        }
        for (node, movement) in &self.settlements {
            let support = structure.supports.iter().find(|support| support.node == *node);
            for (direction, movement) in movement.iter().enumerate() {
                let carried = support.is_some_and(|s| s.hold[direction] || s.spring[direction].is_some());
                if movement.abs() > 0.0 && !carried {
                    return Some(format!("node {} is moved in a direction that nothing holds", node + 1));
                }
            }
        }
        None
    }
}
