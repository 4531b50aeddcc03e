//! What was found, and how much of the package was looked at.
use std::fmt;

/// A line of the package that does not hold.
#[derive(Debug, Clone, PartialEq, Eq, PartialOrd, Ord)]
pub struct Finding {
    /// The line of the Markdown, from 1.
    pub line: usize,
    /// The step it belongs to, if it belongs to one.
    pub step: Option<String>,
    /// What should stand there.
    pub expected: String,
    /// What stands there.
    pub found: String,
}

impl Finding {
    /// A finding outside the steps.
    pub(super) fn at(line: usize, expected: impl Into<String>, found: impl Into<String>) -> Self {
        Self { line, step: None, expected: expected.into(), found: found.into() }
    }

    /// A finding in a step.
    pub(super) fn of(step: &str, line: usize, expected: impl Into<String>, found: impl Into<String>) -> Self {
        Self { step: Some(step.to_owned()), ..Self::at(line, expected, found) }
    }
}

impl fmt::Display for Finding {
    fn fmt(&self, f: &mut fmt::Formatter<'_>) -> fmt::Result {
        write!(f, "line {}", self.line)?;
        if let Some(step) = &self.step {
            write!(f, ", step {step}")?;
        }
        write!(f, ": expected {}; found {}", self.expected, self.found)
    }
}

/// How much of the package was confirmed.
#[derive(Debug, Clone, Default, PartialEq, Eq)]
pub struct Coverage {
    /// Steps in the package.
    pub steps: usize,
    /// Steps in which nothing was found.
    pub steps_confirmed: usize,
    /// Operands that the steps name.
    pub operands: usize,
    /// Operands whose address leads to a number that prints the same.
    pub operands_traced: usize,
    /// Tables that steps may draw on.
    pub tables: usize,
    /// Numbers in their cells.
    pub table_numbers: usize,
    /// Those of them on which a step draws, or which were compared with a step or added up.
    pub table_numbers_confirmed: usize,
    /// Each table that holds others, with how many.
    pub open_tables: Vec<(String, usize)>,
    /// Results quoted in tables and in the verdict that were compared with their step.
    pub quotes: usize,
    /// Numbers on the page that belong to no step and to no table, such as those of prose: nobody confirmed them.
    pub loose_numbers: usize,
    /// Steps on which nothing draws and which end no chain, in the order of the page.
    pub orphans: Vec<String>,
}

/// The outcome of a confirmation.
#[derive(Debug, Clone, Default, PartialEq, Eq)]
pub struct Report {
    /// Everything that does not hold, in the order of the page.
    pub findings: Vec<Finding>,
    /// What is worth knowing and is no fault.
    pub remarks: Vec<String>,
    /// How much was looked at.
    pub coverage: Coverage,
}

impl Report {
    /// Whether every line holds.
    #[must_use]
    pub fn ok(&self) -> bool {
        self.findings.is_empty()
    }
}

impl fmt::Display for Report {
    fn fmt(&self, f: &mut fmt::Formatter<'_>) -> fmt::Result {
        for finding in &self.findings {
            writeln!(f, "{finding}")?;
        }
        for remark in &self.remarks {
            writeln!(f, "remark: {remark}")?;
        }
        let coverage = &self.coverage;
        writeln!(f, "steps confirmed: {} of {}", coverage.steps_confirmed, coverage.steps)?;
        writeln!(f, "operands traced: {} of {}", coverage.operands_traced, coverage.operands)?;
        writeln!(f, "tables: {}", coverage.tables)?;
        writeln!(f, "numbers in tables confirmed: {} of {}", coverage.table_numbers_confirmed, coverage.table_numbers)?;
        if !coverage.open_tables.is_empty() {
            let tables: Vec<String> = coverage.open_tables.iter().map(|(id, count)| format!("{id} {count}")).collect();
            writeln!(f, "numbers in tables that nothing confirms: {}", tables.join(", "))?;
        }
        writeln!(f, "quoted results compared: {}", coverage.quotes)?;
        writeln!(f, "numbers in neither step nor table: {}", coverage.loose_numbers)?;
        if !coverage.orphans.is_empty() {
            writeln!(f, "steps on which nothing draws: {}", coverage.orphans.join(", "))?;
        }
        f.write_str(if self.ok() { "Confirmed.\n" } else { "NOT CONFIRMED.\n" })
    }
}
