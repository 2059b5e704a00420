//! The named constants of the language.

use crate::units::{Dimension, constants};

use super::Constant;

impl Constant {
    /// Its value in SI.
    #[must_use]
    pub fn value(self) -> f64 {
        match self {
            Self::Pi => std::f64::consts::PI,
            Self::MolarGasConstant => constants::MOLAR_GAS_CONSTANT,
            Self::Avogadro => constants::AVOGADRO_CONSTANT,
            Self::Boltzmann => constants::BOLTZMANN_CONSTANT,
            Self::StandardGravity => constants::STANDARD_GRAVITY,
        }
    }

    /// Its dimension.
    #[must_use]
    pub fn dimension(self) -> Dimension {
        let per_mole = |dimension: Dimension| dimension.per(Dimension::AMOUNT).unwrap_or(dimension);
        match self {
            Self::Pi => Dimension::NONE,
            Self::MolarGasConstant => Dimension::MOLAR_HEAT_CAPACITY,
            Self::Avogadro => per_mole(Dimension::NONE),
            Self::Boltzmann => Dimension::HEAT_CAPACITY,
            Self::StandardGravity => Dimension::ACCELERATION,
        }
    }

    /// Its word in a sheet.
    #[must_use]
    pub fn word(self) -> &'static str {
        match self {
            Self::Pi => "pi",
            Self::MolarGasConstant => "R",
            Self::Avogadro => "N_A",
            Self::Boltzmann => "k_B",
            Self::StandardGravity => "g_n",
        }
    }
}
