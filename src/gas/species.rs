//! The pure gases that ship with the crate, and their constants.

use std::sync::OnceLock;

use super::atomic_weight::molecule;
use super::polynomial::{Interval, intervals};
use super::source::Source;
use super::table::{number, rows};

/// Constants of the pure gases; sources in `data/SOURCES.md`.
const SPECIES_TABLE: &str = include_str!("data/species.csv");

const COLUMNS: [&str; 20] = [
    "name",
    "formula",
    "cas",
    "group",
    "r_number",
    "aliases",
    "t_c_k",
    "t_c_source",
    "p_c_pa",
    "p_c_source",
    "rho_c_kg_m3",
    "omega",
    "omega_source",
    "t_boil_k",
    "t_boil_source",
    "t_triple_k",
    "t_triple_source",
    "p_triple_pa",
    "equation",
    "note",
];

/// One pure gas.
#[derive(Debug)]
#[non_exhaustive]
pub struct Species {
    /// Its name in the trade, `carbon dioxide`.
    pub name: &'static str,
    /// Its formula, `CO2`. Isomers share one.
    pub formula: &'static str,
    /// Number of the substance in the CAS registry.
    pub cas: &'static str,
    /// Kind of gas in the trade: `permanent`, `noble`, `hydrocarbon`, `oxide`, `acid or toxic`, `process`, `refrigerant`, `vapour`.
    pub group: &'static str,
    /// Its number as a refrigerant (ISO 817), `R744`.
    pub r_number: Option<&'static str>,
    /// Other names.
    pub aliases: Box<[&'static str]>,
    /// Molar mass, kg/mol, from the formula with [`super::atomic_weight::ATOMIC_WEIGHT_SOURCE`].
    pub molar_mass_kg_mol: f64,
    /// Atoms of one molecule.
    pub atoms: u32,
    /// Critical temperature, K.
    pub t_c_k: Option<f64>,
    /// Critical pressure, Pa.
    pub p_c_pa: Option<f64>,
    /// Critical density, kg/m³.
    pub rho_c_kg_m3: Option<f64>,
    /// Acentric factor, 1.
    pub omega: Option<f64>,
    /// Normal boiling point, K: where the vapour pressure is 101 325 Pa.
    pub t_boil_k: Option<f64>,
    /// Triple point, K; of helium the lambda point.
    pub t_triple_k: Option<f64>,
    /// Pressure at the triple point, Pa.
    pub p_triple_pa: Option<f64>,
    /// Where the constants come from.
    pub sources: ConstantSources,
    /// Citation of its reference equation of state; empty where none is cited.
    pub equation: &'static str,
    /// What has to be known about the constants; empty where nothing has.
    pub note: &'static str,
    /// Heat capacity as polynomials of temperature, in rising order of temperature.
    pub caloric: Option<&'static [Interval]>,
}

/// Where the constants of a species come from, each `None` where there is no value. Critical density and triple pressure
/// come from the equation of state.
#[derive(Clone, Copy, Debug, PartialEq, Eq)]
pub struct ConstantSources {
    /// Of the critical temperature.
    pub t_c: Option<Source>,
    /// Of the critical pressure.
    pub p_c: Option<Source>,
    /// Of the acentric factor.
    pub omega: Option<Source>,
    /// Of the normal boiling point.
    pub t_boil: Option<Source>,
    /// Of the triple point.
    pub t_triple: Option<Source>,
}

impl Species {
    /// Whether a molecule is one atom: then the heat capacity is the same at all temperatures below those of electronic excitation.
    #[must_use]
    pub fn is_one_atom(&self) -> bool {
        self.atoms == 1
    }

