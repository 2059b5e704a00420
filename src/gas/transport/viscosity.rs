//! Viscosity: thin gas, first dependence on density, dense gas.

use super::correlation::Transport;
use super::published;
use super::record::{Batschinski, Chung, Dense, EntropyScaling, FirstDensity, Friction, ThinGas, ViscosityRecord};
use crate::units::constants::AVOGADRO_CONSTANT;
use crate::units::math::{exp, ln, pow, powi, sin, sqrt};

/// Σ a x^t.
pub(super) fn powers(a: &[f64], t: &[f64], x: f64) -> f64 {
    a.iter().zip(t).map(|(a, t)| a * pow(x, *t)).sum()
}

/// Viscosity, Pa s, at a temperature, K, and a density, kg/m³.
///
/// Equation: η = η_0(T) (1 + B_η(T) ρ) + Δη(T, ρ), or the form of the gas itself.
/// Source:   the record, see `data/transport.csv`.
/// Error:    arithmetic checked against the tables of states.
pub(super) fn viscosity(of: &Transport, record: &ViscosityRecord, t_k: f64, rho: f64) -> Option<f64> {
    if let Some(name) = &record.own {
        return published::own_viscosity(name, of, t_k, rho);
    }
    let molar = rho / of.equation.constants().molar_mass_kg_mol;
    if let Some(chung) = &record.chung {
        return Some(by_chung(chung, t_k, molar));
    }
    let thin = thin_gas(of, record, t_k)?;
    if let Some(scaling) = &record.entropy {
        return Some(thin * by_residual_entropy(of, scaling, t_k, molar));
    }
    let first = match &record.initial_density {
        None => 0.0,
        Some(FirstDensity::RainwaterFriend { b, t }) => {
            let star = powers(b, t, t_k / record.epsilon_over_k);
            thin * AVOGADRO_CONSTANT * powi(record.sigma_eta, 3) * star * molar
        }
        Some(FirstDensity::Empirical { t_reducing, rhomolar_reducing, n, d, t }) => {
            let (tau, delta) = (t_reducing / t_k, molar / rhomolar_reducing);
            (0..n.len()).map(|i| n[i] * pow(delta, d[i]) * pow(tau, t[i])).sum()
        }
    };
    let dense = match &record.higher_order {
        None => 0.0,
        Some(Dense::Batschinski(terms)) => batschinski(terms, t_k, molar),
        Some(Dense::Friction(terms)) => friction(of, terms, t_k, rho),
        Some(Dense::Own { name }) => published::dense_viscosity(name, t_k, rho, molar)?,
    };
    Some(thin + first + dense)
}

/// Viscosity of the thin gas, Pa s.
pub(super) fn thin_gas(of: &Transport, record: &ViscosityRecord, t_k: f64) -> Option<f64> {
    let sigma_nm = record.sigma_eta * 1e9;
    let star = t_k / record.epsilon_over_k;
    Some(match record.dilute.as_ref()? {
        ThinGas::CollisionIntegral { c, a, t, molar_mass } => {
            let integral = exp(powers(a, t, ln(star)));
            c * sqrt(molar_mass * 1000.0 * t_k) / (sigma_nm * sigma_nm * integral)
        }
        ThinGas::CollisionIntegralPowers { c, t_reducing, a, t } => c * sqrt(t_k) / powers(a, t, t_k / t_reducing),
        ThinGas::Powers { a, t } => powers(a, t, t_k),
        ThinGas::ReducedPowers { t_reducing, a, t } => powers(a, t, t_k / t_reducing),
        ThinGas::KineticTheory {} => {
            let mass = of.equation.constants().molar_mass_kg_mol * 1000.0;
            26.692e-9 * sqrt(mass * t_k) / (sigma_nm * sigma_nm * neufeld(star))
        }
        ThinGas::Own { name } => published::thin_viscosity(name, t_k)?,
    })
}

/// Collision integral (2,2) of Lennard-Jones molecules: Neufeld, Janzen, Aziz 1972, J. Chem. Phys. 57: 1100-1102.
fn neufeld(star: f64) -> f64 {
    1.161_45 * pow(star, -0.148_74) + 0.524_87 * exp(-0.773_20 * star) + 2.161_78 * exp(-2.437_87 * star)
}

fn batschinski(terms: &Batschinski, t_k: f64, molar: f64) -> f64 {
    let (delta, tau) = (molar / terms.rhomolar_reduce, terms.t_reduce / t_k);
    let mut sum = 0.0;
    for i in 0..terms.a.len() {
        let damping = if terms.gamma[i] == 0.0 { 1.0 } else { exp(terms.gamma[i] * pow(delta, terms.l[i])) };
        sum += terms.a[i] * pow(delta, terms.d1[i]) * pow(tau, terms.t1[i]) * damping;
    }
    let free: f64 = (0..terms.f.len()).map(|i| terms.f[i] * pow(delta, terms.d2[i]) * pow(tau, terms.t2[i])).sum();
    let close = powers(&terms.g, &terms.h, tau) / powers(&terms.p, &terms.q, tau);
    sum + if free == 0.0 { 0.0 } else { free * (1.0 / (close - delta) - 1.0 / close) }
}

