//! The error of the ideal law: `ideal_gas_error.csv` and `ideal_gas_error_summary.csv`, by CoolProp 8.0.0 (MIT) from the same equations.

use gaswright::gas::eos::Equation;
use gaswright::gas::verdict::{Judge, PressureLimit};
use gaswright::gas::{Gas, find};

use super::table::{Worst, rows};

/// 1e-7 points by the digits of the table, times how soft the gas is: the table's T and p are exact.
#[test]
fn errors_of_the_ideal_law() {
    let mut worst = Worst::default();
    let mut count = 0;
    for row in rows(include_str!("../real/ideal_gas_error.csv")) {
        let gas = row.text("gas");
        let (t, p) = (row.number("T_K"), row.number("p_Pa"));
        let place = || format!("{gas} {t} K {p} Pa");
        if gas == "air" {
            // The table has air as one substance.
            let air = Equation::of_name("dry air").unwrap();
            let z = p / (air.density(t, p).unwrap() * air.gas_constant_j_kg_k() * t);
            worst.see("air as one substance", z - 1.0 - row.number("ideal_density_error"), place);
            if row.number("Tr") >= 1.2 {
                let judge = Judge::of(&Gas::named(find("dry air").unwrap())).unwrap();
                match judge.error_percent(t, p) {
                    Ok(percent) => worst.see("air as a mixture", percent / 100.0 - row.number("ideal_density_error"), place),
                    Err(error) => assert!(t > 700.0, "{}: {error}", place()),
                }
            }
            continue;
        }
        let judge = Judge::of(&Gas::named(find(gas).unwrap())).unwrap();
        let percent = judge.error_percent(t, p).unwrap_or_else(|error| panic!("{}: {error}", place()));
        let state = judge.real().properties(t, judge.real().density_kg_m3(t, p).unwrap());
        let soft = (p / (state.rho_kg_m3 * state.p.by_rho)).max(1.0);
        worst.see("pure", (percent / 100.0 - row.number("ideal_density_error")) / soft, place);
        count += 1;
        let rules = row.number("error_below_1_percent") == 1.0;
        assert_eq!(percent.abs() < 1.0, rules, "{}: {percent}", place());
    }
    worst.print();
    assert_eq!(count, 1937);
    worst.within("pure", 1e-7);
    worst.within("air as one substance", 1e-7);
    worst.within("air as a mixture", 1.5e-3);
}

/// `p_first_*_at_288K_Pa` of the summary, three figures and more; blank where the gas condenses first or 30 MPa are passed.
#[test]
fn pressure_up_to_which_the_ideal_law_holds() {
    for row in rows(include_str!("../real/ideal_gas_error_summary.csv")) {
        let gas = row.text("gas");
        if gas == "air" || gas == "ALL" {
            continue;
        }
        let judge = Judge::of(&Gas::named(find(gas).unwrap_or_else(|e| panic!("{gas} {e:?}")))).unwrap();
        for (column, limit) in [("p_first_0p1pct_at_288K_Pa", 0.1), ("p_first_1pct_at_288K_Pa", 1.0), ("p_first_5pct_at_288K_Pa", 5.0)] {
            let found = judge.pressure_limit(288.15, limit).unwrap();
            match (row.optional(column), found) {
                (Some(p), PressureLimit::Reached { p_pa }) => assert!((p_pa / p - 1.0).abs() < 1e-3, "{gas} {limit}: {p_pa} {p}"),
                (None, PressureLimit::Condenses { .. } | PressureLimit::EndOfRange { .. }) => {}
                (None, PressureLimit::Reached { p_pa }) => assert!(p_pa > 29.9e6, "{gas} {limit}: {p_pa}"),
                other => panic!("{gas} {limit}: {other:?}"),
            }
        }
    }
}

#[test]
fn the_line_of_a_figure_is_a_line() {
    let judge = Judge::of(&Gas::named(find("nitrogen").unwrap())).unwrap();
    let line = judge.line_in_reduced_plane(1.0, 60);
    assert!(line.len() > 30);
    for (p_r, t_r) in line {
        let (t_c, p_c) = judge.real().critical_point().unwrap();
        let percent = judge.error_percent(t_r * t_c, p_r * p_c).unwrap();
        assert!((percent.abs() - 1.0).abs() < 1e-6, "{p_r} {t_r}: {percent}");
    }
}
