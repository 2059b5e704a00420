//! A sheet with one mistake, and what the program has to say of it.

use std::collections::BTreeSet;

use gaswright::diagnostic::{Diagnostic, LineIndex, Severity};

use super::good_sheet::GoodSheet;

/// A kind of mistake.
pub(super) struct Operator {
    /// The mistake, as the table names it.
    pub(super) name: &'static str,
    /// The least that has to be said of it.
    pub(super) least: Severity,
    /// Makes it wherever a sheet has room for it.
    pub(super) mutants: fn(&GoodSheet) -> Vec<Mutant>,
}

/// A sheet with one mistake. The cure is right where the finding names it, and where its edit gives the good sheet back.
pub(super) struct Mutant {
    /// Its text.
    pub(super) text: String,
    /// What was changed, in a few words.
    pub(super) change: String,
    /// The lines on which the finding may stand.
    pub(super) lines: BTreeSet<u32>,
    /// The cure: of each group one word has to stand in the finding, in any case.
    pub(super) cure: Vec<Vec<String>>,
}

impl Mutant {
    /// A mutant whose finding belongs on `lines` and names, of each group of `cure`, one word.
    pub(super) fn new(text: String, change: impl Into<String>, lines: impl IntoIterator<Item = u32>, cure: &[&[&str]]) -> Self {
        let cure = cure.iter().map(|group| group.iter().map(|word| word.to_lowercase()).collect()).collect();
        Self { text, change: change.into(), lines: lines.into_iter().collect(), cure }
    }
}

/// How far the program got with a mutant.
#[derive(Clone, Copy, Debug, PartialEq, Eq, PartialOrd, Ord)]
pub(super) enum Found {
    /// Nothing was said, or less than has to be.
    Nothing,
    /// It was said, elsewhere.
    Elsewhere,
    /// It was said on the right line, without the cure.
    OnItsLine,
    /// It was said on the right line, with the cure.
    Cured,
}

/// What was found in a mutant.
pub(super) struct Judgement {
    /// How far the program got.
    pub(super) found: Found,
    /// How many errors it raised.
    pub(super) errors: usize,
    /// Whether the program panicked.
    pub(super) panicked: bool,
    /// Everything that the mutant raises and the good sheet does not, for the list of what was missed.
    pub(super) told: String,
}

/// Solves a mutant and judges what is found in it.
pub(super) fn judge(sheet: &GoodSheet, least: Severity, mutant: &Mutant) -> Judgement {
    // A panic is a defect, and the count goes on to show all of them.
    let Ok(findings) = std::panic::catch_unwind(|| gaswright::solve(&mutant.text).findings) else {
        return Judgement { found: Found::Nothing, errors: 0, panicked: true, told: "\n      the program panics".to_owned() };
    };
    let lines = LineIndex::new(&mutant.text);
    let new: Vec<&Diagnostic> = findings.iter().filter(|finding| !sheet.says_already(finding)).collect();
    let mut found = Found::Nothing;
    // Severities stand in order: an error is the least of them.
    for finding in new.iter().filter(|finding| finding.severity <= least) {
        let first = lines.line(finding.span.start);
        let last = lines.line(finding.span.end.max(finding.span.start + 1) - 1);
        let here = if (first..=last).any(|line| mutant.lines.contains(&line)) {
            let said = said(finding);
            let named = mutant.cure.iter().all(|group| group.iter().any(|word| said.contains(word)));
            if named || restores(finding, sheet, mutant) { Found::Cured } else { Found::OnItsLine }
        } else {
            Found::Elsewhere
        };
        found = found.max(here);
    }
    let told = new
        .iter()
        .map(|finding| {
            format!(
                "\n      {}[{}] line {}: {} | {}",
                finding.severity.word(),
                finding.code,
                lines.line(finding.span.start),
                finding.message,
                finding.help.as_deref().unwrap_or("no help")
            )
        })
        .collect();
    Judgement { found, errors: new.iter().filter(|finding| finding.is_error()).count(), panicked: false, told }
}

/// Whether the edit that a finding offers takes the mistake back.
fn restores(finding: &Diagnostic, sheet: &GoodSheet, mutant: &Mutant) -> bool {
    finding.edit.as_ref().is_some_and(|edit| {
        let mut text = mutant.text.clone();
        text.replace_range(edit.span.start as usize..edit.span.end as usize, &edit.replacement);
        text == sheet.text
    })
}

/// All that a finding says, in small letters.
fn said(finding: &Diagnostic) -> String {
    let mut said = format!("{} {} {} {}", finding.code, finding.message, finding.label, finding.notes.join(" "));
    for text in finding
        .help
        .iter()
        .chain(finding.edit.iter().map(|edit| &edit.replacement))
        .chain(finding.related.iter().map(|related| &related.text))
    {
        said.push(' ');
        said.push_str(text);
    }
    said.to_lowercase()
}
