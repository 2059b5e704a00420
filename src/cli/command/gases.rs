//! `gaswright gases`: the gases that are known, and the page of one.

use clap::{Arg, ArgMatches, Command};

use super::gas_page::{IdealQuestion, formula, humid_air, page, shown};
use crate::cli::ExitCode;
use crate::cli::column::{Column, aligned, number};
use crate::cli::console::Console;
use crate::gas::{self, Gas, ModelKind, Named, RealGas, UnknownGas};
use crate::units;

/// Significant figures that are shown at most.
const FIGURES: usize = 7;

/// Error of the ideal law in density that is asked for unless `--limit` says otherwise, %: that of a sheet.
const LIMIT_PERCENT: f64 = 1.0;

/// Names of the gas that has three degrees of freedom.
const HUMID_AIR: [&str; 3] = ["humid air", "moist air", "wet air"];

/// How the arguments are read.
pub(in crate::cli) fn command() -> Command {
    Command::new("gases")
        .about("List the gases that are known, or show one: constants, models with range and source, how far the ideal law holds")
        .arg(Arg::new("name").value_name("NAME").num_args(1..).help("A gas by name, formula or refrigerant number"))
        .arg(
            Arg::new("temperature")
                .long("temperature")
                .value_name("T")
                .allow_hyphen_values(true)
                .requires("name")
                .help("Tell up to which pressure the ideal law holds at this temperature: 20degC, 293.15K, 68degF"),
        )
        .arg(
            Arg::new("limit")
                .long("limit")
                .value_name("PERCENT")
                .requires("temperature")
                .help("Error in density that is allowed: 1%, the default, as in a sheet"),
        )
}

/// Writes the list or the page.
pub(in crate::cli) fn run(matches: &ArgMatches, console: &mut Console) -> ExitCode {
    let words: Vec<&str> = matches.get_many::<String>("name").map(|words| words.map(String::as_str).collect()).unwrap_or_default();
    if words.is_empty() {
        console.result(&list());
        return ExitCode::Success;
    }
    let asked = |name: &str| matches.get_one::<String>(name).map(String::as_str);
    let question = match question(asked("temperature"), asked("limit")) {
        Ok(question) => question,
        Err(wrong) => return console.wrong(&wrong),
    };
    let name = words.join(" ");
    if HUMID_AIR.iter().any(|known| known.eq_ignore_ascii_case(&name)) {
        if question.is_some() {
            return console.wrong("humid air is not calculated as an ideal gas; `--temperature` is for the gases of the list");
        }
        console.result(&humid_air());
        return ExitCode::Success;
    }
    match gas::find(&name) {
        Ok(found) => {
            console.result(&page(found, question));
            ExitCode::Success
        }
        Err(unknown) => console.wrong(&refusal(&name, &unknown)),
    }
}

/// The temperature and the limit that are asked about.
fn question(temperature: Option<&str>, limit: Option<&str>) -> Result<Option<IdealQuestion>, String> {
    let Some(text) = temperature else { return Ok(None) };
    let t_k = temperature_k(text).ok_or_else(|| format!("`{text}` is no temperature; write it as 20degC or 293.15K"))?;
    if !(t_k > 0.0 && t_k.is_finite()) {
        return Err(format!("`{text}` is not above absolute zero"));
    }
    let limit_percent = match limit {
        None => LIMIT_PERCENT,
        Some(text) => {
            let plain = text.trim().trim_end_matches('%').trim_end();
            let value = plain.parse::<f64>().ok().filter(|value| *value > 0.0 && *value <= 100.0);
            value.ok_or_else(|| format!("`{text}` is no limit; write it as 1% or 0.5%, above 0 and up to 100"))?
        }
    };
    Ok(Some(IdealQuestion { t_k, limit_percent }))
}

/// `20degC`, `20 °C`, `293.15 K` in K; `None` where it is no temperature with a unit.
fn temperature_k(text: &str) -> Option<f64> {
    let text = text.trim().replace('−', "-").replace("°", "deg");
    let end = text.find(|c: char| !(c.is_ascii_digit() || matches!(c, '+' | '-' | '.'))).unwrap_or(text.len());
    let value = text[..end].parse::<f64>().ok()?;
    let unit = units::parse(text[end..].trim()).ok().filter(units::Unit::is_temperature)?;
    Some(unit.to_si(value))
}

/// One line a gas: name, formula, molar mass, what it is calculated by with `, real`, other names.
fn list() -> String {
    let rows = Named::all().map(|named| {
        let constants = gas::catalogue(named);
        let mass = constants.iter().find(|constant| constant.symbol == "M").map(|constant| {
            let (value, unit) = shown(constant);
            format!("{} {unit}", number(value, FIGURES))
        });
        let others = named.aliases().collect::<Vec<_>>().join(", ");
        vec![named.name().to_owned(), formula(named).to_owned(), mass.unwrap_or_default(), real_word(named).to_owned(), others]
    });
    let humid = ["humid air", "", "", "CIPM-2007, virial", "moist air, wet air"].map(str::to_owned).to_vec();
    aligned(&[Column::Text, Column::Text, Column::Number, Column::Text, Column::Text], rows.chain([humid]))
}

