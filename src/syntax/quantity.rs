//! Quantities: numbers with their units, and what is stated of their uncertainty.

use pest::iterators::{Pair, Pairs};

use super::expression::Reader;
use super::grammar::Rule;
use super::tree::{Basis, Literal, Shape, Uncertainty, UnitText, Width};
use crate::diagnostic::Span;
use crate::diagnostic::code::{exact_with_uncertainty, missing_blank, said_twice};

impl Reader<'_> {
    /// A unit and the basis behind it.
    fn unit(&self, pairs: &mut Pairs<'_, Rule>) -> Option<UnitText> {
        let unit = pairs.next_if_rule(Rule::unit)?;
        let basis = pairs.next_if_rule(Rule::basis).map(|pair| (basis_of_word(pair.as_str()), self.span(&pair)));
        Some(UnitText { span: self.span(&unit), basis })
    }

    /// `in UNIT`
    pub(crate) fn in_unit(&self, pair: Pair<'_, Rule>) -> Option<UnitText> {
        let mut pairs = pair.into_inner();
        pairs.next();
        self.unit(&mut pairs)
    }

    /// A number with what stands behind it. A unit that touches its number is told, and the literal is then not whole.
    pub(crate) fn quantity(&mut self, pair: Pair<'_, Rule>, sign: Option<(bool, Span)>) -> (Literal, bool) {
        let whole = self.span(&pair);
        let mut pairs = pair.into_inner();
        let number = pairs.next();
        let digits = number.as_ref().map_or(whole, |number| self.span(number));
        let unit = self.unit(&mut pairs);
        let exact = pairs.next_if_rule(Rule::exact).map(|pair| self.span(&pair));
        let mut value = number_value(self.at(digits));
        let mut span = whole;
        if let Some((negative, place)) = sign {
            span = place.to(span);
            value = if negative { -value } else { value };
        }
        let mut whole_literal = true;
        if let Some(unit) = unit
            && unit.span.start == digits.end
            && !self.at(unit.span).starts_with(['%', '°'])
        {
            self.findings.push(missing_blank::finding(digits, self.at(digits), unit.span, self.at(unit.span)));
            whole_literal = false;
        }
        (Literal { span, digits, value, unit, exact }, whole_literal)
    }

    /// A signed number where no operator can stand. `None` where a finding says why it is none.
    pub(crate) fn literal(&mut self, pair: Pair<'_, Rule>) -> Option<Literal> {
        let mut pairs = pair.into_inner();
        let sign = pairs.next_if_rule(Rule::sign).map(|pair| (pair.as_str() != "+", self.span(&pair)));
        let (literal, whole) = self.quantity(pairs.next()?, sign);
        whole.then_some(literal)
    }

    /// `± A …`. `None` where a finding says why it is none.
    pub(crate) fn uncertainty(&mut self, pair: Pair<'_, Rule>, value: &Literal) -> Option<Uncertainty> {
        let whole = self.span(&pair);
        // The grammar takes the blanks behind the width with it.
        let span = Span { end: whole.start + self.at(whole).trim_end().len() as u32, ..whole };
        if let Some(exact) = value.exact {
            self.findings.push(exact_with_uncertainty::finding(exact, span));
        }
        let mut pairs = pair.into_inner();
        pairs.next();
        let width = self.literal(pairs.next()?);
        let of = match pairs.next_if_rule(Rule::of_word) {
            Some(_) => Some((pairs.next_if_rule(Rule::literal).and_then(|pair| self.literal(pair)))?),
            None => None,
        };
        let width = width?;
        let is_percent = width.unit.is_some_and(|unit| self.at(unit.span) == "%");
        let width = match of {
            Some(of) if is_percent => Width::PercentOfSpan(width, of),
            Some(of) => {
                self.findings.push(exact_with_uncertainty::of_without_percent(width.span, of.span));
                return None;
            }
            None if is_percent => Width::PercentOfValue(width),
            None => Width::Of(width),
        };
        let (mut k, mut dof, mut shape) = (None, None, None);
        for pair in pairs {
            let place = self.span(&pair);
            let slot = match pair.as_rule() {
                Rule::freedom => &mut dof,
                Rule::coverage => &mut k,
                _ => {
                    let written = if pair.as_rule() == Rule::triangular { Shape::Triangular } else { Shape::UShaped };
                    if let Some((_, first)) = shape.replace((written, place)) {
                        self.findings.push(said_twice::finding(place, "the shape of the distribution", first));
                    }
                    continue;
                }
            };
            let number = pair.into_inner().find_map(|pair| if pair.as_rule() == Rule::literal { self.literal(pair) } else { None })?;
            if let Some((_, first)) = slot.replace((number.value, place)) {
                let what = if self.at(place).starts_with('k') { "`k`" } else { "`dof`" };
                self.findings.push(said_twice::finding(place, what, first));
            }
        }
        if let (Some((_, first)), Some((_, place))) = (k, shape) {
            self.findings.push(said_twice::finding(place, "the shape of the distribution", first));
        }
        let shape = shape.map_or(if k.is_some() { Shape::Normal } else { Shape::Rectangular }, |(shape, _)| shape);
        Some(Uncertainty { span, width, shape, k, dof })
    }
}

/// The next pair if it is of a rule.
pub(crate) trait NextIfRule<'i> {
    /// Takes it then.
    fn next_if_rule(&mut self, rule: Rule) -> Option<Pair<'i, Rule>>;
}

impl<'i> NextIfRule<'i> for Pairs<'i, Rule> {
    fn next_if_rule(&mut self, rule: Rule) -> Option<Pair<'i, Rule>> {
        if self.peek().is_some_and(|pair| pair.as_rule() == rule) { self.next() } else { None }
    }
}

fn basis_of_word(word: &str) -> Basis {
    match word {
        "gauge" => Basis::Gauge,
        "diff" => Basis::Difference,
        _ => Basis::Absolute,
    }
}

/// The value of a number as the grammar reads it; infinite where it is too large, zero where it is too small.
pub(crate) fn number_value(digits: &str) -> f64 {
    let value = if digits.is_ascii() { digits.parse() } else { digits.replace(['−', '–'], "-").parse() };
    value.unwrap_or(f64::NAN)
}
