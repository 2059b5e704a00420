//! The solution: every value, every verdict and every check, as plain data.

use crate::gas::verdict::IdealError;
use crate::sheet::{ExprId, QuantityId, StateId};

/// How a group of quantities was found.
#[derive(Clone, Debug)]
pub enum Method {
    /// In closed form: the expression that gives it.
    ClosedForm {
        /// The quantity on the left, the relation rearranged on the right.
        expression: ExprId,
    },
    /// Together or by iteration.
    Numeric {
        /// How: "bracketing", "Newton".
        how: &'static str,
        /// Evaluations of the relations of the block.
        evaluations: u32,
        /// Largest scaled residual of the block.
        residual: f64,
    },
}

/// One step of the working, in the order in which it can be followed.
#[derive(Clone, Debug)]
pub struct Step {
    /// What it finds: one quantity, or all of a block.
    pub quantities: Vec<QuantityId>,
    /// The relations that it uses, by their place in the sheet.
    pub relations: Vec<usize>,
    /// How.
    pub method: Method,
}

/// A verdict on an assumption.
#[derive(Clone, Copy, Debug, PartialEq, Eq, Hash)]
pub enum Verdict {
    /// It holds.
    Confirmed,
    /// It does not hold.
    Failed,
    /// A person has to judge.
    ForJudgement,
}

impl Verdict {
    /// The word for it.
    #[must_use]
    pub fn word(self) -> &'static str {
        match self {
            Self::Confirmed => "confirmed",
            Self::Failed => "failed",
            Self::ForJudgement => "for judgement",
        }
    }
}

/// A requirement or assumption with its condition judged.
#[derive(Clone, Debug, PartialEq)]
pub struct Judged {
    /// Whether the condition holds.
    pub holds: bool,
    /// Left side, right side and margin in the unit of the right side; `None` for a condition of several comparisons.
    pub sides: Option<Sides>,
}

/// The sides of a comparison in the unit of its right side.
#[derive(Clone, Debug, PartialEq)]
pub struct Sides {
    /// Left side.
    pub left: f64,
    /// Right side.
    pub right: f64,
    /// How far the condition is from failing; negative only where it fails.
    pub margin: f64,
    /// The unit, with basis: `bar gauge`.
    pub unit: String,
    /// What the figures and limits of the inputs leave open of the difference of both sides, half the width.
    pub half_width: f64,
    /// The decimal place that the margin deserves, from the figures of its inputs.
    pub place: i32,
}

/// What the rules of common practice and the tool say of a state.
#[derive(Clone, Debug, PartialEq)]
pub struct StateVerdict {
    /// The state.
    pub state: StateId,
    /// On the ideal gas law at this state.
    pub verdict: Verdict,
    /// Error of the ideal law in density in percent, where a reference equation tells it.
    pub ideal_error_percent: Option<f64>,
    /// The errors of the ideal law in all that is calculated by it, where a reference equation tells them.
    pub errors: Option<IdealError>,
    /// p below a third of the critical pressure and T at least twice the critical temperature; `None` where unknown.
    pub rule_a: Option<bool>,
    /// p below a hundredth of the critical pressure.
    pub rule_b: Option<bool>,
    /// Pressure in Pa and temperature in K, where the sheet determines them.
    pub p_pa: Option<f64>,
    /// Temperature in K.
    pub t_k: Option<f64>,
}

/// A relation that was not needed, and agrees.
#[derive(Clone, Debug, PartialEq)]
pub struct SurplusCheck {
    /// The relation, by its place in the sheet.
    pub relation: usize,
    /// Left side less right side, SI.
    pub difference: f64,
    /// What the uncertainties of the inputs allow, SI.
    pub allowed: f64,
}

/// The result of a sheet.
#[derive(Clone, Debug, Default)]
pub struct Solution {
    /// The value of each quantity in SI, by its place in the sheet; NaN where the sheet does not need it.
    pub values: Vec<f64>,
    /// Half the width of each value in SI, from the figures and limits of the inputs to first order.
    pub half_widths: Vec<f64>,
    /// For a value shown in gauge: half the width of the reading above the atmosphere.
    pub gauge_half_widths: Vec<f64>,
    /// The working.
    pub steps: Vec<Step>,
    /// Requirements, as in the sheet.
    pub requirements: Vec<Judged>,
    /// Assumptions, as in the sheet; `None` where they have no condition.
    pub assumptions: Vec<Option<Judged>>,
    /// Cautions, as in the sheet: whether each is shown.
    pub cautions: Vec<bool>,
    /// The verdicts on the states of ideal gases, in the order of the sheet.
    pub states: Vec<StateVerdict>,
    /// Water that condenses at states of humid air, kg per kg of dry air.
    pub condensates: Vec<(StateId, f64)>,
    /// Relations that were not needed and agree.
    pub surplus: Vec<SurplusCheck>,
    /// Relations solved or checked.
    pub n_relations: usize,
    /// Unknowns found.
    pub n_unknowns: usize,
    /// Largest scaled residual of the independent re-check.
    pub largest_residual: f64,
    /// The relation that has it.
    pub worst_relation: Option<usize>,
    /// Pressure of the site in Pa; 0 without a site.
    pub site_pressure_pa: f64,
}
