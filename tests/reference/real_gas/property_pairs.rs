//! States from every two independent properties.

use gaswright::gas::eos::Property;
use gaswright::gas::{Gas, RealGas, ShareBasis, StateError, find};

use super::table::Worst;

fn real(name: &str) -> RealGas {
    RealGas::new(&Gas::named(find(name).unwrap())).unwrap()
}

const FIXING: [Property; 7] = [
    Property::Pressure,
    Property::Temperature,
    Property::Volume,
    Property::Density,
    Property::Enthalpy,
    Property::InternalEnergy,
    Property::Entropy,
];

/// A pair fixes a state to 1e-12 times how much the pair magnifies: the rounding of the property, 1e-15 of its size, over the change that a
/// relative change of the state makes.
#[test]
fn every_pair_finds_its_state_again() {
    let mut worst = Worst::default();
    let (mut tried, mut two) = (0, 0);
    for name in ["nitrogen", "carbon dioxide", "water", "helium", "ammonia", "propane", "R134a", "hydrogen", "sulfur hexafluoride", "argon"]
    {
        let gas = real(name);
        let (t_c, p_c) = gas.critical_point().unwrap();
        for t in [0.8, 0.97, 1.05, 1.4, 2.3] {
            for p in [0.001, 0.05, 0.3, 1.5, 4.0] {
                let (t_k, p_pa) = (t * t_c, p * p_c);
                let Ok(rho) = gas.density_kg_m3(t_k, p_pa) else { continue };
                let state = gas.properties(t_k, rho);
                for (i, x) in FIXING.into_iter().enumerate() {
                    for y in FIXING.into_iter().skip(i + 1) {
                        if (x, y) == (Property::Volume, Property::Density) {
                            continue;
                        }
                        let place = || format!("{name} {t} T_c {p} p_c from {} and {}", x.symbol(), y.symbol());
                        let pair = [x, y];
                        let caloric = |one: Property| matches!(one, Property::Enthalpy | Property::InternalEnergy);
                        let may_be_two = (pair.iter().any(|one| caloric(*one)) && pair.contains(&Property::Temperature))
                            || pair.iter().all(|one| caloric(*one));
                        tried += 1;
                        let found = match gas.solve((x, state.get(x).value), (y, state.get(y).value)) {
                            Ok(found) => found,
                            Err(StateError::Ambiguous { .. }) if may_be_two => {
                                two += 1;
                                let near = (1.001 * t_k, 0.999 * rho);
                                gas.solve_near((x, state.get(x).value), (y, state.get(y).value), near).unwrap()
                            }
                            Err(error) => panic!("{}: {error}", place()),
                        };
                        // How far T and rho may move for a change of 1e-15 of the sizes of x and y.
                        let size = |one: Property| match one {
                            Property::Enthalpy | Property::InternalEnergy => {
                                (gas.gas_constant_j_kg_k() * t_k).max(state.get(one).value.abs())
                            }
                            Property::Entropy => gas.gas_constant_j_kg_k().max(state.get(one).value.abs()),
                            _ => state.get(one).value,
                        };
                        let mut loose: f64 = 1.0;
                        for of in [Property::Temperature, Property::Density] {
                            if let Some((by_x, by_y)) = state.slopes_by(of, x, y) {
                                loose =
                                    loose.max((by_x * size(x)).abs() / state.get(of).value + (by_y * size(y)).abs() / state.get(of).value);
                            }
                        }
                        worst.see("T", (found.t_k / t_k - 1.0) / loose, place);
                        worst.see("rho", (found.rho_kg_m3 / rho - 1.0) / loose, place);
                    }
                }
            }
        }
    }
    println!("{tried} tried, {two} with two answers");
    worst.print();
    assert!(tried > 3500 && two < tried / 10);
    worst.within("T", 1e-12);
    worst.within("rho", 1e-12);
}

#[test]
fn a_mixture_is_found_again() {
    let parts = [(find("nitrogen").unwrap(), 0.79), (find("oxygen").unwrap(), 0.21)];
    for parts in [parts.to_vec(), vec![(find("nitrogen").unwrap(), 0.9), (find("ammonia").unwrap(), 0.1)]] {
        let gas = RealGas::new(&Gas::mixture(&parts, ShareBasis::Mole).unwrap()).unwrap();
        for (t_k, p_pa) in [(250.0, 1e5), (300.0, 1e7), (400.0, 3e7)] {
            if gas.density_kg_m3(t_k, p_pa).is_err() {
                continue;
            }
            let state = gas.properties(t_k, gas.density_kg_m3(t_k, p_pa).unwrap());
            for (x, y) in [
                (Property::Pressure, Property::Enthalpy),
                (Property::Pressure, Property::Entropy),
                (Property::Density, Property::Temperature),
                (Property::Density, Property::InternalEnergy),
                (Property::Pressure, Property::Volume),
                (Property::Temperature, Property::Entropy),
                (Property::Enthalpy, Property::Entropy),
            ] {
                let found = gas
                    .solve((x, state.get(x).value), (y, state.get(y).value))
                    .unwrap_or_else(|e| panic!("{} {} {t_k} {p_pa}: {e}", x.symbol(), y.symbol()));
                assert!((found.t_k / t_k - 1.0).abs() < 1e-11, "{} {} {t_k} {p_pa} {:e}", x.symbol(), y.symbol(), found.t_k / t_k - 1.0);
                assert!((found.rho_kg_m3 / state.rho_kg_m3 - 1.0).abs() < 1e-11);
            }
        }
    }
}

