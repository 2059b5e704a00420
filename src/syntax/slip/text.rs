//! Slips with quotes: a text that is not closed, one without quotes, quotes of another kind.

use super::token::{Token, TokenKind, tokens};
use crate::diagnostic::code::{text_without_quotes, unclosed_text, wrong_quote};
use crate::diagnostic::{Diagnostic, Span};

/// A text that begins at `quote` and is not closed on its logical line.
pub(super) fn unclosed(text: &str, line: Span, quote: u32) -> Diagnostic {
    // A quote is often missing before `from`: the text in front of it then ends with that word.
    for token in tokens(text, Span { start: line.start, end: quote }) {
        if token.kind != TokenKind::Text {
            continue;
        }
        let inner = token.text.trim_matches('"').trim_end();
        for word in ["from", "because"] {
            let Some(before) = inner.strip_suffix(word) else { continue };
            let said = before.trim_end();
            if said.len() < before.len() && !said.is_empty() {
                let end = token.span.start as usize + 1 + said.len();
                return unclosed_text::before_word(Span::new(token.span.start as usize, end), word, Span::new(end, end));
            }
        }
    }
    let first_line = text[quote as usize..line.end as usize].lines().next().unwrap_or("").trim_end();
    let end = quote as usize + first_line.len();
    // `"text from …`: the quote belongs before the word, if a text in quotes does not follow it anyway.
    unclosed_text::finding(Span::new(quote as usize, end), Span::new(end, end))
}

/// `from` or `because` without a text in quotes behind it, and quotes of another kind.
pub(super) fn look(tokens: &[Token<'_>], stop: usize, line: Span) -> Option<Diagnostic> {
    let here = tokens.get(stop);
    let before = stop.checked_sub(1).map(|index| &tokens[index]);
    const SINGLE: &[&str] = &["'", "‘", "’", "‚", "“", "”", "„", "«", "»", "‹", "›", "`", "´"];
    if let Some(quote) = here.filter(|token| token.is_mark(SINGLE)) {
        let second = tokens[stop + 1..].iter().find(|token| token.is_mark(SINGLE) || token.kind == TokenKind::Text);
        let second = second.filter(|token| token.kind == TokenKind::Mark).map(|token| token.span);
        return Some(wrong_quote::finding(quote.span, quote.text, second));
    }
    if let Some(word) = before.filter(|token| token.is_word("from") || token.is_word("because"))
        && here.is_none_or(|token| token.kind != TokenKind::Text)
    {
        let behind = here.map(|token| Span { start: token.span.start, end: end_of_words(tokens, stop, line) });
        return Some(text_without_quotes::finding(word.span, word.text, behind));
    }
    None
}

/// Where the words end that should have stood in quotes: before the next text, `from` or `because`.
fn end_of_words(tokens: &[Token<'_>], start: usize, line: Span) -> u32 {
    let words =
        tokens[start..].iter().take_while(|token| token.kind != TokenKind::Text && !token.is_word("from") && !token.is_word("because"));
    words.last().map_or(line.end, |token| token.span.end)
}
