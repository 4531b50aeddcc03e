//! The factor that a combination puts on a load case, and terms of formulas that carry it.
use crate::formula::{Scope, Symbol, Tree, Value, Worksheet};
use crate::model::{Combination, Model};
use crate::units::Measure;

/// The factor as an operand; `None` where the case stands for itself.
pub fn factor(
    sheet: &mut dyn Worksheet,
    model: &Model,
    combination: &Combination,
    case: usize,
    factor: f64,
) -> Option<Value> {
    (!combination.implied).then(|| {
        let case = &model.cases[case].name;
        sheet.input(format_args!("INPUT.combinations.{}.{case}", combination.name), factor, Measure::Number)
    })
}

/// The symbol of a factor in the `index`-th term of a formula, made known in its scope; none where the factor is 1.
pub(super) fn factor_symbol(scope: &mut Scope<'_>, index: usize, factor: Option<Value>) -> Option<Symbol> {
    factor.map(|factor| {
        let symbol = Symbol::indexed("γ", index);
        scope.set(&symbol, factor);
        symbol
    })
}

/// The `index`-th term of a formula times its factor.
pub(super) fn times_factor(scope: &mut Scope<'_>, index: usize, factor: Option<Value>, term: impl Into<Tree>) -> Tree {
    match factor_symbol(scope, index, factor) {
        Some(symbol) => symbol * term,
        None => term.into(),
    }
}
