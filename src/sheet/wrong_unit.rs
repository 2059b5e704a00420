//! Finds the unit behind terms that do not agree: the one that would make them agree if it were another.
//!
//! The dimension of one declared unit at a time is taken as unknown, and what the statements of the sheet then say of it is
//! asked of the dimension inference. Where several statements in error agree on another dimension, the mistake is the unit,
//! and it is told there, once. Where one statement is in error, the units that look like one of the right dimension are
//! offered as its cure.

use std::ops::Range;

use crate::diagnostic::{Diagnostic, Span, code};
use crate::syntax::{Literal, StatementKind, UnitText};
use crate::units::{self, Dimension, Rational};

use super::inference::{Equations, Symbolic, solve};
use super::reader::Reader;
use super::{Condition, Expr, ExprId, Origin, QuantityId, RelationOrigin};

/// Most units that are tried in one sheet; with more errors than that the single findings have to do.
const MOST_SUSPECTS: usize = 64;

/// Most statements in error: more of them are the work of a program.
const MOST_MISMATCHES: usize = 100;

/// Most statements that are looked at for all suspects together: a fraction of a second.
pub(super) const MOST_STATEMENTS: usize = 300_000;

/// Most dimensions that one unit is tried with.
const MOST_DEMANDS: usize = 4;

/// Cures beyond which none is worth a guess.
const MOST_CURES: usize = 2;

/// What a statement says of dimensions.
#[derive(Clone, Copy, Debug)]
pub(super) enum Claim {
    /// Both are of one dimension.
    Equal(ExprId, ExprId),
    /// The quantity is of this dimension.
    Shown(QuantityId, Dimension),
}

/// A statement whose terms do not agree.
#[derive(Clone, Debug)]
pub(super) struct Mismatch {
    pub(super) claim: Claim,
    /// Its place.
    pub(super) span: Span,
    /// What is told of it, in the findings.
    pub(super) findings: Range<usize>,
}

/// A unit that may be the wrong one.
#[derive(Clone, Copy, Debug, PartialEq, Eq)]
enum Suspect {
    Quantity(QuantityId),
    Literal(u32, Span),
}

/// What follows where a suspect may be of any dimension.
struct Trial {
    /// Statements that still contradict each other.
    contradictions: usize,
    /// The dimension that the suspect would have.
    dimension: Option<Dimension>,
    /// The dimensions that single statements ask of it.
    demands: Vec<Dimension>,
    /// Beside the mismatches: those that hold then.
    cured: Vec<bool>,
}

/// A suspect with the dimension that cures.
struct Cure {
    suspect: Suspect,
    dimension: Dimension,
    cured: Vec<bool>,
    /// How many contradictions it takes away.
    weight: usize,
}

/// The dimension that a symbol of the trade usually has; capital and small letters count (common practice).
fn usual_dimension(symbol: &str) -> Option<Dimension> {
    let stem = symbol.split('_').next().unwrap_or(symbol).trim_end_matches(|c: char| c.is_ascii_digit());
    Some(match stem {
        "p" | "P" | "dp" => Dimension::PRESSURE,
        "T" | "dT" => Dimension::TEMPERATURE,
        "V" => Dimension::VOLUME,
        "m" => Dimension::MASS,
        "n" => Dimension::AMOUNT,
        "t" => Dimension::TIME,
        "d" | "D" | "L" | "l" => Dimension::LENGTH,
        "A" => Dimension::AREA,
        "rho" => Dimension::DENSITY,
        "M" => Dimension::MOLAR_MASS,
        "w" | "u" => Dimension::VELOCITY,
        _ => return None,
    })
}

