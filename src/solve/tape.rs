//! The tape: one flat list of operations in single-assignment form. Values, tangents and adjoints all run over it.

use std::ops::Range;
use std::sync::Arc;

use crate::gas::eos::Equation;
use crate::gas::{self, Gas, StateError, saturation};
use crate::sheet::{GasFunction, StateFunction};
use crate::syntax::Function;
use crate::units::math;

use super::state_function::Substance;

/// The place of an operation on the tape, and of its value.
pub(super) type Slot = u32;

/// One operation. Its value stands in its own slot.
#[derive(Clone, Copy, Debug, PartialEq)]
pub(super) enum Op {
    /// An input, by its number.
    Input(u32),
    /// A number.
    Constant(f64),
    /// An unknown of a block: the solver writes its value.
    Unknown,
    /// `-a`
    Negate(Slot),
    /// `a + b`
    Add(Slot, Slot),
    /// `a - b`
    Subtract(Slot, Slot),
    /// `a b`
    Multiply(Slot, Slot),
    /// `a / b`
    Divide(Slot, Slot),
    /// `a` to the whole power.
    Integer(Slot, i32),
    /// `a` to half the whole power.
    Half(Slot, i32),
    /// `a^b`
    Power(Slot, Slot),
    /// A function of one argument.
    Call(Function, Slot),
    /// The smaller one.
    Least(Slot, Slot),
    /// The larger one.
    Greatest(Slot, Slot),
    /// A function of a gas.
    Gas(GasFunction, u32, Slot),
    /// A property of a state, by its place among [`Tape::states`].
    State(u32),
    /// Pressure of the standard atmosphere.
    StandardPressure(Slot),
}

/// A property of a state with what it reads.
#[derive(Clone, Copy, Debug)]
struct StateOp {
    function: StateFunction,
    gas: u32,
    arguments: [Slot; 3],
}

impl StateOp {
    fn at(&self, values: &[f64]) -> [f64; 3] {
        self.arguments.map(|slot| values[slot as usize])
    }
}

impl Op {
    /// The slots that it reads, but for those of a state.
    fn operands(self) -> [Option<Slot>; 2] {
        match self {
            Self::Input(_) | Self::Constant(_) | Self::Unknown | Self::State(_) => [None, None],
            Self::Negate(a)
            | Self::Integer(a, _)
            | Self::Half(a, _)
            | Self::Call(_, a)
            | Self::Gas(_, _, a)
            | Self::StandardPressure(a) => [Some(a), None],
            Self::Add(a, b)
            | Self::Subtract(a, b)
            | Self::Multiply(a, b)
            | Self::Divide(a, b)
            | Self::Power(a, b)
            | Self::Least(a, b)
            | Self::Greatest(a, b) => [Some(a), Some(b)],
        }
    }
}

/// An operand that is not there.
const NOTHING: (Slot, f64) = (0, 0.0);

/// The largest whole or half power that is computed by products.
const LARGEST_POWER: f64 = 64.0;

/// `derivative * tangent`, where nothing that moves comes in as nothing even where the derivative is infinite.
fn scaled(derivative: f64, tangent: f64) -> f64 {
    if tangent == 0.0 { 0.0 } else { derivative * tangent }
}

/// The operations, and the gases that they use.
#[derive(Clone, Debug, Default)]
pub(super) struct Tape {
    ops: Vec<Op>,
    states: Vec<StateOp>,
    substances: Vec<Arc<Substance>>,
}

impl Tape {
    /// An empty tape over the gases of a sheet.
    #[must_use]
    pub(super) fn new(substances: Vec<Arc<Substance>>) -> Self {
        Self { ops: Vec::new(), states: Vec::new(), substances }
    }

    fn gas(&self, gas: u32) -> &Gas {
        &self.substances[gas as usize].gas.gas
    }

    /// Adds a property of a state.
    pub(super) fn push_state(&mut self, function: StateFunction, gas: u32, arguments: [Slot; 3]) -> Slot {
        self.states.push(StateOp { function, gas, arguments });
        self.push(Op::State(self.states.len() as u32 - 1))
    }

