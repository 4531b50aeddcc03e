//! Printed digits of every quantity: an error budget carried backwards over the whole sheet.
//!
//! Each result owes significant digits, or digits of a stated size where it is zero by nature: one unit of that last
//! place is what it can bear. Walking the steps backwards, what a result can bear divided by the derivative of its
//! formula is what an operand may be off by; the strictest user counts. The rounding of a quantity that others draw
//! on takes a part of that, so that the roundings of a chain stay below the last place of what the chain leads to.
//! Then, walking forwards, each result is printed as the number nearest to its value that lies within a
//! unit of what its *printed* operands give: every line closes by construction, whatever the length of the chain.
//! Where that leaves a result too far from its value, its operands get a digit more.
//! # Source
//! Own rule; propagation of rounding by first derivatives is common practice.
use super::{Ledger, Rule, Sheet, Step};
use crate::units::Printed;

/// Significant digits of what many members share. Fixed, so that one member's needs never reach another's lines.
pub const SHARED_DIGITS: i32 = 7;
/// Most digits a typed input is printed with, should its unit be converted.
const TYPED_DIGITS: i32 = 9;
/// Part of what its users can bear that the rounding of an operand may take.
const SHARE: f64 = 0.2;
/// Units of the last place by which a line may miss; the contract allows one.
const SLACK: f64 = 0.95;
/// Units of the last place that it owes by which a printed result may differ from its value before its operands get
/// finer.
const FARTHEST: f64 = 0.8;
/// The same for a result that others draw on: part of what they can bear.
const FARTHEST_WITHIN: f64 = 0.5;
/// What is smaller than this against the terms it is made of is numerical dust.
pub(super) const DUST: f64 = 1e-10;
/// Finest place relative to a quantity's size: double precision holds no more.
const FINEST: i32 = 11;

/// Decides the printed form of every entry of the sheet.
pub fn settle(sheet: &mut Sheet, digits: u8) {
    let digits = i32::from(digits);
    let owed: Vec<i32> = sheet.ledger.entries().iter().map(|entry| owed_place(entry, digits)).collect();
    let mut finer: Vec<i32> = vec![0; sheet.steps.len()];
    let gradients: Vec<Vec<f64>> = sheet.steps.iter().map(|step| gradient(step, &sheet.ledger)).collect();
    for _ in 0..8 {
        let (place, bearable) = places(sheet, &owed, &finer, &gradients);
        print(sheet, &owed, &place);
        let mut settled = true;
        for (at, step) in sheet.steps.iter().enumerate() {
            // A utilisation must neither stop short of its value nor overshoot what its operands give.
            let result = sheet.ledger.entry(step.result);
            let short = result.rule == Rule::Up && result.printed.value() < result.in_unit() * (1.0 - 1e-9);
            let off = (result.printed.value() - result.in_unit()).abs();
            let id = step.result as usize;
            let own = 10f64.powi(result.printed.place);
            let farthest =
                if place[id] == owed[id] { FARTHEST * own } else { FARTHEST_WITHIN * bearable[id] / result.unit.scale };
            // Where all operands are typed or shared nothing gets finer.
            let fixed = |(_, id): &(_, u32)| matches!(sheet.ledger.entry(*id).rule, Rule::Typed | Rule::Shared);
            if step.operands.iter().all(fixed) {
                continue;
            }
            if short || (off > farthest && result.rule != Rule::Up) || !closes(step, &sheet.ledger) {
                settled = false;
                finer[at] += 1;
            }
        }
        if settled {
            break;
        }
    }
}

/// Derivatives of a step's formula by its operands, at their values.
fn gradient(step: &Step, ledger: &Ledger) -> Vec<f64> {
    let values: Vec<f64> = step.operands.iter().map(|(_, id)| ledger.entry(*id).value).collect();
    step.definition.program().gradient(&values).1
}

/// The last place of every entry, and what its strictest user can bear (SI).
fn places(sheet: &Sheet, owed: &[i32], finer: &[i32], gradients: &[Vec<f64>]) -> (Vec<i32>, Vec<f64>) {
    let entries = sheet.ledger.entries();
    let mut place = owed.to_vec();
    let mut bearable: Vec<f64> =
        owed.iter().zip(entries).map(|(place, entry)| 10f64.powi(*place) * entry.unit.scale).collect();
    for (at, step) in sheet.steps.iter().enumerate().rev() {
        // Nothing follows from a zero: all of its place may go to the rounding of what it is made of.
        let result = &entries[step.result as usize];
        let share = if result.value.abs() <= DUST * result.size { 1.0 } else { 2.0 * SHARE };
        for ((_, id), slope) in step.operands.iter().zip(gradients[at].iter().copied()) {
            let id = *id as usize;
            let entry = &entries[id];
            if slope == 0.0 || matches!(entry.rule, Rule::Typed | Rule::Shared) {
                continue;
            }
            let may_be_off = bearable[step.result as usize] / slope.abs() / 10f64.powi(finer[at]);
            if !may_be_off.is_finite() {
                continue;
            }
            bearable[id] = bearable[id].min(may_be_off);
            let needed = (share * may_be_off / entry.unit.scale).log10().floor() as i32;
            let finest = leading(entry.size / entry.unit.scale) - FINEST;
            place[id] = place[id].min(needed.max(finest));
        }
    }
    (place, bearable)
}

