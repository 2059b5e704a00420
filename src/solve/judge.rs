//! Judges conditions and states at the solution.

use crate::diagnostic::{Diagnostic, code};
use crate::gas;
use crate::gas::verdict::Judge;
use crate::sheet::{Clause, Condition, Property, Sheet, StateId};
use crate::syntax::Comparison;
use crate::units;
use uom::si::f64::{Pressure, ThermodynamicTemperature};
use uom::si::pressure::pascal;
use uom::si::thermodynamic_temperature::kelvin;

use super::recheck;
use super::{Judged, Sides, StateVerdict, Verdict};

/// Relative difference of two sides that rounding alone makes: sides that agree to this are equal, so that `x <= x_max`
/// holds where x is x_max by another way of calculating.
const EQUAL: f64 = 1e-12;

/// Judges a clause; `None` where it has no condition. `half_widths` are those of left side less right side of each of its
/// comparisons in order.
pub(super) fn judge(
    sheet: &Sheet,
    values: &[f64],
    clause: &Clause,
    half_widths: &mut impl Iterator<Item = f64>,
    site_pa: f64,
) -> Option<Judged> {
    let condition = clause.condition.as_ref()?;
    Some(judge_condition(sheet, values, condition, half_widths, site_pa))
}

fn judge_condition(
    sheet: &Sheet,
    values: &[f64],
    condition: &Condition,
    half_widths: &mut impl Iterator<Item = f64>,
    site_pa: f64,
) -> Judged {
    match condition {
        Condition::And(a, b) => {
            let (a, b) = (judge_condition(sheet, values, a, half_widths, site_pa), judge_condition(sheet, values, b, half_widths, site_pa));
            Judged { holds: a.holds && b.holds, sides: None }
        }
        Condition::Or(a, b) => {
            let (a, b) = (judge_condition(sheet, values, a, half_widths, site_pa), judge_condition(sheet, values, b, half_widths, site_pa));
            Judged { holds: a.holds || b.holds, sides: None }
        }
        Condition::Not(inner) => Judged { holds: !judge_condition(sheet, values, inner, half_widths, site_pa).holds, sides: None },
        Condition::Compare { left, comparison, right, unit } => {
            let (left, right) = (recheck::walk(sheet, values, *left), recheck::walk(sheet, values, *right));
            let half_width = half_widths.next().unwrap_or(0.0) / unit.unit.factor.abs();
            let rising = matches!(comparison, Comparison::Greater | Comparison::GreaterOrEqual);
            let mut margin_si = if rising { left.value - right.value } else { right.value - left.value };
            if margin_si.abs() <= EQUAL * (left.value.abs() + right.value.abs()) {
                margin_si = 0.0;
            }
            let strict = matches!(comparison, Comparison::Greater | Comparison::Less);
            let holds = if strict { margin_si > 0.0 } else { margin_si >= 0.0 };
            let margin = margin_si / unit.unit.factor;
            let sides = Sides {
                left: unit.from_si(left.value, site_pa),
                right: unit.from_si(right.value, site_pa),
                margin,
                unit: unit.text(),
                half_width,
                place: units::place_for(margin, half_width),
            };
            Judged { holds, sides: Some(sides) }
        }
    }
}

