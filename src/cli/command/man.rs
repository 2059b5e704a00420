//! `gaswright man`: the manual pages.

use std::fs;
use std::path::{Path, PathBuf};

use clap::{Arg, ArgMatches, Command, value_parser};
use clap_mangen::Man;

use crate::cli::console::Console;
use crate::cli::sheet_file::reason;
use crate::cli::{ExitCode, command_line, output_file};
use crate::diagnostic::visible;

/// How the arguments are read.
pub(in crate::cli) fn command() -> Command {
    Command::new("man").about("Write the manual pages into a folder: gaswright.1 and one for each subcommand").arg(
        Arg::new("folder")
            .value_name("DIR")
            .value_parser(value_parser!(PathBuf))
            .required(true)
            .help("The folder; made where it is missing"),
    )
}

/// Writes the pages.
pub(in crate::cli) fn run(matches: &ArgMatches, console: &mut Console) -> ExitCode {
    let folder = matches.get_one::<PathBuf>("folder").cloned().unwrap_or_default();
    if let Err(error) = fs::create_dir_all(&folder) {
        return console.wrong(&format!("{}: {}", folder.display(), reason(&error)));
    }
    let mut whole = command_line::command();
    // Building gives each subcommand the name that its page has: `gaswright-check`.
    whole.build();
    let pages = std::iter::once(&whole).chain(whole.get_subcommands());
    pages.map(|command| write(console, &folder, command.clone().disable_help_subcommand(true))).fold(ExitCode::Success, ExitCode::graver)
}

/// Writes one page and its path.
fn write(console: &mut Console, folder: &Path, command: Command) -> ExitCode {
    let man = Man::new(command);
    let path = folder.join(man.get_filename());
    let mut page = Vec::new();
    let rendered = man.render(&mut page);
    let written = rendered.map_err(|error| format!("{}: {}", path.display(), reason(&error)));
    match written.and_then(|()| output_file::replace(&path, &String::from_utf8_lossy(&page))) {
        Ok(()) => {
            console.result_line(&visible(&path.to_string_lossy()));
            ExitCode::Success
        }
        Err(message) => console.wrong(&message),
    }
}
