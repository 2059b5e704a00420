//! Judges conditions and states at the solution.

use crate::gas;
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

/// The verdict on the ideal gas law at a state.
///
/// The rules are those of common practice, no source: p below a third of the critical pressure with T at least twice the
/// critical temperature, or p below a hundredth of the critical pressure. Where one of them allows the ideal law it is
/// confirmed; where both refuse, a person has to judge.
pub(super) fn state(sheet: &Sheet, values: &[f64], id: StateId) -> StateVerdict {
    let state = sheet.state(id);
    let value = |wanted: Property| {
        state
            .properties
            .iter()
            .find(|(property, _)| *property == wanted)
            .map(|(_, quantity)| values[quantity.0 as usize])
            .filter(|value| value.is_finite())
    };
    let (p_pa, t_k) = (value(Property::P), value(Property::T));
    let rules = p_pa.zip(t_k).and_then(|(p_pa, t_k)| {
        gas::rules_of_thumb(&sheet.gas(state.gas).gas, ThermodynamicTemperature::new::<kelvin>(t_k), Pressure::new::<pascal>(p_pa))
    });
    let allowed = rules.is_some_and(|rules| rules.allow());
    StateVerdict {
        state: id,
        verdict: if allowed { Verdict::Confirmed } else { Verdict::ForJudgement },
        ideal_error_percent: None,
        rule_a: rules.map(|rules| rules.a),
        rule_b: rules.map(|rules| rules.b),
        p_pa,
        t_k,
    }
}
