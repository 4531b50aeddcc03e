//! How a structure that is not stable can move, in the words of whoever drew it.
use super::failure::{Names, short};
use super::freedom::Slots;
use super::structure::Structure;
use super::system::product;

/// Movements below this part of the largest count as none.
const STILL: f64 = 1e-6;
/// Mechanisms told at once.
const TOLD: usize = 3;

/// A way to move without any member being strained.
#[derive(Debug, Clone, PartialEq)]
pub enum Motion {
    /// A connected part that no support touches.
    Floats {
        /// Its nodes.
        nodes: Vec<usize>,
    },
    /// Nodes that all move the same way.
    Slides {
        /// The nodes.
        nodes: Vec<usize>,
        /// Unit vector, global axes.
        direction: [f64; 2],
        /// Whether they are a whole connected part.
        whole: bool,
    },
    /// Nodes that turn together about one point.
    Turns {
        /// The nodes that move.
        nodes: Vec<usize>,
        /// The centre, m.
        about: [f64; 2],
        /// Whether they are a whole connected part.
        whole: bool,
    },
    /// One member that turns about a node, its other end held by nothing else.
    MemberSpins {
        /// The member.
        member: usize,
        /// The node.
        about: usize,
    },
    /// Anything else: x, y and rotation of each node that moves, the largest movement being 1 m.
    Moves {
        /// The nodes that move.
        nodes: Vec<(usize, [f64; 3])>,
    },
}

/// What moves and what usually mends it.
#[must_use]
pub fn describe(motion: &Motion, names: &Names<'_>) -> String {
    match motion {
        Motion::Floats { nodes } => format!(
            "{} {}: support this part, or join it to the rest",
            subject(nodes, names),
            if nodes.len() == 1 { "is held by nothing" } else { "form a part that nothing holds" },
        ),
        Motion::Slides { nodes, direction, whole: true } => format!(
            "the part with {} can slide {}: no support holds it in that direction. Hold that direction at one of its \
             nodes",
            subject(nodes, names),
            direction_in_words(*direction),
        ),
        Motion::Slides { nodes, direction, whole: false } => format!(
            "{} can move {} without straining any member. A diagonal, a support in that direction or one hinge fewer \
             mends it",
            subject(nodes, names),
            direction_in_words(*direction),
        ),
        Motion::Turns { nodes, about, whole: true } => format!(
            "the part with {} can turn about the point x = {} m, y = {} m: every support of it acts through that point. \
             Add a support whose line passes it by, or hold the rotation",
            subject(nodes, names),
            short(about[0]),
            short(about[1]),
        ),
        Motion::Turns { nodes, about, whole: false } => format!(
            "{} can turn about the point x = {} m, y = {} m without straining any member. A diagonal, another support \
             or one hinge fewer mends it",
            subject(nodes, names),
            short(about[0]),
            short(about[1]),
        ),
        Motion::MemberSpins { member, about } => format!(
            "member {} can turn freely about node {}: nothing else holds its other end. Remove its hinge, or hold or \
             brace that end",
            names.member(*member),
            names.node(*about),
        ),
        Motion::Moves { nodes } => {
            let moves: Vec<String> = nodes
                .iter()
                .map(|(node, [x, y, rotation])| {
                    let size = x.hypot(*y);
                    if size > STILL {
                        format!("{} {}", names.node(*node), direction_in_words([x / size, y / size]))
                    } else {
                        let way = if *rotation > 0.0 { "anticlockwise" } else { "clockwise" };
                        format!("{} turning {way}", names.node(*node))
                    }
                })
                .collect();
            format!(
                "these nodes can move together without straining any member: {}. A diagonal, another support or one \
                 hinge fewer mends it",
                Names::list(&moves)
            )
        }
    }
}

fn subject(nodes: &[usize], names: &Names<'_>) -> String {
    format!("{} {}", if nodes.len() == 1 { "node" } else { "nodes" }, names.node_list(nodes))
}

/// A direction as an engineer says it; the sense is left out where it does not matter.
pub(super) fn direction_in_words([x, y]: [f64; 2]) -> String {
    if y.abs() < 1e-6 {
        "horizontally".into()
    } else if x.abs() < 1e-6 {
        "vertically".into()
    } else {
        let angle = (y / x).atan().to_degrees();
        format!("along a line at {}° to x", short((angle * 10.0).round() / 10.0))
    }
}

/// Connected parts with members but without any support.
pub(super) fn floating(structure: &Structure, slack: &[bool]) -> Vec<Motion> {
    let part = parts(structure, slack);
    let mut held = vec![false; part.len()];
    for support in &structure.supports {
        let holds = support.hold.contains(&true) || support.spring.iter().flatten().any(|k| *k > 0.0);
        held[part[support.node]] |= holds;
    }
    let alone = |label: usize| part.iter().filter(|p| **p == label).count() < 2;
    (0..part.len())
        .filter(|label| part[*label] == *label && !held[*label] && !alone(*label))
        .map(|label| Motion::Floats { nodes: (0..part.len()).filter(|node| part[*node] == label).collect() })
        .take(TOLD)
        .collect()
}

