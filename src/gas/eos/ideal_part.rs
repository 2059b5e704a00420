//! The ideal part of a reference equation: what the gas would do if its molecules did not meet.

use super::record::IdealTerm;
use crate::gas::polynomial::REFERENCE_TEMPERATURE_K;
use crate::units::math::{exp, exp_m1, ln, powi};

/// n ln(c + d exp(s τ)).
#[derive(Clone, Copy, Debug)]
struct Oscillator {
    n: f64,
    s: f64,
    c: f64,
    d: f64,
}

/// The ideal part α° of the reduced Helmholtz energy a/(R T), as a function of τ = T_r/T, without its term ln δ.
///
/// Equation: α° = k ln τ + Σ n τ^t + Σ n ln(c + d exp(s τ)).
/// Symbols:  T_r reducing temperature, K. Every published form of cp/R becomes one of these three; terms constant or linear in τ, which only
///           shift the zero of s and of h, are left out.
/// Valid:    the range of the equation it belongs to.
/// Source:   the publication of the equation; forms as in Span 2000, Multiparameter Equations of State (from memory).
/// Error:    arithmetic checked against `feos` and the tables of states in the tests.
/// Edges:    large s τ is handled by taking exp(-s τ).
#[derive(Clone, Debug)]
pub(crate) struct IdealPart {
    t_reducing_k: f64,
    log: f64,
    powers: Vec<(f64, f64)>,
    oscillators: Vec<Oscillator>,
    /// α° - τ α°_τ at the reference temperature.
    entropy_shift: f64,
    /// τ α°_τ times T at the reference temperature, K.
    energy_shift_k: f64,
}

/// α° and its derivatives τ d/dτ, taken once, twice and three times.
#[derive(Clone, Copy, Debug, Default)]
pub(crate) struct IdealValues {
    pub(crate) e0: f64,
    pub(crate) e1: f64,
    pub(crate) e2: f64,
    pub(crate) e3: f64,
}

impl IdealPart {
    pub(crate) fn new(terms: &[IdealTerm], t_reducing_k: f64) -> Self {
        let mut part =
            Self { t_reducing_k, log: 0.0, powers: Vec::new(), oscillators: Vec::new(), entropy_shift: 0.0, energy_shift_k: 0.0 };
        for term in terms {
            part.add(term);
        }
        let at_reference = part.values(REFERENCE_TEMPERATURE_K);
        part.entropy_shift = at_reference.e1 - at_reference.e0;
        part.energy_shift_k = at_reference.e1 * REFERENCE_TEMPERATURE_K;
        part
    }

    fn add(&mut self, term: &IdealTerm) {
        match term {
            IdealTerm::Lead {} | IdealTerm::Offset {} => {}
            IdealTerm::LogTau { a } => self.log += a,
            IdealTerm::Power { n, t } => self.powers.extend(n.iter().copied().zip(t.iter().copied())),
            IdealTerm::PlanckEinstein { n, t } => {
                self.oscillators.extend(n.iter().zip(t).map(|(n, t)| Oscillator { n: *n, s: -t, c: 1.0, d: -1.0 }));
            }
            IdealTerm::PlanckEinsteinFunctionT { n, v, t_crit } => {
                self.oscillators.extend(n.iter().zip(v).map(|(n, v)| Oscillator { n: *n, s: -v / t_crit, c: 1.0, d: -1.0 }));
            }
            IdealTerm::PlanckEinsteinGeneralized { n, t, c, d } => {
                self.oscillators.extend((0..n.len()).map(|i| Oscillator { n: n[i], s: t[i], c: c[i], d: d[i] }));
            }
            IdealTerm::HeatCapacityConstant { cp_over_r } => self.log += cp_over_r,
            IdealTerm::HeatCapacityPowers { c, t } => {
                for (c, t) in c.iter().zip(t) {
                    if *t == 0.0 {
                        self.log += c;
                    } else {
                        // cp/R = c T^t is -τ² α°_ττ of this power of τ.
                        let scale = crate::units::math::pow(self.t_reducing_k, *t);
                        self.powers.push((-c * scale / (t * (t + 1.0)), -t));
                    }
                }
            }
            IdealTerm::HeatCapacityAlyLee { c } => {
                if let [constant, sinh_n, sinh_t, cosh_n, cosh_t] = c[..] {
                    self.log += constant;
                    let s = |t: f64| -2.0 * t / self.t_reducing_k;
                    if sinh_n != 0.0 {
                        self.oscillators.push(Oscillator { n: sinh_n, s: s(sinh_t), c: 1.0, d: -1.0 });
                    }
                    if cosh_n != 0.0 {
                        self.oscillators.push(Oscillator { n: -cosh_n, s: s(cosh_t), c: 1.0, d: 1.0 });
                    }
                }
            }
        }
    }

    /// α° and its derivatives at a temperature.
    pub(crate) fn values(&self, t_k: f64) -> IdealValues {
        let tau = self.t_reducing_k / t_k;
        let ln_tau = ln(tau);
        let mut sum = IdealValues { e0: self.log * ln_tau, e1: self.log, e2: 0.0, e3: 0.0 };
        for (n, t) in &self.powers {
            let value = n * exp(t * ln_tau);
            sum.e0 += value;
            sum.e1 += t * value;
            sum.e2 += t * t * value;
            sum.e3 += t * t * t * value;
        }
        for one in &self.oscillators {
            let x = one.s * tau;
            // y is the share d e^x / (c + d e^x); its derivative by x is y (1 - y).
            let (logarithm, y) = if x <= 0.0 {
                let e = exp(x);
                let bottom = if one.c == 1.0 && one.d == -1.0 { -exp_m1(x) } else { one.c + one.d * e };
                (ln(bottom), one.d * e / bottom)
            } else {
                let e = exp(-x);
                let bottom = one.c * e + one.d;
                (x + ln(bottom), one.d / bottom)
            };
            let y1 = y * (1.0 - y);
            let y2 = y1 * (1.0 - 2.0 * y);
            sum.e0 += one.n * logarithm;
            sum.e1 += one.n * x * y;
            sum.e2 += one.n * (x * y + x * x * y1);
            sum.e3 += one.n * (x * y + 3.0 * x * x * y1 + powi(x, 3) * y2);
        }
        sum
    }

    /// u/(R T) of the ideal gas from `values` at `t_k`; h - u is 1. Zero of h at the reference temperature.
    pub(crate) fn energy(&self, values: &IdealValues, t_k: f64) -> f64 {
        values.e1 - (self.energy_shift_k + REFERENCE_TEMPERATURE_K) / t_k
    }

    /// s/R of the ideal gas at the molar density of its reference state. Zero at the reference temperature.
    pub(crate) fn entropy(&self, values: &IdealValues) -> f64 {
        values.e1 - values.e0 - self.entropy_shift
    }
}
