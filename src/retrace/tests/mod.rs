//! A package written by hand from the sheet's contract, then damaged in every way that fits on one line.
//!
//! Its values follow from closed forms, worked by hand: a bar of 40 × 100 mm and 5 m under 50 kN (strain N/(E·A) =
//! 50000/(210000·4000) = 59.524×10⁻⁶, stretch 0.29762 mm), and a bracket of 2.5 m with 4 kN at its tip (moment 10 kN·m,
//! stress 10×10⁶/66666.7 = 150 MPa). Its fingerprint was made by another program.
mod damage;
mod hostile;

use super::{Report, confirm, read};

pub(super) const SAMPLE: &str = include_str!("sample.md");

pub(super) fn report(markdown: &str) -> Report {
    confirm(&read(markdown).expect("a package"), None)
}

/// Whether the change of one text for another, which must be there, is seen.
#[track_caller]
pub(super) fn check_caught(from: &str, to: &str, expected: &str) {
    assert!(SAMPLE.contains(from), "`{from}` is not in the sample");
    let report = report(&SAMPLE.replacen(from, to, 1));
    let text = report.to_string();
    assert!(!report.ok() && text.contains(expected), "`{from}` for `{to}`:\n{text}");
}

#[test]
fn a_sound_package_is_confirmed() {
    let package = read(SAMPLE).expect("a package");
    let report = confirm(&package, package.echo());
    assert!(report.ok(), "{report}");
    let coverage = &report.coverage;
    assert_eq!((coverage.steps, coverage.steps_confirmed), (10, 10));
    assert_eq!((coverage.operands, coverage.operands_traced), (26, 26));
    assert_eq!((coverage.tables, coverage.quotes), (7, 3));
    // All but nothing: every number of the tables is drawn on, added up, quoted or named.
    assert_eq!((coverage.table_numbers, coverage.table_numbers_confirmed), (23, 23));
    assert!(coverage.orphans.is_empty(), "{:?}", coverage.orphans);
    assert!(report.remarks.is_empty(), "{report}");
}

#[test]
fn windows_line_ends_and_a_mark_change_nothing() {
    let text = format!("\u{feff}{}", SAMPLE.replace('\n', "\r\n"));
    let package = read(&text).expect("a package");
    let input = read(SAMPLE).expect("a package").echo().map(|echo| echo.replace('\n', "\r\n"));
    let plain = confirm(&package, None);
    assert!(plain.ok(), "{plain}");
    assert_eq!(plain.remarks.len(), 2);
    assert!(!confirm(&package, input.as_deref()).ok(), "an input of other bytes has another fingerprint");
}

#[test]
fn faults_are_told_by_step_and_line() {
    check_caught("η = N/(A·σ_a)", "η = N/(A/σ_a)", "step T1.C1.C01: expected a fraction");
    check_caught("0.07576 ≤ 1 OK", "0.07575 ≤ 1 OK", "rounded up");
    check_caught("= 0.9091 ≤ 1 OK", "= 0.9091 ≤ 1 NOT OK", "found `NOT OK`");
    check_caught("= 0.9091 ≤ 1 OK", "= 0.9091 > 1 OK", "≤ 1`");
    check_caught("from: σ K1.C1.S01 · σ_a", "from: σ_a K1.C1.S01 · σ", "in this order");
    check_caught("M K1.C1.F01 ·", "M K1.C1.F02 ·", "found nothing");
    check_caught("= 150.0 MPa", "= 150.0 kN", "a stress, which the printed numbers give");
    check_caught("= 150.0 MPa", "= 150.2 MPa", "within 1 unit");
    check_caught("= 0.00 kN", "= −0.00 kN", "a zero stands without a minus sign");
    check_caught("| K | 0.00 |", "| K | −0.00 |", "a zero without a minus sign");
    check_caught("| T1 | 50.0 |", "| T1 | 50.2 |", "`50.00 kN`, N of step T1.C1.F01");
    check_caught("| total | −30.00 | 44.00 |", "| total | −30.00 | 45.00 |", "44 for the total");
    check_caught("| B | 3 | −4 |", "| B | 3 |", "3 cells");
    check_caught("```step K1.C1.S01", "```step K1.C1.C01", "a second time");
    check_caught("at **0.9091**", "at **0.8091**", "the result of step K1.C1.C01");
    check_caught("limit, OK (step", "limit, NOT OK (step", "expected `OK`");
    check_caught("(step [K1.C1.C01]", "(step [T1.C1.C01]", "the result of step T1.C1.C01");
    check_caught("| Within their limit | 2 |", "| Within their limit | 3 |", "2 for `Within their limit`");
    check_caught("| 0.9091 | within |", "| 0.9091 | BEYOND LIMIT |", "the verdict of step K1.C1.C01");
    check_caught("fx: 30 kN", "fx: 31 kN", "an input whose SHA-256");
    check_caught("from: b INPUT.sections.RS.b", "from: b RS.P02", "found `66666.7 mm³`");
    check_caught("from: E materials.S.E", "from: E materials.S.G", "found nothing");
    check_caught("```step K1.C1.S01", "```stop K1.C1.S01", "steps inside fences of their own");
    check_caught("```step K1.C1.S01", "``step K1.C1.S01", "steps inside fences of their own");
}

