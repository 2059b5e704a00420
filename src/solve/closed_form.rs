//! Closed forms: a relation rearranged for one of its quantities.
//!
//! Where the quantity stands once, the operations around it are undone one by one; a function that has an inverse offers
//! it. Where it stands several times but only to the first power, its terms are collected.

use crate::sheet::{Expr, ExprId, Exprs, GasFunction, Property, QuantityId, StateFunction};
use crate::syntax::{BinaryOp, Function};

/// A relation rearranged: the expressions that give the quantity, one for each branch.
#[derive(Clone, Debug, PartialEq, Eq)]
pub(super) enum ClosedForm {
    /// One expression.
    One(ExprId),
    /// Two, of which each may satisfy the relation.
    Two(ExprId, ExprId),
    /// The quantity drops out of the relation.
    DropsOut,
    /// No closed form is known.
    None,
}

/// Rearranges `left = right` for `x`; `nonnegative` says that x cannot be below zero.
pub(super) fn solve_for(exprs: &mut Exprs, left: ExprId, right: ExprId, x: QuantityId, nonnegative: bool) -> ClosedForm {
    let (in_left, in_right) = (count(exprs, left, x), count(exprs, right, x));
    match (in_left, in_right) {
        (0, 0) => ClosedForm::None,
        (1, 0) => invert(exprs, left, right, x, nonnegative),
        (0, 1) => invert(exprs, right, left, x, nonnegative),
        _ => collect(exprs, left, right, x),
    }
}

/// How often `x` stands below `id`.
fn count(exprs: &Exprs, id: ExprId, x: QuantityId) -> usize {
    let mut n = 0;
    exprs.quantities(id, &mut |other| n += usize::from(other == x));
    n
}

/// Undoes the operations around the only place of `x`.
fn invert(exprs: &mut Exprs, side: ExprId, other: ExprId, x: QuantityId, nonnegative: bool) -> ClosedForm {
    let (mut side, mut target) = (side, other);
    loop {
        match exprs.get(side) {
            Expr::Quantity(_) => return ClosedForm::One(target),
            Expr::Negate(inner) => {
                target = exprs.add(Expr::Negate(target));
                side = inner;
            }
            Expr::Binary(op, a, b) => {
                let in_a = exprs.mentions(a, x);
                let (op, left, right, next) = match (op, in_a) {
                    (BinaryOp::Add, true) => (BinaryOp::Subtract, target, b, a),
                    (BinaryOp::Add, false) => (BinaryOp::Subtract, target, a, b),
                    (BinaryOp::Subtract, true) => (BinaryOp::Add, target, b, a),
                    (BinaryOp::Subtract, false) => (BinaryOp::Subtract, a, target, b),
                    (BinaryOp::Multiply, true) => (BinaryOp::Divide, target, b, a),
                    (BinaryOp::Multiply, false) => (BinaryOp::Divide, target, a, b),
                    (BinaryOp::Divide, true) => (BinaryOp::Multiply, target, b, a),
                    (BinaryOp::Divide, false) => (BinaryOp::Divide, a, target, b),
                    (BinaryOp::Power, true) => return root(exprs, a, b, target, x, nonnegative),
                    (BinaryOp::Power, false) => {
                        let numerator = exprs.add(Expr::Call(Function::Ln, target, None));
                        let denominator = exprs.add(Expr::Call(Function::Ln, a, None));
                        (BinaryOp::Divide, numerator, denominator, b)
                    }
                };
                target = exprs.binary(op, left, right);
                side = next;
            }
            Expr::Call(function, inner, None) => {
                target = match function {
                    Function::Sqrt => {
                        let two = exprs.number(2.0);
                        exprs.binary(BinaryOp::Power, target, two)
                    }
                    Function::Cbrt => {
                        let three = exprs.number(3.0);
                        exprs.binary(BinaryOp::Power, target, three)
                    }
                    Function::Exp => exprs.add(Expr::Call(Function::Ln, target, None)),
                    Function::Ln => exprs.add(Expr::Call(Function::Exp, target, None)),
                    Function::Log10 => {
                        let ten = exprs.number(10.0);
                        exprs.binary(BinaryOp::Power, ten, target)
                    }
                    Function::Asin => exprs.add(Expr::Call(Function::Sin, target, None)),
                    Function::Acos => exprs.add(Expr::Call(Function::Cos, target, None)),
                    Function::Atan => exprs.add(Expr::Call(Function::Tan, target, None)),
                    Function::Abs => return both_signs(exprs, inner, target, x, nonnegative),
                    // Sine, cosine and tangent come round again and have no one inverse.
                    Function::Sin | Function::Cos | Function::Tan | Function::Min | Function::Max => return ClosedForm::None,
                };
                side = inner;
            }
            Expr::Gas(function, gas, inner) => {
                let inverse = match function {
                    GasFunction::Enthalpy => GasFunction::TemperatureOfEnthalpy,
                    GasFunction::InternalEnergy => GasFunction::TemperatureOfInternalEnergy,
                    GasFunction::Entropy => GasFunction::TemperatureOfEntropy,
                    GasFunction::TemperatureOfEnthalpy => GasFunction::Enthalpy,
                    GasFunction::TemperatureOfInternalEnergy => GasFunction::InternalEnergy,
                    GasFunction::TemperatureOfEntropy => GasFunction::Entropy,
                    GasFunction::SaturationPressure => GasFunction::SaturationTemperature,
                    GasFunction::SaturationTemperature => GasFunction::SaturationPressure,
                    GasFunction::HeatCapacity => return ClosedForm::None,
                };
                target = exprs.add(Expr::Gas(inverse, gas, target));
                side = inner;
            }
            Expr::State(function, gas, arguments) => {
                let place = (0..3).find(|place| exprs.mentions(arguments[*place], x));
                let Some((inverse, place)) = place.and_then(|place| Some((inverse_of(function, place)?, place))) else {
                    return ClosedForm::None;
                };
                side = arguments[place];
                let mut arguments = arguments;
                arguments[place] = target;
                if inverse.moisture.is_none() && place < 2 {
                    arguments[2] = arguments[1];
                }
                target = exprs.add(Expr::State(inverse, gas, arguments));
            }
            Expr::Call(_, _, Some(_)) | Expr::StandardPressure(_) | Expr::Number(..) | Expr::Constant(_) => return ClosedForm::None,
        }
    }
}

