//! Equations of state: reference equations of pure gases, GERG-2008 for mixtures, a cubic equation for the rest.
//!
//! In come temperature and density (or pressure), out go all properties with their derivatives, or a typed error. Read
//! [`property`] first (what a state has), then [`equation`] (a reference equation: constants, range, evaluation), whose parts are
//! `ideal_part` and `residual` with `non_analytic`, read from `record`. `density` and `saturation_line` solve it, `solid_line` says
//! where it ends. What a mixture needs is in `gerg`, `peng_robinson` and `dew_point`.
//! This room knows nothing of sheets and of the ideal law.

mod density;
pub(super) mod dew_point;
pub mod equation;
pub(super) mod gerg;
pub(super) mod ideal_part;
mod non_analytic;
pub(super) mod peng_robinson;
pub mod property;
pub(super) mod record;
pub(super) mod residual;
pub(super) mod saturation_line;
pub(super) mod solid_line;

pub use equation::{Equation, EquationConstants};
pub use gerg::{GERG_SOURCE, GERG_UNCERTAINTY};
pub use peng_robinson::PENG_ROBINSON_SOURCE;
pub use property::{Property, StateProperties, WithSlopes};
pub use saturation_line::SaturationPoint;
