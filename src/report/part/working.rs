//! The working: one entry a result, in an order in which it can be followed, with the sections and the prose of the sheet.

use minijinja::Value;
use serde::Serialize;

use super::answer::emphasis;
use super::gas_model::saturation;
use super::given::described;
use super::narration::narrate;
use super::order::{fixed_state, grouped, is_plain, uses};
use super::origin::{gas_title, origin, origins, with};
use crate::report::draft::{Draft, markdown};
use crate::report::formula::{Formula, Put};
use crate::report::markdown::escape;
use crate::report::table::{count, residual};
use crate::report::typeset::{typeset_number, typeset_unit};
use crate::sheet::{Expr, ExprId, Origin, Property, QuantityId, StateId};
use crate::solve::{Method, Step};

/// An entry of the working.
#[derive(Clone, Debug, Serialize)]
#[serde(tag = "kind", rename_all = "lowercase")]
pub(in crate::report) enum Entry {
    /// A heading of the sheet.
    Section {
        /// Its title.
        title: String,
    },
    /// Prose of the sheet, its live values filled in.
    Prose {
        /// Markdown.
        text: Value,
    },
    /// How one quantity, or several together, were found.
    Step {
        /// The names of what is found, which links lead to.
        anchors: Vec<String>,
        /// What is found.
        what: Value,
        /// The lines of the sheet that say so.
        lines: Vec<u32>,
        /// Formulas below each other, split at their first sign.
        rows: Vec<Row>,
        /// Where it comes from; empty where the formula says it.
        from: Value,
    },
}

/// A row of formulas: what stands up to the sign, and what stands behind it.
#[derive(Clone, Debug, Serialize)]
pub(in crate::report) struct Row {
    left: Value,
    right: Value,
}

/// Room for a line of a formula in em: what a page of A4 has beside the left side.
const ROOM: f64 = 34.0;

/// The working of a solved sheet.
pub(in crate::report) fn working(draft: &mut Draft) -> Vec<Entry> {
    let Some(solution) = draft.input.solution else { return Vec::new() };
    let groups = grouped(draft, &solution.steps);
    let mut entries = Vec::new();
    let statements = &draft.input.tree.statements;
    let mut next = 0;
    for (key, steps) in groups {
        narrate(draft, &mut next, key, &mut entries);
        entries.push(entry(draft, &steps));
    }
    narrate(draft, &mut next, statements.len(), &mut entries);
    // A heading with nothing below it says nothing here.
    let mut kept: Vec<Entry> = Vec::with_capacity(entries.len());
    for entry in entries {
        if matches!((kept.last(), &entry), (Some(Entry::Section { .. }), Entry::Section { .. })) {
            kept.pop();
        }
        kept.push(entry);
    }
    if matches!(kept.last(), Some(Entry::Section { .. })) {
        kept.pop();
    }
    kept
}

