//! gaswright: gas calculations that a colleague can check.
//!
//! A sheet is a text of given quantities and unordered relations. [`solve()`] takes it the whole way, and this is the way:
//!
//! ```text
//! text ──syntax──▶ Tree ──sheet──▶ Sheet ──solve──▶ Solution ──report──▶ md · html · json
//!                           ▲                 ▲
//!                         units              gas
//! ```
//!
//! Each stage has one room and one product of plain data; none prints, none stops at the first error, and what is wrong
//! comes back as [findings](diagnostic::Diagnostic). Rooms stand in one order, [`diagnostic`], [`units`], [`syntax`],
//! [`gas`], [`sheet`], [`solve`](mod@crate::solve), [`report`], [`cli`], and use only rooms before them.
//!
//! ```
//! let solved = gaswright::solve("given V = 3.20 m3 \"Volume\" from \"Plate\"\n\
//!                                given m = 3.90 kg \"Mass\" from \"Scale\"\n\
//!                                let rho = m / V in kg/m3\n\
//!                                answer rho\n");
//! let solution = solved.solution.expect("the sheet is in order");
//! let rho = solved.sheet.find("rho").expect("the sheet declares it");
//! assert_eq!(solution.values[rho.0 as usize], 3.90 / 3.20);
//! ```

// The parser that the grammar makes names its vectors by this crate.
extern crate alloc;

pub mod cli;
pub mod diagnostic;
pub mod gas;
mod pipeline;
pub mod report;
pub mod sheet;
pub mod solve;
pub mod syntax;
pub mod units;

pub use pipeline::{Checked, ExitStatus, Solved, check, solve};
