//! Ideal caloric properties against tables of others, and against themselves.

#![allow(clippy::unwrap_used)]

use gaswright::gas::{Gas, Interval, Named, Polynomial, REFERENCE_TEMPERATURE_K, ShareBasis, Species, find, species};
use uom::si::available_energy::joule_per_kilogram;
use uom::si::f64::{Pressure, ThermodynamicTemperature};
use uom::si::pressure::pascal;
use uom::si::specific_heat_capacity::joule_per_kilogram_kelvin;
use uom::si::thermodynamic_temperature::kelvin;

/// Molar gas constant, J/(mol K), exact since 2019.
const R: f64 = 8.314_462_618_153_24;

fn gas(name: &str) -> Gas {
    Gas::named(find(name).unwrap())
}

fn pure(name: &str) -> &'static Species {
    gas(name).species().unwrap()
}

fn kelvins(t_k: f64) -> ThermodynamicTemperature {
    ThermodynamicTemperature::new::<kelvin>(t_k)
}

/// One row of the table: T, cp, h, s at 1 bar, and cp of the reference equation of state where there is one.
struct Row {
    gas: &'static str,
    t_k: f64,
    cp: f64,
    h: f64,
    s: f64,
    cp_equation: Option<f64>,
}

fn rows() -> Vec<Row> {
    let table = include_str!("ideal_gas_caloric.csv");
    let lines = table.lines().filter(|line| !line.starts_with('#')).skip(1);
    let read = |line: &'static str| {
        let mut fields = line.rsplitn(7, ',').collect::<Vec<_>>();
        fields.reverse();
        let number = |index: usize| fields[index].parse::<f64>();
        Row {
            gas: fields[0].trim_matches('"'),
            t_k: number(1).unwrap(),
            cp: number(2).unwrap(),
            h: number(3).unwrap(),
            s: number(4).unwrap(),
            cp_equation: number(5).ok(),
        }
    };
    let rows: Vec<Row> = lines.map(read).collect();
    assert_eq!(rows.len(), 424);
    rows
}

/// Tolerance 1e-8: the table has nine figures or more and comes from the same coefficients, so that only a wrong formula, a wrong coefficient, a
/// wrong interval or another R would show. Enthalpy is compared beside R T, since it passes through zero.
#[test]
fn heat_capacity_enthalpy_and_entropy_are_those_of_the_polynomials() {
    for Row { gas: name, t_k, cp, h, s, .. } in rows() {
        let gas = gas(name);
        let molar = gas.molar_mass_kg_mol();
        let ours = gas.cp(kelvins(t_k)).get::<joule_per_kilogram_kelvin>() * molar;
        assert!((ours / cp - 1.0).abs() < 1e-8, "cp of {name} at {t_k} K: {ours}");
        let ours = gas.enthalpy(kelvins(t_k)).get::<joule_per_kilogram>() * molar;
        assert!((ours - h).abs() < 1e-8 * h.abs().max(R * t_k), "h of {name} at {t_k} K: {ours}");
        // Ours is zero at 298.15 K, that of the table is absolute: its value there is the published polynomial's own.
        let first = &gas.species().unwrap().caloric.unwrap()[0].polynomial;
        let zero = R * first.entropy(REFERENCE_TEMPERATURE_K);
        let ours = gas.entropy_at_reference_pressure(kelvins(t_k)).get::<joule_per_kilogram_kelvin>() * molar;
        assert!((ours - (s - zero)).abs() < 1e-8 * s, "s of {name} at {t_k} K: {ours}");
    }
}

/// Against the ideal parts of the reference equations of state, which rest on other data. The polynomials follow them to 5e-4 for simple gases;
/// argon and helium differ by the 5.7e-6 of the old gas constant that their equations carry.
#[test]
fn heat_capacities_of_simple_gases_follow_the_reference_equations() {
    let limits =
        [("nitrogen", 5e-4), ("oxygen", 5e-4), ("carbon monoxide", 5e-4), ("carbon dioxide", 5e-4), ("argon", 6e-6), ("helium", 6e-6)];
    for (name, limit) in limits {
        let of_gas: Vec<Row> = rows().into_iter().filter(|row| row.gas == name).collect();
        assert!(of_gas.iter().filter(|row| row.cp_equation.is_some()).count() >= 5, "{name}");
        for row in of_gas {
            let Some(cp) = row.cp_equation else { continue };
            let gas = gas(name);
            let ours = gas.cp_j_kg_k(row.t_k) * gas.molar_mass_kg_mol();
            assert!((ours / cp - 1.0).abs() < limit, "{name} at {} K: {ours} against {cp}", row.t_k);
        }
    }
}

