//! `gaswright report`: the auditable report, as one HTML file or as Markdown.

use std::collections::BTreeMap;
use std::fs;
use std::path::{Path, PathBuf};

use clap::builder::PossibleValuesParser;
use clap::{Arg, ArgMatches, Command, value_parser};

use super::argument::{files, files_of};
use super::solve::{input, solved};
use crate::cli::ExitCode;
use crate::cli::batch::each_sheet;
use crate::cli::console::Console;
use crate::cli::finding_format::{Counts, FoundIn};
use crate::cli::output_file;
use crate::cli::sheet_file::{STANDARD_INPUT, SheetFile, is_standard_input, reason};
use crate::diagnostic::{Diagnostic, visible};
use crate::report::{Format, Templates, report};

/// Largest template that is read, in bytes.
const LARGEST_TEMPLATE: u64 = 4 * 1024 * 1024;

/// How the arguments are read.
pub(in crate::cli) fn command() -> Command {
    Command::new("report")
        .about("Write the report of sheets, NAME.html beside each sheet unless said; nothing is written for a sheet with errors")
        .arg(files())
        .arg(
            Arg::new("output")
                .short('o')
                .long("output")
                .value_name("OUT")
                .value_parser(value_parser!(PathBuf))
                .help("Where to write the report of one sheet: a path that ends with .html or .md, or `-` for standard output"),
        )
        .arg(
            Arg::new("format")
                .long("format")
                .value_name("FORMAT")
                .value_parser(PossibleValuesParser::new(["html", "md"]))
                .help("What to write, where the path does not say it"),
        )
        .arg(
            Arg::new("template")
                .long("template")
                .value_name("DIR")
                .value_parser(value_parser!(PathBuf))
                .help("A folder of templates in place of the built-in ones; `gaswright template DIR` writes those"),
        )
}

/// A sheet that was solved, with its report.
struct Reported {
    file: SheetFile,
    findings: Vec<Diagnostic>,
    code: ExitCode,
    notes: String,
    /// `None` where the sheet has errors; an error of the template otherwise.
    report: Option<Result<String, String>>,
}

/// Writes the reports.
pub(in crate::cli) fn run(matches: &ArgMatches, console: &mut Console) -> ExitCode {
    let paths = files_of(matches);
    let plan = match Plan::of(matches, &paths) {
        Ok(plan) => plan,
        Err(message) => return console.wrong(&message),
    };
    let mut code = ExitCode::Success;
    let mut counts = Counts::default();
    let colour = console.colour;
    let step = |read: Result<SheetFile, String>| read.map(|file| reported(file, &plan, colour));
    let mut place = 0;
    each_sheet(console, &paths, step, |console, reported| {
        let out = &plan.outputs[place];
        place += 1;
        match reported {
            Err(message) => code = code.graver(console.wrong(&message)),
            Ok(reported) => {
                code = code.graver(reported.code);
                counts.add(&reported.findings);
                if !reported.notes.is_empty() {
                    console.note(&reported.notes);
                }
                code = code.graver(write(console, out, &reported));
            }
        }
    });
    if !counts.is_clean() {
        console.note(&format!("{}\n", counts.words()));
    }
    code
}

fn reported(file: SheetFile, plan: &Plan, colour: bool) -> Reported {
    let solved = solved(&file);
    let code = ExitCode::from(solved.exit_status());
    let notes = FoundIn { path: &file.path, text: &file.text, findings: &solved.findings }.for_people(colour);
    let report = (code != ExitCode::Errors).then(|| {
        report(&input(&file, &solved), plan.format, &plan.templates).map_err(|error| format!("the template cannot be used: {error}"))
    });
    Reported { findings: solved.findings, code, notes, report, file }
}

/// Writes one report and the path of what was written.
fn write(console: &mut Console, out: &Path, reported: &Reported) -> ExitCode {
    let text = match &reported.report {
        None => {
            console.note(&format!("{}: has errors, no report is written\n", visible(&reported.file.path)));
            return ExitCode::Errors;
        }
        Some(Err(message)) => return console.wrong(message),
        Some(Ok(text)) => text,
    };
    if is_standard_input(out) {
        console.result_line(text);
        return ExitCode::Success;
    }
    match output_file::replace(out, text) {
        Ok(()) => {
            console.result_line(&visible(&out.to_string_lossy()));
            ExitCode::Success
        }
        Err(message) => console.wrong(&message),
    }
}

/// What is to be written where.
struct Plan {
    format: Format,
    templates: Templates,
    /// One for each sheet; `-` is standard output.
    outputs: Vec<PathBuf>,
}

