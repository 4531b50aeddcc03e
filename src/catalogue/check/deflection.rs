//! Movement against its limit: of a member from the chord between its ends, of a node from where it stood.
use super::*;
use crate::catalogue::element::definitions;
use crate::catalogue::symbol::L;
use crate::formula::source;

definitions! {
    LIMIT: DELTA_LIMIT, Length, L / SPAN_DIVISOR, &source::ALLOWABLE;
    UTILISATION: ETA "Utilisation of the deflection limit", Ratio, DELTA.tree().absolute() / DELTA_LIMIT, &source::ALLOWABLE;
    NODE_ROTATION: ETA "Utilisation of the rotation limit", Ratio, ROTATION.tree().absolute() / ROTATION_LIMIT, &source::ALLOWABLE;
}
