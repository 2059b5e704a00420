//! Statements: from the pairs of one logical line to the tree.

use pest::iterators::{Pair, Pairs};

use super::expression::Reader;
use super::grammar::Rule;
use super::tree::{AnswerItem, GasPart, Literal, Model, Named, ReferenceName, ShareBasis, Statement, StatementKind, Text, UnitText};
use crate::diagnostic::Span;
use crate::diagnostic::code::{missing_text, said_twice};

/// What a statement may end with.
#[derive(Default)]
struct Tail {
    description: Option<Text>,
    source: Option<Text>,
    because: Option<Text>,
}

impl Reader<'_> {
    /// The statement of one logical line, read by the rule of `pair`. `span` is that line, `word` its statement word.
    pub(crate) fn statement(&mut self, pair: Pair<'_, Rule>, span: Span, word: Span) -> Statement {
        let rule = pair.as_rule();
        let mut tail = Tail::default();
        let mut parts: Vec<Pair<'_, Rule>> = Vec::with_capacity(8);
        for pair in pair.into_inner() {
            match pair.as_rule() {
                Rule::description | Rule::source | Rule::reason => self.tail(pair, &mut tail),
                Rule::EOI | Rule::equals | Rule::comma | Rule::plus => {}
                _ => parts.push(pair),
            }
        }
        let mut parts = parts.into_iter();
        if rule != Rule::relation_line {
            parts.next();
        }
        let kind = match rule {
            Rule::gas_line => self.gas(parts),
            Rule::site_line => self.site(parts),
            Rule::reference_line => self.reference(parts),
            Rule::given_line => self.given(parts),
            Rule::unknown_line => self.unknown(parts),
            Rule::let_line => self.let_statement(parts),
            Rule::state_line => self.state(parts),
            Rule::answer_line => Some(self.answer(parts)),
            Rule::correlate_line => self.correlate(parts),
            Rule::relation_line => self.relation(parts),
            _ => {
                if tail.description.is_none() {
                    self.findings.push(missing_text::finding(span, word, self.at(word)));
                }
                let condition = parts.find(|pair| pair.as_rule() == Rule::condition).map(|pair| self.condition(pair));
                match (rule, condition) {
                    (Rule::assume_line, condition) => Some(StatementKind::Assume { condition }),
                    (Rule::caution_line, when) => Some(StatementKind::Caution { when }),
                    (_, Some(condition)) => Some(StatementKind::Require { condition }),
                    (_, None) => None,
                }
            }
        };
        let kind = match kind {
            Some(kind) if !self.is_too_deep() => kind,
            _ => StatementKind::Bad { declares: super::slip::declared_name(self.text, span, self.tree) },
        };
        Statement { span, word, kind, description: tail.description, source: tail.source, because: tail.because }
    }

    fn tail(&mut self, pair: Pair<'_, Rule>, tail: &mut Tail) {
        let place = self.span(&pair);
        let (slot, what) = match pair.as_rule() {
            Rule::source => (&mut tail.source, "the source (`from`)"),
            Rule::reason => (&mut tail.because, "the reason (`because`)"),
            _ => (&mut tail.description, "the description"),
        };
        let Some(string) = pair.into_inner().last() else { return };
        let text = self.string(&string);
        match slot {
            Some(first) => self.findings.push(said_twice::finding(place, what, first.span)),
            None => *slot = Some(text),
        }
    }

    fn string(&self, pair: &Pair<'_, Rule>) -> Text {
        Text { span: self.span(pair), text: resolve(pair.as_str()) }
    }

    fn gas<'i>(&mut self, mut pairs: impl Iterator<Item = Pair<'i, Rule>>) -> Option<StatementKind> {
        let name = self.declared(&pairs.next()?);
        let (mut parts, mut by, mut model) = (Vec::new(), None, None);
        for pair in pairs {
            let place = self.span(&pair);
            match pair.as_rule() {
                Rule::part => parts.push(self.gas_part(pair)),
                Rule::share_basis => {
                    let basis = match pair.into_inner().last().map_or("", |pair| pair.as_str()) {
                        "mass" => ShareBasis::Mass,
                        "volume" => ShareBasis::Volume,
                        _ => ShareBasis::Mole,
                    };
                    if let Some((_, first)) = by.replace((basis, place)) {
                        self.findings.push(said_twice::finding(place, "what the shares are of", first));
                    }
                }
                _ => {
                    let Some(word) = pair.into_inner().last() else { continue };
                    let place = self.span(&word);
                    let written = if word.as_str() == "real" { Model::Real } else { Model::Ideal };
                    if let Some((_, first)) = model.replace((written, place)) {
                        self.findings.push(said_twice::finding(place, "the model of the gas", first));
                    }
                }
            }
        }
        Some(StatementKind::Gas { name: name?, parts, by, model })
    }

    fn gas_part(&mut self, pair: Pair<'_, Rule>) -> GasPart {
        let mut part = GasPart { share: None, species: Text { span: self.span(&pair), text: String::new() } };
        for pair in pair.into_inner() {
            if pair.as_rule() == Rule::share {
                part.share = Some(self.share(pair));
            } else {
                part.species = Text { span: self.span(&pair), text: fold_blanks(pair.as_str()) };
            }
        }
        part
    }

    fn share(&mut self, pair: Pair<'_, Rule>) -> Literal {
        let mut literal = Literal { span: self.span(&pair), digits: self.span(&pair), value: f64::NAN, unit: None, exact: None };
        let mut negative = false;
        for pair in pair.into_inner() {
            match pair.as_rule() {
                Rule::sign => negative = pair.as_str() != "+",
                Rule::number => {
                    literal.digits = self.span(&pair);
                    literal.value = pair.as_str().replace(['−', '–'], "-").parse().unwrap_or(f64::NAN);
                }
                _ => literal.unit = Some(UnitText { span: self.span(&pair), basis: None }),
            }
        }
        let end = literal.unit.map_or(literal.digits, |unit| unit.span);
        literal.span = Span { start: literal.span.start, end: end.end };
        if negative {
            literal.value = -literal.value;
        }
        literal
    }

    fn site<'i>(&mut self, mut pairs: impl Iterator<Item = Pair<'i, Rule>>) -> Option<StatementKind> {
        let what = pairs.next()?.as_rule();
        let value = self.literal(pairs.next()?)?;
        let uncertainty = match pairs.next() {
            Some(pair) => Some(self.uncertainty(pair, &value)?),
            None => None,
        };
        Some(match what {
            Rule::altitude_word => StatementKind::SiteAltitude { value, uncertainty },
            _ => StatementKind::SitePressure { value, uncertainty },
        })
    }

    fn reference<'i>(&mut self, mut pairs: impl Iterator<Item = Pair<'i, Rule>>) -> Option<StatementKind> {
        let which = match pairs.next()?.as_str() {
            "standard" => ReferenceName::Standard,
            "scf" => ReferenceName::Scf,
            _ => ReferenceName::Normal,
        };
        pairs.next()?;
        let temperature = self.literal(pairs.next()?);
        let pressure = self.literal(pairs.next()?);
        Some(StatementKind::Reference { which, temperature: temperature?, pressure: pressure? })
    }

    fn given<'i>(&mut self, mut pairs: impl Iterator<Item = Pair<'i, Rule>>) -> Option<StatementKind> {
        let name = self.declared(&pairs.next()?);
        let value = self.literal(pairs.next()?)?;
        let uncertainty = match pairs.next() {
            Some(pair) => Some(self.uncertainty(pair, &value)?),
            None => None,
        };
        Some(StatementKind::Given { name: name?, value, uncertainty })
    }

    fn unknown<'i>(&mut self, mut pairs: impl Iterator<Item = Pair<'i, Rule>>) -> Option<StatementKind> {
        let name = self.declared(&pairs.next()?);
        let (mut unit, mut within, mut near) = (None, None, None);
        let mut places: [Option<Span>; 3] = [None; 3];
        for pair in pairs {
            let place = self.span(&pair);
            let (slot, what) = match pair.as_rule() {
                Rule::in_unit => (0, "the unit (`in`)"),
                Rule::within => (1, "the range (`within`)"),
                Rule::near => (2, "the guess (`near`)"),
                _ => {
                    self.findings.push(crate::diagnostic::code::word_not_offered::word(place, self.at(place)));
                    continue;
                }
            };
            if let Some(first) = places[slot].replace(place) {
                self.findings.push(said_twice::finding(place, what, first));
                continue;
            }
            match slot {
                0 => unit = self.in_unit(pair),
                1 => within = Some(self.within(pair)),
                _ => near = pair.into_inner().next_back().map(|pair| self.expression(pair)),
            }
        }
        Some(StatementKind::Unknown { name: name?, unit, within, near })
    }

    fn let_statement<'i>(&mut self, mut pairs: impl Iterator<Item = Pair<'i, Rule>>) -> Option<StatementKind> {
        let name = self.declared(&pairs.next()?);
        let value = self.expression(pairs.next()?);
        let unit = pairs.next().and_then(|pair| self.in_unit(pair));
        Some(StatementKind::Let { name: name?, value, unit })
    }

    fn relation<'i>(&mut self, mut pairs: impl Iterator<Item = Pair<'i, Rule>>) -> Option<StatementKind> {
        let left = self.expression(pairs.next()?);
        let right = self.expression(pairs.next()?);
        Some(StatementKind::Relation { left, right })
    }

    fn state<'i>(&mut self, mut pairs: impl Iterator<Item = Pair<'i, Rule>>) -> Option<StatementKind> {
        let name = self.declared(&pairs.next()?);
        pairs.next()?;
        let gas = self.named(&pairs.next()?);
        let mut at = Vec::new();
        for pair in pairs.filter(|pair| pair.as_rule() == Rule::setting) {
            let mut inner = pair.into_inner();
            let (Some(property), Some(value)) = (inner.next(), inner.next_back()) else { continue };
            at.push((self.named(&property), self.expression(value)));
        }
        Some(StatementKind::State { name: name?, gas, at })
    }

    fn answer<'i>(&mut self, pairs: impl Iterator<Item = Pair<'i, Rule>>) -> StatementKind {
        StatementKind::Answer { items: pairs.filter_map(|pair| self.item(pair)).collect() }
    }

    fn item(&mut self, pair: Pair<'_, Rule>) -> Option<AnswerItem> {
        let span = self.span(&pair);
        let mut pairs: Pairs<'_, Rule> = pair.into_inner();
        let path = self.path(&pairs.next()?);
        let (mut unit, mut figures) = (None, None);
        let mut places: [Option<Span>; 2] = [None; 2];
        for pair in pairs {
            let place = self.span(&pair);
            let (slot, what) = if pair.as_rule() == Rule::in_unit { (0, "the unit (`in`)") } else { (1, "the number of figures") };
            if let Some(first) = places[slot].replace(place) {
                self.findings.push(said_twice::finding(place, what, first));
            } else if slot == 0 {
                unit = self.in_unit(pair);
            } else if let Some(number) = pair.into_inner().next_back() {
                figures = super::head::figures(number.as_str(), self.span(&number), self.findings);
            }
        }
        Some(AnswerItem { span, path: path?, unit, figures })
    }

    fn correlate<'i>(&mut self, mut pairs: impl Iterator<Item = Pair<'i, Rule>>) -> Option<StatementKind> {
        let a = self.path(&pairs.next()?);
        let b = self.path(&pairs.next()?);
        let r = self.literal(pairs.next()?);
        Some(StatementKind::Correlate { a: a?, b: b?, r: r? })
    }

    /// The name that a statement in error would have declared.
    pub(crate) fn bad(&mut self, span: Span, word: Span) -> Statement {
        let declares: Option<Named> = super::slip::declared_name(self.text, span, self.tree);
        Statement { span, word, kind: StatementKind::Bad { declares }, description: None, source: None, because: None }
    }
}

