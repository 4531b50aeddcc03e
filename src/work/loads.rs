//! The loads of one case on one member (steps L).
use super::MemberBase;
use crate::catalogue::load::weight;
use crate::catalogue::load::{LoadInputs, Worked, work, work_self_weight};
use crate::catalogue::symbol::{FW, WG, WG1};
use crate::formula::{Scope, Symbol, Value, Worksheet};
use crate::model::{Action, LoadCase, Member, MemberLoad};
use crate::units::Measure;

/// One load of a case on a member, worked.
#[derive(Debug, Clone)]
pub struct CaseLoad {
    /// Place in the case's list; `None` for self-weight.
    pub entry: Option<usize>,
    /// What it does.
    pub worked: Worked,
}

/// Works every load of a case on a member, self-weight first.
///
/// The k-th load on the member, counted over the case's list, has step numbers from 100·k on.
pub fn work_case_loads(
    sheet: &mut dyn Worksheet,
    (member_index, member): (usize, &Member),
    base: &MemberBase,
    case: &LoadCase,
) -> Vec<CaseLoad> {
    let mut worked = Vec::new();
    let names = (member.name.as_str(), case.name.as_str());
    if case.self_weight != 0.0 && base.get(&WG).is_some() {
        let mut known = base.known.clone();
        if (case.self_weight - 1.0).abs() > 0.0 {
            known.extend(scaled_weight(sheet, names, base, case));
        }
        worked.push(CaseLoad { entry: None, worked: work_self_weight(sheet, names, &known, member.kind) });
    }
    let on_member = case.loads.iter().filter_map(|load| match &load.acts {
        Action::Member { member, load: acts } if *member == member_index => Some((load.entry, acts)),
        _ => None,
    });
    for (k, (entry, load)) in on_member.enumerate() {
        let inputs = load_inputs(sheet, &case.name, entry, member, load);
        worked.push(CaseLoad {
            entry: Some(entry),
            worked: work(sheet, names, &base.known, member.kind, k + 1, load, &inputs),
        });
    }
    worked
}

/// The weight per length times the case's own factor on self-weight.
fn scaled_weight(
    sheet: &mut dyn Worksheet,
    (member, case_name): (&str, &str),
    base: &MemberBase,
    case: &LoadCase,
) -> Option<(Symbol, Value)> {
    let factor =
        sheet.input(format_args!("INPUT.loads.{case_name}.weight.factor.value"), case.self_weight, Measure::Number);
    let mut scope = Scope::new(sheet, member, Some(case_name));
    scope.inherit(&base.known);
    scope.set(&FW, factor);
    let full = base.get(&WG)?;
    scope.set(&WG1, full);
    Some((WG, scope.work('L', 50, &weight::SCALED)))
}

/// The values of one load under the addresses of the input's tables.
pub fn load_inputs(
    sheet: &mut dyn Worksheet,
    case: &str,
    entry: usize,
    member: &Member,
    load: &MemberLoad,
) -> LoadInputs {
    let row = entry + 1;
    let name = &member.name;
    let mut value = |table: &str, key: &str, si: f64, measure| {
        Some(sheet.input(format_args!("INPUT.loads.{case}.{table}.{row}.{name}.{key}"), si, measure))
    };
    let mut inputs = LoadInputs::default();
    match load {
        MemberLoad::Line { start, end, over, .. } => {
            inputs.w1 = value("lines", "w_1", *start, Measure::LineLoad);
            inputs.w2 =
                if (start - end).abs() > 0.0 { value("lines", "w_2", *end, Measure::LineLoad) } else { inputs.w1 };
            if let Some([a, b]) = over {
                inputs.a = value("lines", "from", *a, Measure::Span);
                inputs.b = value("lines", "to", *b, Measure::Span);
            }
        }
        MemberLoad::Point { force, at, .. } => {
            inputs.p = value("points", "p", *force, Measure::Force);
            inputs.a = value("points", "at", *at, Measure::Span);
        }
        MemberLoad::Moment { moment, at } => {
            inputs.m = value("couples", "m", *moment, Measure::Moment);
            inputs.a = value("couples", "at", *at, Measure::Span);
        }
        MemberLoad::Warm { top, bottom } => {
            inputs.top = value("warming", "top", *top, Measure::Temperature);
            inputs.bottom = value("warming", "bottom", *bottom, Measure::Temperature);
        }
        MemberLoad::TooLong { by } => inputs.too_long = value("misfit", "too_long", *by, Measure::Length),
    }
    inputs
}
