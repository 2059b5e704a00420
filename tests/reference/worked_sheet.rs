//! A sheet taken the whole way, for tests that compare what comes out of it.

use gaswright::Solved;

/// A sheet that has a solution.
#[derive(Debug)]
pub(super) struct WorkedSheet {
    solved: Solved,
}

impl WorkedSheet {
    /// Solves `text`. A sheet without a solution fails the test with everything that was found.
    pub(super) fn of(text: &str) -> Self {
        let solved = gaswright::solve(text);
        assert!(solved.solution.is_some(), "{}\n{text}", told(&solved));
        Self { solved }
    }

    /// The value of a quantity in SI.
    pub(super) fn si(&self, name: &str) -> f64 {
        let Some(quantity) = self.solved.sheet.find(name) else { panic!("the sheet has no `{name}`") };
        self.solved.solution.as_ref().map_or(f64::NAN, |solution| solution.values[quantity.0 as usize])
    }

    /// The largest scaled residual of the independent re-check.
    pub(super) fn largest_residual(&self) -> f64 {
        self.solved.solution.as_ref().map_or(f64::NAN, |solution| solution.largest_residual)
    }

    /// Fails unless a quantity is `expected` within `allowed`, both in SI.
    #[track_caller]
    pub(super) fn assert_within(&self, name: &str, expected: f64, allowed: f64) {
        let found = self.si(name);
        assert!((found - expected).abs() <= allowed, "{name} = {found}, expected {expected} ± {allowed}");
    }

    /// Fails unless a quantity rounds to `printed` at a place whose unit is `unit_of_last_figure`.
    #[track_caller]
    pub(super) fn assert_rounds_to(&self, name: &str, printed: f64, unit_of_last_figure: f64) {
        // The hundredth of a millionth lets a value pass that lies on the border in binary but not in decimal arithmetic.
        self.assert_within(name, printed, 0.5 * unit_of_last_figure * (1.0 + 1e-8));
    }

    /// The texts of all findings of a code.
    pub(super) fn found(&self, code: &str) -> Vec<&str> {
        self.solved.findings.iter().filter(|finding| finding.code == code).map(|finding| finding.message.as_str()).collect()
    }
}

/// Everything that was found in a sheet, for the message of a test that fails.
pub(super) fn told(solved: &Solved) -> String {
    solved.findings.iter().map(|finding| format!("\n{}[{}]: {}", finding.severity.word(), finding.code, finding.message)).collect()
}