impl Reader<'_> {
    /// Remembers that the findings made since `before` tell that a statement does not agree.
    pub(super) fn remember_mismatch(&mut self, before: usize, claim: Claim, span: Span) {
        let told = self.findings.len();
        if self.findings[before.min(told)..].iter().any(|finding| finding.code == code::dimension_mismatch::CODE) {
            self.mismatches.push(Mismatch { claim, span, findings: before..told });
        }
    }

    /// Looks for the units behind the mismatches.
    pub(super) fn wrong_units(&mut self) {
        if self.mismatches.is_empty() || self.mismatches.len() > MOST_MISMATCHES {
            return;
        }
        let definitions = self.definitions();
        let mut gone: Vec<usize> = Vec::new();
        let mut told: Vec<Diagnostic> = Vec::new();
        // Each round takes at least two mismatches away.
        while let Some((cure, cures)) = self.best_cure(&definitions) {
            let Suspect::Quantity(id) = cure.suspect else { break };
            if cure.weight < 2 || cures > 1 || cure.cured.iter().filter(|cured| **cured).count() < 2 {
                break;
            }
            told.push(self.unit_finding(id, &cure));
            self.poisoned[id.0 as usize] = true;
            self.sheet.quantities[id.0 as usize].dimension = cure.dimension;
            let mut cured = cure.cured.into_iter();
            let (solved, left) = std::mem::take(&mut self.mismatches).into_iter().partition(|_| cured.next().unwrap_or(false));
            self.mismatches = left;
            let solved: Vec<Mismatch> = solved;
            gone.extend(solved.into_iter().flat_map(|mismatch| mismatch.findings));
        }
        self.offer_cures(&definitions);
        if gone.is_empty() {
            return;
        }
        let mut at = 0;
        self.findings.retain(|_| {
            at += 1;
            !gone.contains(&(at - 1))
        });
        self.errors = self.errors.saturating_sub(gone.len());
        for finding in told {
            self.report(finding);
        }
    }

    /// The suspect that takes the most contradictions away, and how many do so equally well.
    fn best_cure(&self, definitions: &[Option<ExprId>]) -> Option<(Cure, usize)> {
        if self.mismatches.len() < 2 {
            return None;
        }
        let mut suspects: Vec<Suspect> = Vec::new();
        for mismatch in &self.mismatches {
            for suspect in self.suspects(mismatch, definitions) {
                if matches!(suspect, Suspect::Quantity(_)) && !suspects.contains(&suspect) {
                    suspects.push(suspect);
                }
            }
            if suspects.len() > MOST_SUSPECTS {
                return None;
            }
        }
        let mut cures = self.cures(&suspects);
        let most = cures.iter().map(|cure| cure.weight).max()?;
        cures.retain(|cure| cure.weight == most);
        // Of several that would do equally well, the one that looks like a slip, then the one whose symbol says so, then an input.
        self.prefer(&mut cures, |reader, id, dimension| {
            reader.unit_text(id).is_some_and(|unit| !units::alike(unit.span.of(reader.text), dimension, &[]).is_empty())
        });
        self.prefer(&mut cures, |reader, id, dimension| usual_dimension(&reader.sheet.quantity(id).name) == Some(dimension));
        self.prefer(&mut cures, |reader, id, _| reader.sheet.quantity(id).origin == Origin::Given);
        let equals = cures.len();
        Some((cures.into_iter().next()?, equals))
    }

    fn prefer(&self, cures: &mut Vec<Cure>, fits: impl Fn(&Self, QuantityId, Dimension) -> bool) {
        let fitting = |cure: &Cure| matches!(cure.suspect, Suspect::Quantity(id) if fits(self, id, cure.dimension));
        if cures.iter().any(fitting) {
            cures.retain(fitting);
        }
    }

    /// Those of the suspects that take contradictions away.
    fn cures(&self, suspects: &[Suspect]) -> Vec<Cure> {
        if suspects.is_empty()
            || suspects.len() > MOST_SUSPECTS
            || self.statements_with_claims() * (suspects.len() + 1) > self.statements_left.get()
        {
            return Vec::new();
        }
        let before = self.trial(None, None).contradictions;
        let mut cures = Vec::new();
        for suspect in suspects {
            let mut trial = self.trial(Some(*suspect), None);
            if trial.demands.len() > 1 {
                // Statements disagree, as where two units are wrong: what most of them ask for counts.
                let demands = std::mem::take(&mut trial.demands);
                for dimension in demands.into_iter().take(MOST_DEMANDS) {
                    let other = self.trial(Some(*suspect), Some(dimension));
                    if other.contradictions < trial.contradictions {
                        trial = other;
                    }
                }
            }
            // What has a unit is no pure number by a slip: then the relation lacks a divisor.
            if let Some(dimension) = trial.dimension.filter(|dimension| !dimension.is_none())
                && trial.contradictions < before
            {
                cures.push(Cure { suspect: *suspect, dimension, cured: trial.cured, weight: before - trial.contradictions });
            }
        }
        cures
    }

    /// Beside the quantities: the expression of each `let` that gives no unit.
    fn definitions(&self) -> Vec<Option<ExprId>> {
        let mut definitions = vec![None; self.sheet.quantities.len()];
        for relation in &self.sheet.relations {
            if let (RelationOrigin::Let, Expr::Quantity(id)) = (relation.origin, self.sheet.exprs.get(relation.left))
                && self.inferred.binary_search(&id).is_ok()
            {
                definitions[id.0 as usize] = Some(relation.right);
            }
        }
        definitions
    }

    fn statements_with_claims(&self) -> usize {
        self.mismatches.len() + self.sheet.relations.len() + self.sheet.requirements.len() + self.sheet.answers.len()
    }

    /// The declared units that a mismatch hangs on: of the numbers and quantities in it, and of what an inferred quantity is made of.
    fn suspects(&self, mismatch: &Mismatch, definitions: &[Option<ExprId>]) -> Vec<Suspect> {
        let mut open: Vec<ExprId> = Vec::new();
        let mut found: Vec<Suspect> = Vec::new();
        let mut quantities: Vec<QuantityId> = Vec::new();
        match mismatch.claim {
            Claim::Equal(left, right) => open.extend([right, left]),
            Claim::Shown(id, _) => quantities.push(id),
        }
        let mut seen = 0;
        loop {
            while let Some(expr) = open.pop() {
                match self.sheet.exprs.get(expr) {
                    Expr::Number(_, literal) => {
                        if let Some(info) = self.literals.get(literal as usize)
                            && let Some(span) = info.unit
                        {
                            found.push(Suspect::Literal(literal, span));
                        }
                    }
                    Expr::Quantity(id) if !quantities.contains(&id) => quantities.push(id),
                    _ => open.extend(self.sheet.exprs.parts(expr)),
                }
                if found.len() + quantities.len() > MOST_SUSPECTS {
                    return found;
                }
            }
            let Some(id) = quantities.get(seen).copied() else { return found };
            seen += 1;
            if self.inferred.binary_search(&id).is_ok() {
                open.extend(definitions[id.0 as usize]);
            } else if matches!(self.sheet.quantity(id).origin, Origin::Given | Origin::Let | Origin::Unknown) {
                found.push(Suspect::Quantity(id));
            }
        }
    }

    /// What the statements of the sheet say where one unit may be any.
    fn trial(&self, free: Option<Suspect>, of: Option<Dimension>) -> Trial {
        let n_quantities = self.sheet.quantities.len();
        self.statements_left.set(self.statements_left.get().saturating_sub(self.statements_with_claims()));
        let mut undetermined = self.undetermined.clone();
        for id in &self.inferred {
            undetermined[id.0 as usize] = true;
        }
        let (asked, free_literal) = match free {
            Some(Suspect::Quantity(id)) => {
                undetermined[id.0 as usize] = true;
                (id, None)
            }
            Some(Suspect::Literal(literal, _)) => (QuantityId(n_quantities as u32), Some(literal)),
            None => (QuantityId(u32::MAX), None),
        };
        let mut equations = Equations {
            sheet: &self.sheet,
            literals: &self.literals,
            undetermined: &undetermined,
            free_literal,
            pure: Vec::new(),
            contradictions: 0,
        };
        if let Some(dimension) = of.and_then(|dimension| dimension.power(Rational::whole(-1))) {
            equations.pure.push(Symbolic { base: dimension, unknown: vec![(asked, Rational::ONE)] });
        }
        let mut parts: Vec<(Range<usize>, usize)> = Vec::new();
        for mismatch in &self.mismatches {
            let (from, before) = (equations.pure.len(), equations.contradictions);
            claim(&mut equations, mismatch.claim);
            parts.push((from..equations.pure.len(), equations.contradictions - before));
        }
        for relation in &self.sheet.relations {
            if !matches!(relation.origin, RelationOrigin::Law(..) | RelationOrigin::Atmosphere) {
                claim(&mut equations, Claim::Equal(relation.left, relation.right));
            }
        }
        for clause in self.sheet.assumptions.iter().chain(&self.sheet.requirements).chain(&self.sheet.cautions) {
            if let Some(condition) = &clause.condition {
                compare(&mut equations, condition);
            }
        }
        for (at, quantity) in self.sheet.quantities.iter().enumerate() {
            let id = QuantityId(at as u32);
            for bound in [quantity.low, quantity.high, quantity.near].into_iter().flatten() {
                // A bound in error stands among the mismatches.
                if self.mismatches.iter().any(|mismatch| Some(mismatch.span) == self.sheet.span_of(bound)) {
                    continue;
                }
                let (own, bound) = (known_or_asked(&equations, id), equations.walk(bound));
                equations.equal(Some(&own), bound.as_ref());
            }
        }
        for answer in &self.sheet.answers {
            // Shown in the unit of its own line it says nothing of that unit.
            if answer.shown.unit.name.is_empty() || answer.shown.unit == self.sheet.quantity(answer.quantity).shown.unit {
                continue;
            }
            claim(&mut equations, Claim::Shown(answer.quantity, answer.shown.unit.dimension));
        }
        let Equations { pure, contradictions, .. } = equations;
        let found = solve(pure.clone(), n_quantities + 1);
        let fails = |equation: &Symbolic| {
            let mut base = Some(equation.base);
            for (id, power) in &equation.unknown {
                let Some(dimension) = found[id.0 as usize] else { return false };
                base = base.and_then(|base| base.times(dimension.power(*power)?));
            }
            base.is_none_or(|base| !base.is_none())
        };
        let failing: Vec<bool> = pure.iter().map(fails).collect();
        let cured = parts.into_iter().map(|(range, own)| own == 0 && !range.is_empty() && !failing[range].contains(&true)).collect();
        let mut demands: Vec<Dimension> = Vec::new();
        for equation in &pure {
            if let [(id, power)] = equation.unknown[..]
                && id == asked
                && let Some(dimension) = Rational::new(-power.den(), power.num()).and_then(|power| equation.base.power(power))
                && !demands.contains(&dimension)
            {
                demands.push(dimension);
            }
        }
        Trial {
            demands,
            contradictions: contradictions + failing.iter().filter(|fails| **fails).count(),
            dimension: found.get(asked.0 as usize).copied().flatten(),
            cured,
        }
    }

    /// The unit of the line of a quantity, as written.
    fn unit_text(&self, id: QuantityId) -> Option<UnitText> {
        match &self.tree.statements[self.sheet.quantity(id).statement].kind {
            StatementKind::Given { value, .. } => value.unit,
            StatementKind::Let { unit, .. } | StatementKind::Unknown { unit, .. } => *unit,
            _ => None,
        }
    }

    fn given_value(&self, id: QuantityId) -> Option<&Literal> {
        match &self.tree.statements[self.sheet.quantity(id).statement].kind {
            StatementKind::Given { value, .. } => Some(value),
            _ => None,
        }
    }

    /// The one finding of a unit that several statements speak against.
    fn unit_finding(&self, id: QuantityId, cure: &Cure) -> Diagnostic {
        /// More than these crowd the finding.
        const MOST: usize = 3;
        let quantity = self.sheet.quantity(id);
        let unit = self.unit_text(id);
        let span = unit.map(|unit| unit.whole()).or_else(|| self.given_value(id).map(|value| value.span)).unwrap_or(quantity.span);
        let written = unit.map(|unit| unit.span.of(self.text));
        let (found, wanted) = (quantity.dimension.describe(), cure.dimension.describe());
        let mut finding = code::dimension_mismatch::by_its_uses(span, &quantity.name, written, &found, &wanted);
        let uses = self.mismatches.iter().zip(&cure.cured).filter(|(_, cured)| **cured);
        for (mismatch, _) in uses.take(MOST) {
            finding = finding.related(mismatch.span, format!("{} is asked for here", code::a(&wanted)));
        }
        let near = written.map(|written| self.alike(written, cure.dimension)).unwrap_or_default();
        match (near.as_slice(), unit) {
            ([one], Some(unit)) => match self.replaced(unit, one) {
                Some(replacement) => finding.help(format!("did you mean `{one}`?")).edit(unit.whole(), replacement),
                None => finding.help(format!("did you mean `{one}`?")),
            },
            ([], _) | (_, None) => finding.help(code::dimension_mismatch::units_of(&wanted, &units_of(cure.dimension))),
            (several, _) => finding.help(format!("did you mean {}?", either(several))),
        }
    }

    /// Units of a dimension that are easily written as `written`, those of the sheet first.
    fn alike(&self, written: &str, dimension: Dimension) -> Vec<String> {
        let quantities = self.sheet.quantities.iter().map(|quantity| quantity.shown.unit.name.as_str());
        let in_use: Vec<&str> = quantities
            .chain(self.sheet.literals.iter().map(|literal| literal.unit.split(' ').next().unwrap_or("")))
            .filter(|unit| !unit.is_empty() && *unit != written)
            .collect();
        units::alike(written, dimension, &in_use)
    }

    /// Another unit in the place of one: its basis goes where the new one has none. `None` where a basis is missing.
    fn replaced(&self, unit: UnitText, other: &str) -> Option<String> {
        let needs_basis = units::parse(other).is_ok_and(|unit| unit.needs_basis());
        match unit.basis {
            Some((basis, _)) if needs_basis => Some(format!("{other} {}", basis.word())),
            None if needs_basis => None,
            _ => Some(other.to_owned()),
        }
    }

    /// Adds to every mismatch that is left the units that look like the right one, where they are one or two.
    fn offer_cures(&mut self, definitions: &[Option<ExprId>]) {
        for at in 0..self.mismatches.len() {
            let mismatch = self.mismatches[at].clone();
            let suspects = self.suspects(&mismatch, definitions);
            let mut cures: Vec<(UnitText, String, String)> = Vec::new();
            for cure in self.cures(&suspects).into_iter().filter(|cure| cure.cured[at]) {
                let (unit, owner) = match cure.suspect {
                    Suspect::Quantity(id) => (self.unit_text(id), format!(" of `{}`", self.sheet.quantity(id).name)),
                    Suspect::Literal(_, span) => (Some(UnitText { span, basis: None }), String::new()),
                };
                let Some(unit) = unit else { continue };
                cures.extend(self.alike(unit.span.of(self.text), cure.dimension).into_iter().map(|near| (unit, near, owner.clone())));
            }
            if cures.is_empty() || cures.len() > MOST_CURES {
                continue;
            }
            let said: Vec<String> =
                cures.iter().map(|(unit, near, owner)| format!("with `{near}` in place of `{}`{owner}", unit.span.of(self.text))).collect();
            let help = format!("the terms would agree {}", said.join(" or "));
            let edit = match cures.as_slice() {
                [(unit, near, _)] => self.replaced(*unit, near).map(|replacement| (unit.whole(), replacement)),
                _ => None,
            };
            let range = mismatch.findings;
            let Some(finding) = self.findings[range].iter_mut().find(|finding| finding.code == code::dimension_mismatch::CODE) else {
                continue;
            };
            finding.help = Some(help);
            if let (Some((span, replacement)), None) = (edit, &finding.edit) {
                finding.edit = Some(crate::diagnostic::Edit { span, replacement, safe: false });
            }
        }
    }
}

