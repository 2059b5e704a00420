//! A real gas to compute with: the model that fits it, its range, and its states.

use std::fmt;
use std::sync::Arc;

use uom::si::f64::{MassDensity, Pressure, ThermodynamicTemperature};
use uom::si::mass_density::kilogram_per_cubic_meter;
use uom::si::pressure::pascal;
use uom::si::thermodynamic_temperature::kelvin;

use super::eos::equation::{AIR, Equation};
use super::eos::gerg::{GERG_P_LIMIT_PA, GERG_P_PA, GERG_SOURCE, GERG_T_K, GERG_T_LIMIT_K, GERG_UNCERTAINTY, Gerg};
use super::eos::peng_robinson::{PENG_ROBINSON_SOURCE, PengRobinson};
use super::eos::property::StateProperties;
use super::ideal_gas::Gas;
use super::phase::{NearCondensation, PhaseGuard};
use super::polynomial::REFERENCE_TEMPERATURE_K;
use super::state_error::{Limit, StateError};
use crate::units::constants::MOLAR_GAS_CONSTANT;

/// A state with both reduced coordinates this near to 1 is near the critical point: there no model is to be trusted to its uncertainty.
pub const NEAR_CRITICAL: f64 = 0.01;

/// Which kind of model a real gas has.
#[derive(Clone, Copy, Debug, PartialEq, Eq)]
#[non_exhaustive]
pub enum ModelKind {
    /// The reference equation of state of a pure gas.
    ReferenceEquation,
    /// GERG-2008 for a mixture of its components.
    Gerg2008,
    /// Peng and Robinson's cubic equation, for what neither of the others has.
    PengRobinson,
}

impl ModelKind {
    /// Its name in a report.
    #[must_use]
    pub fn words(self) -> &'static str {
        match self {
            Self::ReferenceEquation => "reference equation of state",
            Self::Gerg2008 => "GERG-2008",
            Self::PengRobinson => "Peng-Robinson equation",
        }
    }
}

/// No model fits a gas.
#[derive(Clone, Debug, PartialEq, Eq)]
#[non_exhaustive]
pub struct NoEquation {
    /// The species for which constants are missing.
    pub species: &'static str,
}

impl fmt::Display for NoEquation {
    fn fmt(&self, out: &mut fmt::Formatter<'_>) -> fmt::Result {
        write!(out, "no equation of state for {}", self.species)
    }
}

impl std::error::Error for NoEquation {}

/// Range of a model, published and extrapolated.
#[derive(Clone, Copy, Debug, PartialEq)]
#[non_exhaustive]
pub struct ModelRange {
    /// Lowest published temperature, K.
    pub t_low_k: f64,
    /// Highest published temperature, K.
    pub t_high_k: f64,
    /// Highest published pressure, Pa.
    pub p_high_pa: f64,
    /// Lowest temperature to which the model goes on, K.
    pub t_limit_low_k: f64,
    /// Highest temperature to which the model goes on, K.
    pub t_limit_high_k: f64,
    /// Highest pressure to which the model goes on, Pa.
    pub p_limit_pa: f64,
}

/// Range of the cubic equation: none is published, and a warning that it is used stands in its place.
const PENG_ROBINSON_RANGE: ModelRange =
    ModelRange { t_low_k: 50.0, t_high_k: 1500.0, p_high_pa: 100e6, t_limit_low_k: 50.0, t_limit_high_k: 1500.0, p_limit_pa: 100e6 };

impl ModelRange {
    /// What of a state is beyond the limits to which the model goes on; the first that applies.
    #[must_use]
    pub fn beyond(&self, t_k: f64, p_pa: f64) -> Option<Limit> {
        if !(self.t_limit_low_k..=self.t_limit_high_k).contains(&t_k) {
            return Some(self.temperature(t_k));
        }
        (!(..=self.p_limit_pa).contains(&p_pa)).then(|| self.pressure(p_pa))
    }

    /// What of a state is beyond the published range; both, temperature first.
    #[must_use]
    pub fn unpublished(&self, t_k: f64, p_pa: f64) -> Vec<Limit> {
        let mut out = Vec::new();
        if !(self.t_low_k..=self.t_high_k).contains(&t_k) {
            out.push(self.temperature(t_k));
        }
        if !(..=self.p_high_pa).contains(&p_pa) {
            out.push(self.pressure(p_pa));
        }
        out
    }

