//! `gaswright solve`: answers as a table for people, or the whole result as data.

use clap::{ArgMatches, Command};

use super::argument::{files, files_of, switch};
use crate::cli::ExitCode;
use crate::cli::batch::each_sheet;
use crate::cli::console::Console;
use crate::cli::finding_format::{Counts, FindingFormat, FoundIn, SarifRun};
use crate::cli::sheet_file::SheetFile;
use crate::diagnostic::{Diagnostic, visible};
use crate::report::{self, Input, ResultObject};
use crate::{Checked, Solved};

/// How the arguments are read.
pub(in crate::cli) fn command() -> Command {
    Command::new("solve")
        .about("Solve sheets: a table of answers, or with --json the whole result, one object a line")
        .arg(files())
        .arg(switch("json", "Write the result of each sheet as one JSON object a line").conflicts_with("format"))
        .arg(FindingFormat::argument())
}

/// A sheet that was solved, ready to be shown.
struct Shown {
    file: SheetFile,
    findings: Vec<Diagnostic>,
    code: ExitCode,
    /// For standard output.
    result: String,
    /// For standard error.
    notes: String,
}

/// Solves the sheets.
pub(in crate::cli) fn run(matches: &ArgMatches, console: &mut Console) -> ExitCode {
    let format = if matches.get_flag("json") { FindingFormat::Json } else { FindingFormat::of(matches) };
    let colour = console.colour;
    let paths = files_of(matches);
    let several = paths.len() > 1;
    let mut code = ExitCode::Success;
    let mut counts = Counts::default();
    let mut log = SarifRun::default();
    let step = |read: Result<SheetFile, String>| read.map(|file| solve(file, format, several, colour));
    each_sheet(console, &paths, step, |console, shown| match shown {
        Err(message) => code = code.graver(console.wrong(&message)),
        Ok(shown) => {
            code = code.graver(shown.code);
            counts.add(&shown.findings);
            console.result(&shown.result);
            if !shown.notes.is_empty() {
                console.note(&shown.notes);
            }
            if format == FindingFormat::Sarif {
                log.add(shown.file.path, shown.file.text, shown.findings);
            }
        }
    });
    match format {
        FindingFormat::Sarif => log.write(console),
        FindingFormat::People if !counts.is_clean() => console.note(&format!("{}\n", counts.words())),
        _ => {}
    }
    code
}

fn solve(file: SheetFile, format: FindingFormat, several: bool, colour: bool) -> Shown {
    let solved = solved(&file);
    let code = ExitCode::from(solved.exit_status());
    let found = FoundIn { path: &file.path, text: &file.text, findings: &solved.findings };
    let (mut result, mut notes) = (String::new(), String::new());
    match format {
        FindingFormat::People => {
            notes = found.for_people(colour);
            if code != ExitCode::Errors {
                if several {
                    result.push_str(&format!("{}\n", visible(&file.path)));
                }
                result.push_str(&report::table(&input(&file, &solved)));
                if several {
                    result.push('\n');
                }
            }
        }
        FindingFormat::Short => result = found.short(),
        FindingFormat::Json => result = line(&report::result(&input(&file, &solved))),
        FindingFormat::Sarif => {}
    }
    Shown { findings: solved.findings, code, result, notes, file }
}

/// The solution of a file; of one that is refused nothing but why.
pub(super) fn solved(file: &SheetFile) -> Solved {
    match &file.refused {
        None => crate::solve(&file.text),
        Some(_) => {
            let Checked { tree, sheet, findings } = super::check::checked(file);
            Solved { tree, sheet, solution: None, findings }
        }
    }
}

/// What the report room is told of a solved sheet.
pub(super) fn input<'a>(file: &'a SheetFile, solved: &'a Solved) -> Input<'a> {
    Input {
        path: &file.path,
        text: &file.text,
        tree: &solved.tree,
        sheet: &solved.sheet,
        solution: solved.solution.as_ref(),
        findings: &solved.findings,
    }
}

/// The object of a sheet that was checked and not solved, on a line of its own.
pub(super) fn object_of_checked(file: &SheetFile, checked: &Checked) -> String {
    let input = Input {
        path: &file.path,
        text: &file.text,
        tree: &checked.tree,
        sheet: &checked.sheet,
        solution: None,
        findings: &checked.findings,
    };
    let mut object = report::result(&input);
    if !checked.findings.iter().any(Diagnostic::is_error) {
        object.status = "checked";
    }
    line(&object)
}

/// An object on a line of its own.
fn line(object: &ResultObject) -> String {
    // No map of it has a key that is no text, and no number is infinite: nothing can fail.
    serde_json::to_string(object).unwrap_or_default() + "\n"
}
