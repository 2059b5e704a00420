//! Gases: what a `gas` line says.

use std::sync::Arc;

use crate::diagnostic::{Span, code, nearest};
use crate::gas::humid_air::HumidAir;
use crate::gas::{self, Gas, MixtureError, Named as NamedGas, RealGas};
use crate::syntax::{self, GasPart, Model, Named, ShareBasis, Statement};

use super::reader::Reader;
use super::{GasId, GasModel, SheetGas};

/// The gas that has three degrees of freedom.
const HUMID_AIR: &str = "humid air";

impl Reader<'_> {
    /// A `gas` line; `None` where it is in error.
    pub(super) fn gas(
        &mut self,
        statement: &Statement,
        name: Named,
        parts: &[GasPart],
        by: Option<(ShareBasis, Span)>,
        model: Option<(Model, Span)>,
    ) -> Option<GasId> {
        let mut sound = true;
        if let [part] = parts
            && part.share.is_none()
            && part.species.text.eq_ignore_ascii_case(HUMID_AIR)
        {
            return self.humid_air(name, model, part.species.span);
        }
        let mut species: Vec<(NamedGas, f64)> = Vec::new();
        for part in parts {
            let share = part.share.map_or(Some(1.0), |share| self.share(&share));
            match gas::find(&part.species.text) {
                Ok(found) => {
                    if let Some(share) = share {
                        species.push((found, share));
                    }
                }
                Err(unknown) => {
                    sound = false;
                    let finding = if part.species.text.eq_ignore_ascii_case(HUMID_AIR) {
                        code::not_offered::finding(
                            part.species.span,
                            "`humid air` as a part of a mixture",
                            "let it stand alone, or mix `dry air` and `water`",
                        )
                    } else if unknown.ambiguous {
                        code::unknown_gas::ambiguous(part.species.span, &part.species.text, &unknown.near.join(", "))
                    } else {
                        // Another name of humid air, or a slip in its own, where it may stand: alone.
                        let text = &part.species.text;
                        let humid = parts.len() == 1 && part.share.is_none() && (unknown.later || !nearest(text, [HUMID_AIR]).is_empty());
                        let near: Vec<&str> = humid.then_some(HUMID_AIR).into_iter().chain(unknown.near.iter().copied()).collect();
                        code::unknown_gas::finding(part.species.span, text, &near)
                    };
                    self.report(finding);
                }
            }
            sound &= share.is_some();
        }
        let mixed = parts.len() > 1 || parts.iter().any(|part| part.share.is_some());
        if mixed && by.is_none() {
            let span = parts
                .first()
                .map_or(statement.span, |part| part.share.map_or(part.species.span, |share| share.span))
                .to(parts.last().map_or(statement.span, |part| part.species.span));
            self.report(code::mixture_shares::basis(span));
            sound = false;
        }
        let without: Vec<&GasPart> = parts.iter().filter(|part| part.share.is_none()).collect();
        if let (true, true, Some(first), Some(last)) = (sound, mixed, without.first(), without.last()) {
            let names: Vec<String> = without.iter().map(|part| format!("`{}`", part.species.text)).collect();
            let span = if without.len() == parts.len() { first.species.span.to(last.species.span) } else { first.species.span };
            self.report(code::mixture_shares::missing(span, &names, without.len() == parts.len()));
            sound = false;
        }
        if !sound {
            return None;
        }
        let whole = Span { start: name.span.end, end: statement.span.end };
        let gas = if mixed {
            let basis = match by.map_or(ShareBasis::Mole, |(by, _)| by) {
                ShareBasis::Mole => gas::ShareBasis::Mole,
                ShareBasis::Mass => gas::ShareBasis::Mass,
                ShareBasis::Volume => gas::ShareBasis::Volume,
            };
            match Gas::mixture(&species, basis) {
                Ok(gas) => gas,
                Err(error) => {
                    let span = parts.first().map_or(whole, |part| part.share.map_or(part.species.span, |share| share.span));
                    let span = span.to(parts.last().map_or(span, |part| part.species.span));
                    let finding = match &error {
                        MixtureError::Sum { sum } => {
                            let rounded =
                                |value: f64| crate::units::write_to_place(value, -6).trim_end_matches('0').trim_end_matches('.').to_owned();
                            code::mixture_shares::sum(span, &rounded(*sum), &rounded(*sum * 100.0))
                        }
                        other => code::mixture_shares::share(span, &other.to_string()),
                    };
                    self.report(finding);
                    return None;
                }
            }
        } else {
            Gas::named(species.first()?.0)
        };
        let behind = by.map_or(parts.last()?.species.span, |(_, place)| place).end as usize;
        let model_place = model.map_or(Span::new(behind, behind), |(_, place)| place);
        let model = match model {
            Some((Model::Real, place)) => match RealGas::new(&gas) {
                Ok(real) => GasModel::Real(real),
                Err(without) => {
                    self.report(code::no_gas_data::equation(place, without.species));
                    return None;
                }
            },
            _ => GasModel::Ideal,
        };
        Some(self.add_gas(name, gas, model, model_place))
    }

    fn add_gas(&mut self, name: Named, gas: Gas, model: GasModel, model_place: Span) -> GasId {
        let (span, name) = (name.span, self.tree.names.text(name.name).to_owned());
        self.sheet.gases.push(SheetGas { name, gas: Arc::new(gas), model, span, model_place, statement: self.statement });
        GasId(self.sheet.gases.len() as u32 - 1)
    }

    /// Humid air, which has a model of its own.
    fn humid_air(&mut self, name: Named, model: Option<(Model, Span)>, place: Span) -> Option<GasId> {
        if let Some((Model::Ideal, place)) = model {
            self.report(code::not_offered::finding(
                place,
                "`, ideal` for humid air",
                "leave it out: humid air has one model, and `dry air` may be ideal",
            ));
            return None;
        }
        let (Ok(dry), Some(humid)) = (gas::find("dry air"), HumidAir::new()) else { return None };
        Some(self.add_gas(name, Gas::named(dry), GasModel::HumidAir(Arc::new(humid)), place))
    }

    fn share(&mut self, literal: &syntax::Literal) -> Option<f64> {
        let value = self.value(literal, "")?;
        if !value.shown.unit.dimension.is_none() {
            let dimension = value.shown.unit.dimension.describe();
            self.report(code::mixture_shares::share(literal.span, &format!("a share is a pure number, this is {}", code::a(&dimension))));
            return None;
        }
        if value.si < 0.0 {
            self.report(code::mixture_shares::share(literal.span, "it is negative"));
            return None;
        }
        Some(value.si)
    }
}
