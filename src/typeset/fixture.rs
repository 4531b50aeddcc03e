//! A small package for tests: every block, steps of every shape, narrow and wide tables, a figure.
use crate::document::{Block, Document, Inline, RunningHead};
use crate::figure::{Anchor, Dash, Figure, Item, Scene, Stroke, Style, TextItem};
use crate::formula::{Definition, Symbol, Tree, source};
use crate::sheet::{Cell, Column, Comparison, Row, Rule, Sheet, Step, Table};
use crate::units::{Measure, Printed, Unit, parse_unit};

/// The built-in fonts, read once for all tests.
#[cfg(test)]
pub(crate) fn fonts() -> &'static super::Fonts {
    static FONTS: std::sync::LazyLock<super::Fonts> = std::sync::LazyLock::new(super::Fonts::built_in);
    &FONTS
}

fn unit(text: &str) -> Unit {
    parse_unit(text).unwrap_or_else(|_| Unit::none())
}

/// Writes a quantity down; `count` and `place` are its printed digits.
fn enter(sheet: &mut Sheet, address: &str, unit_text: &str, count: i64, place: i32) -> u32 {
    let unit = unit(unit_text);
    let printed = Printed { count, place };
    let id = sheet.ledger.enter(address.into(), printed.value() * unit.scale, unit, Rule::Owed).id;
    sheet.ledger.entry_mut(id).printed = printed;
    id
}

fn step(sheet: &mut Sheet, number: &str, definition: Definition, operands: Vec<(Symbol, u32)>, result: u32) -> Step {
    let step = Step { number: number.into(), definition, operands, result, comparison: None, by: None, note: None };
    sheet.push_step(step.clone());
    step
}

