//! Every drawing of every example: legible, whole, and the same each time.
use super::*;
use crate::figure::{Item, Scene};

const EXAMPLES: [(&str, &str); 7] = [
    ("canopy-roof-truss", include_str!("../../../demo-inputs/canopy-roof-truss.yaml")),
    ("hanger-rod", include_str!("../../../demo-inputs/hanger-rod.yaml")),
    ("lifting-frame", include_str!("../../../demo-inputs/lifting-frame.yaml")),
    ("pipe-support-portal", include_str!("../../../demo-inputs/pipe-support-portal.yaml")),
    ("platform-beam-us", include_str!("../../../demo-inputs/platform-beam-us.yaml")),
    ("pump-frame-hinged", include_str!("../../../demo-inputs/pump-frame-hinged.yaml")),
    ("timber-canopy", include_str!("../../../demo-inputs/timber-canopy.yaml")),
];

fn drawings(text: &str) -> Vec<Figure> {
    match crate::package::solve(text) {
        Ok(solved) => draw(&solved.model, &solved.solution, &solved.results),
        Err(refusal) => panic!("{}", refusal.render("example", crate::diagnostic::Colour::Never)),
    }
}

fn overlap(a: &[f64; 4], b: &[f64; 4]) -> bool {
    a[0] < b[2] - 0.01 && b[0] < a[2] - 0.01 && a[1] < b[3] - 0.01 && b[1] < a[3] - 0.01
}

/// Whether a line passes through a rectangle, by points close to each other on it.
fn passes(a: [f64; 2], b: [f64; 2], area: &[f64; 4]) -> bool {
    (0..=400).map(|k| f64::from(k) / 400.0).any(|t| {
        let p = [a[0] + t * (b[0] - a[0]), a[1] + t * (b[1] - a[1])];
        p[0] > area[0] && p[0] < area[2] && p[1] > area[1] && p[1] < area[3]
    })
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
    for (at, (text, area)) in texts.iter().enumerate() {
        if area[0] < 0.0 || area[1] < 0.0 || area[2] > scene.width || area[3] > scene.height {
            faults.push(format!("`{text}` leaves the sheet"));
        }
        faults.extend(
            texts[..at]
                .iter()
                .filter(|(_, other)| overlap(area, other))
                .map(|(other, _)| format!("`{text}` covers `{other}`")),
        );
        for item in &scene.items {
            if let Item::Path { points, stroke: Some(stroke), closed: false, .. } = item
                && stroke.width >= 0.28
                && points.windows(2).any(|w| passes(w[0], w[1], area))
            {
                faults.push(format!("`{text}` lies on a line"));
            }
        }
    }
    let outside = |p: &[f64; 2]| p[0] < 0.0 || p[1] < 0.0 || p[0] > scene.width || p[1] > scene.height;
    for item in &scene.items {
        if let Item::Path { points, .. } = item
            && points.iter().any(outside)
        {
            faults.push("a line leaves the sheet".into());
        }
    }
    if scene.height > 115.0 {
        faults.push(format!("{} mm tall", scene.height));
    }
    faults
}

#[test]
fn labels_are_legible_and_everything_is_on_the_sheet() {
    let mut all = Vec::new();
    for (name, text) in EXAMPLES {
        for figure in drawings(text) {
            all.extend(faults(&figure.scene).into_iter().map(|fault| format!("{name} {}: {fault}", figure.id)));
        }
    }
    assert!(all.is_empty(), "{}", all.join("\n"));
}

#[test]
fn drawn_twice_they_are_the_same_bytes() {
    let (_, text) = EXAMPLES[5];
    let bytes = || drawings(text).iter().map(crate::write::svg::write).collect::<Vec<_>>();
    assert_eq!(bytes(), bytes());
}

#[test]
fn every_case_and_combination_is_drawn() {
    for (name, text) in EXAMPLES {
        let figures = drawings(text);
        let has = |id: &str| figures.iter().any(|f| f.id == id && !f.alternative.is_empty());
        assert!(has("structure") && has("signs") && has("utilisation"), "{name}");
        let Ok(solved) = crate::package::solve(text) else { panic!("{name}") };
        assert!(solved.model.cases.iter().all(|c| has(&format!("case.{}", c.name))), "{name}");
        assert!(solved.model.combinations.iter().all(|c| has(&format!("{}.deflected", c.name))), "{name}");
    }
}