    fn temperature(&self, value: f64) -> Limit {
        let Self { t_low_k: low, t_high_k: high, t_limit_low_k: limit_low, t_limit_high_k: limit_high, .. } = *self;
        Limit { quantity: "temperature", value, low, high, limit_low, limit_high, unit: "K" }
    }

    fn pressure(&self, value: f64) -> Limit {
        Limit { quantity: "pressure", value, low: 0.0, high: self.p_high_pa, limit_low: 0.0, limit_high: self.p_limit_pa, unit: "Pa" }
    }
}

/// A real gas. Cheap to clone.
///
/// A pure gas has its reference equation, and so has dry air; a mixture of the 21 components of GERG-2008 has that model, everything else
/// Peng and Robinson's equation. h and s are zero for the ideal gas of each species at 298.15 K and 100 kPa, as those of [`Gas`] are. M and R are those of the
/// model.
#[derive(Clone, Debug)]
pub struct RealGas(Arc<Inner>);

#[derive(Debug)]
struct Inner {
    title: String,
    model: Model,
    guard: PhaseGuard,
    critical: Option<(f64, f64)>,
}

#[derive(Debug)]
pub(crate) enum Model {
    Equation(&'static Equation),
    /// An equation for a mixture of fixed composition as if it were one substance. It has no saturation line of its own: the guard of
    /// the mixture says where it condenses.
    OneSubstance {
        equation: &'static Equation,
        /// What the entropy of the mixture is above that of the equation, J/(kg K): at the reference state that of mixing.
        s_mixing_j_kg_k: f64,
    },
    Gerg(Box<Gerg>),
    PengRobinson(PengRobinson),
}

impl RealGas {
    /// The real gas of the composition of `gas`.
    ///
    /// # Errors
    ///
    /// [`NoEquation`] where a species has neither a reference equation nor the constants of a cubic one.
    pub fn new(gas: &Gas) -> Result<Self, NoEquation> {
        let model = match gas.species() {
            Some(species) => Equation::of(species).map(Model::Equation),
            None => Self::as_one_substance(gas).or_else(|| Gerg::new(gas.components()).ok().map(|gerg| Model::Gerg(Box::new(gerg)))),
        };
        let model = match model {
            Some(model) => model,
            None => Model::PengRobinson(PengRobinson::new(gas.components()).map_err(|species| NoEquation { species })?),
        };
        let critical = match &model {
            Model::Equation(equation) | Model::OneSubstance { equation, .. } => {
                Some((equation.constants().t_c_k, equation.constants().p_c_pa))
            }
            _ => gas.critical_temperature().zip(gas.critical_pressure()).map(|(t, p)| (t.get::<kelvin>(), p.get::<pascal>())),
        };
        Ok(Self(Arc::new(Inner { title: gas.title(), model, guard: PhaseGuard::new(gas), critical })))
    }

    /// Dry air by its own reference equation, which is published for more temperatures and pressures than GERG-2008 is.
    fn as_one_substance(gas: &Gas) -> Option<Model> {
        let equation = (gas.title() == AIR).then(|| Equation::of_name(AIR)).flatten()?;
        Some(Model::OneSubstance { equation, s_mixing_j_kg_k: gas.s_j_kg_k(REFERENCE_TEMPERATURE_K) })
    }

    /// What the gas is, as a sheet would say it.
    #[must_use]
    pub fn title(&self) -> &str {
        &self.0.title
    }

    /// Kind of its model.
    #[must_use]
    pub fn kind(&self) -> ModelKind {
        match self.0.model {
            Model::Equation(_) | Model::OneSubstance { .. } => ModelKind::ReferenceEquation,
            Model::Gerg(_) => ModelKind::Gerg2008,
            Model::PengRobinson(_) => ModelKind::PengRobinson,
        }
    }

    /// Publication of its model.
    #[must_use]
    pub fn source(&self) -> &'static str {
        match &self.0.model {
            Model::Equation(equation) | Model::OneSubstance { equation, .. } => equation.constants().source,
            Model::Gerg(_) => GERG_SOURCE,
            Model::PengRobinson(_) => PENG_ROBINSON_SOURCE,
        }
    }

