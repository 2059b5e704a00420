//! The nine-coefficient polynomial: heat capacity, enthalpy and entropy of an ideal gas over one interval of temperature.

use std::sync::OnceLock;

use super::table::{number, rows};
use crate::units::math::ln;

/// Temperature at which the ideal gas of every species has h = 0 and s = 0, K.
pub const REFERENCE_TEMPERATURE_K: f64 = 298.15;

/// Pressure at which the ideal gas of every species has s = 0, Pa.
pub const REFERENCE_PRESSURE_PA: f64 = 100_000.0;

/// Where the form and the coefficients of the polynomials come from.
pub const POLYNOMIAL_SOURCE: &str =
    "McBride, Zehe, Gordon 2002, NASA/TP-2002-211556, with the revisions up to September 2021 (data/thermo.inp of NASA CEA)";

/// Nine coefficients.
///
/// Equation: cp = a1 T⁻² + a2 T⁻¹ + a3 + a4 T + a5 T² + a6 T³ + a7 T⁴;
///           h = -a1 T⁻¹ + a2 ln T + a3 T + a4 T²/2 + a5 T³/3 + a6 T⁴/4 + a7 T⁵/5 + b1;
///           s = -a1 T⁻²/2 - a2 T⁻¹ + a3 ln T + a4 T + a5 T²/2 + a6 T³/3 + a7 T⁴/4 + b2, at 100 kPa.
/// Symbols:  T temperature, K; cp and s in the unit of a3, h in that unit times kelvin. As published the unit is the molar gas
///           constant; the polynomials of a [`Gas`](super::Gas) are scaled to J/(kg K).
/// Valid:    the [`Interval`] it belongs to. Outside it the formulas go on, so that the caller decides on extrapolation.
/// Source:   [`POLYNOMIAL_SOURCE`].
/// Error:    up to 1e-3 in cp against reference equations of state for simple gases, 1e-2 for others;
///           arithmetic checked in `tests/reference/caloric.rs`.
/// Edges:    T > 0. With a1 = a2 = 0 (one-atom gases) every positive T is good.
#[derive(Clone, Copy, Debug, Default, PartialEq)]
pub struct Polynomial {
    /// a1 to a7.
    pub a: [f64; 7],
    /// Constant of the enthalpy, b1.
    pub b1: f64,
    /// Constant of the entropy, b2.
    pub b2: f64,
}

const THIRD: f64 = 1.0 / 3.0;

impl Polynomial {
    /// Heat capacity at constant pressure.
    #[must_use]
    pub fn heat_capacity(&self, t_k: f64) -> f64 {
        let [a1, a2, a3, a4, a5, a6, a7] = self.a;
        let inverse = 1.0 / t_k;
        (a1 * inverse + a2) * inverse + a3 + t_k * (a4 + t_k * (a5 + t_k * (a6 + t_k * a7)))
    }

    /// Derivative of [`Self::heat_capacity`] by temperature.
    #[must_use]
    pub fn heat_capacity_slope(&self, t_k: f64) -> f64 {
        let [a1, a2, _, a4, a5, a6, a7] = self.a;
        let inverse = 1.0 / t_k;
        -(2.0 * a1 * inverse + a2) * inverse * inverse + a4 + t_k * (2.0 * a5 + t_k * (3.0 * a6 + t_k * 4.0 * a7))
    }

    /// Enthalpy; its derivative is [`Self::heat_capacity`].
    #[must_use]
    pub fn enthalpy(&self, t_k: f64) -> f64 {
        let [a1, a2, a3, a4, a5, a6, a7] = self.a;
        let powers = t_k * (a3 + t_k * (0.5 * a4 + t_k * (THIRD * a5 + t_k * (0.25 * a6 + t_k * 0.2 * a7))));
        a2 * ln(t_k) - a1 / t_k + powers + self.b1
    }

    /// Entropy at [`REFERENCE_PRESSURE_PA`]; its derivative is [`Self::heat_capacity`] over temperature.
    #[must_use]
    pub fn entropy(&self, t_k: f64) -> f64 {
        let [a1, a2, a3, a4, a5, a6, a7] = self.a;
        let inverse = 1.0 / t_k;
        let powers = t_k * (a4 + t_k * (0.5 * a5 + t_k * (THIRD * a6 + t_k * 0.25 * a7)));
        a3 * ln(t_k) - (0.5 * a1 * inverse + a2) * inverse + powers + self.b2
    }

