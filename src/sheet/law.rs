//! The laws of a state: the relations that tie its properties.

use crate::diagnostic::{Diagnostic, Span, code};
use crate::gas::saturation::has_saturation_line;
use crate::gas::transport::Transport;
use crate::syntax::{BinaryOp, Function};
use crate::units::constants::STANDARD_STATE_PRESSURE;

use super::reader::Reader;
use super::{Expr, ExprId, GasFunction, GasId, GasModel, Property, QuantityId, RelationOrigin, StateFunction, StateId};

impl Reader<'_> {
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
            let gas = self.sheet.states[index].gas;
            if matches!(self.sheet.gas(gas).model, GasModel::HumidAir(_)) {
                self.property(state, Property::HumidityRatio);
            }
            let used: Vec<Property> = Property::ROWS
                .iter()
                .map(|row| row.property)
                .filter(|property| self.properties.contains_key(&(state, *property)))
                .collect();
            if let Some(finding) = self.without_data(state, gas, &used) {
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

    /// A property among `used` that the gas does not offer: no data, or humid air alone has it.
    fn without_data(&self, state: StateId, gas: GasId, used: &[Property]) -> Option<Diagnostic> {
        let (entry, owner) = (self.sheet.gas(gas), self.sheet.state(state));
        let caloric = match &entry.model {
            GasModel::Ideal => entry.gas.has_caloric().err(),
            GasModel::Real(real) => real.without_caloric(),
            GasModel::HumidAir(_) => None,
        };
        if let Some(species) = caloric
            && used.iter().any(|property| property.is_caloric())
        {
            let by_equation = entry.model.is_ideal() && entry.gas.species().is_some_and(has_saturation_line);
            return Some(code::outside_model_range::no_data(owner.span, species, by_equation));
        }
        let is_humid = matches!(entry.model, GasModel::HumidAir(_));
        let transport = if is_humid { None } else { Transport::of(&entry.gas) };
        used.iter().find_map(|property| {
            let is_known = match property {
                Property::Mu => transport.is_some_and(|transport| transport.viscosity_range().is_some()),
                Property::Lambda => transport.is_some_and(|transport| transport.conductivity_range().is_some()),
                moisture if moisture.is_moisture() => {
                    let place = self.first_use(state, *moisture).unwrap_or(owner.span);
                    return (!is_humid).then(|| code::no_gas_data::moisture(place, &owner.name, property.row().field, &entry.gas.title()));
                }
                _ => true,
            };
            let title = if is_humid { "humid air".to_owned() } else { entry.gas.title() };
            (!is_known).then(|| code::no_gas_data::transport(owner.span, &owner.name, property.row().word, &title))
        })
    }

    /// Where the sheet first asks for a property of a state.
    fn first_use(&self, state: StateId, property: Property) -> Option<Span> {
        let id = *self.properties.get(&(state, property))?;
        let exprs = (0..self.sheet.exprs.len() as u32).map(ExprId);
        let places = exprs.filter(|expr| self.sheet.exprs.get(*expr) == Expr::Quantity(id)).filter_map(|expr| self.sheet.span_of(expr));
        places.min_by_key(|span| span.start)
    }

    /// The relation that ties `property` to temperature and pressure.
    fn law(&mut self, state: StateId, gas: GasId, property: Property, used: &[Property]) {
        match (&self.sheet.gas(gas).model, property) {
            (_, Property::P | Property::T) => {}
            (GasModel::Ideal, Property::Mu | Property::Lambda) | (GasModel::Real(_), _) => {
                self.equation_law(state, gas, property, used, None)
            }
            (GasModel::HumidAir(_), Property::HumidityRatio) => {}
            (GasModel::HumidAir(_), Property::DewPoint) => self.dew_point_law(state, gas),
            (GasModel::HumidAir(_), _) => self.equation_law(state, gas, property, used, Some(Property::HumidityRatio)),
            (GasModel::Ideal, _) => self.ideal_law(state, gas, property, used),
        }
    }

    /// A property by the equation of state of the gas, as a function of temperature and pressure and, of humid air, its moisture.
    fn equation_law(&mut self, state: StateId, gas: GasId, property: Property, used: &[Property], moisture: Option<Property>) {
        let span = self.sheet.state(state).span;
        let quantity = |reader: &mut Self, property: Property| -> ExprId {
            let id = reader.property(state, property);
            reader.expr(Expr::Quantity(id), span)
        };
        let left = quantity(self, property);
        if property == Property::Rho && used.contains(&Property::V) {
            let v = quantity(self, Property::V);
            let (left, one) = (self.product(left, v, span), self.expr(Expr::Number(1.0, u32::MAX), span));
            self.relation(left, one, RelationOrigin::Law(state, property), span);
            return;
        }
        let (t, p) = (quantity(self, Property::T), quantity(self, Property::P));
        let third = moisture.map_or(p, |moisture| quantity(self, moisture));
        let function = StateFunction { of: property, x: Property::T, y: Property::P, moisture };
        let right = self.expr(Expr::State(function, gas, [t, p, third]), span);
        self.relation(left, right, RelationOrigin::Law(state, property), span);
    }

    /// The dew point of humid air, which its temperature has no part in.
    fn dew_point_law(&mut self, state: StateId, gas: GasId) {
        let span = self.sheet.state(state).span;
        let [left, p, w] = [Property::DewPoint, Property::P, Property::HumidityRatio].map(|property| {
            let id = self.property(state, property);
            self.expr(Expr::Quantity(id), span)
        });
        let function = StateFunction { of: Property::DewPoint, x: Property::P, y: Property::HumidityRatio, moisture: None };
        let right = self.expr(Expr::State(function, gas, [p, w, w]), span);
        self.relation(left, right, RelationOrigin::Law(state, Property::DewPoint), span);
    }

    /// The relation that ties `property` to pressure and temperature (ideal gas law; ideal caloric properties).
    fn ideal_law(&mut self, state: StateId, gas: GasId, property: Property, used: &[Property]) {
        let span = self.sheet.state(state).span;
        let uses = |other: Property| used.contains(&other);
        let Some(constant) = self.gas_constant(gas, "R") else { return };
        let quantity = |reader: &mut Self, property: Property| -> ExprId {
            let id = reader.property(state, property);
            reader.expr(Expr::Quantity(id), span)
        };
        let (left, right) = match property {
            Property::P
            | Property::T
            | Property::Mu
            | Property::Lambda
            | Property::RelativeHumidity
            | Property::DewPoint
            | Property::HumidityRatio => return,
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
