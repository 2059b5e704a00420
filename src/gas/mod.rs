//! Gases: what they are made of, what they weigh, and how they behave as ideal gases.
//!
//! In come names, shares, temperatures and pressures; out go constants with their sources, and the ideal law and the
//! ideal caloric properties with their ranges. Everything inside is in SI base units; the doors take and give quantities of
//! `uom`, and beside them, for the evaluation tape, plain numbers whose names carry the unit. The room knows nothing of
//! sheets.
//!
//! Read [`mod@species`] first (one pure gas and its constants), then [`name`] (finding it), [`mixture`] (shares) and
//! [`ideal_gas`] (a [`Gas`] to compute with). The heat capacities of all of them are [`polynomial`]s of temperature, whose
//! range and inversion are in [`caloric`]. [`atmosphere`] and [`rules`] stand alone.
//!
//! # Zero of enthalpy and entropy
//!
//! `h` and `s` of every species are zero for its ideal gas at [`REFERENCE_TEMPERATURE_K`] and [`REFERENCE_PRESSURE_PA`]. The
//! entropy of a mixture holds the entropy of mixing, so that `s` of a mixture at the reference state is positive.

pub mod atmosphere;
pub mod atomic_weight;
pub mod caloric;
pub mod catalogue;
pub mod eos;
pub mod humid_air;
pub mod ideal_gas;
mod isoline;
pub mod mixture;
pub mod model_weakness;
pub mod name;
pub mod named_mixture;
pub mod phase;
pub mod polynomial;
mod property_pair;
pub mod real_gas;
pub mod rules;
pub mod saturation;
pub mod source;
pub mod species;
pub mod state_error;
mod table;
pub mod transport;
pub mod verdict;

pub use atmosphere::{OutOfRange, d_standard_pressure_pa_per_m, standard_pressure, standard_pressure_pa};
pub use atomic_weight::{AtomicWeight, atomic_weight, atomic_weights};
pub use caloric::TemperatureRange;
pub use catalogue::{Constant, catalogue};
pub use ideal_gas::{Gas, HeatCapacitySlope};
pub use mixture::{Component, MixtureError, ShareBasis};
pub use name::{Named, UnknownGas, find};
pub use named_mixture::{NamedMixture, named_mixtures};
pub use polynomial::{Interval, Polynomial, REFERENCE_PRESSURE_PA, REFERENCE_TEMPERATURE_K};
pub use real_gas::{ModelKind, ModelRange, NoEquation, RealGas};
pub use rules::{Rules, rules_of_thumb};
pub use source::Source;
pub use species::{ConstantSources, Species, species};
pub use state_error::{Limit, StateError};
