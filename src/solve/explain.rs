//! Says in the trade's words what is wrong with a system of relations: what is missing, what conflicts, what has no value.

use std::collections::BTreeSet;

use crate::diagnostic::{Diagnostic, Span, code};
use crate::sheet::{Expr, ExprId, GasFunction, Kind, Origin, Property, QuantityId, RelationOrigin, Sheet, State, StateId, write_expr};
use crate::syntax::{BinaryOp, Function};
use crate::units::{self, Dimension};

use super::recheck;
use super::run::Fault;
use super::structure::Part;

/// Names that a finding lists at the most.
const MOST_NAMES: usize = 8;

/// A value of a quantity for a finding: four figures and its unit.
pub(super) fn shown(sheet: &Sheet, id: QuantityId, si: f64, site_pa: f64) -> String {
    let quantity = sheet.quantity(id);
    let value = quantity.shown.from_si(si, site_pa);
    // Nothing is exactly zero to five figures: it is zero.
    let value = if value == 0.0 { "0".to_owned() } else { units::write_figures(value, 5) };
    format!("{value} {}", quantity.shown.text()).trim_end().to_owned()
}

/// Values of a quantity from the smallest to the largest: `1 m, 2 m and 3 m`.
pub(super) fn shown_all(sheet: &Sheet, id: QuantityId, values: &[f64], site_pa: f64) -> String {
    let mut sorted = values.to_vec();
    sorted.sort_by(f64::total_cmp);
    let texts: Vec<String> = sorted.into_iter().map(|si| shown(sheet, id, si, site_pa)).collect();
    match texts.as_slice() {
        [first @ .., last] if !first.is_empty() => format!("{} and {last}", first.join(", ")),
        _ => texts.concat(),
    }
}

/// `a`, `b` and `c`, cut where they are many.
fn list(names: &[String]) -> String {
    let mut quoted: Vec<String> = names.iter().take(MOST_NAMES).map(|name| format!("`{name}`")).collect();
    if names.len() > MOST_NAMES {
        quoted.push(format!("{} more", names.len() - MOST_NAMES));
    }
    quoted.join(", ")
}

/// A part with fewer relations than quantities.
pub(super) fn missing(sheet: &Sheet, part: &Part, quantities: &[QuantityId], relations: &[usize]) -> Diagnostic {
    let n_missing = part.columns.len() - part.rows.len();
    let short: BTreeSet<StateId> = quantities
        .iter()
        .filter_map(|id| match sheet.quantity(*id).origin {
            Origin::Property(state, _) if sheet.state(state).at.len() < sheet.gas(sheet.state(state).gas).degrees_of_freedom() => {
                Some(state)
            }
            _ => None,
        })
        .collect();
    let mut names: Vec<String> = Vec::new();
    for id in quantities {
        names.push(sheet.quantity(*id).name.clone());
    }
    if let Some(state) = short.iter().next()
        && short.len() == n_missing
    {
        let entry = sheet.state(*state);
        let has = match entry.at.as_slice() {
            [] => "no property".to_owned(),
            [(property, _)] => format!("one property, {} ({})", property.row().field, property.row().word),
            more => format!("{} properties", more.len()),
        };
        let needs = sheet.gas(entry.gas).degrees_of_freedom();
        let taken: Vec<Property> = entry.at.iter().map(|(property, _)| *property).collect();
        let ideal = sheet.gas(entry.gas).model.is_ideal();
        let thermal = ideal && [Property::T, Property::H, Property::U].iter().any(|property| taken.contains(property));
        let is_moist = taken.iter().any(|property| property.is_moisture());
        let moisture = [Property::RelativeHumidity, Property::DewPoint, Property::HumidityRatio];
        let moisture = moisture.into_iter().filter(|_| needs == 3 && !is_moist);
        let offers: Vec<String> = [Property::P, Property::T, Property::V, Property::Rho, Property::H, Property::S]
            .into_iter()
            .chain(moisture)
            .filter(|property| !(taken.contains(property) || thermal && matches!(property, Property::T | Property::H)))
            .map(|property| format!("`{}.{}` ({})", entry.name, property.row().field, property.row().word))
            .collect();
        let others: Vec<String> = names.iter().filter(|name| !name.starts_with(&format!("{}.", entry.name))).cloned().collect();
        let mut closes = offers.join(", ");
        if !others.is_empty() {
            closes = format!("{closes}, or of {}", list(&others));
        }
        let mut finding =
            code::under_determined::state(entry.span, &entry.name, &has, (needs, needs.saturating_sub(entry.at.len()).max(1)), &closes);
        for relation in relations.iter().filter(|relation| sheet.relations[**relation].origin == RelationOrigin::Line).take(MOST_NAMES) {
            finding = finding.related(sheet.relations[*relation].span, "waits for it");
        }
        return finding;
    }
    // What a person would give comes first: quantities that the sheet declares, before properties of states.
    let rank = |id: &QuantityId| match sheet.quantity(*id).origin {
        Origin::Unknown => 0,
        Origin::Let => 1,
        _ => 2,
    };
    let mut ranked: Vec<QuantityId> = quantities.to_vec();
    ranked.sort_by_key(|id| (rank(id), id.0));
    let names: Vec<String> = ranked.iter().map(|id| sheet.quantity(*id).name.clone()).collect();
    let first = ranked.first().copied().unwrap_or(QuantityId(0));
    let mut finding = code::under_determined::part(sheet.quantity(first).span, &sheet.quantity(first).name, n_missing, &list(&names));
    for id in ranked.iter().skip(1).take(MOST_NAMES) {
        let quantity = sheet.quantity(*id);
        if quantity.span != sheet.quantity(first).span && finding.related.iter().all(|label| label.span != quantity.span) {
            finding = finding.related(quantity.span, format!("`{}` is not determined either", quantity.name));
        }
    }
    finding
}

