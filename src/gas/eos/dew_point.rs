//! Whether a mixture would condense, and where: by the cubic equation.

use super::peng_robinson::{PengRobinson, Root};
use crate::units::math::{exp, ln};

/// Most steps of the search for a condensate.
const MOST_STEPS: u32 = 200;

/// Step of ln X at which the search ends.
const STEP: f64 = 1e-10;

/// A trial liquid that comes this near to the gas itself is no second phase.
const SAME: f64 = 1e-4;

/// What a search for a condensate finds.
#[derive(Clone, Copy, Debug, PartialEq)]
pub(crate) struct Condensate {
    /// ln Σ X of the tangent plane: above 0 the gas condenses.
    pub(crate) excess: f64,
    /// The component that most of the condensate is.
    pub(crate) mostly: usize,
}

impl PengRobinson {
    /// Searches for a liquid that the gas would condense to.
    ///
    /// Equation: ln X_i + ln φ_i(X) = ln y_i + ln φ_i(y); the gas is unstable where Σ X > 1 (Michelsen 1982, Fluid Phase Equilib. 9: 1-19,
    ///           from memory), by direct substitution from Wilson's estimate and from the least volatile component alone.
    /// Error:    that of the cubic equation with all interaction parameters zero: one to three kelvins in a dew point of hydrocarbons.
    /// Edges:    `None` where every trial runs into the gas itself: no liquid at this temperature and pressure.
    pub(crate) fn condensate(&self, t_k: f64, p_pa: f64) -> Option<Condensate> {
        let y = self.fractions();
        let gas = self.fugacities(&y, t_k, p_pa, Root::Gas);
        let target: Vec<f64> = y.iter().zip(&gas).map(|(y, phi)| ln(y.max(f64::MIN_POSITIVE)) + phi).collect();
        let wilson: Vec<f64> = (0..self.len()).map(|i| y[i] / self.volatility(i, t_k, p_pa)).collect();
        let heavy = (0..self.len()).filter(|i| y[*i] > 0.0).min_by(|a, b| {
            let of = |i: usize| self.volatility(i, t_k, p_pa);
            of(*a).total_cmp(&of(*b))
        })?;
        let alone: Vec<f64> = (0..self.len()).map(|i| if i == heavy { 1.0 } else { 1e-8 * y[i] }).collect();
        let mut best: Option<Condensate> = None;
        for start in [wilson, alone] {
            if let Some(found) = self.trial(&y, &target, start, t_k, p_pa)
                && best.is_none_or(|known| found.excess > known.excess)
            {
                best = Some(found);
            }
        }
        best
    }

    fn trial(&self, y: &[f64], target: &[f64], mut amounts: Vec<f64>, t_k: f64, p_pa: f64) -> Option<Condensate> {
        for _ in 0..MOST_STEPS {
            let total: f64 = amounts.iter().sum();
            if !(total > 0.0 && total.is_finite()) {
                return None;
            }
            let x: Vec<f64> = amounts.iter().map(|amount| amount / total).collect();
            let phi = self.fugacities(&x, t_k, p_pa, Root::Liquid);
            let mut change: f64 = 0.0;
            for i in 0..amounts.len() {
                if y[i] > 0.0 {
                    let next = exp((target[i] - phi[i]).clamp(-500.0, 500.0));
                    change = change.max((next / amounts[i].max(f64::MIN_POSITIVE) - 1.0).abs());
                    amounts[i] = next;
                }
            }
            if !change.is_finite() {
                return None;
            }
            if change < STEP {
                break;
            }
        }
        let total: f64 = amounts.iter().sum();
        let x: Vec<f64> = amounts.iter().map(|amount| amount / total).collect();
        let distance: f64 = x.iter().zip(y).map(|(x, y)| (x - y).abs()).sum();
        let pure = y.len() == 1;
        if !total.is_finite() || (!pure && distance < SAME) {
            return None;
        }
        let mostly = (0..x.len()).max_by(|a, b| x[*a].total_cmp(&x[*b]))?;
        Some(Condensate { excess: ln(total), mostly })
    }

    /// Dew point at a pressure, K, at or above `low_k`, where the gas condenses, and below `high_k`, where it does not.
    pub(crate) fn dew_point(&self, p_pa: f64, low_k: f64, high_k: f64) -> Option<f64> {
        let condenses = |t_k: f64| self.condensate(t_k, p_pa).is_some_and(|found| found.excess > 0.0);
        if !condenses(low_k) || condenses(high_k) {
            return None;
        }
        let (mut low, mut high) = (low_k, high_k);
        // The excess is smooth only where there is a liquid: bisection needs no more than its sign.
        while high - low > 1e-6 * high {
            let middle = 0.5 * (low + high);
            if condenses(middle) {
                low = middle;
            } else {
                high = middle;
            }
        }
        Some(0.5 * (low + high))
    }
}
