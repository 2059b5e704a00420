//! The head of the file: a YAML block between `---` lines.
//!
//! The block is read as pairs of keys and values with their places, and every value is typed here, so that all errors of a
//! head come in one run and `03` stays `03`. Where the block is no YAML, each of its entries is read alone.

mod block;
mod key;
mod read;
mod yaml;

pub use key::EDITION;
pub(crate) use key::figures;
pub(crate) use read::read;