/// A relation that was not needed and does not agree. `touched` are inputs that its sides depend on, `part` the relations
/// that are one too many together.
pub(super) fn conflict(
    sheet: &Sheet,
    relation: usize,
    difference: f64,
    allowed: f64,
    touched: &[QuantityId],
    part: &[usize],
) -> Diagnostic {
    let entry = &sheet.relations[relation];
    let (difference, allowed) = (in_unit(sheet, entry.left, difference), in_unit(sheet, entry.left, allowed));
    // A state that takes part with a third property is the place of the mistake, whatever line the conflict shows on.
    let relation = third_property(sheet, relation, part).unwrap_or(relation);
    let entry = &sheet.relations[relation];
    let what = what_of(sheet, relation);
    let mut places: Vec<(Span, String)> = Vec::new();
    let state = match entry.origin {
        RelationOrigin::At(state, _) | RelationOrigin::Law(state, _) => Some(state),
        _ => None,
    };
    // The laws of a state stand on no line of their own.
    for other in part.iter().filter(|other| **other != relation && !matches!(sheet.relations[**other].origin, RelationOrigin::Law(..))) {
        let span = sheet.relations[*other].span;
        places.push((span, "takes part in the conflict".to_owned()));
    }
    for id in touched {
        let quantity = sheet.quantity(*id);
        let value = quantity.reading.as_ref().map_or(String::new(), |reading| format!("`{}` = {}", quantity.name, reading.text));
        places.push((quantity.span, value));
    }
    places.sort();
    places.dedup_by_key(|(span, _)| *span);
    places.retain(|(span, _)| *span != entry.span);
    let mut finding = code::over_determined::conflict(entry.span, &what, &difference, &allowed, places.len() + 1);
    for (span, text) in places {
        finding = finding.related(span, text);
    }
    if let Some(state) = state.map(|state| sheet.state(state)).filter(|state| is_overfixed(sheet, state)) {
        let fields: Vec<String> = state.at.iter().map(|(property, _)| format!("`{}`", property.row().field)).collect();
        let (whose, number) =
            if sheet.gas(state.gas).degrees_of_freedom() == 3 { ("a state of humid air", "three") } else { ("a state", "two") };
        finding = finding.fact(format!(
            "{whose} has {number} degrees of freedom: {number} of {} fix `{}`, and the others follow",
            fields.join(", "),
            state.name
        ));
    }
    finding
}

