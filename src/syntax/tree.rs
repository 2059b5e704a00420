//! The tree: what a sheet says, statement by statement, with the place of every word. No meaning is judged here.

use std::collections::HashMap;

use crate::diagnostic::Span;

/// An interned name. Two names are the same text exactly when they are equal.
#[derive(Clone, Copy, Debug, PartialEq, Eq, Hash, PartialOrd, Ord)]
pub struct Name(pub u32);

/// The names of a file, each kept once.
#[derive(Clone, Debug, Default)]
pub struct Names {
    texts: Vec<Box<str>>,
    index: HashMap<Box<str>, Name>,
}

impl Names {
    /// The name of `text`, new or known.
    pub fn intern(&mut self, text: &str) -> Name {
        if let Some(name) = self.index.get(text) {
            return *name;
        }
        let name = Name(self.texts.len() as u32);
        self.texts.push(text.into());
        self.index.insert(text.into(), name);
        name
    }

    /// The name of `text` if the file has it.
    #[must_use]
    pub fn find(&self, text: &str) -> Option<Name> {
        self.index.get(text).copied()
    }

    /// The text of a name of this file.
    #[must_use]
    pub fn text(&self, name: Name) -> &str {
        &self.texts[name.0 as usize]
    }
}

/// A name at a place.
#[derive(Clone, Copy, Debug, PartialEq, Eq)]
pub struct Named {
    /// The name.
    pub name: Name,
    /// Where it stands.
    pub span: Span,
}

/// A name, or a field behind a dot: `m`, `cold.p`, `vent.inner.x` (all behind the first dot is one name).
#[derive(Clone, Copy, Debug, PartialEq, Eq)]
pub struct Path {
    /// The first name.
    pub base: Named,
    /// What stands behind the first dot.
    pub field: Option<Named>,
}

impl Path {
    /// The whole path.
    #[must_use]
    pub fn span(&self) -> Span {
        self.field.map_or(self.base.span, |field| self.base.span.to(field.span))
    }
}

/// A quoted text or a title, with escapes resolved.
#[derive(Clone, Debug, PartialEq, Eq)]
pub struct Text {
    /// Where it stands, quotes included.
    pub span: Span,
    /// What it says.
    pub text: String,
}

/// What a pressure (or a temperature difference) counts from.
#[derive(Clone, Copy, Debug, PartialEq, Eq, Hash)]
pub enum Basis {
    /// From vacuum.
    Absolute,
    /// From the atmosphere of the site.
    Gauge,
    /// A difference of two.
    Difference,
}

impl Basis {
    /// The word of the language.
    #[must_use]
    pub fn word(self) -> &'static str {
        match self {
            Self::Absolute => "abs",
            Self::Gauge => "gauge",
            Self::Difference => "diff",
        }
    }
}

/// A unit as written, with the basis behind it.
#[derive(Clone, Copy, Debug, PartialEq, Eq)]
pub struct UnitText {
    /// The unit token.
    pub span: Span,
    /// The basis word behind it.
    pub basis: Option<(Basis, Span)>,
}

impl UnitText {
    /// Unit and basis together.
    #[must_use]
    pub fn whole(&self) -> Span {
        self.basis.map_or(self.span, |(_, span)| self.span.to(span))
    }
}

/// A number as written: `-9.6 bar gauge`, `12 exact`, `0.62`.
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct Literal {
    /// Sign, number, unit, basis and `exact` together.
    pub span: Span,
    /// The digits alone, without sign.
    pub digits: Span,
    /// The value as written, sign included. Infinite where the digits leave the range of doubles.
    pub value: f64,
    /// The unit behind it.
    pub unit: Option<UnitText>,
    /// The word `exact` behind it.
    pub exact: Option<Span>,
}

/// An expression of a [`Tree`], by its place in [`Tree::expressions`].
#[derive(Clone, Copy, Debug, PartialEq, Eq, Hash, PartialOrd, Ord)]
pub struct ExprId(pub u32);

/// An expression and its place.
#[derive(Clone, Debug, PartialEq)]
pub struct Expr {
    /// Where it stands, brackets around it not included.
    pub span: Span,
    /// What it is.
    pub kind: ExprKind,
}

