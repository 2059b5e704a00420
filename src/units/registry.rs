//! The registry: all unit names, in order, each with its dimension and factor.
//!
//! The names are sorted once; a factor is read or composed when its name is first asked for, so that a sheet pays for the units
//! that it uses.

use std::sync::OnceLock;

use super::names::{COMPOSED, Definition, READ, Row};
use super::{Dimension, Rational, ReferenceVolume, Unit, parse};

/// The unit names of the tool, in the order of their bytes.
pub struct Registry {
    entries: Vec<Entry>,
}

/// A unit name: one word, which compound units are made of.
pub struct Entry {
    row: &'static Row,
    resolved: OnceLock<Option<Resolved>>,
}

/// What an entry stands for.
#[derive(Clone, Copy)]
struct Resolved {
    dimension: Dimension,
    factor: f64,
    offset: f64,
    reference: Option<ReferenceVolume>,
}

/// The registry, built at its first use.
pub fn registry() -> &'static Registry {
    static REGISTRY: OnceLock<Registry> = OnceLock::new();
    REGISTRY.get_or_init(|| {
        let mut entries: Vec<Entry> = READ.iter().chain(COMPOSED).map(|row| Entry { row, resolved: OnceLock::new() }).collect();
        entries.sort_unstable_by_key(|entry| entry.row.name);
        Registry { entries }
    })
}

impl Registry {
    /// The entry of a name.
    #[must_use]
    pub fn find(&self, name: &str) -> Option<&Entry> {
        let at = self.entries.binary_search_by_key(&name, |entry| entry.row.name).ok()?;
        Some(&self.entries[at])
    }

    /// All entries, in order.
    #[must_use]
    pub fn entries(&self) -> &[Entry] {
        &self.entries
    }

    /// All names, in order.
    pub fn names(&self) -> impl Iterator<Item = &'static str> + '_ {
        self.entries.iter().map(|entry| entry.row.name)
    }
}

impl Entry {
    /// The name.
    #[must_use]
    pub fn name(&self) -> &'static str {
        self.row.name
    }

    /// The unit of this name standing alone.
    ///
    /// A test reads every entry: none is `None`.
    #[must_use]
    pub fn unit(&self) -> Option<Unit> {
        let resolved = self.resolved()?;
        Some(Unit {
            name: self.row.name.to_owned(),
            dimension: resolved.dimension,
            factor: resolved.factor,
            offset: resolved.offset,
            references: resolved.reference.map(|volume| (volume, Rational::ONE)).into_iter().collect(),
        })
    }

    /// Its dimension.
    #[must_use]
    pub fn dimension(&self) -> Option<Dimension> {
        Some(self.resolved()?.dimension)
    }

    /// Its factor to SI base units, and the reference volume that it is, if any.
    pub(super) fn factor(&self) -> Option<(f64, Option<ReferenceVolume>)> {
        self.resolved().map(|resolved| (resolved.factor, resolved.reference))
    }

    /// Its offset; zero but for temperature scales.
    pub(super) fn offset(&self) -> f64 {
        self.resolved().map_or(0.0, |resolved| resolved.offset)
    }

    fn resolved(&self) -> Option<Resolved> {
        *self.resolved.get_or_init(|| Resolved::of(&self.row.definition))
    }
}

impl Resolved {
    fn of(definition: &Definition) -> Option<Self> {
        let plain = |dimension, factor| Self { dimension, factor, offset: 0.0, reference: None };
        Some(match *definition {
            Definition::Uom { abbreviation, read, dimension } => plain(dimension, read(&format!("1 {abbreviation}"))?),
            Definition::Scale { abbreviation, interval, scale } => Self {
                offset: scale(&format!("0 {abbreviation}"))?,
                ..plain(Dimension::TEMPERATURE, interval(&format!("1 {abbreviation}"))?)
            },
            Definition::Composed { number: (numerator, denominator), of } => {
                let unit = parse(of).ok()?;
                plain(unit.dimension, numerator * unit.factor / denominator)
            }
            Definition::Reference { volume, of } => Self { reference: Some(volume), ..plain(Dimension::AMOUNT, parse(of).ok()?.factor) },
        })
    }
}

#[cfg(test)]
mod tests {
    use super::*;

    #[test]
    fn every_name_has_a_unit() {
        for entry in registry().entries() {
            let unit = entry.unit().unwrap_or_else(|| panic!("{} has no factor", entry.name()));
            assert!(unit.factor.is_normal() && unit.factor > 0.0, "{}", entry.name());
            assert_eq!(parse(entry.name()).unwrap(), unit);
        }
    }

    #[test]
    fn names_are_many_sorted_and_different() {
        let names: Vec<_> = registry().names().collect();
        assert!(names.len() >= 250, "{}", names.len());
        assert!(names.windows(2).all(|pair| pair[0] < pair[1]));
    }

    #[test]
    fn no_name_is_a_word_of_the_language() {
        let words = "given let unknown gas site reference state assume require caution answer section correlate cases sweep chart curve \
                     table time rate method takes gives apply in within near from because exact at of to by with as until most starting \
                     against steps figures when varying abs gauge diff triangular sqrt cbrt exp ln log10 max sin cos tan asin acos atan \
                     pi R N_A k_B g_n k dof if else not and or";
        for word in words.split_whitespace() {
            assert!(registry().find(word).is_none(), "{word}");
        }
    }

    #[test]
    fn a_name_and_its_trailing_digits_are_never_confused() {
        // `X2` may be a name only where `X` is none, or the power would hide behind the name.
        for name in registry().names() {
            let stem = name.trim_end_matches(|c: char| c.is_ascii_digit());
            assert!(stem == name || registry().find(stem).is_none(), "{name}");
        }
    }

    #[test]
    fn names_that_are_not_there() {
        for name in ["", "in", "C", "F", "mBar", "bars", "barg"] {
            assert!(registry().find(name).is_none(), "{name}");
        }
    }
}
