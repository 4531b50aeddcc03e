//! Where formulas are worked: the same calls fill in results alone or write down every step.
use super::{Definition, Symbol};
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
    /// A symbol that is not known counts as zero on a silent sheet; the tests of each kind see to it that none is.
    pub fn work(&mut self, letter: char, nn: u16, definition: &Definition) -> Value {
        let operands: Vec<Value> =
            definition.program().symbols().iter().map(|s| self.get(s).unwrap_or(Value::silent(f64::NAN))).collect();
        let number = StepNumber { subject: self.subject, combination: self.combination, letter, nn };
        let value = self.sheet.work(number, definition, &operands);
        self.set(definition.symbol(), value);
        value
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
