//! Whole packages: the same bytes every time, step numbers that stay put, files that appear together or not at all.
use calcsheaf::document::Templates;
use calcsheaf::package::{self, Package};
use std::collections::BTreeMap;
use std::fs;
use std::path::{Path, PathBuf};
use std::sync::LazyLock;

pub(crate) fn demos() -> Vec<PathBuf> {
    let folder = Path::new(env!("CARGO_MANIFEST_DIR")).join("demo-inputs");
    let mut found: Vec<PathBuf> = fs::read_dir(folder)
        .expect("demos")
        .map(|entry| entry.expect("entry").path())
        .filter(|path| path.extension().is_some_and(|e| e == "yaml"))
        .collect();
    found.sort();
    assert!(found.len() >= 4, "demos are missing");
    found
}

pub(crate) fn pack(text: &str, name: &str) -> Package {
    let solved = match package::solve(text) {
        Ok(solved) => solved,
        Err(refusal) => panic!("{name}:\n{}", refusal.render(name, calcsheaf::diagnostic::Colour::Never)),
    };
    solved.package(name, text, &Templates::built_in()).unwrap_or_else(|fault| panic!("{name}: {fault}"))
}

pub(crate) fn pack_file(path: &Path) -> (String, Package) {
    let text = fs::read_to_string(path).expect("input");
    let name = path.file_name().expect("name").to_string_lossy().into_owned();
    let package = pack(&text, &name);
    (text, package)
}

/// The packages of all demos and of the stored random structures.
pub(crate) fn many() -> &'static [(String, Package)] {
    static MANY: LazyLock<Vec<(String, Package)>> = LazyLock::new(|| {
        let files = demos().into_iter().chain(crate::published::cases("independent"));
        files.map(|path| pack_file(&path).1).map(|package| (package.stem.clone(), package)).collect()
    });
    assert!(MANY.len() > 40, "random structures are missing");
    &MANY
}

/// Step number to the whole text of its block.
fn steps(markdown: &str) -> BTreeMap<String, String> {
    let mut found = BTreeMap::new();
    let mut lines = markdown.lines();
    while let Some(line) = lines.next() {
        if let Some(number) = line.strip_prefix("```step ") {
            let body: Vec<&str> = lines.by_ref().take_while(|line| *line != "```").collect();
            assert!(found.insert(number.to_owned(), body.join("\n")).is_none(), "{number} stands twice");
        }
    }
    found
}

#[test]
fn the_same_input_gives_the_same_bytes() {
    for path in demos() {
        let ((_, one), (_, other)) = (pack_file(&path), pack_file(&path));
        assert_eq!(one.markdown, other.markdown);
        assert_eq!(one.results, other.results);
        assert_eq!(one.figures, other.figures);
    }
}

#[test]
fn every_step_of_every_demo_is_printed_once_and_closes() {
    for path in demos() {
        let (_, package) = pack_file(&path);
        let printed = steps(&package.markdown);
        for step in &package.sheet.steps {
            assert!(
                printed.contains_key(&step.number),
                "{}: {} is worked and not printed",
                path.display(),
                step.number
            );
            assert!(
                calcsheaf::sheet::digits::closes(step, &package.sheet.ledger),
                "{}: {} does not close",
                path.display(),
                step.number
            );
        }
        assert_eq!(printed.len(), package.sheet.steps.len(), "{}", path.display());
        for entry in package.sheet.ledger.entries().iter().filter(|entry| entry.printed.count == 0) {
            assert!(
                !entry.printed.is_negative() && !entry.printed.digits().contains('−'),
                "{} is a negative zero",
                entry.address
            );
        }
    }
}

/// The median operand of every demo needs no more than five significant digits.
#[test]
fn operands_are_short() {
    for path in demos() {
        let (_, package) = pack_file(&path);
        let mut digits: Vec<usize> = package
            .sheet
            .steps
            .iter()
            .flat_map(|step| &step.operands)
            .map(|(_, id)| package.sheet.ledger.entry(*id).printed.count.unsigned_abs())
            .filter(|count| *count > 0)
            .map(|count| count.to_string().len())
            .collect();
        digits.sort_unstable();
        assert!(digits[digits.len() / 2] <= 5, "{}: median {}", path.display(), digits[digits.len() / 2]);
    }
}

/// Edits of the portal that have nothing to do with what is compared.
#[test]
fn numbers_stay_put_and_the_rest_stays_byte_for_byte() {
    let path = demos().into_iter().find(|p| p.ends_with("pipe-support-portal.yaml")).expect("portal");
    let text = fs::read_to_string(path).expect("input");
    let before = steps(&pack(&text, "portal.yaml").markdown);
    let of_whole = |number: &str| number.starts_with("structure.");
    let apart = |text: &str| {
        // A second part of its own, written before everything else.
        text.replace("nodes:\n", "nodes:\n  Z1: {x: 20 m, y: 0 m}\n  Z2: {x: 24 m, y: 0 m}\n")
            .replace("supports:\n", "supports:\n  Z1: pinned\n  Z2: {hold: [y]}\n")
            .replace("members:\n", "members:\n  ZZ: {kind: frame, from: Z1, to: Z2, section: UPP, material: S275}\n")
    };
    for (what, edited) in [
        ("a part of its own", apart(&text)),
        ("a section nobody uses", text.replace("sections:\n", "sections:\n  SPARE: {shape: round, diameter: 20 mm}\n")),
        (
            "a load case nobody combines",
            text.replace("load_cases:\n", "load_cases:\n  SPARE:\n    loads:\n      - {at: C, fx: 1 kN}\n"),
        ),
        ("a title", text.replace("Pump-house pipe support", "Another title")),
    ] {
        assert_ne!(edited, text, "{what}: the edit found nothing");
        let after = steps(&pack(&edited, "portal.yaml").markdown);
        for (number, body) in &before {
            // Sums over the whole structure and self-weight of the new part are the only ones concerned.
            if of_whole(number) {
                assert!(after.contains_key(number), "{what}: {number} is gone");
            } else {
                assert_eq!(after.get(number), Some(body), "{what}: {number}");
            }
        }
    }
}

/// A changed load moves what it touches; what it does not touch keeps its number all the same.
#[test]
fn a_changed_load_renumbers_nothing() {
    let path = demos().into_iter().find(|p| p.ends_with("pipe-support-portal.yaml")).expect("portal");
    let text = fs::read_to_string(path).expect("input");
    let before = steps(&pack(&text, "portal.yaml").markdown);
    let edited = text.replacen("14 kN", "14.5 kN", 1);
    assert_ne!(edited, text);
    let after = steps(&pack(&edited, "portal.yaml").markdown);
    assert_eq!(before.keys().collect::<Vec<_>>(), after.keys().collect::<Vec<_>>());
    let geometry = |number: &str| number.contains(".G0") || number.contains(".P");
    for (number, body) in before.iter().filter(|(number, _)| geometry(number) && number.split('.').count() == 2) {
        // Only the printed digits of a member's own constants may follow its needs.
        let words = |text: &str| text.lines().take(2).map(str::to_owned).collect::<Vec<_>>();
        assert_eq!(words(&after[number]), words(body), "{number}");
    }
}