/// What a claim says, in the equations.
fn claim(equations: &mut Equations<'_>, claim: Claim) {
    let (left, right) = match claim {
        Claim::Equal(left, right) => (equations.walk(left), equations.walk(right)),
        Claim::Shown(id, dimension) => (Some(known_or_asked(equations, id)), Some(Symbolic { base: dimension, unknown: Vec::new() })),
    };
    equations.equal(left.as_ref(), right.as_ref());
}

fn compare(equations: &mut Equations<'_>, condition: &Condition) {
    match condition {
        Condition::Compare { left, right, .. } => claim(equations, Claim::Equal(*left, *right)),
        Condition::And(a, b) | Condition::Or(a, b) => {
            compare(equations, a);
            compare(equations, b);
        }
        Condition::Not(inner) => compare(equations, inner),
    }
}

fn known_or_asked(equations: &Equations<'_>, id: QuantityId) -> Symbolic {
    if equations.undetermined[id.0 as usize] {
        Symbolic { base: Dimension::NONE, unknown: vec![(id, Rational::ONE)] }
    } else {
        Symbolic { base: equations.sheet.quantity(id).dimension, unknown: Vec::new() }
    }
}

/// The commonest units of a dimension.
fn units_of(dimension: Dimension) -> Vec<&'static str> {
    const MOST: usize = 3;
    let quantity = units::quantities().iter().find(|quantity| quantity.dimension == dimension);
    quantity.map_or(Vec::new(), |quantity| quantity.units.iter().take(MOST).map(String::as_str).collect())
}

fn either(units: &[String]) -> String {
    units.iter().map(|unit| format!("`{unit}`")).collect::<Vec<_>>().join(" or ")
}
