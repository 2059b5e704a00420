//! Shares of a mixture and the mole fractions they mean.

use std::fmt;

use super::name::Named;
use super::species::Species;

/// What the shares of a mixture are shares of.
#[derive(Clone, Copy, Debug, PartialEq, Eq)]
pub enum ShareBasis {
    /// Amount of substance.
    Mole,
    /// Mass.
    Mass,
    /// Volume of each gas alone at the temperature and pressure of the mixture: for ideal gases the same as [`Self::Mole`].
    Volume,
}

impl ShareBasis {
    /// How a sheet says it, `by mole`.
    #[must_use]
    pub fn words(self) -> &'static str {
        match self {
            Self::Mole => "by mole",
            Self::Mass => "by mass",
            Self::Volume => "by volume",
        }
    }
}

/// One species of a gas.
#[derive(Clone, Copy, Debug)]
pub struct Component {
    /// The species.
    pub species: &'static Species,
    /// Its share of the amount of substance, 0 to 1.
    pub mole_fraction: f64,
    /// Its share of the mass, 0 to 1.
    pub mass_fraction: f64,
}

/// Why shares make no mixture.
#[derive(Clone, Debug, PartialEq)]
#[non_exhaustive]
pub enum MixtureError {
    /// There are no parts.
    Empty,
    /// There are more than [`MOST_PARTS`] parts.
    TooMany {
        /// How many.
        parts: usize,
    },
    /// The shares do not sum to 1 within [`SUM_TOLERANCE`].
    Sum {
        /// What they sum to.
        sum: f64,
    },
    /// A share is negative, or no number.
    Share {
        /// The part.
        name: &'static str,
        /// Its share.
        share: f64,
    },
    /// A part stands twice.
    Repeated {
        /// The part.
        name: &'static str,
    },
}

/// Most parts of a mixture.
pub const MOST_PARTS: usize = 32;

/// How far the sum of the shares may be from 1: rounding of a written composition, no more.
pub const SUM_TOLERANCE: f64 = 1e-6;

impl fmt::Display for MixtureError {
    fn fmt(&self, out: &mut fmt::Formatter<'_>) -> fmt::Result {
        match self {
            Self::Empty => write!(out, "a mixture needs at least one part"),
            Self::TooMany { parts } => write!(out, "a mixture has at most {MOST_PARTS} parts, this one has {parts}"),
            Self::Sum { sum } => write!(out, "the shares sum to {}, not to 1", rounded(*sum)),
            Self::Share { name, share } => write!(out, "the share of {name} is {}, not between 0 and 1", rounded(*share)),
            Self::Repeated { name } => write!(out, "{name} stands twice in the mixture"),
        }
    }
}

impl std::error::Error for MixtureError {}

/// A share without the last digits of binary arithmetic: 0.82 + 0.16 is 0.98.
pub(super) fn rounded(share: f64) -> f64 {
    let rounded = (share * 1e12).round() / 1e12;
    if rounded.is_finite() && rounded != 0.0 { rounded } else { share }
}

