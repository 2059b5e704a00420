//! The command line: which subcommands there are, what they share, and the way to the one that is asked for.

use std::ffi::OsString;

use clap::builder::PossibleValuesParser;
use clap::{Arg, ArgMatches, Command, value_parser};

use super::ExitCode;
use super::command::{check, completions, explain, gases, man, new, report, schema, solve, template, tidy, units};
use super::console::{Console, notes_go_to_a_terminal, terminal_has_colour};

/// Most threads that may be asked for.
const MOST_THREADS: i64 = 1_024;

/// A subcommand: how its arguments are read, and what runs.
struct Subcommand {
    command: fn() -> Command,
    run: fn(&ArgMatches, &mut Console) -> ExitCode,
}

/// All of them, in the order of the help.
const SUBCOMMANDS: &[Subcommand] = &[
    Subcommand { command: check::command, run: check::run },
    Subcommand { command: solve::command, run: solve::run },
    Subcommand { command: report::command, run: report::run },
    Subcommand { command: tidy::command, run: tidy::run },
    Subcommand { command: new::command, run: new::run },
    Subcommand { command: gases::command, run: gases::run },
    Subcommand { command: units::command, run: units::run },
    Subcommand { command: explain::command, run: explain::run },
    Subcommand { command: schema::command, run: schema::run },
    Subcommand { command: template::command, run: template::run },
    Subcommand { command: completions::command, run: completions::run },
    Subcommand { command: man::command, run: man::run },
];

/// Runs the program with the arguments of its process, the first being its own name.
#[must_use]
pub fn run(arguments: impl IntoIterator<Item = OsString>) -> ExitCode {
    let mut console = Console::process();
    let code = run_on(arguments, &mut console);
    console.finish(code)
}

/// Runs the program with its output going to `console`.
fn run_on(arguments: impl IntoIterator<Item = OsString>, console: &mut Console) -> ExitCode {
    console.colour = terminal_has_colour();
    console.progress = notes_go_to_a_terminal();
    let matches = match command().try_get_matches_from(arguments) {
        Ok(matches) => matches,
        Err(error) => return tell(&error, console),
    };
    match matches.get_one::<String>("color").map(String::as_str) {
        Some("always") => console.colour = true,
        Some("never") => console.colour = false,
        _ => {}
    }
    console.threads = matches.get_one::<i64>("threads").map(|threads| *threads as usize);
    let Some((name, matches)) = matches.subcommand() else {
        return console.wrong("a subcommand is missing; `gaswright --help` lists them");
    };
    match SUBCOMMANDS.iter().find(|subcommand| (subcommand.command)().get_name() == name) {
        Some(subcommand) => (subcommand.run)(matches, console),
        None => console.wrong(&format!("`{name}` is no subcommand")),
    }
}

/// Writes help or version as a result, what is wrong with the arguments as a note.
fn tell(error: &clap::Error, console: &mut Console) -> ExitCode {
    let text = error.render();
    if error.use_stderr() {
        let text = if console.colour { text.ansi().to_string() } else { text.to_string() };
        console.note(&text);
        ExitCode::WrongUse
    } else {
        console.result(&text.to_string());
        ExitCode::Success
    }
}

/// The whole command line.
pub(super) fn command() -> Command {
    Command::new("gaswright")
        .version(env!("CARGO_PKG_VERSION"))
        .about("Gas calculations that a colleague can check: a text sheet in, an auditable report out")
        .after_help(
            "Exit status:\n  \
             0  everything holds\n  \
             1  a sheet has errors\n  \
             2  the command line is wrong, or a file cannot be read or written\n  \
             3  solved, but a requirement or a judged assumption fails\n\n\
             Start with `gaswright new first.gw`, then `gaswright solve first.gw` and `gaswright report first.gw`.",
        )
        .arg(
            Arg::new("color")
                .long("color")
                .value_name("WHEN")
                .value_parser(PossibleValuesParser::new(["auto", "always", "never"]))
                .default_value("auto")
                .hide_default_value(true)
                .global(true)
                .help("Colour findings; auto: on a terminal, unless NO_COLOR is set"),
        )
        .arg(
            Arg::new("threads")
                .long("threads")
                .value_name("N")
                .value_parser(value_parser!(i64).range(1..=MOST_THREADS))
                .global(true)
                .help("Threads for several sheets, all cores unless said; never changes a digit"),
        )
        .subcommands(SUBCOMMANDS.iter().map(|subcommand| (subcommand.command)()))
        .subcommand_required(true)
        .arg_required_else_help(true)
        .disable_help_subcommand(true)
        .infer_long_args(false)
}

#[cfg(test)]
mod tests {
    use super::*;
    use crate::cli::console::tests::Kept;

    fn run_with(arguments: &[&str]) -> (ExitCode, String, String) {
        let (results, notes) = (Kept::default(), Kept::default());
        let mut console = Console::new(Box::new(results.clone()), Box::new(notes.clone()));
        let arguments = std::iter::once("gaswright").chain(arguments.iter().copied()).map(OsString::from);
        let code = run_on(arguments, &mut console);
        let code = console.finish(code);
        (code, results.text(), notes.text())
    }

    #[test]
    fn the_command_line_holds_together() {
        command().debug_assert();
    }

    #[test]
    fn help_is_a_result_and_names_every_subcommand() {
        let (code, results, notes) = run_with(&["--help"]);
        assert_eq!((code, notes.as_str()), (ExitCode::Success, ""));
        for subcommand in SUBCOMMANDS {
            assert!(results.contains((subcommand.command)().get_name()), "{results}");
        }
    }

    #[test]
    fn wrong_use_is_explained_with_the_nearest_right_one() {
        for (arguments, word) in
            [(&["slove", "x.gw"][..], "solve"), (&["solve", "--jsn", "x.gw"], "--json"), (&["solve"], "FILE"), (&[], "Usage")]
        {
            let (code, results, notes) = run_with(arguments);
            assert_eq!((code, results.as_str()), (ExitCode::WrongUse, ""), "{arguments:?}");
            assert!(notes.contains(word), "{arguments:?}: {notes}");
        }
    }

    #[test]
    fn numbers_of_threads_that_make_no_sense_are_refused() {
        for threads in ["0", "-1", "4096", "two"] {
            assert_eq!(run_with(&["check", "--threads", threads, "x.gw"]).0, ExitCode::WrongUse, "{threads}");
        }
    }
}
