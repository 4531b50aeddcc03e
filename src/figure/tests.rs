//! Which way arrows point and diagrams lie, on a beam small enough to judge by eye.
use super::*;
use crate::model::{Model, read};

fn beam(load: &str) -> Model {
    let text = format!(
        "calcsheaf: 1\nproject: {{title: t}}\nmaterials:\n  S: {{E: 210 GPa}}\nsections:\n  R: {{shape: rectangle, depth: \
         100 mm, width: 50 mm}}\nnodes:\n  A: {{x: 0 m, y: 0 m}}\n  B: {{x: 4 m, y: 0 m}}\nsupports:\n  A: pinned\n  B: \
         {{hold: [y]}}\nmembers:\n  M1: {{kind: frame, from: A, to: B, section: R, material: S}}\nload_cases:\n  L:\n    \
         loads:\n      - {load}\n"
    );
    match read(&text) {
        Ok(reading) => reading.model,
        Err(_) => panic!("the beam is not read"),
    }
}

/// Tips of filled arrow heads with the point halfway between their other corners.
fn heads(scene: &Scene) -> Vec<([f64; 2], [f64; 2])> {
    scene
        .items
        .iter()
        .filter_map(|item| match item {
            Item::Path { points, fill: Some(0.0), stroke: None, .. } if points.len() == 3 => {
                Some((points[0], [(points[1][0] + points[2][0]) / 2.0, (points[1][1] + points[2][1]) / 2.0]))
            }
            _ => None,
        })
        .collect()
}

#[track_caller]
fn arrows_point(load: &str, x: f64, y: f64) {
    let model = beam(load);
    let figure = load_case(&model, &model.cases[0]);
    let heads = heads(&figure.scene);
    assert!(!heads.is_empty(), "{load}: no arrow");
    for (tip, back) in heads {
        let along = (tip[0] - back[0]) * x + (tip[1] - back[1]) * y;
        let size = (tip[0] - back[0]).hypot(tip[1] - back[1]);
        assert!(along > 0.99 * size, "{load}: an arrow points elsewhere");
    }
}

#[test]
fn arrows_follow_the_sign_of_the_load() {
    // The sheet's y runs downward: a load along −Y points to larger y.
    arrows_point("{on: M1, dir: Y, w: -3 kN/m}", 0.0, 1.0);
    arrows_point("{on: M1, dir: Y, w: 3 kN/m}", 0.0, -1.0);
    arrows_point("{on: M1, dir: Y, p: -3 kN, at: 1 m}", 0.0, 1.0);
    arrows_point("{on: M1, dir: X, w: -3 kN/m}", -1.0, 0.0);
    arrows_point("{at: B, fx: 3 kN}", 1.0, 0.0);
    arrows_point("{at: B, fy: 3 kN}", 0.0, -1.0);
}

#[test]
fn the_moment_of_a_simply_supported_beam_lies_below_it() {
    let model = beam("{on: M1, dir: Y, w: -3 kN/m}");
    // w·L²/8 at the middle of a uniformly loaded beam, tension below.
    let curves = vec![vec![(0.0, 0.0), (2.0, 3e3 * 16.0 / 8.0), (4.0, 0.0)]];
    let drawn = diagram(&model, &Diagram { letter: "M", combination: "L".into(), curves }).map(|f| f.scene);
    let scene = drawn.unwrap_or_default();
    let level = |item: &Item, width: f64| match item {
        Item::Path { points, stroke: Some(stroke), closed: false, .. } if (stroke.width - width).abs() < 1e-9 => {
            Some(points.iter().map(|p| p[1]).fold(f64::NEG_INFINITY, f64::max))
        }
        _ => None,
    };
    let member = scene.items.iter().find_map(|i| level(i, 0.45)).unwrap_or(f64::INFINITY);
    let lowest = scene.items.iter().filter_map(|i| level(i, 0.3)).fold(f64::NEG_INFINITY, f64::max);
    assert!(lowest > member + 10.0, "member at {member}, curve down to {lowest}");
}

#[test]
fn numbers_keep_their_digits() {
    assert_eq!(number::number(-11.0, 4), "−11");
    assert_eq!(number::number(0.123_46, 3), "0.123");
    assert_eq!(number::number(12_345.0, 3), "12345");
}