fn entry(draft: &mut Draft, steps: &[&Step]) -> Entry {
    let sheet = draft.input.sheet;
    let mut lines: Vec<u32> = steps
        .iter()
        .flat_map(|step| &step.relations)
        .filter_map(|relation| sheet.relations.get(*relation))
        .map(|relation| draft.line(relation.statement))
        .collect();
    lines.sort_unstable();
    lines.dedup();
    let anchors = steps.iter().flat_map(|step| &step.quantities).map(|id| draft.input.quantity(*id).name.clone()).collect();
    let mut rows = Vec::new();
    if let Some(state) = steps.first().and_then(|step| fixed_state(draft, step)) {
        for step in steps {
            fixed_row(draft, step, &mut rows);
        }
        let (what, from) = (fixed_title(draft, state), with(draft, &steps.iter().flat_map(|step| uses(draft, step)).collect::<Vec<_>>()));
        return Entry::Step { anchors, what: markdown(what), lines, rows, from: markdown(from) };
    }
    let Some(step) = steps.first() else {
        return Entry::Step { anchors, what: markdown(""), lines, rows, from: markdown("") };
    };
    let what = title(draft, step);
    let used = uses(draft, step);
    let origin = match &step.method {
        Method::ClosedForm { expression } => {
            let (origin, relation) = origin(draft, step, *expression);
            if let Some(Formula::Chain(left, right)) = relation
                && let Some((sign, right)) = right.into_iter().next()
            {
                push_lines(draft, &Formula::Opening(Some(left), sign), right, &mut rows);
            }
            closed_rows(draft, step, *expression, &mut rows);
            origin
        }
        Method::Numeric { how, evaluations, residual: left } => {
            numeric_rows(draft, step, &mut rows);
            let what = if step.relations.len() == 1 {
                "Solved".to_owned()
            } else {
                format!("{} solved together", count(step.relations.len(), "relation"))
            };
            let how = format!(
                "{what} by {how} in {}; largest scaled residual {}.",
                count(*evaluations as usize, "evaluation"),
                typeset_number(&residual(*left))
            );
            [origins(draft, step), how].join(" ").trim_start().to_owned()
        }
    };
    let expressions: Vec<ExprId> = match &step.method {
        Method::ClosedForm { expression } => vec![*expression],
        Method::Numeric { .. } => {
            step.relations.iter().filter_map(|at| sheet.relations.get(*at)).flat_map(|relation| [relation.left, relation.right]).collect()
        }
    };
    let from = [origin, with(draft, &used), reference(draft, step)]
        .into_iter()
        .chain(saturation(draft, &expressions))
        .filter(|sentence| !sentence.is_empty())
        .collect::<Vec<_>>()
        .join(" ");
    Entry::Step { anchors, what: markdown(what), lines, rows, from: markdown(from) }
}

/// Which reference conditions a result counts by.
fn reference(draft: &Draft, step: &Step) -> String {
    let input = draft.input;
    let [normal, standard, scf] = input.sheet.references;
    let known = [("Nm3", normal), ("Sm3", standard), ("scf", scf.or(standard))];
    let counts = |word: &str| {
        let names = step.quantities.iter().map(|id| &input.quantity(*id).shown.unit.name);
        names.flat_map(|name| name.split(|c: char| !c.is_ascii_alphanumeric())).any(|part| part == word)
    };
    let sentences = known.iter().filter(|(word, _)| counts(word)).filter_map(|(word, conditions)| {
        let line = draft.line((*conditions)?.statement);
        Some(format!("One {} is *p V*/(*R T*) at the reference conditions of [line {line}](#line-{line}).", typeset_unit(word)))
    });
    sentences.collect::<Vec<_>>().join(" ")
}

/// `p_full = p_1 = 10.61 bar abs`, one row a property.
fn fixed_row(draft: &mut Draft, step: &Step, rows: &mut Vec<Row>) {
    let (Some(id), Method::ClosedForm { expression }) = (step.quantities.first(), &step.method) else { return };
    let left = Formula::Opening(Some(Box::new(draft.symbol(*id))), "=");
    let formula = draft.formula(*expression, Put::Symbols);
    let result = result(draft, *id);
    let middle = if matches!(formula, Formula::Value(_)) {
        String::new()
    } else {
        draft.math(&Formula::Opening(Some(Box::new(formula)), "=")) + " "
    };
    rows.push(Row { left: markdown(draft.math(&left)), right: markdown(format!("{middle}{result}")) });
}

fn fixed_title(draft: &Draft, state: StateId) -> String {
    let state = draft.input.sheet.state(state);
    let description = draft.input.description(state.statement);
    if description.is_empty() {
        format!("State {}", emphasis(&state.name))
    } else {
        format!("{}: state {}", escape(description), emphasis(&state.name))
    }
}

/// What a step finds.
fn title(draft: &mut Draft, step: &Step) -> String {
    let titles: Vec<String> = step.quantities.iter().map(|id| quantity_title(draft, *id)).collect();
    titles.join("; ")
}

fn quantity_title(draft: &mut Draft, id: QuantityId) -> String {
    let quantity = draft.input.quantity(id);
    if let Origin::Property(state, property) = quantity.origin {
        return property_title(draft, state, property);
    }
    let described = described(draft, id);
    if described.is_empty() { draft.set_symbol(id) } else { escape(&described) }
}

