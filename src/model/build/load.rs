//! One entry of a case's `loads:`, in one of the seven forms a load may have.
use super::super::keys::{
    Block, FIT_LOAD, GRADIENT, LINE_LOAD, MOMENT_LOAD, NODE_LOAD, POINT_LOAD, SETTLE, Sign, WARM_LOAD,
};
use super::super::{Action, Direction, Load, Material, Member, MemberLoad, Section, Support};
use super::fields::Fields;
use super::leaf::{self, listed, quantity};
use super::names::{Directory, UNKNOWN};
use super::place::{Spans, place};
use super::section;
use crate::catalogue::section::{BOTTOM, TOP};
use crate::diagnostic::{Code, Diagnostic, Diagnostics};
use crate::input::{Raw, Shape};
use crate::units::Measure;

/// What loads act on.
pub(super) struct Scope<'a> {
    pub(super) directory: &'a Directory,
    pub(super) spans: &'a Spans<'a>,
    pub(super) members: &'a [Member],
    pub(super) materials: &'a [Material],
    pub(super) sections: &'a [Option<Section>],
    pub(super) supports: &'a [Support],
}

/// The loads of one entry: one for each member it names.
pub(super) fn read(raw: &Raw, subject: String, entry: usize, scope: &Scope<'_>, faults: &mut Diagnostics) -> Vec<Load> {
    let Shape::Map(given) = &raw.shape else {
        let fault = leaf::wrong_form(raw, &subject, "a block of keys");
        faults.push(fault.help("a load is written `{on: BC, dir: Y, w: -4 kN/m}`"));
        return Vec::new();
    };
    let keys: Vec<&str> = given.iter().map(|field| field.key.as_str()).collect();
    let block = match form(&keys) {
        Ok(block) => block,
        Err(wrong) => {
            faults.push(wrong.fault(raw, &subject));
            return Vec::new();
        }
    };
    let Some(fields) = Fields::open(raw, subject, block, faults) else { return Vec::new() };
    let actions = if *block == NODE_LOAD {
        vec![node_load(&fields, scope, faults)]
    } else if *block == SETTLE {
        vec![settle(&fields, scope, faults)]
    } else {
        member_loads(&fields, block, scope, faults)
    };
    actions.into_iter().map(|acts| Load { entry, acts }).collect()
}

/// Why an entry has no one form.
enum Formless {
    Several(Vec<&'static str>),
    NoPlace,
    Nothing,
}

/// The form of an entry follows from the key that says what acts.
fn form(keys: &[&str]) -> Result<&'static Block, Formless> {
    const ON_MEMBERS: [(&str, &Block); 5] =
        [("w", &LINE_LOAD), ("p", &POINT_LOAD), ("m", &MOMENT_LOAD), ("warm", &WARM_LOAD), ("too_long", &FIT_LOAD)];
    let has = |key: &str| keys.contains(&key);
    if has("settle") {
        return Ok(&SETTLE);
    }
    if !has("on") {
        let on_member = ON_MEMBERS.iter().any(|(key, _)| *key != "m" && has(key));
        return if has("at") && !on_member { Ok(&NODE_LOAD) } else { Err(Formless::NoPlace) };
    }
    let forms: Vec<_> = ON_MEMBERS.iter().filter(|(key, _)| has(key)).collect();
    match forms.as_slice() {
        [(_, block)] => Ok(block),
        [] => Err(Formless::Nothing),
        several => Err(Formless::Several(several.iter().map(|(key, _)| *key).collect())),
    }
}

impl Formless {
    fn fault(self, raw: &Raw, subject: &str) -> Diagnostic {
        match self {
            Self::Several(keys) => raw
                .error(Code::NotTogether)
                .message(format!("{subject} is several loads in one"))
                .label(format!("it has {}", listed(keys, "and")))
                .help("write each as an entry of its own"),
            Self::NoPlace => raw
                .error(Code::MissingKey)
                .message(format!("{subject} does not say where it acts"))
                .label("no place")
                .help("`on` names a member, `at` a node, `settle` a support"),
            Self::Nothing => raw
                .error(Code::EmptyLoad)
                .message(format!("{subject} does not say what acts"))
                .label("no load")
                .help("a load on a member has one of `w`, `p`, `m`, `warm` and `too_long`"),
        }
    }
}

fn node_load(fields: &Fields<'_>, scope: &Scope<'_>, faults: &mut Diagnostics) -> Action {
    let node = fields.reference("at", &scope.directory.nodes, faults).unwrap_or(UNKNOWN);
    if ["fx", "fy", "m"].iter().all(|key| fields.get(key).is_none()) {
        let fault = fields.raw.error(Code::EmptyLoad).message(format!("{} does not say what acts", fields.subject));
        faults.push(fault.label("no load").help("a load on a node has one or more of `fx`, `fy` and `m`"));
    }
    let mut component = |key| fields.quantity(key, faults).unwrap_or(0.0);
    Action::Node { node, forces: [component("fx"), component("fy"), component("m")] }
}