/// The kinds of expression.
#[derive(Clone, Debug, PartialEq)]
pub enum ExprKind {
    /// A number.
    Number(Literal),
    /// A quantity, a field of a state or gas, or a constant.
    Name(Path),
    /// `-x`.
    Negate(ExprId),
    /// Two operands.
    Binary(BinaryOp, ExprId, ExprId),
    /// A function of the language and its arguments.
    Call(Function, Span, Box<[ExprId]>),
    /// A function that a gas or a curve offers: `x.p_sat(T)`.
    CallPath(Path, Box<[ExprId]>),
    /// A part that is in error; its finding is already made.
    Bad,
}

/// The operators between two operands.
#[derive(Clone, Copy, Debug, PartialEq, Eq, Hash)]
pub enum BinaryOp {
    /// `+`
    Add,
    /// `-`
    Subtract,
    /// `*`
    Multiply,
    /// `/`
    Divide,
    /// `^`
    Power,
}

/// The functions of the language.
#[derive(Clone, Copy, Debug, PartialEq, Eq, Hash)]
#[expect(missing_docs, reason = "each is the function of its name")]
pub enum Function {
    Sqrt,
    Cbrt,
    Exp,
    Ln,
    Log10,
    Abs,
    Min,
    Max,
    Sin,
    Cos,
    Tan,
    Asin,
    Acos,
    Atan,
}

impl Function {
    /// All of them, in the order of the language page.
    pub const ALL: [Self; 14] = [
        Self::Sqrt,
        Self::Cbrt,
        Self::Exp,
        Self::Ln,
        Self::Log10,
        Self::Abs,
        Self::Min,
        Self::Max,
        Self::Sin,
        Self::Cos,
        Self::Tan,
        Self::Asin,
        Self::Acos,
        Self::Atan,
    ];

    /// Its word.
    #[must_use]
    pub fn word(self) -> &'static str {
        match self {
            Self::Sqrt => "sqrt",
            Self::Cbrt => "cbrt",
            Self::Exp => "exp",
            Self::Ln => "ln",
            Self::Log10 => "log10",
            Self::Abs => "abs",
            Self::Min => "min",
            Self::Max => "max",
            Self::Sin => "sin",
            Self::Cos => "cos",
            Self::Tan => "tan",
            Self::Asin => "asin",
            Self::Acos => "acos",
            Self::Atan => "atan",
        }
    }

    /// The function of a word.
    #[must_use]
    pub fn of_word(word: &str) -> Option<Self> {
        Self::ALL.into_iter().find(|function| function.word() == word)
    }
}

/// How two sides of a condition are compared.
#[derive(Clone, Copy, Debug, PartialEq, Eq, Hash)]
pub enum Comparison {
    /// `<`
    Less,
    /// `<=`
    LessOrEqual,
    /// `>`
    Greater,
    /// `>=`
    GreaterOrEqual,
}

impl Comparison {
    /// As written.
    #[must_use]
    pub fn sign(self) -> &'static str {
        match self {
            Self::Less => "<",
            Self::LessOrEqual => "<=",
            Self::Greater => ">",
            Self::GreaterOrEqual => ">=",
        }
    }
}

/// A condition.
#[derive(Clone, Debug, PartialEq)]
pub struct Condition {
    /// Where it stands.
    pub span: Span,
    /// What it is.
    pub kind: ConditionKind,
}

/// The kinds of condition.
#[derive(Clone, Debug, PartialEq)]
pub enum ConditionKind {
    /// Two sides compared.
    Compare(ExprId, Comparison, ExprId),
    /// Both hold.
    And(Box<Condition>, Box<Condition>),
    /// One holds.
    Or(Box<Condition>, Box<Condition>),
    /// It does not hold.
    Not(Box<Condition>),
}

/// The shape of a stated uncertainty.
#[derive(Clone, Copy, Debug, PartialEq, Eq, Hash)]
pub enum Shape {
    /// Limits of a rectangular distribution.
    Rectangular,
    /// Limits of a triangular distribution.
    Triangular,
    /// Limits of a U-shaped (arcsine) distribution.
    UShaped,
    /// Expanded uncertainty of a normal distribution; the coverage factor stands beside it.
    Normal,
}

