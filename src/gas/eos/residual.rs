//! The residual part of a reference equation: what the molecules do to each other.

use super::non_analytic::NonAnalytic;
use super::record::ResidualTerm;
use crate::units::math::{exp, ln, pow, sqrt};

/// Most shapes of δ that an equation may have; the compiled form keeps one number for each on the stack.
const MOST_SHAPES: usize = 64;

/// Highest whole power of δ plus one.
const POWERS: usize = 32;

/// Most different exponents l with their factors g.
const MOST_DAMPINGS: usize = 12;

/// The part of a term that depends on δ.
#[derive(Clone, Copy, Debug, PartialEq)]
enum Shape {
    /// δ^d.
    Power { d: usize },
    /// δ^d exp(-g δ^l); `damping` is the place of (g, l).
    Damped { d: usize, damping: usize },
    /// δ^d exp(-η (δ-ε)²).
    Bell { d: usize, eta: f64, epsilon: f64 },
}

/// The factor of a term, beside τ^t, that depends on τ.
#[derive(Clone, Copy, Debug, PartialEq)]
enum Warp {
    /// exp(-β (τ-γ)²).
    Bell { beta: f64, gamma: f64 },
    /// exp(1/(β (τ-γ)² + b)).
    Hat { beta: f64, gamma: f64, b: f64 },
    /// exp(-g τ^m).
    Damped { g: f64, m: f64 },
}

#[derive(Clone, Copy, Debug)]
struct Term {
    n: f64,
    exponent: usize,
    shape: usize,
}

#[derive(Clone, Copy, Debug)]
struct WarpedTerm {
    n: f64,
    t: f64,
    shape: usize,
    warp: Warp,
}

/// The residual part α^r of the reduced Helmholtz energy a/(R T).
///
/// Equation: α^r(τ, δ) = Σ n F(δ) G(τ) + non-analytic terms, with F a power of δ, damped by exp(-g δ^l) or in a bell
///           exp(-η (δ-ε)²), and G a power of τ, in a bell, a hat or damped in the same way; see [`ResidualTerm`].
/// Symbols:  τ = T_r/T and δ = ρ/ρ_r with the reducing point of the equation.
/// Valid:    the range of the equation.
/// Source:   the publication of the equation.
/// Error:    checked against `feos` to 1e-12 in the tests.
/// Edges:    the non-analytic terms have no derivative at exactly δ = 1: there δ is moved by 1e-9.
///
/// Terms that share F are added up once a temperature ([`Self::isotherm`]), so that a step along an isotherm costs no power of τ.
#[derive(Clone, Debug)]
pub(crate) struct ResidualPart {
    exponents: Vec<f64>,
    terms: Vec<Term>,
    warped: Vec<WarpedTerm>,
    shapes: Vec<Shape>,
    /// g and l of every exponential of δ.
    dampings: Vec<(f64, usize)>,
    highest_power: usize,
    non_analytic: Vec<NonAnalytic>,
    /// The shapes once more in groups, each power of δ with the place of its coefficient: undamped, damped by the same exponential, in a bell.
    undamped: Vec<PowerOfDelta>,
    damped_groups: Vec<(Damping, Vec<PowerOfDelta>)>,
    bells: Vec<Bell>,
}

/// δ^d and the place of its coefficient.
#[derive(Clone, Copy, Debug)]
struct PowerOfDelta {
    d: usize,
    shape: usize,
}

/// exp(-g δ^l).
#[derive(Clone, Copy, Debug)]
struct Damping {
    g: f64,
    l: usize,
}

/// δ^d exp(-η (δ-ε)²) and the place of its coefficient.
#[derive(Clone, Copy, Debug)]
struct Bell {
    d: usize,
    eta: f64,
    epsilon: f64,
    shape: usize,
}

/// α^r and its derivatives in the operators D = δ ∂/∂δ and E = τ ∂/∂τ: `a21` is D² E α^r.
#[derive(Clone, Copy, Debug, Default, PartialEq)]
pub(crate) struct ResidualValues {
    pub(crate) a00: f64,
    pub(crate) a10: f64,
    pub(crate) a01: f64,
    pub(crate) a20: f64,
    pub(crate) a11: f64,
    pub(crate) a02: f64,
    pub(crate) a30: f64,
    pub(crate) a21: f64,
    pub(crate) a12: f64,
    pub(crate) a03: f64,
}

