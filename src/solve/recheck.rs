//! The independent re-check: walks every relation as written, with the values found. It shares no code with the tape but the
//! elementary functions and the gas kernels.

use crate::gas;
use crate::sheet::{Expr, ExprId, QuantityId, Sheet};
use crate::syntax::{BinaryOp, Function};
use crate::units::math;

use super::{physics, state_function, tape};

/// A value, and the size of its terms: what it would be if nothing in it cancelled.
#[derive(Clone, Copy, Debug)]
pub(super) struct Walked {
    pub(super) value: f64,
    pub(super) size: f64,
}

/// Walks an expression with the values of quantities.
pub(super) fn walk(sheet: &Sheet, values: &[f64], expr: ExprId) -> Walked {
    let plain = |value: f64| Walked { value, size: value.abs() };
    match sheet.exprs.get(expr) {
        Expr::Number(value, _) => plain(value),
        Expr::Constant(constant) => plain(constant.value()),
        Expr::Quantity(id) => {
            let value = values[id.0 as usize];
            Walked { value, size: value.abs().max(1e-3 * size_of(sheet, id)) }
        }
        Expr::Negate(a) => {
            let a = walk(sheet, values, a);
            Walked { value: -a.value, size: a.size }
        }
        Expr::Binary(op, a, b) => {
            let (a, b) = (walk(sheet, values, a), walk(sheet, values, b));
            match op {
                BinaryOp::Add => Walked { value: a.value + b.value, size: a.size + b.size },
                BinaryOp::Subtract => Walked { value: a.value - b.value, size: a.size + b.size },
                BinaryOp::Multiply => Walked { value: a.value * b.value, size: a.size * b.size },
                BinaryOp::Divide => Walked { value: a.value / b.value, size: a.size / b.value.abs() },
                BinaryOp::Power => {
                    let value = math::pow(a.value, b.value);
                    Walked { value, size: if b.value > 0.0 { value.abs().max(math::pow(a.size, b.value)) } else { value.abs() } }
                }
            }
        }
        Expr::Call(Function::Min, a, Some(b)) => {
            let (a, b) = (walk(sheet, values, a).value, walk(sheet, values, b).value);
            plain(if a <= b { a } else { b })
        }
        Expr::Call(Function::Max, a, Some(b)) => {
            let (a, b) = (walk(sheet, values, a).value, walk(sheet, values, b).value);
            plain(if a >= b { a } else { b })
        }
        Expr::Call(function, a, _) => plain(tape::call(function, walk(sheet, values, a).value)),
        Expr::Gas(function, id, a) => plain(tape::gas_value(&sheet.gas(id).gas, function, walk(sheet, values, a).value)),
        Expr::State(function, id, arguments) => {
            let at = arguments.map(|argument| walk(sheet, values, argument).value);
            plain(state_function::value(sheet.gas(id), function, at).unwrap_or(f64::NAN))
        }
        Expr::StandardPressure(a) => plain(gas::standard_pressure_pa(walk(sheet, values, a).value)),
    }
}

/// The size below which a quantity is not taken for small.
fn size_of(sheet: &Sheet, id: QuantityId) -> f64 {
    let quantity = sheet.quantity(id);
    if quantity.is_known() { 0.0 } else { physics::usual_size(quantity) }
}

/// The residual of a relation against the size of its terms.
pub(super) fn residual(sheet: &Sheet, values: &[f64], relation: usize) -> f64 {
    let relation = &sheet.relations[relation];
    let (left, right) = (walk(sheet, values, relation.left), walk(sheet, values, relation.right));
    let difference = (left.value - right.value).abs();
    if difference == 0.0 { 0.0 } else { difference / (left.size + right.size) }
}