/// The function that finds the argument at `place` from the value of `function`: any two of the properties that can fix a
/// state do, and of humid air each measure of its moisture follows from the others.
fn inverse_of(function: StateFunction, place: usize) -> Option<StateFunction> {
    let StateFunction { of, x, y, moisture } = function;
    match (moisture, place) {
        (Some(moisture), 2) => of.is_moisture().then_some(StateFunction { of: moisture, moisture: Some(of), ..function }),
        (Some(_), _) => None,
        (None, 1) if of.is_moisture() => Some(StateFunction { of: y, y: of, ..function }),
        (None, 0) if of.is_moisture() => Some(StateFunction { of: x, x: of, ..function }),
        (None, 0) => of.fixes_a_state().then_some(StateFunction { of: x, x: of, ..function }),
        (None, _) => of.fixes_a_state().then_some(StateFunction { of: y, y: of, ..function }),
    }
}

/// The temperature and the pressure of a state from two relations, each of which gives another property by both of them.
pub(super) fn solve_for_state(exprs: &mut Exprs, relations: [(ExprId, ExprId); 2]) -> Option<[ExprId; 2]> {
    let mut given = Vec::with_capacity(2);
    for (left, right) in relations {
        let Expr::State(function, gas, _) = exprs.get(right) else { return None };
        let is_law = (function.x, function.y) == (Property::T, Property::P) && function.moisture.is_none();
        if !is_law || !function.of.fixes_a_state() {
            return None;
        }
        given.push((function.of, gas, left));
    }
    let [(x, gas, a), (y, other, b)] = given[..] else { return None };
    (gas == other && x != y)
        .then(|| [Property::T, Property::P].map(|of| exprs.add(Expr::State(StateFunction { of, x, y, moisture: None }, gas, [a, b, b]))))
}

/// `base^exponent = target`, x in the base.
fn root(exprs: &mut Exprs, base: ExprId, exponent: ExprId, target: ExprId, x: QuantityId, nonnegative: bool) -> ClosedForm {
    let whole = exprs.constant_value(exponent);
    let positive = match whole {
        Some(0.0) => return ClosedForm::None,
        Some(2.0) => exprs.add(Expr::Call(Function::Sqrt, target, None)),
        Some(3.0) => exprs.add(Expr::Call(Function::Cbrt, target, None)),
        Some(n) => {
            let inverse = exprs.number(1.0 / n);
            exprs.binary(BinaryOp::Power, target, inverse)
        }
        None => {
            let one = exprs.number(1.0);
            let inverse = exprs.binary(BinaryOp::Divide, one, exponent);
            exprs.binary(BinaryOp::Power, target, inverse)
        }
    };
    let bare = matches!(exprs.get(base), Expr::Quantity(_)) && nonnegative;
    match whole {
        // A whole even power hides the sign of its base.
        Some(n) if n % 2.0 == 0.0 && !bare => both_signs(exprs, base, positive, x, nonnegative),
        // Another odd power than the third of something that may be negative has no closed form here.
        Some(n) if n == n.round() && n % 2.0 != 0.0 && n != 3.0 && n != 1.0 && !bare => ClosedForm::None,
        _ => invert(exprs, base, positive, x, nonnegative),
    }
}