    /// How many operations there are.
    #[must_use]
    pub(super) fn len(&self) -> usize {
        self.ops.len()
    }

    /// Adds an operation. Powers with a constant whole or half exponent become products and roots.
    pub(super) fn push(&mut self, op: Op) -> Slot {
        let op = match op {
            Op::Power(base, exponent) => match self.ops[exponent as usize] {
                Op::Constant(value) if value.abs() <= LARGEST_POWER && value == value.round() => Op::Integer(base, value as i32),
                Op::Constant(value) if value.abs() <= LARGEST_POWER && value * 2.0 == (value * 2.0).round() => {
                    Op::Half(base, (value * 2.0) as i32)
                }
                _ => op,
            },
            op => op,
        };
        self.ops.push(op);
        self.ops.len() as Slot - 1
    }

    /// The slots before a range that it reads, ascending.
    #[must_use]
    pub(super) fn reads_before(&self, range: Range<usize>) -> Vec<Slot> {
        let mut found = Vec::new();
        for op in &self.ops[range.clone()] {
            let of_state: &[Slot] = if let Op::State(at) = op { &self.states[*at as usize].arguments } else { &[] };
            let slots = op.operands().into_iter().flatten().chain(of_state.iter().copied());
            found.extend(slots.filter(|slot| (*slot as usize) < range.start));
        }
        found.sort_unstable();
        found.dedup();
        found
    }

    /// Evaluates a range into `values`. Unknowns keep what stands there.
    pub(super) fn evaluate(&self, range: Range<usize>, inputs: &[f64], values: &mut [f64]) {
        for at in range {
            let value = |slot: Slot| values[slot as usize];
            values[at] = match self.ops[at] {
                Op::Input(input) => inputs[input as usize],
                Op::Constant(constant) => constant,
                Op::Unknown => continue,
                Op::Negate(a) => -value(a),
                Op::Add(a, b) => value(a) + value(b),
                Op::Subtract(a, b) => value(a) - value(b),
                Op::Multiply(a, b) => value(a) * value(b),
                Op::Divide(a, b) => value(a) / value(b),
                Op::Integer(a, power) => math::powi(value(a), power),
                Op::Half(a, power) => half_power(value(a), power),
                Op::Power(a, b) => math::pow(value(a), value(b)),
                Op::Call(function, a) => call(function, value(a)),
                Op::Least(a, b) => least(value(a), value(b)),
                Op::Greatest(a, b) => -least(-value(a), -value(b)),
                Op::Gas(function, gas, a) => gas_value(self.gas(gas), function, value(a)),
                Op::State(at) => {
                    let state = &self.states[at as usize];
                    self.substances[state.gas as usize].value(state.function, state.at(values))
                }
                Op::StandardPressure(a) => gas::standard_pressure_pa(value(a)),
            };
        }
    }

    /// The partial derivatives of an operation by its operands, at `values`.
    fn partials(&self, at: usize, values: &[f64]) -> [(Slot, f64); 3] {
        let [a, b] = match self.ops[at] {
            Op::State(state) => {
                let state = &self.states[state as usize];
                let (_, slopes) = self.substances[state.gas as usize].sloped(state.function, state.at(values));
                let [a, b, c] = state.arguments;
                return [(a, slopes[0]), (b, slopes[1]), (c, slopes[2])];
            }
            op => self.partials_of_two(op, at, values),
        };
        [a, b, NOTHING]
    }

