//! Expressions with every name settled: the arena that relations, closed forms and conditions live in.

use crate::syntax::{BinaryOp, Function};

use super::{GasId, Property, QuantityId};

/// An expression of a sheet, by its place in the arena.
#[derive(Clone, Copy, Debug, PartialEq, Eq, Hash, PartialOrd, Ord)]
pub struct ExprId(pub u32);

/// A function that a gas offers. Each takes one argument and gives SI units, by mass.
#[derive(Clone, Copy, Debug, PartialEq, Eq, Hash)]
pub enum GasFunction {
    /// Isobaric heat capacity of the ideal gas at a temperature.
    HeatCapacity,
    /// Enthalpy of the ideal gas at a temperature.
    Enthalpy,
    /// Entropy of the ideal gas at a temperature and 100 kPa.
    Entropy,
    /// Temperature that belongs to an enthalpy: the inverse of [`Self::Enthalpy`].
    TemperatureOfEnthalpy,
    /// Temperature that belongs to an entropy at 100 kPa: the inverse of [`Self::Entropy`].
    TemperatureOfEntropy,
    /// Internal energy of the ideal gas at a temperature, h - R T.
    InternalEnergy,
    /// Temperature that belongs to an internal energy.
    TemperatureOfInternalEnergy,
    /// Saturation pressure at a temperature, by the reference equation of the gas.
    SaturationPressure,
    /// Saturation temperature at a pressure: the inverse of [`Self::SaturationPressure`].
    SaturationTemperature,
}

/// A property of a gas by the properties that fix its state: `h(T, p)` and, the other way round, `T(h, p)`.
#[derive(Clone, Copy, Debug, PartialEq, Eq, Hash)]
pub struct StateFunction {
    /// What it gives.
    pub of: Property,
    /// The property of the first argument.
    pub x: Property,
    /// The property of the second.
    pub y: Property,
    /// Of humid air: the property of the third, which says how moist it is.
    pub moisture: Option<Property>,
}

impl StateFunction {
    /// The properties of its arguments, in their order.
    pub fn arguments(self) -> impl Iterator<Item = Property> {
        [Some(self.x), Some(self.y), self.moisture].into_iter().flatten()
    }
}

/// A named constant.
#[derive(Clone, Copy, Debug, PartialEq, Eq, Hash)]
pub enum Constant {
    /// The circle's ratio.
    Pi,
    /// The molar gas constant.
    MolarGasConstant,
    /// The Avogadro constant.
    Avogadro,
    /// The Boltzmann constant.
    Boltzmann,
    /// Standard gravity.
    StandardGravity,
}

/// An expression. Everything is in coherent SI units, pressures and temperatures absolute.
#[derive(Clone, Copy, Debug, PartialEq)]
pub enum Expr {
    /// A number in SI, and the literal it was written as (`u32::MAX` where it was not written).
    Number(f64, u32),
    /// A named constant.
    Constant(Constant),
    /// A quantity.
    Quantity(QuantityId),
    /// `-x`
    Negate(ExprId),
    /// Two operands.
    Binary(BinaryOp, ExprId, ExprId),
    /// A function of one argument; of `min` and `max` the second stands beside it.
    Call(Function, ExprId, Option<ExprId>),
    /// A function of a gas.
    Gas(GasFunction, GasId, ExprId),
    /// A property of a gas by two others, of humid air by three; the third argument repeats the second where there are two.
    State(StateFunction, GasId, [ExprId; 3]),
    /// Pressure of the standard atmosphere at an altitude (ISO 2533).
    StandardPressure(ExprId),
}

/// The arena.
#[derive(Clone, Debug, Default)]
pub struct Exprs {
    nodes: Vec<Expr>,
}

impl Exprs {
    /// Adds an expression.
    pub fn add(&mut self, expr: Expr) -> ExprId {
        self.nodes.push(expr);
        ExprId(self.nodes.len() as u32 - 1)
    }

    /// A number that was not written in the sheet.
    pub fn number(&mut self, value: f64) -> ExprId {
        self.add(Expr::Number(value, u32::MAX))
    }

    /// Two operands.
    pub fn binary(&mut self, op: BinaryOp, a: ExprId, b: ExprId) -> ExprId {
        self.add(Expr::Binary(op, a, b))
    }

