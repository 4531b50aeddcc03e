//! One block of the file, read against its table of keys.
use super::super::keys::{Block, Key, Presence, Takes};
use super::leaf;
use super::names::Names;
use crate::diagnostic::{Code, Diagnostic, Diagnostics, nearest};
use crate::input::{Field, Raw, Shape};
use std::borrow::Cow;

/// A block whose keys are known to be those of its table.
pub(super) struct Fields<'a> {
    /// The block.
    pub(super) raw: &'a Raw,
    /// What it is, for messages: "member `M3`".
    pub(super) subject: String,
    fields: &'a [Field],
    keys: Cow<'a, [Key]>,
}

impl<'a> Fields<'a> {
    /// Opens a block: reports unknown keys and missing ones. `None` where it is no block of keys at all.
    pub(super) fn open(raw: &'a Raw, subject: String, block: &'a Block, faults: &mut Diagnostics) -> Option<Self> {
        Self::with_keys(raw, subject, Cow::Borrowed(&block.keys), faults)
    }

    pub(super) fn with_keys(
        raw: &'a Raw,
        subject: String,
        keys: Cow<'a, [Key]>,
        faults: &mut Diagnostics,
    ) -> Option<Self> {
        let fields: &[Field] = match &raw.shape {
            Shape::Map(fields) => fields,
            Shape::Null(_) => &[],
            _ => {
                let names = leaf::listed(keys.iter().map(|key| key.name), "and");
                let fault = leaf::wrong_form(raw, &subject, "a block of keys");
                faults.push(fault.help(format!("its keys are {names}")));
                return None;
            }
        };
        for field in fields.iter().filter(|field| keys.iter().all(|key| key.name != field.key)) {
            faults.push(unknown_key(field, &subject, &keys));
        }
        for key in keys.iter().filter(|key| key.presence == Presence::Required) {
            // A key that is there but misspelt is one fault, not two.
            let meant = |field: &Field| field.key == key.name || near(&field.key, &keys) == Some(key.name);
            if !fields.iter().any(meant) {
                faults.push(missing_key(raw, &subject, key));
            }
        }
        Some(Self { raw, subject, fields, keys })
    }

