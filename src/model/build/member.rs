//! `members:` what joins which nodes, made of what.
use super::super::keys::{ALLOWABLE, EFFECTIVE_LENGTH, MEMBER, Sign};
use super::super::{Allowable, EffectiveLength, Material, Member, MemberKind, Node, Section};
use super::fields::Fields;
use super::leaf::{number, quantity_of};
use super::names::{Directory, UNKNOWN};
use super::{material, place, section};
use crate::catalogue::section::INERTIA;
use crate::diagnostic::{Code, Diagnostic, Diagnostics};
use crate::input::Raw;
use crate::units::{Dimension, Measure, parse_number};

/// What members are made of.
pub(super) struct Context<'a> {
    pub(super) directory: &'a Directory,
    pub(super) materials: &'a [Material],
    pub(super) sections: &'a [Option<Section>],
    pub(super) nodes: &'a [Node],
}

pub(super) fn read(root: &Fields<'_>, context: &Context<'_>, faults: &mut Diagnostics) -> Vec<Member> {
    // Two nodes count as one place when they are nearer than this; rounding in typed coordinates is far below.
    let extent = context.nodes.iter().flat_map(|node| [node.x.abs(), node.y.abs()]).fold(0.0, f64::max);
    let entries = root.entries("members", faults).iter();
    entries.map(|field| member(&field.value, &field.key, 1e-9 * extent, context, faults)).collect()
}

fn member(raw: &Raw, name: &str, nearest_m: f64, context: &Context<'_>, faults: &mut Diagnostics) -> Member {
    let directory = context.directory;
    let mut member = unknown(name);
    let Some(fields) = Fields::open(raw, format!("member `{name}`"), &MEMBER, faults) else { return member };
    let kind = fields.word("kind", faults).map(|word| match word {
        "bar" => MemberKind::Bar,
        "bar3" => MemberKind::Bar3,
        "beam" => MemberKind::Beam,
        _ => MemberKind::Frame,
    });
    member.kind = kind.unwrap_or(MemberKind::Frame);
    let mut refer = |key, names| fields.reference(key, names, faults).unwrap_or(UNKNOWN);
    member.from = refer("from", &directory.nodes);
    member.to = refer("to", &directory.nodes);
    member.section = refer("section", &directory.sections);
    member.material = refer("material", &directory.materials);
    let hinge = fields.word("hinge", faults);
    member.hinge = [matches!(hinge, Some("start" | "both")), matches!(hinge, Some("end" | "both"))];
    member.tension_only = fields.flag("tension_only", faults).unwrap_or(false);
    let limits = limits(&fields, name, context.materials.get(member.material), faults);
    (member.allowable, member.allowable_path) = limits;
    if let Some(lengths) = fields.block("effective_length", &EFFECTIVE_LENGTH, faults) {
        member.in_plane = lengths.read("in_plane", faults, effective_length);
        member.out_of_plane = lengths.read("out_of_plane", faults, effective_length);
    }
    member.note = fields.text("note", faults);
    if let Some(kind) = kind {
        suits_kind(&fields, kind, &member, context, faults);
    }
    has_length(raw, name, &member, nearest_m, context, faults);
    member
}

fn unknown(name: &str) -> Member {
    Member {
        name: name.to_owned(),
        kind: MemberKind::Frame,
        from: UNKNOWN,
        to: UNKNOWN,
        section: UNKNOWN,
        material: UNKNOWN,
        hinge: [false; 2],
        allowable: Allowable::default(),
        allowable_path: [String::new(), String::new(), String::new()],
        in_plane: None,
        out_of_plane: None,
        tension_only: false,
        note: None,
    }
}

