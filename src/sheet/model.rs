//! The sheet with names, kinds and dimensions settled: plain data that can be built without a text.

use std::sync::Arc;

use crate::diagnostic::Span;
use crate::gas::humid_air::HumidAir;
use crate::gas::{Gas, RealGas};
use crate::syntax::{Basis, BinaryOp, Comparison, Function, Head, Shape};
use crate::units::{Dimension, Rational, Unit};

use super::{Expr, ExprId, Exprs, GasFunction};

/// A quantity, by its place in [`Sheet::quantities`].
#[derive(Clone, Copy, Debug, PartialEq, Eq, Hash, PartialOrd, Ord)]
pub struct QuantityId(pub u32);

/// A gas, by its place in [`Sheet::gases`].
#[derive(Clone, Copy, Debug, PartialEq, Eq, Hash, PartialOrd, Ord)]
pub struct GasId(pub u32);

/// A state, by its place in [`Sheet::states`].
#[derive(Clone, Copy, Debug, PartialEq, Eq, Hash, PartialOrd, Ord)]
pub struct StateId(pub u32);

/// Whether a temperature or pressure counts from zero or is a difference.
#[derive(Clone, Copy, Debug, PartialEq, Eq, Hash)]
pub enum Kind {
    /// Neither temperature nor pressure.
    Plain,
    /// Counts from absolute zero or from vacuum.
    Absolute,
    /// A difference of two.
    Difference,
    /// May be either: the sheet does not say.
    Either,
}

/// A unit to show a value in, with its basis.
#[derive(Clone, Debug, PartialEq)]
pub struct ShownUnit {
    /// The unit; of a difference without its offset, of a reference volume with its reference conditions in the factor.
    pub unit: Unit,
    /// `abs`, `gauge` or `diff`, of a pressure always, of a temperature difference where written.
    pub basis: Option<Basis>,
}

impl ShownUnit {
    /// As it stands behind a number: `bar gauge`, `kg/m3`; empty for a plain number.
    #[must_use]
    pub fn text(&self) -> String {
        match self.basis {
            Some(basis) => format!("{} {}", self.unit.name, basis.word()),
            None => self.unit.name.clone(),
        }
    }

    /// The value of an SI value (absolute for a pressure or a temperature) in this unit; `site_pressure_pa` is taken off
    /// a gauge reading.
    #[must_use]
    pub fn from_si(&self, si: f64, site_pressure_pa: f64) -> f64 {
        match self.basis {
            Some(Basis::Gauge) => self.unit.from_si(si - site_pressure_pa),
            _ => self.unit.from_si(si),
        }
    }
}

/// A stated uncertainty with its numbers in SI.
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct StatedUncertainty {
    /// Limits (half width), or expanded uncertainty of a normal distribution, in SI.
    pub width_si: f64,
    /// Which distribution.
    pub shape: Shape,
    /// Coverage factor of a normal one.
    pub k: f64,
    /// Degrees of freedom, `None` for infinite.
    pub dof: Option<f64>,
}

impl StatedUncertainty {
    /// The standard uncertainty in SI (JCGM 100:2008, 4.3).
    #[must_use]
    pub fn standard_si(&self) -> f64 {
        match self.shape {
            Shape::Rectangular => self.width_si / 3f64.sqrt(),
            Shape::Triangular => self.width_si / 6f64.sqrt(),
            Shape::UShaped => self.width_si / 2f64.sqrt(),
            Shape::Normal => self.width_si / self.k,
        }
    }
}

/// The value of a given as it was written.
#[derive(Clone, Debug, PartialEq)]
pub struct Reading {
    /// In SI: absolute, or above the atmosphere where [`Self::gauge`].
    pub si: f64,
    /// Whether the pressure of the site has to be added.
    pub gauge: bool,
    /// Marked `exact`.
    pub exact: bool,
    /// Half a unit of the last written figure, in SI; 0 where exact.
    pub half_width_si: f64,
    /// Significant figures as written.
    pub figures: u32,
    /// What stands behind `±`.
    pub uncertainty: Option<StatedUncertainty>,
    /// The value as written, blanks folded: `9.6 bar gauge`.
    pub text: String,
    /// What stands from `±` on, as written; empty without.
    pub uncertainty_text: String,
}

/// Where a quantity comes from.
#[derive(Clone, Copy, Debug, PartialEq, Eq, Hash)]
pub enum Origin {
    /// `given`
    Given,
    /// `unknown`
    Unknown,
    /// `let`
    Let,
    /// A property of a state.
    Property(StateId, Property),
    /// The pressure of the site, `site.p`.
    SitePressure,
    /// The altitude of the site, `site.altitude`, where that is what was given.
    SiteAltitude,
    /// A constant of a gas: `n2.M`.
    GasConstant(GasId),
}

