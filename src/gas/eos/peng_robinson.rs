//! A cubic equation of state for gases that no better equation has: Peng and Robinson 1976.

use super::equation::Equation;
use super::property::{Reduced, StateProperties};
use crate::gas::ideal_gas::Gas;
use crate::gas::mixture::Component;
use crate::gas::polynomial::{REFERENCE_PRESSURE_PA, REFERENCE_TEMPERATURE_K};
use crate::gas::species::Species;
use crate::gas::state_error::StateError;
use crate::units::constants::MOLAR_GAS_CONSTANT;
use crate::units::math::{acos, cbrt, cos, ln, sqrt};

/// Where the equation comes from. The citation is from memory.
pub const PENG_ROBINSON_SOURCE: &str = "Peng, Robinson 1976, Ind. Eng. Chem. Fundam. 15: 59-64, all interaction parameters zero";

/// Ω_a and Ω_b of the equation, exact roots of its critical conditions to double precision.
const OMEGA_A: f64 = 0.457_235_528_921_382_1;
const OMEGA_B: f64 = 0.077_796_073_903_888_46;

const SQRT_2: f64 = std::f64::consts::SQRT_2;

/// The ideal part of one component: of its reference equation where it has one, else its polynomials.
#[derive(Clone, Debug)]
enum IdealSource {
    Equation(&'static Equation),
    Polynomials(Gas),
    None,
}

#[derive(Clone, Debug)]
struct Part {
    species: &'static Species,
    fraction: f64,
    /// sqrt(a_c), co-volume b, κ and critical temperature.
    root_a: f64,
    b: f64,
    kappa: f64,
    t_c_k: f64,
    p_c_pa: f64,
    omega: f64,
    ideal: IdealSource,
}

/// Peng and Robinson's equation for one gas or mixture.
///
/// Equation: p = R T/(v - b) - a(T)/(v² + 2 b v - b²); a = (Σ x_i sqrt(a_i α_i))², b = Σ x_i b_i,
///           sqrt(α_i) = 1 + κ_i (1 - sqrt(T/T_c,i)), κ_i = 0.37464 + 1.54226 ω_i - 0.26992 ω_i².
/// Symbols:  v molar volume, m³/mol; x_i mole fractions; T_c,i, p_c,i, ω_i critical constants and acentric factor.
/// Valid:    gases; a few percent in density, more near the critical point and for polar gases.
/// Source:   [`PENG_ROBINSON_SOURCE`].
/// Error:    of the model as above; arithmetic checked against `feos`.
/// Edges:    with three roots the gas is the one of the lowest density.
#[derive(Clone, Debug)]
pub(crate) struct PengRobinson {
    parts: Vec<Part>,
    pub(crate) molar_mass_kg_mol: f64,
    b: f64,
    /// sqrt(a) = whole - half_slope · sqrt(T).
    whole: f64,
    by_root_t: f64,
    mixing: f64,
}

/// Which of the roots.
#[derive(Clone, Copy, Debug, PartialEq, Eq)]
pub(crate) enum Root {
    Gas,
    Liquid,
}

impl PengRobinson {
    /// For the components of a gas; the name of one that lacks a critical point or an acentric factor is the error.
    pub(crate) fn new(components: &[Component]) -> Result<Self, &'static str> {
        let mut parts = Vec::new();
        for component in components {
            let species = component.species;
            let (Some(t_c_k), Some(p_c_pa), Some(omega)) = (species.t_c_k, species.p_c_pa, species.omega) else {
                return Err(species.name);
            };
            let r = MOLAR_GAS_CONSTANT;
            let ideal = match Equation::of(species) {
                Some(equation) => IdealSource::Equation(equation),
                None if species.caloric.is_some() => IdealSource::Polynomials(Gas::pure(species)),
                None => IdealSource::None,
            };
            parts.push(Part {
                species,
                fraction: component.mole_fraction,
                root_a: r * t_c_k * sqrt(OMEGA_A / p_c_pa),
                b: OMEGA_B * r * t_c_k / p_c_pa,
                kappa: 0.374_64 + omega * (1.542_26 - 0.269_92 * omega),
                t_c_k,
                p_c_pa,
                omega,
                ideal,
            });
        }
        let molar_mass_kg_mol = parts.iter().map(|part| part.fraction * part.species.molar_mass_kg_mol).sum();
        let fractions: Vec<f64> = parts.iter().map(|part| part.fraction).collect();
        let mixing = parts.iter().filter(|part| part.fraction > 0.0).map(|part| part.fraction * ln(part.fraction)).sum();
        let mut one = Self { parts, molar_mass_kg_mol, b: 0.0, whole: 0.0, by_root_t: 0.0, mixing };
        (one.b, one.whole, one.by_root_t) = one.mixed(&fractions);
        Ok(one)
    }

