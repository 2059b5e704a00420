//! From a sheet to its solution, and what stands in the way of it.

use std::collections::BTreeSet;

use crate::diagnostic::{Diagnostic, code};
use crate::sheet::{Expr, ExprId, GasFunction, Origin, QuantityId, RelationOrigin, Sheet};
use crate::units;

use super::plan::{self, How, NO_SLOT, Plan};
use super::run::{self, Evaluation};
use super::structure::{Part, Pattern, Structure, structure};
use super::{Method, Solution, Step, SurplusCheck, explain, judge, recheck, refusal, reservation, slip};

/// A scaled residual of the re-check above this is no solution.
const LARGEST_RESIDUAL: f64 = 1e-8;

/// What rounding allows a relation that was not needed to be off by, relative to the size of its terms.
const ROUNDING: f64 = 1e-9;

/// Errors of one kind that are told; more of them are the work of a program and help nobody.
const MOST_ERRORS: usize = 1000;

/// Coverage of the difference that the uncertainties of the inputs allow (JCGM 100:2008, 6.2.1: about 95 %).
const COVERAGE: f64 = 2.0;

/// The structure of a sheet, with rows and columns as relations and quantities.
struct Analysed {
    structure: Structure,
    /// The relation of every row.
    relations: Vec<usize>,
    /// The quantity of every column.
    quantities: Vec<QuantityId>,
}

/// As far as structure goes: what is missing. Over-determined parts conflict or agree only by their values.
#[must_use]
pub fn check(sheet: &Sheet) -> Vec<Diagnostic> {
    missing(sheet, &analyse(sheet))
}

fn analyse(sheet: &Sheet) -> Analysed {
    let mut poisoned = vec![false; sheet.quantities.len()];
    for id in &sheet.poisoned {
        poisoned[id.0 as usize] = true;
    }
    let atmosphere = sheet.relations.iter().any(|relation| relation.origin == RelationOrigin::Atmosphere);
    let mut columns = vec![u32::MAX; sheet.quantities.len()];
    let mut quantities = Vec::new();
    for (at, quantity) in sheet.quantities.iter().enumerate() {
        let settled = quantity.is_known() || poisoned[at] || (atmosphere && quantity.origin == Origin::SitePressure);
        if !settled {
            columns[at] = quantities.len() as u32;
            quantities.push(QuantityId(at as u32));
        }
    }
    // What defines comes first, so that what is left over is a line that says it again.
    let rank = |origin: RelationOrigin| match origin {
        RelationOrigin::Law(..) => 0,
        RelationOrigin::Let => 1,
        RelationOrigin::At(..) => 2,
        RelationOrigin::Line | RelationOrigin::Atmosphere => 3,
    };
    let mut relations: Vec<usize> =
        (0..sheet.relations.len()).filter(|at| sheet.relations[*at].origin != RelationOrigin::Atmosphere).collect();
    relations.sort_by_key(|at| (rank(sheet.relations[*at].origin), *at));
    let mut pattern = Pattern::new(quantities.len());
    let mut row = Vec::new();
    for at in &relations {
        row.clear();
        for side in [sheet.relations[*at].left, sheet.relations[*at].right] {
            sheet.exprs.quantities(side, &mut |id| {
                let column = columns[id.0 as usize];
                if column != u32::MAX {
                    row.push(column);
                }
            });
        }
        pattern.push(&row);
    }
    Analysed { structure: structure(&pattern), relations, quantities }
}

fn missing(sheet: &Sheet, analysed: &Analysed) -> Vec<Diagnostic> {
    let parts = &analysed.structure.missing;
    let untold = parts.get(MOST_ERRORS).and_then(|part| part.columns.first()).map(|column| {
        let place = sheet.quantity(analysed.quantities[*column as usize]).span;
        code::too_many_errors::finding(place, parts.len() - MOST_ERRORS)
    });
    parts
        .iter()
        .take(MOST_ERRORS)
        .map(|part| {
            let quantities: Vec<QuantityId> = part.columns.iter().map(|column| analysed.quantities[*column as usize]).collect();
            let relations: Vec<usize> = part.rows.iter().map(|row| analysed.relations[*row as usize]).collect();
            explain::missing(sheet, part, &quantities, &relations)
        })
        .chain(untold)
        .collect()
}

