//! Polynomials on a stretch of a member, and the places where they vanish.

/// Coefficients by rising power of the distance from the stretch's beginning.
#[derive(Debug, Clone, Copy, PartialEq, Default)]
pub struct Polynomial(pub [f64; 6]);

impl Polynomial {
    /// The value at a distance.
    #[must_use]
    pub fn at(&self, x: f64) -> f64 {
        self.0.iter().rev().fold(0.0, |sum, coefficient| sum * x + coefficient)
    }

    /// The derivative.
    #[must_use]
    pub fn derivative(&self) -> Self {
        let mut result = [0.0; 6];
        for power in 1..6 {
            result[power - 1] = power as f64 * self.0[power];
        }
        Self(result)
    }

    /// The integral that starts with `constant`; the highest power must be free.
    #[must_use]
    pub fn integral(&self, constant: f64) -> Self {
        let mut result = [constant, 0.0, 0.0, 0.0, 0.0, 0.0];
        for power in 0..5 {
            result[power + 1] = self.0[power] / (power + 1) as f64;
        }
        Self(result)
    }

    /// `self·a + other·b`.
    #[must_use]
    pub fn combined(&self, a: f64, other: &Self, b: f64) -> Self {
        let mut result = [0.0; 6];
        for (power, coefficient) in result.iter_mut().enumerate() {
            *coefficient = a * self.0[power] + b * other.0[power];
        }
        Self(result)
    }

    /// The largest magnitude that its terms reach on a stretch: what rounding is measured against.
    #[must_use]
    pub fn size(&self, length: f64) -> f64 {
        self.0.iter().rev().fold(0.0, |sum, coefficient| sum * length + coefficient.abs())
    }

    /// Places inside (0, length) where it changes sign, in order.
    ///
    /// Between two places where the derivative vanishes it is monotone, so halving finds each exactly.
    #[must_use]
    pub fn roots(&self, length: f64) -> Vec<f64> {
        let tolerance = 1e-13 * self.size(length);
        if self.0[1..].iter().all(|c| *c == 0.0) || tolerance == 0.0 {
            return Vec::new();
        }
        let mut edges = vec![0.0];
        edges.extend(self.derivative().roots(length));
        edges.push(length);
        let mut roots: Vec<f64> = Vec::new();
        for pair in edges.windows(2) {
            let (mut low, mut high) = (pair[0], pair[1]);
            let (at_low, at_high) = (self.at(low), self.at(high));
            if at_low.abs() <= tolerance || at_high.abs() <= tolerance || (at_low > 0.0) == (at_high > 0.0) {
                // A double root touches zero at an edge; ends of the stretch are judged by the caller.
                if at_high.abs() <= tolerance && high < length {
                    roots.push(high);
                }
                continue;
            }
            for _ in 0..200 {
                let middle = f64::midpoint(low, high);
                if middle <= low || middle >= high {
                    break;
                }
                if (self.at(middle) > 0.0) == (at_low > 0.0) {
                    low = middle;
                } else {
                    high = middle;
                }
            }
            roots.push(f64::midpoint(low, high));
        }
        roots.dedup_by(|a, b| (*a - *b).abs() <= 1e-12 * length);
        roots
    }
}

#[cfg(test)]
mod tests {
    use super::*;

    /// (x − 1)(x − 2)(x − 3)(x − 4) expanded by hand.
    #[test]
    fn roots_of_a_quartic() {
        let roots = Polynomial([24.0, -50.0, 35.0, -10.0, 1.0, 0.0]).roots(5.0);
        assert_eq!(roots.len(), 4);
        for (root, expected) in roots.iter().zip([1.0, 2.0, 3.0, 4.0]) {
            assert!((root - expected).abs() < 1e-12);
        }
    }
}