    /// The same polynomial with h and s zero at [`REFERENCE_TEMPERATURE_K`], where its values are those of `first`, the
    /// polynomial of the same species that covers that temperature (or is continued to it from 300 K).
    #[must_use]
    pub fn from_reference(mut self, first: &Self) -> Self {
        self.b1 -= first.enthalpy(REFERENCE_TEMPERATURE_K);
        self.b2 -= first.entropy(REFERENCE_TEMPERATURE_K);
        self
    }

    /// Adds `factor` times `other`.
    pub fn add(&mut self, factor: f64, other: &Self) {
        for (sum, coefficient) in self.a.iter_mut().zip(other.a) {
            *sum += factor * coefficient;
        }
        self.b1 += factor * other.b1;
        self.b2 += factor * other.b2;
    }
}

/// The polynomial of one species over one interval of temperature, as published.
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct Interval {
    /// Name of the species.
    pub species: &'static str,
    /// Low end, K.
    pub low_k: f64,
    /// High end, K; it belongs to this interval and not to the next.
    pub high_k: f64,
    /// cp/R, h/R in kelvin, s/R.
    pub polynomial: Polynomial,
    /// Code of the data source, as the table of NASA states it.
    pub code: &'static str,
    /// The work that the heat capacities come from, as the table of NASA abbreviates it.
    pub reference: &'static str,
}

/// Coefficients; source and licence notice in `data/SOURCES.md`.
const INTERVAL_TABLE: &str = include_str!("data/nasa9.csv");

const COLUMNS: [&str; 15] =
    ["name", "interval", "t_low_k", "t_high_k", "a1", "a2", "a3", "a4", "a5", "a6", "a7", "b1", "b2", "code", "reference"];

impl Interval {
    fn read(row: [&'static str; 15]) -> Option<Self> {
        let [species, _, low, high, a1, a2, a3, a4, a5, a6, a7, b1, b2, code, reference] = row;
        let mut a = [0.0; 7];
        for (place, field) in a.iter_mut().zip([a1, a2, a3, a4, a5, a6, a7]) {
            *place = number(field)?;
        }
        let polynomial = Polynomial { a, b1: number(b1)?, b2: number(b2)? };
        Some(Self { species, low_k: number(low)?, high_k: number(high)?, polynomial, code, reference })
    }
}

/// All intervals, those of a species together and in rising order of temperature.
pub(super) fn intervals() -> &'static [Interval] {
    static INTERVALS: OnceLock<Vec<Interval>> = OnceLock::new();
    INTERVALS.get_or_init(|| rows(INTERVAL_TABLE, COLUMNS).filter_map(Interval::read).collect())
}

#[cfg(test)]
mod tests {
    use super::*;

    #[test]
    fn every_line_of_the_table_is_an_interval_and_neighbours_touch() {
        let lines = INTERVAL_TABLE.lines().filter(|line| !line.starts_with('#')).count() - 1;
        assert_eq!(intervals().len(), lines);
        for pair in intervals().windows(2) {
            if pair[0].species == pair[1].species {
                assert_eq!(pair[0].high_k, pair[1].low_k, "{}", pair[0].species);
            }
            assert!(pair[0].low_k < pair[0].high_k, "{}", pair[0].species);
        }
    }

    /// The published coefficients have nine or ten digits: a slipped one breaks the joint at 1000 K, where neighbours agree to 2e-6
    /// in cp and to 1e-7 of a temperature in h and s.
    #[test]
    fn neighbours_agree_where_they_touch() {
        for pair in intervals().windows(2).filter(|pair| pair[0].species == pair[1].species) {
            let (t, low, high) = (pair[0].high_k, &pair[0].polynomial, &pair[1].polynomial);
            let cp = low.heat_capacity(t);
            assert!((high.heat_capacity(t) / cp - 1.0).abs() < 2e-6, "cp of {} at {t}", pair[0].species);
            assert!((high.enthalpy(t) - low.enthalpy(t)).abs() < 4e-7 * cp * t, "h of {} at {t}", pair[0].species);
            assert!((high.entropy(t) - low.entropy(t)).abs() < 2e-7 * cp, "s of {} at {t}", pair[0].species);
        }
    }

    #[test]
    fn one_atom_gases_are_good_at_any_positive_temperature() {
        let helium = intervals().iter().find(|interval| interval.species == "helium").unwrap().polynomial;
        for t in [f64::MIN_POSITIVE, 1e-200, 1e-3, 4.2] {
            assert_eq!(helium.heat_capacity(t), 2.5);
            assert!(helium.enthalpy(t).is_finite() && helium.entropy(t).is_finite());
        }
    }
}
