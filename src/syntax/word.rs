//! The words of the language: which start a statement, and which name nothing else.

use super::tree::Function;

/// The words that start a statement, in the order of the language page.
pub const STATEMENT_WORDS: &[&str] =
    &["section", "gas", "site", "reference", "given", "unknown", "let", "state", "assume", "require", "caution", "answer", "correlate"];

/// Words that start a statement of the language which this version does not offer.
pub const STATEMENT_WORDS_NOT_OFFERED: &[&str] =
    &["cases", "sweep", "chart", "curve", "table", "time", "rate", "method", "takes", "gives", "apply"];

/// Words of expressions which this version does not offer.
pub(crate) const EXPRESSION_WORDS_NOT_OFFERED: &[&str] =
    &["if", "then", "else", "integral", "start", "end", "largest", "smallest", "ceil", "floor", "varying"];

/// The constants.
pub const CONSTANTS: &[&str] = &["pi", "R", "N_A", "k_B", "g_n"];

/// The words between the parts of a statement.
const INNER_WORDS: &[&str] = &[
    "against", "and", "as", "at", "because", "by", "ceil", "else", "end", "exact", "figures", "floor", "from", "if", "in", "integral",
    "largest", "most", "near", "not", "of", "or", "smallest", "start", "starting", "steps", "then", "to", "until", "varying", "when",
    "with", "within",
];

/// Whether `word` starts a statement of the language, offered or not.
#[must_use]
pub fn starts_statement(word: &str) -> bool {
    // No such word is longer; most first words of a relation are told apart by that alone.
    (3..=9).contains(&word.len()) && (STATEMENT_WORDS.contains(&word) || STATEMENT_WORDS_NOT_OFFERED.contains(&word))
}

/// Whether `word` belongs to the language and so names no quantity, gas or state.
#[must_use]
pub fn is_reserved(word: &str) -> bool {
    starts_statement(word) || INNER_WORDS.binary_search(&word).is_ok() || CONSTANTS.contains(&word) || Function::of_word(word).is_some()
}

#[cfg(test)]
mod tests {
    use super::*;

    #[test]
    fn the_words_are_sorted_for_the_search() {
        assert!(INNER_WORDS.is_sorted());
    }

    #[test]
    fn every_word_of_the_language_is_reserved_and_the_words_of_the_trade_are_not() {
        for word in ["given", "cases", "site", "sqrt", "pi", "g_n", "in", "within", "varying", "integral", "rate", "ceil"] {
            assert!(is_reserved(word), "{word}");
        }
        for word in ["p", "T_1", "normal", "ideal", "gauge", "diff", "k", "case", "Given", "volume"] {
            assert!(!is_reserved(word), "{word}");
        }
    }
}
