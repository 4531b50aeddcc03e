//! The whole sheet of a package: steps for what is worked line by line, tables for everything.
use super::{Cell, Recording, Sheet, chapter, digits};
use crate::analysis::Solution;
use crate::formula::{Silent, Value, Worksheet};
use crate::model::{DeflectionCheck, Detail, Model};
use crate::units::Measure;
use crate::work::{
    self, Check, CombinationWork, Energy, MemberForces, NodeBalance, Prepared, largest_axial, node_movement, prepare,
    work_all, work_case_total, work_member_checks, work_node, work_node_checks, work_one, work_stability_check,
    work_whole,
};

/// Results of the whole structure, worked silently.
#[derive(Debug, Clone, Default)]
pub struct Results {
    /// Sections, members' constants, loads.
    pub prepared: Prepared,
    /// By combination.
    pub combinations: Vec<CombinationWork>,
    /// The combination that governs each member.
    pub governing: Vec<usize>,
    /// The combination of each member's largest deflection against its limit, where that is checked.
    pub deflecting: Vec<Option<usize>>,
    /// Members alike in kind, section, material, length, hinges and limits: each member's group.
    pub alike: Vec<usize>,
    /// Of each group, the member whose governing combination is the worst, and the one whose deflection is.
    pub worst_of_group: Vec<(usize, Option<usize>)>,
    /// Energy of each combination.
    pub energy: Vec<Energy>,
    /// Checked movements of nodes again by virtual work.
    pub virtual_work: Vec<VirtualMovement>,
}

/// A node's movement by virtual work, in the combination where it is largest against its limit.
#[derive(Debug, Clone, Default)]
pub struct VirtualMovement {
    /// The node.
    pub node: usize,
    /// 0 for x, 1 for y, 2 for rotation.
    pub direction: usize,
    /// The combination.
    pub combination: usize,
    /// Each member's share, m or rad.
    pub shares: Vec<f64>,
    /// Share of supports that settle or give, m or rad.
    pub supports: f64,
}

/// Works every result of a solved structure.
#[must_use]
pub fn results(model: &Model, solution: &Solution) -> Results {
    let mut silent = Silent;
    let prepared = prepare(&mut silent, model);
    let combinations = work_all(&mut silent, model, &prepared, solution);
    let governing: Vec<usize> = (0..model.members.len()).map(|at| governing(model, &combinations, at)).collect();
    let worst = |wanted: &dyn Fn(&Check) -> bool| {
        let ratio =
            |work: &CombinationWork| work.checks.iter().filter(|c| wanted(c)).filter_map(|c| c.ratio).reduce(f64::max);
        let rated: Vec<(usize, f64)> =
            combinations.iter().enumerate().filter_map(|(at, work)| ratio(work).map(|r| (at, r))).collect();
        rated
            .iter()
            .copied()
            .reduce(|best, next| if next.1 > best.1 * (1.0 + 1e-9) { next } else { best })
            .map(|(at, _)| at)
    };
    let deflecting: Vec<Option<usize>> =
        model.members.iter().map(|m| worst(&|c| c.kind == "deflection" && c.subject == m.name)).collect();
    let energy = model
        .combinations
        .iter()
        .zip(&solution.combinations)
        .zip(&combinations)
        .map(|((combination, solved), work)| {
            work::energy(model, &prepared, combination, solved, (&work.forces, &work.extremes, &work.nodes))
        })
        .collect();
    let mut virtual_work = Vec::new();
    for check in &model.checks.deflection {
        let DeflectionCheck::Node { node, direction, .. } = check else { continue };
        let kind = format!("deflection.{}", ["x", "y", "r"][*direction]);
        let Some(combination) = worst(&|c| c.kind == kind && c.subject == model.nodes[*node].name) else { continue };
        if solution.combinations[combination].members.iter().any(|m| m.slack) {
            continue;
        }
        let Some((forces, extremes)) = work::unit_response(model, &prepared, *node, *direction) else { continue };
        let work = &combinations[combination];
        let real = (work.forces.as_slice(), work.extremes.as_slice());
        let shares = work::virtual_work(&prepared, model, &model.combinations[combination], real, (&forces, &extremes));
        let supports = work::support_share(model, &solution.combinations[combination], &forces, *node, *direction);
        virtual_work.push(VirtualMovement { node: *node, direction: *direction, combination, shares, supports });
    }
    let alike = alike(model, &prepared);
    let groups = alike.iter().max().map_or(0, |last| last + 1);
    let worst_of_group = (0..groups)
        .map(|group| {
            let members: Vec<usize> = (0..alike.len()).filter(|at| alike[*at] == group).collect();
            let rated = |wanted: &dyn Fn(usize) -> Option<f64>| {
                members
                    .iter()
                    .filter_map(|at| wanted(*at).map(|ratio| (*at, ratio)))
                    .reduce(|best, next| if next.1 > best.1 * (1.0 + 1e-9) { next } else { best })
                    .map(|(at, _)| at)
            };
            let worst = rated(&|at| Some(score(&combinations[governing[at]], &model.members[at].name, at).0))
                .or(members.first().copied());
            let ratio_of = |at: usize| {
                let name = &model.members[at].name;
                let work = &combinations[deflecting[at]?];
                work.checks
                    .iter()
                    .filter(|c| c.kind == "deflection" && c.subject == *name)
                    .filter_map(|c| c.ratio)
                    .reduce(f64::max)
            };
            (worst.unwrap_or(0), rated(&ratio_of))
        })
        .collect();
    Results { prepared, combinations, governing, deflecting, alike, worst_of_group, energy, virtual_work }
}

