//! Mixtures that have a name of their own.

use super::species::{Species, species};

/// A mixture that ships with the crate.
#[derive(Debug, PartialEq)]
#[non_exhaustive]
pub struct NamedMixture {
    /// Its name in the trade, `dry air`.
    pub name: &'static str,
    /// Other names.
    pub aliases: &'static [&'static str],
    /// Name of each species and its share by mole; they sum to 1.
    pub shares: &'static [(&'static str, f64)],
    /// Where the shares come from.
    pub source: &'static str,
    /// Critical temperature, K.
    pub t_c_k: f64,
    /// Critical pressure, Pa.
    pub p_c_pa: f64,
    /// Where the critical point comes from.
    pub critical_source: &'static str,
}

/// Shares: as the table of NASA states them beside its species `Air` ("Mole%: N2 78.084, O2 20.9476, Ar .9365, CO2 .0319. Gordon,1982"); the
/// number of that report, NASA TP-1906, is from memory. Traces are counted as argon and carbon dioxide. The molar mass, 28.9654 g/mol,
/// lies 2e-6 below that of CIPM-2007 and 4e-5 above that of the US Standard Atmosphere 1976.
static MIXTURES: [NamedMixture; 1] = [NamedMixture {
    name: "dry air",
    aliases: &["air, dry", "dry-air", "R729"],
    shares: &[("nitrogen", 0.780_84), ("oxygen", 0.209_476), ("argon", 0.009_365), ("carbon dioxide", 0.000_319)],
    source: "Gordon 1982, NASA TP-1906, as stated in the thermodynamic table of NASA CEA",
    t_c_k: 132.5306,
    p_c_pa: 3_786_000.0,
    critical_source: "Lemmon et al. 2000, J. Phys. Chem. Ref. Data 29: 331-385 (doi 10.1063/1.1285884)",
}];

/// All named mixtures.
#[must_use]
pub fn named_mixtures() -> &'static [NamedMixture] {
    &MIXTURES
}

impl NamedMixture {
    /// The species and their mole fractions, in the order of [`Self::shares`].
    #[must_use]
    pub fn components(&self) -> Vec<(&'static Species, f64)> {
        let of_name = |name: &str| species().iter().find(|one| one.name == name);
        self.shares.iter().filter_map(|(name, share)| Some((of_name(name)?, *share))).collect()
    }
}

#[cfg(test)]
mod tests {
    use super::*;

    #[test]
    fn shares_are_of_known_species_and_sum_to_one() {
        for mixture in named_mixtures() {
            assert_eq!(mixture.components().len(), mixture.shares.len());
            let sum: f64 = mixture.shares.iter().map(|(_, share)| share).sum();
            assert!((sum - 1.0).abs() < 1e-12, "{} sums to {sum}", mixture.name);
        }
    }
}
