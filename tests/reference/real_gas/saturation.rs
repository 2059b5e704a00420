//! The saturation line: `saturation.csv`, by CoolProp 8.0.0 (MIT) from the same equations.

use gaswright::gas::eos::Equation;

use super::table::{Worst, rows};

#[test]
fn pressure_and_densities_of_saturation() {
    let mut worst = Worst::default();
    let rows = rows(include_str!("../real/saturation.csv"));
    assert_eq!(rows.len(), 389);
    for row in rows {
        let (name, t) = (row.text("gas"), row.number("T_K"));
        let equation = Equation::of_name(name).unwrap();
        let place = || format!("{name} {t} K");
        let line = equation.saturation(t).unwrap_or_else(|error| panic!("{}: {error}", place()));
        // Below 10 Pa the pressure of the table is not that of its own saturated gas (propane at 85.7 K: 5e-4 below rho'' R T/M): there the
        // density of the gas says the same.
        if line.p_pa > 10.0 {
            worst.see("p", line.p_pa / row.number("psat_Pa") - 1.0, place);
        }
        worst.see("dp/dT", line.dp_dt_pa_k / row.number("dpsat_dT_Pa_K") - 1.0, place);
        worst.see("rho'", line.rho_liquid_kg_m3 / row.number("rho_liquid_kg_m3") - 1.0, place);
        worst.see("rho''", line.rho_vapour_kg_m3 / row.number("rho_vapour_kg_m3") - 1.0, place);
        let back = equation.saturation_temperature(line.p_pa).unwrap();
        worst.see("T", back.t_k / t - 1.0, place);
    }
    worst.print();
    // Nine figures in the table: 5e-9.
    for what in ["p", "dp/dT", "rho'", "rho''"] {
        worst.within(what, 1e-8);
    }
    worst.within("T", 1e-12);
}

/// The auxiliary equations serve as a bound: 5 % of a margin is left for them.
#[test]
fn the_line_is_found_everywhere() {
    let mut worst = Worst::default();
    for name in Equation::names().into_iter().filter(|name| *name != "dry air") {
        let equation = Equation::of_name(name).unwrap();
        let c = equation.constants();
        let mut last = 0.0;
        for i in 0..=200 {
            let t = c.t_min_k + (c.t_c_own_k - c.t_min_k) * f64::from(i) / 200.0;
            let t = t.min(c.t_c_own_k);
            let line = equation.saturation(t).unwrap_or_else(|error| panic!("{name} {t} K: {error}"));
            assert!(line.p_pa > last, "{name} {t}: {} after {last}", line.p_pa);
            last = line.p_pa;
            let back = equation.saturation_temperature(line.p_pa).unwrap_or_else(|error| panic!("{name} {t} K back: {error}"));
            worst.see("T", back.t_k / t - 1.0, || format!("{name} {t} K"));
        }
        for s in [1e-3, 1e-4, 1e-5, 1e-6, 1e-7, 1e-8, 1e-10] {
            let t = c.t_c_own_k * (1.0 - s);
            let line = equation.saturation(t).unwrap_or_else(|error| panic!("{name} {t} K: {error}"));
            let back = equation.saturation_temperature(line.p_pa).unwrap_or_else(|error| panic!("{name} {t} K back: {error}"));
            worst.see("T near critical", back.t_k / t - 1.0, || format!("{name} 1 - {s}"));
        }
    }
    worst.print();
    worst.within("T", 1e-8);
    worst.within("T near critical", 1e-7);
}
