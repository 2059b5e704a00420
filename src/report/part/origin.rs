//! Where a result comes from: the relation, and the quantities in it.

use super::answer::emphasis;
use crate::report::draft::Draft;
use crate::report::formula::{Formula, Put};
use crate::report::markdown::escape;
use crate::report::model::model_words;
use crate::sheet::{Expr, ExprId, GasId, GasModel, Property, QuantityId, Relation, RelationOrigin};
use crate::solve::Step;

/// Width in em above which a relation is not set within a sentence.
const WIDEST_IN_A_SENTENCE: f64 = 18.0;

/// Which relation a closed form comes from, where its first row does not say it already; and that relation as written, where it
/// needs a row of its own.
pub(super) fn origin(draft: &mut Draft, step: &Step, expression: ExprId) -> (String, Option<Formula>) {
    let input = draft.input;
    let (Some(id), Some(relation)) =
        (step.quantities.first(), step.relations.first().and_then(|relation| input.sheet.relations.get(*relation)))
    else {
        return (String::new(), None);
    };
    let name = relation_name(draft, relation);
    let mut sentences = Vec::new();
    let mut row = None;
    if is_rearranged(draft, relation, *id, expression) {
        let formula = draft.relation(relation);
        let symbol = draft.set_symbol(*id);
        let name = if name.is_empty() { format!("Relation of line {}", draft.line(relation.statement)) } else { name };
        if formula.is_tall() || formula.width() > WIDEST_IN_A_SENTENCE {
            sentences.push(format!("{name}, first line, solved for {symbol}"));
            row = Some(formula);
        } else {
            sentences.push(format!("{name}: {}, solved for {symbol}", draft.math(&formula)));
        }
    } else if !name.is_empty() {
        sentences.push(name);
    }
    sentences.extend(grounds(draft, relation));
    (closed(&sentences), row)
}

/// The names and grounds of the relations of a block.
pub(super) fn origins(draft: &Draft, step: &Step) -> String {
    let mut sentences: Vec<String> = Vec::new();
    for relation in step.relations.iter().filter_map(|relation| draft.input.sheet.relations.get(*relation)) {
        for sentence in Some(relation_name(draft, relation)).filter(|name| !name.is_empty()).into_iter().chain(grounds(draft, relation)) {
            if !sentences.contains(&sentence) {
                sentences.push(sentence);
            }
        }
    }
    closed(&sentences)
}

/// Why a relation holds and where it stands, as its line says.
fn grounds(draft: &Draft, relation: &Relation) -> Vec<String> {
    let stated = matches!(relation.origin, RelationOrigin::Line | RelationOrigin::Let);
    let Some(statement) = draft.input.tree.statements.get(relation.statement).filter(|_| stated) else { return Vec::new() };
    let because = statement.because.as_ref().map(|text| format!("Because: {}", escape(&text.text)));
    let source = statement.source.as_ref().map(|text| format!("Source: {}", escape(&text.text)));
    because.into_iter().chain(source).collect()
}

/// Sentences, each with its full stop.
fn closed(sentences: &[String]) -> String {
    sentences.iter().map(|sentence| format!("{}.", sentence.trim_end_matches('.'))).collect::<Vec<_>>().join(" ")
}

/// Characters of the title of a gas above which its name in the sheet stands for it.
const LONGEST_TITLE: usize = 32;

/// What a gas is called in a sentence.
pub(super) fn gas_title(draft: &Draft, gas: GasId) -> String {
    let title = draft.input.gas_title(gas);
    if title.chars().count() > LONGEST_TITLE { draft.input.sheet.gas(gas).name.clone() } else { title }
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
            let gas = gas_title(draft, state.gas);
            let sheet_gas = input.sheet.gas(state.gas);
            // Where both are used, one is the inverse of the other whatever the model.
            let inverse = property == Property::Rho && state.properties.iter().any(|(other, _)| *other == Property::V);
            match (&sheet_gas.model, property) {
                (GasModel::Real(_) | GasModel::HumidAir(_), Property::Rho) if inverse => {
                    return format!("Density and specific volume of state {}", emphasis(&state.name));
                }
                (_, Property::Mu | Property::Lambda) => {
                    return format!("Published correlation of the {} of {} (source under States)", property.row().word, escape(&gas));
                }
                (GasModel::Real(real), _) => {
                    return format!(
                        "State {} by {} for {} (source under States)",
                        emphasis(&state.name),
                        model_words(real.kind()),
                        escape(&gas)
                    );
                }
                (GasModel::HumidAir(_), _) => {
                    return format!("Model of humid air at state {} (source under States)", emphasis(&state.name));
                }
                (GasModel::Ideal, _) => {}
            }
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
