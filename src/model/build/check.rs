//! `checks:` what is compared with limits.
use super::super::keys::{BUCKLING, CHECKS, MEMBER_DEFLECTION, NODE_DEFLECTION, STABILITY, Sign};
use super::super::{Checks, DeflectionCheck, DeflectionLimit, Selection};
use super::fields::Fields;
use super::leaf::{self, quantity, typed};
use super::names::{Directory, UNKNOWN};
use crate::diagnostic::{Code, Diagnostic, Diagnostics};
use crate::input::{Raw, Shape};
use crate::units::{Measure, parse_number};

pub(super) fn read(root: &Fields<'_>, directory: &Directory, faults: &mut Diagnostics) -> Checks {
    let Some(raw) = root.get("checks") else { return Checks::default() };
    let Some(checks) = Fields::open(raw, "`checks`".to_owned(), &CHECKS, faults) else { return Checks::default() };
    let buckling = checks.block("buckling", &BUCKLING, faults);
    if let Some(buckling) = &buckling {
        // One method so far; the word is still read, so that another is refused and not taken for this one.
        let _ = buckling.word("method", faults);
    }
    Checks {
        stress: selection(&checks, "stress", directory, faults),
        shear: selection(&checks, "shear", directory, faults),
        deflection: deflections(&checks, directory, faults),
        buckling: buckling.and_then(|buckling| buckling.number("safety", faults)),
        slenderness: checks.number("slenderness", faults),
        stability: checks.block("stability", &STABILITY, faults).and_then(|s| s.number("at_least", faults)),
    }
}

fn selection(checks: &Fields<'_>, key: &str, directory: &Directory, faults: &mut Diagnostics) -> Selection {
    let Some(raw) = checks.get(key) else { return Selection::All };
    let what = checks.what(key);
    let Shape::List(items) = &raw.shape else {
        return match leaf::word(raw, &what, &["all", "off"]) {
            Ok("off") => Selection::Off,
            Ok(_) => Selection::All,
            Err(fault) => {
                faults.push(fault.help("or a list of members, such as `[AB, BC]`"));
                Selection::All
            }
        };
    };
    let mut members = Vec::new();
    for item in items {
        match directory.members.find(item, &what) {
            Ok(member) if members.contains(&member) => {
                let name = directory.members.name(member);
                let fault = item.error(Code::NamedTwice).message(format!("{what} names member `{name}` twice"));
                faults.push(fault.label("named already"));
            }
            Ok(member) => members.push(member),
            Err(fault) => faults.push(fault),
        }
    }
    Selection::Members(members)
}

fn deflections(checks: &Fields<'_>, directory: &Directory, faults: &mut Diagnostics) -> Vec<DeflectionCheck> {
    let mut list = Vec::new();
    for (at, raw) in checks.items("deflection", faults).iter().enumerate() {
        let subject = format!("deflection check {}", at + 1);
        let called = subject.clone();
        let Shape::Map(given) = &raw.shape else {
            let fault = leaf::wrong_form(raw, &subject, "a block of keys");
            faults.push(fault.help("it is written `{member: BC, limit: L/360}` or `{node: B, dir: x, limit: 12 mm}`"));
            continue;
        };
        let has = |key: &str| given.iter().any(|field| field.key == key);
        let check = match (has("member"), has("node")) {
            (true, false) => member_deflection(raw, subject, directory, faults),
            (false, true) => node_deflection(raw, subject, directory, faults),
            (both, _) => {
                let code = if both { Code::NotTogether } else { Code::MissingKey };
                let message = format!(
                    "{subject} names {}",
                    if both { "both a member and a node" } else { "neither a member nor a node" }
                );
                let fault = raw.error(code).message(message).label("one of `member` and `node` is needed");
                faults.push(
                    fault.help("it is written `{member: BC, limit: L/360}` or `{node: B, dir: x, limit: 12 mm}`"),
                );
                None
            }
        };
        if let Some(check) = check {
            if list.iter().any(|earlier| is_of_the_same(earlier, &check)) {
                let fault = raw.error(Code::NamedTwice).message(format!("{called} limits what an earlier one limits"));
                faults.push(fault.label("limited already").help("keep the tighter of the two"));
            }
            list.push(check);
        }
    }
    list
}

/// Whether two limits are of the same movement: there would be two answers to one question.
fn is_of_the_same(one: &DeflectionCheck, other: &DeflectionCheck) -> bool {
    match (one, other) {
        (DeflectionCheck::Member { member, .. }, DeflectionCheck::Member { member: other, .. }) => {
            member == other && *member != UNKNOWN
        }
        (
            DeflectionCheck::Node { node, direction, .. },
            DeflectionCheck::Node { node: other, direction: along, .. },
        ) => node == other && direction == along && *node != UNKNOWN,
        _ => false,
    }
}

fn member_deflection(
    raw: &Raw,
    subject: String,
    directory: &Directory,
    faults: &mut Diagnostics,
) -> Option<DeflectionCheck> {
    let fields = Fields::open(raw, subject, &MEMBER_DEFLECTION, faults)?;
    let member = fields.reference("member", &directory.members, faults).unwrap_or(UNKNOWN);
    let limit = fields.read("limit", faults, limit)?;
    Some(DeflectionCheck::Member { member, limit })
}

fn node_deflection(
    raw: &Raw,
    subject: String,
    directory: &Directory,
    faults: &mut Diagnostics,
) -> Option<DeflectionCheck> {
    let fields = Fields::open(raw, subject, &NODE_DEFLECTION, faults)?;
    let node = fields.reference("node", &directory.nodes, faults).unwrap_or(UNKNOWN);
    let dir = fields.word("dir", faults);
    let measure = if dir == Some("r") { Measure::Rotation } else { Measure::Length };
    // Without a direction it is open what the limit must be.
    let direction = match dir? {
        "x" => 0,
        "y" => 1,
        _ => 2,
    };
    let limit = fields.read("limit", faults, |raw, what| quantity(raw, what, measure, Sign::Positive))?;
    Some(DeflectionCheck::Node { node, direction, limit })
}

/// `L/360`, or a length.
fn limit(raw: &Raw, what: &str) -> Result<DeflectionLimit, Diagnostic> {
    let text = typed(raw, what)?;
    let Some(divisor) = text.strip_prefix('L').map(str::trim_start).and_then(|rest| rest.strip_prefix('/')) else {
        return quantity(raw, what, Measure::Length, Sign::Positive).map(DeflectionLimit::Absolute).map_err(|fault| {
            Diagnostic { help: vec!["a limit is written `L/360`, or as a length such as `12 mm`".to_owned()], ..fault }
        });
    };
    match parse_number(divisor) {
        Ok(divisor) if divisor > 0.0 => Ok(DeflectionLimit::SpanOver(divisor)),
        Ok(_) => Err(raw.error(Code::OutOfRange).message(format!("{what} must be above zero")).label("not above zero")),
        Err(fault) => {
            let error =
                raw.error(Code::NotANumber).message(format!("{what} is not `L/` and a number")).label(fault.message);
            Err(error.help("a limit is written `L/360`, or as a length such as `12 mm`"))
        }
    }
}
