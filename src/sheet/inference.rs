//! Finds the dimension of every quantity whose line gives no unit, from the relations that use it.
//!
//! A dimension is a vector of exponents, and what a relation says of dimensions is linear in them: two terms of a sum have
//! the same, a product has their sum, an argument of a function has none. Each such statement is an equation between the
//! unknown dimensions; those with one unknown are solved as they come, the rest by elimination. What no relation forces is
//! a pure number.

use std::collections::VecDeque;

use crate::syntax::{BinaryOp, Function};
use crate::units::{Dimension, Rational};

use super::reader::Reader;
use super::{Expr, ExprId, GasFunction, Kind, QuantityId, RelationOrigin, Sheet};

/// Equations that are left for elimination at the most: it costs their square.
const MOST_COUPLED: usize = 2000;

/// A known dimension times unknown ones, each to a power.
#[derive(Clone, Debug, Default)]
pub(super) struct Symbolic {
    pub(super) base: Dimension,
    pub(super) unknown: Vec<(QuantityId, Rational)>,
}

impl Symbolic {
    pub(super) fn times(mut self, other: &Self, power: Rational) -> Option<Self> {
        self.base = self.base.times(other.base.power(power)?)?;
        for (id, exponent) in &other.unknown {
            let exponent = exponent.checked_mul(power)?;
            match self.unknown.iter_mut().find(|(known, _)| known == id) {
                Some((_, sum)) => *sum = sum.checked_add(exponent)?,
                None => self.unknown.push((*id, exponent)),
            }
        }
        self.unknown.retain(|(_, exponent)| !exponent.is_zero());
        Some(self)
    }

    fn to_the(&self, power: Rational) -> Option<Self> {
        Self::default().times(self, power)
    }

    /// Puts `value` in for `id`.
    fn substituted(&self, id: QuantityId, value: &Self) -> Option<Self> {
        let Some(at) = self.unknown.iter().position(|(known, _)| *known == id) else { return Some(self.clone()) };
        let mut rest = self.clone();
        let (_, power) = rest.unknown.remove(at);
        rest.times(value, power)
    }
}

/// What relations say of unknown dimensions: each of these is a pure number.
pub(super) struct Equations<'a> {
    pub(super) sheet: &'a Sheet,
    pub(super) literals: &'a [super::reader::LiteralInfo],
    pub(super) undetermined: &'a [bool],
    /// A written number whose dimension is asked for too; it counts as the quantity behind the last one.
    pub(super) free_literal: Option<u32>,
    pub(super) pure: Vec<Symbolic>,
    /// How many statements do not hold whatever the unknown dimensions are.
    pub(super) contradictions: usize,
}

impl Equations<'_> {
    pub(super) fn equal(&mut self, a: Option<&Symbolic>, b: Option<&Symbolic>) {
        if let (Some(a), Some(b)) = (a, b)
            && let Some(ratio) = a.clone().times(b, Rational::whole(-1))
        {
            if !ratio.unknown.is_empty() {
                self.pure.push(ratio);
            } else if !ratio.base.is_none() {
                self.contradictions += 1;
            }
        }
    }

    /// The dimension of an expression; `None` where it cannot be told.
    pub(super) fn walk(&mut self, id: ExprId) -> Option<Symbolic> {
        let known = |base: Dimension| Some(Symbolic { base, unknown: Vec::new() });
        let unknown = |id: QuantityId| Some(Symbolic { base: Dimension::NONE, unknown: vec![(id, Rational::ONE)] });
        match self.sheet.exprs.get(id) {
            Expr::Number(_, literal) if self.free_literal == Some(literal) => unknown(QuantityId(self.undetermined.len() as u32)),
            Expr::Number(_, literal) => known(self.literals.get(literal as usize).map_or(Dimension::NONE, |info| info.dimension)),
            Expr::Constant(constant) => known(constant.dimension()),
            Expr::Quantity(quantity) if self.undetermined[quantity.0 as usize] => unknown(quantity),
            Expr::Quantity(quantity) => known(self.sheet.quantity(quantity).dimension),
            Expr::Negate(inner) => self.walk(inner),
            Expr::Binary(op, a, b) => {
                let (left, right) = (self.walk(a), self.walk(b));
                match op {
                    BinaryOp::Add | BinaryOp::Subtract => {
                        self.equal(left.as_ref(), right.as_ref());
                        left.or(right)
                    }
                    BinaryOp::Multiply => left?.times(&right?, Rational::ONE),
                    BinaryOp::Divide => left?.times(&right?, Rational::whole(-1)),
                    BinaryOp::Power => {
                        self.equal(right.as_ref(), Some(&Symbolic::default()));
                        match self.sheet.exprs.constant_value(b).and_then(Rational::approximate) {
                            Some(power) => left?.to_the(power),
                            None => {
                                self.equal(left.as_ref(), Some(&Symbolic::default()));
                                known(Dimension::NONE)
                            }
                        }
                    }
                }
            }
            Expr::Call(function, a, b) => {
                let argument = self.walk(a);
                let second = b.map(|b| self.walk(b));
                match function {
                    Function::Sqrt => argument?.to_the(Rational::new(1, 2)?),
                    Function::Cbrt => argument?.to_the(Rational::new(1, 3)?),
                    Function::Abs => argument,
                    Function::Min | Function::Max => {
                        let second = second.flatten();
                        self.equal(argument.as_ref(), second.as_ref());
                        argument.or(second)
                    }
                    _ => {
                        self.equal(argument.as_ref(), Some(&Symbolic::default()));
                        known(Dimension::NONE)
                    }
                }
            }
            Expr::Gas(function @ (GasFunction::SaturationPressure | GasFunction::SaturationTemperature), _, a) => {
                let argument = self.walk(a);
                let (takes, gives) = if function == GasFunction::SaturationPressure {
                    (Dimension::TEMPERATURE, Dimension::PRESSURE)
                } else {
                    (Dimension::PRESSURE, Dimension::TEMPERATURE)
                };
                self.equal(argument.as_ref(), known(takes).as_ref());
                known(gives)
            }
            Expr::Gas(..) | Expr::State(..) | Expr::StandardPressure(_) => None,
        }
    }
}

