//! The classics among mechanisms, each told as what moves and how.
use super::Job;
use super::job::{FIXED, PINNED, ROLLER};
use crate::analysis::{Failure, Motion, Names, describe};

fn motions(job: &Job) -> Vec<Motion> {
    match job.try_solve() {
        Err(Failure::Mechanism { motions, .. }) => motions,
        other => panic!("{other:?}"),
    }
}

fn only(job: &Job) -> Motion {
    let mut motions = motions(job);
    assert_eq!(motions.len(), 1, "{motions:?}");
    motions.remove(0)
}

fn assert_turns(motion: &Motion, expected: &[usize], [x, y]: [f64; 2], expected_whole: bool) {
    let Motion::Turns { nodes, about, whole } = motion else { panic!("{motion:?}") };
    assert_eq!((nodes.as_slice(), *whole), (expected, expected_whole));
    assert!((about[0] - x).hypot(about[1] - y) < 1e-6, "{about:?}");
}

#[test]
fn no_support_at_all() {
    let job = Job::new(&[[0.0, 0.0], [4.0, 0.0]]).frame(0, 1, 1e9, 1e6);
    assert_eq!(job.try_solve().err(), Some(Failure::NoSupport));
}

#[test]
fn no_horizontal_support() {
    let job = Job::new(&[[0.0, 0.0], [4.0, 0.0], [8.0, 0.0]]).support(0, ROLLER).support(2, ROLLER);
    let job = job.frame(0, 1, 1e9, 1e6).frame(1, 2, 1e9, 1e6);
    assert_eq!(only(&job), Motion::Slides { nodes: vec![0, 1, 2], direction: [1.0, 0.0], whole: true });
}

#[test]
fn truss_on_two_rollers() {
    let job = Job::new(&[[0.0, 0.0], [4.0, 0.0], [2.0, 3.0]]).support(0, ROLLER).support(1, ROLLER);
    let job = job.bar(0, 1, 1e8).bar(1, 2, 1e8).bar(2, 0, 1e8);
    assert_eq!(only(&job), Motion::Slides { nodes: vec![0, 1, 2], direction: [1.0, 0.0], whole: true });
}

#[test]
fn three_parallel_rollers_on_a_slope() {
    let job = Job::new(&[[0.0, 0.0], [3.0, 0.0], [6.0, 0.0]]).turned(0, ROLLER, 30.0).turned(1, ROLLER, 30.0);
    let job = job.turned(2, ROLLER, 30.0).frame(0, 1, 1e9, 1e6).frame(1, 2, 1e9, 1e6);
    let Motion::Slides { nodes, direction, whole: true } = only(&job) else { panic!() };
    assert_eq!(nodes, [0, 1, 2]);
    assert!((direction[0] - 0.75f64.sqrt()).abs() < 1e-7 && (direction[1] - 0.5).abs() < 1e-7);
}

#[test]
fn rollers_whose_lines_meet() {
    // Rollers at (0,0) and (6,0) held along lines at 45° through (3,3); the one at (3,0) held vertically.
    let job = Job::new(&[[0.0, 0.0], [3.0, 0.0], [6.0, 0.0]]).turned(0, ROLLER, -45.0).support(1, ROLLER);
    let job = job.turned(2, ROLLER, 45.0).frame(0, 1, 1e9, 1e6).frame(1, 2, 1e9, 1e6);
    assert_turns(&only(&job), &[0, 1, 2], [3.0, 3.0], true);
}

#[test]
fn pinned_at_one_node_only() {
    let job = Job::new(&[[1.0, 2.0], [4.0, 2.0], [4.0, 5.0]]).support(0, PINNED);
    let job = job.frame(0, 1, 1e9, 1e6).frame(1, 2, 1e9, 1e6);
    assert_turns(&only(&job), &[1, 2], [1.0, 2.0], true);
    let single = Job::new(&[[1.0, 2.0], [4.0, 2.0]]).support(0, PINNED).frame(0, 1, 1e9, 1e6);
    assert_turns(&only(&single), &[1], [1.0, 2.0], true);
}

#[test]
fn one_roller_only() {
    let job = Job::new(&[[0.0, 0.0], [4.0, 1.0]]).support(0, ROLLER).frame(0, 1, 1e9, 1e6);
    let found = motions(&job);
    assert_eq!(found.len(), 2);
    assert_eq!(found[0], Motion::Slides { nodes: vec![0, 1], direction: [1.0, 0.0], whole: true });
    assert_turns(&found[1], &[1], [0.0, 0.0], true);
}

