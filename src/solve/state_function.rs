//! Evaluates properties of states: from the properties that fix a state to another one, with the derivatives by each.

use std::sync::{Mutex, PoisonError};

use crate::gas::eos::property as kernel;
use crate::gas::eos::{StateProperties, WithSlopes};
use crate::gas::humid_air::{HumidAir, HumidAirState, Moisture};
use crate::gas::transport::Transport;
use crate::gas::{Gas, RealGas, StateError};
use crate::sheet::{GasModel, Property, SheetGas, StateFunction};
use crate::units::constants::STANDARD_STATE_PRESSURE;

/// A value with its derivatives by the arguments in their order.
pub(super) type Sloped = (f64, [f64; 3]);

/// Relative step of the central differences for humid air, whose model has no derivatives of its own: the third root of the
/// rounding of a double, where rounding and curvature spoil the difference alike.
const STEP: f64 = 6e-6;

/// A gas of a sheet on a tape. It keeps the state that was asked for last: a sheet wants many properties of one.
#[derive(Debug)]
pub(super) struct Substance {
    pub(super) gas: SheetGas,
    last: Mutex<Option<Kept>>,
}

#[derive(Debug)]
struct Kept {
    by: [Property; 2],
    at: [f64; 2],
    state: StateProperties,
}

impl Substance {
    pub(super) fn new(gas: SheetGas) -> Self {
        Self { gas, last: Mutex::new(None) }
    }

    /// The value of a function, with its derivatives. What has no value is not a number.
    pub(super) fn sloped(&self, function: StateFunction, at: [f64; 3]) -> Sloped {
        let nothing = (f64::NAN, [f64::NAN; 3]);
        let GasModel::Real(real) = &self.gas.model else { return sloped(&self.gas, function, at).unwrap_or(nothing) };
        let (by, values) = ([function.x, function.y], [at[0], at[1]]);
        let mut last = self.last.lock().unwrap_or_else(PoisonError::into_inner);
        let same = |kept: &Kept| kept.by == by && kept.at.map(f64::to_bits) == values.map(f64::to_bits);
        if let Some(kept) = last.as_ref().filter(|kept| same(kept)) {
            return of_state(&self.gas.gas, &kept.state, function).unwrap_or(nothing);
        }
        let Ok(state) = real_state(real, function, at) else { return nothing };
        *last = Some(Kept { by, at: values, state });
        of_state(&self.gas.gas, &state, function).unwrap_or(nothing)
    }

    pub(super) fn value(&self, function: StateFunction, at: [f64; 3]) -> f64 {
        self.sloped(function, at).0
    }
}

/// The value of a function, or why there is none.
pub(super) fn value(gas: &SheetGas, function: StateFunction, at: [f64; 3]) -> Result<f64, StateError> {
    match &gas.model {
        GasModel::HumidAir(air) => humid(air, function, at),
        _ => sloped(gas, function, at).map(|(value, _)| value),
    }
}

fn sloped(gas: &SheetGas, function: StateFunction, at: [f64; 3]) -> Result<Sloped, StateError> {
    match &gas.model {
        GasModel::Ideal => ideal_transport(&gas.gas, function, at),
        GasModel::Real(real) => of_state(&gas.gas, &real_state(real, function, at)?, function),
        GasModel::HumidAir(air) => {
            let value = humid(air, function, at)?;
            let mut slopes = [0.0; 3];
            for (place, property) in function.arguments().enumerate() {
                // A humidity may be zero, and its step must not be.
                let step = STEP * if property.is_moisture() { at[place].abs().max(1e-4) } else { at[place].abs() };
                let shifted = |by: f64| {
                    let mut at = at;
                    at[place] += by;
                    humid(air, function, at)
                };
                slopes[place] = match (shifted(-step), shifted(step)) {
                    (Ok(below), Ok(above)) => (above - below) / (2.0 * step),
                    // At saturation and in dry air one side is not there.
                    (Err(_), Ok(above)) => (above - value) / step,
                    (Ok(below), Err(_)) => (value - below) / step,
                    (Err(error), Err(_)) => return Err(error),
                };
            }
            Ok((value, slopes))
        }
    }
}

