//! Viscosity and thermal conductivity of water and steam: IAPWS R12-08 and R15-11.

use std::f64::consts::PI;

use crate::gas::eos::equation::Equation;
use crate::units::math::{acos, atan, exp, ln, pow, powi, sin, sqrt, tan};

const T_STAR: f64 = 647.096;
const RHO_STAR: f64 = 322.0;
const P_STAR: f64 = 22.064e6;

/// Correlation length of both releases: ξ_0, Λ_0, ν and γ.
const XI_0: f64 = 0.13;
const LAMBDA_0: f64 = 0.06;
const NU: f64 = 0.630;
const GAMMA: f64 = 1.239;

/// Reduced temperature of the background of the compressibility.
const T_R: f64 = 1.5;

const H: [[f64; 7]; 6] = [
    [5.200_94e-1, 2.225_31e-1, -2.813_78e-1, 1.619_13e-1, -3.253_72e-2, 0.0, 0.0],
    [8.508_95e-2, 9.991_15e-1, -9.068_51e-1, 2.573_99e-1, 0.0, 0.0, 0.0],
    [-1.083_74, 1.887_97, -7.724_79e-1, 0.0, 0.0, 0.0, 0.0],
    [-2.895_55e-1, 1.266_13, -4.898_37e-1, 0.0, 6.984_52e-2, 0.0, -4.356_73e-3],
    [0.0, 0.0, -2.570_40e-1, 0.0, 0.0, 8.721_02e-3, 0.0],
    [0.0, 1.205_73e-1, 0.0, 0.0, 0.0, 0.0, -5.932_64e-4],
];

const L: [[f64; 6]; 5] = [
    [1.603_973_57, -0.646_013_523, 0.111_443_906, 0.102_997_357, -0.050_412_363_4, 0.006_098_592_58],
    [2.337_718_42, -2.788_437_78, 1.536_161_67, -0.463_045_512, 0.083_282_701_9, -0.007_192_012_45],
    [2.196_505_29, -4.545_807_85, 3.557_772_44, -1.409_449_78, 0.275_418_278, -0.020_593_881_6],
    [-1.210_513_78, 1.608_129_89, -0.621_178_141, 0.071_637_322_4, 0.0, 0.0],
    [-2.720_337_0, 4.575_863_31, -3.183_692_45, 1.116_834_8, -0.192_683_05, 0.012_913_842],
];

fn double_sum<const N: usize>(table: &[[f64; N]], t: f64, d: f64) -> f64 {
    let (x, y) = (1.0 / t - 1.0, d - 1.0);
    table.iter().rev().fold(0.0, |sum, row| sum * x + row.iter().rev().fold(0.0, |sum, one| sum * y + one))
}

/// Correlation length ξ, nm, from the compressibility less its background.
fn correlation_length(equation: &Equation, t_k: f64, rho: f64, r: f64) -> f64 {
    let molar = rho / equation.constants().molar_mass_kg_mol;
    let (t, d) = (t_k / T_STAR, rho / RHO_STAR);
    let compressibility = |t_k: f64| {
        let [_, a1, a2] = equation.isotherm(t_k).terms(molar);
        P_STAR / RHO_STAR / (r * t_k * (1.0 + a1 + a2))
    };
    let excess = d * (compressibility(t_k) - compressibility(T_R * T_STAR) * T_R / t);
    if excess > 0.0 { XI_0 * pow(excess / LAMBDA_0, NU / GAMMA) } else { 0.0 }
}

/// Viscosity, Pa s, with the enhancement near the critical point.
///
/// Equation: IAPWS R12-08, eqs. 10 to 20.
/// Error:    1 % to 3 % in the gas as the release states it; arithmetic checked against the table of steam.
pub(super) fn viscosity(equation: &Equation, t_k: f64, rho: f64) -> f64 {
    let (t, d) = (t_k / T_STAR, rho / RHO_STAR);
    let thin = 100.0 * sqrt(t) / (1.677_52 + (2.204_62 + (0.636_656_4 - 0.241_605 / t) / t) / t);
    let dense = exp(d * double_sum(&H, t, d));
    let xi = correlation_length(equation, t_k, rho, equation.gas_constant_j_kg_k());
    let (c, s) = (xi / 1.9, xi / 1.1);
    let y = if xi < 0.381_701_641_6 {
        0.2 * c * powi(s, 5) * (1.0 - c + c * c - 765.0 / 504.0 * s * s)
    } else {
        let psi = acos(1.0 / sqrt(1.0 + s * s));
        let w = sqrt(((c - 1.0) / (c + 1.0)).abs()) * tan(0.5 * psi);
        let l = if c > 1.0 { ln((1.0 + w) / (1.0 - w)) } else { 2.0 * atan(w.abs()) };
        sin(3.0 * psi) / 12.0 - sin(2.0 * psi) / (4.0 * c) + (1.0 - 1.25 * c * c) * sin(psi) / (c * c)
            - ((1.0 - 1.5 * c * c) * psi - pow((c * c - 1.0).abs(), 1.5) * l) / powi(c, 3)
    };
    thin * dense * exp(0.068 * y) * 1e-6
}

/// Thermal conductivity, W/(m K), with the enhancement near the critical point.
///
/// Equation: IAPWS R15-11, eqs. 15 to 24.
/// Error:    1 % to 3 % in the gas as the release states it; arithmetic checked against the table of steam.
pub(super) fn conductivity(equation: &Equation, t_k: f64, rho: f64) -> Option<f64> {
    let (t, d) = (t_k / T_STAR, rho / RHO_STAR);
    let thin = sqrt(t) / (2.443_221e-3 + (1.323_095e-2 + (6.770_357e-3 + (-3.454_586e-3 + 4.096_266e-4 / t) / t) / t) / t);
    let dense = exp(d * double_sum(&L, t, d));
    let r = 461.518_05;
    let y = correlation_length(equation, t_k, rho, r) / 0.4;
    let z = if y < 1.2e-7 {
        0.0
    } else {
        let state = equation.properties(t_k, rho);
        let inverse = 1.0 / state.k.value;
        let omega = (1.0 - inverse) * atan(y) + inverse * y - (1.0 - exp(-1.0 / (1.0 / y + y * y / (3.0 * d * d))));
        2.0 / (PI * y) * omega * state.cp.value / r
    };
    let near_critical = 177.8514 * d * t / (viscosity(equation, t_k, rho) * 1e6) * z;
    let out = (thin * dense + near_critical) * 1e-3;
    out.is_finite().then_some(out)
}
