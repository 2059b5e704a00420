//! Numbers that no state has: nothing panics, nothing runs on, and what is answered has the pressure that was asked for.

use std::time::{Duration, Instant};

use gaswright::gas::eos::{Equation, Property};
use gaswright::gas::humid_air::{HumidAir, Moisture};
use gaswright::gas::model_weakness::weaknesses;
use gaswright::gas::transport::Transport;
use gaswright::gas::verdict::Judge;
use gaswright::gas::{Gas, Named, RealGas, ShareBasis, StateError, find};
use proptest::prelude::*;

/// A single call takes microseconds to milliseconds in a test build; one that takes this long runs on.
const RUNS_ON: Duration = Duration::from_secs(5);

/// Numbers of no quantity: the ends of the format, both zeros, the three that are none.
const ODD: [f64; 16] = [
    f64::NAN,
    f64::INFINITY,
    f64::NEG_INFINITY,
    0.0,
    -0.0,
    -1.0,
    -300.0,
    -1e308,
    5e-324,
    f64::MIN_POSITIVE,
    1e-200,
    1e-12,
    1e12,
    1e154,
    1e308,
    f64::MAX,
];

fn mixture(parts: &[(&str, f64)]) -> Gas {
    let parts: Vec<(Named, f64)> = parts.iter().map(|(name, x)| (find(name).unwrap(), *x)).collect();
    Gas::mixture(&parts, ShareBasis::Mole).unwrap()
}

/// Every pure gas that has an equation, mixtures by GERG-2008, and gases of the cubic equation.
fn gases() -> Vec<(Gas, RealGas)> {
    let pure = Equation::names().into_iter().filter_map(|name| find(name).ok()).map(Gas::named);
    let others = [
        mixture(&[("methane", 0.8), ("ethane", 0.1), ("propane", 0.05), ("n-hexane", 0.05)]),
        mixture(&[("argon", 0.7), ("helium", 0.3)]),
        mixture(&[("nitrogen", 0.7), ("carbon dioxide", 0.1), ("water", 0.2)]),
        mixture(&[("nitrogen", 0.6), ("ammonia", 0.3), ("water", 0.1)]),
        Gas::named(find("silane").unwrap()),
    ];
    pure.chain(others).map(|gas| (gas.clone(), RealGas::new(&gas).unwrap())).collect()
}

/// Temperatures and pressures at which something ends: the critical point, as published and as the equation has it, the lower end and the
/// saturation pressure there, the limits, and the neighbours of each in the format.
fn corners(gas: &RealGas) -> (Vec<f64>, Vec<f64>) {
    let range = gas.range();
    let mut temperatures = vec![range.t_low_k, range.t_high_k, range.t_limit_low_k, range.t_limit_high_k, 300.0];
    let mut pressures = vec![range.p_high_pa, range.p_limit_pa, 1e5];
    if let Some((t_c, p_c)) = gas.critical_point() {
        temperatures.push(t_c);
        pressures.push(p_c);
    }
    if let Some(equation) = gas.equation() {
        let c = equation.constants();
        temperatures.push(c.t_c_own_k);
        pressures.push(c.p_c_own_pa);
        pressures.extend(equation.saturation(c.t_min_k).ok().map(|line| line.p_pa));
        pressures.extend(equation.saturation(0.9 * c.t_c_own_k).ok().map(|line| line.p_pa));
        temperatures.push(0.9 * c.t_c_own_k);
    }
    let near = |values: Vec<f64>| values.into_iter().flat_map(|x| [x.next_down(), x, x.next_up()]).collect();
    (near(temperatures), near(pressures))
}

/// Runs one call and fails where it takes too long.
fn timed<T>(what: impl FnOnce() -> String, call: impl FnOnce() -> T) -> T {
    let start = Instant::now();
    let out = call();
    assert!(start.elapsed() < RUNS_ON, "{}: {:?}", what(), start.elapsed());
    out
}

