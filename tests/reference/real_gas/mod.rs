//! Real gases against tables computed by other programs from the same published equations, and against themselves.

#![allow(clippy::unwrap_used, clippy::print_stdout)]

mod anything_goes_in;
mod critical_point;
mod equation_consistency;
mod equation_library;
mod hostile_numbers;
mod humid_air;
mod iapws;
mod ideal_error;
mod mixtures;
mod phase;
mod pressure_release;
mod property_pairs;
mod saturation;
mod slopes;
mod states;
mod table;
mod transport;
mod virial;
