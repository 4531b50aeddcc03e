//! Laws that hold for every structure, tried on structures drawn at random.
//!
//! Statics and linear elasticity give them: superposition, indifference to turning, to cutting a member in two and to
//! the way a pin is written, and Maxwell's reciprocity (S. P. Timoshenko, J. M. Gere, Mechanics of Materials; recalled).
use proptest::prelude::*;
use serde_json::Value;

/// A frame on a line of nodes with two feet: positions in m, section sizes in mm, loads in kN and kN/m.
#[derive(Debug, Clone)]
struct Frame {
    nodes: Vec<[f64; 2]>,
    sizes: Vec<(f64, f64)>,
    node_loads: Vec<[f64; 3]>,
    line_loads: Vec<f64>,
    point_loads: Vec<f64>,
}

fn frames() -> impl Strategy<Value = Frame> {
    (3_usize..6).prop_flat_map(|count| {
        let nodes = prop::collection::vec((1.0..4.0_f64, -2.0..3.0_f64), count).prop_map(|steps| {
            let mut x = 0.0;
            steps
                .into_iter()
                .map(|(dx, y)| {
                    x += dx;
                    [x, y]
                })
                .collect::<Vec<_>>()
        });
        let members = count - 1;
        (
            nodes,
            prop::collection::vec((80.0..300.0_f64, 40.0..150.0_f64), members),
            prop::collection::vec(prop::array::uniform3(-20.0..20.0_f64), count),
            prop::collection::vec(-10.0..10.0_f64, members),
            prop::collection::vec(-15.0..15.0_f64, members),
        )
            .prop_map(|(nodes, sizes, node_loads, line_loads, point_loads)| Frame {
                nodes,
                sizes,
                node_loads,
                line_loads,
                point_loads,
            })
    })
}

impl Frame {
    /// The input text, the whole turned anticlockwise by `turn` about the origin.
    fn text(&self, turn: f64, extra: &str) -> String {
        let (c, s) = (turn.cos(), turn.sin());
        let mut text = String::from("calcsheaf: 1\nproject: {title: Law}\nmaterials: {M: {E: 210 GPa}}\nsections:\n");
        for (at, (depth, width)) in self.sizes.iter().enumerate() {
            text += &format!("  S{at}: {{shape: rectangle, depth: {depth} mm, width: {width} mm}}\n");
        }
        text += "nodes:\n";
        for (at, [x, y]) in self.nodes.iter().enumerate() {
            text += &format!("  N{at}: {{x: {} m, y: {} m}}\n", c * x - s * y, s * x + c * y);
        }
        let last = self.nodes.len() - 1;
        text += &format!("supports:\n  N0: fixed\n  N{last}: {{hold: [y], turned: {turn} rad}}\nmembers:\n");
        for at in 0..last {
            text += &format!("  M{at}: {{kind: frame, from: N{at}, to: N{}, section: S{at}, material: M}}\n", at + 1);
        }
        text += "load_cases:\n  P:\n    loads:\n";
        for (at, [fx, fy, m]) in self.node_loads.iter().enumerate() {
            text += &format!(
                "      - {{at: N{at}, fx: {} kN, fy: {} kN, m: {m} kN.m}}\n",
                c * fx - s * fy,
                s * fx + c * fy
            );
        }
        text += "  Q:\n    loads:\n";
        for at in 0..last {
            text += &format!("      - {{on: M{at}, dir: y, w: {} kN/m}}\n", self.line_loads[at]);
            text += &format!("      - {{on: M{at}, dir: y, p: {} kN, at: 37 %}}\n", self.point_loads[at]);
        }
        text + extra
    }
}

fn solve(text: &str) -> Value {
    let json = calcsheaf::package::results(text).unwrap_or_else(|faults| panic!("{text}\n{faults}"));
    serde_json::from_str(&json).expect("results")
}

