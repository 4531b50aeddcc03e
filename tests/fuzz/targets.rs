//! The targets: readers of quantities, formulas and YAML, whole inputs, packages read back.
use super::Target;
use calcsheaf::diagnostic::{Colour, Content, Place, Source};
use calcsheaf::document::Templates;
use calcsheaf::formula::{Operand, Program, parse_numbers, parse_printed, parse_symbols, with_numbers, with_symbols};
use calcsheaf::units::{Printed, parse_number, parse_quantity, parse_unit};
use calcsheaf::{input, package, retrace};
use std::fs;
use std::path::Path;

pub(super) const TARGETS: &[Target] = &[
    Target { name: "quantity", seeds: Vec::new, words: QUANTITY, run: quantity, few: 2000 },
    Target { name: "formula", seeds: Vec::new, words: FORMULA, run: formula, few: 1000 },
    Target { name: "yaml", seeds: small_inputs, words: YAML, run: yaml, few: 300 },
    Target { name: "input", seeds: small_inputs, words: INPUT, run: whole_input, few: 60 },
    Target { name: "retrace", seeds: Vec::new, words: PACKAGE, run: read_back, few: 60 },
];

const QUANTITY: &[&str] = &[
    "1e308",
    "1e-308",
    "1e999",
    "nan",
    "NaN",
    "inf",
    "-inf",
    ".inf",
    "−",
    "-",
    "+",
    ".",
    "0",
    "-0",
    "8 ft 6 in",
    "kN",
    "·",
    "*",
    "/",
    "m",
    "mm2",
    "mm⁴",
    "^",
    "^-2",
    "²",
    "⁻¹",
    "deg",
    "°",
    "°C",
    "/K",
    "1/K",
    "kNm",
    "lbf",
    "e",
    "e5",
    "%",
    " ",
    "\u{a0}",
    "\u{202e}",
    "١٢",
    "½",
    "m^127",
    "m-128",
    "m9",
    "N9·N9·N9·N9·N9",
];
const FORMULA: &[&str] = &[
    "(",
    ")",
    "|",
    "√(",
    "max(",
    "min(",
    "sin(",
    "atan(",
    ", ",
    " + ",
    " − ",
    "·",
    "/",
    "²",
    "⁻",
    "⁻¹",
    "⁹⁹⁹",
    "×10³",
    "×10⁻⁶",
    "×10⁹⁹⁹",
    "κ₁",
    "σ_top",
    "N_Ed",
    "π",
    "(−3.2 mm)",
    "0.000",
    "1234567890123456789",
    "kN·m/rad",
    "1/m",
    " mm²",
    "N/mm²",
    "−",
    "-",
    "e",
    "\u{200b}",
];
const YAML: &[&str] = &[
    "&a ",
    "*a",
    "<<: ",
    "!!str ",
    "? ",
    "- ",
    ": ",
    "{",
    "}",
    "[",
    "]",
    ",",
    "|",
    ">",
    "|+\n",
    ">-\n",
    "'",
    "\"",
    "#",
    "---\n",
    "...\n",
    "%YAML 1.2\n",
    "\t",
    "~",
    "null",
    "no",
    "010",
    "0x1F",
    "1e3",
    ".inf",
    "\u{2028}",
    "\u{85}",
    "\u{feff}",
    "\r",
    "\r\n",
    "\\x00",
    "\\u202e",
    "\0",
    "@",
    "`",
    "&a [*a, *a]",
    "  ",
    "\n",
];
const INPUT: &[&str] = &[
    "1e308 kN",
    "-1e300 kN/m",
    "1e-300 mm",
    "1e160 m",
    "nan",
    ".inf kN",
    "-0 kN",
    "0",
    "0 m",
    "1e15 mm2",
    "1e-9 GPa",
    "bar",
    "bar3",
    "beam",
    "frame",
    "pinned",
    "fixed",
    "start",
    "both",
    "end",
    "{hold: [y]}",
    "{x: 1 kN/mm}",
    "true",
    "false",
    "full",
    "summary",
    "us",
    "8",
    "3",
    "X",
    "y",
    "50 %",
    "[0 m, 1 m]",
    "A",
    "B",
    "C",
    "AB",
    "D",
    "S",
    "rectangle",
    "round",
    "tube",
    "i",
    "angle",
    "plates",
    "given",
    "-1",
    "1e6",
    "90 deg",
    "89.9999999 deg",
    "tension_only: true",
    "hinge: both",
    "self_weight: 1e9",
    "per: plan",
    "warm: 1e9 K",
    "{top: 20 K, bottom: -5 K}",
    "\"| a | b |\"",
    "\"```step A.G01\"",
    "\"{{ program }}\"",
    "<script>",
    "\u{202e}",
    "\u{200b}",
    "settle",
    "m",
    "w",
    "p",
];
const PACKAGE: &[&str] = &[
    "```step A.G01\n",
    "```",
    "````text\n",
    "| ",
    "|---|\n",
    "**Table C1.U** x\n",
    "from: ",
    " · ",
    "= ",
    "−",
    "0",
    "9",
    "1e9",
    "×10⁹⁹",
    "²",
    "(",
    ")",
    "√(",
    "OK",
    "NOT OK",
    " ≤ ",
    "SHA-256: ",
    "Governing: ",
    "INPUT.nodes.A.x",
    "total",
    "mm",
    "kN",
    "\u{feff}",
    "\r\n",
    "\\",
    "*",
];

