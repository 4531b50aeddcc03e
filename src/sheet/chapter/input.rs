//! The input as understood: nodes, supports, materials, sections, members, loads, combinations, limits.
use super::{Builder, Cell, typed, words};
use crate::catalogue::section::input_symbols;
use crate::model::{
    Action, DeflectionCheck, DeflectionLimit, Direction, EffectiveLength, LoadCase, Member, MemberKind, MemberLoad,
    Model, Support,
};
use crate::sheet::{Recording, Table};
use crate::units::Measure as M;

/// Every table of the input.
pub(super) fn tables(model: &Model, sheet: &mut Recording<'_>) -> Vec<Table> {
    let mut tables = vec![nodes(model, sheet), supports(model, sheet), materials(model, sheet)];
    tables.extend(sections(model, sheet));
    tables.push(members(model, sheet));
    tables.push(gravity(model, sheet));
    for case in &model.cases {
        tables.extend(loads(model, case, sheet));
    }
    tables.push(combinations(model, sheet));
    tables.extend(limits(model, sheet));
    tables.into_iter().flatten().collect()
}

fn nodes(model: &Model, sheet: &mut Recording<'_>) -> Option<Table> {
    let mut table = Builder::new("INPUT.nodes", "Nodes", "node").column("x", M::Span).column("y", M::Span);
    for node in &model.nodes {
        let cells = vec![
            typed(sheet, format_args!("INPUT.nodes.{}.x", node.name), Some(node.x), M::Span),
            typed(sheet, format_args!("INPUT.nodes.{}.y", node.name), Some(node.y), M::Span),
        ];
        table.row(&node.name, cells);
    }
    table.build(sheet)
}

/// What a support holds, in words.
fn held(support: &Support) -> String {
    let words: Vec<&str> =
        ["x", "y", "r"].into_iter().zip(support.hold).filter(|(_, held)| *held).map(|(word, _)| word).collect();
    match words.as_slice() {
        [] => "none".into(),
        ["x", "y", "r"] => "x, y, r (fixed)".into(),
        ["x", "y"] => "x, y (pinned)".into(),
        some => some.join(", "),
    }
}

fn supports(model: &Model, sheet: &mut Recording<'_>) -> Option<Table> {
    let mut table = Builder::new("INPUT.supports", "Supports", "node")
        .words("held")
        .column("turned", M::Angle)
        .column("spring_x", M::Spring)
        .column("spring_y", M::Spring)
        .column("spring_r", M::RotationalSpring);
    for support in &model.supports {
        let name = &model.nodes[support.node].name;
        let [x, y, r] = support.spring;
        let turned = (support.turned != 0.0).then_some(support.turned);
        let cells = vec![
            words(held(support)),
            typed(sheet, format_args!("INPUT.supports.{name}.turned"), turned, M::Angle),
            typed(sheet, format_args!("INPUT.supports.{name}.spring_x"), x, M::Spring),
            typed(sheet, format_args!("INPUT.supports.{name}.spring_y"), y, M::Spring),
            typed(sheet, format_args!("INPUT.supports.{name}.spring_r"), r, M::RotationalSpring),
        ];
        table.row(name, cells);
    }
    table.build(sheet)
}

fn materials(model: &Model, sheet: &mut Recording<'_>) -> Option<Table> {
    let mut table = Builder::new("INPUT.materials", "Materials and allowable stresses", "material")
        .column("E", M::Stress)
        .column("G", M::Stress)
        .column("density", M::Density)
        .column("expansion", M::Expansion)
        .column("tension", M::Stress)
        .column("compression", M::Stress)
        .column("shear", M::Stress)
        .words("source")
        .note("Allowable stresses are the user's, from the code that governs at the place of use.");
    for material in &model.materials {
        let name = &material.name;
        let limits = &material.allowable;
        let mut cells = Vec::new();
        for (key, value, measure) in [
            ("E", Some(material.modulus), M::Stress),
            ("G", material.shear_modulus, M::Stress),
            ("density", material.density, M::Density),
            ("expansion", material.expansion, M::Expansion),
            ("tension", limits.tension, M::Stress),
            ("compression", limits.compression, M::Stress),
            ("shear", limits.shear, M::Stress),
        ] {
            cells.push(typed(sheet, format_args!("INPUT.materials.{name}.{key}"), value, measure));
        }
        cells.push(words(limits.source.clone().unwrap_or_default()));
        table.row(name, cells);
    }
    table.build(sheet)
}

