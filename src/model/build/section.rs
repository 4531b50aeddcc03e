//! `sections:` shapes with the dimensions their own tables ask for.
use super::super::Section;
use super::super::keys::{PLATE, SECTION, is_required, section_keys, takes_plates};
use super::fields::Fields;
use super::leaf;
use crate::catalogue::section::{self as shapes, Given, Param, Plate, SectionKind};
use crate::diagnostic::{Code, Diagnostics, nearest};
use crate::formula::Symbol;
use crate::input::{Raw, Shape};
use std::borrow::Cow;

/// Sections in file order; `None` for one that is at fault.
pub(super) fn read(root: &Fields<'_>, faults: &mut Diagnostics) -> Vec<Option<Section>> {
    let entries = root.entries("sections", faults).iter();
    entries.map(|field| section(&field.value, &field.key, faults)).collect()
}

/// Whether a section has a property, given or worked out.
pub(super) fn has(section: &Section, property: &Symbol) -> bool {
    // The steps of every other shape end with all properties known.
    section.kind.name() != "given" || section.given.get(property).is_some()
}

fn section(raw: &Raw, name: &str, faults: &mut Diagnostics) -> Option<Section> {
    let subject = format!("section `{name}`");
    let kind = shape(raw, &subject, faults)?;
    let keys = section_keys(kind);
    let before = faults.len();
    let fields = Fields::with_keys(raw, subject, Cow::Owned(keys), faults)?;
    let given = Given {
        values: values(&fields, kind, faults),
        plates: if takes_plates(kind) { plates(&fields, faults) } else { Vec::new() },
        turned: fields.flag("turned", faults).unwrap_or(false),
    };
    if given.turned && kind.name() == "given" {
        let fault = fields.get("turned").unwrap_or(raw).error(Code::NotTogether);
        let fault = fault.message(format!("{} is read from a table and cannot be turned", fields.subject));
        faults.push(fault.label("not with `given`").help("give the values about the axis of bending instead"));
    }
    let own_shear_area = kind.params().iter().find(|param| param.key == "shear_area");
    let shear_area = match own_shear_area {
        Some(param) => given.get(&param.symbol),
        None => fields.quantity("shear_area", faults),
    };
    let source = fields.text("source", faults);
    // Whether dimensions fit together can be asked only when all of them were understood.
    if faults.len() > before {
        return None;
    }
    for (key, reason) in kind.faults(&given) {
        let at = fields.raw_of(key).unwrap_or(raw);
        let fault = at.error(Code::BadSection).message(format!("the dimensions of {} make no section", fields.subject));
        faults.push(fault.label(reason));
    }
    (faults.len() == before).then(|| Section { name: name.to_owned(), kind, given, shear_area, source })
}

fn shape(raw: &Raw, subject: &str, faults: &mut Diagnostics) -> Option<&'static dyn SectionKind> {
    let Shape::Map(fields) = &raw.shape else {
        // Reported by opening the block, with the keys every shape has.
        let _ = Fields::open(raw, subject.to_owned(), &SECTION, faults);
        return None;
    };
    let names = || shapes::ALL.iter().map(|kind| kind.name());
    let Some(field) = fields.iter().find(|field| field.key == "shape") else {
        let fault =
            raw.error(Code::MissingKey).message(format!("{subject} has no `shape`")).label("`shape` is missing");
        faults.push(fault.help(format!("shapes are {}", leaf::listed(names(), "and"))));
        return None;
    };
    let word = match leaf::typed(&field.value, &format!("`shape` of {subject}")) {
        Ok(word) => word,
        Err(fault) => {
            faults.push(fault.help(format!("shapes are {}", leaf::listed(names(), "and"))));
            return None;
        }
    };
    let found = shapes::find(word);
    if found.is_none() {
        let fault = field.value.error(Code::UnknownWord).message(format!("`shape` of {subject} cannot be `{word}`"));
        let fault = fault.label("no such shape");
        let listed = leaf::listed(names(), "and");
        faults.push(match nearest(word, names()) {
            Some(near) => fault.help(format!("the nearest shape is `{near}`; shapes are {listed}")),
            None => fault.help(format!("shapes are {listed}")),
        });
    }
    found
}

fn values(fields: &Fields<'_>, kind: &dyn SectionKind, faults: &mut Diagnostics) -> Vec<(Symbol, f64)> {
    let value = |param: &Param, faults: &mut Diagnostics| match fields.get(param.key) {
        Some(_) => fields.quantity(param.key, faults),
        None if is_required(kind, param) => None,
        None => param.default,
    };
    kind.params().iter().filter_map(|param| Some((param.symbol.clone(), value(param, faults)?))).collect()
}

fn plates(fields: &Fields<'_>, faults: &mut Diagnostics) -> Vec<Plate> {
    let items = fields.items("plates", faults);
    if let Some(raw) =
        fields.get("plates").filter(|raw| items.is_empty() && matches!(raw.shape, Shape::List(_) | Shape::Null(_)))
    {
        let fault = raw.error(Code::BadSection).message(format!("{} has no plates", fields.subject));
        faults.push(fault.label("none are listed"));
    }
    let mut list = Vec::new();
    for (at, raw) in items.iter().enumerate() {
        let subject = format!("plate {} of {}", at + 1, fields.subject);
        let Some(plate) = Fields::open(raw, subject, &PLATE, faults) else { continue };
        let mut length = |key| plate.quantity(key, faults).unwrap_or(f64::NAN);
        list.push(Plate { width: length("width"), height: length("height"), at: length("at") });
    }
    list
}