fn small_inputs() -> Vec<String> {
    let folder = Path::new(env!("CARGO_MANIFEST_DIR")).join("tests/cases");
    [
        "published/o-b03.yaml",
        "published/o-q04.yaml",
        "published/o-s01.yaml",
        "published/o-m03.yaml",
        "valid/every-key.yaml",
    ]
    .iter()
    .map(|name| fs::read_to_string(folder.join(name)).expect("a case"))
    .collect()
}

/// What is read is finite and prints as a unit that is read as the same.
fn quantity(bytes: &[u8]) -> &'static str {
    let text = String::from_utf8_lossy(bytes);
    if let Err(fault) = parse_number(&text) {
        assert!(text.get(fault.span).is_some() && !fault.help.is_empty());
    }
    if let Ok(unit) = parse_unit(&text) {
        assert!(unit.scale.is_finite() && unit.scale > 0.0, "{unit:?}");
        let again = parse_unit(&unit.text).expect("a printed unit");
        assert_eq!((&again.text, again.dimension), (&unit.text, unit.dimension));
    }
    match parse_quantity(&text) {
        Ok(quantity) => {
            assert!(quantity.value.is_finite());
            "read"
        }
        Err(fault) => {
            assert!(text.get(fault.span).is_some() && !fault.message.is_empty() && !fault.help.is_empty());
            "refused"
        }
    }
}

/// What is read as a formula prints as itself, and its numbers print as they were.
fn formula(bytes: &[u8]) -> &'static str {
    let text = String::from_utf8_lossy(bytes);
    if let Ok(number) = parse_printed(&text) {
        assert!(!number.si().is_nan());
        let again = parse_printed(&number.to_string()).expect("a printed number");
        assert!(again.prints_as(&number), "{number} and {again}");
    }
    if let Err(fault) = parse_numbers(&text) {
        assert!(text.get(fault.span).is_some() && !fault.message.is_empty());
    }
    match parse_symbols(&text) {
        Ok(tree) => {
            let printed = with_symbols(&tree);
            let again = parse_symbols(&printed).unwrap_or_else(|fault| panic!("{printed}: {fault}"));
            assert_eq!(with_symbols(&again), printed);
            let program = Program::new(&tree);
            let _ = program.evaluate(&vec![1.5; program.symbols().len()]);
            let number = |_: &_| Operand { printed: Printed { count: -25, place: -1 }, unit: "kN·m".into() };
            let printed = with_numbers(&tree, &number);
            // A constant of more digits than a number may have is refused among numbers, in words.
            let longest = printed.split(|c: char| !c.is_ascii_digit()).map(str::len).max().unwrap_or(0);
            assert!(longest > 18 || parse_numbers(&printed).is_ok(), "{printed}");
            "read"
        }
        Err(fault) => {
            assert!(text.get(fault.span).is_some() && !fault.message.is_empty());
            "refused"
        }
    }
}