/// For every node the first node of the connected part it belongs to.
fn parts(structure: &Structure, slack: &[bool]) -> Vec<usize> {
    let edges = structure.members.iter().enumerate().filter(|(m, _)| !slack[*m]).map(|(_, e)| (e.from, e.to));
    joined(structure.nodes.len(), edges)
}

fn joined(nodes: usize, edges: impl Iterator<Item = (usize, usize)>) -> Vec<usize> {
    let mut parent: Vec<usize> = (0..nodes).collect();
    fn root(parent: &[usize], mut node: usize) -> usize {
        while parent[node] != node {
            node = parent[node];
        }
        node
    }
    for (a, b) in edges {
        let (a, b) = (root(&parent, a), root(&parent, b));
        parent[a.max(b)] = a.min(b);
    }
    (0..nodes).map(|node| root(&parent, node)).collect()
}

/// Whether a movement strains no member and no spring.
///
/// Each line of each stiffness matrix is judged by itself against what its own terms could add up to, so that a soft
/// structure with one very stiff member is not taken for a mechanism.
pub(super) fn is_strainless(structure: &Structure, slack: &[bool], slots: &Slots, values: &[f64]) -> bool {
    let largest = values.iter().fold(0.0, |most: f64, value| most.max(value.abs()));
    let springs_rest = slots.springs.iter().zip(values).all(|(k, value)| *k <= 0.0 || value.abs() <= STILL * largest);
    springs_rest
        && structure.members.iter().enumerate().filter(|(member, _)| !slack[*member]).all(|(member, element)| {
            let movement = slots.member_movement(member, element.freedoms(), values);
            let force = product(&element.stiffness, &movement);
            force.iter().zip(element.stiffness.chunks(movement.len())).all(|(force, row)| {
                let terms: f64 = row.iter().zip(&movement).map(|(k, d)| (k * d).abs()).sum();
                let row_largest = row.iter().fold(0.0, |most: f64, k| most.max(k.abs()));
                // Nodes at rest still carry the dust of the mode's last digits.
                force.abs() <= STILL * terms.max(1e-2 * row_largest * largest)
            })
        })
}

/// Tells the motions behind strainless movements of the slots.
pub(super) fn motions(structure: &Structure, slack: &[bool], slots: &Slots, modes: Vec<Vec<f64>>) -> Vec<Motion> {
    let size = structure.size();
    let nodes = structure.nodes.len();
    let modes: Vec<Vec<[f64; 3]>> = modes
        .iter()
        .map(|values| (0..nodes).map(|node| slots.movement(node, values)).collect())
        .map(|mode: Vec<[f64; 3]>| mode.into_iter().map(|[x, y, r]| [x, y, r * size]).collect())
        .collect();
    let part = parts(structure, slack);
    separate(modes).iter().take(TOLD).map(|mode| classify(structure, slack, &part, mode, size)).collect()
}

/// Independent movements that each keep as many nodes still as possible: elimination, a pivot being the first
/// movement of the first node that moves clearly.
fn separate(mut modes: Vec<Vec<[f64; 3]>>) -> Vec<Vec<[f64; 3]>> {
    let nodes = modes.first().map_or(0, Vec::len);
    let mut done = 0;
    for threshold in [0.1, 1e-3] {
        for place in 0..3 * nodes {
            let (node, direction) = (place / 3, place % 3);
            let clear = |mode: &Vec<[f64; 3]>| {
                let largest = mode.iter().flatten().fold(0.0, |most: f64, value| most.max(value.abs()));
                if largest > 0.0 { mode[node][direction].abs() / largest } else { 0.0 }
            };
            let best = (done..modes.len()).max_by(|a, b| clear(&modes[*a]).total_cmp(&clear(&modes[*b])));
            let Some(best) = best else { return modes };
            if clear(&modes[best]) <= threshold {
                continue;
            }
            modes.swap(done, best);
            let pivot = modes[done][node][direction];
            for value in modes[done].iter_mut().flatten() {
                *value /= pivot;
            }
            let own = modes[done].clone();
            for (_, other) in modes.iter_mut().enumerate().filter(|(other, _)| *other != done) {
                let factor = other[node][direction];
                for (value, own) in other.iter_mut().flatten().zip(own.iter().flatten()) {
                    *value -= factor * own;
                }
            }
            done += 1;
        }
    }
    modes
}