/// NASA's own polynomial of dry air (species `Air` of the same file, "Mole%: N2 78.084, O2 20.9476, Ar .9365, CO2 .0319"): made from those of
/// its components, with the entropy of mixing. It has nine figures in each coefficient.
#[test]
fn dry_air_is_the_mixture_that_its_published_polynomial_describes() {
    let low = Polynomial {
        a: [10099.5016, -196.827561, 5.00915511, -0.00576101373, 1.06685993e-05, -7.94029797e-09, 2.18523191e-12],
        b1: -176.796731,
        b2: -3.921504225,
    };
    let high = Polynomial {
        a: [241521.443, -1257.8746, 5.14455867, -0.000213854179, 7.06522784e-08, -1.07148349e-11, 6.57780015e-16],
        b1: 6462.26319,
        b2: -8.147411905,
    };
    let air = gas("dry air");
    let specific = air.gas_constant_j_kg_k();
    // Entropy of mixing, which the published polynomial holds and the zero of the components does not: Σ x s(298.15 K) of the components.
    let zero: f64 = air
        .components()
        .iter()
        .map(|part| part.mole_fraction * part.species.caloric.unwrap()[0].polynomial.entropy(REFERENCE_TEMPERATURE_K))
        .sum();
    for t_k in [300.0, 400.0, 600.0, 1000.0, 1500.0, 2500.0, 4000.0, 6000.0] {
        let published = if t_k <= 1000.0 { low } else { high };
        let cp = published.heat_capacity(t_k);
        assert!((air.cp_j_kg_k(t_k) / specific / cp - 1.0).abs() < 2e-8, "cp at {t_k} K");
        let rise = published.enthalpy(t_k) - low.enthalpy(REFERENCE_TEMPERATURE_K);
        assert!((air.h_j_kg(t_k) / specific - rise).abs() < 2e-8 * cp * t_k, "h at {t_k} K");
        let entropy = published.entropy(t_k);
        assert!((air.s_j_kg_k(t_k) / specific + zero - entropy).abs() < 2e-8 * entropy, "s at {t_k} K");
    }
}

/// Standard molar entropies at 298.15 K and 1 bar, J/(mol K): CODATA Key Values for Thermodynamics (Cox, Wagman, Medvedev 1989), from memory,
/// with their uncertainties. The polynomials round their constants to nine figures.
#[test]
fn absolute_entropies_of_the_polynomials_are_the_key_values() {
    let key_values = [
        ("nitrogen", 191.609, 0.004),
        ("oxygen", 205.152, 0.005),
        ("hydrogen", 130.680, 0.003),
        ("argon", 154.846, 0.003),
        ("helium", 126.153, 0.002),
        ("carbon dioxide", 213.785, 0.010),
        ("carbon monoxide", 197.660, 0.004),
        ("water", 188.835, 0.010),
        ("ammonia", 192.77, 0.05),
    ];
    for (name, printed, uncertainty) in key_values {
        let first: &Interval = &pure(name).caloric.unwrap()[0];
        let ours = R * first.polynomial.entropy(REFERENCE_TEMPERATURE_K);
        assert!((ours - printed).abs() <= uncertainty, "{name}: {ours}");
    }
}

#[test]
fn zero_of_enthalpy_and_entropy_is_the_ideal_gas_at_298_kelvin_and_1_bar() {
    for one in species().iter().filter(|one| one.caloric.is_some()) {
        let gas = Gas::pure(one);
        let size = gas.gas_constant_j_kg_k() * REFERENCE_TEMPERATURE_K;
        assert!(gas.h_j_kg(REFERENCE_TEMPERATURE_K).abs() < 1e-10 * size, "{}", one.name);
        let s = gas.entropy(kelvins(REFERENCE_TEMPERATURE_K), Pressure::new::<pascal>(100_000.0));
        assert!(s.get::<joule_per_kilogram_kelvin>().abs() < 1e-12 * gas.gas_constant_j_kg_k(), "{}", one.name);
    }
}

