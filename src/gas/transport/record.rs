//! The terms of the correlations as they ship: one line of JSON a gas.

use serde::Deserialize;

use super::super::eos::record::line_of;

/// Terms of the correlations; origin and notices in `data/EQUATIONS.md`.
const TRANSPORT: &str = include_str!("../data/transport.jsonl");

/// Correlations of one gas; each may be missing.
#[derive(Debug, Deserialize)]
pub(super) struct TransportRecord {
    pub(super) viscosity: Option<ViscosityRecord>,
    pub(super) conductivity: Option<ConductivityRecord>,
}

/// Viscosity: a form of its own, a scaling by residual entropy, or the sum of parts.
#[derive(Debug, Deserialize)]
pub(super) struct ViscosityRecord {
    /// Form that belongs to this gas alone.
    #[serde(default)]
    pub(super) own: Option<String>,
    /// Depth of the pair potential over the Boltzmann constant, K.
    #[serde(default)]
    pub(super) epsilon_over_k: f64,
    /// Its length, m.
    #[serde(default)]
    pub(super) sigma_eta: f64,
    pub(super) dilute: Option<ThinGas>,
    pub(super) initial_density: Option<FirstDensity>,
    pub(super) higher_order: Option<Dense>,
    /// Scaling by residual entropy.
    pub(super) entropy: Option<EntropyScaling>,
    /// Parameters of Chung's method.
    pub(super) chung: Option<Chung>,
}

/// Viscosity of the thin gas.
#[derive(Debug, Deserialize)]
#[serde(tag = "type")]
pub(super) enum ThinGas {
    /// C sqrt(M T)/(σ² exp(Σ a (ln T*)^t)).
    #[serde(rename = "collision_integral")]
    CollisionIntegral {
        #[serde(rename = "C")]
        c: f64,
        a: Vec<f64>,
        t: Vec<f64>,
        molar_mass: f64,
    },
    /// C sqrt(T)/Σ a T*^t.
    #[serde(rename = "collision_integral_powers_of_Tstar")]
    CollisionIntegralPowers {
        #[serde(rename = "C")]
        c: f64,
        #[serde(rename = "T_reducing")]
        t_reducing: f64,
        a: Vec<f64>,
        t: Vec<f64>,
    },
    /// Σ a T^t.
    #[serde(rename = "powers_of_T")]
    Powers { a: Vec<f64>, t: Vec<f64> },
    /// Σ a (T/T_r)^t.
    #[serde(rename = "powers_of_Tr")]
    ReducedPowers {
        #[serde(rename = "T_reducing")]
        t_reducing: f64,
        a: Vec<f64>,
        t: Vec<f64>,
    },
    /// Chapman and Enskog with Neufeld's collision integral.
    #[serde(rename = "kinetic_theory")]
    KineticTheory {},
    /// A form of one gas.
    #[serde(rename = "own")]
    Own { name: String },
}

/// First dependence of the viscosity on density.
#[derive(Debug, Deserialize)]
#[serde(tag = "type")]
pub(super) enum FirstDensity {
    /// Second viscosity virial coefficient, Σ b T*^t times N_A σ³.
    #[serde(rename = "Rainwater-Friend")]
    RainwaterFriend { b: Vec<f64>, t: Vec<f64> },
    /// Σ n δ^d τ^t.
    #[serde(rename = "empirical")]
    Empirical {
        #[serde(rename = "T_reducing")]
        t_reducing: f64,
        rhomolar_reducing: f64,
        n: Vec<f64>,
        d: Vec<f64>,
        t: Vec<f64>,
    },
}

/// Viscosity of the dense gas above the first dependence.
#[derive(Debug, Deserialize)]
#[serde(tag = "type")]
pub(super) enum Dense {
    /// Powers of τ and δ, and the free volume term of Batschinski and Hildebrand.
    #[serde(rename = "modified_Batschinski_Hildebrand")]
    Batschinski(Box<Batschinski>),
    /// Friction theory of Quiñones-Cisneros.
    #[serde(rename = "friction_theory")]
    Friction(Box<Friction>),
    /// A form of one gas.
    #[serde(rename = "own")]
    Own { name: String },
}

#[derive(Debug, Deserialize)]
pub(super) struct Batschinski {
    #[serde(rename = "T_reduce")]
    pub(super) t_reduce: f64,
    pub(super) rhomolar_reduce: f64,
    pub(super) a: Vec<f64>,
    pub(super) d1: Vec<f64>,
    pub(super) t1: Vec<f64>,
    pub(super) gamma: Vec<f64>,
    pub(super) l: Vec<f64>,
    pub(super) f: Vec<f64>,
    pub(super) d2: Vec<f64>,
    pub(super) t2: Vec<f64>,
    pub(super) g: Vec<f64>,
    pub(super) h: Vec<f64>,
    pub(super) p: Vec<f64>,
    pub(super) q: Vec<f64>,
}

