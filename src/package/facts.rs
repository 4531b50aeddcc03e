//! Fills what the templates may speak of from the model, the solution and the sheet.
use super::comparisons;
use crate::analysis::Solution;
use crate::document::{
    AssumptionFact, BalanceSheet, BasisFact, CaseFacts, CombinationFacts, CombinationSheet, DisplayFacts, Facts, Group,
    InputFacts, LeftOutFact, MemberFact, MemberSheet, NodeSheet, PersonFact, ProgramFacts, ProjectFacts, RevisionFact,
    SectionFact, StructureFacts,
};
use crate::model::{Detail, Model, Person, Project};
use crate::sheet::{Results, Sheet, is_worked, kind_word};

/// What stands beside model and solution: the file and what it is called.
#[derive(Debug, Clone, Copy)]
pub struct Origin<'a> {
    /// Name without folders.
    pub name: &'a str,
    /// Its text.
    pub text: &'a str,
    /// SHA-256 of its bytes.
    pub sha256: &'a str,
}

/// Everything that the templates may speak of.
#[must_use]
pub fn facts(
    model: &Model,
    solution: &Solution,
    results: &Results,
    sheet: &Sheet,
    cautions: Vec<String>,
    origin: Origin<'_>,
) -> Facts {
    let steps = Index::new(sheet);
    let (symbols, read_symbols) = super::symbols::facts(&model.display, sheet);
    let (sample, sample_rest) = comparisons::sample(results, sheet, origin.sha256);
    Facts {
        project: project(&model.project),
        display: DisplayFacts {
            detail: match model.display.detail {
                Detail::Governing => "governing",
                Detail::Full => "full",
                Detail::Summary => "summary",
            }
            .into(),
            digits: model.display.digits.to_string(),
        },
        checks: comparisons::facts(model, results, sheet),
        cautions,
        sign_figures: figures(sheet, &["signs"]),
        structure: structure(model, sheet, &steps),
        cases: model.cases.iter().map(|case| self::case(model, case, sheet, &steps)).collect(),
        combinations: (0..model.combinations.len()).map(|at| combination(model, solution, at, sheet)).collect(),
        node_sheets: node_sheets(model, &steps),
        balance_sheets: model
            .combinations
            .iter()
            .map(|c| BalanceSheet {
                combination: c.name.clone(),
                groups: steps.groups(&[("", "structure", Some(&c.name), 'R', 0..30)]),
            })
            .collect(),
        load_audit: model
            .combinations
            .iter()
            .zip(&solution.combinations)
            .map(|(c, solved)| Group {
                text: trust(solution, solved, &c.name),
                tables: tables(sheet, &[&format!("{}.A", c.name)]),
                ..Group::default()
            })
            .collect(),
        member_sheets: member_sheets(model, results, sheet, &steps),
        second_answers: second_answers(model, results, sheet, &steps),
        sample,
        sample_rest,
        symbols,
        read_symbols,
        left_out: solution
            .left_out
            .iter()
            .map(|left| LeftOutFact {
                node: model.nodes[left.node].name.clone(),
                direction: match left.direction {
                    None => "rotation".into(),
                    Some([x, y]) if y.abs() < 1e-9 * x.abs() => "movement along X".into(),
                    Some([x, y]) if x.abs() < 1e-9 * y.abs() => "movement along Y".into(),
                    Some([x, y]) => format!("movement along the direction {:.1}° from X", y.atan2(x).to_degrees()),
                },
            })
            .collect(),
        input: InputFacts { name: origin.name.into(), sha256: origin.sha256.into(), text: origin.text.into() },
        program: ProgramFacts {
            version: env!("CARGO_PKG_VERSION").into(),
            validated: super::validation::COVERED.iter().map(|line| (*line).to_owned()).collect(),
            uncovered: super::validation::uncovered(model),
            steps: sheet.steps.len().to_string(),
            tables: sheet.tables.len().to_string(),
        },
    }
}