/// `inner = target` or `inner = -target`.
fn both_signs(exprs: &mut Exprs, inner: ExprId, target: ExprId, x: QuantityId, nonnegative: bool) -> ClosedForm {
    if matches!(exprs.get(inner), Expr::Quantity(_)) && nonnegative {
        return ClosedForm::One(target);
    }
    let negative = exprs.add(Expr::Negate(target));
    match (invert(exprs, inner, target, x, nonnegative), invert(exprs, inner, negative, x, nonnegative)) {
        (ClosedForm::One(a), ClosedForm::One(b)) => ClosedForm::Two(a, b),
        _ => ClosedForm::None,
    }
}

/// An expression that is `free + slope x`; `None` stands for zero.
#[derive(Clone, Copy)]
struct Linear {
    free: Option<ExprId>,
    slope: Option<ExprId>,
}

/// Collects the terms of `x` where both sides are linear in it.
fn collect(exprs: &mut Exprs, left: ExprId, right: ExprId, x: QuantityId) -> ClosedForm {
    let (Some(left), Some(right)) = (linear(exprs, left, x), linear(exprs, right, x)) else { return ClosedForm::None };
    let numerator = difference(exprs, right.free, left.free);
    let slope = difference(exprs, left.slope, right.slope);
    match (slope, numerator) {
        (None, _) => ClosedForm::DropsOut,
        (Some(slope), _) if exprs.constant_value(slope) == Some(0.0) => ClosedForm::DropsOut,
        (Some(slope), Some(numerator)) => ClosedForm::One(exprs.binary(BinaryOp::Divide, numerator, slope)),
        (Some(_), None) => ClosedForm::One(exprs.number(0.0)),
    }
}

fn linear(exprs: &mut Exprs, id: ExprId, x: QuantityId) -> Option<Linear> {
    if !exprs.mentions(id, x) {
        return Some(Linear { free: Some(id), slope: None });
    }
    match exprs.get(id) {
        Expr::Quantity(_) => Some(Linear { free: None, slope: Some(exprs.number(1.0)) }),
        Expr::Negate(a) => {
            let a = linear(exprs, a, x)?;
            let mut negative = |part: Option<ExprId>| part.map(|part| exprs.add(Expr::Negate(part)));
            Some(Linear { free: negative(a.free), slope: negative(a.slope) })
        }
        Expr::Binary(op @ (BinaryOp::Add | BinaryOp::Subtract), a, b) => {
            let (a, b) = (linear(exprs, a, x)?, linear(exprs, b, x)?);
            if op == BinaryOp::Add {
                Some(Linear { free: sum(exprs, a.free, b.free), slope: sum(exprs, a.slope, b.slope) })
            } else {
                Some(Linear { free: difference(exprs, a.free, b.free), slope: difference(exprs, a.slope, b.slope) })
            }
        }
        Expr::Binary(BinaryOp::Multiply, a, b) => {
            let (factor, inner) = match (exprs.mentions(a, x), exprs.mentions(b, x)) {
                (false, true) => (a, b),
                (true, false) => (b, a),
                _ => return None,
            };
            let inner = linear(exprs, inner, x)?;
            let mut times = |part: Option<ExprId>| {
                part.map(|part| if is_one(exprs, part) { factor } else { exprs.binary(BinaryOp::Multiply, factor, part) })
            };
            Some(Linear { free: times(inner.free), slope: times(inner.slope) })
        }
        Expr::Binary(BinaryOp::Divide, a, b) if !exprs.mentions(b, x) => {
            let inner = linear(exprs, a, x)?;
            let mut over = |part: Option<ExprId>| part.map(|part| exprs.binary(BinaryOp::Divide, part, b));
            Some(Linear { free: over(inner.free), slope: over(inner.slope) })
        }
        _ => None,
    }
}

fn is_one(exprs: &Exprs, id: ExprId) -> bool {
    matches!(exprs.get(id), Expr::Number(value, u32::MAX) if value == 1.0)
}

fn sum(exprs: &mut Exprs, a: Option<ExprId>, b: Option<ExprId>) -> Option<ExprId> {
    match (a, b) {
        (Some(a), Some(b)) => Some(exprs.binary(BinaryOp::Add, a, b)),
        (one, None) | (None, one) => one,
    }
}

fn difference(exprs: &mut Exprs, a: Option<ExprId>, b: Option<ExprId>) -> Option<ExprId> {
    match (a, b) {
        (Some(a), Some(b)) => Some(exprs.binary(BinaryOp::Subtract, a, b)),
        (a, None) => a,
        (None, Some(b)) => Some(exprs.add(Expr::Negate(b))),
    }
}
