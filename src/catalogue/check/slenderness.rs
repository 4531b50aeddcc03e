//! Effective length over radius of gyration against a limit.
use super::*;
use crate::catalogue::element::definitions;
use crate::catalogue::symbol::{RI, RZ};
use crate::formula::{Tree, source};

definitions! {
    IN: LAMBDA_IN, Number, L_IN / RI, &source::EULER;
    OUT: LAMBDA_OUT, Number, L_OUT / RZ, &source::EULER;
    UTILISATION_IN: ETA "Utilisation of the slenderness limit in the plane alone; NOT CHECKED out of the plane", Ratio, LAMBDA_IN / LAMBDA_LIMIT, &source::ALLOWABLE;
    UTILISATION: ETA "Utilisation of the slenderness limit", Ratio, Tree::Max(vec![LAMBDA_IN.into(), LAMBDA_OUT.into()]) / LAMBDA_LIMIT, &source::ALLOWABLE;
}
