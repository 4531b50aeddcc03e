//! Texts that are no package, and packages cut short.
use super::{SAMPLE, report};
use crate::retrace::{confirm, read};
use proptest::prelude::*;

#[test]
fn a_package_cut_short_is_never_confirmed() {
    let end_of_input = SAMPLE.rfind("````\n").expect("the input's fence") + 5;
    for at in (0..end_of_input).step_by(10) {
        let mut at = at;
        while !SAMPLE.is_char_boundary(at) {
            at -= 1;
        }
        if let Ok(package) = read(&SAMPLE[..at]) {
            assert!(!confirm(&package, None).ok(), "cut at {at}");
        }
    }
    assert!(read(&SAMPLE[..SAMPLE.len() - 4]).expect("a package").echo().is_some());
}

#[test]
fn refusals_say_what_is_missing() {
    #[track_caller]
    fn check(text: &str, words: &str) {
        let refusal = read(text).expect_err("no package").to_string();
        assert!(refusal.contains(words), "{refusal}");
    }
    check("", "no step");
    check("A letter.\n", "no step");
    check("```step A.G01\nx\n", "never closed");
    check("```step A.G01\nx\n```\n", "no SHA-256");
    let hex = "0123456789abcdef".repeat(4);
    check(&format!("```step A.G01\nx\n```\nSHA-256: {hex}\n"), "input file is not printed");
}

#[test]
fn deep_and_long_formulas_do_no_harm() {
    let deep = format!("{}x{}", "(".repeat(100_000), ")".repeat(100_000));
    let long = vec!["x·x"; 20_000].join(" + ");
    for formula in [deep, long] {
        let text = SAMPLE.replacen("W = b·h²/6", &format!("W = {formula}"), 1);
        assert!(!report(&text).ok());
    }
    // A chain of as many steps as a large package has.
    let mut chain = String::new();
    for at in 1..3000 {
        let from = if at == 1 { "T1.G01".to_owned() } else { format!("M{}.G01", at - 1) };
        chain.push_str(&format!("```step M{at}.G01\nA length\nx = y\n  = 5.000 m\n  = 5.000 m\nfrom: y {from}\n```\n"));
    }
    let found = report(&SAMPLE.replacen("## Member K1", &format!("{chain}\n## Member K1"), 1));
    assert!(found.ok(), "{}", found.coverage.steps);
    assert_eq!(found.coverage.steps_confirmed, 3009);
}

proptest! {
    #[test]
    fn any_text_is_refused_or_reported(text in any::<String>()) {
        let _ = read(&text).map(|package| confirm(&package, Some(&text)));
    }

    #[test]
    fn pieces_of_packages_are_refused_or_reported(
        pieces in prop::collection::vec((0_usize..SAMPLE.len(), 0_usize..300), 1..12),
        noise in "[`|−·/×⁻²()= \\n0-9a-z]{0,12}",
    ) {
        let mut text = String::new();
        for (start, length) in pieces {
            text.extend(SAMPLE.chars().skip(start).take(length));
            text.push_str(&noise);
        }
        text.push_str(&SAMPLE[SAMPLE.rfind("SHA-256").unwrap_or(0)..]);
        if let Ok(package) = read(&text) {
            let _ = confirm(&package, None).to_string();
        }
    }
}