fn settle(fields: &Fields<'_>, scope: &Scope<'_>, faults: &mut Diagnostics) -> Action {
    let node = fields.reference("settle", &scope.directory.nodes, faults).unwrap_or(UNKNOWN);
    let movement = ["x", "y", "r"].map(|key| fields.quantity(key, faults));
    if ["x", "y", "r"].iter().all(|key| fields.get(key).is_none()) {
        let fault = fields.raw.error(Code::EmptyLoad).message(format!("{} moves nothing", fields.subject));
        faults.push(fault.label("no movement").help("a settlement has one or more of `x`, `y` and `r`"));
    }
    if node == UNKNOWN {
        return Action::Settle { node, movement };
    }
    let name = scope.directory.nodes.name(node);
    match scope.supports.iter().find(|support| support.node == node) {
        None => {
            let at = fields.get("settle").unwrap_or(fields.raw);
            let fault =
                at.error(Code::NotHeld).message(format!("{} moves a support that is not there", fields.subject));
            faults.push(
                fault
                    .label(format!("node `{name}` has no support"))
                    .help("only held or sprung directions can be moved"),
            );
        }
        Some(support) => {
            for (direction, key) in ["x", "y", "r"].into_iter().enumerate() {
                let free = !support.hold[direction] && support.spring[direction].is_none();
                if let Some(raw) = fields.get(key).filter(|_| free) {
                    let fault =
                        raw.error(Code::NotHeld).message(format!("{} moves a direction that is free", fields.subject));
                    let label = format!("the support of node `{name}` neither holds nor springs `{key}`");
                    faults.push(fault.label(label).help("only held or sprung directions can be moved"));
                }
            }
        }
    }
    Action::Settle { node, movement }
}

fn member_loads(fields: &Fields<'_>, block: &Block, scope: &Scope<'_>, faults: &mut Diagnostics) -> Vec<Action> {
    let members = on(fields, scope, faults);
    let direction = if *block == LINE_LOAD || *block == POINT_LOAD { direction(fields, faults) } else { None };
    let intensity = if *block == LINE_LOAD { intensity(fields, faults) } else { [0.0; 2] };
    let per_plan = *block == LINE_LOAD && fields.word("per", faults).is_some();
    let force = if *block == POINT_LOAD { fields.quantity("p", faults) } else { None };
    let moment = if *block == MOMENT_LOAD { fields.quantity("m", faults) } else { None };
    let by = if *block == FIT_LOAD { fields.quantity("too_long", faults) } else { None };
    let warm = if *block == WARM_LOAD { warm(fields, faults) } else { None };
    // Placeholders stand for what is at fault, so that every member is still looked at.
    let direction = direction.unwrap_or(Direction::GlobalY);
    let mut actions = Vec::new();
    for (member, named_at) in members {
        let load = if *block == LINE_LOAD {
            let over = over(fields, member, scope, faults);
            MemberLoad::Line { direction, start: intensity[0], end: intensity[1], over, per_plan }
        } else if *block == POINT_LOAD {
            MemberLoad::Point { direction, force: force.unwrap_or(f64::NAN), at: at(fields, member, scope, faults) }
        } else if *block == MOMENT_LOAD {
            MemberLoad::Moment { moment: moment.unwrap_or(f64::NAN), at: at(fields, member, scope, faults) }
        } else if *block == WARM_LOAD {
            faults.extend(cannot_warm(named_at, member, warm, scope));
            let [top, bottom] = warm.unwrap_or([f64::NAN; 2]);
            MemberLoad::Warm { top, bottom }
        } else {
            MemberLoad::TooLong { by: by.unwrap_or(f64::NAN) }
        };
        actions.push(Action::Member { member, load });
    }
    actions
}

/// The members an entry acts on, each with the value that names it.
fn on<'a>(fields: &Fields<'a>, scope: &Scope<'_>, faults: &mut Diagnostics) -> Vec<(usize, &'a Raw)> {
    let mut members: Vec<(usize, &Raw)> = Vec::new();
    let items = fields.items("on", faults);
    if let Some(raw) =
        fields.get("on").filter(|raw| items.is_empty() && matches!(raw.shape, Shape::List(_) | Shape::Null(_)))
    {
        let fault = raw.error(Code::NoValue).message(format!("{} names no member", fields.what("on")));
        faults.push(fault.label("a member is missing"));
    }
    for raw in items {
        match scope.directory.members.find(raw, &fields.what("on")) {
            Ok(member) if members.iter().any(|(other, _)| *other == member) => {
                let name = scope.directory.members.name(member);
                let fault =
                    raw.error(Code::NamedTwice).message(format!("{} names member `{name}` twice", fields.what("on")));
                faults.push(fault.label("named already").help("write a second entry where the load acts twice"));
            }
            Ok(member) => members.push((member, raw)),
            Err(fault) => faults.push(fault),
        }
    }
    members
}