/// The plan of a sheet, and what is missing in it. Closed forms are added to its arena.
pub(super) fn plan(sheet: &mut Sheet) -> (Plan, Vec<Diagnostic>) {
    let analysed = analyse(sheet);
    let missing = missing(sheet, &analysed);
    (compile(sheet, &analysed), missing)
}

fn compile(sheet: &mut Sheet, analysed: &Analysed) -> Plan {
    let blocks: Vec<Part> = analysed
        .structure
        .blocks
        .iter()
        .map(|block| Part {
            rows: block.rows.iter().map(|row| analysed.relations[*row as usize] as u32).collect(),
            columns: block.columns.iter().map(|column| analysed.quantities[*column as usize].0).collect(),
        })
        .collect();
    let surplus: Vec<usize> = analysed.structure.surplus.iter().map(|(row, _)| analysed.relations[*row as usize]).collect();
    plan::compile(sheet, &blocks, &surplus)
}

/// The values of the inputs of a plan as the sheet gives them.
pub(super) fn inputs(sheet: &Sheet, plan: &Plan) -> Vec<f64> {
    plan.inputs.iter().map(|(id, _)| sheet.quantity(*id).reading.as_ref().map_or(f64::NAN, |reading| reading.si)).collect()
}

/// Solves a sheet. Closed forms are added to its arena. Without errors there is a solution; with errors there is none.
#[must_use]
pub fn solve(sheet: &mut Sheet) -> (Option<Solution>, Vec<Diagnostic>) {
    let analysed = analyse(sheet);
    let mut findings = missing(sheet, &analysed);
    let plan = compile(sheet, &analysed);
    for (relation, quantity) in &plan.empty {
        findings.push(code::no_solution::says_nothing(sheet.relations[*relation].span, &sheet.quantity(*quantity).name));
    }
    let inputs = inputs(sheet, &plan);
    let evaluation = run::evaluate(sheet, &plan, &inputs);
    let values: Vec<f64> =
        plan.slots.iter().map(|slot| if *slot == NO_SLOT { f64::NAN } else { evaluation.values[*slot as usize] }).collect();
    let site_pa = sheet.site_pressure.map_or(0.0, |id| values[id.0 as usize]);
    let refused = faults(sheet, &plan, &evaluation, &values, site_pa, &mut findings);
    findings.extend(refusal::phases(sheet, &values, &refused));
    let widths = Widths::of(sheet, &plan, &evaluation);
    let surplus = surplus_checks(sheet, &analysed, &plan, &evaluation, &widths, &mut findings);
    if findings.iter().any(Diagnostic::is_error) {
        return (None, findings);
    }
    let solution = conclude(sheet, &plan, &evaluation, values, &widths, surplus, site_pa, &mut findings);
    if findings.iter().any(Diagnostic::is_error) { (None, findings) } else { (Some(solution), findings) }
}

