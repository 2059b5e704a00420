//! The two rules of thumb for the ideal law.

use uom::si::f64::{Pressure, ThermodynamicTemperature};
use uom::si::pressure::pascal;
use uom::si::thermodynamic_temperature::kelvin;

use super::ideal_gas::Gas;

/// What the two rules of thumb say at one state: `true` where the ideal law is taken to hold.
///
/// They are common practice and have no source. They inform and do not decide: they allow errors in density of up to 3 %, and
/// refuse many states whose error is below 1 %.
#[derive(Clone, Copy, Debug, PartialEq, Eq)]
pub struct Rules {
    /// Rule a: p below a third of the critical pressure, and T above twice the critical temperature.
    pub a: bool,
    /// Rule b: p below a hundredth of the critical pressure, at any T.
    pub b: bool,
}

impl Rules {
    /// Whether one of the rules allows the ideal law.
    #[must_use]
    pub fn allow(self) -> bool {
        self.a || self.b
    }
}

/// Judges a state by the rules of thumb; `None` for a gas whose critical point is not known.
///
/// Of mixtures the pseudo-critical point counts, see [`Gas::critical_temperature`].
#[must_use]
pub fn rules_of_thumb(gas: &Gas, t: ThermodynamicTemperature, p: Pressure) -> Option<Rules> {
    let (t_c_k, p_c_pa) = (gas.critical_temperature()?.get::<kelvin>(), gas.critical_pressure()?.get::<pascal>());
    let (t_k, p_pa) = (t.get::<kelvin>(), p.get::<pascal>());
    Some(Rules { a: p_pa < p_c_pa / 3.0 && t_k > 2.0 * t_c_k, b: p_pa < 0.01 * p_c_pa })
}
