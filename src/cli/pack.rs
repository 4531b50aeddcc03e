//! `pack`: solves a structure and writes its package.
use super::files::{Fault, Output, Staged};
use super::{Outcome, say, warn};
use crate::diagnostic::Colour;
use crate::document::Templates;
use crate::package::{self, Solved, Texts};
use crate::typeset::Fonts;
use clap::Args;
use std::io::IsTerminal;
use std::path::{Path, PathBuf};
use std::sync::OnceLock;

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
        let fonts = OnceLock::new();
        std::thread::scope(|scope| {
            // The faces are read while the first structure is being solved.
            scope.spawn(|| fonts.get_or_init(Fonts::built_in));
            let fonts = || fonts.get_or_init(Fonts::built_in);
            self.inputs.iter().map(|input| self.one(input, &templates, &fonts)).max().unwrap_or(Outcome::Good)
        })
    }

    fn one<'f>(&self, input: &Path, templates: &Templates, fonts: &(impl Fn() -> &'f Fonts + Sync)) -> Outcome {
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
        let folder = self.out.clone().unwrap_or_else(|| input.parent().map_or_else(PathBuf::new, Path::to_path_buf));
        let written = if self.blind {
            let place = folder.join(format!("{stem}.brief"));
            brief(&solved, &name, &text, templates, fonts(), &place).map(|()| {
                say(&format!("{}: brief without results written", place.display()));
                Outcome::Good
            })
        } else {
            full(&solved, &name, &text, templates, fonts, &folder.join(&stem)).map(|beyond| {
                report(&folder, &stem, &solved, beyond);
                if beyond > 0 { Outcome::BeyondLimit } else { Outcome::Good }
            })
        };
        match written {
            Ok(outcome) => outcome,
            Err(fault) => {
                warn(&fault);
                Outcome::Failed
            }
        }
    }
}

/// Writes the brief without results.
fn brief(
    solved: &Solved,
    name: &str,
    text: &str,
    templates: &Templates,
    fonts: &Fonts,
    place: &Path,
) -> Result<(), String> {
    let error = |fault: &dyn std::fmt::Display| format!("error: {fault}");
    let brief = solved.brief(name, text, templates).map_err(|fault| error(&fault))?;
    let pdf = solved.pdf(&brief, fonts).map_err(|fault| error(&fault))?;
    let mut staged = Staged::default();
    let mut outputs = drawings(place, brief.figures);
    outputs.push(Output { path: with_ending(place, "md"), bytes: brief.markdown.into_bytes() });
    outputs.push(Output { path: with_ending(place, "pdf"), bytes: pdf });
    staged.add(&outputs).map_err(|fault| not_written(&fault))?;
    staged.publish(&[with_ending(place, "figures")]).map_err(|fault| not_written(&fault))
}

/// Writes a package and gives the number of checks beyond their limits. The texts are on their way to the disk while
/// the pages are still set.
fn full<'f>(
    solved: &Solved,
    name: &str,
    text: &str,
    templates: &Templates,
    fonts: &(impl Fn() -> &'f Fonts + Sync),
    place: &Path,
) -> Result<usize, String> {
    let mut staged = Staged::default();
    let texts_written = |texts: Texts| {
        let mut outputs = drawings(place, texts.figures);
        outputs.push(Output { path: with_ending(place, "results.json"), bytes: texts.results.into_bytes() });
        outputs.push(Output { path: with_ending(place, "md"), bytes: texts.markdown.into_bytes() });
        staged.add(&outputs)
    };
    let (package, texts_written, pdf) = solved
        .package_and_pdf(name, text, templates, fonts, texts_written)
        .map_err(|fault| format!("error: {fault}"))?;
    texts_written.map_err(|fault| not_written(&fault))?;
    let pdf = Output { path: with_ending(place, "pdf"), bytes: pdf };
    staged.add(&[pdf]).map_err(|fault| not_written(&fault))?;
    staged.publish(&[with_ending(place, "figures")]).map_err(|fault| not_written(&fault))?;
    Ok(package.beyond)
}

fn drawings(place: &Path, figures: Vec<(String, String)>) -> Vec<Output> {
    let folder = with_ending(place, "figures");
    figures
        .into_iter()
        .map(|(id, svg)| Output { path: folder.join(format!("{id}.svg")), bytes: svg.into_bytes() })
        .collect()
}

/// `<place>.<ending>`: what stands after the last point of a name is part of it.
fn with_ending(place: &Path, ending: &str) -> PathBuf {
    let mut name = place.file_name().unwrap_or_default().to_os_string();
    name.push(".");
    name.push(ending);
    place.with_file_name(name)
}

fn not_written(fault: &Fault) -> String {
    format!(
        "error: `{}` cannot be written: {}\nhelp: earlier files are as they were; free room or choose another folder with --out",
        fault.path.display(),
        fault.error
    )
}

/// What matters of a package in a few lines.
fn report(folder: &Path, stem: &str, solved: &Solved, beyond: usize) {
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
