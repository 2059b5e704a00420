//! Checks dimensions and kinds: terms that are added, set equal or compared must be of one dimension, and temperatures and
//! pressures must count to a temperature (a pressure) or to a difference.

use crate::diagnostic::{Diagnostic, Span, code};
use crate::syntax::{BinaryOp, Function, StatementKind};
use crate::units::{Dimension, Rational};

use super::reader::Reader;
use super::value::{cut, folded};
use super::wrong_unit::Claim;
use super::{Expr, ExprId, GasFunction, Kind, Origin, QuantityId, RelationOrigin};

/// Rounding allowed where temperatures or pressures are counted.
const COUNT_TOLERANCE: f64 = 1e-9;

/// What usually lies behind two dimensions that differ by this factor.
fn usual_slip(left: Dimension, right: Dimension) -> Option<&'static str> {
    let ratio = left.per(right)?;
    let is = |factor: Dimension| ratio == factor || Dimension::NONE.per(factor) == Some(ratio);
    if is(Dimension::TIME) {
        Some(
            "they differ by a time: an amount stands for a flow (`L` for `L/min`, `kg` for `kg/h`) or an energy for a power (`kJ` for `kW`)",
        )
    } else if is(Dimension::MOLAR_MASS) {
        Some("they differ by a molar mass: `R` is per mole, a gas has its own constant (`n2.R`); `mol` and `kg` need `n2.M` between them")
    } else if is(Dimension::TEMPERATURE) {
        Some("they differ by a temperature: a heat capacity or a gas constant lacks its temperature, or has one too many")
    } else if is(Dimension::PRESSURE) {
        Some("they differ by a pressure: a volume stands for p V, or a pressure for a ratio of pressures")
    } else {
        None
    }
}

/// What is known of an expression: its dimension, and how many temperatures or pressures it counts.
#[derive(Clone, Copy, Debug)]
struct Measure {
    dimension: Dimension,
    /// The least and the most that it may count: they differ where a part may be of either kind. `None` where a part has a
    /// factor of its own.
    count: Option<(f64, f64)>,
    /// A gauge reading is among the terms.
    gauge: bool,
    /// How many absolute values are among the terms.
    absolutes: u32,
}

impl Measure {
    fn of(dimension: Dimension) -> Self {
        Self { dimension, count: None, gauge: false, absolutes: 0 }
    }

    fn of_kind(dimension: Dimension, kind: Kind, gauge: bool) -> Self {
        let (count, absolutes) = match kind {
            Kind::Absolute => (Some((1.0, 1.0)), 1),
            Kind::Difference => (Some((0.0, 0.0)), 0),
            Kind::Either => (Some((0.0, 1.0)), 0),
            Kind::Plain => (None, 0),
        };
        Self { dimension, count, gauge, absolutes }
    }

    fn word(&self) -> Option<&'static str> {
        if self.dimension == Dimension::TEMPERATURE {
            Some("temperature")
        } else if self.dimension == Dimension::PRESSURE {
            Some("pressure")
        } else {
            None
        }
    }
}