/// What must hold of the density at any temperature and pressure: see the assertions.
fn density_is_sound(gas: &RealGas, t_k: f64, p_pa: f64) -> Option<f64> {
    let place = || format!("{} at {t_k:e} K, {p_pa:e} Pa", gas.title());
    let is_state = t_k > 0.0 && t_k.is_finite() && p_pa > 0.0 && p_pa.is_finite();
    match timed(place, || gas.density_kg_m3(t_k, p_pa)) {
        Ok(rho) => {
            assert!(is_state && rho > 0.0 && rho.is_finite(), "{}: {rho}", place());
            let state = gas.properties(t_k, rho);
            // Rounding of the pressure: the terms are some times their sum. Where the gas is softer than 1 in 1e6 (within 1e-6 of the critical
            // point) the density says no more about the pressure than this either.
            // Below 1e-300 Pa the reduced density runs out of the digits of the format, by 1e-324 of some 1e7 Pa.
            assert!((state.p.value - p_pa).abs() < 1e-9 * p_pa + 1e-315, "{}: {:e}", place(), state.p.value);
            // The critical point of the table is that of the equation to 1e-6 of R T in this slope: see the test of critical points.
            assert!(state.p.by_rho > -1e-6 * gas.gas_constant_j_kg_k() * t_k, "{}: between the spinodals", place());
            Some(rho)
        }
        Err(StateError::NoState { .. }) => {
            assert!(!is_state, "{}", place());
            None
        }
        Err(_) => {
            assert!(is_state, "{}", place());
            None
        }
    }
}

#[test]
fn density_at_odd_numbers_and_corners() {
    for (_, gas) in gases() {
        let (temperatures, pressures) = corners(&gas);
        let mut found = 0;
        for t_k in ODD.iter().chain(&temperatures) {
            for p_pa in ODD.iter().chain(&pressures) {
                found += u32::from(density_is_sound(&gas, *t_k, *p_pa).is_some());
            }
        }
        assert!(found > 0, "{}: no corner has a state", gas.title());
    }
}

/// Two properties, each odd or that of a corner: an error, or a state that has both.
#[test]
fn states_by_odd_pairs() {
    let odd = [f64::NAN, f64::NEG_INFINITY, 0.0, -1e308, 5e-324, 1e-12, 1e12, 1e308];
    let fixing: Vec<Property> = Property::ALL.into_iter().filter(|one| one.fixes_a_state()).collect();
    for (_, gas) in gases() {
        let (t_k, p_pa) = (300.0_f64.max(gas.range().t_low_k), 1e4);
        let middle = gas.density_kg_m3(t_k, p_pa).ok().map(|rho| gas.properties(t_k, rho));
        for (at, x) in fixing.iter().enumerate() {
            for y in &fixing[at + 1..] {
                for value in odd {
                    // Odd beside odd, and odd beside a value of a real state, either way round.
                    let beside = middle.map(|state| (state.get(*x).value, state.get(*y).value));
                    let tries = [Some((value, value)), beside.map(|(_, b)| (value, b)), beside.map(|(a, _)| (a, value))];
                    for (a, b) in tries.into_iter().flatten() {
                        let place = || format!("{}: {} = {a:e}, {} = {b:e}", gas.title(), x.symbol(), y.symbol());
                        let Ok(state) = timed(place, || gas.solve((*x, a), (*y, b))) else { continue };
                        let size = |property: Property, value: f64| match property {
                            Property::Enthalpy | Property::InternalEnergy => gas.gas_constant_j_kg_k() * state.t_k + value.abs(),
                            Property::Entropy => gas.gas_constant_j_kg_k() + value.abs(),
                            _ => value.abs(),
                        };
                        for (property, value) in [(*x, a), (*y, b)] {
                            let got = state.get(property).value;
                            assert!((got - value).abs() <= 1e-9 * size(property, value), "{}: {got:e}", place());
                        }
                        assert!(gas.check(state.t_k, state.p.value).is_ok(), "{}", place());
                    }
                }
            }
        }
    }
}

