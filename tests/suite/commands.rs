//! The program run as a user runs it.
use std::fs;
use std::path::{Path, PathBuf};
use std::process::{Command, Output};

fn run(arguments: &[&str]) -> Output {
    Command::new(env!("CARGO_BIN_EXE_calcsheaf")).args(arguments).output().expect("the program starts")
}

fn folder(name: &str) -> PathBuf {
    let folder = Path::new(env!("CARGO_TARGET_TMPDIR")).join(name);
    drop(fs::remove_dir_all(&folder));
    fs::create_dir_all(&folder).expect("folder");
    folder
}

fn demo(name: &str) -> String {
    Path::new(env!("CARGO_MANIFEST_DIR")).join("demo-inputs").join(name).to_string_lossy().into_owned()
}

#[test]
fn pack_writes_every_file_of_a_package() {
    let out = folder("pack");
    let result = run(&["pack", &demo("hanger-rod.yaml"), "--out", &out.to_string_lossy()]);
    assert_eq!(result.status.code(), Some(0), "{}", String::from_utf8_lossy(&result.stderr));
    for file in ["hanger-rod.md", "hanger-rod.pdf", "hanger-rod.results.json", "hanger-rod.figures/structure.svg"] {
        assert!(fs::metadata(out.join(file)).is_ok_and(|m| m.len() > 0), "{file} is missing");
    }
    let left: Vec<_> = fs::read_dir(&out)
        .expect("folder")
        .map(|e| e.expect("entry").file_name())
        .filter(|n| n.to_string_lossy().ends_with(".part"))
        .collect();
    assert!(left.is_empty(), "{left:?}");
    assert!(String::from_utf8_lossy(&result.stdout).contains("licensed"), "the caution is missing");
}

/// The limit of the demo's rod set below its stress.
#[test]
fn a_check_beyond_its_limit_is_told_by_the_exit_code() {
    let out = folder("beyond");
    let text = fs::read_to_string(demo("hanger-rod.yaml")).expect("demo").replace("tension: 45 MPa", "tension: 20 MPa");
    let input = out.join("beyond.yaml");
    fs::write(&input, text).expect("input");
    let result = run(&["pack", &input.to_string_lossy()]);
    assert_eq!(result.status.code(), Some(3));
    assert!(String::from_utf8_lossy(&result.stdout).contains("BEYOND LIMIT"));
    assert!(fs::read_to_string(out.join("beyond.md")).expect("package").contains("NOT OK"));
}

#[test]
fn an_input_that_cannot_be_used_leaves_the_earlier_package_whole() {
    let out = folder("unusable");
    let input = out.join("job.yaml");
    fs::copy(demo("hanger-rod.yaml"), &input).expect("input");
    assert_eq!(run(&["pack", &input.to_string_lossy()]).status.code(), Some(0));
    let before = fs::read(out.join("job.md")).expect("package");
    for (broken, says) in
        [("pump: {x: 0 m", "error["), ("lower: {kind: bar3, from: coupling, to: pmp, section: R36", "`pump`")]
    {
        let text = fs::read_to_string(demo("hanger-rod.yaml")).expect("demo");
        let text = if says == "error[" {
            text.replace("pump: {x: 0 m, y: 0 m}", broken)
        } else {
            text.replace("lower: {kind: bar3, from: coupling, to: pump, section: R36", broken)
        };
        fs::write(&input, text).expect("input");
        let result = run(&["pack", &input.to_string_lossy()]);
        let told = String::from_utf8_lossy(&result.stderr);
        assert_eq!(result.status.code(), Some(2), "{told}");
        assert!(told.contains(says) && told.contains("job.yaml:"), "{told}");
        assert_eq!(fs::read(out.join("job.md")).expect("package"), before);
    }
}