/// α^r along one isotherm: the coefficient of every shape of δ.
#[derive(Clone, Copy, Debug)]
pub(crate) struct Isotherm<'a> {
    part: &'a ResidualPart,
    tau: f64,
    coefficients: [f64; MOST_SHAPES],
}

/// Powers of δ and the exponentials of its dampings.
struct Delta {
    powers: [f64; POWERS],
    dampings: [f64; MOST_DAMPINGS],
}

impl ResidualPart {
    /// Compiles the terms; `None` where arrays differ in length or an exponent is beyond what the compiled form holds.
    pub(crate) fn new(families: &[ResidualTerm]) -> Option<Self> {
        let mut part = Self {
            exponents: Vec::new(),
            terms: Vec::new(),
            warped: Vec::new(),
            shapes: Vec::new(),
            dampings: Vec::new(),
            highest_power: 1,
            non_analytic: Vec::new(),
            undamped: Vec::new(),
            damped_groups: Vec::new(),
            bells: Vec::new(),
        };
        for family in families {
            part.add(family)?;
        }
        for shape in &part.shapes {
            let (Shape::Power { d } | Shape::Damped { d, .. } | Shape::Bell { d, .. }) = shape;
            part.highest_power = part.highest_power.max(*d);
        }
        for (_, l) in &part.dampings {
            part.highest_power = part.highest_power.max(*l);
        }
        let fits = part.shapes.len() <= MOST_SHAPES
            && part.dampings.len() <= MOST_DAMPINGS
            && part.highest_power < POWERS
            && part.exponents.len() <= MOST_EXPONENTS;
        part.group();
        fits.then_some(part)
    }

    fn group(&mut self) {
        self.damped_groups = self.dampings.iter().map(|(g, l)| (Damping { g: *g, l: *l }, Vec::new())).collect();
        for (shape, form) in self.shapes.iter().enumerate() {
            match *form {
                Shape::Power { d } => self.undamped.push(PowerOfDelta { d, shape }),
                Shape::Damped { d, damping } => self.damped_groups[damping].1.push(PowerOfDelta { d, shape }),
                Shape::Bell { d, eta, epsilon } => self.bells.push(Bell { d, eta, epsilon, shape }),
            }
        }
    }

    fn add(&mut self, family: &ResidualTerm) -> Option<()> {
        match family {
            ResidualTerm::Power { n, t, d, l } => {
                for (i, n) in n.iter().enumerate() {
                    let shape = self.damped(*d.get(i)?, 1.0, *l.get(i)?);
                    self.plain(*n, *t.get(i)?, shape);
                }
            }
            ResidualTerm::Exponential { n, t, d, g, l } => {
                for (i, n) in n.iter().enumerate() {
                    let shape = self.damped(*d.get(i)?, *g.get(i)?, *l.get(i)?);
                    self.plain(*n, *t.get(i)?, shape);
                }
            }
            ResidualTerm::Gaussian { n, t, d, eta, epsilon, beta, gamma } => {
                for (i, n) in n.iter().enumerate() {
                    let shape = self.shape(Shape::Bell { d: usize::from(*d.get(i)?), eta: *eta.get(i)?, epsilon: *epsilon.get(i)? });
                    let warp = Warp::Bell { beta: *beta.get(i)?, gamma: *gamma.get(i)? };
                    self.warped.push(WarpedTerm { n: *n, t: *t.get(i)?, shape, warp });
                }
            }
            ResidualTerm::Lemmon { n, t, d, l, m } => {
                for (i, n) in n.iter().enumerate() {
                    let shape = self.damped(*d.get(i)?, 1.0, *l.get(i)?);
                    match *m.get(i)? {
                        0.0 => self.plain(*n, *t.get(i)?, shape),
                        m => self.warped.push(WarpedTerm { n: *n, t: *t.get(i)?, shape, warp: Warp::Damped { g: 1.0, m } }),
                    }
                }
            }
            ResidualTerm::Gao { n, t, d, eta, epsilon, beta, gamma, b } => {
                for (i, n) in n.iter().enumerate() {
                    let shape = self.shape(Shape::Bell { d: usize::from(*d.get(i)?), eta: -*eta.get(i)?, epsilon: *epsilon.get(i)? });
                    let warp = Warp::Hat { beta: *beta.get(i)?, gamma: *gamma.get(i)?, b: *b.get(i)? };
                    self.warped.push(WarpedTerm { n: *n, t: *t.get(i)?, shape, warp });
                }
            }
            ResidualTerm::DoubleExponential { n, t, d, gd, ld, gt, lt } => {
                for (i, n) in n.iter().enumerate() {
                    let shape = self.damped(*d.get(i)?, *gd.get(i)?, *ld.get(i)?);
                    let warp = Warp::Damped { g: *gt.get(i)?, m: *lt.get(i)? };
                    self.warped.push(WarpedTerm { n: *n, t: *t.get(i)?, shape, warp });
                }
            }
            ResidualTerm::NonAnalytic { n, a, b, beta, A, B, C, D } => {
                for (i, n) in n.iter().enumerate() {
                    let coefficients = [*n, *a.get(i)?, *b.get(i)?, *beta.get(i)?, *A.get(i)?, *B.get(i)?, *C.get(i)?, *D.get(i)?];
                    self.non_analytic.push(NonAnalytic::new(coefficients));
                }
            }
        }
        Some(())
    }

