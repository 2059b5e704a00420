//! The kernel of the reference equations against the library `feos`, from the same parameters.

use feos::multiparameter::{MultiParameter, MultiParameterRecord};
use feos_core::parameter::{Parameters, PureRecord};
use feos_core::{Contributions, State};
use gaswright::gas::eos::Equation;
use quantity::{KELVIN, METER, MOL};

use super::table::Worst;

/// The molar gas constant that the library computes with.
const R: f64 = 8.314_462_618_153_24;

/// Tolerance 1e-12, at twice the critical density and above five times that: there the terms are several times larger than their sum and
/// their rounding stays.
#[test]
fn the_kernel_agrees_with_the_library() {
    let text = include_str!("../../../src/gas/data/equations.jsonl");
    let mut worst = Worst::default();
    assert_eq!(text.lines().count(), Equation::names().len());
    for (line, name) in text.lines().zip(Equation::names()) {
        let value: serde_json::Value = serde_json::from_str(line).unwrap();
        assert_eq!(value["identifier"]["name"], name);
        let record: PureRecord<MultiParameterRecord, ()> = serde_json::from_str(line).unwrap();
        let library = MultiParameter::new(Parameters::new_pure(record).unwrap());
        let equation = Equation::of_name(name).unwrap_or_else(|| panic!("{name} is not read"));
        let c = equation.constants();
        let scale = c.r_j_mol_k / R;
        for t in [0.7, 0.95, 1.0003, 1.2, 2.0, 4.0] {
            for d in [1e-6, 0.01, 0.3, 0.97, 1.03, 2.0, 2.7] {
                let (t_k, rho) = (t * c.t_c_k, d * c.rho_c_mol_m3);
                let density = rho * (MOL / (METER * METER * METER));
                let state = State::new_pure(&&library, t_k * KELVIN, density).unwrap();
                let ours = equation.properties(t_k, rho * c.molar_mass_kg_mol);
                let (m, rt) = (c.molar_mass_kg_mol, c.r_j_mol_k * t_k);
                let pascal = quantity::PASCAL;
                let joule = quantity::JOULE / MOL;
                let place = || format!("{name} at {t} T_c, {d} rho_c");
                let dense = if d > 1.5 { 5.0 } else { 1.0 };
                // The residual parts, in units of R T, R or 1, so that the zero of h and s does not enter.
                let p = state.pressure(Contributions::Total).convert_into(pascal) * scale;
                let size = (rt * rho).max(p.abs());
                worst.see("p", (ours.p.value - p) / size / dense, place);
                let p_rho = state.dp_drho(Contributions::Total).convert_into(pascal / (MOL / (METER * METER * METER))) * scale;
                worst.see("dp/drho", (ours.p.by_rho * m - p_rho) / rt.max(p_rho.abs()) / dense, place);
                let p_t = state.dp_dt(Contributions::Total).convert_into(pascal / KELVIN) * scale;
                worst.see("dp/dT", (ours.p.by_t - p_t) / (c.r_j_mol_k * rho).max(p_t.abs()) / dense, place);
                let cv = state.molar_isochoric_heat_capacity(Contributions::Total).convert_into(joule / KELVIN) * scale;
                worst.see("cv", (ours.cv.value * m - cv) / cv.abs() / dense, place);
                let cp = state.molar_isobaric_heat_capacity(Contributions::Total).convert_into(joule / KELVIN) * scale;
                if p_rho > 1e-3 * rt {
                    worst.see("cp", (ours.cp.value * m - cp) / cp.abs() * (p_rho / rt).min(1.0) / dense, place);
                }
                let u = state.residual_molar_internal_energy().convert_into(joule) * scale;
                let ideal = equation.properties(t_k, 1e-15 * c.rho_c_mol_m3 * m);
                worst.see("u", ((ours.u.value - ideal.u.value) * m - u) / rt.max(u.abs()), place);
            }
        }
    }
    worst.print();
    for what in ["p", "dp/drho", "dp/dT", "cv", "cp", "u"] {
        worst.within(what, 1e-12);
    }
}
