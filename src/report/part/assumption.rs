//! Assumptions: first that each gas is ideal, judged at its states, then those that the sheet states.

use minijinja::Value;
use serde::Serialize;
use uom::si::pressure::pascal;
use uom::si::thermodynamic_temperature::kelvin;

use super::answer::{emphasis, words};
use crate::report::draft::{Draft, markdown};
use crate::report::formula::{Formula, Symbol};
use crate::report::markdown::escape;
use crate::report::page::{Plane, Point};
use crate::report::typeset::{NO_BREAK, typeset_number};
use crate::report::verdict::margin;

use crate::sheet::{GasId, StateId};
use crate::solve::{StateVerdict, Verdict};
use crate::units::{write_figures, write_to_place};

/// The assumptions, and the figures of the gases among them.
#[derive(Clone, Debug, Serialize)]
pub(in crate::report) struct Assumptions {
    rows: Vec<Row>,
    planes: Vec<PlaneView>,
    #[serde(skip)]
    pub(in crate::report) figures: Vec<Plane>,
}

/// An assumption and its verdict.
#[derive(Clone, Debug, Serialize)]
struct Row {
    text: String,
    because: Value,
    verdict: &'static str,
    failed: bool,
    line: u32,
}

/// The figure of a gas: its number, and each of its states in numbers.
#[derive(Clone, Debug, Serialize)]
struct PlaneView {
    number: usize,
    gas: String,
    critical_source: String,
    states: Vec<PlaneRow>,
}

/// A state in the reduced plane.
#[derive(Clone, Debug, Serialize)]
struct PlaneRow {
    name: String,
    p_r: String,
    t_r: String,
    a: &'static str,
    b: &'static str,
    verdict: &'static str,
}

/// The assumptions of a solved sheet.
pub(in crate::report) fn assumptions(draft: &mut Draft) -> Assumptions {
    let mut rows = Vec::new();
    let mut planes = Vec::new();
    let mut figures = Vec::new();
    for (gas, states) in states_of_gases(draft) {
        let sheet_gas = draft.input.sheet.gas(gas);
        let title = sheet_gas.gas.title();
        rows.push(Row {
            text: format!("{} is an ideal gas", capitalised(&title)),
            because: markdown(reason(draft, gas, &states)),
            verdict: words(gravest(&states)),
            failed: gravest(&states) == Verdict::Failed,
            line: draft.line(sheet_gas.statement),
        });
        if let Some((view, plane)) = plane(draft, gas, &states, figures.len() + 1) {
            planes.push(view);
            figures.push(plane);
        }
    }
    let input = draft.input;
    for (at, clause) in input.sheet.assumptions.iter().enumerate() {
        let Some(verdict) = input.assumption_verdict(at) else { continue };
        let mut because = escape(&clause.because);
        if let Some(condition) = &clause.condition {
            let formula = draft.math(&draft.condition(condition));
            let judged = input.solution.and_then(|solution| solution.assumptions.get(at)).and_then(Option::as_ref);
            let margin = judged
                .and_then(|judged| margin(Some(condition), judged))
                .map_or_else(String::new, |margin| format!(", {}", margin.typeset()));
            let between = if because.is_empty() { "" } else { ". Judged: " };
            because = format!("{because}{between}{formula}{margin}");
        }
        if !clause.source.is_empty() {
            because = format!("{because} ({})", escape(&clause.source));
        }
        let (failed, line) = (verdict == Verdict::Failed, draft.line(clause.statement));
        rows.push(Row { text: clause.text.clone(), because: markdown(because), verdict: words(verdict), failed, line });
    }
    Assumptions { rows, planes, figures }
}

/// What the sheet assumes of each gas, and the gravest verdict on it.
pub(super) fn gas_verdicts(draft: &Draft) -> Vec<(String, Verdict)> {
    states_of_gases(draft)
        .into_iter()
        .map(|(gas, states)| (format!("{} is an ideal gas", capitalised(&draft.input.sheet.gas(gas).gas.title())), gravest(&states)))
        .collect()
}

/// The gases that have states, with the verdicts on these.
fn states_of_gases<'a>(draft: &Draft<'a>) -> Vec<(GasId, Vec<&'a StateVerdict>)> {
    let input = draft.input;
    let mut gases: Vec<(GasId, Vec<&StateVerdict>)> = Vec::new();
    for (at, state) in input.sheet.states.iter().enumerate() {
        let Some(verdict) = input.state_verdict(StateId(at as u32)) else { continue };
        match gases.iter_mut().find(|(gas, _)| *gas == state.gas) {
            Some((_, states)) => states.push(verdict),
            None => gases.push((state.gas, vec![verdict])),
        }
    }
    gases
}