/// Whether a state is given more properties than fix it.
fn is_overfixed(sheet: &Sheet, state: &State) -> bool {
    state.at.len() > sheet.gas(state.gas).degrees_of_freedom()
}

/// The last property of a state that is fixed by more than it needs, where the surplus relation of `part` is a line of the sheet.
fn third_property(sheet: &Sheet, relation: usize, part: &[usize]) -> Option<usize> {
    if matches!(sheet.relations[relation].origin, RelationOrigin::At(..) | RelationOrigin::Law(..)) {
        return None;
    }
    part.iter().copied().find(|other| {
        let RelationOrigin::At(state, property) = sheet.relations[*other].origin else { return false };
        let state = sheet.state(state);
        is_overfixed(sheet, state) && state.at.last().is_some_and(|(last, _)| *last == property)
    })
}

/// A relation that was not needed and agrees.
pub(super) fn agrees(sheet: &Sheet, relation: usize, difference: f64, allowed: f64) -> Diagnostic {
    let entry = &sheet.relations[relation];
    code::surplus_agrees::finding(
        entry.span,
        &what_of(sheet, relation),
        &in_unit(sheet, entry.left, difference),
        &in_unit(sheet, entry.left, allowed),
    )
}

fn what_of(sheet: &Sheet, relation: usize) -> String {
    let entry = &sheet.relations[relation];
    match entry.origin {
        RelationOrigin::At(state, property) | RelationOrigin::Law(state, property) => {
            format!("`{}` of the state `{}`", property.row().field, sheet.state(state).name)
        }
        _ => format!("`{}`", cut(&format!("{} = {}", write_expr(sheet, entry.left), write_expr(sheet, entry.right)))),
    }
}

/// Text cut to what a message can hold.
fn cut(text: &str) -> String {
    const LONGEST: usize = 80;
    if text.chars().count() <= LONGEST { text.to_owned() } else { text.chars().take(LONGEST).chain(['…']).collect() }
}

/// An SI difference with the unit of what stands on a side.
fn in_unit(sheet: &Sheet, side: ExprId, si: f64) -> String {
    let mut unit = None;
    if let Expr::Quantity(id) = sheet.exprs.get(side) {
        unit = Some(sheet.quantity(id).shown.unit.interval());
    }
    let unit = unit.or_else(|| units::parse(&sheet.dimension_of(side)?.si_unit()).ok());
    match unit {
        Some(unit) => format!("{} {}", units::write_figures(si.abs() / unit.factor, 3), unit.name).trim_end().to_owned(),
        None => units::write_figures(si.abs(), 3),
    }
}

