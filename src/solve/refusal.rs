//! States that are refused: what the model of a gas says of a state that is no gas, told at the line of the state.

use crate::diagnostic::{Diagnostic, Span, code};
use crate::gas::phase::PhaseGuard;
use crate::gas::{Limit, ModelRange, StateError};
use crate::sheet::{Expr, ExprId, GasFunction, GasId, GasModel, Property, Sheet, State, StateId};
use crate::units::{self, constants::ZERO_CELSIUS};

use super::{recheck, state_function, tape};

/// A temperature for people: `26.9 degC (300.1 K)`.
pub(super) fn temperature(t_k: f64) -> String {
    let celsius = units::write_to_place(t_k - ZERO_CELSIUS, -1);
    format!("{celsius} degC ({} K)", units::write_to_place(t_k, -1))
}

/// A pressure for people, absolute: `8.365 bar abs`, `3.000 kPa abs`.
pub(super) fn pressure(p_pa: f64) -> String {
    let (unit, factor) = match p_pa.abs() {
        p if p >= 1e5 => ("bar", 1e5),
        p if p >= 10.0 => ("kPa", 1e3),
        _ => ("Pa", 1.0),
    };
    format!("{} {unit} abs", units::write_figures(p_pa / factor, 4))
}

/// Where a state stands, and what its gas is called.
struct Place<'a> {
    span: Span,
    state: &'a str,
    gas: String,
}

/// The first part of an expression that its gas refuses although its own arguments have values.
pub(super) fn of_expression(
    sheet: &Sheet,
    owner: Option<StateId>,
    expression: ExprId,
    fallback: Span,
    values: &[f64],
) -> Option<Diagnostic> {
    if recheck::walk(sheet, values, expression).value.is_finite() {
        return None;
    }
    for part in sheet.exprs.parts(expression) {
        if let Some(finding) = of_expression(sheet, owner, part, fallback, values) {
            return Some(finding);
        }
    }
    let value = |expr: ExprId| recheck::walk(sheet, values, expr).value;
    match sheet.exprs.get(expression) {
        Expr::State(function, gas, arguments) => {
            let at = arguments.map(value);
            if at.iter().any(|value| !value.is_finite()) {
                return None;
            }
            let error = state_function::value(sheet.gas(gas), function, at).err()?;
            Some(match owner {
                Some(state) => refused(sheet, state, &error),
                None => told(sheet, gas, &Place { span: fallback, state: "", gas: gas_title(sheet, gas) }, &error),
            })
        }
        Expr::Gas(function @ (GasFunction::SaturationPressure | GasFunction::SaturationTemperature), gas, a) => {
            let a = value(a);
            let error = a.is_finite().then(|| tape::saturation_line(&sheet.gas(gas).gas, function, a).err()).flatten()?;
            let place =
                sheet.span_of(expression).filter(|span| fallback.start <= span.start && span.end <= fallback.end).unwrap_or(fallback);
            saturation(&gas_title(sheet, gas), place, &error)
        }
        _ => None,
    }
}

fn gas_title(sheet: &Sheet, gas: GasId) -> String {
    let entry = sheet.gas(gas);
    if matches!(entry.model, GasModel::HumidAir(_)) { entry.model.word().to_owned() } else { entry.gas.title() }
}

/// Looks at every state with a pressure and a temperature: whether it is a gas at all, whatever its model. States in `told`
/// have their finding.
pub(super) fn phases(sheet: &Sheet, values: &[f64], told: &[bool]) -> Vec<Diagnostic> {
    let mut guards: Vec<Option<PhaseGuard>> = vec![None; sheet.gases.len()];
    let mut findings = Vec::new();
    for (at, state) in sheet.states.iter().enumerate() {
        let (Some((p_pa, t_k)), false) = (pressure_and_temperature(state, values), told[at]) else { continue };
        let error = match &sheet.gas(state.gas).model {
            GasModel::Real(real) => real.check(t_k, p_pa).err(),
            GasModel::Ideal => {
                let guard = guards[state.gas.0 as usize].get_or_insert_with(|| PhaseGuard::new(&sheet.gas(state.gas).gas));
                // The ideal law itself has no range: what no line is known for is left to the verdict.
                guard.check(t_k, p_pa).err().filter(|error| !matches!(error, StateError::NotConverged { .. } | StateError::OutOfRange(_)))
            }
            GasModel::HumidAir(_) => None,
        };
        if let Some(error) = error {
            findings.push(refused(sheet, StateId(at as u32), &error));
        }
    }
    findings
}

/// Pressure in Pa and temperature in K of a state, where both have values that a gas may have.
pub(super) fn pressure_and_temperature(state: &State, values: &[f64]) -> Option<(f64, f64)> {
    let value = |wanted: Property| {
        let (_, id) = state.properties.iter().find(|(property, _)| *property == wanted)?;
        Some(values[id.0 as usize]).filter(|value| value.is_finite())
    };
    value(Property::P).zip(value(Property::T))
}

/// A state that its gas refuses.
pub(super) fn refused(sheet: &Sheet, id: StateId, error: &StateError) -> Diagnostic {
    let state = sheet.state(id);
    let place = Place { span: state.span, state: &state.name, gas: gas_title(sheet, state.gas) };
    told(sheet, state.gas, &place, error)
}

