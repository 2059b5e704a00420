//! The dimension: which base quantities a quantity is made of.

use super::Rational;
use super::quantity;

/// Largest exponent of a base quantity, in size. Engineering needs a handful; a bound keeps a slip such as `m99` from travelling on.
pub const LARGEST_EXPONENT: i32 = 24;

/// Largest denominator of an exponent.
pub const LARGEST_DENOMINATOR: i32 = 64;

/// Symbols of the coherent SI units of the base quantities, in the order in which a compound is written.
const BASE_UNITS: [(usize, &str); 7] = [(1, "kg"), (0, "m"), (2, "s"), (3, "A"), (4, "K"), (5, "mol"), (6, "cd")];

/// Exponents of the seven base quantities of the SI: length, mass, time, electric current, temperature, amount of
/// substance, luminous intensity. All zero is a pure number, and the default.
#[derive(Clone, Copy, Debug, Default, PartialEq, Eq, PartialOrd, Ord, Hash)]
pub struct Dimension {
    exponents: [Rational; 7],
}

impl Dimension {
    /// A pure number.
    pub const NONE: Self = Self::of([0, 0, 0, 0, 0, 0, 0]);
    /// Length, m.
    pub const LENGTH: Self = Self::of([1, 0, 0, 0, 0, 0, 0]);
    /// Mass, kg.
    pub const MASS: Self = Self::of([0, 1, 0, 0, 0, 0, 0]);
    /// Time, s.
    pub const TIME: Self = Self::of([0, 0, 1, 0, 0, 0, 0]);
    /// Electric current, A.
    pub const CURRENT: Self = Self::of([0, 0, 0, 1, 0, 0, 0]);
    /// Temperature, K.
    pub const TEMPERATURE: Self = Self::of([0, 0, 0, 0, 1, 0, 0]);
    /// Amount of substance, mol.
    pub const AMOUNT: Self = Self::of([0, 0, 0, 0, 0, 1, 0]);
    /// Luminous intensity, cd.
    pub const LUMINOUS_INTENSITY: Self = Self::of([0, 0, 0, 0, 0, 0, 1]);
    /// Area, m².
    pub const AREA: Self = Self::of([2, 0, 0, 0, 0, 0, 0]);
    /// Volume, m³.
    pub const VOLUME: Self = Self::of([3, 0, 0, 0, 0, 0, 0]);
    /// Frequency, 1/s.
    pub const FREQUENCY: Self = Self::of([0, 0, -1, 0, 0, 0, 0]);
    /// Velocity, m/s.
    pub const VELOCITY: Self = Self::of([1, 0, -1, 0, 0, 0, 0]);
    /// Acceleration, m/s².
    pub const ACCELERATION: Self = Self::of([1, 0, -2, 0, 0, 0, 0]);
    /// Force, N.
    pub const FORCE: Self = Self::of([1, 1, -2, 0, 0, 0, 0]);
    /// Pressure, Pa.
    pub const PRESSURE: Self = Self::of([-1, 1, -2, 0, 0, 0, 0]);
    /// Energy, J.
    pub const ENERGY: Self = Self::of([2, 1, -2, 0, 0, 0, 0]);
    /// Power, W.
    pub const POWER: Self = Self::of([2, 1, -3, 0, 0, 0, 0]);
    /// Density, kg/m³.
    pub const DENSITY: Self = Self::of([-3, 1, 0, 0, 0, 0, 0]);
    /// Specific volume, m³/kg.
    pub const SPECIFIC_VOLUME: Self = Self::of([3, -1, 0, 0, 0, 0, 0]);
    /// Molar volume, m³/mol.
    pub const MOLAR_VOLUME: Self = Self::of([3, 0, 0, 0, 0, -1, 0]);
    /// Molar mass, kg/mol.
    pub const MOLAR_MASS: Self = Self::of([0, 1, 0, 0, 0, -1, 0]);
    /// Mass flow, kg/s.
    pub const MASS_FLOW: Self = Self::of([0, 1, -1, 0, 0, 0, 0]);
    /// Volume flow, m³/s.
    pub const VOLUME_FLOW: Self = Self::of([3, 0, -1, 0, 0, 0, 0]);
    /// Molar flow, mol/s.
    pub const MOLAR_FLOW: Self = Self::of([0, 0, -1, 0, 0, 1, 0]);
    /// Specific energy, such as specific enthalpy, J/kg.
    pub const SPECIFIC_ENERGY: Self = Self::of([2, 0, -2, 0, 0, 0, 0]);
    /// Molar energy, J/mol.
    pub const MOLAR_ENERGY: Self = Self::of([2, 1, -2, 0, 0, -1, 0]);
    /// Heat capacity, J/K.
    pub const HEAT_CAPACITY: Self = Self::of([2, 1, -2, 0, -1, 0, 0]);
    /// Specific heat capacity, specific entropy and specific gas constant, J/(kg K).
    pub const SPECIFIC_HEAT_CAPACITY: Self = Self::of([2, 0, -2, 0, -1, 0, 0]);
    /// Molar heat capacity and molar gas constant, J/(mol K).
    pub const MOLAR_HEAT_CAPACITY: Self = Self::of([2, 1, -2, 0, -1, -1, 0]);
    /// Thermal conductivity, W/(m K).
    pub const THERMAL_CONDUCTIVITY: Self = Self::of([1, 1, -3, 0, -1, 0, 0]);
    /// Heat transfer coefficient, W/(m² K).
    pub const HEAT_TRANSFER_COEFFICIENT: Self = Self::of([0, 1, -3, 0, -1, 0, 0]);
    /// Dynamic viscosity, Pa s.
    pub const DYNAMIC_VISCOSITY: Self = Self::of([-1, 1, -1, 0, 0, 0, 0]);
    /// Kinematic viscosity, m²/s.
    pub const KINEMATIC_VISCOSITY: Self = Self::of([2, 0, -1, 0, 0, 0, 0]);

