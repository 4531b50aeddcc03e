//! Critical loads against closed forms.
use super::Job;
use super::job::{FIXED, PINNED, ROLLER};
use crate::analysis::{CriticalLoad, critical_load};
use crate::model::MemberKind;
use std::f64::consts::PI;

fn critical(job: &Job, axial: &[Vec<(f64, f64)>]) -> Option<CriticalLoad> {
    critical_load(&job.structure, axial, &vec![false; job.structure.members.len()]).expect("fits")
}

fn constant(forces: &[f64]) -> Vec<Vec<(f64, f64)>> {
    forces.iter().map(|force| vec![(0.0, *force)]).collect()
}

/// Within 0.002 %.
fn check(job: &Job, axial: &[Vec<(f64, f64)>], expected: f64) -> CriticalLoad {
    let found = critical(job, axial).expect("something buckles");
    assert!((found.factor / expected - 1.0).abs() < 2e-5, "found {}, expected {expected}", found.factor);
    let points = || found.mode.iter().flatten().map(|(_, [x, y])| x.hypot(*y));
    assert!((points().fold(0.0, f64::max) - 1.0).abs() < 1e-12);
    found
}

/// Root by bisection between a place where the function is negative and one where it is positive.
fn root(function: impl Fn(f64) -> f64, mut low: f64, mut high: f64) -> f64 {
    for _ in 0..100 {
        let middle = 0.5 * (low + high);
        if function(middle) > 0.0 { high = middle } else { low = middle }
    }
    low
}

const EI: f64 = 210e9 * 257e-8;
const L: f64 = 3.0;

fn column(turn: f64) -> Job {
    let (s, c) = turn.to_radians().sin_cos();
    Job::new(&[[1.0, 1.0], [1.0 + L * c, 1.0 + L * s]]).frame(0, 1, 3.6e8, EI)
}

/// Timoshenko & Gere, Theory of Elastic Stability, chapter 2 (recalled): π²/4, π², 20.19 (tan u = u), 4π² times EI/l²,
/// whatever way the column stands.
#[test]
fn euler_columns() {
    let unit = EI / (L * L) / 100e3;
    let tangent = root(|u| u.sin() - u * u.cos(), 4.6, 4.4).powi(2);
    for turn in [90.0, 0.0, 217.0] {
        let forces = constant(&[-100e3]);
        let along = [false, true, false];
        let held = [false, true, true];
        check(&column(turn).support(0, FIXED), &forces, PI * PI / 4.0 * unit);
        check(&column(turn).support(0, PINNED).turned(1, along, turn), &forces, PI * PI * unit);
        check(&column(turn).support(0, FIXED).turned(1, along, turn), &forces, tangent * unit);
        check(&column(turn).support(0, FIXED).turned(1, held, turn), &forces, 4.0 * PI * PI * unit);
    }
}

/// Nothing is left to solve for at the nodes when both ends are fixed: the member bows between them.
#[test]
fn fixed_at_both_ends() {
    let job = column(0.0).support(0, FIXED).support(1, FIXED);
    let found = check(&job, &constant(&[-1e5]), 4.0 * PI * PI * EI / (L * L) / 1e5);
    // The shape is 1 − cos(2πx/l): a half at the quarter points.
    let quarter = found.mode[0].iter().min_by(|a, b| (a.0 - L / 4.0).abs().total_cmp(&(b.0 - L / 4.0).abs()));
    let (x, [_, v]) = quarter.expect("points");
    let expected = 0.5 * (1.0 - (2.0 * PI * x / L).cos());
    assert!((v - expected).abs() < 1e-3, "found {v} at {x}, expected {expected}");
}

/// Timoshenko & Gere, 2.17 (recalled), a pin-ended column with shear: P = Pe/(1 + Pe/(G·As)).
#[test]
fn shear_lowers_the_load() {
    for flexibility in [0.05, 0.3, 1.2] {
        let job = column(0.0).shear(flexibility).support(0, PINNED).support(1, ROLLER);
        let (euler, shear) = (PI * PI * EI / (L * L), 12.0 * EI / (flexibility * L * L));
        check(&job, &constant(&[-1.0]), euler / (1.0 + euler / shear));
    }
}