/// The kernel's name of a property; `None` for those that it does not have.
fn kernel_property(property: Property) -> Option<kernel::Property> {
    Some(match property {
        Property::P => kernel::Property::Pressure,
        Property::T => kernel::Property::Temperature,
        Property::V => kernel::Property::Volume,
        Property::Rho => kernel::Property::Density,
        Property::H => kernel::Property::Enthalpy,
        Property::U => kernel::Property::InternalEnergy,
        Property::S => kernel::Property::Entropy,
        Property::Cp => kernel::Property::HeatCapacityPressure,
        Property::Cv => kernel::Property::HeatCapacityVolume,
        Property::K => kernel::Property::HeatCapacityRatio,
        Property::W => kernel::Property::SpeedOfSound,
        Property::Z => kernel::Property::CompressibilityFactor,
        Property::Mu | Property::Lambda | Property::RelativeHumidity | Property::DewPoint | Property::HumidityRatio => return None,
    })
}

fn dependent(function: StateFunction) -> StateError {
    StateError::Dependent { properties: [function.x.row().field, function.y.row().field] }
}

fn real_state(real: &RealGas, function: StateFunction, at: [f64; 3]) -> Result<StateProperties, StateError> {
    let (Some(x), Some(y)) = (kernel_property(function.x), kernel_property(function.y)) else { return Err(dependent(function)) };
    real.solve((x, at[0]), (y, at[1]))
}

/// A property of a real state with its derivatives by the two that fix it.
fn of_state(gas: &Gas, state: &StateProperties, function: StateFunction) -> Result<Sloped, StateError> {
    let (Some(x), Some(y)) = (kernel_property(function.x), kernel_property(function.y)) else { return Err(dependent(function)) };
    let missing = || StateError::NoState { quantity: function.of.row().word, value: f64::NAN };
    match kernel_property(function.of) {
        Some(of) => {
            let (by_x, by_y) = state.slopes_by(of, x, y).ok_or_else(|| dependent(function))?;
            Ok((state.get(of).value, [by_x, by_y, 0.0]))
        }
        None => {
            let WithSlopes { value, by_t, by_rho } = transport(gas, function.of, state.t_k, state.rho_kg_m3).ok_or_else(missing)?;
            let t = state.slopes_by(kernel::Property::Temperature, x, y).ok_or_else(|| dependent(function))?;
            let rho = state.slopes_by(kernel::Property::Density, x, y).ok_or_else(|| dependent(function))?;
            Ok((value, [by_t * t.0 + by_rho * rho.0, by_t * t.1 + by_rho * rho.1, 0.0]))
        }
    }
}

fn transport(gas: &Gas, of: Property, t_k: f64, rho_kg_m3: f64) -> Option<WithSlopes> {
    let transport = Transport::of(gas)?;
    match of {
        Property::Mu => transport.viscosity_pa_s(t_k, rho_kg_m3),
        Property::Lambda => transport.conductivity_w_m_k(t_k, rho_kg_m3),
        _ => None,
    }
}

/// Viscosity and conductivity of an ideal gas: the correlation at the density of the ideal law.
fn ideal_transport(gas: &Gas, function: StateFunction, [t_k, p_pa, _]: [f64; 3]) -> Result<Sloped, StateError> {
    for (quantity, value) in [("temperature", t_k), ("pressure", p_pa)] {
        if !(value > 0.0 && value.is_finite()) {
            return Err(StateError::NoState { quantity, value });
        }
    }
    let rho = p_pa / (gas.gas_constant_j_kg_k() * t_k);
    let missing = || StateError::NoState { quantity: function.of.row().word, value: f64::NAN };
    let WithSlopes { value, by_t, by_rho } = transport(gas, function.of, t_k, rho).ok_or_else(missing)?;
    Ok((value, [by_t - by_rho * rho / t_k, by_rho * rho / p_pa, 0.0]))
}

