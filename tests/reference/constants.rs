//! Physical constants against the published ones, and the figures of a result against the rules of the language.

use gaswright::units::constants::{
    AVOGADRO_CONSTANT, BOLTZMANN_CONSTANT, COLUMN_MERCURY_DENSITY, COLUMN_WATER_DENSITY, CONSTANTS, MOLAR_GAS_CONSTANT, PLANCK_CONSTANT,
    SPEED_OF_LIGHT, STANDARD_ATMOSPHERE, STANDARD_GRAVITY, STANDARD_STATE_PRESSURE, STEFAN_BOLTZMANN_CONSTANT, ZERO_CELSIUS,
};
use gaswright::units::{
    figures_written, find_constant, half_width, last_place_written, parse, place_for, place_of_width, write_figures, write_to_place,
};

/// Name, value of this tool, printed value, relative tolerance, source. Exact values have to be the same double; a value printed with
/// dots behind it (here 10 digits) to half a unit of its last digit.
const PUBLISHED: [(&str, f64, f64, f64, &str); 12] = [
    ("Avogadro constant", AVOGADRO_CONSTANT, 6.022_140_76e23, 0.0, "SI Brochure, 9th edition (2019), section 2.2"),
    ("Boltzmann constant", BOLTZMANN_CONSTANT, 1.380_649e-23, 0.0, "SI Brochure, 9th edition (2019), section 2.2"),
    ("Planck constant", PLANCK_CONSTANT, 6.626_070_15e-34, 0.0, "SI Brochure, 9th edition (2019), section 2.2"),
    ("speed of light", SPEED_OF_LIGHT, 299_792_458.0, 0.0, "SI Brochure, 9th edition (2019), section 2.2"),
    ("molar gas constant", MOLAR_GAS_CONSTANT, 8.314_462_618, 6e-11, "CODATA 2022, 8.314 462 618..."),
    ("Stefan-Boltzmann constant", STEFAN_BOLTZMANN_CONSTANT, 5.670_374_419e-8, 9e-11, "CODATA 2022, 5.670 374 419... e-8"),
    ("standard gravity", STANDARD_GRAVITY, 9.806_65, 0.0, "3rd CGPM (1901); CODATA 2022"),
    ("standard atmosphere", STANDARD_ATMOSPHERE, 101_325.0, 0.0, "10th CGPM (1954); CODATA 2022"),
    ("standard-state pressure", STANDARD_STATE_PRESSURE, 100_000.0, 0.0, "CODATA 2022"),
    ("zero Celsius", ZERO_CELSIUS, 273.15, 0.0, "SI Brochure, 9th edition (2019), section 2.3.1"),
    ("column of water", COLUMN_WATER_DENSITY, 1000.0, 0.0, "NIST SP 811 (2008), appendix B"),
    ("column of mercury", COLUMN_MERCURY_DENSITY, 13_595.1, 0.0, "NIST SP 811 (2008), appendix B"),
];

#[test]
fn constants_are_the_published_ones() {
    for (name, value, printed, tolerance, source) in PUBLISHED {
        assert!(((value - printed) / printed).abs() <= tolerance, "{name}: {value:e}, published {printed:e} ({source})");
    }
}

#[test]
fn constants_that_follow_from_others_do() {
    let molar_gas_constant = AVOGADRO_CONSTANT * BOLTZMANN_CONSTANT;
    assert!((MOLAR_GAS_CONSTANT / molar_gas_constant - 1.0).abs() < 1e-15);
    let (k, h, c, pi) = (BOLTZMANN_CONSTANT, PLANCK_CONSTANT, SPEED_OF_LIGHT, std::f64::consts::PI);
    let stefan_boltzmann = 2.0 * pi * (pi * pi * k * k) * (pi * pi * k * k) / (15.0 * (h * h * h) * (c * c));
    // Fourteen roundings of 1.1e-16 each, and 15 digits of the constant.
    assert!((STEFAN_BOLTZMANN_CONSTANT / stefan_boltzmann - 1.0).abs() < 3e-15);
    // The conventional millimetre of mercury is the torr but for 1.4e-7 (NIST SP 811, appendix B).
    let millimetre_of_mercury = COLUMN_MERCURY_DENSITY * STANDARD_GRAVITY * 1e-3;
    assert!((millimetre_of_mercury / (STANDARD_ATMOSPHERE / 760.0) - 1.0 - 1.4e-7).abs() < 1e-8);
}

