//! The saturation line of a reference equation: pressure, densities and temperature where gas and liquid are in balance.

use serde::Deserialize;

use super::equation::{Equation, EquationIsotherm};
use super::record::line_of;
use crate::gas::state_error::{Limit, StateError};
use crate::units::math::{exp, ln, pow};

/// Auxiliary equations; origin in `data/EQUATIONS.md`.
const STARTS: &str = include_str!("../data/saturation_start.jsonl");

/// Relative step of the densities at which Newton's method ends; the next would be about its square.
const STEP: f64 = 1e-9;

/// Most steps of Newton's method on both densities.
const MOST_STEPS: u32 = 40;

/// Relative distance from the critical temperature of the equation within which the line is taken as the straight line in ln p over 1/T to
/// the critical point: both densities are within rounding of the pressure there.
const AT_CRITICAL: f64 = 1e-7;

/// Auxiliary equations of a gas for p_sat and both densities, as a start and a quick bound, never as a result.
///
/// Equation: value = reducing value · exp((T_r/T) Σ n θ^t) or · (1 + Σ n θ^t), θ = 1 - T/T_r.
/// Error:    no bound is taken for granted: some are off by several percent (the pressure of n-octane by 10 % at 216 K, the density of helium by 5.7 % at
///           0.98 T_c). What is concluded from them is checked for every gas in the tests.
#[derive(Clone, Debug, Deserialize)]
pub(crate) struct SaturationStart {
    #[serde(rename = "pS")]
    pressure: Auxiliary,
    #[serde(rename = "rhoV")]
    vapour: Auxiliary,
    #[serde(rename = "rhoL")]
    liquid: Auxiliary,
}

#[derive(Clone, Debug, Deserialize)]
struct Auxiliary {
    #[serde(rename = "T_r")]
    t_r: f64,
    reducing: f64,
    over_t: bool,
    log: bool,
    n: Vec<f64>,
    t: Vec<f64>,
}

impl Auxiliary {
    fn value(&self, t_k: f64) -> f64 {
        let theta = (1.0 - t_k / self.t_r).max(0.0);
        let sum: f64 = self.n.iter().zip(&self.t).map(|(n, t)| n * pow(theta, *t)).sum();
        if self.log { self.reducing * exp(if self.over_t { sum * self.t_r / t_k } else { sum }) } else { self.reducing * (1.0 + sum) }
    }
}

impl SaturationStart {
    pub(crate) fn of(name: &str) -> Option<Self> {
        serde_json::from_str(line_of(STARTS, "{\"name\":\"", name)?).ok()
    }

    pub(crate) fn p_sat(&self, t_k: f64) -> f64 {
        self.pressure.value(t_k)
    }

    pub(crate) fn rho_vapour(&self, t_k: f64) -> f64 {
        self.vapour.value(t_k)
    }

    fn rho_liquid(&self, t_k: f64) -> f64 {
        self.liquid.value(t_k)
    }
}

/// A point of the saturation line.
#[derive(Clone, Copy, Debug, PartialEq)]
pub(crate) struct Saturation {
    pub(crate) t_k: f64,
    pub(crate) p_pa: f64,
    /// Molar densities, mol/m³.
    pub(crate) rho_vapour: f64,
    pub(crate) rho_liquid: f64,
}

impl Equation {
    /// The point of the saturation line at a temperature.
    ///
    /// Equation: p(ρ') = p(ρ''), g(ρ') = g(ρ''), by Newton's method in both densities (Akasaka 2008, J. Therm. Sci. Technol. 3: 442-451, from
    ///           memory) from the auxiliary equations; where that leaves its way, by bisection between the spinodals.
    /// Valid:    from the lowest temperature of the equation to its own critical point.
    /// Error:    rounding; near the critical point that of the equation's pressure.
    /// Edges:    within [`AT_CRITICAL`] of the critical temperature the critical point itself, moved along the line.
    pub(crate) fn saturation_at(&self, t_k: f64) -> Result<Saturation, StateError> {
        let c = &self.constants;
        if !(t_k >= c.t_min_k && t_k <= c.t_c_own_k) {
            return Err(StateError::OutOfRange(Limit {
                quantity: "temperature",
                value: t_k,
                low: c.t_min_k,
                high: c.t_c_own_k,
                limit_low: c.t_min_k,
                limit_high: c.t_c_own_k,
                unit: "K",
            }));
        }
        if t_k > c.t_c_own_k * (1.0 - AT_CRITICAL) {
            let slope = self.critical_slope();
            let p_pa = c.p_c_own_pa * exp(slope * (1.0 - c.t_c_own_k / t_k));
            return Ok(Saturation { t_k, p_pa, rho_vapour: c.rho_c_own_mol_m3, rho_liquid: c.rho_c_own_mol_m3 });
        }
        let isotherm = self.isotherm(t_k);
        let by_newton = isotherm.saturation_from(self.start.rho_vapour(t_k), self.start.rho_liquid(t_k));
        by_newton.or_else(|| isotherm.saturation_between_spinodals()).ok_or(StateError::NotConverged {
            what: "saturation pressure",
            model: "the reference equation of state",
            iterations: MOST_STEPS,
            residual: f64::NAN,
        })
    }

