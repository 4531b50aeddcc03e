//! The worksheet that writes every step down.
use super::digits::DUST;
use super::{Comparison, Rule, Sheet, Step};
use crate::formula::{Definition, StepNumber, Value, Worksheet};
use crate::model::Display;
use crate::units::{Measure, Unit};
use std::fmt;

/// Part of its terms below which a result is their small difference: it owes digits of that part, not of itself.
const DIFFERENCE: f64 = 1e-2;
/// The same of movements, whose small differences are what strains come from.
const DIFFERENCE_OF_MOVEMENTS: f64 = 1e-3;

/// A worksheet over a sheet.
pub struct Recording<'a> {
    /// Where steps go.
    pub sheet: &'a mut Sheet,
    display: &'a Display,
}

impl<'a> Recording<'a> {
    /// Writes to a sheet, in the units of `display`.
    pub fn new(sheet: &'a mut Sheet, display: &'a Display) -> Self {
        Self { sheet, display }
    }

    /// The unit in which a kind of quantity is printed.
    #[must_use]
    pub fn unit(&self, measure: Measure) -> Unit {
        self.display.unit(measure)
    }

    fn record(
        &mut self,
        number: StepNumber<'_>,
        definition: &Definition,
        operands: &[Value],
        rule: Option<Rule>,
        comparison: Option<Comparison>,
    ) -> Value {
        let address = number.to_string();
        if let Some(known) = self.sheet.ledger.at(&address) {
            // Worked before for another purpose: the same step, the same result.
            return known;
        }
        let values: Vec<f64> = operands.iter().map(|v| v.si).collect();
        let (value, gradient) = definition.program().gradient(&values);
        let size: f64 =
            gradient.iter().zip(operands).map(|(slope, v)| (slope * self.sheet.ledger.entry(v.id).size).abs()).sum();
        let of_movements = number.letter == 'D';
        let least = size * if of_movements { DIFFERENCE_OF_MOVEMENTS } else { DIFFERENCE };
        let rule = rule.unwrap_or(if value.abs() <= DUST * size {
            Rule::OwedOf(size)
        } else if number.letter == 'P' {
            Rule::Shared
        } else if value.abs() < least {
            Rule::OwedOf(least)
        } else {
            Rule::Owed
        });
        let rule = if rule == Rule::OwedOf(0.0) { Rule::OwedOf(if of_movements { least } else { size }) } else { rule };
        let result = self.sheet.ledger.enter(address.clone(), value, self.display.unit(definition.measure()), rule);
        if of_movements {
            self.sheet.ledger.entry_mut(result.id).size = size;
        } else if let Rule::OwedOf(owed) = rule {
            self.sheet.ledger.entry_mut(result.id).size = owed;
        }
        let symbols = definition.program().symbols();
        let operands = symbols.iter().cloned().zip(operands.iter().map(|v| v.id)).collect();
        self.sheet.push_step(Step {
            number: address,
            definition: definition.clone(),
            operands,
            result: result.id,
            comparison,
            by: None,
            note: None,
        });
        result
    }
}

impl Worksheet for Recording<'_> {
    fn work(&mut self, number: StepNumber<'_>, definition: &Definition, operands: &[Value]) -> Value {
        self.record(number, definition, operands, None, None)
    }

    fn balance(&mut self, number: StepNumber<'_>, definition: &Definition, operands: &[Value]) -> Value {
        self.record(number, definition, operands, Some(Rule::OwedOf(0.0)), None)
    }

    fn compare(&mut self, number: StepNumber<'_>, definition: &Definition, operands: &[Value], limit: f64) -> Value {
        let values: Vec<f64> = operands.iter().map(|v| v.si).collect();
        let ok = within(definition.program().evaluate(&values), limit);
        self.record(number, definition, operands, Some(Rule::Up), Some(Comparison { limit, at_most: true, ok }))
    }

    fn remark(&mut self, by: Option<&str>, note: Option<&str>) {
        if let Some(step) = self.sheet.steps.last_mut() {
            if let Some(by) = by {
                step.by = Some(by.to_owned());
            }
            if let Some(note) = note {
                step.note = Some(note.to_owned());
            }
        }
    }

    fn input(&mut self, address: fmt::Arguments<'_>, si: f64, measure: Measure) -> Value {
        let address = address.to_string();
        self.sheet
            .ledger
            .at(&address)
            .unwrap_or_else(|| self.sheet.ledger.enter(address, si, self.display.unit(measure), Rule::Typed))
    }

    fn stated(&mut self, address: fmt::Arguments<'_>, si: f64, size: f64, measure: Measure) -> Value {
        let address = address.to_string();
        if let Some(known) = self.sheet.ledger.at(&address) {
            return known;
        }
        let rule = Rule::OwedOf(si.abs().max(1e-3 * size));
        let value = self.sheet.ledger.enter(address, si, self.display.unit(measure), rule);
        self.sheet.ledger.entry_mut(value.id).size = si.abs().max(DUST * size);
        value
    }
}

/// Whether a ratio keeps its limit; what exceeds it by rounding alone keeps it.
#[must_use]
pub fn within(ratio: f64, limit: f64) -> bool {
    ratio <= limit * (1.0 + 1e-12)
}
