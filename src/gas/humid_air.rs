//! Moist air: density, humidity, dew point, condensate.

use super::eos::Equation;
use super::eos::equation::AIR;
use super::ideal_gas::Gas;
use super::name::find;
use super::phase::condensation_temperature;
use super::polynomial::REFERENCE_PRESSURE_PA;
use super::state_error::{Limit, StateError};
use crate::units::constants::{MOLAR_GAS_CONSTANT, ZERO_CELSIUS};
use crate::units::math::{exp, ln, pow, sqrt};

/// Where the density in [`CIPM_T_K`] and [`CIPM_P_PA`] comes from.
pub const CIPM_SOURCE: &str = "CIPM-2007: Picard, Davis, Gläser, Fujii 2008, Metrologia 45: 149-155, 400 µmol/mol carbon dioxide";

/// Relative standard uncertainty of the formula, from memory.
pub const CIPM_UNCERTAINTY: &str = "22e-6 of the density (standard uncertainty of the formula alone)";

/// Temperatures of CIPM-2007, K: 15 to 27 degC.
pub const CIPM_T_K: (f64, f64) = (288.15, 300.15);

/// Pressures of CIPM-2007, Pa.
pub const CIPM_P_PA: (f64, f64) = (60_000.0, 110_000.0);

/// Temperatures of moist air, K: -100 to 200 degC.
pub const HUMID_T_K: (f64, f64) = (173.15, 473.15);

/// Highest pressure of moist air, Pa. The enhancement of the saturation pressure is followed by second virial coefficients up to here.
pub const HUMID_P_PA: f64 = 2e6;

/// Where the saturation pressure comes from.
pub const SATURATION_SOURCE: &str = "IAPWS-95 over water, IAPWS R14-08(2011) over ice below 0.01 degC";

/// Where the enhancement of the saturation pressure and the compressibility outside CIPM-2007 come from.
pub const VIRIAL_SOURCE: &str = "second virial coefficients of air (Lemmon et al. 2000), of water (IAPWS-95) and of the pair \
     (Harvey, Huang 2007, Int. J. Thermophys. 28: 556-565, from memory)";

/// Triple point of water, K: below it relative humidity and dew point are over ice.
pub const TRIPLE_POINT_K: f64 = 273.16;

/// Molar masses that belong to CIPM-2007, kg/mol, the air with 400 µmol/mol carbon dioxide.
const CIPM_M_AIR: f64 = 28.965_46e-3;
const CIPM_M_WATER: f64 = 18.015_28e-3;

/// Gas constant of CIPM-2007, J/(mol K).
const CIPM_R: f64 = 8.314_472;

/// The one further property that a state of moist air needs.
#[derive(Clone, Copy, Debug, PartialEq)]
#[non_exhaustive]
pub enum Moisture {
    /// Relative humidity, 0 to 1: mole fraction of water over that of saturated air at the same temperature and pressure.
    RelativeHumidity(f64),
    /// Dew point (below 0.01 degC frost point) at the pressure of the state, K.
    DewPoint(f64),
    /// Water per dry air by mass, kg/kg.
    HumidityRatio(f64),
    /// Mole fraction of water.
    MoleFraction(f64),
}

/// What the density of a state of moist air was found by.
#[derive(Clone, Copy, Debug, PartialEq, Eq)]
#[non_exhaustive]
pub enum HumidAirModel {
    /// CIPM-2007.
    Cipm2007,
    /// A mixture of air and water with second virial coefficients.
    Virial,
}

/// A state of moist air, per mass of the moist air.
#[derive(Clone, Copy, Debug, PartialEq)]
#[non_exhaustive]
pub struct HumidAirState {
    /// Temperature, K.
    pub t_k: f64,
    /// Pressure, Pa.
    pub p_pa: f64,
    /// Mole fraction of water.
    pub x_water: f64,
    /// Relative humidity, 0 to 1.
    pub relative_humidity: f64,
    /// Dew point, K, below [`TRIPLE_POINT_K`] frost point; not a number for dry air.
    pub t_dew_k: f64,
    /// Water per dry air by mass.
    pub humidity_ratio: f64,
    /// Density, kg/m³.
    pub rho_kg_m3: f64,
    /// Compressibility factor p M/(rho R T).
    pub z: f64,
    /// Molar mass, kg/mol.
    pub molar_mass_kg_mol: f64,
    /// Enthalpy of the ideal mixture, J/kg.
    pub h_j_kg: f64,
    /// Internal energy, h - p/rho of the ideal mixture, J/kg.
    pub u_j_kg: f64,
    /// Entropy of the ideal mixture, with that of mixing, J/(kg K).
    pub s_j_kg_k: f64,
    /// Heat capacity at constant pressure of the ideal mixture, J/(kg K).
    pub cp_j_kg_k: f64,
    /// Heat capacity at constant volume of the ideal mixture, J/(kg K).
    pub cv_j_kg_k: f64,
    /// Ratio of the heat capacities.
    pub k: f64,
    /// Speed of sound of the ideal mixture, m/s.
    pub w_m_s: f64,
    /// What the density was found by.
    pub model: HumidAirModel,
    /// 100 (rho_ideal/rho - 1), %, by CIPM-2007 in its range, else by virial coefficients.
    pub ideal_error_percent: f64,
}

