//! The finding of a line that its rule cannot read.

use super::statement_word::blanks_before;
use super::token::{Token, TokenKind, tokens};
use super::{expected, number, text, unit};
use crate::diagnostic::code::{
    bad_line, chained_comparison, foreign_sign, given_expression, indented_line, misplaced_uncertainty, missing_equals, missing_operator,
    one_sided_uncertainty, reserved_name, said_twice, too_deep, too_long, unbalanced_bracket, unknown_word, word_not_offered, wrong_equals,
};
use crate::diagnostic::{Diagnostic, Span, nearest};
use crate::syntax::grammar::Rule;
use crate::syntax::limits::{DEEPEST_BRACKETS, LONGEST_LINE};
use crate::syntax::line::{Fault, Line};
use crate::syntax::word::{CONSTANTS, EXPRESSION_WORDS_NOT_OFFERED, is_reserved, starts_statement};

/// Where a rule stopped reading a line.
pub(crate) struct Stop<'a> {
    /// The rule.
    pub(crate) rule: Rule,
    /// The byte of the file.
    pub(crate) at: u32,
    /// What was tried there.
    pub(crate) tried: &'a [Rule],
}

/// What is wrong with a line by its quotes, brackets and length.
pub(crate) fn fault(file: &str, line: &Line, fault: Fault) -> Diagnostic {
    let one = |at: u32| Span { start: at, end: at + 1 };
    match fault {
        Fault::UnclosedText(at) => text::unclosed(file, line.span, at),
        Fault::UnclosedBracket(at) => unbalanced_bracket::unclosed(one(at), one(at).of(file), line.span),
        Fault::UnopenedBracket(at) => unbalanced_bracket::unopened(one(at), one(at).of(file)),
        Fault::MismatchedBracket(open, close) => {
            unbalanced_bracket::mismatched(one(open), one(open).of(file), one(close), one(close).of(file))
        }
        Fault::TooDeep(at) => too_deep::brackets(one(at), DEEPEST_BRACKETS),
        Fault::TooLong => {
            let start = line.span.start as usize;
            let shown = file[start..].chars().take(20).take_while(|character| *character != '\n').map(char::len_utf8).sum::<usize>();
            too_long::line(Span::new(start, start + shown), LONGEST_LINE)
        }
        Fault::NothingAbove => indented_line::nothing_above(line.word, blanks_before(file, line.span.start as usize)),
    }
}

/// Says why `line` cannot be read and what would cure it.
pub(crate) fn explain(file: &str, line: Span, stop: &Stop<'_>) -> Diagnostic {
    let found = tokens(file, line);
    let index = found.iter().position(|token| token.span.end > stop.at).unwrap_or(found.len());
    let look = Look { file, line, stop, tokens: &found, index };
    look.foreign()
        .or_else(|| look.indented_statement())
        .or_else(|| text::look(&found, index, line))
        .or_else(|| look.not_offered())
        .or_else(|| unit::look(&found, index))
        .or_else(|| number::look(&found, index))
        .or_else(|| look.uncertainty())
        .or_else(|| look.comparison())
        .or_else(|| look.equals())
        .or_else(|| look.other_word())
        .or_else(|| look.misspelt_word())
        .or_else(|| look.missing_word())
        .or_else(|| look.given_expression())
        .or_else(|| look.missing_operator())
        .or_else(|| look.reserved())
        .unwrap_or_else(|| look.expected())
}

/// A line in error and the place where reading stopped.
struct Look<'a> {
    file: &'a str,
    line: Span,
    stop: &'a Stop<'a>,
    tokens: &'a [Token<'a>],
    /// The token at which reading stopped; one past the last where the line ends too early.
    index: usize,
}

impl<'a> Look<'a> {
    fn here(&self) -> Option<&'a Token<'a>> {
        self.tokens.get(self.index)
    }

    fn before(&self) -> Option<&'a Token<'a>> {
        self.index.checked_sub(1).map(|index| &self.tokens[index])
    }

    fn tried(&self, rule: Rule) -> bool {
        self.stop.tried.contains(&rule)
    }