    fn shape(&mut self, shape: Shape) -> usize {
        self.shapes.iter().position(|known| *known == shape).unwrap_or_else(|| {
            self.shapes.push(shape);
            self.shapes.len() - 1
        })
    }

    fn damped(&mut self, d: u8, g: f64, l: u8) -> usize {
        let d = usize::from(d);
        if l == 0 {
            return self.shape(Shape::Power { d });
        }
        let damping = (g, usize::from(l));
        let place = self.dampings.iter().position(|known| *known == damping).unwrap_or_else(|| {
            self.dampings.push(damping);
            self.dampings.len() - 1
        });
        self.shape(Shape::Damped { d, damping: place })
    }

    fn plain(&mut self, n: f64, t: f64, shape: usize) {
        let exponent = self.exponents.iter().position(|known| *known == t).unwrap_or_else(|| {
            self.exponents.push(t);
            self.exponents.len() - 1
        });
        self.terms.push(Term { n, exponent, shape });
    }

    /// The isotherm of τ.
    pub(crate) fn isotherm(&self, tau: f64) -> Isotherm<'_> {
        let tau_powers = TauPowers::new(tau);
        let mut coefficients = [0.0; MOST_SHAPES];
        let mut powers = [0.0; MOST_EXPONENTS];
        for (power, t) in powers.iter_mut().zip(&self.exponents) {
            *power = tau_powers.of(*t);
        }
        for term in &self.terms {
            coefficients[term.shape] += term.n * powers[term.exponent];
        }
        for term in &self.warped {
            let w = term.warp.at(tau)[0];
            if w > NEGLIGIBLE {
                coefficients[term.shape] += term.n * tau_powers.of(term.t) * exp(w);
            }
        }
        Isotherm { part: self, tau, coefficients }
    }

    fn delta(&self, delta: f64) -> Delta {
        let mut powers = [1.0; POWERS];
        for i in 1..=self.highest_power {
            powers[i] = powers[i - 1] * delta;
        }
        let mut dampings = [0.0; MOST_DAMPINGS];
        for (value, (g, l)) in dampings.iter_mut().zip(&self.dampings) {
            *value = exp(-g * powers[*l]);
        }
        Delta { powers, dampings }
    }

    /// α^r with all derivatives up to the third.
    pub(crate) fn values(&self, tau: f64, delta: f64) -> ResidualValues {
        let tau_powers = TauPowers::new(tau);
        // Coefficient of each shape under E taken 0, 1, 2 and 3 times.
        let mut sums = [[0.0; 4]; MOST_SHAPES];
        let mut powers = [0.0; MOST_EXPONENTS];
        for (power, t) in powers.iter_mut().zip(&self.exponents) {
            *power = tau_powers.of(*t);
        }
        for term in &self.terms {
            let t = self.exponents[term.exponent];
            let mut value = term.n * powers[term.exponent];
            for sum in &mut sums[term.shape] {
                *sum += value;
                value *= t;
            }
        }
        for term in &self.warped {
            let [w, w1, w2, w3] = term.warp.at(tau);
            if w <= NEGLIGIBLE {
                continue;
            }
            let value = term.n * tau_powers.of(term.t) * exp(w);
            let factors = raised(term.t + w1, w2, w3);
            for (sum, factor) in sums[term.shape].iter_mut().zip(factors) {
                *sum += value * factor;
            }
        }
        let points = self.delta(delta);
        let mut out = ResidualValues::default();
        for (shape, c) in self.shapes.iter().zip(&sums) {
            let (value, factors) = points.of(shape, delta, &self.dampings);
            let f = factors.map(|factor| factor * value);
            out.a00 += f[0] * c[0];
            out.a10 += f[1] * c[0];
            out.a20 += f[2] * c[0];
            out.a30 += f[3] * c[0];
            out.a01 += f[0] * c[1];
            out.a11 += f[1] * c[1];
            out.a21 += f[2] * c[1];
            out.a02 += f[0] * c[2];
            out.a12 += f[1] * c[2];
            out.a03 += f[0] * c[3];
        }
        for term in &self.non_analytic {
            term.add(tau, delta, &mut out);
        }
        out
    }

    /// The coefficients of δ and of δ² at δ = 0, the reduced second and (half the) third virial coefficient, with E taken 0 and 1 times:
    /// `[[b, E b], [c, E c]]` of α^r = b δ + c δ² + ….
    pub(crate) fn virial(&self, tau: f64) -> [[f64; 2]; 2] {
        let tau_powers = TauPowers::new(tau);
        let mut out = [[0.0; 2]; 2];
        let mut add = |shape: &Shape, value: f64, slope: f64| {
            let (first, second) = shape.series(&self.dampings);
            out[0][0] += value * first;
            out[0][1] += value * slope * first;
            out[1][0] += value * second;
            out[1][1] += value * slope * second;
        };
        for term in &self.terms {
            let t = self.exponents[term.exponent];
            add(&self.shapes[term.shape], term.n * tau_powers.of(t), t);
        }
        for term in &self.warped {
            let [w, w1, ..] = term.warp.at(tau);
            add(&self.shapes[term.shape], term.n * tau_powers.of(term.t) * exp(w), term.t + w1);
        }
        for term in &self.non_analytic {
            term.add_virial(tau, &mut out);
        }
        out
    }
}

