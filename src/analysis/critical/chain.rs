//! A member cut into short pieces in a row, reduced to its two ends: bending stiffness less what compression takes.
use super::axial::Axial;

type Square2 = [[f64; 2]; 2];
/// Matrix of a piece or of a whole member: `v1 φ1 v2 φ2`.
pub(super) type Square4 = [[f64; 4]; 4];

/// The pieces of one member.
#[derive(Debug, Clone)]
pub(super) struct Chain {
    /// Distances from the start at which pieces meet, both ends included.
    pub(super) places: Vec<f64>,
    /// Elastic and geometric matrix of each piece; the second belongs to a load factor of 1.
    pieces: Vec<[Square4; 2]>,
    /// Whether its ends turn freely.
    pinned: bool,
}

impl Chain {
    /// Cuts a member at `places`; the axial force is straight within each piece.
    pub(super) fn new(places: Vec<f64>, bending: f64, shear: f64, axial: &Axial, pinned: bool) -> Self {
        let length = places.last().copied().unwrap_or(0.0);
        let pieces = places
            .windows(2)
            .map(|pair| {
                let piece = pair[1] - pair[0];
                let shear = shear * (length / piece).powi(2);
                let force = axial.straight_within(pair[0], pair[1]);
                [elastic(bending, shear, piece), geometric(force, shear, piece)]
            })
            .collect();
        Self { places, pieces, pinned }
    }

    /// Takes the joints between the pieces out, from the start to the end.
    pub(super) fn reduce(&self, factor: f64) -> Reduced {
        let mut pieces = self.pieces.iter().map(|[elastic, geometric]| sum(elastic, geometric, factor));
        let mut matrix = pieces.next().unwrap_or_default();
        let mut joints = Vec::with_capacity(self.pieces.len());
        let mut negatives = 0;
        for piece in pieces {
            let own = add(block(&matrix, 1, 1), block(&piece, 0, 0));
            let joint = Joint::new(own, block(&matrix, 1, 0), block(&piece, 0, 1));
            negatives += joint.negatives;
            let [left, right] = [&joint.to_start, &joint.to_next].map(|to| multiply(&joint.inverse, to));
            let start = subtract(block(&matrix, 0, 0), multiply(&transposed(&joint.to_start), &left));
            let cross = subtract([[0.0; 2]; 2], multiply(&transposed(&joint.to_start), &right));
            let end = subtract(block(&piece, 1, 1), multiply(&transposed(&joint.to_next), &right));
            matrix = from_blocks(start, cross, end);
            joints.push(joint);
        }
        let mut reduced = Reduced { matrix, joints, ends: None, negatives };
        if self.pinned {
            reduced.release_ends();
        }
        reduced
    }
}

/// A member reduced to its ends.
#[derive(Debug, Clone)]
pub(super) struct Reduced {
    /// On `v1 φ1 v2 φ2`; the rotations of a pinned member have none.
    pub(super) matrix: Square4,
    /// Number of negative eigenvalues among what was taken out.
    pub(super) negatives: usize,
    joints: Vec<Joint>,
    /// The two end rotations of a pinned member: towards `v1` and `v2`.
    ends: Option<Joint>,
}

/// What is kept of two unknowns taken out, so that they can be found again.
#[derive(Debug, Clone)]
struct Joint {
    inverse: Square2,
    to_start: Square2,
    to_next: Square2,
    negatives: usize,
}

impl Joint {
    fn new(own: Square2, to_start: Square2, to_next: Square2) -> Self {
        let [[a, b], [_, d]] = own;
        let mut determinant = a * d - b * b;
        if determinant.abs() <= f64::MIN_POSITIVE {
            determinant = f64::MIN_POSITIVE.sqrt();
        }
        let negatives = match (determinant < 0.0, a + d < 0.0) {
            (true, _) => 1,
            (false, true) => 2,
            (false, false) => 0,
        };
        let inverse = [[d / determinant, -b / determinant], [-b / determinant, a / determinant]];
        Self { inverse, to_start, to_next, negatives }
    }
}