/// The width behind `±`.
#[derive(Clone, Copy, Debug, PartialEq)]
pub enum Width {
    /// `0.02 m3`, or a plain number.
    Of(Literal),
    /// `1 %` of the value as written.
    PercentOfValue(Literal),
    /// `1 % of 16 bar`: of an instrument's span.
    PercentOfSpan(Literal, Literal),
}

/// A stated uncertainty: `± 0.02 m3 k=2 dof=9`.
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct Uncertainty {
    /// From the `±` to its last word.
    pub span: Span,
    /// How wide.
    pub width: Width,
    /// Which distribution.
    pub shape: Shape,
    /// `k=`, with its place.
    pub k: Option<(f64, Span)>,
    /// `dof=`, with its place.
    pub dof: Option<(f64, Span)>,
}

/// The ends of `within`; an open end is `None`.
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct Within {
    /// From the word to the last end.
    pub span: Span,
    /// Lower end.
    pub low: Option<ExprId>,
    /// Upper end.
    pub high: Option<ExprId>,
}

/// One part of a gas: a share and a species.
#[derive(Clone, Debug, PartialEq)]
pub struct GasPart {
    /// The share as written, `%` as its unit.
    pub share: Option<Literal>,
    /// The species by name or formula, blanks folded to one.
    pub species: Text,
}

/// What the shares of a mixture are shares of.
#[derive(Clone, Copy, Debug, PartialEq, Eq, Hash)]
pub enum ShareBasis {
    /// Amount of substance.
    Mole,
    /// Mass.
    Mass,
    /// Volume at the same p and T, the same as by mole for an ideal gas.
    Volume,
}

/// Which model a gas is calculated with.
#[derive(Clone, Copy, Debug, PartialEq, Eq, Hash)]
pub enum Model {
    /// The ideal gas law.
    Ideal,
    /// The reference equation of state.
    Real,
}

/// Which reference conditions.
#[derive(Clone, Copy, Debug, PartialEq, Eq, Hash)]
pub enum ReferenceName {
    /// For `Nm3`.
    Normal,
    /// For `Sm3` and, unless it has its own, `scf`.
    Standard,
    /// For `scf`.
    Scf,
}

/// A piece of prose.
#[derive(Clone, Debug, PartialEq)]
pub enum ProsePiece {
    /// Markdown as written, `{{` and `}}` resolved.
    Text(String),
    /// A live value: `{cold.p in kPa abs}`.
    Live {
        /// From brace to brace.
        span: Span,
        /// The quantity.
        path: Path,
        /// The unit to show it in.
        unit: Option<UnitText>,
    },
}

/// One item of `answer`.
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct AnswerItem {
    /// The whole item.
    pub span: Span,
    /// The quantity.
    pub path: Path,
    /// The unit to show it in.
    pub unit: Option<UnitText>,
    /// How many figures to show.
    pub figures: Option<(u32, Span)>,
}

