//! Physical constants and conventional values, each with its edition and source.
//!
//! Since the SI of 2019 the first three are exact. Whoever needs a constant takes it from here, so that no second
//! value of it can drift.

/// Avogadro constant, 1/mol, exact. Source: SI Brochure, 9th edition (2019), section 2.2; CODATA 2022.
pub const AVOGADRO_CONSTANT: f64 = 6.022_140_76e23;

/// Boltzmann constant, J/K, exact. Source: SI Brochure, 9th edition (2019), section 2.2; CODATA 2022.
pub const BOLTZMANN_CONSTANT: f64 = 1.380_649e-23;

/// Molar gas constant, J/(mol K): the product of the Avogadro and the Boltzmann constant, all digits of which are
/// exact. Source: CODATA 2022.
pub const MOLAR_GAS_CONSTANT: f64 = 8.314_462_618_153_24;

/// Planck constant, J s, exact. Source: SI Brochure, 9th edition (2019), section 2.2; CODATA 2022.
pub const PLANCK_CONSTANT: f64 = 6.626_070_15e-34;

/// Speed of light in vacuum, m/s, exact. Source: SI Brochure, 9th edition (2019), section 2.2; CODATA 2022.
pub const SPEED_OF_LIGHT: f64 = 299_792_458.0;

/// Stefan-Boltzmann constant, W/(m² K⁴): 2 π⁵ k⁴/(15 h³ c²), exact but for the digits after these. Source: CODATA 2022.
pub const STEFAN_BOLTZMANN_CONSTANT: f64 = 5.670_374_419_184_43e-8;

/// Standard acceleration of gravity, m/s², conventional. Source: 3rd CGPM (1901); CODATA 2022.
pub const STANDARD_GRAVITY: f64 = 9.806_65;

/// Standard atmosphere, Pa, conventional. Source: 10th CGPM (1954), resolution 4; CODATA 2022.
pub const STANDARD_ATMOSPHERE: f64 = 101_325.0;

/// Standard-state pressure, Pa, conventional. Source: IUPAC (1982); CODATA 2022.
pub const STANDARD_STATE_PRESSURE: f64 = 100_000.0;

/// Thermodynamic temperature of zero degrees Celsius, K, by definition. Source: SI Brochure, 9th edition (2019), section 2.3.1.
pub const ZERO_CELSIUS: f64 = 273.15;

/// Density of water in a column that shows a pressure, kg/m³, conventional. Source: NIST SP 811 (2008), appendix B,
/// "conventional" columns of water.
pub const COLUMN_WATER_DENSITY: f64 = 1000.0;

/// Density of mercury in a column that shows a pressure, kg/m³, conventional. Source: NIST SP 811 (2008), appendix B,
/// "conventional" columns of mercury.
pub const COLUMN_MERCURY_DENSITY: f64 = 13_595.1;

/// A constant that a sheet may name.
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct Constant {
    /// Its name in a sheet.
    pub symbol: &'static str,
    /// What it is.
    pub title: &'static str,
    /// Its value in SI base units.
    pub value: f64,
    /// Its SI unit; empty for a pure number.
    pub unit: &'static str,
    /// Where the value comes from.
    pub source: &'static str,
}

/// The constants that a sheet may name, in the order of their symbols.
pub const CONSTANTS: [Constant; 5] = [
    Constant {
        symbol: "N_A",
        title: "Avogadro constant",
        value: AVOGADRO_CONSTANT,
        unit: "1/mol",
        source: "exact by definition: SI Brochure, 9th edition (2019)",
    },
    Constant {
        symbol: "R",
        title: "molar gas constant",
        value: MOLAR_GAS_CONSTANT,
        unit: "J/(mol.K)",
        source: "N_A k_B, exact: CODATA 2022",
    },
    Constant {
        symbol: "g_n",
        title: "standard acceleration of gravity",
        value: STANDARD_GRAVITY,
        unit: "m/s2",
        source: "conventional: 3rd CGPM (1901)",
    },
    Constant {
        symbol: "k_B",
        title: "Boltzmann constant",
        value: BOLTZMANN_CONSTANT,
        unit: "J/K",
        source: "exact by definition: SI Brochure, 9th edition (2019)",
    },
    Constant {
        symbol: "pi",
        title: "ratio of a circle's circumference to its diameter",
        value: std::f64::consts::PI,
        unit: "",
        source: "mathematics",
    },
];

/// The constant that a sheet calls by this symbol.
#[must_use]
pub fn find_constant(symbol: &str) -> Option<&'static Constant> {
    CONSTANTS.iter().find(|constant| constant.symbol == symbol)
}

#[cfg(test)]
mod tests {
    use super::*;

    #[test]
    fn constants_are_in_order_and_found() {
        assert!(CONSTANTS.is_sorted_by_key(|constant| constant.symbol));
        for constant in &CONSTANTS {
            assert_eq!(find_constant(constant.symbol), Some(constant));
        }
        assert_eq!(find_constant("r"), None);
    }

    #[test]
    fn the_unit_of_a_constant_is_that_of_its_value() {
        for constant in CONSTANTS.iter().filter(|constant| !constant.unit.is_empty()) {
            let unit = crate::units::parse(constant.unit).unwrap();
            assert_eq!((unit.factor, unit.offset), (1.0, 0.0), "{}", constant.symbol);
            assert_eq!(unit.dimension.si_unit(), constant.unit, "{}", constant.symbol);
        }
    }
}