impl Reduced {
    fn release_ends(&mut self) {
        let m = self.matrix;
        let own = [[m[1][1], m[1][3]], [m[3][1], m[3][3]]];
        // Both ends at once: `to_start` couples the rotations to (v1, v2).
        let joint = Joint::new(own, [[m[1][0], m[1][2]], [m[3][0], m[3][2]]], [[0.0; 2]; 2]);
        let kept = [[m[0][0], m[0][2]], [m[2][0], m[2][2]]];
        let taken = multiply(&transposed(&joint.to_start), &multiply(&joint.inverse, &joint.to_start));
        let [[a, b], [_, d]] = subtract(kept, taken);
        self.matrix = [[a, 0.0, b, 0.0], [0.0; 4], [b, 0.0, d, 0.0], [0.0; 4]];
        self.negatives += joint.negatives;
        self.ends = Some(joint);
    }

    /// Loads on the joints carried to the ends: `v1 φ1 v2 φ2`. `loads` has one entry a place, ends included, and keeps
    /// what [`Reduced::restore`] needs.
    pub(super) fn carry(&self, loads: &mut [[f64; 2]]) -> [f64; 4] {
        let mut start = loads.first().copied().unwrap_or_default();
        for (place, joint) in self.joints.iter().enumerate() {
            let at = times(&joint.inverse, loads[place + 1]);
            start = minus(start, times(&transposed(&joint.to_start), at));
            loads[place + 2] = minus(loads[place + 2], times(&transposed(&joint.to_next), at));
        }
        let end = loads.last().copied().unwrap_or_default();
        let carried = [start[0], start[1], end[0], end[1]];
        let Some(ends) = &self.ends else { return carried };
        if let Some(first) = loads.first_mut() {
            *first = start;
        }
        let at = times(&transposed(&ends.to_start), times(&ends.inverse, [start[1], end[1]]));
        [start[0] - at[0], 0.0, end[0] - at[1], 0.0]
    }

    /// Movements of all places from those of the ends, `loads` being what [`Reduced::carry`] left.
    pub(super) fn restore(&self, ends: [f64; 4], loads: &[[f64; 2]]) -> Vec<[f64; 2]> {
        let [mut start, mut next] = [[ends[0], ends[1]], [ends[2], ends[3]]];
        if let Some(joint) = &self.ends {
            let load = |place: Option<&[f64; 2]>| place.map_or(0.0, |load| load[1]);
            let right = minus([load(loads.first()), load(loads.last())], times(&joint.to_start, [start[0], next[0]]));
            [start[1], next[1]] = times(&joint.inverse, right);
        }
        let mut movements = vec![next];
        for (place, joint) in self.joints.iter().enumerate().rev() {
            let right = minus(minus(loads[place + 1], times(&joint.to_start, start)), times(&joint.to_next, next));
            next = times(&joint.inverse, right);
            movements.push(next);
        }
        movements.push(start);
        movements.reverse();
        movements
    }
}

/// Bending stiffness of a piece with shear.
///
/// # Source
/// J. S. Przemieniecki, Theory of Matrix Structural Analysis, chapter 5 (recalled).
fn elastic(bending: f64, shear: f64, l: f64) -> Square4 {
    let k = bending / (l.powi(3) * (1.0 + shear));
    let (a, b, near, far) = (12.0 * k, 6.0 * k * l, (4.0 + shear) * k * l * l, (2.0 - shear) * k * l * l);
    [[a, b, -a, b], [b, near, -b, far], [-a, -b, a, -b], [b, far, -b, near]]
}

/// ∫ N·w′·w′ over a piece, N straight from start to end, w the exact shape of the unloaded piece with shear.
///
/// The integrand is of degree five, for which three Gauss points are exact.
fn geometric([start, end]: [f64; 2], shear: f64, l: f64) -> Square4 {
    let offset = 0.5 * 0.6f64.sqrt();
    let mut matrix = [[0.0; 4]; 4];
    for (x, weight) in [(0.5 - offset, 5.0 / 18.0), (0.5, 8.0 / 18.0), (0.5 + offset, 5.0 / 18.0)] {
        let scale = 1.0 / (1.0 + shear);
        let straight = (6.0 * x - 6.0 * x * x + shear) * scale / l;
        let bow = 0.5 * shear * (1.0 - 2.0 * x);
        let first = (1.0 - 4.0 * x + 3.0 * x * x + bow) * scale;
        let second = (3.0 * x * x - 2.0 * x - bow) * scale;
        let slope = [-straight, first, straight, second];
        let force = (start + (end - start) * x) * weight * l;
        for (row, a) in matrix.iter_mut().zip(slope) {
            for (entry, b) in row.iter_mut().zip(slope) {
                *entry += force * a * b;
            }
        }
    }
    matrix
}

