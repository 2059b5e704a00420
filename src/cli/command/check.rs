//! `gaswright check`: names, dimensions and structure, without results.

use std::path::PathBuf;

use clap::{ArgMatches, Command};

use super::argument::{files, files_of, switch};
use crate::Checked;
use crate::cli::ExitCode;
use crate::cli::batch::each_sheet;
use crate::cli::console::Console;
use crate::cli::finding_format::{Counts, FindingFormat, FoundIn, SarifRun};
use crate::cli::output_file;
use crate::cli::sheet_file::{SheetFile, is_standard_input};
use crate::cli::watch::{PERIOD, Watched};
use crate::diagnostic::{Diagnostic, Edit};
use crate::sheet::Sheet;
use crate::syntax::Tree;

/// Rounds of safe edits: one edit may bring another mistake to light.
const MOST_ROUNDS: usize = 10;

/// How the arguments are read.
pub(in crate::cli) fn command() -> Command {
    Command::new("check")
        .about("Check sheets as far as names, dimensions and structure, without results")
        .arg(files())
        .arg(FindingFormat::argument())
        .arg(switch(
            "fix",
            "Write the cures that cannot change a meaning into the sheets; of standard input the text goes to standard output",
        ))
        .arg(switch("watch", "Check again whenever a sheet changes, until stopped"))
}

/// A sheet that was checked, ready to be shown.
struct Shown {
    file: SheetFile,
    findings: Vec<Diagnostic>,
    /// The sheet with its safe cures, and how many they are.
    fixed: Option<(String, usize)>,
    text: String,
}

/// Checks the sheets.
pub(in crate::cli) fn run(matches: &ArgMatches, console: &mut Console) -> ExitCode {
    let format = FindingFormat::of(matches);
    let fix = matches.get_flag("fix");
    let paths = files_of(matches);
    if fix && format != FindingFormat::People && paths.iter().any(|path| is_standard_input(path)) {
        return console.wrong("`--fix` writes the sheet of standard input to standard output, where `--format` would write too");
    }
    if !matches.get_flag("watch") {
        return once(console, &paths, format, fix);
    }
    if paths.iter().any(|path| is_standard_input(path)) {
        return console.wrong("`--watch` looks at files again, which standard input is not");
    }
    let mut watched = Watched::new(&paths);
    once(console, &paths, format, fix);
    console.flush();
    loop {
        std::thread::sleep(PERIOD);
        let changed = watched.changed();
        if !changed.is_empty() {
            once(console, &changed, format, fix);
            console.flush();
            // What a cure changed is not a change of the writer's.
            watched.changed();
        }
    }
}

/// Checks the sheets once.
fn once(console: &mut Console, paths: &[PathBuf], format: FindingFormat, fix: bool) -> ExitCode {
    let colour = console.colour;
    let mut code = ExitCode::Success;
    let mut counts = Counts::default();
    let mut log = SarifRun::default();
    let step = |read: Result<SheetFile, String>| read.map(|file| check(file, format, fix, colour));
    each_sheet(console, paths, step, |console, shown| match shown {
        Err(message) => code = code.graver(console.wrong(&message)),
        Ok(shown) => {
            if fix {
                code = code.graver(write_fixed(console, &shown));
            }
            if shown.findings.iter().any(Diagnostic::is_error) {
                code = code.graver(ExitCode::Errors);
            }
            counts.add(&shown.findings);
            match format {
                FindingFormat::People => console.note(&shown.text),
                FindingFormat::Short | FindingFormat::Json => console.result(&shown.text),
                FindingFormat::Sarif => log.add(shown.file.path, shown.file.text, shown.findings),
            }
        }
    });
    match format {
        FindingFormat::Sarif => log.write(console),
        FindingFormat::People => console.note(&format!("{}\n", counts.words())),
        _ => {}
    }
    code
}

