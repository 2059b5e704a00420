//! The result object: what `solve --json` prints, described by [`SCHEMA`].

use serde::Serialize;

use crate::diagnostic::json::FindingObject;

/// JSON Schema (2020-12) of the object.
pub const SCHEMA: &str = include_str!("result.schema.json");

/// The result of a sheet. Numbers are full double precision; only `text` is rounded.
#[derive(Clone, Debug, Serialize)]
#[non_exhaustive]
pub struct ResultObject {
    /// Which sheet.
    pub sheet: SheetObject,
    /// Which program.
    pub tool: ToolObject,
    /// `solved`, `checked` (found without errors and not solved) or `failed`.
    pub status: &'static str,
    /// Every quantity in the order of its declaration.
    pub quantities: Vec<QuantityObject>,
    /// The results that the sheet exists for.
    pub answers: Vec<AnswerObject>,
    /// The state points.
    pub states: Vec<StateObject>,
    /// The requirements.
    pub requirements: Vec<RequirementObject>,
    /// The assumptions of the sheet.
    pub assumptions: Vec<AssumptionObject>,
    /// The cautions.
    pub cautions: Vec<CautionObject>,
    /// The independent checks; `null` where the sheet has no solution.
    pub checks: Option<ChecksObject>,
    /// Correlations of givens as stated.
    pub correlations: Vec<CorrelationObject>,
    /// What was found.
    pub findings: Vec<FindingObject>,
}

/// The head of a sheet.
#[derive(Clone, Debug, Serialize)]
#[expect(missing_docs, reason = "each is the key of the head of its name")]
pub struct SheetObject {
    pub path: String,
    pub title: Option<String>,
    pub document: Option<String>,
    pub revision: Option<String>,
    pub purpose: Option<String>,
    pub digest: String,
}

/// The program.
#[derive(Clone, Debug, Serialize)]
#[expect(missing_docs, reason = "name and version")]
pub struct ToolObject {
    pub name: &'static str,
    pub version: &'static str,
}

/// A quantity. `value` and `si` are `null` where the sheet has no solution or does not need it.
#[derive(Clone, Debug, Serialize)]
pub struct QuantityObject {
    /// `m`, `cold.p`.
    pub name: String,
    /// Its description, empty without.
    pub description: String,
    /// Its value in `unit`.
    pub value: Option<f64>,
    /// The unit it is shown in, with basis; empty for a plain number.
    pub unit: String,
    /// Its value in coherent SI units, a pressure absolute in pascal, a temperature in kelvin.
    pub si: Option<f64>,
    /// The trade's word for its dimension, else its SI unit.
    pub dimension: String,
    /// `given`, `solved` or `constant`.
    pub origin: &'static str,
    /// The line that declares it.
    pub line: u32,
    /// Significant figures: of a given as written, else those that it deserves.
    pub figures: Option<u32>,
    /// Its uncertainty as stated; `null` without.
    pub uncertainty: Option<UncertaintyObject>,
    /// How it was found; `null` for what was given.
    pub steps: Option<StepObject>,
    /// Its source, `null` without.
    pub source: Option<String>,
}

/// An uncertainty. All but `standard_si` are in the unit of the quantity, a temperature as an interval.
#[derive(Clone, Debug, Serialize)]
pub struct UncertaintyObject {
    /// Standard uncertainty.
    pub standard: f64,
    /// Expanded uncertainty: k times the standard one.
    pub expanded: f64,
    /// Coverage factor: the stated one of a normal distribution, else 2.
    pub k: f64,
    /// Degrees of freedom; `null` for infinite.
    pub dof: Option<f64>,
    /// Standard uncertainty in SI.
    pub standard_si: f64,
    /// `rectangular`, `triangular`, `u-shaped` or `normal`.
    pub distribution: &'static str,
    /// What contributes to it: nothing, for an input.
    pub contributions: Vec<ContributionObject>,
    /// Monte Carlo results: none, for an input.
    pub monte_carlo: Option<MonteCarloObject>,
}

/// The share of an uncertain input in an uncertainty.
#[derive(Clone, Debug, Serialize)]
#[expect(missing_docs, reason = "the schema says what each is")]
pub struct ContributionObject {
    pub name: String,
    pub distribution: &'static str,
    pub standard: f64,
    pub unit: String,
    pub sensitivity: f64,
    pub contribution: f64,
    pub share: f64,
}

/// The result of a Monte Carlo run.
#[derive(Clone, Debug, Serialize)]
#[expect(missing_docs, reason = "the schema says what each is")]
pub struct MonteCarloObject {
    pub trials: u64,
    pub failed: u64,
    pub mean: f64,
    pub standard: f64,
    pub coverage: f64,
    pub shortest: [f64; 2],
    pub symmetric: [f64; 2],
}

/// How a quantity was found.
#[derive(Clone, Debug, Serialize)]
pub struct StepObject {
    /// Its place in the working, from 1.
    pub number: usize,
    /// `closed form`, or how it was iterated.
    pub method: &'static str,
    /// The relation rearranged, in the spelling of a sheet; `null` where it was iterated.
    pub expression: Option<String>,
    /// The quantities that were found together with it, itself included.
    pub quantities: Vec<String>,
    /// The lines of the relations used, each once.
    pub lines: Vec<u32>,
    /// Evaluations of a block that was iterated.
    pub evaluations: Option<u32>,
    /// Largest scaled residual of a block that was iterated.
    pub residual: Option<f64>,
}

/// An answer.
#[derive(Clone, Debug, Serialize)]
pub struct AnswerObject {
    /// The quantity.
    pub name: String,
    /// Its value in `unit`, `null` where the sheet has no solution.
    pub value: Option<f64>,
    /// The unit, with basis.
    pub unit: String,
    /// Rounded to what it deserves, with its unit; empty where the sheet has no solution.
    pub text: String,
}

