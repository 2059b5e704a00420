//! Flow through a nozzle: `pressure_release.csv`, case `real`, by CoolProp 8.0.0 (MIT).

use gaswright::gas::eos::Property;
use gaswright::gas::{Gas, RealGas, StateError, find};

use super::table::{Worst, rows};

/// The throat state by pressure and entropy, its flux, and that it is the largest: the table's maximum and sonic condition agree to 6e-8.
#[test]
fn mass_flux_through_a_nozzle() {
    let mut worst = Worst::default();
    let (mut gas_throats, mut wet_throats) = (0, 0);
    for row in rows(include_str!("../real/pressure_release.csv")).into_iter().filter(|row| row.text("case") == "real") {
        let name = match row.text("gas") {
            "steam" => "water",
            "air" => "dry air",
            other => other,
        };
        let gas = RealGas::new(&Gas::named(find(name).unwrap())).unwrap();
        let (t0, p0) = (row.number("T0_K"), row.number("p0_Pa"));
        let place = || format!("{name} {t0} K {p0} Pa");
        let stagnation = gas.properties(t0, gas.density_kg_m3(t0, p0).unwrap_or_else(|error| panic!("{}: {error}", place())));
        let p = row.number("p_throat_Pa");
        let flux = |p: f64| {
            gas.solve((Property::Pressure, p), (Property::Entropy, stagnation.s.value))
                .map(|throat| (throat.rho_kg_m3 * (2.0 * (stagnation.h.value - throat.h.value)).sqrt(), throat))
        };
        if row.text("throat_phase") != "gas" {
            // The gas ends before the throat.
            if row.text("throat_phase") == "two_phase" {
                assert!(
                    matches!(flux(p), Err(StateError::TwoPhase { .. } | StateError::Liquid { .. } | StateError::Condenses { .. })),
                    "{}",
                    place()
                );
            }
            wet_throats += 1;
            continue;
        }
        gas_throats += 1;
        let (g, throat) = flux(p).unwrap_or_else(|error| panic!("{}: {error}", place()));
        let which = if name == "dry air" { "air" } else { "pure" };
        worst.see(&format!("flux {which}"), g / row.number("mass_flux_kg_m2_s") - 1.0, place);
        worst.see(&format!("T {which}"), throat.t_k / row.number("T_throat_K") - 1.0, place);
        worst.see(&format!("w {which}"), throat.w.value / row.number("w_throat_m_s") * row.number("mach_throat") - 1.0, place);
        if row.text("regime") == "choked" {
            for factor in [0.99, 1.01] {
                if let Ok((other, _)) = flux(p * factor) {
                    assert!(other < g, "{}", place());
                }
            }
        }
    }
    println!("{gas_throats} {wet_throats}");
    worst.print();
    assert_eq!((gas_throats, wet_throats), (178, 3));
    for what in ["flux pure", "T pure", "w pure"] {
        worst.within(what, 1e-6);
    }
    // The table has air as one substance, the mixture is within 0.15 %.
    worst.within("flux air", 1.5e-3);
}
