//! `combinations:` factors on load cases; without any, each load case stands as one of its own.
use super::super::keys::{COMBINATION, PURPOSES, Sign};
use super::super::{Combination, LoadCase, Purpose};
use super::fields::Fields;
use super::leaf::{number, word};
use super::names::Directory;
use crate::diagnostic::{Code, Diagnostics};

pub(super) fn read(
    root: &Fields<'_>,
    directory: &Directory,
    cases: &[LoadCase],
    faults: &mut Diagnostics,
) -> Vec<Combination> {
    let entries = root.entries("combinations", faults);
    if entries.is_empty() {
        return cases.iter().enumerate().map(|(at, case)| implied(at, case)).collect();
    }
    let mut list = Vec::new();
    for field in entries {
        let subject = format!("combination `{}`", field.key);
        let Some(fields) = Fields::open(&field.value, subject, &COMBINATION, faults) else { continue };
        list.push(Combination {
            name: field.key.clone(),
            title: fields.text("title", faults),
            factors: factors(&fields, directory, faults),
            purposes: fields.get("for").map(|_| purposes(&fields, faults)),
            implied: false,
        });
    }
    list
}

fn implied(at: usize, case: &LoadCase) -> Combination {
    let (name, title) = (case.name.clone(), case.title.clone());
    Combination { name, title, factors: vec![(at, 1.0)], purposes: None, implied: true }
}

fn factors(fields: &Fields<'_>, directory: &Directory, faults: &mut Diagnostics) -> Vec<(usize, f64)> {
    let entries = fields.entries("factors", faults);
    if let Some(raw) = fields.get("factors").filter(|raw| entries.is_empty() && raw.as_typed().is_none()) {
        let fault = raw.error(Code::NoValue).message(format!("{} names no load case", fields.what("factors")));
        faults.push(fault.label("no factors").help("factors are written `factors: {D: 1.2, L: 1.6}`"));
    }
    let mut list = Vec::new();
    for entry in entries {
        let message = format!("{} names a load case that does not exist", fields.what("factors"));
        let what = format!("the factor of `{}` in {}", entry.key, fields.subject);
        match (directory.cases.find_key(entry, &message), number(&entry.value, &what, Sign::Any)) {
            (Ok(case), Ok(factor)) => list.push((case, factor)),
            (case, factor) => faults.extend(case.err().into_iter().chain(factor.err())),
        }
    }
    list
}

fn purposes(fields: &Fields<'_>, faults: &mut Diagnostics) -> Vec<Purpose> {
    const ALL: [Purpose; 6] = [
        Purpose::Stress,
        Purpose::Shear,
        Purpose::Deflection,
        Purpose::Buckling,
        Purpose::Slenderness,
        Purpose::Stability,
    ];
    let mut list = Vec::new();
    let items = fields.items("for", faults);
    if let Some(raw) = fields.get("for").filter(|_| items.is_empty()) {
        let fault = raw.error(Code::NoValue).message(format!("{} names no check", fields.what("for")));
        faults.push(fault.label("for nothing").help("leave the key out where the combination counts for every check"));
    }
    for raw in items {
        match word(raw, &fields.what("for"), PURPOSES) {
            Ok(found) => {
                list.extend(PURPOSES.iter().zip(ALL).filter(|(name, _)| **name == found).map(|(_, purpose)| purpose))
            }
            Err(fault) => faults.push(fault),
        }
    }
    list
}
