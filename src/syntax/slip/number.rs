//! Slips in numbers: a decimal comma, a point without a digit, a blank between digits.

use super::token::{Token, TokenKind};
use crate::diagnostic::Diagnostic;
use crate::diagnostic::code::{decimal_comma, missing_digit, missing_operator};

/// Looks at the tokens around the place where reading stopped.
pub(super) fn look(tokens: &[Token<'_>], stop: usize) -> Option<Diagnostic> {
    let at = |index: usize| tokens.get(index);
    for comma in [Some(stop), stop.checked_sub(1)].into_iter().flatten() {
        if let (Some(whole), Some(mark), Some(decimals)) = (comma.checked_sub(1).and_then(at), at(comma), at(comma + 1))
            && mark.is_mark(&[","])
            && whole.kind == TokenKind::Number
            && decimals.kind == TokenKind::Number
            && whole.touches(mark)
            && mark.touches(decimals)
        {
            return Some(decimal_comma::finding(whole.span.to(decimals.span), whole.text, decimals.text));
        }
    }
    let here = at(stop)?;
    let before = stop.checked_sub(1).and_then(at);
    if here.is_mark(&["."]) {
        if let Some(digits) = at(stop + 1).filter(|next| next.kind == TokenKind::Number && here.touches(next)) {
            let span = here.span.to(digits.span);
            return Some(match before.filter(|before| before.kind == TokenKind::Number && before.touches(here)) {
                Some(number) => missing_digit::second_point(number.span.to(digits.span)),
                None => missing_digit::before_point(span, digits.text),
            });
        }
        if let Some(number) = before.filter(|before| before.kind == TokenKind::Number && before.touches(here)) {
            return Some(missing_digit::after_point(number.span.to(here.span), number.text));
        }
    }
    if here.kind == TokenKind::Number
        && let Some(number) = before.filter(|before| before.kind == TokenKind::Number)
    {
        return Some(missing_operator::between_numbers(number.span.to(here.span), number.text, here.text));
    }
    None
}
