//! What is known of a gas, each constant with its unit and its source: for lists and for the page of one gas.

use super::atomic_weight::ATOMIC_WEIGHT_SOURCE;
use super::ideal_gas::Gas;
use super::name::Named;
use super::polynomial::{POLYNOMIAL_SOURCE, REFERENCE_TEMPERATURE_K};
use super::source::Source;

/// One constant of a gas.
#[derive(Clone, Debug, PartialEq)]
pub struct Constant {
    /// What it is, `critical temperature`.
    pub quantity: &'static str,
    /// Its symbol in a sheet, `T_c`; empty where it has none.
    pub symbol: &'static str,
    /// Its value, in [`Self::unit`].
    pub value: f64,
    /// Its unit in the spelling of a sheet; empty for pure numbers.
    pub unit: &'static str,
    /// Where it comes from.
    pub source: String,
}

/// Where the limits of extrapolation come from: no publication states them.
const EXTRAPOLATION_RULE: &str =
    "rule of gaswright: 300 K down to 250 K, one-atom gases without limit, up to 1.1 of the highest temperature";

fn constant(quantity: &'static str, symbol: &'static str, value: f64, unit: &'static str, source: impl Into<String>) -> Constant {
    Constant { quantity, symbol, value, unit, source: source.into() }
}

/// The constants of a gas that are known, in a fixed order.
#[must_use]
pub fn catalogue(named: Named) -> Vec<Constant> {
    let gas = Gas::named(named);
    let mut list = vec![
        constant("molar mass", "M", gas.molar_mass_kg_mol(), "kg/mol", ATOMIC_WEIGHT_SOURCE),
        constant("specific gas constant", "R", gas.gas_constant_j_kg_k(), "J/(kg.K)", "molar gas constant over molar mass"),
    ];
    match named {
        Named::Species(one) => {
            let text = |source: Option<Source>| source.map(|source| source.text(one.equation)).unwrap_or_default();
            let equation = Some(Source::Equation);
            let found = [
                ("critical temperature", "T_c", one.t_c_k, "K", one.sources.t_c),
                ("critical pressure", "p_c", one.p_c_pa, "Pa abs", one.sources.p_c),
                ("critical density", "", one.rho_c_kg_m3, "kg/m3", equation),
                ("acentric factor", "", one.omega, "", one.sources.omega),
                ("normal boiling point", "", one.t_boil_k, "K", one.sources.t_boil),
                ("triple point temperature", "", one.t_triple_k, "K", one.sources.t_triple),
                ("triple point pressure", "", one.p_triple_pa, "Pa abs", equation),
            ];
            for (quantity, symbol, value, unit, source) in found {
                if let Some(value) = value {
                    list.push(constant(quantity, symbol, value, unit, text(source)));
                }
            }
        }
        Named::Mixture(mixture) => {
            list.push(constant("critical temperature", "T_c", mixture.t_c_k, "K", mixture.critical_source));
            list.push(constant("critical pressure", "p_c", mixture.p_c_pa, "Pa abs", mixture.critical_source));
            for (name, share) in mixture.shares {
                list.push(constant(name, "", *share, "mol/mol", mixture.source));
            }
        }
    }
    if gas.has_caloric().is_ok() {
        let range = gas.caloric_range();
        let source = caloric_source(&gas);
        let cp = gas.cp_j_kg_k(REFERENCE_TEMPERATURE_K);
        list.push(constant("heat capacity at constant pressure, ideal gas at 298.15 K", "cp", cp, "J/(kg.K)", source.as_str()));
        let k = cp / (cp - gas.gas_constant_j_kg_k());
        list.push(constant("heat capacity ratio, ideal gas at 298.15 K", "k", k, "", source.as_str()));
        list.push(constant("caloric properties published from", "", range.low_k, "K", source.as_str()));
        list.push(constant("caloric properties published to", "", range.high_k, "K", source.as_str()));
        list.push(constant("caloric properties extrapolated down to", "", range.limit_low_k, "K", EXTRAPOLATION_RULE));
        list.push(constant("caloric properties extrapolated up to", "", range.limit_high_k, "K", EXTRAPOLATION_RULE));
    }
    list
}

/// The source of the heat capacities of a gas; of a pure one with the work that the polynomials were fitted to.
#[must_use]
pub fn caloric_source(gas: &Gas) -> String {
    let fitted = gas.species().and_then(|one| one.caloric).and_then(|intervals| intervals.first());
    fitted.map_or_else(|| POLYNOMIAL_SOURCE.to_owned(), |first| format!("{POLYNOMIAL_SOURCE}: {}", first.reference))
}

#[cfg(test)]
mod tests {
    use super::*;
    use crate::gas::name::find;

    #[test]
    fn every_constant_of_every_gas_has_a_value_and_a_source() {
        for named in Named::all() {
            let list = catalogue(named);
            assert!(list.len() >= 4, "{}", named.name());
            for constant in list {
                assert!(constant.value.is_finite() && !constant.source.is_empty(), "{} {constant:?}", named.name());
            }
        }
    }

    #[test]
    fn the_page_of_a_gas_holds_what_is_known_and_no_more() {
        let quantities = |name| catalogue(find(name).unwrap()).iter().map(|constant| constant.quantity).collect::<Vec<_>>();
        assert!(quantities("CO2").contains(&"triple point pressure"));
        assert!(!quantities("CO2").contains(&"normal boiling point"));
        assert!(quantities("dry air").contains(&"argon"));
        assert!(!quantities("R134a").iter().any(|quantity| quantity.starts_with("heat capacity")));
    }
}
