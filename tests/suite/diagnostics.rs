//! What the reader says of every mistake: `tests/cases/faults/<mistake>.yaml` and the whole text beside it, files that
//! must be read without a word, and files made at random, which must never end in a panic.
use calcsheaf::diagnostic::{Code, Colour, Source};
use calcsheaf::model::{self, Action, EffectiveLength, MemberLoad, Reading};
use proptest::prelude::*;
use std::fs;
use std::path::{Path, PathBuf};

const VALID: &str = include_str!("../cases/valid/every-key.yaml");

fn case(path: &str) -> PathBuf {
    Path::new(env!("CARGO_MANIFEST_DIR")).join("tests/cases").join(path)
}

/// What a run would write to standard error for a file.
fn told(text: &str, file: &str) -> String {
    let faults = match model::read(text) {
        Ok(reading) => reading.warnings,
        Err(faults) => faults,
    };
    faults.render(&Source::new(text), file, Colour::Never)
}

#[test]
fn every_mistake_is_told_as_expected() {
    let mut inputs: Vec<PathBuf> = fs::read_dir(case("faults"))
        .expect("folder")
        .map(|entry| entry.expect("entry").path())
        .filter(|path| path.extension().is_some_and(|e| e == "yaml"))
        .collect();
    inputs.sort();
    assert!(inputs.len() >= 30, "only {} mistakes found", inputs.len());
    let mut wrong = Vec::new();
    for path in inputs {
        let text = fs::read_to_string(&path).expect("input");
        let expected = fs::read_to_string(path.with_extension("expected.txt")).expect("expected text");
        let file = path.file_name().expect("name").to_string_lossy();
        let found = told(&text, &file);
        if found != expected {
            wrong.push(format!("=== {file}, expected\n{expected}=== found\n{found}"));
        }
    }
    assert!(wrong.is_empty(), "{}", wrong.join("\n"));
}

/// Every code an input can cause alone is caused by some file of the folder; the rest need a made text or an analysis.
#[test]
fn every_code_has_its_mistake() {
    const ELSEWHERE: &[&str] = &["E002", "E003", "E009", "E010", "E011", "E023", "E070", "E071", "E072"];
    let all: String = fs::read_dir(case("faults"))
        .expect("folder")
        .map(|entry| entry.expect("entry").path())
        .filter(|path| path.to_string_lossy().ends_with(".expected.txt"))
        .map(|path| fs::read_to_string(path).expect("expected text"))
        .collect();
    let missing: Vec<&str> = Code::ALL
        .iter()
        .map(|code| code.id())
        .filter(|id| !ELSEWHERE.contains(id) && !all.contains(&format!("[{id}]")))
        .collect();
    assert!(missing.is_empty(), "{missing:?}");
}

#[track_caller]
fn read(text: &str) -> Reading {
    model::read(text).unwrap_or_else(|faults| panic!("{}", faults.render(&Source::new(text), "file", Colour::Never)))
}

#[track_caller]
fn same(found: f64, expected: f64) {
    assert!((found - expected).abs() <= 1e-12 * expected.abs(), "{found} against {expected}");
}

/// The file uses every key of the language; the values are those typed in it, turned into SI by hand.
#[test]
fn a_file_with_every_key_is_understood() {
    let Reading { model, .. } = read(VALID);
    assert_eq!(model.project.number.as_deref(), Some("24-0117"));
    assert_eq!(model.project.checked_by.name, None);
    assert_eq!(model.project.approved_by.name, None);
    assert_eq!(model.project.purpose.as_deref(), Some("Shows that the support carries the pipe.\n\n- one\n- two"));
    assert!(model.project.assumptions[0].confirm && !model.project.assumptions[1].confirm);
    assert_eq!(model.project.revisions[1].affects, ["members.BC", "load_cases.L", "load_cases.L.loads[1]"]);
    assert_eq!(model.display.digits, 5);
    same(model.gravity, 9.81);
    same(model.materials[0].allowable.shear.expect("shear"), 95e6);
    // A weight per volume is divided by standard gravity.
    same(model.materials[1].density.expect("density"), 78_500.0 / 9.806_65);
    let names: Vec<&str> = model.nodes.iter().map(|node| node.name.as_str()).collect();
    assert_eq!(names, ["A", "B", "C", "1", "no", "1e3"]);
    // 8 ft 6 in = 102 in of 25.4 mm.
    same(model.nodes[4].x, 102.0 * 0.0254);
    assert_eq!(model.supports[2].hold, [true, false, false]);
    same(model.supports[2].spring[1].expect("spring"), 12e6);
    same(model.supports[2].turned, std::f64::consts::PI / 6.0);
    let bc = &model.members[1];
    assert_eq!(bc.hinge, [true, false]);
    assert_eq!(bc.allowable.tension, Some(150e6));
    assert_eq!(bc.allowable.compression, Some(165e6));
    assert_eq!(bc.allowable_path[0], "members.BC.allowable.tension");
    assert_eq!(bc.allowable_path[1], "materials.S275.allowable.compression");
    assert_eq!(bc.in_plane, Some(EffectiveLength::Factor(1.0)));
    assert_eq!(bc.out_of_plane, Some(EffectiveLength::Length(2.0)));
    assert_eq!(model.members[2].name, "on");
    assert!(model.members[2].tension_only);
    same(model.cases[0].self_weight, 1.0);
    same(model.cases[1].self_weight, 0.1);
    let entries: Vec<usize> = model.cases[0].loads.iter().map(|load| load.entry).collect();
    assert_eq!(entries, [0, 1, 2, 2, 3, 4, 5]);
    // BC runs 4 m right and 3 m up: 5 m, half of it 2.5 m.
    let Action::Member { load: MemberLoad::Line { over: Some([from, to]), .. }, .. } = model.cases[0].loads[4].acts
    else {
        panic!("no part of a member");
    };
    same(from, 0.5);
    same(to, 2.5);
    assert_eq!(model.combinations.len(), 2);
    assert_eq!(model.combinations[1].factors, [(0, 1.2), (1, 1.6)]);
    assert_eq!(model.checks.deflection.len(), 4);
    assert_eq!(model.checks.stability, Some(10.0));
}

