//! Expressions: from the pairs of the grammar to the tree.
//!
//! Only brackets nest; chains of operators are put together by their precedence without recursion.

use pest::iterators::{Pair, Pairs};

use super::grammar::Rule;
use super::limits::MOST_OPERATORS;
use super::quantity::NextIfRule;
use super::tree::{BinaryOp, Expr, ExprId, ExprKind, Function, Literal, Named, Path, Tree, Within};
use super::word::{CONSTANTS, EXPRESSION_WORDS_NOT_OFFERED, is_reserved};
use crate::diagnostic::code::{argument_count, missing_operator, reserved_name, too_deep, unit_power, word_not_offered};
use crate::diagnostic::{Diagnostic, Span};

/// What a statement is read into: the tree that grows, and the findings.
pub(crate) struct Reader<'t> {
    /// The whole file.
    pub(crate) text: &'t str,
    /// Where the logical line begins in it.
    pub(crate) offset: usize,
    /// What has been read.
    pub(crate) tree: &'t mut Tree,
    /// What is wrong with it.
    pub(crate) findings: &'t mut Vec<Diagnostic>,
    /// Operators of this statement so far.
    pub(crate) operators: usize,
}

/// An operand on the way to its place: the expression, and where it stands with the brackets around it.
#[derive(Clone, Copy)]
pub(crate) struct Operand {
    pub(crate) id: ExprId,
    pub(crate) outer: Span,
}

/// An operator that waits for its right operand.
#[derive(Clone, Copy)]
enum Waiting {
    Negate(Span),
    Binary(BinaryOp),
}

impl Waiting {
    fn precedence(self) -> u8 {
        match self {
            Self::Binary(BinaryOp::Add | BinaryOp::Subtract) => 1,
            Self::Binary(BinaryOp::Multiply | BinaryOp::Divide) => 2,
            Self::Negate(_) => 3,
            Self::Binary(BinaryOp::Power) => 4,
        }
    }
}

impl<'t> Reader<'t> {
    /// Where a pair stands in the file.
    pub(crate) fn span(&self, pair: &Pair<'_, Rule>) -> Span {
        let span = pair.as_span();
        Span::new(span.start() + self.offset, span.end() + self.offset)
    }

