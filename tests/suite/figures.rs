//! Every drawing of every example, of random frames and of a crowded one: labels apart, off the members, on the sheet.
use crate::packages::{many, pack};
use calcsheaf::figure::{Figure, Item, Scene};

/// Heavier lines are members, curves and loads, mm.
const HEAVY: f64 = 0.28;
/// Greatest height that leaves room for a caption on a sheet, mm.
const TALLEST: f64 = 215.0;

fn overlap(a: &[f64; 4], b: &[f64; 4]) -> bool {
    a[0] < b[2] - 0.01 && b[0] < a[2] - 0.01 && a[1] < b[3] - 0.01 && b[1] < a[3] - 0.01
}

/// Whether a line passes through a rectangle: the part of it within one pair of sides reaches into the other.
fn passes(a: [f64; 2], b: [f64; 2], area: &[f64; 4]) -> bool {
    let (mut enter, mut leave) = (0.0_f64, 1.0_f64);
    for i in 0..2 {
        let (low, high, run) = (area[i] + 0.01, area[i + 2] - 0.01, b[i] - a[i]);
        if run.abs() < 1e-12 {
            if a[i] <= low || a[i] >= high {
                return false;
            }
        } else {
            let (s, t) = ((low - a[i]) / run, (high - a[i]) / run);
            enter = enter.max(s.min(t));
            leave = leave.min(s.max(t));
        }
    }
    enter < leave
}

fn faults(scene: &Scene) -> Vec<String> {
    let mut faults = Vec::new();
    let texts: Vec<(&str, [f64; 4])> = scene
        .items
        .iter()
        .filter_map(|item| match item {
            Item::Text(text) => Some((text.text.as_str(), text.extent())),
            Item::Path { .. } => None,
        })
        .collect();
    let heavy: Vec<[[f64; 2]; 2]> = scene
        .items
        .iter()
        .filter_map(|item| match item {
            Item::Path { points, stroke: Some(stroke), closed: false, .. } if stroke.width >= HEAVY => Some(points),
            _ => None,
        })
        .flat_map(|points| points.windows(2).map(|w| [w[0], w[1]]).collect::<Vec<_>>())
        .collect();
    for (at, (text, area)) in texts.iter().enumerate() {
        if area[0] < 0.0 || area[1] < 0.0 || area[2] > scene.width || area[3] > scene.height {
            faults.push(format!("`{text}` leaves the sheet"));
        }
        let covered = texts[..at].iter().filter(|(_, other)| overlap(area, other));
        faults.extend(covered.map(|(other, _)| format!("`{text}` covers `{other}`")));
        if heavy.iter().any(|[a, b]| passes(*a, *b, area)) {
            faults.push(format!("`{text}` lies on a line"));
        }
    }
    let outside = |p: &[f64; 2]| p[0] < 0.0 || p[1] < 0.0 || p[0] > scene.width || p[1] > scene.height;
    let leaves = |item: &Item| matches!(item, Item::Path { points, .. } if points.iter().any(outside));
    if scene.items.iter().any(leaves) {
        faults.push("a line leaves the sheet".into());
    }
    if scene.height > TALLEST {
        faults.push(format!("{} mm tall", scene.height));
    }
    faults
}

/// Faults of all drawings; labels, and how many of them found no room.
fn judge(name: &str, figures: &[Figure], all: &mut Vec<String>) -> (usize, usize) {
    let mut count = (0, 0);
    for figure in figures {
        all.extend(faults(&figure.scene).into_iter().map(|fault| format!("{name} {}: {fault}", figure.id)));
        count = (count.0 + figure.scene.labels, count.1 + figure.scene.keyed);
    }
    count
}

#[test]
fn labels_of_every_drawing_are_legible_and_nearly_all_stand_beside_what_they_name() {
    let mut all = Vec::new();
    let (mut labels, mut keyed) = (0, 0);
    for (name, package) in many() {
        let count = judge(name, &package.sheet.figures, &mut all);
        (labels, keyed) = (labels + count.0, keyed + count.1);
    }
    assert!(all.is_empty(), "{} faults:\n{}", all.len(), all.join("\n"));
    assert!(labels > 3000, "only {labels} labels");
    assert!(keyed * 50 <= labels, "{keyed} of {labels} labels found no room");
}

/// A frame of many storeys and bays, in which not every name has room.
fn tower(storeys: usize, bays: usize) -> String {
    let mut text = String::from(
        "calcsheaf: 1\nproject: {title: Tower}\ndisplay: {detail: summary}\nmaterials: {S: {E: 210 GPa, density: 7850 \
         kg/m3, allowable: {tension: 165 MPa, compression: 165 MPa, source: brief}}}\nsections:\n  C: {shape: i, \
         depth: 300 mm, width: 300 mm, web: 11 mm, flange: 19 mm}\nnodes:\n",
    );
    for storey in 0..=storeys {
        for bay in 0..=bays {
            text += &format!("  N{storey}-{bay}: {{x: {} m, y: {} m}}\n", 6 * bay, 4 * storey);
        }
    }
    text += "supports:\n";
    for bay in 0..=bays {
        text += &format!("  N0-{bay}: fixed\n");
    }
    text += "members:\n";
    let mut member = |name: String, from: String, to: String| {
        text += &format!("  {name}: {{kind: frame, from: {from}, to: {to}, section: C, material: S}}\n");
    };
    for storey in 0..storeys {
        for bay in 0..=bays {
            member(format!("C{storey}-{bay}"), format!("N{storey}-{bay}"), format!("N{}-{bay}", storey + 1));
        }
    }
    for storey in 1..=storeys {
        for bay in 0..bays {
            member(format!("B{storey}-{bay}"), format!("N{storey}-{bay}"), format!("N{storey}-{}", bay + 1));
        }
    }
    text += "load_cases:\n  D:\n    self_weight: true\n    loads:\n";
    for storey in 1..=storeys {
        text += &format!("      - {{at: N{storey}-0, fx: {storey} kN}}\n");
        for bay in 0..bays {
            text += &format!("      - {{on: B{storey}-{bay}, dir: Y, w: -{} kN/m}}\n", 5 + bay);
        }
    }
    text
}

#[test]
fn a_crowded_frame_stays_legible() {
    let package = pack(&tower(20, 6), "tower.yaml");
    let mut all = Vec::new();
    judge("tower", &package.sheet.figures, &mut all);
    assert!(all.is_empty(), "{} faults:\n{}", all.len(), all.join("\n"));
    let figure = |id: &str| package.sheet.figures.iter().find(|f| f.id == id).expect("a drawing");
    let structure = &figure("structure").scene;
    assert!(structure.keyed * 3 <= structure.labels, "{} of {}", structure.keyed, structure.labels);
    // What is not written in the drawing is said to stand elsewhere, not left out in silence.
    let words = |id: &str| {
        let texts = figure(id).scene.items.iter().filter_map(|item| match item {
            Item::Text(text) => Some(text.text.clone()),
            Item::Path { .. } => None,
        });
        texts.collect::<Vec<_>>().join("\n")
    };
    assert!(figure("D.M").scene.keyed == 0 || words("D.M").contains("found no room"));
}