    fn read(row: [&'static str; 20], intervals: &'static [Interval]) -> Option<Self> {
        let [name, formula, cas, group, r_number, aliases, t_c, t_c_source, p_c, p_c_source, rho_c, omega, omega_source, ..] = row;
        let [.., t_boil, t_boil_source, t_triple, t_triple_source, p_triple, equation, note] = row;
        let molecule = molecule(formula)?;
        Some(Self {
            name,
            formula,
            cas,
            group,
            r_number: (!r_number.is_empty()).then_some(r_number),
            aliases: aliases.split(';').filter(|alias| !alias.is_empty()).collect(),
            molar_mass_kg_mol: molecule.molar_mass_kg_mol,
            atoms: molecule.atoms,
            t_c_k: number(t_c),
            p_c_pa: number(p_c),
            rho_c_kg_m3: number(rho_c),
            omega: number(omega),
            t_boil_k: number(t_boil),
            t_triple_k: number(t_triple),
            p_triple_pa: number(p_triple),
            sources: ConstantSources {
                t_c: Source::from_key(t_c_source),
                p_c: Source::from_key(p_c_source),
                omega: Source::from_key(omega_source),
                t_boil: Source::from_key(t_boil_source),
                t_triple: Source::from_key(t_triple_source),
            },
            equation,
            note,
            caloric: of_species(intervals, name),
        })
    }
}

/// The intervals of one species, which stand together in the table.
fn of_species(intervals: &'static [Interval], name: &str) -> Option<&'static [Interval]> {
    let first = intervals.iter().position(|interval| interval.species == name)?;
    let count = intervals[first..].iter().take_while(|interval| interval.species == name).count();
    Some(&intervals[first..first + count])
}

/// All pure gases, in the order of the table.
///
/// The table is read at the first call.
#[must_use]
pub fn species() -> &'static [Species] {
    static SPECIES: OnceLock<Vec<Species>> = OnceLock::new();
    SPECIES.get_or_init(|| {
        let intervals = intervals();
        rows(SPECIES_TABLE, COLUMNS).filter_map(|row| Species::read(row, intervals)).collect()
    })
}

#[cfg(test)]
mod tests {
    use super::*;

    #[test]
    fn every_line_of_the_table_is_a_species() {
        let lines = SPECIES_TABLE.lines().filter(|line| !line.starts_with('#')).count() - 1;
        assert_eq!(species().len(), lines);
        assert!(lines >= 60);
    }

    #[test]
    fn every_interval_belongs_to_a_species() {
        let used: usize = species().iter().filter_map(|one| one.caloric).map(<[Interval]>::len).sum();
        assert_eq!(used, intervals().len());
    }

    #[test]
    fn every_constant_has_a_source_and_every_source_a_constant() {
        for one in species() {
            let pairs = [
                (one.t_c_k, one.sources.t_c),
                (one.p_c_pa, one.sources.p_c),
                (one.omega, one.sources.omega),
                (one.t_boil_k, one.sources.t_boil),
                (one.t_triple_k, one.sources.t_triple),
            ];
            for (value, source) in pairs {
                assert_eq!(value.is_some(), source.is_some(), "{}", one.name);
                assert!(source != Some(Source::Equation) || !one.equation.is_empty(), "{}", one.name);
            }
            assert!(one.rho_c_kg_m3.is_none() || !one.equation.is_empty(), "{}", one.name);
            assert!(one.p_triple_pa.is_none() || !one.equation.is_empty(), "{}", one.name);
        }
    }

    #[test]
    fn constants_stand_in_their_order() {
        for one in species() {
            let (critical, boiling, triple) = (one.t_c_k.unwrap(), one.t_boil_k, one.t_triple_k);
            assert!(boiling.is_none_or(|t| t < critical && triple.is_none_or(|low| low < t)), "{}", one.name);
            assert!(triple.is_none_or(|t| t < critical), "{}", one.name);
            assert!(one.p_triple_pa.is_none_or(|p| p < one.p_c_pa.unwrap()), "{}", one.name);
            assert!(one.omega.is_none_or(|omega| (-0.5..1.0).contains(&omega)), "{}", one.name);
        }
    }
}
