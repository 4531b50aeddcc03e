//! Random structures solved from first principles by a separate program, number by number.
//! The structures, the solver and its results stand in `tests/cases/independent`.
use crate::published::{cases, results};
use serde_json::Value;
use std::fs;

/// Relative agreement asked of every number; values that are zero are judged against the largest of their kind.
const AGREEMENT: f64 = 1e-7;

/// Strain and curvature of a structure that is free of force: rounding of what its warming alone would give.
fn dust(key: &str) -> f64 {
    match key {
        "axial" => 1e-14,
        "curvature" => 1e-15,
        _ => 0.0,
    }
}

/// Walks both trees and collects what differs. `size` is the largest value under the same key beside it.
fn compare(place: &str, found: &Value, expected: &Value, sizes: &dyn Fn(&str) -> f64, faults: &mut Vec<String>) {
    match expected {
        Value::Object(map) => {
            for (key, value) in map {
                compare(&format!("{place}.{key}"), &found[key], value, sizes, faults);
            }
        }
        Value::Number(number) => {
            let expected = number.as_f64().expect("number");
            let Some(found) = found.as_f64() else {
                faults.push(format!("{place}: missing, expected {expected}"));
                return;
            };
            let key = place.rsplit('.').next().expect("key");
            if place.contains(".equilibrium.") {
                // What is left over of loads and reactions is rounding, against the largest force and its arm.
                if found.abs() > 1e-7 * sizes("n").max(sizes("v")).max(sizes("m")) {
                    faults.push(format!("{place}: {found} is left over"));
                }
                return;
            }
            let relative = if key == "critical_load_factor" { 1e-3 } else { AGREEMENT };
            if (found - expected).abs() > relative * expected.abs() + 1e-9 * sizes(key) + dust(key) {
                faults.push(format!("{place}: {found} against {expected}"));
            }
        }
        Value::String(text) if found != expected => faults.push(format!("{place}: {found} against {text}")),
        _ => {}
    }
}

/// Largest magnitude of every key in a tree.
fn largest(value: &Value, key: &str, found: &mut std::collections::BTreeMap<String, f64>) {
    match value {
        Value::Object(map) => map.iter().for_each(|(key, value)| largest(value, key, found)),
        Value::Number(number) => {
            let size = number.as_f64().unwrap_or(0.0).abs();
            let entry = found.entry(key.to_owned()).or_insert(0.0);
            *entry = entry.max(size);
        }
        _ => {}
    }
}

#[test]
fn random_structures_agree_with_a_separate_solver() {
    let mut faults = Vec::new();
    let mut structures = 0;
    for path in cases("independent") {
        let expected_path = path.with_extension("expected.json");
        let expected: Value =
            serde_json::from_str(&fs::read_to_string(&expected_path).expect("expected")).expect("json");
        let name = path.file_stem().expect("stem").to_string_lossy().into_owned();
        let found = results(&path);
        let mut sizes = std::collections::BTreeMap::new();
        largest(&expected["combinations"], "", &mut sizes);
        let size = |key: &str| sizes.get(key).copied().unwrap_or(0.0);
        for part in ["combinations", "sections"] {
            compare(&format!("{name}.{part}"), &found[part], &expected[part], &size, &mut faults);
        }
        for row in expected["checks"].as_array().into_iter().flatten() {
            let id = row["id"].as_str().expect("id");
            match found["checks"].as_array().expect("rows").iter().find(|r| r["id"] == id) {
                Some(found) => {
                    for key in ["demand", "limit", "ratio"] {
                        let (found, expected) = (&found[key], &row[key]);
                        let both = found.as_f64().zip(expected.as_f64());
                        if both.is_some_and(|(f, e)| (f - e).abs() > 1e-3 * e.abs())
                            || found.is_null() != expected.is_null()
                        {
                            faults.push(format!("{name}.checks.{id}.{key}: {found} against {expected}"));
                        }
                    }
                }
                None => faults.push(format!("{name}.checks.{id} is missing")),
            }
        }
        structures += 1;
    }
    assert!(structures >= 20, "only {structures} structures found");
    assert!(
        faults.is_empty(),
        "{} faults:\n{}",
        faults.len(),
        faults.iter().take(40).cloned().collect::<Vec<_>>().join("\n")
    );
}
