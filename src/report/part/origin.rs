//! Where a result comes from: the relation, and the quantities in it.

use super::answer::emphasis;
use crate::report::draft::Draft;
use crate::report::formula::Put;
use crate::report::markdown::escape;
use crate::sheet::{Expr, ExprId, Property, QuantityId, Relation, RelationOrigin};
use crate::solve::Step;

/// Which relation a closed form comes from, where its first row does not say it already.
pub(super) fn origin(draft: &mut Draft, step: &Step, expression: ExprId) -> String {
    let input = draft.input;
    let (Some(id), Some(relation)) =
        (step.quantities.first(), step.relations.first().and_then(|relation| input.sheet.relations.get(*relation)))
    else {
        return String::new();
    };
    let rearranged = is_rearranged(draft, relation, *id, expression);
    let name = relation_name(draft, relation);
    let mut text = name.clone();
    if rearranged {
        let formula = draft.math(&draft.relation(relation));
        let symbol = draft.set_symbol(*id);
        let name = if name.is_empty() { format!("Relation of line {}", draft.line(relation.statement)) } else { name };
        text = format!("{name}: {formula}, solved for {symbol}");
    }
    let statement =
        input.tree.statements.get(relation.statement).filter(|_| matches!(relation.origin, RelationOrigin::Line | RelationOrigin::Let));
    let mut add = |words: String| {
        text = if text.is_empty() { words } else { format!("{text}; {words}") };
    };
    if let Some(because) = statement.and_then(|statement| statement.because.as_ref()) {
        add(format!("because {}", escape(&because.text)));
    }
    if let Some(source) = statement.and_then(|statement| statement.source.as_ref()) {
        add(format!("source: {}", escape(&source.text)));
    }
    if text.is_empty() { text } else { text + "." }
}

/// The name of a relation, for a sentence that begins with it.
fn relation_name(draft: &Draft, relation: &Relation) -> String {
    let input = draft.input;
    match relation.origin {
        RelationOrigin::Let => String::new(),
        RelationOrigin::Line => {
            let description = input.description(relation.statement);
            if description.is_empty() { String::new() } else { escape(description) }
        }
        RelationOrigin::At(state, _) => format!("What the line of state {} fixes", emphasis(&input.sheet.state(state).name)),
        RelationOrigin::Law(state, property) => {
            let state = input.sheet.state(state);
            let gas = input.sheet.gas(state.gas).gas.title();
            match property {
                Property::H | Property::U | Property::S | Property::Cp | Property::Cv | Property::K | Property::W => {
                    format!("Ideal-gas {} of {} (source under States)", property.row().word, escape(&gas))
                }
                Property::V | Property::Rho | Property::P | Property::T => format!("Ideal gas law of state {}", emphasis(&state.name)),
                _ => String::new(),
            }
        }
        RelationOrigin::Atmosphere => "Standard atmosphere (ISO 2533) at the altitude of the site".to_owned(),
    }
}

/// Whether the closed form is another form of the relation than the written one.
fn is_rearranged(draft: &Draft, relation: &Relation, id: QuantityId, expression: ExprId) -> bool {
    let input = draft.input;
    let written = |side: ExprId, other: ExprId| {
        input.sheet.exprs.get(side) == Expr::Quantity(id) && draft.formula(other, Put::Symbols) == draft.formula(expression, Put::Symbols)
    };
    !written(relation.left, relation.right) && !written(relation.right, relation.left)
}

/// `With V (line 15), ρ (line 19).`, each a link to where it comes from.
pub(super) fn with(draft: &mut Draft, used: &[QuantityId]) -> String {
    let mut seen: Vec<QuantityId> = Vec::new();
    let mut links = Vec::new();
    for id in used {
        if seen.contains(id) {
            continue;
        }
        seen.push(*id);
        let quantity = draft.input.quantity(*id);
        let line = draft.line(quantity.statement);
        let symbol = draft.set_symbol(*id);
        links.push(format!("[{symbol}](#{}) ([line {line}](#line-{line}))", quantity.name));
    }
    if links.is_empty() { String::new() } else { format!("With {}.", links.join(", ")) }
}
