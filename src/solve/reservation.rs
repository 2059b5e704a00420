//! What a solved state is told with although it holds: extrapolated models, states near to condensing or to the critical point,
//! mixtures for which no good model is known.

use crate::diagnostic::{Diagnostic, code};
use crate::gas::humid_air::{HumidAir, Moisture};
use crate::gas::model_weakness::weaknesses;
use crate::gas::phase::PhaseGuard;
use crate::gas::transport::Transport;
use crate::gas::{ModelKind, RealGas, catalogue};
use crate::sheet::{GasModel, Property, Sheet, State, StateId};
use crate::units;

use super::refusal::{beyond_published, limit_words, pressure_and_temperature, temperature};

/// Share of the water that counts as rounding at saturation.
const SATURATED: f64 = 1e-8;

/// All reservations about the models of a solved sheet.
pub(super) fn reservations(sheet: &Sheet, values: &[f64], findings: &mut Vec<Diagnostic>) {
    for (at, gas) in sheet.gases.iter().enumerate() {
        if let GasModel::Real(real) = &gas.model {
            let first = sheet.states.iter().find(|state| state.gas.0 as usize == at);
            if let Some(state) = first {
                weak(sheet, state, real, findings);
            }
        }
    }
    let mut guards: Vec<Option<PhaseGuard>> = vec![None; sheet.gases.len()];
    for (at, state) in sheet.states.iter().enumerate() {
        let Some((p_pa, t_k)) = pressure_and_temperature(state, values) else { continue };
        let gas = sheet.gas(state.gas);
        let near = match &gas.model {
            GasModel::Real(real) => {
                for [value, published, _] in beyond_published(&real.range(), t_k, p_pa) {
                    let (title, source) = (gas.gas.title(), real.source());
                    findings.push(code::outside_model_range::unpublished(state.span, &state.name, &title, &value, &published, source));
                }
                if real.near_critical(t_k, p_pa) {
                    findings.push(near_critical(state, real));
                }
                real.near_condensation(t_k, p_pa)
            }
            GasModel::Ideal => {
                extrapolated_heat_capacity(sheet, state, t_k, findings);
                guards[state.gas.0 as usize].get_or_insert_with(|| PhaseGuard::new(&gas.gas)).check(t_k, p_pa)
            }
            // How near humid air is to its dew point is what its relative humidity says.
            GasModel::HumidAir(air) => {
                humid(state, air, values, (t_k, p_pa), findings);
                Ok(None)
            }
        };
        if let Ok(Some(near)) = near {
            findings.push(code::near_condensation::finding(
                state.span,
                &state.name,
                near.component,
                &units::write_figures(near.margin_k, 2),
                &temperature(near.t_condensation_k),
            ));
        }
        transport(sheet, StateId(at as u32), t_k, p_pa, findings);
    }
}

fn near_critical(state: &State, real: &RealGas) -> Diagnostic {
    let (t_c, p_c) = real.critical_point().unwrap_or_default();
    code::near_critical::finding(state.span, &state.name, &temperature(t_c), &super::refusal::pressure(p_c))
}

/// Water of humid air that condenses.
fn humid(state: &State, air: &HumidAir, values: &[f64], (t_k, p_pa): (f64, f64), findings: &mut Vec<Diagnostic>) {
    let Some(excess) = condensate(state, air, values) else { return };
    let ratio = humidity_ratio(state, values).unwrap_or(f64::NAN);
    let t_dew = air.mole_fraction(t_k, p_pa, Moisture::HumidityRatio(ratio)).and_then(|x| air.dew_point(p_pa, x)).ok().map(temperature);
    findings.push(code::water_condenses::finding(state.span, &state.name, &units::write_figures(1000.0 * excess, 3), t_dew.as_deref()));
}

fn humidity_ratio(state: &State, values: &[f64]) -> Option<f64> {
    let (_, id) = state.properties.iter().find(|(property, _)| *property == Property::HumidityRatio)?;
    Some(values[id.0 as usize]).filter(|value| value.is_finite())
}

/// What condenses at a state of humid air, kg per kg of dry air; `None` where nothing does.
fn condensate(state: &State, air: &HumidAir, values: &[f64]) -> Option<f64> {
    let ((p_pa, t_k), ratio) = pressure_and_temperature(state, values).zip(humidity_ratio(state, values))?;
    // Air that is just saturated comes back with rounding.
    air.condensate(ratio, t_k, p_pa).ok().filter(|excess| *excess > SATURATED * ratio)
}

/// What condenses at the states of humid air, kg per kg of dry air.
pub(super) fn condensates(sheet: &Sheet, values: &[f64]) -> Vec<(StateId, f64)> {
    let of = |(at, state): (usize, &State)| match &sheet.gas(state.gas).model {
        GasModel::HumidAir(air) => condensate(state, air, values).map(|excess| (StateId(at as u32), excess)),
        _ => None,
    };
    sheet.states.iter().enumerate().filter_map(of).collect()
}

/// A mixture for which the models disagree, or that only a cubic equation covers. It is told once, at the line of the gas.
fn weak(sheet: &Sheet, state: &State, real: &RealGas, findings: &mut Vec<Diagnostic>) {
    let gas = sheet.gas(state.gas);
    for weakness in weaknesses(&gas.gas, real) {
        let spread = weakness.spread.map(|spread| units::write_figures(100.0 * spread, 2));
        let cubic = real.kind() == ModelKind::PengRobinson;
        findings.push(code::weak_model::finding(gas.span, &gas.gas.title(), weakness.text, spread.as_deref(), weakness.source, cubic));
    }
}

/// A state between the published range of the heat capacity of its gas and the limit to which it is taken.
fn extrapolated_heat_capacity(sheet: &Sheet, state: &State, t_k: f64, findings: &mut Vec<Diagnostic>) {
    if !state.properties.iter().any(|(property, _)| property.is_caloric()) {
        return;
    }
    let gas = &sheet.gas(state.gas).gas;
    let range = gas.caloric_range();
    if range.is_published(t_k) {
        return;
    }
    let kelvin = |t_k: f64| format!("{} K", units::write_figures(t_k, 4));
    let published = format!("{} to {}", kelvin(range.low_k), kelvin(range.high_k));
    let source = catalogue::caloric_source(gas);
    findings.push(code::outside_model_range::extrapolated(state.span, &state.name, &kelvin(t_k), &published, &source));
}

/// A viscosity or conductivity beyond the range for which its correlation is published.
fn transport(sheet: &Sheet, id: StateId, t_k: f64, p_pa: f64, findings: &mut Vec<Diagnostic>) {
    let state = sheet.state(id);
    let Some(transport) = Transport::of(&sheet.gas(state.gas).gas) else { return };
    for (property, _) in &state.properties {
        let range = match property {
            Property::Mu => transport.viscosity_range(),
            Property::Lambda => transport.conductivity_range(),
            _ => None,
        };
        let Some(range) = range else { continue };
        if let Some(limit) = range.unpublished(t_k, p_pa).first() {
            let [value, published, _] = limit_words(limit);
            let word = property.row().word;
            findings.push(code::outside_model_range::correlation(state.span, &state.name, word, &value, &published, range.source));
        }
    }
}