/// Timoshenko & Gere, 2.12 (recalled): a column under its own weight, fixed at its foot: q·l = 7.837·EI/l². Rederived:
/// the first zero of J₋₁/₃(⅔·√(q·l³/EI)).
#[test]
fn own_weight() {
    // J₋₁/₃(z)·(z/2)^⅓ as its power series in z²/4 = q·l³/9EI.
    let series = |t: f64| {
        let (mut term, mut sum) = (1.0, 1.0);
        for k in 1..40 {
            term *= -t / (f64::from(k) * (f64::from(k) - 1.0 / 3.0));
            sum += term;
        }
        -sum
    };
    let expected = 9.0 * root(series, 0.5, 1.2);
    assert!((expected - 7.837).abs() < 1e-3);
    let job = column(90.0).support(0, FIXED);
    check(&job, &[vec![(0.0, -1.0), (L, 0.0)]], expected * EI / (L * L));
}

/// A load half-way up a column that is fixed at its foot: the free upper half rests on a cantilever of half the length.
#[test]
fn load_half_way_up() {
    let job = column(90.0).support(0, FIXED);
    let axial = vec![(0.0, -1.0), (L / 2.0, -1.0), (L / 2.0, 0.0), (L, 0.0)];
    check(&job, &[axial], PI * PI * EI / (L * L));
}

/// Timoshenko & Gere, chapter 2, buckling of frames (recalled): portal free to sway, load on each column, pinned feet
/// kh·tan kh = 6I₂h/(I₁l), fixed feet kh/tan kh = −6I₂h/(I₁l).
#[test]
fn portals() {
    let (h, ei, rigid) = (4.0, 200e9 * 2000e-8, 2e13);
    let portal = || {
        let job = Job::new(&[[0.0, 0.0], [0.0, h], [h, h], [h, 0.0]]);
        job.frame(0, 1, rigid, ei).frame(1, 2, rigid, ei).frame(3, 2, rigid, ei)
    };
    let forces = constant(&[-1e5, 0.0, -1e5]);
    let pinned = root(|u| u * u.tan() - 6.0, 1.0, 1.5);
    let fixed = root(|u| u * u.cos() + 6.0 * u.sin(), 3.1, 1.6);
    assert!((pinned - 1.349_553).abs() < 1e-6 && (fixed - 2.716_460).abs() < 1e-6);
    let unit = ei / (h * h) / 1e5;
    let found = check(&portal().support(0, PINNED).support(3, PINNED), &forces, pinned * pinned * unit);
    // It sways: both corners move sideways together.
    assert!((found.mode[1][0].1[0] - found.mode[1].last().expect("points").1[0]).abs() < 1e-6);
    check(&portal().support(0, FIXED).support(3, FIXED), &forces, fixed * fixed * unit);
}

/// A column on a rotational spring, free above: u·tan u = k·l/EI (Timoshenko & Gere, recalled).
#[test]
fn spring_at_the_foot() {
    let k = 2.0 * EI / L;
    let job = column(90.0).spring(0, [true, true, false], [None, None, Some(k)]);
    let u = root(|u| u * u.tan() - 2.0, 0.5, 1.5);
    check(&job, &constant(&[-1.0]), u * u * EI / (L * L));
}

/// A bar between its nodes is a pin-ended strut; without second moment of area it does not bow, and there is no load.
#[test]
fn bars_as_struts() {
    let strut = |ei: f64, kind| {
        let job = Job::new(&[[0.0, 0.0], [L, 0.0], [0.0, L]]).support(0, PINNED).support(2, PINNED);
        job.member(kind, 0, 1, 3.6e8, ei).member(kind, 1, 2, 3.6e8, ei)
    };
    let forces = constant(&[-1e5, 1e5]);
    for kind in [MemberKind::Bar, MemberKind::Bar3] {
        check(&strut(EI, kind), &forces, PI * PI * EI / (L * L) / 1e5);
    }
    assert!(critical(&strut(EI, MemberKind::Bar), &constant(&[1.0, 2.0])).is_none());
    assert!(critical(&strut(0.0, MemberKind::Bar), &forces).is_none());
}

/// A post pinned at both ends leans on a cantilever beside it: P/h = 3EI/h³.
#[test]
fn leaning_post() {
    let h = 4.0;
    let job = Job::new(&[[0.0, 0.0], [0.0, h], [5.0, h], [5.0, 0.0]]).support(0, FIXED).support(3, PINNED);
    let job = job.frame(0, 1, 1e13, EI).bar(1, 2, 1e13).bar(3, 2, 1e13);
    let found = check(&job, &constant(&[0.0, 0.0, -1000.0]), 3.0 * EI / (h * h) / 1000.0);
    assert_eq!(found.without_inertia, [2]);
}

