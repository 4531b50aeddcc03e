//! Places along members: distances from the start, or percentages.
use super::super::keys::Sign;
use super::super::{Display, Member, Node};
use super::leaf::{quantity, shown_length, typed};
use crate::diagnostic::{Code, Diagnostic};
use crate::input::Raw;
use crate::units::{Measure, parse_number};

/// The lengths of all members, m; NaN where one is not known.
pub(super) struct Spans<'a> {
    lengths: Vec<f64>,
    display: &'a Display,
}

impl<'a> Spans<'a> {
    pub(super) fn new(members: &[Member], nodes: &[Node], display: &'a Display) -> Self {
        Self { lengths: members.iter().map(|member| length(member, nodes)).collect(), display }
    }

    /// m; NaN where it is not known.
    pub(super) fn length(&self, member: usize) -> f64 {
        self.lengths.get(member).copied().unwrap_or(f64::NAN)
    }
}

/// The length of a member, m; NaN where an end is not known.
pub(super) fn length(member: &Member, nodes: &[Node]) -> f64 {
    match (nodes.get(member.from), nodes.get(member.to)) {
        (Some(a), Some(b)) => (b.x - a.x).hypot(b.y - a.y),
        _ => f64::NAN,
    }
}

/// The distance of a place from the start of a member, m; `name` is the member's.
pub(super) fn place(raw: &Raw, what: &str, member: usize, name: &str, spans: &Spans<'_>) -> Result<f64, Diagnostic> {
    let text = typed(raw, what)?;
    let length = spans.length(member);
    let at = match text.strip_suffix('%') {
        Some(percent) => {
            let percent = parse_number(percent.trim_end()).map_err(|fault| {
                let error = raw.error(Code::NotANumber).message(format!("{what} is not a percentage"));
                error.label(fault.message).help("a percentage is a number and `%`, such as `50 %`")
            })?;
            // Whether a percentage is in range does not depend on the length, which may not be known.
            if !(0.0..=100.0).contains(&percent) {
                return Err(outside(raw, what, name, length, spans));
            }
            length * (percent / 100.0)
        }
        None => quantity(raw, what, Measure::Span, Sign::Any)?,
    };
    // A length that comes from a square root may differ from the typed one in its last digits.
    let slack = 1e-9 * length;
    if at < -slack || at > length + slack || (length.is_nan() && at < 0.0) {
        return Err(outside(raw, what, name, length, spans));
    }
    Ok(if length.is_nan() { at } else { at.clamp(0.0, length) })
}

fn outside(raw: &Raw, what: &str, name: &str, length: f64, spans: &Spans<'_>) -> Diagnostic {
    let fault = raw.error(Code::OutsideMember).message(format!("{what} lies outside member `{name}`"));
    let range = "places run from 0 at its `from` node to its length, or from 0 % to 100 %";
    match length.is_finite() {
        true => fault.label(format!("`{name}` is {} long", shown_length(length, spans.display))).help(range),
        false => fault.label("beyond its ends").help(range),
    }
}