/// One table a shape, so that a column keeps its unit; built-up sections have one each.
fn sections(model: &Model, sheet: &mut Recording<'_>) -> Vec<Option<Table>> {
    let mut tables = Vec::new();
    let mut shapes: Vec<&str> = Vec::new();
    for section in &model.sections {
        let shape = section.kind.name();
        if !shapes.contains(&shape) {
            shapes.push(shape);
        }
        let plates = &section.given.plates;
        if !plates.is_empty() {
            let id = format!("INPUT.plates.{}", section.name);
            let mut table = Builder::new(id, format!("Plates of section {}", section.name), "plate")
                .column("width", M::Length)
                .column("height", M::Length)
                .column("at", M::Length);
            for (at, plate) in plates.iter().enumerate() {
                let row = at + 1;
                let name = &section.name;
                let cells = vec![
                    typed(sheet, format_args!("INPUT.plates.{name}.{row}.width"), Some(plate.width), M::Length),
                    typed(sheet, format_args!("INPUT.plates.{name}.{row}.height"), Some(plate.height), M::Length),
                    typed(sheet, format_args!("INPUT.plates.{name}.{row}.at"), Some(plate.at), M::Length),
                ];
                table.row(row.to_string(), cells);
            }
            tables.push(table.build(sheet));
        }
    }
    for shape in shapes {
        let of_shape: Vec<_> = model.sections.iter().filter(|s| s.kind.name() == shape).collect();
        let mut table = Builder::new(format!("INPUT.sections.{shape}"), format!("Sections, shape {shape}"), "section");
        let params = of_shape[0].kind.params();
        for param in params {
            table = table.column(param.key, param.measure);
        }
        table = table.column("shear_area", M::Area).words("lies").words("source");
        for section in of_shape {
            let name = &section.name;
            let used = input_symbols(section.kind, &section.given);
            let mut cells: Vec<Cell> = params
                .iter()
                .map(|param| {
                    let value = used.iter().find(|(key, ..)| key == param.key).map(|(.., si)| *si);
                    typed(sheet, format_args!("INPUT.sections.{shape}.{name}.{}", param.key), value, param.measure)
                })
                .collect();
            cells.push(typed(
                sheet,
                format_args!("INPUT.sections.{shape}.{name}.shear_area"),
                section.shear_area,
                M::Area,
            ));
            cells.push(words(if section.given.turned { "turned by 90°" } else { "" }));
            cells.push(words(section.source.clone().unwrap_or_default()));
            if cells.iter().all(|c| *c == Cell::Empty) {
                cells.pop();
                cells.push(words("plates listed apart"));
            }
            table.row(name, cells);
        }
        tables.push(table.build(sheet));
    }
    tables
}

/// The word of a member kind in the input.
#[must_use]
pub const fn kind_word(kind: MemberKind) -> &'static str {
    match kind {
        MemberKind::Bar => "bar",
        MemberKind::Bar3 => "bar3",
        MemberKind::Beam => "beam",
        MemberKind::Frame => "frame",
    }
}

fn members(model: &Model, sheet: &mut Recording<'_>) -> Option<Table> {
    let mut table = Builder::new("INPUT.members", "Members", "member")
        .words("kind")
        .words("from")
        .words("to")
        .words("section")
        .words("material")
        .words("hinge")
        .column("in_plane", M::Number)
        .column("in_plane_length", M::Span)
        .column("out_of_plane", M::Number)
        .column("out_of_plane_length", M::Span)
        .column("tension", M::Stress)
        .column("compression", M::Stress)
        .column("shear", M::Stress)
        .words("remark");
    for member in &model.members {
        let cells = member_cells(model, member, sheet);
        table.row(&member.name, cells);
    }
    table.build(sheet)
}

fn member_cells(model: &Model, member: &Member, sheet: &mut Recording<'_>) -> Vec<Cell> {
    let name = &member.name;
    let hinge = match member.hinge {
        [false, false] => "",
        [true, false] => "start",
        [false, true] => "end",
        [true, true] => "both",
    };
    let mut cells = vec![
        words(kind_word(member.kind)),
        words(&model.nodes[member.from].name),
        words(&model.nodes[member.to].name),
        words(&model.sections[member.section].name),
        words(&model.materials[member.material].name),
        words(hinge),
    ];
    let compressed_checks = model.checks.buckling.is_some() || model.checks.slenderness.is_some();
    let in_plane = member.in_plane.or(compressed_checks.then_some(EffectiveLength::Factor(1.0)));
    for (key, given) in [("in_plane", in_plane), ("out_of_plane", member.out_of_plane)] {
        let (factor, length) = match given {
            Some(EffectiveLength::Factor(factor)) => (Some(factor), None),
            Some(EffectiveLength::Length(length)) => (None, Some(length)),
            None => (None, None),
        };
        cells.push(typed(sheet, format_args!("INPUT.members.{name}.{key}"), factor, M::Number));
        cells.push(typed(sheet, format_args!("INPUT.members.{name}.{key}_length"), length, M::Span));
    }
    let limits = [member.allowable.tension, member.allowable.compression, member.allowable.shear];
    for ((key, limit), path) in ["tension", "compression", "shear"].into_iter().zip(limits).zip(&member.allowable_path)
    {
        let own = limit.filter(|_| path.starts_with("members."));
        cells.push(typed(sheet, format_args!("INPUT.members.{name}.{key}"), own, M::Stress));
    }
    let mut remark = Vec::new();
    if member.tension_only {
        remark.push("tension only".to_owned());
    }
    remark.extend(member.note.clone());
    cells.push(words(remark.join("; ")));
    cells
}

