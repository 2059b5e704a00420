//! Formulas: one tree, and the two languages it is written in.
//!
//! An expression of a sheet becomes a [`Formula`], with symbols or with values put in. [`latex`] writes it for the Markdown,
//! [`mathml`] for the page. [`symbol`] says what a name looks like.

mod latex;
mod mathml;
mod symbol;
mod tree;

pub(super) use latex::latex;
pub(super) use mathml::{escape, mathml};
pub(super) use symbol::Symbol;
pub(super) use tree::{Formula, Put};
