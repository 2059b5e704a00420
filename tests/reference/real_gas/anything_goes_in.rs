//! Whatever goes in, out comes a gas state that has what was asked for, or an error: never a panic, never another root.

use gaswright::gas::eos::{Equation, Property};
use gaswright::gas::{Gas, Named, RealGas, ShareBasis, find};
use gaswright::units::math::pow;

/// Numbers between 0 and 1, the same in every run.
struct Numbers(u64);

impl Numbers {
    fn next(&mut self) -> f64 {
        self.0 = self.0.wrapping_mul(6_364_136_223_846_793_005).wrapping_add(1_442_695_040_888_963_407);
        (self.0 >> 11) as f64 / (1_u64 << 53) as f64
    }

    fn between(&mut self, low: f64, high: f64) -> f64 {
        low * pow(high / low, self.next())
    }
}

fn gases() -> Vec<RealGas> {
    let mut gases: Vec<Gas> = Equation::names().into_iter().filter_map(|name| find(name).ok()).map(Gas::named).collect();
    let mixture = |parts: &[(&str, f64)]| {
        let parts: Vec<(Named, f64)> = parts.iter().map(|(name, x)| (find(name).unwrap(), *x)).collect();
        Gas::mixture(&parts, ShareBasis::Mole).unwrap()
    };
    gases.push(mixture(&[("methane", 0.8), ("ethane", 0.1), ("propane", 0.05), ("n-hexane", 0.05)]));
    gases.push(mixture(&[("nitrogen", 0.6), ("ammonia", 0.3), ("water", 0.1)]));
    gases.push(Gas::named(find("silane").unwrap()));
    gases.iter().map(|gas| RealGas::new(gas).unwrap()).collect()
}

#[test]
fn density_from_any_temperature_and_pressure() {
    let mut numbers = Numbers(7);
    let (mut found, mut refused) = (0, 0);
    for gas in gases() {
        for _ in 0..400 {
            let (t, p) = (numbers.between(1.0, 4000.0), numbers.between(1e-6, 1e11));
            let Ok(rho) = gas.density_kg_m3(t, p) else {
                refused += 1;
                continue;
            };
            found += 1;
            let state = gas.properties(t, rho);
            assert!((state.p.value / p - 1.0).abs() < 1e-9, "{} {t} K {p} Pa: {}", gas.title(), state.p.value);
            assert!(state.p.by_rho > 0.0, "{} {t} K {p} Pa", gas.title());
            // The root of the gas: no density below it has more pressure.
            for i in 1..20 {
                let lower = gas.properties(t, rho * f64::from(i) / 20.0).p.value;
                assert!(lower < p * (1.0 + 1e-9), "{} {t} K {p} Pa: {lower} below", gas.title());
            }
        }
    }
    println!("{found} found, {refused} refused");
    assert!(found > 4000);
}

#[test]
fn any_pair_of_any_numbers() {
    let mut numbers = Numbers(11);
    let fixing: Vec<Property> = Property::ALL.into_iter().filter(|one| one.fixes_a_state()).collect();
    let (mut found, mut refused) = (0, 0);
    for gas in gases() {
        for _ in 0..40 {
            let mut one = || {
                let property = fixing[(numbers.next() * fixing.len() as f64) as usize];
                let value = match property {
                    Property::Pressure => numbers.between(1e-2, 1e9),
                    Property::Temperature => numbers.between(5.0, 3000.0),
                    Property::Volume => numbers.between(1e-4, 1e4),
                    Property::Density => numbers.between(1e-4, 1e4),
                    Property::Entropy => 2e4 * (numbers.next() - 0.5),
                    _ => 4e6 * (numbers.next() - 0.5),
                };
                (property, value)
            };
            let (x, y) = (one(), one());
            match gas.solve(x, y) {
                Ok(state) => {
                    found += 1;
                    for (property, value) in [x, y] {
                        let scale = match property {
                            Property::Enthalpy | Property::InternalEnergy => gas.gas_constant_j_kg_k() * state.t_k + value.abs(),
                            Property::Entropy => gas.gas_constant_j_kg_k() + value.abs(),
                            _ => value,
                        };
                        let got = state.get(property).value;
                        assert!((got - value).abs() < 1e-9 * scale, "{} {x:?} {y:?}: {got}", gas.title());
                    }
                    gas.check(state.t_k, state.p.value).unwrap();
                }
                Err(_) => refused += 1,
            }
        }
    }
    println!("{found} found, {refused} refused");
    assert!(found > 150 && refused > 150);
}
