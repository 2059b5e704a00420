//! Several unknowns at once: Newton's method with exact derivatives, damped, inside bounds, from several starts.
//!
//! Unknowns are scaled by their size and relations by the largest scaled entry of their row, so that a residual is the part
//! of the unknowns by which it is off (Dennis and Schnabel, Numerical Methods for Unconstrained Optimization and Nonlinear
//! Equations, 1983, chapters 6 and 7).

use super::linear::{Entry, Factors, Symbolic};

/// Steps of one run at the most.
const MOST_STEPS: u32 = 300;

/// Halvings of a step at the most.
const MOST_HALVINGS: u32 = 40;

/// A residual this small against the size of its terms satisfies its relation.
pub(super) const SATISFIED: f64 = 1e-9;

/// Damping of the normal equations, relative to their largest entry.
const DAMPING: f64 = 1e-8;

/// Blocks of more unknowns than this have no damped step where their derivatives are singular.
const LARGEST_NORMAL: usize = 500;

/// Values of unknowns that differ by less than this, relative, are one solution.
const SAME_SOLUTION: f64 = 1e-6;

/// What the solver needs of a block.
pub(super) trait System {
    /// How many unknowns, and relations.
    fn n(&self) -> usize;
    /// Residuals at `x`, and the size of the terms of each.
    fn residuals(&mut self, x: &[f64], residuals: &mut [f64], magnitudes: &mut [f64]);
    /// Derivatives at the `x` of the last call of `residuals`, where they are not zero.
    fn jacobian(&mut self, entries: &mut Vec<Entry>);
}

/// One unknown of a system.
#[derive(Clone, Copy, Debug)]
pub(super) struct Unknown {
    pub(super) low: f64,
    pub(super) high: f64,
    /// Where to start; `None` where nothing is known.
    pub(super) near: Option<f64>,
    pub(super) size: f64,
}

/// What became of one run.
#[derive(Clone, Debug)]
pub(super) struct Run {
    pub(super) x: Vec<f64>,
    /// Largest residual against the size of its terms.
    pub(super) residual: f64,
    /// Which relation has it.
    pub(super) worst: usize,
    pub(super) evaluations: u32,
}

impl Run {
    pub(super) fn has_converged(&self) -> bool {
        self.residual <= SATISFIED
    }
}

/// One run of the damped Newton method from `start`.
pub(super) fn run(system: &mut impl System, unknowns: &[Unknown], start: &[f64]) -> Run {
    let n = system.n();
    let (mut x, mut f, mut sizes) = (start.to_vec(), vec![0.0; n], vec![0.0; n]);
    let mut entries: Vec<Entry> = Vec::new();
    let mut symbolic = Symbolic::default();
    let mut evaluations = 1;
    system.residuals(&x, &mut f, &mut sizes);
    let mut trial = vec![0.0; n];
    let mut trial_f = vec![0.0; n];
    let mut trial_sizes = vec![0.0; n];
    for _ in 0..MOST_STEPS {
        if f.iter().any(|value| !value.is_finite()) || f.iter().all(|value| *value == 0.0) {
            break;
        }
        entries.clear();
        system.jacobian(&mut entries);
        let scales: Vec<f64> = x.iter().zip(unknowns).map(|(x, unknown)| x.abs().max(1e-3 * unknown.size)).collect();
        let mut weights = vec![0.0f64; n];
        for entry in &entries {
            let weight = &mut weights[entry.row as usize];
            *weight = weight.max((entry.value * scales[entry.column as usize]).abs());
        }
        weights.iter_mut().for_each(|weight| *weight = if weight.is_finite() && *weight > 0.0 { 1.0 / *weight } else { 1.0 });
        let step = direction(&entries, &f, &weights, &scales, &mut symbolic);
        let norm = |f: &[f64]| f.iter().zip(&weights).map(|(f, weight)| (f * weight) * (f * weight)).sum::<f64>();
        let before = norm(&f);
        let mut factor = 1.0;
        let mut moved = 0.0f64;
        let mut improved = false;
        for _ in 0..MOST_HALVINGS {
            moved = 0.0;
            for at in 0..n {
                let to = (x[at] + factor * step[at]).clamp(unknowns[at].low, unknowns[at].high);
                trial[at] = if to.is_finite() { to } else { x[at] };
                moved = moved.max(((trial[at] - x[at]) / scales[at]).abs());
            }
            system.residuals(&trial, &mut trial_f, &mut trial_sizes);
            evaluations += 1;
            let after = norm(&trial_f);
            if after.is_finite() && after < before * (1.0 - 1e-4 * factor) {
                improved = true;
                break;
            }
            factor *= 0.5;
            if moved < 1e-16 {
                break;
            }
        }
        if !improved {
            // Nothing is gained along the step: where the residuals are only rounding, this is the solution.
            system.residuals(&x, &mut f, &mut sizes);
            break;
        }
        x.copy_from_slice(&trial);
        f.copy_from_slice(&trial_f);
        sizes.copy_from_slice(&trial_sizes);
        if moved < 1e-15 {
            break;
        }
    }
    let mut worst = (0, 0.0f64);
    for at in 0..n {
        let scaled = if f[at] == 0.0 { 0.0 } else { f[at].abs() / sizes[at] };
        let scaled = if scaled.is_nan() { f64::INFINITY } else { scaled };
        if scaled > worst.1 {
            worst = (at, scaled);
        }
    }
    Run { x, residual: worst.1, worst: worst.0, evaluations }
}

