//! The constants that ship, against other sources and against themselves.

#![allow(clippy::unwrap_used)]

use gaswright::gas::atomic_weight::molecule;
use gaswright::gas::{Gas, MixtureError, Named, ShareBasis, find, rules_of_thumb, species};
use uom::si::f64::{Pressure, ThermodynamicTemperature};
use uom::si::pressure::pascal;
use uom::si::thermodynamic_temperature::kelvin;

/// Rows of a table with one name and then numbers, empty where not known.
fn rows<const N: usize>(table: &'static str) -> Vec<(&'static str, [Option<f64>; N])> {
    let read = |line: &'static str| {
        let mut numbers = [None; N];
        let mut rest = line;
        for place in numbers.iter_mut().rev() {
            let (before, number) = rest.rsplit_once(',').unwrap();
            (*place, rest) = (number.parse().ok(), before);
        }
        (rest.trim_matches('"'), numbers)
    };
    table.lines().filter(|line| !line.starts_with('#')).skip(1).map(read).collect()
}

fn other_sources() -> Vec<(&'static str, [Option<f64>; 4])> {
    rows(include_str!("gas_constants.csv"))
}

#[test]
fn there_are_gases_enough_and_all_have_a_second_source() {
    assert!(species().len() >= 60);
    let mut names: Vec<&str> = other_sources().iter().map(|(name, _)| *name).collect();
    names.sort_unstable();
    let mut ours: Vec<&str> = species().iter().map(|one| one.name).collect();
    ours.sort_unstable();
    assert_eq!(names, ours);
}

/// The other source has older atomic weights: the stated uncertainty of the present ones covers the difference, beside half a unit of the last
/// figure printed there, at worst that of 20.179 g/mol (neon).
#[test]
fn molar_masses_agree_within_the_uncertainty_of_the_atomic_weights() {
    for (name, [mass, ..]) in other_sources() {
        let Named::Species(one) = find(name).unwrap() else { unreachable!() };
        let uncertainty = molecule(one.formula).unwrap().uncertainty_kg_mol;
        let difference = (one.molar_mass_kg_mol - mass.unwrap()).abs();
        let printed = format!("{}", mass.unwrap());
        let half_unit = 0.5 * 10f64.powi(2 - printed.len() as i32);
        assert!(difference <= uncertainty + half_unit, "{name}: {difference} kg/mol");
    }
}

/// Critical temperature: within 0.2 % of an evaluated series but for the gases named, whose sources are known to disagree by so much; cyclohexane
/// is left out, since the series by way of its library has the values of methylcyclopentane for it. Of n-decane it has 611.7 K, six kelvin
/// below every other source.
#[test]
fn critical_temperatures_agree_with_evaluated_series() {
    let known = [("propadiene", 0.0102), ("carbonyl sulfide", 0.0100), ("vinyl chloride", 0.0095), ("n-decane", 0.0098)];
    let mut compared = 0;
    for (name, [_, t_c, ..]) in other_sources() {
        let Named::Species(one) = find(name).unwrap() else { unreachable!() };
        let (Some(theirs), Some(ours)) = (t_c, one.t_c_k) else { continue };
        if name == "cyclohexane" {
            continue;
        }
        let allowed = known.iter().find(|(known, _)| *known == name).map_or(0.002, |(_, allowed)| *allowed);
        assert!((theirs / ours - 1.0).abs() <= allowed, "{name}: {ours} against {theirs}");
        compared += 1;
    }
    assert!(compared >= 60);
}

/// Critical pressure: within 1 % but for the gases named; see the test above.
#[test]
fn critical_pressures_agree_with_evaluated_series() {
    let known = [
        ("carbonyl sulfide", 0.078),
        ("vinyl chloride", 0.054),
        ("neon", 0.036),
        ("acetylene", 0.026),
        ("ethanol", 0.021),
        ("R11", 0.02),
        ("R14", 0.019),
        ("trans-2-butene", 0.019),
        ("cyclopentane", 0.016),
        ("nitrogen trifluoride", 0.016),
        ("ethylene oxide", 0.015),
        ("deuterium", 0.011),
    ];
    let mut compared = 0;
    for (name, [_, _, p_c, _]) in other_sources() {
        let Named::Species(one) = find(name).unwrap() else { unreachable!() };
        let (Some(theirs), Some(ours)) = (p_c, one.p_c_pa) else { continue };
        if name == "cyclohexane" {
            continue;
        }
        let allowed = known.iter().find(|(known, _)| *known == name).map_or(0.01, |(_, allowed)| *allowed);
        assert!((theirs / ours - 1.0).abs() <= allowed, "{name}: {ours} against {theirs}");
        compared += 1;
    }
    assert!(compared >= 60);
}

/// Acentric factor: within 0.02 but for sulfur hexafluoride, where the other source stands alone (0.150 against 0.210 to 0.218 elsewhere), and
/// those named, whose sources are known to disagree by so much.
#[test]
fn acentric_factors_agree_with_another_compilation() {
    let known = [("ozone", 0.057), ("propadiene", 0.052), ("vinyl chloride", 0.039), ("nitrogen trifluoride", 0.025), ("silane", 0.062)];
    let mut compared = 0;
    for (name, [.., omega]) in other_sources() {
        let Named::Species(one) = find(name).unwrap() else { unreachable!() };
        let (Some(theirs), Some(ours)) = (omega, one.omega) else { continue };
        if name == "sulfur hexafluoride" {
            continue;
        }
        let allowed = known.iter().find(|(known, _)| *known == name).map_or(0.02, |(_, allowed)| *allowed);
        assert!((ours - theirs).abs() <= allowed, "{name}: {ours} against {theirs}");
        compared += 1;
    }
    assert!(compared >= 55);
}

