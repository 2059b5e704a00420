//! States: what a `state` line fixes.

use crate::diagnostic::{Span, code};
use crate::syntax::{self, Named};

use super::reader::{Meaning, Reader};
use super::{Expr, ExprId, GasId, GasModel, Property, RelationOrigin, State, StateId};

impl Reader<'_> {
    /// The name of a state, before its properties are looked at.
    pub(super) fn declare_state(&mut self, name: Named) -> StateId {
        self.sheet.states.push(State {
            name: self.tree.names.text(name.name).to_owned(),
            gas: GasId(u32::MAX),
            statement: self.statement,
            span: name.span,
            at: Vec::new(),
            properties: Vec::new(),
        });
        self.poisoned_states.push(false);
        StateId(self.sheet.states.len() as u32 - 1)
    }

    /// A `state` line.
    pub(super) fn state(&mut self, name: Named, gas: Named, at: &[(Named, syntax::ExprId)]) {
        let Some((Meaning::State(state), span)) = self.names.get(&name.name).copied().filter(|(_, span)| *span == name.span) else {
            for (_, expr) in at {
                self.lower(*expr);
            }
            return;
        };
        debug_assert_eq!(span, name.span);
        let index = state.0 as usize;
        match self.names.get(&gas.name).map(|(meaning, _)| *meaning) {
            Some(Meaning::Gas(id)) => self.sheet.states[index].gas = id,
            Some(Meaning::Poisoned) => self.poisoned_states[index] = true,
            other => {
                self.poisoned_states[index] = true;
                let text = self.tree.names.text(gas.name);
                let mut known: Vec<&str> = self.sheet.gases.iter().map(|gas| gas.name.as_str()).collect();
                known.sort_unstable();
                let near: Vec<String> = crate::diagnostic::nearest(text, known.iter().copied()).into_iter().map(str::to_owned).collect();
                let near: Vec<&str> = near.iter().map(String::as_str).collect();
                let finding = match other {
                    Some(Meaning::State(_)) => code::unknown_name::gas(gas.span, text, &near).fact(format!("`{text}` is a state")),
                    Some(_) => code::unknown_name::gas(gas.span, text, &near).fact(format!("`{text}` is a quantity")),
                    None => code::unknown_name::gas(gas.span, text, &near),
                };
                self.report(finding);
            }
        }
        let owner = self.sheet.states[index].name.clone();
        let mut fixed: Vec<(Property, Span, ExprId)> = Vec::new();
        for (field, expr) in at {
            let value = self.lower(*expr);
            let word = self.tree.names.text(field.name);
            let property = self.property_of(&owner, word, field.span);
            match (property, value) {
                (Some(property), Some(value)) => {
                    if let Some((_, first, _)) = fixed.iter().find(|(other, ..)| *other == property) {
                        let finding = code::property_given_twice::finding(field.span, &owner, word, *first);
                        self.report(finding);
                        self.poisoned_states[index] = true;
                    } else {
                        fixed.push((property, field.span, value));
                    }
                }
                (_, value) => {
                    self.poisoned_states[index] = true;
                    if let Some(value) = value {
                        self.poison_below(value);
                    }
                }
            }
        }
        let properties: Vec<Property> = fixed.iter().map(|(property, ..)| *property).collect();
        let gas = self.sheet.states[index].gas;
        if let Some(model) = self.sheet.gases.get(gas.0 as usize).map(|gas| &gas.model)
            && let Some((pair, why)) = dependent(model, &properties)
            && !self.poisoned_states[index]
        {
            let humid = matches!(model, GasModel::HumidAir(_));
            let place = fixed
                .first()
                .map_or(name.span, |(_, span, _)| *span)
                .to(fixed.last().map_or(name.span, |(_, _, value)| self.sheet.span_of(*value).unwrap_or(name.span)));
            self.report(if humid {
                code::dependent_properties::of_humid_air(place, &owner, &pair, why)
            } else {
                code::dependent_properties::finding(place, &owner, &pair, why)
            });
            self.poisoned_states[index] = true;
        }
        if self.poisoned_states[index] {
            for (_, _, value) in fixed {
                self.poison_below(value);
            }
            for (key, id) in &self.properties {
                if key.0 == state {
                    self.poisoned[id.0 as usize] = true;
                }
            }
            return;
        }
        for (property, span, value) in fixed {
            let quantity = self.property(state, property);
            let left = self.expr(Expr::Quantity(quantity), span);
            let whole = span.to(self.sheet.span_of(value).unwrap_or(span));
            self.relation(left, value, RelationOrigin::At(state, property), whole);
            self.sheet.states[index].at.push((property, span));
        }
    }
}

/// Whether these properties, two or more, do not fix a state: which, and why.
///
/// Density is one over specific volume. Of an ideal gas the enthalpy, internal energy and heat capacities are functions of
/// temperature alone, and the compressibility factor is 1 everywhere. The dew point of humid air and its humidity ratio are one
/// thing said twice at a known pressure.
fn dependent(model: &GasModel, at: &[Property]) -> Option<(String, &'static str)> {
    let of_temperature =
        |property: &Property| matches!(property, Property::T | Property::H | Property::U | Property::Cp | Property::Cv | Property::K);
    let of_density = |property: &Property| matches!(property, Property::V | Property::Rho);
    if at.len() < 2 {
        return None;
    }
    let mut names: Vec<String> = at.iter().map(|property| format!("`{}`", property.row().field)).collect();
    let last = names.pop().unwrap_or_default();
    let names = format!("{} and {last}", names.join(", "));
    if at.iter().all(of_density) {
        return Some((names, "specific volume is one over density: one determines the other"));
    }
    if [Property::P, Property::DewPoint, Property::HumidityRatio].iter().all(|property| at.contains(property)) {
        return Some((names, "at a known pressure the dew point and the humidity ratio are one thing said twice"));
    }
    if !model.is_ideal() {
        return None;
    }
    if at.contains(&Property::Z) {
        return Some((names, "the compressibility factor of an ideal gas is 1 in every state and fixes none"));
    }
    if at.iter().all(|property| of_temperature(property) || *property == Property::W) {
        let why = if at.contains(&Property::Cp) && at.contains(&Property::Cv) {
            "cp and cv of an ideal gas differ by its gas constant, and both are functions of temperature alone"
        } else {
            "enthalpy, internal energy, heat capacities and speed of sound of an ideal gas are functions of temperature alone"
        };
        return Some((names, why));
    }
    None
}