fn gravity(model: &Model, sheet: &mut Recording<'_>) -> Option<Table> {
    if model.cases.iter().all(|case| case.self_weight == 0.0) {
        return None;
    }
    let mut table =
        Builder::new("INPUT.gravity", "Acceleration of self-weight", "symbol").column("value", M::Acceleration);
    let cell = typed(sheet, format_args!("INPUT.gravity.g.value"), Some(model.gravity), M::Acceleration);
    table.row("g", vec![cell]);
    table.build(sheet)
}

const fn direction_word(direction: Direction) -> &'static str {
    match direction {
        Direction::GlobalX => "X",
        Direction::GlobalY => "Y",
        Direction::LocalX => "x",
        Direction::LocalY => "y",
    }
}

fn loads(model: &Model, case: &LoadCase, sheet: &mut Recording<'_>) -> Vec<Option<Table>> {
    let id = |kind: &str| format!("INPUT.loads.{}.{kind}", case.name);
    let title = |what: &str| format!("{what}, load case {}", case.name);
    let mut weight =
        Builder::new(id("weight"), title("Self-weight, acting along −Y"), "term").column("value", M::Number);
    let mut nodes = Builder::new(id("nodes"), title("Loads on nodes"), "entry")
        .words("node")
        .column("fx", M::Force)
        .column("fy", M::Force)
        .column("m", M::Moment);
    let mut lines = Builder::new(id("lines"), title("Line loads on members"), "entry")
        .words("member")
        .words("dir")
        .column("w_1", M::LineLoad)
        .column("w_2", M::LineLoad)
        .column("from", M::Span)
        .column("to", M::Span)
        .words("per");
    let mut points = Builder::new(id("points"), title("Point forces on members"), "entry")
        .words("member")
        .words("dir")
        .column("p", M::Force)
        .column("at", M::Span);
    let mut couples = Builder::new(id("couples"), title("Couples on members"), "entry")
        .words("member")
        .column("m", M::Moment)
        .column("at", M::Span);
    let mut warming = Builder::new(id("warming"), title("Warming of members"), "entry")
        .words("member")
        .column("top", M::Temperature)
        .column("bottom", M::Temperature);
    let mut misfit = Builder::new(id("misfit"), title("Lack of fit of members"), "entry")
        .words("member")
        .column("too_long", M::Length);
    let mut settlements = Builder::new(id("settlements"), title("Imposed movements of supports"), "entry")
        .words("node")
        .column("x", M::Length)
        .column("y", M::Length)
        .column("r", M::Rotation);
    if case.self_weight != 0.0 {
        let cell = typed(
            sheet,
            format_args!("INPUT.loads.{}.weight.factor.value", case.name),
            Some(case.self_weight),
            M::Number,
        );
        weight.row("factor", vec![cell]);
    }
    for load in &case.loads {
        let entry = load.entry + 1;
        let case_name = &case.name;
        match &load.acts {
            Action::Node { node, forces } => {
                let mut cells = vec![words(&model.nodes[*node].name)];
                for (key, force, measure) in
                    [("fx", forces[0], M::Force), ("fy", forces[1], M::Force), ("m", forces[2], M::Moment)]
                {
                    let force = (force != 0.0).then_some(force);
                    cells.push(typed(
                        sheet,
                        format_args!("INPUT.loads.{case_name}.nodes.{entry}.{key}"),
                        force,
                        measure,
                    ));
                }
                nodes.row(entry.to_string(), cells);
            }
            Action::Settle { node, movement } => {
                let mut cells = vec![words(&model.nodes[*node].name)];
                for (key, amount, measure) in
                    [("x", movement[0], M::Length), ("y", movement[1], M::Length), ("r", movement[2], M::Rotation)]
                {
                    cells.push(typed(
                        sheet,
                        format_args!("INPUT.loads.{case_name}.settlements.{entry}.{key}"),
                        amount,
                        measure,
                    ));
                }
                settlements.row(entry.to_string(), cells);
            }
            Action::Member { member, load } => {
                let member = &model.members[*member];
                let row = format!("{entry}.{}", member.name);
                let inputs = crate::work::load_inputs(sheet, case_name, load_entry(entry), member, load);
                let cell = super::quantity;
                let name = || words(&member.name);
                match load {
                    MemberLoad::Line { direction, per_plan, .. } => {
                        let second = inputs.w2.filter(|w| Some(*w) != inputs.w1);
                        let cells = vec![
                            name(),
                            words(direction_word(*direction)),
                            cell(inputs.w1),
                            cell(second),
                            cell(inputs.a),
                            cell(inputs.b),
                            words(if *per_plan { "plan" } else { "" }),
                        ];
                        lines.row(row, cells);
                    }
                    MemberLoad::Point { direction, .. } => {
                        points
                            .row(row, vec![name(), words(direction_word(*direction)), cell(inputs.p), cell(inputs.a)]);
                    }
                    MemberLoad::Moment { .. } => couples.row(row, vec![name(), cell(inputs.m), cell(inputs.a)]),
                    MemberLoad::Warm { .. } => warming.row(row, vec![name(), cell(inputs.top), cell(inputs.bottom)]),
                    MemberLoad::TooLong { .. } => misfit.row(row, vec![name(), cell(inputs.too_long)]),
                }
            }
        }
    }
    [weight, nodes, lines, points, couples, warming, misfit, settlements]
        .into_iter()
        .map(|table| table.build(sheet))
        .collect()
}

