//! The elastic critical load factor of the whole structure against the smallest allowed.
use super::*;
use crate::catalogue::element::definitions;
use crate::formula::source;

definitions! {
    UTILISATION: ETA "Utilisation of the critical load factor", Ratio, ALPHA_LEAST / ALPHA_CR, &source::EULER;
}