/// A property of humid air.
fn humid(air: &HumidAir, function: StateFunction, at: [f64; 3]) -> Result<f64, StateError> {
    let by = [function.x, function.y];
    let moisture = |property: Property, value: f64| match property {
        Property::RelativeHumidity => Some(Moisture::RelativeHumidity(value)),
        Property::DewPoint => Some(Moisture::DewPoint(value)),
        Property::HumidityRatio => Some(Moisture::HumidityRatio(value)),
        _ => None,
    };
    // Dew point and humidity ratio by one another: the temperature of the air has no part in them.
    if by[0] == Property::P
        && let Some(given) = moisture(by[1], at[1])
    {
        let (p_pa, t_k) = (at[0], DEW_POINT_AT_K);
        let x_water = air.mole_fraction(t_k, p_pa, given)?;
        return if function.of == Property::DewPoint { air.dew_point(p_pa, x_water) } else { Ok(air.humidity_ratio(x_water)) };
    }
    // The pressure at which so much water has that dew point.
    if by == [Property::DewPoint, Property::HumidityRatio] && function.of == Property::P {
        return pressure_of_dew_point(air, at[0], at[1]);
    }
    let Some(given) = function.moisture.and_then(|property| moisture(property, at[2])) else { return Err(dependent(function)) };
    if by != [Property::T, Property::P] {
        return Err(dependent(function));
    }
    if matches!(function.of, Property::RelativeHumidity | Property::HumidityRatio) {
        // Neither needs the density or the dew point of the state, which is only asked where it refuses what is given.
        let x_water = air.mole_fraction(at[0], at[1], given)?;
        let humidity = air.relative_humidity(at[0], at[1], x_water)?;
        if humidity <= 1.0 || matches!(given, Moisture::HumidityRatio(_)) {
            return Ok(if function.of == Property::RelativeHumidity { humidity.min(1.0) } else { air.humidity_ratio(x_water) });
        }
    }
    let state = match (air.state(at[0], at[1], given), given) {
        // More water than the air can hold: what is left as a gas is saturated, and the rest has condensed.
        (Err(StateError::Condenses { .. }), Moisture::HumidityRatio(_)) => air.state(at[0], at[1], Moisture::RelativeHumidity(1.0))?,
        (state, _) => state?,
    };
    humid_property(&state, function.of).ok_or_else(|| dependent(function))
}

/// The pressure, Pa, at which air of a humidity ratio has a dew point, K: its partial pressure of water is then that of saturation,
/// which hardly moves with the pressure.
fn pressure_of_dew_point(air: &HumidAir, t_dew_k: f64, ratio: f64) -> Result<f64, StateError> {
    /// Relative step at which the pressure stays.
    const STAYS: f64 = 1e-14;
    const MOST_STEPS: u32 = 100;
    let mut p_pa = STANDARD_STATE_PRESSURE;
    let x_water = air.mole_fraction(DEW_POINT_AT_K, p_pa, Moisture::HumidityRatio(ratio))?;
    if x_water <= 0.0 {
        return Err(StateError::NoState { quantity: Property::HumidityRatio.row().word, value: ratio });
    }
    for _ in 0..MOST_STEPS {
        let next = air.saturated_partial_pressure(t_dew_k, p_pa)? / x_water;
        let step = (next / p_pa - 1.0).abs();
        p_pa = next;
        if step < STAYS {
            break;
        }
    }
    Ok(p_pa)
}

/// A temperature at which the humidity ratio of a dew point is looked up; it does not depend on it.
const DEW_POINT_AT_K: f64 = 293.15;

fn humid_property(state: &HumidAirState, of: Property) -> Option<f64> {
    Some(match of {
        Property::P => state.p_pa,
        Property::T => state.t_k,
        Property::V => 1.0 / state.rho_kg_m3,
        Property::Rho => state.rho_kg_m3,
        Property::H => state.h_j_kg,
        Property::U => state.u_j_kg,
        Property::S => state.s_j_kg_k,
        Property::Cp => state.cp_j_kg_k,
        Property::Cv => state.cv_j_kg_k,
        Property::K => state.k,
        Property::W => state.w_m_s,
        Property::Z => state.z,
        Property::RelativeHumidity => state.relative_humidity,
        Property::DewPoint => state.t_dew_k,
        Property::HumidityRatio => state.humidity_ratio,
        Property::Mu | Property::Lambda => return None,
    })
}