/// The species of a mixture and their mole fractions, which sum to 1. Species of share 0 are left out.
///
/// Equation: by mole and by volume x_i = y_i / Σ y; by mass x_i = (y_i/M_i) / Σ (y_j/M_j). A part that is a mixture itself is taken
/// apart, and species that come from several parts are added up.
///
/// # Errors
///
/// [`MixtureError`], the first that applies.
pub fn mole_fractions(parts: &[(Named, f64)], by: ShareBasis) -> Result<Vec<(&'static Species, f64)>, MixtureError> {
    if parts.is_empty() {
        return Err(MixtureError::Empty);
    }
    if parts.len() > MOST_PARTS {
        return Err(MixtureError::TooMany { parts: parts.len() });
    }
    for (index, (named, share)) in parts.iter().enumerate() {
        let name = named.name();
        // Written so that not-a-number fails too.
        if !(*share >= 0.0 && share.is_finite()) {
            return Err(MixtureError::Share { name, share: *share });
        }
        if parts[..index].iter().any(|(earlier, _)| earlier == named) {
            return Err(MixtureError::Repeated { name });
        }
    }
    let sum: f64 = parts.iter().map(|(_, share)| share).sum();
    if (sum - 1.0).abs() > SUM_TOLERANCE {
        return Err(MixtureError::Sum { sum });
    }
    let mut amounts: Vec<(&'static Species, f64)> = Vec::new();
    for (named, share) in parts.iter().filter(|(_, share)| *share > 0.0) {
        let own = own_fractions(*named);
        let amount = match by {
            ShareBasis::Mole | ShareBasis::Volume => *share,
            ShareBasis::Mass => *share / molar_mass_kg_mol(&own),
        };
        for (species, fraction) in own {
            match amounts.iter_mut().find(|(known, _)| known.name == species.name) {
                Some((_, sum)) => *sum += amount * fraction,
                None => amounts.push((species, amount * fraction)),
            }
        }
    }
    let total: f64 = amounts.iter().map(|(_, amount)| amount).sum();
    for (_, amount) in &mut amounts {
        *amount /= total;
    }
    Ok(amounts)
}

/// The mole fractions of a named gas.
pub(super) fn own_fractions(named: Named) -> Vec<(&'static Species, f64)> {
    match named {
        Named::Species(species) => vec![(species, 1.0)],
        Named::Mixture(mixture) => mixture.components(),
    }
}

/// Molar mass of a mixture, kg/mol: Σ x_i M_i.
pub(super) fn molar_mass_kg_mol(fractions: &[(&'static Species, f64)]) -> f64 {
    fractions.iter().map(|(species, fraction)| fraction * species.molar_mass_kg_mol).sum()
}

#[cfg(test)]
mod tests {
    use super::*;
    use crate::gas::name::find;

    fn fractions(parts: &[(&str, f64)], by: ShareBasis) -> Result<Vec<(&'static Species, f64)>, MixtureError> {
        let parts: Vec<(Named, f64)> = parts.iter().map(|(name, share)| (find(name).unwrap(), *share)).collect();
        mole_fractions(&parts, by)
    }

    #[test]
    fn bad_shares_say_what_is_wrong() {
        let error = |parts: &[(&str, f64)]| fractions(parts, ShareBasis::Mole).unwrap_err();
        assert_eq!(error(&[]), MixtureError::Empty);
        assert_eq!(error(&[("Ar", 0.82), ("CO2", 0.16)]).to_string(), "the shares sum to 0.98, not to 1");
        assert_eq!(error(&[("Ar", 1.2), ("CO2", -0.2)]), MixtureError::Share { name: "carbon dioxide", share: -0.2 });
        assert_eq!(error(&[("Ar", 0.5), ("argon", 0.5)]), MixtureError::Repeated { name: "argon" });
        assert!(matches!(error(&[("Ar", f64::NAN)]), MixtureError::Share { .. }));
        assert!(matches!(error(&[("Ar", f64::INFINITY)]), MixtureError::Share { .. }));
        assert_eq!(error(&[("Ar", 0.1); 33]), MixtureError::TooMany { parts: 33 });
        assert!(matches!(error(&[("Ar", 0.0)]), MixtureError::Sum { .. }));
        assert!(fractions(&[("Ar", 0.5), ("He", 0.5 + 9e-7)], ShareBasis::Mole).is_ok());
        assert!(fractions(&[("Ar", 0.5), ("He", 0.5 + 1.1e-6)], ShareBasis::Mole).is_err());
    }

    #[test]
    fn mixtures_within_mixtures_are_taken_apart() {
        let sum = fractions(&[("dry air", 0.9), ("argon", 0.1)], ShareBasis::Mole).unwrap();
        assert_eq!(sum.len(), 4);
        let argon = sum.iter().find(|(species, _)| species.name == "argon").unwrap().1;
        assert!((argon - (0.9 * 0.009_365 + 0.1)).abs() < 1e-15);
    }

    #[test]
    fn a_share_of_nothing_is_left_out() {
        assert_eq!(fractions(&[("N2", 1.0), ("He", 0.0)], ShareBasis::Mass).unwrap().len(), 1);
    }
}