    /// b and both parts of sqrt(a) for other fractions.
    fn mixed(&self, fractions: &[f64]) -> (f64, f64, f64) {
        let mut sums = (0.0, 0.0, 0.0);
        for (part, x) in self.parts.iter().zip(fractions) {
            sums.0 += x * part.b;
            sums.1 += x * part.root_a * (1.0 + part.kappa);
            sums.2 += x * part.root_a * part.kappa / sqrt(part.t_c_k);
        }
        sums
    }

    pub(crate) fn len(&self) -> usize {
        self.parts.len()
    }

    pub(crate) fn species(&self, index: usize) -> &'static Species {
        self.parts[index].species
    }

    pub(crate) fn fractions(&self) -> Vec<f64> {
        self.parts.iter().map(|part| part.fraction).collect()
    }

    /// Name of a component without caloric properties.
    pub(crate) fn without_caloric(&self) -> Option<&'static str> {
        self.parts.iter().find(|part| matches!(part.ideal, IdealSource::None)).map(|part| part.species.name)
    }

    /// Saturation pressure of a component over the pressure, as a first guess (Wilson 1969, from memory).
    pub(crate) fn volatility(&self, index: usize, t_k: f64, p_pa: f64) -> f64 {
        let part = &self.parts[index];
        part.p_c_pa / p_pa * crate::units::math::exp(5.373 * (1.0 + part.omega) * (1.0 - part.t_c_k / t_k))
    }

    /// Compressibility factor of a root for given fractions, with A and B of the cubic.
    fn root(&self, fractions: &[f64], t_k: f64, p_pa: f64, root: Root) -> (f64, f64, f64, f64) {
        let (b, whole, by_root_t) = self.mixed(fractions);
        let rt = MOLAR_GAS_CONSTANT * t_k;
        let root_a = whole - by_root_t * sqrt(t_k);
        let big_a = root_a * root_a * p_pa / (rt * rt);
        let big_b = b * p_pa / rt;
        (cubic_root(big_a, big_b, root), big_a, big_b, root_a)
    }

    /// Logarithms of the fugacity coefficients of a phase of given fractions, and whether the cubic has one root only.
    pub(crate) fn fugacities(&self, fractions: &[f64], t_k: f64, p_pa: f64, root: Root) -> Vec<f64> {
        let (z, big_a, big_b, root_a) = self.root(fractions, t_k, p_pa, root);
        let b = big_b * MOLAR_GAS_CONSTANT * t_k / p_pa;
        let logarithm = ln((z + (1.0 + SQRT_2) * big_b) / (z + (1.0 - SQRT_2) * big_b)) / (2.0 * SQRT_2 * big_b);
        let free = ln(z - big_b);
        self.parts
            .iter()
            .map(|part| {
                let own = part.root_a * (1.0 + part.kappa * (1.0 - sqrt(t_k / part.t_c_k)));
                let ratio = part.b / b;
                ratio * (z - 1.0) - free - big_a * logarithm * (2.0 * own / root_a - ratio)
            })
            .collect()
    }

    /// Molar density of the gas, mol/m³.
    pub(crate) fn molar_density(&self, t_k: f64, p_pa: f64) -> Result<f64, StateError> {
        let rt = MOLAR_GAS_CONSTANT * t_k;
        let (z, ..) = self.root(&self.fractions(), t_k, p_pa, Root::Gas);
        let mut rho = p_pa / (rt * z);
        // One or two steps of Newton's method take away the rounding of the closed form.
        for _ in 0..3 {
            let (p, slope) = self.pressure(t_k, rho);
            let next = rho - (p - p_pa) / slope;
            if next.is_nan() || (next / rho - 1.0).abs() > 1e-3 {
                break;
            }
            rho = next;
        }
        let (p, slope) = self.pressure(t_k, rho);
        let residual = p / p_pa - 1.0;
        if slope > 0.0 && residual.abs() < 1e-9 {
            return Ok(rho);
        }
        Err(StateError::NotConverged { what: "density", model: "Peng-Robinson", iterations: 3, residual })
    }

    /// Pressure, Pa, and its derivative by molar density.
    fn pressure(&self, t_k: f64, rho: f64) -> (f64, f64) {
        let rt = MOLAR_GAS_CONSTANT * t_k;
        let root_a = self.whole - self.by_root_t * sqrt(t_k);
        let x = self.b * rho;
        let [_, f1, f2, _] = repulsion(x);
        let [_, g1, g2, _] = attraction(x);
        let a = root_a * root_a / (self.b * rt);
        (rho * rt * (1.0 + f1 - a * g1), rt * (1.0 + f1 - a * g1 + f2 - a * g2))
    }

    /// All properties at a temperature, K, and a density, kg/m³.
    pub(crate) fn properties(&self, t_k: f64, rho_kg_m3: f64) -> StateProperties {
        let rho = rho_kg_m3 / self.molar_mass_kg_mol;
        let r = MOLAR_GAS_CONSTANT;
        let x = self.b * rho;
        let f = repulsion(x);
        let g = attraction(x);
        // E of sqrt(a) = whole - by_root_t sqrt(T), with E = -T d/dT.
        let q = self.by_root_t * sqrt(t_k);
        let s = [self.whole - q, 0.5 * q, -0.25 * q, 0.125 * q];
        let a = [s[0] * s[0], 2.0 * s[0] * s[1], 2.0 * (s[1] * s[1] + s[0] * s[2]), 2.0 * (3.0 * s[1] * s[2] + s[0] * s[3])];
        let scale = 1.0 / (self.b * r * t_k);
        let c = [a[0], a[1] + a[0], a[2] + 2.0 * a[1] + a[0], a[3] + 3.0 * a[2] + 3.0 * a[1] + a[0]].map(|value| value * scale);
        let ideal = self.ideal(t_k);
        let rho_reference = REFERENCE_PRESSURE_PA / (r * REFERENCE_TEMPERATURE_K);
        let reduced = Reduced {
            energy: ideal.enthalpy / t_k - 1.0 - c[1] * g[0],
            // The entropy of the ideal part is at the reference pressure: from there to the density at the temperature.
            entropy: ideal.entropy
                - self.mixing
                - ln(rho / rho_reference)
                - ln(t_k / REFERENCE_TEMPERATURE_K)
                - c[1] * g[0]
                - (f[0] - c[0] * g[0]),
            e1: ideal.cp - 1.0 - c[1] * g[0],
            e2: -c[2] * g[0],
            e3: ideal.slope * t_k - c[3] * g[0],
            a10: f[1] - c[0] * g[1],
            a20: f[2] - c[0] * g[2],
            a11: -c[1] * g[1],
            a30: f[3] - c[0] * g[3],
            a21: -c[1] * g[2],
            a12: -c[2] * g[1],
        };
        reduced.properties(t_k, rho_kg_m3, r / self.molar_mass_kg_mol)
    }

    /// cp/R, its derivative by T, h/R and s/R at the reference pressure, of the ideal gas, without the entropy of mixing.
    fn ideal(&self, t_k: f64) -> Ideal {
        let mut sum = Ideal::default();
        for part in &self.parts {
            let one = part.ideal.at(t_k);
            sum.cp += part.fraction * one.cp;
            sum.slope += part.fraction * one.slope;
            sum.enthalpy += part.fraction * one.enthalpy;
            sum.entropy += part.fraction * one.entropy;
        }
        sum
    }
}

