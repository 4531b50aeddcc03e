//! What can be used but should be known: things unused, limits without source, slips that are likely.
mod geometry;

use super::super::{Action, Direction, MemberKind, MemberLoad, Model, Section};
use super::leaf::{listed, shown_length, typed};
use super::{names, place};
use crate::catalogue::section::{BOTTOM, TOP};
use crate::diagnostic::{Address, Code, Diagnostic, Diagnostics, Source};
use crate::input::{Raw, Shape};
use crate::units::parse_quantity;

/// Adds a warning for everything a reader should know.
pub(super) fn add(model: &Model, root: &Raw, source: &Source, remarks: &mut Diagnostics) {
    remarks.extend(unused(model));
    remarks.extend(limits_without_source(model));
    remarks.extend(no_out_of_plane(model));
    remarks.extend(unusual(model));
    remarks.extend(without_effect(model));
    remarks.extend(bare_angles(root));
    remarks.extend(affects_nothing(root, source));
    remarks.extend(geometry::remarks(model));
}

/// The address of something named, such as `members.BC`.
fn address(block: &str, name: &str) -> Address {
    Address::root().key(block).key(name)
}

fn unused(model: &Model) -> Vec<Diagnostic> {
    let mut list = Vec::new();
    let mut section_used = vec![false; model.sections.len()];
    let mut material_used = vec![false; model.materials.len()];
    for member in &model.members {
        section_used.get_mut(member.section).into_iter().for_each(|used| *used = true);
        material_used.get_mut(member.material).into_iter().for_each(|used| *used = true);
    }
    let mut case_used = vec![false; model.cases.len()];
    for (case, _) in model.combinations.iter().flat_map(|combination| &combination.factors) {
        case_used.get_mut(*case).into_iter().for_each(|used| *used = true);
    }
    let mut remark = |block: &str, kind: &str, name: &str, by: &str| {
        let warning = Diagnostic::warning(Code::UnusedEntry, address(block, name));
        list.push(warning.message(format!("{kind} `{name}` is in no {by}")).label("not used"));
    };
    for (section, _) in model.sections.iter().zip(section_used).filter(|(_, used)| !used) {
        remark("sections", "section", &section.name, "member");
    }
    for (material, _) in model.materials.iter().zip(material_used).filter(|(_, used)| !used) {
        remark("materials", "material", &material.name, "member");
    }
    for (case, _) in model.cases.iter().zip(case_used).filter(|(_, used)| !used) {
        remark("load_cases", "load case", &case.name, "combination");
    }
    list
}

fn limits_without_source(model: &Model) -> Vec<Diagnostic> {
    let sourceless = |allowable: &super::super::Allowable| {
        allowable.source.is_none()
            && [allowable.tension, allowable.compression, allowable.shear].iter().any(Option::is_some)
    };
    let remark = |at: Address, of: String| {
        let warning = Diagnostic::warning(Code::NoSource, at.key("allowable"));
        let warning = warning.message(format!("the stress limits of {of} have no source")).label("no `source`");
        warning.help("give `source` a mark of `basis`, or the clause the limits come from")
    };
    let materials = model.materials.iter().filter(|material| sourceless(&material.allowable));
    let materials = materials.map(|m| remark(address("materials", &m.name), format!("material `{}`", m.name)));
    let own = |paths: &[String; 3]| paths.iter().any(|path| path.starts_with("members."));
    let members = model.members.iter().filter(|member| sourceless(&member.allowable) && own(&member.allowable_path));
    let members = members.filter(|member| {
        // Limits that are all the material's are remarked on there.
        let material = model.materials.get(member.material).map(|material| &material.allowable);
        material.is_none_or(|limits| *limits != member.allowable)
    });
    materials.chain(members.map(|m| remark(address("members", &m.name), format!("member `{}`", m.name)))).collect()
}

fn no_out_of_plane(model: &Model) -> Option<Diagnostic> {
    const SHOWN: usize = 6;
    let key = match (model.checks.buckling, model.checks.slenderness) {
        (Some(_), _) => "buckling",
        (None, Some(_)) => "slenderness",
        _ => return None,
    };
    let lacking = model.members.iter().filter(|member| member.kind != MemberKind::Beam && !member.tension_only);
    let names: Vec<&str> = lacking.filter(|m| m.out_of_plane.is_none()).map(|m| m.name.as_str()).collect();
    let label = match names.len() {
        0 => return None,
        count if count > SHOWN => {
            format!("{} and {} more", listed(names[..SHOWN].iter().copied(), "and"), count - SHOWN)
        }
        _ => listed(names, "and"),
    };
    let warning = Diagnostic::warning(Code::NoOutOfPlane, address("checks", key));
    let warning = warning.message("members have no effective length out of the plane, so that part is NOT CHECKED");
    Some(warning.label(label).help("give each `effective_length: {out_of_plane: ..}`, a factor or a length"))
}