fn sum(elastic: &Square4, geometric: &Square4, factor: f64) -> Square4 {
    std::array::from_fn(|i| std::array::from_fn(|j| elastic[i][j] + factor * geometric[i][j]))
}

fn block(m: &Square4, row: usize, column: usize) -> Square2 {
    std::array::from_fn(|i| std::array::from_fn(|j| m[2 * row + i][2 * column + j]))
}

fn from_blocks(start: Square2, cross: Square2, end: Square2) -> Square4 {
    std::array::from_fn(|i| {
        std::array::from_fn(|j| match (i < 2, j < 2) {
            (true, true) => start[i][j],
            (true, false) => cross[i][j - 2],
            (false, true) => cross[j][i - 2],
            (false, false) => end[i - 2][j - 2],
        })
    })
}

fn transposed(m: &Square2) -> Square2 {
    [[m[0][0], m[1][0]], [m[0][1], m[1][1]]]
}

fn multiply(a: &Square2, b: &Square2) -> Square2 {
    std::array::from_fn(|i| std::array::from_fn(|j| a[i][0] * b[0][j] + a[i][1] * b[1][j]))
}

fn add(a: Square2, b: Square2) -> Square2 {
    std::array::from_fn(|i| std::array::from_fn(|j| a[i][j] + b[i][j]))
}

fn subtract(a: Square2, b: Square2) -> Square2 {
    std::array::from_fn(|i| std::array::from_fn(|j| a[i][j] - b[i][j]))
}

fn times(m: &Square2, x: [f64; 2]) -> [f64; 2] {
    [m[0][0] * x[0] + m[0][1] * x[1], m[1][0] * x[0] + m[1][1] * x[1]]
}

fn minus(a: [f64; 2], b: [f64; 2]) -> [f64; 2] {
    [a[0] - b[0], a[1] - b[1]]
}

#[cfg(test)]
mod tests {
    use super::*;

    /// Without axial force the pieces together are the whole member again, shear included.
    #[test]
    fn pieces_add_up_to_the_member() {
        let (ei, shear, l) = (3.0e5, 0.4, 4.0);
        let chain = Chain::new(vec![0.0, 0.7, 1.9, 2.5, l], ei, shear, &Axial::none(), false);
        let reduced = chain.reduce(1.0);
        let whole = elastic(ei, shear, l);
        assert_eq!(reduced.negatives, 0);
        for (row, expected) in reduced.matrix.iter().flatten().zip(whole.iter().flatten()) {
            assert!((row - expected).abs() < 1e-9 * ei, "{row} {expected}");
        }
    }

    /// A pinned member without bending at its ends is a string: N/L between its two movements across.
    #[test]
    fn a_pinned_chain_is_a_string() {
        let (ei, l, n) = (3.0e5, 4.0, 5.0e4);
        let chain = Chain::new(vec![0.0, 1.0, 2.0, 3.0, l], ei, 0.0, &Axial::constant(n), true);
        let matrix = chain.reduce(1.0).matrix;
        assert!((matrix[0][0] - n / l).abs() < 1e-6 * n && (matrix[0][2] + n / l).abs() < 1e-6 * n);
    }

    /// Load at the middle of a pinned chain: PL³/48EI (AISC table 3-23, case 7, recalled).
    #[test]
    fn loads_are_carried_and_movements_restored() {
        let (ei, l, p) = (3.0e5, 4.0, 700.0);
        for pinned in [true, false] {
            let chain = Chain::new(vec![0.0, 1.0, 2.0, 3.0, l], ei, 0.0, &Axial::none(), pinned);
            let reduced = chain.reduce(1.0);
            let mut loads = vec![[0.0; 2]; 5];
            loads[2][0] = p;
            let ends = reduced.carry(&mut loads);
            assert!((ends[0] - p / 2.0).abs() < 1e-9 * p && (ends[2] - p / 2.0).abs() < 1e-9 * p);
            let middle = reduced.restore([0.0; 4], &loads)[2][0];
            let expected = p * l.powi(3) / (if pinned { 48.0 } else { 192.0 } * ei);
            assert!((middle / expected - 1.0).abs() < 1e-9, "{middle} {expected}");
        }
    }
}
