//! The names of units, and where each gets its factor: read from `uom`, or composed of units that are exact there.
//!
//! `uom` rounds most customary units to six or seven digits. Those are composed here from their definitions; the only numbers
//! that stand here are those of the definitions themselves (NIST SP 811, 2008, appendix B, and its footnotes).

use uom::typenum::Integer as _;

use super::constants::{COLUMN_MERCURY_DENSITY, COLUMN_WATER_DENSITY};
use super::{Dimension, ReferenceVolume};

/// One name, and where its factor comes from.
pub(super) struct Row {
    pub(super) name: &'static str,
    pub(super) definition: Definition,
}

/// Where a factor comes from.
pub(super) enum Definition {
    /// A unit of `uom`, by its abbreviation there.
    Uom { abbreviation: &'static str, read: Reader, dimension: Dimension },
    /// A temperature scale with an offset: its interval and its zero, both of `uom`, by the same abbreviation.
    Scale { abbreviation: &'static str, interval: Reader, scale: Reader },
    /// A number (numerator, denominator) times a unit text of this registry.
    Composed { number: (f64, f64), of: &'static str },
    /// A volume of gas at reference conditions, by the unit text of the volume.
    Reference { volume: ReferenceVolume, of: &'static str },
}

/// Reads a quantity written as `1 kPa`; its value in SI base units.
pub(super) type Reader = fn(&str) -> Option<f64>;

/// Rows of names read from `uom`: for each of its quantities our names, with its abbreviation where that differs.
macro_rules! read_from_uom {
    ($($module:ident::$quantity:ident { $($name:literal $(= $abbreviation:literal)?),* $(,)? })*) => {
        pub(super) const READ: &[Row] = &[$($(Row {
            name: $name,
            definition: Definition::Uom {
                abbreviation: read_from_uom!(@abbreviation $name $($abbreviation)?),
                read: |text| text.parse::<uom::si::f64::$quantity>().ok().map(|quantity| quantity.value),
                dimension: Dimension::of([
                    <uom::si::$module::Dimension as uom::si::Dimension>::L::I32,
                    <uom::si::$module::Dimension as uom::si::Dimension>::M::I32,
                    <uom::si::$module::Dimension as uom::si::Dimension>::T::I32,
                    <uom::si::$module::Dimension as uom::si::Dimension>::I::I32,
                    <uom::si::$module::Dimension as uom::si::Dimension>::Th::I32,
                    <uom::si::$module::Dimension as uom::si::Dimension>::N::I32,
                    <uom::si::$module::Dimension as uom::si::Dimension>::J::I32,
                ]),
            },
        },)*)*];
    };
    (@abbreviation $name:literal) => { $name };
    (@abbreviation $name:literal $abbreviation:literal) => { $abbreviation };
}

read_from_uom! {
    ratio::Ratio { "%", "ppm", "ppb" }
    angle::Angle { "rad", "deg" = "°", "gon", "arcmin" = "′", "arcsec" = "″" }
    length::Length {
        "m", "km", "dm", "cm", "mm", "um" = "µm", "nm", "pm", "inch" = "in", "ft", "yd", "mi", "nmi" = "M", "mil" = "0.001 in", "uinch" = "μin",
        "angstrom" = "Å",
    }
    area::Area { "ha" }
    volume::Volume { "L", "kL", "hL", "daL", "dL", "cL", "mL", "uL" = "µL", "nL", "pL", "gal_uk" = "gal (UK)" }
    mass::Mass { "kg", "g", "dag", "mg", "ug" = "µg", "ng", "pg", "t", "grain" = "gr" }
    time::Time { "s", "ms", "us" = "µs", "ns", "ps", "ks", "min", "h", "d" }
    frequency::Frequency { "Hz", "uHz" = "µHz", "mHz", "kHz", "MHz", "GHz", "THz", "rpm" = "1/min" }
    velocity::Velocity { "mph" = "mi/h" }
    force::Force { "N", "GN", "MN", "kN", "daN", "cN", "mN", "uN" = "µN", "nN", "dyn", "kgf", "gf" }
    pressure::Pressure {
        "Pa", "TPa", "GPa", "MPa", "kPa", "hPa", "daPa", "mPa", "uPa" = "µPa", "nPa", "pPa", "bar", "mbar", "atm", "mmH2O" = "mm H₂O",
    }
    energy::Energy {
        "J", "EJ", "PJ", "TJ", "GJ", "MJ", "kJ", "mJ", "uJ" = "µJ", "nJ", "pJ",
        "TWh" = "TW · h", "GWh" = "GW · h", "MWh" = "MW · h", "kWh" = "kW · h", "Wh" = "W · h", "mWh" = "mW · h",
        "cal" = "cal (IT)", "kcal" = "kcal (IT)", "cal_th" = "cal", "kcal_th" = "kcal", "erg", "eV", "keV", "MeV",
    }
    power::Power { "W", "TW", "GW", "MW", "kW", "mW", "uW" = "µW", "nW", "pW", "hp_electric" = "hp (E)" }
    amount_of_substance::AmountOfSubstance { "mol", "kmol", "mmol", "umol" = "µmol", "nmol", "pmol", "fmol" }
    temperature_interval::TemperatureInterval { "K", "kK", "mK", "uK" = "µK", "degR" = "°R" }
    dynamic_viscosity::DynamicViscosity { "P", "cP" }
    diffusion_coefficient::DiffusionCoefficient { "St", "cSt" }
    electric_current::ElectricCurrent { "A", "kA", "mA", "uA" = "µA", "nA", "pA" }
    electric_charge::ElectricCharge { "Ah" = "A · h", "mAh" = "mA · h" }
    electric_potential::ElectricPotential { "V", "MV", "kV", "mV", "uV" = "µV", "nV" }
    electrical_resistance::ElectricalResistance {
        "Ohm" = "Ω", "TOhm" = "TΩ", "GOhm" = "GΩ", "MOhm" = "MΩ", "kOhm" = "kΩ", "mOhm" = "mΩ", "uOhm" = "µΩ",
    }
    electrical_conductance::ElectricalConductance { "S", "mS", "uS" = "µS", "nS", "pS" }
    capacitance::Capacitance { "mF", "uF" = "µF", "nF", "pF" }
    inductance::Inductance { "mH", "uH" = "µH", "nH" }
    radioactivity::Radioactivity { "Bq", "kBq", "MBq", "GBq", "TBq", "Ci", "mCi", "uCi" = "µCi", "nCi" }
    luminous_intensity::LuminousIntensity { "cd", "mcd" }
}

/// A row composed of other units.
const fn composed(name: &'static str, number: f64, of: &'static str) -> Row {
    divided(name, number, 1.0, of)
}

/// A row composed of other units and a fraction.
const fn divided(name: &'static str, numerator: f64, denominator: f64, of: &'static str) -> Row {
    Row { name, definition: Definition::Composed { number: (numerator, denominator), of } }
}

/// A row of a temperature scale with an offset.
const fn scale(name: &'static str, abbreviation: &'static str) -> Row {
    Row {
        name,
        definition: Definition::Scale {
            abbreviation,
            interval: |text| text.parse::<uom::si::f64::TemperatureInterval>().ok().map(|quantity| quantity.value),
            scale: |text| text.parse::<uom::si::f64::ThermodynamicTemperature>().ok().map(|quantity| quantity.value),
        },
    }
}

/// A row of a volume at reference conditions.
const fn reference(name: &'static str, volume: ReferenceVolume, of: &'static str) -> Row {
    Row { name, definition: Definition::Reference { volume, of } }
}

/// Names that `uom` lacks or rounds.
pub(super) const COMPOSED: &[Row] = &[
    scale("degC", "°C"),
    scale("degF", "°F"),
    reference("Nm3", ReferenceVolume::Normal, "m3"),
    reference("Sm3", ReferenceVolume::Standard, "m3"),
    reference("scf", ReferenceVolume::Scf, "ft3"),
    // Avoirdupois and what hangs on it.
    composed("lb", 7000.0, "grain"),
    divided("oz", 1.0, 16.0, "lb"),
    composed("oz_troy", 480.0, "grain"),
    composed("klb", 1000.0, "lb"),
    composed("slug", 1.0, "lbf.s2/ft"),
    composed("ton_us", 2000.0, "lb"),
    composed("ton_uk", 2240.0, "lb"),
    composed("lbmol", 1.0, "lb.mol/g"),
    composed("lbf", 1.0, "lb.kgf/kg"),
    composed("ozf", 1.0, "oz.kgf/kg"),
    composed("pdl", 1.0, "lb.ft/s2"),
    composed("klbf", 1000.0, "lbf"),
    composed("tonf_us", 2000.0, "lbf"),
    composed("tonf_uk", 2240.0, "lbf"),
    composed("kip", 1000.0, "lbf"),
    composed("tf", 1.0, "t.kgf/kg"),
    // Pressures.
    composed("psi", 1.0, "lbf/inch2"),
    composed("psf", 1.0, "lbf/ft2"),
    composed("osi", 1.0, "ozf/inch2"),
    composed("ksi", 1000.0, "psi"),
    composed("kbar", 1000.0, "bar"),
    divided("dbar", 1.0, 10.0, "bar"),
    divided("matm", 1.0, 1000.0, "atm"),
    composed("uatm", 1.0, "atm.ppm"),
    divided("ubar", 1.0, 1000.0, "mbar"),
    divided("torr", 1.0, 760.0, "atm"),
    divided("mtorr", 1.0, 760_000.0, "atm"),
    divided("mmHg", COLUMN_MERCURY_DENSITY, COLUMN_WATER_DENSITY, "mmH2O"),
    composed("cmHg", 10.0, "mmHg"),
    composed("umHg", 1.0, "mmHg.um/mm"),
    composed("inHg", 1.0, "mmHg.inch/mm"),
    composed("cmH2O", 10.0, "mmH2O"),
    composed("mH2O", 1000.0, "mmH2O"),
    composed("inH2O", 1.0, "mmH2O.inch/mm"),
    composed("ftH2O", 1.0, "mmH2O.ft/mm"),
    // Energies and powers; Btu and calorie of the International Table unless `_th` says thermochemical.
    composed("Mcal", 1000.0, "kcal"),
    composed("Tcal", 1_000_000_000.0, "kcal"),
    composed("Gcal", 1_000_000.0, "kcal"),
    composed("Btu", 1.0, "lb.kcal.degF/(kg.K)"),
    composed("kBtu", 1000.0, "Btu"),
    composed("MMBtu", 1_000_000.0, "Btu"),
    composed("Btu_th", 1.0, "lb.kcal_th.degF/(kg.K)"),
    composed("hp", 550.0, "ft.lbf/s"),
    composed("hp_metric", 75.0, "kgf.m/s"),
    composed("ton_refrigeration", 12_000.0, "Btu/h"),
    composed("VA", 1.0, "V.A"),
    composed("MVA", 1.0, "MV.A"),
    composed("kVA", 1.0, "kV.A"),
    // Volumes.
    composed("gal_us", 231.0, "inch3"),
    divided("qt_us", 231.0, 4.0, "inch3"),
    divided("pt_us", 231.0, 8.0, "inch3"),
    divided("floz_us", 231.0, 128.0, "inch3"),
    divided("qt_uk", 1.0, 4.0, "gal_uk"),
    divided("floz_uk", 1.0, 160.0, "gal_uk"),
    divided("pt_uk", 1.0, 8.0, "gal_uk"),
    composed("bbl", 42.0, "gal_us"),
    // Angles, times, speeds, viscosities, permeabilities.
    divided("mrad", 1.0, 1000.0, "rad"),
    composed("urad", 1.0, "rad.ppm"),
    composed("week", 7.0, "d"),
    composed("knot", 1.0, "nmi/h"),
    composed("uP", 1.0, "P.ppm"),
    divided("mP", 1.0, 1000.0, "P"),
    composed("reyn", 1.0, "lbf.s/inch2"),
    composed("darcy", 1.0, "cP.cm2/(s.atm)"),
    divided("mdarcy", 1.0, 1000.0, "darcy"),
];
