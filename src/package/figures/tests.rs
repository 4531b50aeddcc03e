//! Every drawing of every example: whole, and the same each time.
use super::*;

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
