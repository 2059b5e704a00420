//! Assumptions, requirements, cautions, answers, correlations, live values: what a sheet concludes.

use crate::diagnostic::{Span, code};
use crate::syntax::{self, Basis, ConditionKind, ProsePiece, Statement, StatementKind, UnitText};
use crate::units::{Dimension, Unit};

use super::expression::Target;
use super::reader::{PendingAnswer, Reader};
use super::value::{folded, kind_of, si_unit};
use super::wrong_unit::Claim;
use super::{Answer, Clause, Condition, Correlation, Expr, Kind, LiveValue, Origin, Quantity, QuantityId, ShownUnit};

impl Reader<'_> {
    /// Lowers what a statement concludes; units and dimensions are judged later.
    pub(super) fn conclude(&mut self, statement: &Statement) {
        match &statement.kind {
            StatementKind::Assume { condition } => {
                let lowered = condition.as_ref().map(|condition| self.condition(condition));
                if statement.because.is_none() {
                    self.report(code::assumption_without_reason::finding(statement.span));
                }
                if let Some(clause) = self.clause(statement, condition.as_ref(), lowered) {
                    self.sheet.assumptions.push(clause);
                }
            }
            StatementKind::Require { condition } => {
                let lowered = Some(self.condition(condition));
                if let Some(clause) = self.clause(statement, Some(condition), lowered) {
                    self.sheet.requirements.push(clause);
                }
            }
            StatementKind::Caution { when } => {
                let lowered = when.as_ref().map(|condition| self.condition(condition));
                if let Some(clause) = self.clause(statement, when.as_ref(), lowered) {
                    self.sheet.cautions.push(clause);
                }
            }
            StatementKind::Answer { items } => {
                for item in items {
                    let target = self.target(&item.path);
                    let unit = item.unit.map(|unit| (self.shown_unit(unit), unit.whole()));
                    let quantity = match target {
                        Some(Target::Quantity(quantity)) => quantity,
                        Some(Target::Constant(constant)) => {
                            self.report(code::unknown_name::not_a_quantity(
                                item.path.span(),
                                constant.word(),
                                "constant",
                                "a quantity of the sheet",
                            ));
                            continue;
                        }
                        None => continue,
                    };
                    if matches!(unit, Some((None, _))) {
                        continue;
                    }
                    let unit = unit.and_then(|(unit, span)| Some((unit?, span)));
                    let figures = item.figures.map(|(figures, _)| figures);
                    self.pending_answers.push(PendingAnswer { statement: self.statement, span: item.span, quantity, unit, figures });
                }
            }
            StatementKind::Correlate { a, b, r } => self.correlate(statement, a, b, r),
            StatementKind::Prose { pieces } => {
                for piece in pieces {
                    if let ProsePiece::Live { span, path, unit } = piece {
                        self.live(*span, path, *unit);
                    }
                }
            }
            _ => {}
        }
    }

    fn live(&mut self, span: Span, path: &syntax::Path, unit: Option<UnitText>) {
        let target = self.target(path);
        let unit = unit.map(|unit| (self.shown_unit(unit), unit.whole()));
        match target {
            Some(Target::Quantity(quantity)) => {
                if matches!(unit, Some((None, _))) {
                    return;
                }
                let unit = unit.and_then(|(unit, span)| Some((unit?, span)));
                self.pending_live.push(PendingAnswer { statement: self.statement, span, quantity, unit, figures: None });
            }
            Some(Target::Constant(constant)) => {
                self.report(code::unknown_name::not_a_quantity(path.span(), constant.word(), "constant", "a quantity of the sheet"));
            }
            None => {}
        }
    }

    fn clause(
        &mut self,
        statement: &Statement,
        condition: Option<&syntax::Condition>,
        lowered: Option<Option<Condition>>,
    ) -> Option<Clause> {
        // A clause without its text is told where the line was read.
        let description = statement.description.as_ref()?;
        if matches!(lowered, Some(None)) {
            return None;
        }
        let text = |text: &Option<syntax::Text>| text.as_ref().map_or(String::new(), |text| text.text.clone());
        Some(Clause {
            text: description.text.clone(),
            condition: lowered.flatten(),
            condition_text: condition.map_or(String::new(), |condition| folded(condition.span.of(self.text))),
            because: text(&statement.because),
            source: text(&statement.source),
            statement: self.statement,
            span: condition.map_or(statement.span, |condition| condition.span),
        })
    }

    fn condition(&mut self, condition: &syntax::Condition) -> Option<Condition> {
        let mut pair = |a: &syntax::Condition, b: &syntax::Condition| {
            let (a, b) = (self.condition(a), self.condition(b));
            Some((Box::new(a?), Box::new(b?)))
        };
        match &condition.kind {
            ConditionKind::And(a, b) => pair(a, b).map(|(a, b)| Condition::And(a, b)),
            ConditionKind::Or(a, b) => pair(a, b).map(|(a, b)| Condition::Or(a, b)),
            ConditionKind::Not(inner) => Some(Condition::Not(Box::new(self.condition(inner)?))),
            ConditionKind::Compare(left, comparison, right) => {
                let (left, right) = (self.lower(*left), self.lower(*right));
                let unit = ShownUnit { unit: Unit::pure(), basis: None };
                Some(Condition::Compare { left: left?, comparison: *comparison, right: right?, unit })
            }
        }
    }

    fn correlate(&mut self, statement: &Statement, a: &syntax::Path, b: &syntax::Path, r: &syntax::Literal) {
        let mut given = |path: &syntax::Path| match self.target(path)? {
            Target::Quantity(id)
                if matches!(self.sheet.quantity(id).origin, Origin::Given | Origin::SitePressure | Origin::SiteAltitude)
                    && self.sheet.quantity(id).is_known() =>
            {
                Some(id)
            }
            _ => {
                let why = format!("`{}` is not given", path.span().of(self.text));
                self.report(code::correlation_out_of_place::finding(path.span(), &why));
                None
            }
        };
        let (a_id, b_id) = (given(a), given(b));
        let value = self.value(r, "");
        let (Some(a_id), Some(b_id), Some(value)) = (a_id, b_id, value) else { return };
        let why = if a_id == b_id {
            Some((a.span().to(b.span()), "a given is fully correlated with itself"))
        } else if !value.shown.unit.dimension.is_none() || !(-1.0..=1.0).contains(&value.si) {
            Some((r.span, "a correlation coefficient is a number from -1 to 1"))
        } else if self.sheet.correlations.iter().any(|other| (other.a, other.b) == (a_id, b_id) || (other.b, other.a) == (a_id, b_id)) {
            Some((statement.span, "these two are correlated on another line already"))
        } else {
            None
        };
        match why {
            Some((span, why)) => self.report(code::correlation_out_of_place::finding(span, why)),
            None => self.sheet.correlations.push(Correlation { a: a_id, b: b_id, r: value.si, statement: self.statement }),
        }
    }

    /// Judges dimensions and kinds of all that is concluded, and settles the units of margins and answers.
    pub(super) fn check_clauses(&mut self) {
        self.check_bounds();
        for list in 0..3 {
            let clauses = match list {
                0 => std::mem::take(&mut self.sheet.assumptions),
                1 => std::mem::take(&mut self.sheet.requirements),
                _ => std::mem::take(&mut self.sheet.cautions),
            };
            let mut sound = Vec::with_capacity(clauses.len());
            for mut clause in clauses {
                let keeps = match clause.condition.as_mut() {
                    Some(condition) => self.check_condition(condition, clause.span),
                    None => true,
                };
                if keeps {
                    sound.push(clause);
                }
            }
            match list {
                0 => self.sheet.assumptions = sound,
                1 => self.sheet.requirements = sound,
                _ => self.sheet.cautions = sound,
            }
        }
        for pending in std::mem::take(&mut self.pending_answers) {
            if let Some(shown) = self.shown_for(&pending) {
                let PendingAnswer { statement, span, quantity, figures, .. } = pending;
                self.sheet.answers.push(Answer { quantity, shown, figures, statement, span });
            }
        }
        for pending in std::mem::take(&mut self.pending_live) {
            if let Some(shown) = self.shown_for(&pending) {
                let PendingAnswer { statement, span, quantity, .. } = pending;
                self.sheet.live_values.push(LiveValue { statement, span, quantity, shown });
            }
        }
    }

    fn check_condition(&mut self, condition: &mut Condition, span: Span) -> bool {
        match condition {
            Condition::And(a, b) | Condition::Or(a, b) => {
                let (a, b) = (self.check_condition(a, span), self.check_condition(b, span));
                a && b
            }
            Condition::Not(inner) => self.check_condition(inner, span),
            Condition::Compare { left, right, unit, .. } => {
                let place = self.sheet.span_of(*left).unwrap_or(span).to(self.sheet.span_of(*right).unwrap_or(span));
                let before = self.findings.len();
                let Some(dimension) = self.check_comparison(place, *left, *right) else {
                    self.remember_mismatch(before, Claim::Equal(*left, *right), place);
                    return false;
                };
                *unit =
                    self.unit_of_side(*right).or_else(|| self.unit_of_side(*left)).unwrap_or_else(|| si_unit(dimension, Kind::Absolute));
                true
            }
        }
    }

    /// The unit of a side that is one written value or one quantity.
    fn unit_of_side(&self, side: super::ExprId) -> Option<ShownUnit> {
        match self.sheet.exprs.get(side) {
            Expr::Number(_, literal) if literal != u32::MAX => self.unit_of_literal(side),
            Expr::Binary(syntax::BinaryOp::Add, a, _) if matches!(self.sheet.exprs.get(a), Expr::Number(_, literal) if self.literals.get(literal as usize).is_some_and(|info| info.gauge)) => {
                self.unit_of_literal(a)
            }
            Expr::Quantity(id) => {
                let shown = &self.sheet.quantity(id).shown;
                (!shown.unit.name.is_empty() || self.sheet.quantity(id).dimension.is_none()).then(|| shown.clone())
            }
            _ => None,
        }
    }

    fn unit_of_literal(&self, side: super::ExprId) -> Option<ShownUnit> {
        let Expr::Number(_, literal) = self.sheet.exprs.get(side) else { return None };
        let text = &self.sheet.literals.get(literal as usize)?.unit;
        let mut words = text.split(' ');
        let unit = words.next().unwrap_or("");
        let basis = match words.next() {
            Some("gauge") => Some(Basis::Gauge),
            Some("abs") => Some(Basis::Absolute),
            Some("diff") => Some(Basis::Difference),
            _ => None,
        };
        if unit.is_empty() {
            return Some(ShownUnit { unit: Unit::pure(), basis: None });
        }
        let mut parsed = self.with_references(crate::units::parse(unit).ok()?).ok()?;
        if basis == Some(Basis::Difference) {
            parsed = parsed.interval();
        }
        Some(ShownUnit { unit: parsed, basis })
    }

    /// The unit that an answer or a live value is shown in; `None` where it does not fit, which is told.
    fn shown_for(&mut self, pending: &PendingAnswer) -> Option<ShownUnit> {
        let at = pending.quantity.0 as usize;
        if self.undetermined[at] {
            return None;
        }
        let quantity = &self.sheet.quantities[at];
        let Some((shown, span)) = &pending.unit else {
            return Some(self.own_unit(quantity).unwrap_or_else(|| ShownUnit { unit: Unit::pure(), basis: None }));
        };
        if shown.unit.dimension != quantity.dimension {
            let (name, found, wanted) = (quantity.name.clone(), quantity.dimension.describe(), shown.unit.dimension.describe());
            let declared = quantity.span;
            let finding = code::dimension_mismatch::expected(
                *span,
                &format!("`{name}`"),
                &found,
                &format!("the unit `{}`", shown.unit.name),
                &wanted,
                *span,
            )
            .related(declared, format!("`{name}` is {}", code::a(&found)));
            let (before, claim) = (self.findings.len(), Claim::Shown(pending.quantity, shown.unit.dimension));
            self.report(finding);
            self.remember_mismatch(before, claim, pending.span);
            return None;
        }
        let asked = kind_of(&shown.unit, shown.basis);
        let says =
            |kind: Kind, word: &str| if kind == Kind::Absolute { format!("an absolute {word}") } else { format!("a {word} difference") };
        let (kind, word) = (quantity.kind, if quantity.dimension == Dimension::PRESSURE { "pressure" } else { "temperature" });
        if matches!((kind, asked), (Kind::Absolute, Kind::Difference) | (Kind::Difference, Kind::Absolute)) {
            let finding = code::kind_mismatch::shown(pending.span, &says(kind, word), &says(asked, word), *span);
            self.report(finding);
            return None;
        }
        Some(shown.clone())
    }

    /// The unit of the line of a quantity, where it has one.
    fn own_unit(&self, quantity: &Quantity) -> Option<ShownUnit> {
        let states_unit = match quantity.origin {
            Origin::Given | Origin::SitePressure | Origin::SiteAltitude | Origin::GasConstant(_) => true,
            Origin::Unknown | Origin::Let => !quantity.shown.unit.name.is_empty() || quantity.dimension.is_none(),
            Origin::Property(..) => false,
        };
        states_unit.then(|| quantity.shown.clone())
    }

    /// A quantity without a unit of its own is shown in that of the first answer that shows it, else in SI.
    pub(super) fn settle_shown_units(&mut self) {
        let mut first: Vec<Option<ShownUnit>> = vec![None; self.sheet.quantities.len()];
        for answer in &self.sheet.answers {
            let entry = &mut first[answer.quantity.0 as usize];
            let shows_unit = !answer.shown.unit.name.is_empty() || self.sheet.quantity(answer.quantity).dimension.is_none();
            if entry.is_none() && shows_unit {
                *entry = Some(answer.shown.clone());
            }
        }
        for (at, answered) in first.iter_mut().enumerate() {
            let quantity = &self.sheet.quantities[at];
            if self.own_unit(quantity).is_none() {
                let shown = answered.take().unwrap_or_else(|| si_unit(quantity.dimension, quantity.kind));
                self.sheet.quantities[at].shown = shown;
            }
        }
        let settled: Vec<ShownUnit> = self.sheet.quantities.iter().map(|quantity| quantity.shown.clone()).collect();
        let settle = |id: QuantityId, shown: &mut ShownUnit| {
            if shown.unit.name.is_empty() {
                *shown = settled[id.0 as usize].clone();
            }
        };
        for answer in &mut self.sheet.answers {
            settle(answer.quantity, &mut answer.shown);
        }
        for live in &mut self.sheet.live_values {
            settle(live.quantity, &mut live.shown);
        }
    }

    /// Leaves out relations that hang on a line in error, and what they would have determined with them.
    pub(super) fn drop_what_hangs_on_errors(&mut self) {
        if !self.poisoned.contains(&true) {
            return;
        }
        loop {
            let before = self.sheet.relations.len();
            let mut dropped = Vec::new();
            let (sheet, poisoned) = (&mut self.sheet, &self.poisoned);
            let exprs = &sheet.exprs;
            sheet.relations.retain(|relation| {
                let mut hangs = false;
                for side in [relation.left, relation.right] {
                    exprs.quantities(side, &mut |id| hangs |= poisoned[id.0 as usize]);
                }
                if hangs {
                    dropped.push((relation.left, relation.right));
                }
                !hangs
            });
            if self.sheet.relations.len() == before {
                return;
            }
            for (left, right) in dropped {
                self.poison_below(left);
                self.poison_below(right);
            }
        }
    }
}