/// Tells of everything that has no value or an impossible one. What follows from another one stays silent. Of every state,
/// whether its gas refuses it.
fn faults(sheet: &Sheet, plan: &Plan, evaluation: &Evaluation, values: &[f64], site_pa: f64, findings: &mut Vec<Diagnostic>) -> Vec<bool> {
    let mut refused = vec![false; sheet.states.len()];
    let mut told = vec![false; sheet.quantities.len()];
    for (id, _) in &plan.inputs {
        // A reading in gauge below full vacuum is told where it stands; here only results are.
        told[id.0 as usize] = !values[id.0 as usize].is_finite();
    }
    for step in &plan.steps {
        let mut follows = false;
        match &step.how {
            How::ClosedForm(expression) => sheet.exprs.quantities(*expression, &mut |id| {
                follows |= told[id.0 as usize] || plan.slots[id.0 as usize] == NO_SLOT;
            }),
            How::Block(_) => {
                for relation in &step.relations {
                    for side in [sheet.relations[*relation].left, sheet.relations[*relation].right] {
                        sheet.exprs.quantities(side, &mut |id| follows |= !step.quantities.contains(&id) && told[id.0 as usize]);
                    }
                }
            }
        }
        let mut bad = false;
        if !follows {
            let before = findings.len();
            match &step.how {
                How::ClosedForm(expression) => {
                    let id = step.quantities[0];
                    let span = sheet.relations[step.relations[0]].span;
                    let owner = match sheet.relations[step.relations[0]].origin {
                        RelationOrigin::Law(state, _) | RelationOrigin::At(state, _) => Some(state),
                        _ => None,
                    };
                    if owner.is_some_and(|state| refused[state.0 as usize]) && !values[id.0 as usize].is_finite() {
                        bad = true;
                    } else if let Some(finding) = refusal::of_expression(sheet, owner, *expression, span, values) {
                        findings.push(finding);
                        if let Some(state) = owner {
                            refused[state.0 as usize] = true;
                        }
                    } else if let Some(finding) = out_of_model(sheet, id, values)
                        .or_else(|| temperature_out_of_model(sheet, id, *expression, values))
                        .or_else(|| explain::undefined(sheet, values, *expression, span, site_pa))
                    {
                        findings.push(finding);
                    } else if let Some(finding) = explain::impossible(sheet, id, values[id.0 as usize], site_pa)
                        .or_else(|| outside(sheet, plan, evaluation, id, values, site_pa))
                    {
                        findings.push(finding);
                    }
                }
                How::Block(at) => match &evaluation.outcomes[*at] {
                    Err(fault) => {
                        let block = &plan.blocks[*at];
                        let unknowns: Vec<QuantityId> = step.quantities.clone();
                        findings.extend(explain::fault(sheet, fault, &block.relations, &unknowns, site_pa));
                        bad = true;
                    }
                    Ok(solved) => {
                        for id in &step.quantities {
                            if let Some(finding) =
                                out_of_model(sheet, *id, values).or_else(|| explain::impossible(sheet, *id, values[id.0 as usize], site_pa))
                            {
                                findings.push(finding);
                                break;
                            }
                        }
                        if !solved.others.is_empty() && findings.len() == before {
                            let id = plan.blocks[*at].unknowns[solved.told].0;
                            let chosen = explain::shown(sheet, id, values[id.0 as usize], site_pa);
                            findings.push(code::several_roots::chosen(
                                sheet.quantity(id).span,
                                &sheet.quantity(id).name,
                                &chosen,
                                &explain::shown_all(sheet, id, &solved.others, site_pa),
                            ));
                        }
                    }
                },
            }
            bad |= findings[before..].iter().any(Diagnostic::is_error);
        }
        for id in &step.quantities {
            told[id.0 as usize] = follows || bad || !values[id.0 as usize].is_finite();
        }
    }
    refused
}

/// A property that needs the heat capacity of a gas outside the range in which it is known.
fn out_of_model(sheet: &Sheet, id: QuantityId, values: &[f64]) -> Option<Diagnostic> {
    let Origin::Property(state, property) = sheet.quantity(id).origin else { return None };
    if !property.is_caloric() {
        return None;
    }
    let entry = sheet.state(state);
    let (_, t) = entry.properties.iter().find(|(property, _)| *property == crate::sheet::Property::T)?;
    let t_k = values[t.0 as usize];
    if !sheet.gas(entry.gas).model.is_ideal() {
        return None;
    }
    let gas = &sheet.gas(entry.gas).gas;
    let range = gas.caloric_range();
    let kelvin = |t_k: f64| format!("{} K", units::write_figures(t_k, 4));
    (t_k.is_finite() && t_k > 0.0 && !range.contains(t_k)).then(|| {
        let limit = if t_k < range.limit_low_k {
            format!("from {} on", kelvin(range.limit_low_k))
        } else {
            format!("up to {}", kelvin(range.limit_high_k))
        };
        let source =
            format!("published range {} to {}: {}", kelvin(range.low_k), kelvin(range.high_k), crate::gas::catalogue::caloric_source(gas));
        code::outside_model_range::beyond(entry.span, &entry.name, &kelvin(t_k), &limit, &source)
    })
}