impl Plan {
    fn of(matches: &ArgMatches, paths: &[PathBuf]) -> Result<Self, String> {
        let output = matches.get_one::<PathBuf>("output");
        let format = format(matches.get_one::<String>("format").map(String::as_str), output.map(PathBuf::as_path))?;
        let outputs = match output {
            Some(_) if paths.len() > 1 => {
                return Err("`-o` names the report of one sheet; without it each report stands beside its sheet".to_owned());
            }
            Some(output) => vec![output.clone()],
            None => paths.iter().map(|path| beside(path, format)).collect::<Result<_, _>>()?,
        };
        refuse_collisions(paths, &outputs)?;
        let templates = match matches.get_one::<PathBuf>("template") {
            Some(folder) => Templates::from_files(read_templates(folder)?),
            None => Templates::built_in(),
        };
        Ok(Self { format, templates, outputs })
    }
}

/// The format that is asked for, by name or by the ending of the path.
fn format(name: Option<&str>, output: Option<&Path>) -> Result<Format, String> {
    let ending =
        output.filter(|path| !is_standard_input(path)).map(|path| path.extension().unwrap_or_default().to_string_lossy().to_lowercase());
    match (name, ending.as_deref()) {
        (Some("md"), _) | (None, Some("md" | "markdown")) => Ok(Format::Markdown),
        (Some(_), _) | (None, None | Some("html" | "htm")) => Ok(Format::Html),
        (None, Some(_)) => Err("`-o` must end with .html or .md, or `--format html|md` must say what to write".to_owned()),
    }
}

/// The path beside a sheet.
fn beside(sheet: &Path, format: Format) -> Result<PathBuf, String> {
    if is_standard_input(sheet) {
        return Err("a sheet from standard input has no place beside it: say with `-o` where its report goes".to_owned());
    }
    let ending = match format {
        Format::Markdown => "md",
        _ => "html",
    };
    Ok(sheet.with_extension(ending))
}

/// No report may fall on a sheet or on another report of the run.
fn refuse_collisions(sheets: &[PathBuf], outputs: &[PathBuf]) -> Result<(), String> {
    let whole = |path: &PathBuf| fs::canonicalize(path).unwrap_or_else(|_| path.clone());
    let sheets: Vec<PathBuf> = sheets.iter().filter(|path| !is_standard_input(path)).map(whole).collect();
    let mut seen: BTreeMap<PathBuf, &PathBuf> = BTreeMap::new();
    for output in outputs.iter().filter(|path| path.as_os_str() != STANDARD_INPUT) {
        let path = whole(output);
        if sheets.contains(&path) {
            return Err(format!("{}: is the sheet itself; say with `-o` where the report goes", output.display()));
        }
        if seen.insert(path, output).is_some() {
            return Err(format!("{}: two sheets have this path for their report; write them one at a time with `-o`", output.display()));
        }
    }
    Ok(())
}

/// The files of a folder by name.
fn read_templates(folder: &Path) -> Result<BTreeMap<String, String>, String> {
    let told = |path: &Path, error: &std::io::Error| format!("{}: {}", path.display(), reason(error));
    let mut files = BTreeMap::new();
    for entry in fs::read_dir(folder).map_err(|error| told(folder, &error))? {
        let path = entry.map_err(|error| told(folder, &error))?.path();
        let about = fs::metadata(&path).map_err(|error| told(&path, &error))?;
        let Some(name) = path.file_name().and_then(|name| name.to_str()) else { continue };
        if !about.is_file() || name.starts_with('.') {
            continue;
        }
        if about.len() > LARGEST_TEMPLATE {
            return Err(format!("{}: is too large for a template", path.display()));
        }
        let text = fs::read_to_string(&path).map_err(|error| told(&path, &error))?;
        files.insert(name.to_owned(), text);
    }
    Ok(files)
}

#[cfg(test)]
mod tests {
    use super::*;

    #[test]
    fn the_ending_decides_unless_the_format_is_named() {
        let of = |name, output: Option<&str>| format(name, output.map(Path::new));
        assert!(matches!(of(None, None), Ok(Format::Html)));
        assert!(matches!(of(None, Some("a.MD")), Ok(Format::Markdown)));
        assert!(matches!(of(None, Some("-")), Ok(Format::Html)));
        assert!(matches!(of(Some("md"), Some("a.txt")), Ok(Format::Markdown)));
        assert!(of(None, Some("a.pdf")).is_err());
        assert!(of(None, Some("report")).is_err());
    }

    #[test]
    fn a_report_never_falls_on_a_sheet_or_on_another_report() {
        let paths = |names: &[&str]| names.iter().map(PathBuf::from).collect::<Vec<_>>();
        assert!(refuse_collisions(&paths(&["a.gw", "b.gw"]), &paths(&["a.html", "b.html"])).is_ok());
        assert!(refuse_collisions(&paths(&["a.html"]), &paths(&["a.html"])).unwrap_err().contains("the sheet itself"));
        assert!(refuse_collisions(&paths(&["a.gw", "a.txt"]), &paths(&["a.html", "a.html"])).unwrap_err().contains("two sheets"));
        assert!(beside(Path::new("-"), Format::Html).is_err());
    }
}
