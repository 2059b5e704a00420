//! Derivatives of a state by any two properties, of every kind of model.

use gaswright::gas::eos::{Equation, Property, StateProperties};
use gaswright::gas::{Gas, Named, RealGas, ShareBasis, find};
use proptest::prelude::*;

fn mixture(parts: &[(&str, f64)]) -> RealGas {
    let parts: Vec<(Named, f64)> = parts.iter().map(|(name, x)| (find(name).unwrap(), *x)).collect();
    RealGas::new(&Gas::mixture(&parts, ShareBasis::Mole).unwrap()).unwrap()
}

fn gases() -> Vec<RealGas> {
    let pure = Equation::names().into_iter().filter_map(|name| find(name).ok()).map(|named| RealGas::new(&Gas::named(named)).unwrap());
    let others = [
        mixture(&[("methane", 0.9), ("nitrogen", 0.05), ("carbon dioxide", 0.05)]),
        mixture(&[("argon", 0.82), ("carbon dioxide", 0.18)]),
        mixture(&[("nitrogen", 0.9), ("ammonia", 0.1)]),
        mixture(&[("acetylene", 0.3), ("argon", 0.7)]),
    ];
    pure.chain(others).collect()
}

/// A state of a gas by shares of its range: temperatures from its lowest (at least half of the critical one) to twice the critical one, densities
/// of a gas.
fn state(gas: &RealGas, t_share: f64, p_share: f64) -> Option<StateProperties> {
    let (t_c, p_c) = gas.critical_point()?;
    let range = gas.range();
    let (low, high) = (range.t_low_k.max(0.6 * t_c), range.t_high_k.min(2.5 * t_c));
    let t_k = low + (high - low) * t_share;
    let p_pa = gaswright::units::math::pow(1e-4, 1.0 - p_share) * 3.0 * p_c;
    let rho = gas.density_kg_m3(t_k, p_pa).ok()?;
    let state = gas.properties(t_k, rho);
    // Near the critical point a slope is the small difference of large numbers.
    (rho * state.p.by_rho > 0.05 * p_pa).then_some(state)
}

