//! `pack`: solves a structure and writes its package.
use super::files::{Output, write_all};
use super::{Outcome, say, warn};
use crate::diagnostic::Colour;
use crate::document::Templates;
use crate::package;
use crate::typeset::Fonts;
use clap::Args;
use std::io::IsTerminal;
use std::path::{Path, PathBuf};

/// Solve a structure and write its package.
#[derive(Args)]
#[command(after_help = "Example: calcsheaf pack portal.yaml --out packages")]
pub(super) struct Pack {
    /// Input files.
    #[arg(required = true, value_name = "INPUT")]
    inputs: Vec<PathBuf>,
    /// Folder for the package; beside the input where left out.
    #[arg(long, value_name = "DIR")]
    out: Option<PathBuf>,
    /// Write the brief without results instead, for a checker who works independently first.
    #[arg(long)]
    blind: bool,
}

impl Pack {
    pub(super) fn run(&self) -> Outcome {
        let templates = Templates::built_in();
        let fonts = Fonts::built_in();
        self.inputs.iter().map(|input| self.one(input, &templates, &fonts)).max().unwrap_or(Outcome::Good)
    }

    fn one(&self, input: &Path, templates: &Templates, fonts: &Fonts) -> Outcome {
        let shown = input.display().to_string();
        let bytes = match std::fs::read(input) {
            Ok(bytes) => bytes,
            Err(error) => {
                warn(&format!(
                    "error: `{shown}` cannot be read: {error}\nhelp: give the path of an input file, such as demo-inputs/pipe-support-portal.yaml"
                ));
                return Outcome::Unusable;
            }
        };
        let text = match String::from_utf8(bytes) {
            Ok(text) => text,
            Err(error) => {
                let at = error.utf8_error().valid_up_to();
                warn(&format!(
                    "error: `{shown}` is not UTF-8 text: byte {} cannot be read\nhelp: save the file as UTF-8 text",
                    at + 1
                ));
                return Outcome::Unusable;
            }
        };
        let colour = if std::io::stderr().is_terminal() && std::env::var_os("NO_COLOR").is_none() {
            Colour::Always
        } else {
            Colour::Never
        };
        let solved = match package::solve(&text) {
            Ok(solved) => solved,
            Err(refusal) => {
                warn(refusal.render(&shown, colour).trim_end());
                return Outcome::Unusable;
            }
        };
        if !solved.warnings.is_empty() {
            warn(solved.warnings.render(&solved.source, &shown, colour).trim_end());
        }
        let name = input.file_name().map_or_else(|| "input.yaml".into(), |name| name.to_string_lossy().into_owned());
        let stem = input.file_stem().map_or_else(|| "input".into(), |stem| stem.to_string_lossy().into_owned());
        let stem = if self.blind { format!("{stem}.brief") } else { stem };
        let made = if self.blind {
            solved.brief(&name, &text, templates).map_err(|fault| fault.to_string()).and_then(|brief| {
                let pdf = solved.pdf(&brief, fonts)?;
                Ok((brief, pdf))
            })
        } else {
            solved.package_and_pdf(&name, &text, templates, fonts)
        };
        let (package, pdf) = match made {
            Ok(made) => made,
            Err(fault) => {
                warn(&format!("error: {fault}"));
                return Outcome::Failed;
            }
        };
        let folder = self.out.clone().unwrap_or_else(|| input.parent().map_or_else(PathBuf::new, Path::to_path_buf));
        let mut outputs = vec![
            Output { path: folder.join(format!("{stem}.md")), bytes: package.markdown.into_bytes() },
            Output { path: folder.join(format!("{stem}.pdf")), bytes: pdf },
        ];
        if !self.blind {
            let path = folder.join(format!("{stem}.results.json"));
            outputs.push(Output { path, bytes: package.results.into_bytes() });
        }
        let drawings = folder.join(format!("{stem}.figures"));
        for (id, svg) in package.figures {
            outputs.push(Output { path: drawings.join(format!("{id}.svg")), bytes: svg.into_bytes() });
        }
        if let Err(fault) = write_all(&outputs) {
            warn(&format!(
                "error: `{}` cannot be written: {}\nhelp: earlier files are as they were; free room or choose another folder with --out",
                fault.path.display(),
                fault.error
            ));
            return Outcome::Failed;
        }
        if self.blind {
            say(&format!("{}: brief without results written", folder.join(&stem).display()));
            return Outcome::Good;
        }
        report(&folder, &stem, &solved, package.beyond);
        if package.beyond > 0 { Outcome::BeyondLimit } else { Outcome::Good }
    }
}

/// What matters of a package in a few lines.
fn report(folder: &Path, stem: &str, solved: &package::Solved, beyond: usize) {
    let checks = crate::sheet::sorted_checks(&solved.results);
    let unchecked = checks.iter().filter(|check| check.ok().is_none()).count();
    let within = checks.len() - unchecked - beyond;
    say(&format!(
        "{}: {within} checks within their limits, {beyond} beyond, {unchecked} not checked",
        folder.join(stem).display()
    ));
    if let Some(worst) = checks.first()
        && let Some(ratio) = worst.ratio
    {
        say(&format!(
            "  governing: {} at {}{}",
            worst.id,
            crate::sheet::ratio_text(ratio, 3),
            if ratio > 1.0 { "  BEYOND LIMIT" } else { "" }
        ));
    }
    let open = solved.model.project.assumptions.iter().filter(|a| a.confirm).count();
    if open > 0 {
        say(&format!("  PRELIMINARY: {open} assumption(s) to be confirmed"));
    }
    say(&format!("  written: {stem}.md, {stem}.pdf, {stem}.results.json, {stem}.figures/"));
    say("  Not for construction until checked and accepted by a person licensed where it is built.");
}