    fn partials_of_two(&self, op: Op, at: usize, values: &[f64]) -> [(Slot, f64); 2] {
        let value = |slot: Slot| values[slot as usize];
        let one = |slot: Slot, derivative: f64| [(slot, derivative), NOTHING];
        match op {
            Op::Input(_) | Op::Constant(_) | Op::Unknown | Op::State(_) => [NOTHING, NOTHING],
            Op::Negate(a) => one(a, -1.0),
            Op::Add(a, b) => [(a, 1.0), (b, 1.0)],
            Op::Subtract(a, b) => [(a, 1.0), (b, -1.0)],
            Op::Multiply(a, b) => [(a, value(b)), (b, value(a))],
            Op::Divide(a, b) => [(a, 1.0 / value(b)), (b, -values[at] / value(b))],
            Op::Integer(a, power) => one(a, if power == 0 { 0.0 } else { f64::from(power) * math::powi(value(a), power - 1) }),
            Op::Half(a, power) => one(a, 0.5 * f64::from(power) * half_power(value(a), power - 2)),
            Op::Power(a, b) => {
                let (base, exponent) = (value(a), value(b));
                let by_base = if base == 0.0 { exponent * math::pow(base, exponent - 1.0) } else { exponent * values[at] / base };
                [(a, by_base), (b, if values[at] == 0.0 { 0.0 } else { values[at] * math::ln(base) })]
            }
            Op::Call(function, a) => one(a, call_slope(function, value(a), values[at])),
            Op::Least(a, b) => [(a, f64::from(value(a) <= value(b))), (b, f64::from(value(a) > value(b)))],
            Op::Greatest(a, b) => [(a, f64::from(value(a) >= value(b))), (b, f64::from(value(a) < value(b)))],
            Op::Gas(function, gas, a) => one(a, gas_slope(self.gas(gas), function, value(a), values[at])),
            Op::StandardPressure(a) => one(a, gas::d_standard_pressure_pa_per_m(value(a))),
        }
    }

    /// Carries tangents forward over a range. Tangents of inputs and unknowns keep what stands there.
    pub(super) fn tangents(&self, range: Range<usize>, values: &[f64], tangents: &mut [f64]) {
        for at in range {
            if matches!(self.ops[at], Op::Input(_) | Op::Unknown) {
                continue;
            }
            let [(a, by_a), (b, by_b), (c, by_c)] = self.partials(at, values);
            tangents[at] = scaled(by_a, tangents[a as usize]) + scaled(by_b, tangents[b as usize]) + scaled(by_c, tangents[c as usize]);
        }
    }

    /// Carries adjoints backward over a range: adds to what stands in `adjoints`.
    pub(super) fn adjoints(&self, range: Range<usize>, values: &[f64], adjoints: &mut [f64]) {
        for at in range.rev() {
            let adjoint = adjoints[at];
            if adjoint == 0.0 || matches!(self.ops[at], Op::Input(_) | Op::Unknown | Op::Constant(_)) {
                continue;
            }
            let [(a, by_a), (b, by_b), (c, by_c)] = self.partials(at, values);
            adjoints[a as usize] += scaled(by_a, adjoint);
            for (slot, by) in [(b, by_b), (c, by_c)] {
                if by != 0.0 {
                    adjoints[slot as usize] += scaled(by, adjoint);
                }
            }
        }
    }

    /// The size of the terms of every value of a range: what a sum would be if nothing in it cancelled. `least` gives the
    /// size below which an unknown is not taken for small.
    pub(super) fn magnitudes(&self, range: Range<usize>, values: &[f64], magnitudes: &mut [f64]) {
        for at in range {
            let size = |slot: Slot, magnitudes: &[f64]| magnitudes[slot as usize].max(values[slot as usize].abs());
            magnitudes[at] = match self.ops[at] {
                Op::Add(a, b) | Op::Subtract(a, b) => size(a, magnitudes) + size(b, magnitudes),
                Op::Multiply(a, b) => size(a, magnitudes) * size(b, magnitudes),
                Op::Negate(a) => size(a, magnitudes),
                Op::Divide(a, b) => size(a, magnitudes) / values[b as usize].abs(),
                Op::Integer(a, power) if power > 0 => math::powi(size(a, magnitudes), power),
                Op::Call(Function::Abs, a) => size(a, magnitudes),
                Op::Unknown => magnitudes[at],
                _ => values[at].abs(),
            };
        }
    }
}

/// `base` to half the power `power`.
fn half_power(base: f64, power: i32) -> f64 {
    if power % 2 == 0 { math::powi(base, power / 2) } else { math::powi(base.sqrt(), power) }
}

/// The smaller of two, nothing where one is not a number.
fn least(a: f64, b: f64) -> f64 {
    if a.is_nan() || b.is_nan() {
        f64::NAN
    } else if a <= b {
        a
    } else {
        b
    }
}