#[test]
fn constants_of_a_sheet_have_the_values_of_the_house() {
    for (symbol, value) in [
        ("R", MOLAR_GAS_CONSTANT),
        ("N_A", AVOGADRO_CONSTANT),
        ("k_B", BOLTZMANN_CONSTANT),
        ("g_n", STANDARD_GRAVITY),
        ("pi", std::f64::consts::PI),
    ] {
        assert_eq!(find_constant(symbol).unwrap().value, value, "{symbol}");
    }
    assert_eq!(CONSTANTS.len(), 5);
    assert_eq!(parse("degC").unwrap().offset, ZERO_CELSIUS);
    assert_eq!(parse("atm").unwrap().factor, STANDARD_ATMOSPHERE);
}

#[test]
fn figures_as_written_are_counted() {
    for (number, figures, place, half) in [
        ("2.40", 3, -2, 0.005),
        ("25.0", 3, -1, 0.05),
        ("0.050", 2, -3, 0.000_05),
        ("8.40e4", 3, 2, 50.0),
        ("12", 2, 0, 0.05),
        ("2", 1, 0, 0.005),
        ("4.0", 2, -1, 0.005),
        ("9.6", 2, -1, 0.005),
        ("4.0000", 5, -4, 0.000_05),
        ("100", 3, 0, 0.5),
    ] {
        assert_eq!(figures_written(number), figures, "{number}");
        assert_eq!(last_place_written(number), place, "{number}");
        assert_eq!(half_width(number), half, "{number}");
    }
}

#[test]
fn the_last_place_is_the_power_of_ten_nearest_to_the_full_width() {
    assert_eq!(place_of_width(0.04), -1);
    assert_eq!(place_of_width(0.03), -2);
    // The border lies at the square root of ten.
    assert_eq!((place_of_width(3.162), place_of_width(3.163)), (0, 1));
}

/// A product of readings, carried to first order: the half width of each times the other factor, in quadrature.
fn product(a: &str, b: &str, exact: bool) -> String {
    let (x, y) = (a.parse().unwrap_or(f64::NAN), b.parse().unwrap_or(f64::NAN));
    let (half_a, half_b) = (if exact { 0.0 } else { half_width(a) }, half_width(b));
    let half = (half_a * y).hypot(half_b * x);
    write_to_place(x * y, place_for(x * y, half))
}

#[test]
fn a_result_has_the_figures_of_its_inputs() {
    assert_eq!(product("2.50", "4.0000", false), "10.0");
    assert_eq!(product("2.5000", "4.0000", false), "10.000");
    // At least three figures.
    assert_eq!(product("2", "4.0000", false), "8.00");
    // An exact count adds nothing.
    assert_eq!(product("12", "10.25", true), "123.0");
    // A half width above 5 % of the value may show fewer.
    assert_eq!(write_to_place(0.37, place_for(0.37, 0.05)), "0.4");
    assert_eq!(write_to_place(0.37, place_for(0.37, 0.015)), "0.370");
}

#[test]
fn figures_can_be_asked_for() {
    assert_eq!(write_figures(12.0, 5), "12.000");
    assert_eq!(write_figures(5.684_6, 4), "5.685");
    assert_eq!(write_figures(1_061_234.0, 3), "1060000");
    assert_eq!(write_figures(1.061_234e8, 3), "1.06e8");
    assert_eq!(write_figures(-0.000_012_345, 3), "-1.23e-5");
}
