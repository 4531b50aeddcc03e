//! Text to [`Raw`]: maps, lists and leaves in the order of the file, every leaf still text as it was typed.
//!
//! The events of one parser give the text and its places; `serde_yaml`, which is a parser of its own, then reads the
//! file again, and a value that the two understand differently is refused ([`Code::TwoReadings`]).
mod confirm;
mod raw;

pub use raw::{Field, Raw, Shape};

use crate::diagnostic::{Address, Code, Diagnostic, Diagnostics, Source};

/// Reads the values of a file. Faults that leave the rest readable, repeated keys for one, stay in the source.
///
/// # Errors
/// The text is not YAML, holds no value, or two readers understand it differently.
pub fn read(source: &Source) -> Result<Raw, Diagnostics> {
    let Some(root) = source.root() else {
        let mut faults = source.faults().clone();
        if !faults.has_errors() {
            faults.push(empty());
        }
        return Err(faults);
    };
    // What is refused anyway need not be confirmed, and `serde_yaml` may not know it.
    if !source.faults().has_errors()
        && let Err(place) = confirm::confirm(source.text(), root)
    {
        let fault = Diagnostic::error(Code::TwoReadings, Address::root())
            .at(place)
            .message("two YAML readers understand this value differently")
            .label("not clear")
            .help("write it in a plainer way, in double quotes on one line for instance");
        return Err([fault].into_iter().collect());
    }
    Ok(Raw::of(root))
}

fn empty() -> Diagnostic {
    Diagnostic::error(Code::NothingThere, Address::root())
        .at(0..0)
        .message("the file is empty")
        .label("nothing here")
        .help("a file begins with `calcsheaf: 1`")
}

#[cfg(test)]
mod tests {
    use super::*;

    fn leaves(raw: &Raw, found: &mut Vec<String>) {
        match &raw.shape {
            Shape::Text(text) => found.push(text.clone()),
            Shape::Null(typed) => found.push(format!("<{typed}>")),
            Shape::List(items) => items.iter().for_each(|item| leaves(item, found)),
            Shape::Map(fields) => fields.iter().for_each(|field| {
                found.push(format!("{}:", field.key));
                leaves(&field.value, found);
            }),
        }
    }

    #[track_caller]
    fn check(text: &str, expected: &[&str]) {
        let raw = read(&Source::new(text)).unwrap_or_else(|faults| panic!("{faults:?}"));
        let mut found = Vec::new();
        leaves(&raw, &mut found);
        assert_eq!(found, expected);
    }

    #[test]
    fn leaves_and_keys_stay_as_typed() {
        check(
            "on: no\ny: 010\n1e3: 1.50\nnull: ~\n0x1F: true",
            &["on:", "no", "y:", "010", "1e3:", "1.50", "null:", "<~>", "0x1F:", "true"],
        );
        check("{name: , date: }", &["name:", "<>", "date:", "<>"]);
        check("a: 'null'\nb: null\nc: \"\"", &["a:", "null", "b:", "<null>", "c:", ""]);
        check("2026-11-30: 2026-11-30\n12:30: .inf", &["2026-11-30:", "2026-11-30", "12:30:", ".inf"]);
        check("a: &x [1, 2]\nb: *x", &["a:", "1", "2", "b:", "1", "2"]);
    }

    #[test]
    fn prose_blocks_are_read() {
        check(
            "a: |\n  one\n\n  two\nb: >-\n  one\n  two\n\n  three\nc: one\n  two",
            &["a:", "one\n\ntwo\n", "b:", "one two\nthree", "c:", "one two"],
        );
    }

    /// U+2028 ends a line for YAML 1.1 and not for YAML 1.2, and each of the two readers follows one of them.
    #[test]
    fn what_two_readers_understand_differently_is_refused_where_it_stands() {
        let text = "a: 1\nb: one\u{2028}two\n";
        let faults = read(&Source::new(text)).expect_err("the readers differ");
        let found: Vec<_> = faults.iter().map(|d| (d.code, d.span.clone())).collect();
        assert_eq!(found, [(Code::TwoReadings, Some(8..17))]);
    }

    #[test]
    fn nothing_is_no_file() {
        for text in ["", "\n", "# only a remark\n", "\u{feff}"] {
            assert!(read(&Source::new(text)).is_err(), "{text:?}");
        }
    }
}
