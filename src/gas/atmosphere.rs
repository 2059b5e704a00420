//! The pressure of the standard atmosphere at an altitude.

use std::fmt;

use uom::si::f64::{Length, Pressure};
use uom::si::length::meter;
use uom::si::pressure::pascal;

use crate::units::math::{exp, pow};

/// Where the standard atmosphere comes from.
pub const ATMOSPHERE_SOURCE: &str = "ISO 2533 (ICAO Doc 7488/3, Manual of the ICAO Standard Atmosphere)";

/// Lowest geometric altitude, m above mean sea level.
pub const LOWEST_ALTITUDE_M: f64 = -5000.0;

/// Highest geometric altitude, m above mean sea level.
pub const HIGHEST_ALTITUDE_M: f64 = 20_000.0;

/// Nominal radius of the Earth, m.
const EARTH_RADIUS_M: f64 = 6_356_766.0;

/// Standard acceleration of free fall, m/s².
const GRAVITY_M_S2: f64 = 9.806_65;

/// Specific gas constant of air as the standard has it, J/(kg K). It is older than the exact molar gas constant and stays.
const GAS_CONSTANT_J_KG_K: f64 = 287.052_87;

/// Pressure at mean sea level, Pa.
const SEA_LEVEL_PA: f64 = 101_325.0;

/// Temperature at mean sea level, K.
const SEA_LEVEL_K: f64 = 288.15;

/// Fall of the temperature with geopotential altitude below the tropopause, K/m.
const LAPSE_K_M: f64 = 0.0065;

/// Geopotential altitude of the tropopause, m; above it the temperature stays to 20 000 m.
const TROPOPAUSE_M: f64 = 11_000.0;

/// A value outside the range in which a formula holds.
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct OutOfRange {
    /// What the value is of.
    pub quantity: &'static str,
    /// The value.
    pub value: f64,
    /// Low end of the range.
    pub low: f64,
    /// High end of the range.
    pub high: f64,
    /// Unit of all three.
    pub unit: &'static str,
}

impl fmt::Display for OutOfRange {
    fn fmt(&self, out: &mut fmt::Formatter<'_>) -> fmt::Result {
        let Self { quantity, value, low, high, unit } = self;
        write!(out, "{quantity} of {value} {unit} outside {low} to {high} {unit}")
    }
}

impl std::error::Error for OutOfRange {}

/// Pressure of the standard atmosphere at a geometric altitude above mean sea level.
///
/// # Errors
///
/// [`OutOfRange`] outside [`LOWEST_ALTITUDE_M`] to [`HIGHEST_ALTITUDE_M`].
pub fn standard_pressure(altitude: Length) -> Result<Pressure, OutOfRange> {
    let altitude_m = altitude.get::<meter>();
    let p_pa = standard_pressure_pa(altitude_m);
    if p_pa.is_nan() {
        let (low, high) = (LOWEST_ALTITUDE_M, HIGHEST_ALTITUDE_M);
        return Err(OutOfRange { quantity: "altitude", value: altitude_m, low, high, unit: "m" });
    }
    Ok(Pressure::new::<pascal>(p_pa))
}

/// Pressure of the standard atmosphere, Pa; not a number outside the range.
///
/// Equation: H = r Z/(r + Z); below the tropopause T = T_0 - β H, p = p_0 (T/T_0)^(g/(β R)); above it p = p_11 exp(-g (H - H_11)/(R T_11)).
/// Symbols:  Z geometric and H geopotential altitude, m; r radius of the Earth, m; T_0, p_0 at mean sea level; β lapse, K/m; R specific gas
///           constant of air, J/(kg K); the index 11 stands for the tropopause.
/// Valid:    [`LOWEST_ALTITUDE_M`] to [`HIGHEST_ALTITUDE_M`].
/// Source:   [`ATMOSPHERE_SOURCE`].
/// Error:    arithmetic checked in `tests/reference/atmosphere.rs`. Weather moves the pressure by about 3 %.
/// Edges:    Z = 0 gives p_0 exactly.
#[must_use]
pub fn standard_pressure_pa(altitude_m: f64) -> f64 {
    if !(LOWEST_ALTITUDE_M..=HIGHEST_ALTITUDE_M).contains(&altitude_m) {
        return f64::NAN;
    }
    let geopotential_m = EARTH_RADIUS_M * altitude_m / (EARTH_RADIUS_M + altitude_m);
    let t_k = temperature_k(geopotential_m);
    let exponent = GRAVITY_M_S2 / (LAPSE_K_M * GAS_CONSTANT_J_KG_K);
    let below = SEA_LEVEL_PA * pow(t_k / SEA_LEVEL_K, exponent);
    let above_m = (geopotential_m - TROPOPAUSE_M).max(0.0);
    below * exp(-GRAVITY_M_S2 * above_m / (GAS_CONSTANT_J_KG_K * t_k))
}

/// Derivative of [`standard_pressure_pa`] by altitude, Pa/m; not a number outside the range.
///
/// Equation: dp/dZ = -p g/(R T) (r/(r + Z))².
#[must_use]
pub fn d_standard_pressure_pa_per_m(altitude_m: f64) -> f64 {
    let p_pa = standard_pressure_pa(altitude_m);
    let ratio = EARTH_RADIUS_M / (EARTH_RADIUS_M + altitude_m);
    -p_pa * GRAVITY_M_S2 / (GAS_CONSTANT_J_KG_K * temperature_k(ratio * altitude_m)) * ratio * ratio
}

/// Temperature of the standard atmosphere at a geopotential altitude, K.
fn temperature_k(geopotential_m: f64) -> f64 {
    SEA_LEVEL_K - LAPSE_K_M * geopotential_m.min(TROPOPAUSE_M)
}
