//! Findings: what a reader of a sheet has to know, as data.
//!
//! Every other room makes [`Diagnostic`]s, none prints them. A finding has a code that stays the same for ever, a
//! place in the text, a cause and a cure. Here they are also drawn: for a terminal, one a line, as JSON and as SARIF.
//! Read [`finding`] first, then [`code`], where each code has one file with its wording and its page.

pub mod code;
pub mod finding;
pub mod json;
mod near;
mod sarif;
mod short;
mod span;
mod terminal;
mod visible;

pub use finding::{Diagnostic, Edit, Label, Severity};
pub use near::nearest;
pub use sarif::{SarifSheet, sarif};
pub use short::short;
pub use span::{LineIndex, Place, Span};
pub use terminal::terminal;
pub use visible::visible;