/// What the brief without results may speak of: everything of the input, nothing of the solution.
#[must_use]
pub(super) fn brief(model: &Model, sheet: &Sheet, origin: Origin<'_>) -> Facts {
    let steps = Index::new(sheet);
    let nothing = Solution {
        combinations: vec![crate::analysis::CombinationSolution::default(); model.combinations.len()],
        ..Solution::default()
    };
    Facts {
        project: project(&model.project),
        display: DisplayFacts { detail: "summary".into(), digits: model.display.digits.to_string() },
        sign_figures: figures(sheet, &["signs"]),
        structure: structure(model, sheet, &steps),
        cases: model.cases.iter().map(|case| self::case(model, case, sheet, &steps)).collect(),
        combinations: (0..model.combinations.len()).map(|at| combination(model, &nothing, at, sheet)).collect(),
        input: InputFacts { name: origin.name.into(), sha256: origin.sha256.into(), text: origin.text.into() },
        program: ProgramFacts { version: env!("CARGO_PKG_VERSION").into(), ..ProgramFacts::default() },
        ..Facts::default()
    }
}

fn text(of: Option<&String>) -> String {
    of.cloned().unwrap_or_default()
}

fn person(person: &Person) -> PersonFact {
    PersonFact { name: text(person.name.as_ref()), date: text(person.date.as_ref()) }
}

fn project(project: &Project) -> ProjectFacts {
    ProjectFacts {
        title: project.title.clone(),
        number: text(project.number.as_ref()),
        part: text(project.part.as_ref()),
        client: text(project.client.as_ref()),
        revision: text(project.revision.as_ref()),
        status: text(project.status.as_ref()),
        prepared_by: person(&project.prepared_by),
        checked_by: person(&project.checked_by),
        approved_by: person(&project.approved_by),
        revisions: project
            .revisions
            .iter()
            .map(|r| RevisionFact {
                mark: r.mark.clone(),
                date: text(r.date.as_ref()),
                by: text(r.by.as_ref()),
                text: text(r.text.as_ref()),
                affects: r.affects.clone(),
            })
            .collect(),
        purpose: text(project.purpose.as_ref()),
        basis: project.basis.iter().map(|b| BasisFact { mark: b.mark.clone(), text: b.text.clone() }).collect(),
        assumptions: project
            .assumptions
            .iter()
            .enumerate()
            .map(|(at, a)| AssumptionFact { number: (at + 1).to_string(), text: a.text.clone(), confirm: a.confirm })
            .collect(),
        notes: text(project.notes.as_ref()),
    }
}

/// Those of the ids that the sheet has tables for.
fn tables(sheet: &Sheet, ids: &[&str]) -> Vec<String> {
    ids.iter().filter(|id| sheet.table(id).is_some()).map(|id| (*id).to_owned()).collect()
}

fn figures(sheet: &Sheet, ids: &[&str]) -> Vec<String> {
    ids.iter().filter(|id| sheet.figure(id).is_some()).map(|id| (*id).to_owned()).collect()
}

/// What is said of the stress at the section of largest stress.
const DEPTH: &str = "Stress through the depth";

/// Steps found by subject, combination and letter, in the order of their numbers.
struct Index {
    steps: std::collections::BTreeMap<(String, String, char), Vec<(u16, String)>>,
}

type Wanted<'a> = (&'a str, &'a str, Option<&'a String>, char, std::ops::Range<u16>);

impl Index {
    fn new(sheet: &Sheet) -> Self {
        let mut steps: std::collections::BTreeMap<_, Vec<_>> = std::collections::BTreeMap::new();
        for step in &sheet.steps {
            let parts: Vec<&str> = step.number.split('.').collect();
            let (subject, combination, last) = match parts.as_slice() {
                [subject, combination, last] => (*subject, *combination, *last),
                [subject, last] => (*subject, "", *last),
                _ => continue,
            };
            let mut characters = last.chars();
            if let (Some(letter), Ok(nn)) = (characters.next(), characters.as_str().parse::<u16>()) {
                steps
                    .entry((subject.to_owned(), combination.to_owned(), letter))
                    .or_default()
                    .push((nn, step.number.clone()));
            }
        }
        steps.values_mut().for_each(|list| list.sort());
        Self { steps }
    }

