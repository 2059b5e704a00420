//! The subcommands, one file each: how its arguments are read, and what it does.

pub(super) mod check;
pub(super) mod completions;
pub(super) mod explain;
pub(super) mod gases;
pub(super) mod man;
pub(super) mod new;
pub(super) mod report;
pub(super) mod schema;
pub(super) mod solve;
pub(super) mod template;
pub(super) mod tidy;
pub(super) mod units;

mod argument;
mod gas_page;
