//! Whole packages: everything within its box, nothing over anything else, equals signs in one column.
#![allow(clippy::unwrap_used, reason = "a test may fail loudly")]
use super::*;
use crate::formula::{Definition, Symbol, Tree};
use crate::sheet::{Cell, Column as TableColumn, Row, Rule as Digits, Step, Table};
use crate::units::{Measure, Printed, Unit, parse_unit};

fn pages_of(document: &Document, sheet: &Sheet, paper: Paper) -> Pages {
    typeset(document, sheet, paper, fixture::fonts())
}

fn fixture_pages(paper: Paper) -> Pages {
    let sheet = fixture::sheet(3);
    pages_of(&fixture::document(&sheet), &sheet, paper)
}

fn runs(frame: &Frame) -> impl Iterator<Item = &Run> {
    frame.items.iter().filter_map(|item| if let Item::Run(run) = item { Some(run) } else { None })
}

/// What a reader program reads out: spoken texts in place of what they stand for, a space between runs apart.
pub(crate) fn said(frame: &Frame, fonts: &Fonts) -> String {
    let mut text = String::new();
    let mut speaking = false;
    let mut words: Option<&str> = None;
    let mut end = [0.0, 0.0];
    for item in &frame.items {
        match item {
            Item::Run(run) => {
                let apart = (run.x - end[0]).abs() > 1.0 || (run.y - end[1]).abs() > 6.0;
                if apart && (!speaking || words.is_some()) {
                    text.push(' ');
                }
                end = [run.x + run.width, run.y];
                text.push_str(words.take().unwrap_or_default());
                if !speaking {
                    text.extend(frame.glyphs_of(run).iter().map(|glyph| fonts.face(run.face).character(glyph.id)));
                }
            }
            Item::Spoken(spoken) => (speaking, words) = (true, Some(&**spoken)),
            Item::SpokenEnd => (speaking, words) = (false, None),
            _ => {}
        }
    }
    text.split_whitespace().collect::<Vec<_>>().join(" ")
}

/// Everything lies on the paper between its margins, and text of the measure ends where the measure does.
fn check_within(pages: &Pages, paper: Paper) {
    let g = Geometry::of(paper);
    for (at, frame) in pages.sheets.iter().enumerate() {
        for run in runs(frame) {
            let right = run.x + run.width;
            assert!(run.x >= g.left - 0.1 && right <= g.edge + 0.1, "sheet {at}: {run:?}");
            assert!(run.y > g.head && run.y <= g.bottom + 22.0, "sheet {at}: {run:?}");
            let in_body = run.y > g.top && run.y < g.bottom;
            assert!(!in_body || run.x >= g.check || right <= g.right + 0.6, "sheet {at}, past the measure: {run:?}");
        }
        for item in &frame.items {
            match item {
                Item::Rule(rule) => {
                    assert!(rule.x >= g.left - 0.1 && rule.x + rule.width <= g.edge + 0.1, "sheet {at}: {rule:?}");
                    assert!(rule.y >= g.head && rule.y + rule.height <= g.bottom + 22.5, "sheet {at}: {rule:?}");
                }
                Item::Path(path) => {
                    for [x, y] in &path.points {
                        assert!((g.left - 0.1..=g.edge + 0.1).contains(x) && (g.head..=g.bottom).contains(y));
                    }
                }
                _ => {}
            }
        }
    }
}

/// No two texts overlap: the middle bands of their letters are apart.
fn check_apart(pages: &Pages) {
    for (at, frame) in pages.sheets.iter().enumerate() {
        let boxes: Vec<[f32; 4]> = runs(frame)
            .filter(|run| {
                // Parts of one tall bracket overlap by design.
                let first = fixture::fonts().face(run.face).character(frame.glyphs_of(run)[0].id);
                run.width > 1.0 && !(run.face == FaceName::Math && run.count == 1 && "()|√⎛⎜⎝⎞⎟⎠⎷⏐".contains(first))
            })
            .map(|run| [run.x + 0.4, run.x + run.width - 0.4, run.y - 0.42 * run.size, run.y - 0.05 * run.size])
            .collect();
        for (first, a) in boxes.iter().enumerate() {
            for b in &boxes[first + 1..] {
                let apart = a[1] <= b[0] || b[1] <= a[0] || a[3] <= b[2] || b[3] <= a[2];
                assert!(apart, "sheet {at}: {a:?} {b:?}");
            }
        }
    }
}

#[test]
fn everything_lies_within_its_box_and_apart() {
    for paper in [Paper::A4, Paper::Letter] {
        let pages = fixture_pages(paper);
        assert!(pages.sheets.len() > 5);
        check_within(&pages, paper);
        check_apart(&pages);
    }
}

