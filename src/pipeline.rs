//! The way of a sheet through the rooms.

use crate::diagnostic::{Diagnostic, code, finding};
use crate::sheet::{self, Sheet};
use crate::solve::{self, Solution, Verdict};
use crate::syntax::{self, Tree};

/// A sheet read and checked: names, units, dimensions, kinds, structure.
#[derive(Clone, Debug)]
pub struct Checked {
    /// What the text says.
    pub tree: Tree,
    /// What it means.
    pub sheet: Sheet,
    /// What there is to know of it, in the order of the text.
    pub findings: Vec<Diagnostic>,
}

/// A sheet solved, or the findings that say why not.
#[derive(Clone, Debug)]
pub struct Solved {
    /// What the text says.
    pub tree: Tree,
    /// What it means.
    pub sheet: Sheet,
    /// The result; `None` where a finding is an error.
    pub solution: Option<Solution>,
    /// What there is to know of it, in the order of the text.
    pub findings: Vec<Diagnostic>,
}

/// What became of a sheet, as the exit status of a command says it.
#[derive(Clone, Copy, Debug, PartialEq, Eq)]
pub enum ExitStatus {
    /// Solved, and every requirement and judged assumption holds.
    Solved,
    /// The sheet has errors.
    Errors,
    /// Solved, but a requirement or a judged assumption fails.
    Fails,
}

impl Solved {
    /// What became of the sheet.
    #[must_use]
    pub fn exit_status(&self) -> ExitStatus {
        let Some(solution) = &self.solution else { return ExitStatus::Errors };
        let required = solution.requirements.iter().all(|judged| judged.holds);
        let assumed = solution.assumptions.iter().flatten().all(|judged| judged.holds);
        let ideal = solution.states.iter().all(|state| state.verdict != Verdict::Failed);
        if required && assumed && ideal { ExitStatus::Solved } else { ExitStatus::Fails }
    }
}

/// Reads a sheet and checks it as far as names, dimensions and structure go; nothing is solved.
#[must_use]
pub fn check(text: &str) -> Checked {
    let (tree, mut findings) = syntax::parse(text);
    let (sheet, more) = sheet::read(&tree, text);
    findings.extend(more);
    findings.extend(solve::check(&sheet));
    settle(&mut findings);
    Checked { tree, sheet, findings }
}

/// Reads, checks and solves a sheet.
#[must_use]
pub fn solve(text: &str) -> Solved {
    let (tree, mut findings) = syntax::parse(text);
    let (mut sheet, more) = sheet::read(&tree, text);
    findings.extend(more);
    let sound = !findings.iter().any(Diagnostic::is_error);
    let solution = if sound {
        let (solution, more) = solve::solve(&mut sheet);
        findings.extend(more);
        solution
    } else {
        findings.extend(solve::check(&sheet));
        None
    };
    settle(&mut findings);
    Solved { tree, sheet, solution, findings }
}

/// Puts findings in the order of the text. Beside an error, that something is used by nothing may be its shadow and is not
/// told.
fn settle(findings: &mut Vec<Diagnostic>) {
    if findings.iter().any(Diagnostic::is_error) {
        findings.retain(|finding| finding.code != code::unused_input::CODE);
    }
    finding::sort(findings);
}
