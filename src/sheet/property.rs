//! The properties of a state: fields, words, dimensions.

use crate::units::Dimension;

use super::{Property, PropertyRow};

const fn row(property: Property, field: &'static str, word: &'static str, dimension: Dimension) -> PropertyRow {
    PropertyRow { property, field, word, dimension }
}

impl Property {
    /// All properties, in the order in which they are listed.
    pub const ROWS: [PropertyRow; 17] = [
        row(Self::P, "p", "pressure", Dimension::PRESSURE),
        row(Self::T, "T", "temperature", Dimension::TEMPERATURE),
        row(Self::V, "v", "specific volume", Dimension::SPECIFIC_VOLUME),
        row(Self::Rho, "rho", "density", Dimension::DENSITY),
        row(Self::H, "h", "specific enthalpy", Dimension::SPECIFIC_ENERGY),
        row(Self::U, "u", "specific internal energy", Dimension::SPECIFIC_ENERGY),
        row(Self::S, "s", "specific entropy", Dimension::SPECIFIC_HEAT_CAPACITY),
        row(Self::Cp, "cp", "isobaric heat capacity", Dimension::SPECIFIC_HEAT_CAPACITY),
        row(Self::Cv, "cv", "isochoric heat capacity", Dimension::SPECIFIC_HEAT_CAPACITY),
        row(Self::K, "k", "ratio of the heat capacities", Dimension::NONE),
        row(Self::W, "w", "speed of sound", Dimension::VELOCITY),
        row(Self::Z, "Z", "compressibility factor", Dimension::NONE),
        row(Self::Mu, "mu", "dynamic viscosity", Dimension::DYNAMIC_VISCOSITY),
        row(Self::Lambda, "lambda", "thermal conductivity", Dimension::THERMAL_CONDUCTIVITY),
        row(Self::RelativeHumidity, "RH", "relative humidity", Dimension::NONE),
        row(Self::DewPoint, "T_dew", "dew point", Dimension::TEMPERATURE),
        row(Self::HumidityRatio, "W", "humidity ratio", Dimension::NONE),
    ];

    /// What there is to know of it.
    #[must_use]
    pub fn row(self) -> &'static PropertyRow {
        // The table stands in the order of the enum, which a test holds.
        &Self::ROWS[self as usize]
    }

    /// The property of a field.
    #[must_use]
    pub fn of_field(field: &str) -> Option<Self> {
        Self::ROWS.iter().find(|row| row.field == field).map(|row| row.property)
    }

    /// Whether two of its kind can fix the state of a real gas.
    #[must_use]
    pub fn fixes_a_state(self) -> bool {
        matches!(self, Self::P | Self::T | Self::V | Self::Rho | Self::H | Self::U | Self::S)
    }

    /// Whether it says how moist humid air is, and no other gas offers it.
    #[must_use]
    pub fn is_moisture(self) -> bool {
        matches!(self, Self::RelativeHumidity | Self::DewPoint | Self::HumidityRatio)
    }

    /// Whether it is a temperature or a pressure that counts from zero.
    #[must_use]
    pub fn is_absolute(self) -> bool {
        matches!(self, Self::P | Self::T | Self::DewPoint)
    }

    /// Whether it depends on the heat capacity of the gas.
    #[must_use]
    pub fn is_caloric(self) -> bool {
        matches!(self, Self::H | Self::U | Self::S | Self::Cp | Self::Cv | Self::K | Self::W)
    }
}

#[cfg(test)]
mod tests {
    use super::*;

    #[test]
    fn the_table_stands_in_the_order_of_the_properties() {
        for row in &Property::ROWS {
            assert_eq!(row.property.row().field, row.field);
        }
    }
}