    /// d ln p/d ln T of the line at the critical point: there it is that of the critical isochore.
    fn critical_slope(&self) -> f64 {
        let c = &self.constants;
        let state = self.properties(c.t_c_own_k, c.rho_c_own_mol_m3 * c.molar_mass_kg_mol);
        state.p.by_t * c.t_c_own_k / c.p_c_own_pa
    }

    /// dp/dT of the saturation line, Pa/K, by Clapeyron.
    pub(crate) fn saturation_slope(&self, point: &Saturation) -> f64 {
        let c = &self.constants;
        if point.rho_liquid - point.rho_vapour <= 1e-4 * point.rho_liquid {
            return self.critical_slope() * point.p_pa / point.t_k;
        }
        let (vapour, liquid) = (self.reduced(point.t_k, point.rho_vapour), self.reduced(point.t_k, point.rho_liquid));
        let (v, l) = (point.rho_vapour, point.rho_liquid);
        c.r_j_mol_k * (vapour.entropy - liquid.entropy) * v * l / (l - v)
    }

    /// The point of the saturation line at a pressure: Newton's method in ln p over 1/T, kept in a bracket.
    pub(crate) fn t_sat(&self, p_pa: f64) -> Result<Saturation, StateError> {
        let c = &self.constants;
        let lowest = self.saturation_at(c.t_min_k)?;
        if !(p_pa >= lowest.p_pa && p_pa <= c.p_c_own_pa) {
            return Err(StateError::OutOfRange(Limit {
                quantity: "pressure",
                value: p_pa,
                low: lowest.p_pa,
                high: c.p_c_own_pa,
                limit_low: lowest.p_pa,
                limit_high: c.p_c_own_pa,
                unit: "Pa",
            }));
        }
        let (mut low, mut high) = (c.t_min_k, c.t_c_own_k);
        let target = ln(p_pa);
        let mut t_k = self.start_temperature(p_pa).clamp(c.t_min_k, c.t_c_own_k);
        let mut last = f64::INFINITY;
        for step in 1..=60 {
            let point = self.saturation_at(t_k)?;
            let error = ln(point.p_pa) - target;
            if error < 0.0 {
                low = t_k;
            } else {
                high = t_k;
            }
            let slope = self.saturation_slope(&point) * t_k / point.p_pa;
            // ln p is close to a straight line over 1/T.
            let next = t_k / (1.0 + error / slope);
            let change = (next - t_k).abs() / t_k;
            if change < 1e-8 || (change < 1e-6 && change >= last) {
                let t_k = next.clamp(c.t_min_k, c.t_c_own_k);
                return self.saturation_at(t_k).map(|point| Saturation { p_pa, ..point });
            }
            last = change;
            t_k = if next > low && next < high { next } else { 0.5 * (low + high) };
            if high - low < 1e-13 * high || step == 60 {
                return self.saturation_at(t_k).map(|point| Saturation { p_pa, ..point });
            }
        }
        Err(StateError::NotConverged {
            what: "saturation temperature",
            model: "the reference equation of state",
            iterations: 60,
            residual: last,
        })
    }