/// What is read has the shape that `serde_yaml` by itself gives it.
fn yaml(bytes: &[u8]) -> &'static str {
    let source = Source::from_bytes(bytes);
    if let Some(root) = source.root() {
        spans(root, source.text());
    }
    match input::read(&source) {
        Ok(_) if source.faults().has_errors() => "readable with faults",
        Ok(_) => {
            let other: serde_yaml::Value = serde_yaml::from_str(source.text()).expect("the second reader reads it");
            same_shape(source.root().expect("a value"), &other);
            "read"
        }
        Err(faults) => {
            assert!(faults.has_errors());
            assert!(!faults.render(&source, "input.yaml", Colour::Never).is_empty());
            if faults.iter().any(|fault| fault.code == calcsheaf::diagnostic::Code::TwoReadings) {
                "two readings"
            } else {
                "refused"
            }
        }
    }
}

fn spans(place: &Place, text: &str) {
    assert!(text.get(place.span.clone()).is_some(), "{:?}", place.span);
    match &place.content {
        Content::Text { .. } => {}
        Content::List(items) => items.iter().for_each(|item| spans(item, text)),
        Content::Map(entries) => entries.iter().for_each(|entry| {
            assert!(text.get(entry.key_span.clone()).is_some());
            spans(&entry.value, text);
        }),
    }
}

fn same_shape(place: &Place, other: &serde_yaml::Value) {
    match (&place.content, other) {
        (Content::List(items), serde_yaml::Value::Sequence(others)) => {
            assert_eq!(items.len(), others.len());
            items.iter().zip(others).for_each(|(item, other)| same_shape(item, other));
        }
        (Content::Map(entries), serde_yaml::Value::Mapping(others)) => {
            assert_eq!(entries.len(), others.len());
            entries.iter().zip(others.values()).for_each(|(entry, other)| same_shape(&entry.value, other));
        }
        (Content::Text { text, .. }, serde_yaml::Value::String(other)) => assert_eq!(text, other),
        (Content::Text { .. }, other) => assert!(!other.is_mapping() && !other.is_sequence(), "{other:?}"),
        (content, other) => panic!("{content:?} and {other:?}"),
    }
}

/// What is packed is confirmed by `retrace`; what is refused says why.
fn whole_input(bytes: &[u8]) -> &'static str {
    let text = String::from_utf8_lossy(bytes);
    match package::solve(&text) {
        Ok(solved) => {
            if !solved.warnings.is_empty() {
                assert!(!solved.warnings.render(&solved.source, "input.yaml", Colour::Never).is_empty());
            }
            let made =
                solved.package("input.yaml", &text, &Templates::built_in()).unwrap_or_else(|fault| panic!("{fault}"));
            assert!(!made.results.contains("NaN") && !made.results.contains("inf"));
            let read = retrace::read(&made.markdown).unwrap_or_else(|refusal| panic!("{refusal}"));
            let report = retrace::confirm(&read, Some(&text));
            assert!(report.ok(), "{report}");
            "packed"
        }
        Err(refusal) => {
            assert!(!refusal.render("input.yaml", Colour::Never).trim().is_empty());
            "refused"
        }
    }
}

/// What is no sound package is refused or reported.
fn read_back(bytes: &[u8]) -> &'static str {
    let text = String::from_utf8_lossy(bytes);
    match retrace::read(&text) {
        Ok(package) => {
            let report = retrace::confirm(&package, package.echo());
            assert!(!report.to_string().is_empty());
            if report.ok() { "confirmed" } else { "reported" }
        }
        Err(refusal) => {
            assert!(!refusal.to_string().is_empty());
            "refused"
        }
    }
}
