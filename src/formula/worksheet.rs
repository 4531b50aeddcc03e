//! Where formulas are worked: the same calls fill in results alone or write down every step.
use super::{Definition, Symbol};
use crate::units::Measure;
use std::fmt;

/// A worked value and the place where it is written down, if it is.
#[derive(Debug, Clone, Copy, PartialEq)]
pub struct Value {
    /// Value in SI base units.
    pub si: f64,
    /// Its entry in the ledger; meaningless on a silent worksheet.
    pub id: u32,
}

impl Value {
    /// A value that is written down nowhere.
    #[must_use]
    pub const fn silent(si: f64) -> Self {
        Self { si, id: u32::MAX }
    }
}

/// A step's number: `subject[.combination].<letter><nn>`, made of the input's own names.
#[derive(Debug, Clone, Copy, PartialEq, Eq)]
pub struct StepNumber<'a> {
    /// The member, node or section.
    pub subject: &'a str,
    /// The combination or load case, where the step belongs to one.
    pub combination: Option<&'a str>,
    /// The kind of step.
    pub letter: char,
    /// What the step is; always the same for the same thing.
    pub nn: u16,
}

impl fmt::Display for StepNumber<'_> {
    fn fmt(&self, f: &mut fmt::Formatter<'_>) -> fmt::Result {
        f.write_str(self.subject)?;
        if let Some(combination) = self.combination {
            write!(f, ".{combination}")?;
        }
        write!(f, ".{}{:02}", self.letter, self.nn)
    }
}

/// Takes formulas with the values of their symbols and gives the result.
pub trait Worksheet {
    /// Works one step. `operands` stand in the order of the definition's symbols.
    fn work(&mut self, number: StepNumber<'_>, definition: &Definition, operands: &[Value]) -> Value;

    /// Works a step whose result is zero by nature, such as the balance of a node.
    fn balance(&mut self, number: StepNumber<'_>, definition: &Definition, operands: &[Value]) -> Value {
        self.work(number, definition, operands)
    }

    /// Works a step whose result is compared with a plain number, which it must not exceed.
    fn compare(&mut self, number: StepNumber<'_>, definition: &Definition, operands: &[Value], limit: f64) -> Value {
        let _ = limit;
        self.work(number, definition, operands)
    }

    /// Says by what method or clause the last step was worked, and remarks on it.
    fn remark(&mut self, by: Option<&str>, note: Option<&str>) {
        let _ = (by, note);
    }

    /// A value of the input, under its address; the same address gives the same entry again.
    fn input(&mut self, address: fmt::Arguments<'_>, si: f64, measure: Measure) -> Value;

    /// A value that is stated and proved by the steps that use it, such as a movement.
    ///
    /// `size` is the largest of its kind beside it: what is far smaller counts as zero.
    fn stated(&mut self, address: fmt::Arguments<'_>, si: f64, size: f64, measure: Measure) -> Value;
}

/// Computes and writes nothing down.
#[derive(Debug, Clone, Copy, Default)]
pub struct Silent;

impl Worksheet for Silent {
    fn work(&mut self, _: StepNumber<'_>, definition: &Definition, operands: &[Value]) -> Value {
        let mut values = [0.0; 32];
        if operands.len() <= values.len() {
            for (slot, operand) in values.iter_mut().zip(operands) {
                *slot = operand.si;
            }
            Value::silent(definition.program().evaluate(&values[..operands.len()]))
        } else {
            let values: Vec<f64> = operands.iter().map(|v| v.si).collect();
            Value::silent(definition.program().evaluate(&values))
        }
    }

    fn input(&mut self, _: fmt::Arguments<'_>, si: f64, _: Measure) -> Value {
        Value::silent(si)
    }

    fn stated(&mut self, _: fmt::Arguments<'_>, si: f64, _: f64, _: Measure) -> Value {
        Value::silent(si)
    }
}

/// The symbols known so far about one subject, and the worksheet its steps go to.
pub struct Scope<'a> {
    sheet: &'a mut dyn Worksheet,
    subject: &'a str,
    combination: Option<&'a str>,
    known: Vec<(Symbol, Value)>,
}

impl<'a> Scope<'a> {
    /// An empty scope for a subject.
    pub fn new(sheet: &'a mut dyn Worksheet, subject: &'a str, combination: Option<&'a str>) -> Self {
        Self { sheet, subject, combination, known: Vec::new() }
    }

    /// Makes a symbol known; a later meaning replaces an earlier one.
    pub fn set(&mut self, symbol: &Symbol, value: Value) {
        if let Some(entry) = self.known.iter_mut().find(|(s, _)| s == symbol) {
            entry.1 = value;
        } else {
            self.known.push((symbol.clone(), value));
        }
    }

    /// The value of a symbol, where it is known.
    #[must_use]
    pub fn get(&self, symbol: &Symbol) -> Option<Value> {
        self.known.iter().rev().find(|(s, _)| s == symbol).map(|(_, v)| *v)
    }

    /// Works a definition whose symbols are all known, and makes its own symbol known.
    ///
    /// A symbol that is not known makes the result not a number; the tests of each kind see to it that none is.
    pub fn work(&mut self, letter: char, nn: u16, definition: &Definition) -> Value {
        let operands = self.operands(definition);
        let number = StepNumber { subject: self.subject, combination: self.combination, letter, nn };
        let value = self.sheet.work(number, definition, &operands);
        self.set(definition.symbol(), value);
        value
    }

    /// Works a definition whose result is zero by nature.
    pub fn balance(&mut self, letter: char, nn: u16, definition: &Definition) -> Value {
        let operands = self.operands(definition);
        let number = StepNumber { subject: self.subject, combination: self.combination, letter, nn };
        self.sheet.balance(number, definition, &operands)
    }

    /// Works a definition whose result must not exceed `limit`.
    pub fn compare(&mut self, letter: char, nn: u16, definition: &Definition, limit: f64) -> Value {
        let operands = self.operands(definition);
        let number = StepNumber { subject: self.subject, combination: self.combination, letter, nn };
        self.sheet.compare(number, definition, &operands, limit)
    }

    /// What a definition whose symbols are all known gives, SI; nothing is written down.
    #[must_use]
    pub fn glance(&self, definition: &Definition) -> f64 {
        let values: Vec<f64> = self.operands(definition).iter().map(|v| v.si).collect();
        definition.program().evaluate(&values)
    }

    /// The subject and the combination that steps are numbered by.
    #[must_use]
    pub const fn about(&self) -> (&'a str, Option<&'a str>) {
        (self.subject, self.combination)
    }

    fn operands(&self, definition: &Definition) -> Vec<Value> {
        definition.program().symbols().iter().map(|s| self.get(s).unwrap_or(Value::silent(f64::NAN))).collect()
    }

    /// Makes known what another scope knows.
    pub fn inherit(&mut self, known: &[(Symbol, Value)]) {
        self.known.extend_from_slice(known);
    }

    /// Everything known, in order of appearance.
    #[must_use]
    pub fn known(&self) -> &[(Symbol, Value)] {
        &self.known
    }

    /// The worksheet, for steps of another subject.
    pub fn sheet(&mut self) -> &mut dyn Worksheet {
        self.sheet
    }
}