/// A temperature that would have to lie outside the range in which the heat capacity of its gas is known.
fn temperature_out_of_model(sheet: &Sheet, id: QuantityId, expression: ExprId, values: &[f64]) -> Option<Diagnostic> {
    let (Origin::Property(state, _), Expr::Gas(function, gas, argument)) = (sheet.quantity(id).origin, sheet.exprs.get(expression)) else {
        return None;
    };
    let word = match function {
        GasFunction::TemperatureOfEnthalpy => "enthalpy",
        GasFunction::TemperatureOfInternalEnergy => "internal energy",
        GasFunction::TemperatureOfEntropy => "entropy at 100 kPa",
        _ => return None,
    };
    let value = recheck::walk(sheet, values, argument).value;
    if values[id.0 as usize].is_finite() || !value.is_finite() {
        return None;
    }
    let (entry, range) = (sheet.state(state), sheet.gas(gas).gas.caloric_range());
    let kelvin = |t_k: f64| format!("{} K", units::write_figures(t_k, 4));
    let unit = if function == GasFunction::TemperatureOfEntropy { "J/(kg.K)" } else { "J/kg" };
    let limit = format!("from {} to {}", kelvin(range.limit_low_k), kelvin(range.limit_high_k));
    let source = format!(
        "published range {} to {}: {}",
        kelvin(range.low_k),
        kelvin(range.high_k),
        crate::gas::catalogue::caloric_source(&sheet.gas(gas).gas)
    );
    let at = format!("an {word} of {} {unit}", units::write_figures(value, 4));
    Some(code::outside_model_range::beyond(entry.span, &entry.name, &at, &limit, &source))
}

/// A quantity in closed form that lies outside its bounds.
fn outside(sheet: &Sheet, plan: &Plan, evaluation: &Evaluation, id: QuantityId, values: &[f64], site_pa: f64) -> Option<Diagnostic> {
    let _ = (plan, evaluation);
    let quantity = sheet.quantity(id);
    let bound = |expr: Option<crate::sheet::ExprId>| expr.map(|expr| recheck::walk(sheet, values, expr).value);
    let (low, high, value) = (bound(quantity.low), bound(quantity.high), values[id.0 as usize]);
    let beyond = low.is_some_and(|low| value < low - 1e-12 * low.abs()) || high.is_some_and(|high| value > high + 1e-12 * high.abs());
    beyond.then(|| {
        let end = |bound: Option<f64>| bound.map_or(String::new(), |bound| explain::shown(sheet, id, bound, site_pa));
        let bounds = format!("{} .. {}", end(low), end(high));
        code::no_solution::outside_bounds(quantity.bounds_span, &quantity.name, &explain::shown(sheet, id, value, site_pa), bounds.trim())
    })
}

/// How far each value is known, from the figures and the stated limits of the inputs, to first order.
struct Widths {
    /// Half widths by quantity, in quadrature.
    quantities: Vec<f64>,
    /// Half widths of readings above the atmosphere of the site.
    gauge: Vec<f64>,
    /// Half widths of left side less right side of every comparison.
    comparisons: Vec<f64>,
    /// Standard uncertainties of left side less right side of every surplus relation, and the inputs that move it.
    surplus: Vec<(f64, Vec<QuantityId>)>,
}

