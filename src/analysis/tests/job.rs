//! A structure with one combination, built line by line, with the closed-form element matrices.
use crate::analysis::{CombinationSolution, Element, Failure, Loading, MemberLoading, Solution, Structure, solve};
use crate::model::{MemberKind, Support};

pub(super) const FREE: [bool; 3] = [false, false, false];
pub(super) const PINNED: [bool; 3] = [true, true, false];
pub(super) const FIXED: [bool; 3] = [true, true, true];
pub(super) const ROLLER: [bool; 3] = [false, true, false];

#[derive(Debug, Clone)]
pub(super) struct Job {
    pub(super) structure: Structure,
    pub(super) loading: Loading,
}

impl Job {
    pub(super) fn new(nodes: &[[f64; 2]]) -> Self {
        Self {
            structure: Structure { nodes: nodes.to_vec(), ..Structure::default() },
            loading: Loading { nodes: vec![[0.0; 3]; nodes.len()], ..Loading::default() },
        }
    }

    pub(super) fn support(mut self, node: usize, hold: [bool; 3]) -> Self {
        self.structure.supports.push(Support { node, hold, spring: [None; 3], turned: 0.0 });
        self
    }

    pub(super) fn turned(mut self, node: usize, hold: [bool; 3], degrees: f64) -> Self {
        self.structure.supports.push(Support { node, hold, spring: [None; 3], turned: degrees.to_radians() });
        self
    }

    pub(super) fn spring(mut self, node: usize, hold: [bool; 3], spring: [Option<f64>; 3]) -> Self {
        self.structure.supports.push(Support { node, hold, spring, turned: 0.0 });
        self
    }

    fn length(&self, from: usize, to: usize) -> f64 {
        let ([x1, y1], [x2, y2]) = (self.structure.nodes[from], self.structure.nodes[to]);
        (x2 - x1).hypot(y2 - y1)
    }

    pub(super) fn member(mut self, kind: MemberKind, from: usize, to: usize, ea: f64, ei: f64) -> Self {
        let stiffness = stiffness(kind, ea, ei, 0.0, self.length(from, to));
        self.structure.members.push(Element {
            kind,
            from,
            to,
            hinge: [false; 2],
            tension_only: false,
            stiffness,
            axial_rigidity: ea,
            bending_rigidity: (ei > 0.0).then_some(ei),
            shear_flexibility: 0.0,
        });
        self.loading.members.push(MemberLoading::default());
        self
    }

    pub(super) fn bar(self, from: usize, to: usize, ea: f64) -> Self {
        self.member(MemberKind::Bar, from, to, ea, 0.0)
    }

    pub(super) fn frame(self, from: usize, to: usize, ea: f64, ei: f64) -> Self {
        self.member(MemberKind::Frame, from, to, ea, ei)
    }

    pub(super) fn beam(self, from: usize, to: usize, ei: f64) -> Self {
        self.member(MemberKind::Beam, from, to, 0.0, ei)
    }

    /// Hinges of the last member.
    pub(super) fn hinge(mut self, start: bool, end: bool) -> Self {
        self.change_last(|element| element.hinge = [start, end]);
        self
    }

    /// The last member carries tension only.
    pub(super) fn tension_only(mut self) -> Self {
        self.change_last(|element| element.tension_only = true);
        self
    }

    /// Shear flexibility Φ of the last member.
    pub(super) fn shear(mut self, flexibility: f64) -> Self {
        let length = self.structure.members.last().map_or(1.0, |last| self.length(last.from, last.to));
        self.change_last(|element| {
            let ei = element.bending_rigidity.unwrap_or(0.0);
            element.shear_flexibility = flexibility;
            element.stiffness = stiffness(element.kind, element.axial_rigidity, ei, flexibility, length);
        });
        self
    }

    fn change_last(&mut self, change: impl FnOnce(&mut Element)) {
        if let Some(last) = self.structure.members.last_mut() {
            change(last);
        }
    }

    pub(super) fn load(mut self, node: usize, forces: [f64; 3]) -> Self {
        for (total, part) in self.loading.nodes[node].iter_mut().zip(forces) {
            *total += part;
        }
        self
    }

    /// Uniform load across the last member, positive along its local y.
    pub(super) fn uniform(mut self, w: f64) -> Self {
        let length = self.structure.members.last().map_or(1.0, |last| self.length(last.from, last.to));
        if let Some(load) = self.loading.members.last_mut() {
            let (force, couple) = (w * length / 2.0, w * length * length / 12.0);
            load.forces = [0.0, force, couple, 0.0, force, -couple, 0.0];
        }
        self
    }

