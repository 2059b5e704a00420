//! Forms of correlations that belong to one gas alone, from their publications.

use std::f64::consts::PI;

use super::correlation::Transport;
use super::{helium, water};
use crate::units::math::{exp, ln, pow, powi, sqrt};

/// Viscosity, Pa s, by a form of the gas itself.
pub(super) fn own_viscosity(name: &str, of: &Transport, t_k: f64, rho: f64) -> Option<f64> {
    match name {
        "water" => Some(water::viscosity(of.equation, t_k, rho)),
        "helium" => Some(helium::viscosity(t_k, rho)),
        "methanol" => Some(methanol(t_k, rho)),
        "R23" => Some(r23_viscosity(t_k, rho / of.equation.constants().molar_mass_kg_mol)),
        _ => None,
    }
}

/// Thermal conductivity, W/(m K), by a form of the gas itself.
pub(super) fn own_conductivity(name: &str, of: &Transport, t_k: f64, rho: f64) -> Option<f64> {
    match name {
        "water" => water::conductivity(of.equation, t_k, rho),
        "helium" => helium::conductivity(of.equation, t_k, rho),
        "methane" => methane_conductivity(of, t_k, rho),
        "R23" => Some(r23_conductivity(t_k, rho / of.equation.constants().molar_mass_kg_mol)),
        _ => None,
    }
}

/// Viscosity of the thin gas, Pa s.
pub(super) fn thin_viscosity(name: &str, t_k: f64) -> Option<f64> {
    match name {
        "ethane" => {
            // Friend, Ingham, Ely 1991.
            let star = t_k / 245.0;
            Some(12.0085 * sqrt(star) * friend_integral(star) / 1e6)
        }
        "cyclohexane" => {
            // Tariq et al. 2014.
            let section = exp(-1.5093 + 364.87 / t_k - 39_537.0 / (t_k * t_k));
            Some(0.195_92 * sqrt(t_k) / section / 1e6)
        }
        "carbon dioxide" => {
            // Laesecke, Muzny 2017, eq. 4.
            let third = pow(t_k, 1.0 / 3.0);
            let below = 1_749.354_893_188_35 - 369.069_300_007_128 * sqrt(third)
                + 5_423_856.348_876_91 * exp(-2.212_838_521_683_56 * third)
                + (-269_503.247_933_569 + 73_145.021_531_826 * third) / exp(third)
                + 5.343_686_495_092_78 * sqrt(t_k);
            Some(0.001_005_5 * sqrt(t_k) / below)
        }
        _ => None,
    }
}

/// 1/Ω of Friend, Ely and Ingham 1989 and 1991.
fn friend_integral(star: f64) -> f64 {
    const C: [f64; 9] = [
        -3.032_813_828_1,
        16.918_880_086,
        -37.189_364_917,
        41.288_861_858,
        -24.615_921_140,
        8.948_843_095_9,
        -1.873_924_504_2,
        0.209_661_013_90,
        -9.657_043_707_4e-3,
    ];
    let third = pow(star, 1.0 / 3.0);
    C.iter().rev().fold(0.0, |sum, c| sum * third + c) / star
}