fn at(results: &Value, path: &str) -> f64 {
    path.split('.').fold(results, |value, key| &value[key]).as_f64().unwrap_or_else(|| panic!("{path} is missing"))
}

/// Agreement relative to `size`, the largest of the kind.
fn agree(what: &str, found: f64, expected: f64, size: f64) -> Result<(), TestCaseError> {
    prop_assert!(
        (found - expected).abs() <= 1e-8 * size.max(expected.abs()) + 1e-12,
        "{what}: {found} against {expected}"
    );
    Ok(())
}

fn largest_movement(results: &Value, combination: &str) -> f64 {
    let nodes = results["combinations"][combination]["displacements"].as_object().expect("nodes");
    nodes.values().flat_map(|n| ["x", "y"].map(|k| n[k].as_f64().expect("number").abs())).fold(0.0, f64::max)
}

fn largest_moment(results: &Value, combination: &str) -> f64 {
    let members = results["combinations"][combination]["members"].as_object().expect("members");
    members
        .values()
        .flat_map(|m| ["start", "end"].map(|e| m[e]["m"].as_f64().expect("number").abs()))
        .fold(1.0, f64::max)
}

proptest! {
    #![proptest_config(ProptestConfig { cases: 24, ..ProptestConfig::default() })]

    #[test]
    fn cases_superpose(frame in frames(), a in -2.0..2.0_f64, b in -2.0..2.0_f64) {
        let extra = format!("combinations:\n  P: {{factors: {{P: 1}}}}\n  Q: {{factors: {{Q: 1}}}}\n  PQ: {{factors: {{P: {a}, Q: {b}}}}}\n");
        let results = solve(&frame.text(0.0, &extra));
        let (moment, movement) = (largest_moment(&results, "P") + largest_moment(&results, "Q"), largest_movement(&results, "P") + largest_movement(&results, "Q"));
        for member in 0..frame.sizes.len() {
            for key in ["start.m", "end.m", "start.v", "start.n"] {
                let of = |c: &str| at(&results, &format!("combinations.{c}.members.M{member}.{key}"));
                agree(key, of("PQ"), a * of("P") + b * of("Q"), moment)?;
            }
        }
        for node in 0..frame.nodes.len() {
            let of = |c: &str| at(&results, &format!("combinations.{c}.displacements.N{node}.y"));
            agree("y", of("PQ"), a * of("P") + b * of("Q"), movement)?;
        }
    }

    #[test]
    fn a_turned_structure_gives_turned_results(frame in frames(), turn in -3.0..3.0_f64) {
        let (plain, turned) = (solve(&frame.text(0.0, "")), solve(&frame.text(turn, "")));
        let (c, s) = (turn.cos(), turn.sin());
        for combination in ["P", "Q"] {
            let (moment, movement) = (largest_moment(&plain, combination), largest_movement(&plain, combination));
            for member in 0..frame.sizes.len() {
                for key in ["start.m", "end.m", "start.v", "start.n", "peak_deflection.v"] {
                    let path = format!("combinations.{combination}.members.M{member}.{key}");
                    agree(&path, at(&turned, &path), at(&plain, &path), if key.starts_with("peak") { movement } else { moment })?;
                }
            }
            for node in 0..frame.nodes.len() {
                let of = |r: &Value, k: &str| at(r, &format!("combinations.{combination}.displacements.N{node}.{k}"));
                let (x, y) = (of(&plain, "x"), of(&plain, "y"));
                agree("x", of(&turned, "x"), c * x - s * y, movement)?;
                agree("y", of(&turned, "y"), s * x + c * y, movement)?;
            }
        }
    }

    /// The second member cut at a quarter of its length.
    #[test]
    fn cutting_a_member_changes_nothing(frame in frames()) {
        let whole = solve(&frame.text(0.0, ""));
        let mut cut = frame.clone();
        let (a, b) = (frame.nodes[1], frame.nodes[2]);
        cut.nodes.insert(2, [a[0] + 0.25 * (b[0] - a[0]), a[1] + 0.25 * (b[1] - a[1])]);
        cut.sizes.insert(1, frame.sizes[1]);
        cut.node_loads.insert(2, [0.0; 3]);
        cut.line_loads.insert(1, frame.line_loads[1]);
        // The point forces stand at shares of each member's length: they are left out here.
        cut.point_loads = vec![0.0; cut.sizes.len()];
        let mut without = frame.clone();
        without.point_loads = vec![0.0; frame.sizes.len()];
        let (plain, parts) = (solve(&without.text(0.0, "")), solve(&cut.text(0.0, "")));
        let moment = largest_moment(&whole, "Q").max(largest_moment(&plain, "Q"));
        for (plain_path, cut_path) in [("M0.start.m", "M0.start.m"), ("M1.start.m", "M1.start.m"), ("M1.end.m", "M2.end.m"), ("M1.end.n", "M2.end.n")] {
            let of = |r: &Value, p: &str| at(r, &format!("combinations.Q.members.{p}"));
            agree(plain_path, of(&parts, cut_path), of(&plain, plain_path), moment)?;
        }
    }

    #[test]
    fn movements_are_reciprocal(frame in frames(), i in 1_usize..3, j in 1_usize..3) {
        let mut one = frame.clone();
        one.node_loads = vec![[0.0; 3]; frame.nodes.len()];
        let mut other = one.clone();
        one.node_loads[i] = [0.0, 10.0, 0.0];
        other.node_loads[j] = [10.0, 0.0, 0.0];
        let (first, second) = (solve(&one.text(0.0, "")), solve(&other.text(0.0, "")));
        let x_of_j = at(&first, &format!("combinations.P.displacements.N{j}.x"));
        let y_of_i = at(&second, &format!("combinations.P.displacements.N{i}.y"));
        agree("reciprocal movement", x_of_j, y_of_i, largest_movement(&first, "P"))?;
    }

    /// A frame member hinged at both ends and unloaded between them is a bar; a three-node bar under end load is
    /// two bars in a row.
    #[test]
    fn a_pin_is_a_pin_however_it_is_written(h in 1.0..5.0_f64, b in 1.0..5.0_f64, force in 1.0..100.0_f64) {
        let text = |brace: &str| format!(
            "calcsheaf: 1\nproject: {{title: Pins}}\nmaterials: {{M: {{E: 210 GPa}}}}\nsections: {{S: {{shape: tube, diameter: 100 mm, wall: 5 mm}}}}\n\
             nodes: {{A: {{x: 0, y: 0}}, B: {{x: 0, y: {h} m}}, C: {{x: {b} m, y: 0}}, D: {{x: {} m, y: {} m}}}}\nsupports: {{A: pinned, C: pinned}}\n\
             members:\n  AB: {{kind: frame, from: A, to: B, section: S, material: M}}\n{brace}\
             load_cases: {{L: {{loads: [{{at: B, fx: {force} kN}}]}}}}\n", b / 2.0, h / 2.0);
        let write = |kind: &str| text(&format!("  CB: {{kind: {kind}, from: C, to: B, section: S, material: M}}\n  CD: {{kind: bar, from: C, to: D, section: S, material: M}}\n  AD: {{kind: bar, from: A, to: D, section: S, material: M}}\n"));
        let bar = solve(&write("bar"));
        let size = force * 1e3 * (1.0 + b / h + h / b);
        for other in [write("bar3"), write("frame").replace("CB: {kind: frame,", "CB: {kind: frame, hinge: both,")] {
            let other = solve(&other);
            for path in ["members.CB.start.n", "members.AB.start.m", "members.AB.start.n"] {
                let of = |r: &Value| at(r, &format!("combinations.L.{path}"));
                agree(path, of(&other), of(&bar), size)?;
            }
        }
    }
}
