//! The terms with which two equations (carbon dioxide, water) follow the singular behaviour near the critical point.

use super::residual::ResidualValues;
use crate::units::math::{exp, pow};

/// Where exp(-x) is so small that the term, with three derivatives taken, is below the last digit of its sum.
const NEGLIGIBLE: f64 = 100.0;

/// Half width around δ = 1 in which δ is moved: the second derivative does not exist at the point itself.
const STEP_FROM_CRITICAL: f64 = 1e-9;

/// A term n Δ^b δ ψ.
///
/// Equation: Δ = θ² + B ((δ-1)²)^a, θ = (1-τ) + A ((δ-1)²)^(1/(2β)), ψ = exp(-C (δ-1)² - D (τ-1)²).
/// Valid:    everywhere but δ = 1, see the module of the residual part.
/// Source:   Span, Wagner 1996, J. Phys. Chem. Ref. Data 25: 1509-1596; Wagner, Pruss 2002, J. Phys. Chem. Ref. Data 31: 387-535.
/// Error:    checked against `feos` in the tests.
#[derive(Clone, Copy, Debug)]
pub(super) struct NonAnalytic {
    n: f64,
    a: f64,
    b: f64,
    half_inverse_beta: f64,
    big_a: f64,
    big_b: f64,
    big_c: f64,
    big_d: f64,
}

impl NonAnalytic {
    /// From n, a, b, β, A, B, C, D.
    pub(super) fn new([n, a, b, beta, big_a, big_b, big_c, big_d]: [f64; 8]) -> Self {
        Self { n, a, b, half_inverse_beta: 0.5 / beta, big_a, big_b, big_c, big_d }
    }

    fn counts(&self, tau: f64, delta: f64) -> bool {
        self.big_c * (delta - 1.0) * (delta - 1.0) + self.big_d * (tau - 1.0) * (tau - 1.0) < NEGLIGIBLE
    }

    /// Adds the term and D and D² of it.
    pub(super) fn add_terms(&self, tau: f64, delta: f64, sums: &mut [f64; 3]) {
        if !self.counts(tau, delta) {
            return;
        }
        let delta = away_from_critical(delta);
        let x = delta - 1.0;
        let square = x * x;
        // Powers of (δ-1)² and their first two derivatives by δ.
        let p = self.big_a * pow(square, self.half_inverse_beta);
        let q = self.big_b * pow(square, self.a);
        let (k, l) = (2.0 * self.half_inverse_beta, 2.0 * self.a);
        let (p1, p2) = (k * p / x, k * (k - 1.0) * p / square);
        let (q1, q2) = (l * q / x, l * (l - 1.0) * q / square);
        let theta = 1.0 - tau + p;
        let big = theta * theta + q;
        let big1 = 2.0 * theta * p1 + q1;
        let big2 = 2.0 * (p1 * p1 + theta * p2) + q2;
        let y = tau - 1.0;
        let value = self.n * pow(big, self.b) * delta * exp(-self.big_c * square - self.big_d * y * y);
        // Logarithmic derivative by δ and its derivative.
        let g = self.b * big1 / big + 1.0 / delta - 2.0 * self.big_c * x;
        let g1 = self.b * (big2 / big - big1 * big1 / (big * big)) - 1.0 / (delta * delta) - 2.0 * self.big_c;
        let a = delta * g;
        sums[0] += value;
        sums[1] += value * a;
        sums[2] += value * (a * a + delta * (g + delta * g1));
    }

    /// Adds the term with all derivatives up to the third.
    pub(super) fn add(&self, tau: f64, delta: f64, out: &mut ResidualValues) {
        if !self.counts(tau, delta) {
            return;
        }
        let delta = away_from_critical(delta);
        let d = Series::delta(delta);
        let x = d.plus(-1.0);
        let y = Series::tau(tau).plus(-1.0);
        let square = x.times(&x);
        let theta = square.power(self.half_inverse_beta).scaled(self.big_a).minus(&y);
        let big = theta.times(&theta).sum(&square.power(self.a).scaled(self.big_b));
        let psi = square.scaled(-self.big_c).sum(&y.times(&y).scaled(-self.big_d)).exponential();
        let term = big.power(self.b).times(&d).times(&psi).scaled(self.n);
        term.add_to(tau, delta, out);
    }

