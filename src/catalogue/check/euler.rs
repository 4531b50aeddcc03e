//! Compression against the Euler load with a safety factor, in the plane and out of it.
use super::*;
use crate::catalogue::element::definitions;
use crate::catalogue::symbol::{E, I, IZ, L};
use crate::formula::{Tree, source};

definitions! {
    LENGTH_IN: L_IN, Span, K_IN * L, &source::EULER;
    LENGTH_OUT: L_OUT, Span, K_OUT * L, &source::EULER;
    LOAD_IN: P_IN, Force, Tree::Pi.squared() * E * I / L_IN.squared(), &source::EULER;
    LOAD_OUT: P_OUT, Force, Tree::Pi.squared() * E * IZ / L_OUT.squared(), &source::EULER;
    ALLOWED: P_LIMIT, Force, Tree::Min(vec![P_IN.into(), P_OUT.into()]) / SAFETY, &source::EULER;
    ALLOWED_IN: P_LIMIT, Force, P_IN / SAFETY, &source::EULER;
    UTILISATION_IN: ETA "Utilisation in buckling in the plane alone; NOT CHECKED out of the plane", Ratio, N_LEAST.tree().absolute() / P_LIMIT, &source::EULER;
    UTILISATION: ETA "Utilisation in buckling", Ratio, N_LEAST.tree().absolute() / P_LIMIT, &source::EULER;
}
