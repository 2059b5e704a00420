//! Conditions: from the pairs of the grammar to the tree.
//!
//! The grammar reads a side of a comparison and a whole condition alike, since a bracket shows only at its end which of
//! them it holds. Here it is told where a condition stands in the place of a value, or a value in the place of a condition.

use pest::iterators::Pair;

use super::expression::{Operand, Reader};
use super::grammar::Rule;
use super::tree::{Comparison, Condition, ConditionKind, ExprId, ExprKind};
use crate::diagnostic::Span;
use crate::diagnostic::code::{bad_line, chained_comparison};

/// What a bracket or a side turns out to be.
enum Side {
    Value(Operand),
    Holds(Condition),
}

impl Reader<'_> {
    /// A condition.
    pub(crate) fn condition(&mut self, pair: Pair<'_, Rule>) -> Condition {
        let span = self.span(&pair);
        let side = self.joined(pair);
        self.demand(side, span)
    }

    /// Alternatives joined by `or`, or what is joined by `and`. One alone is what it is.
    fn joined(&mut self, pair: Pair<'_, Rule>) -> Side {
        let whole = self.span(&pair);
        let join = if pair.as_rule() == Rule::condition { ConditionKind::Or } else { ConditionKind::And };
        let mut parts: Vec<Side> = Vec::new();
        for pair in pair.into_inner() {
            match pair.as_rule() {
                Rule::cond_and => parts.push(self.joined(pair)),
                Rule::comparison => parts.push(self.comparison(pair)),
                _ => {
                    let place = self.span(&pair);
                    self.count_operator(place);
                }
            }
        }
        if self.is_too_deep() {
            return Side::Holds(self.bad_condition(whole));
        }
        if parts.len() == 1
            && let Some(only) = parts.pop()
        {
            return only;
        }
        let mut held = parts.into_iter().map(|part| self.demand(part, whole)).collect::<Vec<_>>().into_iter();
        let Some(first) = held.next() else { return Side::Holds(self.bad_condition(whole)) };
        Side::Holds(
            held.fold(first, |left, right| Condition { span: left.span.to(right.span), kind: join(Box::new(left), Box::new(right)) }),
        )
    }

    fn comparison(&mut self, pair: Pair<'_, Rule>) -> Side {
        let whole = self.span(&pair);
        let mut words: Vec<Span> = Vec::new();
        let mut sides: Vec<Side> = Vec::new();
        let mut sign = None;
        for pair in pair.into_inner() {
            match pair.as_rule() {
                Rule::not_word => {
                    let place = self.span(&pair);
                    self.count_operator(place);
                    words.push(place);
                }
                Rule::side => sides.push(self.side(pair)),
                _ => sign = Some(comparison_of_sign(pair.as_str())),
            }
        }
        let mut sides = sides.into_iter();
        let (left, right) = (sides.next(), sides.next());
        let held = match (left, sign, right) {
            (Some(left), Some(sign), Some(right)) => {
                let (left, right) = (self.value(left), self.value(right));
                let span = left.outer.to(right.outer);
                Side::Holds(Condition { span, kind: ConditionKind::Compare(left.id, sign, right.id) })
            }
            (Some(only), _, _) => only,
            (None, _, _) => Side::Holds(self.bad_condition(whole)),
        };
        if words.is_empty() || self.is_too_deep() {
            return held;
        }
        let held = self.demand(held, whole);
        let not = |held: Condition, word: Span| Condition { span: word.to(held.span), kind: ConditionKind::Not(Box::new(held)) };
        Side::Holds(words.into_iter().rev().fold(held, not))
    }

    fn side(&mut self, pair: Pair<'_, Rule>) -> Side {
        let mut inner = pair.clone().into_inner();
        match (inner.next(), inner.next()) {
            (Some(group), None) if group.as_rule() == Rule::cond_group => self.bracket(group),
            _ => Side::Value(self.chain(pair)),
        }
    }

    fn bracket(&mut self, group: Pair<'_, Rule>) -> Side {
        let outer = self.span(&group);
        match group.into_inner().find(|pair| pair.as_rule() == Rule::condition).map(|pair| self.joined(pair)) {
            Some(Side::Value(value)) => Side::Value(Operand { id: value.id, outer }),
            Some(holds) => holds,
            None => Side::Holds(self.bad_condition(outer)),
        }
    }

    /// The value that a bracket holds within an expression.
    pub(crate) fn value_in_brackets(&mut self, group: Pair<'_, Rule>) -> ExprId {
        let side = self.bracket(group);
        self.value(side).id
    }

    /// A value; a condition in its place is told.
    fn value(&mut self, side: Side) -> Operand {
        match side {
            Side::Value(value) => value,
            Side::Holds(condition) => {
                if !self.is_bad(&condition) {
                    self.findings.push(chained_comparison::in_place_of_a_value(condition.span));
                }
                Operand { id: self.push(condition.span, ExprKind::Bad), outer: condition.span }
            }
        }
    }

    /// A condition; a value in its place is told.
    fn demand(&mut self, side: Side, whole: Span) -> Condition {
        match side {
            Side::Holds(condition) => condition,
            Side::Value(value) => {
                if self.tree.expr(value.id).kind != ExprKind::Bad {
                    self.findings.push(bad_line::no_comparison(value.outer));
                }
                self.bad_condition(whole)
            }
        }
    }

    fn is_bad(&self, condition: &Condition) -> bool {
        matches!(condition.kind, ConditionKind::Compare(left, _, _) if self.tree.expr(left).kind == ExprKind::Bad)
    }

    fn bad_condition(&mut self, span: Span) -> Condition {
        let bad = self.push(span, ExprKind::Bad);
        Condition { span, kind: ConditionKind::Compare(bad, Comparison::Less, bad) }
    }
}

