//! Reads a tree: settles names, units, dimensions and kinds, and turns states into relations.

use std::cell::Cell;
use std::collections::{BTreeMap, HashMap};

use crate::diagnostic::{Diagnostic, Span, code};
use crate::syntax::{ExprKind, Name, Statement, StatementKind, Tree};
use crate::units::{Dimension, Unit};

use super::{ExprId, GasId, Kind, Origin, Property, Quantity, QuantityId, Relation, RelationOrigin, Sheet, ShownUnit, StateId};

/// Errors after which reading stops: they are the work of a program, and more of them help nobody.
const MOST_ERRORS: usize = 1000;

/// Comparisons of names for suggestions in one sheet: a second's worth.
const MOST_COMPARISONS: usize = 1_000_000;

/// What a name stands for.
#[derive(Clone, Copy, Debug, PartialEq, Eq)]
pub(super) enum Meaning {
    Quantity(QuantityId),
    Gas(GasId),
    State(StateId),
    /// Its own line is in error: uses stay silent.
    Poisoned,
}

impl Meaning {
    pub(super) fn word(self) -> &'static str {
        match self {
            Self::Quantity(_) => "quantity",
            Self::Gas(_) => "gas",
            Self::State(_) => "state",
            Self::Poisoned => "name",
        }
    }
}

/// What is known of a written number besides its value.
#[derive(Clone, Copy, Debug)]
pub(super) struct LiteralInfo {
    pub(super) dimension: Dimension,
    pub(super) kind: Kind,
    /// It stands for a gauge reading, to which the pressure of the site is added.
    pub(super) gauge: bool,
    /// Where its unit stands.
    pub(super) unit: Option<Span>,
}

/// The work of reading one sheet.
pub(super) struct Reader<'a> {
    pub(super) tree: &'a Tree,
    pub(super) text: &'a str,
    pub(super) sheet: Sheet,
    pub(super) findings: Vec<Diagnostic>,
    pub(super) names: HashMap<Name, (Meaning, Span)>,
    pub(super) properties: BTreeMap<(StateId, Property), QuantityId>,
    pub(super) gas_constants: BTreeMap<(GasId, &'static str), QuantityId>,
    /// Beside [`Sheet::literals`].
    pub(super) literals: Vec<LiteralInfo>,
    /// Beside [`Sheet::quantities`]: whether the dimension has still to be found.
    pub(super) undetermined: Vec<bool>,
    /// Quantities whose dimension the relations force, in order.
    pub(super) inferred: Vec<QuantityId>,
    /// Statements whose terms are not of one dimension.
    pub(super) mismatches: Vec<super::wrong_unit::Mismatch>,
    /// Statements that may still be looked at for the unit behind them.
    pub(super) statements_left: Cell<usize>,
    /// Beside [`Sheet::quantities`]: whether its line, or a line that it hangs on, is in error.
    pub(super) poisoned: Vec<bool>,
    /// Beside [`Sheet::states`].
    pub(super) poisoned_states: Vec<bool>,
    /// Beside [`Sheet::gases`]; a poisoned gas has no entry in the sheet and is [`Meaning::Poisoned`].
    pub(super) site: Site,
    pub(super) references_missing: [bool; 3],
    pub(super) statement: usize,
    /// Comparisons of names that may still be made for suggestions.
    pub(super) comparisons_left: usize,
    /// Errors told so far.
    pub(super) errors: usize,
    /// Reading ended early because of too many of them.
    pub(super) stopped: bool,
    /// Answers with the unit that each asks for.
    pub(super) pending_answers: Vec<PendingAnswer>,
    /// Live values of prose with the unit that each asks for.
    pub(super) pending_live: Vec<PendingAnswer>,
}

/// A value to be shown, before its dimension is known.
pub(super) struct PendingAnswer {
    pub(super) statement: usize,
    pub(super) span: Span,
    pub(super) quantity: QuantityId,
    pub(super) unit: Option<(ShownUnit, Span)>,
    pub(super) figures: Option<u32>,
}

/// What is known of the site.
#[derive(Clone, Copy, Debug, Default)]
pub(super) struct Site {
    /// Where a `site` line stands, in error or not.
    pub(super) stated: bool,
    /// Whether a gauge pressure without a site has been told.
    pub(super) told: bool,
    /// Its pressure in Pa, where known.
    pub(super) p_pa: Option<f64>,
}