/// Moist air. Its dry part is the named mixture `dry air`.
#[derive(Clone, Debug)]
pub struct HumidAir {
    dry: Gas,
    water: Gas,
    air_equation: &'static Equation,
    water_equation: &'static Equation,
}

impl HumidAir {
    /// Moist air; `None` only where the tables of the room are damaged.
    #[must_use]
    pub fn new() -> Option<Self> {
        let of = |name: &str| find(name).ok().map(Gas::named);
        Some(Self {
            dry: of("dry air")?,
            water: of("water")?,
            air_equation: Equation::of_name(AIR)?,
            water_equation: Equation::of_name("water")?,
        })
    }

    /// Saturation pressure of pure water at a temperature, K, and its derivative: Pa and Pa/K; over ice below [`TRIPLE_POINT_K`].
    ///
    /// # Errors
    ///
    /// [`StateError::OutOfRange`] outside [`HUMID_T_K`].
    pub fn saturation_pressure(&self, t_k: f64) -> Result<(f64, f64), StateError> {
        check("temperature", t_k, HUMID_T_K, "K")?;
        if t_k >= TRIPLE_POINT_K {
            let point = self.water_equation.saturation(t_k)?;
            return Ok((point.p_pa, point.dp_dt_pa_k));
        }
        let of = |t_k: f64| self.water_equation.solid.sublimation_pa(t_k).unwrap_or(f64::NAN);
        let step = 1e-4 * t_k;
        let upper = (t_k + step).min(TRIPLE_POINT_K);
        Ok((of(t_k), (of(upper) - of(t_k - step)) / (upper - t_k + step)))
    }

    /// Factor by which air raises the saturation pressure of water at a temperature, K, and a pressure, Pa.
    ///
    /// Equation: in the range of CIPM-2007 its f = α + β p + γ t²; elsewhere
    ///           ln f = (v (p - p_s) + B_ww p_s - p (2 Σ y_i B_iw - B))/(R T), with y of saturated air.
    /// Symbols:  v molar volume of water or ice; B second virial coefficients, m³/mol.
    /// Source:   [`CIPM_SOURCE`], [`VIRIAL_SOURCE`].
    /// Error:    1e-4 at 100 kPa against CIPM-2007; third virial coefficients and dissolved air left out.
    ///
    /// # Errors
    ///
    /// As [`Self::saturation_pressure`].
    pub fn enhancement(&self, t_k: f64, p_pa: f64) -> Result<f64, StateError> {
        if is_cipm(t_k, p_pa) {
            let t = t_k - ZERO_CELSIUS;
            return Ok(1.000_62 + 3.14e-8 * p_pa + 5.6e-7 * t * t);
        }
        let (p_s, _) = self.saturation_pressure(t_k)?;
        let rt = MOLAR_GAS_CONSTANT * t_k;
        let volume = if t_k >= TRIPLE_POINT_K { WATER_M3_MOL } else { ICE_M3_MOL };
        let [aa, aw, ww] = self.virials(t_k);
        let y = (p_s / p_pa).min(1.0);
        let mean = (1.0 - y) * (1.0 - y) * aa + 2.0 * y * (1.0 - y) * aw + y * y * ww;
        let pair = (1.0 - y) * aw + y * ww;
        Ok(exp((volume * (p_pa - p_s) + ww * p_s - p_pa * (2.0 * pair - mean)) / rt))
    }

    /// B of air, of the pair and of water, m³/mol.
    fn virials(&self, t_k: f64) -> [f64; 3] {
        let reduced = t_k / 100.0;
        let pair = 66.5687 * pow(reduced, -0.237) - 238.834 * pow(reduced, -1.048) - 176.755 * pow(reduced, -3.183);
        [self.air_equation.virial(t_k).0, 1e-6 * pair, self.water_equation.virial(t_k).0]
    }