#[test]
fn four_bar_parallelogram() {
    let job = Job::new(&[[0.0, 0.0], [0.0, 3.0], [5.0, 3.0], [5.0, 0.0]]).support(0, PINNED).support(3, PINNED);
    let job = job.frame(0, 1, 1e9, 1e6).frame(1, 2, 1e9, 1e6).hinge(true, true).frame(2, 3, 1e9, 1e6);
    assert_eq!(only(&job), Motion::Slides { nodes: vec![1, 2], direction: [1.0, 0.0], whole: false });
}

#[test]
fn truss_panel_without_diagonal() {
    let job = Job::new(&[[0.0, 0.0], [3.0, 0.0], [6.0, 0.0], [0.0, 3.0], [3.0, 3.0], [6.0, 3.0]]);
    let job = job.support(0, PINNED).support(2, ROLLER);
    let job = job.bar(0, 1, 1e8).bar(1, 2, 1e8).bar(3, 4, 1e8).bar(4, 5, 1e8);
    let job = job.bar(0, 3, 1e8).bar(1, 4, 1e8).bar(2, 5, 1e8).bar(0, 4, 1e8);
    let Motion::Moves { nodes } = only(&job) else { panic!("{:?}", only(&job)) };
    assert!(nodes.iter().all(|(node, _)| *node != 0 && *node != 2));
}

#[test]
fn beam_on_three_hinges_in_line() {
    let job = Job::new(&[[0.0, 0.0], [4.0, 0.0], [8.0, 0.0]]).support(0, PINNED).support(2, PINNED);
    let job = job.frame(0, 1, 1e9, 1e6).frame(1, 2, 1e9, 1e6).hinge(true, false);
    assert_eq!(only(&job), Motion::Slides { nodes: vec![1], direction: [0.0, 1.0], whole: false });
}

/// The middle link of three turns about the point where the lines of the outer ones meet: y = 2x and y = −1.5(x − 6).
#[test]
fn chain_of_hinges() {
    let job = Job::new(&[[0.0, 0.0], [1.0, 2.0], [4.0, 3.0], [6.0, 0.0]]).support(0, PINNED).support(3, PINNED);
    let job = job.frame(0, 1, 1e9, 1e6).hinge(false, true).frame(1, 2, 1e9, 1e6).hinge(false, true);
    let job = job.frame(2, 3, 1e9, 1e6);
    assert_turns(&only(&job), &[1, 2], [18.0 / 7.0, 36.0 / 7.0], false);
}

/// Five links: what moves is told node by node, the first one square to its link.
#[test]
fn long_chain_of_hinges() {
    let job = Job::new(&[[0.0, 0.0], [1.0, 2.0], [3.0, 3.0], [5.0, 3.0], [7.0, 0.0]]).support(0, PINNED);
    let job = job.support(4, PINNED).bar(0, 1, 1e8).bar(1, 2, 1e8).bar(2, 3, 1e8).bar(3, 4, 1e8);
    let found = motions(&job);
    assert_eq!(found.len(), 2);
    for motion in found {
        if let Motion::Moves { nodes } = motion {
            for (_, [x, y, _]) in nodes.iter().filter(|(node, _)| *node == 1) {
                assert!((x + 2.0 * y).abs() < 1e-6);
            }
        }
    }
}

#[test]
fn part_of_two_floats() {
    let job = Job::new(&[[0.0, 0.0], [4.0, 0.0], [0.0, 5.0], [4.0, 5.0]]).support(0, FIXED);
    let job = job.frame(0, 1, 1e9, 1e6).frame(2, 3, 1e9, 1e6);
    assert_eq!(only(&job), Motion::Floats { nodes: vec![2, 3] });
}

#[test]
fn stub_behind_a_hinge() {
    let job = Job::new(&[[0.0, 0.0], [4.0, 0.0], [6.0, 0.0]]).support(0, FIXED);
    let job = job.frame(0, 1, 1e9, 1e6).frame(1, 2, 1e9, 1e6).hinge(true, false);
    assert_eq!(only(&job), Motion::MemberSpins { member: 1, about: 1 });
}

#[test]
fn arm_behind_a_hinge_turns() {
    let job = Job::new(&[[0.0, 0.0], [4.0, 0.0], [6.0, 0.0], [6.0, 2.0]]).support(0, FIXED);
    let job = job.frame(0, 1, 1e9, 1e6).frame(1, 2, 1e9, 1e6).hinge(true, false).frame(2, 3, 1e9, 1e6);
    assert_turns(&only(&job), &[2, 3], [4.0, 0.0], false);
}

