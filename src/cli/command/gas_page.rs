//! What `gaswright gases NAME` writes of a gas: constants, models, saturation, transport, and how far the ideal law holds.

use crate::cli::column::{Column, aligned, number};
use crate::gas::eos::Equation;
use crate::gas::humid_air::{CIPM_P_PA, CIPM_SOURCE, CIPM_T_K, CIPM_UNCERTAINTY, HUMID_P_PA, HUMID_T_K, SATURATION_SOURCE, VIRIAL_SOURCE};
use crate::gas::transport::{CorrelationRange, Transport};
use crate::gas::verdict::{Judge, PressureLimit};
use crate::gas::{self, Constant, Gas, ModelKind, Named, RealGas, StateError, saturation};
use crate::units;
use crate::units::constants::ZERO_CELSIUS;

/// Units of the tables in SI, and those that a page shows instead: what the trade reads.
const SHOWN_UNITS: &[(&str, &str)] = &[("kg/mol", "g/mol"), ("Pa abs", "bar abs")];

/// Significant figures that are shown at most.
const FIGURES: usize = 7;

/// Significant figures of a pressure that was calculated for a page.
const FIGURES_OF_A_PRESSURE: usize = 5;

/// For which the ideal law is looked at: a temperature, K, and the error in density that is allowed, %.
#[derive(Clone, Copy, Debug, PartialEq)]
pub(super) struct IdealQuestion {
    pub(super) t_k: f64,
    pub(super) limit_percent: f64,
}

/// A page as it grows: its text and the sources that it cites.
#[derive(Default)]
struct Page {
    text: String,
    sources: Vec<String>,
}

impl Page {
    /// The mark of a source: `[2]`.
    fn cite(&mut self, source: &str) -> String {
        let place = self.sources.iter().position(|known| known == source).unwrap_or_else(|| {
            self.sources.push(source.to_owned());
            self.sources.len() - 1
        });
        format!("[{}]", place + 1)
    }

    /// A heading and its rows.
    fn part(&mut self, head: &str, rows: Vec<Vec<String>>) {
        self.text.push_str(&format!("\n{head}\n"));
        self.text
            .push_str(&aligned(&[Column::Text, Column::Text], rows.into_iter().map(|row| vec![format!("  {}", row[0]), row[1].clone()])));
    }

    fn finish(mut self) -> String {
        self.text.push('\n');
        for (place, source) in self.sources.iter().enumerate() {
            self.text.push_str(&format!("[{}] {source}\n", place + 1));
        }
        self.text
    }
}

/// All that is known of a gas.
pub(super) fn page(named: Named, question: Option<IdealQuestion>) -> String {
    let gas = Gas::named(named);
    let mut page = Page { text: head(named), sources: Vec::new() };
    constants(named, &mut page);
    let real = RealGas::new(&gas).ok();
    ideal(&gas, &mut page);
    if let Some(real) = &real {
        model(real, &mut page);
    }
    if let Some(equation) = gas.species().and_then(Equation::of) {
        saturation_line(equation, &mut page);
    }
    transport(&gas, &mut page);
    if let Some(question) = question {
        how_far(&gas, question, &mut page);
    }
    page.finish()
}

/// Names and notes.
fn head(named: Named) -> String {
    let mut text = named.name().to_owned();
    if !formula(named).is_empty() {
        text.push_str(&format!(" ({})", formula(named)));
    }
    text.push('\n');
    let others = named.aliases().collect::<Vec<_>>().join(", ");
    if !others.is_empty() {
        text.push_str(&format!("also {others}\n"));
    }
    if let Named::Species(species) = named {
        if !species.cas.is_empty() {
            text.push_str(&format!("CAS number {}\n", species.cas));
        }
        if !species.note.is_empty() {
            text.push_str(&format!("{}\n", species.note));
        }
    }
    text
}

/// The constants, each with its source.
fn constants(named: Named, page: &mut Page) {
    let rows: Vec<Vec<String>> = gas::catalogue(named)
        .iter()
        .map(|constant| {
            let (value, unit) = shown(constant);
            vec![constant.quantity.to_owned(), constant.symbol.to_owned(), number(value, FIGURES), unit, page.cite(&constant.source)]
        })
        .collect();
    page.text.push('\n');
    page.text.push_str(&aligned(&[Column::Text, Column::Text, Column::Number, Column::Text, Column::Text], rows));
}