fn gravest(states: &[&StateVerdict]) -> Verdict {
    let has = |verdict: Verdict| states.iter().any(|state| state.verdict == verdict);
    if has(Verdict::Failed) {
        Verdict::Failed
    } else if has(Verdict::ForJudgement) {
        Verdict::ForJudgement
    } else {
        Verdict::Confirmed
    }
}

/// Why the ideal law is taken to hold: the error where a reference equation tells it, and the rules of thumb.
fn reason(draft: &Draft, gas: GasId, states: &[&StateVerdict]) -> String {
    let sheet = draft.input.sheet;
    let name = |state: &StateVerdict| emphasis(&sheet.state(state.state).name);
    let list = |states: &[&&StateVerdict]| states.iter().map(|state| name(state)).collect::<Vec<_>>().join(", ");
    let mut sentences: Vec<String> = Vec::new();
    let errors: Vec<String> = states
        .iter()
        .filter_map(|state| {
            state.ideal_error_percent.map(|error| format!("{}{NO_BREAK}% at {}", typeset_number(&write_figures(error, 2)), name(state)))
        })
        .collect();
    if !errors.is_empty() {
        let limit = sheet.head.ideal_gas_limit.map_or(1.0, |(limit, _)| limit * 100.0);
        sentences.push(format!("error of the ideal law in density {}; limit {}{NO_BREAK}%", errors.join(", "), write_figures(limit, 2)));
    }
    let kept: Vec<&&StateVerdict> = states.iter().filter(|state| state.rule_a == Some(true) || state.rule_b == Some(true)).collect();
    let refused: Vec<&&StateVerdict> = states.iter().filter(|state| state.rule_a == Some(false) && state.rule_b == Some(false)).collect();
    let unknown: Vec<&&StateVerdict> = states.iter().filter(|state| state.rule_a.is_none() && state.rule_b.is_none()).collect();
    if !kept.is_empty() {
        sentences.push(format!("within the rules of thumb at {}", list(&kept)));
    }
    if !refused.is_empty() {
        sentences.push(format!("outside the rules of thumb at {}", list(&refused)));
    }
    if !unknown.is_empty() {
        let why = if sheet.gas(gas).gas.critical_pressure().is_none() {
            "no critical point is known"
        } else {
            "pressure or temperature is not determined"
        };
        sentences.push(format!("not judged at {}: {why}", list(&unknown)));
    }
    sentences.join("; ")
}

/// The figure of a gas with at least one state of known pressure and temperature.
fn plane(draft: &Draft, gas: GasId, states: &[&StateVerdict], number: usize) -> Option<(PlaneView, Plane)> {
    let sheet = draft.input.sheet;
    let model = &sheet.gas(gas).gas;
    let p_c_pa = model.critical_pressure()?.get::<pascal>();
    let t_c_k = model.critical_temperature()?.get::<kelvin>();
    let mut points = Vec::new();
    let mut rows = Vec::new();
    for state in states {
        let (Some(p_pa), Some(t_k)) = (state.p_pa, state.t_k) else { continue };
        let (p_r, t_r) = (p_pa / p_c_pa, t_k / t_c_k);
        if !(p_r.is_finite() && t_r.is_finite() && p_r > 0.0 && t_r > 0.0) {
            continue;
        }
        let name = sheet.state(state.state).name.clone();
        let reduced = |value: f64| typeset_number(&if value >= 0.1 { write_to_place(value, -2) } else { write_figures(value, 2) });
        let word = |rule: Option<bool>| rule.map_or("unknown", |holds| if holds { "yes" } else { "no" });
        rows.push(PlaneRow {
            name: name.clone(),
            p_r: reduced(p_r),
            t_r: reduced(t_r),
            a: word(state.rule_a),
            b: word(state.rule_b),
            verdict: words(state.verdict),
        });
        points.push(Point { name, p_r, t_r });
    }
    if points.is_empty() {
        return None;
    }
    let (title, critical_source) = (model.title(), model.critical_source().to_owned());
    Some((PlaneView { number, gas: title.clone(), critical_source, states: rows }, Plane { gas: title, points }))
}

fn capitalised(text: &str) -> String {
    let mut characters = text.chars();
    characters.next().map_or_else(String::new, |first| first.to_uppercase().chain(characters).collect())
}

/// The symbols of the reduced plane, for the head of its table.
pub(in crate::report) fn reduced_symbols(draft: &mut Draft) -> [String; 2] {
    ["p", "T"].map(|letter| {
        let symbol = |name: &str| Formula::Symbol(Symbol::of_name(name));
        draft.math(&Formula::Chain(Box::new(symbol(letter)), vec![("/", symbol(&format!("{letter}_c")))]))
    })
}
