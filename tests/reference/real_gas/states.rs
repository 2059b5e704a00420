//! Single-phase states of fifteen gases: `states_*.csv`, by CoolProp 8.0.0 (MIT) from the same equations.

use gaswright::gas::eos::{Equation, Property};

use super::table::{Worst, rows};

pub(super) const TABLES: [(&str, &str); 15] = [
    ("nitrogen", include_str!("../real/states_nitrogen.csv")),
    ("oxygen", include_str!("../real/states_oxygen.csv")),
    ("argon", include_str!("../real/states_argon.csv")),
    ("dry air", include_str!("../real/states_air.csv")),
    ("hydrogen", include_str!("../real/states_hydrogen.csv")),
    ("helium", include_str!("../real/states_helium.csv")),
    ("carbon dioxide", include_str!("../real/states_carbon_dioxide.csv")),
    ("methane", include_str!("../real/states_methane.csv")),
    ("ethane", include_str!("../real/states_ethane.csv")),
    ("propane", include_str!("../real/states_propane.csv")),
    ("ammonia", include_str!("../real/states_ammonia.csv")),
    ("water", include_str!("../real/states_steam.csv")),
    ("sulfur hexafluoride", include_str!("../real/states_sulfur_hexafluoride.csv")),
    ("R134a", include_str!("../real/states_r134a.csv")),
    ("carbon monoxide", include_str!("../real/states_carbon_monoxide.csv")),
];

#[test]
fn states_by_temperature_and_pressure() {
    let mut worst = Worst::default();
    let mut count = 0;
    for (name, table) in TABLES {
        let equation = Equation::of_name(name).unwrap();
        for row in rows(table) {
            let (t, p, rho) = (row.number("T_K"), row.number("p_Pa"), row.number("rho_kg_m3"));
            let place = || format!("{name} {t} K {p} Pa");
            let found = equation.density(t, p).unwrap_or_else(|error| panic!("{}: {error}", place()));
            let state = equation.properties(t, found);
            count += 1;
            // How much a relative error of the pressure is magnified in the density.
            let soft = (p / (rho * state.p.by_rho)).max(1.0);
            worst.see("rho", (found / rho - 1.0) / soft, place);
            worst.see("cp", (state.cp.value / row.number("cp_J_kg_K") - 1.0) / soft, place);
            worst.see("cv", (state.cv.value / row.number("cv_J_kg_K") - 1.0) / soft, place);
            worst.see("w", (state.w.value / row.number("w_m_s") - 1.0) / soft, place);
            worst.see("h", (state.h.value - row.number("h_J_kg")) / (equation.gas_constant_j_kg_k() * t) / soft, place);
            worst.see("s", (state.s.value - row.number("s_J_kg_K")) / equation.gas_constant_j_kg_k() / soft, place);
            worst.see("k", (state.k.value / row.number("k") - 1.0) / soft, place);
            let exponent = state.w.value * state.w.value * found / p;
            worst.see("w² rho/p", (exponent / row.number("isentropic_exponent") - 1.0) / soft, place);
            let (joule_thomson, _) = state.slopes_by(Property::Temperature, Property::Pressure, Property::Enthalpy).unwrap();
            // Beside v/cp, since the coefficient itself passes zero.
            let size = (1.0 / (found * state.cp.value)).max(joule_thomson.abs());
            worst.see("(dT/dp)_h", (joule_thomson - row.number("joule_thomson_K_Pa")) / size / soft, place);
        }
    }
    worst.print();
    assert_eq!(count, 3041);
    for what in ["rho", "cp", "cv", "k", "w", "w² rho/p", "(dT/dp)_h", "h", "s"] {
        worst.within(what, 1e-5);
    }
}