/// Most different exponents of τ.
const MOST_EXPONENTS: usize = 64;

/// Exponent of e below which a factor is left out: 1e-43, below the last digit of every sum even after three derivatives.
const NEGLIGIBLE: f64 = -100.0;

/// Powers of τ: products where the exponent is a multiple of an eighth, which most are, by the logarithm elsewhere.
struct TauPowers {
    ln_tau: f64,
    /// τ to the powers 1/8, 1/4, 1/2, 1, 2, … 64.
    doubled: [f64; 10],
}

impl TauPowers {
    fn new(tau: f64) -> Self {
        let half = sqrt(tau);
        let quarter = sqrt(half);
        let mut doubled = [sqrt(quarter), quarter, half, tau, 0.0, 0.0, 0.0, 0.0, 0.0, 0.0];
        for i in 4..doubled.len() {
            doubled[i] = doubled[i - 1] * doubled[i - 1];
        }
        Self { ln_tau: ln(tau), doubled }
    }

    fn of(&self, t: f64) -> f64 {
        let eighths = t * 8.0;
        if eighths != eighths.trunc() || eighths.abs() >= 1024.0 {
            return exp(t * self.ln_tau);
        }
        // The cast is exact: a whole number below 1024.
        let mut rest = eighths.abs() as usize;
        let mut product = 1.0;
        while rest > 0 {
            product *= self.doubled[rest.trailing_zeros() as usize];
            rest &= rest - 1;
        }
        if t < 0.0 { 1.0 / product } else { product }
    }
}

impl Isotherm<'_> {
    /// α^r, D α^r and D² α^r at δ.
    pub(crate) fn terms(&self, delta: f64) -> [f64; 3] {
        let part = self.part;
        let mut powers = [1.0; POWERS];
        for i in 1..=part.highest_power {
            powers[i] = powers[i - 1] * delta;
        }
        // Σ c δ^d with 1, d and d² before it.
        let sum = |terms: &[PowerOfDelta]| {
            let mut sums = [0.0; 3];
            for term in terms {
                let d = term.d as f64;
                let value = self.coefficients[term.shape] * powers[term.d];
                sums[0] += value;
                sums[1] += d * value;
                sums[2] += d * d * value;
            }
            sums
        };
        let [mut zeroth, mut first, mut second] = sum(&part.undamped);
        for (Damping { g, l }, terms) in &part.damped_groups {
            let fall = g * powers[*l];
            let damping = exp(-fall);
            let [p0, p1, p2] = sum(terms);
            // D of the exponential is -l fall, so that D² of the product gathers to this.
            let x = *l as f64 * fall;
            zeroth += damping * p0;
            first += damping * (p1 - x * p0);
            second += damping * (p2 - 2.0 * x * p1 + (x * x - *l as f64 * x) * p0);
        }
        for bell in &part.bells {
            let c = self.coefficients[bell.shape];
            if c == 0.0 {
                continue;
            }
            let x = delta - bell.epsilon;
            let k = 2.0 * bell.eta * delta;
            let value = c * powers[bell.d] * exp(-bell.eta * x * x);
            let a = bell.d as f64 - k * x;
            zeroth += value;
            first += value * a;
            second += value * (a * a - k * (delta + x));
        }
        let mut sums = [zeroth, first, second];
        for term in &part.non_analytic {
            term.add_terms(self.tau, delta, &mut sums);
        }
        sums
    }
}