/// Temperatures across the range of a gas, the joints of the polynomials left out by a thousandth.
fn temperatures(gas: &Gas) -> Vec<f64> {
    let range = gas.caloric_range();
    let low = range.limit_low_k.max(1.0);
    let steps = (0..=300).map(|step| low * (range.limit_high_k / low).powf(f64::from(step) / 300.0)).map(|t| t.min(range.limit_high_k));
    steps.filter(|t| [1000.0, 6000.0].iter().all(|joint: &f64| (t / joint - 1.0).abs() > 1e-3)).collect()
}

fn gases() -> Vec<Gas> {
    let mut gases: Vec<Gas> = species().iter().filter(|one| one.caloric.is_some()).map(Gas::pure).collect();
    gases.push(gas("dry air"));
    let parts = [("argon", 0.82), ("carbon dioxide", 0.18)].map(|(name, share)| (find(name).unwrap(), share));
    gases.push(Gas::mixture(&parts, ShareBasis::Mole).unwrap());
    gases
}

/// What rounding can do to a temperature that is sought from h or u, and from s, relative: the size of the terms that the property is the sum
/// of, over its slope. Eight half units in the last place a term, for its powers, its logarithm, the zero at 298.15 K and the sum. The terms
/// of a polynomial are some ten times its value, above 6000 K several hundred times.
fn rounding(gas: &Gas, t: f64) -> (f64, f64) {
    let (mut enthalpy, mut entropy) = (0.0, 0.0);
    for part in gas.components() {
        let intervals = part.species.caloric.unwrap();
        let interval = intervals.iter().find(|interval| t <= interval.high_k).or(intervals.last()).unwrap();
        let Polynomial { a: [a1, a2, a3, a4, a5, a6, a7], b1, b2 } = interval.polynomial;
        let terms = [a1 / t, a2 * t.ln(), a3 * t, a4 * t.powi(2), a5 * t.powi(3), a6 * t.powi(4), a7 * t.powi(5), b1];
        enthalpy += part.mole_fraction * terms.iter().map(|term| term.abs()).sum::<f64>();
        let terms = [a1 / t.powi(2), a2 / t, a3 * t.ln(), a4 * t, a5 * t.powi(2), a6 * t.powi(3), a7 * t.powi(4), b2];
        entropy += part.mole_fraction * terms.iter().map(|term| term.abs()).sum::<f64>();
    }
    let cp = gas.cp_j_kg_k(t) / gas.gas_constant_j_kg_k();
    (4.0 * f64::EPSILON * enthalpy / ((cp - 1.0) * t), 4.0 * f64::EPSILON * entropy / cp)
}

/// Central differences over 2e-5 of the temperature: truncation is a few times the square of 1e-5, beside rounding over the step.
#[test]
fn heat_capacity_is_the_slope_of_enthalpy_and_entropy() {
    for gas in gases() {
        let range = gas.caloric_range();
        for t in temperatures(&gas) {
            let step = 1e-5 * t;
            if !range.contains(t - step) || !range.contains(t + step) {
                continue;
            }
            let quotient = |property: &dyn Fn(f64) -> f64| (property(t + step) - property(t - step)) / (2.0 * step);
            let cp = gas.cp_j_kg_k(t);
            let (of_enthalpy, of_entropy) = rounding(&gas, t);
            let difference = (quotient(&|t| gas.h_j_kg(t)) / cp - 1.0).abs();
            assert!(difference < 1e-9 + of_enthalpy / 1e-5, "h of {gas:?} at {t}: {difference}");
            let difference = (quotient(&|t| gas.s_j_kg_k(t)) * t / cp - 1.0).abs();
            assert!(difference < 1e-9 + of_entropy / 1e-5, "s of {gas:?} at {t}: {difference}");
            // The terms of the heat capacity are as large against it as those of the enthalpy, times their powers: at most five times.
            let difference = (gas.dcp_dt(t) - quotient(&|t| gas.cp_j_kg_k(t))).abs() * t / cp;
            assert!(difference < 1e-8 + 5.0 * of_enthalpy / 1e-5, "cp of {gas:?} at {t}: {difference}");
        }
    }
}

