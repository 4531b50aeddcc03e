//! The promises of the sheet, tried on every package there is: each is read back from its Markdown alone.
use crate::packages::{demos, pack, pack_file};
use crate::published::cases;
use calcsheaf::retrace;
use std::fs;
use std::path::Path;

/// Reads a package back and says what is not confirmed.
fn unconfirmed(name: &str, markdown: &str, input: &str) -> Vec<String> {
    let package = match retrace::read(markdown) {
        Ok(package) => package,
        Err(refusal) => return vec![format!("{name}: {refusal}")],
    };
    let report = retrace::confirm(&package, Some(input));
    assert_eq!(
        report.coverage.steps,
        report.coverage.steps_confirmed
            + report.findings.iter().filter_map(|f| f.step.as_ref()).collect::<std::collections::BTreeSet<_>>().len(),
        "{name}"
    );
    let orphans = report.coverage.orphans.iter().map(|step| format!("{name}: nothing draws on {step}"));
    report.findings.iter().map(|finding| format!("{name}: {finding}")).chain(orphans).collect()
}

#[test]
fn every_demo_is_confirmed_from_its_markdown_alone() {
    let mut faults = Vec::new();
    for path in demos() {
        let (text, package) = pack_file(&path);
        faults.extend(unconfirmed(&path.to_string_lossy(), &package.markdown, &text));
    }
    assert!(
        faults.is_empty(),
        "{} faults:\n{}",
        faults.len(),
        faults.iter().take(20).cloned().collect::<Vec<_>>().join("\n")
    );
}

/// The same promises hold whatever is worked line by line.
#[test]
fn every_detail_is_confirmed() {
    let path = Path::new(env!("CARGO_MANIFEST_DIR")).join("demo-inputs/timber-canopy.yaml");
    let text = fs::read_to_string(path).expect("demo");
    let mut faults = Vec::new();
    for detail in ["summary", "governing", "full"] {
        let text = text
            .replace("  detail: governing\n", "")
            .replace("\ndisplay:\n", &format!("\ndisplay:\n  detail: {detail}\n"));
        faults.extend(unconfirmed(detail, &pack(&text, "canopy.yaml").markdown, &text));
    }
    assert!(
        faults.is_empty(),
        "{} faults:\n{}",
        faults.len(),
        faults.iter().take(20).cloned().collect::<Vec<_>>().join("\n")
    );
}

/// Published cases and random structures: every kind of support, load, member and section, in both families of units.
#[test]
fn every_case_is_confirmed_from_its_markdown_alone() {
    let mut faults = Vec::new();
    let mut packages = 0;
    for path in cases("published").into_iter().chain(cases("independent")) {
        let (text, package) = pack_file(&path);
        packages += 1;
        faults.extend(unconfirmed(&path.file_name().expect("name").to_string_lossy(), &package.markdown, &text));
    }
    assert!(packages > 100, "only {packages} packages");
    assert!(
        faults.is_empty(),
        "{} faults:\n{}",
        faults.len(),
        faults.iter().take(20).cloned().collect::<Vec<_>>().join("\n")
    );
}

/// The portal's package with one leading digit of a result changed, step after step: each change must be found.
#[test]
fn a_changed_leading_digit_is_found_in_every_step() {
    let path = Path::new(env!("CARGO_MANIFEST_DIR")).join("demo-inputs/hanger-rod.yaml");
    let text = fs::read_to_string(path).expect("demo");
    let markdown = pack(&text, "hanger-rod.yaml").markdown;
    let lines: Vec<&str> = markdown.lines().collect();
    let mut tried = 0;
    for (at, line) in lines.iter().enumerate() {
        // The result is the last line that begins with an equals sign before `from:`.
        let is_result =
            line.trim_start().starts_with("= ") && lines.get(at + 1).is_some_and(|next| next.starts_with("from:"));
        let Some(place) = line.find(|c: char| ('1'..='9').contains(&c)).filter(|_| is_result) else { continue };
        let digit = line.as_bytes()[place];
        let other = if digit == b'9' { '8' } else { char::from(digit + 1) };
        let changed: Vec<String> = lines
            .iter()
            .enumerate()
            .map(|(n, l)| if n == at { format!("{}{other}{}", &l[..place], &l[place + 1..]) } else { (*l).to_owned() })
            .collect();
        let package = retrace::read(&changed.join("\n")).expect("still a package");
        assert!(!retrace::confirm(&package, None).ok(), "line {}: `{line}` changed to {other} is not found", at + 1);
        tried += 1;
    }
    assert!(tried > 60, "only {tried} results were changed");
}
