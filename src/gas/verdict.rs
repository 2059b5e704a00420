//! The verdict on the ideal law: how far it is from the reference, state by state, and how far it holds.

use super::eos::property::StateProperties;
use super::ideal_gas::Gas;
use super::real_gas::{ModelKind, RealGas};
use super::state_error::StateError;
use crate::units::math::{exp, ln};

/// Error of the ideal law at one state.
///
/// Differences are ideal less real, so that a negative error in density says that the ideal law finds too little gas.
#[derive(Clone, Copy, Debug, PartialEq)]
#[non_exhaustive]
pub struct IdealError {
    /// 100 (rho_ideal/rho - 1), %: the compressibility factor less one.
    pub density_percent: f64,
    /// 100 (cp_ideal/cp - 1), %; not a number for a gas without caloric data.
    pub cp_percent: f64,
    /// 100 (w_ideal/w - 1), %.
    pub w_percent: f64,
    /// h_ideal - h, J/kg.
    pub h_j_kg: f64,
    /// s_ideal - s, J/(kg K).
    pub s_j_kg_k: f64,
    /// Which model judges.
    pub judge: ModelKind,
    /// Whether the state is beyond the published range of that model.
    pub is_extrapolated: bool,
}

/// A gas with the model that judges its ideal law.
#[derive(Clone, Debug)]
pub struct Judge {
    ideal: Gas,
    real: RealGas,
}

/// Lowest pressure of the search for the limit of the ideal law, Pa: below it the error is beyond notice for every gas.
const LOWEST_PA: f64 = 1.0;

/// Ratio of neighbouring pressures of the search.
const RATIO: f64 = 1.15;

/// Up to which pressure the ideal law holds within a limit.
#[derive(Clone, Copy, Debug, PartialEq)]
#[non_exhaustive]
pub enum PressureLimit {
    /// At this pressure, Pa, the error reaches the limit for the first time.
    Reached {
        /// The pressure, Pa.
        p_pa: f64,
    },
    /// The error stays within the limit up to this pressure, Pa, where the gas condenses.
    Condenses {
        /// The pressure, Pa.
        p_pa: f64,
    },
    /// The error stays within the limit up to this pressure, Pa, where the model ends.
    EndOfRange {
        /// The pressure, Pa.
        p_pa: f64,
    },
}

impl Judge {
    /// The judge of a gas; `None` without a model that may judge: a mixture or gas for which there is only a cubic equation is not judged,
    /// since that equation is no better than the ideal law at low pressure.
    #[must_use]
    pub fn of(gas: &Gas) -> Option<Self> {
        let real = RealGas::new(gas).ok()?;
        (real.kind() != ModelKind::PengRobinson).then(|| Self { ideal: gas.clone(), real })
    }

    /// The real gas it judges by.
    #[must_use]
    pub fn real(&self) -> &RealGas {
        &self.real
    }

    /// Error of the ideal law in density, %: 100 (rho_ideal/rho - 1) = 100 (Z - 1).
    ///
    /// Both densities are per mole of the same model, with its own R: the error vanishes as p goes to zero.
    ///
    /// # Errors
    ///
    /// As [`RealGas::density_kg_m3`]: the state is not a gas, or beyond the limits of the model.
    pub fn error_percent(&self, t_k: f64, p_pa: f64) -> Result<f64, StateError> {
        let rho = self.real.density_kg_m3(t_k, p_pa)?;
        Ok(100.0 * (p_pa / (rho * self.real.gas_constant_j_kg_k() * t_k) - 1.0))
    }

    /// Errors of the ideal law in all that a sheet may use.
    ///
    /// # Errors
    ///
    /// As [`Self::error_percent`].
    pub fn errors(&self, t_k: f64, p_pa: f64) -> Result<IdealError, StateError> {
        let rho = self.real.density_kg_m3(t_k, p_pa)?;
        let state = self.real.values(t_k, rho);
        Ok(self.errors_of(&state, p_pa))
    }

    fn errors_of(&self, state: &StateProperties, p_pa: f64) -> IdealError {
        let t_k = state.t_k;
        let r = self.real.gas_constant_j_kg_k();
        let percent = |ideal: f64, real: f64| 100.0 * (ideal / real - 1.0);
        let ideal = &self.ideal;
        let cp = ideal.cp_j_kg_k(t_k);
        let k = cp / (cp - ideal.gas_constant_j_kg_k());
        let w = crate::units::math::sqrt(k * ideal.gas_constant_j_kg_k() * t_k);
        let s = ideal.s_j_kg_k(t_k) - ideal.gas_constant_j_kg_k() * ln(p_pa / super::polynomial::REFERENCE_PRESSURE_PA);
        IdealError {
            density_percent: 100.0 * (p_pa / (state.rho_kg_m3 * r * t_k) - 1.0),
            cp_percent: percent(cp, state.cp.value),
            w_percent: percent(w, state.w.value),
            h_j_kg: ideal.h_j_kg(t_k) - state.h.value,
            s_j_kg_k: s - state.s.value,
            judge: self.real.kind(),
            is_extrapolated: !self.real.range().unpublished(t_k, p_pa).is_empty(),
        }
    }

