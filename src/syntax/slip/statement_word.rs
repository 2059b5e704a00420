//! The first word of a line: misspelt ones, and the name that a line in error would have declared.

use pest::Parser;

use super::token::{TokenKind, tokens};
use crate::diagnostic::code::{bad_line, indented_line, missing_operator, unindented_line, unknown_statement};
use crate::diagnostic::{Diagnostic, Span, nearest};
use crate::syntax::character::{is_blank, is_letter};
use crate::syntax::grammar::{Grammar, plain, rule_of_word};
use crate::syntax::limits::MOST_ERRORS;
use crate::syntax::line::{Line, first_word};
use crate::syntax::tree::{Function, Named, Tree};
use crate::syntax::word::{STATEMENT_WORDS, STATEMENT_WORDS_NOT_OFFERED, is_reserved, starts_statement};

/// Words that go on with a statement. At column 1 they have lost their indentation.
const CONTINUING: &[&str] = &["and", "at", "because", "by", "figures", "from", "in", "near", "of", "or", "when", "within"];

/// Whether a line that no statement word starts is no relation either: it goes on with the line above, or its first word
/// is followed by a word, a number or a text.
pub(crate) fn is_misspelt(text: &str, line: &Line) -> bool {
    if goes_on(text, line) {
        return true;
    }
    let word = line.word.of(text);
    if word.is_empty() || is_reserved(word) {
        return false;
    }
    let behind = Span { start: line.word.end, end: line.span.end };
    let next = next_character(text, behind).and_then(|next| text[next..].chars().next());
    next.is_some_and(|next| next == '"' || next.is_ascii_digit() || is_letter(next))
}

/// Whether the line begins with what can only go on with a statement.
fn goes_on(text: &str, line: &Line) -> bool {
    const SIGNS: &[char] = &['"', '+', '*', '/', ')', ',', ']', '±', '<', '>', '='];
    CONTINUING.contains(&line.word.of(text)) || line.span.start > 0 && line.span.of(text).starts_with(SIGNS)
}

/// The finding of a line that is misspelt.
pub(crate) fn misspelt(text: &str, line: &Line) -> Diagnostic {
    let word = line.word.of(text);
    if goes_on(text, line) {
        let begin = if word.is_empty() { tokens(text, line.span).first().map_or(line.word, |token| token.span) } else { line.word };
        return unindented_line::finding(begin, begin.of(text));
    }
    let behind = Span { start: line.word.end, end: line.span.end };
    let next = next_character(text, behind).unwrap_or(line.span.end as usize);
    let word_behind = first_word(&text[next..line.span.end as usize]);
    if Function::of_word(word_behind).is_some() && text[next + word_behind.len()..line.span.end as usize].trim_start().starts_with('(') {
        return missing_operator::between(line.word, word, Span::new(next, next + word_behind.len()), word_behind);
    }
    let near = nearest(word, STATEMENT_WORDS.iter().chain(STATEMENT_WORDS_NOT_OFFERED).copied());
    let Some(near) = near.first() else {
        // `height in m` and the like: what is missing is a word in front.
        return bad_line::no_statement(line.word, word, Span { start: line.span.start, end: line.span.start }, word_behind);
    };
    let cured = format!("{near}{}", behind.of(text));
    let reads = rule_of_word(near).is_some_and(|rule| Grammar::parse(rule, &plain(&cured)).is_ok())
        || *near == "section" && near.len().abs_diff(word.len()) <= 1;
    unknown_statement::near(line.word, word, near, reads)
}

/// Where the first character behind `span.start` stands that is no blank, line end or comment.
fn next_character(text: &str, span: Span) -> Option<usize> {
    let end = span.end as usize;
    let mut at = span.start as usize;
    loop {
        let character = text.get(at..end)?.chars().next()?;
        if character == '#' {
            at += text[at..end].find('\n')?;
        } else if is_blank(character) || matches!(character, '\n' | '\r') {
            at += character.len_utf8();
        } else {
            return Some(at);
        }
    }
}