/// A block that could not be solved; `None` where the reason has its own finding.
pub(super) fn fault(sheet: &Sheet, fault: &Fault, relations: &[usize], quantities: &[QuantityId], site_pa: f64) -> Option<Diagnostic> {
    let place = |id: QuantityId| {
        let quantity = sheet.quantity(id);
        if quantity.low.is_some() || quantity.high.is_some() { quantity.bounds_span } else { quantity.span }
    };
    let first = relations.iter().map(|relation| sheet.relations[*relation].span).min().unwrap_or_default();
    let mut finding = match fault {
        Fault::Silent => return None,
        Fault::Several { quantity, roots } => {
            let name = &sheet.quantity(*quantity).name;
            let largest = roots.iter().copied().max_by(f64::total_cmp);
            let example = largest.map_or(String::new(), |root| shown(sheet, *quantity, root, site_pa));
            let span = sheet.quantity(*quantity).span;
            let choose = if matches!(sheet.quantity(*quantity).origin, Origin::Unknown) {
                format!("add `near {example}` or bounds `within … .. …` to the line of `{name}`")
            } else {
                format!("declare `unknown {name} … near {example}` or bound one of the quantities of these lines")
            };
            code::several_roots::finding(span, name, &shown_all(sheet, *quantity, roots, site_pa), roots.len(), &choose)
        }
        Fault::Outside { quantity, value, low, high } => {
            let end = |bound: f64| if bound.is_finite() { shown(sheet, *quantity, bound, site_pa) } else { String::new() };
            let bounds = format!("{} .. {}", end(*low), end(*high)).trim().to_owned();
            let stated = sheet.quantity(*quantity).low.is_some() || sheet.quantity(*quantity).high.is_some();
            if let Some(finding) = impossible(sheet, *quantity, *value, site_pa).filter(|_| !stated) {
                finding
            } else if !value.is_finite() {
                let name = format!("`{}`", sheet.quantity(*quantity).name);
                code::no_solution::finding(first, &name, &format!("within {bounds}"))
            } else {
                code::no_solution::outside_bounds(
                    place(*quantity),
                    &sheet.quantity(*quantity).name,
                    &shown(sheet, *quantity, *value, site_pa),
                    &bounds,
                )
            }
        }
        Fault::NoRoot { quantity, low, high } => {
            let stated = sheet.quantity(*quantity).low.is_some() || sheet.quantity(*quantity).high.is_some();
            let searched = if stated {
                format!("between {} and {}", shown(sheet, *quantity, *low, site_pa), shown(sheet, *quantity, *high, site_pa))
            } else {
                "anywhere".to_owned()
            };
            let names: Vec<String> = quantities.iter().map(|id| sheet.quantity(*id).name.clone()).collect();
            code::no_solution::finding(first, &list(&names), &searched)
        }
        Fault::NotConverged { starts, worst, residual, at_bound, best } => {
            let names: Vec<String> = quantities.iter().map(|id| sheet.quantity(*id).name.clone()).collect();
            let tried = format!("Newton's method was tried from {starts} starts");
            let largest = if residual.is_finite() { units::write_figures(*residual, 2) } else { "not a number".to_owned() };
            let line = relations.get(*worst).map_or(String::new(), |relation| what_of(sheet, *relation));
            let mut finding = code::not_converged::finding(
                first,
                &list(&names),
                &tried,
                &format!("the largest scaled residual left is {largest}, in {line}"),
            );
            // What nothing is said of leaves the search widest.
            let unguided = quantities
                .iter()
                .map(|id| sheet.quantity(*id))
                .find(|quantity| quantity.near.is_none() && (quantity.low.is_none() || quantity.high.is_none()));
            if let Some(quantity) = unguided {
                let unit = quantity.shown.text();
                let name = &quantity.name;
                finding = finding.help(format!(
                    "say about how large `{name}` is: `near …{}{unit}` behind its `unknown`, or bounds with `within`",
                    if unit.is_empty() { "" } else { " " }
                ));
            }
            if !at_bound.is_empty() {
                let names: Vec<String> = at_bound.iter().map(|id| sheet.quantity(*id).name.clone()).collect();
                finding = finding.fact(format!("the search ran into the bounds of {}", list(&names)));
            }
            if !best.is_empty() {
                let values: Vec<String> = quantities
                    .iter()
                    .zip(best)
                    .take(MOST_NAMES)
                    .map(|(id, value)| format!("{} = {}", sheet.quantity(*id).name, shown(sheet, *id, *value, site_pa)))
                    .collect();
                finding = finding.fact(format!("it came closest at {}", values.join(", ")));
            }
            finding
        }
    };
    for relation in relations.iter().take(MOST_NAMES) {
        let span = sheet.relations[*relation].span;
        if span != finding.span && finding.related.iter().all(|label| label.span != span) {
            finding = finding.related(span, "this relation takes part");
        }
    }
    Some(finding)
}

