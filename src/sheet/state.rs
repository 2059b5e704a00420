//! Gases and states: a state becomes the relations that tie its properties.

use std::sync::Arc;

use crate::diagnostic::{Span, code};
use crate::gas::{self, Gas, MixtureError, Named as NamedGas};
use crate::syntax::{self, BinaryOp, Function, GasPart, Model, Named, ShareBasis, Statement};
use crate::units::constants::STANDARD_STATE_PRESSURE;

use super::reader::{Meaning, Reader};
use super::{Expr, ExprId, GasFunction, GasId, Property, QuantityId, RelationOrigin, SheetGas, State, StateId};

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
        if let Some((Model::Real, span)) = model {
            self.report(code::not_offered::finding(
                span,
                "`, real`, the reference equation of a gas,",
                "leave it out: the gas is then calculated as an ideal gas, and judged",
            ));
            sound = false;
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
                    let finding = if part.species.text.eq_ignore_ascii_case("humid air") {
                        code::not_offered::finding(
                            part.species.span,
                            "`humid air`",
                            "take `dry air`, and account for the water by its partial pressure",
                        )
                    } else if unknown.ambiguous {
                        code::unknown_gas::ambiguous(part.species.span, &part.species.text, &unknown.near.join(", "))
                    } else {
                        code::unknown_gas::finding(part.species.span, &part.species.text, &unknown.near)
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
        self.sheet.gases.push(SheetGas {
            name: self.tree.names.text(name.name).to_owned(),
            gas: Arc::new(gas),
            model: Model::Ideal,
            statement: self.statement,
        });
        Some(GasId(self.sheet.gases.len() as u32 - 1))
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
        if let Some((pair, why)) = dependent(&fixed.iter().map(|(property, ..)| *property).collect::<Vec<_>>())
            && !self.poisoned_states[index]
        {
            let place = fixed
                .first()
                .map_or(name.span, |(_, span, _)| *span)
                .to(fixed.last().map_or(name.span, |(_, _, value)| self.sheet.span_of(*value).unwrap_or(name.span)));
            self.report(code::dependent_properties::finding(place, &owner, &pair, why));
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

    /// The laws of every state, between the properties that the sheet uses.
    pub(super) fn laws(&mut self) {
        for index in 0..self.sheet.states.len() {
            let state = StateId(index as u32);
            // A state whose own line was passed over, because its name means something else, has no gas.
            self.poisoned_states[index] |= self.sheet.states[index].gas.0 as usize >= self.sheet.gases.len();
            if self.poisoned_states[index] {
                // Properties named before the state's own line was found to be in error.
                for (key, id) in &self.properties {
                    if key.0 == state {
                        self.poisoned[id.0 as usize] = true;
                    }
                }
                continue;
            }
            self.statement = self.sheet.states[index].statement;
            // Pressure and temperature are part of every state: the verdict on its model needs them.
            self.property(state, Property::P);
            self.property(state, Property::T);
            let used: Vec<Property> = Property::ROWS
                .iter()
                .map(|row| row.property)
                .filter(|property| self.properties.contains_key(&(state, *property)))
                .collect();
            let gas = self.sheet.states[index].gas;
            if let Err(species) = self.sheet.gas(gas).gas.has_caloric()
                && used.iter().any(|property| property.is_caloric())
            {
                let finding = code::outside_model_range::no_data(self.sheet.states[index].span, species);
                self.report(finding);
                self.poisoned_states[index] = true;
                for property in used {
                    let id = self.property(state, property);
                    self.poisoned[id.0 as usize] = true;
                }
                continue;
            }
            for property in &used {
                self.law(state, gas, *property, &used);
            }
            self.sheet.states[index].properties = used.iter().map(|property| (*property, self.property(state, *property))).collect();
        }
    }

    /// The relation that ties `property` to pressure and temperature (ideal gas law; ideal caloric properties).
    fn law(&mut self, state: StateId, gas: GasId, property: Property, used: &[Property]) {
        let span = self.sheet.state(state).span;
        let uses = |other: Property| used.contains(&other);
        let Some(constant) = self.gas_constant(gas, "R") else { return };
        let quantity = |reader: &mut Self, property: Property| -> ExprId {
            let id = reader.property(state, property);
            reader.expr(Expr::Quantity(id), span)
        };
        let (left, right) = match property {
            Property::P | Property::T | Property::Mu | Property::Lambda => return,
            Property::V => {
                let (p, v, t) = (quantity(self, Property::P), quantity(self, Property::V), quantity(self, Property::T));
                let r = self.expr(Expr::Quantity(constant), span);
                (self.product(p, v, span), self.product(r, t, span))
            }
            Property::Rho => {
                let (p, rho, t) = (quantity(self, Property::P), quantity(self, Property::Rho), quantity(self, Property::T));
                let r = self.expr(Expr::Quantity(constant), span);
                let r_t = self.product(r, t, span);
                (p, self.product(rho, r_t, span))
            }
            Property::H | Property::U | Property::Cp => {
                let function = match property {
                    Property::H => GasFunction::Enthalpy,
                    Property::U => GasFunction::InternalEnergy,
                    _ => GasFunction::HeatCapacity,
                };
                let (value, t) = (quantity(self, property), quantity(self, Property::T));
                (value, self.expr(Expr::Gas(function, gas, t), span))
            }
            Property::S => {
                let (s, t, p) = (quantity(self, Property::S), quantity(self, Property::T), quantity(self, Property::P));
                let r = self.expr(Expr::Quantity(constant), span);
                let reference = self.expr(Expr::Number(STANDARD_STATE_PRESSURE, u32::MAX), span);
                let ratio = self.expr(Expr::Binary(BinaryOp::Divide, p, reference), span);
                let logarithm = self.expr(Expr::Call(Function::Ln, ratio, None), span);
                let at_reference = self.expr(Expr::Gas(GasFunction::Entropy, gas, t), span);
                let fall = self.product(r, logarithm, span);
                (s, self.expr(Expr::Binary(BinaryOp::Subtract, at_reference, fall), span))
            }
            Property::Cv => {
                let cv = quantity(self, Property::Cv);
                let cp = if uses(Property::Cp) { quantity(self, Property::Cp) } else { self.heat_capacity(state, gas, span) };
                let r = self.expr(Expr::Quantity(constant), span);
                (cv, self.expr(Expr::Binary(BinaryOp::Subtract, cp, r), span))
            }
            Property::K => {
                let k = quantity(self, Property::K);
                let cp = if uses(Property::Cp) { quantity(self, Property::Cp) } else { self.heat_capacity(state, gas, span) };
                let cv = if uses(Property::Cv) {
                    quantity(self, Property::Cv)
                } else {
                    let again = if uses(Property::Cp) { quantity(self, Property::Cp) } else { self.heat_capacity(state, gas, span) };
                    let r = self.expr(Expr::Quantity(constant), span);
                    self.expr(Expr::Binary(BinaryOp::Subtract, again, r), span)
                };
                (k, self.expr(Expr::Binary(BinaryOp::Divide, cp, cv), span))
            }
            Property::W => {
                let (w, t) = (quantity(self, Property::W), quantity(self, Property::T));
                let k = if uses(Property::K) {
                    quantity(self, Property::K)
                } else {
                    let cp = if uses(Property::Cp) { quantity(self, Property::Cp) } else { self.heat_capacity(state, gas, span) };
                    let again = if uses(Property::Cp) { quantity(self, Property::Cp) } else { self.heat_capacity(state, gas, span) };
                    let r = self.expr(Expr::Quantity(constant), span);
                    let cv = self.expr(Expr::Binary(BinaryOp::Subtract, again, r), span);
                    self.expr(Expr::Binary(BinaryOp::Divide, cp, cv), span)
                };
                let r = self.expr(Expr::Quantity(constant), span);
                let k_r = self.product(k, r, span);
                let square = self.product(k_r, t, span);
                (w, self.expr(Expr::Call(Function::Sqrt, square, None), span))
            }
            Property::Z => {
                let z = quantity(self, Property::Z);
                (z, self.expr(Expr::Number(1.0, u32::MAX), span))
            }
        };
        self.relation(left, right, RelationOrigin::Law(state, property), span);
    }

    fn heat_capacity(&mut self, state: StateId, gas: GasId, span: Span) -> ExprId {
        let id: QuantityId = self.property(state, Property::T);
        let t = self.expr(Expr::Quantity(id), span);
        self.expr(Expr::Gas(GasFunction::HeatCapacity, gas, t), span)
    }

    fn product(&mut self, a: ExprId, b: ExprId, span: Span) -> ExprId {
        self.expr(Expr::Binary(BinaryOp::Multiply, a, b), span)
    }
}

/// Whether these properties of an ideal gas, two or more, do not fix a state: which, and why.
///
/// Enthalpy, internal energy and the heat capacities of an ideal gas are functions of temperature alone, density is one
/// over specific volume, and the compressibility factor is 1 everywhere.
fn dependent(at: &[Property]) -> Option<(String, &'static str)> {
    let of_temperature =
        |property: &Property| matches!(property, Property::T | Property::H | Property::U | Property::Cp | Property::Cv | Property::K);
    let of_density = |property: &Property| matches!(property, Property::V | Property::Rho);
    if at.len() < 2 {
        return None;
    }
    let names = at.iter().map(|property| format!("`{}`", property.row().field)).collect::<Vec<_>>().join(" and ");
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
    if at.iter().all(of_density) {
        return Some((names, "specific volume is one over density: one determines the other"));
    }
    None
}