#[test]
fn equals_signs_of_a_step_stand_in_one_column() {
    let fonts = fixture::fonts();
    let equals = fonts.face(FaceName::Math).glyph('=');
    let pages = fixture_pages(Paper::A4);
    let mut steps = 0;
    for frame in &pages.sheets {
        let mut columns: Vec<(f32, f32)> = runs(frame)
            .filter(|run| run.face == FaceName::Math && frame.glyphs_of(run)[0].id == equals)
            .map(|run| (run.y, run.x))
            .collect();
        columns.sort_by(|a, b| a.0.total_cmp(&b.0));
        assert_eq!(columns.len() % 3, 0, "three lines a step");
        for step in columns.chunks(3) {
            assert!(step.iter().all(|(_, x)| (x - step[0].1).abs() < 0.01), "{step:?}");
            steps += 1;
        }
    }
    assert_eq!(steps, 3 * 6 + 1);
}

#[test]
fn formulas_are_read_back_as_in_the_markdown() {
    let fonts = fixture::fonts();
    let pages = fixture_pages(Paper::A4);
    let text: String = pages.sheets.iter().map(|frame| said(frame, fonts) + "\n").collect();
    for line in [
        "κ₁ = (6/L²)·(v₂ − v₁) − (2/L)·(2·φ₁ + φ₂)",
        "= (6/(4000 mm)²)·((−3.214 mm) − (−0.1034 mm)) − (2/(4000 mm))·(2·(−0.001102 rad) + 441.0×10⁻⁶ rad)",
        "= −284.7×10⁻⁹ 1/mm",
        "from L B0.G01",
        "= 1.204 > 1 NOT OK",
        "Sheet 1 of",
        "N_start, kN·m",
        "−110.2×10⁻⁶",
        "areas in mm²",
    ] {
        assert!(text.contains(line), "{line}");
    }
}

#[test]
fn a_table_that_goes_on_repeats_its_head() {
    let fonts = fixture::fonts();
    let sheet = fixture::sheet(12);
    let pages = pages_of(&fixture::document(&sheet), &sheet, Paper::A4);
    let with_rows: Vec<String> = pages
        .sheets
        .iter()
        .map(|frame| said(frame, fonts))
        .filter(|text| text.contains(" N40 ") || text.contains(" N5 "))
        .collect();
    assert!(with_rows.len() > 1);
    assert!(with_rows.iter().all(|text| text.contains("Node x, mm y, mm r, rad")));
    assert!(with_rows[1].contains("C1.U continued"));
}

#[test]
fn contents_and_links_lead_to_the_right_sheet() {
    let fonts = fixture::fonts();
    let pages = fixture_pages(Paper::A4);
    let spot = pages.spot("C1.U.N1.r").unwrap();
    assert!(said(&pages.sheets[spot.sheet], fonts).contains("N1 0.038"));
    assert_eq!(pages.spot("C1.U.N1"), Some(spot));
    assert!(pages.spot("nothing.of.that.name").is_none());
    let members = pages.spot("members").unwrap();
    let cover = said(&pages.sheets[0], fonts);
    assert!(cover.contains(&format!("Members {}", members.sheet + 1)), "{cover}");
    let links: usize = pages.sheets.iter().map(|frame| frame.links.len()).sum();
    let leading = pages.sheets.iter().flat_map(|frame| &frame.links).filter(|link| pages.spot(&link.to).is_some());
    assert!(links > 50 && leading.count() > 30);
}

#[test]
fn decimal_points_of_a_column_stand_in_one_line() {
    let fonts = fixture::fonts();
    let face = fonts.face(FaceName::Regular);
    let point = face.glyph('.');
    let pages = fixture_pages(Paper::A4);
    let spot = pages.spot("C1.U").unwrap();
    let frame = &pages.sheets[spot.sheet];
    // The column of x: numbers like 0.031 and 0.150, all with three decimals.
    let mut places = Vec::new();
    for run in runs(frame).filter(|run| run.y > spot.y + 30.0 && run.x > 150.0 && run.x < 180.0) {
        let mut x = run.x;
        for glyph in frame.glyphs_of(run) {
            if glyph.id == point {
                places.push(x);
            }
            x += f32::from(face.advance(glyph.id) + glyph.after) * run.size / 1000.0;
        }
    }
    assert!(places.len() >= 5);
    let columns = places.iter().fold(Vec::<f32>::new(), |mut known, x| {
        if !known.iter().any(|k| (k - x).abs() < 0.05) {
            known.push(*x);
        }
        known
    });
    assert!(columns.len() <= 2, "{columns:?}");
}

