//! The density of a gas from temperature and pressure, by a reference equation.

use super::equation::{Equation, EquationIsotherm};
use super::saturation_line::Saturation;
use crate::gas::state_error::StateError;

/// Relative step of Newton's method at which the answer has all its digits: the next step would be about the square of this one.
const STEP: f64 = 1e-9;

/// Share by which a pressure may differ from saturation and still be that of the saturated gas: `T = T_sat(p)` comes back with rounding.
const SATURATED: f64 = 1e-9;

/// Relative residual of the pressure that may be left where the bracket has closed on the end of the gas.
const ROUNDING: f64 = 1e-11;

/// Most steps: a bracket over the whole range of densities needs some sixty bisections.
const MOST_STEPS: u32 = 120;

/// Highest reduced density that is tried: no gas of the table is denser at its highest pressure.
const DENSEST: f64 = 12.0;

/// Below this share of the saturation pressure by the auxiliary equation a gas is surely below its saturation line, and the line is not
/// solved for: checked for every gas where those equations stand.
const SURELY_GAS: f64 = 0.95;

impl Equation {
    /// Molar density of the gas, mol/m³, within a published or extrapolated range that the caller has checked.
    ///
    /// Equation: p(T, ρ) = p by Newton's method in ρ, kept in a bracket, from a cubic equation's density.
    /// Valid:    below the critical temperature up to the saturation pressure, which is solved for first; above it at every pressure.
    /// Error:    the last digits: a step of [`STEP`] and one more.
    /// Edges:    above saturation [`StateError::Liquid`].
    pub(crate) fn molar_density(&self, t_k: f64, p_pa: f64) -> Result<f64, StateError> {
        let isotherm = self.isotherm(t_k);
        let c = &self.constants;
        if t_k >= c.t_c_own_k {
            return isotherm.density(p_pa, self.density_guess(t_k, p_pa), DENSEST * self.rho_reducing).map(|(rho, _)| rho);
        }
        let near = self.start.p_sat(t_k);
        let highest = if p_pa < SURELY_GAS * near && t_k < 0.98 * c.t_c_own_k {
            // Everything up to the spinodal would do; 5 % above the density of saturation by the auxiliary equation is still below it.
            self.start.rho_vapour(t_k) * 1.05
        } else {
            let Saturation { p_pa: p_sat_pa, rho_vapour, .. } = self.saturation_at(t_k)?;
            if p_pa > p_sat_pa * (1.0 + SATURATED) {
                return Err(self.liquid(t_k, p_pa, p_sat_pa));
            }
            if p_pa >= p_sat_pa * (1.0 - SATURATED) {
                let (p, slope) = isotherm.pressure(rho_vapour);
                let step = if slope > 0.0 { (p_pa - p) / slope } else { 0.0 };
                return Ok(rho_vapour + step.clamp(-1e-6 * rho_vapour, 1e-6 * rho_vapour));
            }
            rho_vapour
        };
        let guess = self.density_guess(t_k, p_pa);
        isotherm.density(p_pa, guess, highest).map(|(rho, _)| rho)
    }

    fn liquid(&self, t_k: f64, p_pa: f64, p_sat_pa: f64) -> StateError {
        StateError::Liquid { t_k, p_pa, t_sat_k: self.t_sat(p_pa).ok().map(|line| line.t_k), p_sat_pa: Some(p_sat_pa) }
    }
}

impl EquationIsotherm<'_> {
    /// The density between 0 and `highest` whose pressure is `p_pa`, and the evaluations it took.
    pub(crate) fn density(&self, p_pa: f64, guess: f64, highest: f64) -> Result<(f64, u32), StateError> {
        let (mut low, mut high) = (0.0, highest);
        let mut rho = if guess > 0.0 && guess < high { guess } else { 0.5 * high };
        // The upper end is only a bound: whether the pressure is reached there shows when the steps run into it.
        let mut high_is_tried = false;
        for step in 1..=MOST_STEPS {
            let (p, slope) = self.pressure(rho);
            let error = p - p_pa;
            if error < 0.0 {
                low = rho;
            } else {
                high = rho;
                high_is_tried = true;
            }
            let next = if slope > 0.0 { rho - error / slope } else { f64::NAN };
            let change = (next - rho).abs();
            if change <= STEP * rho {
                return Ok((next, step));
            }
            // Not a number fails every comparison and bisects. Towards an end that is not tried the density at most doubles: beyond the
            // range of an equation anything may stand.
            rho = if next > low && next < high && (high_is_tried || next <= 2.0 * rho) {
                next
            } else if high_is_tried || high <= 2.0 * rho {
                if !high_is_tried && next >= high { high * (1.0 - 1e-12) } else { 0.5 * (low + high) }
            } else {
                2.0 * rho
            };
            if high - low <= 4.0 * f64::EPSILON * high {
                // Rounding of the pressure near the critical point moves the density by more than a step of Newton's method.
                if low > 0.0 && high < highest {
                    return Ok((rho, step));
                }
                break;
            }
        }
        let (p, _) = self.pressure(rho);
        if (p - p_pa).abs() <= ROUNDING * p_pa {
            return Ok((rho, MOST_STEPS));
        }
        Err(StateError::NotConverged {
            what: "density",
            model: "the reference equation of state",
            iterations: MOST_STEPS,
            residual: (p - p_pa) / p_pa,
        })
    }
}

impl Equation {
    /// Density of the gas, kg/m³, at a temperature, K, and a pressure, Pa: see the door of the room for the guards of range
    /// that are not applied here.
    ///
    /// # Errors
    ///
    /// [`StateError::Liquid`] above the saturation pressure, [`StateError::NoState`] for numbers that are none, [`StateError::NotConverged`].
    pub fn density(&self, t_k: f64, p_pa: f64) -> Result<f64, StateError> {
        for (quantity, value) in [("temperature", t_k), ("pressure", p_pa)] {
            if !(value > 0.0 && value.is_finite()) {
                return Err(StateError::NoState { quantity, value });
            }
        }
        Ok(self.molar_density(t_k, p_pa)? * self.constants.molar_mass_kg_mol)
    }
}