/// Whether h, s and the heat capacities have values a step on either side of a temperature.
fn has_caloric(gas: &RealGas, t_k: f64) -> bool {
    gas.caloric_range_k().is_some_and(|(low, high)| (1.001 * low..0.999 * high).contains(&t_k))
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

fn close(a: f64, b: f64, size: f64, tolerance: f64) -> bool {
    (a - b).abs() <= tolerance * size.max(a.abs()).max(b.abs())
}

proptest! {
    #![proptest_config(ProptestConfig { cases: 12, failure_persistence: None, ..ProptestConfig::default() })]

    /// What holds of slopes by two properties for every gas: a property by itself is 1 and 0; the order of x and y does not matter; the chain rule;
    /// dh = T ds + v dp and du = T ds - p dv; and the four Maxwell relations.
    #[test]
    fn slopes_obey_thermodynamics(t_share in 0.0..1.0_f64, p_share in 0.0..1.0_f64) {
        use Property::{Density, Enthalpy, Entropy, InternalEnergy, Pressure, Temperature, Volume};
        for gas in gases() {
            let Some(one) = state(&gas, t_share, p_share) else { continue };
            if !has_caloric(&gas, one.t_k) {
                continue;
            }
            let place = || format!("{} at {} K, {} Pa", gas.title(), one.t_k, one.p.value);
            let (t, p, v) = (one.t_k, one.p.value, 1.0 / one.rho_kg_m3);
            for x in FIXING {
                prop_assert!(one.slopes_by(Pressure, x, x).is_none(), "{} {}", place(), x.symbol());
                for y in FIXING {
                    let Some(own) = one.slopes_by(x, x, y) else { continue };
                    prop_assert!(close(own.0, 1.0, 1.0, 1e-9), "{} {} by itself: {own:?}", place(), x.symbol());
                    let Some((by_x, by_y)) = one.slopes_by(Entropy, x, y) else { continue };
                    prop_assert_eq!(one.slopes_by(Entropy, y, x).map(|(a, b)| (b, a)), Some((by_x, by_y)), "{}", place());
                    // The chain rule: ds by T and rho, through x and y.
                    let (xs, ys) = (one.get(x), one.get(y));
                    let terms = (by_x * xs.by_t).abs() + (by_y * ys.by_t).abs();
                    prop_assert!(
                        close(by_x * xs.by_t + by_y * ys.by_t, one.s.by_t, terms, 1e-10),
                        "{} s by {} and {}", place(), x.symbol(), y.symbol()
                    );
                }
            }
            prop_assert!(one.slopes_by(Pressure, Volume, Density).is_none(), "{}", place());
            let by = |of: Property, x: Property, y: Property| one.slopes_by(of, x, y).unwrap_or((f64::NAN, f64::NAN));
            // Sound and mixtures by GERG-2008 are given apart from p, h and s: the relations tie them together.
            let (h_s, h_p) = by(Enthalpy, Entropy, Pressure);
            prop_assert!(close(h_s, t, t, 1e-9) && close(h_p, v, v, 1e-9), "{}: dh = {h_s} ds + {h_p} dp", place());
            let (u_s, u_v) = by(InternalEnergy, Entropy, Volume);
            prop_assert!(close(u_s, t, t, 1e-9) && close(u_v, -p, p, 1e-9), "{}: du = {u_s} ds + {u_v} dv", place());
            let r = gas.gas_constant_j_kg_k();
            let maxwell = [
                (by(Temperature, Volume, Entropy).0, -by(Pressure, Entropy, Volume).0, p / r),
                (by(Temperature, Pressure, Entropy).0, by(Volume, Entropy, Pressure).0, v / r),
                (by(Entropy, Volume, Temperature).0, by(Pressure, Temperature, Volume).0, p / t),
                (by(Entropy, Pressure, Temperature).0, -by(Volume, Temperature, Pressure).0, v / t),
            ];
            for (at, (left, right, size)) in maxwell.into_iter().enumerate() {
                prop_assert!(close(left, right, size, 1e-9), "{}: relation {at}: {left} {right}", place());
            }
            // cp, cv and w are what the slopes say.
            let cp = by(Enthalpy, Temperature, Pressure).0;
            prop_assert!(close(cp, one.cp.value, cp, 1e-9), "{}: cp {cp} {}", place(), one.cp.value);
            let cv = by(InternalEnergy, Temperature, Volume).0;
            prop_assert!(close(cv, one.cv.value, cv, 1e-9), "{}: cv {cv} {}", place(), one.cv.value);
            let w2 = by(Pressure, Density, Entropy).0;
            prop_assert!(close(w2, one.w.value * one.w.value, w2, 1e-9), "{}: w² {w2}", place());
            let gap = t * v * v * one.p.by_t * one.p.by_t / one.p.by_rho;
            prop_assert!(close(one.cp.value - one.cv.value, gap, cp, 1e-9), "{}: cp - cv", place());
        }
    }

    /// Slopes of every property by p and T, p and s, rho and u, against states that are solved for on both sides. The error of a central difference by
    /// a step of 1e-4 is 1e-8 times the third derivative, which for a gas off its critical point is a few hundreds at most.
    #[test]
    fn slopes_are_differences_of_solved_states(t_share in 0.0..1.0_f64, p_share in 0.0..1.0_f64) {
        use Property::{Density, Entropy, InternalEnergy, Pressure, Temperature};
        for gas in gases() {
            let Some(one) = state(&gas, t_share, p_share) else { continue };
            if !has_caloric(&gas, one.t_k) || one.rho_kg_m3 * one.p.by_rho < 0.3 * one.p.value {
                continue;
            }
            let r = gas.gas_constant_j_kg_k();
            let size = |property: Property| match property {
                Property::Enthalpy | InternalEnergy => r * one.t_k,
                Entropy => r,
                _ => one.get(property).value.abs(),
            };
            for (x, y) in [(Pressure, Temperature), (Pressure, Entropy), (Density, InternalEnergy)] {
                let step = 1e-4 * size(x);
                let at = |x_value: f64| gas.solve((x, x_value), (y, one.get(y).value));
                let (Ok(above), Ok(below)) = (at(one.get(x).value + step), at(one.get(x).value - step)) else { continue };
                for of in Property::ALL {
                    let Some((slope, _)) = one.slopes_by(of, x, y) else { continue };
                    let difference = (above.get(of).value - below.get(of).value) / (2.0 * step);
                    let scale = size(of) / size(x);
                    prop_assert!(
                        close(slope, difference, scale, 1e-5),
                        "{} at {} K, {} Pa: {} by {} at constant {}: {slope} {difference}",
                        gas.title(), one.t_k, one.p.value, of.symbol(), x.symbol(), y.symbol()
                    );
                }
            }
        }
    }
}
