//! The tokens of a line in error. The grammar has given up on it, so that these are coarse: words, numbers, texts, marks.

use crate::diagnostic::Span;
use crate::syntax::character::{is_blank, is_letter, is_name_char};

/// What a token is.
#[derive(Clone, Copy, Debug, PartialEq, Eq)]
pub(crate) enum TokenKind {
    /// A letter, then letters, digits, `_`.
    Word,
    /// Digits with at most one point inside, and an exponent.
    Number,
    /// A text in quotes.
    Text,
    /// Anything else: a sign of one to three characters.
    Mark,
}

/// A token of a line in error.
#[derive(Clone, Copy, Debug, PartialEq, Eq)]
pub(crate) struct Token<'t> {
    pub(crate) kind: TokenKind,
    pub(crate) span: Span,
    pub(crate) text: &'t str,
}

impl Token<'_> {
    /// Whether it is the word `word`.
    pub(crate) fn is_word(&self, word: &str) -> bool {
        self.kind == TokenKind::Word && self.text == word
    }

    /// Whether it is one of the marks.
    pub(crate) fn is_mark(&self, marks: &[&str]) -> bool {
        self.kind == TokenKind::Mark && marks.contains(&self.text)
    }

    /// Whether the next token touches it.
    pub(crate) fn touches(&self, next: &Self) -> bool {
        self.span.end == next.span.start
    }
}

/// Marks of several characters, the longer first.
const LONG_MARKS: &[&str] = &["+/-", "==", ":=", "**", "!=", "<>", "<=", ">=", "=<", "=>", "&&", "||", "..", "+-", "->"];

/// The tokens of the range `span` of `text`, comments left out.
pub(crate) fn tokens(text: &str, span: Span) -> Vec<Token<'_>> {
    let mut found = Vec::new();
    let end = span.end as usize;
    let mut at = span.start as usize;
    while let Some(character) = text.get(at..end).and_then(|rest| rest.chars().next()) {
        let rest = &text[at..end];
        let (kind, length) = match character {
            '\n' | '\r' => {
                at += 1;
                continue;
            }
            _ if is_blank(character) => {
                at += character.len_utf8();
                continue;
            }
            '#' => {
                at += rest.find('\n').unwrap_or(rest.len());
                continue;
            }
            '"' => (TokenKind::Text, text_length(rest)),
            _ if is_letter(character) => (TokenKind::Word, rest.find(|next| !is_name_char(next)).unwrap_or(rest.len())),
            _ if character.is_ascii_digit() => (TokenKind::Number, number_length(rest)),
            _ => {
                let long = LONG_MARKS.iter().find(|mark| rest.starts_with(**mark));
                (TokenKind::Mark, long.map_or(character.len_utf8(), |mark| mark.len()))
            }
        };
        found.push(Token { kind, span: Span::new(at, at + length), text: &rest[..length] });
        at += length;
    }
    found
}

/// The length of a text with its quotes; to the end of the line's range where it is not closed.
fn text_length(rest: &str) -> usize {
    let bytes = rest.as_bytes();
    let mut at = 1;
    while at < bytes.len() {
        match bytes[at] {
            b'\\' if matches!(bytes.get(at + 1), Some(b'"' | b'\\')) => at += 2,
            b'"' => return at + 1,
            _ => at += 1,
        }
    }
    rest.len()
}

/// The length of a number as the grammar reads it.
fn number_length(rest: &str) -> usize {
    let digits = |from: usize| rest[from..].bytes().take_while(u8::is_ascii_digit).count();
    let mut length = digits(0);
    if rest[length..].starts_with('.') && digits(length + 1) > 0 {
        length += 1 + digits(length + 1);
    }
    if let Some(exponent) = rest[length..].strip_prefix(['e', 'E']) {
        let sign = exponent.chars().next().filter(|sign| matches!(sign, '+' | '-' | '−' | '–')).map_or(0, char::len_utf8);
        let figures = digits(length + 1 + sign);
        if figures > 0 {
            length += 1 + sign + figures;
        }
    }
    length
}

#[cfg(test)]
mod tests {
    use super::*;

    #[test]
    fn a_line_falls_into_words_numbers_texts_and_marks() {
        let text = "given V==2,40 m3 \"a\\\"b\" # c\n 1e4..5 1e−3 x**2 5.";
        let span = Span::new(0, text.len());
        let found: Vec<_> = tokens(text, span).iter().map(|token| token.text).collect();
        let expected = ["given", "V", "==", "2", ",", "40", "m3", "\"a\\\"b\"", "1e4", "..", "5", "1e−3", "x", "**", "2", "5", "."];
        assert_eq!(found, expected);
    }
}
