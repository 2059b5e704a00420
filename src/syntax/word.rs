//! The words of the language: which start a statement, and which name nothing else.

#[cfg(test)]
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
#[cfg(test)]
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

/// All words that name nothing else, sorted: one search instead of one in each list. A test holds it to the lists.
const RESERVED: &[&str] = &[
    "N_A",
    "R",
    "abs",
    "acos",
    "against",
    "and",
    "answer",
    "apply",
    "as",
    "asin",
    "assume",
    "at",
    "atan",
    "because",
    "by",
    "cases",
    "caution",
    "cbrt",
    "ceil",
    "chart",
    "correlate",
    "cos",
    "curve",
    "else",
    "end",
    "exact",
    "exp",
    "figures",
    "floor",
    "from",
    "g_n",
    "gas",
    "given",
    "gives",
    "if",
    "in",
    "integral",
    "k_B",
    "largest",
    "let",
    "ln",
    "log10",
    "max",
    "method",
    "min",
    "most",
    "near",
    "not",
    "of",
    "or",
    "pi",
    "rate",
    "reference",
    "require",
    "section",
    "sin",
    "site",
    "smallest",
    "sqrt",
    "start",
    "starting",
    "state",
    "steps",
    "sweep",
    "table",
    "takes",
    "tan",
    "then",
    "time",
    "to",
    "unknown",
    "until",
    "varying",
    "when",
    "with",
    "within",
];

/// Whether `word` belongs to the language and so names no quantity, gas or state.
#[must_use]
pub fn is_reserved(word: &str) -> bool {
    RESERVED.binary_search(&word).is_ok()
}

#[cfg(test)]
mod tests {
    use super::*;

    #[test]
    fn the_words_that_are_searched_are_those_of_the_lists() {
        let functions = Function::ALL.iter().map(|function| function.word());
        let lists = [STATEMENT_WORDS, STATEMENT_WORDS_NOT_OFFERED, INNER_WORDS, CONSTANTS];
        let mut all: Vec<&str> = lists.into_iter().flatten().copied().chain(functions).collect();
        all.sort_unstable();
        all.dedup();
        assert_eq!(RESERVED, all);
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