fn direction(fields: &Fields<'_>, faults: &mut Diagnostics) -> Option<Direction> {
    fields.word("dir", faults).map(|word| match word {
        "X" => Direction::GlobalX,
        "Y" => Direction::GlobalY,
        "x" => Direction::LocalX,
        _ => Direction::LocalY,
    })
}

/// Force per length at the start and the end of the loaded part, N/m.
fn intensity(fields: &Fields<'_>, faults: &mut Diagnostics) -> [f64; 2] {
    let mut value = |raw: &Raw| match quantity(raw, &fields.what("w"), Measure::LineLoad, Sign::Any) {
        Ok(value) => value,
        Err(fault) => {
            faults.push(fault);
            f64::NAN
        }
    };
    match fields.get("w").map(|raw| (raw, &raw.shape)) {
        Some((_, Shape::List(items))) if items.len() == 2 => [value(&items[0]), value(&items[1])],
        Some((raw, Shape::List(items))) => {
            let fault = leaf::wrong_form(raw, &fields.what("w"), "one force per length, or two");
            faults.push(
                fault
                    .label(format!("{} are listed", items.len()))
                    .help("`w: [a, b]` runs from a at the start to b at the end"),
            );
            [f64::NAN; 2]
        }
        Some((raw, _)) => [value(raw); 2],
        None => [f64::NAN; 2],
    }
}

fn at(fields: &Fields<'_>, member: usize, scope: &Scope<'_>, faults: &mut Diagnostics) -> f64 {
    let name = scope.directory.members.name(member);
    fields.read("at", faults, |raw, what| place(raw, what, member, name, scope.spans)).unwrap_or(f64::NAN)
}

fn over(fields: &Fields<'_>, member: usize, scope: &Scope<'_>, faults: &mut Diagnostics) -> Option<[f64; 2]> {
    let raw = fields.get("over")?;
    let name = scope.directory.members.name(member);
    let what = fields.what("over");
    let items = fields.items("over", faults);
    let [from, to] = items else {
        if matches!(raw.shape, Shape::List(_) | Shape::Null(_)) {
            let fault = leaf::wrong_form(raw, &what, "two places");
            faults.push(fault.label(format!("{} given", items.len())).help("it is written `over: [0.5 m, 2 m]`"));
        }
        return None;
    };
    let mut read = |raw| place(raw, &what, member, name, scope.spans).map_err(|fault| faults.push(fault)).ok();
    let (from, to) = (read(from), read(to));
    let (from, to) = (from?, to?);
    if from >= to {
        let fault = raw.error(Code::Reversed);
        let fault = if from > to {
            fault.message(format!("{what} runs backwards")).label("the first place lies behind the second")
        } else {
            fault.message(format!("{what} has no length")).label("both places are the same")
        };
        faults.push(fault.help("it runs from the smaller distance to the larger, both from the member's `from` node"));
    }
    Some([from, to])
}

/// Warming of the top and the bottom fibre, K.
fn warm(fields: &Fields<'_>, faults: &mut Diagnostics) -> Option<[f64; 2]> {
    let raw = fields.get("warm")?;
    if !matches!(raw.shape, Shape::Map(_)) {
        let read = |raw: &Raw, what: &str| quantity(raw, what, Measure::Temperature, Sign::Any);
        return fields.read("warm", faults, read).map(|rise| [rise; 2]);
    }
    let faces = fields.block("warm", &GRADIENT, faults)?;
    let (top, bottom) = (faces.quantity("top", faults), faces.quantity("bottom", faults));
    Some([top?, bottom?])
}

/// What a member lacks to be warmed, reported where the entry names it.
fn cannot_warm(named_at: &Raw, member: usize, warm: Option<[f64; 2]>, scope: &Scope<'_>) -> Vec<Diagnostic> {
    let name = scope.directory.members.name(member);
    let mut faults = Vec::new();
    let Some(member) = scope.members.get(member) else { return faults };
    if let Some(material) = scope.materials.get(member.material).filter(|material| material.expansion.is_none()) {
        let fault = named_at.error(Code::MaterialLacks);
        let fault = fault.message(format!("member `{name}` is warmed, but its material has no expansion"));
        let fault = fault.label(format!("material `{}` gives no `expansion`", material.name));
        faults.push(
            fault.help(format!("give material `{}` its expansion, such as `expansion: 12e-6 /K`", material.name)),
        );
    }
    let uneven = warm.is_some_and(|[top, bottom]| (top - bottom).abs() > 0.0);
    if let Some(Some(section)) = scope.sections.get(member.section).filter(|_| uneven)
        && !(section::has(section, &TOP) && section::has(section, &BOTTOM))
    {
        let fault = named_at.error(Code::SectionLacks);
        let fault =
            fault.message(format!("member `{name}` is warmed unevenly, but the depth of its section is not known"));
        let fault = fault.label(format!("section `{}` gives no `top` and `bottom`", section.name));
        faults.push(
            fault.help(format!("give section `{}` the distances of its `top` and `bottom` fibres", section.name)),
        );
    }
    faults
}
