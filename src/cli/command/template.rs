//! `gaswright template`: the built-in templates of the report, to be changed and used with `report --template`.

use std::fs;
use std::path::PathBuf;

use clap::{Arg, ArgMatches, Command, value_parser};

use crate::cli::console::Console;
use crate::cli::sheet_file::reason;
use crate::cli::{ExitCode, output_file};
use crate::diagnostic::visible;
use crate::report::built_in_templates;

/// How the arguments are read.
pub(in crate::cli) fn command() -> Command {
    Command::new("template")
        .about("Write the built-in templates of the report into a folder, for `report --template DIR`; never overwrites a file")
        .arg(
            Arg::new("folder")
                .value_name("DIR")
                .value_parser(value_parser!(PathBuf))
                .required(true)
                .help("The folder; made where it is missing"),
        )
}

/// Writes the templates, all or none.
pub(in crate::cli) fn run(matches: &ArgMatches, console: &mut Console) -> ExitCode {
    let folder = matches.get_one::<PathBuf>("folder").cloned().unwrap_or_default();
    for (name, _) in built_in_templates() {
        let path = folder.join(name);
        if path.symlink_metadata().is_ok() {
            return console.wrong(&format!("{}: exists already; no template is written", path.display()));
        }
    }
    if let Err(error) = fs::create_dir_all(&folder) {
        return console.wrong(&format!("{}: {}", folder.display(), reason(&error)));
    }
    for (name, text) in built_in_templates() {
        let path = folder.join(name);
        match output_file::create_new(&path, text) {
            Ok(()) => console.result_line(&visible(&path.to_string_lossy())),
            Err(message) => return console.wrong(&message),
        }
    }
    ExitCode::Success
}