/// Bars in one line hold their middle node sideways only while they pull.
#[test]
fn bars_in_one_line() {
    let line = Job::new(&[[0.0, 0.0], [3.0, 4.0], [6.0, 8.0]]).support(0, PINNED).support(2, PINNED);
    let line = line.member(MemberKind::Bar, 0, 1, 1e8, EI).member(MemberKind::Bar, 1, 2, 1e8, EI);
    let found = critical(&line, &constant(&[-1.0, -1.0])).expect("unstable");
    assert!(found.factor.abs() < 1e-12);
    assert!((found.mode[0].last().expect("points").1[1].abs() - 0.6).abs() < 1e-6);
    assert!(critical(&line, &constant(&[1.0, 1.0])).is_none());
    // Pull in one against push in the other, 2 to 1: the node is held, and the pushed bar buckles by itself.
    check(&line, &constant(&[2.0, -1.0]), root(|p| -string_and_strut(p), 0.5, 1.5) * PI * PI * EI / 25.0);
}

/// Sideways stiffness of that node is (2 − 1)·P/L at any load: the strut buckles at its Euler load first.
fn string_and_strut(p: f64) -> f64 {
    if p < 1.0 { 1.0 } else { -1.0 }
}

/// Two equal columns apart from each other: the factor is that of each, though it is a double one.
#[test]
fn repeated_factors() {
    let job = Job::new(&[[0.0, 0.0], [0.0, L], [5.0, 0.0], [5.0, L]]).support(0, FIXED).support(2, FIXED);
    let job = job.frame(0, 1, 1e9, EI).frame(2, 3, 1e9, EI);
    check(&job, &constant(&[-1.0, -1.0]), PI * PI * EI / (4.0 * L * L));
}

/// A column that is pinned at both ends and held at its middle buckles in two half-waves: 4π²EI/l².
#[test]
fn two_half_waves() {
    let job = Job::new(&[[0.0, 0.0], [0.0, L / 2.0], [0.0, L]]).support(0, PINNED).support(1, [true, false, false]);
    let job = job.support(2, [true, false, false]).frame(0, 1, 1e9, EI).frame(1, 2, 1e9, EI);
    check(&job, &constant(&[-1.0, -1.0]), 4.0 * PI * PI * EI / (L * L));
}

/// A load 2P half-way up a column held sideways at both ends pushes the lower half and pulls the upper one with P each.
///
/// With the middle out by v the supports push back P·v/h at both ends (the couple of the load, h = l/2), so that the
/// moment vanishes at the middle too: EIv″ = −Pv + P·v(h)·x/h below and the same with +P above. The solutions are
/// straight lines with a·sin(kx) below, where a·sin(kh) = 0, and b·sinh(ky) above, where b = 0: the lower half bows by
/// itself and P = π²EI/h².
#[test]
fn pull_above_push_below() {
    let job = Job::new(&[[0.0, 0.0], [0.0, L / 2.0], [0.0, L]]).support(0, PINNED).support(2, [true, false, false]);
    let job = job.frame(0, 1, 1e9, EI).frame(1, 2, 1e9, EI);
    check(&job, &constant(&[-1.0, 1.0]), (2.0 * PI / L).powi(2) * EI);
}

/// Turning a frame with a hinge, a spring and a turned roller leaves its factor as it is.
#[test]
fn turning_the_frame_keeps_the_factor() {
    let frame = |turn: f64| {
        let (s, c) = turn.to_radians().sin_cos();
        let nodes = [[0.0, 0.0], [0.0, 4.0], [5.0, 4.5], [5.5, 0.0]].map(|[x, y]| [c * x - s * y, s * x + c * y]);
        let mut job =
            Job::new(&nodes).turned(0, PINNED, turn).turned(3, ROLLER, turn + 10.0).turned(1, [false; 3], turn);
        job.structure.supports[2].spring = [Some(2e5), None, Some(1e5)];
        let job = job.frame(0, 1, 1e8, EI).frame(1, 2, 1e8, EI).hinge(false, true).frame(2, 3, 1e8, EI);
        critical(&job, &[vec![(0.0, -3e4), (4.0, -2e4)], vec![(0.0, -4e3)], vec![(0.0, -2e4)]]).expect("buckles").factor
    };
    let straight = frame(0.0);
    for turn in [33.0, 90.0, 200.0] {
        assert!((frame(turn) / straight - 1.0).abs() < 1e-6);
    }
}
