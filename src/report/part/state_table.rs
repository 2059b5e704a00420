//! The state points and their properties, in the units in which the sheet shows them.

use minijinja::Value;
use serde::Serialize;

use super::gas_model;
use crate::report::draft::{Draft, markdown};
use crate::report::formula::{Formula, Symbol};
use crate::report::markdown::escape;
use crate::report::typeset::{typeset_number, typeset_unit};
use crate::report::written::{Written, scaled};
use crate::sheet::{GasId, Property, ShownUnit, StateId};

/// Properties that one table of a page has room for; more go into a second one below.
const PROPERTIES_OF_A_TABLE: usize = 6;

/// The states of one gas.
#[derive(Clone, Debug, Serialize)]
pub(in crate::report) struct StateTable {
    gas: String,
    columns: Vec<Value>,
    rows: Vec<Row>,
    /// Model, source and range; empty but for the last table of a gas.
    model: Value,
}

/// A state.
#[derive(Clone, Debug, Serialize)]
struct Row {
    name: String,
    values: Vec<String>,
    line: u32,
}

/// The tables of the states of a solved sheet, one gas after the other.
pub(in crate::report) fn state_tables(draft: &mut Draft) -> Vec<StateTable> {
    let mut tables = Vec::new();
    for gas in (0..draft.input.sheet.gases.len() as u32).map(GasId) {
        let states: Vec<StateId> =
            (0..draft.input.sheet.states.len() as u32).map(StateId).filter(|id| draft.input.sheet.state(*id).gas == gas).collect();
        let mut properties: Vec<(Property, ShownUnit, f64)> = Vec::new();
        for id in &states {
            for (property, quantity) in &draft.input.sheet.state(*id).properties {
                let Some(si) = draft.input.si(*quantity) else { continue };
                match properties.iter_mut().find(|(known, ..)| known == property) {
                    Some((_, _, largest)) => *largest = largest.max(si.abs()),
                    None => properties.push((*property, draft.input.quantity(*quantity).shown.clone(), si.abs())),
                }
            }
        }
        properties.sort_by_key(|(property, ..)| *property);
        // One unit a column: that of the first state, with the prefix that its largest value needs.
        let properties: Vec<(Property, ShownUnit)> =
            properties.into_iter().map(|(property, shown, largest)| (property, scaled(&shown, largest))).collect();
        let n_tables = properties.len().div_ceil(PROPERTIES_OF_A_TABLE);
        for (at, columns) in properties.chunks(PROPERTIES_OF_A_TABLE).enumerate() {
            let used: Vec<Property> = properties.iter().map(|(property, _)| *property).collect();
            let model = if at + 1 == n_tables { gas_model::model(draft, gas, &states, &used) } else { String::new() };
            tables.push(table(draft, gas, &states, columns, model));
        }
    }
    tables
}

fn table(draft: &mut Draft, gas: GasId, states: &[StateId], columns: &[(Property, ShownUnit)], model: String) -> StateTable {
    let input = draft.input;
    let heads = columns
        .iter()
        .map(|(property, shown)| {
            let symbol = draft.math(&Formula::Symbol(Symbol::of_name(bare_name(*property))));
            let unit = shown.text();
            markdown(if unit.is_empty() { symbol } else { format!("{symbol}, {}", escape(&typeset_unit(&unit))) })
        })
        .collect();
    let rows = states
        .iter()
        .map(|id| {
            let state = input.sheet.state(*id);
            let value = |(property, shown): &(Property, ShownUnit)| {
                let quantity = state.properties.iter().find(|(known, _)| known == property).map(|(_, quantity)| *quantity);
                quantity
                    .and_then(|quantity| input.written(quantity, shown, None))
                    .map_or_else(String::new, |Written { number, .. }| typeset_number(&number))
            };
            Row { name: state.name.clone(), values: columns.iter().map(value).collect(), line: draft.line(state.statement) }
        })
        // Of a second table a state that has none of its properties is no part.
        .filter(|row: &Row| row.values.iter().any(|value| !value.is_empty()))
        .collect();
    StateTable { gas: input.gas_title(gas), columns: heads, rows, model: markdown(model) }
}

/// A name whose symbol is that of a property.
fn bare_name(property: Property) -> &'static str {
    match property {
        Property::Cp => "c_p",
        Property::Cv => "c_v",
        other => other.row().field,
    }
}
