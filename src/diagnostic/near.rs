//! Near names: what a misspelt word probably was.

/// Similarity below which a name is not worth suggesting (0 nothing alike, 1 the same).
const LEAST_SIMILARITY: f64 = 0.6;

/// Words longer than this are not compared: a suggestion for them helps nobody, and the comparison costs their square.
const LONGEST_WORD: usize = 64;

/// The names most like `word`, best first, at most three.
///
/// Case and a transposition of neighbours count little. Ties go to the name that comes first in `names`, so that the
/// answer does not depend on anything but the input.
///
/// ```
/// use gaswright::diagnostic::nearest;
/// assert_eq!(nearest("mbra", ["bar", "mbar", "Pa"])[0], "mbar");
/// assert!(nearest("xyzzy", ["bar", "mbar", "Pa"]).is_empty());
/// ```
pub fn nearest<'a>(word: &str, names: impl IntoIterator<Item = &'a str>) -> Vec<&'a str> {
    if word.chars().count() > LONGEST_WORD {
        return Vec::new();
    }
    let lower = word.to_lowercase();
    let mut scored: Vec<(f64, &'a str)> = names
        .into_iter()
        .filter(|name| *name != word)
        .map(|name| {
            let folded = name.to_lowercase();
            let edits = strsim::normalized_damerau_levenshtein(&lower, &folded);
            let alike = strsim::jaro_winkler(&lower, &folded) * 0.9;
            (edits.max(alike * edits.sqrt()), name)
        })
        .filter(|(score, _)| *score >= LEAST_SIMILARITY)
        .collect();
    scored.sort_by(|a, b| b.0.total_cmp(&a.0));
    scored.dedup_by_key(|(_, name)| *name);
    scored.into_iter().take(3).map(|(_, name)| name).collect()
}
