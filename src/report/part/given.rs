//! What was given: every input, and the constants that the relations use.

use std::collections::BTreeSet;

use minijinja::Value;
use serde::Serialize;

use super::gas_model;
use crate::report::draft::{Draft, markdown};
use crate::report::formula::Formula;
use crate::report::typeset::{typeset_reading, typeset_uncertainty, typeset_unit};
use crate::report::written::{Written, without_end_zeros};
use crate::sheet::{Constant, Expr, Origin, QuantityId};
use crate::syntax::{ReferenceName, StatementKind};
use crate::units::{find_constant, write_figures};

/// A row of the table of inputs.
#[derive(Clone, Debug, Serialize)]
pub(in crate::report) struct Given {
    /// The name, which the links of the working lead to; empty for a constant of nature.
    anchor: String,
    symbol: Value,
    what: String,
    value: String,
    si: String,
    uncertainty: String,
    source: String,
    /// `None` for a constant of nature, which no line states.
    line: Option<u32>,
}

/// The inputs in the order of the sheet, then the constants of its gases and of nature that its relations use.
pub(in crate::report) fn givens(draft: &mut Draft) -> Vec<Given> {
    let input = draft.input;
    let ids = || (0..input.sheet.quantities.len() as u32).map(QuantityId);
    let mut rows: Vec<Given> = Vec::new();
    for id in ids().filter(|id| input.quantity(*id).reading.is_some()) {
        let quantity = input.quantity(id);
        let Some(reading) = &quantity.reading else { continue };
        rows.push(Given {
            anchor: quantity.name.clone(),
            symbol: markdown(draft.set_symbol(id)),
            what: described(draft, id),
            value: typeset_reading(&reading.text),
            si: input.in_si(id).map_or_else(String::new, |written| written.typeset()),
            uncertainty: typeset_uncertainty(&reading.uncertainty_text),
            source: quantity.source.clone(),
            line: Some(draft.line(quantity.statement)),
        });
    }
    rows.extend(references(draft));
    let (used, constants) = used(draft);
    for id in ids().filter(|id| used.contains(id) && input.quantity(*id).constant.is_some()) {
        let quantity = input.quantity(id);
        let written = input.in_si(id).map_or_else(String::new, |written| written.typeset());
        let value = draft.put_in(id).map_or_else(String::new, |written| written.typeset());
        let source = if quantity.source.is_empty() { source_of_constant(draft, id) } else { quantity.source.clone() };
        rows.push(Given {
            anchor: quantity.name.clone(),
            symbol: markdown(draft.set_symbol(id)),
            what: described(draft, id),
            value,
            si: written,
            uncertainty: String::new(),
            source,
            line: Some(draft.line(quantity.statement)),
        });
    }
    for constant in constants {
        rows.extend(constant_of_nature(draft, constant));
    }
    rows
}

/// The reference conditions, a row for the temperature and one for the pressure: inputs of every value that counts reference volumes.
fn references(draft: &Draft) -> Vec<Given> {
    let input = draft.input;
    let mut rows = Vec::new();
    for (at, statement) in input.tree.statements.iter().enumerate() {
        let StatementKind::Reference { which, temperature, pressure } = &statement.kind else { continue };
        let (conditions, unit) = match which {
            ReferenceName::Normal => (input.sheet.references[0], "Nm3"),
            ReferenceName::Standard => (input.sheet.references[1], "Sm3"),
            ReferenceName::Scf => (input.sheet.references[2], "scf"),
        };
        let Some(conditions) = conditions.filter(|conditions| conditions.statement == at) else { continue };
        let source = statement.source.as_ref().map_or(String::new(), |text| text.text.clone());
        let written =
            |value: f64, unit: &str| Written { number: without_end_zeros(&write_figures(value, 6)), unit: unit.to_owned() }.typeset();
        let line = Some(draft.line(at));
        for (word, literal, si) in [
            ("temperature", temperature, written(conditions.t_k, "K")),
            ("pressure", pressure, written(conditions.p_pa / 1000.0, "kPa abs")),
        ] {
            rows.push(Given {
                anchor: String::new(),
                symbol: markdown(""),
                what: format!("Reference {word} of {}", typeset_unit(unit)),
                value: typeset_reading(literal.span.of(input.text)),
                si,
                uncertainty: String::new(),
                source: source.clone(),
                line,
            });
        }
    }
    rows
}

/// What a quantity is; empty where the sheet does not say.
pub(super) fn described(draft: &Draft, id: QuantityId) -> String {
    let quantity = draft.input.quantity(id);
    match (quantity.description.as_str(), quantity.origin) {
        ("", Origin::SitePressure) => "Atmospheric pressure".to_owned(),
        ("", Origin::SiteAltitude) => "Altitude above mean sea level".to_owned(),
        (described, Origin::SitePressure) => format!("Atmospheric pressure, {described}"),
        (described, Origin::SiteAltitude) => format!("Altitude above mean sea level, {described}"),
        (described, _) => described.to_owned(),
    }
}

/// The constants of gases and of nature in the relations and conditions of the sheet.
fn used(draft: &Draft) -> (BTreeSet<QuantityId>, Vec<Constant>) {
    let sheet = draft.input.sheet;
    let mut quantities = BTreeSet::new();
    let mut constants: Vec<Constant> = Vec::new();
    let mut open: Vec<_> = sheet.relations.iter().flat_map(|relation| [relation.left, relation.right]).collect();
    while let Some(expr) = open.pop() {
        match sheet.exprs.get(expr) {
            Expr::Quantity(id) => {
                quantities.insert(id);
            }
            Expr::Constant(constant) if !constants.contains(&constant) => constants.push(constant),
            _ => {}
        }
        open.extend(sheet.exprs.parts(expr));
    }
    constants.sort_by_key(|constant| constant.word());
    (quantities, constants)
}

/// Where the constant of a gas comes from.
fn source_of_constant(draft: &Draft, id: QuantityId) -> String {
    let Origin::GasConstant(gas) = draft.input.quantity(id).origin else { return String::new() };
    gas_model::source_of_constant(draft, gas, id)
}

fn constant_of_nature(draft: &mut Draft, constant: Constant) -> Option<Given> {
    if constant == Constant::Pi {
        return None;
    }
    let known = find_constant(constant.word())?;
    let symbol = Formula::constant(constant);
    let number = without_end_zeros(&write_figures(known.value, 15));
    let value = Written { number, unit: known.unit.to_owned() }.typeset();
    Some(Given {
        anchor: String::new(),
        symbol: markdown(draft.math(&symbol)),
        what: known.title.to_owned(),
        value: value.clone(),
        si: value,
        uncertainty: String::new(),
        source: known.source.to_owned(),
        line: None,
    })
}
