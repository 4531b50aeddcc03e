//! A symmetric matrix stored row by row from its first entry to the diagonal, and its factors L·D·Lᵀ.

/// A factorised symmetric matrix. The seam at which another solver can take over.
pub(super) trait Factor {
    /// The pivots: as many are negative as the matrix has negative eigenvalues.
    fn pivots(&self) -> &[f64];
    /// Solves in place.
    fn solve(&self, right: &mut [f64]);
}

/// A symmetric matrix within its envelope.
#[derive(Debug, Clone)]
pub(super) struct Skyline {
    /// First column kept in each row.
    first: Vec<usize>,
    /// Place of each row's first entry in `values`, and the end.
    start: Vec<usize>,
    values: Vec<f64>,
}

impl Skyline {
    /// All zeros; `first` gives the first column of each row, at most the row itself.
    pub(super) fn new(first: Vec<usize>) -> Self {
        let mut start = Vec::with_capacity(first.len() + 1);
        let mut end = 0;
        start.push(0);
        for (row, column) in first.iter().enumerate() {
            end += row + 1 - column;
            start.push(end);
        }
        Self { first, start, values: vec![0.0; end] }
    }

    /// Number of rows.
    pub(super) fn size(&self) -> usize {
        self.first.len()
    }

    fn row(&self, row: usize) -> &[f64] {
        &self.values[self.start[row]..self.start[row + 1]]
    }

    /// Adds to the entry at (i, j) with i ≥ j; the caller keeps within the envelope.
    pub(super) fn add(&mut self, row: usize, column: usize, value: f64) {
        self.values[self.start[row] + column - self.first[row]] += value;
    }

    /// The diagonal.
    pub(super) fn diagonal(&self) -> Vec<f64> {
        (0..self.size()).map(|row| self.values[self.start[row + 1] - 1]).collect()
    }

    /// S·K·S with the diagonal matrix S.
    pub(super) fn scaled(&self, scale: &[f64]) -> Self {
        let mut scaled = self.clone();
        for row in 0..self.size() {
            let columns = &scale[self.first[row]..=row];
            for (value, column) in scaled.values[self.start[row]..self.start[row + 1]].iter_mut().zip(columns) {
                *value *= scale[row] * column;
            }
        }
        scaled
    }

    /// Adds to every entry of the diagonal.
    pub(super) fn shift(&mut self, by: f64) {
        for row in 0..self.size() {
            self.values[self.start[row + 1] - 1] += by;
        }
    }

    /// Largest sum of magnitudes in a row: no eigenvalue is larger.
    pub(super) fn largest_row_sum(&self) -> f64 {
        let mut sums = vec![0.0; self.size()];
        for row in 0..self.size() {
            for (column, value) in (self.first[row]..).zip(self.row(row)) {
                sums[row] += value.abs();
                if column < row {
                    sums[column] += value.abs();
                }
            }
        }
        sums.into_iter().fold(0.0, f64::max)
    }

    /// L·D·Lᵀ without exchange of rows.
    ///
    /// A pivot that vanishes is replaced by one too small to matter, so that signs can be counted and the caller can
    /// look at `pivots` and judge.
    pub(super) fn factorise(mut self) -> Ldl {
        const FLOOR: f64 = 1e-20;
        let size = self.size();
        let mut pivots = vec![0.0; size];
        let mut smallest = f64::INFINITY;
        for row in 0..size {
            let (done, rest) = self.values.split_at_mut(self.start[row]);
            let own = &mut rest[..self.start[row + 1] - self.start[row]];
            let from = self.first[row];
            for column in from..row {
                let other_from = self.first[column];
                let common = from.max(other_from);
                let other = &done[self.start[column]..self.start[column + 1]];
                let left = &own[common.min(column) - from..column - from];
                let right = &other[common.min(column) - other_from..column - other_from];
                let sum: f64 = left.iter().zip(right).map(|(a, b)| a * b).sum();
                own[column - from] -= sum;
            }
            let mut pivot = own[row - from];
            for column in from..row {
                let product = own[column - from];
                let factor = product / pivots[column];
                pivot -= factor * product;
                own[column - from] = factor;
            }
            smallest = smallest.min(pivot);
            if pivot.abs() < FLOOR {
                pivot = FLOOR;
            }
            pivots[row] = pivot;
        }
        Ldl { lower: self, pivots, smallest }
    }
}

/// The factors of a [`Skyline`].
#[derive(Debug, Clone)]
pub(super) struct Ldl {
    lower: Skyline,
    pivots: Vec<f64>,
    /// Smallest pivot met, before any was replaced.
    pub(super) smallest: f64,
}

impl Factor for Ldl {
    fn pivots(&self) -> &[f64] {
        &self.pivots
    }

    fn solve(&self, right: &mut [f64]) {
        let size = self.pivots.len();
        for row in 0..size {
            let entries = self.lower.row(row);
            let from = self.lower.first[row];
            let sum: f64 = entries[..row - from].iter().zip(&right[from..row]).map(|(l, x)| l * x).sum();
            right[row] -= sum;
        }
        for (value, pivot) in right.iter_mut().zip(&self.pivots) {
            *value /= pivot;
        }
        for row in (0..size).rev() {
            let entries = self.lower.row(row);
            let from = self.lower.first[row];
            let known = right[row];
            for (value, l) in right[from..row].iter_mut().zip(entries) {
                *value -= l * known;
            }
        }
    }
}

#[cfg(test)]
mod tests {
    use super::*;

    /// Factors of a matrix with a known solution, and the signs of its eigenvalues (Sylvester's law of inertia).
    #[test]
    fn factors_solve_and_count_signs() {
        // [4 1 0; 1 -3 2; 0 2 5] · [1 2 3] = [6 1 19]; its determinant −81 with a positive 4 means one negative sign.
        let mut matrix = Skyline::new(vec![0, 0, 1]);
        for (row, column, value) in [(0, 0, 4.0), (1, 0, 1.0), (1, 1, -3.0), (2, 1, 2.0), (2, 2, 5.0)] {
            matrix.add(row, column, value);
        }
        let right = [6.0, 1.0, 19.0];
        let factors = matrix.factorise();
        let mut x = right;
        factors.solve(&mut x);
        for (found, expected) in x.iter().zip([1.0, 2.0, 3.0]) {
            assert!((found - expected).abs() < 1e-14);
        }
        assert_eq!(factors.pivots().iter().filter(|pivot| **pivot < 0.0).count(), 1);
    }
}
