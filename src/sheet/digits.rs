//! Printed digits of every quantity: an error budget carried backwards over the whole sheet.
//!
//! Each result owes significant digits, or digits of a stated size where it is zero by nature. A step closes when
//! its printed operands give its printed result within one unit of the last printed place. Half a unit is spent by
//! rounding the result; the other half is shared among the operands by the derivatives of the formula. Walking the
//! steps backwards, each operand so gets the coarsest place that all steps using it can bear. Then every step is
//! re-evaluated from what was printed; where curvature of a formula spoils the linear estimate, its operands get
//! another digit, and a result that shared or typed operands cannot carry is printed coarser.
//! # Source
//! Own rule; propagation of rounding by first derivatives is common practice.
use super::{Ledger, Rule, Sheet, Step};
use crate::units::Printed;

/// Significant digits of what many members share. Fixed, so that one member's needs never reach another's lines.
pub const SHARED_DIGITS: i32 = 7;
/// Most digits a typed input is printed with, should its unit be converted.
const TYPED_DIGITS: i32 = 9;
/// Share of a unit that the operands' roundings may use; the rest is for the result's own and for second order.
const OPERAND_SHARE: f64 = 0.45;
/// Finest place relative to a quantity's size: double precision holds no more.
const FINEST: i32 = 12;

/// Decides the printed form of every entry of the sheet.
pub fn settle(sheet: &mut Sheet, digits: u8) {
    let digits = i32::from(digits);
    let mut place: Vec<i32> = sheet.ledger.entries().iter().map(|entry| owed_place(entry, digits)).collect();
    let gradients: Vec<Vec<f64>> = sheet.steps.iter().map(|step| gradient(step, &sheet.ledger)).collect();
    let mut share = vec![OPERAND_SHARE; sheet.steps.len()];
    for _ in 0..4 {
        for (at, step) in sheet.steps.iter().enumerate().rev() {
            demand(step, &gradients[at], share[at], &sheet.ledger, &mut place);
        }
        print_all(&mut sheet.ledger, &place);
        let mut all_close = true;
        for (at, step) in sheet.steps.iter().enumerate() {
            if !closes(step, &sheet.ledger) {
                all_close = false;
                share[at] /= 8.0;
            }
        }
        if all_close {
            return;
        }
    }
    coarsen(sheet, &mut place);
}

/// Prints results coarser, first to last, until each step closes.
fn coarsen(sheet: &mut Sheet, place: &mut [i32]) {
    for at in 0..sheet.steps.len() {
        let result = sheet.steps[at].result;
        for _ in 0..16 {
            if closes(&sheet.steps[at], &sheet.ledger) {
                break;
            }
            place[result as usize] += 1;
            print(&mut sheet.ledger, result, place[result as usize]);
        }
    }
}

/// The last place that a quantity owes by itself.
fn owed_place(entry: &super::Entry, digits: i32) -> i32 {
    let in_unit = entry.in_unit();
    let place = match entry.rule {
        Rule::Typed => typed_place(in_unit),
        Rule::Shared => leading(in_unit) - (SHARED_DIGITS - 1),
        Rule::Owed | Rule::Up => leading(in_unit) - (digits - 1),
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
    for place in (top - TYPED_DIGITS + 1..=top.max(0)).rev() {
        let printed = Printed::nearest(value, place).value();
        if (printed - value).abs() <= 1e-12 * value.abs() {
            return place;
        }
    }
    top - TYPED_DIGITS + 1
}

fn gradient(step: &Step, ledger: &Ledger) -> Vec<f64> {
    let values: Vec<f64> = step.operands.iter().map(|(_, id)| ledger.entry(*id).value).collect();
    step.definition.program().gradient(&values).1
}

/// Makes the operands of a step fine enough for its result.
fn demand(step: &Step, gradient: &[f64], share: f64, ledger: &Ledger, place: &mut [i32]) {
    let unit = ledger.entry(step.result).unit.scale;
    let of_section = ledger.entry(step.result).rule == Rule::Shared;
    let bearable = share * unit * 10f64.powi(place[step.result as usize]);
    let adjustable: Vec<(usize, f64)> = step
        .operands
        .iter()
        .zip(gradient)
        .filter(|((_, id), slope)| is_adjustable(ledger.entry(*id).rule, of_section) && **slope != 0.0)
        .map(|((_, id), slope)| (*id as usize, slope.abs()))
        .collect();
    let each = bearable / adjustable.len().max(1) as f64;
    for (id, slope) in adjustable {
        let entry = ledger.entry(id as u32);
        // Rounding moves an operand by half a unit of its last place at most.
        let needed = (2.0 * each / slope / entry.unit.scale).log10().floor();
        let finest = leading(entry.size / entry.unit.scale) - FINEST;
        if needed.is_finite() {
            place[id] = place[id].min((needed as i32).max(finest));
        }
    }
}

/// Shared quantities take digits from the steps of their own section alone; typed ones from none.
fn is_adjustable(rule: Rule, of_section: bool) -> bool {
    rule != Rule::Typed && (rule != Rule::Shared || of_section)
}

fn print_all(ledger: &mut Ledger, place: &[i32]) {
    for (id, &place) in place.iter().enumerate() {
        print(ledger, id as u32, place);
    }
}

fn print(ledger: &mut Ledger, id: u32, place: i32) {
    let entry = ledger.entry_mut(id);
    let value = entry.in_unit();
    entry.printed = if entry.rule == Rule::Up { Printed::up(value, place) } else { Printed::nearest(value, place) };
}

/// Whether the printed operands give the printed result within one unit of its last place.
#[must_use]
pub fn closes(step: &Step, ledger: &Ledger) -> bool {
    let values: Vec<f64> = step.operands.iter().map(|(_, id)| ledger.entry(*id).printed_si()).collect();
    let result = ledger.entry(step.result);
    let found = step.definition.program().evaluate(&values) / result.unit.scale;
    let unit = result.printed.unit_of_last_place();
    (found - result.printed.value()).abs() <= unit * (1.0 - 1e-6)
}
