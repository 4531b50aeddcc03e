//! Which movements exist, in which axes, and which of them become equations.
//!
//! A *slot* is one movement of the structure: three of every node (in the node's own axes), one for the rotation of
//! every hinged member end, one along the bar for the middle of every bar3.
use super::ordering::reverse_cuthill_mckee;
use super::solution::LeftOut;
use super::structure::{FREEDOMS, R1, R2, Structure, U1, U2, UM, V1, V2};
use crate::model::MemberKind;

/// Sine of the angle below which two directions count as one.
const SAME_DIRECTION: f64 = 1e-9;

/// What is known of a slot beforehand.
#[derive(Debug, Clone, Copy, PartialEq, Eq)]
pub(super) enum State {
    /// To be solved for.
    Free,
    /// Held; its movement is the support's.
    Held,
    /// Without stiffness, hence left out.
    LeftOut,
}

/// A member freedom as a sum of slots times coefficients; an unused place has the coefficient 0.
pub(super) type Terms = [(usize, f64); 2];

/// All slots of a structure.
#[derive(Debug, Clone)]
pub(super) struct Slots {
    /// Number of nodes; their slots come first, three each.
    nodes: usize,
    /// Cosine and sine of the turn of every node's axes.
    pub(super) axes: Vec<[f64; 2]>,
    /// What is known of every slot.
    pub(super) state: Vec<State>,
    /// Every member's freedoms.
    pub(super) members: Vec<[Terms; FREEDOMS]>,
    /// Spring stiffness of every slot, 0 where there is none.
    pub(super) springs: Vec<f64>,
}

impl Slots {
    /// Finds them, the members in `slack` taken out.
    pub(super) fn new(structure: &Structure, slack: &[bool]) -> Self {
        let nodes = structure.nodes.len();
        let mut slots = Self {
            nodes,
            axes: vec![[1.0, 0.0]; nodes],
            state: vec![State::Free; 3 * nodes],
            members: Vec::new(),
            springs: vec![0.0; 3 * nodes],
        };
        for support in &structure.supports {
            slots.axes[support.node] = cosine_and_sine(support.turned);
            for direction in 0..3 {
                let slot = 3 * support.node + direction;
                if support.hold[direction] {
                    slots.state[slot] = State::Held;
                } else {
                    slots.springs[slot] = support.spring[direction].unwrap_or(0.0);
                }
            }
        }
        slots.leave_out_unstiffened(structure, slack);
        for (member, element) in structure.members.iter().enumerate() {
            let rotation = [0, 1].map(|end| {
                if element.hinged(end) { slots.add(State::Free) } else { 3 * [element.from, element.to][end] + 2 }
            });
            let middle = match element.kind {
                MemberKind::Bar3 => slots.add(if slack[member] { State::LeftOut } else { State::Free }),
                _ => 0,
            };
            let (_, direction) = structure.line(member);
            let [along1, across1] = slots.axial_terms(element.from, direction);
            let [along2, across2] = slots.axial_terms(element.to, direction);
            let mut terms = [[(0, 0.0); 2]; FREEDOMS];
            (terms[U1], terms[V1], terms[R1]) = (along1, across1, [(rotation[0], 1.0), (0, 0.0)]);
            (terms[U2], terms[V2], terms[R2]) = (along2, across2, [(rotation[1], 1.0), (0, 0.0)]);
            if element.kind == MemberKind::Bar3 {
                terms[UM] = [(middle, 1.0), (0, 0.0)];
            }
            slots.members.push(terms);
        }
        slots
    }

    fn add(&mut self, state: State) -> usize {
        self.state.push(state);
        self.springs.push(0.0);
        self.state.len() - 1
    }

    /// Movement of a node along a direction and across it, in the node's own axes.
    fn axial_terms(&self, node: usize, [dx, dy]: [f64; 2]) -> [Terms; 2] {
        let [c, s] = self.axes[node];
        let (along, across) = (c * dx + s * dy, c * dy - s * dx);
        let (first, second) = (3 * node, 3 * node + 1);
        [[(first, along), (second, across)], [(first, -across), (second, along)]]
    }