/// The properties of a state.
#[derive(Clone, Copy, Debug, PartialEq, Eq, Hash, PartialOrd, Ord)]
#[expect(missing_docs, reason = "the table of `Property::ROWS` says what each is")]
pub enum Property {
    P,
    T,
    V,
    Rho,
    H,
    U,
    S,
    Cp,
    Cv,
    K,
    W,
    Z,
    Mu,
    Lambda,
    RelativeHumidity,
    DewPoint,
    HumidityRatio,
}

/// What there is to know of a property.
#[derive(Clone, Copy, Debug)]
pub struct PropertyRow {
    /// The property.
    pub property: Property,
    /// Its field.
    pub field: &'static str,
    /// The trade's word.
    pub word: &'static str,
    /// Its dimension.
    pub dimension: Dimension,
}

/// A quantity.
#[derive(Clone, Debug)]
pub struct Quantity {
    /// `m`, `cold.p`.
    pub name: String,
    /// Where it comes from.
    pub origin: Origin,
    /// The statement that declares it, by its place in the tree.
    pub statement: usize,
    /// The place of its declaration.
    pub span: Span,
    /// Its description, empty without.
    pub description: String,
    /// Its source, empty without.
    pub source: String,
    /// Its dimension.
    pub dimension: Dimension,
    /// Absolute or difference.
    pub kind: Kind,
    /// The unit it is shown in.
    pub shown: ShownUnit,
    /// Of an input: its value.
    pub reading: Option<Reading>,
    /// Of a constant: its value in SI.
    pub constant: Option<f64>,
    /// Lower bound.
    pub low: Option<ExprId>,
    /// Upper bound.
    pub high: Option<ExprId>,
    /// The branch that is meant.
    pub near: Option<ExprId>,
    /// The place of `within`, else of the declaration.
    pub bounds_span: Span,
}

impl Quantity {
    /// Whether its value is known before anything is solved.
    #[must_use]
    pub fn is_known(&self) -> bool {
        self.reading.is_some() || self.constant.is_some()
    }
}

/// Where a relation comes from.
#[derive(Clone, Copy, Debug, PartialEq, Eq, Hash)]
pub enum RelationOrigin {
    /// A line with `=`.
    Line,
    /// The definition of a `let`.
    Let,
    /// A property that a `state` line fixes.
    At(StateId, Property),
    /// A law of the gas that ties properties of a state.
    Law(StateId, Property),
    /// The pressure of the site from its altitude.
    Atmosphere,
}

/// A relation that holds.
#[derive(Clone, Debug)]
pub struct Relation {
    /// Left side.
    pub left: ExprId,
    /// Right side.
    pub right: ExprId,
    /// Where it comes from.
    pub origin: RelationOrigin,
    /// The statement that says it.
    pub statement: usize,
    /// Its place.
    pub span: Span,
}

/// A gas of the sheet.
#[derive(Clone, Debug)]
pub struct SheetGas {
    /// Its name in the sheet.
    pub name: String,
    /// What it is.
    pub gas: Arc<Gas>,
    /// How its states are calculated.
    pub model: GasModel,
    /// The place of its name.
    pub span: Span,
    /// Where `, real` stands or may be written.
    pub model_place: Span,
    /// Its statement.
    pub statement: usize,
}

impl SheetGas {
    /// How many independent properties fix a state of it.
    #[must_use]
    pub fn degrees_of_freedom(&self) -> usize {
        if matches!(self.model, GasModel::HumidAir(_)) { 3 } else { 2 }
    }
}

/// How the states of a gas are calculated.
#[derive(Clone, Debug)]
pub enum GasModel {
    /// By the ideal gas law and heat capacities that depend on temperature alone.
    Ideal,
    /// By an equation of state.
    Real(RealGas),
    /// Air with water vapour.
    HumidAir(Arc<HumidAir>),
}

impl GasModel {
    /// Its word in results.
    #[must_use]
    pub fn word(&self) -> &'static str {
        match self {
            Self::Ideal => "ideal",
            Self::Real(_) => "real",
            Self::HumidAir(_) => "humid air",
        }
    }

    /// Whether the ideal gas law is assumed.
    #[must_use]
    pub fn is_ideal(&self) -> bool {
        matches!(self, Self::Ideal)
    }
}