    fn find(
        &self,
        subject: &str,
        combination: Option<&String>,
        letter: char,
        range: std::ops::Range<u16>,
    ) -> Vec<String> {
        let key = (subject.to_owned(), combination.cloned().unwrap_or_default(), letter);
        self.steps.get(&key).map_or_else(Vec::new, |list| {
            list.iter().filter(|(nn, _)| range.contains(nn)).map(|(_, number)| number.clone()).collect()
        })
    }

    /// One group a row of the list, rows without steps left out.
    fn groups(&self, wanted: &[Wanted<'_>]) -> Vec<Group> {
        wanted
            .iter()
            .map(|(title, subject, combination, letter, range)| Group {
                title: (*title).to_owned(),
                steps: self.find(subject, *combination, *letter, range.clone()),
                ..Group::default()
            })
            .filter(|group| !group.steps.is_empty())
            .collect()
    }
}

fn member_fact(model: &Model, at: usize) -> MemberFact {
    let member = &model.members[at];
    MemberFact {
        name: member.name.clone(),
        kind: kind_word(member.kind).into(),
        section: model.sections[member.section].name.clone(),
        material: model.materials[member.material].name.clone(),
        from: model.nodes[member.from].name.clone(),
        to: model.nodes[member.to].name.clone(),
        note: text(member.note.as_ref()),
    }
}

fn structure(model: &Model, sheet: &Sheet, steps: &Index) -> StructureFacts {
    let mut section_tables: Vec<String> = Vec::new();
    for section in &model.sections {
        let id = format!("INPUT.sections.{}", section.kind.name());
        if sheet.table(&id).is_some() && !section_tables.contains(&id) {
            section_tables.push(id);
        }
    }
    let mut defaults = Vec::new();
    let gravity_given = (model.gravity - crate::units::STANDARD_GRAVITY).abs() > 0.0;
    if !gravity_given && model.cases.iter().any(|c| c.self_weight != 0.0) {
        defaults.push("Gravity is standard gravity, 9.80665 m/s².".into());
    }
    if (model.checks.buckling.is_some() || model.checks.slenderness.is_some())
        && model.members.iter().any(|m| m.in_plane.is_none())
    {
        defaults.push("The effective length factor in the plane is 1 where none is given.".into());
    }
    if model.combinations.iter().any(|c| c.implied) {
        defaults.push("No combinations are given: each load case stands as one of its own, with factor 1.".into());
    }
    StructureFacts {
        nodes: model.nodes.iter().map(|n| n.name.clone()).collect(),
        members: (0..model.members.len()).map(|at| member_fact(model, at)).collect(),
        sections: model
            .sections
            .iter()
            .map(|section| SectionFact {
                name: section.name.clone(),
                shape: section.kind.name().into(),
                source: text(section.source.as_ref()),
                tables: tables(sheet, &[&format!("INPUT.plates.{}", section.name)]),
                figures: figures(sheet, &[&format!("section.{}", section.name)]),
                steps: steps.find(&section.name, None, 'P', 0..1000),
            })
            .collect(),
        materials: model.materials.iter().map(|m| m.name.clone()).collect(),
        figures: figures(sheet, &["structure"]),
        node_tables: tables(sheet, &["INPUT.nodes"]),
        support_tables: tables(sheet, &["INPUT.supports"]),
        member_tables: tables(sheet, &["INPUT.members"]),
        combination_tables: tables(sheet, &["INPUT.combinations"]),
        limit_tables: tables(sheet, &["INPUT.checks", "INPUT.checks.deflection"]),
        section_tables,
        material_tables: tables(sheet, &["INPUT.materials", "INPUT.gravity"]),
        material_steps: Vec::new(),
        defaults,
    }
}

fn case(model: &Model, case: &crate::model::LoadCase, sheet: &Sheet, steps: &Index) -> CaseFacts {
    let ids: Vec<String> = ["weight", "nodes", "lines", "points", "couples", "warming", "misfit", "settlements"]
        .iter()
        .map(|kind| format!("INPUT.loads.{}.{kind}", case.name))
        .filter(|id| sheet.table(id).is_some())
        .collect();
    let mut of_case = Vec::new();
    for member in &model.members {
        of_case.extend(steps.find(&member.name, Some(&case.name), 'L', 50..u16::MAX));
    }
    of_case.extend(steps.find("structure", Some(&case.name), 'R', 41..44));
    CaseFacts {
        name: case.name.clone(),
        title: text(case.title.as_ref()),
        self_weight: if case.self_weight == 0.0 { String::new() } else { format!("{}", case.self_weight) },
        tables: ids,
        figures: figures(sheet, &[&format!("case.{}", case.name)]),
        steps: of_case,
    }
}

fn combination(model: &Model, solution: &Solution, at: usize, sheet: &Sheet) -> CombinationFacts {
    let combination = &model.combinations[at];
    let name = &combination.name;
    let factors = combination
        .factors
        .iter()
        .map(|(case, factor)| format!("{factor}·{}", model.cases[*case].name).replace('-', "−"));
    let solved = &solution.combinations[at];
    let ids: Vec<String> =
        ["U", "D", "R", "F", "J", "Q", "X", "B"].iter().map(|kind| format!("{name}.{kind}")).collect();
    let drawings: Vec<String> =
        ["deflected", "N", "V", "M", "buckling"].iter().map(|kind| format!("{name}.{kind}")).collect();
    CombinationFacts {
        name: name.clone(),
        title: text(combination.title.as_ref()),
        factors: factors.collect::<Vec<_>>().join(" + "),
        purposes: combination.purposes.as_ref().map_or(String::new(), |list| {
            list.iter().map(|p| format!("{p:?}").to_lowercase()).collect::<Vec<_>>().join(", ")
        }),
        implied: combination.implied,
        critical: solved
            .critical
            .as_ref()
            .map_or(String::new(), |c| format!("{:.2}", (c.factor * 100.0).floor() / 100.0)),
        slack: model
            .members
            .iter()
            .zip(&solved.members)
            .filter(|(_, m)| m.slack)
            .map(|(m, _)| m.name.clone())
            .collect(),
        tables: ids.into_iter().filter(|id| sheet.table(id).is_some()).collect(),
        figures: drawings.into_iter().filter(|id| sheet.figure(id).is_some()).collect(),
    }
}

fn node_sheets(model: &Model, steps: &Index) -> Vec<NodeSheet> {
    let mut sheets = Vec::new();
    for node in &model.nodes {
        for combination in &model.combinations {
            let groups = steps.groups(&[("", &node.name, Some(&combination.name), 'N', 0..90)]);
            if !groups.is_empty() {
                sheets.push(NodeSheet { node: node.name.clone(), combination: combination.name.clone(), groups });
            }
        }
    }
    sheets
}

fn member_sheets(model: &Model, results: &Results, sheet: &Sheet, steps: &Index) -> Vec<MemberSheet> {
    let mut sheets = Vec::new();
    for (at, member) in model.members.iter().enumerate() {
        let name = &member.name;
        let worked: Vec<usize> = (0..model.combinations.len()).filter(|c| is_worked(model, results, at, *c)).collect();
        let of_combination = |c: &usize| {
            let combination = &model.combinations[*c].name;
            let wanted: Vec<Wanted<'_>> = vec![
                ("Loads between the ends", name, Some(combination), 'L', 0..50),
                ("Movements in member axes", name, Some(combination), 'D', 0..1000),
                ("Strain", name, Some(combination), 'E', 0..1000),
                ("Stress at the ends", name, Some(combination), 'S', 0..10),
                ("End forces", name, Some(combination), 'F', 0..1000),
                ("Extremes between the ends", name, Some(combination), 'X', 0..60),
                ("Shear stress", name, Some(combination), 'S', 10..20),
                (DEPTH, name, Some(combination), 'S', 20..30),
                ("Comparison with limits", name, Some(combination), 'C', 0..80),
            ];
            let reason = reason(model, results, at, *c);
            let mut groups = steps.groups(&wanted);
            // Headings that repeat would make links depend on their order in the document.
            groups.iter_mut().filter(|group| group.title == DEPTH).for_each(|group| {
                group.figures = figures(sheet, &[&format!("{name}.{combination}.depth")]);
            });
            groups.iter_mut().for_each(|group| group.title = format!("{}, {name}, {combination}", group.title));
            let balance = steps.find(name, Some(combination), 'N', 30..40);
            if !balance.is_empty() {
                groups.push(Group {
                    title: format!("Balance of the middle node, {name}, {combination}"),
                    steps: balance,
                    ..Group::default()
                });
            }
            CombinationSheet { combination: combination.clone(), reason, groups }
        };
        sheets.push(MemberSheet {
            member: member_fact(model, at),
            figures: figures(sheet, &[&format!("member.{name}")]),
            groups: steps.groups(&[(&format!("Geometry and constants, {name}"), name, None, 'G', 0..1000)]),
            sheets: worked.iter().map(of_combination).collect(),
        });
    }
    sheets
}

