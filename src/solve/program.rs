//! A solved sheet as a program: the same plan at other inputs, as often as wanted.

use crate::sheet::{QuantityId, Sheet};

use super::plan::{NO_SLOT, Plan};
use super::run::{self, Evaluation};
use super::solver;

/// The plan of a sheet, compiled once.
#[derive(Clone, Debug)]
pub struct Program {
    plan: Plan,
    inputs: Vec<f64>,
}

impl Program {
    /// Compiles a sheet that is in order; `None` where it cannot be solved at its own inputs.
    #[must_use]
    pub fn new(sheet: &mut Sheet) -> Option<Self> {
        let (plan, missing) = solver::plan(sheet);
        let inputs = solver::inputs(sheet, &plan);
        (missing.is_empty() && plan.empty.is_empty()).then_some(Self { plan, inputs })
    }

    /// The inputs in the order in which [`Runner::solve`] takes them, each with its value in the sheet: SI, above the
    /// atmosphere of the site for a gauge reading.
    pub fn inputs(&self) -> impl Iterator<Item = (QuantityId, f64)> {
        self.plan.inputs.iter().map(|(id, _)| *id).zip(self.inputs.iter().copied())
    }

    /// Solves at the inputs of the sheet, to solve again from there; `None` where a block has no solution.
    #[must_use]
    pub fn runner<'a>(&'a self, sheet: &'a Sheet) -> Option<Runner<'a>> {
        let evaluation = run::evaluate(sheet, &self.plan, &self.inputs);
        if evaluation.outcomes.iter().any(Result::is_err) {
            return None;
        }
        let nominal = evaluation.values.clone();
        Some(Runner { sheet, evaluation, nominal })
    }
}

/// A program with its working memory.
#[derive(Clone, Debug)]
pub struct Runner<'a> {
    sheet: &'a Sheet,
    evaluation: Evaluation<'a>,
    nominal: Vec<f64>,
}

impl Runner<'_> {
    /// Solves at other inputs, without allocating where every block follows from the solution of the sheet. Whether there is
    /// a solution. The result depends on the inputs alone, never on what was solved before.
    pub fn solve(&mut self, inputs: &[f64]) -> bool {
        self.evaluation.again(self.sheet, inputs, &self.nominal)
    }

    /// The value of a quantity in SI; not a number where the sheet does not determine it.
    #[must_use]
    pub fn value(&self, id: QuantityId) -> f64 {
        match self.evaluation.plan.slots[id.0 as usize] {
            NO_SLOT => f64::NAN,
            slot => self.evaluation.values[slot as usize],
        }
    }
}
