//! The properties of a state: fields, words, dimensions.

use crate::units::Dimension;

use super::{Property, PropertyRow};

const fn row(property: Property, field: &'static str, word: &'static str, dimension: Dimension) -> PropertyRow {
    PropertyRow { property, field, word, dimension }
}

impl Property {
    /// All properties, in the order in which they are listed.
    pub const ROWS: [PropertyRow; 14] = [
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
