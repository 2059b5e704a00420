//! Finding a gas by what people call it.

use std::fmt;

use super::named_mixture::{NamedMixture, named_mixtures};
use super::species::{Species, species};
use crate::diagnostic::nearest;

/// What a name of a gas stands for.
#[derive(Clone, Copy, Debug)]
pub enum Named {
    /// A pure gas.
    Species(&'static Species),
    /// A mixture with a name of its own.
    Mixture(&'static NamedMixture),
}

impl Named {
    /// Its name in the trade.
    #[must_use]
    pub fn name(self) -> &'static str {
        match self {
            Self::Species(species) => species.name,
            Self::Mixture(mixture) => mixture.name,
        }
    }

    /// Everything that can be named: the pure gases in the order of their table, then the mixtures.
    pub fn all() -> impl Iterator<Item = Self> {
        species().iter().map(Self::Species).chain(named_mixtures().iter().map(Self::Mixture))
    }

    /// Other names, the number as a refrigerant last.
    pub fn aliases(self) -> impl Iterator<Item = &'static str> {
        let (aliases, r_number): (&'static [&'static str], _) = match self {
            Self::Species(species) => (&species.aliases, species.r_number),
            Self::Mixture(mixture) => (mixture.aliases, None),
        };
        aliases.iter().copied().chain(r_number)
    }

    fn formula(self) -> Option<&'static str> {
        match self {
            // The formula of a spin isomer means the normal gas.
            Self::Species(species) if species.name != "parahydrogen" => Some(species.formula),
            _ => None,
        }
    }
}

impl PartialEq for Named {
    fn eq(&self, other: &Self) -> bool {
        self.name() == other.name()
    }
}

impl Eq for Named {}

/// A name that stands for no gas, or for several.
#[derive(Clone, Debug, Default, PartialEq, Eq)]
#[non_exhaustive]
pub struct UnknownGas {
    /// Names that were probably meant, best first; of an ambiguous formula all that it may mean.
    pub near: Vec<&'static str>,
    /// Whether it is a formula that several gases share: `near` has them all.
    pub ambiguous: bool,
    /// Whether the gas is known but cannot be computed with yet.
    pub later: bool,
}

impl fmt::Display for UnknownGas {
    fn fmt(&self, out: &mut fmt::Formatter<'_>) -> fmt::Result {
        let names = self.near.join("`, `");
        match (self.ambiguous, self.later) {
            (true, _) => write!(out, "the formula of several gases: `{names}`"),
            (_, true) => write!(out, "a gas that cannot be computed with yet"),
            _ if names.is_empty() => write!(out, "no gas of this name is known"),
            _ => write!(out, "no gas of this name is known; near: `{names}`"),
        }
    }
}

impl std::error::Error for UnknownGas {}

/// Names of air with water in it, which needs a third property beside two of a simple gas.
const HUMID_AIR: [&str; 3] = ["humid air", "moist air", "wet air"];

/// Words of the trade that name no single gas, and the name that they probably mean.
const MEANT: [(&str, &str); 1] = [("air", "dry air")];

/// Families of refrigerants whose letters stand in place of the `R` of a number (ISO 817).
const FAMILIES: [&str; 6] = ["HCFC", "HFC", "HFO", "CFC", "PFC", "HC"];

/// Shortest alias that is worth suggesting: shorter ones are formulas and numbers, near to everything.
const SHORTEST_SUGGESTED: usize = 5;

/// Finds a gas by its name, formula, number as a refrigerant (`R134a`, `R-134a`, `HFC-134a`) or another name.
///
/// Upper and lower case count at first, then they do not. Blanks at the ends and doubled ones do not count. A formula that isomers share is an error
/// that lists them.
///
/// ```
/// use gaswright::gas::find;
/// assert_eq!(find("CO2").unwrap().name(), "carbon dioxide");
/// assert_eq!(find("ethene").unwrap().name(), "ethylene");
/// assert_eq!(find("carbon dioxyde").unwrap_err().near[0], "carbon dioxide");
/// assert_eq!(find("C4H10").unwrap_err().near, ["n-butane", "isobutane"]);
/// ```
///
/// # Errors
///
/// [`UnknownGas`], with what was probably meant.
pub fn find(name: &str) -> Result<Named, UnknownGas> {
    let name = name.split_whitespace().collect::<Vec<_>>().join(" ");
    let same: [fn(&str, &str) -> bool; 2] = [|a, b| a == b, str::eq_ignore_ascii_case];
    for same in same {
        if let Some(found) = Named::all().find(|one| same(one.name(), &name) || one.aliases().any(|alias| same(alias, &name))) {
            return Ok(found);
        }
        let meant: Vec<Named> = Named::all().filter(|one| one.formula().is_some_and(|formula| same(formula, &name))).collect();
        match meant[..] {
            [] => {}
            [found] => return Ok(found),
            _ => return Err(UnknownGas { near: meant.iter().map(|one| one.name()).collect(), ambiguous: true, later: false }),
        }
    }
    if let Some(number) = refrigerant_number(&name) {
        let has_number = |one: &Named| one.aliases().any(|alias| alias.eq_ignore_ascii_case(&number));
        if let Some(found) = Named::all().find(has_number) {
            return Ok(found);
        }
    }
    Err(unknown(&name))
}

