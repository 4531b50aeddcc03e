//! How long a package takes, part by part and as a whole process. `cargo bench --bench pack`
//!
//! No timing decides a test: machines differ and are noisy. Compare the parts of one run with each other.
use calcsheaf::document::Templates;
use calcsheaf::package;
use calcsheaf::typeset::Fonts;
use std::fs;
use std::hint::black_box;
use std::path::Path;
use std::process::{Command, Stdio};
use std::time::Instant;

/// Median of several runs, milliseconds.
fn median(mut run: impl FnMut()) -> f64 {
    let mut times: Vec<f64> = (0..15)
        .map(|_| {
            let start = Instant::now();
            run();
            start.elapsed().as_secs_f64() * 1e3
        })
        .collect();
    times.sort_by(f64::total_cmp);
    times[times.len() / 2]
}

#[allow(clippy::print_stdout, reason = "a benchmark reports to the terminal")]
fn main() {
    let folder = Path::new(env!("CARGO_MANIFEST_DIR")).join("demo-inputs");
    let out = Path::new(env!("CARGO_TARGET_TMPDIR")).join("bench");
    println!(
        "{:<22} {:>8} {:>9} {:>9} {:>9} {:>9} {:>9}",
        "demo", "sheets", "solve ms", "text ms", "set ms", "pdf ms", "process ms"
    );
    let mut demos: Vec<_> = fs::read_dir(folder)
        .expect("demos")
        .map(|e| e.expect("entry").path())
        .filter(|p| p.extension().is_some_and(|e| e == "yaml"))
        .collect();
    demos.sort();
    // `cargo bench --bench pack -- portal` runs the demos whose names hold that word.
    let wanted: Vec<String> = std::env::args().skip(1).filter(|a| !a.starts_with('-')).collect();
    demos.retain(|path| wanted.is_empty() || wanted.iter().any(|word| path.to_string_lossy().contains(word)));
    let (templates, fonts) = (Templates::built_in(), Fonts::built_in());
    for path in demos {
        let text = fs::read_to_string(&path).expect("demo");
        let name = path.file_name().expect("name").to_string_lossy().into_owned();
        let Ok(solved) = package::solve(&text) else { continue };
        let package = solved.package(&name, &text, &templates).expect("package");
        let solve = median(|| drop(black_box(package::solve(&text))));
        let write = median(|| drop(black_box(solved.package(&name, &text, &templates))));
        let pdf = median(|| drop(black_box(solved.pdf(&package, &fonts))));
        let set = median(|| {
            drop(black_box(calcsheaf::typeset::typeset(
                &package.document,
                &package.sheet,
                solved.model.display.paper,
                &fonts,
            )));
        });
        let process = median(|| {
            // What a file holds already is not written again: every run begins with an empty folder.
            drop(fs::remove_dir_all(&out));
            let status = Command::new(env!("CARGO_BIN_EXE_calcsheaf"))
                .arg("pack")
                .arg(&path)
                .arg("--out")
                .arg(&out)
                .stdout(Stdio::null())
                .stderr(Stdio::null())
                .status();
            assert!(status.is_ok_and(|s| matches!(s.code(), Some(0 | 3))));
        });
        let sheets = calcsheaf::typeset::typeset(&package.document, &package.sheet, solved.model.display.paper, &fonts)
            .sheets
            .len();
        println!(
            "{:<22} {sheets:>8} {solve:>9.1} {write:>9.1} {set:>9.1} {pdf:>9.1} {process:>9.1}",
            name.trim_end_matches(".yaml")
        );
    }
}
