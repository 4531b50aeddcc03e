//! Stress through the depth, drawn from the steps that work it: every number on it is one of theirs.
use crate::catalogue::symbol::{YB, YT};
use crate::figure::{self, Depth, Fibres, Figure};
use crate::formula::Symbol;
use crate::model::Model;
use crate::sheet::{Results, Sheet};
use crate::work::section_of_largest_stress;

/// A drawing for each member whose stress is worked over its depth.
pub(in crate::package) fn draw(model: &Model, results: &Results, sheet: &Sheet) -> Vec<Figure> {
    let of_member = |at: usize| {
        let member = &model.members[at];
        let combination = *results.governing.get(at)?;
        let work = results.combinations.get(combination)?;
        let combination = model.combinations.get(combination)?.name.clone();
        let step = |nn: u16| sheet.step(&format!("{}.{combination}.S{nn}", member.name));
        let entry = |nn: u16| step(nn).map(|step| sheet.ledger.entry(step.result));
        let pair = |words: &str, [top, bottom]: [u16; 2]| {
            let (top, bottom) = (entry(top)?, entry(bottom)?);
            Some(Fibres {
                words: words.to_owned(),
                values: [top.value, bottom.value],
                printed: [top.printed.to_string(), bottom.printed.to_string()],
            })
        };
        let bending = pair("bending", [22, 23])?;
        let parts: Vec<Fibres> = match (pair("axial", [21, 21]), pair("together", [24, 25])) {
            (Some(axial), Some(whole)) => vec![axial, bending, whole],
            _ => vec![bending],
        };
        let reach = |nn: u16, symbol: &Symbol| {
            let (_, id) = step(nn)?.operands.iter().find(|(s, _)| s == symbol)?;
            Some(sheet.ledger.entry(*id).value)
        };
        let check = work.checks.iter().find(|c| c.subject == member.name && c.kind == "stress");
        let depth = Depth {
            place: section_of_largest_stress(&work.extremes[at], check)?.x,
            member: member.name.clone(),
            combination: combination.clone(),
            section: &model.sections[member.section],
            reach: [reach(22, &YT)?, reach(23, &YB)?],
            parts,
        };
        figure::depth(&model.display, &depth)
    };
    (0..model.members.len()).filter_map(of_member).collect()
}