/// A function of the language.
pub(super) fn call(function: Function, a: f64) -> f64 {
    match function {
        Function::Sqrt => a.sqrt(),
        Function::Cbrt => math::cbrt(a),
        Function::Exp => math::exp(a),
        Function::Ln => math::ln(a),
        Function::Log10 => math::log10(a),
        Function::Abs => a.abs(),
        Function::Sin => math::sin(a),
        Function::Cos => math::cos(a),
        Function::Tan => math::tan(a),
        Function::Asin => math::asin(a),
        Function::Acos => math::acos(a),
        Function::Atan => math::atan(a),
        Function::Min | Function::Max => a,
    }
}

fn call_slope(function: Function, a: f64, value: f64) -> f64 {
    match function {
        Function::Sqrt => 0.5 / value,
        Function::Cbrt => 1.0 / (3.0 * value * value),
        Function::Exp => value,
        Function::Ln => 1.0 / a,
        Function::Log10 => std::f64::consts::LOG10_E / a,
        Function::Abs => {
            if a < 0.0 {
                -1.0
            } else {
                1.0
            }
        }
        Function::Sin => math::cos(a),
        Function::Cos => -math::sin(a),
        Function::Tan => 1.0 + value * value,
        Function::Asin => 1.0 / (1.0 - a * a).sqrt(),
        Function::Acos => -1.0 / (1.0 - a * a).sqrt(),
        Function::Atan => 1.0 / (1.0 + a * a),
        Function::Min | Function::Max => 1.0,
    }
}

/// A function of a gas, SI.
pub(super) fn gas_value(gas: &Gas, function: GasFunction, a: f64) -> f64 {
    let r = gas.gas_constant_j_kg_k();
    match function {
        GasFunction::HeatCapacity => gas.cp_j_kg_k(a),
        GasFunction::Enthalpy => gas.h_j_kg(a),
        GasFunction::InternalEnergy => gas.h_j_kg(a) - r * a,
        GasFunction::Entropy => gas.s_j_kg_k(a),
        GasFunction::TemperatureOfEnthalpy => gas.t_k_from_h(a),
        GasFunction::TemperatureOfInternalEnergy => gas.t_k_from_u(a),
        GasFunction::TemperatureOfEntropy => gas.t_k_from_s(a),
        GasFunction::SaturationPressure | GasFunction::SaturationTemperature => {
            saturation_line(gas, function, a).map_or(f64::NAN, |(value, _)| value)
        }
    }
}

fn gas_slope(gas: &Gas, function: GasFunction, a: f64, value: f64) -> f64 {
    let r = gas.gas_constant_j_kg_k();
    match function {
        GasFunction::HeatCapacity => gas.dcp_dt(a),
        GasFunction::Enthalpy => gas.cp_j_kg_k(a),
        GasFunction::InternalEnergy => gas.cp_j_kg_k(a) - r,
        GasFunction::Entropy => gas.cp_j_kg_k(a) / a,
        GasFunction::TemperatureOfEnthalpy => 1.0 / gas.cp_j_kg_k(value),
        GasFunction::TemperatureOfInternalEnergy => 1.0 / (gas.cp_j_kg_k(value) - r),
        GasFunction::TemperatureOfEntropy => value / gas.cp_j_kg_k(value),
        GasFunction::SaturationPressure | GasFunction::SaturationTemperature => {
            saturation_line(gas, function, a).map_or(f64::NAN, |(_, slope)| slope)
        }
    }
}

/// A value of the saturation line of a gas with its derivative, or why there is none.
pub(super) fn saturation_line(gas: &Gas, function: GasFunction, a: f64) -> Result<(f64, f64), StateError> {
    let equation = gas.species().and_then(Equation::of);
    let equation = equation.ok_or(StateError::NoState { quantity: "saturation line", value: a })?;
    let of = if function == GasFunction::SaturationPressure { saturation::p_sat } else { saturation::t_sat };
    of(equation, a).map(|point| (point.value, point.slope))
}
