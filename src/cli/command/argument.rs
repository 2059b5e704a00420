//! Arguments that several subcommands share.

use std::path::PathBuf;

use clap::{Arg, ArgAction, ArgMatches, value_parser};

/// `FILE…`
pub(super) fn files() -> Arg {
    Arg::new("files")
        .value_name("FILE")
        .value_parser(value_parser!(PathBuf))
        .num_args(1..)
        .required(true)
        .action(ArgAction::Append)
        .help("Sheets; `-` is standard input")
}

/// What was given for [`files`].
pub(super) fn files_of(matches: &ArgMatches) -> Vec<PathBuf> {
    matches.get_many::<PathBuf>("files").map(|paths| paths.cloned().collect()).unwrap_or_default()
}

/// A switch.
pub(super) fn switch(name: &'static str, help: &'static str) -> Arg {
    Arg::new(name).long(name).action(ArgAction::SetTrue).help(help)
}