#[test]
fn a_temperature_finds_back_from_each_of_its_properties() {
    for gas in gases() {
        for t in temperatures(&gas) {
            let (of_enthalpy, of_entropy) = rounding(&gas, t);
            let u = gas.internal_energy(kelvins(t));
            for (property, back, tolerance) in [
                ("h", gas.t_k_from_h(gas.h_j_kg(t)), of_enthalpy),
                ("u", gas.t_k_from_u(u.get::<joule_per_kilogram>()), of_enthalpy),
                ("s", gas.t_k_from_s(gas.s_j_kg_k(t)), of_entropy),
            ] {
                assert!((back / t - 1.0).abs() < 1e-15 + tolerance, "{gas:?}: {t} K from {property} gives {back} K");
            }
        }
    }
}

#[test]
fn temperatures_find_back_at_the_limits_and_at_the_joints() {
    for gas in gases() {
        let range = gas.caloric_range();
        for t in [range.limit_low_k, range.limit_high_k, 1000.0] {
            if range.contains(t) {
                let (of_enthalpy, of_entropy) = rounding(&gas, t);
                assert!((gas.t_k_from_h(gas.h_j_kg(t)) / t - 1.0).abs() < 1e-15 + of_enthalpy, "h of {gas:?} at {t}");
                assert!((gas.t_k_from_s(gas.s_j_kg_k(t)) / t - 1.0).abs() < 1e-15 + of_entropy, "s of {gas:?} at {t}");
            }
        }
    }
}

#[test]
fn there_is_no_property_and_no_temperature_beyond_the_limits() {
    let nitrogen = gas("nitrogen");
    for t in [199.999, 22_000.1, 0.0, -1.0, f64::NAN, f64::INFINITY] {
        assert!(
            nitrogen.cp_j_kg_k(t).is_nan() && nitrogen.h_j_kg(t).is_nan() && nitrogen.s_j_kg_k(t).is_nan() && nitrogen.dcp_dt(t).is_nan()
        );
    }
    assert!(nitrogen.cp_j_kg_k(200.0).is_finite() && nitrogen.cp_j_kg_k(22_000.0).is_finite());
    let (low, high) = (nitrogen.enthalpy(kelvins(200.0)), nitrogen.enthalpy(kelvins(22_000.0)));
    assert!(nitrogen.temperature_from_enthalpy(low * 1.001).is_none() && nitrogen.temperature_from_enthalpy(high * 1.001).is_none());
    assert!(nitrogen.temperature_from_internal_energy(low * 2.0).is_none());
    assert!(nitrogen.temperature_from_entropy(nitrogen.entropy_at_reference_pressure(kelvins(200.0)) * 1.001).is_none());
    for nothing in [f64::NAN, f64::INFINITY, f64::NEG_INFINITY] {
        assert!(nitrogen.t_k_from_h(nothing).is_nan() && nitrogen.t_k_from_u(nothing).is_nan() && nitrogen.t_k_from_s(nothing).is_nan());
    }
    // From 300 K as published; continued to 250 K.
    assert!(gas("propane").cp_j_kg_k(250.0).is_finite() && gas("propane").cp_j_kg_k(249.9).is_nan());
}

#[test]
fn a_gas_of_one_atom_has_five_halves_of_its_gas_constant_at_any_cold() {
    let helium = gas("helium");
    for t in [1e-6, 0.1, 4.2, 77.0, 300.0] {
        assert_eq!(helium.cp_j_kg_k(t), 2.5 * helium.gas_constant_j_kg_k());
        assert!((helium.t_k_from_s(helium.s_j_kg_k(t)) / t - 1.0).abs() < 1e-13, "{t} K");
        assert!(helium.temperature_from_enthalpy(helium.enthalpy(kelvins(t))).is_some());
    }
    // Enthalpy is far from zero in the cold, so that temperature follows from it to an absolute 1e-13 or so.
    assert!((helium.t_k_from_h(helium.h_j_kg(4.2)) - 4.2).abs() < 1e-12);
}

#[test]
fn a_gas_without_polynomials_says_which() {
    let parts = [("nitrogen", 0.9), ("R134a", 0.1)].map(|(name, share)| (find(name).unwrap(), share));
    let mixture = Gas::mixture(&parts, ShareBasis::Mole).unwrap();
    assert_eq!(mixture.has_caloric(), Err("R134a"));
    assert!(mixture.cp_j_kg_k(300.0).is_nan() && mixture.t_k_from_h(1.0).is_nan() && !mixture.caloric_range().contains(300.0));
    assert!(mixture.density(kelvins(300.0), Pressure::new::<pascal>(1e5)).is_finite());
}