    /// The last member is free to grow by this strain.
    pub(super) fn strain(mut self, strain: f64) -> Self {
        let force = self.structure.members.last().map_or(0.0, |last| last.axial_rigidity * strain);
        if let Some(load) = self.loading.members.last_mut() {
            load.strains = [-force, 0.0, 0.0, force, 0.0, 0.0, 0.0];
            load.fixed_axial = [-force; 2];
        }
        self
    }

    pub(super) fn settle(mut self, node: usize, movement: [f64; 3]) -> Self {
        self.loading.settlements.push((node, movement));
        self
    }

    pub(super) fn try_solve(&self) -> Result<Solution, Failure> {
        solve(&self.structure, std::slice::from_ref(&self.loading))
    }

    pub(super) fn solve(&self) -> CombinationSolution {
        let mut solution = self.try_solve().expect("solvable");
        let combination = solution.combinations.remove(0);
        assert!(combination.residual < 1e-9, "residual {}", combination.residual);
        combination
    }

    /// Movements of a member's ends in its own axes: u1 v1 φ1 u2 v2 φ2.
    pub(super) fn end_movements(&self, solution: &CombinationSolution, member: usize) -> [f64; 6] {
        let element = &self.structure.members[member];
        let ([x1, y1], [x2, y2]) = (self.structure.nodes[element.from], self.structure.nodes[element.to]);
        let length = (x2 - x1).hypot(y2 - y1);
        let (c, s) = ((x2 - x1) / length, (y2 - y1) / length);
        let [a, b] = [element.from, element.to].map(|node| solution.displacements[node]);
        let [first, second] = solution.members[member].rotation;
        [c * a[0] + s * a[1], c * a[1] - s * a[0], first, c * b[0] + s * b[1], c * b[1] - s * b[0], second]
    }

    /// Forces of the joints on a frame member's ends in its own axes: k·u less the loads between the ends.
    pub(super) fn end_forces(&self, solution: &CombinationSolution, member: usize) -> [f64; 6] {
        let element = &self.structure.members[member];
        let movement = self.end_movements(solution, member);
        let places: &[usize] = match element.kind {
            MemberKind::Frame => &[0, 1, 2, 3, 4, 5],
            MemberKind::Beam => &[1, 2, 4, 5],
            _ => &[0, 3],
        };
        let mut forces = [0.0; 6];
        if !solution.members[member].slack {
            for (row, i) in places.iter().enumerate() {
                for (column, j) in places.iter().enumerate() {
                    forces[*i] += element.stiffness[row * places.len() + column] * movement[*j];
                }
            }
        }
        let load = self.loading.members[member];
        let strains = if solution.members[member].slack { [0.0; 7] } else { load.strains };
        std::array::from_fn(|place| forces[place] - load.forces[place] - strains[place])
    }

    /// N, V, M at the start in beam convention: tension and sagging positive, V = dM/dx.
    pub(super) fn start(&self, solution: &CombinationSolution, member: usize) -> [f64; 3] {
        let [x, y, m, ..] = self.end_forces(solution, member);
        [-x, y, -m]
    }

    /// N, V, M at the end.
    pub(super) fn end(&self, solution: &CombinationSolution, member: usize) -> [f64; 3] {
        let [_, _, _, x, y, m] = self.end_forces(solution, member);
        [x, -y, m]
    }
}

/// Closed-form matrices of the four kinds (J. S. Przemieniecki, Theory of Matrix Structural Analysis; recalled).
pub(super) fn stiffness(kind: MemberKind, ea: f64, ei: f64, shear: f64, length: f64) -> Vec<f64> {
    let a = ea / length;
    let b = ei / (length.powi(3) * (1.0 + shear));
    let (k, c) = (12.0 * b, 6.0 * b * length);
    let (near, far) = ((4.0 + shear) * b * length * length, (2.0 - shear) * b * length * length);
    match kind {
        MemberKind::Bar => vec![a, -a, -a, a],
        MemberKind::Bar3 => [7.0, -8.0, 1.0, -8.0, 16.0, -8.0, 1.0, -8.0, 7.0].map(|v| v * a / 3.0).to_vec(),
        MemberKind::Beam => vec![k, c, -k, c, c, near, -c, far, -k, -c, k, -c, c, far, -c, near],
        #[rustfmt::skip]
        MemberKind::Frame => vec![
            a, 0.0, 0.0, -a, 0.0, 0.0,
            0.0, k, c, 0.0, -k, c,
            0.0, c, near, 0.0, -c, far,
            -a, 0.0, 0.0, a, 0.0, 0.0,
            0.0, -k, -c, 0.0, k, -c,
            0.0, c, far, 0.0, -c, near,
        ],
    }
}
