//! The result as data: what the object of `solve --json` holds for a sheet.

use super::verdict::interval_unit;
use crate::diagnostic::LineIndex;
use crate::diagnostic::json::FindingObject;
use crate::gas::verdict::{IdealError, Judge};
use crate::sheet::{GasId, Origin, Quantity, QuantityId, Reading, StateId, write_expr};
use crate::solve::{Method, Solution, Step};
use crate::syntax::Shape;

use super::model::judge_source;
use super::object::{
    AnswerObject, AssumptionObject, CautionObject, ChecksObject, CorrelationObject, IdealErrorsObject, QuantityObject, RequirementObject,
    ResultObject, RulesObject, SheetObject, StateObject, StepObject, SurplusObject, ToolObject, UncertaintyObject,
};
use super::{Input, answer_text};

/// Quantities and lines that the step of a block lists at the most: each quantity of the block has the step.
const MOST_OF_A_BLOCK: usize = 64;

/// The result of a sheet as data.
#[must_use]
pub fn result(input: &Input) -> ResultObject {
    let lines = LineIndex::new(input.text);
    let maker = Maker { input, lines: &lines };
    let head = &input.sheet.head;
    let text = |text: &Option<crate::syntax::Text>| text.as_ref().map(|text| text.text.clone());
    ResultObject {
        sheet: SheetObject {
            path: input.path.to_owned(),
            title: text(&head.title),
            document: text(&head.document),
            revision: text(&head.revision),
            purpose: text(&head.purpose),
            digest: input.digest(),
        },
        tool: ToolObject { name: env!("CARGO_PKG_NAME"), version: env!("CARGO_PKG_VERSION") },
        status: if input.solution.is_some() { "solved" } else { "failed" },
        quantities: maker.quantities(),
        answers: maker.answers(),
        states: maker.states(),
        requirements: maker.requirements(),
        assumptions: maker.assumptions(),
        cautions: maker.cautions(),
        checks: input.solution.map(|solution| maker.checks(solution)),
        correlations: maker.correlations(),
        findings: input.findings.iter().map(|finding| FindingObject::new(finding, input.path, input.text, &lines)).collect(),
    }
}

struct Maker<'a> {
    input: &'a Input<'a>,
    lines: &'a LineIndex,
}

