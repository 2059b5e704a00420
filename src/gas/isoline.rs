//! The states of a gas on one isobar, isochore or isotherm.

use super::eos::property::{Property, StateProperties};
use super::eos::saturation_line::Saturation;
use super::phase::frost_point;
use super::property_pair::{AGREES, MOST_STEPS, ROUNDING, SAME, STEP};
use super::real_gas::RealGas;
use super::state_error::StateError;
use crate::units::math::{exp, ln};

/// Densities at which an isotherm is looked at for roots.
const SCAN_POINTS: u32 = 160;

/// ln of the ratio of neighbouring densities of the scan: 160 of them reach down by 1e-14.
const LN_STEP: f64 = 0.2;

/// A target this near to where a property turns, relative to its size, is the turn itself: there the density is found to half the figures.
const AT_TURN: f64 = 1e-13;

/// What is at the lower end of an isobar.
enum LowerEnd {
    /// The state that is sought, by temperature and density.
    Answer(f64, f64),
    /// The temperature of the end; the state is above it.
    Bracket(f64),
    /// The model knows no end.
    Unknown,
}

impl RealGas {
    /// T and rho on an isobar: Newton's method in T, kept in a bracket, on a property that rises (density: falls) with T. The lower end of the gas
    /// is looked for only when a step runs into it.
    pub(super) fn on_isobar(&self, p_pa: f64, (property, target): (Property, f64)) -> Result<(f64, f64), StateError> {
        let (mut low, mut high) = self.temperatures(property);
        let sign = if property == Property::Density { -1.0 } else { 1.0 };
        if let Some(equation) = self.equation()
            && p_pa >= equation.constants().p_c_own_pa
        {
            low = equation.constants().t_c_own_k;
        }
        let (mut low_is_known, mut high_is_known) = (false, false);
        let at = |t_k: f64| -> Result<(StateProperties, f64), StateError> {
            let state = self.values(t_k, self.density_unchecked(t_k, p_pa)?);
            let one = state.get(property);
            Ok((state, one.by_t - one.by_rho * state.p.by_t / state.p.by_rho))
        };
        let mut t_k = match property {
            Property::Density => p_pa / (self.gas_constant_j_kg_k() * target),
            _ => 300.0,
        };
        if !(t_k > low && t_k < high) {
            t_k = 0.5 * (low + high.min(3.0 * low));
        }
        let mut last = f64::INFINITY;
        for _ in 0..MOST_STEPS {
            let found = at(t_k);
            let next = match &found {
                Ok((state, slope)) => {
                    let error = state.get(property).value - target;
                    if sign * error < 0.0 {
                        low = t_k;
                        low_is_known = true;
                    } else {
                        high = t_k;
                        high_is_known = true;
                    }
                    if property == Property::Density || property == Property::Entropy {
                        t_k * exp((-error / (slope * t_k)).clamp(-2.0, 2.0))
                    } else {
                        t_k - error / slope
                    }
                }
                // A state without a gas root is too cold.
                Err(_) => low,
            };
            let change = (next - t_k).abs() / t_k;
            if found.is_ok() && (change < STEP || (change < ROUNDING && change >= last)) && next >= self.temperatures(property).0 {
                return match self.density_unchecked(next, p_pa) {
                    Ok(rho) => Ok((next, rho)),
                    // Rounding has carried the last step over the saturation line.
                    Err(_) => Ok((t_k, self.density_unchecked(t_k, p_pa)?)),
                };
            }
            last = change;
            if next <= low && !low_is_known {
                match self.lower_end(p_pa, (property, target), sign)? {
                    LowerEnd::Answer(t_k, rho) => return Ok((t_k, rho)),
                    LowerEnd::Bracket(t_k) => low = t_k,
                    LowerEnd::Unknown => low = if found.is_err() { t_k } else { low },
                }
                low_is_known = self.equation().is_some();
            } else if found.is_err() {
                low = t_k;
            }
            if next >= high && !high_is_known {
                let (top, slope) = at(high)?;
                let beyond = sign * (target - top.get(property).value);
                if beyond > 1e-12 * self.size(property, &top) {
                    let t_k = if property == Property::Density {
                        high * top.rho_kg_m3 / target
                    } else {
                        high + (target - top.get(property).value) / slope
                    };
                    let no_state = || self.no_state((Property::Pressure, p_pa), (property, target));
                    return Err(self.range().beyond(t_k, p_pa).map_or_else(no_state, StateError::OutOfRange));
                }
                high_is_known = true;
            }
            t_k = if next > low && next < high { next } else { 0.5 * (low + high) };
            if high - low <= 4.0 * f64::EPSILON * high {
                // Closed on a root, or on the end of the gas with the root beyond it.
                return match at(t_k) {
                    Ok((state, _)) if (state.get(property).value - target).abs() <= AGREES * self.size(property, &state) => {
                        Ok((t_k, state.rho_kg_m3))
                    }
                    _ => Err(self.end_of_gas(t_k, p_pa, (property, target))),
                };
            }
        }
        Err(StateError::NotConverged { what: "temperature", model: self.kind().words(), iterations: MOST_STEPS, residual: last })
    }

