//! Fibre stress against the allowable in tension and in compression.
use super::*;
use crate::catalogue::element::definitions;
use crate::formula::source;

definitions! {
    TENSION: ETA "Utilisation in tension", Ratio, SIGMA / TENSION_LIMIT, &source::ALLOWABLE;
    COMPRESSION: ETA "Utilisation in compression", Ratio, SIGMA.tree().absolute() / COMPRESSION_LIMIT, &source::ALLOWABLE;
}
