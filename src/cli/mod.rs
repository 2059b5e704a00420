//! The command line: arguments in, an exit status out.
//!
//! Only this room touches the terminal, files and the environment; it decides nothing that a user of the library would
//! miss. Read `command_line` first, then `command`, where each subcommand has one file. A `SheetFile` is a sheet as it was read,
//! `batch` takes several of them through a step in parallel and keeps their order, `Console` is where everything is
//! written. Exit statuses and streams are those of the user's reference.

mod batch;
mod column;
mod command;
mod command_line;
mod console;
mod diff;
mod exit_code;
mod finding_format;
mod output_file;
mod sheet_file;
mod watch;

pub use command_line::run;
pub use exit_code::ExitCode;