fn classify(structure: &Structure, slack: &[bool], part: &[usize], mode: &[[f64; 3]], size: f64) -> Motion {
    let largest = mode.iter().map(|[x, y, _]| x.hypot(*y)).fold(0.0, f64::max);
    let largest = if largest > 0.0 { largest } else { mode.iter().map(|m| m[2].abs()).fold(0.0, f64::max) };
    let unit: Vec<[f64; 3]> = mode.iter().map(|m| m.map(|value| value / largest)).collect();
    let moving: Vec<usize> = (0..unit.len()).filter(|n| unit[*n][0].hypot(unit[*n][1]) > STILL.sqrt()).collect();
    let everything = || {
        let moves = |m: &[f64; 3]| m.iter().any(|value| value.abs() > STILL.sqrt());
        let nodes = unit.iter().enumerate().filter(|(_, m)| moves(m));
        Motion::Moves { nodes: nodes.map(|(node, [x, y, r])| (node, [*x, *y, r / size])).collect() }
    };
    let Some(first) = moving.first() else { return everything() };
    let whole_but = |kept: &dyn Fn(usize) -> bool| {
        let touched: Vec<usize> = moving.iter().map(|node| part[*node]).collect();
        (0..unit.len()).all(|node| !touched.contains(&part[node]) || moving.contains(&node) || kept(node))
    };
    if let Some((member, about)) = stub(structure, slack, &moving)
        && !whole_but(&|node| node == about)
    {
        return Motion::MemberSpins { member, about };
    }
    let near = |a: [f64; 2], b: [f64; 2]| (a[0] - b[0]).hypot(a[1] - b[1]) < 1e-4;
    let [x, y, _] = unit[*first];
    if moving.iter().all(|node| near([unit[*node][0], unit[*node][1]], [x, y]))
        && (moving.len() > 1 || part_of_several(structure, slack, *first))
    {
        let length = x.hypot(y);
        let clean = |value: f64| if value.abs() < 1e-7 { 0.0 } else { value };
        let [x, y] = [clean(x / length), clean(y / length)];
        let forward = if x < 0.0 || (x <= 0.0 && y < 0.0) { -1.0 } else { 1.0 };
        let direction = [clean(x * forward), clean(y * forward)];
        return Motion::Slides { whole: whole_but(&|_| false), nodes: moving, direction };
    }
    if let Some(about) = centre(structure, &unit, &moving) {
        let at_centre = |node: usize| {
            let [x, y] = structure.nodes[node];
            (x - about[0]).hypot(y - about[1]) < 1e-6 * size
        };
        let edges = structure.members.iter().enumerate().filter(|(member, element)| {
            let turning = |node: usize| moving.contains(&node) || at_centre(node);
            !slack[*member] && turning(element.from) && turning(element.to)
        });
        let group = joined(unit.len(), edges.map(|(_, element)| (element.from, element.to)));
        if moving.iter().all(|node| group[*node] == group[*first]) {
            return Motion::Turns { whole: whole_but(&at_centre), nodes: moving, about };
        }
    }
    everything()
}

/// The only member at the only moving node, and the node at its other end.
fn stub(structure: &Structure, slack: &[bool], moving: &[usize]) -> Option<(usize, usize)> {
    let [node] = moving else { return None };
    let mut there = structure
        .members
        .iter()
        .enumerate()
        .filter(|(member, element)| !slack[*member] && (element.from == *node || element.to == *node));
    let (member, element) = there.next()?;
    let other = if element.from == *node { element.to } else { element.from };
    there.next().is_none().then_some((member, other))
}

/// Whether more than one member meets a node: alone at the end of one member it turns rather than slides.
fn part_of_several(structure: &Structure, slack: &[bool], node: usize) -> bool {
    stub(structure, slack, &[node]).is_none()
}

/// The centre about which all moving nodes turn, if there is one.
///
/// Small turns by ω about c move a point p by ω·(−(p−c)y, (p−c)x); a least-squares fit of ω and ω·c is then judged by
/// how well it tells every node.
fn centre(structure: &Structure, unit: &[[f64; 3]], moving: &[usize]) -> Option<[f64; 2]> {
    let count = moving.len() as f64;
    let mean = |pick: &dyn Fn(usize) -> f64| moving.iter().map(|node| pick(*node)).sum::<f64>() / count;
    let middle = [mean(&|node| structure.nodes[node][0]), mean(&|node| structure.nodes[node][1])];
    let average = [mean(&|node| unit[node][0]), mean(&|node| unit[node][1])];
    let (mut turn, mut arm) = (0.0, 0.0);
    for node in moving {
        let [x, y] = [structure.nodes[*node][0] - middle[0], structure.nodes[*node][1] - middle[1]];
        turn += x * unit[*node][1] - y * unit[*node][0];
        arm += x * x + y * y;
    }
    if let ([node], true) = (moving, arm <= 0.0) {
        // One node alone: its neighbour that stays put is the centre.
        let still = structure.members.iter().find_map(|e| match (e.from == *node, e.to == *node) {
            (true, false) => Some(e.to),
            (false, true) => Some(e.from),
            _ => None,
        })?;
        return Some(structure.nodes[still]);
    }
    let rate = turn / arm;
    if rate.is_nan() || rate.abs() * structure.size() < 1e-4 {
        return None;
    }
    let about = [middle[0] - average[1] / rate, middle[1] + average[0] / rate];
    let fits = moving.iter().all(|node| {
        let [x, y] = structure.nodes[*node];
        let expected = [-(y - about[1]) * rate, (x - about[0]) * rate];
        (unit[*node][0] - expected[0]).hypot(unit[*node][1] - expected[1]) < 1e-4
    });
    let clean = |value: f64| if value.abs() < 1e-9 * structure.size() { 0.0 } else { value };
    fits.then(|| about.map(clean))
}
