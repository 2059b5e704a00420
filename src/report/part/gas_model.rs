//! What a report says of the model of a gas: its kind, its publication, its range and uncertainty, its constants, the zero of its
//! enthalpy and entropy, and the sources of what it does not hold itself.

use super::answer::emphasis;
use crate::gas::eos::Equation;
use crate::gas::humid_air::{CIPM_P_PA, CIPM_SOURCE, CIPM_T_K, CIPM_UNCERTAINTY, HUMID_P_PA, HUMID_T_K, SATURATION_SOURCE, VIRIAL_SOURCE};
use crate::gas::polynomial::POLYNOMIAL_SOURCE;
use crate::gas::transport::{CorrelationRange, Transport};
use crate::gas::{Gas, ModelKind, RealGas};
use crate::report::draft::Draft;
use crate::report::markdown::escape;
use crate::report::model::is_in_cipm;
use crate::report::typeset::typeset_number;
use crate::report::written::{Written, without_end_zeros};
use crate::sheet::{Expr, ExprId, GasFunction, GasId, GasModel, Property, QuantityId, StateId};
use crate::units::{write_figures, write_to_place};

/// Figures of the limits of a range.
const FIGURES_OF_A_RANGE: u32 = 6;

/// The model of a gas in sentences, as far as the properties of its states need them.
pub(super) fn model(draft: &Draft, gas: GasId, states: &[StateId], properties: &[Property]) -> String {
    let sheet_gas = draft.input.sheet.gas(gas);
    let is_caloric = properties.iter().any(|property| property.is_caloric());
    let title = escape(&draft.input.gas_title(gas));
    let mut sentences = match &sheet_gas.model {
        GasModel::Ideal => {
            let mut sentences = vec![format!("Model of {title}: ideal gas.")];
            if is_caloric && sheet_gas.gas.has_caloric().is_ok() {
                sentences.push(polynomials(&sheet_gas.gas));
                sentences.push(zero(&sheet_gas.gas, properties));
            }
            sentences
        }
        GasModel::Real(real) => {
            let mut sentences = vec![real_model(&title, real), constants(real)];
            if is_caloric {
                sentences.push(zero(&sheet_gas.gas, properties));
            }
            sentences.push("No ideal-gas assumption.".to_owned());
            sentences.extend(reduced(draft, real, states));
            sentences
        }
        GasModel::HumidAir(_) => humid_air(draft, &title, &sheet_gas.gas, states, properties),
    };
    if !matches!(sheet_gas.model, GasModel::HumidAir(_)) {
        sentences.extend(correlations(sheet_gas.gas.as_ref(), sheet_gas.model.is_ideal(), properties));
    }
    sentences.join(" ")
}

/// A temperature in K: `126.192 K`.
fn kelvin(t_k: f64) -> String {
    Written { number: without_end_zeros(&write_figures(t_k, FIGURES_OF_A_RANGE)), unit: "K".to_owned() }.typeset()
}

/// A pressure in MPa, or in kPa where that is small.
fn pascal(p_pa: f64) -> String {
    let (factor, unit) = if p_pa < 1e6 { (1e3, "kPa") } else { (1e6, "MPa") };
    Written { number: without_end_zeros(&write_figures(p_pa / factor, FIGURES_OF_A_RANGE)), unit: unit.to_owned() }.typeset()
}

/// `63.151 K to 1 000 K, up to 2 200 MPa`.
fn span(t_low_k: f64, t_high_k: f64, p_high_pa: f64) -> String {
    format!("{} to {}, up to {}", kelvin(t_low_k), kelvin(t_high_k), pascal(p_high_pa))
}

fn polynomials(gas: &Gas) -> String {
    let range = gas.caloric_range();
    format!(
        "Heat capacity, enthalpy and entropy by polynomials published for {} to {} ({}).",
        kelvin(range.low_k),
        kelvin(range.high_k),
        escape(POLYNOMIAL_SOURCE)
    )
}

