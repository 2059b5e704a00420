//! `gaswright completions`: a script that completes the command line in a shell.

use clap::{Arg, ArgMatches, Command, value_parser};
use clap_complete::Shell;

use crate::cli::console::Console;
use crate::cli::{ExitCode, command_line};

/// How the arguments are read.
pub(in crate::cli) fn command() -> Command {
    Command::new("completions")
        .about("Write the completions of a shell to standard output")
        .arg(Arg::new("shell").value_name("SHELL").value_parser(value_parser!(Shell)).required(true).help("The shell"))
}

/// Writes the script.
pub(in crate::cli) fn run(matches: &ArgMatches, console: &mut Console) -> ExitCode {
    let Some(shell) = matches.get_one::<Shell>("shell") else {
        return console.wrong("say for which shell");
    };
    let mut script = Vec::new();
    clap_complete::generate(*shell, &mut command_line::command(), "gaswright", &mut script);
    console.result(&String::from_utf8_lossy(&script));
    ExitCode::Success
}
