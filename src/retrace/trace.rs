//! Addresses: every operand leads to a number that prints the same, no step rests on itself.
use super::Finding;
use super::package::Package;
use super::report::Coverage;
use super::step::PrintedStep;
use super::typed::{is_same, quantity, text};
use crate::diagnostic::{Address, Source};
use crate::formula::{PrintedNumber, Symbol};
use std::collections::btree_map::Entry;
use std::collections::{BTreeMap, BTreeSet};

/// Kinds of step that are results of their own: comparisons, balances, extremes, stresses, end forces.
const FINAL_LETTERS: &str = "CNRXSF";

/// Whether a step is a result of its own, or shows that a gap between movements vanishes.
fn is_end(step: &PrintedStep) -> bool {
    let vanishes = || step.letter() == Some('D') && step.result.printed.count == 0;
    step.letter().is_some_and(|letter| FINAL_LETTERS.contains(letter)) || vanishes()
}

/// Where an address may lead, besides the input.
#[derive(Debug, Clone, PartialEq)]
enum Place {
    Step(usize),
    Cell(Cell),
}

/// A cell: table, row and column, each from 0.
pub(super) type Cell = (usize, usize, usize);

/// Every address of the package.
pub(super) struct Addresses<'p> {
    package: &'p Package,
    places: BTreeMap<String, Place>,
    input: Option<&'p Source>,
    /// Cells on which steps draw.
    drawn: BTreeSet<Cell>,
}

impl<'p> Addresses<'p> {
    /// Gathers the addresses; one that is given twice is a finding.
    pub(super) fn new(package: &'p Package, input: Option<&'p Source>, findings: &mut Vec<Finding>) -> Self {
        let mut places = BTreeMap::new();
        let mut add = |address: String, place: Place, line: usize| match places.entry(address) {
            Entry::Vacant(entry) => {
                entry.insert(place);
            }
            Entry::Occupied(entry) => {
                findings.push(Finding::at(line, "each address once", format!("`{}` a second time", entry.key())));
            }
        };
        for (at, step) in package.steps.iter().enumerate() {
            add(step.number.clone(), Place::Step(at), step.line);
        }
        for (at, table) in package.tables.iter().enumerate() {
            let Some(id) = &table.id else { continue };
            for (row_at, row) in table.rows.iter().enumerate() {
                for (column_at, (symbol, _)) in table.columns.iter().enumerate() {
                    if row.cells.get(column_at).is_some_and(|cell| !cell.is_empty()) {
                        add(format!("{id}.{}.{symbol}", row.name), Place::Cell((at, row_at, column_at)), row.line);
                    }
                }
            }
        }
        Self { package, places, input, drawn: BTreeSet::new() }
    }

    /// Follows every operand of a step and gives how many were traced.
    pub(super) fn trace(
        &mut self,
        step: &PrintedStep,
        operands: &BTreeMap<Symbol, PrintedNumber>,
        findings: &mut Vec<Finding>,
    ) -> usize {
        let mut traced = 0;
        for (symbol, address) in &step.from {
            // A symbol that is not in the formula was found before.
            let Some(number) = operands.get(&Symbol::owned(symbol.clone())) else { continue };
            match self.compare(address, number) {
                Ok(()) => {
                    traced += 1;
                    if let Some(Place::Cell(cell)) = self.places.get(address) {
                        self.drawn.insert(*cell);
                    }
                }
                Err((expected, found)) => {
                    let expected = format!("{expected} at {address}, for {symbol}");
                    findings.push(Finding::of(&step.number, step.from_line, expected, found));
                }
            }
        }
        traced
    }

    /// Cells on which a step draws, printing the same.
    pub(super) fn drawn_cells(&self) -> &BTreeSet<Cell> {
        &self.drawn
    }

    fn compare(&self, address: &str, number: &PrintedNumber) -> Result<(), (String, String)> {
        let there = match self.places.get(address) {
            Some(Place::Step(at)) => self.package.steps.get(*at).map(|step| step.result.clone()),
            Some(Place::Cell((table, row, column))) => {
                self.package.tables.get(*table).and_then(|table| table.number(*row, *column))
            }
            None => return self.compare_input(address, number),
        };
        match there {
            Some(there) if there.prints_as(number) => Ok(()),
            Some(there) => Err((format!("`{number}`"), format!("`{there}`"))),
            None => Err((format!("`{number}`"), "no number".into())),
        }
    }

    /// An operand that is an input by its path: the printed digits say what was typed, though perhaps in another unit.
    fn compare_input(&self, address: &str, number: &PrintedNumber) -> Result<(), (String, String)> {
        let nowhere = || ("a step, a table cell or an input".to_owned(), "nothing".to_owned());
        let path = Address::parse(address);
        let input = self.input.filter(|_| path.to_string() == address).ok_or_else(nowhere)?;
        let typed = text(input, &path).ok_or_else(nowhere)?;
        if quantity(typed).is_some_and(|typed| is_same(&typed, number)) {
            Ok(())
        } else {
            Err((format!("`{number}`"), format!("`{typed}` in the input")))
        }
    }

    /// Steps that rest on themselves, and steps on which nothing draws.
    pub(super) fn chains(&self, findings: &mut Vec<Finding>, coverage: &mut Coverage) {
        let steps = &self.package.steps;
        let index: BTreeMap<&str, usize> = steps.iter().enumerate().map(|(at, s)| (s.number.as_str(), at)).collect();
        let draws: Vec<Vec<usize>> = steps
            .iter()
            .map(|step| step.from.iter().filter_map(|(_, address)| index.get(address.as_str()).copied()).collect())
            .collect();
        let mut drawn_on = vec![0_usize; steps.len()];
        draws.iter().flatten().for_each(|&below| drawn_on[below] += 1);
        coverage.orphans = steps
            .iter()
            .zip(&drawn_on)
            .filter(|(step, drawn)| **drawn == 0 && !is_end(step))
            .map(|(step, _)| step.number.clone())
            .collect();

        // What nothing draws on is part of no ring, and what draws on nothing: taken away again and again, rings are left.
        let mut draws_on: Vec<Vec<usize>> = vec![Vec::new(); steps.len()];
        for (at, below) in draws.iter().enumerate() {
            below.iter().for_each(|&below| draws_on[below].push(at));
        }
        let above_rings = left_over(&draws, drawn_on);
        let below_rings = left_over(&draws_on, draws.iter().map(Vec::len).collect());
        for (at, step) in steps.iter().enumerate() {
            if above_rings[at] && below_rings[at] {
                let found = "a chain that leads back to the step";
                findings.push(Finding::of(&step.number, step.from_line, "operands worked before it", found));
            }
        }
    }
}

/// Nodes of a graph that remain when those without an incoming edge are taken away again and again.
fn left_over(edges: &[Vec<usize>], mut incoming: Vec<usize>) -> Vec<bool> {
    let mut free: Vec<usize> = (0..edges.len()).filter(|&at| incoming[at] == 0).collect();
    let mut is_left = vec![true; edges.len()];
    while let Some(at) = free.pop() {
        is_left[at] = false;
        for &next in &edges[at] {
            incoming[next] -= 1;
            if incoming[next] == 0 {
                free.push(next);
            }
        }
    }
    is_left
}
