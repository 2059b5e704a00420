//! A state from any two independent properties.

use super::eos::property::{Property, StateProperties};

use super::real_gas::RealGas;
use super::state_error::StateError;
use crate::units::math::{exp, ln};

/// Relative step of temperature or density at which a search ends: the next step of Newton's method is about the square of it.
pub(super) const STEP: f64 = 1e-8;

/// Step below which a search that no longer closes in has met the rounding of the property.
pub(super) const ROUNDING: f64 = 1e-6;

/// Most steps of one search.
pub(super) const MOST_STEPS: u32 = 100;

/// Two roots nearer than this are one.
pub(super) const SAME: f64 = 1e-7;

/// How far the properties of a state that was found may be from those asked for, relative to their size.
pub(super) const AGREES: f64 = 1e-9;

impl RealGas {
    /// The state of which two properties are given, as a gas.
    ///
    /// Any two of p, T, v, rho, h, u and s that are independent. The temperature and density are found to 1e-12; where a property hardly
    /// depends on what is sought (h and T of a thin gas), to what that leaves.
    ///
    /// # Errors
    ///
    /// Those of [`Self::check`]; [`StateError::TwoPhase`] with the share of vapour, [`StateError::NoSuchState`], [`StateError::Ambiguous`]
    /// where two states have these properties, [`StateError::Dependent`].
    pub fn solve(&self, first: (Property, f64), second: (Property, f64)) -> Result<StateProperties, StateError> {
        let mut pair = [volume_as_density(first), volume_as_density(second)];
        for ((property, value), (given, _)) in pair.iter().zip([first, second]) {
            let must_be_positive = matches!(property, Property::Pressure | Property::Temperature | Property::Density);
            if !value.is_finite() || (must_be_positive && *value <= 0.0) {
                return Err(StateError::NoState { quantity: given.symbol(), value: *value });
            }
        }
        let dependent = StateError::Dependent { properties: [first.0.symbol(), second.0.symbol()] };
        if pair[0].0 == pair[1].0 || !pair.iter().all(|(property, _)| property.fixes_a_state()) {
            return Err(dependent);
        }
        if !pair.iter().all(|(property, _)| matches!(property, Property::Pressure | Property::Temperature | Property::Density))
            && self.without_caloric().is_some()
        {
            return Err(StateError::NoSuchState { properties: pair.map(|(property, value)| (property.symbol(), value)) });
        }
        pair.sort_by_key(|(property, _)| rank(*property));
        let (t_k, rho) = match pair {
            [(Property::Temperature, t), (Property::Pressure, p)] => (t, self.density_kg_m3(t, p)?),
            [(Property::Temperature, t), (Property::Density, rho)] => (t, rho),
            [(Property::Temperature, t), caloric] => self.on_isotherm(t, caloric)?,
            [(Property::Pressure, p), other] => self.on_isobar(p, other)?,
            [(Property::Density, rho), caloric] => (self.on_isochore(rho, caloric)?, rho),
            [one, other] => self.by_two_calorics(one, other)?,
        };
        let state = self.accept(t_k, rho)?;
        let agrees =
            pair.iter().all(|(property, value)| (state.get(*property).value - value).abs() <= AGREES * self.size(*property, &state));
        if agrees { Ok(state) } else { Err(self.no_state(pair[0], pair[1])) }
    }

    /// As [`Self::solve`]; of two states that have the properties, the one whose temperature, K, and density, kg/m³, are nearest to `near`.
    ///
    /// # Errors
    ///
    /// As [`Self::solve`], but for [`StateError::Ambiguous`].
    pub fn solve_near(&self, first: (Property, f64), second: (Property, f64), near: (f64, f64)) -> Result<StateProperties, StateError> {
        match self.solve(first, second) {
            Err(StateError::Ambiguous { first, second }) => {
                let distance = |(t, rho): (f64, f64)| ln(t / near.0).abs() + ln(rho / near.1).abs();
                let (t_k, rho) = if distance(first) <= distance(second) { first } else { second };
                self.accept(t_k, rho)
            }
            other => other,
        }
    }

