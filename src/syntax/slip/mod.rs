//! Slips: why a line cannot be read, said in the trade's words, with the cure.
//!
//! A line that its rule cannot read is looked at again, alone, from the place where reading stopped ([`explain`]). The
//! mistakes that people really make are looked for first; what is left gets [`expected`], a list of what could stand there.
//! A line that no statement word starts is told by [`statement_word`].

mod expected;
mod explain;
mod number;
mod statement_word;
mod text;
mod token;
mod unit;

pub(crate) use explain::{Stop, explain, fault};
pub(crate) use statement_word::{declared_name, indented_statement, is_misspelt, misspelt};
