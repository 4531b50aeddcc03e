//! The command line: the only room that reads and writes files and speaks to the terminal.
#![allow(clippy::disallowed_methods, reason = "files, environment and terminal belong here")]
mod files;
mod pack;
mod retrace;

use clap::{Parser, Subcommand};
use std::io::Write;
use std::process::ExitCode;

/// Calculation packages for small plane structures, made to be checked with a pocket calculator.
#[derive(Parser)]
#[command(name = "calcsheaf", version, about, max_term_width = 100)]
#[command(
    after_help = "Exit codes: 0 every check within its limit · 3 package written, some check beyond its limit ·\n\
2 the input cannot be used · 1 anything else.\n\n\
Example: calcsheaf pack demo-inputs/pipe-support-portal.yaml"
)]
struct Arguments {
    #[command(subcommand)]
    command: Command,
}

#[derive(Subcommand)]
enum Command {
    /// Solve a structure and write its package: Markdown, PDF, results, figures.
    Pack(pack::Pack),
    /// Read a package back and confirm every line of it.
    Retrace(retrace::Retrace),
}

/// What a command ends with, as the input contract sets it out.
#[derive(Clone, Copy, PartialEq, Eq, PartialOrd, Ord)]
enum Outcome {
    Good,
    BeyondLimit,
    Unusable,
    Failed,
}

impl Outcome {
    const fn code(self) -> u8 {
        match self {
            Self::Good => 0,
            Self::BeyondLimit => 3,
            Self::Unusable => 2,
            Self::Failed => 1,
        }
    }
}

/// Runs the command line of the process.
pub fn run() -> ExitCode {
    let arguments = match Arguments::try_parse() {
        Ok(arguments) => arguments,
        Err(error) => {
            let asked_for = !error.use_stderr();
            drop(error.print());
            return ExitCode::from(if asked_for { 0 } else { 1 });
        }
    };
    let outcome = match arguments.command {
        Command::Pack(pack) => pack.run(),
        Command::Retrace(retrace) => retrace.run(),
    };
    ExitCode::from(outcome.code())
}

/// Writes a line to the terminal; a closed pipe ends nothing.
fn say(text: &str) {
    drop(writeln!(std::io::stdout().lock(), "{text}"));
}

/// Writes a line to the error stream.
fn warn(text: &str) {
    drop(writeln!(std::io::stderr().lock(), "{text}"));
}