/// The sheet: `members` members of six steps each, tables and a figure.
pub(crate) fn sheet(members: usize) -> Sheet {
    let mut sheet = Sheet::default();
    let [l, v1, v2, p1, p2] = ["L", "v₁", "v₂", "φ₁", "φ₂"].map(Symbol::new);
    let [k1, e, i, n, a, m] = ["κ₁", "E", "I_z", "N", "A", "M_start"].map(Symbol::new);
    let [y, s, c, f] = ["y_top", "σ_top", "c", "f"].map(Symbol::new);
    for member in 0..members {
        let name = format!("B{member}");
        let number = |nn: &str| format!("{name}.C1.{nn}");
        let length = enter(&mut sheet, &format!("{name}.G01"), "mm", 4000, 0);
        let (mv1, mv2) =
            (enter(&mut sheet, &number("D03"), "mm", -1034, -4), enter(&mut sheet, &number("D04"), "mm", -3214, -3));
        let (mp1, mp2) =
            (enter(&mut sheet, "C1.U.N0.r", "rad", -1102, -6), enter(&mut sheet, "C1.U.N1.r", "rad", 4410, -7));
        let tree = (6 / l.squared()) * (v2.clone() - v1.tree()) - (2 / l.tree()) * (2 * p1.clone() + p2.clone());
        let definition =
            Definition::new(k1.clone(), "Curvature at the start, from the end displacements", Measure::Curvature, tree)
                .from(&source::CUBIC_BEAM);
        let curvature = enter(&mut sheet, &number("E03"), "1/mm", -2847, -10);
        let operands =
            vec![(l.clone(), length), (v2.clone(), mv2), (v1.clone(), mv1), (p1.clone(), mp1), (p2.clone(), mp2)];
        step(&mut sheet, &number("E03"), definition, operands, curvature);

        let modulus = enter(&mut sheet, "materials.S275.E", "MPa", 210_000, 0);
        let inertia = enter(&mut sheet, "A5.P04", "mm4", 1943, 4);
        let tree = e.clone() * i.clone() * k1.clone();
        let definition =
            Definition::new(m.clone(), "Bending moment at the start", Measure::Moment, tree).from(&source::BENDING);
        let moment = enter(&mut sheet, &number("F03"), "kN.m", -1162, -3);
        let operands = vec![(e.clone(), modulus), (i.clone(), inertia), (k1.clone(), curvature)];
        step(&mut sheet, &number("F03"), definition, operands, moment);

        let force = enter(&mut sheet, &number("F01"), "kN", -1225, -2);
        let area = enter(&mut sheet, "A5.P01", "mm2", 2848, 0);
        let top = enter(&mut sheet, "A5.P05", "mm", 100, 0);
        let tree = n.clone() / a.tree() - (m.clone() * y.clone()) / i.tree();
        let definition = Definition::new(s.clone(), "Stress of the top fibre at the start", Measure::Stress, tree)
            .from(&source::BENDING);
        let stress = enter(&mut sheet, &number("S01"), "MPa", 1679, -3);
        let operands =
            vec![(n.clone(), force), (a.clone(), area), (m.clone(), moment), (y.clone(), top), (i.clone(), inertia)];
        let worked = step(&mut sheet, &number("S01"), definition, operands, stress);
        let limit = enter(&mut sheet, "materials.S275.allowable.tension", "MPa", 165, 0);
        let ratio = enter(&mut sheet, &number("C01"), "", if member == 1 { 1204 } else { 102 }, -3);
        let tree = s.clone().tree().absolute() / f.tree();
        let definition = Definition::new(Symbol::new("u"), "Stress against its limit", Measure::Ratio, tree);
        let ok = member != 1;
        sheet.push_step(Step {
            number: number("C01"),
            definition,
            operands: vec![(s.clone(), worked.result), (f.clone(), limit)],
            result: ratio,
            comparison: Some(Comparison { limit: 1.0, at_most: true, ok }),
            by: Some("R1".into()),
            note: (!ok).then(|| "Beyond the limit: the member, the load or the limit has to change before use.".into()),
        });
        let dx = Symbol::new("Δx");
        let dy = Symbol::new("Δy");
        let x = enter(&mut sheet, &number("G11"), "m", 2400, -3);
        let h = enter(&mut sheet, &number("G12"), "m", -3200, -3);
        let definition =
            Definition::new(l.clone(), "Length between the nodes", Measure::Span, (dx.squared() + dy.squared()).root());
        step(&mut sheet, &format!("{name}.G01"), definition, vec![(dx.clone(), x), (dy.clone(), h)], length);
        let definition = Definition::new(
            c.clone(),
            "Largest of the slopes and their mean",
            Measure::Number,
            Tree::Max(vec![Tree::Sine(Box::new(dx.clone() / l.tree())), (dy.clone() / l.tree()).absolute().squared()]),
        );
        let slope = enter(&mut sheet, &number("G13"), "", 640, -3);
        step(&mut sheet, &number("G13"), definition, vec![(dx, x), (l.clone(), length), (dy, h)], slope);
    }
    balance(&mut sheet);
    tables(&mut sheet, members);
    sheet.figures.push(figure());
    sheet
}

/// A sum too long for one line.
fn balance(sheet: &mut Sheet) {
    let mut operands = Vec::new();
    let mut terms = Vec::new();
    for at in 1..9 {
        let force = Symbol::indexed("F", at);
        let arm = Symbol::indexed("x", at);
        let force_id = enter(sheet, &format!("C1.F.B{at}.N"), "kN", -12_345 * at as i64, -3);
        let arm_id = enter(sheet, &format!("nodes.N{at}.x"), "m", 1250 * at as i64, -3);
        terms.push(force.clone() * arm.clone());
        operands.extend([(force, force_id), (arm, arm_id)]);
    }
    let result = enter(sheet, "C1.R01", "kN.m", 0, -3);
    let definition = Definition::new(
        Symbol::new("R_m"),
        "Moments of all forces about the origin: what is left over is the error of rounding alone",
        Measure::Moment,
        Tree::sum(terms),
    )
    .from(&source::STATICS);
    step(sheet, "C1.R01", definition, operands, result);
}

