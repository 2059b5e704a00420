//! `gaswright schema`: the JSON Schema of the result.

use clap::{ArgMatches, Command};

use crate::cli::ExitCode;
use crate::cli::console::Console;

/// How the arguments are read.
pub(in crate::cli) fn command() -> Command {
    Command::new("schema").about("Write the JSON Schema of the result that `solve --json` gives")
}

/// Writes the schema.
pub(in crate::cli) fn run(_: &ArgMatches, console: &mut Console) -> ExitCode {
    console.result_line(crate::report::SCHEMA);
    ExitCode::Success
}