#[derive(Clone, Copy, Debug, Default)]
struct Ideal {
    cp: f64,
    slope: f64,
    enthalpy: f64,
    entropy: f64,
}

impl IdealSource {
    fn at(&self, t_k: f64) -> Ideal {
        match self {
            Self::Equation(equation) => {
                let values = equation.ideal.values(t_k);
                Ideal {
                    cp: values.e1 - values.e2 + 1.0,
                    slope: -(values.e2 - values.e3) / t_k,
                    enthalpy: t_k * (equation.ideal.energy(&values, t_k) + 1.0),
                    entropy: equation.ideal.entropy(&values) + ln(t_k / REFERENCE_TEMPERATURE_K),
                }
            }
            Self::Polynomials(gas) => {
                let r = gas.gas_constant_j_kg_k();
                Ideal {
                    cp: gas.cp_j_kg_k(t_k) / r,
                    slope: gas.dcp_dt(t_k) / r,
                    enthalpy: gas.h_j_kg(t_k) / r,
                    entropy: gas.s_j_kg_k(t_k) / r,
                }
            }
            Self::None => Ideal { cp: f64::NAN, slope: f64::NAN, enthalpy: f64::NAN, entropy: f64::NAN },
        }
    }
}

/// -ln(1 - x) and x d/dx of it, taken 0 to 3 times.
fn repulsion(x: f64) -> [f64; 4] {
    let y = 1.0 / (1.0 - x);
    [-crate::units::math::ln_1p(-x), x * y, x * y * y, x * (1.0 + x) * y * y * y]
}

