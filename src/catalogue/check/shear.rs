//! Shear stress against the allowable.
//!
//! For a shape worked from its dimensions the stress is V·Q/(I·b) at the level where that is largest; for a section
//! read from a table it is spread evenly over the shear area given.
use super::*;
use crate::catalogue::element::definitions;
use crate::catalogue::symbol::{AV, I};
use crate::formula::source;

definitions! {
    STRESS: TAU, Stress, VMAX.tree().absolute() * Q / (I * BW), &source::SHEAR_STRESS;
    MEAN_STRESS: TAU, Stress, VMAX.tree().absolute() / AV, &source::SHEAR_STRESS;
    UTILISATION: ETA "Utilisation in shear", Ratio, TAU / SHEAR_LIMIT, &source::ALLOWABLE;
}
