//! Viscosity and thermal conductivity: columns of `states_*.csv`, by CoolProp 8.0.0 (MIT) from the correlations named there.

use gaswright::gas::eos::Equation;
use gaswright::gas::transport::Transport;

use super::states::TABLES;
use super::table::{Worst, rows};

/// The same correlations: nine figures, and where the enhancement near the critical point counts, the magnified rounding of the
/// compressibility.
#[test]
fn viscosity_and_conductivity() {
    let mut worst = Worst::default();
    let (mut viscosities, mut conductivities) = (0, 0);
    for (name, table) in TABLES {
        let equation = Equation::of_name(name).unwrap();
        for row in rows(table) {
            let (t, p) = (row.number("T_K"), row.number("p_Pa"));
            let place = || format!("{name} {t} K {p} Pa");
            let rho = equation.density(t, p).unwrap();
            let state = equation.properties(t, rho);
            let soft = (p / (rho * state.p.by_rho)).max(1.0);
            if let Some(mu) = row.optional("mu_Pa_s") {
                let ours = Transport::of_name(name).unwrap().viscosity_pa_s(t, rho).unwrap_or_else(|| panic!("{}", place()));
                worst.see(&format!("mu {name}"), (ours.value / mu - 1.0) / soft, place);
                viscosities += 1;
            }
            if let Some(lambda) = row.optional("lambda_W_m_K") {
                let ours = Transport::of_name(name).unwrap().conductivity_w_m_k(t, rho).unwrap_or_else(|| panic!("{}", place()));
                worst.see(&format!("lambda {name}"), (ours.value / lambda - 1.0) / soft, place);
                conductivities += 1;
            }
        }
    }
    println!("{viscosities} {conductivities}");
    worst.print();
    assert_eq!((viscosities, conductivities), (2828, 2828));
    for what in worst.0.keys().cloned().collect::<Vec<_>>() {
        // The library takes τ and δ of ethane and methane by two reducing points in one formula (305.33 and 305.322 K, 10 139 and 10 139.128
        // mol/m³): 5e-5 and 1e-5 of a part of the sum.
        let tolerance = match what.as_str() {
            "lambda ethane" => 6e-5,
            "lambda methane" => 1e-5,
            _ => 5e-8,
        };
        worst.within(&what, tolerance);
    }
}

#[test]
fn every_correlation_has_values_and_a_range() {
    let mut count = 0;
    let mut wrong = Vec::new();
    for name in Equation::names() {
        let Some(transport) = Transport::of_name(name) else { continue };
        let equation = Equation::of_name(name).unwrap();
        for (range, is_viscosity) in [(transport.viscosity_range(), true), (transport.conductivity_range(), false)] {
            let Some(range) = range else { continue };
            assert!(!range.source.is_empty());
            for i in 0..=10 {
                let t = range.t_low_k + (range.t_high_k.min(equation.constants().t_limit_k) - range.t_low_k) * f64::from(i) / 10.0;
                let p = equation.saturation(t).map_or(1e3, |line| (0.5 * line.p_pa).min(1e3));
                let rho = p / (equation.gas_constant_j_kg_k() * t);
                let value = if is_viscosity { transport.viscosity_pa_s(t, rho) } else { transport.conductivity_w_m_k(t, rho) };
                let sound = if is_viscosity { 2e-7..2e-4 } else { 1e-3..1.5 };
                if !value.is_some_and(|value| sound.contains(&value.value) && value.by_t.is_finite()) {
                    wrong.push(format!("{name} {t} K: {value:?}"));
                }
            }
            count += 1;
        }
    }
    assert!(wrong.is_empty(), "{}", wrong.join("\n"));
    assert_eq!(count, 72);
}