/// Reads `tree`, the tree of `text`. Every statement is judged on its own; the sheet holds what is in order.
#[must_use]
pub fn read(tree: &Tree, text: &str) -> (Sheet, Vec<Diagnostic>) {
    let mut reader = Reader {
        tree,
        text,
        sheet: Sheet { head: tree.head.clone(), ..Sheet::default() },
        findings: Vec::new(),
        names: HashMap::new(),
        properties: BTreeMap::new(),
        gas_constants: BTreeMap::new(),
        pending_answers: Vec::new(),
        pending_live: Vec::new(),
        literals: Vec::new(),
        undetermined: Vec::new(),
        inferred: Vec::new(),
        mismatches: Vec::new(),
        statements_left: Cell::new(super::wrong_unit::MOST_STATEMENTS),
        poisoned: Vec::new(),
        poisoned_states: Vec::new(),
        site: Site::default(),
        references_missing: [false; 3],
        statement: 0,
        comparisons_left: MOST_COMPARISONS,
        errors: 0,
        stopped: false,
    };
    reader.each(Reader::surroundings);
    reader.site_pressure();
    reader.each(Reader::declare);
    reader.each(Reader::relate);
    reader.each(Reader::conclude);
    if reader.stopped {
        return (reader.sheet, reader.findings);
    }
    reader.laws();
    reader.infer_dimensions();
    reader.infer_kinds();
    reader.check_relations();
    reader.check_clauses();
    reader.wrong_units();
    reader.settle_shown_units();
    reader.drop_what_hangs_on_errors();
    // In a sheet with errors every slip may be the shadow of one.
    let read_well = tree.statements.iter().all(|statement| !matches!(statement.kind, StatementKind::Bad { .. }));
    if reader.errors == 0 && read_well && tree.expressions.iter().all(|expr| expr.kind != ExprKind::Bad) {
        reader.slips();
    }
    reader.sheet.poisoned = (0..reader.poisoned.len()).filter(|at| reader.poisoned[*at]).map(|at| QuantityId(at as u32)).collect();
    (reader.sheet, reader.findings)
}