fn hostile_sheet() -> Sheet {
    let mut sheet = Sheet::default();
    let long = "ABCDEFGHIJKLMNOPQRSTUVWX";
    let number = format!("{long}.{long}.C01");
    let unit = parse_unit("kN.m/rad").unwrap_or_else(|_| Unit::none());
    let mut operands = Vec::new();
    let mut terms = Vec::new();
    for at in 0..24 {
        let symbol = Symbol::owned(format!("σ_governing_place_{at}"));
        let id = sheet.ledger.enter(format!("{number}.{at}"), 1.0, unit.clone(), Digits::Owed).id;
        sheet.ledger.entry_mut(id).printed = Printed { count: -123_456_789_012 * (at + 1), place: -17 };
        terms.push(symbol.tree() / (symbol.squared() + 1));
        operands.push((symbol, id));
    }
    let sum = Tree::sum(terms);
    let tree = Tree::Max(vec![
        sum.clone().root(),
        (sum.clone() / sum.clone()).absolute(),
        Tree::Sine(Box::new(sum.squared())),
    ]);
    let result = sheet.ledger.enter(number.clone(), 1.0, unit, Digits::Up).id;
    sheet.ledger.entry_mut(result).printed = Printed { count: i64::MAX, place: -30 };
    let title = "word ".repeat(60);
    sheet.push_step(Step {
        number: number.clone(),
        definition: Definition::new(
            Symbol::new("σ_the_longest_index_that_anyone_would_write"),
            title,
            Measure::Stress,
            tree,
        ),
        operands,
        result,
        comparison: None,
        by: Some("x".repeat(300)),
        note: Some("日本 🦀 ".repeat(40)),
    });
    let columns = (0..30).map(|at| TableColumn { symbol: format!("{long}_{at}"), unit: None }).collect();
    let row = |at: usize| Row {
        name: format!("{long}{at}"),
        cells: (0..30).map(|c| if c % 2 == 0 { Cell::Quantity(result) } else { Cell::Text("y".repeat(90)) }).collect(),
    };
    let rows = (0..3).map(row).collect();
    sheet.push_table(Table {
        id: long.repeat(3),
        title: "t".repeat(200),
        head: long.into(),
        columns,
        rows,
        note: None,
    });
    sheet.push_table(Table {
        id: "empty".into(),
        title: String::new(),
        head: String::new(),
        columns: vec![],
        rows: vec![],
        note: None,
    });
    sheet
}

#[test]
fn long_names_and_wide_tables_stay_within_the_measure() {
    let sheet = hostile_sheet();
    let words = vec![Inline::Text("z".repeat(400))];
    let nested = |depth: usize| {
        (0..depth).fold(Block::Paragraph(words.clone()), |inner, _| Block::List {
            ordered: true,
            items: vec![vec![inner], vec![]],
        })
    };
    let mut blocks: Vec<Block> = sheet.steps.iter().map(|step| Block::Step(step.number.clone())).collect();
    blocks.extend(sheet.tables.iter().map(|table| Block::Table(table.id.clone())));
    blocks.extend([
        Block::Heading { level: 2, text: words.clone(), anchor: "a".into() },
        nested(8),
        Block::Caution(vec![nested(3), Block::Verbatim("v".repeat(500))]),
        Block::Verbatim(format!("{}\n\n{}", "日本語 ".repeat(80), "w ".repeat(300))),
        Block::Grid { head: vec![], rows: vec![] },
        Block::Grid { head: vec![words.clone(), words.clone()], rows: vec![vec![words.clone()], vec![]] },
        Block::Grid { head: vec![words.clone()], rows: vec![vec![vec![Inline::Text("many words ".repeat(2000))]]] },
        Block::Paragraph(vec![]),
        Block::List { ordered: false, items: vec![] },
        Block::Figure("none".into()),
        Block::Contents,
    ]);
    let head = RunningHeadOf::long();
    let document = Document { head, blocks };
    for paper in [Paper::A4, Paper::Letter] {
        let pages = pages_of(&document, &sheet, paper);
        check_within(&pages, paper);
        assert!(pages.missing.contains(&'日') && pages.missing.contains(&'🦀'));
    }
}

struct RunningHeadOf;

impl RunningHeadOf {
    fn long() -> crate::document::RunningHead {
        let text = || "A very long text for so small a place ".repeat(4);
        crate::document::RunningHead {
            title: text(),
            number: text(),
            part: text(),
            revision: text(),
            status: text(),
            prepared: text(),
            checked: text(),
            preliminary: true,
            beyond_limit: true,
            ..Default::default()
        }
    }
}

#[test]
fn an_empty_document_is_one_sheet() {
    let pages = pages_of(&Document::default(), &Sheet::default(), Paper::A4);
    assert_eq!(pages.sheets.len(), 1);
}
