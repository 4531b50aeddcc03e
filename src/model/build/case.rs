//! `load_cases:` self-weight and loads.
use super::super::LoadCase;
use super::super::keys::{CASE, Sign};
use super::fields::Fields;
use super::leaf::{listed, number, read_flag};
use super::load::{self, Scope};
use crate::diagnostic::{Code, Diagnostic, Diagnostics};
use crate::input::Raw;
use std::collections::BTreeSet;

pub(super) fn read(root: &Fields<'_>, scope: &Scope<'_>, faults: &mut Diagnostics) -> Vec<LoadCase> {
    let entries = root.entries("load_cases", faults).iter();
    entries
        .map(|field| {
            let name = field.key.clone();
            let mut case = LoadCase { name: name.clone(), title: None, self_weight: 0.0, loads: Vec::new() };
            let Some(fields) = Fields::open(&field.value, format!("load case `{name}`"), &CASE, faults) else {
                return case;
            };
            case.title = fields.text("title", faults);
            case.self_weight = fields.read("self_weight", faults, self_weight).unwrap_or(0.0);
            if let Some(raw) = fields.get("self_weight").filter(|_| case.self_weight.abs() > 0.0) {
                faults.extend(weightless(raw, &name, scope));
            }
            for (entry, raw) in fields.items("loads", faults).iter().enumerate() {
                let subject = format!("load {} of case `{name}`", entry + 1);
                case.loads.extend(load::read(raw, subject, entry, scope, faults));
            }
            case
        })
        .collect()
}

fn self_weight(raw: &Raw, what: &str) -> Result<f64, Diagnostic> {
    match raw.as_typed().and_then(|text| read_flag(text.trim())) {
        Some(counts) => Ok(if counts { 1.0 } else { 0.0 }),
        None => number(raw, what, Sign::Any)
            .map_err(|fault| fault.help("write `true`, or a factor on the weight such as `1.1`")),
    }
}

/// A fault if members are made of materials without density.
fn weightless(raw: &Raw, case: &str, scope: &Scope<'_>) -> Option<Diagnostic> {
    let materials: BTreeSet<usize> = scope.members.iter().map(|member| member.material).collect();
    let used = |material: usize| materials.contains(&material);
    let lacking = scope.materials.iter().enumerate().filter(|(at, material)| material.density.is_none() && used(*at));
    let names = listed(lacking.map(|(_, material)| material.name.as_str()), "and");
    (!names.is_empty()).then(|| {
        let fault = raw.error(Code::MaterialLacks);
        let fault =
            fault.message(format!("load case `{case}` counts self-weight, but not every material has a density"));
        fault.label(format!("no `density`: {names}")).help("give the density of each, such as `density: 7850 kg/m3`")
    })
}
