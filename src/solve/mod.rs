//! Solving: structure, closed forms, numeric blocks, the evaluation tape, the independent re-check.
//!
//! In comes a [`Sheet`](crate::sheet::Sheet), out goes a [`Solution`] or the reason why there is none. Read
//! [`mod@structure`] (what can be solved, and in which order), `plan` (the sheet compiled to one tape), `run` (blocks), and
//! `solver`, which puts them in a row. This room knows nothing of text.

mod closed_form;
mod explain;
mod judge;
mod linear;
mod newton;
mod physics;
mod plan;
mod program;
mod recheck;
mod refusal;
mod reservation;
mod run;
mod scalar;
mod slip;
mod solution;
mod solver;
mod state_function;
pub mod structure;
mod tape;

pub use program::{Program, Runner};
pub use solution::{Judged, Method, Sides, Solution, StateVerdict, Step, SurplusCheck, Verdict};
pub use solver::{check, solve};