/// A portal without its sideways support slides; a rod loaded across itself has no stiffness there.
#[test]
fn a_mechanism_is_told_in_the_users_words() {
    let out = folder("mechanism");
    let input = out.join("slides.yaml");
    let text = "calcsheaf: 1\nproject: {title: Slides}\nmaterials: {M: {E: 210 GPa}}\nsections: {S: {shape: rectangle, depth: 200 mm, width: 100 mm}}\n\
        nodes: {A: {x: 0, y: 0}, B: {x: 4 m, y: 0}}\nsupports: {A: {hold: [y]}, B: {hold: [y]}}\n\
        members: {AB: {kind: frame, from: A, to: B, section: S, material: M}}\nload_cases: {L: {loads: [{on: AB, dir: Y, w: -1 kN/m}]}}\n";
    fs::write(&input, text).expect("input");
    let result = run(&["pack", &input.to_string_lossy()]);
    let told = String::from_utf8_lossy(&result.stderr);
    assert_eq!(result.status.code(), Some(2));
    assert!(told.contains("error[E070]") && told.contains("help:"), "{told}");
    assert!(!out.join("slides.md").exists());
}

#[test]
fn a_file_that_is_not_there_and_a_folder_that_cannot_be_written() {
    let result = run(&["pack", "no-such-file.yaml"]);
    assert_eq!(result.status.code(), Some(2));
    assert!(String::from_utf8_lossy(&result.stderr).contains("no-such-file.yaml"));
    let out = folder("blocked");
    let file = out.join("file");
    fs::write(&file, "in the way").expect("file");
    let result = run(&["pack", &demo("hanger-rod.yaml"), "--out", &file.join("below").to_string_lossy()]);
    assert_eq!(result.status.code(), Some(1), "{}", String::from_utf8_lossy(&result.stderr));
}

/// A stress known to be beyond its limit is said, though the other limit is missing: simple span of 6 m, 50 kN at
/// mid-span, 50 × 100 mm: M = 75 kN·m, σ = 6·M/(b·d²) = 900 MPa (statics), over 165 MPa allowed in tension.
#[test]
fn a_known_overstress_is_said_though_another_limit_is_missing() {
    let input = "calcsheaf: 1\nproject: {title: T}\nmaterials: {S: {E: 210 GPa, allowable: {tension: 165 MPa}}}\n\
        sections: {P: {shape: rectangle, depth: 100 mm, width: 50 mm}}\n\
        nodes: {A: {x: 0 m, y: 0 m}, B: {x: 6 m, y: 0 m}}\nsupports: {A: pinned, B: {hold: [y]}}\n\
        members: {AB: {kind: frame, from: A, to: B, section: P, material: S}}\n\
        load_cases: {L: {loads: [{on: AB, dir: Y, p: -50 kN, at: 50 %}]}}\n";
    let solved = calcsheaf::package::solve(input).unwrap_or_else(|refusal| panic!("{}", refusal.faults.len()));
    let check = solved.results.combinations[0].checks.iter().find(|c| c.kind == "stress").expect("a row");
    assert_eq!(check.ok(), Some(false));
    assert!((check.ratio.expect("a ratio") - 900.0 / 165.0).abs() < 1e-9);
    assert!(check.why.as_deref().is_some_and(|why| why.contains("compressive")));
    let package = crate::packages::pack(input, "t.yaml");
    assert_eq!(package.beyond, 1);
    let report =
        calcsheaf::retrace::confirm(&calcsheaf::retrace::read(&package.markdown).expect("a package"), Some(input));
    assert!(report.ok(), "{report}");
}

/// Places of loads whose difference is not exact in binary.
#[test]
fn loads_at_awkward_places_are_taken() {
    for (a, b) in [("0.3", "0.9"), ("0.6", "1.7"), ("0.7", "2.9"), ("1.4", "5.8"), ("1.7", "3.9")] {
        let input = format!(
            "calcsheaf: 1\nproject: {{title: T}}\nmaterials: {{S: {{E: 210 GPa}}}}\n\
             sections: {{P: {{shape: rectangle, depth: 100 mm, width: 50 mm}}}}\n\
             nodes: {{A: {{x: 0 m, y: 0 m}}, B: {{x: 6 m, y: 0 m}}}}\nsupports: {{A: pinned, B: {{hold: [y]}}}}\n\
             members: {{AB: {{kind: frame, from: A, to: B, section: P, material: S}}}}\n\
             load_cases: {{L: {{loads: [{{on: AB, dir: Y, p: -10 kN, at: {a} m}}, {{on: AB, dir: Y, p: -10 kN, at: {b} m}}]}}}}\n"
        );
        assert!(calcsheaf::package::solve(&input).is_ok(), "{a} {b}");
    }
}
