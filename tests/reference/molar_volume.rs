//! The volume of one mole of ideal gas at the reference conditions of the trade.

use gaswright::gas::{Gas, find};
use uom::si::f64::{Pressure, ThermodynamicTemperature};
use uom::si::mass_density::kilogram_per_cubic_meter;
use uom::si::pressure::pascal;
use uom::si::thermodynamic_temperature::kelvin;

/// Pressure of one pound-force per square inch, Pa, from exact definitions.
const PSI_PA: f64 = 0.453_592_37 * 9.806_65 / (0.0254 * 0.0254);

/// 60 degF in K.
const SIXTY_FAHRENHEIT_K: f64 = (60.0 + 459.67) / 1.8;

/// Molar volume, m³/mol, and half a unit of its last printed figure. The first is CODATA 2022; the others are R T/p with the exact R, worked in
/// decimal arithmetic.
const PRINTED: [(f64, f64, f64, f64); 7] = [
    (273.15, 101_325.0, 0.022_413_969_545, 5e-13),
    (273.15, 100_000.0, 0.022_710_954_641, 5e-13),
    (288.15, 101_325.0, 0.023_644_830, 5e-10),
    (288.15, 100_000.0, 0.023_958_124, 5e-10),
    (293.15, 101_325.0, 0.024_055_117, 5e-10),
    (298.15, 100_000.0, 0.024_789_570, 5e-10),
    (SIXTY_FAHRENHEIT_K, 14.696 * PSI_PA, 0.023_690_335, 5e-10),
];

#[test]
fn every_gas_has_the_molar_volume_of_the_reference_conditions() {
    for name in ["nitrogen", "helium", "SF6", "dry air"] {
        let gas = Gas::named(find(name).unwrap());
        for (t_k, p_pa, printed, half_unit) in PRINTED {
            let density = gas.density(ThermodynamicTemperature::new::<kelvin>(t_k), Pressure::new::<pascal>(p_pa));
            let volume = gas.molar_mass_kg_mol() / density.get::<kilogram_per_cubic_meter>();
            assert!((volume - printed).abs() <= half_unit, "{name} at {t_k} K: {volume}");
        }
    }
}

/// 379.4828 ft³/lbmol at 60 degF and 14.696 psi.
#[test]
fn the_molar_volume_of_the_customary_units_follows() {
    let gas = Gas::named(find("methane").unwrap());
    let density = gas.density(ThermodynamicTemperature::new::<kelvin>(SIXTY_FAHRENHEIT_K), Pressure::new::<pascal>(14.696 * PSI_PA));
    let cubic_metres_a_mole = gas.molar_mass_kg_mol() / density.get::<kilogram_per_cubic_meter>();
    let cubic_feet_a_pound_mole = cubic_metres_a_mole * 453.592_37 / (0.3048 * 0.3048 * 0.3048);
    assert!((cubic_feet_a_pound_mole - 379.4828).abs() <= 5e-5 * 1.000_001, "{cubic_feet_a_pound_mole}");
}