#[test]
fn two_mechanisms_are_told_apart() {
    let job = Job::new(&[[0.0, 0.0], [4.0, 0.0], [20.0, 0.0], [24.0, 0.0]]).support(0, ROLLER).support(1, ROLLER);
    let job = job.support(2, PINNED).frame(0, 1, 1e9, 1e6).frame(2, 3, 1e9, 1e6);
    let found = motions(&job);
    assert_eq!(found.len(), 2);
    assert_eq!(found[0], Motion::Slides { nodes: vec![0, 1], direction: [1.0, 0.0], whole: true });
    assert_turns(&found[1], &[3], [20.0, 0.0], true);
}

/// A soft structure beside a very stiff one is solved, not taken for a mechanism.
#[test]
fn stiff_beside_soft_is_no_mechanism() {
    let job = Job::new(&[[0.0, 0.0], [3.0, 4.0], [6.0, 8.0]]).support(0, FIXED).frame(0, 1, 1e13, 1e5);
    let job = job.frame(1, 2, 1e13, 1e5).load(2, [-0.8, 0.6, 0.0]);
    let tip = job.try_solve().expect("solvable").combinations[0].displacements[2];
    let moved = -0.8 * tip[0] + 0.6 * tip[1];
    assert!((moved / (1000.0 / 3e5) - 1.0).abs() < 1e-5, "{moved}");
}

#[test]
fn told_in_the_users_names() {
    let names: Vec<String> = ["A", "B", "C"].map(String::from).to_vec();
    let names = Names { nodes: &names, ..Names::default() };
    let text = describe(&Motion::Slides { nodes: vec![0, 1, 2], direction: [1.0, 0.0], whole: true }, &names);
    assert!(text.starts_with("the part with nodes `A`, `B` and `C` can slide horizontally"), "{text}");
    let text = describe(&Motion::Turns { nodes: vec![0, 2], about: [3.0, 1.5], whole: false }, &names);
    assert!(text.starts_with("nodes `A` and `C` can turn about the point x = 3 m, y = 1.5 m"), "{text}");
}

/// A stiff bar that only a spring 10¹⁴ times softer keeps from sliding: no mechanism, but no digits either.
#[test]
fn a_spring_far_too_soft() {
    let job = Job::new(&[[0.0, 0.0], [1.0, 0.0]]).support(0, ROLLER);
    let job = job.spring(1, ROLLER, [Some(1e-5), None, None]).bar(0, 1, 1e9).load(0, [1.0, 0.0, 0.0]);
    let failure = job.try_solve().expect_err("no digits left");
    assert!(matches!(failure, Failure::Untrustworthy { condition } if condition > 1e12), "{failure:?}");
}

/// Numbers that do not fit are refused, not indexed with.
#[test]
fn numbers_that_do_not_fit() {
    let sound = || Job::new(&[[0.0, 0.0], [4.0, 0.0]]).support(0, FIXED).frame(0, 1, 1e9, 1e6);
    let mut jobs = vec![sound(); 6];
    jobs[0].structure.members[0].to = 7;
    jobs[1].structure.members[0].stiffness.pop();
    jobs[2].structure.nodes[1] = [0.0, 0.0];
    jobs[3].loading.nodes.pop();
    jobs[4].loading.settlements.push((1, [0.0, 1.0, 0.0]));
    jobs[5].loading.nodes[1][0] = f64::NAN;
    for job in jobs {
        let failure = job.try_solve().expect_err("does not fit");
        assert!(matches!(failure, Failure::Inconsistent { .. }), "{failure:?}");
    }
}

#[test]
fn failures_in_the_users_names() {
    let nodes = ["A", "B"].map(String::from);
    let members = ["AB", "BC"].map(String::from);
    let combinations = ["C1"].map(String::from);
    let names = Names { nodes: &nodes, members: &members, combinations: &combinations };
    let failure = Failure::LoadedFreeDirection {
        combination: 0,
        node: 1,
        direction: Some([0.0, 1.0]),
        load: -1250.0,
        slack: vec![1],
    };
    let text = failure.describe(&names).remove(0);
    let expected = "node `B` is free to move vertically: nothing there resists it, and combination `C1` loads it with \
                    -1250 N, with `BC` slack.";
    assert!(text.starts_with(expected), "{text}");
    let motions = vec![Motion::MemberSpins { member: 1, about: 0 }];
    let failure = Failure::Mechanism { motions, combination: None, slack: Vec::new() };
    assert!(failure.describe(&names)[0].starts_with("member `BC` can turn freely about node `A`"));
}