/// How far the numbers of a combination can be trusted, in whole powers of ten: dust in the last digits moves no text.
fn trust(solution: &Solution, solved: &crate::analysis::CombinationSolution, name: &str) -> String {
    let power = |value: f64| value.max(1e-16).log10().ceil() as i32;
    format!(
        "Combination {name} was solved from {} equations. The forces left over in them are below 10{} of the largest force; of about 16 digits that the program works with, some {} are lost to the spread of the stiffnesses (condition number about 10{}).",
        solution.equations,
        crate::formula::superscript_number(power(solved.residual)),
        power(solution.condition.max(1.0)),
        crate::formula::superscript_number(power(solution.condition.max(1.0))),
    )
}

/// Why a member is worked line by line under a combination; completes "this combination …".
fn reason(model: &Model, results: &Results, member: usize, combination: usize) -> String {
    let words = match (results.governing[member] == combination, results.deflecting[member] == Some(combination)) {
        _ if model.display.detail != Detail::Governing => return String::new(),
        (true, true) => "governs this member and its deflection",
        (true, false) => "governs this member",
        (false, true) => "governs its deflection",
        (false, false) => return String::new(),
    };
    let others: Vec<&str> = (0..model.members.len())
        .filter(|at| *at != member && results.alike[*at] == results.alike[member])
        .map(|at| model.members[at].name.as_str())
        .collect();
    if others.is_empty() {
        return words.to_owned();
    }
    format!(
        "{words}, the worst of those alike in kind, section, material, length and limits; {} stand in the tables",
        others.join(", ")
    )
}

