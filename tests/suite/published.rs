//! Published check values: every case with its source, every figure to the precision of its source and of its
//! closed form. The cases stand in `tests/cases/published`, their origin in the README there.
use serde_yaml::Value;
use std::fs;
use std::path::{Path, PathBuf};

pub(crate) fn cases(folder: &str) -> Vec<PathBuf> {
    let folder = Path::new(env!("CARGO_MANIFEST_DIR")).join("tests/cases").join(folder);
    let mut found: Vec<PathBuf> = fs::read_dir(&folder)
        .expect("case folder")
        .map(|entry| entry.expect("entry").path())
        .filter(|path| path.extension().is_some_and(|e| e == "yaml"))
        .filter(|path| {
            !path.to_string_lossy().ends_with(".expected.yaml") && path.file_name().is_some_and(|n| n != "units.yaml")
        })
        .collect();
    found.sort();
    found
}

pub(crate) fn results(path: &Path) -> serde_json::Value {
    let text = fs::read_to_string(path).expect("input");
    let json = calcsheaf::package::results(&text).unwrap_or_else(|faults| panic!("{}:\n{faults}", path.display()));
    serde_json::from_str(&json).expect("results")
}

/// The value at a dotted path, at `checks{kind: …, subject: …, combination: …}.key`, or a radius of gyration.
fn look_up(results: &serde_json::Value, path: &str) -> Option<f64> {
    if let Some(section) = path.strip_prefix("radius ") {
        let of = |key: &str| results["sections"][section][key].as_f64();
        return Some((of("inertia")? / of("area")?).sqrt());
    }
    if let Some(rest) = path.strip_prefix("checks{") {
        let (wanted, key) = rest.split_once("}.")?;
        let row = results["checks"].as_array()?.iter().find(|row| {
            wanted.split(", ").all(|pair| pair.split_once(": ").is_some_and(|(key, value)| row[key] == value))
        })?;
        return row[key].as_f64();
    }
    path.split('.').try_fold(results, |at, key| at.get(key))?.as_f64()
}

fn number(entry: &Value, key: &str) -> Option<f64> {
    let value = entry.get(key)?;
    value.as_f64().or_else(|| value.as_str().and_then(|text| text.parse().ok()))
}

/// A value that stands for zero is judged against the largest of its kind in the case.
const ZERO: f64 = 1e-6;

#[test]
fn every_published_figure_is_met() {
    let mut faults = Vec::new();
    let mut checked = 0;
    for path in cases("published") {
        let expected_path = path.with_extension("expected.yaml");
        let expected: Value =
            serde_yaml::from_str(&fs::read_to_string(&expected_path).expect("expected")).expect("yaml");
        let name = path.file_stem().expect("stem").to_string_lossy().into_owned();
        let results = results(&path);
        for entry in expected["expected"].as_sequence().expect("expected list") {
            let place = entry["path"].as_str().expect("path");
            let Some(found) = look_up(&results, place) else {
                faults.push(format!("{name}: {place} is not in the results"));
                continue;
            };
            checked += 1;
            if let Some(exact) = number(entry, "exact") {
                let relative = number(entry, "rtol").unwrap_or(1e-6);
                let absolute = number(entry, "atol").unwrap_or(if exact.abs() < 1e-9 { ZERO } else { 0.0 });
                if (found - exact).abs() > relative * exact.abs() + absolute {
                    faults.push(format!("{name}: {place} is {found}, exactly {exact}"));
                }
            }
            if let (Some(published), Some(tolerance)) = (number(entry, "published_si"), number(entry, "tolerance_si"))
                && (found - published).abs() > tolerance * (1.0 + 1e-9)
            {
                faults.push(format!("{name}: {place} is {found}, published {published} ± {tolerance}"));
            }
        }
    }
    assert!(checked > 450, "only {checked} figures found");
    assert!(faults.is_empty(), "{} faults:\n{}", faults.len(), faults.join("\n"));
}