/// The shapes with the very lines of the manual, turned where that is allowed.
#[test]
fn every_shape_is_read_as_the_manual_writes_it() {
    let shapes = [
        "{shape: rectangle, depth: 200 mm, width: 50 mm}",
        "{shape: round, diameter: 24 mm}",
        "{shape: tube, diameter: 114.3 mm, wall: 5 mm}",
        "{shape: box, depth: 100 mm, width: 100 mm, wall: 5 mm, outer_radius: 7.5 mm, inner_radius: 5 mm}",
        "{shape: box, depth: 100 mm, width: 100 mm, wall: 5 mm}",
        "{shape: i, depth: 200 mm, width: 100 mm, web: 5.6 mm, flange: 8.5 mm, fillet: 12 mm}",
        "{shape: i, depth: 200 mm, width: 100 mm, web: 5.6 mm, flange: 8.5 mm, source: R1, shear_area: 11 cm2}",
        "{shape: channel, depth: 200 mm, width: 75 mm, web: 8.5 mm, flange: 11.5 mm, fillet: 0 mm}",
        "{shape: tee, depth: 100 mm, width: 100 mm, web: 6 mm, flange: 9 mm, fillet: 0 mm, turned: true}",
        "{shape: angle, depth: 80 mm, width: 80 mm, thickness: 8 mm, turned: yes}",
        "{shape: plates, plates: [{width: 150 mm, height: 12 mm, at: 106 mm}, {width: 8 mm, height: 200 mm, at: 0 mm}]}",
        "{shape: given, area: 2848 mm2, inertia: 19.43e6 mm4, top: 100 mm, bottom: 100 mm, minor_inertia: 1.42e6 mm4, shear_area: 1120 mm2, source: R3}",
    ];
    for shape in shapes {
        let model = read(&VALID.replace("  rod: {", &format!("  S: {shape}\n  rod: {{"))).model;
        let section = model.sections.iter().find(|section| section.name == "S").expect("section");
        assert!(shape.contains(&format!("shape: {}", section.kind.name())), "{shape}");
        assert_eq!(section.shear_area.is_some(), shape.contains("shear_area"), "{shape}");
        assert_eq!(section.given.turned, shape.contains("turned"), "{shape}");
    }
}

#[test]
fn without_combinations_each_case_stands_alone() {
    let at = VALID.find("combinations:").expect("block");
    let end = VALID.find("checks:").expect("block");
    let model = read(&format!("{}{}", &VALID[..at], &VALID[end..])).model;
    let names: Vec<(&str, bool)> = model.combinations.iter().map(|c| (c.name.as_str(), c.implied)).collect();
    assert_eq!(names, [("D", true), ("L", true)]);
}

/// Exact definitions: inch 25.4 mm, foot 12 in, pound 0.45359237 kg, standard gravity 9.80665 m/s².
#[test]
fn units_are_read_in_every_form() {
    const KIP: f64 = 1000.0 * 0.453_592_37 * 9.806_65;
    for (typed, expected_m) in [
        ("2500 mm", 2.5),
        ("2500mm", 2.5),
        ("250 cm", 2.5),
        ("2.5e0 m", 2.5),
        ("0.0025 km", 2.5),
        ("8 ft", 2.4384),
        ("8 ft 6 in", 2.5908),
        ("102 in", 2.5908),
        ("+3 m", 3.0),
        ("\"4.5 m\"", 4.5),
        ("'4.5 m'", 4.5),
    ] {
        same(
            read(&VALID.replace("{x: 4 m, y: 0 m}", &format!("{{x: {typed}, y: -9 m}}"))).model.nodes[1].x,
            expected_m,
        );
    }
    for (typed, expected_n) in [
        ("-12 kN", -12e3),
        ("−12 kN", -12e3),
        ("12e-3 MN", 12e3),
        ("2 kip", 2.0 * KIP),
        ("500 lbf", 0.5 * KIP),
        ("0", 0.0),
    ] {
        let model = read(&VALID.replace("fy: -12 kN", &format!("fy: {typed}"))).model;
        let Action::Node { forces, .. } = model.cases[0].loads[0].acts else { panic!("no load on a node") };
        same(forces[1], expected_n);
    }
    for typed in ["2 kN·m", "2 kN.m", "2 kN*m", "2 kNm", "2 kN m", "2000 N·m"] {
        let model = read(&VALID.replace("m: 2 kN·m", &format!("m: {typed}"))).model;
        let Action::Node { forces, .. } = model.cases[0].loads[0].acts else { panic!("no load on a node") };
        same(forces[2], 2000.0);
    }
    for typed in ["210 GPa", "210e3 MPa", "210e3 N/mm2", "210e3 N/mm^2", "210e3 N/mm²", "210 kN/mm2", "21e10 Pa"] {
        same(read(&VALID.replacen("E: 210 GPa", &format!("E: {typed}"), 1)).model.materials[0].modulus, 210e9);
    }
    for typed in ["30 K", "30 degC", "54 degF"] {
        let model = read(&VALID.replace("warm: 30 K", &format!("warm: {typed}"))).model;
        assert!(model.cases[1].loads.iter().any(|load| matches!(load.acts, Action::Member { load: MemberLoad::Warm { top, bottom }, .. } if (top - 30.0).abs() < 1e-12 && (bottom - 30.0).abs() < 1e-12)), "{typed}");
    }
}