    /// Up to which pressure the ideal law holds within `limit_percent` in density at a temperature, K.
    ///
    /// Pressures from where the second virial coefficient makes a fifth of the limit are looked at in steps of 15 %, and the crossing is
    /// bisected within its step, so that a second crossing (near the Boyle temperature the error falls, turns and rises) is not taken for
    /// the first.
    ///
    /// # Errors
    ///
    /// [`StateError::OutOfRange`] where the model has no range at that temperature.
    pub fn pressure_limit(&self, t_k: f64, limit_percent: f64) -> Result<PressureLimit, StateError> {
        let range = self.real.range();
        if let Some(limit) = range.beyond(t_k, LOWEST_PA) {
            return Err(StateError::OutOfRange(limit));
        }
        self.limit_within(t_k, limit_percent, FIGURES)
    }

    /// The same, to a relative step of the pressure.
    fn limit_within(&self, t_k: f64, limit_percent: f64, step: f64) -> Result<PressureLimit, StateError> {
        let range = self.real.range();
        let over = |p_pa: f64| self.error_percent(t_k, p_pa).map(|percent| percent.abs() - limit_percent);
        let bisected = |low: f64, high: f64, holds: &dyn Fn(f64) -> bool| bisected(low, high, step, holds);
        let mut low = self.start_pa(t_k, limit_percent);
        if low > LOWEST_PA && !over(low).is_ok_and(|excess| excess < 0.0) {
            low = LOWEST_PA;
        }
        over(low)?;
        loop {
            let high = low * RATIO;
            if high > range.p_limit_pa {
                return Ok(PressureLimit::EndOfRange { p_pa: low });
            }
            match over(high) {
                Ok(excess) if excess > 0.0 => {
                    return Ok(PressureLimit::Reached { p_pa: bisected(low, high, &|p| over(p).is_ok_and(|e| e <= 0.0)) });
                }
                Ok(_) => low = high,
                Err(_) => {
                    // The gas ends within this step. The error may reach the limit before it does.
                    let end = bisected(low, high, &|p| over(p).is_ok());
                    if over(end).is_ok_and(|excess| excess > 0.0) {
                        return Ok(PressureLimit::Reached { p_pa: bisected(low, end, &|p| over(p).is_ok_and(|e| e <= 0.0)) });
                    }
                    return Ok(PressureLimit::Condenses { p_pa: end });
                }
            }
        }
    }

    /// A pressure, Pa, up to which the error is far below the limit: by the second virial coefficient, and so low beside the critical pressure
    /// that the third adds nothing where the second is near zero.
    fn start_pa(&self, t_k: f64, limit_percent: f64) -> f64 {
        let Some(equation) = self.real.equation() else { return LOWEST_PA };
        let c = equation.constants();
        let (b, ..) = equation.virial(t_k);
        let by_virial = 0.2 * 0.01 * limit_percent * c.r_j_mol_k * t_k / b.abs();
        by_virial.min(0.02 * limit_percent * c.p_c_pa).max(LOWEST_PA)
    }

    /// The line in the reduced plane along which the error of the ideal law in density first reaches `limit_percent`: points (p/p_c, T/T_c)
    /// in rising order of temperature, for a figure. Temperatures at which the limit is not reached before the gas condenses are left out.
    #[must_use]
    pub fn line_in_reduced_plane(&self, limit_percent: f64, points: u32) -> Vec<(f64, f64)> {
        let Some((t_c, p_c)) = self.real.critical_point() else { return Vec::new() };
        let range = self.real.range();
        let (low, high) = (range.t_limit_low_k.max(LOWEST_REDUCED * t_c), range.t_limit_high_k.min(HIGHEST_REDUCED * t_c));
        if low >= high || points < 2 {
            return Vec::new();
        }
        (0..points)
            .filter_map(|i| {
                let t_k = low * exp(ln(high / low) * f64::from(i) / f64::from(points - 1));
                match self.limit_within(t_k.clamp(low, high), limit_percent, FIGURES_OF_A_CHART) {
                    Ok(PressureLimit::Reached { p_pa }) => Some((p_pa / p_c, t_k / t_c)),
                    _ => None,
                }
            })
            .collect()
    }
}

/// Reduced temperatures between which the line of a figure is drawn.
const LOWEST_REDUCED: f64 = 0.5;
const HIGHEST_REDUCED: f64 = 5.0;

/// Relative step of the pressure to which a limit is found.
const FIGURES: f64 = 1e-12;

/// The same for the points of a figure.
const FIGURES_OF_A_CHART: f64 = 1e-7;

/// The largest value between `low`, where `holds` is true, and `high`, where it is not, to a relative step.
fn bisected(low: f64, high: f64, step: f64, holds: &dyn Fn(f64) -> bool) -> f64 {
    let (mut low, mut high) = (low, high);
    while high - low > step * high {
        let middle = 0.5 * (low + high);
        if middle <= low || middle >= high {
            break;
        }
        if holds(middle) {
            low = middle;
        } else {
            high = middle;
        }
    }
    low
}
