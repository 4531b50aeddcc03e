//! The whole structure worked: sections, members, loads, every combination, every check.
use super::{
    Balance, CaseLoad, Check, Extremes, FactoredLoad, MemberBase, MemberForces, NodeBalance, SectionValues, factor,
    movements, work_base, work_case_loads, work_case_total, work_extremes, work_member, work_member_checks, work_node,
    work_node_checks, work_stability_check, work_whole,
};
use crate::analysis::{CombinationSolution, Solution};
use crate::catalogue::section;
use crate::formula::{Symbol, Value, Worksheet};
use crate::model::{Combination, Model};
use crate::units::Measure;

/// What does not depend on the solution.
#[derive(Debug, Clone, Default)]
pub struct Prepared {
    /// Section properties.
    pub sections: Vec<SectionValues>,
    /// Members' constants.
    pub bases: Vec<MemberBase>,
    /// Loads by member, by case.
    pub loads: Vec<Vec<Vec<CaseLoad>>>,
}

/// Works sections, members' constants and loads.
pub fn prepare(sheet: &mut dyn Worksheet, model: &Model) -> Prepared {
    let sections: Vec<SectionValues> = (0..model.sections.len()).map(|at| work_section(sheet, model, at)).collect();
    let bases: Vec<MemberBase> =
        model.members.iter().map(|m| work_base(sheet, model, m, &sections[m.section])).collect();
    let loads = model
        .members
        .iter()
        .enumerate()
        .map(|(at, member)| {
            model.cases.iter().map(|case| work_case_loads(sheet, (at, member), &bases[at], case)).collect()
        })
        .collect();
    Prepared { sections, bases, loads }
}

/// Works one section from its dimensions (steps P), or takes it as given.
pub fn work_section(sheet: &mut dyn Worksheet, model: &Model, at: usize) -> SectionValues {
    let chosen = &model.sections[at];
    let shape = chosen.kind.name();
    let inputs: Vec<(Symbol, Value)> = section::input_symbols(chosen.kind, &chosen.given)
        .into_iter()
        .map(|(key, symbol, measure, si)| {
            let value = match key.strip_prefix("plates.").and_then(|rest| rest.split_once('.')) {
                Some((row, column)) => {
                    sheet.input(format_args!("INPUT.plates.{}.{row}.{column}", chosen.name), si, measure)
                }
                None => sheet.input(format_args!("INPUT.sections.{shape}.{}.{key}", chosen.name), si, measure),
            };
            (symbol, value)
        })
        .collect();
    let properties = section::work(chosen.kind, &chosen.given, &inputs, &chosen.name, sheet);
    let shear_area = chosen.shear_area.map(|area| {
        sheet.input(format_args!("INPUT.sections.{shape}.{}.shear_area", chosen.name), area, Measure::Area)
    });
    SectionValues {
        area: Some(properties.area),
        inertia: properties.inertia,
        top: properties.top,
        bottom: properties.bottom,
        minor_inertia: properties.minor_inertia,
        radius: properties.radius,
        minor_radius: properties.minor_radius,
        shear_moment: properties.shear_moment,
        shear_width: properties.shear_width,
        shear_area,
    }
}

/// One combination worked.
#[derive(Debug, Clone, Default)]
pub struct CombinationWork {
    /// By member.
    pub forces: Vec<MemberForces>,
    /// By member.
    pub extremes: Vec<Extremes>,
    /// By node.
    pub nodes: Vec<NodeBalance>,
    /// Of the whole.
    pub balance: Balance,
    /// Checks of this combination: members in order, then nodes, then the whole.
    pub checks: Vec<Check>,
}

/// Every load of a member with the factor that the combination puts on its case.
pub fn factored<'a>(
    sheet: &mut dyn Worksheet,
    model: &Model,
    combination: &Combination,
    loads: &'a [Vec<CaseLoad>],
) -> Vec<FactoredLoad<'a>> {
    let mut result = Vec::new();
    for (case, size) in &combination.factors {
        if loads[*case].is_empty() {
            continue;
        }
        let gamma = factor(sheet, model, combination, *case, *size);
        result.extend(loads[*case].iter().map(|load| (gamma, *size, load)));
    }
    result
}