fn unusual(model: &Model) -> Vec<Diagnostic> {
    const SOFTEST_PA: f64 = 1e9;
    const STIFFEST_PA: f64 = 1e12;
    const SHALLOWEST: f64 = 0.01;
    let mut list = Vec::new();
    for material in &model.materials {
        if !(SOFTEST_PA..=STIFFEST_PA).contains(&material.modulus) {
            let warning = Diagnostic::warning(Code::Suspicious, address("materials", &material.name).key("E"));
            let warning = warning.message(format!("`E` of material `{}` is unusual", material.name));
            list.push(
                warning.label("below 1 GPa or above 1000 GPa").help("look whether the unit is the one that was meant"),
            );
        }
    }
    let depths: Vec<Option<f64>> = model.sections.iter().map(depth).collect();
    for member in model.members.iter().filter(|m| matches!(m.kind, MemberKind::Beam | MemberKind::Frame)) {
        let length = place::length(member, &model.nodes);
        let depth = depths.get(member.section).copied().flatten();
        if let Some(depth) = depth.filter(|depth| *depth < SHALLOWEST * length) {
            let warning = Diagnostic::warning(Code::Suspicious, address("members", &member.name).key("section"));
            let warning = warning.message(format!("member `{}` is unusually slender", member.name));
            let length = shown_length(length, &model.display);
            let depth = shown_length(depth, &model.display);
            list.push(
                warning
                    .label(format!("{length} long, {depth} deep"))
                    .help("look whether the units are those that were meant"),
            );
        }
    }
    list
}

/// The depth of a section along local y, m.
fn depth(section: &Section) -> Option<f64> {
    if let (Some(top), Some(bottom)) = (section.given.get(&TOP), section.given.get(&BOTTOM)) {
        return Some(top + bottom);
    }
    let outline = section.kind.outline(&section.given);
    let levels = || outline.loops.iter().flatten().map(|point| point[1]);
    let depth = levels().fold(f64::NEG_INFINITY, f64::max) - levels().fold(f64::INFINITY, f64::min);
    (depth.is_finite() && depth > 0.0).then_some(depth)
}

/// Loads per projected length on members that have none square to the load.
fn without_effect(model: &Model) -> Vec<Diagnostic> {
    let mut list = Vec::new();
    for case in &model.cases {
        for load in &case.loads {
            let Action::Member { member, load: MemberLoad::Line { direction, per_plan: true, .. } } = &load.acts else {
                continue;
            };
            let Some(member) = model.members.get(*member) else { continue };
            let (Some(a), Some(b)) = (model.nodes.get(member.from), model.nodes.get(member.to)) else { continue };
            let length = (b.x - a.x).hypot(b.y - a.y);
            let projected = match direction {
                Direction::GlobalX => (b.y - a.y).abs(),
                Direction::GlobalY => (b.x - a.x).abs(),
                Direction::LocalX => 0.0,
                Direction::LocalY => length,
            };
            if projected <= 1e-9 * length {
                let at = address("load_cases", &case.name).key("loads").index(load.entry).key("per");
                let warning = Diagnostic::warning(Code::NoEffect, at);
                let message = format!(
                    "load {} of case `{}` has no effect on member `{}`",
                    load.entry + 1,
                    case.name,
                    member.name
                );
                list.push(warning.message(message).label("the member runs along the load, so nothing projects"));
            }
        }
    }
    list
}

/// Angles are numbers without dimension, so a bare one passes as radians, which is seldom what was meant.
fn bare_angles(root: &Raw) -> Vec<Diagnostic> {
    let turned = names::entries(root, "supports").iter().filter_map(|field| field.value.field("turned"));
    let cases = names::entries(root, "load_cases").iter().filter_map(|field| field.value.field("loads"));
    let settled = cases.flat_map(Raw::items).filter(|load| load.field("settle").is_some());
    let rotations = settled.filter_map(|load| load.field("r"));
    let bare = |raw: &&Raw| {
        typed(raw, "").is_ok_and(|text| parse_quantity(text).is_ok_and(|q| !q.has_unit && q.value.abs() > 0.0))
    };
    let warn = |raw: &Raw| {
        let warning = raw.warning(Code::BareAngle).message("an angle without a unit is read in radians");
        warning.label("radians").help("write its unit, such as `30 deg` or `0.5 rad`")
    };
    turned.chain(rotations).filter(bare).map(warn).collect()
}

/// Addresses under `affects:` that lead nowhere.
fn affects_nothing(root: &Raw, source: &Source) -> Vec<Diagnostic> {
    let revisions = root.field("project").and_then(|project| project.field("revisions"));
    let named = revisions.into_iter().flat_map(Raw::items).filter_map(|row| row.field("affects")).flat_map(Raw::items);
    let nowhere = named.filter_map(|raw| match &raw.shape {
        Shape::Text(text) if source.find(&Address::parse(text.trim())).is_none() => Some((raw, text)),
        _ => None,
    });
    nowhere
        .map(|(raw, text)| {
            let warning = raw
                .warning(Code::NoSuchPlace)
                .message(format!("a revision affects `{text}`, which is not in the file"));
            warning.label("leads nowhere").help("write an address such as `members.BC` or `load_cases.L`")
        })
        .collect()
}