/// The model of a gas without `, real`.
fn ideal(gas: &Gas, page: &mut Page) {
    let judged = match Judge::of(gas) {
        Some(judge) => format!("at every state, by {}", by(judge.real().kind())),
        None => "by the rules of thumb alone: no equation of it is good enough to judge".to_owned(),
    };
    page.part("ideal gas: what a sheet assumes unless it says `, real`", vec![vec!["judged".to_owned(), judged]]);
}

/// The model of a gas with `, real`.
fn model(real: &RealGas, page: &mut Page) {
    let range = real.range();
    let span = |low: f64, high: f64, p: f64| format!("{} to {}, up to {}", kelvin(low), kelvin(high), pressure(p));
    let mut rows = Vec::new();
    let mut row = |what: &str, text: String| rows.push(vec![what.to_owned(), text]);
    row("publication", page.cite(real.source()));
    if real.kind() != ModelKind::PengRobinson {
        row("published for", span(range.t_low_k, range.t_high_k, range.p_high_pa));
    }
    row("goes on to", span(range.t_limit_low_k, range.t_limit_high_k, range.p_limit_pa));
    row("uncertainty", if real.uncertainty().is_empty() { "not on record here".to_owned() } else { real.uncertainty().to_owned() });
    row("its molar mass", format!("{} g/mol", number(1e3 * real.molar_mass_kg_mol(), FIGURES)));
    row("its gas constant", format!("{} J/(kg.K)", number(real.gas_constant_j_kg_k(), FIGURES)));
    if let Some((t_c, p_c)) = real.critical_point() {
        let word = if real.equation().is_some() { "critical point" } else { "pseudo-critical point" };
        row(word, format!("{}, {}", kelvin(t_c), pressure(p_c)));
    }
    if let Some(without) = real.without_caloric() {
        row("not offered", format!("h, u, s, cp, cv, k, w: no heat capacity of {without} is known here"));
    }
    page.part(&format!("`, real`: {}", real.kind().words()), rows);
}

/// The ends of the saturation line.
fn saturation_line(equation: &Equation, page: &mut Page) {
    let source = page.cite(equation.constants().source);
    let ends = match saturation::ends(equation) {
        Ok([(t_low, p_low), (t_high, p_high)]) => {
            format!("{} at {} to {} at {} {source}", kelvin(t_low), pressure(p_low), kelvin(t_high), pressure(p_high))
        }
        Err(error) => error.to_string(),
    };
    page.part("saturation, `p_sat(T)` and `T_sat(p)`", vec![vec!["from".to_owned(), ends]]);
}

/// The correlations of viscosity and conductivity.
fn transport(gas: &Gas, page: &mut Page) {
    let Some(transport) = Transport::of(gas) else { return };
    let mut of = |symbol: &str, word: &str, range: Option<&CorrelationRange>| {
        let Some(range) = range else { return };
        let uncertainty = if range.uncertainty.is_empty() { "not on record here" } else { range.uncertainty };
        let published = format!("{} to {}, up to {}", kelvin(range.t_low_k), kelvin(range.t_high_k), pressure(range.p_high_pa));
        let source = page.cite(range.source);
        let rows = [("publication", source), ("published for", published), ("uncertainty", uncertainty.to_owned())];
        page.part(&format!("{word}, `{symbol}`"), rows.map(|(what, text)| vec![what.to_owned(), text]).to_vec());
    };
    of("mu", "viscosity", transport.viscosity_range());
    of("lambda", "thermal conductivity", transport.conductivity_range());
}

/// Up to which pressure the ideal law holds at a temperature.
fn how_far(gas: &Gas, question: IdealQuestion, page: &mut Page) {
    let IdealQuestion { t_k, limit_percent } = question;
    let percent = number(limit_percent, FIGURES);
    let mut rows = Vec::new();
    match Judge::of(gas) {
        None => rows.push(vec!["not known".to_owned(), "no equation of it is good enough to judge the ideal law".to_owned()]),
        Some(judge) => {
            let answer = match judge.pressure_limit(t_k, limit_percent) {
                Ok(PressureLimit::Reached { p_pa }) => format!("up to {}: there the error in density reaches {percent} %", pressure(p_pa)),
                Ok(PressureLimit::Condenses { p_pa }) => {
                    format!("as long as it is a gas: it condenses at {}, before the error in density reaches {percent} %", pressure(p_pa))
                }
                Ok(PressureLimit::EndOfRange { p_pa }) => {
                    format!("up to {}, where the range of {} ends", pressure(p_pa), by(judge.real().kind()))
                }
                Err(StateError::OutOfRange(limit)) => {
                    format!("not known: {} goes from {} to {}", by(judge.real().kind()), kelvin(limit.limit_low), kelvin(limit.limit_high))
                }
                Err(error) => format!("not known: {error}"),
            };
            rows.push(vec!["holds".to_owned(), answer]);
            rows.push(vec!["judged by".to_owned(), format!("{} {}", judge.real().kind().words(), page.cite(judge.real().source()))]);
        }
    }
    if let Some((t_c, p_c)) = critical(gas) {
        let rule_a = if t_k > 2.0 * t_c { format!("up to {}", pressure(p_c / 3.0)) } else { "at no pressure".to_owned() };
        let practice = format!("rule a {rule_a}, rule b up to {} (common practice, no source)", pressure(0.01 * p_c));
        rows.push(vec!["rules of thumb".to_owned(), practice]);
    }
    page.part(&format!("ideal gas law at {} ({}), error in density within {percent} %", celsius(t_k), kelvin(t_k)), rows);
}