impl Reader<'_> {
    /// The kind of every `let` whose unit does not say it, from its expression.
    pub(super) fn infer_kinds(&mut self) {
        let mut defined: Vec<Option<ExprId>> = vec![None; self.sheet.quantities.len()];
        let mut open: Vec<QuantityId> = Vec::new();
        for relation in &self.sheet.relations {
            if relation.origin == RelationOrigin::Let
                && let Expr::Quantity(id) = self.sheet.exprs.get(relation.left)
                && self.sheet.quantity(id).kind == Kind::Either
            {
                defined[id.0 as usize] = Some(relation.right);
                open.push(id);
            }
        }
        open.reverse();
        let mut visited = vec![false; defined.len()];
        while let Some(id) = open.last().copied() {
            let Some(expr) = defined[id.0 as usize] else {
                open.pop();
                continue;
            };
            let before = open.len();
            if !std::mem::replace(&mut visited[id.0 as usize], true) {
                let mut below = Vec::new();
                self.sheet.exprs.quantities(expr, &mut |other| below.push(other));
                open.extend(below.into_iter().filter(|other| defined[other.0 as usize].is_some() && !visited[other.0 as usize]));
            }
            if open.len() > before {
                continue;
            }
            open.pop();
            defined[id.0 as usize] = None;
            let told = self.findings.len();
            let kind = match self.measure(expr).ok().and_then(|measure| self.whole(&measure, expr).ok().flatten()) {
                Some(count) if count > 0.5 => Kind::Absolute,
                Some(_) => Kind::Difference,
                None => Kind::Either,
            };
            // What is wrong with it is told when the relation itself is checked.
            self.findings.truncate(told);
            self.sheet.quantities[id.0 as usize].kind = kind;
        }
    }

    /// Checks every relation; those in error are left out, and what they would have determined is poisoned.
    pub(super) fn check_relations(&mut self) {
        let mut keep = Vec::with_capacity(self.sheet.relations.len());
        for at in 0..self.sheet.relations.len() {
            let relation = self.sheet.relations[at].clone();
            let lawful = matches!(relation.origin, RelationOrigin::Law(..) | RelationOrigin::Atmosphere);
            let before = self.findings.len();
            let sound = lawful || self.has_undetermined(relation.left) || self.has_undetermined(relation.right) || self.agree(&relation);
            if !sound {
                self.remember_mismatch(before, Claim::Equal(relation.left, relation.right), relation.span);
                self.poison_below(relation.left);
                self.poison_below(relation.right);
            }
            keep.push(sound);
        }
        let mut keep = keep.into_iter();
        self.sheet.relations.retain(|_| keep.next().unwrap_or(true));
    }

    fn has_undetermined(&self, expr: ExprId) -> bool {
        let mut found = false;
        self.sheet.exprs.quantities(expr, &mut |id| found |= self.undetermined[id.0 as usize]);
        found
    }

    fn agree(&mut self, relation: &super::Relation) -> bool {
        let (left, right) = (self.measure(relation.left), self.measure(relation.right));
        let (Ok(left), Ok(right)) = (left, right) else { return false };
        if left.dimension != right.dimension {
            let mut finding = self.relation_mismatch(relation, &left, &right);
            if left.dimension.is_none() || right.dimension.is_none() {
                finding = code::dimension_mismatch::bare_number(finding);
            } else if let Some(slip) = usual_slip(left.dimension, right.dimension) {
                finding = finding.fact(slip);
            }
            let finding = self.with_provenance(finding, &[relation.left, relation.right]);
            self.report(finding);
            return false;
        }
        self.sides(relation.span, (&left, relation.left), (&right, relation.right))
    }

    fn relation_mismatch(&self, relation: &super::Relation, left: &Measure, right: &Measure) -> Diagnostic {
        let (left_span, right_span) = (self.place(relation.left), self.place(relation.right));
        let (found, wanted) = (right.dimension.describe(), left.dimension.describe());
        match relation.origin {
            RelationOrigin::Let => {
                let unit = match &self.tree.statements[relation.statement].kind {
                    StatementKind::Let { unit: Some(unit), .. } => unit.span,
                    _ => left_span,
                };
                let what = format!("`{}`", self.words(relation.right));
                code::dimension_mismatch::expected(right_span, &what, &found, &format!("the unit `{}`", unit.of(self.text)), &wanted, unit)
            }
            RelationOrigin::At(_, property) => {
                let what = format!("`{}`", self.words(relation.right));
                let field = property.row().field;
                code::dimension_mismatch::expected(right_span, &what, &found, &format!("the property `{field}`"), &wanted, left_span)
            }
            _ => {
                let (left_text, right_text) = (format!("`{}`", self.words(relation.left)), format!("`{}`", self.words(relation.right)));
                code::dimension_mismatch::terms(
                    relation.span,
                    "relation",
                    (left_span, &left_text, &wanted),
                    (right_span, &right_text, &found),
                )
            }
        }
    }

    /// A number whose unit is spelled like a quantity of the sheet: `2 V` for `2 * V`.
    fn missing_multiplication(&self, side: ExprId) -> Option<String> {
        let Expr::Number(_, literal) = self.sheet.exprs.get(side) else { return None };
        let literal = self.sheet.literals.get(literal as usize)?;
        let name = self.tree.names.find(&literal.unit).filter(|name| self.names.contains_key(name))?;
        let (number, name) = (&literal.number, self.tree.names.text(name));
        Some(format!("a word straight after a number is its unit; for the quantity `{name}` write `{number} * {name}`"))
    }

    /// Adds where the quantities of the terms get their dimension from.
    fn with_provenance(&self, mut finding: Diagnostic, terms: &[ExprId]) -> Diagnostic {
        /// More than these crowd the finding.
        const MOST: usize = 6;
        let mut seen: Vec<QuantityId> = Vec::new();
        for term in terms {
            self.sheet.exprs.quantities(*term, &mut |id| {
                if !seen.contains(&id) {
                    seen.push(id);
                }
            });
        }
        for id in seen.into_iter().take(MOST) {
            let quantity = self.sheet.quantity(id);
            if matches!(quantity.origin, Origin::Given | Origin::Unknown | Origin::Let)
                && finding.related.iter().all(|label| label.span != quantity.span)
            {
                let inferred = quantity.shown.unit.name.is_empty() && quantity.reading.is_none();
                let from = if inferred { self.forced_by(id) } else { None };
                let dimension = quantity.dimension.describe();
                finding = match from {
                    Some(span) => finding.related(span, format!("`{}` gets its dimension, {dimension}, from here", quantity.name)),
                    None => finding.related(quantity.span, format!("`{}` is {}", quantity.name, code::a(&dimension))),
                };
            }
        }
        finding
    }

    /// The first relation in which a quantity stands as the only one that no line gives a unit.
    fn forced_by(&self, id: QuantityId) -> Option<Span> {
        self.sheet
            .relations
            .iter()
            .find(|relation| self.sheet.exprs.mentions(relation.left, id) || self.sheet.exprs.mentions(relation.right, id))
            .map(|relation| relation.span)
    }

    /// Whether the two sides are of one kind, told where not.
    fn sides(&mut self, span: Span, left: (&Measure, ExprId), right: (&Measure, ExprId)) -> bool {
        let (Ok(left_count), Ok(right_count)) = (self.whole(left.0, left.1), self.whole(right.0, right.1)) else { return false };
        let (Some(left_count), Some(right_count), Some(word)) = (left_count, right_count, left.0.word()) else { return true };
        if (left_count - right_count).abs() < 0.5 {
            return true;
        }
        let says = |count: f64| if count > 0.5 { "absolute" } else { "a difference" };
        let places = ((self.place(left.1), says(left_count)), (self.place(right.1), says(right_count)));
        self.report(code::kind_mismatch::sides(span, places.0, places.1, word));
        false
    }

    /// What a whole side counts: 1 for an absolute value, 0 for a difference, `None` where it is not judged.
    fn whole(&mut self, measure: &Measure, expr: ExprId) -> Result<Option<f64>, ()> {
        let (Some(word), Some((least, most))) = (measure.word(), measure.count) else { return Ok(None) };
        let may_be = |count: f64| {
            // What may be of either kind moves the count in whole steps.
            let steps = (count - least).round();
            count >= least - COUNT_TOLERANCE && count <= most + COUNT_TOLERANCE && (least + steps - count).abs() < COUNT_TOLERANCE
        };
        // Absolute pressures alone may be added, as partial pressures are.
        let judged = word == "temperature" || measure.gauge;
        match (may_be(0.0), may_be(1.0)) {
            (true, true) => return Ok(None),
            (true, false) => return Ok((judged || measure.absolutes <= 1).then_some(0.0)),
            (false, true) => return Ok((judged || measure.absolutes <= 1).then_some(1.0)),
            (false, false) => {}
        }
        if !judged {
            return Ok(None);
        }
        let written = crate::units::write_to_place(if least > 1.0 { least } else { most }, -3);
        let written = if written.contains('.') { written.trim_end_matches('0').trim_end_matches('.') } else { &written };
        let finding = code::kind_mismatch::sum(self.place(expr), word, written);
        self.report(finding);
        Err(())
    }

    fn place(&self, expr: ExprId) -> Span {
        self.sheet.span_of(expr).unwrap_or_default()
    }

    fn words(&self, expr: ExprId) -> String {
        cut(&folded(self.place(expr).of(self.text)))
    }

    fn measure(&mut self, id: ExprId) -> Result<Measure, ()> {
        match self.sheet.exprs.get(id) {
            Expr::Number(_, literal) => Ok(match self.literals.get(literal as usize) {
                Some(info) => Measure::of_kind(info.dimension, info.kind, info.gauge),
                None => Measure::of(Dimension::NONE),
            }),
            Expr::Constant(constant) => Ok(Measure::of(constant.dimension())),
            Expr::Quantity(quantity) => {
                let quantity = self.sheet.quantity(quantity);
                let gauge = quantity.shown.basis == Some(crate::syntax::Basis::Gauge);
                Ok(Measure::of_kind(quantity.dimension, quantity.kind, gauge))
            }
            Expr::Negate(inner) => {
                let inner = self.measure(inner)?;
                Ok(Measure { count: inner.count.map(|(least, most)| (-most, -least)), ..inner })
            }
            Expr::Binary(op, a, b) => self.measure_binary(id, op, a, b),
            Expr::Call(function, a, b) => self.measure_call(id, function, a, b),
            Expr::Gas(GasFunction::SaturationPressure, _, a) => self.saturation(a, "p_sat", Dimension::TEMPERATURE, Dimension::PRESSURE),
            Expr::Gas(GasFunction::SaturationTemperature, _, a) => self.saturation(a, "T_sat", Dimension::PRESSURE, Dimension::TEMPERATURE),
            Expr::Gas(..) | Expr::State(..) | Expr::StandardPressure(_) => Ok(Measure::of(Dimension::NONE)),
        }
    }

    fn measure_binary(&mut self, id: ExprId, op: BinaryOp, a: ExprId, b: ExprId) -> Result<Measure, ()> {
        // A gauge literal: the reading and the pressure of the site are one absolute pressure.
        if let Expr::Number(_, literal) = self.sheet.exprs.get(a)
            && op == BinaryOp::Add
            && self.literals.get(literal as usize).is_some_and(|info| info.gauge)
        {
            return Ok(Measure::of_kind(Dimension::PRESSURE, Kind::Absolute, true));
        }
        let (left, right) = (self.measure(a), self.measure(b));
        let (left, right) = (left?, right?);
        let span = self.place(id);
        let beyond = |reader: &mut Self| reader.report(code::power_too_high::expression(span));
        match op {
            BinaryOp::Add | BinaryOp::Subtract => {
                if left.dimension != right.dimension {
                    let (left_text, right_text) = (format!("`{}`", self.words(a)), format!("`{}`", self.words(b)));
                    let (left_dimension, right_dimension) = (left.dimension.describe(), right.dimension.describe());
                    let place = if op == BinaryOp::Add { "sum" } else { "difference" };
                    let mut finding = code::dimension_mismatch::terms(
                        span,
                        place,
                        (self.place(a), &left_text, &left_dimension),
                        (self.place(b), &right_text, &right_dimension),
                    );
                    if [a, b].into_iter().any(|side| matches!(self.sheet.exprs.get(side), Expr::Number(..)))
                        && (left.dimension.is_none() || right.dimension.is_none())
                    {
                        finding = code::dimension_mismatch::bare_number(finding);
                    }
                    if let Some(slip) = usual_slip(left.dimension, right.dimension) {
                        finding = finding.fact(slip);
                    }
                    if let Some(missing) = [a, b].into_iter().find_map(|side| self.missing_multiplication(side)) {
                        finding = finding.help(missing);
                    }
                    let finding = self.with_provenance(finding, &[a, b]);
                    self.report(finding);
                    return Err(());
                }
                let count = left.count.zip(right.count).map(|(left, right)| {
                    if op == BinaryOp::Add { (left.0 + right.0, left.1 + right.1) } else { (left.0 - right.1, left.1 - right.0) }
                });
                Ok(Measure {
                    dimension: left.dimension,
                    count,
                    gauge: left.gauge || right.gauge,
                    absolutes: left.absolutes + right.absolutes,
                })
            }
            BinaryOp::Multiply | BinaryOp::Divide => {
                let dimension =
                    if op == BinaryOp::Multiply { left.dimension.times(right.dimension) } else { left.dimension.per(right.dimension) };
                let Some(dimension) = dimension else {
                    beyond(self);
                    return Err(());
                };
                let is_sum = |expr: ExprId| matches!(self.sheet.exprs.get(expr), Expr::Binary(BinaryOp::Add | BinaryOp::Subtract, ..));
                let (sum, factor) = match (self.sheet.exprs.constant_value(a), self.sheet.exprs.constant_value(b)) {
                    (Some(factor), None) if op == BinaryOp::Multiply && left.dimension.is_none() && is_sum(b) => (right, factor),
                    (None, Some(factor)) if right.dimension.is_none() && is_sum(a) => {
                        (left, if op == BinaryOp::Multiply { factor } else { 1.0 / factor })
                    }
                    _ => return Ok(Measure::of(dimension)),
                };
                // Between the ends of a range that is stretched not every step is met: only a certain count is carried on.
                Ok(Measure {
                    dimension,
                    count: sum.count.filter(|(least, most)| least == most).map(|(count, _)| (count * factor, count * factor)),
                    ..sum
                })
            }
            BinaryOp::Power => {
                if !right.dimension.is_none() {
                    let finding = code::dimension_mismatch::exponent(self.place(b), &right.dimension.describe());
                    self.report(finding);
                    return Err(());
                }
                if left.dimension.is_none() {
                    return Ok(Measure::of(Dimension::NONE));
                }
                let Some(exponent) = self.sheet.exprs.constant_value(b) else {
                    let finding = code::dimension_mismatch::base(self.place(a), &left.dimension.describe());
                    self.report(finding);
                    return Err(());
                };
                match Rational::approximate(exponent).and_then(|exponent| left.dimension.power(exponent)) {
                    Some(dimension) => Ok(Measure::of(dimension)),
                    None => {
                        beyond(self);
                        Err(())
                    }
                }
            }
        }
    }

    fn measure_call(&mut self, id: ExprId, function: Function, a: ExprId, b: Option<ExprId>) -> Result<Measure, ()> {
        let first = self.measure(a);
        let second = b.map(|b| self.measure(b)).transpose();
        let (first, second) = (first?, second?);
        let root = |den: i32| Rational::new(1, den).and_then(|power| first.dimension.power(power)).map(Measure::of);
        match (function, second) {
            (Function::Sqrt | Function::Cbrt, _) => root(if function == Function::Sqrt { 2 } else { 3 }).ok_or_else(|| {
                let finding = code::power_too_high::expression(self.place(id));
                self.report(finding);
            }),
            (Function::Abs, _) => Ok(Measure { count: first.count.filter(|count| *count == (0.0, 0.0)), ..first }),
            (Function::Min | Function::Max, Some(second)) => {
                if first.dimension != second.dimension {
                    let b = b.unwrap_or(a);
                    let (left_text, right_text) = (format!("`{}`", self.words(a)), format!("`{}`", self.words(b)));
                    let (left, right) = (first.dimension.describe(), second.dimension.describe());
                    let finding = code::dimension_mismatch::terms(
                        self.place(id),
                        "comparison",
                        (self.place(a), &left_text, &left),
                        (self.place(b), &right_text, &right),
                    );
                    let finding = self.with_provenance(finding, &[a, b]);
                    self.report(finding);
                    return Err(());
                }
                let count = first.count.zip(second.count).filter(|(a, b)| a == b).map(|(a, _)| a);
                Ok(Measure { count, gauge: first.gauge || second.gauge, absolutes: first.absolutes.max(second.absolutes), ..first })
            }
            _ if first.dimension.is_none() => Ok(Measure::of(Dimension::NONE)),
            _ => {
                let mut finding = code::dimension_mismatch::argument(self.place(a), function.word(), &first.dimension.describe());
                let mut factors = Vec::new();
                self.factors_with_dimension(a, &mut factors);
                if factors.len() > 1 {
                    finding = finding.fact(format!("its factors: {}", factors.join(", ")));
                }
                let finding = self.with_provenance(finding, &[a]);
                self.report(finding);
                Err(())
            }
        }
    }

    /// A function of the saturation line: it takes and gives absolute values.
    fn saturation(&mut self, a: ExprId, word: &str, takes: Dimension, gives: Dimension) -> Result<Measure, ()> {
        let argument = self.measure(a)?;
        let place = self.place(a);
        if argument.dimension != takes {
            self.report(code::dimension_mismatch::argument_of(place, word, &argument.dimension.describe(), &takes.describe()));
            return Err(());
        }
        if argument.count.is_some_and(|(_, most)| most < 0.5) {
            self.report(code::kind_mismatch::argument(place, word, &takes.describe()));
            return Err(());
        }
        Ok(Measure::of_kind(gives, Kind::Absolute, false))
    }

    /// The factors of a product that have a dimension, as written, each with it.
    fn factors_with_dimension(&mut self, expr: ExprId, found: &mut Vec<String>) {
        /// More than these crowd the finding.
        const MOST: usize = 6;
        match self.sheet.exprs.get(expr) {
            Expr::Binary(BinaryOp::Multiply | BinaryOp::Divide, a, b) => {
                self.factors_with_dimension(a, found);
                self.factors_with_dimension(b, found);
            }
            Expr::Negate(inner) => self.factors_with_dimension(inner, found),
            _ => {
                if let Ok(measure) = self.measure(expr)
                    && !measure.dimension.is_none()
                    && found.len() < MOST
                {
                    found.push(format!("`{}` ({})", self.words(expr), measure.dimension.describe()));
                }
            }
        }
    }

    /// Checks the sides of a comparison: dimension and kind. The dimension of both where they agree.
    pub(super) fn check_comparison(&mut self, span: Span, left: ExprId, right: ExprId) -> Option<Dimension> {
        if self.has_undetermined(left) || self.has_undetermined(right) {
            return None;
        }
        let (a, b) = (self.measure(left), self.measure(right));
        let (a, b) = (a.ok()?, b.ok()?);
        if a.dimension != b.dimension {
            let (left_text, right_text) = (format!("`{}`", self.words(left)), format!("`{}`", self.words(right)));
            let (found, wanted) = (a.dimension.describe(), b.dimension.describe());
            let finding = code::dimension_mismatch::terms(
                span,
                "comparison",
                (self.place(left), &left_text, &found),
                (self.place(right), &right_text, &wanted),
            );
            let finding = self.with_provenance(finding, &[left, right]);
            self.report(finding);
            return None;
        }
        self.sides(span, (&a, left), (&b, right)).then_some(a.dimension)
    }

    /// Checks bounds and `near` of every quantity against its dimension.
    pub(super) fn check_bounds(&mut self) {
        for at in 0..self.sheet.quantities.len() {
            let quantity = &self.sheet.quantities[at];
            if self.undetermined[at] {
                continue;
            }
            for bound in [quantity.low, quantity.high, quantity.near].into_iter().flatten() {
                let Ok(measure) = self.measure(bound) else { continue };
                let quantity = &self.sheet.quantities[at];
                if measure.dimension != quantity.dimension {
                    let (found, wanted) = (measure.dimension.describe(), quantity.dimension.describe());
                    let finding = code::dimension_mismatch::expected(
                        self.place(bound),
                        "this bound",
                        &found,
                        &format!("`{}`", quantity.name),
                        &wanted,
                        quantity.span,
                    );
                    let (before, span, claim) =
                        (self.findings.len(), self.place(bound), Claim::Shown(QuantityId(at as u32), measure.dimension));
                    self.report(finding);
                    self.remember_mismatch(before, claim, span);
                    self.poisoned[at] = true;
                }
            }
        }
    }
}