/// ln((1 + (1+√2) x)/(1 + (1-√2) x))/(2√2) and x d/dx of it, taken 0 to 3 times.
fn attraction(x: f64) -> [f64; 4] {
    let ln_1p = crate::units::math::ln_1p;
    let q = 1.0 + x * (2.0 - x);
    let value = (ln_1p((1.0 + SQRT_2) * x) - ln_1p((1.0 - SQRT_2) * x)) / (2.0 * SQRT_2);
    let square = 1.0 + x * x;
    [value, x / q, x * square / (q * q), x * ((1.0 + 3.0 * x * x) * q - 4.0 * x * square * (1.0 - x)) / (q * q * q)]
}

/// Root of z³ + (B-1) z² + (A - 3B² - 2B) z - (A B - B² - B³): the largest for the gas, the smallest above B for the liquid.
fn cubic_root(big_a: f64, big_b: f64, which: Root) -> f64 {
    let c2 = big_b - 1.0;
    let c1 = big_a - big_b * (3.0 * big_b + 2.0);
    let c0 = -big_b * (big_a - big_b - big_b * big_b);
    let q = (c2 * c2 - 3.0 * c1) / 9.0;
    let r = (2.0 * c2 * c2 * c2 - 9.0 * c2 * c1 + 27.0 * c0) / 54.0;
    let discriminant = r * r - q * q * q;
    let mut z = if discriminant > 0.0 {
        let a = -r.signum() * cbrt(r.abs() + sqrt(discriminant));
        let b = if a == 0.0 { 0.0 } else { q / a };
        a + b - c2 / 3.0
    } else {
        let root = sqrt(q);
        let angle = acos((r / (root * root * root)).clamp(-1.0, 1.0)) / 3.0;
        let third = 2.0 * std::f64::consts::FRAC_PI_3;
        // Of the three the middle term of the cosine orders them: angle is within 0 and π/3.
        let (largest, smallest) = (-2.0 * root * cos(angle + third) - c2 / 3.0, -2.0 * root * cos(angle) - c2 / 3.0);
        match which {
            Root::Liquid if smallest > big_b => smallest,
            Root::Liquid => {
                let middle = -2.0 * root * cos(angle - third) - c2 / 3.0;
                if middle > big_b { middle } else { largest }
            }
            Root::Gas => largest,
        }
    };
    for _ in 0..2 {
        let value = ((z + c2) * z + c1) * z + c0;
        let slope = (3.0 * z + 2.0 * c2) * z + c1;
        let next = z - value / slope;
        if next > big_b && (next - z).abs() < 1e-3 * z {
            z = next;
        }
    }
    z
}