    /// Why there is no gas below a temperature of an isobar.
    fn end_of_gas(&self, t_k: f64, p_pa: f64, (property, target): (Property, f64)) -> StateError {
        let below = t_k * (1.0 - 1e-6);
        self.check(below, p_pa).err().unwrap_or_else(|| self.no_state((Property::Pressure, p_pa), (property, target)))
    }

    /// Where the gas of a pressure ends towards low temperature, and whether the state that is sought is there or beyond.
    fn lower_end(&self, p_pa: f64, (property, target): (Property, f64), sign: f64) -> Result<LowerEnd, StateError> {
        let Some(equation) = self.equation() else { return Ok(LowerEnd::Unknown) };
        let c = equation.constants();
        let line = if p_pa >= c.p_c_own_pa { None } else { equation.t_sat(p_pa).ok() };
        let at_low = match &line {
            Some(point) => self.values(point.t_k, point.rho_vapour * c.molar_mass_kg_mol),
            None => {
                let t_k = if p_pa >= c.p_c_own_pa { c.t_c_own_k } else { c.t_min_k };
                self.values(t_k, self.density_unchecked(t_k, p_pa)?)
            }
        };
        let short = sign * (target - at_low.get(property).value);
        if short.abs() <= 1e-10 * self.size(property, &at_low) {
            return Ok(LowerEnd::Answer(at_low.t_k, at_low.rho_kg_m3));
        }
        if short < 0.0 {
            return Err(self.below_the_isobar(p_pa, (property, target), line.as_ref()));
        }
        Ok(LowerEnd::Bracket(at_low.t_k))
    }

    /// What a state is that is colder than the gas goes at a pressure for which there is no saturation temperature: above the critical
    /// pressure dense fluid, below that of the triple point solid, where the line of the solid is known.
    fn below_without_line(&self, p_pa: f64, given: (Property, f64)) -> StateError {
        let no_state = || self.no_state((Property::Pressure, p_pa), given);
        let Some(equation) = self.equation() else { return no_state() };
        let c = equation.constants();
        if p_pa >= c.p_c_own_pa {
            return StateError::Liquid { t_k: c.t_c_own_k, p_pa, t_sat_k: None, p_sat_pa: None };
        }
        frost_point(equation, p_pa, c.t_min_k).map_or_else(no_state, |t_k| StateError::Solid {
            t_k,
            p_pa,
            t_triple_k: c.t_min_k,
            p_border_pa: equation.solid.sublimation_pa(t_k),
        })
    }