/// A state point.
#[derive(Clone, Debug)]
pub struct State {
    /// Its name.
    pub name: String,
    /// Its gas.
    pub gas: GasId,
    /// Its statement.
    pub statement: usize,
    /// The place of its name.
    pub span: Span,
    /// The properties that its line fixes.
    pub at: Vec<(Property, Span)>,
    /// The properties in the system of relations, with their quantities, in the order of [`Property`].
    pub properties: Vec<(Property, QuantityId)>,
}

/// A condition with names settled.
#[derive(Clone, Debug)]
pub enum Condition {
    /// Two sides compared.
    Compare {
        /// Left side.
        left: ExprId,
        /// How.
        comparison: Comparison,
        /// Right side.
        right: ExprId,
        /// The unit of the right side, in which margins are told.
        unit: ShownUnit,
    },
    /// Both hold.
    And(Box<Condition>, Box<Condition>),
    /// One holds.
    Or(Box<Condition>, Box<Condition>),
    /// It does not hold.
    Not(Box<Condition>),
}

/// An assumption, a requirement or a caution.
#[derive(Clone, Debug)]
pub struct Clause {
    /// Its text.
    pub text: String,
    /// Its condition; `None` where it has none.
    pub condition: Option<Condition>,
    /// The condition as written, blanks folded.
    pub condition_text: String,
    /// `because`, empty without.
    pub because: String,
    /// `from`, empty without.
    pub source: String,
    /// Its statement.
    pub statement: usize,
    /// Its place.
    pub span: Span,
}

/// A result that the sheet exists for.
#[derive(Clone, Debug)]
pub struct Answer {
    /// The quantity.
    pub quantity: QuantityId,
    /// The unit to show it in.
    pub shown: ShownUnit,
    /// `figures` behind it.
    pub figures: Option<u32>,
    /// Its statement.
    pub statement: usize,
    /// Its place.
    pub span: Span,
}

/// A live value of prose.
#[derive(Clone, Debug)]
pub struct LiveValue {
    /// The statement of the prose.
    pub statement: usize,
    /// The place from brace to brace.
    pub span: Span,
    /// The quantity.
    pub quantity: QuantityId,
    /// The unit to show it in.
    pub shown: ShownUnit,
}

impl Condition {
    /// Calls `visit` with both sides of every comparison, in the order written.
    pub fn sides(&self, visit: &mut impl FnMut(ExprId)) {
        match self {
            Self::Compare { left, right, .. } => {
                visit(*left);
                visit(*right);
            }
            Self::And(a, b) | Self::Or(a, b) => {
                a.sides(visit);
                b.sides(visit);
            }
            Self::Not(inner) => inner.sides(visit),
        }
    }
}

/// A number typed in prose beside the name of a quantity.
#[derive(Clone, Debug, PartialEq)]
pub struct TypedNumber {
    /// The statement of the prose.
    pub statement: usize,
    /// From the name to the end of the number with its unit.
    pub span: Span,
    /// The quantity.
    pub quantity: QuantityId,
    /// The number in SI; above the atmosphere of the site where [`Self::gauge`].
    pub si: f64,
    /// Whether it counts from the atmosphere of the site.
    pub gauge: bool,
    /// Half a unit of its last figure in SI.
    pub half_width_si: f64,
    /// As typed.
    pub text: String,
}

/// Two givens that are correlated.
#[derive(Clone, Debug)]
pub struct Correlation {
    /// One.
    pub a: QuantityId,
    /// The other.
    pub b: QuantityId,
    /// Their correlation coefficient.
    pub r: f64,
    /// Its statement.
    pub statement: usize,
}

/// Reference conditions.
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct ReferenceConditions {
    /// Temperature in K.
    pub t_k: f64,
    /// Pressure in Pa.
    pub p_pa: f64,
    /// The statement.
    pub statement: usize,
}

/// A literal of an expression as written, to be shown in formulas.
#[derive(Clone, Debug, PartialEq)]
pub struct ShownLiteral {
    /// The number as written, sign included.
    pub number: String,
    /// The unit behind it as [`ShownUnit::text`], empty without.
    pub unit: String,
}