    /// Temperature at which the auxiliary equation has a pressure.
    fn start_temperature(&self, p_pa: f64) -> f64 {
        let c = &self.constants;
        // In x = 1/T the line is nearly straight: false position with the Illinois rule ends in a few steps.
        let target = ln(p_pa);
        let f = |x: f64| ln(self.start.p_sat(1.0 / x)) - target;
        let (mut a, mut b) = (1.0 / c.t_c_k, 1.0 / c.t_min_k);
        let (mut fa, mut fb) = (f(a), f(b));
        if fa.is_nan() || fb.is_nan() || fa <= 0.0 || fb >= 0.0 {
            return if fb >= 0.0 { c.t_min_k } else { c.t_c_own_k * (1.0 - 1e-6) };
        }
        for _ in 0..12 {
            let x = b - fb * (b - a) / (fb - fa);
            let fx = f(x);
            if fx.abs() < 1e-6 || fx.is_nan() {
                return 1.0 / x;
            }
            if (fx > 0.0) == (fb > 0.0) {
                fa *= 0.5;
            } else {
                (a, fa) = (b, fb);
            }
            (b, fb) = (x, fx);
        }
        1.0 / b
    }
}

impl EquationIsotherm<'_> {
    /// p/(R T), g/(R T) but for a function of T, and the derivative of the first by density.
    fn balance(&self, rho: f64) -> (f64, f64, f64) {
        let [a0, a1, a2] = self.terms(rho);
        (rho * (1.0 + a1), ln(rho) + a0 + a1, 1.0 + a1 + a2)
    }

    fn point(&self, vapour: f64, liquid: f64) -> Saturation {
        // From the vapour: the pressure of the liquid is a small difference of large terms.
        Saturation { t_k: self.t_k, p_pa: self.rt * self.balance(vapour).0, rho_vapour: vapour, rho_liquid: liquid }
    }

    fn saturation_from(&self, vapour: f64, liquid: f64) -> Option<Saturation> {
        let (mut v, mut l) = (vapour, liquid);
        let mut last = f64::INFINITY;
        for _ in 0..MOST_STEPS {
            let (pv, gv, qv) = self.balance(v);
            let (pl, gl, ql) = self.balance(l);
            // Between the spinodals there is no balance to converge to.
            if !(qv > 0.0 && ql > 0.0) {
                return None;
            }
            let (dp, dg) = (pv - pl, gv - gl);
            let (hv, hl) = (qv / v, ql / l);
            let determinant = qv * hl - ql * hv;
            let (to_l, to_v) = ((dg * qv - dp * hv) / determinant, (dg * ql - dp * hl) / determinant);
            let change = (to_v / v).abs().max((to_l / l).abs());
            if !change.is_finite() {
                return None;
            }
            v += to_v.clamp(-0.3 * v, 0.3 * v);
            l += to_l.clamp(-0.1 * l, 0.1 * l);
            if l - v < 1e-6 * l {
                return None;
            }
            if change < STEP || (change < 1e-6 && change >= last) {
                return Some(self.point(v, l));
            }
            last = change;
        }
        None
    }

    /// Bisection in ln p between the pressures of the two spinodals, on the difference of the Gibbs energies.
    fn saturation_between_spinodals(&self) -> Option<Saturation> {
        let c = &self.equation.constants;
        let middle = c.rho_c_own_mol_m3;
        if self.balance(middle).2 >= 0.0 {
            return None;
        }
        // Each spinodal by bisection between a stable density and the critical one.
        let spinodal = |stable: f64| {
            let (mut a, mut b) = (stable, middle);
            for _ in 0..200 {
                let x = 0.5 * (a + b);
                if self.balance(x).2 > 0.0 {
                    a = x;
                } else {
                    b = x;
                }
                if (b - a).abs() < 1e-13 * middle {
                    break;
                }
            }
            a
        };
        let mut dense = 1.001 * middle;
        while self.balance(dense).2 <= 0.0 {
            dense += 0.02 * (dense - middle).max(0.05 * middle);
            if dense > 5.0 * middle {
                return None;
            }
        }
        let (vapour_end, liquid_end) = (spinodal(1e-6 * middle), spinodal(dense));
        let highest = self.balance(vapour_end).0;
        let lowest = self.balance(liquid_end).0.max(1e-12 * highest);
        let (mut a, mut b) = (ln(lowest), ln(highest));
        let mut found = None;
        for _ in 0..100 {
            let p = exp(0.5 * (a + b));
            let v = self.bisected(p, 0.0, vapour_end)?;
            let l = self.bisected(p, liquid_end, 6.0 * middle)?;
            found = Some((v, l));
            // At low pressure the liquid has the larger Gibbs energy: there only the gas is stable.
            if self.balance(v).1 < self.balance(l).1 {
                a = ln(p);
            } else {
                b = ln(p);
            }
            if b - a < 1e-13 {
                break;
            }
        }
        found.map(|(v, l)| self.point(v, l))
    }

    /// Density of a stable branch whose p/(R T) is given.
    fn bisected(&self, p: f64, low: f64, high: f64) -> Option<f64> {
        let (mut a, mut b) = (low, high);
        for _ in 0..200 {
            let x = 0.5 * (a + b);
            if self.balance(x).0 < p {
                a = x;
            } else {
                b = x;
            }
            if b - a <= 4.0 * f64::EPSILON * b {
                break;
            }
        }
        let x = 0.5 * (a + b);
        x.is_finite().then_some(x)
    }
}

