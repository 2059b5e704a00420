//! `gaswright units`: the quantities that are known, and the units of one.

use clap::{Arg, ArgMatches, Command};

use crate::cli::ExitCode;
use crate::cli::column::{Column, aligned, number};
use crate::cli::console::Console;
use crate::units::{Quantity, find_quantity, parse, quantities};

/// Significant figures that are shown at most.
const FIGURES: usize = 10;

/// How the arguments are read.
pub(in crate::cli) fn command() -> Command {
    Command::new("units").about("List the quantities with their units, or the units of one with their value in SI").arg(
        Arg::new("quantity").value_name("QUANTITY").num_args(1..).help("A quantity by name, `mass flow`, or by one of its units, `kg/h`"),
    )
}

/// Writes the list or the units of a quantity.
pub(in crate::cli) fn run(matches: &ArgMatches, console: &mut Console) -> ExitCode {
    let words: Vec<&str> = matches.get_many::<String>("quantity").map(|words| words.map(String::as_str).collect()).unwrap_or_default();
    if words.is_empty() {
        console.result(&list());
        return ExitCode::Success;
    }
    let name = words.join(" ");
    match find_quantity(&name) {
        Ok(quantity) => {
            console.result(&page(quantity));
            ExitCode::Success
        }
        Err(near) if near.is_empty() => console.wrong(&format!("`{name}` is no quantity that is known; `gaswright units` lists them")),
        Err(near) => console.wrong(&format!("`{name}` is no quantity that is known; near: {}", near.join(", "))),
    }
}

/// One line a quantity: its name and its units.
fn list() -> String {
    aligned(&[Column::Text, Column::Text], quantities().iter().map(|quantity| vec![quantity.name.to_owned(), quantity.units.join(" ")]))
}

/// The units of a quantity, one a line, with what one of them is in SI.
fn page(quantity: &Quantity) -> String {
    let si = quantity.dimension.si_unit();
    let rows = quantity.units.iter().filter_map(|name| {
        let unit = parse(name).ok()?;
        let reference = if unit.references.is_empty() { "" } else { "at its reference conditions an amount of substance" };
        let value = if unit.references.is_empty() { number(unit.factor, FIGURES) } else { String::new() };
        let offset = if unit.offset == 0.0 { reference.to_owned() } else { format!("with zero at {} {si}", number(unit.offset, FIGURES)) };
        Some(vec![name.clone(), value, if unit.references.is_empty() { si.clone() } else { String::new() }, offset])
    });
    format!("{}\n\n{}", quantity.name, aligned(&[Column::Text, Column::Number, Column::Text, Column::Text], rows))
}

#[cfg(test)]
mod tests {
    use super::*;

    #[test]
    fn every_quantity_has_a_line_and_every_unit_of_it_too() {
        assert_eq!(list().lines().count(), quantities().len());
        for quantity in quantities() {
            assert_eq!(page(quantity).lines().count(), quantity.units.len() + 2, "{}", quantity.name);
        }
    }

    #[test]
    fn a_unit_is_shown_by_its_value_in_si() {
        let page = page(find_quantity("temperature").unwrap());
        assert!(page.lines().any(|line| line.split_whitespace().eq(["degC", "1", "K", "with", "zero", "at", "273.15", "K"])), "{page}");
    }
}