fn friction(of: &Transport, f: &Friction, t_k: f64, rho: f64) -> f64 {
    let tau = f.T_reduce / t_k;
    let (psi1, psi2) = (exp(tau) - f.c1, exp(tau * tau) - f.c2);
    let k = |a: &[f64; 3], n: i32| (a[0] + a[1] * psi1 + a[2] * psi2) * powi(tau, n);
    let optional = |a: &Option<[f64; 3]>, n: i32| a.as_ref().map_or(0.0, |a| k(a, n));
    let state = of.equation.properties(t_k, rho);
    // Pressures in bar: repulsive, attractive, ideal.
    let p = state.p.value / 1e5;
    let repulsive = t_k * state.p.by_t / 1e5;
    let attractive = p - repulsive;
    let ideal = rho * of.equation.gas_constant_j_kg_k() * t_k / 1e5;
    let excess = repulsive - ideal;
    k(&f.Aa, f.Na) * attractive
        + k(&f.Ar, f.Nr) * excess
        + k(&f.Ai, 1) * ideal
        + k(&f.Aaa, f.Naa) * attractive * attractive
        + optional(&f.Adrdr, f.Nrr) * excess * excess
        + optional(&f.Arr, f.Nrr) * repulsive * repulsive
        + optional(&f.Aii, f.Nii) * ideal * ideal
        + optional(&f.Arrr, f.Nrrr) * powi(repulsive, 3)
        + optional(&f.Aaaa, f.Naaa) * powi(attractive, 3)
}

/// Bell 2016: a scaling of the viscosity over that of the thin gas by the residual entropy.
fn by_residual_entropy(of: &Transport, scaling: &EntropyScaling, t_k: f64, molar: f64) -> f64 {
    let c = of.equation.constants();
    let a = of.equation.residual.values(of.equation.t_reducing_k / t_k, molar / of.equation.rho_reducing);
    let x = molar * c.r_j_mol_k * (a.a01 - a.a00) / scaling.rhosr_critical;
    let liquid = 1.0 / (1.0 + exp(-100.0 * (x - 2.0)));
    let cubic = |c: &[f64; 4]| c[0] + x * (c[1] + x * (c[2] + x * c[3]));
    let reference = exp(liquid * cubic(&scaling.c_liq) + (1.0 - liquid) * cubic(&scaling.c_vap));
    1.0 + scaling.c * (reference - 1.0)
}

/// Chung et al. 1988, Ind. Eng. Chem. Res. 27: 671-679.
fn by_chung(gas: &Chung, t_k: f64, molar: f64) -> f64 {
    const A: [[f64; 3]; 10] = [
        [6.324_02, 50.411_90, -51.680_10],
        [0.121_02e-2, -0.115_36e-2, -0.625_71e-2],
        [5.283_46, 254.209, -168.481],
        [6.622_63, 38.095_7, -8.464_14],
        [19.745_4, 7.630_34, -14.354_4],
        [-1.899_92, -12.536_7, 4.985_29],
        [24.274_5, 3.449_45, -11.291_3],
        [0.797_16, 1.117_64, 0.123_48e-1],
        [-0.238_16, 0.676_95e-1, -0.816_3],
        [0.686_29e-1, 0.347_93, 0.592_56],
    ];
    let volume = 1e6 / gas.rhomolar_critical;
    let mass = gas.molar_mass * 1000.0;
    let dipole = powi(131.3 * gas.dipole_moment_debye / sqrt(volume * gas.t_critical), 4);
    let a = A.map(|[constant, by_omega, by_dipole]| constant + by_omega * gas.acentric + by_dipole * dipole);
    let shape = 1.0 - 0.2756 * gas.acentric + 0.059_035 * dipole;
    let star = t_k / (gas.t_critical / 1.2593);
    let integral = neufeld(star) - 6.435e-4 * pow(star, 0.148_74) * sin(18.0323 * pow(star, -0.7683) - 7.273_71);
    let size = pow(volume, 2.0 / 3.0);
    let thin = 4.0785e-5 * sqrt(mass * t_k) / (size * integral) * shape;
    let y = molar * 1e-6 * volume / 6.0;
    let g1 = (1.0 - 0.5 * y) / powi(1.0 - y, 3);
    let g2 = (a[0] * (1.0 - exp(-a[3] * y)) / y + a[1] * g1 * exp(a[4] * y) + a[2] * g1) / (a[0] * a[3] + a[1] + a[2]);
    let kinetic = thin * (1.0 / g2 + a[5] * y);
    let potential = 36.344e-6 * sqrt(mass * gas.t_critical) / size * a[6] * y * y * g2 * exp(a[7] + a[8] / star + a[9] / (star * star));
    (kinetic + potential) / 10.0
}
