//! Ideal caloric properties per mass over the whole range of a gas, and the temperature that belongs to one of them.

use super::polynomial::{Interval, Polynomial, REFERENCE_TEMPERATURE_K};
use super::species::Species;
use crate::units::math::{exp, ln, sqrt};

/// The temperatures for which the caloric properties of a gas hold.
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct TemperatureRange {
    /// Lowest published temperature, K.
    pub low_k: f64,
    /// Highest published temperature, K.
    pub high_k: f64,
    /// Lowest temperature to which the polynomials go on, K. 0 stands for one-atom gases, good at every temperature above it.
    pub limit_low_k: f64,
    /// Highest temperature to which the polynomials go on, K.
    pub limit_high_k: f64,
}

/// Polynomials that were fitted from this temperature, K, go on down to [`CONTINUED_DOWN_TO_K`].
const FITTED_FROM_K: f64 = 300.0;

/// How far polynomials from [`FITTED_FROM_K`] go on downwards, K.
const CONTINUED_DOWN_TO_K: f64 = 250.0;

/// How far polynomials go on upwards, as a multiple of the highest published temperature.
const CONTINUED_UP_BY: f64 = 1.1;

impl TemperatureRange {
    /// Of a gas without caloric data: it holds no temperature.
    pub const EMPTY: Self =
        Self { low_k: f64::INFINITY, high_k: f64::NEG_INFINITY, limit_low_k: f64::INFINITY, limit_high_k: f64::NEG_INFINITY };

    fn of_species(species: &Species, intervals: &[Interval]) -> Self {
        let (Some(first), Some(last)) = (intervals.first(), intervals.last()) else {
            return Self::EMPTY;
        };
        let limit_low_k = if species.is_one_atom() {
            0.0
        } else if first.low_k == FITTED_FROM_K {
            CONTINUED_DOWN_TO_K
        } else {
            first.low_k
        };
        Self { low_k: first.low_k, high_k: last.high_k, limit_low_k, limit_high_k: CONTINUED_UP_BY * last.high_k }
    }

    fn intersection(self, other: Self) -> Self {
        Self {
            low_k: self.low_k.max(other.low_k),
            high_k: self.high_k.min(other.high_k),
            limit_low_k: self.limit_low_k.max(other.limit_low_k),
            limit_high_k: self.limit_high_k.min(other.limit_high_k),
        }
    }

    /// Whether a temperature is within the published range.
    #[must_use]
    pub fn is_published(&self, t_k: f64) -> bool {
        t_k >= self.low_k && t_k <= self.high_k
    }

    /// Whether a temperature is within the limits of extrapolation: the properties have values there.
    #[must_use]
    pub fn contains(&self, t_k: f64) -> bool {
        t_k >= self.limit_low_k.max(f64::MIN_POSITIVE) && t_k <= self.limit_high_k
    }
}

/// A polynomial per mass, J/(kg K), and the temperature up to which it counts.
#[derive(Clone, Copy, Debug, PartialEq)]
struct Piece {
    high_k: f64,
    polynomial: Polynomial,
}

/// Caloric properties of one gas: those of its components, added up to one polynomial an interval.
#[derive(Clone, Debug, PartialEq)]
pub(super) struct Caloric {
    pieces: Vec<Piece>,
    pub(super) range: TemperatureRange,
    /// Specific gas constant, J/(kg K).
    gas_constant: f64,
}

/// The property that a temperature is sought for.
#[derive(Clone, Copy, Debug, PartialEq, Eq)]
pub(super) enum Property {
    /// h, J/kg.
    Enthalpy,
    /// u = h - R T, J/kg.
    InternalEnergy,
    /// s at the reference pressure, J/(kg K).
    Entropy,
}

