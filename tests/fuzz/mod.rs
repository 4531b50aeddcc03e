//! Nothing panics or hangs, whatever the bytes: five targets on a stored corpus, each with a generator that knows the
//! shape of what it spoils.
//!
//! Under `cargo test` every stored file and a few hundred inputs made of it are tried. Longer, with another seed and
//! seconds a target:
//! `FUZZ_SEED=7 FUZZ_SECONDS=60 cargo test --release --test suite fuzz_long -- --ignored --nocapture`.
//! An input that breaks a promise is printed; it belongs into `tests/fuzz/corpus/<target>` once mended.
mod spoil;
mod targets;

use spoil::Spoiler;
use std::fs;
use std::panic::{AssertUnwindSafe, catch_unwind};
use std::path::Path;
use std::time::{Duration, Instant};
use targets::TARGETS;

/// What is tried, and how inputs are made for it.
struct Target {
    name: &'static str,
    /// Texts that spoiled inputs are made of besides the corpus.
    seeds: fn() -> Vec<String>,
    /// Pieces that are put into them.
    words: &'static [&'static str],
    /// Does everything that the program would do, and checks what must hold. Says which way the input went.
    run: fn(&[u8]) -> &'static str,
    /// Inputs tried under `cargo test`.
    few: usize,
}

fn corpus(target: &Target) -> Vec<Vec<u8>> {
    let folder = Path::new(env!("CARGO_MANIFEST_DIR")).join("tests/fuzz/corpus").join(target.name);
    let mut paths: Vec<_> = fs::read_dir(folder).expect("corpus").map(|entry| entry.expect("entry").path()).collect();
    paths.sort();
    paths.into_iter().map(|path| fs::read(path).expect("stored input")).collect()
}

/// Tries the corpus, then inputs made of it until `goes_on` says no; gives how many, which ways they went, the slowest.
fn fuzz(target: &Target, seed: u64, goes_on: impl Fn(usize) -> bool) -> String {
    let stored = corpus(target);
    assert!(!stored.is_empty(), "no corpus for {}", target.name);
    let mut ways = std::collections::BTreeMap::new();
    let mut slowest = Duration::ZERO;
    let mut broken = Vec::new();
    let mut attempt = |input: &[u8]| {
        let start = Instant::now();
        let way = catch_unwind(AssertUnwindSafe(|| (target.run)(input))).unwrap_or_else(|fault| {
            let said = fault.downcast_ref::<String>().cloned().unwrap_or_default();
            broken.push(format!("{said}\n--- by\n{}\n---", String::from_utf8_lossy(input)));
            "BROKEN"
        });
        slowest = slowest.max(start.elapsed());
        if start.elapsed() > Duration::from_secs(60) {
            broken.push(format!("takes {:?}\n--- by\n{}\n---", start.elapsed(), String::from_utf8_lossy(input)));
        }
        *ways.entry(way).or_insert(0_usize) += 1;
    };
    stored.iter().for_each(|input| attempt(input));
    let texts: Vec<Vec<u8>> = stored.into_iter().chain((target.seeds)().into_iter().map(String::into_bytes)).collect();
    let mut spoiler = Spoiler::new(seed);
    for at in 0.. {
        if !goes_on(at) {
            break;
        }
        attempt(&spoiler.spoilt(&texts, target.words));
    }
    let tried: usize = ways.values().sum();
    let report = format!("{}: {tried} inputs, slowest {slowest:?}, {ways:?}", target.name);
    assert!(broken.is_empty(), "{report}\n{}", broken[..broken.len().min(8)].join("\n"));
    report
}

#[test]
fn fuzz_on_the_stored_corpus() {
    for target in TARGETS {
        fuzz(target, 1, |at| at < target.few);
    }
}

/// The documented longer run; see the head of this file.
#[expect(clippy::print_stdout, reason = "the count of inputs is what the run is for")]
#[test]
#[ignore = "takes minutes"]
fn fuzz_long() {
    let number = |name: &str, default: u64| std::env::var(name).ok().and_then(|n| n.parse().ok()).unwrap_or(default);
    let (seed, seconds) = (number("FUZZ_SEED", 2), number("FUZZ_SECONDS", 60));
    for target in TARGETS {
        let start = Instant::now();
        println!("{}", fuzz(target, seed, |_| start.elapsed() < Duration::from_secs(seconds)));
    }
}
