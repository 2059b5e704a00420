//! How findings of a run are written: for people on standard error, or for programs on standard output.

use clap::builder::PossibleValuesParser;
use clap::{Arg, ArgMatches};

use super::console::Console;
use crate::diagnostic::{Diagnostic, LineIndex, SarifSheet, Severity, sarif, short, terminal};

/// Findings drawn for one sheet; of the rest the number is told. A program gets them all.
const MOST_DRAWN: usize = 100;

/// Who reads the findings.
#[derive(Clone, Copy, Debug, PartialEq, Eq)]
pub(super) enum FindingFormat {
    /// People, on standard error.
    People,
    /// One line a finding.
    Short,
    /// The object of the result.
    Json,
    /// One SARIF log of the whole run.
    Sarif,
}

impl FindingFormat {
    /// The option `--format`.
    pub(super) fn argument() -> Arg {
        Arg::new("format")
            .long("format")
            .value_name("FORMAT")
            .value_parser(PossibleValuesParser::new(["short", "json", "sarif"]))
            .help("Findings for programs, on standard output: one line each, the JSON result of each sheet, or one SARIF 2.1.0 log")
    }

    /// What was asked for.
    pub(super) fn of(matches: &ArgMatches) -> Self {
        match matches.get_one::<String>("format").map(String::as_str) {
            Some("short") => Self::Short,
            Some("json") => Self::Json,
            Some("sarif") => Self::Sarif,
            _ => Self::People,
        }
    }
}

/// Findings of one sheet, with all that is needed to place them.
pub(super) struct FoundIn<'a> {
    pub(super) path: &'a str,
    pub(super) text: &'a str,
    pub(super) findings: &'a [Diagnostic],
}

impl FoundIn<'_> {
    /// Drawn on the source, the first [`MOST_DRAWN`] of them; errors are not left out for the sake of lesser ones.
    pub(super) fn for_people(&self, colour: bool) -> String {
        let mut drawn = String::new();
        if self.findings.is_empty() {
            return drawn;
        }
        let lines = LineIndex::new(self.text);
        let n_errors = self.findings.iter().filter(|finding| finding.is_error()).count();
        let mut room_for_lesser = MOST_DRAWN.saturating_sub(n_errors);
        let mut room_for_errors = MOST_DRAWN;
        let mut left_out = 0;
        for finding in self.findings {
            let room = if finding.is_error() { &mut room_for_errors } else { &mut room_for_lesser };
            if *room == 0 {
                left_out += 1;
                continue;
            }
            *room -= 1;
            drawn.push_str(&terminal(finding, self.path, self.text, &lines, colour));
            drawn.push('\n');
        }
        if left_out > 0 {
            drawn.push_str(&format!(
                "… and {left_out} more in {}; `--format short` lists them all\n\n",
                crate::diagnostic::visible(self.path)
            ));
        }
        drawn
    }

    /// One line each.
    pub(super) fn short(&self) -> String {
        if self.findings.is_empty() {
            return String::new();
        }
        let lines = LineIndex::new(self.text);
        self.findings.iter().map(|finding| short(finding, self.path, self.text, &lines) + "\n").collect()
    }
}

/// Sheets of a run kept for one SARIF log.
#[derive(Default)]
pub(super) struct SarifRun {
    sheets: Vec<(String, String, Vec<Diagnostic>)>,
}

impl SarifRun {
    /// Adds a sheet: its path, its text and its findings. The text of a sheet without findings is not kept.
    pub(super) fn add(&mut self, path: String, text: String, findings: Vec<Diagnostic>) {
        let text = if findings.is_empty() { String::new() } else { text };
        self.sheets.push((path, text, findings));
    }

    /// Writes the log.
    pub(super) fn write(&self, console: &mut Console) {
        let lines: Vec<LineIndex> = self.sheets.iter().map(|(_, text, _)| LineIndex::new(text)).collect();
        let sheets: Vec<SarifSheet<'_>> =
            self.sheets.iter().zip(&lines).map(|((path, text, findings), lines)| SarifSheet { path, text, lines, findings }).collect();
        console.result_line(&sarif(&sheets).to_string());
    }
}

/// How many findings of each severity a run has.
#[derive(Clone, Copy, Debug, Default, PartialEq, Eq)]
pub(super) struct Counts {
    sheets: usize,
    errors: usize,
    warnings: usize,
    notes: usize,
}

impl Counts {
    /// Counts one sheet.
    pub(super) fn add(&mut self, findings: &[Diagnostic]) {
        self.sheets += 1;
        for finding in findings {
            match finding.severity {
                Severity::Error => self.errors += 1,
                Severity::Warning => self.warnings += 1,
                Severity::Note => self.notes += 1,
            }
        }
    }

    /// Whether anything was found.
    pub(super) fn is_clean(&self) -> bool {
        self.errors + self.warnings + self.notes == 0
    }

    /// In words: `1 sheet: 2 errors, 1 warning`.
    pub(super) fn words(&self) -> String {
        let found = [(self.errors, "error"), (self.warnings, "warning"), (self.notes, "note")];
        let found: Vec<String> = found.into_iter().filter(|(count, _)| *count > 0).map(|(count, word)| plural(count, word)).collect();
        let found = if found.is_empty() { "no findings".to_owned() } else { found.join(", ") };
        format!("{}: {found}", plural(self.sheets, "sheet"))
    }
}

fn plural(count: usize, word: &str) -> String {
    if count == 1 { format!("1 {word}") } else { format!("{count} {word}s") }
}

#[cfg(test)]
mod tests {
    use super::*;
    use crate::diagnostic::Span;

    #[test]
    fn only_the_first_hundred_are_drawn_and_errors_come_before_lesser_ones() {
        let text = "answer V\n".repeat(300);
        let mut findings: Vec<Diagnostic> =
            (0..150).map(|line| Diagnostic::warning("a-code", Span::new(line * 9, line * 9 + 6), "lesser")).collect();
        findings.push(Diagnostic::error("a-code", Span::new(2_000, 2_001), "grave"));
        let drawn = FoundIn { path: "a.gw", text: &text, findings: &findings }.for_people(false);
        assert_eq!(drawn.matches("warning[a-code]").count(), MOST_DRAWN - 1);
        assert_eq!(drawn.matches("error[a-code]").count(), 1);
        assert!(drawn.contains("… and 51 more in a.gw"), "{drawn}");
        assert_eq!(FoundIn { path: "a.gw", text: &text, findings: &findings }.short().lines().count(), 151);
    }

    #[test]
    fn counts_are_told_in_words() {
        let mut counts = Counts::default();
        counts.add(&[]);
        assert!(counts.is_clean());
        assert_eq!(counts.words(), "1 sheet: no findings");
        counts.add(&[Diagnostic::error("a", Span::default(), "m"), Diagnostic::note("b", Span::default(), "m")]);
        assert_eq!(counts.words(), "2 sheets: 1 error, 1 note");
    }
}