    /// Partial pressure of water in saturated air, Pa: enhancement times saturation pressure; in the range of CIPM-2007 by its formula.
    ///
    /// # Errors
    ///
    /// As [`Self::saturation_pressure`].
    pub fn saturated_partial_pressure(&self, t_k: f64, p_pa: f64) -> Result<f64, StateError> {
        let p_s = if is_cipm(t_k, p_pa) { cipm_saturation_pressure(t_k) } else { self.saturation_pressure(t_k)?.0 };
        Ok(self.enhancement(t_k, p_pa)? * p_s)
    }

    /// Mole fraction of water from any measure of the moisture, at a temperature, K, and a pressure, Pa.
    ///
    /// # Errors
    ///
    /// [`StateError::NoState`] for a measure that is negative or beyond what there is, [`StateError::OutOfRange`].
    pub fn mole_fraction(&self, t_k: f64, p_pa: f64, moisture: Moisture) -> Result<f64, StateError> {
        check("pressure", p_pa, (f64::MIN_POSITIVE, HUMID_P_PA), "Pa")?;
        let (quantity, value, x) = match moisture {
            Moisture::RelativeHumidity(rh) => ("relative humidity", rh, rh * self.saturated_partial_pressure(t_k, p_pa)? / p_pa),
            Moisture::DewPoint(t_dew_k) => ("dew point", t_dew_k, self.saturated_partial_pressure(t_dew_k, p_pa)? / p_pa),
            Moisture::HumidityRatio(w) => ("humidity ratio", w, w / (w + self.mass_ratio())),
            Moisture::MoleFraction(x) => ("mole fraction of water", x, x),
        };
        if !(value >= 0.0 && (0.0..1.0).contains(&x)) {
            return Err(StateError::NoState { quantity, value });
        }
        Ok(x)
    }

    /// Molar mass of water over that of dry air.
    fn mass_ratio(&self) -> f64 {
        self.water.molar_mass_kg_mol() / self.dry.molar_mass_kg_mol()
    }

    /// Relative humidity from the mole fraction of water.
    ///
    /// # Errors
    ///
    /// As [`Self::saturation_pressure`].
    pub fn relative_humidity(&self, t_k: f64, p_pa: f64, x_water: f64) -> Result<f64, StateError> {
        Ok(x_water * p_pa / self.saturated_partial_pressure(t_k, p_pa)?)
    }

    /// Water per dry air by mass from the mole fraction of water.
    #[must_use]
    pub fn humidity_ratio(&self, x_water: f64) -> f64 {
        self.mass_ratio() * x_water / (1.0 - x_water)
    }

    /// Dew point at a pressure, Pa, from the mole fraction of water, K.
    ///
    /// The partial pressure without enhancement gives the start; the enhancement, which hardly moves with temperature, is then put in until the
    /// dew point stays.
    ///
    /// # Errors
    ///
    /// [`StateError::OutOfRange`] for air that is drier than [`HUMID_T_K`] reaches down to, [`StateError::NoState`] for dry air.
    pub fn dew_point(&self, p_pa: f64, x_water: f64) -> Result<f64, StateError> {
        let partial = x_water * p_pa;
        if partial.is_nan() || partial <= 0.0 {
            return Err(StateError::NoState { quantity: "mole fraction of water", value: x_water });
        }
        let start = condensation_temperature(self.water_equation, partial).unwrap_or(HUMID_T_K.0);
        let mut t_k = start.clamp(HUMID_T_K.0, HUMID_T_K.1);
        let (mut low, mut high) = HUMID_T_K;
        let mut last = f64::INFINITY;
        for _ in 0..60 {
            let error = ln(self.saturated_partial_pressure(t_k, p_pa)? / partial);
            if error < 0.0 {
                low = t_k;
            } else {
                high = t_k;
            }
            let (p_s, slope) = self.saturation_pressure(t_k)?;
            let next = t_k - error * p_s / slope;
            let change = (next - t_k).abs();
            if change < 1e-9 || (change < 1e-6 && change >= last) {
                return if next >= HUMID_T_K.0 { Ok(next) } else { Err(range("dew point", next, HUMID_T_K, "K")) };
            }
            if next < HUMID_T_K.0 && t_k == HUMID_T_K.0 {
                return Err(range("dew point", next, HUMID_T_K, "K"));
            }
            last = change;
            t_k = if next > low && next < high { next } else { next.clamp(HUMID_T_K.0, HUMID_T_K.1).clamp(low, high) };
            if high - low < 1e-10 {
                return Ok(t_k);
            }
        }
        Err(StateError::NotConverged { what: "dew point", model: "the saturation line of water", iterations: 60, residual: last })
    }

