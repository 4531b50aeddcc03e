//! The comparison with limits and the sampling list, as the templates see them.
use super::symbols::what_it_is;
use crate::document::{CheckFacts, CheckRow, Group, MatrixRow, SampleFact, SampleGroup, SampleSubject};
use crate::model::{Combination, DeflectionCheck, MemberKind, Model, Purpose};
use crate::sheet::{Results, Sheet, Step, ratio_text, sorted_checks};
use crate::units::Measure;
use crate::work::Check;
use std::collections::{BTreeMap, BTreeSet};

/// Every comparison.
pub(super) fn facts(model: &Model, results: &Results, sheet: &Sheet) -> CheckFacts {
    let checks = sorted_checks(results);
    let rows: Vec<CheckRow> = checks.iter().map(|check| row(model, sheet, check)).collect();
    let count = |wanted: Option<bool>| checks.iter().filter(|c| c.ok() == wanted).count();
    let kinds = KINDS.iter().map(|(kind, _)| (*kind).to_owned()).collect();
    CheckFacts {
        governing: rows.first().filter(|row| !row.ratio.is_empty()).cloned(),
        within: count(Some(true)),
        beyond: count(Some(false)),
        not_checked: count(None),
        matrix: matrix(model, &checks),
        kinds,
        rows,
        groups: groups(model, sheet),
    }
}

fn row(model: &Model, sheet: &Sheet, check: &Check) -> CheckRow {
    let quantity =
        |si: Option<f64>| si.map_or(String::new(), |si| crate::sheet::quantity_text(&model.display, si, check.measure));
    let step = check.step.as_deref().and_then(|number| sheet.step(number));
    let ratio = match (check.ratio, step) {
        (None, _) => String::new(),
        (Some(_), Some(step)) => sheet.ledger.entry(step.result).printed.to_string(),
        (Some(ratio), None) => ratio_text(ratio, model.display.digits),
    };
    let member = model.members.iter().find(|m| m.name == check.subject);
    let source =
        member.filter(|_| check.kind == "stress" || check.kind == "shear").and_then(|m| m.allowable.source.clone());
    CheckRow {
        id: check.id.clone(),
        subject: check.subject.clone(),
        kind: check.kind.clone(),
        combination: check.combination.clone(),
        place: check.place.map_or(String::new(), |x| {
            format!("x = {}", crate::sheet::quantity_text(&model.display, x, Measure::Span))
        }),
        demand: quantity(check.demand),
        limit: quantity(check.limit),
        source: source.unwrap_or_default(),
        ratio,
        verdict: match check.ok() {
            Some(true) => "OK",
            Some(false) => "NOT OK",
            None => "NOT CHECKED",
        }
        .into(),
        why: check.why.clone().unwrap_or_default(),
        address: step.map_or(String::new(), |step| step.number.clone()),
    }
}

/// Every member, every node with a check and the whole, under every combination, against every kind of check.
fn matrix(model: &Model, checks: &[&Check]) -> Vec<MatrixRow> {
    let mut rows = Vec::new();
    for (at, member) in model.members.iter().enumerate() {
        for combination in &model.combinations {
            rows.push(matrix_row(checks, &member.name, false, combination, &|kind| not_for_member(model, at, kind)));
        }
    }
    let mut nodes = BTreeSet::new();
    for check in &model.checks.deflection {
        if let DeflectionCheck::Node { node, .. } = check
            && nodes.insert(*node)
        {
            for combination in &model.combinations {
                rows.push(matrix_row(checks, &model.nodes[*node].name, true, combination, &|_| "– (of members)"));
            }
        }
    }
    for combination in &model.combinations {
        rows.push(matrix_row(checks, crate::work::WHOLE, false, combination, &|kind| match kind {
            "stability" => "NOT CHECKED: not asked for",
            _ => "– (of members)",
        }));
    }
    rows
}

/// One subject under one combination.
fn matrix_row(
    checks: &[&Check],
    subject: &str,
    node: bool,
    combination: &Combination,
    why_not: &dyn Fn(&str) -> &'static str,
) -> MatrixRow {
    let of_kind = |kind: &str, wanted: &str| kind == wanted || kind.split('.').next() == Some(wanted);
    let cell = |(kind, purpose): &(&str, Purpose)| {
        let of: Vec<&&Check> = checks
            .iter()
            .filter(|c| c.subject == subject && c.combination == combination.name)
            .filter(|c| c.kind.starts_with("deflection.") == node && of_kind(&c.kind, kind))
            .collect();
        if of.is_empty() {
            let why = why_not(kind);
            let excluded =
                !combination.is_for(*purpose) && (!why.starts_with('–') || why.ends_with("(not compressed)"));
            return if excluded { "– (combination for others)".to_owned() } else { why.to_owned() };
        }
        let worst = of.iter().filter_map(|c| c.ratio).reduce(f64::max).map(|ratio| ratio_text(ratio, 3));
        match (of.iter().any(|c| c.ok() == Some(false)), of.iter().any(|c| c.ok().is_none()), worst) {
            (true, _, Some(worst)) => format!("{worst} BEYOND LIMIT"),
            (_, true, Some(worst)) => format!("{worst} in part; NOT CHECKED in part"),
            (_, true, None) => "NOT CHECKED".into(),
            (_, _, worst) => format!("{} within", worst.unwrap_or_default()),
        }
    };
    MatrixRow { subject: format!("{subject}, {}", combination.name), cells: KINDS.iter().map(cell).collect() }
}