/// Viscosity of the dense gas above the first dependence on density, Pa s.
pub(super) fn dense_viscosity(name: &str, t_k: f64, rho: f64, molar: f64) -> Option<f64> {
    let two_thirds = |x: f64| pow(x, 2.0 / 3.0);
    match name {
        "hydrogen" => {
            // Muzny, Huber, Kazakov 2013.
            let (t, d) = (t_k / 33.145, rho * 0.011);
            let exponent =
                4.563_340_68e-2 * t + 2.327_978_68e-1 / t + 9.583_261_20e-1 * d * d / (1.279_411_89e-1 + t) + 3.635_765_95e-1 * powi(d, 6);
            Some(6.434_496_73e-6 * d * d * exp(exponent))
        }
        "benzene" => {
            // Avgeri et al. 2014.
            let (t, d) = (t_k / 562.02, rho / 304.792);
            let sum = -9.989_45 * d * d
                + 86.062_60 * d / (2.748_72 + 1.111_30 * t - d)
                + (-134.133 * d - 352.473 * d * d) / (6.609_89 + 88.4174 * d * d);
            Some(1e-6 * two_thirds(d) * sqrt(t) * sum)
        }
        "n-hexane" => {
            // Michailidou et al. 2013.
            let (t, d) = (t_k / 507.82, rho / 233.182);
            let sum = 2.534_023_35 / t - 9.724_061_002 / (0.469_437_316 + t + 158.557_163_1 * d * d)
                + 72.429_168_56 * (1.0 + d) / (10.607_512_53 + 8.628_373_915 * t - 6.613_464_41 * d + d * d - 2.212_724_566 * d * t);
            Some(1e-6 * two_thirds(d) * sqrt(t) * sum)
        }
        "n-heptane" => {
            // Michailidou et al. 2014.
            let (t, d) = (t_k / 540.13, rho / 232.0);
            let sum = 22.15 * d - 15.008_70 * d * d
                + 3.717_91 * powi(d, 3)
                + 77.728_18 * d / (9.734_49 + 9.519 * t - 6.340_76 * d + d * d - 2.519_09 * d * t);
            Some(1e-6 * two_thirds(d) * sqrt(t) * sum)
        }
        "carbon dioxide" => {
            // Laesecke, Muzny 2017, eqs. 8 and 9.
            const C1: f64 = 0.360_603_235_428_487;
            const C2: f64 = 0.121_550_806_591_497;
            const GAMMA: f64 = 8.062_827_374_812_77;
            let (t_triple, rho_triple, mass, r) = (216.592, 1178.53, 0.044_009_8, 8.314_51);
            let (t, d) = (t_k / t_triple, rho / rho_triple);
            let scale = two_thirds(rho_triple) * sqrt(r * t_triple) / (pow(mass, 1.0 / 6.0) * 84_446_887.435_799_45);
            Some(scale * (C1 * t * powi(d, 3) + (d * d + pow(d, GAMMA)) / (t - C2)))
        }
        "ethane" => {
            const G: [f64; 11] = [
                0.471_770_03,
                -0.239_503_11,
                0.398_083_01,
                -0.273_433_35,
                0.351_922_60,
                -0.211_013_08,
                -0.004_785_79,
                0.073_781_29,
                -0.030_435_255,
                -0.304_352_86,
                0.001_215_675,
            ];
            Some(15.977 * friend_dense(&G, 305.33 / t_k, molar / 6870.0) / 1e6)
        }
        _ => None,
    }
}

/// Dense part of Friend, Ely and Ingham 1989 and 1991.
fn friend_dense(g: &[f64; 11], tau: f64, delta: f64) -> f64 {
    const R: [i32; 11] = [1, 1, 2, 2, 2, 3, 3, 4, 4, 1, 1];
    const S: [f64; 11] = [0.0, 1.0, 0.0, 1.0, 1.5, 0.0, 2.0, 0.0, 1.0, 0.0, 1.0];
    let term = |i: usize| g[i] * powi(delta, R[i]) * pow(tau, S[i]);
    (0..9).map(term).sum::<f64>() / (1.0 + term(9) + term(10))
}

/// Conductivity of the thin gas, W/(m K).
pub(super) fn thin_conductivity(name: &str, of: &Transport, t_k: f64) -> Option<f64> {
    match name {
        "ethane" => {
            // Friend, Ingham, Ely 1991.
            let internal = 1.710_414_7 - 0.693_648_2 / (t_k / 245.0);
            Some(0.276_505e-3 * of.thin_viscosity(t_k)? * 1e6 * (3.75 - internal * (ideal_curvature(of, t_k) + 1.5)))
        }
        "carbon dioxide" => {
            // Huber et al. 2016, eq. 3.
            let tau = of.equation.t_reducing_k / t_k;
            let below = 0.015_187_430_7 + tau * (0.028_067_404_0 + tau * (0.022_856_419_0 - 0.007_416_242_10 * tau));
            Some(1e-3 / (sqrt(tau) * below))
        }
        _ => None,
    }
}

/// τ² times the second derivative of the ideal part by τ.
fn ideal_curvature(of: &Transport, t_k: f64) -> f64 {
    let ideal = of.equation.ideal.values(t_k);
    ideal.e2 - ideal.e1
}

