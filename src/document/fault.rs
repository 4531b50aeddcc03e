//! What is wrong with a template.
use super::read::Unreadable;
use std::error::Error;
use std::fmt;

/// A template that cannot be printed.
#[derive(Debug, Clone, PartialEq, Eq)]
pub struct TemplateFault {
    /// The template's name.
    pub template: String,
    /// The line in it, from 1; none where it cannot be told.
    pub line: Option<usize>,
    /// What is wrong or missing.
    pub message: String,
}

impl fmt::Display for TemplateFault {
    fn fmt(&self, f: &mut fmt::Formatter<'_>) -> fmt::Result {
        write!(f, "template `{}`", self.template)?;
        if let Some(line) = self.line {
            write!(f, ", line {line}")?;
        }
        write!(f, ": {}", self.message)
    }
}

impl Error for TemplateFault {}

impl TemplateFault {
    /// What the template engine found wrong, told from the innermost template it names.
    pub(super) fn from_engine(error: &minijinja::Error, chapter: &str) -> Self {
        let mut innermost = error;
        while let Some(inner) = innermost.source().and_then(|inner| inner.downcast_ref::<minijinja::Error>()) {
            innermost = inner;
        }
        let said = innermost.detail().map_or_else(|| innermost.kind().to_string(), ToString::to_string);
        let expression = innermost
            .template_source()
            .zip(innermost.range())
            .and_then(|(source, range)| source.get(range))
            .filter(|expression| !expression.trim().is_empty());
        let message = match (expression, innermost.kind()) {
            (Some(expression), minijinja::ErrorKind::UndefinedError) => {
                format!("nothing is called `{}`", expression.trim())
            }
            (Some(expression), _) => format!("{said}, in `{}`", expression.trim()),
            (None, _) => said,
        };
        Self { template: innermost.name().unwrap_or(chapter).to_string(), line: innermost.line(), message }
    }

    /// What the chapter printed cannot be read; `text_of` gives the chapter's own text, to find the line.
    pub(super) fn from_print(unreadable: &Unreadable, chapter: &str, text: &str) -> Self {
        // Names are put in when the template is printed, so the line is known by its first words.
        let words = unreadable.words.trim();
        let start: Vec<&str> = words.split_whitespace().take(2).collect();
        let find = |words: &str| text.lines().position(|line| !words.is_empty() && line.contains(words));
        let line = find(words).or_else(|| find(&start.join(" "))).map(|at| at + 1);
        Self { template: chapter.to_string(), line, message: unreadable.message.clone() }
    }
}
