//! The formula: one tree from which MathML and LaTeX are written.

use crate::sheet::{Condition, Constant, Expr, ExprId, GasFunction, QuantityId, Relation};
use crate::syntax::{BinaryOp, Comparison, Function};
use crate::units::constants::STANDARD_STATE_PRESSURE;
use crate::units::{Rational, write_figures};

use super::symbol::{Subscript, Symbol};
use crate::report::draft::Draft;
use crate::report::written::{Written, without_end_zeros};

/// A formula.
#[derive(Clone, Debug, PartialEq, Eq)]
pub(in crate::report) enum Formula {
    /// A symbol.
    Symbol(Symbol),
    /// A number, with its unit.
    Value(Written),
    /// Terms, each with whether it is taken off.
    Sum(Vec<(bool, Formula)>),
    /// Factors.
    Product(Vec<Formula>),
    /// One over the other.
    Fraction(Box<Formula>, Box<Formula>),
    /// A power.
    Power(Box<Formula>, Box<Formula>),
    /// The square (2) or cube (3) root.
    Root(Box<Formula>, u8),
    /// A function of the language, by its word.
    Function(&'static str, Vec<Formula>),
    /// A function that has a symbol: the enthalpy of a gas at a temperature.
    Application(Symbol, Vec<Formula>),
    /// The size without sign.
    Magnitude(Box<Formula>),
    /// Formulas with a sign between each two: `=`, `≈`, `≥`.
    Chain(Box<Formula>, Vec<(&'static str, Formula)>),
    /// Conditions with a word between or before them.
    Words(&'static str, Vec<Formula>),
    /// A left side whose right side stands elsewhere: `m =`.
    Opening(Option<Box<Formula>>, &'static str),
}

/// Figures with which a constant of nature is put into a formula.
const FIGURES_OF_A_CONSTANT: u32 = 6;

/// What stands for a quantity.
#[derive(Clone, Copy, Debug, PartialEq, Eq)]
pub(in crate::report) enum Put {
    /// Its symbol.
    Symbols,
    /// Its value.
    Values,
}

impl Draft<'_> {
    /// The symbol of a quantity.
    pub(in crate::report) fn symbol(&self, id: QuantityId) -> Formula {
        Formula::Symbol(Symbol::of_name(&self.input.quantity(id).name))
    }

    /// A relation as the sheet has it.
    pub(in crate::report) fn relation(&self, relation: &Relation) -> Formula {
        Formula::Chain(Box::new(self.formula(relation.left, Put::Symbols)), vec![("=", self.formula(relation.right, Put::Symbols))])
    }

    /// A condition as the sheet has it.
    pub(in crate::report) fn condition(&self, condition: &Condition) -> Formula {
        let both = |a: &Condition, b: &Condition| vec![self.condition(a), self.condition(b)];
        match condition {
            Condition::Compare { left, comparison, right, .. } => {
                let sign = match comparison {
                    Comparison::Less => "<",
                    Comparison::LessOrEqual => "≤",
                    Comparison::Greater => ">",
                    Comparison::GreaterOrEqual => "≥",
                };
                Formula::Chain(Box::new(self.formula(*left, Put::Symbols)), vec![(sign, self.formula(*right, Put::Symbols))])
            }
            Condition::And(a, b) => Formula::Words("and", both(a, b)),
            Condition::Or(a, b) => Formula::Words("or", both(a, b)),
            Condition::Not(inner) => Formula::Words("not", vec![self.condition(inner)]),
        }
    }

    /// The formula of an expression.
    pub(in crate::report) fn formula(&self, expr: ExprId, put: Put) -> Formula {
        let exprs = &self.input.sheet.exprs;
        match exprs.get(expr) {
            Expr::Number(value, literal) => self.number(value, literal, put),
            Expr::Constant(constant) => match put {
                Put::Values if constant != Constant::Pi => {
                    let number = without_end_zeros(&write_figures(constant.value(), FIGURES_OF_A_CONSTANT));
                    Formula::Value(Written { number, unit: constant.dimension().si_unit() })
                }
                _ => Formula::constant(constant),
            },
            Expr::Quantity(id) => match put {
                Put::Symbols => self.symbol(id),
                Put::Values => self.put_in(id).map_or_else(|| self.symbol(id), Formula::Value),
            },
            Expr::Negate(a) => Formula::Sum(vec![(true, self.formula(a, put))]),
            Expr::Binary(op, a, b) => self.binary(op, a, b, put),
            Expr::Call(function, a, b) => {
                let first = self.formula(a, put);
                match (function, b) {
                    (Function::Sqrt, _) => Formula::Root(Box::new(first), 2),
                    (Function::Cbrt, _) => Formula::Root(Box::new(first), 3),
                    (Function::Abs, _) => Formula::Magnitude(Box::new(first)),
                    (other, None) => Formula::Function(other.word(), vec![first]),
                    (other, Some(b)) => Formula::Function(other.word(), vec![first, self.formula(b, put)]),
                }
            }
            Expr::Gas(function, gas, a) => {
                Formula::Application(gas_function(function, &self.input.sheet.gas(gas).name), vec![self.formula(a, put)])
            }
            Expr::State(function, gas, arguments) => {
                // As a property of a state reads, with the name of the gas in place of that of the state.
                let symbol = Symbol::of_name(&format!("{}.{}", self.input.sheet.gas(gas).name, function.of.row().field));
                let arguments = function.arguments().zip(arguments).map(|(_, argument)| self.formula(argument, put)).collect();
                Formula::Application(symbol, arguments)
            }
            Expr::StandardPressure(a) => {
                let below = Subscript { text: "ISO 2533".to_owned(), italic: false };
                let symbol = Symbol { delta: false, base: "p".to_owned(), subscripts: vec![below] };
                Formula::Application(symbol, vec![self.formula(a, put)])
            }
        }
    }

    fn number(&self, value: f64, literal: u32, put: Put) -> Formula {
        let Some(shown) = self.input.sheet.literals.get(literal as usize) else { return unwritten(value) };
        let written = Written { number: shown.number.clone(), unit: shown.unit.clone() };
        // In a formula with numbers put in, every temperature counts from absolute zero.
        if put == Put::Values && matches!(written.unit.as_str(), "degC" | "degF") {
            return Formula::Value(Written { number: without_end_zeros(&crate::units::write_to_place(value, -2)), unit: "K".to_owned() });
        }
        Formula::Value(written)
    }

    /// The literal of `7.5 bar gauge`, which an expression holds as the reading plus the pressure of the site.
    fn gauge_literal(&self, a: ExprId, b: ExprId) -> Option<Formula> {
        let site = self.input.sheet.site_pressure?;
        let (Expr::Number(_, literal), Expr::Quantity(other)) = (self.input.sheet.exprs.get(a), self.input.sheet.exprs.get(b)) else {
            return None;
        };
        let shown = self.input.sheet.literals.get(literal as usize).filter(|shown| other == site && shown.unit.ends_with(" gauge"))?;
        Some(Formula::Value(Written { number: shown.number.clone(), unit: shown.unit.clone() }))
    }

    fn binary(&self, op: BinaryOp, a: ExprId, b: ExprId, put: Put) -> Formula {
        if op == BinaryOp::Add
            && let Some(literal) = self.gauge_literal(a, b)
        {
            return literal;
        }
        let (left, right) = (self.formula(a, put), self.formula(b, put));
        match op {
            BinaryOp::Add | BinaryOp::Subtract => sum(left, op == BinaryOp::Subtract, right),
            BinaryOp::Multiply => product(left, right),
            BinaryOp::Divide => quotient(left, right),
            BinaryOp::Power => power(left, right, self.exponent(b)),
        }
    }

    /// The exponent where it is a plain number.
    fn exponent(&self, expr: ExprId) -> Option<f64> {
        match self.input.sheet.exprs.get(expr) {
            Expr::Number(value, _) => Some(value),
            _ => None,
        }
    }
}

fn sum(left: Formula, minus: bool, right: Formula) -> Formula {
    let mut terms = match left {
        Formula::Sum(terms) => terms,
        other => vec![(false, other)],
    };
    match right {
        // `a + (b - c)` reads the same without brackets; a term that begins with a sign keeps them.
        Formula::Sum(more) if !minus && more.first().is_some_and(|(taken_off, _)| !taken_off) => terms.extend(more),
        other => terms.push((minus, other)),
    }
    Formula::Sum(terms)
}

/// A formula without the minus sign before the whole of it, and whether it had one.
fn without_sign(formula: Formula) -> (bool, Formula) {
    match formula {
        Formula::Sum(mut terms) if terms.len() == 1 && terms[0].0 => (true, terms.remove(0).1),
        Formula::Value(Written { number, unit }) if unit.is_empty() && number.starts_with(['-', '−']) => {
            (true, Formula::Value(Written { number: number.trim_start_matches(['-', '−']).to_owned(), unit }))
        }
        other => (false, other),
    }
}

fn product(left: Formula, right: Formula) -> Formula {
    // `-2 * x` is read as `-(2 * x)`, which is the same and needs no brackets.
    let (minus, left) = without_sign(left);
    if minus {
        return Formula::Sum(vec![(true, product(left, right))]);
    }
    let mut factors = match left {
        Formula::Product(factors) => factors,
        other => vec![other],
    };
    match right {
        Formula::Product(more) => factors.extend(more),
        other => factors.push(other),
    }
    Formula::Product(factors)
}

fn quotient(left: Formula, right: Formula) -> Formula {
    let (minus, left) = without_sign(left);
    if minus {
        return Formula::Sum(vec![(true, quotient(left, right))]);
    }
    match left {
        // `a / b / c` is one fraction.
        Formula::Fraction(above, below) => Formula::Fraction(above, Box::new(product(*below, right))),
        other => Formula::Fraction(Box::new(other), Box::new(right)),
    }
}

fn power(base: Formula, exponent: Formula, value: Option<f64>) -> Formula {
    match value {
        Some(0.5) => Formula::Root(Box::new(base), 2),
        Some(value) if value == 1.0 / 3.0 => Formula::Root(Box::new(base), 3),
        _ => Formula::Power(Box::new(base), Box::new(exponent)),
    }
}

/// A number that no sheet wrote: it comes from a law or from rearranging.
fn unwritten(value: f64) -> Formula {
    if value == STANDARD_STATE_PRESSURE {
        return Formula::Value(Written { number: "100".to_owned(), unit: "kPa".to_owned() });
    }
    let plain = |number: String| Formula::Value(Written { number, unit: String::new() });
    if value < 0.0 {
        return Formula::Sum(vec![(true, unwritten(-value))]);
    }
    match Rational::approximate(value) {
        Some(ratio) if ratio.den() > 1 && ratio.den() != 2 && ratio.den() != 4 && ratio.den() != 5 => {
            Formula::Fraction(Box::new(plain(ratio.num().to_string())), Box::new(plain(ratio.den().to_string())))
        }
        _ => plain(without_end_zeros(&write_figures(value, 15))),
    }
}

fn gas_function(function: GasFunction, gas: &str) -> Symbol {
    let (base, below) = match function {
        GasFunction::HeatCapacity => ("c", Some("p")),
        GasFunction::TemperatureOfEnthalpy => ("T", Some("h")),
        GasFunction::TemperatureOfEntropy => ("T", Some("s")),
        GasFunction::TemperatureOfInternalEnergy => ("T", Some("u")),
        GasFunction::Enthalpy => ("h", None),
        GasFunction::Entropy => ("s", None),
        GasFunction::InternalEnergy => ("u", None),
        GasFunction::SaturationPressure => ("p", Some("sat")),
        GasFunction::SaturationTemperature => ("T", Some("sat")),
    };
    // A letter is the symbol of a quantity, a word is none.
    let own = below.map(|text| Subscript { text: text.to_owned(), italic: text.len() == 1 });
    let gas = Subscript { text: gas.replace('_', " "), italic: false };
    Symbol { delta: false, base: base.to_owned(), subscripts: own.into_iter().chain([gas]).collect() }
}

/// How tightly a formula holds together, loosest first.
#[derive(Clone, Copy, Debug, PartialEq, Eq, PartialOrd, Ord)]
pub(in crate::report) enum Hold {
    /// Compared or joined by words.
    Chain,
    /// Terms.
    Sum,
    /// Factors, fractions, a number with a unit.
    Product,
    /// A power.
    Power,
    /// Cannot be torn apart.
    Atom,
}

impl Formula {
    /// The symbol of a constant.
    pub(in crate::report) fn constant(constant: Constant) -> Self {
        let (base, below) = match constant {
            Constant::Pi => ("π", None),
            Constant::MolarGasConstant => ("R", None),
            Constant::Avogadro => ("N", Some("A")),
            Constant::Boltzmann => ("k", Some("B")),
            Constant::StandardGravity => ("g", Some("n")),
        };
        let subscripts = below.map(|text| Subscript { text: text.to_owned(), italic: false }).into_iter().collect();
        Self::Symbol(Symbol { delta: false, base: base.to_owned(), subscripts })
    }

    /// How tightly it holds together.
    pub(in crate::report) fn hold(&self) -> Hold {
        match self {
            Self::Chain(..) | Self::Words(..) | Self::Opening(..) => Hold::Chain,
            Self::Sum(_) => Hold::Sum,
            Self::Value(written) if written.number.starts_with(['-', '−']) => Hold::Sum,
            Self::Value(written) if !written.unit.is_empty() || written.number.contains('e') => Hold::Product,
            Self::Product(_) | Self::Fraction(..) => Hold::Product,
            Self::Function(..) | Self::Application(..) => Hold::Product,
            Self::Power(..) => Hold::Power,
            Self::Symbol(_) | Self::Value(_) | Self::Root(..) | Self::Magnitude(_) => Hold::Atom,
        }
    }

    /// Whether a multiplication sign stands between two factors; else a thin space does. A number behind a factor needs one,
    /// and so does anything behind a unit, which it would seem to belong to.
    pub(in crate::report) fn needs_cross(left: &Self, right: &Self) -> bool {
        right.begins_with_number() || left.has_unit()
    }

    fn begins_with_number(&self) -> bool {
        match self {
            Self::Value(_) => true,
            Self::Power(base, _) => base.begins_with_number(),
            Self::Product(factors) => factors.first().is_some_and(Self::begins_with_number),
            _ => false,
        }
    }

    /// Whether a number with a unit stands in it.
    fn has_unit(&self) -> bool {
        match self {
            Self::Value(written) => !written.unit.is_empty(),
            Self::Fraction(above, below) => above.has_unit() || below.has_unit(),
            Self::Product(factors) => factors.iter().any(Self::has_unit),
            Self::Power(base, _) | Self::Root(base, _) => base.has_unit(),
            _ => false,
        }
    }

    /// Whether it is higher than a line, so that brackets around it have to grow.
    pub(in crate::report) fn is_tall(&self) -> bool {
        match self {
            Self::Symbol(_) | Self::Value(_) => false,
            Self::Fraction(..) | Self::Root(..) | Self::Power(..) => true,
            Self::Magnitude(inner) => inner.is_tall(),
            Self::Sum(terms) => terms.iter().any(|(_, term)| term.is_tall()),
            Self::Product(parts) | Self::Function(_, parts) | Self::Application(_, parts) | Self::Words(_, parts) => {
                parts.iter().any(Self::is_tall)
            }
            Self::Chain(first, more) => first.is_tall() || more.iter().any(|(_, part)| part.is_tall()),
            Self::Opening(left, _) => left.as_ref().is_some_and(|left| left.is_tall()),
        }
    }

    /// Its width in em of the mathematics face, estimated.
    pub(in crate::report) fn width(&self) -> f64 {
        let all = |parts: &[Self], between: f64| parts.iter().map(|part| part.width() + between).sum::<f64>();
        match self {
            Self::Symbol(symbol) => symbol_width(symbol),
            Self::Value(written) => written_width(written),
            Self::Sum(terms) => terms.iter().map(|(_, term)| term.width() + 1.2 + bracket_width(term, Hold::Product)).sum(),
            Self::Product(factors) => factors.iter().map(|factor| factor.width() + 0.9 + bracket_width(factor, Hold::Product)).sum(),
            Self::Fraction(above, below) => above.width().max(below.width()) + 0.4,
            Self::Power(base, exponent) => base.width() + bracket_width(base, Hold::Atom) + 0.7 * exponent.width(),
            Self::Root(inner, _) | Self::Magnitude(inner) => inner.width() + 1.0,
            Self::Function(word, arguments) => 0.5 * word.len() as f64 + 1.0 + all(arguments, 0.6),
            Self::Application(symbol, arguments) => symbol_width(symbol) + 1.0 + all(arguments, 0.6),
            Self::Chain(first, more) => first.width() + more.iter().map(|(_, part)| part.width() + 1.4).sum::<f64>(),
            Self::Words(_, parts) => all(parts, 2.5),
            Self::Opening(left, _) => left.as_ref().map_or(0.0, |left| left.width()) + 1.2,
        }
    }

    /// The formula in lines no wider than `room` em where it can be broken: between terms or between factors. Each line but the first
    /// begins with a sign, which stands beside it.
    pub(in crate::report) fn lines(self, room: f64) -> Vec<(&'static str, Self)> {
        if self.width() <= room {
            return vec![("", self)];
        }
        match self {
            Self::Sum(terms) => {
                let mut lines: Vec<(&'static str, Vec<(bool, Self)>)> = Vec::new();
                let mut filled = f64::INFINITY;
                for (minus, term) in terms {
                    let wide = term.width() + 1.2;
                    match lines.last_mut() {
                        Some((_, line)) if filled + wide <= room => line.push((minus, term)),
                        Some(_) => {
                            lines.push((if minus { "−" } else { "+" }, vec![(false, term)]));
                            filled = 0.0;
                        }
                        None => {
                            lines.push(("", vec![(minus, term)]));
                            filled = 0.0;
                        }
                    }
                    filled += wide;
                }
                lines.into_iter().map(|(sign, line)| (sign, one_term(line))).collect()
            }
            Self::Product(factors) => {
                let mut lines: Vec<Vec<Self>> = Vec::new();
                let mut filled = f64::INFINITY;
                for factor in factors {
                    let wide = factor.width() + 0.9;
                    match lines.last_mut() {
                        Some(line) if filled + wide <= room => line.push(factor),
                        _ => {
                            lines.push(vec![factor]);
                            filled = 0.0;
                        }
                    }
                    filled += wide;
                }
                let sign = |at: usize| if at == 0 { "" } else { "×" };
                lines.into_iter().enumerate().map(|(at, line)| (sign(at), one_factor(line))).collect()
            }
            other => vec![("", other)],
        }
    }
}

fn one_term(mut terms: Vec<(bool, Formula)>) -> Formula {
    match terms.as_slice() {
        [(false, _)] => terms.remove(0).1,
        _ => Formula::Sum(terms),
    }
}

fn one_factor(mut factors: Vec<Formula>) -> Formula {
    if factors.len() == 1 { factors.remove(0) } else { Formula::Product(factors) }
}

fn bracket_width(formula: &Formula, least: Hold) -> f64 {
    if formula.hold() < least { 0.8 } else { 0.0 }
}

fn symbol_width(symbol: &Symbol) -> f64 {
    let below: usize = symbol.subscripts.iter().map(|part| part.text.chars().count() + 1).sum();
    0.55 * symbol.base.chars().count() as f64 + if symbol.delta { 0.8 } else { 0.0 } + 0.32 * below as f64
}

fn written_width(written: &Written) -> f64 {
    let unit = if written.unit.is_empty() { 0.0 } else { 0.2 + 0.45 * written.unit.chars().count() as f64 };
    0.5 * written.number.chars().count() as f64 + unit
}