fn comparison_of_sign(sign: &str) -> Comparison {
    match sign {
        "<=" | "≤" => Comparison::LessOrEqual,
        ">=" | "≥" => Comparison::GreaterOrEqual,
        ">" => Comparison::Greater,
        _ => Comparison::Less,
    }
}

#[cfg(test)]
mod tests {
    use crate::syntax::{Condition, ConditionKind, StatementKind, parse};

    fn shape(condition: &Condition) -> String {
        match &condition.kind {
            ConditionKind::Compare(_, sign, _) => sign.sign().to_owned(),
            ConditionKind::And(left, right) => format!("({} and {})", shape(left), shape(right)),
            ConditionKind::Or(left, right) => format!("({} or {})", shape(left), shape(right)),
            ConditionKind::Not(inner) => format!("not {}", shape(inner)),
        }
    }

    fn read(condition: &str) -> (String, Vec<(&'static str, String)>) {
        let text = format!("require {condition} \"text\"");
        let (tree, findings) = parse(&text);
        let found = findings.iter().map(|finding| (finding.code, finding.span.of(&text).to_owned())).collect();
        let StatementKind::Require { condition } = &tree.statements[0].kind else { return ("bad".to_owned(), found) };
        (shape(condition), found)
    }

    #[test]
    fn and_binds_before_or_and_brackets_hold_either() {
        assert_eq!(read("a > b or c < d and not e >= f").0, "(> or (< and not >=))");
        assert_eq!(read("(a > b or c < d) and not (not (e >= f))").0, "((> or <) and not not >=)");
        assert_eq!(read("((a + b)) * (c) > -(d)^2").0, ">");
        assert_eq!(read("(((a > b)))").0, ">");
    }

    #[test]
    fn values_and_conditions_do_not_take_each_others_place() {
        assert_eq!(read("a + b").1, [("bad-line", "a + b".to_owned())]);
        assert_eq!(read("a > b and (c)").1, [("bad-line", "(c)".to_owned())]);
        assert_eq!(read("not a").1, [("bad-line", "a".to_owned())]);
        assert_eq!(read("(a > b) * 2 > c").1, [("chained-comparison", "a > b".to_owned())]);
        assert_eq!(read("(a > b) > c").1, [("chained-comparison", "a > b".to_owned())]);
    }
}