impl<'a> Reader<'a> {
    fn each(&mut self, visit: fn(&mut Self, &'a Statement)) {
        for (at, statement) in self.tree.statements.iter().enumerate() {
            if self.stopped {
                return;
            }
            self.statement = at;
            visit(self, statement);
            if self.errors >= MOST_ERRORS {
                self.stopped = true;
                self.findings.push(code::too_many_errors::stopped(statement.span, self.errors));
            }
        }
    }

    pub(super) fn report(&mut self, finding: Diagnostic) {
        self.errors += usize::from(finding.is_error());
        self.findings.push(finding);
    }

    /// First of all: what every value may need, wherever it stands.
    fn surroundings(&mut self, statement: &'a Statement) {
        match &statement.kind {
            StatementKind::Bad { .. } if statement.word.of(self.text) == "site" => self.site.stated = true,
            StatementKind::SiteAltitude { .. } | StatementKind::SitePressure { .. } => self.site.stated = true,
            StatementKind::Reference { which, temperature, pressure } => self.reference(*which, temperature, pressure, statement),
            _ => {}
        }
    }

    /// The names and what they are, with the values of inputs.
    fn declare(&mut self, statement: &'a Statement) {
        match &statement.kind {
            StatementKind::Gas { name, parts, by, model } => {
                let meaning = match self.gas(statement, *name, parts, *by, *model) {
                    Some(gas) => Meaning::Gas(gas),
                    None => Meaning::Poisoned,
                };
                self.name(name.name, name.span, meaning);
            }
            StatementKind::Given { name, value, uncertainty } => {
                let id = self.given(statement, *name, value, uncertainty.as_ref());
                self.name(name.name, name.span, Meaning::Quantity(id));
            }
            StatementKind::Unknown { name, unit, .. } => {
                let id = self.declared(statement, *name, *unit, Origin::Unknown);
                self.name(name.name, name.span, Meaning::Quantity(id));
            }
            StatementKind::Let { name, unit, .. } => {
                let id = self.declared(statement, *name, *unit, Origin::Let);
                self.name(name.name, name.span, Meaning::Quantity(id));
            }
            StatementKind::State { name, .. } => {
                let id = self.declare_state(*name);
                self.name(name.name, name.span, Meaning::State(id));
            }
            StatementKind::Bad { declares: Some(name) } => {
                self.names.entry(name.name).or_insert((Meaning::Poisoned, name.span));
            }
            _ => {}
        }
    }

    fn name(&mut self, name: Name, span: Span, meaning: Meaning) {
        match self.names.get(&name) {
            None => {
                self.names.insert(name, (meaning, span));
            }
            Some((Meaning::Poisoned, first)) if meaning == Meaning::Poisoned || *first != span => {}
            Some((first_meaning, first)) => {
                let text = self.tree.names.text(name).to_owned();
                let finding = code::name_defined_twice::finding(span, &text, *first, first_meaning.word());
                // Which of the two is meant nobody knows: what hangs on either stays silent.
                if let Meaning::Quantity(id) = *first_meaning {
                    self.poisoned[id.0 as usize] = true;
                }
                if let Meaning::Quantity(id) = meaning {
                    self.poisoned[id.0 as usize] = true;
                }
                if let Meaning::State(id) = meaning {
                    self.poisoned_states[id.0 as usize] = true;
                }
                let first = *first;
                self.names.insert(name, (Meaning::Poisoned, first));
                self.report(finding);
            }
        }
    }

    /// An `unknown` or `let` with its unit.
    fn declared(
        &mut self,
        statement: &Statement,
        name: crate::syntax::Named,
        unit: Option<crate::syntax::UnitText>,
        origin: Origin,
    ) -> QuantityId {
        let shown = unit.map(|unit| self.shown_unit(unit));
        let poisoned = matches!(shown, Some(None));
        let shown = shown.flatten();
        let quantity = self.quantity(self.tree.names.text(name.name).to_owned(), origin, statement, name.span);
        let at = quantity.0 as usize;
        self.poisoned[at] = poisoned;
        self.undetermined[at] = shown.is_none();
        if let Some(shown) = shown {
            let kind = self.kind_of_shown(&shown);
            let entry = &mut self.sheet.quantities[at];
            entry.dimension = shown.unit.dimension;
            entry.kind = kind;
            entry.shown = shown;
        }
        quantity
    }

    /// A new quantity with nothing known of it.
    pub(super) fn quantity(&mut self, name: String, origin: Origin, statement: &Statement, span: Span) -> QuantityId {
        let text = |text: &Option<crate::syntax::Text>| text.as_ref().map_or(String::new(), |text| text.text.clone());
        self.sheet.quantities.push(Quantity {
            name,
            origin,
            statement: self.statement,
            span,
            description: text(&statement.description),
            source: text(&statement.source),
            dimension: Dimension::NONE,
            kind: Kind::Plain,
            shown: ShownUnit { unit: Unit::pure(), basis: None },
            reading: None,
            constant: None,
            low: None,
            high: None,
            near: None,
            bounds_span: span,
        });
        self.undetermined.push(false);
        self.poisoned.push(false);
        QuantityId(self.sheet.quantities.len() as u32 - 1)
    }

    /// Relations, definitions, states: everything that ties quantities.
    fn relate(&mut self, statement: &'a Statement) {
        match &statement.kind {
            StatementKind::Unknown { name, within, near, .. } => {
                if let Some((Meaning::Quantity(id), span)) = self.names.get(&name.name).copied()
                    && span == name.span
                {
                    self.bounds(id, within.as_ref(), *near);
                }
            }
            StatementKind::Let { name, value, .. } => {
                let meaning = self.names.get(&name.name).copied();
                let right = self.lower(*value);
                match (meaning, right) {
                    (Some((Meaning::Quantity(id), span)), Some(right)) if span == name.span && !self.poisoned[id.0 as usize] => {
                        let left = self.expr(super::Expr::Quantity(id), name.span);
                        self.relation(left, right, RelationOrigin::Let, statement.span);
                    }
                    (Some((Meaning::Quantity(id), span)), None) if span == name.span => self.poisoned[id.0 as usize] = true,
                    (_, Some(right)) => self.poison_below(right),
                    _ => {}
                }
            }
            StatementKind::Relation { left, right } => {
                let (left, right) = (self.lower(*left), self.lower(*right));
                match (left, right) {
                    (Some(left), Some(right)) => self.relation(left, right, RelationOrigin::Line, statement.span),
                    (Some(one), None) | (None, Some(one)) => self.poison_below(one),
                    (None, None) => {}
                }
            }
            StatementKind::State { name, gas, at } => self.state(*name, *gas, at),
            StatementKind::Bad { .. } => self.poison_named_in(statement.span),
            _ => {}
        }
    }

    pub(super) fn relation(&mut self, left: ExprId, right: ExprId, origin: RelationOrigin, span: Span) {
        self.sheet.relations.push(Relation { left, right, origin, statement: self.statement, span });
    }

    /// A line that could not be read may have been the one that determines what it names.
    fn poison_named_in(&mut self, span: Span) {
        let words = span.of(self.text).split(|c: char| !(c.is_ascii_alphanumeric() || c == '_'));
        for word in words.filter(|word| !word.is_empty()) {
            if let Some((Meaning::Quantity(id), _)) = self.tree.names.find(word).and_then(|name| self.names.get(&name))
                && !self.sheet.quantity(*id).is_known()
            {
                self.poisoned[id.0 as usize] = true;
            }
        }
    }

    /// The line that would have determined one of these quantities is in error: they stay silent.
    pub(super) fn poison_below(&mut self, expr: ExprId) {
        let mut below = Vec::new();
        self.sheet.exprs.quantities(expr, &mut |id| below.push(id));
        for id in below {
            if !self.sheet.quantity(id).is_known() {
                self.poisoned[id.0 as usize] = true;
            }
        }
    }
}