    /// What a state below the saturation temperature of its pressure is.
    fn below_the_isobar(&self, p_pa: f64, (property, target): (Property, f64), line: Option<&Saturation>) -> StateError {
        let (Some(equation), Some(point)) = (self.equation(), line) else { return self.below_without_line(p_pa, (property, target)) };
        let m = equation.constants().molar_mass_kg_mol;
        let of = |rho: f64| {
            let value = equation.properties(point.t_k, rho * m).get(property).value;
            if property == Property::Density { 1.0 / value } else { value }
        };
        let wanted = if property == Property::Density { 1.0 / target } else { target };
        let (vapour, liquid) = (of(point.rho_vapour), of(point.rho_liquid));
        let quality = (wanted - liquid) / (vapour - liquid);
        if quality > 0.0 {
            StateError::TwoPhase { t_sat_k: point.t_k, p_sat_pa: p_pa, quality }
        } else {
            StateError::Liquid { t_k: point.t_k, p_pa, t_sat_k: Some(point.t_k), p_sat_pa: None }
        }
    }

    /// T on an isochore: h, u and s rise with T where the density is that of a gas.
    pub(super) fn on_isochore(&self, rho: f64, (property, target): (Property, f64)) -> Result<f64, StateError> {
        let (mut low, mut high) = self.temperatures(property);
        let of = |t_k: f64| self.values(t_k, rho).get(property);
        let wrong = || self.no_state((Property::Density, rho), (property, target));
        let mut wet = None;
        if let Some(equation) = self.equation() {
            let c = equation.constants();
            let molar = rho / c.molar_mass_kg_mol;
            let at_critical = of(c.t_c_own_k).value;
            if target >= at_critical {
                low = c.t_c_own_k;
            } else if molar >= c.rho_c_own_mol_m3 {
                return Err(StateError::Liquid {
                    t_k: c.t_c_own_k,
                    p_pa: self.values(c.t_c_own_k, rho).p.value,
                    t_sat_k: None,
                    p_sat_pa: None,
                });
            } else {
                high = c.t_c_own_k;
                if let Some(point) = dew_line(equation, molar) {
                    low = point.t_k;
                    wet = Some(point);
                }
            }
        }
        let (bottom, top) = (of(low), of(high));
        let size = self.size(property, &self.values(high, rho));
        if (target - bottom.value).abs() <= 1e-10 * size {
            return Ok(low);
        }
        if target < bottom.value {
            // Below the dew line of this density the gas is wet; its quality is not sought at a temperature that is not known.
            return Err(wet.map_or_else(wrong, |point| self.wet_on_isochore(&point, rho, (property, target))));
        }
        if target > top.value + 1e-12 * size {
            let t_k = high + (target - top.value) / top.by_t;
            return Err(self.range().beyond(t_k, self.values(high, rho).p.value).map_or_else(wrong, StateError::OutOfRange));
        }
        let mut t_k = if low < 300.0 && high > 300.0 { 300.0 } else { 0.5 * (low + high.min(2.0 * low)) };
        let mut last = f64::INFINITY;
        for _ in 0..MOST_STEPS {
            let one = of(t_k);
            let error = one.value - target;
            if error < 0.0 {
                low = t_k;
            } else {
                high = t_k;
            }
            let next = if property == Property::Entropy {
                t_k * exp((-error / (one.by_t * t_k)).clamp(-2.0, 2.0))
            } else {
                t_k - error / one.by_t
            };
            let change = (next - t_k).abs() / t_k;
            if change < STEP || (change < ROUNDING && change >= last) {
                return Ok(next);
            }
            last = change;
            t_k = if next > low && next < high { next } else { 0.5 * (low + high) };
            if high - low <= 2.0 * f64::EPSILON * high {
                return Ok(t_k);
            }
        }
        Err(StateError::NotConverged { what: "temperature", model: self.kind().words(), iterations: MOST_STEPS, residual: last })
    }

