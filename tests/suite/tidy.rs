//! The rules of the house, held by a test: who may import whom, what every file must carry.
use std::fs;
use std::path::{Path, PathBuf};

/// Rooms and the rooms they may use.
const IMPORTS: &[(&str, &[&str])] = &[
    ("cores", &[]),
    ("units", &[]),
    ("diagnostic", &[]),
    ("formula", &["units"]),
    ("catalogue", &["formula", "units", "model"]),
    ("input", &["diagnostic"]),
    ("model", &["catalogue", "diagnostic", "formula", "input", "units"]),
    ("analysis", &["model", "units"]),
    ("work", &["analysis", "catalogue", "formula", "model", "units"]),
    ("sheet", &["analysis", "catalogue", "figure", "formula", "model", "units", "work"]),
    ("figure", &["catalogue", "model", "units"]),
    ("document", &["cores", "units"]),
    ("typeset", &["cores", "document", "figure", "formula", "model", "sheet", "units"]),
    ("write", &["analysis", "cores", "document", "figure", "formula", "model", "sheet", "typeset", "units", "work"]),
    ("retrace", &["diagnostic", "formula", "units"]),
    (
        "package",
        &[
            "analysis",
            "catalogue",
            "diagnostic",
            "document",
            "figure",
            "formula",
            "input",
            "model",
            "sheet",
            "typeset",
            "units",
            "work",
            "write",
        ],
    ),
];

/// External crates and the only rooms that use them.
const CRATES: &[(&str, &[&str])] = &[
    ("nalgebra", &["analysis"]),
    ("serde_yaml", &["input"]),
    ("saphyr_parser", &["diagnostic"]),
    ("annotate_snippets", &["diagnostic"]),
    ("strsim", &["diagnostic"]),
    ("minijinja", &["document"]),
    ("pulldown_cmark", &["document"]),
    ("printpdf", &["write"]),
    ("lopdf", &["write"]),
    ("flate2", &["write"]),
    ("subsetter", &["typeset", "write"]),
    ("ttf_parser", &["typeset", "write"]),
    ("serde_json", &["write"]),
    ("clap", &["cli"]),
];

fn sources() -> Vec<PathBuf> {
    fn walk(folder: &Path, found: &mut Vec<PathBuf>) {
        let mut entries: Vec<PathBuf> =
            fs::read_dir(folder).expect("folder").map(|e| e.expect("entry").path()).collect();
        entries.sort();
        for path in entries {
            if path.is_dir() {
                walk(&path, found);
            } else if path.extension().is_some_and(|e| e == "rs") {
                found.push(path);
            }
        }
    }
    let mut found = Vec::new();
    walk(&Path::new(env!("CARGO_MANIFEST_DIR")).join("src"), &mut found);
    assert!(found.len() > 40, "sources not found");
    found
}

fn room(path: &Path) -> String {
    let inside = path.strip_prefix(Path::new(env!("CARGO_MANIFEST_DIR")).join("src")).expect("under src");
    let first = inside.components().next().expect("component").as_os_str().to_string_lossy().into_owned();
    first.trim_end_matches(".rs").to_owned()
}

/// The part of a file that is not its own tests.
fn without_tests(text: &str) -> &str {
    text.find("#[cfg(test)]").map_or(text, |at| &text[..at])
}

#[test]
fn rooms_import_only_what_the_house_allows() {
    let mut faults = Vec::new();
    for path in sources() {
        let room = room(&path);
        let text = fs::read_to_string(&path).expect("text");
        let Some((_, allowed)) = IMPORTS.iter().find(|(name, _)| *name == room) else {
            assert!(["cli", "lib", "main"].contains(&room.as_str()), "{room} is in no row of the house");
            continue;
        };
        for (at, line) in without_tests(&text).lines().enumerate() {
            if line.trim_start().starts_with("//") {
                continue;
            }
            for (found, _) in line.match_indices("crate::") {
                let other: String =
                    line[found + 7..].chars().take_while(|c| c.is_alphanumeric() || *c == '_').collect();
                if !other.is_empty()
                    && other != room
                    && IMPORTS.iter().any(|(name, _)| *name == other)
                    && !allowed.contains(&other.as_str())
                {
                    faults.push(format!("{}:{}: {room} uses {other}", path.display(), at + 1));
                }
            }
        }
    }
    assert!(faults.is_empty(), "{}", faults.join("\n"));
}

#[test]
fn outside_crates_stay_in_their_rooms() {
    let mut faults = Vec::new();
    for path in sources() {
        let room = room(&path);
        let text = fs::read_to_string(&path).expect("text");
        for (name, rooms) in CRATES {
            let used = text.lines().any(|line| {
                !line.trim_start().starts_with("//")
                    && (line.contains(&format!("{name}::")) || line.contains(&format!("use {name}")))
            });
            if used && !rooms.contains(&room.as_str()) {
                faults.push(format!("{}: {name} belongs to {rooms:?}", path.display()));
            }
        }
        let touches_files = without_tests(&text).lines().any(|line| {
            !line.trim_start().starts_with("//")
                && (line.contains("std::fs") || line.contains("std::env::var") || line.contains("SystemTime::now"))
        });
        if touches_files && room != "cli" {
            faults.push(format!("{}: files, clock and environment belong to cli", path.display()));
        }
    }
    assert!(faults.is_empty(), "{}", faults.join("\n"));
}

#[test]
fn every_file_says_what_it_is_and_stays_short() {
    let mut faults = Vec::new();
    for path in sources() {
        let text = fs::read_to_string(&path).expect("text");
        if !text.starts_with("//!") {
            faults.push(format!("{}: no `//!` line", path.display()));
        }
        let lines = text.lines().count();
        if lines > 500 {
            faults.push(format!("{}: {lines} lines", path.display()));
        }
        let stem = path.file_stem().expect("stem").to_string_lossy();
        if ["util", "utils", "common", "helpers", "misc"].contains(&&*stem) {
            faults.push(format!("{}: the name says nothing", path.display()));
        }
    }
    assert!(faults.is_empty(), "{}", faults.join("\n"));
}
