//! The door: viscosity and conductivity of a gas, with source and range.

use std::fmt;
use std::sync::OnceLock;

use super::record::{TransportRecord, record_of};
use super::{conductivity, viscosity};
use crate::gas::eos::WithSlopes;
use crate::gas::eos::equation::{AIR, Equation};
use crate::gas::ideal_gas::Gas;
use crate::gas::state_error::Limit;
use crate::gas::table::{number, rows};

/// Sources and ranges of the correlations.
const TABLE: &str = include_str!("../data/transport.csv");

const COLUMNS: [&str; 7] = ["name", "property", "t_low_k", "t_high_k", "p_high_pa", "uncertainty", "source"];

/// Relative step of the central differences that give the slopes.
const STEP: f64 = 1e-4;

/// Range and source of one correlation.
#[derive(Clone, Copy, Debug, PartialEq)]
#[non_exhaustive]
pub struct CorrelationRange {
    /// Lowest temperature, K.
    pub t_low_k: f64,
    /// Highest temperature, K.
    pub t_high_k: f64,
    /// Highest pressure, Pa.
    pub p_high_pa: f64,
    /// Uncertainty as the publication states it; empty where none is on record here.
    pub uncertainty: &'static str,
    /// The publication.
    pub source: &'static str,
}

/// A gas has no correlation for a property.
#[derive(Clone, Debug, PartialEq, Eq)]
#[non_exhaustive]
pub struct NoCorrelation {
    /// What the gas is.
    pub gas: String,
    /// `viscosity` or `thermal conductivity`.
    pub property: &'static str,
}

impl fmt::Display for NoCorrelation {
    fn fmt(&self, out: &mut fmt::Formatter<'_>) -> fmt::Result {
        write!(out, "no published correlation for the {} of {}", self.property, self.gas)
    }
}

impl std::error::Error for NoCorrelation {}

/// Transport properties of one gas.
#[derive(Debug)]
pub struct Transport {
    record: TransportRecord,
    pub(super) equation: &'static Equation,
    viscosity: Option<CorrelationRange>,
    conductivity: Option<CorrelationRange>,
}

/// A name of the table and what has been read for it.
type Entry = (&'static str, OnceLock<Option<Transport>>);

impl Transport {
    /// Of a pure gas, or of dry air; `None` where neither property has a correlation. Mixtures have none.
    #[must_use]
    pub fn of(gas: &Gas) -> Option<&'static Self> {
        match gas.species() {
            Some(species) => Self::of_name(species.name),
            None if gas.title() == AIR => Self::of_name(AIR),
            None => None,
        }
    }

    /// By the name of the table.
    #[must_use]
    pub fn of_name(name: &str) -> Option<&'static Self> {
        static ALL: OnceLock<Vec<Entry>> = OnceLock::new();
        let all = ALL.get_or_init(|| Equation::names().into_iter().map(|name| (name, OnceLock::new())).collect());
        let (name, cell) = all.iter().find(|(known, _)| *known == name)?;
        cell.get_or_init(|| Self::read(name)).as_ref()
    }

    fn read(name: &'static str) -> Option<Self> {
        let record = record_of(name)?;
        let equation = Equation::of_name(name)?;
        let range = |property: &str| {
            let row = rows(TABLE, COLUMNS).find(|row| row[0] == name && row[1] == property)?;
            Some(CorrelationRange {
                t_low_k: number(row[2])?,
                t_high_k: number(row[3])?,
                p_high_pa: number(row[4])?,
                uncertainty: row[5],
                source: row[6],
            })
        };
        let viscosity = record.viscosity.as_ref().and_then(|_| range("viscosity"));
        let conductivity = record.conductivity.as_ref().and_then(|_| range("conductivity"));
        Some(Self { record, equation, viscosity, conductivity })
    }

    /// Range and source of the viscosity.
    #[must_use]
    pub fn viscosity_range(&self) -> Option<&CorrelationRange> {
        self.viscosity.as_ref()
    }

    /// Range and source of the thermal conductivity.
    #[must_use]
    pub fn conductivity_range(&self) -> Option<&CorrelationRange> {
        self.conductivity.as_ref()
    }

    /// Viscosity, Pa s, at a temperature, K, and a density, kg/m³; `None` without a correlation, and where it has no value.
    ///
    /// The density may be that of the ideal law. The slopes are central differences with a step of 1e-4.
    #[must_use]
    pub fn viscosity_pa_s(&self, t_k: f64, rho_kg_m3: f64) -> Option<WithSlopes> {
        self.viscosity.as_ref()?;
        self.sloped(t_k, rho_kg_m3, |t, rho| self.plain_viscosity(t, rho))
    }

    /// Thermal conductivity, W/(m K), as [`Self::viscosity_pa_s`].
    #[must_use]
    pub fn conductivity_w_m_k(&self, t_k: f64, rho_kg_m3: f64) -> Option<WithSlopes> {
        self.conductivity.as_ref()?;
        let record = self.record.conductivity.as_ref()?;
        self.sloped(t_k, rho_kg_m3, |t, rho| conductivity::conductivity(self, record, t, rho))
    }

    /// The viscosity alone.
    pub(super) fn plain_viscosity(&self, t_k: f64, rho: f64) -> Option<f64> {
        viscosity::viscosity(self, self.record.viscosity.as_ref()?, t_k, rho)
    }

    /// The viscosity of the thin gas.
    pub(super) fn thin_viscosity(&self, t_k: f64) -> Option<f64> {
        viscosity::thin_gas(self, self.record.viscosity.as_ref()?, t_k)
    }

    fn sloped(&self, t_k: f64, rho: f64, of: impl Fn(f64, f64) -> Option<f64>) -> Option<WithSlopes> {
        if !(t_k > 0.0 && rho > 0.0 && t_k.is_finite() && rho.is_finite()) {
            return None;
        }
        let (dt, dr) = (STEP * t_k, STEP * rho);
        let out = WithSlopes {
            value: of(t_k, rho)?,
            by_t: (of(t_k + dt, rho)? - of(t_k - dt, rho)?) / (2.0 * dt),
            by_rho: (of(t_k, rho + dr)? - of(t_k, rho - dr)?) / (2.0 * dr),
        };
        (out.value > 0.0 && out.value.is_finite() && out.by_t.is_finite() && out.by_rho.is_finite()).then_some(out)
    }
}

impl CorrelationRange {
    /// What of a state is outside the published range: temperature first, then pressure.
    #[must_use]
    pub fn unpublished(&self, t_k: f64, p_pa: f64) -> Vec<Limit> {
        let mut out = Vec::new();
        if !(self.t_low_k..=self.t_high_k).contains(&t_k) {
            out.push(Limit {
                quantity: "temperature",
                value: t_k,
                low: self.t_low_k,
                high: self.t_high_k,
                limit_low: self.t_low_k,
                limit_high: self.t_high_k,
                unit: "K",
            });
        }
        if !(..=self.p_high_pa).contains(&p_pa) {
            out.push(Limit {
                quantity: "pressure",
                value: p_pa,
                low: 0.0,
                high: self.p_high_pa,
                limit_low: 0.0,
                limit_high: self.p_high_pa,
                unit: "Pa",
            });
        }
        out
    }
}