fn tables(sheet: &mut Sheet, members: usize) {
    let column = |symbol: &str, text: &str| Column { symbol: symbol.into(), unit: Some(unit(text)) };
    let words = |symbol: &str| Column { symbol: symbol.into(), unit: None };
    let mut rows = Vec::new();
    for at in 0..members.max(3) * 6 {
        let name = format!("N{at}");
        let x = enter(sheet, &format!("C1.U.{name}.x"), "mm", 31 + 7 * at as i64, -3);
        let y = enter(sheet, &format!("C1.U.{name}.y"), "mm", -3214 * (at as i64 + 1), -3);
        let r = enter(sheet, &format!("C1.U.{name}.r"), "rad", -1102 + 40 * at as i64, -7);
        rows.push(Row { name, cells: vec![Cell::Quantity(x), Cell::Quantity(y), Cell::Quantity(r)] });
    }
    sheet.push_table(Table {
        id: "C1.U".into(),
        title: "Node displacements, combination C1".into(),
        head: "Node".into(),
        columns: vec![column("x", "mm"), column("y", "mm"), column("r", "rad")],
        rows,
        note: Some("Rotations are anticlockwise.".into()),
    });
    let symbols = ["N_start", "V_start", "M_start", "N_end", "V_end", "M_end", "M_peak", "x_peak", "v_peak", "w"];
    let mut columns: Vec<Column> = symbols.iter().map(|symbol| column(symbol, "kN.m")).collect();
    columns.push(words("governing step"));
    let rows = (0..4)
        .map(|at| {
            let mut cells: Vec<Cell> = symbols
                .iter()
                .enumerate()
                .map(|(place, symbol)| {
                    let count = 12_345 * (place as i64 - 4) + at;
                    Cell::Quantity(enter(sheet, &format!("C1.F.B{at}.{symbol}"), "kN.m", count, -3))
                })
                .collect();
            cells.push(Cell::Address("B0.C1.S01".into()));
            Row { name: format!("B{at}"), cells }
        })
        .collect();
    let title = "Member end forces, combination C1".into();
    sheet.push_table(Table { id: "C1.F".into(), title, head: "Member".into(), columns, rows, note: None });
}

fn figure() -> Figure {
    let line = |points: &[[f64; 2]], width, dash, grey| Item::Path {
        points: points.to_vec(),
        closed: false,
        stroke: Some(Stroke { width, dash, grey }),
        fill: None,
    };
    let text = |at, anchor, style, text: &str| {
        Item::Text(TextItem { at, anchor, size: 8.5, style, text: text.into(), halo: true })
    };
    let items = vec![
        line(&[[10.0, 50.0], [10.0, 10.0], [110.0, 10.0], [110.0, 50.0]], 0.5, Dash::Solid, 0.0),
        line(&[[5.0, 55.0], [115.0, 55.0]], 0.2, Dash::Chain, 0.4),
        Item::Path {
            points: vec![[10.0, 50.0], [7.0, 55.0], [13.0, 55.0]],
            closed: true,
            stroke: Some(Stroke { width: 0.25, dash: Dash::Solid, grey: 0.0 }),
            fill: Some(0.85),
        },
        text([60.0, 9.5], Anchor::Middle, Style::Bold, "BC"),
        text([12.0, 30.0], Anchor::Start, Style::Italic, "AB"),
        text([108.0, 30.0], Anchor::End, Style::Regular, "−3.214 kN/m"),
    ];
    Figure {
        id: "structure".into(),
        title: "Structure with nodes and members".into(),
        alternative: "A portal of two columns and a beam.".into(),
        scene: Scene { width: 120.0, height: 58.0, items, ..Scene::default() },
    }
}

fn plain(text: &str) -> Vec<Inline> {
    vec![Inline::Text(text.into())]
}

fn heading(level: u8, text: &str, anchor: &str) -> Block {
    Block::Heading { level, text: plain(text), anchor: anchor.into() }
}

const PROSE: &str = "Nobody need solve the equations again. Displacements enter as stated values, and the sheet proves \
    them: member by member from displacement to strain, to stress and end force; node by node, where the end forces \
    and the loads balance; and as a whole, where the reactions and the loads do. Movements that fit together, obey \
    the law of each member and balance at every node are the solution (curvature κ = M/(E·I), areas in mm², \
    10⁻³ of a metre, Größe, Żółć, Привет, Ωμέγα).";