/// The part of an expression that has no value although its own parts have: `None` where all have one.
pub(super) fn undefined(sheet: &Sheet, values: &[f64], expr: ExprId, fallback: Span, site_pa: f64) -> Option<Diagnostic> {
    let here = recheck::walk(sheet, values, expr).value;
    if here.is_finite() {
        return None;
    }
    for part in sheet.exprs.parts(expr) {
        if let Some(finding) = undefined(sheet, values, part, fallback, site_pa) {
            return Some(finding);
        }
    }
    let mut ids = Vec::new();
    sheet.exprs.quantities(expr, &mut |id| {
        if !ids.contains(&id) {
            ids.push(id);
        }
    });
    let list: Vec<String> = ids
        .iter()
        .take(MOST_NAMES)
        .map(|id| format!("{} = {}", sheet.quantity(*id).name, shown(sheet, *id, values[id.0 as usize], site_pa)))
        .collect();
    let list = if list.is_empty() { "there is no quantity in it".to_owned() } else { format!("with {}", list.join(", ")) };
    let place =
        |part: ExprId| sheet.span_of(part).filter(|span| fallback.start <= span.start && span.end <= fallback.end).unwrap_or(fallback);
    let text = cut(&write_expr(sheet, expr));
    let value = |part: ExprId| recheck::walk(sheet, values, part).value;
    let beyond = |why: &str| Some(code::undefined_value::finding(place(expr), &text, why, &list));
    match sheet.exprs.get(expr) {
        Expr::Binary(BinaryOp::Divide, _, b) if value(b) == 0.0 => {
            Some(code::division_by_zero::finding(place(b), &cut(&write_expr(sheet, b)), &list))
        }
        Expr::Binary(BinaryOp::Power, a, b) if value(a) == 0.0 && value(b) < 0.0 => {
            Some(code::division_by_zero::finding(place(a), &cut(&write_expr(sheet, a)), &list))
        }
        Expr::Binary(BinaryOp::Power, a, _) if value(a) < 0.0 => beyond("a negative number has no power with a fraction"),
        Expr::Call(Function::Ln | Function::Log10, a, _) if value(a) <= 0.0 => beyond("the logarithm of zero or less"),
        Expr::Call(Function::Sqrt, a, _) if value(a) < 0.0 => beyond("the root of less than zero"),
        Expr::Call(Function::Asin | Function::Acos, ..) => beyond("its argument lies outside -1 to 1"),
        Expr::Gas(function, gas, a) => {
            let range = sheet.gas(gas).gas.caloric_range();
            let limit =
                format!("from {} K to {} K", units::write_figures(range.limit_low_k, 4), units::write_figures(range.limit_high_k, 4));
            let inverse = matches!(
                function,
                GasFunction::TemperatureOfEnthalpy | GasFunction::TemperatureOfEntropy | GasFunction::TemperatureOfInternalEnergy
            );
            if inverse {
                beyond(&format!("the temperature that belongs to it lies outside the range of the heat capacity, {limit}"))
            } else {
                let at = format!("{} K", units::write_figures(value(a), 5));
                beyond(&format!("at {at} it lies outside the range of the heat capacity, {limit}"))
            }
        }
        _ => beyond("it is outside the range of numbers (1.7e308)"),
    }
}

/// A value that a quantity cannot have; `None` where it can.
pub(super) fn impossible(sheet: &Sheet, id: QuantityId, si: f64, site_pa: f64) -> Option<Diagnostic> {
    let quantity = sheet.quantity(id);
    if si < 0.0 && quantity.dimension == Dimension::TEMPERATURE && quantity.kind == Kind::Either && quantity.origin == Origin::Unknown {
        return Some(code::below_absolute_zero::perhaps(quantity.span, &quantity.name, &shown(sheet, id, si, site_pa)));
    }
    if si >= 0.0 || !super::physics::cannot_be_negative(quantity) {
        return None;
    }
    let value = shown(sheet, id, si, site_pa);
    let span = quantity.span;
    if quantity.dimension == Dimension::TEMPERATURE && quantity.kind == Kind::Absolute {
        let value = format!("{value} ({} K)", units::write_figures(si, 5));
        return Some(code::below_absolute_zero::result(span, &quantity.name, &value));
    }
    if quantity.dimension == Dimension::PRESSURE {
        let value = format!("{value} ({} kPa abs)", units::write_figures(si / 1000.0, 5));
        return Some(code::below_vacuum::result(span, &quantity.name, &value));
    }
    Some(code::negative_result::finding(span, &quantity.name, &quantity.dimension.describe(), &value))
}