    /// Adds the coefficients of δ and δ² at δ = 0, with E taken 0 and 1 times.
    pub(super) fn add_virial(&self, tau: f64, out: &mut [[f64; 2]; 2]) {
        if !self.counts(tau, 0.0) {
            return;
        }
        // The factor of δ is smooth at δ = 0: its value there and its slope are the two coefficients.
        let d = Series::delta(0.0);
        let x = d.plus(-1.0);
        let y = Series::tau(tau).plus(-1.0);
        let square = x.times(&x);
        let theta = square.power(self.half_inverse_beta).scaled(self.big_a).minus(&y);
        let big = theta.times(&theta).sum(&square.power(self.a).scaled(self.big_b));
        let psi = square.scaled(-self.big_c).sum(&y.times(&y).scaled(-self.big_d)).exponential();
        let factor = big.power(self.b).times(&psi).scaled(self.n).0;
        out[0][0] += factor[at(0, 0)];
        out[0][1] += factor[at(0, 1)] * tau;
        out[1][0] += factor[at(1, 0)];
        out[1][1] += factor[at(1, 1)] * tau;
    }
}

fn away_from_critical(delta: f64) -> f64 {
    if (delta - 1.0).abs() < STEP_FROM_CRITICAL { 1.0 + STEP_FROM_CRITICAL } else { delta }
}

/// Degree to which the series goes.
const DEGREE: usize = 3;

/// The place of δ^i τ^j, i + j at most [`DEGREE`].
const fn at(i: usize, j: usize) -> usize {
    let n = i + j;
    n * (n + 1) / 2 + j
}

/// A Taylor series in δ and τ about a point, cut after the third degree: coefficients, not derivatives.
#[derive(Clone, Copy, Debug)]
struct Series([f64; 10]);

impl Series {
    fn delta(value: f64) -> Self {
        let mut out = [0.0; 10];
        out[at(0, 0)] = value;
        out[at(1, 0)] = 1.0;
        Self(out)
    }

    fn tau(value: f64) -> Self {
        let mut out = [0.0; 10];
        out[at(0, 0)] = value;
        out[at(0, 1)] = 1.0;
        Self(out)
    }

    fn plus(mut self, constant: f64) -> Self {
        self.0[0] += constant;
        self
    }

    fn scaled(mut self, factor: f64) -> Self {
        for value in &mut self.0 {
            *value *= factor;
        }
        self
    }

    fn sum(mut self, other: &Self) -> Self {
        for (value, more) in self.0.iter_mut().zip(&other.0) {
            *value += more;
        }
        self
    }

    fn minus(self, other: &Self) -> Self {
        self.sum(&other.scaled(-1.0))
    }

    fn times(&self, other: &Self) -> Self {
        let mut out = [0.0; 10];
        for i in 0..=DEGREE {
            for j in 0..=DEGREE - i {
                for k in 0..=DEGREE - i - j {
                    for l in 0..=DEGREE - i - j - k {
                        out[at(i + k, j + l)] += self.0[at(i, j)] * other.0[at(k, l)];
                    }
                }
            }
        }
        Self(out)
    }

    /// f of the series, from f and its first three derivatives at the constant, each over its factorial.
    fn composed(&self, [f0, f1, f2, f3]: [f64; 4]) -> Self {
        let mut rest = *self;
        rest.0[0] = 0.0;
        rest.times(&rest.times(&rest.scaled(f3).plus(f2)).plus(f1)).plus(f0)
    }

    fn power(&self, exponent: f64) -> Self {
        let x = self.0[0];
        let f0 = pow(x, exponent);
        let f1 = exponent * f0 / x;
        let f2 = 0.5 * (exponent - 1.0) * f1 / x;
        let f3 = (exponent - 2.0) * f2 / (3.0 * x);
        self.composed([f0, f1, f2, f3])
    }

    fn exponential(&self) -> Self {
        let value = exp(self.0[0]);
        self.composed([value, value, 0.5 * value, value / 6.0])
    }

    /// Adds the series in the operators D = δ ∂/∂δ and E = τ ∂/∂τ.
    fn add_to(&self, tau: f64, delta: f64, out: &mut ResidualValues) {
        // δ^i τ^j ∂^(i+j)/∂δ^i ∂τ^j.
        let factorial = [1.0, 1.0, 2.0, 6.0];
        let (d, t) = ([1.0, delta, delta * delta, delta * delta * delta], [1.0, tau, tau * tau, tau * tau * tau]);
        let p = |i: usize, j: usize| self.0[at(i, j)] * factorial[i] * factorial[j] * d[i] * t[j];
        out.a00 += p(0, 0);
        out.a10 += p(1, 0);
        out.a01 += p(0, 1);
        out.a20 += p(2, 0) + p(1, 0);
        out.a11 += p(1, 1);
        out.a02 += p(0, 2) + p(0, 1);
        out.a30 += p(3, 0) + 3.0 * p(2, 0) + p(1, 0);
        out.a21 += p(2, 1) + p(1, 1);
        out.a12 += p(1, 2) + p(1, 1);
        out.a03 += p(0, 3) + 3.0 * p(0, 2) + p(0, 1);
    }
}