/// The text between quotes: escapes resolved, a line end with the blanks around it folded to one blank.
pub(crate) fn resolve(quoted: &str) -> String {
    let inner = quoted.strip_prefix('"').and_then(|rest| rest.strip_suffix('"')).unwrap_or(quoted);
    let mut text = String::with_capacity(inner.len());
    let mut characters = inner.chars().peekable();
    while let Some(character) = characters.next() {
        match character {
            '\\' if matches!(characters.peek(), Some('"' | '\\')) => text.extend(characters.next()),
            '\n' => {
                text.truncate(text.trim_end_matches(|character| super::character::is_blank(character) || character == '\r').len());
                while characters.peek().is_some_and(|next| super::character::is_blank(*next)) {
                    characters.next();
                }
                text.push(' ');
            }
            _ => text.push(character),
        }
    }
    text
}

/// A name of several words with one blank between them.
pub(crate) fn fold_blanks(text: &str) -> String {
    let mut folded = String::with_capacity(text.len());
    for line in text.lines() {
        let code = line.split('#').next().unwrap_or("");
        for word in code.split(|character: char| super::character::is_blank(character) || character == '\r').filter(|word| !word.is_empty())
        {
            if !folded.is_empty() {
                folded.push(' ');
            }
            folded.push_str(word);
        }
    }
    folded
}
