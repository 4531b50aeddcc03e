//! Results by combination: movements, reactions, end forces, stresses, places of extremes, audit of loads.
use super::{Builder, Cell, quantity, words};
use crate::analysis::Solution;
use crate::formula::{Value, Worksheet};
use crate::model::{MemberKind, Model};
use crate::sheet::{Recording, Results, Table, VirtualMovement, is_worked};
use crate::units::Measure as M;
use crate::work::{CombinationWork, node_movement, relative_movements};

/// Every table of results.
pub(super) fn tables(
    model: &Model,
    solution: &Solution,
    results: &Results,
    worked: &[CombinationWork],
    sheet: &mut Recording<'_>,
) -> Vec<Table> {
    let mut tables = Vec::new();
    for (at, work) in worked.iter().enumerate() {
        tables.push(movements(model, solution, at, sheet));
        tables.push(relative(model, at, sheet));
        tables.push(reactions(model, at, work, sheet));
        tables.push(end_forces(model, at, work, sheet));
        tables.push(joint_forces(model, at, work, sheet));
        tables.push(stresses(model, results, at, work, sheet));
        tables.push(places(model, at, sheet));
        tables.push(critical(model, solution, at, sheet));
        tables.push(audit(model, at, work, sheet));
        tables.push(energy(model, results, at, sheet));
        for again in results.virtual_work.iter().filter(|again| again.combination == at) {
            tables.push(shares(model, again, sheet));
        }
    }
    tables.into_iter().flatten().collect()
}

fn movements(model: &Model, solution: &Solution, at: usize, sheet: &mut Recording<'_>) -> Option<Table> {
    let combination = &model.combinations[at];
    let name = &combination.name;
    let mut table = Builder::new(format!("{name}.U"), format!("Movements of nodes, combination {name}"), "node")
        .column("x", M::Length)
        .column("y", M::Length)
        .column("r", M::Rotation)
        .note("Stated values: the steps that use them prove them.");
    let solved = &solution.combinations[at];
    for (node, of) in model.nodes.iter().enumerate() {
        let cells = node_movement(sheet, model, combination, solved, node).map(|v| Cell::Quantity(v.id)).to_vec();
        table.row(&of.name, cells);
    }
    for (index, member) in model.members.iter().enumerate() {
        let moved = crate::work::movements(sheet, model, combination, solved, index);
        for (end, word) in ["start", "end"].into_iter().enumerate() {
            if member.hinge[end] {
                table.row(
                    format!("{}.{word}", member.name),
                    vec![Cell::Empty, Cell::Empty, Cell::Quantity(moved.ends[end][2].id)],
                );
            }
        }
        if let Some([x, y]) = moved.middle {
            table.row(format!("{}.middle", member.name), vec![Cell::Quantity(x.id), Cell::Quantity(y.id), Cell::Empty]);
        }
    }
    table.build(sheet)
}

/// Relative movements that are stated beside the movements of the nodes.
fn relative(model: &Model, at: usize, sheet: &Recording<'_>) -> Option<Table> {
    let name = &model.combinations[at].name;
    let title = format!("Movements relative to start and chord, combination {name}");
    let mut table = Builder::new(format!("{name}.D"), title, "member").note(
        "Stated where they are the small difference of large movements. Each step D13 to D20 shows that the movements of the nodes leave no gap in their last printed place; strain, end force and balance prove the further digits.",
    );
    for (column, measure, _) in relative_movements(name, "") {
        table = table.column(column, measure);
    }
    for member in &model.members {
        let values = relative_movements(name, &member.name).map(|(.., address)| sheet.sheet.ledger.at(&address));
        if values.iter().any(Option::is_some) {
            table.row(&member.name, values.map(quantity).to_vec());
        }
    }
    table.build(sheet)
}

fn reactions(model: &Model, at: usize, work: &CombinationWork, sheet: &Recording<'_>) -> Option<Table> {
    let name = &model.combinations[at].name;
    let mut table = Builder::new(format!("{name}.R"), format!("Reactions, combination {name}"), "node")
        .column("x", M::Force)
        .column("y", M::Force)
        .column("r", M::Moment)
        .note("Forces of the supports on the structure, in global axes; on foundations they act the other way.");
    for support in &model.supports {
        let reaction = work.nodes[support.node].reaction;
        table.row(&model.nodes[support.node].name, reaction.map(quantity).to_vec());
    }
    table.build(sheet)
}

