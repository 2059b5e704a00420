//! Saturation as a function of a pure gas: `p_sat(T)` and `T_sat(p)`, with their derivatives.

use super::eos::Equation;
use super::species::Species;
use super::state_error::StateError;

/// A value of the saturation line with its derivative.
#[derive(Clone, Copy, Debug, PartialEq)]
#[non_exhaustive]
pub struct OnSaturationLine {
    /// The value: Pa or K.
    pub value: f64,
    /// Its derivative: Pa/K or K/Pa.
    pub slope: f64,
}

/// Whether a gas has a saturation line here: a reference equation. Mixtures and gases without one have none.
#[must_use]
pub fn has_saturation_line(species: &Species) -> bool {
    Equation::of(species).is_some()
}

/// Saturation pressure of a pure gas at a temperature in K, in Pa.
///
/// Equation: equal pressure and Gibbs energy of both phases of the reference equation.
/// Valid:    from its lowest temperature (mostly the triple point) to the critical one.
/// Error:    that of the equation; it stands in its publication.
///
/// # Errors
///
/// [`StateError::OutOfRange`] with the ends of the line.
pub fn p_sat(equation: &Equation, t_k: f64) -> Result<OnSaturationLine, StateError> {
    let point = equation.saturation(t_k)?;
    Ok(OnSaturationLine { value: point.p_pa, slope: point.dp_dt_pa_k })
}

/// Saturation temperature of a pure gas at a pressure in Pa, in K. As [`p_sat`].
///
/// # Errors
///
/// [`StateError::OutOfRange`] with the ends of the line.
pub fn t_sat(equation: &Equation, p_pa: f64) -> Result<OnSaturationLine, StateError> {
    let point = equation.saturation_temperature(p_pa)?;
    Ok(OnSaturationLine { value: point.t_k, slope: 1.0 / point.dp_dt_pa_k })
}

/// Ends of the saturation line: lowest and highest temperature, K, and their pressures, Pa.
///
/// # Errors
///
/// [`StateError::NotConverged`] where the line is not found at its lower end.
pub fn ends(equation: &Equation) -> Result<[(f64, f64); 2], StateError> {
    let c = equation.constants();
    Ok([(c.t_min_k, equation.saturation(c.t_min_k)?.p_pa), (c.t_c_own_k, c.p_c_own_pa)])
}
