//! Many faults at once, in the order of the text.
use super::{Diagnostic, Severity, Source};
use std::fmt;

/// Faults of one file, collected so that one run reports them all.
#[derive(Debug, Clone, Default, PartialEq, Eq)]
pub struct Diagnostics {
    list: Vec<Diagnostic>,
}

impl Diagnostics {
    /// None yet.
    #[must_use]
    pub const fn new() -> Self {
        Self { list: Vec::new() }
    }

    /// Adds one.
    pub fn push(&mut self, diagnostic: Diagnostic) {
        self.list.push(diagnostic);
    }

    /// Whether there are none.
    #[must_use]
    pub fn is_empty(&self) -> bool {
        self.list.is_empty()
    }

    /// How many there are.
    #[must_use]
    pub fn len(&self) -> usize {
        self.list.len()
    }

    /// Whether any of them makes the input unusable.
    #[must_use]
    pub fn has_errors(&self) -> bool {
        self.list.iter().any(|d| d.severity == Severity::Error)
    }

    /// All of them.
    pub fn iter(&self) -> std::slice::Iter<'_, Diagnostic> {
        self.list.iter()
    }

    /// Errors alone.
    #[must_use]
    pub fn errors(self) -> Self {
        self.only(Severity::Error)
    }

    /// Warnings alone.
    #[must_use]
    pub fn warnings(self) -> Self {
        self.only(Severity::Warning)
    }

    fn only(mut self, severity: Severity) -> Self {
        self.list.retain(|d| d.severity == severity);
        self
    }

    /// Gives each its bytes in the text, sorts them by place, and keeps one of each place and code.
    #[must_use]
    pub fn placed(mut self, source: &Source) -> Self {
        for diagnostic in &mut self.list {
            if diagnostic.span.is_none() {
                diagnostic.span = source.find(&diagnostic.address).map(|found| found.pointer());
            }
        }
        // A stable sort: what was found first at one place stands first.
        self.list.sort_by_key(|d| d.span.as_ref().map_or((0, 0), |span| (span.start, span.end)));
        self.list.dedup_by(|later, earlier| {
            later.span.is_some() && later.span == earlier.span && later.code == earlier.code
        });
        self
    }
}

impl fmt::Display for Diagnostics {
    /// One line each, for where the text of the file is not at hand.
    fn fmt(&self, f: &mut fmt::Formatter<'_>) -> fmt::Result {
        for diagnostic in &self.list {
            let severity = match diagnostic.severity {
                Severity::Error => "error",
                Severity::Warning => "warning",
            };
            let (id, address, message) = (diagnostic.code.id(), &diagnostic.address, &diagnostic.message);
            writeln!(f, "{severity}[{id}] {address}: {message} ({})", diagnostic.label)?;
        }
        Ok(())
    }
}

impl std::error::Error for Diagnostics {}

impl Extend<Diagnostic> for Diagnostics {
    fn extend<T: IntoIterator<Item = Diagnostic>>(&mut self, more: T) {
        self.list.extend(more);
    }
}

impl FromIterator<Diagnostic> for Diagnostics {
    fn from_iter<T: IntoIterator<Item = Diagnostic>>(list: T) -> Self {
        Self { list: list.into_iter().collect() }
    }
}

impl IntoIterator for Diagnostics {
    type Item = Diagnostic;
    type IntoIter = std::vec::IntoIter<Diagnostic>;
    fn into_iter(self) -> Self::IntoIter {
        self.list.into_iter()
    }
}

impl<'a> IntoIterator for &'a Diagnostics {
    type Item = &'a Diagnostic;
    type IntoIter = std::slice::Iter<'a, Diagnostic>;
    fn into_iter(self) -> Self::IntoIter {
        self.list.iter()
    }
}
