//! `project:` titles, people, revisions and prose.
use super::super::keys::{ASSUMPTION, BASIS, PERSON, PROJECT, REVISION};
use super::super::{Assumption, Basis, Person, Project, Revision};
use super::fields::Fields;
use super::leaf;
use crate::diagnostic::{Code, Diagnostics};

pub(super) fn read(root: &Fields<'_>, faults: &mut Diagnostics) -> Project {
    let Some(raw) = root.get("project") else { return Project::default() };
    let Some(project) = Fields::open(raw, "`project`".to_owned(), &PROJECT, faults) else { return Project::default() };
    Project {
        title: project.text("title", faults).unwrap_or_default(),
        number: project.text("number", faults),
        part: project.text("part", faults),
        client: project.text("client", faults),
        prepared_by: person(&project, "prepared_by", faults),
        checked_by: person(&project, "checked_by", faults),
        approved_by: person(&project, "approved_by", faults),
        revision: project.text("revision", faults),
        status: project.text("status", faults),
        revisions: revisions(&project, faults),
        purpose: project.text("purpose", faults),
        basis: basis(&project, faults),
        assumptions: assumptions(&project, faults),
        notes: project.text("notes", faults),
    }
}

fn person(project: &Fields<'_>, key: &str, faults: &mut Diagnostics) -> Person {
    let Some(raw) = project.get(key) else { return Person::default() };
    let Some(person) = Fields::open(raw, format!("`{key}`"), &PERSON, faults) else { return Person::default() };
    Person { name: person.text("name", faults), date: person.text("date", faults) }
}

fn revisions(project: &Fields<'_>, faults: &mut Diagnostics) -> Vec<Revision> {
    let items = project.items("revisions", faults).iter().enumerate();
    let mut list: Vec<Revision> = Vec::new();
    for (at, raw) in items {
        let Some(row) = Fields::open(raw, format!("revision {}", at + 1), &REVISION, faults) else { continue };
        let affects =
            row.items("affects", faults).iter().filter_map(|item| match leaf::typed(item, &row.what("affects")) {
                Ok(text) => Some(text.to_owned()),
                Err(fault) => {
                    faults.push(fault);
                    None
                }
            });
        let affects = affects.collect();
        let mark = row.text("mark", faults).unwrap_or_default();
        refuse_repeated(&row, "mark", &mark, list.iter().map(|r| r.mark.as_str()), faults);
        list.push(Revision {
            mark,
            date: row.text("date", faults),
            by: row.text("by", faults),
            text: row.text("text", faults),
            affects,
        });
    }
    list
}

fn basis(project: &Fields<'_>, faults: &mut Diagnostics) -> Vec<Basis> {
    let mut list: Vec<Basis> = Vec::new();
    for (at, raw) in project.items("basis", faults).iter().enumerate() {
        let Some(row) = Fields::open(raw, format!("basis {}", at + 1), &BASIS, faults) else { continue };
        let mark = row.text("mark", faults).unwrap_or_default();
        refuse_repeated(&row, "mark", &mark, list.iter().map(|b| b.mark.as_str()), faults);
        list.push(Basis { mark, text: row.text("text", faults).unwrap_or_default() });
    }
    list
}

fn assumptions(project: &Fields<'_>, faults: &mut Diagnostics) -> Vec<Assumption> {
    let items = project.items("assumptions", faults).iter().enumerate();
    let mut list = Vec::new();
    for (at, raw) in items {
        let Some(row) = Fields::open(raw, format!("assumption {}", at + 1), &ASSUMPTION, faults) else { continue };
        list.push(Assumption {
            text: row.text("text", faults).unwrap_or_default(),
            confirm: row.flag("confirm", faults).unwrap_or(false),
        });
    }
    list
}

/// A mark is referred to, so it must stand for one row alone.
fn refuse_repeated<'a>(
    row: &Fields<'_>,
    key: &str,
    mark: &str,
    mut earlier: impl Iterator<Item = &'a str>,
    faults: &mut Diagnostics,
) {
    if let Some(raw) = row.get(key).filter(|_| !mark.is_empty())
        && earlier.any(|other| other == mark)
    {
        let fault = raw.error(Code::NamedTwice).message(format!("the mark `{mark}` is given twice"));
        faults.push(fault.label("an earlier row has it").help("give each row a mark of its own"));
    }
}