fn critical(gas: &Gas) -> Option<(f64, f64)> {
    gas.critical_temperature().map(|t| t.value).zip(gas.critical_pressure().map(|p| p.value))
}

/// The page of humid air, which is no gas of the table.
pub(super) fn humid_air() -> String {
    let mut page = Page { text: "humid air\nalso moist air, wet air; in a sheet `gas air = humid air`\n".to_owned(), sources: Vec::new() };
    let span = |t: (f64, f64)| format!("{} to {}", kelvin(t.0), kelvin(t.1));
    let row = |what: &str, text: String| vec![what.to_owned(), text];
    let air = Named::all().find(|named| named.name() == "dry air").map(Named::name).unwrap_or_default();
    page.part(
        "states",
        vec![
            row("fixed by", "three properties, one of them RH, T_dew or W".to_owned()),
            row("offers", "p T v rho h u s cp cv k w Z RH T_dew W, per mass of the moist air".to_owned()),
            row("range", format!("{}, up to {}", span(HUMID_T_K), pressure(HUMID_P_PA))),
            row("dry part", format!("`{air}`; `gaswright gases dry air` shows it")),
        ],
    );
    let (cipm, virial, line) = (page.cite(CIPM_SOURCE), page.cite(VIRIAL_SOURCE), page.cite(SATURATION_SOURCE));
    page.part(
        "density",
        vec![
            row("CIPM-2007", format!("{}, {} to {} {cipm}", span(CIPM_T_K), pressure(CIPM_P_PA.0), pressure(CIPM_P_PA.1))),
            row("uncertainty", CIPM_UNCERTAINTY.to_owned()),
            row("elsewhere", format!("mixture of air and water with second virial coefficients {virial}")),
        ],
    );
    page.part(
        "humidity",
        vec![
            row("RH", format!("over water, below 0.01 degC over ice {line}")),
            row("T_dew", "dew point, below 0.01 degC frost point".to_owned()),
            row("W", "water per dry air by mass".to_owned()),
        ],
    );
    page.finish()
}

/// The formula of a species; nothing for a mixture.
pub(super) fn formula(named: Named) -> &'static str {
    match named {
        Named::Species(species) => species.formula,
        Named::Mixture(_) => "",
    }
}

/// A constant in the unit that the trade reads.
pub(super) fn shown(constant: &Constant) -> (f64, String) {
    let plain = |text: &str| units::parse(text.split(' ').next().unwrap_or_default()).ok();
    let wanted = SHOWN_UNITS.iter().find(|(unit, _)| *unit == constant.unit);
    match wanted.and_then(|(from, to)| Some((plain(from)?, plain(to)?, *to))) {
        Some((from, to, name)) => (to.from_si(from.to_si(constant.value)), name.to_owned()),
        None => (constant.value, constant.unit.to_owned()),
    }
}

/// A model within a sentence.
fn by(kind: ModelKind) -> String {
    if kind == ModelKind::Gerg2008 { kind.words().to_owned() } else { format!("the {}", kind.words()) }
}

fn kelvin(t_k: f64) -> String {
    format!("{} K", number(t_k, FIGURES))
}

fn celsius(t_k: f64) -> String {
    format!("{} degC", number(t_k - ZERO_CELSIUS, FIGURES))
}

/// A pressure in bar, in Pa where it is very small.
fn pressure(p_pa: f64) -> String {
    if p_pa < 100.0 {
        format!("{} Pa abs", number(p_pa, FIGURES_OF_A_PRESSURE))
    } else {
        format!("{} bar abs", number(p_pa / 1e5, FIGURES_OF_A_PRESSURE))
    }
}
