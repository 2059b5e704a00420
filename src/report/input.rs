//! What a report is made of.

use crate::diagnostic::{Diagnostic, LineIndex};
use crate::sheet::{Quantity, QuantityId, Sheet, StateId};
use crate::solve::Solution;
use crate::syntax::{self, Tree};

/// A sheet with all that is known of it. Plain data of the rooms before: nothing in it was made for a report.
#[derive(Clone, Copy, Debug)]
pub struct Input<'a> {
    /// The path of the sheet as the user gave it.
    pub path: &'a str,
    /// Its text.
    pub text: &'a str,
    /// What it says.
    pub tree: &'a Tree,
    /// What it means.
    pub sheet: &'a Sheet,
    /// What comes out; `None` where the sheet has errors.
    pub solution: Option<&'a Solution>,
    /// Everything that was found, in the order of the text.
    pub findings: &'a [Diagnostic],
}

impl<'a> Input<'a> {
    pub(super) fn quantity(&self, id: QuantityId) -> &'a Quantity {
        self.sheet.quantity(id)
    }

    /// The value of a quantity in SI; `None` where the sheet has no solution or does not need it.
    pub(super) fn si(&self, id: QuantityId) -> Option<f64> {
        self.solution.and_then(|solution| solution.values.get(id.0 as usize)).copied().filter(|value| value.is_finite())
    }

    /// What condenses at a state of humid air, kg per kg of dry air.
    pub(super) fn condensate(&self, id: StateId) -> Option<f64> {
        let found = self.solution?.condensates.iter().find(|(state, _)| *state == id);
        found.map(|(_, condensate)| *condensate)
    }

    /// The pressure of the site in Pa; 0 without one.
    pub(super) fn site_pressure_pa(&self) -> f64 {
        self.solution.map_or(0.0, |solution| solution.site_pressure_pa)
    }

    /// The first line of a statement.
    pub(super) fn line(&self, lines: &LineIndex, statement: usize) -> u32 {
        self.tree.statements.get(statement).map_or(1, |statement| lines.line(statement.span.start))
    }

    /// The description behind a statement; empty without.
    pub(super) fn description(&self, statement: usize) -> &'a str {
        self.tree.statements.get(statement).and_then(|statement| statement.description.as_ref()).map_or("", |text| &text.text)
    }

    /// Digest of the sheet: `sha256:` and 64 hexadecimal digits.
    #[must_use]
    pub fn digest(&self) -> String {
        syntax::digest(self.tree, self.text)
    }
}