    /// Signs of other notations: `==`, `**`, `:=`, `!=`, `²`.
    fn foreign(&self) -> Option<Diagnostic> {
        let here = self.here()?;
        let in_condition = matches!(self.stop.rule, Rule::require_line | Rule::assume_line | Rule::caution_line);
        if in_condition && here.is_mark(&["=", "=="]) {
            return Some(foreign_sign::equality_in_condition(here.span, here.text));
        }
        if here.kind != TokenKind::Mark {
            return None;
        }
        let cure = match here.text {
            "==" | ":=" => "=",
            ":" if self.tried(Rule::equals) => "=",
            "**" => "^",
            "=<" | "≦" => "<=",
            "=>" | "≧" => ">=",
            "&&" => "and",
            "||" => "or",
            "÷" => "/",
            "²" => "^2",
            "³" => "^3",
            "!" if self.tried(Rule::not_word) => "not",
            "!=" | "<>" | "≠" => return Some(foreign_sign::inequality(here.span, here.text)),
            "√" => return Some(foreign_sign::root(here.span)),
            ";" => return Some(foreign_sign::semicolon(here.span)),
            _ => return None,
        };
        Some(foreign_sign::finding(here.span, here.text, cure))
    }

    /// A statement word that begins an indented line.
    fn indented_statement(&self) -> Option<Diagnostic> {
        let here = self.here()?;
        let blanks = blanks_before(self.file, here.span.start as usize);
        let first = blanks.start > self.line.start && blanks.of(self.file).trim().is_empty();
        (here.kind == TokenKind::Word && starts_statement(here.text) && first)
            .then(|| indented_line::statement(here.span, here.text, blanks))
    }

    /// `if`, `integral(`, `start(` and what else a later version of the tool reads.
    fn not_offered(&self) -> Option<Diagnostic> {
        let end = (self.index + 1).min(self.tokens.len());
        let first = usize::from(self.stop.rule != Rule::relation_line);
        let mut tokens = self.tokens[..end].iter().enumerate().skip(first);
        let (_, token) = tokens.find(|(index, token)| {
            token.kind == TokenKind::Word
                && EXPRESSION_WORDS_NOT_OFFERED.contains(&token.text)
                && (*index == 0 || !self.tokens[index - 1].is_mark(&["."]) && !starts_statement(self.tokens[index - 1].text))
        })?;
        Some(word_not_offered::word(token.span, token.text))
    }

    /// `±` where none can stand, `+/-`, and limits that differ.
    fn uncertainty(&self) -> Option<Diagnostic> {
        let here = self.here()?;
        if let Some(first) = self.tokens[..self.index].iter().find(|token| token.is_mark(&["±", "+-"]))
            && here.is_mark(&["±", "+-", "+/-"])
        {
            return Some(said_twice::finding(here.span, "the uncertainty", first.span));
        }
        let takes_one = matches!(self.stop.rule, Rule::given_line | Rule::site_line);
        if here.is_mark(&["+/-"]) && takes_one {
            return Some(foreign_sign::finding(here.span, here.text, "±"));
        }
        if here.is_mark(&["±", "+/-", "+-"]) && !takes_one {
            return Some(misplaced_uncertainty::finding(here.span));
        }
        let one_sided = takes_one && self.index > 3 && here.is_mark(&["+", "-", "−", "–", "/"]);
        let rest = self.tokens.get(self.index + 1..).unwrap_or(&[]);
        let stops = rest.iter().position(|token| token.kind == TokenKind::Text).unwrap_or(rest.len());
        let other = rest[..stops].iter().rfind(|token| token.is_mark(&["+", "-", "−", "–"]));
        match other {
            None if one_sided && self.tokens[..self.index].iter().any(|token| token.is_mark(&["±", "+-"])) => {
                let end = rest[..stops].last().map_or(here.span, |token| token.span);
                Some(one_sided_uncertainty::finding(here.span.to(end)))
            }
            Some(other) if one_sided && other.text != here.text => {
                let end = rest[..stops].last().map_or(other.span, |token| token.span);
                Some(one_sided_uncertainty::finding(here.span.to(end)))
            }
            _ => None,
        }
    }

    /// `1 < x < 2`
    fn comparison(&self) -> Option<Diagnostic> {
        const SIGNS: &[&str] = &["<", "<=", ">", ">=", "≤", "≥"];
        let here = self.here().filter(|token| token.is_mark(SIGNS))?;
        if matches!(self.stop.rule, Rule::require_line | Rule::assume_line | Rule::caution_line) {
            let first = self.tokens[..self.index].iter().rfind(|token| token.is_mark(SIGNS))?;
            let middle = Span { start: first.span.end, end: here.span.start }.of(self.file).trim();
            return Some(chained_comparison::finding(here.span, middle, first.span));
        }
        Some(chained_comparison::no_condition(here.span, here.text))
    }

