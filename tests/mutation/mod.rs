//! How much is caught: the sheets of `sheets/examples/`, each with one mistake of the trade at a time.
//!
//! An operator makes one kind of mistake wherever a sheet has room for it. A mutant counts as caught where the program finds fault with
//! it, as found on the right line where the finding stands where a colleague would point, and as cured where that finding also says
//! what to do. Read [`mutant`] first, then [`good_sheet`], then the operators ([`quantities`], [`relations`], [`states`], [`gases`],
//! [`paper`], [`slips`]); [`tally`] counts, prints the table and holds the floor below which no share may fall.

mod gases;
mod good_sheet;
mod mutant;
mod paper;
mod quantities;
mod relations;
mod slips;
mod states;
mod tally;