/// A point of the saturation line of a gas.
#[derive(Clone, Copy, Debug, PartialEq)]
#[non_exhaustive]
pub struct SaturationPoint {
    /// Temperature, K.
    pub t_k: f64,
    /// Pressure, Pa.
    pub p_pa: f64,
    /// Slope of the line, Pa/K.
    pub dp_dt_pa_k: f64,
    /// Density of the gas on the line, kg/m³.
    pub rho_vapour_kg_m3: f64,
    /// Density of the liquid on the line, kg/m³.
    pub rho_liquid_kg_m3: f64,
}

impl Equation {
    /// The saturation line at a temperature, K.
    ///
    /// # Errors
    ///
    /// [`StateError::OutOfRange`] below the lowest temperature of the equation and above its critical one.
    pub fn saturation(&self, t_k: f64) -> Result<SaturationPoint, StateError> {
        self.saturation_at(t_k).map(|point| self.point(point))
    }

    /// The saturation line at a pressure, Pa.
    ///
    /// # Errors
    ///
    /// [`StateError::OutOfRange`] below the lowest pressure of the line and above its critical one.
    pub fn saturation_temperature(&self, p_pa: f64) -> Result<SaturationPoint, StateError> {
        self.t_sat(p_pa).map(|point| self.point(point))
    }

    fn point(&self, point: Saturation) -> SaturationPoint {
        let m = self.constants.molar_mass_kg_mol;
        SaturationPoint {
            t_k: point.t_k,
            p_pa: point.p_pa,
            dp_dt_pa_k: self.saturation_slope(&point),
            rho_vapour_kg_m3: point.rho_vapour * m,
            rho_liquid_kg_m3: point.rho_liquid * m,
        }
    }
}

#[cfg(test)]
mod tests {
    use super::*;

    /// What the searches conclude from the auxiliary equations up to 0.98 of the critical temperature: a pressure that counts as surely that of
    /// a gas is below saturation, its density is below the end of the bracket, the end is before the spinodal, and a density that counts as
    /// surely that of a gas is.
    #[test]
    fn what_the_auxiliary_equations_decide_is_right() {
        let mut wrong = Vec::new();
        for name in Equation::names().into_iter().filter(|name| *name != super::super::equation::AIR) {
            let equation = Equation::of_name(name).unwrap();
            let c = &equation.constants;
            for i in 0..=100 {
                let t_k = c.t_min_k + (0.98 * c.t_c_own_k - c.t_min_k) * f64::from(i) / 100.0;
                let line = equation.saturation_at(t_k).unwrap();
                let (p, rho) = (equation.start.p_sat(t_k), equation.start.rho_vapour(t_k));
                let isotherm = equation.isotherm(t_k);
                let (at_end, slope) = isotherm.pressure(1.05 * rho);
                if !(0.95 * p < line.p_pa && 0.9 * rho < line.rho_vapour && at_end > 0.95 * p && slope > 0.0) {
                    wrong.push(format!("{name} {t_k} K: {} {} {} {slope}", p / line.p_pa, rho / line.rho_vapour, at_end / p));
                }
            }
        }
        assert!(wrong.is_empty(), "{}", wrong.join("\n"));
    }
}