/// What the enthalpy and the entropy count from: the same for every model.
fn zero(gas: &Gas, properties: &[Property]) -> String {
    let of_each = if gas.species().is_some() { "" } else { " of each component" };
    let energy = if properties.contains(&Property::U) { "; *u* is *h* − *p* *v*" } else { "" };
    format!("*h* and *s* are zero for the ideal gas{of_each} at 298.15\u{a0}K and 100\u{a0}kPa{energy}.")
}

fn real_model(title: &str, real: &RealGas) -> String {
    let range = real.range();
    let published = match real.kind() {
        ModelKind::PengRobinson => {
            format!("no range is published; used for {}", span(range.t_limit_low_k, range.t_limit_high_k, range.p_limit_pa))
        }
        _ => format!("published for {}", span(range.t_low_k, range.t_high_k, range.p_high_pa)),
    };
    let uncertainty = match real.uncertainty() {
        "" => "its uncertainty is not on record here".to_owned(),
        stated => format!("stated uncertainty: {}", escape(stated)),
    };
    format!("Model of {title}: {} ({}), {published}; {uncertainty}.", real.kind().words(), escape(real.source()))
}

/// The constants that belong to the model.
fn constants(real: &RealGas) -> String {
    let value = |number: f64, figures: u32, unit: &str| {
        Written { number: without_end_zeros(&write_figures(number, figures)), unit: unit.to_owned() }.typeset()
    };
    format!(
        "Gas constant and molar mass are its own: {} and {}.",
        escape(&value(real.gas_constant_j_kg_k(), 7, "J/(kg.K)")),
        escape(&value(1e3 * real.molar_mass_kg_mol(), 7, "g/mol"))
    )
}

/// A reduced coordinate with two decimals, or two figures where it is small.
pub(super) fn reduced_number(value: f64) -> String {
    typeset_number(&if value >= 0.1 { write_to_place(value, -2) } else { write_figures(value, 2) })
}

/// Where the states lie beside the critical point.
fn reduced(draft: &Draft, real: &RealGas, states: &[StateId]) -> Option<String> {
    let (t_c_k, p_c_pa) = real.critical_point()?;
    let places: Vec<String> = states
        .iter()
        .filter_map(|id| {
            let (t_k, p_pa) = draft.input.temperature_and_pressure(*id)?;
            let name = emphasis(&draft.input.sheet.state(*id).name);
            Some(format!("{name} {} and {}", reduced_number(p_pa / p_c_pa), reduced_number(t_k / t_c_k)))
        })
        .collect();
    (!places.is_empty()).then(|| format!("Reduced pressure and temperature: {}.", places.join(", ")))
}

fn humid_air(draft: &Draft, title: &str, dry: &Gas, states: &[StateId], properties: &[Property]) -> Vec<String> {
    let mut by_cipm = Vec::new();
    let mut by_virial = Vec::new();
    for id in states {
        let Some((t_k, p_pa)) = draft.input.temperature_and_pressure(*id) else { continue };
        let name = emphasis(&draft.input.sheet.state(*id).name);
        if is_in_cipm(t_k, p_pa) { by_cipm.push(name) } else { by_virial.push(name) }
    }
    let mut sentences = vec![format!("Model of {title}: dry air and water vapour; properties are per mass of the moist air.")];
    if !by_cipm.is_empty() {
        sentences.push(format!(
            "Density at {} by {}, published for {} to {} and {} to {}; {}.",
            by_cipm.join(", "),
            escape(CIPM_SOURCE),
            kelvin(CIPM_T_K.0),
            kelvin(CIPM_T_K.1),
            pascal(CIPM_P_PA.0),
            pascal(CIPM_P_PA.1),
            escape(CIPM_UNCERTAINTY)
        ));
    }
    if !by_virial.is_empty() {
        sentences.push(format!(
            "Density at {}, outside the range of CIPM-2007, by {}, used for {}.",
            by_virial.join(", "),
            escape(VIRIAL_SOURCE),
            span(HUMID_T_K.0, HUMID_T_K.1, HUMID_P_PA)
        ));
    }
    sentences.push(format!("Saturation of water: {}; relative humidity below that is over ice.", escape(SATURATION_SOURCE)));
    if properties.iter().any(|property| property.is_caloric()) {
        sentences.push(format!("As an ideal mixture: {}", polynomials(dry)));
        sentences.push(zero(dry, properties));
    }
    sentences.push("No ideal-gas assumption on the density.".to_owned());
    for id in states {
        let Some(condensate) = draft.input.condensate(*id) else { continue };
        let amount = Written { number: write_figures(1000.0 * condensate, 3), unit: "g/kg".to_owned() }.typeset();
        let name = emphasis(&draft.input.sheet.state(*id).name);
        sentences.push(format!(
            "At {name} {amount} of water per dry air condense: its properties are those of the saturated air that is left, and *W* counts all the water."
        ));
    }
    sentences
}

