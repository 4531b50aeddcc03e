//! The axial force along a member: straight between given points, with jumps.

/// Axial force along a member.
#[derive(Debug, Clone, Default)]
pub(super) struct Axial {
    /// Distance from the start and force there, tension positive; two points at one place are a jump.
    points: Vec<(f64, f64)>,
}

impl Axial {
    pub(super) fn new(points: &[(f64, f64)]) -> Self {
        Self { points: points.to_vec() }
    }

    /// No force at all.
    pub(super) fn none() -> Self {
        Self::default()
    }

    /// The same force everywhere.
    #[cfg(test)]
    pub(super) fn constant(force: f64) -> Self {
        Self { points: vec![(0.0, force)] }
    }

    /// The force, where it is the same everywhere.
    pub(super) fn constant_force(&self) -> Option<f64> {
        let (_, first) = self.points.first().copied().unwrap_or_default();
        self.points.iter().all(|(_, force)| (force - first).abs() <= 1e-12 * first.abs()).then_some(first)
    }

    /// Largest magnitude.
    pub(super) fn largest(&self) -> f64 {
        self.points.iter().fold(0.0, |most: f64, (_, force)| most.max(force.abs()))
    }

    /// Largest compression, a magnitude; 0 where there is none.
    pub(super) fn compression(&self) -> f64 {
        self.points.iter().fold(0.0, |most: f64, (_, force)| most.max(-force))
    }

    /// Places inside a member where the force bends or jumps.
    pub(super) fn breaks(&self, length: f64) -> impl Iterator<Item = f64> {
        let margin = 1e-6 * length;
        self.points.iter().map(|(place, _)| *place).filter(move |place| *place > margin && *place < length - margin)
    }

    /// Force at both ends of a stretch without breaks.
    pub(super) fn straight_within(&self, from: f64, to: f64) -> [f64; 2] {
        let middle = 0.5 * (from + to);
        let after = self.points.partition_point(|(place, _)| *place <= middle);
        let (Some(left), Some(right)) = (self.points.get(after.wrapping_sub(1)), self.points.get(after)) else {
            // Beyond the first or the last point the force goes on unchanged.
            let nearest = if after == 0 { self.points.first() } else { self.points.last() };
            return [nearest.map_or(0.0, |(_, force)| *force); 2];
        };
        let slope = (right.1 - left.1) / (right.0 - left.0);
        [from, to].map(|place| left.1 + slope * (place - left.0))
    }

    /// Mean over the length.
    pub(super) fn mean(&self, length: f64) -> f64 {
        let mut places = vec![0.0];
        places.extend(self.breaks(length));
        places.push(length);
        let parts = places.windows(2).map(|pair| {
            let [start, end] = self.straight_within(pair[0], pair[1]);
            0.5 * (start + end) * (pair[1] - pair[0])
        });
        parts.sum::<f64>() / length
    }
}

#[cfg(test)]
mod tests {
    use super::*;

    #[test]
    fn a_jump_is_seen_from_both_sides() {
        let axial = Axial::new(&[(0.0, -10.0), (1.0, -10.0), (1.0, 4.0), (4.0, 16.0)]);
        assert_eq!(axial.breaks(4.0).collect::<Vec<f64>>(), [1.0, 1.0]);
        let [a, b] = axial.straight_within(0.0, 1.0);
        let [c, d] = axial.straight_within(1.0, 2.5);
        for (found, expected) in [(a, -10.0), (b, -10.0), (c, 4.0), (d, 10.0), (axial.mean(4.0), 5.0)] {
            assert!((found - expected).abs() < 1e-12, "{found} {expected}");
        }
    }
}
