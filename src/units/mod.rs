//! Units: what a unit word stands for, and how finely a number is written.
//!
//! In comes the text of one unit (`kJ/(kg.K)`) or of one number; out go the dimension, the factor and the offset to SI base
//! units, the significant figures, and, where a word is not known, what it probably was. Factors are read from `uom`,
//! never typed: the room only says which of its units have which name, and composes from exact ones what it rounds.
//!
//! Read [`Unit`] and [`parse`] first, then [`registry`], where all names come together, and [`Dimension`]. [`figures`] counts and
//! writes digits, [`constants`] holds the physical constants of the whole house, [`math`] is its one door to elementary
//! functions. This room knows nothing of sheets, gases or pressure bases: that `bar` needs `abs` or `gauge` is said elsewhere.

mod alike;
pub mod constants;
mod dimension;
pub mod figures;
pub mod math;
mod misspelling;
mod names;
mod product;
mod quantity;
mod rational;
mod reading;
mod registry;
mod unit;
mod unit_error;

pub use alike::alike;
pub use constants::{Constant, find_constant};
pub use dimension::{Dimension, LARGEST_DENOMINATOR, LARGEST_EXPONENT};
pub use figures::{figures_written, half_width, last_place_written, place_for, place_of_width, write_figures, write_to_place};
pub use misspelling::{Cure, joined_basis};
pub use quantity::{Quantity, find_quantity, quantities};
pub use rational::Rational;
pub use reading::parse;
pub use registry::{Entry, Registry, registry};
pub use unit::{ReferenceVolume, Unit};
pub use unit_error::{UnitError, UnitErrorKind};