/// Where viscosity and conductivity come from, as far as they are used.
fn correlations(gas: &Gas, is_ideal: bool, properties: &[Property]) -> Vec<String> {
    let Some(transport) = Transport::of(gas) else { return Vec::new() };
    let of = |property: Property, word: &str, range: Option<&CorrelationRange>| {
        let range = range.filter(|_| properties.contains(&property))?;
        let uncertainty = match range.uncertainty {
            "" => String::new(),
            stated => format!("; stated uncertainty: {}", escape(stated)),
        };
        let density = if is_ideal { " at the density of the ideal law" } else { "" };
        Some(format!(
            "{word}{density} by the correlation of {}, published for {}{uncertainty}.",
            escape(range.source),
            span(range.t_low_k, range.t_high_k, range.p_high_pa)
        ))
    };
    let viscosity = of(Property::Mu, "Viscosity", transport.viscosity_range());
    viscosity.into_iter().chain(of(Property::Lambda, "Thermal conductivity", transport.conductivity_range())).collect()
}

/// Where the saturation pressures and temperatures in an expression come from, a sentence a gas.
pub(super) fn saturation(draft: &Draft, expressions: &[ExprId]) -> Vec<String> {
    let sheet = draft.input.sheet;
    let mut sentences = Vec::new();
    let mut open: Vec<ExprId> = expressions.to_vec();
    while let Some(expr) = open.pop() {
        if let Expr::Gas(GasFunction::SaturationPressure | GasFunction::SaturationTemperature, gas, _) = sheet.exprs.get(expr)
            && let Some(constants) = sheet.gas(gas).gas.species().and_then(Equation::of).map(Equation::constants)
        {
            let title = escape(&draft.input.gas_title(gas));
            let (low, high) = (kelvin(constants.t_min_k), kelvin(constants.t_c_k));
            let sentence = format!(
                "Saturation of {title} by its reference equation of state ({}), from {low} to the critical point at {high}.",
                escape(constants.source)
            );
            if !sentences.contains(&sentence) {
                sentences.push(sentence);
            }
        }
        open.extend(sheet.exprs.parts(expr));
    }
    sentences
}

/// Where a constant of a gas comes from: of a real gas from its model.
pub(super) fn source_of_constant(draft: &Draft, gas: GasId, id: QuantityId) -> String {
    let sheet_gas = draft.input.sheet.gas(gas);
    let field = draft.input.quantity(id).name.rsplit('.').next().unwrap_or_default();
    match (&sheet_gas.model, field) {
        (GasModel::Real(real), "R" | "M") => format!("that of the {}: {}", real.kind().words(), real.source()),
        (GasModel::Real(real), _) if real.equation().is_some() => format!("{}: {}", real.kind().words(), real.source()),
        (_, "R") => "R/M with R of CODATA 2022, M by atomic weights of CIAAW 2021".to_owned(),
        (_, "M") => "atomic weights of CIAAW 2021".to_owned(),
        _ => sheet_gas.gas.critical_source().to_owned(),
    }
}
