//! Trusses against closed forms and published examples.
use super::job::{FREE, PINNED, ROLLER};
use super::{Job, close};
use crate::analysis::{Failure, LeftOut};

/// S. Timoshenko, Strength of Materials, part I, three bars meeting (recalled): P/(1 + 2cos³α) in the middle one; warmed
/// or made too long, the middle bar carries −EA·ε·2cos³α/(1 + 2cos³α).
#[test]
fn three_bar_hanger() {
    let (ea, h, p, strain) = (105e6, 2.0, 50_000.0, 4.8e-4);
    let (cos, side) = (30f64.to_radians().cos(), h * 30f64.to_radians().tan());
    let hanger = || {
        let job = Job::new(&[[0.0, 0.0], [-side, h], [0.0, h], [side, h]]);
        job.support(1, PINNED).support(2, PINNED).support(3, PINNED).bar(0, 1, ea).bar(0, 3, ea).bar(0, 2, ea)
    };
    let share = 1.0 + 2.0 * cos.powi(3);
    let job = hanger().load(0, [0.0, -p, 0.0]);
    let found = job.solve();
    close(job.start(&found, 2)[0], p / share, 0.0);
    close(job.start(&found, 0)[0], p * cos * cos / share, 0.0);
    close(found.displacements[0][1], -p / share * h / ea, 0.0);
    let job = hanger().strain(strain);
    let found = job.solve();
    close(job.start(&found, 2)[0], -ea * strain * 2.0 * cos.powi(3) / share, 0.0);
    close(job.start(&found, 1)[0], ea * strain * cos * cos / share, 0.0);
}

/// D. L. Logan, example 3.7 (recalled; the exact figures are 1500/126000 m and 500/126000 m): roller on a 45° slope.
#[test]
fn logan_example_3_7_inclined_roller() {
    let ea = 210e9 * 6e-4;
    let job = Job::new(&[[0.0, 0.0], [0.0, 1.0], [1.0, 1.0]]).support(0, PINNED).support(1, ROLLER);
    let job = job.turned(2, ROLLER, 45.0).bar(0, 1, ea).bar(1, 2, ea).bar(0, 2, ea * 2f64.sqrt());
    let found = job.load(1, [1e6, 0.0, 0.0]).solve();
    close(found.displacements[1][0], 1500.0 / 126_000.0, 0.0);
    close(found.displacements[2][0], 500.0 / 126_000.0, 0.0);
    close(found.displacements[2][1], 500.0 / 126_000.0, 0.0);
}

/// D. L. Logan, example 3.6 (recalled): d1y = (P + k12·0.05)/k22 with joint 1 moved 50 mm to the left.
#[test]
fn logan_example_3_6_imposed_movement() {
    let ea = 210e9 * 6e-4;
    let job = Job::new(&[[0.0, 0.0], [3.0, 4.0], [0.0, 4.0]]).support(0, [true, false, false]);
    let job = job.support(1, PINNED).support(2, PINNED).bar(0, 1, ea).bar(0, 2, ea);
    let job = job.load(0, [0.0, 1e6, 0.0]).settle(0, [-0.05, 0.0, 0.0]);
    let found = job.solve();
    let (k12, k22) = (ea / 5.0 * 0.6 * 0.8, ea / 5.0 * 0.64 + ea / 4.0);
    close(found.displacements[0][1], (1e6 + k12 * 0.05) / k22, 0.0);
    close(found.displacements[0][0], -0.05, 0.0);
    assert!((job.start(&found, 0)[0] - 76_600.0).abs() < 150.0);
    assert!((job.start(&found, 1)[0] + 1.061e6).abs() < 500.0);
}

/// R. C. Hibbeler, Engineering Mechanics: Statics, chapter 6 (recalled): determinate truss by joints.
#[test]
fn hibbeler_determinate_truss() {
    let job = Job::new(&[[0.0, 0.0], [3.0, 4.0], [6.0, 4.0], [6.0, 0.0]]).support(0, ROLLER).support(2, PINNED);
    let job = job.bar(0, 1, 1e8).bar(0, 3, 1e8).bar(3, 1, 1e8).bar(3, 2, 1e8).bar(2, 1, 1e8);
    let job = job.load(1, [0.0, -400.0, 0.0]).load(3, [600.0, 0.0, 0.0]);
    let solution = job.try_solve().expect("solvable");
    assert_eq!(solution.equations, 5);
    assert_eq!(solution.left_out.iter().filter(|place| place.direction.is_none()).count(), 4);
    for (bar, expected) in [-750.0, 450.0, 250.0, -200.0, -600.0].into_iter().enumerate() {
        close(job.start(&solution.combinations[0], bar)[0], expected, 0.0);
    }
}

/// Bars in one oblique line: the node between them moves along the line alone; across it nothing resists, so an
/// unloaded direction is left out and a loaded one refused by name.
#[test]
fn oblique_direction_without_stiffness() {
    let line = || Job::new(&[[0.0, 0.0], [3.0, 4.0], [6.0, 8.0]]).support(0, PINNED).support(2, PINNED);
    let line = || line().bar(0, 1, 1e6).bar(1, 2, 1e6);
    let solution = line().load(1, [600.0, 800.0, 0.0]).try_solve().expect("solvable");
    // Two bars of 5 m share 1000 N: 1000·5/(2·EA).
    close(solution.combinations[0].displacements[1][0], 0.6 * 0.0025, 0.0);
    close(solution.combinations[0].displacements[1][1], 0.8 * 0.0025, 0.0);
    assert!(solution.left_out.contains(&LeftOut { node: 1, direction: Some([-0.8, 0.6]) }));
    let failure = line().load(1, [-80.0, 60.0, 0.0]).try_solve().expect_err("loaded across");
    let Failure::LoadedFreeDirection { combination: 0, node: 1, direction: Some([x, y]), load, .. } = failure else {
        panic!("{failure:?}")
    };
    close(x * load, -80.0, 0.0);
    close(y * load, 60.0, 0.0);
}

/// A couple on a node that bars alone hold has nothing to turn against.
#[test]
fn couple_on_a_truss_node() {
    let job = Job::new(&[[0.0, 0.0], [3.0, 4.0], [6.0, 0.0]]).support(0, PINNED).support(2, PINNED);
    let job = job.bar(0, 1, 1e6).bar(1, 2, 1e6).load(1, [0.0, -10.0, 7.0]);
    let failure = job.try_solve().expect_err("a couple on a pin");
    assert!(matches!(failure, Failure::LoadedFreeDirection { node: 1, direction: None, load, .. } if load > 6.9));
}

/// A node that nothing joins is left out whole and bothers nobody.
#[test]
fn lone_node() {
    let job = Job::new(&[[0.0, 0.0], [3.0, 4.0], [6.0, 0.0], [9.0, 9.0]]).support(0, PINNED).support(2, PINNED);
    let job = job.support(3, FREE).bar(0, 1, 1e6).bar(1, 2, 1e6).load(1, [0.0, -10.0, 0.0]);
    let solution = job.try_solve().expect("solvable");
    assert_eq!(solution.left_out.iter().filter(|place| place.node == 3).count(), 3);
}