    /// The two-phase state of a density and a property that is below that of the dry gas: its temperature is where the property of the wet
    /// gas, by its quality, is met; found by bisection along the saturation line.
    fn wet_on_isochore(&self, dew: &Saturation, rho: f64, (property, target): (Property, f64)) -> StateError {
        let fallback = StateError::TwoPhase { t_sat_k: dew.t_k, p_sat_pa: dew.p_pa, quality: 1.0 };
        let Some(equation) = self.equation() else { return fallback };
        let m = equation.constants().molar_mass_kg_mol;
        let wet = |t_k: f64| -> Option<(f64, f64, f64)> {
            let point = equation.saturation_at(t_k).ok()?;
            let (vapour, liquid) = (1.0 / (point.rho_vapour * m), 1.0 / (point.rho_liquid * m));
            let quality = (1.0 / rho - liquid) / (vapour - liquid);
            let of = |rho: f64| equation.properties(t_k, rho * m).get(property).value;
            Some((quality * of(point.rho_vapour) + (1.0 - quality) * of(point.rho_liquid), quality, point.p_pa))
        };
        let (mut low, mut high) = (equation.constants().t_min_k, dew.t_k);
        if wet(low).is_none_or(|(value, ..)| value > target) {
            return fallback;
        }
        for _ in 0..60 {
            let middle = 0.5 * (low + high);
            match wet(middle) {
                Some((value, ..)) if value < target => low = middle,
                _ => high = middle,
            }
        }
        wet(high).map_or(fallback, |(_, quality, p_sat_pa)| StateError::TwoPhase { t_sat_k: high, p_sat_pa, quality })
    }

    /// T and rho on an isotherm. h and u of a gas fall with density and rise again where it is dense: both roots are looked for.
    pub(super) fn on_isotherm(&self, t_k: f64, (property, target): (Property, f64)) -> Result<(f64, f64), StateError> {
        let range = self.range();
        if let Some(limit) = range.beyond(t_k, 0.0) {
            return Err(StateError::OutOfRange(limit));
        }
        let mut highest = None;
        let mut line = None;
        if let Some(equation) = self.equation() {
            let c = equation.constants();
            if t_k < c.t_c_own_k {
                let point = equation.saturation_at(t_k)?;
                highest = Some(point.rho_vapour * c.molar_mass_kg_mol);
                line = Some(point);
            }
        }
        let highest = match highest {
            Some(rho) => rho,
            None => self.densest(t_k)?,
        };
        let of = |rho: f64| self.values(t_k, rho).get(property);
        let at = |i: u32| highest * exp(-f64::from(SCAN_POINTS - i) * LN_STEP);
        let mut roots: Vec<f64> = Vec::new();
        let mut low = at(0);
        let first = of(low);
        let (mut below, mut slope) = (first.value - target, first.by_rho);
        let size = self.size(property, &self.values(t_k, highest));
        for i in 1..=SCAN_POINTS {
            let high = if i == SCAN_POINTS { highest } else { at(i) };
            let one = of(high);
            let above = one.value - target;
            if below == 0.0 || (below < 0.0) != (above < 0.0) {
                roots.push(refine(&of, target, low, high, below < 0.0));
            } else if (slope < 0.0) != (one.by_rho < 0.0) {
                // Between the two densities the property turns: the target may lie just within the turn.
                let turn = turning_point(&of, low, high, slope < 0.0);
                let at_turn = of(turn).value - target;
                if at_turn.abs() <= AT_TURN * size {
                    roots.push(turn);
                } else if (at_turn < 0.0) != (below < 0.0) {
                    roots.push(refine(&of, target, low, turn, below < 0.0));
                    roots.push(refine(&of, target, turn, high, below >= 0.0));
                }
            }
            (low, below, slope) = (high, above, one.by_rho);
        }
        if roots.is_empty() && below.abs() <= 1e-10 * size {
            roots.push(highest);
        }
        roots.dedup_by(|a, b| (*a / *b - 1.0).abs() < SAME);
        match roots[..] {
            [rho] => Ok((t_k, rho)),
            [a, b, ..] => Err(StateError::Ambiguous { first: (t_k, a), second: (t_k, b) }),
            [] => Err(match (line, self.equation()) {
                (Some(point), Some(equation)) => {
                    let m = equation.constants().molar_mass_kg_mol;
                    let of = |rho: f64| equation.properties(t_k, rho * m).get(property).value;
                    let (vapour, liquid) = (of(point.rho_vapour), of(point.rho_liquid));
                    let quality = (target - liquid) / (vapour - liquid);
                    if quality > 0.0 && quality < 1.0 {
                        StateError::TwoPhase { t_sat_k: t_k, p_sat_pa: point.p_pa, quality }
                    } else {
                        self.no_state((Property::Temperature, t_k), (property, target))
                    }
                }
                _ => self.no_state((Property::Temperature, t_k), (property, target)),
            }),
        }
    }

