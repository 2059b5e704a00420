//! The parser that the grammar of `grammar/sheet.pest` makes.

// The derive makes a public enum without comments on its members, which the grammar itself explains.
#![allow(missing_docs)]

use std::borrow::Cow;

use pest_derive::Parser;

use super::character::is_blank;

/// Reads one logical line by one rule.
#[derive(Parser)]
#[grammar = "../grammar/sheet.pest"]
pub(crate) struct Grammar;

/// The rule that a statement word chooses. `section` and the words that are not offered have none.
pub(crate) fn rule_of_word(word: &str) -> Option<Rule> {
    Some(match word {
        "gas" => Rule::gas_line,
        "site" => Rule::site_line,
        "reference" => Rule::reference_line,
        "given" => Rule::given_line,
        "unknown" => Rule::unknown_line,
        "let" => Rule::let_line,
        "state" => Rule::state_line,
        "assume" => Rule::assume_line,
        "require" => Rule::require_line,
        "caution" => Rule::caution_line,
        "answer" => Rule::answer_line,
        "correlate" => Rule::correlate_line,
        _ => return None,
    })
}

/// A logical line as the grammar reads it: outside of texts in quotes, line ends, comments and all kinds of blanks are
/// plain blanks. No byte moves.
pub(crate) fn plain(line: &str) -> Cow<'_, str> {
    // Bytes with which something begins that has to be written as blanks, if not inside a text.
    let odd = |byte: u8| matches!(byte, b'\t' | b'\r' | b'\n' | b'#' | 0xC2 | 0xE2);
    if !line.bytes().any(odd) {
        return Cow::Borrowed(line);
    }
    let mut plain = String::with_capacity(line.len());
    let mut characters = line.chars().peekable();
    let (mut in_text, mut in_comment) = (false, false);
    while let Some(character) = characters.next() {
        in_comment &= character != '\n';
        let blank = !in_text && (in_comment || character == '#' || is_blank(character) || matches!(character, '\n' | '\r'));
        in_comment |= blank && character == '#';
        if blank {
            plain.extend(std::iter::repeat_n(' ', character.len_utf8()));
            continue;
        }
        plain.push(character);
        match character {
            '\\' if in_text && matches!(characters.peek(), Some('"' | '\\')) => plain.extend(characters.next()),
            '"' => in_text = !in_text,
            _ => {}
        }
    }
    Cow::Owned(plain)
}

#[cfg(test)]
mod tests {
    use super::*;

    #[test]
    fn no_byte_moves_and_texts_stay() {
        let line = "given V =\t3\u{A0}m3 # c \u{E9}\"\r\n  \"a\t# \\\"b\u{A0}\"";
        let expected = format!("given V = 3  m3{}\"a\t# \\\"b\u{A0}\"", " ".repeat(12));
        assert_eq!(plain(line), expected);
        assert_eq!(plain(line).len(), line.len());
    }
}