#[derive(Debug, Deserialize)]
#[allow(non_snake_case)]
pub(super) struct Friction {
    pub(super) T_reduce: f64,
    pub(super) c1: f64,
    pub(super) c2: f64,
    pub(super) Ai: [f64; 3],
    pub(super) Aa: [f64; 3],
    pub(super) Ar: [f64; 3],
    pub(super) Aaa: [f64; 3],
    pub(super) Na: i32,
    pub(super) Nr: i32,
    pub(super) Naa: i32,
    pub(super) Nrr: i32,
    pub(super) Arr: Option<[f64; 3]>,
    pub(super) Adrdr: Option<[f64; 3]>,
    pub(super) Aii: Option<[f64; 3]>,
    #[serde(default)]
    pub(super) Nii: i32,
    pub(super) Arrr: Option<[f64; 3]>,
    pub(super) Aaaa: Option<[f64; 3]>,
    #[serde(default)]
    pub(super) Nrrr: i32,
    #[serde(default)]
    pub(super) Naaa: i32,
}

#[derive(Debug, Deserialize)]
pub(super) struct EntropyScaling {
    #[serde(rename = "C")]
    pub(super) c: f64,
    pub(super) c_liq: [f64; 4],
    pub(super) c_vap: [f64; 4],
    pub(super) rhosr_critical: f64,
}

#[derive(Debug, Deserialize)]
pub(super) struct Chung {
    #[serde(rename = "T_critical")]
    pub(super) t_critical: f64,
    pub(super) rhomolar_critical: f64,
    pub(super) molar_mass: f64,
    pub(super) acentric: f64,
    #[serde(rename = "dipole_moment_D")]
    pub(super) dipole_moment_debye: f64,
}

/// Thermal conductivity: a form of its own, or the sum of parts.
#[derive(Debug, Deserialize)]
pub(super) struct ConductivityRecord {
    #[serde(default)]
    pub(super) own: Option<String>,
    pub(super) dilute: Option<ThinConductivity>,
    pub(super) residual: Option<DenseConductivity>,
    pub(super) critical: Option<Enhancement>,
}

/// Conductivity of the thin gas.
#[derive(Debug, Deserialize)]
#[serde(tag = "type")]
pub(super) enum ThinConductivity {
    /// Σ A T_r^n/Σ B T_r^m.
    #[serde(rename = "ratio_of_polynomials")]
    Ratio {
        #[serde(rename = "T_reducing")]
        t_reducing: f64,
        #[serde(rename = "A")]
        a: Vec<f64>,
        n: Vec<f64>,
        #[serde(rename = "B")]
        b: Vec<f64>,
        m: Vec<f64>,
    },
    /// A_0 η_0 + Σ A τ^t, with the viscosity of the thin gas.
    #[serde(rename = "eta0_and_poly")]
    Viscosity {
        #[serde(rename = "A")]
        a: Vec<f64>,
        t: Vec<f64>,
    },
    /// A form of one gas.
    #[serde(rename = "own")]
    Own { name: String },
}

/// Conductivity of the dense gas.
#[derive(Debug, Deserialize)]
#[serde(tag = "type")]
pub(super) enum DenseConductivity {
    /// Σ B τ^t δ^d.
    #[serde(rename = "polynomial")]
    Powers {
        #[serde(rename = "T_reducing")]
        t_reducing: f64,
        rhomass_reducing: f64,
        #[serde(rename = "B")]
        b: Vec<f64>,
        t: Vec<f64>,
        d: Vec<f64>,
    },
    /// Σ A τ^t δ^d exp(-γ δ^l), reduced as the equation of state is.
    #[serde(rename = "polynomial_and_exponential")]
    DampedPowers {
        #[serde(rename = "A")]
        a: Vec<f64>,
        t: Vec<f64>,
        d: Vec<f64>,
        gamma: Vec<f64>,
        l: Vec<f64>,
    },
}

/// Enhancement of the conductivity near the critical point.
#[derive(Debug, Deserialize)]
#[serde(tag = "type")]
pub(super) enum Enhancement {
    /// Olchowy and Sengers, simplified.
    #[serde(rename = "simplified_Olchowy_Sengers")]
    OlchowySengers(OlchowySengers),
    /// A form of one gas.
    #[serde(rename = "own")]
    Own { name: String },
}

#[derive(Debug, Deserialize)]
pub(super) struct OlchowySengers {
    #[serde(rename = "GAMMA", default = "amplitude_susceptibility")]
    pub(super) amplitude: f64,
    #[serde(rename = "R0", default = "amplitude_dynamic")]
    pub(super) r0: f64,
    #[serde(default = "exponent_gamma")]
    pub(super) gamma: f64,
    #[serde(default = "exponent_nu")]
    pub(super) nu: f64,
    #[serde(rename = "qD", default = "cutoff")]
    pub(super) q_d: f64,
    #[serde(default = "correlation_length")]
    pub(super) zeta0: f64,
    #[serde(rename = "T_ref")]
    pub(super) t_ref: Option<f64>,
    /// Pressure that makes the compressibility dimensionless, Pa, where it is not the critical one.
    pub(super) p_reducing: Option<f64>,
}

// The values of Olchowy and Sengers where a correlation states none.
fn amplitude_susceptibility() -> f64 {
    0.0496
}

fn amplitude_dynamic() -> f64 {
    1.03
}

fn exponent_gamma() -> f64 {
    1.239
}

fn exponent_nu() -> f64 {
    0.63
}

fn cutoff() -> f64 {
    2e9
}

fn correlation_length() -> f64 {
    1.94e-10
}

/// The record of a gas.
pub(super) fn record_of(name: &str) -> Option<TransportRecord> {
    serde_json::from_str(line_of(TRANSPORT, "{\"name\":\"", name)?).ok()
}