    /// The density at the highest pressure of the range, or as far up as the model has a gas.
    fn densest(&self, t_k: f64) -> Result<f64, StateError> {
        let mut p_pa = self.range().p_limit_pa;
        loop {
            match self.density_unchecked(t_k, p_pa) {
                Ok(rho) if rho.is_finite() => return Ok(rho),
                Err(error) if p_pa < 1e4 => return Err(error),
                _ => p_pa *= 0.5,
            }
        }
    }
}

/// The root of a property between two densities, by Newton's method in ln rho kept in the bracket.
fn refine(of: &impl Fn(f64) -> super::eos::property::WithSlopes, target: f64, low: f64, high: f64, rises: bool) -> f64 {
    let (mut low, mut high) = (low, high);
    let mut rho = crate::units::math::sqrt(low * high);
    let mut last = f64::INFINITY;
    for _ in 0..MOST_STEPS {
        let one = of(rho);
        let error = one.value - target;
        if (error < 0.0) == rises {
            low = rho;
        } else {
            high = rho;
        }
        let next = rho * exp((-error / (one.by_rho * rho)).clamp(-1.0, 1.0));
        let change = (next / rho - 1.0).abs();
        if change < STEP || (change < ROUNDING && change >= last) {
            return next;
        }
        last = change;
        rho = if next > low && next < high { next } else { 0.5 * (low + high) };
        if high - low <= 4.0 * f64::EPSILON * high {
            break;
        }
    }
    rho
}

/// Where a property turns between two densities, by bisection on its slope.
fn turning_point(of: &impl Fn(f64) -> super::eos::property::WithSlopes, low: f64, high: f64, falls: bool) -> f64 {
    let (mut low, mut high) = (low, high);
    while high - low > 1e-12 * high {
        let middle = 0.5 * (low + high);
        if middle <= low || middle >= high {
            break;
        }
        if (of(middle).by_rho < 0.0) == falls {
            low = middle;
        } else {
            high = middle;
        }
    }
    0.5 * (low + high)
}

/// The point of the saturation line whose gas has a molar density; `None` below its lowest.
fn dew_line(equation: &super::eos::Equation, molar: f64) -> Option<Saturation> {
    let c = equation.constants();
    let lowest = equation.saturation_at(c.t_min_k).ok()?;
    if molar <= lowest.rho_vapour {
        return None;
    }
    let (mut low, mut high) = (c.t_min_k, c.t_c_own_k);
    // ln rho'' is close to a straight line over 1/T: false position there, and halving where it stays on one side.
    let target = ln(molar);
    let of = |t_k: f64| equation.saturation_at(t_k).ok().map(|point| ln(point.rho_vapour) - target);
    let (mut f_low, mut f_high) = (of(low)?, of(high)?);
    for step in 0..80 {
        let (x, y) = (1.0 / low, 1.0 / high);
        let by_line = 1.0 / (x - f_low * (y - x) / (f_high - f_low));
        let t_k = if step % 3 == 2 || !(by_line > low && by_line < high) { 0.5 * (low + high) } else { by_line };
        let f = of(t_k)?;
        if f < 0.0 {
            (low, f_low) = (t_k, f);
        } else {
            (high, f_high) = (t_k, f);
        }
        if f.abs() < 1e-13 || high - low < 1e-14 * high {
            return equation.saturation_at(t_k).ok();
        }
    }
    equation.saturation_at(0.5 * (low + high)).ok()
}
