//! N(x), V(x), M(x) and the deflection from the chord as piecewise polynomials, and where they peak.
//!
//! # Sign convention
//! dN/dx = −w_x, dV/dx = w_y, dM/dx = V; a couple m drops M by m; M = E·I·(v″ − free curvature) while shear
//! deformation adds −V/B_v to the slope.
use super::Polynomial;
use crate::catalogue::load::Local;

/// What is known at the member's ends, and its rigidities.
#[derive(Debug, Clone, Copy, Default)]
pub struct Ends {
    /// Length, m.
    pub length: f64,
    /// Axial force, shear force and moment at the start.
    pub start: [f64; 3],
    /// Rotation of the start relative to the chord, rad.
    pub start_rotation: f64,
    /// Bending rigidity, N·m²; zero where the member does not bend.
    pub bending: f64,
    /// Shear rigidity, N; infinite without shear deformation.
    pub shear: f64,
}

#[derive(Debug, Clone)]
struct Stretch {
    from: f64,
    length: f64,
    n: Polynomial,
    v: Polynomial,
    m: Polynomial,
    /// Deflection from the chord.
    d: Polynomial,
}

/// Section forces and deflection along a member.
#[derive(Debug, Clone)]
pub struct Field {
    length: f64,
    stretches: Vec<Stretch>,
}

/// What is looked at along a member.
#[derive(Debug, Clone, Copy, PartialEq)]
pub enum Quantity {
    /// Axial force.
    N,
    /// Shear force.
    V,
    /// Bending moment.
    M,
    /// Deflection from the chord.
    Deflection,
    /// `axial`·N + `bending`·M, such as a fibre stress.
    Mixed {
        /// Factor on N.
        axial: f64,
        /// Factor on M.
        bending: f64,
    },
}

/// An extreme: its place and its value.
#[derive(Debug, Clone, Copy, PartialEq, Default)]
pub struct Peak {
    /// Distance from the start, m.
    pub x: f64,
    /// Value there.
    pub value: f64,
    /// Whether the place belongs to what follows a jump there.
    pub after: bool,
}

impl Field {
    /// Integrates the loads, each with its factor, from the start.
    #[must_use]
    pub fn new(ends: &Ends, loads: &[(f64, Local)]) -> Self {
        let length = ends.length;
        let mut places = vec![0.0, length];
        for (_, load) in loads {
            match load {
                Local::Line { a, b, .. } => places.extend(a.iter().chain(b.iter()).map(|v| v.si)),
                Local::Point { a, .. } | Local::Couple { a, .. } => places.push(a.si),
                Local::Curvature(_) => {}
            }
        }
        places.retain(|x| (0.0..=length).contains(x));
        places.sort_by(f64::total_cmp);
        places.dedup_by(|a, b| (*a - *b).abs() <= 1e-12 * length);
        let [mut n, mut v, mut m] = ends.start;
        let (mut slope, mut d) = (ends.start_rotation, 0.0);
        let mut stretches = Vec::new();
        for pair in places.windows(2) {
            let (from, to) = (pair[0], pair[1]);
            let h = to - from;
            let (mut along, mut across, mut free) = (Polynomial::default(), Polynomial::default(), 0.0);
            for (factor, load) in loads {
                match load {
                    Local::Line { a, b, along: wx, across: wy } => {
                        let (a, b) = (a.map_or(0.0, |v| v.si), b.map_or(length, |v| v.si));
                        let middle = f64::midpoint(from, to);
                        if middle > a && middle < b {
                            for (sum, pair) in [(&mut along, wx), (&mut across, wy)] {
                                if let Some([first, last]) = pair {
                                    let per_length = (last.si - first.si) / (b - a);
                                    sum.0[0] += factor * (first.si + per_length * (from - a));
                                    sum.0[1] += factor * per_length;
                                }
                            }
                        }
                    }
                    Local::Point { a, along, across } if (a.si - from).abs() <= 1e-12 * length => {
                        n -= factor * along.map_or(0.0, |p| p.si);
                        v += factor * across.map_or(0.0, |p| p.si);
                    }
                    Local::Couple { a, m: couple } if (a.si - from).abs() <= 1e-12 * length => m -= factor * couple.si,
                    Local::Curvature(curvature) => free += factor * curvature.si,
                    Local::Point { .. } | Local::Couple { .. } => {}
                }
            }
            let normal = along.combined(-1.0, &Polynomial::default(), 0.0).integral(n);
            let shear = across.integral(v);
            let moment = shear.integral(m);
            let (turn, deflection) = if ends.bending > 0.0 {
                let mut curvature = moment.combined(1.0 / ends.bending, &Polynomial::default(), 0.0);
                curvature.0[0] += free;
                let turn = curvature.integral(slope);
                let bent = turn.integral(d);
                let mut sheared = moment.combined(-1.0 / ends.shear, &Polynomial::default(), 0.0);
                sheared.0[0] = 0.0;
                (turn, bent.combined(1.0, &sheared, 1.0))
            } else {
                (Polynomial::default(), Polynomial::default())
            };
            n = normal.at(h);
            v = shear.at(h);
            m = moment.at(h);
            slope = turn.at(h);
            d = deflection.at(h);
            stretches.push(Stretch { from, length: h, n: normal, v: shear, m: moment, d: deflection });
        }
        Self { length, stretches }
    }

