//! The reference equations against thermodynamics.

use gaswright::gas::eos::{Equation, Property};
use gaswright::units::math::ln;

use super::table::Worst;

/// Every slope against a central difference of the value: error of the difference 1e-6 to 1e-5 by its step of 1e-4 (three digits above what a
/// wrong formula would give).
#[test]
fn slopes_are_differences() {
    let mut worst = Worst::default();
    for name in Equation::names() {
        let equation = Equation::of_name(name).unwrap();
        let c = equation.constants();
        for t in [0.85, 1.05, 1.5, 2.5] {
            for d in [0.001, 0.1, 0.4, 1.5] {
                if t < 1.0 && d > 0.05 {
                    continue;
                }
                let (t_k, rho) = (t * c.t_c_k, d * c.rho_c_mol_m3 * c.molar_mass_kg_mol);
                let state = equation.properties(t_k, rho);
                let (dt, dr) = (1e-4 * t_k, 1e-4 * rho);
                let difference = |a: f64, b: f64, step: f64| (a - b) / (2.0 * step);
                for property in Property::ALL {
                    let of = |t: f64, r: f64| equation.properties(t, r).get(property).value;
                    let by_t = difference(of(t_k + dt, rho), of(t_k - dt, rho), dt);
                    let by_rho = difference(of(t_k, rho + dr), of(t_k, rho - dr), dr);
                    let one = state.get(property);
                    let gas = equation.gas_constant_j_kg_k();
                    let size = match property {
                        Property::Enthalpy | Property::InternalEnergy => gas * t_k,
                        Property::Entropy => gas,
                        _ => one.value.abs(),
                    };
                    worst.see(property.symbol(), (one.by_t - by_t) * t_k / size.max((one.by_t * t_k).abs()), || {
                        format!("{name} {t} {d} by T")
                    });
                    worst.see(property.symbol(), (one.by_rho - by_rho) * rho / size.max((one.by_rho * rho).abs()), || {
                        format!("{name} {t} {d} by rho")
                    });
                }
            }
        }
    }
    worst.print();
    for property in Property::ALL {
        worst.within(property.symbol(), 2e-5);
    }
}

/// cp - cv = T/ρ² (∂p/∂T)²/(∂p/∂ρ); Maxwell: ∂s/∂ρ = -(∂p/∂T)/ρ² and ∂u/∂ρ = (p - T ∂p/∂T)/ρ², the left sides by
/// differences of the values.
#[test]
fn heat_capacities_and_maxwell_relations() {
    for name in Equation::names() {
        let equation = Equation::of_name(name).unwrap();
        let c = equation.constants();
        for (t, d) in [(1.1, 0.2), (1.5, 1.0), (2.0, 0.01)] {
            let (t_k, rho) = (t * c.t_c_k, d * c.rho_c_mol_m3 * c.molar_mass_kg_mol);
            let state = equation.properties(t_k, rho);
            let gap = t_k / (rho * rho) * state.p.by_t * state.p.by_t / state.p.by_rho;
            assert!(((state.cp.value - state.cv.value) / gap - 1.0).abs() < 1e-12, "{name}");
            let step = 1e-4 * rho;
            let of = |property: Property| {
                let at = |rho: f64| equation.properties(t_k, rho).get(property).value;
                (at(rho + step) - at(rho - step)) / (2.0 * step)
            };
            let gas = equation.gas_constant_j_kg_k();
            assert!((of(Property::Entropy) + state.p.by_t / (rho * rho)).abs() * rho / gas < 1e-6, "{name}");
            assert!(
                (of(Property::InternalEnergy) - (state.p.value - t_k * state.p.by_t) / (rho * rho)).abs() * rho / (gas * t_k) < 1e-6,
                "{name}"
            );
            // h = u + p v and w² = (∂p/∂ρ) k are how they are defined.
            assert!((state.h.value - state.u.value - state.p.value / rho).abs() < 1e-12 * (gas * t_k + state.h.value.abs()));
            assert!((state.w.value * state.w.value / (state.k.value * state.p.by_rho) - 1.0).abs() < 1e-12);
        }
    }
}

/// As the density goes to zero Z goes to 1 + B ρ, and h and s to those of the ideal gas, zero at 298.15 K and 100 kPa.
#[test]
fn real_becomes_ideal() {
    for name in Equation::names() {
        let equation = Equation::of_name(name).unwrap();
        let c = equation.constants();
        let gas = equation.gas_constant_j_kg_k();
        let rho = 1e5 / (gas * 298.15);
        let thin = equation.properties(298.15, 1e-9 * rho);
        assert!((thin.z.value - 1.0).abs() < 1e-9, "{name}");
        assert!(thin.h.value.abs() < 1e-7 * gas * 298.15, "{name}: {}", thin.h.value);
        // ln of 1e-9 is the fall of the entropy to 100 kPa.
        assert!((thin.s.value / gas + ln(1e-9)).abs() < 1e-7, "{name}: {}", thin.s.value);
        assert!((thin.cp.value - thin.cv.value - gas).abs() < 1e-7 * gas, "{name}");
        assert!((thin.cp.value / equation.ideal_cp_j_kg_k(298.15) - 1.0).abs() < 1e-7, "{name}");
        let t_k = 1.2 * c.t_c_k;
        let (b, third, _) = equation.virial(t_k);
        let molar = 1e-4 * c.rho_c_mol_m3;
        let z = equation.properties(t_k, molar * c.molar_mass_kg_mol).z.value;
        assert!((z - 1.0 - b * molar - third * molar * molar).abs() < 1e-10, "{name}: {:e}", z - 1.0 - b * molar);
    }
}

/// The reference equations against the ideal polynomials of the room: 1 % covers the worst gas of the table of ideal heat capacities below 1000 K.
#[test]
fn the_ideal_part_is_that_of_the_polynomials() {
    for name in Equation::names() {
        let Ok(named) = gaswright::gas::find(name) else { continue };
        let gas = gaswright::gas::Gas::named(named);
        if gas.has_caloric().is_err() {
            continue;
        }
        let equation = Equation::of_name(name).unwrap();
        for t in [300.0, 400.0, 500.0] {
            let difference = equation.ideal_cp_j_kg_k(t) / gas.cp_j_kg_k(t) - 1.0;
            assert!(difference.abs() < 0.02, "{name} {t}: {difference}");
        }
    }
}
