//! Raw to Model: every rule of the language, every fault collected.
//!
//! A value that is at fault is replaced by a placeholder (NaN, or an index beyond every list) that no later rule takes
//! offence at, so one fault never hides or invents another. A model that holds a placeholder is never handed out.
mod case;
mod check;
mod combination;
mod display;
mod fields;
mod leaf;
mod load;
mod material;
mod member;
mod names;
mod node;
mod place;
mod project;
mod remarks;
mod section;
mod support;

use super::keys::ROOT;
use super::{Model, Reading};
use crate::diagnostic::{Address, Code, Diagnostic, Diagnostics, Source};
use crate::input::{self, Raw, Shape};
use crate::units::STANDARD_GRAVITY;
use fields::{FILE, Fields};
use leaf::typed;
use names::Directory;

/// Reads and understands a file.
///
/// # Errors
/// Every fault of the file, sorted by place, if it has any.
pub fn read(text: &str) -> Result<Reading, Diagnostics> {
    read_source(Source::new(text))
}

/// Reads and understands a file whose places are known.
///
/// # Errors
/// Every fault of the file, sorted by place, if it has any.
pub fn read_source(source: Source) -> Result<Reading, Diagnostics> {
    let raw = input::read(&source).map_err(|faults| faults.placed(&source))?;
    let (model, warnings) = build(&raw, &source)?;
    Ok(Reading { model, warnings, source })
}

/// Understands what was read; the warnings come with the model.
///
/// # Errors
/// Every fault of the file, sorted by place, if it has any. Warnings are left out then: many would be
/// consequences of the faults.
pub fn build(raw: &Raw, source: &Source) -> Result<(Model, Diagnostics), Diagnostics> {
    let mut faults = source.faults().clone();
    if let Some(fault) = version(raw) {
        let newer = fault.1;
        faults.push(fault.0);
        if newer {
            // What a later version means cannot be judged.
            return Err(faults.placed(source));
        }
    }
    let Some(root) = Fields::open(raw, FILE.to_owned(), &ROOT, &mut faults) else {
        return Err(faults.placed(source));
    };
    let model = model(&root, source, &mut faults);
    if faults.has_errors() {
        return Err(faults.errors().placed(source));
    }
    remarks::add(&model, raw, source, &mut faults);
    Ok((model, faults.placed(source)))
}

fn model(root: &Fields<'_>, source: &Source, faults: &mut Diagnostics) -> Model {
    let directory = Directory::new(root.raw, source, faults);
    let project = project::read(root, faults);
    let display = display::read(root, faults);
    let gravity = root.quantity("gravity", faults).unwrap_or(STANDARD_GRAVITY);
    let materials = material::read(root, faults);
    let sections = section::read(root, faults);
    let nodes = node::read(root, faults);
    let supports = support::read(root, &directory, faults);
    let context = member::Context { directory: &directory, materials: &materials, sections: &sections, nodes: &nodes };
    let members = member::read(root, &context, faults);
    for (block, what) in [("nodes", "nodes"), ("members", "members"), ("load_cases", "load cases")] {
        if let Some(raw) = root.get(block).filter(|_| names::entries(root.raw, block).is_empty())
            && matches!(raw.shape, Shape::Null(_) | Shape::Map(_))
        {
            let fault = raw.error(Code::NothingThere).message(format!("the file lists no {what}"));
            faults.push(fault.label("nothing is listed here"));
        }
    }
    let spans = place::Spans::new(&members, &nodes, &display);
    let scope = load::Scope {
        directory: &directory,
        spans: &spans,
        members: &members,
        materials: &materials,
        sections: &sections,
        supports: &supports,
    };
    let cases = case::read(root, &scope, faults);
    let combinations = combination::read(root, &directory, &cases, faults);
    let checks = check::read(root, &directory, faults);
    let sections = sections.into_iter().flatten().collect();
    Model { project, display, gravity, materials, sections, nodes, supports, members, cases, combinations, checks }
}

/// What is wrong with the version, and whether it is a later one.
fn version(raw: &Raw) -> Option<(Diagnostic, bool)> {
    const HELP: &str = "the first line of a file is `calcsheaf: 1`";
    let Shape::Map(fields) = &raw.shape else {
        let fault = Diagnostic::error(Code::Version, Address::root()).at(raw.pointer());
        return Some((fault.message("the file is no block of keys").label("no `calcsheaf: 1`").help(HELP), true));
    };
    let Some(at) = fields.iter().position(|field| field.key == "calcsheaf") else {
        // The missing key itself is reported with the others of the outermost block.
        return None;
    };
    let value = &fields[at].value;
    let fault = value.error(Code::Version);
    let text = match typed(value, "`calcsheaf`") {
        Ok(text) => text,
        Err(fault) => return Some((fault.help(HELP), false)),
    };
    if text != "1" {
        let newer = text.parse::<f64>().is_ok_and(|version| version > 1.0);
        let fault = fault.message(format!("`{text}` is no version of the input language that is known here"));
        let fault = fault.label(if newer { "newer than 1" } else { "not a version" });
        let help = if newer { "use a newer program, or write the file in version 1" } else { HELP };
        return Some((fault.help(help), newer));
    }
    (at > 0).then(|| {
        let fault = fault.message("`calcsheaf: 1` does not stand first").label("this must be the first key");
        (fault.at(fields[at].key_span.clone()).help("move the line to the top of the file"), false)
    })
}