    /// The value at a place; at a jump, before or after it.
    #[must_use]
    pub fn at(&self, quantity: Quantity, x: f64, after: bool) -> f64 {
        let tolerance = 1e-12 * self.length;
        let found = if after {
            self.stretches.iter().rev().find(|s| x >= s.from - tolerance)
        } else {
            self.stretches.iter().find(|s| x <= s.from + s.length + tolerance)
        };
        found.map_or(0.0, |s| s.polynomial(quantity).at((x - s.from).clamp(0.0, s.length)))
    }

    /// Every place where a quantity can be largest or smallest: ends, jumps, and zeros of its derivative.
    #[must_use]
    pub fn candidates(&self, quantity: Quantity) -> Vec<Peak> {
        let mut peaks = Vec::new();
        for stretch in &self.stretches {
            let polynomial = stretch.polynomial(quantity);
            peaks.push(Peak { x: stretch.from, value: polynomial.at(0.0), after: true });
            for root in polynomial.derivative().roots(stretch.length) {
                peaks.push(Peak { x: stretch.from + root, value: polynomial.at(root), after: true });
            }
            peaks.push(Peak { x: stretch.from + stretch.length, value: polynomial.at(stretch.length), after: false });
        }
        peaks
    }

    /// The candidate with the largest score; what is larger by rounding alone does not displace an earlier one.
    #[must_use]
    pub fn peak(&self, quantity: Quantity, score: impl Fn(f64) -> f64) -> Peak {
        let size = self.stretches.iter().map(|s| s.polynomial(quantity).size(s.length)).fold(0.0, f64::max);
        let mut candidates = self.candidates(quantity).into_iter();
        let first = candidates.next().unwrap_or_default();
        candidates
            .fold(first, |best, peak| if score(peak.value) > score(best.value) + 1e-11 * size { peak } else { best })
    }

    /// Whether the deflection has no kink at a place: only there does its slope vanish at a peak.
    #[must_use]
    pub fn at_slope(&self, x: f64) -> bool {
        let tolerance = 1e-12 * self.length;
        let slope = |after: bool| {
            let stretch = if after {
                self.stretches.iter().rev().find(|s| x >= s.from - tolerance)
            } else {
                self.stretches.iter().find(|s| x <= s.from + s.length + tolerance)
            };
            stretch.map_or(0.0, |s| s.d.derivative().at((x - s.from).clamp(0.0, s.length)))
        };
        let size = self.stretches.iter().map(|s| s.d.derivative().size(s.length)).fold(0.0, f64::max);
        (slope(true) - slope(false)).abs() <= 1e-9 * size
    }

    /// Whether the axial force is the same all along.
    #[must_use]
    pub fn is_steady_axially(&self) -> bool {
        let first = self.stretches.first().map_or(0.0, |s| s.n.0[0]);
        self.stretches.iter().all(|s| s.n.0[1..].iter().all(|c| *c == 0.0) && (s.n.0[0] - first).abs() == 0.0)
    }

    /// Places where the loading or its slope changes, the ends included.
    #[must_use]
    pub fn places(&self) -> Vec<f64> {
        let mut places: Vec<f64> = self.stretches.iter().map(|s| s.from).collect();
        places.push(self.length);
        places
    }
}

impl Stretch {
    fn polynomial(&self, quantity: Quantity) -> Polynomial {
        match quantity {
            Quantity::N => self.n,
            Quantity::V => self.v,
            Quantity::M => self.m,
            Quantity::Deflection => self.d,
            Quantity::Mixed { axial, bending } => self.n.combined(axial, &self.m, bending),
        }
    }
}
