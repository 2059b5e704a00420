//! The unit: a way to count a quantity, with its way to SI base units.

use super::{Dimension, Entry, Rational, registry};

/// A volume of gas at reference conditions, which is an amount of gas.
#[derive(Clone, Copy, Debug, PartialEq, Eq, PartialOrd, Ord, Hash)]
pub enum ReferenceVolume {
    /// The normal cubic metre, `Nm3`.
    Normal,
    /// The standard cubic metre, `Sm3`.
    Standard,
    /// The standard cubic foot, `scf`.
    Scf,
}

impl ReferenceVolume {
    /// The unit word of it.
    #[must_use]
    pub fn word(self) -> &'static str {
        match self {
            Self::Normal => "Nm3",
            Self::Standard => "Sm3",
            Self::Scf => "scf",
        }
    }
}

/// A unit, made of the units of the registry.
#[derive(Clone, Debug, PartialEq)]
pub struct Unit {
    /// Its spelling, as a sheet writes it: `kJ/(kg.K)`, `degC`, `m3/h`. Empty for a pure number.
    pub name: String,
    /// What it measures. A reference volume counts as an amount of substance.
    pub dimension: Dimension,
    /// SI base units in one of it: SI = value × factor + offset. With [`references`](Self::references) it is the factor of the volume alone.
    pub factor: f64,
    /// The zero of its scale in SI base units; not zero for `degC` and `degF` standing alone only.
    pub offset: f64,
    /// The reference volumes in it, each with its power. Whoever knows the reference conditions multiplies the factor by
    /// (p/(R T)) to this power, which turns m³ into mol.
    pub references: Vec<(ReferenceVolume, Rational)>,
}

impl Unit {
    /// The unit of pure numbers: one, without a name.
    #[must_use]
    pub fn pure() -> Self {
        Self { name: String::new(), dimension: Dimension::NONE, factor: 1.0, offset: 0.0, references: Vec::new() }
    }

    /// A value in this unit, in SI base units.
    ///
    /// ```
    /// assert_eq!(gaswright::units::parse("degC").unwrap().to_si(31.0), 304.15);
    /// ```
    #[must_use]
    pub fn to_si(&self, value: f64) -> f64 {
        value * self.factor + self.offset
    }

    /// A value in SI base units, in this unit.
    #[must_use]
    pub fn from_si(&self, si: f64) -> f64 {
        (si - self.offset) / self.factor
    }

    /// Whether it has exactly the dimension of pressure. Energy per volume has it too.
    #[must_use]
    pub fn is_pressure(&self) -> bool {
        self.dimension == Dimension::PRESSURE
    }

    /// Whether a number before it has to say its pressure basis: a unit of pressure that is not written as an energy per volume, as
    /// that of a heating value is (`MJ/m3`).
    ///
    /// ```
    /// use gaswright::units::parse;
    /// assert!(parse("bar").unwrap().needs_basis());
    /// assert!(!parse("MJ/m3").unwrap().needs_basis());
    /// ```
    #[must_use]
    pub fn needs_basis(&self) -> bool {
        let is_energy = |word: &str| registry().find(word).and_then(Entry::dimension) == Some(Dimension::ENERGY);
        self.is_pressure() && !self.name.split(['.', '/', '(', ')']).any(is_energy)
    }

    /// Whether it has exactly the dimension of temperature.
    #[must_use]
    pub fn is_temperature(&self) -> bool {
        self.dimension == Dimension::TEMPERATURE
    }

    /// The unit of differences on its scale: the same without the offset.
    #[must_use]
    pub fn interval(&self) -> Self {
        Self { offset: 0.0, ..self.clone() }
    }
}

#[cfg(test)]
mod tests {
    use super::super::parse;
    use super::*;

    #[test]
    fn scales_with_an_offset_go_there_and_back() {
        let (celsius, fahrenheit) = (parse("degC").unwrap(), parse("degF").unwrap());
        assert_eq!(celsius.to_si(0.0), 273.15);
        assert_eq!(celsius.from_si(373.15), 100.0);
        // -40 is the same on both; the factor 5/9 is rounded, and 233.15 has digits to 3e-14.
        assert!((fahrenheit.to_si(-40.0) - celsius.to_si(-40.0)).abs() < 1e-13);
        assert!((fahrenheit.from_si(celsius.to_si(30.0)) - 86.0).abs() < 1e-12);
    }

    #[test]
    fn an_interval_has_no_offset() {
        let interval = parse("degF").unwrap().interval();
        assert_eq!((interval.to_si(9.0), interval.name.as_str()), (5.0, "degF"));
    }

    #[test]
    fn kinds_of_units() {
        assert!(parse("kgf/cm2").unwrap().is_pressure());
        assert!(!parse("kg/(s.bar)").unwrap().is_pressure());
        for (text, needs) in [("psi", true), ("lbf/in2", true), ("N/mm2", true), ("kWh/m3", false), ("Btu/ft3", false), ("kJ/kg", false)] {
            assert_eq!(parse(text).unwrap().needs_basis(), needs, "{text}");
        }
        assert!(parse("degR").unwrap().is_temperature());
        assert!(!parse("W/K").unwrap().is_temperature());
        assert_eq!(Unit::pure().to_si(12.0), 12.0);
    }

    #[test]
    fn the_word_of_a_reference_volume_is_its_unit() {
        for reference in [ReferenceVolume::Normal, ReferenceVolume::Standard, ReferenceVolume::Scf] {
            assert_eq!(parse(reference.word()).unwrap().references, [(reference, Rational::ONE)]);
        }
    }
}
