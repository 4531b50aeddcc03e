//! Tests of the solver against closed forms and laws.
mod bracing;
mod buckling;
mod frames;
mod job;
mod laws;
mod mechanisms;
mod trusses;

use job::Job;

/// Asserts that a value agrees with its closed form to a part in a thousand million, or is as good as 0 beside `scale`.
fn close(found: f64, expected: f64, scale: f64) {
    let allowed = 1e-9 * expected.abs().max(scale);
    assert!((found - expected).abs() <= allowed, "found {found}, expected {expected}");
}
