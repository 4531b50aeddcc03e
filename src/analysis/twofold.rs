//! Sums and products carried in twice the precision of a double, for residuals.

/// The unevaluated sum of two doubles, the second far smaller than the first.
///
/// # Source
/// T. J. Dekker, A floating-point technique for extending the available precision, Numerische Mathematik 18 (recalled).
#[derive(Debug, Clone, Copy, Default)]
pub(super) struct Twofold {
    high: f64,
    low: f64,
}

impl Twofold {
    /// A double as it is.
    pub(super) fn new(value: f64) -> Self {
        Self { high: value, low: 0.0 }
    }

    /// Adds `factor` times `other`.
    pub(super) fn add_product(&mut self, factor: f64, other: Self) {
        let product = factor * other.high;
        let lost = factor.mul_add(other.high, -product) + factor * other.low;
        let sum = self.high + product;
        let moved = sum - self.high;
        let error = (self.high - (sum - moved)) + (product - moved);
        let low = self.low + error + lost;
        self.high = sum + low;
        self.low = low - (self.high - sum);
    }

    /// Rounded to a double.
    pub(super) fn value(self) -> f64 {
        self.high
    }
}

#[cfg(test)]
mod tests {
    use super::*;

    /// 1 + 1e-20 − 1 is 1e-20; the square of 1 + 2⁻³⁰ keeps its last term.
    #[test]
    fn small_parts_survive() {
        let mut sum = Twofold::new(1.0);
        sum.add_product(1e-20, Twofold::new(1.0));
        sum.add_product(-1.0, Twofold::new(1.0));
        assert!((sum.value() - 1e-20).abs() < 1e-35);
        let near_one = 1.0 + f64::powi(2.0, -30);
        let mut square = Twofold::default();
        square.add_product(near_one, Twofold::new(near_one));
        square.add_product(-1.0, Twofold::new(1.0 + f64::powi(2.0, -29)));
        assert!((square.value() - f64::powi(2.0, -60)).abs() < 1e-30);
    }
}
