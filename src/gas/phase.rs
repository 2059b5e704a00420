//! Whether a state is that of a gas: liquid, two-phase and solid states are refused, for real and ideal gases alike.

use super::eos::dew_point::Condensate;
use super::eos::equation::Equation;
use super::eos::peng_robinson::PengRobinson;
use super::eos::saturation_line::Saturation;
use super::ideal_gas::Gas;
use super::species::Species;
use super::state_error::StateError;

/// A state this near to condensation is warned of, K.
pub const NEAR_CONDENSATION_K: f64 = 5.0;

/// Share by which a pressure may lie above saturation and still be the saturated gas: `T = T_sat(p)` comes back with rounding.
const SATURATED: f64 = 1e-9;

/// Below this share of the saturation pressure by the auxiliary equation at a temperature 5 K lower a gas is not near its line.
const SURELY_DRY: f64 = 0.95;

/// Below this share carbon dioxide is not looked at for frost: the trace of it in air is taken out of a plant that is so cold, and in dense
/// gas its partial pressure says nothing of its solubility.
const TRACE: f64 = 0.01;

/// Where the border of the gas is taken from.
#[derive(Clone, Copy, Debug, PartialEq, Eq)]
#[non_exhaustive]
pub enum BorderModel {
    /// The saturation line of the reference equation, for a component at its partial pressure.
    SaturationLine,
    /// The sublimation pressure of the solid, for a component at its partial pressure.
    SublimationLine,
    /// The dew point of the mixture by Peng and Robinson's equation, good to a few kelvins.
    PengRobinson,
}

/// A gas that is near to condensing.
#[derive(Clone, Copy, Debug, PartialEq)]
#[non_exhaustive]
pub struct NearCondensation {
    /// The component that condenses first.
    pub component: &'static str,
    /// Temperature at which it condenses at this pressure, K.
    pub t_condensation_k: f64,
    /// How far the state is above it, K.
    pub margin_k: f64,
    /// By what.
    pub model: BorderModel,
}

/// The borders of one gas.
///
/// A pure gas: its saturation line, below the triple point its sublimation pressure where that is known, above it the melting pressure.
/// A mixture: water (and what has a sublimation line) by its partial pressure, the rest by the dew point of the cubic equation.
#[derive(Clone, Debug)]
pub struct PhaseGuard(Kind);

