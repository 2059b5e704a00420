//! `gaswright gases`: the gases that are known, and the page of one.

use clap::{Arg, ArgMatches, Command};

use crate::cli::ExitCode;
use crate::cli::column::{Column, aligned, number};
use crate::cli::console::Console;
use crate::gas::{self, Constant, Named, UnknownGas};
use crate::units;

/// Units of the tables in SI, and those that a page shows instead: what the trade reads.
const SHOWN_UNITS: &[(&str, &str)] = &[("kg/mol", "g/mol"), ("Pa abs", "bar abs")];

/// Significant figures that are shown at most.
const FIGURES: usize = 7;

/// How the arguments are read.
pub(in crate::cli) fn command() -> Command {
    Command::new("gases")
        .about("List the gases that are known, or show the constants of one with their sources")
        .arg(Arg::new("name").value_name("NAME").num_args(1..).help("A gas by name, formula or refrigerant number"))
}

/// Writes the list or the page.
pub(in crate::cli) fn run(matches: &ArgMatches, console: &mut Console) -> ExitCode {
    let words: Vec<&str> = matches.get_many::<String>("name").map(|words| words.map(String::as_str).collect()).unwrap_or_default();
    if words.is_empty() {
        console.result(&list());
        return ExitCode::Success;
    }
    let name = words.join(" ");
    match gas::find(&name) {
        Ok(found) => {
            console.result(&page(found));
            ExitCode::Success
        }
        Err(unknown) => console.wrong(&refusal(&name, &unknown)),
    }
}

/// One line a gas: name, formula, molar mass, other names.
fn list() -> String {
    let rows = Named::all().map(|named| {
        let constants = gas::catalogue(named);
        let mass = constants.iter().find(|constant| constant.symbol == "M").map(|constant| {
            let (value, unit) = shown(constant);
            format!("{} {unit}", number(value, FIGURES))
        });
        let others = named.aliases().collect::<Vec<_>>().join(", ");
        vec![named.name().to_owned(), formula(named).to_owned(), mass.unwrap_or_default(), others]
    });
    aligned(&[Column::Text, Column::Text, Column::Number, Column::Text], rows)
}

/// All that is known of a gas.
fn page(named: Named) -> String {
    let mut page = named.name().to_owned();
    if !formula(named).is_empty() {
        page.push_str(&format!(" ({})", formula(named)));
    }
    page.push('\n');
    let others = named.aliases().collect::<Vec<_>>().join(", ");
    if !others.is_empty() {
        page.push_str(&format!("also {others}\n"));
    }
    if let Named::Species(species) = named {
        if !species.cas.is_empty() {
            page.push_str(&format!("CAS number {}\n", species.cas));
        }
        if !species.note.is_empty() {
            page.push_str(&format!("{}\n", species.note));
        }
    }
    page.push('\n');
    let constants = gas::catalogue(named);
    let mut sources: Vec<&str> = Vec::new();
    let rows: Vec<Vec<String>> = constants
        .iter()
        .map(|constant| {
            let (value, unit) = shown(constant);
            let place = sources.iter().position(|source| *source == constant.source).unwrap_or_else(|| {
                sources.push(&constant.source);
                sources.len() - 1
            });
            vec![constant.quantity.to_owned(), constant.symbol.to_owned(), number(value, FIGURES), unit, format!("[{}]", place + 1)]
        })
        .collect();
    page.push_str(&aligned(&[Column::Text, Column::Text, Column::Number, Column::Text, Column::Text], rows));
    page.push('\n');
    for (place, source) in sources.iter().enumerate() {
        page.push_str(&format!("[{}] {source}\n", place + 1));
    }
    page
}

/// The formula of a species; nothing for a mixture.
fn formula(named: Named) -> &'static str {
    match named {
        Named::Species(species) => species.formula,
        Named::Mixture(_) => "",
    }
}

/// A constant in the unit that the trade reads.
fn shown(constant: &Constant) -> (f64, String) {
    let plain = |text: &str| units::parse(text.split(' ').next().unwrap_or_default()).ok();
    let wanted = SHOWN_UNITS.iter().find(|(unit, _)| *unit == constant.unit);
    match wanted.and_then(|(from, to)| Some((plain(from)?, plain(to)?, *to))) {
        Some((from, to, name)) => (to.from_si(from.to_si(constant.value)), name.to_owned()),
        None => (constant.value, constant.unit.to_owned()),
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

    #[test]
    fn every_gas_has_a_line_and_a_page() {
        assert_eq!(list().lines().count(), Named::all().count());
        for named in Named::all() {
            let page = page(named);
            assert!(page.starts_with(named.name()) && page.contains("molar mass"), "{page}");
        }
    }

    #[test]
    fn a_page_shows_values_in_the_units_of_the_trade() {
        let page = page(gas::find("nitrogen").unwrap());
        for text in ["28.014", "g/mol", "33.958", "bar abs", "126.192"] {
            assert!(page.contains(text), "{text}: {page}");
        }
    }
}