impl Maker<'_> {
    fn quantities(&self) -> Vec<QuantityObject> {
        let sheet = self.input.sheet;
        let mut found_by = vec![None; sheet.quantities.len()];
        for (at, step) in self.input.solution.iter().flat_map(|solution| solution.steps.iter().enumerate()) {
            for id in &step.quantities {
                found_by[id.0 as usize] = Some((at, step));
            }
        }
        let ids = (0..sheet.quantities.len() as u32).map(QuantityId);
        ids.zip(&sheet.quantities).map(|(id, quantity)| self.quantity(id, quantity, found_by[id.0 as usize])).collect()
    }

    fn quantity(&self, id: QuantityId, quantity: &Quantity, found_by: Option<(usize, &Step)>) -> QuantityObject {
        let input = self.input;
        let si = input.si(id);
        let uncertainty = quantity.reading.as_ref().filter(|_| input.solution.is_some()).and_then(|reading| uncertainty(reading, quantity));
        QuantityObject {
            name: quantity.name.clone(),
            description: quantity.description.clone(),
            value: si.map(|si| quantity.shown.from_si(si, input.site_pressure_pa())).filter(|value| value.is_finite()),
            unit: quantity.shown.text(),
            si,
            dimension: quantity.dimension.describe(),
            origin: origin(quantity),
            line: self.lines.line(quantity.span.start),
            figures: input.figures(id),
            uncertainty,
            steps: found_by.map(|(at, step)| self.step(at, step)),
            source: Some(&quantity.source).filter(|source| !source.is_empty()).cloned(),
        }
    }

    fn step(&self, at: usize, step: &Step) -> StepObject {
        let sheet = self.input.sheet;
        let mut lines: Vec<u32> = step
            .relations
            .iter()
            .take(MOST_OF_A_BLOCK)
            .map(|relation| self.input.line(self.lines, sheet.relations[*relation].statement))
            .collect();
        lines.sort_unstable();
        lines.dedup();
        lines.truncate(MOST_OF_A_BLOCK);
        let (method, expression, evaluations, residual) = match step.method {
            Method::ClosedForm { expression } => ("closed form", Some(write_expr(sheet, expression)), None, None),
            Method::Numeric { how, evaluations, residual } => (how, None, Some(evaluations), Some(residual)),
        };
        let quantities = step.quantities.iter().take(MOST_OF_A_BLOCK).map(|id| sheet.quantity(*id).name.clone()).collect();
        StepObject { number: at + 1, method, expression, quantities, lines, evaluations, residual }
    }

    fn answers(&self) -> Vec<AnswerObject> {
        let input = self.input;
        let answers = input.sheet.answers.iter();
        answers
            .map(|answer| AnswerObject {
                name: input.quantity(answer.quantity).name.clone(),
                value: input.si(answer.quantity).map(|si| answer.shown.from_si(si, input.site_pressure_pa())),
                unit: answer.shown.text(),
                text: answer_text(input, answer),
            })
            .collect()
    }

    fn states(&self) -> Vec<StateObject> {
        let sheet = self.input.sheet;
        let verdict_of = |id: StateId| self.input.solution.and_then(|solution| solution.states.iter().find(|verdict| verdict.state == id));
        // Of each gas, once: a model of a mixture takes its time to be set up.
        let mut sources: Vec<Option<&'static str>> = vec![None; sheet.gases.len()];
        let source_of_judge = |gas: GasId| Judge::of(&sheet.gas(gas).gas).as_ref().map_or("", judge_source);
        // A state whose gas is in error has none to be told.
        let states = sheet.states.iter().enumerate().filter(|(_, state)| (state.gas.0 as usize) < sheet.gases.len());
        states
            .map(|(at, state)| {
                let gas = sheet.gas(state.gas);
                let verdict = verdict_of(StateId(at as u32));
                let by = self.input.state_model(StateId(at as u32));
                let properties = state.properties.iter().map(|(property, id)| {
                    let value = self.input.si(*id).map_or(serde_json::Value::Null, serde_json::Value::from);
                    (property.row().field.to_owned(), value)
                });
                StateObject {
                    name: state.name.clone(),
                    gas: self.input.gas_title(state.gas),
                    model: gas.model.word(),
                    line: self.input.line(self.lines, state.statement),
                    model_kind: by.kind,
                    model_source: by.source,
                    extrapolated: by.extrapolated,
                    ideal_errors: verdict.and_then(|verdict| verdict.errors).map(|errors| {
                        let source = sources[state.gas.0 as usize].get_or_insert_with(|| source_of_judge(state.gas));
                        self.ideal_errors(&errors, source)
                    }),
                    condensate: self.input.condensate(StateId(at as u32)),
                    ideal_error_percent: verdict.and_then(|verdict| verdict.ideal_error_percent),
                    verdict: verdict.map(|verdict| verdict.verdict.word()),
                    rules: verdict.map(|verdict| RulesObject { a: verdict.rule_a, b: verdict.rule_b }),
                    properties: properties.collect(),
                }
            })
            .collect()
    }

    fn ideal_errors(&self, errors: &IdealError, source: &str) -> IdealErrorsObject {
        let number = |value: f64| Some(value).filter(|value| value.is_finite());
        IdealErrorsObject {
            density_percent: errors.density_percent,
            cp_percent: number(errors.cp_percent),
            w_percent: number(errors.w_percent),
            h_difference: number(errors.h_j_kg),
            s_difference: number(errors.s_j_kg_k),
            judge: errors.judge.words(),
            judge_source: source.to_owned(),
            extrapolated: errors.is_extrapolated,
            limit_percent: self.input.ideal_limit_percent(),
        }
    }

    fn requirements(&self) -> Vec<RequirementObject> {
        let requirements = self.input.sheet.requirements.iter().enumerate();
        requirements
            .map(|(at, clause)| {
                let judged = self.input.solution.and_then(|solution| solution.requirements.get(at));
                let sides = judged.and_then(|judged| judged.sides.as_ref());
                RequirementObject {
                    text: clause.text.clone(),
                    condition: clause.condition_text.clone(),
                    line: self.input.line(self.lines, clause.statement),
                    met: judged.map(|judged| judged.holds),
                    left: sides.map(|sides| sides.left),
                    right: sides.map(|sides| sides.right),
                    margin: sides.map(|sides| sides.margin),
                    margin_unit: sides.map(|sides| interval_unit(&sides.unit).to_owned()),
                    unit: sides.map(|sides| sides.unit.clone()),
                    probability: None,
                    guarded_margin: None,
                }
            })
            .collect()
    }

    fn assumptions(&self) -> Vec<AssumptionObject> {
        let assumptions = self.input.sheet.assumptions.iter().enumerate();
        assumptions
            .map(|(at, clause)| AssumptionObject {
                text: clause.text.clone(),
                condition: clause.condition.as_ref().map(|_| clause.condition_text.clone()),
                because: clause.because.clone(),
                line: self.input.line(self.lines, clause.statement),
                verdict: self.input.assumption_verdict(at).map(crate::solve::Verdict::word),
            })
            .collect()
    }

    fn cautions(&self) -> Vec<CautionObject> {
        let cautions = self.input.sheet.cautions.iter().enumerate();
        cautions
            .map(|(at, clause)| CautionObject {
                text: clause.text.clone(),
                line: self.input.line(self.lines, clause.statement),
                shown: self.input.solution.and_then(|solution| solution.cautions.get(at)).copied(),
            })
            .collect()
    }

    fn checks(&self, solution: &Solution) -> ChecksObject {
        let line_of = |relation: usize| self.lines.line(self.input.sheet.relations[relation].span.start);
        ChecksObject {
            relations: solution.n_relations,
            unknowns: solution.n_unknowns,
            largest_residual: solution.largest_residual,
            largest_residual_line: solution.worst_relation.map(line_of),
            surplus: solution
                .surplus
                .iter()
                .map(|check| SurplusObject { line: line_of(check.relation), difference: check.difference, allowed: check.allowed })
                .collect(),
        }
    }

    fn correlations(&self) -> Vec<CorrelationObject> {
        let name = |id| self.input.quantity(id).name.clone();
        self.input.sheet.correlations.iter().map(|pair| CorrelationObject { a: name(pair.a), b: name(pair.b), r: pair.r }).collect()
    }
}

fn uncertainty(reading: &Reading, quantity: &Quantity) -> Option<UncertaintyObject> {
    let stated = reading.uncertainty.as_ref()?;
    let standard_si = stated.standard_si();
    let standard = standard_si / quantity.shown.unit.factor;
    let (k, distribution) = match stated.shape {
        Shape::Normal => (stated.k, "normal"),
        Shape::Rectangular => (2.0, "rectangular"),
        Shape::Triangular => (2.0, "triangular"),
        Shape::UShaped => (2.0, "u-shaped"),
    };
    let (contributions, monte_carlo) = (Vec::new(), None);
    Some(UncertaintyObject { standard, expanded: k * standard, k, dof: stated.dof, standard_si, distribution, contributions, monte_carlo })
}

/// The word of the result for where a quantity comes from.
fn origin(quantity: &Quantity) -> &'static str {
    if quantity.reading.is_some() {
        "given"
    } else if quantity.constant.is_some() || matches!(quantity.origin, Origin::GasConstant(_)) {
        "constant"
    } else {
        "solved"
    }
}
