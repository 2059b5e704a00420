//! Slips in units: blanks inside, a power with `^`, the inch.

use super::token::{Token, TokenKind};
use crate::diagnostic::code::{inch_word, pressure_without_basis, unit_power, unit_with_blanks, unknown_unit};
use crate::diagnostic::{Diagnostic, Span};
use crate::units::joined_basis;

/// Longest unit word that is taken for one where a name could also stand.
const LONGEST_UNIT_WORD: usize = 6;

/// Looks at the tokens around the place where reading stopped.
pub(super) fn look(tokens: &[Token<'_>], stop: usize) -> Option<Diagnostic> {
    basis(tokens, stop)
        .or_else(|| degrees(tokens, stop))
        .or_else(|| doubled(tokens, stop))
        .or_else(|| inch(tokens, stop))
        .or_else(|| blanks(tokens, stop))
        .or_else(|| power(tokens, stop))
}

/// `9.6 bar g`, `9.6 bar(g)`, `9.6 bar-g`, `9.6 bar absolute`.
fn basis(tokens: &[Token<'_>], stop: usize) -> Option<Diagnostic> {
    let here = tokens.get(stop)?;
    let unit = stop.checked_sub(1).map(|before| &tokens[before]).filter(|token| token.kind == TokenKind::Word)?;
    let start = start_of_unit(tokens, stop)?;
    let (word, last) = if here.kind == TokenKind::Word {
        (here, here)
    } else if here.is_mark(&["(", "["]) {
        (tokens.get(stop + 1)?, tokens.get(stop + 2).filter(|token| token.is_mark(&[")", "]"]))?)
    } else {
        let touches = here.is_mark(&["-", "−", "–"]) && unit.touches(here);
        let word = tokens.get(stop + 1).filter(|word| touches && here.touches(word))?;
        (word, word)
    };
    if start + 1 != stop {
        return None;
    }
    let (unit_text, basis) = joined_basis(unit.text, word.text.trim_end_matches('.'))?;
    let span = if here.kind == TokenKind::Word { here.span } else { here.span.to(last.span) };
    let between = if here.kind == TokenKind::Word || !unit.touches(here) { " " } else { "" };
    let rest = match here.text {
        "(" => format!("({})", word.text),
        "[" => format!("[{}]", word.text),
        _ if here.kind == TokenKind::Word => word.text.to_owned(),
        sign => format!("{sign}{}", word.text),
    };
    Some(pressure_without_basis::otherwise_spelled(
        span,
        &format!("{}{between}{rest}", unit.text),
        unit.span.to(last.span),
        &unit_text,
        basis,
    ))
}

/// `20 deg C`, `20 ° C`: one word.
fn degrees(tokens: &[Token<'_>], stop: usize) -> Option<Diagnostic> {
    let is_degree = |token: &Token<'_>| matches!(token.text, "deg" | "degs" | "degree" | "degrees" | "°" | "º");
    let first = [Some(stop), stop.checked_sub(1)].into_iter().flatten().find(|at| tokens.get(*at).is_some_and(is_degree))?;
    first.checked_sub(1).filter(|before| tokens[*before].kind == TokenKind::Number || tokens[*before].is_word("in"))?;
    let scale = tokens.get(first + 1)?;
    let joined = match scale.text {
        "C" | "c" | "Celsius" | "celsius" => "degC",
        "F" | "f" | "Fahrenheit" | "fahrenheit" => "degF",
        "R" | "Rankine" => "degR",
        "K" | "Kelvin" | "kelvin" => "K",
        _ => return None,
    };
    let whole = tokens[first].span.to(scale.span);
    Some(unit_with_blanks::finding(scale.span, whole, joined))
}

/// `kg//m`: a sign that stands twice.
fn doubled(tokens: &[Token<'_>], stop: usize) -> Option<Diagnostic> {
    const SIGNS: &[&str] = &["/", ".", "·"];
    let sign = tokens.get(stop).filter(|token| token.is_mark(SIGNS))?;
    let second = tokens.get(stop + 1).filter(|second| second.text == sign.text && sign.touches(second))?;
    start_of_unit(tokens, stop)?;
    Some(unknown_unit::doubled_sign(sign.span.to(second.span), sign.text))
}

/// `6 in`: the word is taken.
fn inch(tokens: &[Token<'_>], stop: usize) -> Option<Diagnostic> {
    for index in [Some(stop), stop.checked_sub(1)].into_iter().flatten() {
        let Some(word) = tokens.get(index).filter(|token| token.is_word("in")) else { continue };
        let number = index.checked_sub(1).map(|before| &tokens[before])?;
        if number.kind == TokenKind::Number {
            return Some(inch_word::finding(number.text, word.span));
        }
    }
    None
}

/// `9.81 m / s2`: the sign of division belongs to the unit, and the blanks cut it off.
fn blanks(tokens: &[Token<'_>], stop: usize) -> Option<Diagnostic> {
    let sign = tokens.get(stop).filter(|token| token.is_mark(&["/", ".", "·", "⋅", "*", "×"]))?;
    stop.checked_sub(1).filter(|before| tokens[*before].kind == TokenKind::Word)?;
    let start = start_of_unit(tokens, stop)?;
    let next = tokens.get(stop + 1)?;
    let end = match next.kind {
        TokenKind::Word if is_like_a_unit(next.text) => end_of_unit(tokens, stop + 1),
        TokenKind::Mark if next.text == "(" => {
            let close = tokens[stop + 1..].iter().position(|token| token.is_mark(&[")"]))?;
            tokens[stop + 1 + close].span.end
        }
        _ => return None,
    };
    let parts: Vec<&Token<'_>> = tokens[start..].iter().take_while(|token| token.span.end <= end).collect();
    let has_blank = parts.windows(2).any(|pair| !pair[0].touches(pair[1]));
    if !has_blank && !sign.is_mark(&["*", "×"]) {
        return None;
    }
    let mut joined = String::new();
    for (index, part) in parts.iter().enumerate() {
        let beside = index > 0 && part.kind == TokenKind::Word && parts[index - 1].kind == TokenKind::Word;
        joined.push_str(if beside { "." } else { "" });
        joined.push_str(if part.is_mark(&["*", "×", "·", "⋅"]) { "." } else { part.text });
    }
    let whole = Span { start: tokens[start].span.start, end };
    Some(unit_with_blanks::finding(Span { start: sign.span.start, end }, whole, &joined))
}

/// `2 m^2` where no expression can stand.
fn power(tokens: &[Token<'_>], stop: usize) -> Option<Diagnostic> {
    let hat = tokens.get(stop).filter(|token| token.is_mark(&["^"]))?;
    let unit = stop.checked_sub(1).map(|before| &tokens[before]).filter(|token| token.kind == TokenKind::Word)?;
    let exponent = tokens.get(stop + 1).filter(|token| token.kind == TokenKind::Number)?;
    Some(unit_power::of_a_unit(unit.span.to(exponent.span), unit.text, exponent.text, hat.span.to(exponent.span)))
}

/// The index of the first token of the unit that ends before `stop`, if a number or `in` stands before it.
fn start_of_unit(tokens: &[Token<'_>], stop: usize) -> Option<usize> {
    let mut index = stop.checked_sub(1)?;
    loop {
        let before = index.checked_sub(1).map(|before| &tokens[before])?;
        if before.kind == TokenKind::Number || before.is_word("in") {
            return Some(index);
        }
        if !before.touches(&tokens[index]) || before.kind == TokenKind::Text {
            return None;
        }
        index -= 1;
    }
}

/// Where the unit that goes on at `start` ends: the tokens that touch, and what a further sign joins to them.
fn end_of_unit(tokens: &[Token<'_>], start: usize) -> u32 {
    let mut end = start;
    while let (Some(sign), Some(next)) = (tokens.get(end + 1), tokens.get(end + 2)) {
        if !sign.is_mark(&["/", ".", "·", "⋅"]) || next.kind != TokenKind::Word || !is_like_a_unit(next.text) {
            break;
        }
        end += 2;
    }
    tokens[end].span.end
}

fn is_like_a_unit(word: &str) -> bool {
    word.chars().count() <= LONGEST_UNIT_WORD && !word.contains('_')
}