fn check(mut file: SheetFile, format: FindingFormat, fix: bool, colour: bool) -> Shown {
    let mut checked = checked(&file);
    let mut fixed = None;
    if fix && file.refused.is_none() {
        let mut count = 0;
        for _ in 0..MOST_ROUNDS {
            let Some((text, made)) = with_safe_edits(&file.text, &checked.findings) else { break };
            count += made;
            file.text = text;
            checked = crate::check(&file.text);
        }
        fixed = (count > 0).then(|| (file.text.clone(), count));
        if count == 0 && is_standard_input(&file.place) {
            fixed = Some((file.text.clone(), 0));
        }
    }
    let found = FoundIn { path: &file.path, text: &file.text, findings: &checked.findings };
    let text = match format {
        FindingFormat::People => found.for_people(colour),
        FindingFormat::Short => found.short(),
        FindingFormat::Json => super::solve::object_of_checked(&file, &checked),
        FindingFormat::Sarif => String::new(),
    };
    Shown { findings: checked.findings, fixed, text, file }
}

/// The sheet of a file; of one that is refused nothing but why.
pub(super) fn checked(file: &SheetFile) -> Checked {
    match &file.refused {
        None => crate::check(&file.text),
        Some(finding) => Checked { tree: Tree::default(), sheet: Sheet::default(), findings: vec![finding.clone()] },
    }
}

/// Writes the cured text where the sheet came from.
fn write_fixed(console: &mut Console, shown: &Shown) -> ExitCode {
    let Some((text, count)) = &shown.fixed else { return ExitCode::Success };
    if is_standard_input(&shown.file.place) {
        console.result(text);
        return ExitCode::Success;
    }
    match output_file::replace(&shown.file.place, text) {
        Ok(()) => {
            let cures = if *count == 1 { "cure" } else { "cures" };
            console.note(&format!("{}: {count} {cures} written\n", crate::diagnostic::visible(&shown.file.path)));
            ExitCode::Success
        }
        Err(message) => console.wrong(&message),
    }
}

/// The text with the safe edits of its findings made, and how many they are; `None` where there is none. Of edits that
/// overlap the first is made; the next round sees to the other.
fn with_safe_edits(text: &str, findings: &[Diagnostic]) -> Option<(String, usize)> {
    let mut edits: Vec<&Edit> = findings.iter().filter_map(|finding| finding.edit.as_ref()).filter(|edit| edit.safe).collect();
    edits.sort_by_key(|edit| (edit.span.start, edit.span.end));
    let mut cured = String::with_capacity(text.len());
    let (mut at, mut made) = (0, 0);
    let mut last: Option<&Edit> = None;
    for edit in edits {
        let (start, end) = (edit.span.start as usize, edit.span.end as usize);
        let fits = start >= at && start <= end && text.is_char_boundary(start) && text.is_char_boundary(end);
        if !fits || last.is_some_and(|last| last.span == edit.span) || edit.span.of(text) == edit.replacement {
            continue;
        }
        cured.push_str(&text[at..start]);
        cured.push_str(&edit.replacement);
        (at, made, last) = (end, made + 1, Some(edit));
    }
    cured.push_str(&text[at..]);
    (made > 0).then_some((cured, made))
}

#[cfg(test)]
mod tests {
    use super::*;
    use crate::diagnostic::Span;

    fn finding(start: usize, end: usize, replacement: &str) -> Diagnostic {
        Diagnostic::error("a-code", Span::new(start, end), "m").safe_edit(Span::new(start, end), replacement)
    }

    #[test]
    fn safe_edits_are_made_and_others_are_not() {
        let findings = [finding(0, 5, "given"), Diagnostic::error("a-code", Span::new(6, 7), "m").edit(Span::new(6, 7), "W")];
        assert_eq!(with_safe_edits("giben V = 2 m3", &findings), Some(("given V = 2 m3".into(), 1)));
        assert_eq!(with_safe_edits("given V = 2 m3", &findings), None);
    }

    #[test]
    fn edits_that_overlap_leave_one_and_ranges_that_do_not_fit_none() {
        let findings = [finding(0, 2, "x"), finding(1, 3, "y"), finding(0, 2, "z"), finding(2, 99, "w")];
        assert_eq!(with_safe_edits("abcd", &findings), Some(("xcd".into(), 1)));
        assert_eq!(with_safe_edits("ä", &[finding(1, 2, "x")]), None);
    }
}