    /// A state by temperature and density, when it is a gas within the limits.
    fn accept(&self, t_k: f64, rho: f64) -> Result<StateProperties, StateError> {
        self.single_phase(t_k, rho)?;
        let state = self.properties(t_k, rho);
        if !(state.p.value > 0.0 && state.p.by_rho > 0.0) {
            return Err(StateError::NoSuchState { properties: [("T", t_k), ("rho", rho)] });
        }
        self.check(t_k, state.p.value)?;
        Ok(state)
    }

    /// Refuses a temperature and density between gas and liquid, and a liquid, of a pure gas.
    fn single_phase(&self, t_k: f64, rho: f64) -> Result<(), StateError> {
        let Some(equation) = self.equation() else { return Ok(()) };
        let c = equation.constants();
        if !(t_k >= c.t_min_k && t_k < c.t_c_own_k) {
            return Ok(());
        }
        let molar = rho / c.molar_mass_kg_mol;
        if molar < 0.9 * equation.start.rho_vapour(t_k) && t_k < 0.98 * c.t_c_own_k {
            return Ok(());
        }
        let line = equation.saturation_at(t_k)?;
        if molar <= line.rho_vapour * (1.0 + 1e-8) {
            return Ok(());
        }
        if molar < line.rho_liquid {
            let quality = (1.0 / molar - 1.0 / line.rho_liquid) / (1.0 / line.rho_vapour - 1.0 / line.rho_liquid);
            return Err(StateError::TwoPhase { t_sat_k: t_k, p_sat_pa: line.p_pa, quality });
        }
        let p_pa = equation.pressure_pa(t_k, rho);
        Err(StateError::Liquid { t_k, p_pa, t_sat_k: equation.t_sat(p_pa).ok().map(|point| point.t_k), p_sat_pa: Some(line.p_pa) })
    }

    pub(super) fn no_state(&self, a: (Property, f64), b: (Property, f64)) -> StateError {
        StateError::NoSuchState { properties: [(a.0.symbol(), a.1), (b.0.symbol(), b.1)] }
    }

    /// Temperatures between which a gas is sought.
    pub(super) fn temperatures(&self) -> (f64, f64) {
        let range = self.range();
        (range.t_limit_low_k, range.t_limit_high_k)
    }

    /// T and rho from two of h, u and s: Newton's method in ln T and ln rho from the ideal gas and from a net of other starts. All gas states
    /// that are found count; two different ones are an error.
    fn by_two_calorics(&self, a: (Property, f64), b: (Property, f64)) -> Result<(f64, f64), StateError> {
        let (low, high) = self.temperatures();
        let mut found: Option<(f64, f64)> = None;
        let mut refused = None;
        // From h and u alone p v follows, and a gas may have two states; h and s, u and s have one.
        let may_be_two = a.0 != Property::Entropy && b.0 != Property::Entropy;
        for (t_start, rho_start) in self.starts(a, b) {
            if !(t_start >= low && t_start <= high) {
                continue;
            }
            let Some((t_k, rho)) = self.newton(a, b, t_start, rho_start) else { continue };
            match self.accept(t_k, rho) {
                Ok(_) => match found {
                    None if may_be_two => found = Some((t_k, rho)),
                    None => return Ok((t_k, rho)),
                    Some(known) if (known.0 / t_k - 1.0).abs() > SAME || (known.1 / rho - 1.0).abs() > 1e3 * SAME => {
                        return Err(StateError::Ambiguous { first: known, second: (t_k, rho) });
                    }
                    Some(_) => {}
                },
                Err(error) => {
                    refused.get_or_insert(error);
                }
            }
        }
        found.ok_or_else(|| refused.unwrap_or_else(|| self.no_state(a, b)))
    }