/// Everything else that takes a temperature or a pressure.
#[test]
fn saturation_transport_verdict_and_moist_air_at_odd_numbers() {
    for (ideal, gas) in gases() {
        let (temperatures, pressures) = corners(&gas);
        let judge = Judge::of(&ideal);
        let _ = weaknesses(&ideal, &gas);
        for t_k in ODD.iter().chain(&temperatures).copied() {
            let place = || format!("{} at {t_k:e} K", gas.title());
            if let Some(equation) = gas.equation() {
                let c = equation.constants();
                match timed(place, || equation.saturation(t_k)) {
                    Ok(line) => assert!(
                        (c.t_min_k..=c.t_c_own_k).contains(&t_k) && line.p_pa > 0.0 && line.rho_vapour_kg_m3 <= line.rho_liquid_kg_m3,
                        "{}",
                        place()
                    ),
                    Err(StateError::NotConverged { .. }) => panic!("{}: not converged", place()),
                    Err(_) => assert!(!(c.t_min_k..=c.t_c_own_k).contains(&t_k) || equation.constants().name == "dry air", "{}", place()),
                }
            }
            if let Some(transport) = Transport::of(&ideal) {
                for rho in ODD {
                    for value in [transport.viscosity_pa_s(t_k, rho), transport.conductivity_w_m_k(t_k, rho)].into_iter().flatten() {
                        assert!(value.value > 0.0 && value.value.is_finite() && value.by_t.is_finite(), "{} {rho:e}", place());
                    }
                }
            }
            if let Some(judge) = &judge {
                for percent in [0.0, -1.0, 1.0, 1e308, f64::NAN] {
                    let _ = timed(place, || judge.pressure_limit(t_k, percent));
                }
                for p_pa in ODD {
                    if let Ok(errors) = judge.errors(t_k, p_pa) {
                        assert!(errors.density_percent.is_finite(), "{} {p_pa:e} Pa", place());
                    }
                }
            }
        }
        if let Some(equation) = gas.equation() {
            for p_pa in ODD.iter().chain(&pressures).copied() {
                let place = || format!("{} at {p_pa:e} Pa", gas.title());
                match timed(place, || equation.saturation_temperature(p_pa)) {
                    Ok(line) => assert!((line.p_pa / p_pa - 1.0).abs() < 1e-9, "{}", place()),
                    Err(error) => assert!(!matches!(error, StateError::NotConverged { .. }), "{}: {error}", place()),
                }
            }
        }
    }
    let air = HumidAir::new().unwrap();
    for t_k in ODD.into_iter().chain([173.15, 273.16, 288.15, 473.15]) {
        for p_pa in ODD.into_iter().chain([6e4, 1.1e5, 2e6]) {
            for x in ODD.into_iter().chain([0.5, 1.0, 290.0]) {
                for moisture in
                    [Moisture::RelativeHumidity(x), Moisture::DewPoint(x), Moisture::HumidityRatio(x), Moisture::MoleFraction(x)]
                {
                    let place = || format!("moist air at {t_k:e} K, {p_pa:e} Pa, {moisture:?}");
                    if let Ok(state) = timed(place, || air.state(t_k, p_pa, moisture)) {
                        assert!(state.rho_kg_m3 > 0.0 && state.rho_kg_m3.is_finite() && (0.0..1.0).contains(&state.x_water), "{}", place());
                    }
                }
                let _ = timed(|| format!("condensate of {x:e} at {t_k:e} K, {p_pa:e} Pa"), || air.condensate(x, t_k, p_pa));
            }
        }
    }
}

/// Any number of the format, the plausible ones more often.
fn number(low: f64, high: f64) -> impl Strategy<Value = f64> {
    let plausible = (0.0..1.0_f64).prop_map(move |x| gaswright::units::math::pow(high / low, x) * low);
    prop_oneof![1 => proptest::num::f64::ANY, 3 => plausible]
}

proptest! {
    #![proptest_config(ProptestConfig { cases: 64, failure_persistence: None, ..ProptestConfig::default() })]

    /// Each case is tried with every gas.
    #[test]
    fn density_at_any_number(t_k in number(1.0, 4000.0), p_pa in number(1e-6, 1e11)) {
        for (_, gas) in gases() {
            density_is_sound(&gas, t_k, p_pa);
        }
    }

    /// The density of a gas rises along an isotherm, and falls along an isobar, as far as both are gas.
    #[test]
    fn density_is_monotonic(t_share in 0.0..1.0_f64, p_pa in number(1.0, 3e7), step in 1.0001..1.2_f64) {
        for (_, gas) in gases() {
            let range = gas.range();
            let t_k = range.t_low_k * gaswright::units::math::pow(range.t_high_k / range.t_low_k, t_share);
            let Some(rho) = density_is_sound(&gas, t_k, p_pa) else { continue };
            if let Some(more) = density_is_sound(&gas, t_k, step * p_pa) {
                prop_assert!(more > rho, "{} {t_k} K {p_pa} Pa: {rho} then {more}", gas.title());
            }
            if let Some(less) = density_is_sound(&gas, step * t_k, p_pa) {
                // Quantum gases and water beside: expansion is positive for every gas off its melting line.
                prop_assert!(less < rho, "{} {t_k} K {p_pa} Pa: {rho} then {less} when warmer", gas.title());
            }
        }
    }
}