/// A state point.
#[derive(Clone, Debug, Serialize)]
pub struct StateObject {
    /// Its name.
    pub name: String,
    /// What the gas is.
    pub gas: String,
    /// `ideal` or `real`.
    pub model: &'static str,
    /// Its line.
    pub line: u32,
    /// Kind of the model: `ideal gas law`, `reference equation of state`, `GERG-2008`, `Peng-Robinson equation`, `CIPM-2007`, `virial coefficients`.
    pub model_kind: &'static str,
    /// Publication of the model; of an ideal gas that of its heat capacity, `null` where the state uses none.
    pub model_source: Option<String>,
    /// Whether the state lies beyond the published range of its model; `null` where the sheet has no solution.
    pub extrapolated: Option<bool>,
    /// Water that condenses at a state of humid air, kg per kg of dry air; `null` where none does.
    pub condensate: Option<f64>,
    /// Error of the ideal law in density in percent, where a reference equation tells it.
    pub ideal_error_percent: Option<f64>,
    /// The errors of the ideal law in all that the state may use, where a reference equation tells them.
    pub ideal_errors: Option<IdealErrorsObject>,
    /// The verdict on the ideal law; `null` where the sheet has no solution.
    pub verdict: Option<&'static str>,
    /// What the rules of thumb say; `null` where the sheet has no solution.
    pub rules: Option<RulesObject>,
    /// The properties of the system of relations in SI, by field.
    pub properties: serde_json::Map<String, serde_json::Value>,
}

/// The errors of the ideal law at a state, ideal less real at the same pressure and temperature; `null` where it has none.
#[derive(Clone, Debug, Serialize)]
pub struct IdealErrorsObject {
    /// 100 (rho_ideal/rho - 1).
    pub density_percent: f64,
    /// 100 (cp_ideal/cp - 1).
    pub cp_percent: Option<f64>,
    /// 100 (w_ideal/w - 1).
    pub w_percent: Option<f64>,
    /// h_ideal - h in J/kg.
    pub h_difference: Option<f64>,
    /// s_ideal - s in J/(kg K).
    pub s_difference: Option<f64>,
    /// Kind of the model that judges.
    pub judge: &'static str,
    /// Its publication.
    pub judge_source: String,
    /// Whether the state lies beyond the published range of that model.
    pub extrapolated: bool,
    /// The limit of the sheet in percent.
    pub limit_percent: f64,
}

/// The rules of thumb: `a` is p < p_c/3 with T > 2 T_c, `b` is p < 0.01 p_c; `null` where the critical point is unknown.
#[derive(Clone, Copy, Debug, Serialize)]
#[expect(missing_docs, reason = "the rules have no other name")]
pub struct RulesObject {
    pub a: Option<bool>,
    pub b: Option<bool>,
}

/// A requirement. `left` and `right` are in `unit`, that of the right side, `margin` in `margin_unit`.
#[derive(Clone, Debug, Serialize)]
pub struct RequirementObject {
    /// Its text.
    pub text: String,
    /// The condition as written.
    pub condition: String,
    /// Its line.
    pub line: u32,
    /// Whether it is met; `null` where the sheet has no solution.
    pub met: Option<bool>,
    /// Left side; `null` for a condition of several comparisons.
    pub left: Option<f64>,
    /// Right side.
    pub right: Option<f64>,
    /// How far it is from failing; negative only where it is not met.
    pub margin: Option<f64>,
    /// The unit of the margin, which is a difference: without basis, `K` where `unit` is `degC`.
    pub margin_unit: Option<String>,
    /// The unit.
    pub unit: Option<String>,
    /// Probability of being met: no uncertainty is propagated yet, so `null`.
    pub probability: Option<f64>,
    /// The margin less its uncertainty, likewise.
    pub guarded_margin: Option<f64>,
}

/// An assumption.
#[derive(Clone, Debug, Serialize)]
pub struct AssumptionObject {
    /// Its text.
    pub text: String,
    /// The condition as written; `null` without.
    pub condition: Option<String>,
    /// Why; empty without.
    pub because: String,
    /// Its line.
    pub line: u32,
    /// `confirmed`, `failed` or `for judgement`; `null` where the sheet has no solution.
    pub verdict: Option<&'static str>,
}

/// A caution.
#[derive(Clone, Debug, Serialize)]
pub struct CautionObject {
    /// Its text.
    pub text: String,
    /// Its line.
    pub line: u32,
    /// Whether its condition holds; `null` where the sheet has no solution.
    pub shown: Option<bool>,
}

/// The independent checks.
#[derive(Clone, Debug, Serialize)]
pub struct ChecksObject {
    /// Relations solved or checked.
    pub relations: usize,
    /// Unknowns found.
    pub unknowns: usize,
    /// Largest scaled residual when every relation is evaluated again as written.
    pub largest_residual: f64,
    /// The line of the relation that has it.
    pub largest_residual_line: Option<u32>,
    /// Relations that were not needed and agree.
    pub surplus: Vec<SurplusObject>,
}

/// A relation that was not needed and agrees; numbers in SI.
#[derive(Clone, Copy, Debug, Serialize)]
pub struct SurplusObject {
    /// Its line.
    pub line: u32,
    /// Left side less right side.
    pub difference: f64,
    /// What the uncertainties of the inputs allow.
    pub allowed: f64,
}

/// Two givens that are correlated.
#[derive(Clone, Debug, Serialize)]
#[expect(missing_docs, reason = "two names and their correlation coefficient")]
pub struct CorrelationObject {
    pub a: String,
    pub b: String,
    pub r: f64,
}