fn told(sheet: &Sheet, gas: GasId, place: &Place, error: &StateError) -> Diagnostic {
    let Place { span, state, gas: title } = place;
    match error {
        StateError::Liquid { t_k, p_pa, t_sat_k, p_sat_pa } => code::would_condense::liquid(
            *span,
            state,
            title,
            (&temperature(*t_k), &pressure(*p_pa)),
            t_sat_k.map(|t| (temperature(t), units::write_figures(t - t_k, 2))),
            p_sat_pa.map(pressure),
        ),
        StateError::TwoPhase { t_sat_k, p_sat_pa, quality } => code::would_condense::wet(
            *span,
            state,
            title,
            &units::write_figures(100.0 * quality, 3),
            &temperature(*t_sat_k),
            &pressure(*p_sat_pa),
        ),
        StateError::Condenses { component, t_k, partial_pressure_pa, p_sat_pa, t_dew_k, .. } => code::would_condense::component(
            *span,
            state,
            component,
            &temperature(*t_k),
            &pressure(*partial_pressure_pa),
            p_sat_pa.map(pressure),
            t_dew_k.map(temperature),
        ),
        StateError::Solid { t_k, p_pa, t_triple_k, p_border_pa } => code::would_be_solid::finding(
            *span,
            state,
            title,
            (&temperature(*t_k), &pressure(*p_pa)),
            &temperature(*t_triple_k),
            p_border_pa.map(pressure),
        ),
        StateError::OutOfRange(limit) => {
            code::outside_model_range::equation(*span, state, title, &Words::of(limit).text(), &source(sheet, gas))
        }
        StateError::NoState { quantity, value } => code::no_such_state::impossible(*span, state, word_of(quantity), *value <= 0.0),
        StateError::NoSuchState { properties: [a, b] } => {
            let text = |(symbol, value): &(&str, f64)| format!("{symbol} = {}", units::write_figures(*value, 5));
            code::no_such_state::none(*span, state, title, &format!("{} and {} (SI)", text(a), text(b)))
        }
        StateError::Ambiguous { first, second } => {
            let text = |(t_k, rho): (f64, f64)| format!("{} at {} kg/m3", temperature(t_k), units::write_figures(rho, 4));
            code::no_such_state::two(*span, state, &text(*first), &text(*second))
        }
        StateError::Dependent { properties: [a, b] } => {
            code::dependent_properties::finding(*span, state, &format!("`{a}` and `{b}`"), "here they do not vary independently")
        }
        StateError::NotConverged { what, model, iterations, .. } => {
            code::no_such_state::not_converged(*span, state, title, what, model, *iterations)
        }
    }
}

/// The trade's word for a quantity that a kernel names by its symbol.
fn word_of(quantity: &str) -> &str {
    Property::of_field(quantity).map_or(quantity, |property| property.row().word)
}

/// The publication of the model of a gas.
fn source(sheet: &Sheet, gas: GasId) -> String {
    match &sheet.gas(gas).model {
        GasModel::Real(real) => real.source().to_owned(),
        _ => String::new(),
    }
}

/// A range and a value in words.
struct Words<'a>(&'a Limit);

impl<'a> Words<'a> {
    fn of(limit: &'a Limit) -> Self {
        Self(limit)
    }

    fn value(&self, value: f64) -> String {
        match self.0.unit {
            "K" => format!("{} K", units::write_figures(value, 5)),
            "Pa" => pressure(value),
            unit => format!("{} {unit}", units::write_figures(value, 4)),
        }
    }

    /// "a temperature of 640 K; published from 169.85 K to 455 K, usable to 500.5 K"
    fn text(&self) -> [String; 3] {
        let Limit { quantity, value, low, high, limit_low, limit_high, .. } = self.0;
        let (value, published) = (self.value(*value), self.span(*low, *high));
        let goes_on = if (limit_low, limit_high) == (low, high) { String::new() } else { self.span(*limit_low, *limit_high) };
        [format!("a {quantity} of {value}"), published, goes_on]
    }

    fn span(&self, low: f64, high: f64) -> String {
        if low > 0.0 { format!("from {} to {}", self.value(low), self.value(high)) } else { format!("up to {}", self.value(high)) }
    }
}

/// What of a state is beyond a published range, in words: the value, and the range.
pub(super) fn beyond_published(range: &ModelRange, t_k: f64, p_pa: f64) -> Vec<[String; 3]> {
    range.unpublished(t_k, p_pa).iter().map(|limit| Words::of(limit).text()).collect()
}

/// The same of one limit.
pub(super) fn limit_words(limit: &Limit) -> [String; 3] {
    Words::of(limit).text()
}

/// A temperature or pressure that the saturation line does not reach.
fn saturation(gas: &str, place: Span, error: &StateError) -> Option<Diagnostic> {
    Some(match error {
        StateError::OutOfRange(limit) => {
            let [value, published, _] = Words::of(limit).text();
            code::no_gas_data::beyond_saturation(place, gas, &value, &published)
        }
        StateError::NoState { quantity, value } => code::no_such_state::impossible(place, "", word_of(quantity), *value <= 0.0),
        StateError::NotConverged { what, model, iterations, .. } => {
            code::no_such_state::not_converged(place, "", gas, what, model, *iterations)
        }
        _ => return None,
    })
}
