//! Tests of the whole writer: texts written by hand from the sheet's format.
use super::*;
use crate::document::RunningHead;
use crate::figure::{Figure, Scene};
use crate::formula::{Definition, Symbol, Tree, source};
use crate::sheet::{Cell, Column, Comparison, Row, Rule, Step, Table};
use crate::units::{Measure, Printed, Unit, parse_unit};

/// Enters a quantity whose printed form is `count` units of `10^place`.
fn enter(sheet: &mut Sheet, address: &str, count: i64, place: i32, unit: &str) -> u32 {
    let unit = if unit.is_empty() { Unit::none() } else { parse_unit(unit).unwrap_or_else(|_| Unit::none()) };
    let printed = Printed { count, place };
    let id = sheet.ledger.enter(address.into(), printed.value() * unit.scale, unit, Rule::Owed).id;
    sheet.ledger.entry_mut(id).printed = printed;
    id
}

fn step(number: &str, definition: Definition, operands: Vec<(Symbol, u32)>, result: u32) -> Step {
    Step { number: number.into(), definition, operands, result, comparison: None, by: None, note: None }
}

#[track_caller]
fn check(sheet: &Sheet, block: Block, expected: &str) {
    let document = Document { head: RunningHead::default(), blocks: vec![block] };
    assert_eq!(write(&document, sheet, "support"), expected);
}

fn paragraph_of(words: &str) -> Block {
    Block::Paragraph(vec![Inline::Text(words.into())])
}