/// The name that the line at `span` declares, or would declare if it could be read. `site` and `reference` stand for
/// what such a line fixes, so that what depends on it can stay silent.
pub(crate) fn declared_name(text: &str, span: Span, tree: &mut Tree) -> Option<Named> {
    let slice = span.of(text);
    let word = first_word(slice);
    let word_span = Span::new(span.start as usize, span.start as usize + word.len());
    let word = match word {
        _ if starts_statement(word) => word,
        _ => return misspelt_name(text, word_span, span.end, tree),
    };
    let named = |tree: &mut Tree, place: Span| Some(Named { name: tree.names.intern(place.of(text)), span: place });
    let place = match word {
        "site" | "reference" => {
            return Some(Named { name: tree.names.intern(word), span: word_span });
        }
        "given" | "unknown" | "let" | "gas" | "state" | "gives" | "cases" | "curve" | "table" | "time" | "rate" => {
            word_behind(text, word_span, span.end)?
        }
        "takes" => {
            let first = word_behind(text, word_span, span.end)?;
            match first.of(text) {
                "gas" | "state" => word_behind(text, first, span.end)?,
                _ => first,
            }
        }
        "apply" => {
            const MOST: u32 = 400;
            let near = Span { start: span.start, end: span.end.min(span.start + MOST) };
            let found = tokens(text, near);
            let as_word = found.iter().position(|token| token.is_word("as"))?;
            found.get(as_word + 1).filter(|token| token.kind == TokenKind::Word)?.span
        }
        _ => return None,
    };
    if is_reserved(place.of(text)) { None } else { named(tree, place) }
}

/// The name behind a first word that is misspelt, where what follows shows that it would be declared.
fn misspelt_name(text: &str, word: Span, end: u32, tree: &mut Tree) -> Option<Named> {
    let place = word_behind(text, word, end)?;
    let next = next_character(text, Span { start: place.end, end })?;
    let behind = &text[next..end as usize];
    let declares = behind.starts_with('=') && !behind.starts_with("==") || matches!(first_word(behind), "in" | "of" | "within");
    (declares && !is_reserved(place.of(text))).then(|| Named { name: tree.names.intern(place.of(text)), span: place })
}

/// The word that stands next behind `span`.
fn word_behind(text: &str, span: Span, end: u32) -> Option<Span> {
    let at = next_character(text, Span { start: span.end, end })?;
    let word = first_word(&text[at..end as usize]);
    (!word.is_empty()).then(|| Span::new(at, at + word.len()))
}

/// A whole statement that is indented, and so would vanish in the prose or the title above it.
pub(crate) fn indented_statement(text: &str, line: &Line) -> Vec<Diagnostic> {
    let Some(start) = line.continuation else { return Vec::new() };
    let mut findings = Vec::new();
    let mut at = start as usize;
    let end = line.span.end as usize;
    while at < end && findings.len() <= MOST_ERRORS {
        let physical = &text[at..end];
        let length = physical.find('\n').unwrap_or(physical.len());
        let physical = &physical[..length];
        let code = physical.trim_start_matches(is_blank);
        let indented = code.len() < physical.len() || at == start as usize;
        let word = first_word(code);
        let first = at + physical.len() - code.len();
        if indented && rule_of_word(word).is_some_and(|rule| Grammar::parse(rule, &plain(code.trim_end())).is_ok()) {
            findings.push(indented_line::statement(Span::new(first, first + word.len()), word, blanks_before(text, first)));
        }
        at += length + 1;
    }
    findings
}

/// The blanks between the line start and byte `at`.
pub(super) fn blanks_before(text: &str, at: usize) -> Span {
    let line = text[..at].rfind('\n').map_or(0, |newline| newline + 1);
    Span::new(line, at)
}