impl Widths {
    fn of(sheet: &Sheet, plan: &Plan, evaluation: &Evaluation) -> Self {
        let n = sheet.quantities.len();
        let mut widths = Self {
            quantities: vec![0.0; n],
            gauge: vec![0.0; n],
            comparisons: vec![0.0; plan.comparisons.len()],
            surplus: vec![(0.0, Vec::new()); plan.surplus.len()],
        };
        let site = sheet.site_pressure.map(|id| plan.slots[id.0 as usize]).filter(|slot| *slot != NO_SLOT);
        let mut tangents = vec![0.0; plan.tape.len()];
        for (id, input) in &plan.inputs {
            let Some(reading) = &sheet.quantity(*id).reading else { continue };
            let half_width = reading.uncertainty.map_or(reading.half_width_si, |stated| stated.width_si);
            // Limits are taken for rectangular where only the figures are known.
            let standard = reading.uncertainty.map_or(reading.half_width_si / 3f64.sqrt(), |stated| stated.standard_si());
            if half_width == 0.0 && plan.surplus.is_empty() {
                continue;
            }
            tangents.fill(0.0);
            tangents[*input as usize] = 1.0;
            evaluation.tangents(&mut tangents);
            let of = |slot: u32| if slot == NO_SLOT || !tangents[slot as usize].is_finite() { 0.0 } else { tangents[slot as usize] };
            let at_site = site.map_or(0.0, of);
            for (at, slot) in plan.slots.iter().enumerate() {
                let part = of(*slot) * half_width;
                widths.quantities[at] += part * part;
                let part = (of(*slot) - at_site) * half_width;
                widths.gauge[at] += part * part;
            }
            for (width, sides) in widths.comparisons.iter_mut().zip(&plan.comparisons) {
                let part = (of(sides.left) - of(sides.right)) * half_width;
                *width += part * part;
            }
            for ((variance, inputs), residual) in widths.surplus.iter_mut().zip(&plan.surplus) {
                let slope = of(residual.left) - of(residual.right);
                if slope != 0.0 {
                    inputs.push(*id);
                }
                *variance += slope * standard * (slope * standard);
            }
        }
        let root = |value: &mut f64| *value = value.sqrt();
        widths.quantities.iter_mut().chain(&mut widths.gauge).chain(&mut widths.comparisons).for_each(root);
        widths.surplus.iter_mut().for_each(|(variance, _)| root(variance));
        widths
    }
}

fn surplus_checks(
    sheet: &Sheet,
    analysed: &Analysed,
    plan: &Plan,
    evaluation: &Evaluation,
    widths: &Widths,
    findings: &mut Vec<Diagnostic>,
) -> Vec<SurplusCheck> {
    let mut checks = Vec::new();
    let mut conflicts: BTreeSet<usize> = BTreeSet::new();
    for ((residual, (standard, inputs)), (_, part)) in plan.surplus.iter().zip(&widths.surplus).zip(&analysed.structure.surplus) {
        let (left, right) = (evaluation.values[residual.left as usize], evaluation.values[residual.right as usize]);
        let difference = left - right;
        if !difference.is_finite() {
            // A side has no value: where it lacks one is told there, or here where it is this line's own fault.
            let span = sheet.relations[residual.relation].span;
            let values: Vec<f64> =
                plan.slots.iter().map(|slot| if *slot == NO_SLOT { f64::NAN } else { evaluation.values[*slot as usize] }).collect();
            let relation = &sheet.relations[residual.relation];
            let mut complete = true;
            for side in [relation.left, relation.right] {
                sheet.exprs.quantities(side, &mut |id| complete &= values[id.0 as usize].is_finite());
            }
            if complete {
                findings.extend(
                    [relation.left, relation.right].into_iter().find_map(|side| explain::undefined(sheet, &values, side, span, 0.0)),
                );
            }
            continue;
        }
        let allowed = (COVERAGE * standard).max(ROUNDING * (left.abs() + right.abs()));
        if difference.abs() <= allowed {
            checks.push(SurplusCheck { relation: residual.relation, difference, allowed });
            findings.push(explain::agrees(sheet, residual.relation, difference, allowed));
        } else {
            let part: Vec<usize> = part.rows.iter().map(|row| analysed.relations[*row as usize]).collect();
            // Relations that conflict together are one mistake.
            if part.iter().any(|relation| conflicts.contains(relation)) {
                continue;
            }
            conflicts.extend(&part);
            if conflicts.len() > MOST_ERRORS {
                continue;
            }
            findings.push(explain::conflict(sheet, residual.relation, difference, allowed, inputs, &part));
        }
    }
    checks
}