impl Reader<'_> {
    /// Settles [`super::Quantity::dimension`] of all that are undetermined. What is poisoned and stays undetermined keeps
    /// its mark.
    pub(super) fn infer_dimensions(&mut self) {
        if !self.undetermined.contains(&true) {
            return;
        }
        let mut equations = Equations {
            sheet: &self.sheet,
            literals: &self.literals,
            undetermined: &self.undetermined,
            free_literal: None,
            pure: Vec::new(),
            contradictions: 0,
        };
        for relation in &self.sheet.relations {
            if matches!(relation.origin, RelationOrigin::Law(..) | RelationOrigin::Atmosphere) {
                continue;
            }
            let (left, right) = (equations.walk(relation.left), equations.walk(relation.right));
            equations.equal(left.as_ref(), right.as_ref());
        }
        let found = solve(equations.pure, self.undetermined.len());
        for (at, dimension) in found.into_iter().enumerate() {
            if !self.undetermined[at] {
                continue;
            }
            let Some(dimension) = dimension.or((!self.poisoned[at]).then_some(Dimension::NONE)) else { continue };
            self.undetermined[at] = false;
            self.inferred.push(QuantityId(at as u32));
            let quantity = &mut self.sheet.quantities[at];
            quantity.dimension = dimension;
            quantity.kind =
                if dimension == Dimension::PRESSURE || dimension == Dimension::TEMPERATURE { Kind::Either } else { Kind::Plain };
        }
    }
}

/// The unknown dimensions of `equations`, by quantity.
pub(super) fn solve(mut equations: Vec<Symbolic>, n_quantities: usize) -> Vec<Option<Dimension>> {
    let mut found: Vec<Option<Dimension>> = vec![None; n_quantities];
    let mut uses: Vec<Vec<u32>> = vec![Vec::new(); n_quantities];
    for (at, equation) in equations.iter().enumerate() {
        for (id, _) in &equation.unknown {
            uses[id.0 as usize].push(at as u32);
        }
    }
    let mut open: VecDeque<u32> = (0..equations.len() as u32).collect();
    while let Some(at) = open.pop_front() {
        let equation = &mut equations[at as usize];
        let mut rest = Some(Symbolic { base: equation.base, unknown: Vec::new() });
        for (id, power) in &equation.unknown {
            let known = found[id.0 as usize].map(|base| Symbolic { base, unknown: Vec::new() });
            let factor = known.unwrap_or_else(|| Symbolic { base: Dimension::NONE, unknown: vec![(*id, Rational::ONE)] });
            rest = rest.and_then(|rest| rest.times(&factor, *power));
        }
        let Some(rest) = rest else { continue };
        *equation = rest;
        if let [(id, power)] = equation.unknown[..]
            && let Some(dimension) = Rational::new(-power.den(), power.num()).and_then(|power| equation.base.power(power))
        {
            found[id.0 as usize] = Some(dimension);
            equation.unknown.clear();
            open.extend(&uses[id.0 as usize]);
        }
    }
    equations.retain(|equation| equation.unknown.len() > 1);
    if equations.len() > MOST_COUPLED {
        return found;
    }
    let mut definitions: Vec<(QuantityId, Symbolic)> = Vec::new();
    while let Some(equation) = equations.pop() {
        let Some(&(id, power)) = equation.unknown.first() else { continue };
        let mut others = equation.clone();
        others.unknown.remove(0);
        let Some(value) = Rational::new(-power.den(), power.num()).and_then(|power| others.to_the(power)) else { continue };
        for other in &mut equations {
            if let Some(reduced) = other.substituted(id, &value) {
                *other = reduced;
            }
        }
        definitions.push((id, value));
    }
    for (id, value) in definitions.into_iter().rev() {
        let mut dimension = Some(value.base);
        for (other, power) in &value.unknown {
            let base = found[other.0 as usize].unwrap_or(Dimension::NONE);
            dimension = dimension.and_then(|dimension| dimension.times(base.power(*power)?));
        }
        found[id.0 as usize] = dimension;
    }
    found
}
