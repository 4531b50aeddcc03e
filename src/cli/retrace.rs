//! `retrace`: the checker's own tool. Reads a package back and confirms every line of it.
use super::{Outcome, say, warn};
use crate::retrace;
use clap::Args;
use std::path::{Path, PathBuf};

/// Read a package back from its Markdown alone and confirm every step, address, verdict and total.
#[derive(Args)]
#[command(after_help = "Example: calcsheaf retrace portal.md --input portal.yaml\n\n\
Exit code 0 only when all is confirmed, 3 when something is not, 2 when the file is no package.")]
pub(super) struct Retrace {
    /// The package's Markdown.
    #[arg(value_name = "PACKAGE")]
    package: PathBuf,
    /// The input, to confirm fingerprint and echo.
    #[arg(long, value_name = "FILE")]
    input: Option<PathBuf>,
}

impl Retrace {
    pub(super) fn run(&self) -> Outcome {
        let Some(text) = text_of(&self.package) else { return Outcome::Unusable };
        let input = match &self.input {
            None => None,
            Some(path) => match text_of(path) {
                Some(text) => Some(text),
                None => return Outcome::Unusable,
            },
        };
        let package = match retrace::read(&text) {
            Ok(package) => package,
            Err(refusal) => {
                warn(&format!("error: `{}` cannot be retraced: {refusal}", self.package.display()));
                return Outcome::Unusable;
            }
        };
        let report = retrace::confirm(&package, input.as_deref());
        say(report.to_string().trim_end());
        if report.ok() { Outcome::Good } else { Outcome::BeyondLimit }
    }
}

fn text_of(path: &Path) -> Option<String> {
    match std::fs::read(path).map(String::from_utf8) {
        Ok(Ok(text)) => Some(text),
        Ok(Err(_)) => {
            warn(&format!("error: `{}` is not UTF-8 text", path.display()));
            None
        }
        Err(error) => {
            warn(&format!("error: `{}` cannot be read: {error}", path.display()));
            None
        }
    }
}