/// The number of a refrigerant in the form of the table, `R134a`, where the name is another form of one.
fn refrigerant_number(name: &str) -> Option<String> {
    let letters = name.bytes().take_while(u8::is_ascii_alphabetic).count();
    let (family, number) = name.split_at(letters);
    let number = number.trim_start_matches(['-', ' ']);
    let is_family = family.eq_ignore_ascii_case("R") || FAMILIES.iter().any(|known| known.eq_ignore_ascii_case(family));
    (is_family && number.starts_with(|first: char| first.is_ascii_digit())).then(|| format!("R{number}"))
}

/// What was probably meant by a name that stands for nothing.
fn unknown(name: &str) -> UnknownGas {
    if HUMID_AIR.iter().any(|known| known.eq_ignore_ascii_case(name)) {
        return UnknownGas { near: vec!["dry air"], ambiguous: false, later: true };
    }
    if let Some((_, meant)) = MEANT.iter().find(|(word, _)| word.eq_ignore_ascii_case(name)) {
        return UnknownGas { near: vec![meant], ..UnknownGas::default() };
    }
    let aliases = Named::all().flat_map(Named::aliases).filter(|alias| alias.len() >= SHORTEST_SUGGESTED);
    let near = nearest(name, Named::all().map(Named::name).chain(aliases));
    UnknownGas { near, ..UnknownGas::default() }
}

#[cfg(test)]
mod tests {
    use super::*;

    fn found(name: &str) -> &'static str {
        find(name).map_or("", Named::name)
    }

    #[test]
    fn names_formulas_numbers_and_aliases_lead_to_the_gas() {
        for (name, gas) in [
            ("nitrogen", "nitrogen"),
            ("N2", "nitrogen"),
            ("n2", "nitrogen"),
            ("Carbon  Dioxide ", "carbon dioxide"),
            ("propene", "propylene"),
            ("laughing gas", "nitrous oxide"),
            ("sulphur hexafluoride", "sulfur hexafluoride"),
            ("R744", "carbon dioxide"),
            ("r-134a", "R134a"),
            ("R 134a", "R134a"),
            ("HFC-134a", "R134a"),
            ("HFO-1234yf", "R1234yf"),
            ("R1234ze", "R1234ze(E)"),
            ("C2H2F4", "R134a"),
            ("R-600a", "isobutane"),
            ("H2", "hydrogen"),
            ("D2", "deuterium"),
            ("CO", "carbon monoxide"),
            ("C2H5OH", "ethanol"),
            ("Dry Air", "dry air"),
        ] {
            assert_eq!(found(name), gas, "{name}");
        }
    }

    #[test]
    fn formulas_of_isomers_list_them_all() {
        for (formula, gases) in [
            ("C4H10", &["n-butane", "isobutane"][..]),
            ("c5h12", &["n-pentane", "isopentane", "neopentane"]),
            ("C2H6O", &["dimethyl ether", "ethanol"]),
        ] {
            let error = find(formula).unwrap_err();
            assert!(error.ambiguous);
            assert_eq!(error.near, gases);
        }
    }

    #[test]
    fn unknown_names_bring_near_ones() {
        assert_eq!(find("carbon dioxyde").unwrap_err().near[0], "carbon dioxide");
        assert_eq!(find("nitrogn").unwrap_err().near[0], "nitrogen");
        assert_eq!(find("air").unwrap_err(), UnknownGas { near: vec!["dry air"], ambiguous: false, later: false });
        assert!(find("humid air").unwrap_err().later);
        for name in ["", " ", "xyzzy", "R", "R-", "HC", "\u{202e}2N", "N₂"] {
            assert!(find(name).is_err(), "{name}");
        }
    }

    #[test]
    fn no_name_means_two_gases() {
        let mut seen: Vec<(String, &str)> = Vec::new();
        for one in Named::all() {
            for name in std::iter::once(one.name()).chain(one.aliases()) {
                let folded = name.to_ascii_lowercase();
                let other = seen.iter().find(|(known, gas)| *known == folded && *gas != one.name());
                assert!(other.is_none(), "{name} means {} and {other:?}", one.name());
                assert_eq!(found(name), one.name(), "{name}");
                assert_eq!(found(&folded), one.name(), "{folded}");
                seen.push((folded, one.name()));
            }
        }
    }
}
