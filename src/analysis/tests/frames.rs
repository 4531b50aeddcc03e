//! Beams and frames against closed forms and published examples.
use super::job::{FIXED, PINNED, ROLLER};
use super::{Job, close};
use crate::model::MemberKind;

/// AISC Steel Construction Manual, table 3-23, cases 19 and 22 (recalled): cantilever, load at its end and along it.
#[test]
fn cantilever() {
    let (ei, length, p, w) = (4.0e6, 3.0, 1000.0, 500.0);
    let job = Job::new(&[[0.0, 0.0], [length, 0.0]]).support(0, FIXED).frame(0, 1, 1e9, ei).uniform(-w);
    let job = job.load(1, [0.0, -p, 0.0]);
    let found = job.solve();
    close(found.displacements[1][1], -p * length.powi(3) / (3.0 * ei) - w * length.powi(4) / (8.0 * ei), 0.0);
    close(found.displacements[1][2], -p * length.powi(2) / (2.0 * ei) - w * length.powi(3) / (6.0 * ei), 0.0);
    close(job.start(&found, 0)[2], -p * length - w * length * length / 2.0, 0.0);
    close(job.end(&found, 0)[2], 0.0, p);
}

/// The same deep cantilever with shear: P·L³/3EI + P·L/(G·As), and 12EI/(G·As·L²) = Φ (Timoshenko & Gere, recalled).
#[test]
fn shear_adds_its_own_deflection() {
    let (ei, length, p, shear) = (4.0e6, 3.0, 1000.0, 0.4);
    let job = Job::new(&[[0.0, 0.0], [length, 0.0]]).support(0, FIXED).frame(0, 1, 1e9, ei).shear(shear);
    let rigidity = 12.0 * ei / (shear * length * length);
    let found = job.load(1, [0.0, -p, 0.0]).solve();
    close(found.displacements[1][1], -p * length.powi(3) / (3.0 * ei) - p * length / rigidity, 0.0);
}

/// AISC table 3-23, case 12 (recalled): fixed at one end, propped at the other, uniform load: R = 3wl/8, M = −wl²/8.
#[test]
fn propped_cantilever() {
    let (ei, length, w) = (4.0e6, 5.0, 800.0);
    let job = Job::new(&[[0.0, 0.0], [length, 0.0]]).support(0, FIXED).support(1, ROLLER);
    let job = job.frame(0, 1, 1e9, ei).uniform(-w);
    let found = job.solve();
    close(job.end(&found, 0)[1], -3.0 * w * length / 8.0, 0.0);
    close(job.start(&found, 0)[2], -w * length * length / 8.0, 0.0);
    close(found.displacements[1][2], w * length.powi(3) / (48.0 * ei), 0.0);
}

/// Superposition of AISC table 3-23, cases 19 and 22 (recalled): R = (3wl/8)/(1 + 3EI/kl³) on a spring.
#[test]
fn propped_by_a_spring() {
    let (ei, length, w, k) = (4.0e6, 4.0, 5000.0, 4.0e5);
    let job = Job::new(&[[0.0, 0.0], [length, 0.0]]).support(0, FIXED);
    let job = job.spring(1, [false; 3], [None, Some(k), None]).frame(0, 1, 1e9, ei).uniform(-w);
    let found = job.solve();
    let reaction = 3.0 * w * length / 8.0 / (1.0 + 3.0 * ei / (k * length.powi(3)));
    close(found.displacements[1][1], -reaction / k, 0.0);
    close(job.end(&found, 0)[1], -reaction, 0.0);
}

/// A spring whose far end is moved by δ lifts a cantilever's tip by δ·k/(k + 3EI/l³): two springs in series.
#[test]
fn a_sprung_support_that_settles() {
    let (ei, length, k, sink) = (4.0e6, 4.0, 4.0e5, -0.01);
    let job = Job::new(&[[0.0, 0.0], [length, 0.0]]).support(0, FIXED);
    let job = job.spring(1, [false; 3], [None, Some(k), None]).frame(0, 1, 1e9, ei).settle(1, [0.0, sink, 0.0]);
    close(job.solve().displacements[1][1], sink * k / (k + 3.0 * ei / length.powi(3)), 0.0);
}

/// Slope-deflection (Hibbeler, Structural Analysis, recalled): the middle support of two equal spans sinks by δ, both
/// far ends pinned: M = +3EI·δ/l² over it.
#[test]
fn a_middle_support_sinks() {
    let (ei, length, sink) = (4.0e6, 6.0, 0.012);
    let job = Job::new(&[[0.0, 0.0], [length, 0.0], [2.0 * length, 0.0]]);
    let job = job.support(0, PINNED).support(1, ROLLER).support(2, ROLLER).settle(1, [0.0, -sink, 0.0]);
    let job = job.frame(0, 1, 1e9, ei).frame(1, 2, 1e9, ei);
    let found = job.solve();
    close(job.end(&found, 0)[2], 3.0 * ei * sink / (length * length), 0.0);
    close(found.displacements[1][1], -sink, 0.0);
}