#[test]
fn the_range_of_a_mixture_is_what_its_gases_share() {
    let parts = [("nitrogen", 0.9), ("helium", 0.05), ("propane", 0.05)].map(|(name, share)| (find(name).unwrap(), share));
    let range = Gas::mixture(&parts, ShareBasis::Mole).unwrap().caloric_range();
    assert_eq!((range.low_k, range.high_k, range.limit_low_k), (300.0, 6000.0, 250.0));
    assert!((range.limit_high_k - 6600.0).abs() < 1e-9);
    assert!(range.is_published(300.0) && !range.is_published(299.0) && range.contains(299.0));
}

#[test]
fn heat_capacities_differ_by_the_gas_constant_and_sound_follows() {
    for gas in gases() {
        let t = kelvins(350.0);
        let difference = (gas.cp(t) - gas.cv(t)).get::<joule_per_kilogram_kelvin>();
        let specific = gas.specific_gas_constant().get::<joule_per_kilogram_kelvin>();
        assert!((difference / specific - 1.0).abs() < 1e-14 * gas.cp_j_kg_k(350.0) / specific, "{gas:?}");
        let k = gas.heat_capacity_ratio(t).value;
        assert!((gas.speed_of_sound(t).value.powi(2) / (k * specific * 350.0) - 1.0).abs() < 1e-14, "{gas:?}");
    }
}

#[test]
fn a_mixture_of_one_is_that_gas() {
    for one in species() {
        let (pure, named) = (Gas::pure(one), Named::Species(one));
        for by in [ShareBasis::Mole, ShareBasis::Mass, ShareBasis::Volume] {
            assert_eq!(Gas::mixture(&[(named, 1.0)], by).unwrap(), pure);
            // A share beside nothing takes the way of mixtures, not the short cut of a single part.
            let almost = Gas::mixture(&[(named, 1.0 - 1e-9)], by).unwrap();
            assert_eq!(almost.molar_mass_kg_mol(), pure.molar_mass_kg_mol(), "{}", one.name);
            if one.caloric.is_some() {
                assert_eq!(almost.h_j_kg(400.0), pure.h_j_kg(400.0), "{}", one.name);
                assert_eq!(almost.s_j_kg_k(400.0), pure.s_j_kg_k(400.0), "{}", one.name);
            }
        }
    }
}

/// Entropy of mixing of equal amounts of two gases: R ln 2 a mole, whatever the gases.
#[test]
fn mixing_raises_entropy_by_what_it_must() {
    for (a, b) in [("argon", "helium"), ("nitrogen", "carbon dioxide"), ("methane", "SF6")] {
        let parts = [(find(a).unwrap(), 0.5), (find(b).unwrap(), 0.5)];
        let mixture = Gas::mixture(&parts, ShareBasis::Mole).unwrap();
        for t in [298.15, 350.0, 1200.0] {
            let apart: f64 = mixture.components().iter().map(|part| part.mass_fraction * Gas::pure(part.species).s_j_kg_k(t)).sum();
            let rise = (mixture.s_j_kg_k(t) - apart) * mixture.molar_mass_kg_mol() / R;
            assert!((rise - std::f64::consts::LN_2).abs() < 1e-12, "{a} and {b}: {rise}");
            let enthalpy: f64 = mixture.components().iter().map(|part| part.mass_fraction * Gas::pure(part.species).h_j_kg(t)).sum();
            let size = mixture.gas_constant_j_kg_k() * t;
            assert!((mixture.h_j_kg(t) - enthalpy).abs() < 1e-12 * size, "{a} and {b}");
        }
    }
}

#[test]
fn entropy_falls_with_the_logarithm_of_pressure() {
    let nitrogen = gas("nitrogen");
    let s = |bar: f64| nitrogen.entropy(kelvins(300.0), Pressure::new::<pascal>(1e5 * bar)).get::<joule_per_kilogram_kelvin>();
    let specific = nitrogen.gas_constant_j_kg_k();
    assert!((s(1.0) - s(std::f64::consts::E) - specific).abs() < 1e-12 * specific);
    assert_eq!(s(1.0), nitrogen.s_j_kg_k(300.0));
}
