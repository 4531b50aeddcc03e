//! Formulas of every shape: within their boxes, about the axis, broken after operators.
#![allow(clippy::unwrap_used, reason = "a test may fail loudly")]
use super::*;
use crate::typeset::fixture;

fn build(tree: &Tree, filling: Filling<'_>) -> (Frame, Box2) {
    let fonts = fixture::fonts();
    let mut setter = Setter::new(fonts);
    let mut frame = Frame::default();
    let set = Maths { setter: &mut setter, frame: &mut frame }.build(tree, filling, Place::Alone, 10.0, 0);
    (frame, set)
}

fn symbols() -> [Symbol; 3] {
    ["a", "b_1", "κ₁"].map(Symbol::new)
}

fn runs(frame: &Frame) -> Vec<Run> {
    frame.items.iter().filter_map(|item| if let Item::Run(run) = item { Some(*run) } else { None }).collect()
}

#[test]
fn a_fraction_stands_about_the_axis() {
    let [a, b, _] = symbols();
    let (frame, set) = build(&(a / b), Filling::Symbols);
    let rule = frame.items.iter().find_map(|item| if let Item::Rule(rule) = item { Some(*rule) } else { None });
    let rule = rule.unwrap();
    assert!((rule.y + rule.height / 2.0 + 2.5).abs() < 1e-4, "the rule's middle is on the axis, 0.25 em up");
    let all = runs(&frame);
    assert!(all[0].y < rule.y && all[1].y > rule.y);
    assert!(set.height > 5.0 && set.depth > 3.0);
}

#[test]
fn every_shape_stays_within_its_box() {
    let [a, b, c] = symbols();
    let number = |symbol: &Symbol| {
        Some(if symbol.as_str() == "a" {
            (Printed { count: -1102, place: -7 }, "rad/mm")
        } else {
            (Printed { count: 4000, place: 0 }, "N/mm²")
        })
    };
    let sum = a.clone() + b.clone() - c.tree();
    let shapes = [
        sum.clone(),
        -sum.clone(),
        sum.clone() * c.tree() * 3,
        sum.clone() / (a.clone() / b.squared()),
        sum.clone().squared(),
        (a.clone() / b.tree()).cubed().root(),
        (sum.clone() / b.tree()).absolute(),
        Tree::Max(vec![a.tree(), sum.clone(), b.clone() / c.tree()]),
        Tree::ArcTangent(Box::new(b.clone() / c.tree())),
        ((sum.clone() / b.tree()) * (sum / c.tree())).root(),
        Tree::Pi * a.power(-2),
    ];
    for tree in &shapes {
        for filling in [Filling::Symbols, Filling::Numbers(&number)] {
            let (frame, set) = build(tree, filling);
            for run in runs(&frame) {
                assert!(run.x > -0.01 && run.x + run.width < set.width + 0.5, "{tree:?}");
                assert!(-run.y < set.height + 0.01 && run.y < set.depth + 0.01, "{tree:?}");
            }
            for item in &frame.items {
                if let Item::Rule(rule) = item {
                    assert!(rule.x > -0.01 && rule.x + rule.width < set.width + 0.01, "{tree:?}");
                    assert!(-rule.y < set.height + 0.01, "{tree:?}");
                }
            }
        }
    }
}

#[test]
fn brackets_grow_about_what_they_hold() {
    let [a, b, c] = symbols();
    let (frame, set) = build(&(((a / b.clone()) / (c.tree() / b)).squared()), Filling::Symbols);
    let all = runs(&frame);
    assert!(set.height + set.depth > 25.0);
    // Read first, so it stands first, at the left end.
    assert!(all[0].x.abs() < 0.01);
}

#[test]
fn a_long_formula_is_broken_after_operators_within_the_measure() {
    let terms: Vec<Tree> = (1..30).map(|at| Symbol::indexed("F", at) * Symbol::indexed("x", at)).collect();
    let tree = Tree::sum(terms) * Symbol::new("L") / Symbol::new("E");
    let fonts = fixture::fonts();
    for room in [120.0, 250.0, 340.0] {
        let mut setter = Setter::new(fonts);
        let mut frame = Frame::default();
        let lines = Maths { setter: &mut setter, frame: &mut frame }.lines(&tree, Filling::Symbols, 10.0, room, 16.0);
        assert!(lines.len() > 2);
        for (at, line) in lines.iter().enumerate() {
            assert!(line.width <= room - if at > 0 { 16.0 } else { 0.0 } + 0.01);
            for item in &frame.items[line.from..line.to] {
                if let Item::Run(run) = item {
                    assert!(run.x > -0.01 && run.x + run.width <= line.width + 0.5);
                }
            }
        }
        assert_eq!(lines.last().map(|line| line.to), Some(frame.items.len()));
    }
}
