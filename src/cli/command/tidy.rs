//! `gaswright tidy`: the canonical layout of sheets.

use std::path::PathBuf;

use clap::{ArgMatches, Command};

use super::argument::{files, files_of, switch};
use crate::cli::batch::each_sheet;
use crate::cli::console::Console;
use crate::cli::diff::unified;
use crate::cli::finding_format::FoundIn;
use crate::cli::sheet_file::{SheetFile, is_standard_input};
use crate::cli::{ExitCode, output_file};
use crate::diagnostic::visible;
use crate::syntax;

/// How the arguments are read.
pub(in crate::cli) fn command() -> Command {
    Command::new("tidy")
        .about("Write sheets in canonical layout to standard output, or in place with --write; --check shows what would change")
        .arg(files())
        .arg(switch("write", "Write the canonical layout into the sheets").conflicts_with("check"))
        .arg(switch("check", "Write nothing; show what would change, with exit status 1 where anything would"))
}

/// What is done with the canonical text.
#[derive(Clone, Copy, PartialEq, Eq)]
enum Use {
    Print,
    Write,
    Check,
}

/// A sheet that was laid out, ready to be shown.
struct LaidOut {
    place: PathBuf,
    code: ExitCode,
    /// Findings, for standard error.
    notes: String,
    /// The canonical text, or what would change.
    result: String,
    /// Whether the layout of the sheet is another.
    differs: bool,
}

/// Lays the sheets out.
pub(in crate::cli) fn run(matches: &ArgMatches, console: &mut Console) -> ExitCode {
    let paths = files_of(matches);
    let what = match (matches.get_flag("write"), matches.get_flag("check")) {
        (true, _) => Use::Write,
        (_, true) => Use::Check,
        _ => Use::Print,
    };
    if what == Use::Write && paths.iter().any(|path| is_standard_input(path)) {
        return console.wrong("standard input cannot be written to: without `--write` its canonical layout goes to standard output");
    }
    let colour = console.colour;
    let mut code = ExitCode::Success;
    let step = |read: Result<SheetFile, String>| read.map(|file| lay_out(&file, what, colour));
    each_sheet(console, &paths, step, |console, laid_out| match laid_out {
        Err(message) => code = code.graver(console.wrong(&message)),
        Ok(laid_out) => {
            code = code.graver(laid_out.code);
            if !laid_out.notes.is_empty() {
                console.note(&laid_out.notes);
            }
            if what != Use::Write {
                console.result(&laid_out.result);
            } else if laid_out.differs {
                match output_file::replace(&laid_out.place, &laid_out.result) {
                    Ok(()) => console.note(&format!("{}: written in canonical layout\n", visible(&laid_out.place.to_string_lossy()))),
                    Err(message) => code = code.graver(console.wrong(&message)),
                }
            }
        }
    });
    code
}

fn lay_out(file: &SheetFile, what: Use, colour: bool) -> LaidOut {
    let tidied = match &file.refused {
        Some(finding) => Err(vec![finding.clone()]),
        None => syntax::tidy(&file.text),
    };
    let (place, path) = (file.place.clone(), &file.path);
    match tidied {
        Err(findings) => {
            let mut notes = FoundIn { path, text: &file.text, findings: &findings }.for_people(colour);
            notes.push_str(&format!("{}: has errors, its layout stays as it is\n", visible(path)));
            LaidOut { place, code: ExitCode::Errors, notes, result: String::new(), differs: false }
        }
        Ok(text) => {
            let differs = text != file.text;
            let code = if what == Use::Check && differs { ExitCode::Errors } else { ExitCode::Success };
            let result = if what == Use::Check { unified(&visible(path), &file.text, &text) } else { text };
            LaidOut { place, code, notes: String::new(), result, differs }
        }
    }
}