fn end_forces(model: &Model, at: usize, work: &CombinationWork, sheet: &Recording<'_>) -> Option<Table> {
    let name = &model.combinations[at].name;
    let mut table = Builder::new(format!("{name}.F"), format!("Member end forces, combination {name}"), "member");
    for (symbol, measure) in [
        ("N_1", M::Force),
        ("V_1", M::Force),
        ("M_1", M::Moment),
        ("N_2", M::Force),
        ("V_2", M::Force),
        ("M_2", M::Moment),
    ] {
        table = table.column(symbol, measure);
    }
    table = table.note("Section forces: N tension, V = dM/dx, M positive where the −y side is stretched; 1 at the start, 2 at the end.");
    for (member, forces) in model.members.iter().zip(&work.forces) {
        let cells =
            [forces.n[0], forces.v[0], forces.m[0], forces.n[1], forces.v[1], forces.m[1]].map(quantity).to_vec();
        table.row(&member.name, cells);
    }
    table.build(sheet)
}

fn joint_forces(model: &Model, at: usize, work: &CombinationWork, sheet: &Recording<'_>) -> Option<Table> {
    let name = &model.combinations[at].name;
    let mut table = Builder::new(
        format!("{name}.J"),
        format!("Forces of members on their joints, combination {name}"),
        "member",
    )
    .column("F_x1", M::Force)
    .column("F_y1", M::Force)
    .column("F_x2", M::Force)
    .column("F_y2", M::Force)
    .note(
        "Global axes; 1 on the start joint, 2 on the end joint. The couples are M_1 on the start and −M_2 on the end.",
    );
    for (member, forces) in model.members.iter().zip(&work.forces) {
        let [[x1, y1], [x2, y2]] = forces.on_joint;
        table.row(&member.name, [x1, y1, x2, y2].map(quantity).to_vec());
    }
    table.build(sheet)
}

/// Largest stresses; of members not worked line by line as stated values.
fn stresses(
    model: &Model,
    results: &Results,
    at: usize,
    work: &CombinationWork,
    sheet: &mut Recording<'_>,
) -> Option<Table> {
    let name = &model.combinations[at].name;
    let mut table = Builder::new(format!("{name}.Q"), format!("Largest stresses, combination {name}"), "member")
        .column("σ_ten", M::Stress)
        .column("x_ten", M::Span)
        .words("fibre of tension")
        .column("σ_com", M::Stress)
        .column("x_com", M::Span)
        .words("fibre of compression")
        .words("worked")
        .note("Algebraically largest and smallest stress of each member and their distances from its start.");
    let largest = work
        .extremes
        .iter()
        .flat_map(|e| [e.tension, e.compression])
        .flatten()
        .map(|e| e.value.si.abs())
        .fold(0.0, f64::max);
    for (index, member) in model.members.iter().enumerate() {
        let extremes = &work.extremes[index];
        let (Some(tension), Some(compression)) = (extremes.tension, extremes.compression) else { continue };
        let mut cells = Vec::new();
        let bar = matches!(member.kind, MemberKind::Bar | MemberKind::Bar3);
        for (extreme, key) in [(tension, "ten"), (compression, "com")] {
            let worked = is_worked(model, results, index, at) && extreme.value.id != u32::MAX;
            let stress = if worked {
                extreme.value
            } else {
                sheet.stated(format_args!("{name}.Q.{}.σ_{key}", member.name), extreme.value.si, largest, M::Stress)
            };
            let length = results.prepared.bases[index].length;
            let place = sheet.stated(format_args!("{name}.Q.{}.x_{key}", member.name), extreme.x, length, M::Span);
            cells.push(Cell::Quantity(stress.id));
            cells.push(Cell::Quantity(place.id));
            cells.push(words(if bar { "" } else { extreme.fibre.word() }));
        }
        cells.push(words(if is_worked(model, results, index, at) { "yes" } else { "" }));
        table.row(&member.name, cells);
    }
    table.build(sheet)
}