/// Rows count from 1, entries from 0.
const fn load_entry(row: usize) -> usize {
    row - 1
}

fn combinations(model: &Model, sheet: &mut Recording<'_>) -> Option<Table> {
    let mut table = Builder::new("INPUT.combinations", "Combinations: factor on each load case", "combination");
    for case in &model.cases {
        table = table.column(&case.name, M::Number);
    }
    table = table.words("for").words("title");
    for combination in model.combinations.iter().filter(|c| !c.implied) {
        let mut cells: Vec<Cell> = model
            .cases
            .iter()
            .enumerate()
            .map(|(at, case)| {
                let factor = combination.factors.iter().find(|(index, _)| *index == at).map(|(_, factor)| *factor);
                typed(sheet, format_args!("INPUT.combinations.{}.{}", combination.name, case.name), factor, M::Number)
            })
            .collect();
        let purposes = combination.purposes.as_ref().map_or(String::new(), |list| {
            list.iter().map(|p| format!("{p:?}").to_lowercase()).collect::<Vec<_>>().join(", ")
        });
        cells.push(words(purposes));
        cells.push(words(combination.title.clone().unwrap_or_default()));
        table.row(&combination.name, cells);
    }
    table.build(sheet)
}

fn limits(model: &Model, sheet: &mut Recording<'_>) -> Vec<Option<Table>> {
    let checks = &model.checks;
    let mut general = Builder::new("INPUT.checks", "Limits of the whole", "check")
        .column("safety", M::Number)
        .column("limit", M::Number)
        .column("at_least", M::Number);
    if checks.buckling.is_some() {
        let cell = typed(sheet, format_args!("INPUT.checks.buckling.safety"), checks.buckling, M::Number);
        general.row("buckling", vec![cell, Cell::Empty, Cell::Empty]);
    }
    if checks.slenderness.is_some() {
        let cell = typed(sheet, format_args!("INPUT.checks.slenderness.limit"), checks.slenderness, M::Number);
        general.row("slenderness", vec![Cell::Empty, cell, Cell::Empty]);
    }
    if checks.stability.is_some() {
        let cell = typed(sheet, format_args!("INPUT.checks.stability.at_least"), checks.stability, M::Number);
        general.row("stability", vec![Cell::Empty, Cell::Empty, cell]);
    }
    let mut movement = Builder::new("INPUT.checks.deflection", "Limits of movement", "subject")
        .column("n", M::Number)
        .column("limit", M::Length)
        .column("x", M::Length)
        .column("y", M::Length)
        .column("r", M::Rotation)
        .note("n divides the member's length and limits its deflection from the chord; x, y and r limit a node's movement.");
    for check in &checks.deflection {
        let mut cells = vec![Cell::Empty; 5];
        let (name, at, key, value, measure) = match check {
            DeflectionCheck::Member { member, limit: DeflectionLimit::SpanOver(n) } => {
                (&model.members[*member].name, 0, "n", *n, M::Number)
            }
            DeflectionCheck::Member { member, limit: DeflectionLimit::Absolute(limit) } => {
                (&model.members[*member].name, 1, "limit", *limit, M::Length)
            }
            DeflectionCheck::Node { node, direction, limit } => {
                let measure = if *direction == 2 { M::Rotation } else { M::Length };
                (&model.nodes[*node].name, 2 + direction, ["x", "y", "r"][*direction], *limit, measure)
            }
        };
        cells[at] = typed(sheet, format_args!("INPUT.checks.deflection.{name}.{key}"), Some(value), measure);
        movement.row(name, cells);
    }
    vec![general.build(sheet), movement.build(sheet)]
}