/// ISO 817: inorganic gases have the number 700, or from a molar mass of 100 g/mol on 7000, plus their molar mass in whole grams; a letter
/// tells apart those of equal mass.
#[test]
fn numbers_of_inorganic_refrigerants_hold_their_molar_mass() {
    let mut checked = 0;
    for one in species() {
        let digits = one.r_number.and_then(|number| number.strip_prefix("R7")).map(|digits| digits.trim_end_matches('A'));
        if let Some(digits) = digits.filter(|digits| digits.len() >= 2) {
            assert_eq!(format!("{:02.0}", 1000.0 * one.molar_mass_kg_mol), digits.trim_start_matches("00"), "{}", one.name);
            checked += 1;
        }
    }
    assert!(checked >= 10);
}

/// The polynomials that the table of NASA lacks, by name: a gas that loses its polynomials shows here.
#[test]
fn all_gases_but_those_named_have_polynomials() {
    let without: Vec<&str> = species().iter().filter(|one| one.caloric.is_none()).map(|one| one.name).collect();
    let known = [
        "parahydrogen",
        "isohexane",
        "n-heptane",
        "n-octane",
        "n-nonane",
        "n-decane",
        "R125",
        "R134a",
        "R143a",
        "R152a",
        "R227ea",
        "R245fa",
        "R1234yf",
        "R1234ze(E)",
    ];
    assert_eq!(without, known);
}

/// By mole and by volume are the same for ideal gases; by mass is not. Values: sums of the atomic weights by hand.
#[test]
fn shares_by_mole_volume_and_mass() {
    let parts = |argon: f64| [(find("argon").unwrap(), argon), (find("carbon dioxide").unwrap(), 1.0 - argon)];
    let by_mole = Gas::mixture(&parts(0.82), ShareBasis::Mole).unwrap();
    assert_eq!(by_mole, Gas::mixture(&parts(0.82), ShareBasis::Volume).unwrap());
    assert!((by_mole.molar_mass_kg_mol() / (0.82 * 0.03995 + 0.18 * 0.044009) - 1.0).abs() < 1e-15);
    let by_mass = Gas::mixture(&parts(0.6), ShareBasis::Mass).unwrap();
    assert!((by_mass.molar_mass_kg_mol() * (0.6 / 0.03995 + 0.4 / 0.044009) - 1.0).abs() < 1e-15);
    assert!((by_mass.components()[0].mass_fraction - 0.6).abs() < 1e-15);
    assert_eq!(by_mole.title(), "0.82 argon + 0.18 carbon dioxide by mole");
}

/// The shares by mass of a mixture, given back as shares by mass, are the same mixture.
#[test]
fn mass_fractions_lead_back_to_the_mixture() {
    let air = Gas::named(find("dry air").unwrap());
    let parts: Vec<(Named, f64)> = air.components().iter().map(|part| (Named::Species(part.species), part.mass_fraction)).collect();
    let again = Gas::mixture(&parts, ShareBasis::Mass).unwrap();
    for (a, b) in air.components().iter().zip(again.components()) {
        assert!((a.mole_fraction / b.mole_fraction - 1.0).abs() < 1e-14, "{}", a.species.name);
    }
}

#[test]
fn shares_that_make_no_mixture_say_why() {
    let named = |name: &str| find(name).unwrap();
    let error = Gas::mixture(&[(named("argon"), 0.82), (named("CO2"), 0.16)], ShareBasis::Mole).unwrap_err();
    assert!(matches!(error, MixtureError::Sum { sum } if (sum - 0.98).abs() < 1e-12), "{error}");
    let error = Gas::mixture(&[(named("argon"), 0.5), (named("Ar"), 0.5)], ShareBasis::Mass).unwrap_err();
    assert_eq!(error, MixtureError::Repeated { name: "argon" });
}

/// Kay's rule by hand for a welding gas, and no rule for a gas with a critical point of its own.
#[test]
fn critical_points_of_mixtures() {
    let welding = Gas::mixture(&[(find("argon").unwrap(), 0.82), (find("CO2").unwrap(), 0.18)], ShareBasis::Mole).unwrap();
    let t_c = welding.critical_temperature().unwrap().get::<kelvin>();
    assert!((t_c - (0.82 * 150.687 + 0.18 * 304.1282)).abs() < 1e-10, "{t_c}");
    assert!(welding.critical_source().contains("Kay"));
    let air = Gas::named(find("dry air").unwrap());
    assert_eq!(air.critical_pressure().unwrap().get::<pascal>(), 3_786_000.0);
    assert!(!air.critical_source().contains("Kay"));
}

#[test]
fn rules_of_thumb_say_what_another_program_says() {
    let table: Vec<(&str, [Option<f64>; 4])> = rows(include_str!("rules_of_thumb.csv"));
    assert!(table.len() >= 200);
    for (name, [t_k, p_pa, a, b]) in table {
        let gas = Gas::named(find(name).unwrap());
        let (t, p) = (ThermodynamicTemperature::new::<kelvin>(t_k.unwrap()), Pressure::new::<pascal>(p_pa.unwrap()));
        let rules = rules_of_thumb(&gas, t, p).unwrap();
        assert_eq!((rules.a, rules.b), (a == Some(1.0), b == Some(1.0)), "{name} at {t_k:?} K, {p_pa:?} Pa");
        assert_eq!(rules.allow(), rules.a || rules.b);
    }
}