/// What a statement says.
#[derive(Clone, Debug, PartialEq)]
#[non_exhaustive]
pub enum StatementKind {
    /// `section Title`
    Section {
        /// The title.
        title: Text,
    },
    /// `> Prose`; lines of prose that follow each other are one statement.
    Prose {
        /// Its pieces in order.
        pieces: Vec<ProsePiece>,
    },
    /// `gas NAME = …`
    Gas {
        /// The name.
        name: Named,
        /// One species, or the parts of a mixture.
        parts: Vec<GasPart>,
        /// `by mole`, `by mass`, `by volume`.
        by: Option<(ShareBasis, Span)>,
        /// `, ideal` or `, real`.
        model: Option<(Model, Span)>,
    },
    /// `site altitude = …`
    SiteAltitude {
        /// The altitude.
        value: Literal,
        /// Its uncertainty.
        uncertainty: Option<Uncertainty>,
    },
    /// `site pressure = …`
    SitePressure {
        /// The pressure.
        value: Literal,
        /// Its uncertainty.
        uncertainty: Option<Uncertainty>,
    },
    /// `reference normal at T, p`
    Reference {
        /// Which conditions.
        which: ReferenceName,
        /// The temperature.
        temperature: Literal,
        /// The pressure.
        pressure: Literal,
    },
    /// `given NAME = VALUE`
    Given {
        /// The name.
        name: Named,
        /// The value as written.
        value: Literal,
        /// Its uncertainty.
        uncertainty: Option<Uncertainty>,
    },
    /// `unknown NAME in UNIT within LO .. HI near GUESS`
    Unknown {
        /// The name.
        name: Named,
        /// Its unit.
        unit: Option<UnitText>,
        /// Its bounds.
        within: Option<Within>,
        /// The branch that is meant.
        near: Option<ExprId>,
    },
    /// `let NAME = EXPRESSION in UNIT`
    Let {
        /// The name.
        name: Named,
        /// What it is.
        value: ExprId,
        /// The unit to show it in.
        unit: Option<UnitText>,
    },
    /// `LEFT = RIGHT`
    Relation {
        /// Left side.
        left: ExprId,
        /// Right side.
        right: ExprId,
    },
    /// `state NAME of GAS at X = …, Y = …`
    State {
        /// The name.
        name: Named,
        /// The gas.
        gas: Named,
        /// The properties that fix it.
        at: Vec<(Named, ExprId)>,
    },
    /// `assume [CONDITION] "text" because "reason"`; the text is the description.
    Assume {
        /// The condition to be judged.
        condition: Option<Condition>,
    },
    /// `require CONDITION "text"`; the text is the description.
    Require {
        /// The condition to be met.
        condition: Condition,
    },
    /// `caution [when CONDITION] "text"`; the text is the description.
    Caution {
        /// When it is shown; always where `None`.
        when: Option<Condition>,
    },
    /// `answer A in UNIT, B`
    Answer {
        /// The results that the sheet exists for.
        items: Vec<AnswerItem>,
    },
    /// `correlate A, B r`
    Correlate {
        /// One given.
        a: Path,
        /// The other.
        b: Path,
        /// Their correlation, from -1 to 1.
        r: Literal,
    },
    /// A statement in error; its finding is already made. `declares` is the name that it would have declared, so that
    /// uses of that name stay silent.
    Bad {
        /// The name that it would have declared, where one could be read.
        declares: Option<Named>,
    },
}

/// One statement: one logical line.
#[derive(Clone, Debug, PartialEq)]
pub struct Statement {
    /// From its first word to the end of its last, comments at its end not included.
    pub span: Span,
    /// Its first word (for a relation, an empty range at its start).
    pub word: Span,
    /// What it says.
    pub kind: StatementKind,
    /// The description in quotes.
    pub description: Option<Text>,
    /// `from "source"`
    pub source: Option<Text>,
    /// `because "reason"`
    pub because: Option<Text>,
}

/// The head of the file.
#[derive(Clone, Debug, Default, PartialEq)]
#[non_exhaustive]
pub struct Head {
    /// From the first `---` to the last; `None` without a head.
    pub span: Option<Span>,
    /// `title`
    pub title: Option<Text>,
    /// `document`
    pub document: Option<Text>,
    /// `revision`
    pub revision: Option<Text>,
    /// `purpose`
    pub purpose: Option<Text>,
    /// `limits: {ideal gas: 1 %}` as a ratio (0.01), with its place.
    pub ideal_gas_limit: Option<(f64, Span)>,
    /// `figures: 5`
    pub figures: Option<(u32, Span)>,
    /// `strict: true`
    pub strict: bool,
    /// `coverage: 99 %` as a ratio.
    pub coverage: Option<(f64, Span)>,
    /// `monte_carlo: 1000000`; `auto` is `None` inside.
    pub monte_carlo: Option<(Option<u64>, Span)>,
    /// `seed: 7`
    pub seed: Option<(u64, Span)>,
}

/// A whole sheet as read.
#[derive(Clone, Debug, Default)]
pub struct Tree {
    /// The head.
    pub head: Head,
    /// The statements in the order of the file.
    pub statements: Vec<Statement>,
    /// The arena of expressions.
    pub expressions: Vec<Expr>,
    /// The names of the file.
    pub names: Names,
    /// Comments, from `#` to the end of the physical line, in the order of the file.
    pub comments: Vec<Span>,
}

impl Tree {
    /// The expression of an id of this tree.
    #[must_use]
    pub fn expr(&self, id: ExprId) -> &Expr {
        &self.expressions[id.0 as usize]
    }
}
