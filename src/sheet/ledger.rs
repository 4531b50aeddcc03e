//! Every quantity that is printed: one value, one unit, one printed form, one address.
use crate::formula::{Operand, Value};
use crate::units::{Printed, Unit};
use std::collections::BTreeMap;

/// How the printed digits of a quantity are decided.
#[derive(Debug, Clone, Copy, PartialEq)]
pub enum Rule {
    /// An input: as many digits as say exactly what was typed.
    Typed,
    /// Shared by many members: a fixed number of significant digits, whatever needs it.
    Shared,
    /// Stated or worked for one member, node or combination: from the error budget.
    /// It owes significant digits of its own value.
    Owed,
    /// Zero by nature, such as a residual: owes digits of the given magnitude (SI) instead of its own.
    OwedOf(f64),
    /// A utilisation: owes significant digits and is rounded up.
    Up,
}

/// A printed quantity.
#[derive(Debug, Clone, PartialEq)]
pub struct Entry {
    /// Where it stands: a step's number or a table cell.
    pub address: String,
    /// Value in SI base units.
    pub value: f64,
    /// Unit in print.
    pub unit: Unit,
    /// How its digits are decided.
    pub rule: Rule,
    /// Its magnitude, or what it is small against where it is zero by nature; SI.
    pub size: f64,
    /// Its printed form, in `unit`; settled by the error budget.
    pub printed: Printed,
}

impl Entry {
    /// The value in the printed unit.
    #[must_use]
    pub fn in_unit(&self) -> f64 {
        self.value / self.unit.scale
    }

    /// The value that the printed form stands for, in SI base units.
    #[must_use]
    pub fn printed_si(&self) -> f64 {
        self.printed.value() * self.unit.scale
    }

    /// The printed form with its unit, as it stands in a formula.
    #[must_use]
    pub fn operand(&self) -> Operand {
        Operand { printed: self.printed, unit: self.unit.text.to_string() }
    }
}

/// Every printed quantity of a sheet; `Value::id` points into it.
#[derive(Debug, Default)]
pub struct Ledger {
    entries: Vec<Entry>,
    by_address: BTreeMap<String, u32>,
}

impl Ledger {
    /// Writes a quantity down.
    ///
    /// # Panics
    /// Never: an address that is taken keeps its first entry and the new one stands beside it, which the
    /// sheet's own tests report.
    pub fn enter(&mut self, address: String, value: f64, unit: Unit, rule: Rule) -> Value {
        let id = self.entries.len() as u32;
        self.by_address.entry(address.clone()).or_insert(id);
        self.entries.push(Entry {
            address,
            value,
            unit,
            rule,
            size: value.abs(),
            printed: Printed { count: 0, place: 0 },
        });
        Value { si: value, id }
    }

    /// The quantity at an address.
    #[must_use]
    pub fn at(&self, address: &str) -> Option<Value> {
        self.by_address.get(address).map(|&id| Value { si: self.entries[id as usize].value, id })
    }

    /// The entry of a value.
    #[must_use]
    pub fn entry(&self, id: u32) -> &Entry {
        &self.entries[id as usize]
    }

    /// The entry of a value, to settle its printed form.
    pub fn entry_mut(&mut self, id: u32) -> &mut Entry {
        &mut self.entries[id as usize]
    }

    /// All entries.
    #[must_use]
    pub fn entries(&self) -> &[Entry] {
        &self.entries
    }
}