    /// Marks the directions of nodes that no member and no spring stiffens, turning a node's axes where one is oblique.
    fn leave_out_unstiffened(&mut self, structure: &Structure, slack: &[bool]) {
        let mut directions: Vec<Vec<[f64; 2]>> = vec![Vec::new(); self.nodes];
        let mut turning: Vec<bool> = (0..self.nodes).map(|node| self.springs[3 * node + 2] > 0.0).collect();
        for (member, element) in structure.members.iter().enumerate().filter(|(member, _)| !slack[*member]) {
            let (_, [dx, dy]) = structure.line(member);
            for (end, node) in [element.from, element.to].into_iter().enumerate() {
                if element.kind != MemberKind::Beam {
                    directions[node].push([dx, dy]);
                }
                if !element.is_bar() {
                    directions[node].push([-dy, dx]);
                    turning[node] |= !element.hinged(end);
                }
            }
        }
        for node in 0..self.nodes {
            let [c, s] = self.axes[node];
            let axes = [[c, s], [-s, c]];
            for (axis, direction) in axes.iter().enumerate() {
                if self.springs[3 * node + axis] > 0.0 {
                    directions[node].push(*direction);
                }
            }
            self.leave_out_translations(node, axes, &directions[node]);
            let rotation = &mut self.state[3 * node + 2];
            if *rotation == State::Free && !turning[node] {
                *rotation = State::LeftOut;
            }
        }
    }

    fn leave_out_translations(&mut self, node: usize, axes: [[f64; 2]; 2], stiff: &[[f64; 2]]) {
        let free = [0, 1].map(|axis| self.state[3 * node + axis] == State::Free);
        let stiffened = |axis: usize| stiff.iter().any(|d| dot(*d, axes[axis]).abs() > SAME_DIRECTION);
        if free == [true, true] {
            let Some(first) = stiff.first() else {
                self.state[3 * node] = State::LeftOut;
                self.state[3 * node + 1] = State::LeftOut;
                return;
            };
            let across = [-first[1], first[0]];
            if stiff.iter().any(|d| dot(*d, across).abs() > SAME_DIRECTION) {
                return;
            }
            match [stiffened(0), stiffened(1)] {
                [true, false] => self.state[3 * node + 1] = State::LeftOut,
                [false, true] => self.state[3 * node] = State::LeftOut,
                _ => {
                    self.axes[node] = *first;
                    self.state[3 * node + 1] = State::LeftOut;
                }
            }
            return;
        }
        for (axis, free) in free.into_iter().enumerate() {
            if free && !stiffened(axis) {
                self.state[3 * node + axis] = State::LeftOut;
            }
        }
    }

    /// The node and direction of a slot: `None` for slots that belong to members, a direction of `None` for a rotation.
    pub(super) fn place(&self, slot: usize) -> Option<LeftOut> {
        let node = slot / 3;
        if node >= self.nodes {
            return None;
        }
        let [c, s] = self.axes[node];
        let direction = match slot % 3 {
            0 => Some([c, s]),
            1 => Some([-s, c]),
            _ => None,
        };
        Some(LeftOut { node, direction })
    }

    /// Slots of the directions left out at nodes.
    pub(super) fn left_out_slots(&self) -> impl Iterator<Item = usize> {
        (0..3 * self.nodes).filter(|slot| self.state[*slot] == State::LeftOut)
    }

    /// Directions left out at nodes.
    pub(super) fn left_out(&self) -> Vec<LeftOut> {
        self.left_out_slots().filter_map(|slot| self.place(slot)).collect()
    }

    /// A node's movement in global axes.
    pub(super) fn movement(&self, node: usize, values: &[f64]) -> [f64; 3] {
        let [c, s] = self.axes[node];
        let [first, second, rotation] = [0, 1, 2].map(|direction| values[3 * node + direction]);
        [c * first - s * second, s * first + c * second, rotation]
    }

    /// Adds global forces on a node to forces on slots.
    pub(super) fn add_force(&self, node: usize, [x, y, couple]: [f64; 3], forces: &mut [f64]) {
        let [c, s] = self.axes[node];
        forces[3 * node] += c * x + s * y;
        forces[3 * node + 1] += c * y - s * x;
        forces[3 * node + 2] += couple;
    }