/// Places between ends that have no formula: stated, and proved by what vanishes there.
fn places(model: &Model, at: usize, sheet: &mut Recording<'_>) -> Option<Table> {
    const SYMBOLS: [&str; 6] = ["x_M", "x_t", "x_c", "x_V", "x_N", "x_v"];
    let name = &model.combinations[at].name;
    let mut table =
        Builder::new(format!("{name}.X"), format!("Places of extremes between the ends, combination {name}"), "member");
    for symbol in SYMBOLS {
        table = table.column(symbol, M::Span);
    }
    table = table
        .note("Distances from the member's start; stated, and proved by the step where shear force or slope vanishes.");
    for member in &model.members {
        let cells: Vec<Cell> = SYMBOLS
            .iter()
            .map(|symbol| quantity(sheet.sheet.ledger.at(&format!("{name}.X.{}.{symbol}", member.name))))
            .collect();
        if cells.iter().any(|cell| *cell != Cell::Empty) {
            table.row(&member.name, cells);
        }
    }
    table.build(sheet)
}

fn critical(model: &Model, solution: &Solution, at: usize, sheet: &mut Recording<'_>) -> Option<Table> {
    let name = &model.combinations[at].name;
    let factor = solution.combinations[at].critical.as_ref()?.factor;
    let mut table =
        Builder::new(format!("{name}.B"), format!("Elastic critical load factor, combination {name}"), "subject")
            .column("α_cr", M::Number)
            .note("Stated value of an eigenvalue computation; the page cannot prove it line by line.");
    let value = sheet.stated(format_args!("{name}.B.structure.α_cr"), factor, factor, M::Number);
    table.row("structure", vec![Cell::Quantity(value.id)]);
    table.build(sheet)
}

fn audit(model: &Model, at: usize, work: &CombinationWork, sheet: &mut Recording<'_>) -> Option<Table> {
    let name = &model.combinations[at].name;
    let mut table =
        Builder::new(format!("{name}.A"), format!("Audit of loads about the global origin, combination {name}"), "sum")
            .column("A_x", M::Force)
            .column("A_y", M::Force)
            .column("A_m", M::Moment)
            .note("Asked: what the input's loads add up to. Returned: what the supports give. Left over: their sum.");
    let mut row = |word: &str, values: [Option<Value>; 3]| table.row(word, values.map(quantity).to_vec());
    row("asked", work.balance.asked);
    row("returned", work.balance.returned);
    row("left over", work.balance.left_over);
    table.build(sheet)
}

fn energy(model: &Model, results: &Results, at: usize, sheet: &mut Recording<'_>) -> Option<Table> {
    let name = &model.combinations[at].name;
    let mut table = Builder::new(format!("{name}.W"), format!("Work and energy, combination {name}"), "part").column("E", M::Energy).note(
        "External: half of loads and reactions times movements. Strain: half of ∫(N²/EA + M²/EI). Free: half of the work on warming and lack of fit.",
    );
    let [external, strain, free, _] = crate::work::work_energy(sheet, name, &results.energy[at]);
    for (word, value) in [("external", external), ("strain", strain), ("free", free)] {
        table.row(word, vec![Cell::Quantity(value.id)]);
    }
    table.build(sheet)
}

fn shares(model: &Model, again: &VirtualMovement, sheet: &mut Recording<'_>) -> Option<Table> {
    let combination = &model.combinations[again.combination].name;
    let node = &model.nodes[again.node].name;
    let word = ["x", "y", "r"][again.direction];
    let measure = if again.direction == 2 { M::Rotation } else { M::Length };
    let id = format!("{combination}.K.{node}.{word}");
    let title =
        format!("Movement of node {node} in {word} by virtual work, combination {combination}: share of each member");
    let mut table = Builder::new(id, title, "member").column("w", measure).note(
        "∫(N·n/EA + M·m/EI) with n and m from a unit force at the node; N and M are those of the end forces and loads.",
    );
    for (member, share) in model.members.iter().zip(&again.shares).filter(|(_, share)| **share != 0.0) {
        let value =
            sheet.stated(format_args!("{combination}.K.{node}.{word}.{}.w", member.name), *share, *share, measure);
        table.row(&member.name, vec![Cell::Quantity(value.id)]);
    }
    let address = format!("{combination}.K.{node}.{word}.{}.w", crate::work::SUPPORTS);
    if let Some(value) = sheet.sheet.ledger.at(&address) {
        table.row(crate::work::SUPPORTS, vec![Cell::Quantity(value.id)]);
    }
    table.build(sheet)
}