/// Second answers by another theory.
fn second_answers(model: &Model, results: &Results, sheet: &Sheet, steps: &Index) -> Vec<Group> {
    let mut groups = Vec::new();
    for combination in &model.combinations {
        groups.push(Group {
            title: format!("Work and energy, combination {}", combination.name),
            text: "Work of the loads comes from movements, energy from section forces: a wrong stiffness shows here."
                .into(),
            tables: tables(sheet, &[&format!("{}.W", combination.name)]),
            steps: steps.find("structure", Some(&combination.name), 'R', 31..32),
            ..Group::default()
        });
    }
    for (at, member) in model.members.iter().enumerate() {
        for (c, combination) in model.combinations.iter().enumerate() {
            if !is_worked(model, results, at, c) {
                continue;
            }
            groups.extend(steps.groups(&[
                (
                    &format!("Order of magnitude of the moment, {}, {}", member.name, combination.name),
                    &member.name,
                    Some(&combination.name),
                    'X',
                    61..70,
                ),
                (
                    &format!("Deflection again by unit load, {}, {}", member.name, combination.name),
                    &member.name,
                    Some(&combination.name),
                    'X',
                    71..80,
                ),
            ]));
        }
    }
    for again in &results.virtual_work {
        let (node, combination) = (&model.nodes[again.node].name, &model.combinations[again.combination].name);
        let word = ["x", "y", "r"][again.direction];
        let nn = again.direction as u16;
        let mut of_node = steps.find(node, Some(combination), 'N', 91 + nn..92 + nn);
        of_node.extend(steps.find(node, Some(combination), 'N', 94 + nn..95 + nn));
        groups.push(Group {
            title: format!("Movement of node {node} in {word} again by virtual work, {combination}"),
            tables: tables(sheet, &[&format!("{combination}.K.{node}.{word}")]),
            steps: of_node,
            ..Group::default()
        });
    }
    groups
}