#[test]
fn a_formula_changed_in_both_lines_does_not_close() {
    let text = SAMPLE.replacen("W = b·h²/6", "W = b·h³/6", 1).replacen("(100 mm)²/6", "(100 mm)³/6", 1);
    assert!(report(&text).to_string().contains("a volume in `66666.7 mm³`"), "{}", report(&text));
    let text = SAMPLE.replacen("W = b·h²/6", "W = b·h²/8", 1).replacen("(100 mm)²/6", "(100 mm)²/8", 1);
    assert!(report(&text).to_string().contains("expected 50000"), "{}", report(&text));
}

#[test]
fn what_is_beyond_its_limit_may_not_be_called_unchecked() {
    let partly = SAMPLE
        .replacen("| 0.9091 | within |", "| 0.9091 | NOT CHECKED: in one plane only |", 1)
        .replacen("limit, OK (step", "limit, NOT CHECKED (step", 1)
        .replacen("limit | 2 |", "limit | 1 |", 1)
        .replacen("| Not checked | 1 |", "| Not checked | 2 |", 1);
    assert!(report(&partly).ok(), "{}", report(&partly));
    let beyond = partly.replacen("165 MPa, compression", "105 MPa, compression", 1);
    let beyond = beyond.replacen("/(165 MPa)", "/(105 MPa)", 1).replacen("= 0.9091 ≤ 1 OK", "= 1.4286 > 1 NOT OK", 1);
    let found = report(&beyond.replace("0.9091", "1.4286")).to_string();
    assert!(found.contains("the verdict of step K1.C1.C01; found `NOT CHECKED`"), "{found}");
    assert!(found.contains("expected `NOT OK`; found NOT CHECKED"), "{found}");
}

#[test]
fn one_kind_of_step_gives_one_symbol() {
    let step = |subject: &str, symbol: &str| {
        format!("```step {subject}.G01\nLength\n{symbol} = l\n  = 5.000 m\n  = 5.000 m\nfrom: l T1.G01\n```\n\n")
    };
    let text = format!("{}{}## Member K1", step("T2", "L"), step("T3", "M"));
    let found = report(&SAMPLE.replacen("## Member K1", &text, 1)).to_string();
    assert!(found.contains("step T3.G01: expected L, as in other steps of this kind; found M"), "{found}");
}

#[test]
fn a_step_keeps_to_its_combination() {
    let table = |id: &str| format!("**Table {id}** Movements\n\n| end | u, mm |\n|---|---:|\n| end | 0.2976 |\n\n");
    let with_table = SAMPLE.replacen("## Member T1", &format!("{}## Member T1", table("C2.U")), 1);
    assert!(report(&with_table).ok());
    let found = report(&with_table.replacen("u₂ C1.U.end.u", "u₂ C2.U.end.u", 1));
    assert_eq!(found.findings.len(), 1, "{found}");
    assert!(found.to_string().contains("expected operands of combination C1"), "{found}");
}

#[test]
fn steps_that_rest_on_themselves_are_found() {
    // x and y print the same and draw on each other.
    let step = |number: &str, below: &str| {
        format!("```step {number}\nA length\nx = y\n  = 5.000 m\n  = 5.000 m\nfrom: y {below}\n```\n\n")
    };
    let ring = format!("{}{}", step("X.G01", "X.G02"), step("X.G02", "X.G01"));
    let found = report(&SAMPLE.replacen("## Member K1", &format!("{ring}## Member K1"), 1));
    assert_eq!(found.findings.len(), 2, "{found}");
    assert!(found.to_string().contains("step X.G01: expected operands worked before it"));
    let chain = format!("{}{}", step("X.G01", "X.G02"), step("X.G02", "T1.G01"));
    let found = report(&SAMPLE.replacen("## Member K1", &format!("{chain}## Member K1"), 1));
    assert!(found.ok(), "{found}");
    assert_eq!(found.coverage.orphans, ["X.G01"]);
}
