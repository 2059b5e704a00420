//! The terms of one reference equation as they ship: one line of JSON a gas, in the form that the public parameter files have.

use serde::Deserialize;

/// Terms of all reference equations, one line each; origin and notices in `data/EQUATIONS.md`.
pub(crate) const EQUATIONS: &str = include_str!("../data/equations.jsonl");

/// One equation: reducing point, ideal part, residual part.
#[derive(Debug, Deserialize)]
pub(crate) struct EquationRecord {
    /// Reducing temperature, K.
    pub(crate) tc: f64,
    /// Reducing density, mol/m³.
    pub(crate) rhoc: f64,
    /// Terms of the ideal part of the reduced Helmholtz energy.
    pub(crate) ideal_gas: Vec<IdealTerm>,
    /// Terms of its residual part.
    pub(crate) residual: Vec<ResidualTerm>,
}

/// A term of the ideal part.
#[derive(Debug, Deserialize)]
#[serde(tag = "type")]
pub(crate) enum IdealTerm {
    /// ln δ + a1 + a2 τ. The constants are arbitrary and are left aside: the zero of h and s is set anew.
    #[serde(rename = "IdealGasHelmholtzLead")]
    Lead {},
    /// An offset of h and s, left aside for the same reason.
    #[serde(rename = "IdealGasHelmholtzEnthalpyEntropyOffset")]
    Offset {},
    /// a ln τ.
    #[serde(rename = "IdealGasHelmholtzLogTau")]
    LogTau { a: f64 },
    /// Σ n τ^t.
    #[serde(rename = "IdealGasHelmholtzPower")]
    Power { n: Vec<f64>, t: Vec<f64> },
    /// Σ n ln(1 - exp(-t τ)).
    #[serde(rename = "IdealGasHelmholtzPlanckEinstein")]
    PlanckEinstein { n: Vec<f64>, t: Vec<f64> },
    /// The same with temperatures v and their own reducing temperature.
    #[serde(rename = "IdealGasHelmholtzPlanckEinsteinFunctionT")]
    PlanckEinsteinFunctionT {
        n: Vec<f64>,
        v: Vec<f64>,
        #[serde(rename = "Tcrit")]
        t_crit: f64,
    },
    /// Σ n ln(c + d exp(t τ)).
    #[serde(rename = "IdealGasHelmholtzPlanckEinsteinGeneralized")]
    PlanckEinsteinGeneralized { n: Vec<f64>, t: Vec<f64>, c: Vec<f64>, d: Vec<f64> },
    /// A constant part of cp/R.
    #[serde(rename = "IdealGasHelmholtzCP0Constant")]
    HeatCapacityConstant {
        #[serde(rename = "cp_over_R")]
        cp_over_r: f64,
    },
    /// Σ c T^t as a part of cp/R.
    #[serde(rename = "IdealGasHelmholtzCP0PolyT")]
    HeatCapacityPowers { c: Vec<f64>, t: Vec<f64> },
    /// Aly and Lee's form of cp/R, five coefficients.
    #[serde(rename = "IdealGasHelmholtzCP0AlyLee")]
    HeatCapacityAlyLee { c: Vec<f64> },
}

/// A family of terms of the residual part, as arrays of equal length.
#[derive(Debug, Deserialize)]
#[serde(tag = "type")]
pub(crate) enum ResidualTerm {
    /// n δ^d τ^t exp(-δ^l), without the exponential where l is 0.
    #[serde(rename = "ResidualHelmholtzPower")]
    Power { n: Vec<f64>, t: Vec<f64>, d: Vec<u8>, l: Vec<u8> },
    /// n δ^d τ^t exp(-g δ^l).
    #[serde(rename = "ResidualHelmholtzExponential")]
    Exponential { n: Vec<f64>, t: Vec<f64>, d: Vec<u8>, g: Vec<f64>, l: Vec<u8> },
    /// n δ^d τ^t exp(-η (δ-ε)² - β (τ-γ)²).
    #[serde(rename = "ResidualHelmholtzGaussian")]
    Gaussian { n: Vec<f64>, t: Vec<f64>, d: Vec<u8>, eta: Vec<f64>, epsilon: Vec<f64>, beta: Vec<f64>, gamma: Vec<f64> },
    /// n δ^d τ^t exp(-δ^l - τ^m), each without its exponential where the exponent is 0.
    #[serde(rename = "ResidualHelmholtzLemmon2005")]
    Lemmon { n: Vec<f64>, t: Vec<f64>, d: Vec<u8>, l: Vec<u8>, m: Vec<f64> },
    /// n δ^d τ^t exp(η (δ-ε)² + 1/(β (τ-γ)² + b)), with η below zero.
    #[serde(rename = "ResidualHelmholtzGaoB")]
    Gao { n: Vec<f64>, t: Vec<f64>, d: Vec<u8>, eta: Vec<f64>, epsilon: Vec<f64>, beta: Vec<f64>, gamma: Vec<f64>, b: Vec<f64> },
    /// n δ^d τ^t exp(-gd δ^ld - gt τ^lt).
    #[serde(rename = "ResidualHelmholtzDoubleExponential")]
    DoubleExponential { n: Vec<f64>, t: Vec<f64>, d: Vec<u8>, gd: Vec<f64>, ld: Vec<u8>, gt: Vec<f64>, lt: Vec<f64> },
    /// n Δ^b δ ψ, see [`super::non_analytic`].
    #[serde(rename = "ResidualHelmholtzNonAnalytic")]
    #[allow(non_snake_case)]
    NonAnalytic { n: Vec<f64>, a: Vec<f64>, b: Vec<f64>, beta: Vec<f64>, A: Vec<f64>, B: Vec<f64>, C: Vec<f64>, D: Vec<f64> },
}

/// The line of a gas in a table of lines, without reading the others.
pub(crate) fn line_of(table: &'static str, prefix: &str, name: &str) -> Option<&'static str> {
    table.lines().find(|line| line.strip_prefix(prefix).and_then(|rest| rest.strip_prefix(name)).is_some_and(|rest| rest.starts_with('"')))
}

/// The record of a gas; `None` where there is none or it cannot be read (a test reads all).
pub(crate) fn record_of(name: &str) -> Option<EquationRecord> {
    serde_json::from_str(line_of(EQUATIONS, "{\"identifier\":{\"name\":\"", name)?).ok()
}