/// The combination with the member's largest utilisation; without any, with its largest stress or force.
fn governing(model: &Model, combinations: &[CombinationWork], member: usize) -> usize {
    let name = &model.members[member].name;
    let score = |work: &CombinationWork| score(work, name, member);
    let mut best = 0;
    for at in 1..combinations.len() {
        let (new, old) = (score(&combinations[at]), score(&combinations[best]));
        let margin = |a: f64, b: f64| a > b * (1.0 + 1e-9);
        if margin(new.0, old.0)
            || !margin(old.0, new.0) && (margin(new.1, old.1) || !margin(old.1, new.1) && margin(new.2, old.2))
        {
            best = at;
        }
    }
    best
}

/// How hard a combination is on a member: largest utilisation, largest stress, largest force.
fn score(work: &CombinationWork, name: &str, member: usize) -> (f64, f64, f64) {
    let is_node = |kind: &str| kind.starts_with("deflection.");
    let ratio = work
        .checks
        .iter()
        .filter(|c| c.subject == name && !is_node(&c.kind))
        .filter_map(|c| c.ratio)
        .fold(0.0, f64::max);
    let forces = &work.forces[member];
    let stress = [work.extremes[member].tension, work.extremes[member].compression]
        .into_iter()
        .flatten()
        .map(|e| e.value.si.abs())
        .fold(0.0, f64::max);
    let force = forces.n.iter().chain(&forces.m).flatten().map(|v| v.si.abs()).fold(0.0, f64::max);
    (ratio, stress, force)
}

/// Groups of members alike in everything that a sheet of their own would show but their place and their forces.
fn alike(model: &Model, prepared: &Prepared) -> Vec<usize> {
    let mut groups: Vec<usize> = Vec::new();
    let mut first: Vec<usize> = Vec::new();
    for (at, member) in model.members.iter().enumerate() {
        let same = first.iter().position(|other| {
            let (o, length) = (&model.members[*other], prepared.bases[at].length);
            o.kind == member.kind
                && o.section == member.section
                && o.material == member.material
                && o.hinge == member.hinge
                && o.tension_only == member.tension_only
                && o.in_plane == member.in_plane
                && o.out_of_plane == member.out_of_plane
                && o.allowable == member.allowable
                && (prepared.bases[*other].length - length).abs() <= 1e-9 * length
        });
        groups.push(same.unwrap_or_else(|| {
            first.push(at);
            first.len() - 1
        }));
    }
    groups
}

/// Whether a member is worked line by line under a combination.
#[must_use]
pub fn is_worked(model: &Model, results: &Results, member: usize, combination: usize) -> bool {
    match model.display.detail {
        Detail::Full => true,
        Detail::Governing => {
            results.governing[member] == combination || results.deflecting[member] == Some(combination)
        }
        Detail::Summary => false,
    }
}

/// Writes the sheet of a package and settles its digits.
#[must_use]
pub fn compose(model: &Model, solution: &Solution, results: &Results) -> Sheet {
    let mut sheet = Sheet::default();
    let mut recording = Recording::new(&mut sheet, &model.display);
    let prepared = prepare(&mut recording, model);
    let totals: Vec<[Option<Value>; 3]> = model
        .cases
        .iter()
        .enumerate()
        .map(|case| work_case_total(&mut recording, model, case, &prepared.loads))
        .collect();
    let mut worked = Vec::new();
    for (at, combination) in model.combinations.iter().enumerate() {
        let solved = &solution.combinations[at];
        let silent = &results.combinations[at];
        let mut forces = Vec::new();
        let mut all_extremes = silent.extremes.clone();
        for (member_at, member) in model.members.iter().enumerate() {
            if is_worked(model, results, member_at, at) {
                let (member_forces, extremes) =
                    work_one(&mut recording, model, &prepared, (member_at, solved), combination);
                let section = &prepared.sections[member.section];
                let largest = largest_axial(&silent.forces);
                let subject = (member_at, member);
                work_member_checks(
                    &mut recording,
                    model,
                    subject,
                    combination,
                    section,
                    &member_forces,
                    &extremes,
                    largest,
                );
                let loads = work::factored(&mut recording, model, combination, &prepared.loads[member_at]);
                if results.governing[member_at] == at {
                    let check = silent.checks.iter().find(|c| c.subject == member.name && c.kind == "stress");
                    if let Some(place) = work::section_of_largest_stress(&extremes, check) {
                        work::work_depth(&mut recording, member, combination, &member_forces, &place);
                    }
                }
                work::work_bound(&mut recording, member, combination, &loads, &member_forces, &extremes);
                if results.deflecting[member_at] == Some(at) {
                    work::work_unit_load(&mut recording, member, combination, &loads, &member_forces, &extremes);
                }
                forces.push(member_forces);
                all_extremes[member_at] = extremes;
            } else {
                forces.push(stated_forces(
                    &mut recording,
                    &combination.name,
                    &member.name,
                    &silent.forces[member_at],
                    &silent.forces,
                ));
            }
        }
        let nodes: Vec<NodeBalance> = (0..model.nodes.len())
            .map(|node| {
                let moved = node_movement(&mut recording, model, combination, solved, node);
                work_node(&mut recording, model, node, combination, &forces, &prepared.loads, moved)
            })
            .collect();
        let balance = work_whole(&mut recording, model, combination, &totals, &nodes);
        work_node_checks(&mut recording, model, combination, &|sheet, node| {
            node_movement(sheet, model, combination, solved, node)
        });
        work_stability_check(&mut recording, model, combination, solved.critical.as_ref().map(|c| c.factor));
        work::work_energy(&mut recording, &combination.name, &results.energy[at]);
        for again in results.virtual_work.iter().filter(|again| again.combination == at) {
            let moved = node_movement(&mut recording, model, combination, solved, again.node)[again.direction];
            work::work_virtual(
                &mut recording,
                model,
                combination,
                (again.node, again.direction),
                (again.shares.as_slice(), again.supports),
                moved,
            );
        }
        worked.push(CombinationWork { forces, extremes: all_extremes, nodes, balance, checks: silent.checks.clone() });
    }
    for table in chapter::tables(model, solution, results, &worked, &mut recording) {
        recording.sheet.push_table(table);
    }
    leave_out_unused(&mut sheet);
    digits::settle(&mut sheet, model.display.digits);
    sheet
}