/// The factors of a product under an operator applied 0 to 3 times, from the logarithmic derivative `a` and the operator's next two
/// on it.
fn raised(a: f64, a1: f64, a2: f64) -> [f64; 4] {
    [1.0, a, a * a + a1, a * a * a + 3.0 * a * a1 + a2]
}

impl Warp {
    /// The exponent w and E w, E² w, E³ w.
    fn at(self, tau: f64) -> [f64; 4] {
        match self {
            Self::Bell { beta, gamma } => {
                let x = tau - gamma;
                let k = -2.0 * beta * tau;
                [-beta * x * x, k * x, k * (2.0 * tau - gamma), k * (4.0 * tau - gamma)]
            }
            Self::Hat { beta, gamma, b } => {
                let x = tau - gamma;
                let inverse = 1.0 / (beta * x * x + b);
                let square = inverse * inverse;
                let w1 = -2.0 * beta * x * square;
                let w2 = square * (8.0 * beta * beta * x * x * inverse - 2.0 * beta);
                let w3 = beta * beta * x * square * inverse * (24.0 - 48.0 * beta * x * x * inverse);
                [inverse, tau * w1, tau * w1 + tau * tau * w2, tau * w1 + 3.0 * tau * tau * w2 + tau * tau * tau * w3]
            }
            Self::Damped { g, m } => {
                let w = -g * pow(tau, m);
                [w, m * w, m * m * w, m * m * m * w]
            }
        }
    }
}

impl Shape {
    /// Coefficients of δ and of δ² in the series of the shape.
    fn series(&self, dampings: &[(f64, usize)]) -> (f64, f64) {
        match *self {
            Self::Power { d } => (if d == 1 { 1.0 } else { 0.0 }, if d == 2 { 1.0 } else { 0.0 }),
            Self::Damped { d, damping } => {
                // δ^d (1 - g δ^l + g² δ^2l/2 - …).
                let (g, l) = dampings[damping];
                let of = |power: usize| match power.checked_sub(d) {
                    Some(0) => 1.0,
                    Some(rest) if rest == l => -g,
                    Some(rest) if rest == 2 * l => 0.5 * g * g,
                    _ => 0.0,
                };
                (of(1), of(2))
            }
            Self::Bell { d, eta, epsilon } => {
                let value = exp(-eta * epsilon * epsilon);
                match d {
                    1 => (value, 2.0 * eta * epsilon * value),
                    2 => (0.0, value),
                    _ => (0.0, 0.0),
                }
            }
        }
    }
}

impl Delta {
    /// The value of a shape and its factors under D taken 0 to 3 times.
    fn of(&self, shape: &Shape, delta: f64, dampings: &[(f64, usize)]) -> (f64, [f64; 4]) {
        match *shape {
            Shape::Power { d } => {
                let value = self.powers[d];
                let d = d as f64;
                (value, [1.0, d, d * d, d * d * d])
            }
            Shape::Damped { d, damping } => {
                let (g, l) = dampings[damping];
                let value = self.powers[d] * self.dampings[damping];
                let (l, fall) = (l as f64, g * self.powers[l]);
                (value, raised(d as f64 - l * fall, -l * l * fall, -l * l * l * fall))
            }
            Shape::Bell { d, eta, epsilon } => {
                let x = delta - epsilon;
                let k = -2.0 * eta * delta;
                let value = self.powers[d] * exp(-eta * x * x);
                (value, raised(d as f64 + k * x, k * (delta + x), k * (4.0 * delta - epsilon)))
            }
        }
    }
}
