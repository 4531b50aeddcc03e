//! Tables of results for whoever works them alone: rows and columns, and nothing in the cells.
use crate::model::Model;
use crate::sheet::{Cell, Column, Recording, Row, Table};
use crate::units::Measure as M;

/// Blank tables of every combination.
pub(super) fn tables(model: &Model, sheet: &Recording<'_>) -> Vec<Table> {
    let nodes: Vec<&str> = model.nodes.iter().map(|n| n.name.as_str()).collect();
    let supports: Vec<&str> = model.supports.iter().map(|s| model.nodes[s.node].name.as_str()).collect();
    let members: Vec<&str> = model.members.iter().map(|m| m.name.as_str()).collect();
    let movement = [("x", M::Length), ("y", M::Length), ("r", M::Rotation)];
    let reaction = [("x", M::Force), ("y", M::Force), ("r", M::Moment)];
    let ends = [
        ("N_1", M::Force),
        ("V_1", M::Force),
        ("M_1", M::Moment),
        ("N_2", M::Force),
        ("V_2", M::Force),
        ("M_2", M::Moment),
    ];
    let stress = [("σ_ten", M::Stress), ("x_ten", M::Span), ("σ_com", M::Stress), ("x_com", M::Span)];
    let mut tables = Vec::new();
    for combination in &model.combinations {
        let name = &combination.name;
        let mut add = |id: &str, title: &str, head: &str, rows: &[&str], columns: &[(&str, M)]| {
            tables.push(Table {
                id: format!("{name}.{id}"),
                title: format!("{title}, combination {name}: to be filled in"),
                head: head.into(),
                columns: columns
                    .iter()
                    .map(|(symbol, measure)| Column { symbol: (*symbol).into(), unit: Some(sheet.unit(*measure)) })
                    .collect(),
                rows: rows
                    .iter()
                    .map(|row| Row { name: (*row).into(), cells: vec![Cell::Empty; columns.len()] })
                    .collect(),
                note: None,
            });
        };
        add("U", "Movements of nodes", "node", &nodes, &movement);
        add("R", "Reactions", "node", &supports, &reaction);
        add("F", "Member end forces", "member", &members, &ends);
        add("Q", "Largest stresses", "member", &members, &stress);
    }
    tables
}
