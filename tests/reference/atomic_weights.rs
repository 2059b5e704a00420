//! Atomic weights and the molar masses that follow from them.
//!
//! Source of the weights: CIAAW, Standard atomic weights of the elements 2021, abridged values (Prohaska et al. 2022, Pure Appl. Chem. 94).

use gaswright::gas::{Gas, atomic_weight, atomic_weights, find};

/// Symbol, weight and uncertainty as printed: the digits in brackets count in the last places.
const PRINTED: [(&str, &str); 16] = [
    ("H", "1.0080(2)"),
    ("He", "4.002602(2)"),
    ("C", "12.011(2)"),
    ("N", "14.007(1)"),
    ("O", "15.999(1)"),
    ("F", "18.998403162(5)"),
    ("Ne", "20.1797(6)"),
    ("Si", "28.085(1)"),
    ("P", "30.973761998(5)"),
    ("S", "32.06(2)"),
    ("Cl", "35.45(1)"),
    ("Ar", "39.95(16)"),
    ("Br", "79.904(3)"),
    ("Kr", "83.798(2)"),
    ("I", "126.90447(3)"),
    ("Xe", "131.293(6)"),
];

#[test]
fn atomic_weights_are_those_of_2021() {
    for (symbol, printed) in PRINTED {
        let (value, uncertainty) = printed.trim_end_matches(')').split_once('(').unwrap();
        let decimals = value.split_once('.').unwrap().1.len();
        let uncertainty = format!("{uncertainty}e-{decimals}").parse::<f64>().unwrap();
        let ours = atomic_weight(symbol).unwrap();
        assert_eq!(ours.weight_g_mol, value.parse::<f64>().unwrap(), "{symbol}");
        assert!((ours.uncertainty_g_mol / uncertainty - 1.0).abs() < 1e-12, "{symbol}");
    }
}

#[test]
fn every_element_of_the_crate_is_in_the_table_above() {
    for element in atomic_weights() {
        // Deuterium is an isotope and has no standard atomic weight: half of the 4.0282 g/mol that Richardson, Leachman, Lemmon 2014
        // (J. Phys. Chem. Ref. Data 43: 013103) give for D2, to the half unit of its last figure.
        if element.symbol == "D" {
            assert!((element.weight_g_mol - 0.5 * 4.0282).abs() < 0.5 * 0.00005);
        } else {
            assert!(PRINTED.iter().any(|(symbol, _)| *symbol == element.symbol), "{}", element.symbol);
        }
    }
}

/// Sums of the printed weights, g/mol, worked by hand to the figures shown.
#[test]
fn molar_masses_follow_from_the_formula() {
    for (formula, printed) in [
        ("H2", "2.016"),
        ("He", "4.0026"),
        ("N2", "28.014"),
        ("O2", "31.998"),
        ("CO2", "44.009"),
        ("CO", "28.010"),
        ("CH4", "16.043"),
        ("C2H6", "30.070"),
        ("C3H8", "44.097"),
        ("n-butane", "58.124"),
        ("C2H4", "28.054"),
        ("C2H2", "26.038"),
        ("NH3", "17.031"),
        ("H2S", "34.076"),
        ("SO2", "64.058"),
        ("N2O", "44.013"),
        ("SF6", "146.05"),
        ("H2O", "18.015"),
    ] {
        let grams = 1000.0 * Gas::named(find(formula).unwrap()).molar_mass_kg_mol();
        let decimals = printed.split_once('.').unwrap().1.len();
        assert_eq!(format!("{grams:.decimals$}"), printed, "{formula}");
    }
}

/// CIPM-2007 gives 28.96546 g/mol (Picard et al. 2008, Metrologia 45: 149-155), the US Standard Atmosphere 1976 28.9644 g/mol. Real dry air varies by
/// more than their difference of 4e-5, through its carbon dioxide, and argon made from air is 5e-5 lighter than its standard weight.
#[test]
fn dry_air_weighs_what_the_standards_say() {
    let grams = 1000.0 * Gas::named(find("dry air").unwrap()).molar_mass_kg_mol();
    assert!((grams / 28.96546 - 1.0).abs() < 5e-5, "{grams}");
    assert!((grams / 28.9644 - 1.0).abs() < 5e-5, "{grams}");
}
