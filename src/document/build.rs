//! Templates printed with facts, chapter by chapter, and read as blocks.
use super::fact::Fact;
use super::fault::TemplateFault;
use super::templates::{ORDER, Templates};
use super::visible::{escaped, visible_line};
use super::{Block, Document, Facts, RunningHead, anchor, marks, token};
use crate::cores::side_by_side;
use minijinja::syntax::SyntaxConfig;
use minijinja::value::Value;
use minijinja::{AutoEscape, Environment, Error, ErrorKind, Output, State, UndefinedBehavior};

/// Puts a package together.
///
/// In templates every value is escaped, so that text from the input stands as typed and on one line.
/// `{{ text|prose }}` lets text from the input keep its paragraphs, lists and emphasis; `{{ number|link }}` prints
/// the address of a step or a table as a link to it, `{{ number|short_link }}` the last part of a step's number. The module `marks` lists the marks that stand for what is no text.
///
/// # Errors
/// A template that is missing, cannot be parsed, names a fact that does not exist, or prints what cannot be read.
pub fn build(facts: &Facts, templates: &Templates) -> Result<Document, TemplateFault> {
    let environment = environment(templates)?;
    let known = facts.value();
    let chapters: Vec<(usize, &str)> = templates.chapters().collect();
    let read = |line: usize, chapter: &str| {
        let Some(text) = templates.text(chapter).filter(|_| chapter != ORDER) else {
            let message = format!("there is no template called `{chapter}`");
            return Err(TemplateFault { template: ORDER.into(), line: Some(line), message });
        };
        let printed = environment
            .get_template(chapter)
            .and_then(|template| template.render(known.clone()))
            .map_err(|error| TemplateFault::from_engine(&error, chapter))?;
        marks::blocks(&printed, facts).map_err(|unreadable| TemplateFault::from_print(&unreadable, chapter, text))
    };
    let parts = side_by_side(chapters.len(), || (), |(), at| read(chapters[at].0, chapters[at].1));
    let mut blocks = parts.into_iter().collect::<Result<Vec<_>, _>>()?.concat();
    anchor::set(&mut blocks);
    Ok(Document { head: head(facts), blocks })
}

fn environment(templates: &Templates) -> Result<Environment<'static>, TemplateFault> {
    let mut environment = Environment::new();
    environment.set_debug(true);
    // A tag on a line of its own leaves no line behind; a template that is included ends with its own line.
    environment.set_syntax(
        SyntaxConfig::builder()
            .trim_blocks(true)
            .lstrip_blocks(true)
            .keep_trailing_newline(true)
            .build()
            .map_err(|error| TemplateFault::from_engine(&error, ORDER))?,
    );
    environment.set_undefined_behavior(UndefinedBehavior::Strict);
    environment.set_auto_escape_callback(|_| AutoEscape::Custom("markdown".into()));
    environment.set_formatter(print);
    environment.add_filter("prose", |text: String| Value::from_safe_string(token::prose(&text)));
    environment.add_filter("link", |to: String| Value::from_safe_string(token::link(&to)));
    environment.add_filter("short_link", |to: String| Value::from_safe_string(token::short(&to)));
    for (name, text) in templates.iter().filter(|(name, _)| !name.starts_with(ORDER)) {
        environment
            .add_template_owned(name.to_string(), text.to_string())
            .map_err(|error| TemplateFault::from_engine(&error, name))?;
    }
    Ok(environment)
}

/// Prints a value so that it means itself; what templates themselves made is printed as it is.
fn print(out: &mut Output<'_>, _: &mut State<'_, '_>, value: &Value) -> Result<(), Error> {
    if value.is_undefined() {
        return Err(Error::from(ErrorKind::UndefinedError));
    }
    let text = value.to_string();
    let text = if value.is_safe() { text } else { escaped(&text) };
    out.write_str(&text).map_err(Error::from)
}

fn head(facts: &Facts) -> RunningHead {
    let project = &facts.project;
    let signed = |name: &str, date: &str| {
        let parts = [visible_line(name), visible_line(date)];
        parts.into_iter().filter(|part| !part.is_empty()).collect::<Vec<_>>().join(", ")
    };
    let of_revision = project.revisions.iter().rev().find(|revision| revision.mark == project.revision);
    let dates = [of_revision.map_or("", |revision| &revision.date), &project.prepared_by.date];
    RunningHead {
        title: visible_line(&project.title),
        number: visible_line(&project.number),
        part: visible_line(&project.part),
        client: visible_line(&project.client),
        revision: visible_line(&project.revision),
        status: visible_line(&project.status),
        prepared: signed(&project.prepared_by.name, &project.prepared_by.date),
        checked: signed(&project.checked_by.name, &project.checked_by.date),
        date: dates.into_iter().find(|date| is_date(date)).unwrap_or_default().to_string(),
        preliminary: project.assumptions.iter().any(|assumption| assumption.confirm),
        beyond_limit: facts.checks.beyond > 0,
    }
}

/// Whether a text reads `YYYY-MM-DD`.
fn is_date(text: &str) -> bool {
    let pattern = "dddd-dd-dd";
    text.len() == pattern.len()
        && text.chars().zip(pattern.chars()).all(|(c, p)| if p == 'd' { c.is_ascii_digit() } else { c == p })
}

/// Steps, tables and figures that a document prints, in reading order.
#[must_use]
pub fn printed(document: &Document) -> Vec<&Block> {
    fn walk<'a>(blocks: &'a [Block], found: &mut Vec<&'a Block>) {
        for block in blocks {
            match block {
                Block::Step(_) | Block::Table(_) | Block::Figure(_) => found.push(block),
                Block::Caution(inner) => walk(inner, found),
                Block::List { items, .. } => items.iter().for_each(|item| walk(item, found)),
                _ => {}
            }
        }
    }
    let mut found = Vec::new();
    walk(&document.blocks, &mut found);
    found
}
