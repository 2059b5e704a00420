//! The standard atmosphere against published tables.

use gaswright::gas::{d_standard_pressure_pa_per_m, standard_pressure, standard_pressure_pa};
use uom::si::f64::Length;
use uom::si::length::{foot, meter};
use uom::si::pressure::pascal;

/// The table carries the rounding of the library that made it, 1.8e-6 against the formulas of the manual; the rest is its nine figures.
#[test]
fn pressures_are_those_of_the_manual() {
    let table = include_str!("standard_atmosphere.csv");
    let mut rows = 0;
    for line in table.lines().filter(|line| line.starts_with(|first: char| first.is_ascii_digit() || first == '-')) {
        let (altitude, pressure) = line.split_once(',').unwrap();
        let (altitude, pressure): (f64, f64) = (altitude.parse().unwrap(), pressure.parse().unwrap());
        let ours = standard_pressure(Length::new::<meter>(altitude)).unwrap().get::<pascal>();
        assert!((ours / pressure - 1.0).abs() < 3e-6, "{altitude} m: {ours} against {pressure}");
        rows += 1;
    }
    assert!(rows >= 30);
}

/// US Standard Atmosphere 1976 (NOAA-S/T 76-1562), geometric altitude, five figures. It is the same atmosphere up to 32 km, with a gas constant
/// that differs by 2e-7.
#[test]
fn printed_figures_of_the_standard_of_1976() {
    for (altitude, printed, unit) in [(0.0, 101_325.0, 1.0), (2000.0, 79_501.0, 1.0), (10_000.0, 26_500.0, 1.0), (20_000.0, 5529.3, 0.1)] {
        let ours = standard_pressure_pa(altitude);
        assert!((ours - printed).abs() <= 0.5 * unit, "{altitude} m: {ours}");
    }
}

/// Altitude is geometric: taken as geopotential, 10 km would give 26 436 Pa, 0.24 % less.
#[test]
fn altitude_is_geometric() {
    assert!((standard_pressure_pa(10_000.0) / 26_436.0 - 1.0) > 0.002);
}

#[test]
fn sea_level_is_exact_and_the_unit_does_not_matter() {
    assert_eq!(standard_pressure_pa(0.0), 101_325.0);
    let in_feet = standard_pressure(Length::new::<foot>(1000.0)).unwrap();
    assert!((in_feet.get::<pascal>() / standard_pressure_pa(304.8) - 1.0).abs() < 1e-14);
}

/// Central differences over 2 m: truncation is about (Δ/H)²/6 = 3e-9 of the slope with H the scale height of 8 km, rounding about 1e-11.
#[test]
fn the_slope_is_the_difference_quotient() {
    for altitude in [-4990.0, -500.0, 0.0, 12.0, 2400.0, 10_999.0, 11_200.0, 15_000.0, 19_990.0] {
        let quotient = (standard_pressure_pa(altitude + 1.0) - standard_pressure_pa(altitude - 1.0)) / 2.0;
        let slope = d_standard_pressure_pa_per_m(altitude);
        assert!((slope / quotient - 1.0).abs() < 1e-8, "{altitude} m: {slope} against {quotient}");
    }
}

#[test]
fn altitudes_outside_the_range_are_refused_with_it() {
    for altitude in [-5000.1, 20_000.1, f64::NAN, f64::INFINITY, f64::NEG_INFINITY] {
        let error = standard_pressure(Length::new::<meter>(altitude)).unwrap_err();
        assert_eq!((error.low, error.high, error.unit), (-5000.0, 20_000.0, "m"));
        assert!(standard_pressure_pa(altitude).is_nan() && d_standard_pressure_pa_per_m(altitude).is_nan());
    }
    assert!(standard_pressure(Length::new::<meter>(-5000.0)).is_ok() && standard_pressure(Length::new::<meter>(20_000.0)).is_ok());
}