    /// Uncertainty as the publication states it; empty where none is on record.
    #[must_use]
    pub fn uncertainty(&self) -> &'static str {
        match &self.0.model {
            Model::Equation(equation) | Model::OneSubstance { equation, .. } => equation.constants().uncertainty,
            Model::Gerg(_) => GERG_UNCERTAINTY,
            Model::PengRobinson(_) => "a few percent in density, more near the critical point and for polar gases",
        }
    }

    /// The reference equation, where that is its model.
    #[must_use]
    pub fn equation(&self) -> Option<&'static Equation> {
        match self.0.model {
            Model::Equation(equation) => Some(equation),
            _ => None,
        }
    }

    /// Molar mass of the model, kg/mol.
    #[must_use]
    pub fn molar_mass_kg_mol(&self) -> f64 {
        match &self.0.model {
            Model::Equation(equation) | Model::OneSubstance { equation, .. } => equation.constants().molar_mass_kg_mol,
            Model::Gerg(gerg) => gerg.molar_mass_kg_mol,
            Model::PengRobinson(cubic) => cubic.molar_mass_kg_mol,
        }
    }

    /// Specific gas constant of the model, J/(kg K).
    #[must_use]
    pub fn gas_constant_j_kg_k(&self) -> f64 {
        match &self.0.model {
            Model::Equation(equation) | Model::OneSubstance { equation, .. } => equation.gas_constant_j_kg_k(),
            Model::Gerg(gerg) => gerg.gas_constant_j_kg_k(),
            Model::PengRobinson(cubic) => MOLAR_GAS_CONSTANT / cubic.molar_mass_kg_mol,
        }
    }

    /// Critical temperature, K, and pressure, Pa, as published with the equation; of mixtures the pseudo-critical point of [`Gas`].
    #[must_use]
    pub fn critical_point(&self) -> Option<(f64, f64)> {
        self.0.critical
    }

    /// Range of the model.
    #[must_use]
    pub fn range(&self) -> ModelRange {
        match &self.0.model {
            Model::Equation(equation) | Model::OneSubstance { equation, .. } => {
                let c = equation.constants();
                ModelRange {
                    t_low_k: c.t_min_k,
                    t_high_k: c.t_max_k,
                    p_high_pa: c.p_max_pa,
                    t_limit_low_k: c.t_min_k,
                    t_limit_high_k: c.t_limit_k,
                    p_limit_pa: c.p_limit_pa,
                }
            }
            Model::Gerg(_) => ModelRange {
                t_low_k: GERG_T_K.0,
                t_high_k: GERG_T_K.1,
                p_high_pa: GERG_P_PA,
                t_limit_low_k: GERG_T_LIMIT_K.0,
                t_limit_high_k: GERG_T_LIMIT_K.1,
                p_limit_pa: GERG_P_LIMIT_PA,
            },
            Model::PengRobinson(_) => PENG_ROBINSON_RANGE,
        }
    }

    /// Whether a state of a pure gas is within [`NEAR_CRITICAL`] of its critical point, in temperature and in pressure.
    #[must_use]
    pub fn near_critical(&self, t_k: f64, p_pa: f64) -> bool {
        let near = |x: f64, c: f64| (x / c - 1.0).abs() <= NEAR_CRITICAL;
        self.equation().is_some() && self.0.critical.is_some_and(|(t_c, p_c)| near(t_k, t_c) && near(p_pa, p_c))
    }

    /// How near a gas is to condensing, where that is within [`NEAR_CONDENSATION_K`](super::phase::NEAR_CONDENSATION_K).
    ///
    /// # Errors
    ///
    /// As [`PhaseGuard::check`].
    pub fn near_condensation(&self, t_k: f64, p_pa: f64) -> Result<Option<NearCondensation>, StateError> {
        self.0.guard.check(t_k, p_pa)
    }

    /// Whether a temperature and a pressure are a gas within the limits of the model; the error says why not.
    ///
    /// # Errors
    ///
    /// [`StateError::NoState`], [`StateError::OutOfRange`], and those of [`PhaseGuard::check`].
    pub fn check(&self, t_k: f64, p_pa: f64) -> Result<(), StateError> {
        for (quantity, value) in [("temperature", t_k), ("pressure", p_pa)] {
            if !(value > 0.0 && value.is_finite()) {
                return Err(StateError::NoState { quantity, value });
            }
        }
        let range = self.range();
        if t_k <= range.t_limit_high_k && p_pa <= range.p_limit_pa {
            self.0.guard.check(t_k, p_pa)?;
        }
        range.beyond(t_k, p_pa).map_or(Ok(()), |limit| Err(StateError::OutOfRange(limit)))
    }

    /// Density of the gas, kg/m³, at a temperature, K, and a pressure, Pa.
    ///
    /// # Errors
    ///
    /// Those of [`Self::check`], and [`StateError::NotConverged`].
    pub fn density_kg_m3(&self, t_k: f64, p_pa: f64) -> Result<f64, StateError> {
        self.check(t_k, p_pa)?;
        self.density_unchecked(t_k, p_pa)
    }

    /// The density of the gas root, where phase and range are checked already.
    pub(crate) fn density_unchecked(&self, t_k: f64, p_pa: f64) -> Result<f64, StateError> {
        match &self.0.model {
            Model::Equation(equation) | Model::OneSubstance { equation, .. } => equation.density(t_k, p_pa),
            Model::Gerg(gerg) => gerg.density(t_k, p_pa),
            Model::PengRobinson(cubic) => Ok(cubic.molar_density(t_k, p_pa)? * cubic.molar_mass_kg_mol),
        }
    }

    /// All properties at a temperature, K, and a density, kg/m³, with their slopes. Phase and range are not looked at; what has no value (a
    /// heat capacity outside [`Self::caloric_range_k`], a speed of sound between the spinodals) is not a number.
    #[must_use]
    pub fn properties(&self, t_k: f64, rho_kg_m3: f64) -> StateProperties {
        match &self.0.model {
            Model::Equation(equation) => equation.properties(t_k, rho_kg_m3),
            Model::OneSubstance { equation, s_mixing_j_kg_k } => {
                let mut state = equation.properties(t_k, rho_kg_m3);
                state.s.value += s_mixing_j_kg_k;
                state
            }
            Model::Gerg(gerg) => gerg.properties(t_k, rho_kg_m3),
            Model::PengRobinson(cubic) => cubic.properties(t_k, rho_kg_m3),
        }
    }

    /// As [`Self::properties`]; the slopes of cp, cv, k and w may be left at zero where they cost extra.
    pub(crate) fn values(&self, t_k: f64, rho_kg_m3: f64) -> StateProperties {
        match &self.0.model {
            Model::Gerg(gerg) => gerg.values(t_k, rho_kg_m3),
            _ => self.properties(t_k, rho_kg_m3),
        }
    }

    /// Lowest and highest temperature, K, at which h, u, s, cp, cv, k and w have values; `None` for a gas with [`Self::without_caloric`].
    ///
    /// Those of [`Self::range`], but for Peng and Robinson's equation, where the heat capacities of the components may end before.
    #[must_use]
    pub fn caloric_range_k(&self) -> Option<(f64, f64)> {
        let range = self.range();
        let (low, high) = match &self.0.model {
            Model::PengRobinson(cubic) => cubic.caloric_range()?,
            _ => (0.0, f64::INFINITY),
        };
        Some((range.t_limit_low_k.max(low), range.t_limit_high_k.min(high)))
    }

    /// Name of a component without caloric data: then only p, v, rho, T and Z have values.
    #[must_use]
    pub fn without_caloric(&self) -> Option<&'static str> {
        match &self.0.model {
            Model::PengRobinson(cubic) => cubic.without_caloric(),
            _ => None,
        }
    }
}

/// The same with quantities.
impl RealGas {
    /// Density of the gas.
    ///
    /// # Errors
    ///
    /// As [`Self::density_kg_m3`].
    pub fn density(&self, t: ThermodynamicTemperature, p: Pressure) -> Result<MassDensity, StateError> {
        self.density_kg_m3(t.get::<kelvin>(), p.get::<pascal>()).map(MassDensity::new::<kilogram_per_cubic_meter>)
    }

    /// All properties of the state at a temperature and a pressure.
    ///
    /// # Errors
    ///
    /// As [`Self::density_kg_m3`].
    pub fn state(&self, t: ThermodynamicTemperature, p: Pressure) -> Result<StateProperties, StateError> {
        let t_k = t.get::<kelvin>();
        Ok(self.properties(t_k, self.density_kg_m3(t_k, p.get::<pascal>())?))
    }
}

/// Gases are equal when they have the same title and kind of model: titles name the composition.
impl PartialEq for RealGas {
    fn eq(&self, other: &Self) -> bool {
        self.0.title == other.0.title && self.kind() == other.kind()
    }
}