/// The limits that count for a member, and the YAML path of each: its own, otherwise the material's.
fn limits(
    fields: &Fields<'_>,
    name: &str,
    material: Option<&Material>,
    faults: &mut Diagnostics,
) -> (Allowable, [String; 3]) {
    let own = material::allowable(fields, faults);
    let fallback = material.map(|material| &material.allowable);
    let stem = |own: Option<f64>| match material {
        Some(material) if own.is_none() => format!("materials.{}.allowable", material.name),
        _ => format!("members.{name}.allowable"),
    };
    let values = [own.tension, own.compression, own.shear];
    let mut paths = [String::new(), String::new(), String::new()];
    for ((path, value), key) in paths.iter_mut().zip(values).zip(&ALLOWABLE.keys[..3]) {
        *path = format!("{}.{}", stem(value), key.name);
    }
    let limits = Allowable {
        tension: own.tension.or(fallback.and_then(|limits| limits.tension)),
        compression: own.compression.or(fallback.and_then(|limits| limits.compression)),
        shear: own.shear.or(fallback.and_then(|limits| limits.shear)),
        source: own.source.or_else(|| fallback.and_then(|limits| limits.source.clone())),
    };
    (limits, paths)
}

fn effective_length(raw: &Raw, what: &str) -> Result<EffectiveLength, Diagnostic> {
    if raw.as_typed().is_some_and(|text| parse_number(text).is_ok()) {
        return number(raw, what, Sign::Positive).map(EffectiveLength::Factor);
    }
    quantity_of(raw, what, Measure::Span, &[Dimension::LENGTH], Sign::Positive)
        .map(|(length, _)| EffectiveLength::Length(length))
}

/// Hinges, tension alone and bending stiffness belong to some kinds only.
fn suits_kind(fields: &Fields<'_>, kind: MemberKind, member: &Member, context: &Context<'_>, faults: &mut Diagnostics) {
    let bends = matches!(kind, MemberKind::Beam | MemberKind::Frame);
    let subject = &fields.subject;
    if let Some(raw) = fields.get("hinge").filter(|_| !bends) {
        let fault = raw.error(Code::NotForKind).message(format!("{subject} is a bar and has no hinges"));
        faults.push(
            fault.label("only beams and frames have them").help("a bar passes no moment anyway: take the key out"),
        );
    }
    if let Some(raw) = fields.get("tension_only").filter(|_| bends && member.tension_only) {
        let fault = raw.error(Code::NotForKind).message(format!("{subject} bends and cannot be tension-only"));
        faults.push(fault.label("only a bar or bar3 can").help("make it `kind: bar`, or take the key out"));
    }
    if let (true, Some(Some(section)), Some(raw)) = (bends, context.sections.get(member.section), fields.get("section"))
        && !section::has(section, &INERTIA)
    {
        let fault = raw.error(Code::SectionLacks).message(format!("{subject} bends, but its section has no inertia"));
        let fault = fault.label(format!("section `{}` gives no `inertia`", section.name));
        faults.push(fault.help(format!("give section `{}` its `inertia`, or make the member a bar", section.name)));
    }
}

fn has_length(raw: &Raw, name: &str, member: &Member, nearest_m: f64, context: &Context<'_>, faults: &mut Diagnostics) {
    let nodes = &context.directory.nodes;
    let length = place::length(member, context.nodes);
    if member.from != UNKNOWN && member.from == member.to {
        let fault = raw
            .error(Code::ZeroLength)
            .message(format!("member `{name}` begins and ends at node `{}`", nodes.name(member.from)));
        faults.push(fault.label("no length").help("`from` and `to` are two different nodes"));
    } else if length <= nearest_m {
        let (a, b) = (nodes.name(member.from), nodes.name(member.to));
        let fault = raw
            .error(Code::ZeroLength)
            .message(format!("member `{name}` joins nodes `{a}` and `{b}`, which stand at the same place"));
        faults.push(fault.label("no length").help("use one node in place of the two, or correct their coordinates"));
    } else if length.is_infinite() {
        let fault = raw.error(Code::OutOfRange).message(format!("member `{name}` is too long to compute with"));
        faults.push(fault.label("too long").help("correct the coordinates of its nodes"));
    }
}
