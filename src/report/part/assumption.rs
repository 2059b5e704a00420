//! Assumptions: first that each gas is ideal, judged at its states, then those that the sheet states.

use minijinja::Value;
use serde::Serialize;
use uom::si::pressure::pascal;
use uom::si::thermodynamic_temperature::kelvin;

use super::answer::{emphasis, words};
use super::gas_model::reduced_number;
use crate::gas::verdict::{IdealError, Judge};
use crate::report::draft::{Draft, markdown};
use crate::report::formula::{Formula, Symbol};
use crate::report::markdown::escape;
use crate::report::model::{judge_source, limit_text, model_words};
use crate::report::page::{Plane, Point};
use crate::report::typeset::{NO_BREAK, typeset_number, typeset_unit};
use crate::report::verdict::margin;
use crate::sheet::{GasId, Property, StateId};
use crate::solve::{StateVerdict, Verdict};
use crate::units::write_to_place;

/// The assumptions, and the figures of the gases among them.
#[derive(Clone, Debug, Serialize)]
pub(in crate::report) struct Assumptions {
    rows: Vec<Row>,
    gases: Vec<GasView>,
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

/// An ideal gas: the errors of its law, and its figure.
#[derive(Clone, Debug, Serialize)]
struct GasView {
    judged: Option<JudgedGas>,
    plane: Option<PlaneView>,
}

/// The errors of the ideal law of one gas.
#[derive(Clone, Debug, Serialize)]
struct JudgedGas {
    head: String,
    columns: Vec<Value>,
    rows: Vec<JudgedRow>,
    note: Value,
}

/// A state and the errors of the ideal law there.
#[derive(Clone, Debug, Serialize)]
struct JudgedRow {
    name: String,
    values: Vec<Value>,
    verdict: &'static str,
    failed: bool,
    line: u32,
}

/// What the ideal law may be off in, and how it is shown.
#[derive(Clone, Copy)]
struct Deviation {
    property: Property,
    symbol: &'static str,
    unit: &'static str,
    of: fn(&IdealError) -> f64,
    /// From SI to the unit, and the decimal place; a percentage has its own.
    factor: f64,
    place: i32,
}

impl Deviation {
    const DENSITY: Self =
        Self { property: Property::Rho, symbol: "rho", unit: "%", of: |errors| errors.density_percent, factor: 1.0, place: -2 };
    const OTHERS: [Self; 4] = [
        Self { property: Property::Cp, symbol: "c_p", unit: "%", of: |errors| errors.cp_percent, factor: 1.0, place: -2 },
        Self { property: Property::W, symbol: "w", unit: "%", of: |errors| errors.w_percent, factor: 1.0, place: -2 },
        Self { property: Property::H, symbol: "h", unit: "kJ/kg", of: |errors| errors.h_j_kg, factor: 1e-3, place: -2 },
        Self { property: Property::S, symbol: "s", unit: "J/(kg.K)", of: |errors| errors.s_j_kg_k, factor: 1.0, place: -2 },
    ];
}

/// The figure of a gas: its number, and each of its states in numbers.
#[derive(Clone, Debug, Serialize)]
struct PlaneView {
    number: usize,
    gas: String,
    critical_source: String,
    /// The limit of the sheet with its sign of percent, where the figure has its line; else empty.
    limit: String,
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
    let mut gases = Vec::new();
    let mut figures = Vec::new();
    for (gas, states) in states_of_gases(draft) {
        let sheet_gas = draft.input.sheet.gas(gas);
        let title = sheet_gas.gas.title();
        let judge = Judge::of(&sheet_gas.gas);
        rows.push(Row {
            text: format!("{} is an ideal gas", capitalised(&title)),
            because: markdown(reason(draft, gas, &states, judge.as_ref())),
            verdict: words(gravest(&states)),
            failed: gravest(&states) == Verdict::Failed,
            line: draft.line(sheet_gas.statement),
        });
        let judged = judge.as_ref().map(|judge| judged(draft, gas, &states, judge));
        let (view, figure) = plane(draft, gas, &states, judge.as_ref(), figures.len() + 1).unzip();
        figures.extend(figure);
        gases.push(GasView { judged, plane: view });
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
    Assumptions { rows, gases, figures }
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

/// Why the ideal law is taken to hold or not: the largest error where a reference equation tells it, and the rules of thumb.
fn reason(draft: &Draft, gas: GasId, states: &[&StateVerdict], judge: Option<&Judge>) -> String {
    let sheet = draft.input.sheet;
    let name = |state: &StateVerdict| emphasis(&sheet.state(state.state).name);
    let list = |some: &[&&StateVerdict]| match some.len() {
        all if all == states.len() && all > 1 => "every state".to_owned(),
        _ => some.iter().map(|state| name(state)).collect::<Vec<_>>().join(", "),
    };
    let limit = draft.input.ideal_limit_percent();
    let mut sentences: Vec<String> = Vec::new();
    if let Some(judge) = judge {
        let largest = |of: fn(&IdealError) -> f64, used: &dyn Fn(StateId) -> bool| {
            let errors = states.iter().filter(|state| used(state.state)).filter_map(|state| Some((of(state.errors.as_ref()?), *state)));
            errors.filter(|(error, _)| error.is_finite()).max_by(|a, b| a.0.abs().total_cmp(&b.0.abs()))
        };
        let error = |(error, state): (f64, &StateVerdict)| format!("{}{NO_BREAK}% at {}", percent(error, limit), name(state));
        let density = largest(|errors| errors.density_percent, &|_| true).map(|found| format!("in density {}", error(found)));
        // Heat capacity and speed of sound decide too where they are used; they are told where they do.
        let uses = |id: StateId, wanted: Property| draft.input.state_uses(id, |property| property == wanted);
        let cp = largest(|errors| errors.cp_percent, &|id| uses(id, Property::Cp));
        let cp = cp.filter(|(error, _)| error.abs() > limit).map(|found| format!("in heat capacity {}", error(found)));
        let w = largest(|errors| errors.w_percent, &|id| uses(id, Property::W));
        let w = w.filter(|(error, _)| error.abs() > limit).map(|found| format!("in speed of sound {}", error(found)));
        let errors: Vec<String> = [density, cp, w].into_iter().flatten().collect();
        if !errors.is_empty() {
            sentences.push(format!(
                "largest error of the ideal law, by {}: {}; limit {}{NO_BREAK}%",
                model_words(judge.real().kind()),
                errors.join(", "),
                limit_text(limit)
            ));
        }
        let beyond: Vec<&&StateVerdict> = states.iter().filter(|state| state.errors.is_none() && state.p_pa.is_some()).collect();
        if !beyond.is_empty() {
            sentences.push(format!("beyond the range of {} at {}", model_words(judge.real().kind()), list(&beyond)));
        }
    } else {
        sentences.push("no reference equation of it is known here, the rules of thumb stand in".to_owned());
    }
    let kept: Vec<&&StateVerdict> = states.iter().filter(|state| state.rule_a == Some(true) || state.rule_b == Some(true)).collect();
    let refused: Vec<&&StateVerdict> = states.iter().filter(|state| state.rule_a == Some(false) && state.rule_b == Some(false)).collect();
    let unknown: Vec<&&StateVerdict> = states.iter().filter(|state| state.rule_a.is_none() && state.rule_b.is_none()).collect();
    let rules = match (kept.is_empty(), refused.is_empty()) {
        (false, true) => format!("common practice: within the rules of thumb at {}", list(&kept)),
        (true, false) => format!("common practice: outside the rules of thumb at {}", list(&refused)),
        (false, false) => format!("common practice: within the rules of thumb at {}, outside them at {}", list(&kept), list(&refused)),
        (true, true) => String::new(),
    };
    sentences.extend(Some(rules).filter(|rules| !rules.is_empty()));
    if !unknown.is_empty() {
        let why = if sheet.gas(gas).gas.critical_pressure().is_none() {
            "no critical point is known"
        } else {
            "pressure or temperature is not determined"
        };
        sentences.push(format!("no rule of thumb at {}: {why}", list(&unknown)));
    }
    sentences.join("; ")
}

/// An error in percent, to two decimals, or as fine as the limit needs.
fn percent(error: f64, limit_percent: f64) -> String {
    let place = if limit_percent < 0.1 { crate::units::math::log10(limit_percent).floor() as i32 - 1 } else { -2 };
    to_place(error, place)
}

/// A number to a decimal place, zero without a sign.
fn to_place(value: f64, place: i32) -> String {
    let written = write_to_place(value, place);
    let is_zero = written.bytes().all(|byte| matches!(byte, b'0' | b'.' | b'-'));
    typeset_number(if is_zero { written.trim_start_matches('-') } else { &written })
}

/// The errors of the ideal law of one gas, state by state; only what the states use.
fn judged(draft: &mut Draft, gas: GasId, states: &[&StateVerdict], judge: &Judge) -> JudgedGas {
    let input = draft.input;
    let limit = input.ideal_limit_percent();
    let uses = |wanted: Property| states.iter().any(|state| input.state_uses(state.state, |property| property == wanted));
    let mut columns: Vec<Deviation> = vec![Deviation::DENSITY];
    columns.extend(Deviation::OTHERS.into_iter().filter(|column| uses(column.property)));
    let heads = columns
        .iter()
        .map(|column| {
            let symbol = draft.math(&Formula::Symbol(Symbol::of_name(column.symbol)));
            markdown(if column.unit == "%" { format!("{symbol}, %") } else { format!("{symbol}, {}", escape(&typeset_unit(column.unit))) })
        })
        .collect();
    let rows = states
        .iter()
        .map(|state| {
            let value = |column: &Deviation| {
                let used = column.property == Property::Rho || input.state_uses(state.state, |property| property == column.property);
                let error = state.errors.as_ref().filter(|_| used).map(|errors| (column.of)(errors)).filter(|error| error.is_finite());
                let Some(error) = error else { return markdown("") };
                if column.unit != "%" {
                    return markdown(to_place(error * column.factor, column.place));
                }
                let text = percent(error, limit);
                markdown(if error.abs() > limit { format!("**{text}**") } else { text })
            };
            JudgedRow {
                name: input.sheet.state(state.state).name.clone(),
                values: columns.iter().map(value).collect(),
                verdict: words(state.verdict),
                failed: state.verdict == Verdict::Failed,
                line: draft.line(input.sheet.state(state.state).statement),
            }
        })
        .collect();
    let title = input.gas_title(gas);
    JudgedGas {
        head: format!("Error of the ideal gas law for {title}, ideal less real at the same pressure and temperature"),
        columns: heads,
        rows,
        note: markdown(judged_note(draft, states, judge, &columns)),
    }
}

/// By what the ideal law is judged, what decides, and where the judge itself is extrapolated.
fn judged_note(draft: &Draft, states: &[&StateVerdict], judge: &Judge, columns: &[Deviation]) -> String {
    let limit = limit_text(draft.input.ideal_limit_percent());
    let kind = model_words(judge.real().kind());
    let mut sentences = vec![format!("Judged by {kind}: {}.", escape(judge_source(judge)))];
    let words =
        |percent: bool| columns.iter().filter(move |column| (column.unit == "%") == percent).map(|column| column.property.row().word);
    let (deciding, shown) = (words(true).collect::<Vec<_>>(), words(false).collect::<Vec<_>>());
    let decides = if deciding.len() > 1 { "decide" } else { "decides" };
    sentences.push(format!("{} {decides} against the limit of the sheet, {limit}{NO_BREAK}%.", capitalised(&deciding.join(", "))));
    if !shown.is_empty() {
        sentences.push(format!("Differences in {} do not decide: their zero is a convention.", shown.join(" and ")));
    }
    let names = |wanted: &dyn Fn(&StateVerdict) -> bool| {
        let names = states.iter().filter(|state| wanted(state)).map(|state| emphasis(&draft.input.sheet.state(state.state).name));
        names.collect::<Vec<_>>().join(", ")
    };
    let extrapolated = names(&|state| state.errors.is_some_and(|errors| errors.is_extrapolated));
    if !extrapolated.is_empty() {
        sentences.push(format!("It is extrapolated beyond its published range at {extrapolated}."));
    }
    let beyond = names(&|state| state.errors.is_none());
    if !beyond.is_empty() {
        sentences.push(format!("It tells nothing at {beyond}, which is left for the checker to judge."));
    }
    sentences.join(" ")
}

/// Points of the line of the limit in the figure.
const POINTS_OF_THE_LINE: u32 = 90;

/// The figure of a gas with at least one state of known pressure and temperature.
fn plane(draft: &Draft, gas: GasId, states: &[&StateVerdict], judge: Option<&Judge>, number: usize) -> Option<(PlaneView, Plane)> {
    let sheet = draft.input.sheet;
    let model = &sheet.gas(gas).gas;
    // The line of the judge is drawn by the critical point of its model, and so are the states.
    let own = judge.and_then(|judge| judge.real().critical_point());
    let (t_c_k, p_c_pa) = match own {
        Some(critical) => critical,
        None => (model.critical_temperature()?.get::<kelvin>(), model.critical_pressure()?.get::<pascal>()),
    };
    let mut points = Vec::new();
    let mut rows = Vec::new();
    for state in states {
        let (Some(p_pa), Some(t_k)) = (state.p_pa, state.t_k) else { continue };
        let (p_r, t_r) = (p_pa / p_c_pa, t_k / t_c_k);
        if !(p_r.is_finite() && t_r.is_finite() && p_r > 0.0 && t_r > 0.0) {
            continue;
        }
        let name = sheet.state(state.state).name.clone();
        let word = |rule: Option<bool>| rule.map_or("unknown", |holds| if holds { "yes" } else { "no" });
        rows.push(PlaneRow {
            name: name.clone(),
            p_r: reduced_number(p_r),
            t_r: reduced_number(t_r),
            a: word(state.rule_a),
            b: word(state.rule_b),
            verdict: words(state.verdict),
        });
        points.push(Point { name, p_r, t_r, verdict: state.verdict });
    }
    if points.is_empty() {
        return None;
    }
    let limit = draft.input.ideal_limit_percent();
    let line = judge.map_or_else(Vec::new, |judge| judge.line_in_reduced_plane(limit, POINTS_OF_THE_LINE));
    let limit = format!("{}{NO_BREAK}%", limit_text(limit));
    let view = PlaneView {
        number,
        gas: model.title(),
        critical_source: model.critical_source().to_owned(),
        limit: if line.is_empty() { String::new() } else { limit.clone() },
        states: rows,
    };
    Some((view, Plane { gas: model.title(), points, line, limit }))
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