/// The sheet: what the solver sees.
#[derive(Clone, Debug, Default)]
pub struct Sheet {
    /// The head as read.
    pub head: Head,
    /// Every quantity in the order of its declaration.
    pub quantities: Vec<Quantity>,
    /// The arena of expressions.
    pub exprs: Exprs,
    /// Where each expression that was written stands, by its place in the arena; those made later have none.
    pub expr_spans: Vec<Span>,
    /// The literals that numbers of the arena were written as.
    pub literals: Vec<ShownLiteral>,
    /// Relations in the order of the sheet; laws of a state stand behind its line.
    pub relations: Vec<Relation>,
    /// Gases.
    pub gases: Vec<SheetGas>,
    /// States.
    pub states: Vec<State>,
    /// Assumptions.
    pub assumptions: Vec<Clause>,
    /// Requirements.
    pub requirements: Vec<Clause>,
    /// Cautions.
    pub cautions: Vec<Clause>,
    /// Answers.
    pub answers: Vec<Answer>,
    /// Live values in prose.
    pub live_values: Vec<LiveValue>,
    /// Numbers typed in prose beside the name of a quantity.
    pub typed_numbers: Vec<TypedNumber>,
    /// Correlations.
    pub correlations: Vec<Correlation>,
    /// Reference conditions: normal, standard, scf.
    pub references: [Option<ReferenceConditions>; 3],
    /// The quantity `site.p`, where the sheet has a site.
    pub site_pressure: Option<QuantityId>,
    /// Quantities and relations left out because they hang on a line in error; the solver takes them for known.
    pub poisoned: Vec<QuantityId>,
}

impl Sheet {
    /// The quantity of an id of this sheet.
    #[must_use]
    pub fn quantity(&self, id: QuantityId) -> &Quantity {
        &self.quantities[id.0 as usize]
    }

    /// The dimension of an expression whose terms agree; `None` where it has none that a quantity can have.
    #[must_use]
    pub fn dimension_of(&self, expr: ExprId) -> Option<Dimension> {
        match self.exprs.get(expr) {
            Expr::Number(_, literal) => match self.literals.get(literal as usize) {
                Some(literal) if !literal.unit.is_empty() => {
                    let word = literal.unit.split(' ').next().unwrap_or("");
                    crate::units::parse(word).ok().map(|unit| unit.dimension)
                }
                _ => Some(Dimension::NONE),
            },
            Expr::Constant(constant) => Some(constant.dimension()),
            Expr::Quantity(id) => Some(self.quantity(id).dimension),
            Expr::Negate(a) => self.dimension_of(a),
            Expr::Binary(op, a, b) => match op {
                BinaryOp::Add | BinaryOp::Subtract => self.dimension_of(a),
                BinaryOp::Multiply => self.dimension_of(a)?.times(self.dimension_of(b)?),
                BinaryOp::Divide => self.dimension_of(a)?.per(self.dimension_of(b)?),
                BinaryOp::Power => {
                    let base = self.dimension_of(a)?;
                    if base.is_none() {
                        return Some(base);
                    }
                    let exponent = self.exprs.constant_value(b).and_then(Rational::approximate)?;
                    base.power(exponent)
                }
            },
            Expr::Call(Function::Sqrt, a, _) => self.dimension_of(a)?.power(Rational::new(1, 2)?),
            Expr::Call(Function::Cbrt, a, _) => self.dimension_of(a)?.power(Rational::new(1, 3)?),
            Expr::Call(Function::Abs | Function::Min | Function::Max, a, _) => self.dimension_of(a),
            Expr::Call(..) => Some(Dimension::NONE),
            Expr::Gas(function, ..) => Some(match function {
                GasFunction::HeatCapacity | GasFunction::Entropy => Dimension::SPECIFIC_HEAT_CAPACITY,
                GasFunction::Enthalpy | GasFunction::InternalEnergy => Dimension::SPECIFIC_ENERGY,
                GasFunction::SaturationPressure => Dimension::PRESSURE,
                _ => Dimension::TEMPERATURE,
            }),
            Expr::State(function, ..) => Some(function.of.row().dimension),
            Expr::StandardPressure(_) => Some(Dimension::PRESSURE),
        }
    }

    /// The quantity of a name.
    #[must_use]
    pub fn find(&self, name: &str) -> Option<QuantityId> {
        self.quantities.iter().position(|quantity| quantity.name == name).map(|at| QuantityId(at as u32))
    }

    /// The place of an expression, where it was written.
    #[must_use]
    pub fn span_of(&self, expr: ExprId) -> Option<Span> {
        self.expr_spans.get(expr.0 as usize).copied()
    }

    /// The gas of an id of this sheet.
    #[must_use]
    pub fn gas(&self, id: GasId) -> &SheetGas {
        &self.gases[id.0 as usize]
    }

    /// The state of an id of this sheet.
    #[must_use]
    pub fn state(&self, id: StateId) -> &State {
        &self.states[id.0 as usize]
    }
}