/// Thousands of nodes must be read in the blink of an eye, and so must the telling of thousands of faults.
#[test]
fn large_files_are_read_in_linear_time() {
    const COUNT: usize = 4000;
    let mut text = VALID.split("nodes:").next().expect("head").to_owned();
    text.push_str("nodes:\n");
    for node in 0..COUNT {
        text.push_str(&format!("  N{node}: {{x: {node} m, y: 0 m}}\n"));
    }
    text.push_str("members:\n");
    for node in 1..COUNT {
        text.push_str(&format!(
            "  M{node}: {{kind: bar, from: N{}, to: N{node}, section: rod, material: W}}\n",
            node - 1
        ));
    }
    text.push_str("load_cases:\n  D: {self_weight: true}\n");
    assert_eq!(read(&text).model.members.len(), COUNT - 1);
    let broken = text.replace("section: rod", "section: rood");
    assert_eq!(told(&broken, "large.yaml").matches("error[E021]").count(), COUNT - 1);
}

proptest! {
    #![proptest_config(ProptestConfig::with_cases(300))]

    #[test]
    fn random_bytes_never_panic(bytes in prop::collection::vec(any::<u8>(), 0..200)) {
        let source = Source::from_bytes(&bytes);
        if let Err(faults) = model::read_source(source.clone()) {
            prop_assert!(faults.render(&source, "random.yaml", Colour::Always).contains("error"));
        }
    }

    #[test]
    fn random_text_never_panics(text in "\\PC{0,300}") {
        let _ = told(&text, "random.yaml");
    }

    #[test]
    fn random_yaml_never_panics(text in "[-a-c0-2:\\[\\]{},&*!|>'\"#? \t\r\n%@`~<.]{0,200}") {
        let _ = told(&text, "random.yaml");
    }

    #[test]
    fn a_valid_file_changed_at_random_never_panics(
        changes in prop::collection::vec((0.0..1.0_f64, 0usize..40, "\\PC{0,3}|[-:\\[\\]{}&*!|>'\"# \t\r\n]{0,3}"), 1..6)
    ) {
        let mut text: Vec<char> = VALID.chars().collect();
        for (at, length, new) in changes {
            let start = (at * text.len() as f64) as usize;
            let end = (start + length).min(text.len());
            text.splice(start..end, new.chars());
        }
        let text: String = text.into_iter().collect();
        let _ = told(&text, "changed.yaml");
    }

    /// Prose as it may stand in a block, lines and blank lines at random, is understood by both readers.
    #[test]
    fn both_readers_agree_on_prose(
        lines in prop::collection::vec("[ ]{0,3}[A-Za-z*>#|-][A-Za-z0-9 .,:;#*_`|\"'-]{0,30}|", 1..8),
        style in "[|>][+-]?"
    ) {
        let body: String = lines.iter().map(|line| if line.is_empty() { "\n".to_owned() } else { format!("    {line}\n") }).collect();
        let changed = VALID.replace("  notes: None.\n", &format!("  notes: {style}\n    First.\n{body}"));
        if let Err(faults) = model::read(&changed) {
            prop_assert!(false, "{}", faults.render(&Source::new(&changed), "f", Colour::Never));
        }
    }

    /// Plain and quoted leaves as an engineer may type them are understood by both readers, and as typed.
    #[test]
    fn both_readers_agree_on_ordinary_texts(text in "[A-Za-z0-9][A-Za-z0-9 .,;()/+*=<>%°·äéß'_-]{0,40}[A-Za-z0-9]") {
        let changed = VALID.replace("client: Works department", &format!("client: {text}"));
        let model = model::read(&changed).unwrap_or_else(|faults| panic!("{}", faults.render(&Source::new(&changed), "f", Colour::Never))).model;
        prop_assert_eq!(model.project.client.as_deref(), Some(text.as_str()));
    }
}