    /// Density of moist air, kg/m³, and what it was found by.
    ///
    /// Equation: CIPM-2007, ρ = p M_a/(Z R T) (1 - x (1 - M_v/M_a)), in its range; elsewhere ρ = p M/(Z R T) with Z by second virial
    ///           coefficients. At the border the two agree within 5e-5.
    /// Symbols:  x mole fraction of water; M molar masses; Z as [`Self::compressibility_factor`].
    /// Valid:    [`HUMID_T_K`], up to [`HUMID_P_PA`].
    /// Source:   [`CIPM_SOURCE`], [`VIRIAL_SOURCE`].
    /// Error:    [`CIPM_UNCERTAINTY`]; the virial form 3e-4 up to 700 kPa against the model of ASHRAE RP-1485.
    #[must_use]
    pub fn density_kg_m3(&self, t_k: f64, p_pa: f64, x_water: f64) -> (f64, HumidAirModel) {
        let z = self.compressibility_factor(t_k, p_pa, x_water);
        if is_cipm(t_k, p_pa) {
            let m = CIPM_M_AIR * (1.0 - x_water * (1.0 - CIPM_M_WATER / CIPM_M_AIR));
            return (p_pa * m / (z * CIPM_R * t_k), HumidAirModel::Cipm2007);
        }
        (self.ideal_density_kg_m3(t_k, p_pa, x_water) / z, HumidAirModel::Virial)
    }

    /// Density of moist air as a mixture of ideal gases, p M/(R T), kg/m³.
    #[must_use]
    pub fn ideal_density_kg_m3(&self, t_k: f64, p_pa: f64, x_water: f64) -> f64 {
        p_pa * self.molar_mass(x_water) / (MOLAR_GAS_CONSTANT * t_k)
    }

    /// Molar mass of moist air, kg/mol.
    #[must_use]
    pub fn molar_mass(&self, x_water: f64) -> f64 {
        (1.0 - x_water) * self.dry.molar_mass_kg_mol() + x_water * self.water.molar_mass_kg_mol()
    }

    /// Compressibility factor of moist air: CIPM-2007 in its range, second virial coefficients elsewhere.
    #[must_use]
    pub fn compressibility_factor(&self, t_k: f64, p_pa: f64, x_water: f64) -> f64 {
        if is_cipm(t_k, p_pa) {
            return cipm_compressibility(t_k, p_pa, x_water);
        }
        let [aa, aw, ww] = self.virials(t_k);
        let y = x_water;
        let b = (1.0 - y) * (1.0 - y) * aa + 2.0 * y * (1.0 - y) * aw + y * y * ww;
        // Z = 1 + B ρ with ρ = p/(R T Z).
        let q = b * p_pa / (MOLAR_GAS_CONSTANT * t_k);
        0.5 * (1.0 + sqrt((1.0 + 4.0 * q).max(0.0)))
    }

