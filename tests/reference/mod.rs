//! Published values, each with its source beside it, against what the program computes.

mod air;
mod atmosphere;
mod atomic_weights;
mod caloric;
mod compression;
mod constants;
mod equation_of_state;
mod gas_data;
mod gas_mixing;
mod isentropic_flow;
mod molar_volume;
mod nonlinear_systems;
mod real_gas;
mod reference_volume;
mod relief_area;
mod unit_factors;
mod vessel;
mod worked_sheet;