/// What a gas is calculated by with `, real`, in a word.
fn real_word(named: Named) -> &'static str {
    match RealGas::new(&Gas::named(named)).map(|real| real.kind()) {
        Ok(ModelKind::ReferenceEquation) => "reference equation",
        Ok(ModelKind::Gerg2008) => "GERG-2008",
        Ok(ModelKind::PengRobinson) => "Peng-Robinson",
        Err(_) => "ideal only",
    }
}

fn refusal(name: &str, unknown: &UnknownGas) -> String {
    match (&unknown.near[..], unknown.ambiguous) {
        (near, true) => format!("`{name}` is the formula of several gases: {}", near.join(", ")),
        _ if unknown.later => format!("`{name}` is not offered by this version"),
        ([], _) => format!("`{name}` is no gas that is known; `gaswright gases` lists them"),
        (near, _) => format!("`{name}` is no gas that is known; near: {}", near.join(", ")),
    }
}

#[cfg(test)]
mod tests {
    use super::*;

    fn page_of(name: &str, question: Option<IdealQuestion>) -> String {
        page(gas::find(name).unwrap(), question)
    }

    #[test]
    fn every_gas_has_a_line_and_a_page() {
        // And one line for humid air.
        assert_eq!(list().lines().count(), Named::all().count() + 1);
        for named in Named::all() {
            let page = page(named, Some(IdealQuestion { t_k: 300.0, limit_percent: 1.0 }));
            assert!(page.starts_with(named.name()) && page.contains("molar mass"), "{page}");
            assert!(page.contains("ideal gas law at 26.85 degC"), "{page}");
        }
    }

    #[test]
    fn a_page_shows_values_in_the_units_of_the_trade() {
        let page = page_of("nitrogen", None);
        for text in ["28.014", "g/mol", "33.958", "bar abs", "126.192", "63.151 K to 1000 K", "Span et al. 2000", "density 0.02 %", "`mu`"]
        {
            assert!(page.contains(text), "{text}: {page}");
        }
    }

    #[test]
    fn a_page_tells_its_models_and_where_each_comes_from() {
        assert!(page_of("dry air", None).contains("`, real`: reference equation of state"));
        assert!(page_of("CO2", None).contains("216.592 K at 5.1796 bar abs to 304.1282 K at 73.773 bar abs"));
        let humid = humid_air();
        assert!(humid.contains("CIPM-2007") && humid.contains("T_dew"), "{humid}");
        // A mark for every source, and no source without its mark.
        for named in Named::all() {
            let page = page(named, None);
            let sources = page.lines().filter(|line| line.starts_with('[')).count();
            for at in 1..=sources {
                assert!(page.matches(&format!("[{at}]")).count() >= 2, "{at}: {page}");
            }
        }
    }

    #[test]
    fn a_page_tells_how_far_the_ideal_law_holds() {
        let at = |name: &str, t_k: f64, limit_percent: f64| page_of(name, Some(IdealQuestion { t_k, limit_percent }));
        let nitrogen = at("nitrogen", 293.15, 1.0);
        assert!(nitrogen.contains("ideal gas law at 20 degC (293.15 K), error in density within 1 %"), "{nitrogen}");
        assert!(nitrogen.contains("rule a up to 11.319 bar abs, rule b up to 0.33958 bar abs"), "{nitrogen}");
        assert!(at("carbon dioxide", 293.15, 1.0).contains("holds           up to 1.8"), "{}", at("carbon dioxide", 293.15, 1.0));
        assert!(at("water", 300.0, 1.0).contains("it condenses at"), "{}", at("water", 300.0, 1.0));
        assert!(at("nitrogen", 3000.0, 1.0).contains("not known: the reference equation of state goes from"));
    }

    #[test]
    fn temperatures_and_limits_are_read_with_their_units() {
        for (text, t_k) in [("20degC", 293.15), ("20 degC", 293.15), ("-10 °C", 263.15), ("293.15K", 293.15), ("68 degF", 293.15)] {
            assert!((temperature_k(text).unwrap() - t_k).abs() < 1e-9, "{text}");
        }
        for text in ["", "20", "20 bar", "degC", "warm"] {
            assert_eq!(temperature_k(text), None, "{text}");
        }
        assert_eq!(question(Some("20degC"), Some("0.5 %")).unwrap().unwrap().limit_percent, 0.5);
        for (temperature, limit) in [("-300degC", None), ("20degC", Some("0")), ("20degC", Some("much")), ("20degC", Some("-1%"))] {
            assert!(question(Some(temperature), limit).is_err(), "{temperature} {limit:?}");
        }
    }
}
