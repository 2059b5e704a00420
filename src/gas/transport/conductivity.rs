//! Thermal conductivity: thin gas, dense gas, enhancement near the critical point.

use std::f64::consts::PI;

use super::correlation::Transport;
use super::published;
use super::record::{ConductivityRecord, DenseConductivity, Enhancement, OlchowySengers, ThinConductivity};
use super::viscosity::powers;
use crate::units::math::{atan, exp, pow};

/// The Boltzmann constant that the correlations were fitted with, J/K.
const BOLTZMANN: f64 = 1.380_648_8e-23;

/// Thermal conductivity, W/(m K), at a temperature, K, and a density, kg/m³.
///
/// Equation: λ = λ_0(T) + Δλ(T, ρ) + Δλ_c(T, ρ), or the form of the gas itself.
/// Source:   the record, see `data/transport.csv`; Δλ_c: Olchowy, Sengers 1989, Int. J. Thermophys. 10: 417-426, simplified.
/// Error:    arithmetic checked against the tables of states.
pub(super) fn conductivity(of: &Transport, record: &ConductivityRecord, t_k: f64, rho: f64) -> Option<f64> {
    if let Some(name) = &record.own {
        return published::own_conductivity(name, of, t_k, rho);
    }
    let (tau, delta) = (of.equation.t_reducing_k / t_k, rho / of.equation.constants().molar_mass_kg_mol / of.equation.rho_reducing);
    let thin = match record.dilute.as_ref()? {
        ThinConductivity::Ratio { t_reducing, a, n, b, m } => powers(a, n, t_k / t_reducing) / powers(b, m, t_k / t_reducing),
        ThinConductivity::Viscosity { a, t } => {
            let viscosity = of.thin_viscosity(t_k)? * 1e6;
            a[0] * viscosity + (1..a.len()).map(|i| a[i] * pow(tau, t[i])).sum::<f64>()
        }
        ThinConductivity::Own { name } => published::thin_conductivity(name, of, t_k)?,
    };
    let dense = match record.residual.as_ref()? {
        DenseConductivity::Powers { t_reducing, rhomass_reducing, b, t, d } => {
            let (tau, delta) = (t_reducing / t_k, rho / rhomass_reducing);
            (0..b.len()).map(|i| b[i] * pow(tau, t[i]) * pow(delta, d[i])).sum::<f64>()
        }
        DenseConductivity::DampedPowers { a, t, d, gamma, l } => {
            let damping = |i: usize| if gamma[i] == 0.0 { 1.0 } else { exp(-gamma[i] * pow(delta, l[i])) };
            (0..a.len()).map(|i| a[i] * pow(tau, t[i]) * pow(delta, d[i]) * damping(i)).sum::<f64>()
        }
    };
    let near_critical = match &record.critical {
        None => 0.0,
        Some(Enhancement::OlchowySengers(terms)) => olchowy_sengers(of, terms, t_k, rho)?,
        Some(Enhancement::Own { name }) => published::enhancement(name, t_k, rho)?,
    };
    Some(thin + dense + near_critical)
}

fn olchowy_sengers(of: &Transport, terms: &OlchowySengers, t_k: f64, rho: f64) -> Option<f64> {
    let c = of.equation.constants();
    let molar = rho / c.molar_mass_kg_mol;
    let delta = molar / of.equation.rho_reducing;
    let t_ref = terms.t_ref.unwrap_or(1.5 * of.equation.t_reducing_k);
    let state = of.equation.properties(t_k, rho);
    let dp_drho = state.p.by_rho * c.molar_mass_kg_mol;
    let (_, dp_drho_ref) = of.equation.isotherm(t_ref).pressure(molar);
    let scale = terms.p_reducing.unwrap_or(c.p_c_pa) / (of.equation.rho_reducing * of.equation.rho_reducing) * molar;
    let excess = scale / dp_drho - scale / dp_drho_ref * t_ref / t_k;
    if excess.is_nan() || excess <= 10.0 * f64::EPSILON {
        return Some(0.0);
    }
    let length = terms.zeta0 * pow(excess / terms.amplitude, terms.nu / terms.gamma);
    let y = terms.q_d * length;
    let (cp, cv) = (state.cp.value, state.cv.value);
    let viscosity = of.plain_viscosity(t_k, rho)?;
    let omega = 2.0 / PI * ((cp - cv) / cp * atan(y) + cv / cp * y);
    let omega0 = 2.0 / PI * (1.0 - exp(-1.0 / (1.0 / y + y * y / (3.0 * delta * delta))));
    Some(rho * cp * terms.r0 * BOLTZMANN * t_k / (6.0 * PI * viscosity * length) * (omega - omega0))
}