/// Prints every entry: inputs and stated values by themselves, results so that their line closes.
fn print(sheet: &mut Sheet, owed: &[i32], place: &[i32]) {
    for id in 0..owed.len() {
        let entry = sheet.ledger.entry_mut(id as u32);
        let value = entry.in_unit();
        entry.printed =
            if says_exactly(value, owed[id]) { trimmed(value, owed[id]) } else { Printed::nearest(value, place[id]) };
    }
    for step in &sheet.steps {
        let id = step.result as usize;
        let found = from_print(step, &sheet.ledger);
        // Zero that follows from plain inputs or from zeros alone needs no decimals to say how small it is.
        let is_plain = |id: u32| {
            let operand = sheet.ledger.entry(id);
            operand.rule == Rule::Typed || operand.printed.count == 0
        };
        let plain = step.operands.iter().all(|(_, id)| is_plain(*id)) || sheet.ledger.entry(step.result).size == 0.0;
        let entry = sheet.ledger.entry_mut(step.result);
        let value = entry.in_unit();
        let is_zero = entry.value.abs() <= DUST * entry.size;
        entry.printed = if entry.rule == Rule::Up {
            Printed::up(found, place[id])
        } else if is_zero {
            if found == 0.0 && plain { Printed { count: 0, place: 0 } } else { zero(found, owed[id], place[id]) }
        } else if says_exactly(value, owed[id]) && (found - value).abs() <= SLACK * 10f64.powi(owed[id]) {
            trimmed(value, owed[id])
        } else {
            closing(value, found, place[id])
        };
    }
}

/// Whether the digits that a value owes say it exactly, so that it needs no more of them.
fn says_exactly(value: f64, place: i32) -> bool {
    (Printed::nearest(value, place).value() - value).abs() <= 1e-12 * value.abs()
}

/// A value that its place says exactly; zero needs no decimals.
fn trimmed(value: f64, place: i32) -> Printed {
    let printed = Printed::nearest(value, place);
    if printed.count == 0 { Printed { count: 0, place: 0 } } else { printed }
}

/// The printed number nearest to the value that still closes with what its printed operands give.
fn closing(value: f64, found: f64, place: i32) -> Printed {
    let unit = 10f64.powi(place);
    Printed::nearest(value.clamp(found - (SLACK - 0.5) * unit, found + (SLACK - 0.5) * unit), place)
}

/// Zero, printed to the finest place at which the line closes: numerical dust is no number.
fn zero(found: f64, owed: i32, place: i32) -> Printed {
    let finest = (place..=owed).find(|place| found.abs() <= SLACK * 10f64.powi(*place)).unwrap_or(owed);
    if found == 0.0 { Printed { count: 0, place: owed } } else { closing(0.0, found, finest) }
}

/// What the printed operands of a step give, in the unit of its result.
fn from_print(step: &Step, ledger: &Ledger) -> f64 {
    let values: Vec<f64> = step.operands.iter().map(|(_, id)| ledger.entry(*id).printed_si()).collect();
    step.definition.program().evaluate(&values) / ledger.entry(step.result).unit.scale
}

/// The last place that a quantity owes by itself.
fn owed_place(entry: &super::Entry, digits: i32) -> i32 {
    let in_unit = entry.in_unit();
    let place = match entry.rule {
        Rule::Typed => typed_place(in_unit),
        // Round dimensions stay as short as they are.
        Rule::Shared if says_exactly(in_unit, leading(in_unit) - (digits - 1)) => leading(in_unit) - (digits - 1),
        Rule::Shared => leading(in_unit) - (SHARED_DIGITS - 1),
        Rule::Owed => leading(in_unit) - (digits - 1),
        // A utilisation far below its limit needs no more decimals than one near it.
        Rule::Up => (leading(in_unit) - (digits - 1)).max(-digits),
        Rule::OwedOf(size) => leading(size / entry.unit.scale) - (digits - 1),
    };
    // Digits before the decimal point are not rounded away while they are few enough to be read.
    if in_unit.abs() < 1e6 { place.min(0) } else { place }
}

/// Exponent of ten of the leading digit; of zero, that of one.
fn leading(value: f64) -> i32 {
    if value == 0.0 || !value.is_finite() { 0 } else { value.abs().log10().floor() as i32 }
}

/// The coarsest place that says what was typed, after any change of unit.
fn typed_place(value: f64) -> i32 {
    if value == 0.0 {
        return 0;
    }
    let top = leading(value);
    (top - TYPED_DIGITS + 1..=top.max(0))
        .rev()
        .find(|place| (Printed::nearest(value, *place).value() - value).abs() <= 1e-12 * value.abs())
        .unwrap_or(top - TYPED_DIGITS + 1)
}

/// Whether the printed operands give the printed result within one unit of its last place.
#[must_use]
pub fn closes(step: &Step, ledger: &Ledger) -> bool {
    let printed = ledger.entry(step.result).printed;
    (from_print(step, ledger) - printed.value()).abs() <= printed.unit_of_last_place() * (1.0 + 1e-9)
}