    /// A member's freedoms from the movements of the slots.
    pub(super) fn member_movement(&self, member: usize, freedoms: &[usize], values: &[f64]) -> Vec<f64> {
        let terms = &self.members[member];
        freedoms.iter().map(|f| terms[*f].iter().map(|(slot, factor)| factor * values[*slot]).sum()).collect()
    }

    /// Adds forces on a member's freedoms to forces on slots.
    pub(super) fn add_member_force(&self, member: usize, freedoms: &[usize], local: &[f64], forces: &mut [f64]) {
        for (freedom, value) in freedoms.iter().zip(local) {
            for (slot, factor) in self.members[member][*freedom] {
                forces[slot] += factor * value;
            }
        }
    }

    /// Numbers the free slots, `freedoms` saying which freedoms of each member are joined by it.
    pub(super) fn number(&self, freedoms: &[&[usize]]) -> Numbering {
        let free: Vec<usize> = (0..self.state.len()).filter(|slot| self.state[*slot] == State::Free).collect();
        let mut rank = vec![None; self.state.len()];
        for (position, slot) in free.iter().enumerate() {
            rank[*slot] = Some(position);
        }
        let joined: Vec<Vec<usize>> = (0..self.members.len())
            .map(|member| {
                let terms = freedoms[member].iter().flat_map(|f| self.members[member][*f]);
                let mut list: Vec<usize> = terms.filter(|(_, c)| c.abs() > 0.0).filter_map(|(s, _)| rank[s]).collect();
                list.sort_unstable();
                list.dedup();
                list
            })
            .collect();
        let mut neighbours = vec![Vec::new(); free.len()];
        for list in &joined {
            for a in list {
                neighbours[*a].extend(list.iter().copied().filter(|b| b != a));
            }
        }
        for list in &mut neighbours {
            list.sort_unstable();
            list.dedup();
        }
        let place = reverse_cuthill_mckee(&neighbours);
        let mut first: Vec<usize> = (0..free.len()).collect();
        for list in &joined {
            if let Some(lowest) = list.iter().map(|a| place[*a]).min() {
                for a in list {
                    first[place[*a]] = first[place[*a]].min(lowest);
                }
            }
        }
        let equation = rank.into_iter().map(|rank| rank.map(|r| place[r])).collect();
        Numbering { equation, first }
    }
}

/// Equation numbers of the free slots.
#[derive(Debug, Clone)]
pub(super) struct Numbering {
    /// Per slot.
    pub(super) equation: Vec<Option<usize>>,
    /// First column of each row of the matrix.
    pub(super) first: Vec<usize>,
}

impl Numbering {
    /// Number of equations.
    pub(super) fn count(&self) -> usize {
        self.first.len()
    }

    /// Values of the equations out of values of the slots.
    pub(super) fn gather(&self, slots: &[f64]) -> Vec<f64> {
        let mut values = vec![0.0; self.count()];
        for (slot, equation) in self.equation.iter().enumerate() {
            if let Some(equation) = equation {
                values[*equation] = slots[slot];
            }
        }
        values
    }

    /// Puts values of the equations where their slots are; the other slots keep what they have.
    pub(super) fn scatter(&self, values: &[f64], slots: &mut [f64]) {
        for (slot, equation) in self.equation.iter().enumerate() {
            if let Some(equation) = equation {
                slots[slot] = values[*equation];
            }
        }
    }
}

/// Cosine and sine, without the dust that a quarter turn in radians leaves.
fn cosine_and_sine(angle: f64) -> [f64; 2] {
    let (s, c) = angle.sin_cos();
    let clean = |value: f64, other: f64| {
        if value.abs() < 1e-15 {
            0.0
        } else if other.abs() < 1e-15 {
            value.signum()
        } else {
            value
        }
    };
    [clean(c, s), clean(s, c)]
}

fn dot(a: [f64; 2], b: [f64; 2]) -> f64 {
    a[0] * b[0] + a[1] * b[1]
}
