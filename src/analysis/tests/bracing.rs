//! Bars that carry no compression.
use super::job::{PINNED, ROLLER};
use super::{Job, close};
use crate::analysis::{Failure, MemberLoading, solve};

/// A pin-jointed panel 4 m × 3 m on pinned feet with crossed braces (0-2 and 3-1) that carry tension only.
fn panel() -> Job {
    let job = Job::new(&[[0.0, 0.0], [0.0, 3.0], [4.0, 3.0], [4.0, 0.0]]).support(0, PINNED).support(3, PINNED);
    let job = job.bar(0, 1, 1e8).bar(1, 2, 1e8).bar(2, 3, 1e8);
    job.bar(0, 2, 1e7).tension_only().bar(3, 1, 1e7).tension_only()
}

/// Statics of the panel with the compressed brace away: brace 60·5/4, top −60, far post −75·3/5.
#[test]
fn crossed_braces() {
    for (force, taut, slack) in [(60_000.0, 3, 4), (-60_000.0, 4, 3)] {
        let job = panel().load(if force > 0.0 { 1 } else { 2 }, [force, 0.0, 0.0]);
        let found = job.solve();
        assert!(found.members[slack].slack && !found.members[taut].slack);
        close(job.start(&found, taut)[0], 75_000.0, 0.0);
        close(job.start(&found, slack)[0], 0.0, 1.0);
        close(job.start(&found, 1)[0], -60_000.0, 0.0);
        close(job.start(&found, if force > 0.0 { 2 } else { 0 })[0], -45_000.0, 0.0);
    }
}

/// Two combinations, each with its own slack brace, in one run.
#[test]
fn each_combination_by_itself() {
    let job = panel();
    let mut loadings = vec![job.loading.clone(), job.loading.clone()];
    loadings[0].nodes[1][0] = 100.0;
    loadings[1].nodes[2][0] = -100.0;
    let solution = solve(&job.structure, &loadings).expect("solvable");
    let slack =
        |combination: usize| solution.combinations[combination].members.iter().map(|m| m.slack).collect::<Vec<_>>();
    assert_eq!(slack(0), [false, false, false, false, true]);
    assert_eq!(slack(1), [false, false, false, true, false]);
}

/// Posts that shorten press both braces: taking both away would leave a mechanism. One goes, the other then carries
/// nothing (the panel is determinate).
#[test]
fn both_braces_pressed() {
    let job = panel().load(1, [0.0, -5e4, 0.0]).load(2, [0.0, -5e4, 0.0]);
    let found = job.solve();
    assert_eq!(found.members.iter().filter(|member| member.slack).count(), 1);
    close(job.start(&found, 0)[0], -5e4, 0.0);
    close(job.start(&found, 3)[0], 0.0, 5e4);
    close(job.start(&found, 4)[0], 0.0, 5e4);
}

/// One brace alone, pressed: without it the panel is a mechanism, and the slack brace is named.
#[test]
fn a_single_pressed_brace() {
    let mut job = panel();
    job.structure.members.pop();
    job.loading.members.pop();
    let failure = job.load(2, [-1000.0, 0.0, 0.0]).try_solve().expect_err("nothing braces it");
    let Failure::Mechanism { combination: Some(0), slack, motions } = failure else { panic!("{failure:?}") };
    assert_eq!(slack, [3]);
    assert_eq!(motions.len(), 1);
}

/// A taut wire that is warmed by more than its stretch goes slack and takes no compression; the beam then carries all.
#[test]
fn a_warmed_wire_goes_slack() {
    let job = Job::new(&[[0.0, 0.0], [4.0, 0.0], [4.0, 3.0]]).support(0, [true; 3]).support(2, PINNED);
    let job = job.frame(0, 1, 1e9, 8e6).bar(1, 2, 1e6).tension_only().strain(0.01);
    let found = job.load(1, [0.0, -2000.0, 0.0]).solve();
    assert!(found.members[1].slack);
    close(found.displacements[1][1], -2000.0 * 64.0 / (3.0 * 8e6), 0.0);
}

/// A slack bar3 hands half of the load along it to each end (statics of a uniform load).
#[test]
fn a_slack_bar_still_weighs() {
    let job = Job::new(&[[0.0, 0.0], [0.0, 3.0]]).support(0, PINNED);
    let job = job.spring(1, [true, false, false], [None, Some(1e5), None]);
    let mut job = job.member(crate::model::MemberKind::Bar3, 0, 1, 1e6, 0.0).tension_only().load(1, [0.0, -500.0, 0.0]);
    let weight = 60.0;
    job.loading.members[0] = MemberLoading {
        forces: [-weight / 6.0, 0.0, 0.0, -weight / 6.0, 0.0, 0.0, -4.0 * weight / 6.0],
        fixed_axial: [weight / 2.0, -weight / 2.0],
        ..MemberLoading::default()
    };
    let found = job.solve();
    assert!(found.members[0].slack);
    close(found.displacements[1][1], -(500.0 + weight / 2.0) / 1e5, 0.0);
    close(found.members[0].middle.expect("a middle")[1], found.displacements[1][1] / 2.0, 0.0);
}

/// Three braced storeys: whatever the set of slack braces, taut ones pull and slack ones would be pressed.
#[test]
fn storeys_of_braces() {
    let mut nodes = Vec::new();
    for level in 0..4 {
        nodes.extend([[0.0, 3.0 * f64::from(level)], [4.0, 3.0 * f64::from(level)]]);
    }
    let mut job = Job::new(&nodes).support(0, PINNED).support(1, ROLLER).bar(0, 1, 1e8);
    for level in 0..3 {
        let (a, b) = (2 * level, 2 * level + 1);
        job = job.bar(a, a + 2, 1e8).bar(b, b + 2, 1e8).bar(a + 2, b + 2, 1e8);
        job = job.bar(a, b + 2, 1e7).tension_only().bar(b, a + 2, 1e7).tension_only();
        let push = [4000.0, -9000.0, 2500.0][level];
        job = job.load(a + 2, [push, -20_000.0, 0.0]).load(b + 2, [0.0, -30_000.0, 0.0]);
    }
    let found = job.solve();
    for (member, element) in job.structure.members.iter().enumerate().filter(|(_, element)| element.tension_only) {
        let [u1, _, _, u2, ..] = job.end_movements(&found, member);
        let force = element.axial_rigidity / 5.0 * (u2 - u1);
        assert!(if found.members[member].slack { force < 1e-3 } else { force > -1e-3 }, "member {member}: {force}");
    }
}
