//! How much of what can go wrong with one mark in a step `retrace` sees, counted.
//!
//! Every step of a package is changed in one place at a time: every digit, sign, unit, operator, symbol, raised figure,
//! bracket, verdict and address, every line. [`judge`] says of each change, by a reader of its own, whether it makes the
//! step wrong by more than its closure; all of those must be seen.
mod change;
mod judge;
mod page;
mod tables;

use calcsheaf::retrace;
use change::{Change, changes};
use page::Page;
use std::collections::{BTreeMap, BTreeSet};
use std::fs;
use std::path::Path;

/// What the judge says of a change.
#[derive(Debug, Clone, Copy, PartialEq, Eq)]
enum Weight {
    /// The step is wrong by more than its closure.
    Beyond,
    /// Every line still closes and leads to a number that prints the same.
    Below,
    /// Words: no number depends on it.
    Words,
}

/// Changes of one class.
#[derive(Debug, Clone, Copy, Default)]
struct Count {
    beyond: usize,
    beyond_seen: usize,
    below: usize,
    below_seen: usize,
    words: usize,
    words_seen: usize,
}

/// A change that was not seen though it should have been.
type Unseen = (String, &'static str, String);

fn demo(name: &str) -> (String, Page) {
    let path = Path::new(env!("CARGO_MANIFEST_DIR")).join("demo-inputs").join(name);
    let text = fs::read_to_string(path).expect("demo");
    let page = Page::new(crate::packages::pack(&text, name).markdown);
    (text, page)
}

/// Changes a page step by step, takes every `stride`th change, and counts what is seen.
fn count(page: &Page, stride: usize, all: bool, counts: &mut BTreeMap<&'static str, Count>) -> Vec<Unseen> {
    let made: Vec<Vec<Change>> = (0..page.steps.len())
        .map(|at| {
            let others = page.others(at);
            let of_step = changes(page.body(at), &others, all);
            of_step
                .into_iter()
                .enumerate()
                .filter(|(n, _)| (n + 7 * at) % stride == 0)
                .map(|(_, change)| change)
                .collect()
        })
        .collect();
    let mut unseen = Vec::new();
    for group in page.groups() {
        let most = group.iter().map(|&at| made[at].len()).max().unwrap_or(0);
        for round in 0..most {
            let here: Vec<(usize, &Change)> = group.iter().filter_map(|&at| Some((at, made[at].get(round)?))).collect();
            let faulty = page.faulty_steps(&here);
            for (at, change) in here {
                let number = &page.steps[at].number;
                // A fault that shows elsewhere than in the step itself is looked for with nothing else changed.
                let is_seen = faulty.as_ref().is_some_and(|faulty| faulty.contains(number))
                    || page.faulty_steps(&[(at, change)]).is_none_or(|faulty| !faulty.is_empty());
                let weight = page.weight(at, change);
                let count = counts.entry(change.class).or_default();
                match weight {
                    Weight::Beyond => {
                        count.beyond += 1;
                        count.beyond_seen += usize::from(is_seen);
                    }
                    Weight::Below => {
                        count.below += 1;
                        count.below_seen += usize::from(is_seen);
                    }
                    Weight::Words => {
                        count.words += 1;
                        count.words_seen += usize::from(is_seen);
                    }
                }
                if !is_seen && weight != Weight::Below {
                    unseen.push((number.clone(), change.class, page.shown(at, change)));
                }
            }
        }
    }
    unseen
}

fn table(counts: &BTreeMap<&'static str, Count>) -> String {
    let mut lines = vec![format!(
        "{:<20}{:>10}{:>10}{:>9}{:>10}{:>10}{:>10}{:>10}",
        "class", "beyond", "seen", "share", "below", "seen", "words", "seen"
    )];
    let mut total = Count::default();
    let mut line = |name: &str, c: &Count| {
        let share = 100.0 * c.beyond_seen as f64 / c.beyond.max(1) as f64;
        lines.push(format!(
            "{name:<20}{:>10}{:>10}{share:>8.2}%{:>10}{:>10}{:>10}{:>10}",
            c.beyond, c.beyond_seen, c.below, c.below_seen, c.words, c.words_seen
        ));
    };
    for (class, c) in counts {
        line(class, c);
        total.beyond += c.beyond;
        total.beyond_seen += c.beyond_seen;
        total.below += c.below;
        total.below_seen += c.below_seen;
        total.words += c.words;
        total.words_seen += c.words_seen;
    }
    line("all", &total);
    lines.join("\n")
}

/// Counts go to the terminal, where `--nocapture` shows them.
#[expect(clippy::print_stdout, reason = "the share is what the run is for")]
#[track_caller]
fn check(name: &str, stride: usize, all: bool) {
    let (_, page) = demo(name);
    assert!(retrace::confirm(&retrace::read(&page.text).expect("a package"), None).ok(), "{name}");
    let mut counts = BTreeMap::new();
    let unseen = count(&page, stride, all, &mut counts);
    println!("{name}\n{}", table(&counts));
    let distinct: BTreeSet<&Unseen> = unseen.iter().collect();
    let shown: Vec<String> =
        distinct.iter().take(40).map(|(step, class, text)| format!("{step}, {class}: {text}")).collect();
    assert!(unseen.is_empty(), "{} changes not seen, such as\n{}", unseen.len(), shown.join("\n"));
}

#[test]
fn one_change_in_a_step_is_seen_wherever_it_falls() {
    check("hanger-rod.yaml", 37, false);
}

/// Every change in every step of the demos: `cargo test --release --test suite every_change -- --ignored --nocapture`.
#[test]
#[ignore = "takes minutes"]
fn every_change_in_every_step_of_the_demos_is_seen() {
    for name in ["hanger-rod.yaml", "pipe-support-portal.yaml"] {
        check(name, 1, true);
    }
}

#[expect(clippy::print_stdout, reason = "the share is what the run is for")]
#[track_caller]
fn check_tables(name: &str, stride: usize) {
    let (_, page) = demo(name);
    let (counts, unseen) = tables::count(&page.text, stride);
    println!("{name}\n{:<34}{:>8}{:>8}", "changes in tables", "made", "seen");
    for (kind, (seen, made)) in counts {
        println!("{kind:<34}{made:>8}{seen:>8}");
    }
    assert!(
        unseen.is_empty(),
        "{} changes not seen, such as\n{}",
        unseen.len(),
        unseen[..unseen.len().min(40)].join("\n")
    );
}

#[test]
fn what_is_not_seen_in_a_table_is_named_as_unconfirmed() {
    check_tables("hanger-rod.yaml", 13);
}

/// `cargo test --release --test suite every_change -- --ignored --nocapture`.
#[test]
#[ignore = "takes minutes"]
fn every_change_in_the_tables_of_the_demos_is_seen_or_named() {
    for name in ["hanger-rod.yaml", "pipe-support-portal.yaml", "pump-frame-hinged.yaml"] {
        check_tables(name, 1);
    }
}
