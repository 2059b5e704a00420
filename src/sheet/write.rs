//! Writes an expression as a sheet would.

use crate::syntax::BinaryOp;

use super::{Expr, ExprId, GasFunction, Sheet};

/// How tightly an expression holds together.
#[derive(Clone, Copy, PartialEq, Eq, PartialOrd, Ord)]
enum Tightness {
    Sum,
    Product,
    Sign,
    Power,
    Atom,
}

/// The text of an expression, in the syntax of a sheet, with no more brackets than it needs.
#[must_use]
pub fn write_expr(sheet: &Sheet, expr: ExprId) -> String {
    let mut text = String::new();
    write(sheet, expr, &mut text);
    text
}

fn tightness(sheet: &Sheet, expr: ExprId) -> Tightness {
    match sheet.exprs.get(expr) {
        Expr::Binary(BinaryOp::Add, a, _) if is_gauge_reading(sheet, a) => Tightness::Power,
        Expr::Binary(BinaryOp::Add | BinaryOp::Subtract, ..) => Tightness::Sum,
        Expr::Binary(BinaryOp::Multiply | BinaryOp::Divide, ..) => Tightness::Product,
        Expr::Binary(BinaryOp::Power, ..) => Tightness::Power,
        Expr::Negate(_) => Tightness::Sign,
        Expr::Number(_, literal) if sheet.literals.get(literal as usize).is_some_and(|literal| !literal.unit.is_empty()) => {
            Tightness::Power
        }
        Expr::Number(value, literal) if value < 0.0 && sheet.literals.get(literal as usize).is_none() => Tightness::Sign,
        _ => Tightness::Atom,
    }
}

fn is_gauge_reading(sheet: &Sheet, expr: ExprId) -> bool {
    matches!(sheet.exprs.get(expr), Expr::Number(_, literal) if sheet.literals.get(literal as usize).is_some_and(|literal| literal.unit.ends_with(" gauge")))
}

fn bracketed(sheet: &Sheet, expr: ExprId, least: Tightness, text: &mut String) {
    if tightness(sheet, expr) < least {
        text.push('(');
        write(sheet, expr, text);
        text.push(')');
    } else {
        write(sheet, expr, text);
    }
}

fn write(sheet: &Sheet, expr: ExprId, text: &mut String) {
    match sheet.exprs.get(expr) {
        Expr::Number(value, literal) => match sheet.literals.get(literal as usize) {
            Some(shown) => {
                text.push_str(&shown.number);
                if !shown.unit.is_empty() {
                    text.push(' ');
                    text.push_str(&shown.unit);
                }
            }
            None => text.push_str(&format!("{value}")),
        },
        Expr::Constant(constant) => text.push_str(constant.word()),
        Expr::Quantity(id) => text.push_str(&sheet.quantity(id).name),
        Expr::Negate(inner) => {
            text.push('-');
            bracketed(sheet, inner, Tightness::Power, text);
        }
        // A gauge reading stands for itself and the pressure of the site.
        Expr::Binary(BinaryOp::Add, a, _) if is_gauge_reading(sheet, a) => write(sheet, a, text),
        Expr::Binary(op, a, b) => {
            let (sign, left, right) = match op {
                BinaryOp::Add => (" + ", Tightness::Sum, Tightness::Sum),
                BinaryOp::Subtract => (" - ", Tightness::Sum, Tightness::Product),
                BinaryOp::Multiply => (" * ", Tightness::Product, Tightness::Product),
                BinaryOp::Divide => (" / ", Tightness::Product, Tightness::Sign),
                BinaryOp::Power => ("^", Tightness::Atom, Tightness::Power),
            };
            bracketed(sheet, a, left, text);
            text.push_str(sign);
            bracketed(sheet, b, right, text);
        }
        Expr::Call(function, a, b) => {
            text.push_str(function.word());
            text.push('(');
            write(sheet, a, text);
            if let Some(b) = b {
                text.push_str(", ");
                write(sheet, b, text);
            }
            text.push(')');
        }
        Expr::Gas(function, gas, a) => {
            let name = &sheet.gas(gas).name;
            let function = match function {
                GasFunction::HeatCapacity => "cp",
                GasFunction::Enthalpy => "h",
                GasFunction::InternalEnergy => "u",
                GasFunction::Entropy => "s",
                GasFunction::TemperatureOfEnthalpy => "T_of_h",
                GasFunction::TemperatureOfInternalEnergy => "T_of_u",
                GasFunction::TemperatureOfEntropy => "T_of_s",
                GasFunction::SaturationPressure => "p_sat",
                GasFunction::SaturationTemperature => "T_sat",
            };
            text.push_str(&format!("{name}.{function}("));
            write(sheet, a, text);
            text.push(')');
        }
        Expr::State(function, gas, arguments) => {
            text.push_str(&format!("{}.{}(", sheet.gas(gas).name, function.of.row().field));
            for (at, (property, argument)) in function.arguments().zip(arguments).enumerate() {
                text.push_str(if at == 0 { "" } else { ", " });
                text.push_str(&format!("{} = ", property.row().field));
                write(sheet, argument, text);
            }
            text.push(')');
        }
        Expr::StandardPressure(a) => {
            text.push_str("standard_atmosphere(");
            write(sheet, a, text);
            text.push(')');
        }
    }
}