    pub(super) fn get(&self, key: &str) -> Option<&'a Raw> {
        debug_assert!(self.keys.iter().any(|k| k.name == key), "`{key}` is not in the table of {}", self.subject);
        self.fields.iter().find(|field| field.key == key).map(|field| &field.value)
    }

    /// The value of any key, whether the table has it or not.
    pub(super) fn raw_of(&self, key: &str) -> Option<&'a Raw> {
        self.fields.iter().find(|field| field.key == key).map(|field| &field.value)
    }

    fn takes(&self, key: &str) -> Option<Takes> {
        self.keys.iter().find(|k| k.name == key).map(|k| k.takes)
    }

    /// The key of this block, for messages: "`to` of member `M3`".
    pub(super) fn what(&self, key: &str) -> String {
        if self.subject == FILE { format!("`{key}`") } else { format!("`{key}` of {}", self.subject) }
    }

    /// Reads the value of a key, if it is there; a fault is reported.
    pub(super) fn read<T>(
        &self,
        key: &str,
        faults: &mut Diagnostics,
        read: impl FnOnce(&'a Raw, &str) -> Result<T, Diagnostic>,
    ) -> Option<T> {
        let raw = self.get(key)?;
        match read(raw, &self.what(key)) {
            Ok(value) => Some(value),
            Err(fault) => {
                let about = self.keys.iter().find(|k| k.name == key).filter(|_| fault.code == Code::NoValue);
                faults.push(match about {
                    Some(about) => fault.help(format!("`{key}`: {}", about.doc)),
                    None => fault,
                });
                None
            }
        }
    }

    pub(super) fn text(&self, key: &str, faults: &mut Diagnostics) -> Option<String> {
        let required = self.keys.iter().any(|k| k.name == key && k.presence == Presence::Required);
        self.read(key, faults, |raw, what| match leaf::text(raw, what)? {
            None if required => leaf::typed(raw, what).map(|text| Some(text.to_owned())),
            text => Ok(text),
        })
        .flatten()
    }

    pub(super) fn flag(&self, key: &str, faults: &mut Diagnostics) -> Option<bool> {
        self.read(key, faults, leaf::flag)
    }

    pub(super) fn word(&self, key: &str, faults: &mut Diagnostics) -> Option<&'static str> {
        let Some(Takes::Word(words)) = self.takes(key) else { return None };
        self.read(key, faults, |raw, what| leaf::word(raw, what, words))
    }

    pub(super) fn number(&self, key: &str, faults: &mut Diagnostics) -> Option<f64> {
        let Some(Takes::Number(sign)) = self.takes(key) else { return None };
        self.read(key, faults, |raw, what| leaf::number(raw, what, sign))
    }

    /// In SI units.
    pub(super) fn quantity(&self, key: &str, faults: &mut Diagnostics) -> Option<f64> {
        let Some(Takes::Quantity(measure, sign)) = self.takes(key) else { return None };
        self.read(key, faults, |raw, what| leaf::quantity(raw, what, measure, sign))
    }

    pub(super) fn reference(&self, key: &str, names: &Names, faults: &mut Diagnostics) -> Option<usize> {
        self.read(key, faults, |raw, what| names.find(raw, what))
    }

    /// The items of a list; a single value counts as a list of one where the table says so.
    pub(super) fn items(&self, key: &str, faults: &mut Diagnostics) -> &'a [Raw] {
        let Some(raw) = self.get(key) else { return &[] };
        match &raw.shape {
            Shape::List(items) => items,
            Shape::Null(_) => &[],
            _ if matches!(self.takes(key), Some(Takes::OneOrList(_))) => std::slice::from_ref(raw),
            _ => {
                let fault = leaf::wrong_form(raw, &self.what(key), "a list");
                faults.push(fault.help("a list stands in `[ ]`, or on lines that begin with `- `"));
                &[]
            }
        }
    }

    /// A block under a key.
    pub(super) fn block(&self, key: &str, block: &'a Block, faults: &mut Diagnostics) -> Option<Fields<'a>> {
        let raw = self.get(key)?;
        Fields::open(raw, self.what(key), block, faults)
    }

    /// The entries of a block whose keys are names.
    pub(super) fn entries(&self, key: &str, faults: &mut Diagnostics) -> &'a [Field] {
        let Some(raw) = self.get(key) else { return &[] };
        match &raw.shape {
            Shape::Map(fields) => fields,
            Shape::Null(_) => &[],
            _ => {
                let fault = leaf::wrong_form(raw, &self.what(key), "a block of names");
                faults.push(fault.help("each name stands on a line of its own, followed by a colon"));
                &[]
            }
        }
    }
}

/// The subject of the outermost block.
pub(super) const FILE: &str = "the file";

fn unknown_key(field: &Field, subject: &str, keys: &[Key]) -> Diagnostic {
    let fault = Diagnostic::error(Code::UnknownKey, field.value.address.clone()).at(field.key_span.clone());
    let fault = fault.message(format!("{subject} has no key `{}`", field.key)).label("unknown key");
    match near(&field.key, keys) {
        Some(near) => fault.help(format!("the nearest key is `{near}`")),
        None => fault.help(format!("its keys are {}", leaf::listed(keys.iter().map(|key| key.name), "and"))),
    }
}

/// The key that a misspelt one was meant to be.
fn near(typed: &str, keys: &[Key]) -> Option<&'static str> {
    if keys.iter().any(|key| key.name == typed) { None } else { nearest(typed, keys.iter().map(|key| key.name)) }
}

fn missing_key(raw: &Raw, subject: &str, key: &Key) -> Diagnostic {
    let code = if key.name == "calcsheaf" { Code::Version } else { Code::MissingKey };
    let fault = raw.error(code).message(format!("{subject} has no `{}`", key.name));
    fault.label(format!("`{}` is missing", key.name)).help(format!("`{}`: {}", key.name, key.doc))
}