/// Every kind of check there is; what was not asked for is said to be so.
const KINDS: [(&str, Purpose); 6] = [
    ("stress", Purpose::Stress),
    ("shear", Purpose::Shear),
    ("deflection", Purpose::Deflection),
    ("buckling", Purpose::Buckling),
    ("slenderness", Purpose::Slenderness),
    ("stability", Purpose::Stability),
];

/// Why a member has no row of a kind.
fn not_for_member(model: &Model, member: usize, kind: &str) -> &'static str {
    let checks = &model.checks;
    let of = model.members[member].kind;
    let bends = crate::work::carries_shear(of);
    match kind {
        "stress" if !checks.stress.covers(member) => "NOT CHECKED: switched off",
        "shear" if !bends => "– (a bar carries no shear)",
        "shear" if !checks.shear.covers(member) => "NOT CHECKED: switched off",
        "deflection" if !bends => "– (a bar stays straight)",
        "deflection" => "NOT CHECKED: no limit given",
        "buckling" | "slenderness" if of == MemberKind::Beam => "– (no axial force)",
        "buckling" if checks.buckling.is_none() => "NOT CHECKED: not asked for",
        "slenderness" if checks.slenderness.is_none() => "NOT CHECKED: not asked for",
        "buckling" | "slenderness" => "– (not compressed)",
        "stability" => "– (of the whole)",
        _ => "NOT CHECKED: not asked for",
    }
}

/// Comparisons that stand on no member sheet.
fn groups(model: &Model, sheet: &Sheet) -> Vec<Group> {
    let of = |wanted: &dyn Fn(&str) -> bool| -> Vec<String> {
        sheet
            .steps
            .iter()
            .filter(|step| step.comparison.is_some() && wanted(&step.number))
            .map(|step| step.number.clone())
            .collect()
    };
    let node_step = |number: &str| number.rsplit('.').next().is_some_and(|last| last.starts_with("C8"));
    let whole_step = |number: &str| number.starts_with("structure.") && number.ends_with(".C51");
    let _ = model;
    let overview = sheet.figure("utilisation").map(|figure| Group {
        title: "Ratios at a glance".into(),
        figures: vec![figure.id.clone()],
        ..Group::default()
    });
    let of_steps = [("Movements of nodes", of(&node_step)), ("Stability of the whole", of(&whole_step))]
        .into_iter()
        .filter(|(_, steps)| !steps.is_empty())
        .map(|(title, steps)| Group { title: title.into(), steps, ..Group::default() });
    overview.into_iter().chain(of_steps).collect()
}

/// What the checker should confirm at least, chosen by rule and not by the originator.
///
/// All governing comparisons, everything above 0.8, each distinct formula once, and a tenth of the rest drawn by the
/// input's fingerprint. The shares are common practice. The first two have a line each, the others stand by subject.
pub(super) fn sample(results: &Results, sheet: &Sheet, sha256: &str) -> (Vec<SampleFact>, Vec<SampleGroup>) {
    let mut seen = BTreeSet::new();
    let mut chosen = Vec::new();
    let mut subjects = BTreeSet::new();
    for check in sorted_checks(results) {
        let Some(step) = check.step.as_deref().and_then(|number| sheet.step(number)) else { continue };
        let why = if subjects.insert(check.subject.clone()) {
            "governs"
        } else if check.ratio.is_some_and(|ratio| ratio > 0.8) {
            "above 0.8"
        } else {
            continue;
        };
        if seen.insert(step.number.as_str()) {
            let what = what_it_is(step);
            chosen.push(SampleFact { address: step.number.clone(), what, why: why.to_owned() });
        }
    }
    let mut formulas = BTreeSet::new();
    let first = |step: &&Step| {
        let letter = step.number.rsplit('.').next().and_then(|last| last.chars().next()).unwrap_or(' ');
        let formula = match letter {
            // Balances differ in their number of terms alone.
            'N' | 'R' => String::new(),
            _ => crate::formula::with_symbols(step.definition.tree()),
        };
        formulas.insert((what_it_is(step), formula))
    };
    let firsts: Vec<&Step> =
        sheet.steps.iter().filter(first).filter(|step| seen.insert(step.number.as_str())).collect();
    let drawn = |step: &&Step| {
        // A tenth, by the fingerprint and the step's own number: other steps do not move the draw.
        let mut hash: u64 = 0xcbf2_9ce4_8422_2325;
        for byte in sha256.bytes().chain(step.number.bytes()) {
            hash = (hash ^ u64::from(byte)).wrapping_mul(0x0100_0000_01b3);
        }
        (hash ^ (hash >> 32)).is_multiple_of(10)
    };
    let draw: Vec<&Step> = sheet.steps.iter().filter(drawn).filter(|step| seen.insert(step.number.as_str())).collect();
    let groups = [("First use of a formula", firsts), ("Drawn by the fingerprint of the input", draw)]
        .into_iter()
        .filter(|(_, steps)| !steps.is_empty())
        .map(|(why, steps)| SampleGroup { why: why.into(), subjects: by_subject(&steps) })
        .collect();
    (chosen, groups)
}

/// Steps under what stands before the letter of their numbers, in the order in which they were worked.
fn by_subject(steps: &[&Step]) -> Vec<SampleSubject> {
    let mut subjects: Vec<SampleSubject> = Vec::new();
    let mut known: BTreeMap<&str, usize> = BTreeMap::new();
    for step in steps {
        let subject = step.number.rsplit_once('.').map_or("", |(subject, _)| subject);
        let at = *known.entry(subject).or_insert_with(|| {
            subjects.push(SampleSubject { subject: subject.to_owned(), steps: Vec::new() });
            subjects.len() - 1
        });
        subjects[at].steps.push(step.number.clone());
    }
    subjects.iter_mut().for_each(|subject| subject.steps.sort());
    subjects
}