    /// The expression of an id of this arena.
    #[must_use]
    pub fn get(&self, id: ExprId) -> Expr {
        self.nodes[id.0 as usize]
    }

    /// How many expressions there are.
    #[must_use]
    pub fn len(&self) -> usize {
        self.nodes.len()
    }

    /// Whether there are none.
    #[must_use]
    pub fn is_empty(&self) -> bool {
        self.nodes.is_empty()
    }

    /// The parts of an expression, left first.
    pub fn parts(&self, id: ExprId) -> impl Iterator<Item = ExprId> + use<> {
        let (a, b, c) = match self.get(id) {
            Expr::Number(..) | Expr::Constant(_) | Expr::Quantity(_) => (None, None, None),
            Expr::Negate(a) | Expr::Gas(_, _, a) | Expr::StandardPressure(a) => (Some(a), None, None),
            Expr::Binary(_, a, b) => (Some(a), Some(b), None),
            Expr::Call(_, a, b) => (Some(a), b, None),
            Expr::State(function, _, [a, b, c]) => (Some(a), Some(b), function.moisture.map(|_| c)),
        };
        a.into_iter().chain(b).chain(c)
    }

    /// The value of an expression in which no quantity stands.
    #[must_use]
    pub fn constant_value(&self, id: ExprId) -> Option<f64> {
        match self.get(id) {
            Expr::Number(value, _) => Some(value),
            Expr::Constant(constant) => Some(constant.value()),
            Expr::Negate(a) => Some(-self.constant_value(a)?),
            Expr::Binary(op, a, b) => {
                let (a, b) = (self.constant_value(a)?, self.constant_value(b)?);
                Some(match op {
                    BinaryOp::Add => a + b,
                    BinaryOp::Subtract => a - b,
                    BinaryOp::Multiply => a * b,
                    BinaryOp::Divide => a / b,
                    BinaryOp::Power => crate::units::math::pow(a, b),
                })
            }
            _ => None,
        }
    }

    /// Calls `visit` with every quantity below `id`, in the order written, as often as it stands there.
    pub fn quantities(&self, id: ExprId, visit: &mut impl FnMut(QuantityId)) {
        self.find(id, &mut |quantity| {
            visit(quantity);
            false
        });
    }

    /// Whether `quantity` stands below `id`.
    #[must_use]
    pub fn mentions(&self, id: ExprId, quantity: QuantityId) -> bool {
        self.find(id, &mut |other| other == quantity)
    }

    /// Whether `is_it` holds for a quantity below `id`; those behind the first for which it does are not looked at.
    fn find(&self, mut id: ExprId, is_it: &mut impl FnMut(QuantityId) -> bool) -> bool {
        let mut waiting = Waiting::default();
        loop {
            match self.get(id) {
                Expr::Number(..) | Expr::Constant(_) => {}
                Expr::Quantity(quantity) => {
                    if is_it(quantity) {
                        return true;
                    }
                }
                Expr::Negate(a) | Expr::Gas(_, _, a) | Expr::StandardPressure(a) | Expr::Call(_, a, None) => {
                    id = a;
                    continue;
                }
                Expr::Binary(_, a, b) | Expr::Call(_, a, Some(b)) => {
                    waiting.push(b);
                    id = a;
                    continue;
                }
                Expr::State(function, _, [a, b, c]) => {
                    if function.moisture.is_some() {
                        waiting.push(c);
                    }
                    waiting.push(b);
                    id = a;
                    continue;
                }
            }
            match waiting.pop() {
                Some(next) => id = next,
                None => return false,
            }
        }
    }
}

/// Expressions that wait to be walked: a few without memory of their own, since most expressions are small and walked often.
#[derive(Default)]
struct Waiting {
    few: [Option<ExprId>; 12],
    n_few: usize,
    more: Vec<ExprId>,
}

impl Waiting {
    fn push(&mut self, id: ExprId) {
        match self.few.get_mut(self.n_few) {
            Some(place) => {
                *place = Some(id);
                self.n_few += 1;
            }
            None => self.more.push(id),
        }
    }

    fn pop(&mut self) -> Option<ExprId> {
        self.more.pop().or_else(|| {
            self.n_few = self.n_few.checked_sub(1)?;
            self.few[self.n_few]
        })
    }
}
