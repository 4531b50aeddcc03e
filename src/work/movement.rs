//! Movements of a combination as the sheet states them (table `<combination>.U`).
use super::{Movements, node_movement};
use crate::analysis::CombinationSolution;
use crate::formula::Worksheet;
use crate::model::{Combination, MemberKind, Model};
use crate::units::Measure;

/// The stated movements that belong to one member.
///
/// A hinged end's own rotation stands in the row `<member>.start` or `<member>.end`, the middle node of a
/// three-node bar in the row `<member>.middle`.
pub fn movements(
    sheet: &mut dyn Worksheet,
    model: &Model,
    combination: &Combination,
    solution: &CombinationSolution,
    member_index: usize,
) -> Movements {
    let member = &model.members[member_index];
    let own = &solution.members[member_index];
    let name = &combination.name;
    let mut ends = [member.from, member.to].map(|node| node_movement(sheet, model, combination, solution, node));
    let largest = |of: &dyn Fn(&[f64; 3]) -> f64| solution.displacements.iter().map(of).fold(0.0, f64::max);
    let slide = largest(&|d| d[0].abs().max(d[1].abs()));
    let turn = largest(&|d| d[2].abs());
    for (end, word) in ["start", "end"].into_iter().enumerate() {
        if member.hinge[end] {
            let address = format_args!("{name}.U.{}.{word}.r", member.name);
            ends[end][2] = sheet.stated(address, own.rotation[end], turn, Measure::Rotation);
        }
    }
    let middle = own.middle.filter(|_| member.kind == MemberKind::Bar3).map(|[x, y]| {
        [
            sheet.stated(format_args!("{name}.U.{}.middle.x", member.name), x, slide, Measure::Length),
            sheet.stated(format_args!("{name}.U.{}.middle.y", member.name), y, slide, Measure::Length),
        ]
    });
    Movements { ends, middle, slack: own.slack }
}