/// The verdict on the ideal gas law at a state of an ideal gas.
///
/// Where a reference equation tells the error, it decides against the limit of the sheet: the error in density, and of the heat
/// capacity and the speed of sound where the sheet uses them. Beyond the range of that equation a person has to judge. Without
/// one the rules of common practice (no source) stand in: p below a third of the critical pressure with T at least twice the
/// critical temperature, or p below a hundredth of the critical pressure, confirm; where both refuse, a person has to judge.
pub(super) fn state(sheet: &Sheet, values: &[f64], id: StateId, judge: Option<&Judge>) -> StateVerdict {
    let state = sheet.state(id);
    let value = |wanted: Property| {
        let found = state.properties.iter().find(|(property, _)| *property == wanted);
        found.map(|(_, quantity)| values[quantity.0 as usize]).filter(|value| value.is_finite())
    };
    let (p_pa, t_k) = (value(Property::P), value(Property::T));
    let rules = p_pa.zip(t_k).and_then(|(p_pa, t_k)| {
        gas::rules_of_thumb(&sheet.gas(state.gas).gas, ThermodynamicTemperature::new::<kelvin>(t_k), Pressure::new::<pascal>(p_pa))
    });
    let errors = judge.zip(p_pa.zip(t_k)).map(|(judge, (p_pa, t_k))| judge.errors(t_k, p_pa));
    let limit_percent = limit_percent(sheet);
    let (verdict, errors) = match errors {
        Some(Ok(errors)) => {
            let uses = |wanted: Property| state.properties.iter().any(|(property, _)| *property == wanted);
            let deciding = [
                Some(errors.density_percent),
                uses(Property::Cp).then_some(errors.cp_percent),
                uses(Property::W).then_some(errors.w_percent),
            ];
            let holds = deciding.into_iter().flatten().all(|error| error.abs() <= limit_percent || error.is_nan());
            (if holds { Verdict::Confirmed } else { Verdict::Failed }, Some(errors))
        }
        Some(Err(_)) => (Verdict::ForJudgement, None),
        None if rules.is_some_and(|rules| rules.allow()) => (Verdict::Confirmed, None),
        None => (Verdict::ForJudgement, None),
    };
    StateVerdict {
        state: id,
        verdict,
        ideal_error_percent: errors.map(|errors| errors.density_percent),
        errors,
        rule_a: rules.map(|rules| rules.a),
        rule_b: rules.map(|rules| rules.b),
        p_pa,
        t_k,
    }
}

/// The error of the ideal law that a sheet allows, in percent: 1 % unless its head says otherwise.
pub(super) fn limit_percent(sheet: &Sheet) -> f64 {
    100.0 * sheet.head.ideal_gas_limit.map_or(0.01, |(limit, _)| limit)
}

/// The verdicts on all states of ideal gases.
pub(super) fn states(sheet: &Sheet, values: &[f64]) -> Vec<StateVerdict> {
    let mut judges: Vec<Option<Option<Judge>>> = vec![None; sheet.gases.len()];
    let mut verdicts = Vec::new();
    for (at, entry) in sheet.states.iter().enumerate() {
        let gas = sheet.gas(entry.gas);
        if gas.model.is_ideal() {
            let judge = judges[entry.gas.0 as usize].get_or_insert_with(|| Judge::of(&gas.gas));
            verdicts.push(state(sheet, values, StateId(at as u32), judge.as_ref()));
        }
    }
    verdicts
}

/// Says of each gas whose ideal law fails at a state of it, what would cure it.
pub(super) fn failures(sheet: &Sheet, verdicts: &[StateVerdict]) -> Vec<Diagnostic> {
    let limit = units::write_figures(limit_percent(sheet), 2);
    let failed = verdicts.iter().filter(|verdict| verdict.verdict == Verdict::Failed);
    failed
        .filter_map(|verdict| {
            let errors = verdict.errors?;
            let (state, percent) = (sheet.state(verdict.state), limit_percent(sheet));
            let gas = sheet.gas(state.gas);
            let uses = |wanted: Property| state.properties.iter().any(|(property, _)| *property == wanted);
            let over = [
                ("density", true, errors.density_percent),
                ("heat capacity", uses(Property::Cp), errors.cp_percent),
                ("speed of sound", uses(Property::W), errors.w_percent),
            ];
            let over: Vec<String> = over
                .into_iter()
                .filter(|(_, used, error)| *used && error.abs() > percent)
                .map(|(word, _, error)| format!("{} % in {word}", units::write_figures(error, 2)))
                .collect();
            Some(code::ideal_law_fails::finding(
                state.span,
                &state.name,
                &gas.gas.title(),
                &over.join(", "),
                &limit,
                gas.model_place,
                &gas.name,
            ))
        })
        .collect()
}
