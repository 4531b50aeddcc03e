//! Fibre stress against the allowable in tension and in compression.
use super::*;
use crate::catalogue::element::definitions;
use crate::formula::source;

definitions! {
    TENSION: ETA, Ratio, SIGMA / TENSION_LIMIT, &source::ALLOWABLE;
    COMPRESSION: ETA, Ratio, SIGMA.tree().absolute() / COMPRESSION_LIMIT, &source::ALLOWABLE;
}