#[expect(clippy::too_many_arguments, reason = "everything that the solution is made of, gathered once")]
fn conclude(
    sheet: &Sheet,
    plan: &Plan,
    evaluation: &Evaluation,
    values: Vec<f64>,
    widths: &Widths,
    surplus: Vec<SurplusCheck>,
    site_pa: f64,
    findings: &mut Vec<Diagnostic>,
) -> Solution {
    let skipped: BTreeSet<usize> = plan.surplus.iter().map(|residual| residual.relation).collect();
    let mut worst: Option<(usize, f64)> = None;
    for at in (0..sheet.relations.len()).filter(|at| !skipped.contains(at)) {
        let residual = recheck::residual(sheet, &values, at);
        if residual.is_nan() || residual > LARGEST_RESIDUAL {
            let text = if residual.is_nan() { "not a number".to_owned() } else { units::write_figures(residual, 2) };
            findings.push(code::not_converged::residual(sheet.relations[at].span, &text));
        }
        if worst.is_none_or(|(_, largest)| residual > largest) {
            worst = Some((at, residual));
        }
    }
    let mut half_widths = widths.comparisons.iter().copied();
    let assumptions: Vec<_> =
        sheet.assumptions.iter().map(|clause| judge::judge(sheet, &values, clause, &mut half_widths, site_pa)).collect();
    let requirements: Vec<_> =
        sheet.requirements.iter().filter_map(|clause| judge::judge(sheet, &values, clause, &mut half_widths, site_pa)).collect();
    let cautions: Vec<bool> = sheet
        .cautions
        .iter()
        .map(|clause| judge::judge(sheet, &values, clause, &mut half_widths, site_pa).is_none_or(|judged| judged.holds))
        .collect();
    let states = judge::states(sheet, &values);
    findings.extend(judge::failures(sheet, &states));
    reservation::reservations(sheet, &values, findings);
    slip::slips(sheet, &values, &plan.steps, &requirements, site_pa, findings);
    let steps: Vec<Step> = plan
        .steps
        .iter()
        .map(|step| Step {
            quantities: step.quantities.clone(),
            relations: step.relations.clone(),
            method: match &step.how {
                How::ClosedForm(expression) => Method::ClosedForm { expression: *expression },
                How::Block(at) => match &evaluation.outcomes[*at] {
                    Ok(solved) => match solved.branch.and_then(|branch| plan.blocks[*at].candidates.get(branch)) {
                        Some((_, expression)) => Method::ClosedForm { expression: *expression },
                        None => Method::Numeric { how: solved.how, evaluations: solved.evaluations, residual: solved.residual },
                    },
                    Err(_) => Method::Numeric { how: "not solved", evaluations: 0, residual: f64::NAN },
                },
            },
        })
        .collect();
    let condensates = reservation::condensates(sheet, &values);
    Solution {
        n_unknowns: steps.iter().map(|step| step.quantities.len()).sum(),
        n_relations: sheet.relations.len(),
        values,
        half_widths: widths.quantities.clone(),
        gauge_half_widths: widths.gauge.clone(),
        steps,
        requirements,
        assumptions,
        cautions,
        states,
        condensates,
        surplus,
        largest_residual: worst.map_or(0.0, |(_, residual)| residual),
        worst_relation: worst.map(|(at, _)| at),
        site_pressure_pa: site_pa,
    }
}
