//! The product of powers of units that a unit text builds up, factor by factor.

use super::{Dimension, Entry, Rational, ReferenceVolume, Unit, math};

/// A product of powers of units.
///
/// Numerator and denominator are kept apart: dividing once, at the end, rounds once.
pub(super) struct Product {
    pub(super) name: String,
    dimension: Dimension,
    numerator: f64,
    denominator: f64,
    references: Vec<(ReferenceVolume, Rational)>,
    /// The zero of the scale, where the product is one unit.
    offset: f64,
    /// Whether it is one unit or a power of one, which needs no bracket.
    pub(super) single: bool,
}

impl Product {
    /// The one of `1/`.
    pub(super) fn one() -> Self {
        Self {
            name: "1".to_owned(),
            dimension: Dimension::NONE,
            numerator: 1.0,
            denominator: 1.0,
            references: Vec::new(),
            offset: 0.0,
            single: true,
        }
    }

    /// A power of a unit. `None` beyond the limits.
    pub(super) fn power(entry: &Entry, name: String, power: i32) -> Option<Self> {
        let (factor, reference) = entry.factor()?;
        Some(Self {
            name,
            dimension: entry.dimension()?.power(power.into())?,
            numerator: math::powi(factor, power),
            denominator: 1.0,
            references: reference.map(|volume| (volume, power.into())).into_iter().collect(),
            offset: if power == 1 { entry.offset() } else { 0.0 },
            single: true,
        })
    }

    /// This times or over another. `None` beyond the limits.
    pub(super) fn combine(mut self, other: Self, over: bool) -> Option<Self> {
        let (numerator, denominator) = if over { (other.denominator, other.numerator) } else { (other.numerator, other.denominator) };
        self.dimension = if over { self.dimension.per(other.dimension)? } else { self.dimension.times(other.dimension)? };
        self.numerator *= numerator;
        self.denominator *= denominator;
        for (volume, power) in other.references {
            let power = if over { power.checked_neg()? } else { power };
            match self.references.iter_mut().find(|(own, _)| *own == volume) {
                Some((_, own)) => *own = own.checked_add(power)?,
                None => self.references.push((volume, power)),
            }
        }
        self.name.push(if over { '/' } else { '.' });
        self.name.push_str(&other.name);
        self.offset = 0.0;
        self.single = false;
        self.in_range().then_some(self)
    }

    pub(super) fn in_range(&self) -> bool {
        self.numerator.is_normal() && self.denominator.is_normal() && (self.numerator / self.denominator).is_normal()
    }

    pub(super) fn into_unit(mut self) -> Unit {
        self.references.retain(|(_, power)| !power.is_zero());
        self.references.sort_unstable();
        Unit {
            name: self.name,
            dimension: self.dimension,
            factor: self.numerator / self.denominator,
            offset: self.offset,
            references: self.references,
        }
    }
}