    /// The dimension with these whole exponents of length, mass, time, current, temperature, amount, luminous intensity.
    pub(crate) const fn of(exponents: [i32; 7]) -> Self {
        let mut whole = [Rational::ZERO; 7];
        let mut base = 0;
        while base < 7 {
            whole[base] = Rational::whole(exponents[base]);
            base += 1;
        }
        Self { exponents: whole }
    }

    /// The exponents of length, mass, time, current, temperature, amount, luminous intensity.
    #[must_use]
    pub const fn exponents(self) -> [Rational; 7] {
        self.exponents
    }

    /// Whether it is that of a pure number.
    #[must_use]
    pub fn is_none(self) -> bool {
        self == Self::NONE
    }

    /// The dimension of a product; `None` beyond the limit of powers.
    #[must_use]
    pub fn times(self, other: Self) -> Option<Self> {
        if other.is_none() {
            return Some(self);
        }
        self.combine(|base, own| own.checked_add(other.exponents[base]))
    }

    /// The dimension of a quotient; `None` beyond the limit of powers.
    #[must_use]
    pub fn per(self, other: Self) -> Option<Self> {
        self.combine(|base, own| own.checked_sub(other.exponents[base]))
    }

    /// The dimension of a power; `None` beyond the limit of powers.
    #[must_use]
    pub fn power(self, exponent: Rational) -> Option<Self> {
        if exponent == Rational::ONE {
            return Some(self);
        }
        self.combine(|_, own| if own.is_zero() { Some(own) } else { own.checked_mul(exponent) })
    }

    /// Makes each exponent anew; `None` where one does not fit, is above 24 in size or has a denominator above 64.
    fn combine(self, make: impl Fn(usize, Rational) -> Option<Rational>) -> Option<Self> {
        let mut exponents = self.exponents;
        for (base, exponent) in exponents.iter_mut().enumerate() {
            let made = make(base, *exponent)?;
            if made == *exponent {
                continue;
            }
            let largest = Rational::whole(LARGEST_EXPONENT);
            if made > largest || made.checked_neg()? > largest || made.den() > LARGEST_DENOMINATOR {
                return None;
            }
            *exponent = made;
        }
        Some(Self { exponents })
    }

    /// The trade's word for the commonest quantity of this dimension: `pressure`, `mass flow`, `pure number`.
    #[must_use]
    pub fn name(self) -> Option<&'static str> {
        quantity::commonest(self).map(|known| known.name)
    }

    /// What a message calls it: its name, else its SI unit.
    ///
    /// ```
    /// use gaswright::units::Dimension;
    /// assert_eq!(Dimension::PRESSURE.describe(), "pressure");
    /// let odd = Dimension::VOLUME.times(Dimension::TEMPERATURE).unwrap();
    /// assert_eq!(odd.describe(), "m3.K");
    /// ```
    #[must_use]
    pub fn describe(self) -> String {
        self.name().map_or_else(|| self.si_unit(), str::to_owned)
    }

    /// The coherent SI unit as a sheet spells it, with the names of derived units where the trade uses them: `Pa`, `J/(kg.K)`.
    ///
    /// Empty for a pure number. Fractional exponents, which no sheet can write, stand as `m^(1/2)`.
    #[must_use]
    pub fn si_unit(self) -> String {
        quantity::commonest(self).map_or_else(|| self.in_base_units(), |known| known.si_unit.to_owned())
    }

    fn in_base_units(self) -> String {
        let mut above = Vec::new();
        let mut below = Vec::new();
        for (base, symbol) in BASE_UNITS {
            let exponent = self.exponents[base];
            let size = if exponent < Rational::ZERO { exponent.checked_neg().unwrap_or(exponent) } else { exponent };
            let part = match (size.num(), size.den()) {
                (0, _) => continue,
                (1, 1) => symbol.to_owned(),
                (_, 1) => format!("{symbol}{size}"),
                _ => format!("{symbol}^({size})"),
            };
            if exponent > Rational::ZERO { above.push(part) } else { below.push(part) }
        }
        let numerator = if above.is_empty() && !below.is_empty() { "1".to_owned() } else { above.join(".") };
        match below.as_slice() {
            [] => numerator,
            [single] => format!("{numerator}/{single}"),
            several => format!("{numerator}/({})", several.join(".")),
        }
    }
}

