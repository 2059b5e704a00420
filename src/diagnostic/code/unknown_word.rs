//! A misspelt word between the parts of a statement.

use crate::diagnostic::{Diagnostic, Span};

/// The code.
pub(crate) const CODE: &str = "unknown-word";

/// The page.
pub(crate) const PAGE: &str = r##"
# A misspelt word within a statement

Between the parts of a statement stand words of the language: `in`, `within`, `near`, `at`, `of`, `from`, `because`, `by mole` and
others. The word here is none of those that could stand at its place.

```gw
given V = 3.20 m3 "Volume" form "Plate"
answer V
```

```gw cured
given V = 3.20 m3 "Volume" from "Plate"
answer V
```
"##;

/// `word` is most like `near`.
pub(crate) fn near(span: Span, word: &str, near: &str) -> Diagnostic {
    Diagnostic::error(CODE, span, format!("`{word}` has no meaning here"))
        .label(format!("did you mean `{near}`?"))
        .help(format!("write `{near}`"))
        .edit(span, near)
}

/// `word` is none of `words`.
pub(crate) fn choice(span: Span, word: &str, words: &[&str]) -> Diagnostic {
    let all = words.iter().map(|word| format!("`{word}`")).collect::<Vec<_>>().join(" or ");
    Diagnostic::error(CODE, span, format!("`{word}` has no meaning here")).label(format!("expected {all}")).help(format!("write {all}"))
}

/// `word` stands between two of a list, where a comma belongs; `gap` is what the comma replaces. `listed` says of what.
pub(crate) fn comma(span: Span, word: &str, listed: &str, gap: Span) -> Diagnostic {
    Diagnostic::error(CODE, span, format!("{listed} are separated by a comma, not by `{word}`"))
        .label("a comma belongs here")
        .help(format!("write `,` for `{word}`"))
        .safe_edit(gap, ",")
}