/// The document of [`sheet`].
pub(crate) fn document(sheet: &Sheet) -> Document {
    let link = |to: &str| Inline::Link { to: to.into(), text: plain(to) };
    let mut blocks = vec![
        heading(1, "Pump-house pipe support", "pump-house-pipe-support"),
        Block::Paragraph(plain(PROSE)),
        Block::Caution(vec![
            Block::Paragraph(vec![
                Inline::Strong(plain("Not for construction.")),
                Inline::Text(" Allowables and load factors are the user's, from the code that governs at the place of use; a person licensed there has to check and sign the package before anything is built from it.".into()),
            ]),
            Block::List { ordered: false, items: vec![vec![Block::Paragraph(plain("Connections are not checked."))], vec![Block::Paragraph(plain("Fatigue is not checked."))]] },
        ]),
        Block::Grid {
            head: vec![plain("Signature"), plain("Name"), plain("Date")],
            rows: vec![
                vec![plain("Prepared"), plain("A. Person"), plain("2026-11-30")],
                vec![plain("Checked"), vec![], vec![]],
                vec![plain("Approved"), vec![], vec![]],
            ],
        },
        heading(2, "Contents", "contents"),
        Block::Contents,
        Block::NewSheet,
        heading(2, "How to check this package", "how-to-check-this-package"),
        Block::Paragraph(vec![
            Inline::Text("Begin with the table ".into()),
            link("C1.U"),
            Inline::Text(", then work ".into()),
            link("B0.C1.E03"),
            Inline::Text(" with ".into()),
            Inline::Emphasis(plain("a pocket calculator")),
            Inline::Text("; the input key is ".into()),
            Inline::Code("members.BC.hinge".into()),
            Inline::Text(".".into()),
        ]),
        Block::List {
            ordered: true,
            items: vec![
                vec![Block::Paragraph(plain(PROSE))],
                vec![Block::Paragraph(plain("Every line closes on a pocket calculator.")), Block::Paragraph(plain("Numbers stay put."))],
            ],
        },
        Block::Grid {
            head: vec![plain("Mark"), plain("Assumption"), plain("Why it is reasonable")],
            rows: vec![vec![plain("1"), plain(PROSE), plain("Base plates act as pins; to be confirmed by the drawing of the foundation.")]],
        },
        heading(3, "Structure", "structure-heading"),
        Block::Figure("structure".into()),
        heading(2, "Results", "results"),
        Block::Table("C1.U".into()),
        Block::Table("C1.F".into()),
        Block::Step("C1.R01".into()),
        heading(2, "Members", "members"),
    ];
    let mut subject = "";
    for step in &sheet.steps {
        let name = step.number.split('.').next().unwrap_or_default();
        if name != subject && step.number != "C1.R01" {
            subject = name;
            blocks.push(heading(3, &format!("Member {name}"), &format!("member-{}", name.to_lowercase())));
        }
        if step.number != "C1.R01" {
            blocks.push(Block::Step(step.number.clone()));
        }
    }
    blocks.push(heading(2, "Input file", "input-file"));
    blocks.push(Block::Verbatim("calcsheaf: 1\n\nproject:\n  title: Pump-house pipe support\nmembers:\n  AB: {kind: frame, from: A, to: B, section: A5, material: S275, hinge: start, note: a line that is far longer than the measure of the sheet allows}\n\tκ: σ².\n".into()));
    Document {
        head: RunningHead {
            title: "Pump-house pipe support".into(),
            number: "24-0117".into(),
            part: "Support PS-104".into(),
            client: "Water works".into(),
            revision: "B".into(),
            status: "for check".into(),
            prepared: "A. Person, 2026-11-30".into(),
            checked: String::new(),
            date: "2026-11-30".into(),
            preliminary: true,
            beyond_limit: true,
        },
        blocks,
    }
}