#[cfg(test)]
mod tests {
    use super::*;

    fn half() -> Rational {
        Rational::new(1, 2).unwrap()
    }

    #[test]
    fn products_quotients_and_powers() {
        assert_eq!(Dimension::FORCE.per(Dimension::AREA), Some(Dimension::PRESSURE));
        assert_eq!(Dimension::PRESSURE.times(Dimension::VOLUME), Some(Dimension::ENERGY));
        assert_eq!(Dimension::LENGTH.power(3.into()), Some(Dimension::VOLUME));
        assert_eq!(Dimension::AREA.power(half()), Some(Dimension::LENGTH));
        assert_eq!(Dimension::PRESSURE.per(Dimension::PRESSURE), Some(Dimension::NONE));
        assert!(Dimension::default().is_none());
        assert!(!Dimension::MASS.is_none());
    }

    #[test]
    fn the_limit_of_powers() {
        let largest = Dimension::LENGTH.power(LARGEST_EXPONENT.into()).unwrap();
        assert_eq!(largest.times(Dimension::LENGTH), None);
        assert_eq!(Dimension::NONE.per(largest).unwrap().per(Dimension::LENGTH), None);
        assert_eq!(Dimension::LENGTH.power(Rational::new(1, 64).unwrap()).unwrap().power(half()), None);
        assert_eq!(Dimension::LENGTH.power(Rational::whole(i32::MIN)), None);
        assert!(Dimension::LENGTH.power(Rational::new(27, 50).unwrap()).is_some());
    }

    #[test]
    fn names_and_si_units() {
        for (dimension, name, unit) in [
            (Dimension::NONE, "pure number", ""),
            (Dimension::PRESSURE, "pressure", "Pa"),
            (Dimension::ENERGY, "energy", "J"),
            (Dimension::SPECIFIC_HEAT_CAPACITY, "specific heat capacity", "J/(kg.K)"),
            (Dimension::DENSITY, "density", "kg/m3"),
            (Dimension::SPECIFIC_VOLUME, "specific volume", "m3/kg"),
            (Dimension::HEAT_TRANSFER_COEFFICIENT, "heat transfer coefficient", "W/(m2.K)"),
            (Dimension::MOLAR_FLOW, "molar flow", "mol/s"),
            (Dimension::AMOUNT, "amount of substance", "mol"),
            (Dimension::TEMPERATURE, "temperature", "K"),
            (Dimension::FORCE, "force", "N"),
            (Dimension::POWER, "power", "W"),
            (Dimension::MASS_FLOW, "mass flow", "kg/s"),
            (Dimension::VOLUME_FLOW, "volume flow", "m3/s"),
            (Dimension::MOLAR_MASS, "molar mass", "kg/mol"),
            (Dimension::LUMINOUS_INTENSITY, "luminous intensity", "cd"),
            (Dimension::CURRENT, "electric current", "A"),
        ] {
            assert_eq!(dimension.name(), Some(name));
            assert_eq!(dimension.describe(), name);
            assert_eq!(dimension.si_unit(), unit);
        }
    }

    #[test]
    fn a_dimension_without_a_name_is_described_by_its_unit() {
        let odd = Dimension::of([-2, 1, -3, 0, 0, 0, 0]);
        assert_eq!((odd.name(), odd.describe()), (None, "kg/(m2.s3)".to_owned()));
        assert_eq!(Dimension::of([0, 0, 0, 0, -3, 0, 0]).describe(), "1/K3");
        assert_eq!(Dimension::of([0, 0, 5, 0, 0, 0, 0]).describe(), "s5");
        assert_eq!(Dimension::PRESSURE.power(half()).unwrap().describe(), "kg^(1/2)/(m^(1/2).s)");
    }

    #[test]
    fn si_units_in_base_units_read_back() {
        for exponents in [[-2, 1, -3, 0, 0, 0, 0], [5, -3, 2, 1, -1, 2, -4], [0, 0, 0, 0, -3, 0, 0], [7, 0, 0, 0, 0, 0, 0]] {
            let dimension = Dimension::of(exponents);
            let unit = crate::units::parse(&dimension.si_unit()).unwrap();
            assert_eq!((unit.dimension, unit.factor), (dimension, 1.0), "{}", unit.name);
        }
    }
}