#[derive(Clone, Debug)]
enum Kind {
    Pure { equation: &'static Equation, t_triple_k: f64 },
    Mixture { partial: Vec<(&'static Equation, f64)>, rest: Option<Rest> },
}

/// What is left of a mixture without its water.
#[derive(Clone, Debug)]
struct Rest {
    cubic: PengRobinson,
    share: f64,
    highest_t_c_k: f64,
}

impl PhaseGuard {
    /// The borders of a gas.
    #[must_use]
    pub fn new(gas: &Gas) -> Self {
        if let Some(species) = gas.species()
            && let Some(equation) = Equation::of(species)
        {
            let t_triple_k = species.t_triple_k.unwrap_or(equation.constants().t_min_k);
            return Self(Kind::Pure { equation, t_triple_k });
        }
        let has_line = |species: &Species| Equation::of(species).filter(|equation| equation.solid.sublimation_source().is_some());
        let partial = gas
            .components()
            .iter()
            .filter_map(|component| has_line(component.species).map(|equation| (equation, component.mole_fraction)))
            .collect();
        Self(Kind::Mixture { partial, rest: Rest::new(gas) })
    }

    /// Refuses a state that is not a gas, and says how near a gas is to condensing where that is within [`NEAR_CONDENSATION_K`].
    ///
    /// # Errors
    ///
    /// [`StateError::Liquid`], [`StateError::Solid`], [`StateError::Condenses`]; [`StateError::NotConverged`] where a saturation line is not
    /// found.
    pub fn check(&self, t_k: f64, p_pa: f64) -> Result<Option<NearCondensation>, StateError> {
        match &self.0 {
            Kind::Pure { equation, t_triple_k } => pure(equation, *t_triple_k, t_k, p_pa),
            Kind::Mixture { partial, rest } => {
                let mut near: Option<NearCondensation> = None;
                let mut see = |found: Option<NearCondensation>| {
                    if let Some(found) = found
                        && near.is_none_or(|known| found.margin_k < known.margin_k)
                    {
                        near = Some(found);
                    }
                };
                for (equation, share) in partial {
                    see(by_partial_pressure(equation, *share, t_k, p_pa)?);
                }
                if let Some(rest) = rest {
                    see(rest.check(t_k, p_pa)?);
                }
                Ok(near)
            }
        }
    }
}

fn near(equation: &Equation, t_k: f64, t_condensation_k: f64, model: BorderModel) -> Option<NearCondensation> {
    let margin_k = t_k - t_condensation_k;
    (margin_k < NEAR_CONDENSATION_K).then_some(NearCondensation { component: equation.constants().name, t_condensation_k, margin_k, model })
}

/// A pure gas.
fn pure(equation: &Equation, t_triple_k: f64, t_k: f64, p_pa: f64) -> Result<Option<NearCondensation>, StateError> {
    let c = equation.constants();
    let solid = |p_border_pa: Option<f64>| StateError::Solid { t_k, p_pa, t_triple_k, p_border_pa };
    if t_k < c.t_min_k {
        if let Some(p_border) = equation.solid.sublimation_pa(t_k) {
            if p_pa > p_border * (1.0 + SATURATED) {
                return Err(solid(Some(p_border)));
            }
            return Ok(frost_point(equation, p_pa, t_k).and_then(|t| near(equation, t_k, t, BorderModel::SublimationLine)));
        }
        // The border is not known; above the pressure where it starts it is passed for certain.
        let lowest = equation.saturation_at(c.t_min_k)?.p_pa;
        if p_pa > lowest {
            return Err(if t_k < t_triple_k {
                solid(None)
            } else {
                StateError::Liquid { t_k, p_pa, t_sat_k: sat(equation, p_pa), p_sat_pa: None }
            });
        }
        return Ok(None);
    }
    if p_pa > c.p_c_pa
        && let Some(p_border) = equation.solid.melting_pa(t_k)
        && p_border > c.p_c_pa
        && p_pa > p_border
    {
        return Err(solid(Some(p_border)));
    }
    if t_k >= c.t_c_own_k {
        if p_pa >= c.p_c_own_pa || t_k - NEAR_CONDENSATION_K >= c.t_c_own_k {
            return Ok(None);
        }
        return Ok(sat(equation, p_pa).and_then(|t| near(equation, t_k, t, BorderModel::SaturationLine)));
    }
    let below = (t_k - NEAR_CONDENSATION_K).max(c.t_min_k);
    if p_pa < SURELY_DRY * equation.start.p_sat(below) && t_k - NEAR_CONDENSATION_K > c.t_min_k {
        return Ok(None);
    }
    let Saturation { p_pa: p_sat_pa, .. } = equation.saturation_at(t_k)?;
    if p_pa > p_sat_pa * (1.0 + SATURATED) {
        return Err(StateError::Liquid { t_k, p_pa, t_sat_k: sat(equation, p_pa), p_sat_pa: Some(p_sat_pa) });
    }
    let t_condensation_k = sat(equation, p_pa).or_else(|| frost_point(equation, p_pa, t_k));
    Ok(t_condensation_k.and_then(|t| near(equation, t_k, t, BorderModel::SaturationLine)))
}

fn sat(equation: &Equation, p_pa: f64) -> Option<f64> {
    equation.t_sat(p_pa).ok().map(|point| point.t_k)
}

/// Temperature at which a gas of a pressure, Pa, begins to condense or to freeze out.
pub(crate) fn condensation_temperature(equation: &Equation, p_pa: f64) -> Option<f64> {
    sat(equation, p_pa).or_else(|| frost_point(equation, p_pa, equation.constants().t_min_k))
}

/// Temperature of the sublimation line at a pressure, by bisection in temperature; `None` without one, and outside it.
pub(super) fn frost_point(equation: &Equation, p_pa: f64, high_k: f64) -> Option<f64> {
    let of = |t_k: f64| equation.solid.sublimation_pa(t_k);
    let mut high = high_k.min(equation.constants().t_min_k);
    of(high)?;
    // The lowest temperature of the line, found by halving.
    let mut low = high;
    while of(low).is_some_and(|p| p > p_pa) {
        high = low;
        low *= 0.9;
    }
    of(low)?;
    for _ in 0..60 {
        let middle = 0.5 * (low + high);
        if of(middle)? < p_pa {
            low = middle;
        } else {
            high = middle;
        }
    }
    Some(0.5 * (low + high))
}

/// A component of a mixture that has a solid below its triple point: water, carbon dioxide. Above it water alone is judged so, since the
/// cubic equation knows the others better.
fn by_partial_pressure(equation: &Equation, share: f64, t_k: f64, p_pa: f64) -> Result<Option<NearCondensation>, StateError> {
    let c = equation.constants();
    let is_water = c.name == "water";
    let partial_pressure_pa = share * p_pa;
    let is_below = t_k < c.t_min_k;
    if !is_water && share < TRACE {
        return Ok(None);
    }
    if !is_below && (!is_water || t_k >= c.t_c_own_k + NEAR_CONDENSATION_K || partial_pressure_pa >= c.p_c_own_pa) {
        return Ok(None);
    }
    let p_border = if is_below {
        equation.solid.sublimation_pa(t_k)
    } else if t_k < c.t_c_own_k {
        Some(equation.saturation_at(t_k)?.p_pa)
    } else {
        None
    };
    let t_border_k = condensation_temperature(equation, partial_pressure_pa);
    if let Some(p_sat_pa) = p_border
        && partial_pressure_pa > p_sat_pa * (1.0 + SATURATED)
    {
        return Err(StateError::Condenses {
            component: c.name,
            t_k,
            p_pa,
            partial_pressure_pa,
            p_sat_pa: Some(p_sat_pa),
            t_dew_k: t_border_k,
        });
    }
    let model = if is_below { BorderModel::SublimationLine } else { BorderModel::SaturationLine };
    Ok(t_border_k.and_then(|t| near(equation, t_k, t, model)))
}

impl Rest {
    fn new(gas: &Gas) -> Option<Self> {
        let is_water = |species: &Species| species.name == "water";
        let mut components: Vec<_> = gas.components().iter().filter(|one| !is_water(one.species)).copied().collect();
        let share: f64 = components.iter().map(|one| one.mole_fraction).sum();
        if components.is_empty() {
            return None;
        }
        for one in &mut components {
            one.mole_fraction /= share;
        }
        let highest_t_c_k = components.iter().filter_map(|one| one.species.t_c_k).fold(0.0, f64::max);
        PengRobinson::new(&components).ok().map(|cubic| Self { cubic, share, highest_t_c_k })
    }

    fn check(&self, t_k: f64, p_pa: f64) -> Result<Option<NearCondensation>, StateError> {
        if t_k - NEAR_CONDENSATION_K > self.highest_t_c_k {
            return Ok(None);
        }
        let p = self.share * p_pa;
        let positive = |found: &Condensate| found.excess > 0.0;
        let high_k = 1.02 * self.highest_t_c_k + NEAR_CONDENSATION_K;
        if let Some(found) = self.cubic.condensate(t_k, p).filter(positive) {
            let species = self.cubic.species(found.mostly);
            return Err(StateError::Condenses {
                component: species.name,
                t_k,
                p_pa,
                partial_pressure_pa: self.share * self.cubic.fractions()[found.mostly] * p_pa,
                p_sat_pa: None,
                t_dew_k: self.cubic.dew_point(p, t_k, high_k),
            });
        }
        let below = t_k - NEAR_CONDENSATION_K;
        if below <= 0.0 {
            return Ok(None);
        }
        let Some(found) = self.cubic.condensate(below, p).filter(positive) else { return Ok(None) };
        let near = self.cubic.dew_point(p, below, t_k).map(|t_condensation_k| NearCondensation {
            component: self.cubic.species(found.mostly).name,
            t_condensation_k,
            margin_k: t_k - t_condensation_k,
            model: BorderModel::PengRobinson,
        });
        Ok(near)
    }
}