    /// No `=`, or one too many.
    fn equals(&self) -> Option<Diagnostic> {
        let mut depth = 0_usize;
        let mut signs = Vec::new();
        for (index, token) in self.tokens.iter().enumerate() {
            match token.text {
                "(" => depth += 1,
                ")" => depth = depth.saturating_sub(1),
                "=" if depth == 0 && !(index > 0 && matches!(self.tokens[index - 1].text, "k" | "dof")) => signs.push(token.span),
                _ => {}
            }
        }
        match self.stop.rule {
            Rule::relation_line => match signs.as_slice() {
                [] if self.tried(Rule::equals) => Some(wrong_equals::none(self.line, self.at_or_end())),
                [first, second, ..] if self.stop.at >= second.start => Some(wrong_equals::several(*second, *first)),
                _ => None,
            },
            Rule::given_line | Rule::let_line | Rule::gas_line | Rule::site_line => {
                if self.tried(Rule::equals) && self.index == 2 {
                    let here = self.here()?;
                    let sign = here.is_mark(&["-", "−", "–", "("]) && !self.tokens[1].touches(here);
                    let fits = here.kind != TokenKind::Mark || sign;
                    return fits.then(|| missing_equals::finding(here.span, self.tokens[1].text));
                }
                match signs.as_slice() {
                    [first, second, ..] if self.stop.at >= first.end => Some(wrong_equals::several(*second, *first)),
                    _ => None,
                }
            }
            _ => None,
        }
    }

    /// A word between the parts of a statement that is spelt wrong.
    fn misspelt_word(&self) -> Option<Diagnostic> {
        let here = self.here().filter(|token| token.kind == TokenKind::Word)?;
        let words = expected::words(self.stop.tried);
        // Behind a text only the words of the tail can stand, whatever was meant.
        let near = nearest(here.text, words.iter().copied());
        if let Some(near) = near.first() {
            return Some(unknown_word::near(here.span, here.text, near));
        }
        let choice = matches!(self.stop.tried, [Rule::reference_name | Rule::share_basis_name | Rule::model_name])
            || self.stop.rule == Rule::site_line && self.index == 1;
        choice.then(|| unknown_word::choice(here.span, here.text, &words))
    }

    /// `in`, `..` or a comma that is said otherwise: `2 m as mm`, `p = 1 bar abs and T = 300 K`.
    fn other_word(&self) -> Option<Diagnostic> {
        let here = self.here()?;
        if self.tried(Rule::dots) && (here.is_word("to") || here.is_mark(&["…", "-", "–"])) {
            return Some(unknown_word::near(here.span, here.text, ".."));
        }
        let shows = matches!(self.stop.rule, Rule::let_line | Rule::answer_line | Rule::unknown_line);
        if (shows || self.tried(Rule::in_unit) || self.tried(Rule::in_word)) && (here.is_word("as") || here.is_word("to")) && self.index > 1
        {
            return Some(unknown_word::near(here.span, here.text, "in"));
        }
        let listed = match self.stop.rule {
            Rule::state_line => "the properties of a state",
            Rule::answer_line => "answers",
            Rule::correlate_line => "the two inputs",
            Rule::reference_line => "temperature and pressure",
            _ => return None,
        };
        let before = self.before().filter(|_| self.index > 1 && (here.is_word("and") || here.is_mark(&["&", "+"])))?;
        let follows = self.tokens.get(self.index + 1)?;
        let listed_next = follows.kind != TokenKind::Text
            && (self.stop.rule != Rule::state_line || self.tokens[..self.index].iter().any(|token| token.is_word("at")));
        let gap = Span { start: before.span.end, end: here.span.end };
        listed_next.then(|| unknown_word::comma(here.span, here.text, listed, gap))
    }