    /// The state of moist air at a temperature, K, a pressure, Pa, and a moisture.
    ///
    /// # Errors
    ///
    /// [`StateError::Condenses`] above a relative humidity of 1, [`StateError::OutOfRange`], [`StateError::NoState`].
    pub fn state(&self, t_k: f64, p_pa: f64, moisture: Moisture) -> Result<HumidAirState, StateError> {
        if !(t_k > 0.0 && t_k.is_finite()) {
            return Err(StateError::NoState { quantity: "temperature", value: t_k });
        }
        if !(p_pa > 0.0 && p_pa.is_finite()) {
            return Err(StateError::NoState { quantity: "pressure", value: p_pa });
        }
        check("temperature", t_k, HUMID_T_K, "K")?;
        let x_water = self.mole_fraction(t_k, p_pa, moisture)?;
        let relative_humidity = self.relative_humidity(t_k, p_pa, x_water)?;
        let t_dew_k = if x_water > 0.0 { self.dew_point(p_pa, x_water)? } else { f64::NAN };
        if relative_humidity > 1.0 + 1e-9 {
            return Err(StateError::Condenses {
                component: "water",
                t_k,
                p_pa,
                partial_pressure_pa: x_water * p_pa,
                p_sat_pa: self.saturated_partial_pressure(t_k, p_pa).ok(),
                t_dew_k: Some(t_dew_k),
            });
        }
        let (rho_kg_m3, model) = self.density_kg_m3(t_k, p_pa, x_water);
        let molar_mass_kg_mol = self.molar_mass(x_water);
        let z = self.compressibility_factor(t_k, p_pa, x_water);
        // Shares by mass of dry air and water.
        let water = x_water * self.water.molar_mass_kg_mol() / molar_mass_kg_mol;
        let of = |property: fn(&Gas, f64) -> f64| (1.0 - water) * property(&self.dry, t_k) + water * property(&self.water, t_k);
        let r = MOLAR_GAS_CONSTANT / molar_mass_kg_mol;
        let (cp, h, s) = (of(Gas::cp_j_kg_k), of(Gas::h_j_kg), of(Gas::s_j_kg_k));
        let term = |x: f64| if x > 0.0 { x * ln(x) } else { 0.0 };
        let mixing = -r * (term(x_water) + term(1.0 - x_water));
        let k = cp / (cp - r);
        Ok(HumidAirState {
            t_k,
            p_pa,
            x_water,
            relative_humidity,
            t_dew_k,
            humidity_ratio: self.humidity_ratio(x_water),
            rho_kg_m3,
            z,
            molar_mass_kg_mol,
            h_j_kg: h,
            u_j_kg: h - r * t_k,
            s_j_kg_k: s + mixing - r * ln(p_pa / REFERENCE_PRESSURE_PA),
            cp_j_kg_k: cp,
            cv_j_kg_k: cp - r,
            k,
            w_m_s: sqrt(k * r * t_k),
            model,
            ideal_error_percent: 100.0 * (z - 1.0),
        })
    }

    /// Water that condenses, kg per kg of dry air, when air of a humidity ratio comes to a temperature, K, and a pressure, Pa: none where it
    /// stays below saturation.
    ///
    /// # Errors
    ///
    /// As [`Self::mole_fraction`].
    pub fn condensate(&self, humidity_ratio: f64, t_k: f64, p_pa: f64) -> Result<f64, StateError> {
        if !(humidity_ratio >= 0.0 && humidity_ratio.is_finite()) {
            return Err(StateError::NoState { quantity: "humidity ratio", value: humidity_ratio });
        }
        check("pressure", p_pa, (f64::MIN_POSITIVE, HUMID_P_PA), "Pa")?;
        let x = self.saturated_partial_pressure(t_k, p_pa)? / p_pa;
        // Where water boils at this pressure, air takes up any amount of it.
        Ok(if x >= 1.0 { 0.0 } else { (humidity_ratio - self.humidity_ratio(x)).max(0.0) })
    }
}

/// Molar volumes of water at 20 degC and of ice at 0 degC, m³/mol.
const WATER_M3_MOL: f64 = 18.05e-6;
const ICE_M3_MOL: f64 = 19.65e-6;

fn is_cipm(t_k: f64, p_pa: f64) -> bool {
    t_k >= CIPM_T_K.0 && t_k <= CIPM_T_K.1 && p_pa >= CIPM_P_PA.0 && p_pa <= CIPM_P_PA.1
}

/// Saturation pressure of CIPM-2007, Pa.
fn cipm_saturation_pressure(t_k: f64) -> f64 {
    exp((1.237_884_7e-5 * t_k - 1.912_131_6e-2) * t_k + 33.937_110_47 - 6.343_164_5e3 / t_k)
}

/// Compressibility factor of CIPM-2007.
fn cipm_compressibility(t_k: f64, p_pa: f64, x: f64) -> f64 {
    let t = t_k - ZERO_CELSIUS;
    let first = 1.581_23e-6 + t * (-2.9331e-8 + 1.1043e-10 * t) + (5.707e-6 - 2.051e-8 * t) * x + (1.9898e-4 - 2.376e-6 * t) * x * x;
    let q = p_pa / t_k;
    1.0 - q * first + q * q * (1.83e-11 - 0.765e-8 * x * x)
}

fn check(quantity: &'static str, value: f64, ends: (f64, f64), unit: &'static str) -> Result<(), StateError> {
    if value >= ends.0 && value <= ends.1 { Ok(()) } else { Err(range(quantity, value, ends, unit)) }
}

fn range(quantity: &'static str, value: f64, (low, high): (f64, f64), unit: &'static str) -> StateError {
    StateError::OutOfRange(Limit { quantity, value, low, high, limit_low: low, limit_high: high, unit })
}