impl Caloric {
    /// Adds up the components, given with mole fractions that sum to 1; `gas_constant` is that of the mixture, J/(kg K).
    ///
    /// Equation: cp = (R/M) Σ x_i cp_i/R, likewise h and s; s with the entropy of mixing -(R/M) Σ x_i ln x_i.
    ///
    /// The name of the first component without polynomials is the error.
    pub(super) fn new(components: &[(&'static Species, f64)], gas_constant: f64) -> Result<Self, &'static str> {
        let mut range: Option<TemperatureRange> = None;
        let mut breaks = Vec::new();
        for (species, _) in components {
            let intervals = species.caloric.ok_or(species.name)?;
            let own = TemperatureRange::of_species(species, intervals);
            range = Some(range.map_or(own, |sum| sum.intersection(own)));
            breaks.extend(intervals.iter().map(|interval| interval.high_k));
        }
        let range = range.unwrap_or(TemperatureRange::EMPTY);
        breaks.retain(|high_k| *high_k <= range.high_k);
        breaks.sort_by(f64::total_cmp);
        breaks.dedup();
        let mixing: f64 = components.iter().map(|(_, fraction)| fraction * ln(*fraction)).sum();
        let pieces = breaks
            .iter()
            .map(|high_k| {
                let mut polynomial = Polynomial { b2: -gas_constant * mixing, ..Polynomial::default() };
                for (species, fraction) in components {
                    let intervals = species.caloric.unwrap_or(&[]);
                    let covering = intervals.iter().find(|interval| interval.high_k >= *high_k);
                    if let (Some(first), Some(interval)) = (intervals.first(), covering) {
                        polynomial.add(gas_constant * fraction, &interval.polynomial.from_reference(&first.polynomial));
                    }
                }
                Piece { high_k: *high_k, polynomial }
            })
            .collect();
        Ok(Self { pieces, range, gas_constant })
    }

    /// The polynomial that counts at a temperature; `None` outside the limits. The first and the last go on beyond their ends.
    fn at(&self, t_k: f64) -> Option<&Polynomial> {
        if !self.range.contains(t_k) {
            return None;
        }
        let piece = self.pieces.iter().find(|piece| t_k <= piece.high_k).or(self.pieces.last())?;
        Some(&piece.polynomial)
    }

    /// cp, J/(kg K); not a number outside the limits, as with the next three.
    pub(super) fn cp(&self, t_k: f64) -> f64 {
        self.at(t_k).map_or(f64::NAN, |polynomial| polynomial.heat_capacity(t_k))
    }

    /// dcp/dT, J/(kg K²).
    pub(super) fn cp_slope(&self, t_k: f64) -> f64 {
        self.at(t_k).map_or(f64::NAN, |polynomial| polynomial.heat_capacity_slope(t_k))
    }

    /// h, J/kg.
    pub(super) fn enthalpy(&self, t_k: f64) -> f64 {
        self.at(t_k).map_or(f64::NAN, |polynomial| polynomial.enthalpy(t_k))
    }

    /// s at the reference pressure, J/(kg K).
    pub(super) fn entropy(&self, t_k: f64) -> f64 {
        self.at(t_k).map_or(f64::NAN, |polynomial| polynomial.entropy(t_k))
    }

    fn value(&self, property: Property, polynomial: &Polynomial, t_k: f64) -> f64 {
        match property {
            Property::Enthalpy => polynomial.enthalpy(t_k),
            Property::InternalEnergy => polynomial.enthalpy(t_k) - self.gas_constant * t_k,
            Property::Entropy => polynomial.entropy(t_k),
        }
    }

    /// The temperature, K, at which a property has the value `target`; not a number outside the limits.
    ///
    /// All three properties rise with temperature. Where two polynomials touch they miss each other by up to 3e-7 of the
    /// temperature: a target in the gap gives the temperature of the joint, one that both reach gives the lower temperature.
    pub(super) fn temperature(&self, property: Property, target: f64) -> f64 {
        self.seek(property, target).0
    }

    /// The temperature of [`Self::temperature`], and the steps of the iteration.
    fn seek(&self, property: Property, target: f64) -> (f64, u32) {
        if !target.is_finite() {
            return (f64::NAN, 0);
        }
        let mut low_k = self.range.limit_low_k.max(f64::MIN_POSITIVE);
        let last = self.pieces.len().saturating_sub(1);
        for (index, Piece { high_k, polynomial }) in self.pieces.iter().enumerate() {
            let high_k = if index == last { self.range.limit_high_k } else { *high_k };
            let (from, to) = (self.value(property, polynomial, low_k), self.value(property, polynomial, high_k));
            if target >= from && target <= to {
                return self.root(property, polynomial, target, low_k, high_k);
            }
            // A state exactly at a limit must find its way back although its property carries rounding.
            let slack = 8.0 * f64::EPSILON * (from.abs() + target.abs() + self.scale(property, high_k));
            if target < from {
                return if index > 0 || target >= from - slack { (low_k, 0) } else { (f64::NAN, 0) };
            }
            if index == last && target <= to + slack {
                return (high_k, 0);
            }
            low_k = high_k;
        }
        (f64::NAN, 0)
    }

    /// Size of the terms that a property is the sum of.
    fn scale(&self, property: Property, t_k: f64) -> f64 {
        match property {
            Property::Enthalpy | Property::InternalEnergy => self.gas_constant * t_k,
            Property::Entropy => self.gas_constant,
        }
    }

    /// Newton's method kept inside a bracket whose ends lie on either side of the target. Gives the temperature and how many steps it took.
    ///
    /// Entropy is close to a straight line over ln T, enthalpy over T: each is stepped in its own variable. The iteration ends when a step is
    /// below [`STEP`] of the temperature, or when rounding lets the residual fall no more.
    fn root(&self, property: Property, polynomial: &Polynomial, target: f64, mut low_k: f64, mut high_k: f64) -> (f64, u32) {
        let mut t_k = REFERENCE_TEMPERATURE_K.clamp(low_k, high_k);
        let (mut best_k, mut best) = (t_k, f64::INFINITY);
        let ends = (low_k, high_k);
        for steps in 1..=MOST_STEPS {
            let residual = self.value(property, polynomial, t_k) - target;
            let falls = residual.abs() < best;
            if falls {
                (best_k, best) = (t_k, residual.abs());
            }
            if residual < 0.0 {
                low_k = t_k;
            } else {
                high_k = t_k;
            }
            let cp = polynomial.heat_capacity(t_k);
            let stepped = match property {
                Property::Enthalpy => t_k - residual / cp,
                Property::InternalEnergy => t_k - residual / (cp - self.gas_constant),
                Property::Entropy => t_k * exp(-residual / cp),
            };
            // A root at an end of the range: rounding carries the step past it.
            let next = match stepped {
                _ if stepped >= low_k && stepped <= high_k => stepped,
                _ if stepped < low_k && low_k == ends.0 => low_k,
                _ if stepped > high_k && high_k == ends.1 => high_k,
                _ => middle(low_k, high_k),
            };
            let step = (next - t_k).abs() / t_k;
            if step <= STEP {
                return (next, steps);
            }
            if !falls && step <= ROUNDING {
                return (best_k, steps);
            }
            t_k = next;
        }
        (best_k, MOST_STEPS)
    }
}

/// Relative step of temperature at which Newton's method ends: a few units in the last place.
const STEP: f64 = 1e-15;

/// Relative step of temperature below which a residual that does not fall is rounding: from here on the next step of Newton's method would be
/// about the square of this one.
const ROUNDING: f64 = 1e-9;

/// Most steps: ten at worst are needed, bisection of the widest bracket, from the smallest number up, would take some 70 more.
const MOST_STEPS: u32 = 200;

/// The middle of a bracket, the geometric one where it spans orders of magnitude.
fn middle(low_k: f64, high_k: f64) -> f64 {
    if high_k > 4.0 * low_k { sqrt(low_k) * sqrt(high_k) } else { 0.5 * (low_k + high_k) }
}

#[cfg(test)]
mod tests {
    use super::*;
    use crate::gas::species::species;

    fn pure(one: &'static Species) -> Option<Caloric> {
        Caloric::new(&[(one, 1.0)], crate::units::constants::MOLAR_GAS_CONSTANT / one.molar_mass_kg_mol).ok()
    }

    /// Inversion relies on it, upwards to the limit of extrapolation too.
    #[test]
    fn heat_capacities_exceed_the_gas_constant_everywhere() {
        for caloric in species().iter().filter_map(pure) {
            let range = caloric.range;
            let low = range.limit_low_k.max(1.0);
            for step in 0..=2000 {
                let t = low + (range.limit_high_k - low) * f64::from(step) / 2000.0;
                assert!(caloric.cp(t) > 2.4 * caloric.gas_constant, "{range:?} at {t}");
            }
        }
    }

    #[test]
    fn ranges_follow_the_rule_of_extrapolation() {
        let of = |name: &str| pure(species().iter().find(|one| one.name == name).unwrap()).unwrap().range;
        let close = |range: TemperatureRange, low, high, limit_low, limit_high: f64| {
            assert_eq!((range.low_k, range.high_k, range.limit_low_k), (low, high, limit_low));
            assert!((range.limit_high_k / limit_high - 1.0).abs() < 1e-15);
        };
        close(of("nitrogen"), 200.0, 20000.0, 200.0, 22000.0);
        close(of("propane"), 300.0, 6000.0, 250.0, 6600.0);
        close(of("helium"), 300.0, 20000.0, 0.0, 22000.0);
        assert!(of("helium").contains(1e-9) && !of("helium").contains(0.0) && !of("helium").contains(f64::NAN));
        assert!(!TemperatureRange::EMPTY.contains(300.0));
    }

    #[test]
    fn a_target_between_two_polynomials_gives_their_joint() {
        let argon = pure(species().iter().find(|one| one.name == "argon").unwrap()).unwrap();
        let (below, above) = (argon.pieces[1].polynomial.enthalpy(6000.0), argon.pieces[2].polynomial.enthalpy(6000.0));
        assert!(above > below);
        assert_eq!(argon.temperature(Property::Enthalpy, 0.5 * (below + above)), 6000.0);
    }

    /// A state at a limit may carry a last digit that lies beyond it.
    #[test]
    fn rounding_at_a_limit_is_forgiven_and_no_more() {
        let nitrogen = pure(species().iter().find(|one| one.name == "nitrogen").unwrap()).unwrap();
        let (low, high) = (nitrogen.enthalpy(200.0), nitrogen.enthalpy(22_000.0));
        assert!(high.is_finite());
        assert_eq!(nitrogen.temperature(Property::Enthalpy, low.next_down()), 200.0);
        assert_eq!(nitrogen.temperature(Property::Enthalpy, high.next_up()), nitrogen.range.limit_high_k);
        assert!(nitrogen.temperature(Property::Enthalpy, low * (1.0 + 1e-12)).is_nan());
        assert!(nitrogen.temperature(Property::Enthalpy, high * (1.0 + 1e-12)).is_nan());
    }

    /// Most steps that any gas takes from any temperature of its range, by property: a slower or luckier iteration shows here.
    #[test]
    fn newton_takes_few_steps() {
        let mut most = [0; 3];
        for caloric in species().iter().filter_map(pure) {
            let range = caloric.range;
            for step in 0..=500 {
                let low = range.limit_low_k.max(1.0);
                let t = low * crate::units::math::pow(range.limit_high_k / low, f64::from(step) / 500.0);
                let Some(polynomial) = caloric.at(t) else { continue };
                for (most, property) in most.iter_mut().zip([Property::Enthalpy, Property::InternalEnergy, Property::Entropy]) {
                    let target = caloric.value(property, polynomial, t);
                    let steps = caloric.seek(property, target).1;
                    *most = steps.max(*most);
                }
            }
        }
        assert_eq!(most, [9, 10, 9]);
    }
}
