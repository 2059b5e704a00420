//! By what a state was calculated: kind of the model, its publication, and whether it goes beyond what is published.

use crate::gas::humid_air::{CIPM_P_PA, CIPM_SOURCE, CIPM_T_K, VIRIAL_SOURCE};
use crate::gas::{ModelKind, catalogue, verdict::Judge};
use crate::sheet::{GasId, GasModel, Property, StateId};
use crate::units;

use super::Input;

/// The model of one state.
#[derive(Clone, Debug, PartialEq, Eq)]
pub(super) struct StateModel {
    /// `ideal gas law`, `reference equation of state`, `GERG-2008`, `CIPM-2007`.
    pub(super) kind: &'static str,
    /// Publication; of an ideal gas that of its heat capacity, where the state uses it.
    pub(super) source: Option<String>,
    /// Whether the state lies beyond the published range; `None` where it has no temperature or pressure.
    pub(super) extrapolated: Option<bool>,
}

impl<'a> Input<'a> {
    /// What a gas is: `nitrogen`, `0.82 argon + 0.18 carbon dioxide by mole`, `humid air`.
    pub(super) fn gas_title(&self, id: GasId) -> String {
        let gas = self.sheet.gas(id);
        if matches!(gas.model, GasModel::HumidAir(_)) { gas.model.word().to_owned() } else { gas.gas.title() }
    }

    /// Temperature in K and pressure in Pa of a state, where the sheet determines both.
    pub(super) fn temperature_and_pressure(&self, id: StateId) -> Option<(f64, f64)> {
        let value = |wanted: Property| {
            let (_, quantity) = self.sheet.state(id).properties.iter().find(|(property, _)| *property == wanted)?;
            self.si(*quantity)
        };
        value(Property::T).zip(value(Property::P))
    }

    /// Whether a state uses a property that makes `wanted` true.
    pub(super) fn state_uses(&self, id: StateId, wanted: impl Fn(Property) -> bool) -> bool {
        self.sheet.state(id).properties.iter().any(|(property, _)| wanted(*property))
    }

    /// By what a state was calculated.
    pub(super) fn state_model(&self, id: StateId) -> StateModel {
        let gas = self.sheet.gas(self.sheet.state(id).gas);
        let at = self.temperature_and_pressure(id);
        match &gas.model {
            GasModel::Ideal => {
                let is_caloric = self.state_uses(id, Property::is_caloric) && gas.gas.has_caloric().is_ok();
                StateModel {
                    kind: "ideal gas law",
                    source: is_caloric.then(|| catalogue::caloric_source(&gas.gas)),
                    extrapolated: at.map(|(t_k, _)| is_caloric && !gas.gas.caloric_range().is_published(t_k)),
                }
            }
            GasModel::Real(real) => StateModel {
                kind: real.kind().words(),
                source: Some(real.source().to_owned()),
                extrapolated: at.map(|(t_k, p_pa)| !real.range().unpublished(t_k, p_pa).is_empty()),
            },
            GasModel::HumidAir(_) => {
                let is_cipm = at.is_some_and(|(t_k, p_pa)| is_in_cipm(t_k, p_pa));
                let (kind, source) = if is_cipm { ("CIPM-2007", CIPM_SOURCE) } else { ("virial coefficients", VIRIAL_SOURCE) };
                StateModel { kind, source: Some(source.to_owned()), extrapolated: at.map(|_| false) }
            }
        }
    }

    /// The error of the ideal law that the sheet allows, in percent: 1 % unless its head says otherwise.
    pub(super) fn ideal_limit_percent(&self) -> f64 {
        100.0 * self.sheet.head.ideal_gas_limit.map_or(0.01, |(limit, _)| limit)
    }
}

/// The limit of a sheet as it is read: `1`, `0.5`.
pub(super) fn limit_text(percent: f64) -> String {
    super::written::without_end_zeros(&units::write_figures(percent, 2))
}

/// Whether the density of humid air is that of CIPM-2007.
pub(super) fn is_in_cipm(t_k: f64, p_pa: f64) -> bool {
    (CIPM_T_K.0..=CIPM_T_K.1).contains(&t_k) && (CIPM_P_PA.0..=CIPM_P_PA.1).contains(&p_pa)
}

/// A model within a sentence: `the reference equation of state`, `GERG-2008`.
pub(super) fn model_words(kind: ModelKind) -> &'static str {
    match kind {
        ModelKind::ReferenceEquation => "the reference equation of state",
        ModelKind::Gerg2008 => "GERG-2008",
        ModelKind::PengRobinson => "the Peng-Robinson equation",
    }
}

/// The publication of the model that judges.
pub(super) fn judge_source(judge: &Judge) -> &'static str {
    judge.real().source()
}
