//! `gaswright new`: a commented sheet to start from.

use std::path::PathBuf;

use clap::{Arg, ArgMatches, Command, value_parser};

use crate::cli::console::Console;
use crate::cli::sheet_file::is_standard_input;
use crate::cli::{ExitCode, output_file};
use crate::diagnostic::visible;

/// The sheet to start from.
pub(in crate::cli) const SHEET: &str = include_str!("new.gw");

/// How the arguments are read.
pub(in crate::cli) fn command() -> Command {
    Command::new("new").about("Write a commented sheet to start from; never overwrites a file").arg(
        Arg::new("file").value_name("FILE").value_parser(value_parser!(PathBuf)).help("Where to write it; without, to standard output"),
    )
}

/// Writes the sheet.
pub(in crate::cli) fn run(matches: &ArgMatches, console: &mut Console) -> ExitCode {
    let Some(path) = matches.get_one::<PathBuf>("file").filter(|path| !is_standard_input(path)) else {
        console.result(SHEET);
        return ExitCode::Success;
    };
    match output_file::create_new(path, SHEET) {
        Ok(()) => {
            let shown = visible(&path.to_string_lossy()).into_owned();
            console.note(&format!("{shown}: written; now `gaswright solve {shown}`, then `gaswright report {shown}`\n"));
            ExitCode::Success
        }
        Err(message) => console.wrong(&message),
    }
}

#[cfg(test)]
mod tests {
    use super::*;
    use crate::ExitStatus;

    #[test]
    fn the_sheet_solves_without_a_finding_and_is_in_canonical_layout() {
        let solved = crate::solve(SHEET);
        assert_eq!(solved.findings, []);
        assert_eq!(solved.exit_status(), ExitStatus::Solved);
        assert_eq!(crate::syntax::tidy(SHEET).as_deref(), Ok(SHEET));
        assert!(SHEET.lines().filter(|line| line.contains('#')).count() >= 5);
    }
}