    /// A comma or a word that is left out.
    fn missing_word(&self) -> Option<Diagnostic> {
        let here = self.here()?;
        if here.kind != TokenKind::Word || is_reserved(here.text) {
            return None;
        }
        let next_is_equals = self.tokens.get(self.index + 1).is_some_and(|next| next.is_mark(&["="]));
        let word = match self.stop.rule {
            Rule::state_line if next_is_equals && self.tried(Rule::comma) => ", ",
            Rule::answer_line | Rule::correlate_line if self.tried(Rule::comma) => ", ",
            Rule::unknown_line if (self.tried(Rule::in_unit) || self.tried(Rule::in_word)) && self.index == 2 => " in ",
            Rule::state_line if self.tried(Rule::of_word) => " of ",
            _ => return None,
        };
        let gap = Span { start: self.before()?.span.end, end: here.span.start };
        let expected = format!("`{}`", word.trim());
        let finding = bad_line::finding(here.span, &format!("`{}`", self.shown(here)), &format!("{expected} before it"));
        Some(finding.help(format!("put {expected} before `{}`", self.shown(here))).edit(gap, word))
    }

    /// A token as a finding can show it.
    fn shown(&self, token: &Token<'_>) -> String {
        token.text.lines().next().unwrap_or("").chars().take(40).collect()
    }

    /// A given whose value has to be calculated.
    fn given_expression(&self) -> Option<Diagnostic> {
        if self.stop.rule != Rule::given_line || self.tokens.get(2).is_none_or(|token| token.text != "=") {
            return None;
        }
        let here = self.here()?;
        let operator = here.is_mark(&["+", "-", "−", "–", "*", "×", "·", "⋅", "/", "^"]) && self.index > 3;
        let operand = self.index == 3 && (here.kind == TokenKind::Word && !is_reserved(here.text) || here.is_mark(&["("]))
            || self.index == 3 && crate::syntax::tree::Function::of_word(here.text).is_some();
        (operator || operand).then(|| {
            let value = self.tokens[3].span.to(self.end_of_value());
            given_expression::finding(value, self.tokens[0].span)
        })
    }

    /// The last token before the texts at the end of the line.
    fn end_of_value(&self) -> Span {
        let value = self.tokens[3..].iter().take_while(|token| {
            token.kind != TokenKind::Text && !token.is_word("from") && !token.is_word("because") && !token.is_word("in")
        });
        value.last().map_or(self.tokens[3].span, |token| token.span)
    }

    /// Two operands side by side.
    fn missing_operator(&self) -> Option<Diagnostic> {
        let (before, here) = (self.before()?, self.here()?);
        let ends = matches!(before.kind, TokenKind::Word | TokenKind::Number) || before.is_mark(&[")"]);
        let is_function = |token: &Token<'_>| crate::syntax::tree::Function::of_word(token.text).is_some();
        let is_called = is_function(here) && self.tokens.get(self.index + 1).is_some_and(|next| next.is_mark(&["("]));
        let begins = here.kind == TokenKind::Number
            || here.is_mark(&["("])
            || is_called
            || here.kind == TokenKind::Word && (!is_reserved(here.text) || CONSTANTS.contains(&here.text));
        // Behind a unit `abs` is a basis.
        let basis = before.text == "abs" && self.index > 1 && self.tokens[self.index - 2].kind == TokenKind::Word;
        let takes_operator = self.tried(Rule::operator)
            || (is_called || CONSTANTS.contains(&here.text))
                && matches!(self.stop.rule, Rule::let_line | Rule::relation_line)
                && self.index > 2;
        if self.tried(Rule::operator) && is_function(before) && !basis {
            return Some(reserved_name::function_without_brackets(before.span, before.text));
        }
        (takes_operator && ends && begins && !basis).then(|| missing_operator::between(before.span, before.text, here.span, here.text))
    }

    /// A word of the language where a name should stand.
    fn reserved(&self) -> Option<Diagnostic> {
        let here = self.here().filter(|token| token.kind == TokenKind::Word && is_reserved(token.text))?;
        (self.tried(Rule::path) || self.tried(Rule::name)).then(|| reserved_name::used(here.span, here.text))
    }

    fn at_or_end(&self) -> Span {
        self.here().or(self.before()).map_or(self.line, |token| token.span)
    }

    /// What is left: what was found, and what could stand there.
    fn expected(&self) -> Diagnostic {
        let phrase = expected::phrase(self.stop.tried);
        let finding = match self.here() {
            Some(here) => bad_line::finding(here.span, &format!("`{}`", self.shown(here)), &phrase),
            None => bad_line::finding(self.at_or_end(), "its end", &format!("{phrase} behind it")),
        };
        match expected::form(self.stop.rule) {
            Some(form) => finding.help(format!("the statement reads `{form}`")),
            None => finding,
        }
    }
}