/// The Newton step, or the step of Levenberg and Marquardt where the derivatives are singular.
fn direction(entries: &[Entry], f: &[f64], weights: &[f64], scales: &[f64], symbolic: &mut Symbolic) -> Vec<f64> {
    let n = f.len();
    let against: Vec<f64> = f.iter().map(|f| -f).collect();
    if let Some(factors) = Factors::of(entries, scales, symbolic) {
        let step = factors.solve(&against);
        if step.iter().all(|part| part.is_finite()) {
            return step;
        }
    }
    if n > LARGEST_NORMAL {
        return vec![0.0; n];
    }
    // The normal equations of the scaled system, damped.
    let scaled = |entry: &Entry| entry.value * scales[entry.column as usize] * weights[entry.row as usize];
    let mut right = vec![0.0; n];
    let mut normal: Vec<Entry> = Vec::new();
    let mut largest = f64::MIN_POSITIVE;
    for a in entries {
        right[a.column as usize] += scaled(a) * against[a.row as usize] * weights[a.row as usize];
        for b in entries.iter().filter(|b| b.row == a.row) {
            let value = scaled(a) * scaled(b);
            largest = largest.max(value.abs());
            normal.push(Entry { row: a.column, column: b.column, value });
        }
    }
    normal.extend((0..n as u32).map(|at| Entry { row: at, column: at, value: DAMPING * largest }));
    let step = Factors::of(&normal, &vec![1.0; n], &mut Symbolic::default()).map_or_else(|| vec![0.0; n], |factors| factors.solve(&right));
    step.iter().zip(scales).map(|(step, scale)| if step.is_finite() { step * scale } else { 0.0 }).collect()
}

/// Where to start: the first from what is known, the others spread over the bounds.
///
/// The spread is the additive recurrence of Roberts (2018) with the generalised golden ratio; it is the same on every run.
pub(super) fn start(unknowns: &[Unknown], number: u32) -> Vec<f64> {
    let mut golden = 2.0f64;
    for _ in 0..40 {
        golden = crate::units::math::pow(1.0 + golden, 1.0 / (unknowns.len() as f64 + 1.0));
    }
    unknowns
        .iter()
        .enumerate()
        .map(|(at, unknown)| {
            let step = 1.0 / crate::units::math::pow(golden, at as f64 + 1.0);
            let place = (0.5 + step * f64::from(number)).fract();
            let wide = unknown.high - unknown.low > 1e6 * unknown.size;
            if number == 0 {
                return unknown.near.unwrap_or_else(|| {
                    if !wide { 0.5 * (unknown.low + unknown.high) } else { unknown.size.clamp(unknown.low, unknown.high) }
                });
            }
            if !wide {
                return unknown.low + place * (unknown.high - unknown.low);
            }
            // Three decades to either side of the usual size, or of what it is near to.
            let centre = unknown.near.map_or(unknown.size, |near| if near == 0.0 { unknown.size } else { near });
            let size = centre * crate::units::math::pow(10.0, 6.0 * place - 3.0);
            let signed = if unknown.low < 0.0 && number % 2 == 1 { -size } else { size };
            signed.clamp(unknown.low, unknown.high)
        })
        .collect()
}

/// Whether two solutions are the same.
pub(super) fn same(a: &[f64], b: &[f64], unknowns: &[Unknown]) -> bool {
    a.iter().zip(b).zip(unknowns).all(|((a, b), unknown)| (a - b).abs() <= SAME_SOLUTION * a.abs().max(b.abs()).max(1e-3 * unknown.size))
}
