//! Viscosity and thermal conductivity of pure gases and of dry air, by published correlations.
//!
//! In come temperature and density, out go mu and lambda with their derivatives, source and range. A correlation is a thin gas part, a
//! first dependence on density and a dense part, and for the conductivity an enhancement near the critical point that takes its
//! heat capacities and compressibility from the reference equation. Read [`correlation`] first (the door), then `viscosity` and
//! `conductivity`; `record` reads the terms that ship, `published` holds the forms that belong to one gas alone, `water`
//! and `helium` those that are long.

mod conductivity;
pub mod correlation;
mod helium;
mod published;
mod record;
mod viscosity;
mod water;

pub use correlation::{CorrelationRange, NoCorrelation, Transport};