    /// The text of a range of the file.
    pub(crate) fn at(&self, span: Span) -> &'t str {
        span.of(self.text)
    }

    /// Adds a part of an expression.
    pub(crate) fn push(&mut self, span: Span, kind: ExprKind) -> ExprId {
        let id = ExprId(self.tree.expressions.len() as u32);
        self.tree.expressions.push(Expr { span, kind });
        id
    }

    /// Counts an operator; the first one too many is told.
    pub(crate) fn count_operator(&mut self, span: Span) {
        self.operators += 1;
        if self.operators == MOST_OPERATORS + 1 {
            self.findings.push(too_deep::operators(span, MOST_OPERATORS));
        }
    }

    /// Whether the statement holds more operators than it may. Its parts are then not worth keeping.
    pub(crate) fn is_too_deep(&self) -> bool {
        self.operators > MOST_OPERATORS
    }

    /// A name where it is declared: a word of the language is refused.
    pub(crate) fn declared(&mut self, pair: &Pair<'_, Rule>) -> Option<Named> {
        let span = self.span(pair);
        if is_reserved(pair.as_str()) {
            self.findings.push(reserved_name::declared(span, pair.as_str()));
            return None;
        }
        Some(self.named(pair))
    }

    /// A name where it is used or where any word may stand.
    pub(crate) fn named(&mut self, pair: &Pair<'_, Rule>) -> Named {
        Named { name: self.tree.names.intern(pair.as_str()), span: self.span(pair) }
    }

    /// A path; `None`, with its finding made, where it begins with a word that names nothing.
    pub(crate) fn path(&mut self, pair: &Pair<'_, Rule>) -> Option<Path> {
        let span = self.span(pair);
        let text = pair.as_str();
        let (base, field) = text.split_once('.').map_or((text, None), |(base, field)| (base, Some(field)));
        let base_span = Span::new(span.start as usize, span.start as usize + base.len());
        if is_reserved(base) && !CONSTANTS.contains(&base) && !(field.is_some() && matches!(base, "site" | "gas")) {
            self.findings.push(if EXPRESSION_WORDS_NOT_OFFERED.contains(&base) {
                word_not_offered::word(base_span, base)
            } else if Function::of_word(base).is_some() && field.is_none() {
                reserved_name::function_without_brackets(base_span, base)
            } else {
                reserved_name::used(base_span, base)
            });
            return None;
        }
        let names = &mut self.tree.names;
        Some(Path {
            base: Named { name: names.intern(base), span: base_span },
            field: field.map(|field| Named { name: names.intern(field), span: Span::new(base_span.end as usize + 1, span.end as usize) }),
        })
    }

    /// `within LO .. HI`
    pub(crate) fn within(&mut self, pair: Pair<'_, Rule>) -> Within {
        let mut within = Within { span: self.span(&pair), low: None, high: None };
        for pair in pair.into_inner() {
            match pair.as_rule() {
                Rule::low => within.low = pair.into_inner().next().map(|pair| self.expression(pair)),
                Rule::high => within.high = pair.into_inner().next_back().map(|pair| self.expression(pair)),
                _ => {}
            }
        }
        within
    }

    /// An expression: a flat chain of operands, signs and operators.
    pub(crate) fn expression(&mut self, pair: Pair<'_, Rule>) -> ExprId {
        self.chain(pair).id
    }

    /// An expression with the place of the brackets around it.
    pub(crate) fn chain(&mut self, pair: Pair<'_, Rule>) -> Operand {
        let whole = self.span(&pair);
        let mut pairs = pair.into_inner();
        let mut operands: Vec<Operand> = Vec::new();
        let mut waiting: Vec<Waiting> = Vec::new();
        // The sign that stands straight before the next operand, not yet among the waiting.
        let mut sign: Option<(bool, Span)> = None;
        // The operator `^` behind a quantity with a unit that no bracket holds together.
        let mut bare_power: Option<Span> = None;
        while let Some(pair) = pairs.next() {
            match pair.as_rule() {
                Rule::sign => {
                    self.wait_for(&mut waiting, sign.take());
                    sign = Some((pair.as_str() != "+", self.span(&pair)));
                    continue;
                }
                Rule::operator => {
                    let place = self.span(&pair);
                    self.count_operator(place);
                    let operator = operator_of_sign(pair.as_str());
                    if operator == BinaryOp::Power
                        && let Some(last) = operands.last()
                        && let ExprKind::Number(Literal { unit: Some(_), .. }) = self.tree.expr(last.id).kind
                        && last.outer == self.tree.expr(last.id).span
                    {
                        bare_power = Some(last.outer);
                    }
                    let next = Waiting::Binary(operator);
                    while let Some(top) = waiting.last() {
                        if top.precedence() < next.precedence() || operator == BinaryOp::Power && top.precedence() == 4 {
                            break;
                        }
                        self.settle(&mut operands, &mut waiting);
                    }
                    waiting.push(next);
                    continue;
                }
                _ => {}
            }
            let operand = self.operand(pair, &mut pairs, &mut waiting, &mut sign);
            if let Some(base) = bare_power.take() {
                let exponent = operand.outer;
                self.findings.push(unit_power::finding(base, self.at(base), base.to(exponent), self.at(exponent)));
            }
            operands.push(operand);
        }
        while !waiting.is_empty() {
            self.settle(&mut operands, &mut waiting);
        }
        match operands.pop() {
            Some(operand) => operand,
            None => Operand { id: self.push(whole, ExprKind::Bad), outer: whole },
        }
    }

    /// Puts a sign that no number took among the operators that wait.
    fn wait_for(&mut self, waiting: &mut Vec<Waiting>, sign: Option<(bool, Span)>) {
        if let Some((negative, place)) = sign {
            self.count_operator(place);
            if negative {
                waiting.push(Waiting::Negate(place));
            }
        }
    }

    fn operand(
        &mut self,
        pair: Pair<'_, Rule>,
        pairs: &mut Pairs<'_, Rule>,
        waiting: &mut Vec<Waiting>,
        sign: &mut Option<(bool, Span)>,
    ) -> Operand {
        let span = self.span(&pair);
        match pair.as_rule() {
            Rule::quantity => {
                // A sign before a number with a unit belongs to the number, where no operand stands before it.
                let has_unit = pair.clone().into_inner().nth(1).is_some_and(|pair| pair.as_rule() == Rule::unit);
                let own = if has_unit { sign.take() } else { None };
                self.wait_for(waiting, sign.take());
                let (literal, whole) = self.quantity(pair, own);
                let kind = if whole { ExprKind::Number(literal) } else { ExprKind::Bad };
                Operand { id: self.push(literal.span, kind), outer: literal.span }
            }
            Rule::group => {
                self.wait_for(waiting, sign.take());
                let inner = pair.into_inner().find(|pair| pair.as_rule() == Rule::expression);
                let id = match inner {
                    Some(inner) => self.expression(inner),
                    None => self.push(span, ExprKind::Bad),
                };
                Operand { id, outer: span }
            }
            Rule::cond_group => {
                self.wait_for(waiting, sign.take());
                Operand { id: self.value_in_brackets(pair), outer: span }
            }
            _ => {
                self.wait_for(waiting, sign.take());
                match pairs.next_if_rule(Rule::arguments) {
                    Some(arguments) => self.call(&pair, arguments),
                    None => {
                        let kind = self.path(&pair).map_or(ExprKind::Bad, ExprKind::Name);
                        Operand { id: self.push(span, kind), outer: span }
                    }
                }
            }
        }
    }

    fn call(&mut self, callee: &Pair<'_, Rule>, arguments: Pair<'_, Rule>) -> Operand {
        let callee_span = self.span(callee);
        let bracket = self.span(&arguments);
        let span = callee_span.to(bracket);
        let word = callee.as_str();
        if EXPRESSION_WORDS_NOT_OFFERED.contains(&word) {
            self.findings.push(word_not_offered::function(callee_span, word));
            return Operand { id: self.push(span, ExprKind::Bad), outer: span };
        }
        let function = Function::of_word(word);
        let path = if function.is_none() { self.path(callee) } else { None };
        let arguments: Box<[ExprId]> =
            arguments.into_inner().filter(|pair| pair.as_rule() == Rule::expression).map(|pair| self.expression(pair)).collect();
        let kind = match (function, path) {
            (Some(function), _) => {
                let many = matches!(function, Function::Min | Function::Max);
                if many && arguments.len() < 2 || !many && arguments.len() != 1 {
                    self.findings.push(argument_count::finding(span, word, if many { "two or more arguments" } else { "one argument" }));
                    ExprKind::Bad
                } else {
                    ExprKind::Call(function, callee_span, arguments)
                }
            }
            (None, Some(_)) if callee_span.end != bracket.start => {
                let between = Span::new(callee_span.end as usize, bracket.start as usize);
                self.findings.push(missing_operator::before_bracket(span, word, between));
                ExprKind::Bad
            }
            (None, Some(path)) => ExprKind::CallPath(path, arguments),
            (None, None) => ExprKind::Bad,
        };
        Operand { id: self.push(span, kind), outer: span }
    }

    /// Gives the operator that waits last its operands.
    fn settle(&mut self, operands: &mut Vec<Operand>, waiting: &mut Vec<Waiting>) {
        let (Some(operator), Some(right)) = (waiting.pop(), operands.pop()) else { return };
        let (span, kind) = match operator {
            Waiting::Negate(place) => (place.to(right.outer), ExprKind::Negate(right.id)),
            Waiting::Binary(operator) => match operands.pop() {
                Some(left) => (left.outer.to(right.outer), ExprKind::Binary(operator, left.id, right.id)),
                None => (right.outer, ExprKind::Bad),
            },
        };
        let id = self.push(span, kind);
        operands.push(Operand { id, outer: span });
    }
}

fn operator_of_sign(sign: &str) -> BinaryOp {
    match sign {
        "+" => BinaryOp::Add,
        "*" | "×" | "·" | "⋅" => BinaryOp::Multiply,
        "/" => BinaryOp::Divide,
        "^" => BinaryOp::Power,
        _ => BinaryOp::Subtract,
    }
}