/// Steps that only lead to other steps, by letter: properties, geometry, loads.
const MEANS: [&str; 3] = [".P", ".G", ".L"];

/// Takes away steps on which nothing draws and which are no result of their own.
fn leave_out_unused(sheet: &mut Sheet) {
    let mut users = vec![0_usize; sheet.ledger.entries().len()];
    for step in &sheet.steps {
        step.operands.iter().for_each(|(_, id)| users[*id as usize] += 1);
    }
    for cell in sheet.tables.iter().flat_map(|table| &table.rows).flat_map(|row| &row.cells) {
        if let Cell::Quantity(id) = cell {
            users[*id as usize] += 1;
        }
    }
    // Operands are worked before what draws on them, so one walk from the end meets every chain of unused steps.
    let mut kept = Vec::with_capacity(sheet.steps.len());
    while let Some(step) = sheet.steps.pop() {
        let is_means = step.number.rfind('.').is_some_and(|at| MEANS.iter().any(|m| step.number[at..].starts_with(m)));
        if is_means && users[step.result as usize] == 0 {
            step.operands.iter().for_each(|(_, id)| users[*id as usize] -= 1);
        } else {
            kept.push(step);
        }
    }
    sheet.step_at.clear();
    kept.into_iter().rev().for_each(|step| sheet.push_step(step));
}

/// End forces of a member that is not worked line by line, as its tables state them.
fn stated_forces(
    sheet: &mut dyn Worksheet,
    combination: &str,
    member: &str,
    silent: &MemberForces,
    all: &[MemberForces],
) -> MemberForces {
    let largest = |of: &dyn Fn(&MemberForces) -> Vec<f64>| all.iter().flat_map(of).fold(0.0, f64::max);
    let force = largest(&|f| f.n.iter().chain(&f.v).flatten().map(|v| v.si.abs()).collect());
    let moment = largest(&|f| f.m.iter().flatten().map(|v| v.si.abs()).collect());
    let mut state = |table: &str, column: &str, value: Option<Value>, size: f64, measure: Measure| {
        value.map(|v| sheet.stated(format_args!("{combination}.{table}.{member}.{column}"), v.si, size, measure))
    };
    let mut stated = MemberForces::default();
    for end in 0..2 {
        let at = end + 1;
        stated.n[end] = state("F", &format!("N_{at}"), silent.n[end], force, Measure::Force);
        stated.v[end] = state("F", &format!("V_{at}"), silent.v[end], force, Measure::Force);
        stated.m[end] = state("F", &format!("M_{at}"), silent.m[end], moment, Measure::Moment);
        stated.on_joint[end][0] = state("J", &format!("F_x{at}"), silent.on_joint[end][0], force, Measure::Force);
        stated.on_joint[end][1] = state("J", &format!("F_y{at}"), silent.on_joint[end][1], force, Measure::Force);
        stated.top[end] = silent.top[end];
        stated.bottom[end] = silent.bottom[end];
    }
    stated
}

/// The sheet of a brief without results: the input's tables, and tables of results left blank.
#[must_use]
pub fn brief(model: &Model) -> Sheet {
    let mut sheet = Sheet::default();
    let mut recording = Recording::new(&mut sheet, &model.display);
    for table in chapter::brief_tables(model, &mut recording) {
        recording.sheet.push_table(table);
    }
    digits::settle(&mut sheet, model.display.digits);
    sheet
}
