//! A formula with everything that is said of it: symbol, plain words, kind of quantity, source.
use super::{DimensionFault, Program, Source, Symbol, Tree, dimension_of};
use crate::units::{Dimension, Measure};
use std::sync::Arc;

/// One formula, written once. Cloning is cheap.
#[derive(Debug, Clone)]
pub struct Definition {
    inner: Arc<Inner>,
}

#[derive(Debug)]
struct Inner {
    symbol: Symbol,
    title: String,
    measure: Measure,
    tree: Tree,
    program: Program,
    source: Option<&'static Source>,
}

impl Definition {
    /// A formula for `symbol`, described in plain words and printed in the unit of `measure`.
    #[must_use]
    pub fn new(symbol: Symbol, title: impl Into<String>, measure: Measure, tree: impl Into<Tree>) -> Self {
        let tree = tree.into();
        let program = Program::new(&tree);
        Self { inner: Arc::new(Inner { symbol, title: title.into(), measure, tree, program, source: None }) }
    }

    /// The same formula with its published source.
    #[must_use]
    pub fn from(self, source: &'static Source) -> Self {
        let Inner { symbol, title, measure, tree, program, .. } =
            Arc::try_unwrap(self.inner).unwrap_or_else(|shared| Inner {
                symbol: shared.symbol.clone(),
                title: shared.title.clone(),
                measure: shared.measure,
                tree: shared.tree.clone(),
                program: shared.program.clone(),
                source: shared.source,
            });
        Self { inner: Arc::new(Inner { symbol, title, measure, tree, program, source: Some(source) }) }
    }

    /// What the formula gives.
    #[must_use]
    pub fn symbol(&self) -> &Symbol {
        &self.inner.symbol
    }

    /// What it finds, in plain words.
    #[must_use]
    pub fn title(&self) -> &str {
        &self.inner.title
    }

    /// The kind of quantity it gives.
    #[must_use]
    pub fn measure(&self) -> Measure {
        self.inner.measure
    }

    /// The formula.
    #[must_use]
    pub fn tree(&self) -> &Tree {
        &self.inner.tree
    }

    /// The formula, ready to evaluate; its slots are the symbols in order of first appearance.
    #[must_use]
    pub fn program(&self) -> &Program {
        &self.inner.program
    }

    /// Where it is published.
    #[must_use]
    pub fn source(&self) -> Option<&'static Source> {
        self.inner.source
    }

    /// Whether the formula gives the dimension its measure promises.
    ///
    /// # Errors
    /// Terms of a sum differ in dimension, or the result is of another dimension than the measure's.
    pub fn check_dimensions(&self, of: &dyn Fn(&Symbol) -> Dimension) -> Result<(), DimensionFault> {
        let found = dimension_of(self.tree(), of)?;
        match found {
            Some(found) if found != self.measure().dimension() => {
                Err(DimensionFault::new(self.measure().dimension(), found))
            }
            _ => Ok(()),
        }
    }
}