#[test]
fn a_step_stands_as_the_contract_sets_it_out() {
    let mut sheet = Sheet::default();
    let [l, v1, v2, p1, p2] = ["L", "v₁", "v₂", "φ₁", "φ₂"].map(Symbol::new);
    let tree = (6 / l.squared()) * (v2.clone() - v1.tree()) - (2 / l.tree()) * (2 * p1.clone() + p2.clone());
    let title = "Curvature at the start, from the end displacements";
    let definition = Definition::new(Symbol::new("κ₁"), title, Measure::Curvature, tree).from(&source::CUBIC_BEAM);
    let operands = vec![
        (l, enter(&mut sheet, "BC.G01", 4000, 0, "mm")),
        (v2, enter(&mut sheet, "BC.C1.D04", -3214, -3, "mm")),
        (v1, enter(&mut sheet, "BC.C1.D03", -1034, -4, "mm")),
        (p1, enter(&mut sheet, "C1.U.B.r", -1102, -6, "rad")),
        (p2, enter(&mut sheet, "C1.U.C.r", 4410, -7, "rad")),
    ];
    let result = enter(&mut sheet, "BC.C1.E03", -2847, -10, "1/mm");
    let mut written = step("BC.C1.E03", definition, operands, result);
    written.by = Some("R1".into());
    written.note = Some("Positive curvature\nsags.".into());
    sheet.push_step(written);
    check(
        &sheet,
        Block::Step("BC.C1.E03".into()),
        "```step BC.C1.E03
Curvature at the start, from the end displacements
κ₁ = (6/L²)·(v₂ − v₁) − (2/L)·(2·φ₁ + φ₂)
   = (6/(4000 mm)²)·((−3.214 mm) − (−0.1034 mm)) −
       (2/(4000 mm))·(2·(−0.001102 rad) + 441.0×10⁻⁶ rad)
   = −284.7×10⁻⁹ 1/mm
from: L BC.G01 · v₂ BC.C1.D04 · v₁ BC.C1.D03 · φ₁ C1.U.B.r · φ₂ C1.U.C.r
by: slope-deflection · R1
note: Positive curvature sags.
```
",
    );
}

#[test]
fn a_comparison_ends_in_its_verdict() {
    let mut sheet = Sheet::default();
    let [demand, limit] = ["σ", "σ_lim"].map(Symbol::new);
    let tree = demand.tree() / limit.tree();
    let definition = Definition::new(Symbol::new("u"), "Stress over its limit", Measure::Ratio, tree);
    let operands = vec![
        (demand, enter(&mut sheet, "BC.C1.S01", 447, -1, "MPa")),
        (limit, enter(&mut sheet, "materials.S275.allowable.tension", 165, 0, "MPa")),
    ];
    let result = enter(&mut sheet, "BC.C1.C01", 2710, -4, "");
    let mut written = step("BC.C1.C01", definition, operands, result);
    written.comparison = Some(Comparison { limit: 1.0, at_most: true, ok: true });
    sheet.push_step(written);
    check(
        &sheet,
        Block::Step("BC.C1.C01".into()),
        "```step BC.C1.C01
Stress over its limit
u = σ/σ_lim
  = (44.7 MPa)/(165 MPa)
  = 0.2710 ≤ 1 OK
from: σ BC.C1.S01 · σ_lim materials.S275.allowable.tension
```
",
    );
}

#[test]
fn a_single_symbol_and_a_bare_number_keep_their_three_lines() {
    let mut sheet = Sheet::default();
    let x = Symbol::new("x_B");
    let operand = enter(&mut sheet, "nodes.B.x", 4000, 0, "mm");
    let result = enter(&mut sheet, "B.G01", 4000, 0, "mm");
    let definition = Definition::new(Symbol::new("x"), "Place", Measure::Length, x.tree());
    sheet.push_step(step("B.G01", definition, vec![(x, operand)], result));
    let result = enter(&mut sheet, "BC.G09", 1, 0, "");
    let definition = Definition::new(Symbol::new("K"), "Effective length factor", Measure::Number, Tree::Number(1.0));
    sheet.push_step(step("BC.G09", definition, vec![], result));
    check(
        &sheet,
        Block::Step("B.G01".into()),
        "```step B.G01\nPlace\nx = x_B\n  = 4000 mm\n  = 4000 mm\nfrom: x_B nodes.B.x\n```\n",
    );
    check(&sheet, Block::Step("BC.G09".into()), "```step BC.G09\nEffective length factor\nK = 1\n  = 1\n  = 1\n```\n");
}

#[test]
fn a_table_has_its_name_before_it_and_no_padding() {
    let mut sheet = Sheet::default();
    let x = enter(&mut sheet, "C1.U.B.x", -12, -1, "mm");
    let r = enter(&mut sheet, "C1.U.B.r", 0, -3, "mrad");
    let column = |symbol: &str, unit: &str| Column { symbol: symbol.into(), unit: parse_unit(unit).ok() };
    sheet.push_table(Table {
        id: "C1.U".into(),
        title: "Node displacements, combination C1".into(),
        head: "Node".into(),
        columns: vec![column("x", "mm"), column("r", "mrad"), Column { symbol: "from".into(), unit: None }],
        rows: vec![
            Row { name: "B".into(), cells: vec![Cell::Quantity(x), Cell::Quantity(r), Cell::Address("C1.R".into())] },
            Row { name: "C".into(), cells: vec![Cell::Empty, Cell::Empty, Cell::Text("a | b".into())] },
        ],
        note: Some("Stated, then proved.".into()),
    });
    check(
        &sheet,
        Block::Table("C1.U".into()),
        "**Table C1.U** Node displacements, combination C1\n\
         | Node | x, mm | r, mrad | from |\n|---|---:|---:|---|\n\
         | B | −1.2 | 0.000 | C1.R |\n| C | | | a \\| b |\n\nStated, then proved.\n",
    );
}

#[test]
fn a_figure_is_linked_beside_the_package() {
    let mut sheet = Sheet::default();
    sheet.figures.push(Figure {
        id: "C1.M".into(),
        title: "Bending moments".into(),
        alternative: "Moments [kN·m] of C1".into(),
        scene: Scene::default(),
    });
    check(
        &sheet,
        Block::Figure("C1.M".into()),
        "![Moments \\[kN·m\\] of C1](support.figures/C1.M.svg)\n\n**Figure C1.M** Bending moments\n",
    );
}

#[test]
fn each_sentence_begins_a_line() {
    check(
        &Sheet::default(),
        paragraph_of("By A. Person, rev. 2. It holds. Does it? 3. Yes (always.) No."),
        "By A. Person, rev. 2.\nIt holds.\nDoes it? 3.\nYes (always.) No.\n",
    );
}

#[test]
fn a_sentence_may_end_in_bold() {
    let bold = Inline::Strong(vec![Inline::Text("Stop.".into())]);
    let block = Block::Paragraph(vec![bold, Inline::Text(" Then look. Go.".into())]);
    check(&Sheet::default(), block, "**Stop.**\nThen look.\nGo.\n");
}

#[test]
fn the_beginning_of_a_line_is_never_a_mark() {
    for (words, expected) in [
        ("# a", "\\# a\n"),
        ("- a", "\\- a\n"),
        ("+ a", "\\+ a\n"),
        ("> a", "\\> a\n"),
        ("=== a", "\\=== a\n"),
        ("1. a", "1\\. a\n"),
        ("```step X", "\\`\\`\\`step X\n"),
        ("2.5 kN", "2.5 kN\n"),
        ("a\n\n# b", "a # b\n"),
    ] {
        check(&Sheet::default(), paragraph_of(words), expected);
    }
}

#[test]
fn a_fence_is_longer_than_what_it_holds() {
    check(&Sheet::default(), Block::Verbatim("a\n````\nb".into()), "`````text\na\n````\nb\n`````\n");
}

#[test]
fn what_the_sheet_does_not_hold_is_said() {
    check(&Sheet::default(), Block::Step("A.G01".into()), "**The step A.G01 is missing from this package.**\n");
}

#[test]
fn contents_and_links_lead_to_headings() {
    let heading = |level, words: &str, anchor: &str| Block::Heading {
        level,
        text: vec![Inline::Text(words.into())],
        anchor: anchor.into(),
    };
    let link = Inline::Link { to: "BC.G01".into(), text: vec![Inline::Text("BC.G01".into())] };
    let document = Document {
        head: RunningHead::default(),
        blocks: vec![
            Block::Contents,
            heading(2, "Member sheets", "member-sheets"),
            heading(3, "Member BC", "member-bc"),
            heading(4, "Geometry", "geometry"),
            Block::Step("BC.G01".into()),
            Block::Paragraph(vec![link]),
        ],
    };
    assert_eq!(
        write(&document, &Sheet::default(), "s"),
        "- [Member sheets](#member-sheets)\n  - [Member BC](#member-bc)\n\n## Member sheets\n\n### Member BC\n\n\
         #### Geometry\n\n**The step BC.G01 is missing from this package.**\n\n[BC.G01](#member-bc)\n"
    );
}