fn property_title(draft: &Draft, state: StateId, property: Property) -> String {
    let state = draft.input.sheet.state(state);
    let gas = gas_title(draft, state.gas);
    let word = property.row().word;
    let word = word.chars().next().map_or_else(String::new, |first| first.to_uppercase().chain(word.chars().skip(1)).collect::<String>());
    format!("{word} of {} at state {}", escape(&gas), emphasis(&state.name))
}

/// The formula of a closed form, the same with numbers put in, the result.
fn closed_rows(draft: &mut Draft, step: &Step, expression: ExprId, rows: &mut Vec<Row>) {
    let Some(id) = step.quantities.first() else { return };
    let left = Formula::Opening(Some(Box::new(draft.symbol(*id))), "=");
    push_lines(draft, &left, draft.formula(expression, Put::Symbols), rows);
    let equals = Formula::Opening(None, "=");
    let names_something = !uses(draft, step).is_empty() || has_constant(draft, expression);
    if names_something && !is_plain(draft, expression) {
        push_lines(draft, &equals, draft.formula(expression, Put::Values), rows);
    }
    let result = result(draft, *id);
    rows.push(Row { left: markdown(draft.math(&equals)), right: markdown(result) });
}

fn has_constant(draft: &Draft, expression: ExprId) -> bool {
    let exprs = &draft.input.sheet.exprs;
    let mut open = vec![expression];
    while let Some(expr) = open.pop() {
        if matches!(exprs.get(expr), Expr::Constant(_)) {
            return true;
        }
        open.extend(exprs.parts(expr));
    }
    false
}

fn push_lines(draft: &mut Draft, left: &Formula, right: Formula, rows: &mut Vec<Row>) {
    for (at, (sign, line)) in right.lines(ROOM).into_iter().enumerate() {
        let left = if at == 0 { draft.math(left) } else { draft.math(&Formula::Opening(None, sign)) };
        rows.push(Row { left: markdown(left), right: markdown(draft.math(&line)) });
    }
}

/// The relations of a block as written, then each result.
fn numeric_rows(draft: &mut Draft, step: &Step, rows: &mut Vec<Row>) {
    let input = draft.input;
    for relation in step.relations.iter().filter_map(|relation| input.sheet.relations.get(*relation)) {
        let left = Formula::Opening(Some(Box::new(draft.formula(relation.left, Put::Symbols))), "=");
        push_lines(draft, &left, draft.formula(relation.right, Put::Symbols), rows);
    }
    for id in &step.quantities {
        let result = result(draft, *id);
        let left = Formula::Opening(Some(Box::new(draft.symbol(*id))), "=");
        rows.push(Row { left: markdown(draft.math(&left)), right: markdown(result) });
    }
}

/// The result with the figures it is carried on with, then in bold as it is stated.
fn result(draft: &Draft, id: QuantityId) -> String {
    let input = draft.input;
    let quantity = input.quantity(id);
    let Some(carried) = draft.put_in(id) else { return "(no value)".to_owned() };
    let mut stated: Vec<(String, bool)> = Vec::new();
    let shown = crate::report::written::scaled(&quantity.shown, input.si(id).unwrap_or(0.0));
    let own = input.written(id, &shown, input.answer_figures(id));
    let answers = input
        .sheet
        .answers
        .iter()
        .filter(|answer| answer.quantity == id)
        .filter_map(|answer| input.written(id, &answer.shown, answer.figures));
    for written in own.into_iter().chain(answers) {
        let text = escape(&written.typeset());
        if !stated.iter().any(|(other, _)| *other == text) {
            stated.push((text, written.unit == carried.unit));
        }
    }
    let carried = escape(&carried.typeset());
    let mut text = if stated.iter().any(|(other, _)| *other == carried) { String::new() } else { carried };
    for (stated, same_unit) in &stated {
        if !text.is_empty() {
            text.push_str(if *same_unit { " ≈ " } else { ", that is " });
        }
        text.push_str(&format!("**{stated}**"));
    }
    text
}