/// One member under one combination: forces, extremes, checks.
pub fn work_one(
    sheet: &mut dyn Worksheet,
    model: &Model,
    prepared: &Prepared,
    (at, solution): (usize, &CombinationSolution),
    combination: &Combination,
) -> (MemberForces, Extremes) {
    let member = &model.members[at];
    let base = &prepared.bases[at];
    let loads = factored(sheet, model, combination, &prepared.loads[at]);
    let moved = movements(sheet, model, combination, solution, at);
    let forces = work_member(sheet, member, combination, base, &loads, &moved);
    let rigidities = (base.length, base.bending, base.shear_rigidity);
    let carried: &[FactoredLoad<'_>] = if moved.slack { &[] } else { &loads };
    let extremes = work_extremes(sheet, member, combination, rigidities, carried, &forces);
    (forces, extremes)
}

/// Largest axial force of a combination, against which compression is told from rounding.
#[must_use]
pub fn largest_axial(forces: &[MemberForces]) -> f64 {
    forces.iter().flat_map(|f| f.n).flatten().map(|n| n.si.abs()).fold(0.0, f64::max)
}

/// Works every combination with every check.
pub fn work_all(
    sheet: &mut dyn Worksheet,
    model: &Model,
    prepared: &Prepared,
    solution: &Solution,
) -> Vec<CombinationWork> {
    let totals: Vec<[Option<Value>; 3]> =
        model.cases.iter().enumerate().map(|case| work_case_total(sheet, model, case, &prepared.loads)).collect();
    model
        .combinations
        .iter()
        .zip(&solution.combinations)
        .map(|(combination, solved)| {
            let (forces, extremes): (Vec<_>, Vec<_>) =
                (0..model.members.len()).map(|at| work_one(sheet, model, prepared, (at, solved), combination)).unzip();
            let nodes: Vec<NodeBalance> = (0..model.nodes.len())
                .map(|node| {
                    let moved = node_movement(sheet, model, combination, solved, node);
                    work_node(sheet, model, node, combination, &forces, &prepared.loads, moved)
                })
                .collect();
            let balance = work_whole(sheet, model, combination, &totals, &nodes);
            let largest = largest_axial(&forces);
            let mut checks = Vec::new();
            for (at, member) in model.members.iter().enumerate() {
                let section = &prepared.sections[member.section];
                checks.extend(work_member_checks(
                    sheet,
                    model,
                    (at, member),
                    combination,
                    section,
                    &forces[at],
                    &extremes[at],
                    largest,
                ));
            }
            checks.extend(work_node_checks(sheet, model, combination, &|sheet, node| {
                node_movement(sheet, model, combination, solved, node)
            }));
            checks.extend(work_stability_check(sheet, model, combination, solved.critical.as_ref().map(|c| c.factor)));
            CombinationWork { forces, extremes, nodes, balance, checks }
        })
        .collect()
}

/// A node's stated movements.
pub fn node_movement(
    sheet: &mut dyn Worksheet,
    model: &Model,
    combination: &Combination,
    solution: &CombinationSolution,
    node: usize,
) -> [Value; 3] {
    let largest = |of: &dyn Fn(&[f64; 3]) -> f64| solution.displacements.iter().map(of).fold(0.0, f64::max);
    let (slide, turn) = (largest(&|d| d[0].abs().max(d[1].abs())), largest(&|d| d[2].abs()));
    let (name, of_node) = (&combination.name, &model.nodes[node].name);
    let [x, y, r] = solution.displacements[node];
    [
        sheet.stated(format_args!("{name}.U.{of_node}.x"), x, slide, Measure::Length),
        sheet.stated(format_args!("{name}.U.{of_node}.y"), y, slide, Measure::Length),
        sheet.stated(format_args!("{name}.U.{of_node}.r"), r, turn, Measure::Rotation),
    ]
}
