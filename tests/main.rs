//! What is checked from outside: one binary, so that it is linked once.
#![expect(clippy::disallowed_methods, reason = "expected values are computed by other code than the program's")]

mod commands;
mod corpus;
mod examples;
mod mutation;
mod pages;
mod reference;
mod report;
mod sarif;
mod solver;
mod syntax;