/// D. L. Logan, A First Course in the Finite Element Method, example 5.1 (recalled): portal with fixed feet, 10 000 lb at
/// one corner, 5000 lb·in on the other; inches and pounds, tolerance half a unit of the last place printed.
#[test]
fn logan_example_5_1() {
    let (e, area, column, beam) = (30e6, 10.0, 200.0, 100.0);
    let job = Job::new(&[[0.0, 0.0], [0.0, 120.0], [120.0, 120.0], [120.0, 0.0]]).support(0, FIXED).support(3, FIXED);
    let job = job.frame(0, 1, e * area, e * column).frame(1, 2, e * area, e * beam).frame(2, 3, e * area, e * column);
    let job = job.load(1, [10_000.0, 0.0, 0.0]).load(2, [0.0, 0.0, 5000.0]);
    let found = job.solve();
    let published = [
        (found.displacements[1][0], 0.211, 5e-4),
        (found.displacements[1][1], 0.00148, 5e-6),
        (found.displacements[1][2], -0.00153, 5e-6),
        (found.displacements[2][0], 0.209, 5e-4),
        (found.displacements[2][1], -0.00148, 5e-6),
        (found.displacements[2][2], -0.00149, 5e-6),
        (job.start(&found, 0)[0], 3700.0, 50.0),
        (job.start(&found, 0)[1], 4990.0, 5.0),
        (job.start(&found, 0)[2], -376_000.0, 500.0),
        (job.end(&found, 0)[2], 223_000.0, 500.0),
    ];
    for (found, expected, tolerance) in published {
        assert!((found - expected).abs() <= tolerance, "found {found}, published {expected}");
    }
}

/// A. Kleinlogel, Rigid Frame Formulas, rectangular frame with fixed feet (recalled): M_B = −wl²/6(k + 2) at the corners,
/// M_A = wl²/12(k + 2) at the feet, k = (I2/I1)(h/l), members as good as rigid along their axes.
#[test]
fn kleinlogel_fixed_feet() {
    let (h, l, w) = (4.0, 6.0, 12_000.0);
    let (column, beam) = (210e9 * 8091e-8, 210e9 * 8356e-8);
    let job = Job::new(&[[0.0, 0.0], [0.0, h], [l, h], [l, 0.0]]).support(0, FIXED).support(3, FIXED);
    let rigid = 210e9 * 100.0;
    let job = job.frame(0, 1, rigid, column).frame(2, 3, rigid, column).frame(1, 2, rigid, beam).uniform(-w);
    let found = job.solve();
    let k = (beam / column) * (h / l);
    let near = |found: f64, expected: f64| {
        assert!((found / expected - 1.0).abs() < 1e-6, "found {found}, expected {expected}");
    };
    near(job.start(&found, 2)[2], -w * l * l / (6.0 * (k + 2.0)));
    near(job.start(&found, 0)[2], w * l * l / (12.0 * (k + 2.0)));
    near(job.start(&found, 0)[0], -w * l / 2.0);
}

/// Statics of a three-hinged frame (Hibbeler, Structural Analysis, recalled): H = wl²/8f.
#[test]
fn three_hinged_frame() {
    let (l, f, w) = (12.0, 6.0, 5000.0);
    let job = Job::new(&[[0.0, 0.0], [0.0, f], [l / 2.0, f], [l, f], [l, 0.0]]).support(0, PINNED).support(4, PINNED);
    let job = job.frame(0, 1, 1e9, 1e7).frame(1, 2, 1e9, 1e7).hinge(false, true).uniform(-w);
    let job = job.frame(2, 3, 1e9, 1e7).uniform(-w).frame(3, 4, 1e9, 1e7);
    let found = job.solve();
    close(job.start(&found, 1)[0], -w * l * l / (8.0 * f), 0.0);
    close(job.end(&found, 1)[2], 0.0, w * l * l);
    close(job.start(&found, 1)[2], -w * l * l / 8.0, 0.0);
    // The hinge lets both sides turn, each by itself, the same amount in opposite sense.
    close(found.members[1].rotation[1], -found.members[2].rotation[0], 0.0);
}

/// AISC table 3-23, two equal spans (recalled) with members that only bend: M = −wl²/8 over the middle support.
#[test]
fn beams_on_three_supports() {
    let (l, w) = (6.0, 4000.0);
    let job = Job::new(&[[0.0, 0.0], [l, 0.0], [2.0 * l, 0.0]]);
    let job = job.support(0, PINNED).support(1, ROLLER).support(2, ROLLER);
    let job = job.beam(0, 1, 4e6).uniform(-w).beam(1, 2, 4e6).uniform(-w);
    let solution = job.try_solve().expect("solvable");
    assert_eq!(solution.left_out.len(), 2);
    assert!(solution.left_out.iter().all(|place| place.direction == Some([1.0, 0.0])));
    close(job.end(&solution.combinations[0], 0)[2], -w * l * l / 8.0, 0.0);
}

/// Statics: a bar3 fixed at its start under q per length along it moves q·L²/2EA at its end, 3q·L²/8EA at its middle.
#[test]
fn quadratic_bar() {
    let (ea, l, q) = (6.0e6, 3.0, 4000.0);
    let mut job = Job::new(&[[1.0, 2.0], [1.0 + 0.6 * l, 2.0 + 0.8 * l]]).support(0, PINNED);
    job = job.turned(1, [false, true, false], 0.8f64.atan2(0.6).to_degrees()).member(MemberKind::Bar3, 0, 1, ea, 0.0);
    let (end, middle) = (q * l / 6.0, 4.0 * q * l / 6.0);
    job.loading.members[0].forces = [end, 0.0, 0.0, end, 0.0, 0.0, middle];
    let found = job.solve();
    let moved = q * l * l / (2.0 * ea);
    close(found.displacements[1][0], 0.6 * moved, 0.0);
    close(found.displacements[1][1], 0.8 * moved, 0.0);
    let middle = found.members[0].middle.expect("a middle");
    close(middle[0], 0.6 * 0.75 * moved, 0.0);
    close(middle[1], 0.8 * 0.75 * moved, 0.0);
}
