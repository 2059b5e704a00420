//! The draft of a report: the input, and the formulas that were set so far.

use std::cell::RefCell;
use std::collections::{BTreeMap, BTreeSet};

use minijinja::Value;

use crate::diagnostic::LineIndex;
use crate::sheet::{Expr, QuantityId};
use crate::solve::Method;

use super::Input;
use super::formula::{Formula, latex, mathml};

/// What every part of a report is made with.
pub(super) struct Draft<'a> {
    pub(super) input: &'a Input<'a>,
    pub(super) lines: LineIndex,
    /// Each formula as it stands in the Markdown, dollar signs included, and its MathML.
    pub(super) formulas: BTreeMap<String, String>,
    /// For each quantity the one that it only repeats, else itself.
    same: Vec<QuantityId>,
    /// The lines of the sheet that the report cites so far.
    cited: RefCell<BTreeSet<u32>>,
}

impl<'a> Draft<'a> {
    pub(super) fn new(input: &'a Input<'a>) -> Self {
        Self { input, lines: LineIndex::new(input.text), formulas: BTreeMap::new(), same: repeated(input), cited: RefCell::default() }
    }

    /// A formula for the Markdown; its MathML is kept for the HTML.
    pub(super) fn math(&mut self, formula: &Formula) -> String {
        let source = latex(formula);
        if !self.formulas.contains_key(&source) {
            self.formulas.insert(source.clone(), mathml(formula));
        }
        source
    }

    /// The symbol of a quantity for the Markdown.
    pub(super) fn set_symbol(&mut self, id: QuantityId) -> String {
        let symbol = self.symbol(id);
        self.math(&symbol)
    }

    /// The quantity that a quantity only repeats: `p_1` of `full.p` where a state is fixed at `p = p_1`. Else itself.
    pub(super) fn same_as(&self, id: QuantityId) -> QuantityId {
        self.same.get(id.0 as usize).copied().unwrap_or(id)
    }

    /// The line of a statement, which the report cites.
    pub(super) fn line(&self, statement: usize) -> u32 {
        self.cite(self.input.line(&self.lines, statement))
    }

    /// Cites a line: a link leads to it in the listing of the sheet.
    pub(super) fn cite(&self, line: u32) -> u32 {
        self.cited.borrow_mut().insert(line);
        line
    }

    /// The lines cited so far, in rising order.
    pub(super) fn cited(&self) -> Vec<u32> {
        self.cited.borrow().iter().copied().collect()
    }
}

/// For each quantity of a sheet the one that it only repeats.
fn repeated(input: &Input) -> Vec<QuantityId> {
    let mut same: Vec<QuantityId> = (0..input.sheet.quantities.len() as u32).map(QuantityId).collect();
    // Steps stand in the order in which they were solved, so that what is repeated is settled before.
    for step in input.solution.iter().flat_map(|solution| &solution.steps) {
        if let ([id], Method::ClosedForm { expression }) = (step.quantities.as_slice(), &step.method)
            && let Expr::Quantity(other) = input.sheet.exprs.get(*expression)
        {
            same[id.0 as usize] = same[other.0 as usize];
        }
    }
    same
}

/// Markdown that a template prints as it is.
pub(super) fn markdown(text: impl Into<String>) -> Value {
    Value::from_safe_string(text.into())
}
