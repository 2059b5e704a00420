//! Mistakes with state points.

use gaswright::diagnostic::Span;
use gaswright::syntax::{ExprId, Named, Statement, StatementKind};

use super::good_sheet::GoodSheet;
use super::mutant::Mutant;

/// A state: its statement, its name, the properties that its line fixes.
type State<'a> = (&'a Statement, &'a str, &'a [(Named, ExprId)]);

/// The states of a sheet.
fn states(sheet: &GoodSheet) -> Vec<State<'_>> {
    let states = sheet.statements().iter().filter_map(|statement| match &statement.kind {
        StatementKind::State { name, at, .. } => Some((statement, sheet.name_of(*name), at.as_slice())),
        _ => None,
    });
    states.collect()
}

/// The end of the last property of a state.
fn end_of(sheet: &GoodSheet, at: &[(Named, ExprId)]) -> u32 {
    at.iter().map(|(_, id)| sheet.solved.tree.expr(*id).span.end).max().unwrap_or_default()
}

fn has(sheet: &GoodSheet, at: &[(Named, ExprId)], property: &str) -> bool {
    at.iter().any(|(name, _)| sheet.name_of(*name) == property)
}

/// p, v and T all given, by a specific volume that the state does not have.
pub(super) fn third_property(sheet: &GoodSheet) -> Vec<Mutant> {
    let mut mutants = Vec::new();
    for (statement, name, at) in states(sheet) {
        let (property, value) = if has(sheet, at, "v") { ("rho", "4.321 kg/m3") } else { ("v", "0.4321 m3/kg") };
        let end = end_of(sheet, at);
        let text = sheet.with(Span { start: end, end }, &format!(", {property} = {value}"));
        mutants.push(Mutant::new(text, format!("`{name}` with a third property"), sheet.lines_of(statement.span), &[&["two"]]));
    }
    mutants
}

/// One property where two are needed.
pub(super) fn one_property(sheet: &GoodSheet) -> Vec<Mutant> {
    let mut mutants = Vec::new();
    for (statement, name, at) in states(sheet) {
        let [(first, first_id), (_, second_id)] = at else { continue };
        let tree = &sheet.solved.tree;
        let span = Span { start: tree.expr(*first_id).span.end, end: tree.expr(*second_id).span.end };
        let left = sheet.name_of(*first);
        let offered: Vec<String> = ["p", "T", "v", "rho", "h", "s"]
            .iter()
            .filter(|property| **property != left)
            .map(|property| format!("`{name}.{property}`"))
            .collect();
        let offered: Vec<&str> = offered.iter().map(String::as_str).collect();
        let change = format!("`{name}` with `{left}` alone");
        mutants.push(Mutant::new(
            sheet.with(span, ""),
            change,
            sheet.lines_of(statement.span),
            &[&["two", "one more", "second"], &offered],
        ));
    }
    mutants
}

/// Whether a state is of an ideal gas.
fn is_ideal(sheet: &GoodSheet, name: &str) -> bool {
    let read = &sheet.solved.sheet;
    read.states.iter().any(|state| state.name == name && read.gas(state.gas).model.is_ideal())
}

/// Enthalpy and temperature of an ideal gas, which do not count as two. Of a real gas they do.
pub(super) fn dependent_properties(sheet: &GoodSheet) -> Vec<Mutant> {
    let mut mutants = Vec::new();
    for (statement, name, at) in states(sheet).into_iter().filter(|(_, name, _)| is_ideal(sheet, name)) {
        let Some((property, id)) = at.iter().find(|(property, _)| sheet.name_of(*property) == "p").filter(|_| has(sheet, at, "T")) else {
            continue;
        };
        let span = property.span.to(sheet.solved.tree.expr(*id).span);
        for instead in ["h = 5000 J/kg", "u = -80000 J/kg"] {
            let change = format!("`{name}` at `{instead}` and its temperature");
            mutants.push(Mutant::new(sheet.with(span, instead), change, sheet.lines_of(statement.span), &[&["two"], &["depend", "alone"]]));
        }
    }
    mutants
}

/// A property given twice.
pub(super) fn property_twice(sheet: &GoodSheet) -> Vec<Mutant> {
    let mut mutants = Vec::new();
    for (statement, name, at) in states(sheet) {
        let Some((property, id)) = at.first() else { continue };
        let again = sheet.at(property.span.to(sheet.solved.tree.expr(*id).span));
        let end = end_of(sheet, at);
        let text = sheet.with(Span { start: end, end }, &format!(", {again}"));
        mutants.push(Mutant::new(
            text,
            format!("`{name}` with `{again}` twice"),
            sheet.lines_of(statement.span),
            &[&["remove", "once", "one of"]],
        ));
    }
    mutants
}

/// A temperature below the range of the heat capacity, where the state needs one.
pub(super) fn below_the_heat_capacity(sheet: &GoodSheet) -> Vec<Mutant> {
    let mut mutants = Vec::new();
    for (statement, name, at) in states(sheet).into_iter().filter(|(_, name, _)| is_ideal(sheet, name)) {
        let Some((_, id)) = at.iter().find(|(property, _)| sheet.name_of(*property) == "T") else { continue };
        let caloric = |field: &str| matches!(field, "h" | "u" | "s" | "cp" | "cv" | "k" | "w");
        let used =
            sheet.uses().iter().any(|(_, base, field)| sheet.at(*base) == name && field.is_some_and(|field| caloric(sheet.at(field))));
        let temperature = sheet.at(sheet.solved.tree.expr(*id).span);
        let given = sheet.givens().find(|(_, given, value)| *given == temperature && sheet.unit_of(value) == "degC");
        let (true, Some((given, _, value))) = (used, given) else { continue };
        let text = sheet.with(Span { start: value.span.start, end: value.digits.end }, "-150");
        let mut lines = sheet.lines_using(name);
        lines.extend(sheet.lines_of(statement.span).chain(sheet.lines_of(given.span)));
        mutants.push(Mutant::new(text, format!("`{name}` at -150 degC"), lines, &[&["200", "solid", "liquid"]]));
    }
    mutants
}

/// A specific volume for a density: the right number, the wrong property.
pub(super) fn property_of_another_dimension(sheet: &GoodSheet) -> Vec<Mutant> {
    let mut mutants = Vec::new();
    for (statement, name, at) in states(sheet) {
        for (property, _) in at {
            let (here, instead) = match sheet.name_of(*property) {
                "p" => ("pressure", "rho"),
                "T" => ("temperature", "s"),
                "v" => ("specific volume", "rho"),
                "s" => ("specific entropy", "h"),
                "h" => ("specific energy", "s"),
                _ => continue,
            };
            let change = format!("`{instead}` for `{}` of `{name}`", sheet.name_of(*property));
            mutants.push(Mutant::new(
                sheet.with(property.span, instead),
                change,
                sheet.lines_of(statement.span),
                &[&[here, "specific heat capacity"]],
            ));
        }
    }
    mutants
}