    /// Starts of a search: the ideal gas by its own properties on a net of temperatures and densities, the nearest first.
    fn starts(&self, a: (Property, f64), b: (Property, f64)) -> Vec<(f64, f64)> {
        let (low, high) = self.temperatures();
        let r = self.gas_constant_j_kg_k();
        let critical = self.critical_point().map_or(1.0, |(t_c, p_c)| p_c / (0.29 * r * t_c));
        let mut starts = Vec::new();
        for i in 0..14 {
            let t_k = low * exp(ln(high / low) * (f64::from(i) + 0.5) / 14.0);
            for j in 0..14 {
                let rho = 2.8 * critical * exp(-0.8 * f64::from(j));
                let state = self.values(t_k, rho);
                let distance =
                    |(property, target): (Property, f64)| (state.get(property).value - target).abs() / self.size(property, &state);
                let far = distance(a) + distance(b);
                if far.is_finite() {
                    starts.push((far, t_k, rho));
                }
            }
        }
        starts.sort_by(|x, y| x.0.total_cmp(&y.0));
        starts.truncate(24);
        let net = starts.into_iter().map(|(_, t_k, rho)| (t_k, rho));
        if a.0 == Property::Entropy || b.0 == Property::Entropy {
            return net.collect();
        }
        // h and u leave little but p v: along the densities at which u is met the places where h is crossed are the best starts.
        let (h, u) = if a.0 == Property::Enthalpy { (a, b) } else { (b, a) };
        let mut crossings = Vec::new();
        let mut last: Option<(f64, f64, f64)> = None;
        for j in 0..96 {
            let rho = 3.2 * critical * exp(-0.2 * f64::from(j));
            let Ok(t_k) = self.on_isochore(rho, u) else {
                last = None;
                continue;
            };
            let error = self.values(t_k, rho).h.value - h.1;
            if let Some((t_last, rho_last, before)) = last
                && (before < 0.0) != (error < 0.0)
            {
                let share = before / (before - error);
                crossings.push((t_last + share * (t_k - t_last), rho_last + share * (rho - rho_last)));
            }
            last = Some((t_k, rho, error));
        }
        crossings.into_iter().chain(net).collect()
    }

    fn newton(&self, a: (Property, f64), b: (Property, f64), t_start: f64, rho_start: f64) -> Option<(f64, f64)> {
        let (mut t_k, mut rho) = (t_start, rho_start);
        let (low, high) = self.temperatures();
        let mut last = f64::INFINITY;
        for _ in 0..MOST_STEPS {
            let state = self.values(t_k, rho);
            let (x, y) = (state.get(a.0), state.get(b.0));
            let (ex, ey) = (x.value - a.1, y.value - b.1);
            let (xt, xr, yt, yr) = (x.by_t * t_k, x.by_rho * rho, y.by_t * t_k, y.by_rho * rho);
            let determinant = xt * yr - xr * yt;
            let (dt, dr) = (-(ex * yr - ey * xr) / determinant, -(ey * xt - ex * yt) / determinant);
            let change = dt.abs().max(dr.abs());
            if !change.is_finite() {
                return None;
            }
            t_k *= exp(dt.clamp(-0.3, 0.3));
            rho *= exp(dr.clamp(-1.0, 1.0));
            if !(t_k > 0.5 * low && t_k < 1.5 * high && rho > 0.0) {
                return None;
            }
            if change < STEP || (change < ROUNDING && change >= last) {
                let state = self.values(t_k, rho);
                let agrees = |(property, target): (Property, f64)| {
                    (state.get(property).value - target).abs() <= AGREES * self.size(property, &state)
                };
                return (agrees(a) && agrees(b)).then_some((t_k, rho));
            }
            last = change;
        }
        None
    }

    /// What a difference of a property is compared with: r T, r, or the property itself.
    pub(super) fn size(&self, property: Property, state: &StateProperties) -> f64 {
        let r = self.gas_constant_j_kg_k();
        match property {
            Property::Enthalpy | Property::InternalEnergy => r * state.t_k,
            Property::Entropy => r,
            _ => state.get(property).value.abs(),
        }
    }
}

fn volume_as_density((property, value): (Property, f64)) -> (Property, f64) {
    if property == Property::Volume { (Property::Density, 1.0 / value) } else { (property, value) }
}

fn rank(property: Property) -> u32 {
    match property {
        Property::Temperature => 0,
        Property::Pressure => 1,
        Property::Density | Property::Volume => 2,
        Property::Enthalpy => 3,
        Property::InternalEnergy => 4,
        _ => 5,
    }
}
