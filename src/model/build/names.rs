//! Names and what they refer to.
use super::leaf::typed;
use crate::diagnostic::{Code, Diagnostic, Diagnostics, Source, nearest};
use crate::input::{Field, Raw, Shape};
use std::collections::BTreeMap;

/// The index of a name that refers to nothing. No model with one in it leaves the builder: the fault is reported.
pub(super) const UNKNOWN: usize = usize::MAX;

/// The names of one kind in file order.
pub(super) struct Names {
    /// Such as `node`.
    kind: &'static str,
    /// Such as `nodes`.
    block: &'static str,
    line: Option<usize>,
    index: BTreeMap<String, usize>,
    list: Vec<String>,
}

/// The names of every kind.
pub(super) struct Directory {
    pub(super) nodes: Names,
    pub(super) sections: Names,
    pub(super) materials: Names,
    pub(super) members: Names,
    pub(super) cases: Names,
}

impl Directory {
    /// All names, collected before anything else, so that order in the file does not matter.
    pub(super) fn new(root: &Raw, source: &Source, faults: &mut Diagnostics) -> Self {
        let mut names = |kind, block| Names::new(root, source, kind, block, faults);
        let directory = Self {
            nodes: names("node", "nodes"),
            sections: names("section", "sections"),
            materials: names("material", "materials"),
            members: names("member", "members"),
            cases: names("load case", "load_cases"),
        };
        names("combination", "combinations");
        directory
    }
}

impl Names {
    fn new(root: &Raw, source: &Source, kind: &'static str, block: &'static str, faults: &mut Diagnostics) -> Self {
        let entries = entries(root, block);
        for field in entries {
            if !is_name(&field.key) {
                let fault = Diagnostic::error(Code::BadName, field.value.address.clone()).at(field.key_span.clone());
                faults.push(
                    fault
                        .message(format!("`{}` is no name for a {kind}", field.key))
                        .label("not a name")
                        .help("a name is 1 to 24 of the characters A-Z a-z 0-9 _ -, starting with a letter or digit"),
                );
            }
        }
        let list: Vec<String> = entries.iter().map(|field| field.key.clone()).collect();
        let index = list.iter().enumerate().map(|(at, name)| (name.clone(), at)).collect();
        let line = source.line_of(&root.address.key(block));
        Self { kind, block, line, index, list }
    }

    /// What a value refers to.
    pub(super) fn find(&self, raw: &Raw, what: &str) -> Result<usize, Diagnostic> {
        let name = typed(raw, what)?;
        self.index.get(name).copied().ok_or_else(|| {
            let fault = raw.error(Code::UnknownReference);
            self.unknown(fault, name).message(format!("{what} names a {} that does not exist", self.kind))
        })
    }

    /// What a key refers to, in a block whose keys are names.
    pub(super) fn find_key(&self, field: &Field, message: &str) -> Result<usize, Diagnostic> {
        self.index.get(&field.key).copied().ok_or_else(|| {
            let fault =
                Diagnostic::error(Code::UnknownReference, field.value.address.clone()).at(field.key_span.clone());
            self.unknown(fault, &field.key).message(message)
        })
    }

    fn unknown(&self, fault: Diagnostic, name: &str) -> Diagnostic {
        let listed = match self.line {
            Some(line) => format!("{}s are listed under `{}:` (line {line})", self.kind, self.block),
            None => format!("{}s are listed under `{}:`, which the file does not have", self.kind, self.block),
        };
        let fault = fault.label(format!("no {} is called `{name}`", self.kind));
        match nearest(name, self.list.iter().map(String::as_str)) {
            Some(near) => fault.help(format!("the nearest name is `{near}`; {listed}")),
            None => fault.help(listed),
        }
    }

    pub(super) fn name(&self, index: usize) -> &str {
        self.list.get(index).map_or("?", String::as_str)
    }
}

/// The entries of a block of the file whose keys are names; none where it is missing, empty or no such block.
pub(super) fn entries<'a>(root: &'a Raw, block: &str) -> &'a [Field] {
    let Shape::Map(fields) = &root.shape else { return &[] };
    match fields.iter().find(|field| field.key == block).map(|field| &field.value.shape) {
        Some(Shape::Map(entries)) => entries,
        _ => &[],
    }
}

fn is_name(text: &str) -> bool {
    (1..=24).contains(&text.len())
        && text.bytes().all(|b| b.is_ascii_alphanumeric() || matches!(b, b'_' | b'-'))
        && text.bytes().next().is_some_and(|b| b.is_ascii_alphanumeric())
}

#[cfg(test)]
mod tests {
    use super::*;

    #[test]
    fn names_as_the_contract_has_them() {
        for name in ["A", "1", "10", "no", "1e3", "B-2_c", "abcdefghijklmnopqrstuvwx"] {
            assert!(is_name(name), "{name}");
        }
        for name in ["", "-A", "_A", "A B", "Ä", "A.B", "abcdefghijklmnopqrstuvwxy"] {
            assert!(!is_name(name), "{name}");
        }
    }
}
