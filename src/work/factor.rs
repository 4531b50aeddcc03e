//! The factor that a combination puts on a load case.
use crate::formula::{Value, Worksheet};
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