#[test]
fn what_is_no_gas_is_refused_with_the_reason() {
    let steam = real("water");
    // Steam at 9 bar and 195 degC expands to 1.2 bar: wet at 377.93 K.
    let header = steam.solve((Property::Pressure, 9e5), (Property::Temperature, 468.15)).unwrap();
    match steam.solve((Property::Pressure, 1.2e5), (Property::Entropy, header.s.value)) {
        Err(StateError::TwoPhase { t_sat_k, p_sat_pa, quality }) => {
            assert!((t_sat_k - 377.93).abs() < 0.01 && p_sat_pa == 1.2e5 && quality > 0.8 && quality < 1.0);
        }
        other => panic!("{other:?}"),
    }
    let propane = real("propane");
    assert!(
        matches!(propane.density_kg_m3(293.15, 1e6), Err(StateError::Liquid { t_sat_k: Some(t), p_sat_pa: Some(p), .. }) if (t - 300.09).abs() < 0.01 && (p - 836_460.0).abs() < 100.0)
    );
    let dioxide = real("carbon dioxide");
    assert!(matches!(dioxide.density_kg_m3(188.15, 1.5e5), Err(StateError::Solid { .. })));
    assert!(matches!(real("helium").density_kg_m3(5.3, 3e7), Err(StateError::Solid { .. })));
    for bad in [0.0, -1.0, f64::NAN, f64::INFINITY] {
        assert!(matches!(dioxide.density_kg_m3(300.0, bad), Err(StateError::NoState { .. })));
        assert!(matches!(dioxide.density_kg_m3(bad, 1e5), Err(StateError::NoState { .. })));
        assert!(matches!(dioxide.solve((Property::Pressure, 1e5), (Property::Density, bad)), Err(StateError::NoState { .. })));
    }
    assert!(matches!(real("R134a").density_kg_m3(640.0, 5e5), Err(StateError::OutOfRange(limit)) if limit.high == 455.0));
    assert!(matches!(dioxide.solve((Property::Density, 20.0), (Property::Volume, 0.05)), Err(StateError::Dependent { .. })));
    assert!(matches!(dioxide.solve((Property::Pressure, 1e5), (Property::HeatCapacityRatio, 1.3)), Err(StateError::Dependent { .. })));
    assert!(matches!(dioxide.solve((Property::Temperature, 280.0), (Property::Density, 400.0)), Err(StateError::TwoPhase { .. })));
    assert!(matches!(dioxide.solve((Property::Temperature, 280.0), (Property::Density, 950.0)), Err(StateError::Liquid { .. })));
    assert!(dioxide.near_critical(305.0, 7.4e6) && !dioxide.near_critical(305.0, 7.0e6) && !dioxide.near_critical(310.0, 7.4e6));
    // The saturated gas itself is a gas, whichever way its state was found.
    let line = propane.equation().unwrap().saturation(290.0).unwrap();
    assert!((propane.density_kg_m3(290.0, line.p_pa).unwrap() / line.rho_vapour_kg_m3 - 1.0).abs() < 1e-9);
    let back = propane.equation().unwrap().saturation_temperature(5e5).unwrap();
    assert!((propane.density_kg_m3(back.t_k, 5e5).unwrap() / back.rho_vapour_kg_m3 - 1.0).abs() < 1e-9);
}

/// Heat capacities of a component may end before the equation of state: a state just inside is found, whatever the search meets on its way, and one
/// below is refused.
#[test]
fn the_end_of_the_heat_capacities_is_an_end() {
    let parts = [(find("acetylene").unwrap(), 0.3), (find("argon").unwrap(), 0.7)];
    let gas = RealGas::new(&Gas::mixture(&parts, ShareBasis::Mole).unwrap()).unwrap();
    let (low, high) = gas.caloric_range_k().unwrap();
    assert!(low > gas.range().t_limit_low_k && high <= gas.range().t_limit_high_k);
    for t_k in [1.0001 * low, 300.0, 0.999 * high] {
        let rho = gas.density_kg_m3(t_k, 1e5).unwrap();
        let state = gas.properties(t_k, rho);
        for (x, y) in [
            (Property::Pressure, Property::Enthalpy),
            (Property::Pressure, Property::Entropy),
            (Property::Density, Property::InternalEnergy),
            (Property::Enthalpy, Property::Entropy),
        ] {
            let found = gas.solve((x, state.get(x).value), (y, state.get(y).value)).unwrap_or_else(|e| panic!("{t_k} {}: {e}", y.symbol()));
            assert!((found.t_k / t_k - 1.0).abs() < 1e-9, "{t_k} {} {}", x.symbol(), y.symbol());
        }
    }
    let end = gas.properties(low, gas.density_kg_m3(low, 1e5).unwrap());
    assert!(gas.solve((Property::Pressure, 1e5), (Property::Enthalpy, end.h.value - 1e4)).is_err());
    // Density needs no heat capacity: it goes on.
    let cold = 0.9 * low;
    let rho = gas.density_kg_m3(cold, 1e5).unwrap();
    let found = gas.solve((Property::Pressure, 1e5), (Property::Density, rho)).unwrap();
    assert!((found.t_k / cold - 1.0).abs() < 1e-12);
}
