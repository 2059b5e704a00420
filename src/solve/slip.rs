//! Slips that only show at the solution: what a checker would ask about a sheet that solves.

use crate::diagnostic::{Diagnostic, code};
use crate::sheet::{Origin, Property, QuantityId, Sheet};
use crate::units::{self, Dimension};

use super::plan::PlannedStep;
use super::{Judged, explain};

/// A heat capacity ratio given by hand may differ from that of the gas by this much before it is told.
const SAME_RATIO: f64 = 1e-3;

/// Looks for slips at the solution.
pub(super) fn slips(
    sheet: &Sheet,
    values: &[f64],
    steps: &[PlannedStep],
    requirements: &[Judged],
    site_pa: f64,
    findings: &mut Vec<Diagnostic>,
) {
    let moved = moved_by_inputs(sheet, steps);
    let mut told: Vec<QuantityId> = Vec::new();
    for answer in &sheet.answers {
        if !moved[answer.quantity.0 as usize] && !told.contains(&answer.quantity) {
            told.push(answer.quantity);
            findings.push(code::answer_without_input::finding(answer.span, &sheet.quantity(answer.quantity).name));
        }
    }
    for (clause, judged) in sheet.requirements.iter().zip(requirements) {
        let Some(condition) = &clause.condition else { continue };
        let (mut moves, mut result) = (false, false);
        condition.sides(&mut |side| {
            sheet.exprs.quantities(side, &mut |id| {
                moves |= moved[id.0 as usize];
                result |= !sheet.quantity(id).is_known();
            });
        });
        if result && !moves {
            findings.push(code::requirement_decides_nothing::no_input(clause.span));
        }
        if let Some(sides) = &judged.sides
            && sides.margin.abs() < sides.half_width
            // Sides that are not known at all decide nothing by their figures.
            && sides.half_width <= sides.left.abs() + sides.right.abs()
            && result
        {
            let unit = sides.unit.split(' ').next().unwrap_or("");
            let text = |value: f64| format!("{} {unit}", units::write_figures(value, 2)).trim_end().to_owned();
            findings.push(code::decided_by_missing_figures::finding(clause.span, &text(sides.margin), &text(sides.half_width)));
        }
    }
    ratios_by_hand(sheet, values, findings);
    for typed in &sheet.typed_numbers {
        let value = values[typed.quantity.0 as usize] - if typed.gauge { site_pa } else { 0.0 };
        if value.is_finite() && (value - typed.si).abs() > typed.half_width_si * (1.0 + 1e-9) {
            let name = &sheet.quantity(typed.quantity).name;
            let value = explain::shown(sheet, typed.quantity, values[typed.quantity.0 as usize], site_pa);
            findings.push(code::typed_number_disagrees::finding(typed.span, name, &typed.text, &value));
        }
    }
}

/// Which quantities hang on an input, in the order in which they are found.
fn moved_by_inputs(sheet: &Sheet, steps: &[PlannedStep]) -> Vec<bool> {
    let mut moved: Vec<bool> = sheet.quantities.iter().map(|quantity| quantity.reading.is_some()).collect();
    for step in steps {
        let mut moves = false;
        for relation in &step.relations {
            let relation = &sheet.relations[*relation];
            for side in [relation.left, relation.right] {
                sheet.exprs.quantities(side, &mut |id| moves |= !step.quantities.contains(&id) && moved[id.0 as usize]);
            }
        }
        for id in &step.quantities {
            moved[id.0 as usize] |= moves;
        }
    }
    moved
}

/// A heat capacity ratio given by hand for a gas that the sheet also uses as a state.
fn ratios_by_hand(sheet: &Sheet, values: &[f64], findings: &mut Vec<Diagnostic>) {
    for quantity in &sheet.quantities {
        let (Origin::Given, Some(reading)) = (quantity.origin, &quantity.reading) else { continue };
        let symbol = quantity.name.split('_').next().unwrap_or("");
        let description = quantity.description.to_lowercase();
        let is_ratio = matches!(symbol, "k" | "kappa" | "gamma")
            && (description.contains("heat capacit") || description.contains("specific heat") || description.contains("isentropic"));
        if quantity.dimension != Dimension::NONE || !is_ratio || !(1.0..2.0).contains(&reading.si) {
            continue;
        }
        let off = sheet.states.iter().filter_map(|state| {
            let (_, t) = state.properties.iter().find(|(property, _)| *property == Property::T)?;
            let gas = &sheet.gas(state.gas);
            if !gas.model.is_ideal() {
                return None;
            }
            let gas = &gas.gas;
            gas.has_caloric().ok()?;
            let cp = gas.cp_j_kg_k(values[t.0 as usize]);
            let k = cp / (cp - gas.gas_constant_j_kg_k());
            k.is_finite().then_some((state, k))
        });
        let worst = off.max_by(|a, b| (reading.si / a.1 - 1.0).abs().total_cmp(&(reading.si / b.1 - 1.0).abs()));
        let Some((state, k)) = worst else { continue };
        let difference = (reading.si / k - 1.0).abs();
        if difference > SAME_RATIO {
            let owner = format!("{}.k", state.name);
            let percent = units::write_figures(100.0 * difference, 2);
            findings.push(code::constant_by_hand::ratio(
                quantity.span,
                &quantity.name,
                &reading.text,
                &owner,
                &units::write_figures(k, 4),
                &percent,
            ));
        }
    }
}