/// Enhancement near the critical point, W/(m K).
pub(super) fn enhancement(name: &str, t_k: f64, rho: f64) -> Option<f64> {
    (name == "ammonia").then(|| {
        // Tufeu et al. 1984.
        let (t_c, rho_c, k_b) = (405.4, 235.0, 1.380_650_4e-23);
        // At the critical temperature itself the sum diverges: the nearest value it is defined at stands in.
        let t = ((t_k - t_c) / t_c).abs().max(1e-6);
        let viscosity = (2.60 + 1.6 * t) * 1e-5;
        let slope = (2.18 - 0.12 / exp(17.8 * t)) * 1e5;
        let x = 0.61 * rho_c + 16.5 * ln(t);
        let length = 1.34e-10 * pow(t, -0.63) * (1.0 + sqrt(t));
        let isochore =
            1.2 * k_b * t_k * t_k / (6.0 * PI * viscosity * length) * slope * slope * 0.423e-8 * pow(t, -1.24) * (1.0 + sqrt(t) / 0.7);
        let damped = isochore * exp(-36.0 * t * t);
        let away = |rho: f64| x * x / (x * x + powi(rho - 0.96 * rho_c, 2));
        if rho < 0.6 * rho_c { damped * away(0.6 * rho_c) * powi(rho / (0.6 * rho_c), 2) } else { damped * away(rho) }
    })
}

/// Friend, Ely, Ingham 1989.
fn methane_conductivity(of: &Transport, t_k: f64, rho: f64) -> Option<f64> {
    const G: [f64; 11] = [
        0.412_501_37,
        -0.143_909_12,
        0.103_669_93,
        0.402_874_64,
        -0.249_035_24,
        -0.129_531_31,
        0.065_757_76,
        0.025_666_28,
        -0.037_165_26,
        -0.387_983_41,
        0.035_338_15,
    ];
    let equation = of.equation;
    let c = equation.constants();
    let molar = rho / c.molar_mass_kg_mol;
    let (delta, tau, star) = (molar / 10_139.0, 190.55 / t_k, t_k / 174.0);
    let thin = 10.50 * sqrt(star) * friend_integral(star);
    let viscosity = thin + 12.149 * friend_dense(&G, tau, delta);
    let internal = 1.458_850 - 0.437_716_2 / star;
    let dilute = 0.518_28 * thin * (3.75 - internal * (ideal_curvature(of, t_k) + 1.5));
    const TERMS: [(i32, f64, f64); 6] = [
        (1, 0.0, 2.414_920_7),
        (3, 0.0, 0.551_663_31),
        (4, 0.0, -0.528_377_34),
        (4, 1.0, 0.073_809_553),
        (5, 0.0, 0.244_655_07),
        (5, 1.0, -0.047_613_626),
    ];
    let sum: f64 = TERMS.iter().map(|(r, s, j)| j * powi(delta, *r) * pow(tau, *s)).sum();
    let saturated = if t_k < c.t_c_k && molar < c.rho_c_mol_m3 { equation.start.rho_vapour(t_k) / c.rho_c_mol_m3 } else { 1.0 };
    let dense = 6.296_38 * (sum + 1.555_461_2 * delta * delta / saturated);
    let (x, y) = (1.0 - 1.0 / tau, 1.0 - delta);
    let f = exp(-2.646 * sqrt(x.abs()) - 2.678 * y * y + 0.637 * y);
    let a = equation.residual.values(equation.t_reducing_k / t_k, molar / equation.rho_reducing);
    let q = 1.0 + a.a10 + a.a20;
    let susceptibility = if x.abs() < 0.03 && y.abs() < 1e-16 {
        0.0801 * pow(x.abs(), -1.190)
    } else if x.abs() < 0.03 && y.abs() < 0.03 {
        let near = pow(y.abs(), -1.0 / 0.355);
        let omega = -1.401 * x * near;
        let inside = 1.0 - 6.098 * x * near;
        let theta = if inside > 0.0 { 1.0 + 0.287 * pow(inside, 0.71) } else { 1.0 };
        0.1133 * pow(y.abs(), -3.352) * pow(theta, 0.732) / (theta + omega * (theta + 0.535))
    } else {
        0.286_31 * delta * tau / q
    };
    let g = 1.0 + a.a10 - a.a11;
    let near_critical = 91.855 / (viscosity * tau * tau) * g * g * pow(susceptibility, 0.4681) * f;
    let out = (dilute + dense + near_critical) * 1e-3;
    out.is_finite().then_some(out)
}

