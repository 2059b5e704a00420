//! The parts of a report, each as the template sees it: words, numbers already rounded and written, formulas.
//!
//! Plain strings are texts of the sheet, which the template escapes; values made by `markdown` are Markdown already.

mod answer;
mod assumption;
mod check;
mod gas_model;
mod given;
mod head;
mod listing;
mod narration;
mod order;
mod origin;
mod state_table;
mod working;

pub(super) use answer::answers;
pub(super) use assumption::{assumptions, reduced_symbols};
pub(super) use check::{cautions, checks, findings};
pub(super) use given::givens;
pub(super) use head::head;
pub(super) use listing::listing;
pub(super) use state_table::state_tables;
pub(super) use working::working;
