//! Why a state has no value.

use std::fmt;

/// Which side of a range a value is on, and of what.
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct Limit {
    /// What the value is of: `temperature`, `pressure`, `density`.
    pub quantity: &'static str,
    /// The value, in [`Self::unit`].
    pub value: f64,
    /// Lowest value of the published range.
    pub low: f64,
    /// Highest value of the published range.
    pub high: f64,
    /// Lowest value to which the model goes on.
    pub limit_low: f64,
    /// Highest value to which the model goes on.
    pub limit_high: f64,
    /// Unit of all of them: `K`, `Pa`.
    pub unit: &'static str,
}

/// Why a state of a gas has no value.
#[derive(Clone, Debug, PartialEq)]
#[non_exhaustive]
pub enum StateError {
    /// A pressure, temperature or other property that no gas can have: zero, negative, or no number.
    NoState {
        /// What it is.
        quantity: &'static str,
        /// The value, in SI units.
        value: f64,
    },
    /// The gas would be liquid.
    Liquid {
        /// Temperature of the state, K.
        t_k: f64,
        /// Pressure of the state, Pa.
        p_pa: f64,
        /// Saturation temperature at that pressure, K; `None` above the critical pressure.
        t_sat_k: Option<f64>,
        /// Saturation pressure at that temperature, Pa; `None` below the range of the saturation line.
        p_sat_pa: Option<f64>,
    },
    /// The gas would be partly liquid.
    TwoPhase {
        /// Saturation temperature of the state, K.
        t_sat_k: f64,
        /// Saturation pressure of the state, Pa.
        p_sat_pa: f64,
        /// Share of the mass that is vapour, 0 to 1.
        quality: f64,
    },
    /// The gas would be solid: above the sublimation or the melting pressure.
    Solid {
        /// Temperature, K.
        t_k: f64,
        /// Pressure, Pa.
        p_pa: f64,
        /// Temperature of the triple point, K.
        t_triple_k: f64,
        /// Pressure of sublimation or of melting at that temperature, Pa, where it is known.
        p_border_pa: Option<f64>,
    },
    /// A component of a mixture would condense.
    Condenses {
        /// Name of the component that the condensate mostly is.
        component: &'static str,
        /// Temperature, K.
        t_k: f64,
        /// Pressure of the mixture, Pa.
        p_pa: f64,
        /// Partial pressure of the component, Pa.
        partial_pressure_pa: f64,
        /// Its saturation pressure at that temperature, Pa, where it has one.
        p_sat_pa: Option<f64>,
        /// Dew point of the mixture at that pressure, K, where it was found.
        t_dew_k: Option<f64>,
    },
    /// Outside the range to which the model goes on.
    OutOfRange(Limit),
    /// Two states have these properties.
    Ambiguous {
        /// Temperature and density of one of them, K and kg/m³.
        first: (f64, f64),
        /// Temperature and density of the other.
        second: (f64, f64),
    },
    /// No state of a gas has these properties.
    NoSuchState {
        /// Symbols and values of the two, SI.
        properties: [(&'static str, f64); 2],
    },
    /// The two properties are not independent: they fix no state.
    Dependent {
        /// Symbols of the two.
        properties: [&'static str; 2],
    },
    /// The iteration found no answer.
    NotConverged {
        /// What was sought.
        what: &'static str,
        /// Model that was evaluated.
        model: &'static str,
        /// Steps taken.
        iterations: u32,
        /// Relative residual that was left.
        residual: f64,
    },
}

impl fmt::Display for StateError {
    fn fmt(&self, out: &mut fmt::Formatter<'_>) -> fmt::Result {
        match self {
            Self::NoState { quantity, value } => write!(out, "{quantity} of {value} is no state of a gas"),
            Self::Liquid { t_k, p_pa, t_sat_k, p_sat_pa } => {
                write!(out, "liquid at {t_k} K and {p_pa} Pa")?;
                if let Some(t_sat_k) = t_sat_k {
                    write!(out, ": saturation at this pressure is {t_sat_k} K")?;
                }
                if let Some(p_sat_pa) = p_sat_pa {
                    write!(out, ", at this temperature {p_sat_pa} Pa")?;
                }
                Ok(())
            }
            Self::TwoPhase { t_sat_k, p_sat_pa, quality } => {
                write!(out, "two-phase: {quality} vapour by mass at saturation, {t_sat_k} K and {p_sat_pa} Pa")
            }
            Self::Solid { t_k, p_pa, t_triple_k, p_border_pa } => {
                write!(out, "solid at {t_k} K and {p_pa} Pa: triple point at {t_triple_k} K")?;
                p_border_pa.map_or(Ok(()), |p| write!(out, ", border of the solid at this temperature {p} Pa"))
            }
            Self::Condenses { component, t_k, p_pa, partial_pressure_pa, t_dew_k, .. } => {
                write!(out, "{component} condenses at {t_k} K and {p_pa} Pa: partial pressure {partial_pressure_pa} Pa")?;
                t_dew_k.map_or(Ok(()), |t| write!(out, ", dew point {t} K"))
            }
            Self::OutOfRange(limit) => {
                let Limit { quantity, value, low, high, limit_low, limit_high, unit } = limit;
                write!(
                    out,
                    "{quantity} of {value} {unit} outside the range {low} to {high} {unit}, extrapolated {limit_low} to {limit_high} {unit}"
                )
            }
            Self::Ambiguous { first, second } => {
                write!(out, "two states: {} K at {} kg/m3 and {} K at {} kg/m3", first.0, first.1, second.0, second.1)
            }
            Self::NoSuchState { properties: [a, b] } => write!(out, "no state of the gas has {} = {} and {} = {}", a.0, a.1, b.0, b.1),
            Self::Dependent { properties: [a, b] } => write!(out, "{a} and {b} are not independent here"),
            Self::NotConverged { what, model, iterations, residual } => {
                write!(out, "{what} not found by {model} after {iterations} steps, residual {residual}")
            }
        }
    }
}

impl std::error::Error for StateError {}