/// Xiang, Laesecke, Huber 2006.
fn methanol(t_k: f64, rho: f64) -> f64 {
    let molar = rho / 0.032_042_16;
    let (sigma, n_a) = (0.3408e-9, 6.022_141_29e23);
    let star = t_k / 577.87;
    let (d, t) = (rho / 273.0, t_k / 512.6);
    const B: [f64; 9] =
        [-19.572_881, 219.739_99, -1_015.322_6, 2_471.012_51, -3_375.171_7, 2_491.659_7, -787.260_86, 14.085_455, -0.346_641_58];
    const T: [f64; 9] = [0.0, -0.25, -0.5, -0.75, -1.0, -1.25, -1.5, -2.5, -5.5];
    let volume = n_a * powi(sigma, 3);
    let b = volume * super::viscosity::powers(&B, &T, star);
    let c = volume * volume * 1.862_220_85e-3 * powi(star, 3) * exp(9.990_338 / sqrt(star));
    let gas = 1.0 + b * molar + c * molar * molar;
    let lennard_jones = 1.161_45 * pow(star, -0.148_74) + 0.524_87 * exp(-0.773_20 * star) + 2.161_78 * exp(-2.437_87 * star);
    let polar = 0.102_25 * pow(star, -0.973_46) + 0.106_57 * exp(-0.345_28 * star) - 0.445_57 * exp(-2.580_55 * star);
    let stockmayer = lennard_jones * (1.0 + powi(0.4575, 2) / (1.0 + 0.959_76e-3 * powi(0.4575, 6)) * polar);
    let thin = 2.669_57e-26 * sqrt(32.042_16 * t_k) / (sigma * sigma * stockmayer);
    const D: [f64; 7] = [-1.181_909, 0.503_103_0, -0.626_846_1, 0.516_931_2, -0.235_134_9, 5.398_023_5e-2, -4.906_961_7e-3];
    const E: [f64; 9] =
        [4.018_368, -4.239_180, 2.245_110, -0.575_069_8, 2.302_102_6e-2, 2.569_677_5e-2, -6.837_274_9e-3, 7.270_718_9e-4, -2.925_571_1e-5];
    let diameter: f64 = D.iter().rev().fold(0.0, |sum, d| sum / t + d) + d * E.iter().rev().fold(0.0, |sum, e| sum * d + e);
    let hard = 2.0 * PI * n_a * powi(diameter * 0.719_342_2e-9, 3) / 3.0;
    let zeta = hard * molar / 4.0;
    let g = (1.0 - 0.5 * zeta) / powi(1.0 - zeta, 3);
    let dense = 1.0 / g + 0.8 * hard * molar + 0.761 * g * powi(hard * molar, 2);
    let share = 1.0 / (1.0 + exp(5.0 * (d - 1.0)));
    thin * (share * gas + (1.0 - share) * dense)
}

/// 4/((e^x + e^-x)(e^y + e^-y)), the bell of Shan et al. about the critical point of R23.
fn r23_bell(t_k: f64, molar_l: f64) -> f64 {
    let (x, y) = (molar_l - 7.5114, t_k - 299.2793);
    4.0 / ((exp(x) + exp(-x)) * (exp(y) + exp(-y)))
}

/// Shan, Penoncello, Jacobsen 2000.
fn r23_viscosity(t_k: f64, molar: f64) -> f64 {
    const A: [f64; 5] = [0.442_572_8, -0.513_840_3, 0.154_756_6, -0.028_218_44, 0.001_578_286];
    let l = ln(t_k / 243.91);
    let integral = exp(A.iter().rev().fold(0.0, |sum, a| sum * l + a));
    let thin = 1.25 * 0.021_357 * sqrt(70.014 * t_k) / (0.4278 * 0.4278 * integral);
    let (d, rho_l) = (molar / 1000.0, 32.174);
    let liquid = 0.1832 * rho_l * rho_l / (rho_l - d) * sqrt(t_k) * exp(d / (rho_l - d) * 771.23 / (8.314_51 * t_k));
    (pow((rho_l - d) / rho_l, 1.3163) * thin + pow(d / rho_l, 1.3163) * liquid + 3.967 * r23_bell(t_k, d)) / 1e6
}

/// Shan, Penoncello, Jacobsen 2000.
fn r23_conductivity(t_k: f64, molar: f64) -> f64 {
    let (d, rho_l) = (molar / 1000.0, 68.345);
    let thin = -2.5370 + 0.053_66 * t_k;
    let liquid = 0.149_14 * rho_l * rho_l / (rho_l - d) * sqrt(t_k) * exp(d / (rho_l - d) * 2508.58 / (8.314_51 * t_k));
    (pow((rho_l - d) / rho_l, 0.942_15) * thin + pow(d / rho_l, 0.942_15) * liquid + 25.0 * r23_bell(t_k, d)) / 1e3
}
