//! Laws that every solution obeys, whatever the structure.
use super::job::{FIXED, PINNED, ROLLER};
use super::{Job, close};

/// A frame with a hinge, a brace, a spring and a turned roller, loaded all over.
fn mixed(turn: f64) -> Job {
    let (s, c) = turn.to_radians().sin_cos();
    let places = [[0.0, 0.0], [0.0, 4.0], [5.0, 5.0], [9.0, 4.0], [9.0, 0.5]];
    let nodes = places.map(|[x, y]| [c * x - s * y, s * x + c * y]);
    let job = Job::new(&nodes).turned(0, PINNED, turn).turned(4, ROLLER, turn + 20.0);
    let mut job = job.turned(3, [false; 3], turn - 35.0);
    job.structure.supports[2].spring = [Some(3e6), None, Some(2e5)];
    let job = job.frame(0, 1, 4e8, 6e6).uniform(-3000.0).frame(1, 2, 4e8, 5e6).hinge(false, true).uniform(-7000.0);
    let job = job.frame(2, 3, 4e8, 5e6).uniform(-2000.0).frame(3, 4, 4e8, 6e6).shear(0.3).bar(0, 2, 2e8).strain(3e-4);
    let turned = |[x, y, m]: [f64; 3]| [c * x - s * y, s * x + c * y, m];
    job.load(1, turned([9000.0, -2000.0, 500.0])).load(2, turned([0.0, -4000.0, 0.0])).settle(4, [0.0, -0.004, 0.0])
}

#[test]
fn turning_the_structure_turns_the_results() {
    let straight = mixed(0.0);
    let reference = straight.solve();
    for turn in [17.0, 90.0, 143.0, 270.0] {
        let job = mixed(turn);
        let found = job.solve();
        let (s, c) = turn.to_radians().sin_cos();
        for (a, b) in reference.displacements.iter().zip(&found.displacements) {
            close(b[0], c * a[0] - s * a[1], 0.1);
            close(b[1], s * a[0] + c * a[1], 0.1);
            close(b[2], a[2], 0.1);
        }
        for member in 0..job.structure.members.len() {
            let (a, b) = (straight.end_forces(&reference, member), job.end_forces(&found, member));
            for (a, b) in a.iter().zip(b) {
                close(b, *a, 1e5);
            }
        }
    }
}

/// Maxwell and Betti: the work of one set of forces on the movements of another is the same both ways.
#[test]
fn reciprocity() {
    let bare = || {
        let mut job = mixed(30.0);
        job.loading.settlements.clear();
        job.loading.members.fill(Default::default());
        job.loading.nodes.fill([0.0; 3]);
        job
    };
    let (first, second) = ([700.0, -300.0, 90.0], [-200.0, 500.0, 40.0]);
    let one = bare().load(1, first).solve();
    let other = bare().load(3, second).solve();
    let work = |force: [f64; 3], movement: [f64; 3]| force.iter().zip(movement).map(|(f, u)| f * u).sum::<f64>();
    close(work(second, one.displacements[3]), work(first, other.displacements[1]), 0.0);
}

/// Forces of the joints on the members, added up at a free node, are the load on it.
#[test]
fn joints_are_in_balance() {
    let job = mixed(0.0);
    let found = job.solve();
    let mut sum = [0.0; 3];
    for (member, element) in job.structure.members.iter().enumerate() {
        let forces = job.end_forces(&found, member);
        for (end, node) in [element.from, element.to].into_iter().enumerate().filter(|(_, node)| *node == 2) {
            let ([x1, y1], [x2, y2]) = (job.structure.nodes[element.from], job.structure.nodes[element.to]);
            let length = (x2 - x1).hypot(y2 - y1);
            let (c, s) = ((x2 - x1) / length, (y2 - y1) / length);
            let [x, y, m] = [forces[3 * end], forces[3 * end + 1], forces[3 * end + 2]];
            sum = [sum[0] + c * x - s * y, sum[1] + s * x + c * y, sum[2] + m];
            assert_eq!(node, 2);
        }
    }
    close(sum[0], 0.0, 1e5);
    close(sum[1], -4000.0, 1e5);
    close(sum[2], 0.0, 1e5);
}

/// A long beam of many members keeps its digits: tip of a cantilever of 300 members, P·L³/3EI.
#[test]
fn many_members() {
    let count = 300;
    let nodes: Vec<[f64; 2]> = (0..=count).map(|i| [0.6 * f64::from(i), 0.8 * f64::from(i)]).collect();
    let mut job = Job::new(&nodes).support(0, FIXED);
    for member in 0..count as usize {
        job = job.frame(member, member + 1, 1e9, 1e7);
    }
    let found = job.load(count as usize, [-0.8, 0.6, 0.0]).solve();
    let tip = found.displacements[count as usize];
    let moved = -0.8 * tip[0] + 0.6 * tip[1];
    let expected = f64::from(count).powi(3) / 3e7;
    assert!((moved / expected - 1.0).abs() < 1e-8, "found {moved}, expected {expected}");
}
