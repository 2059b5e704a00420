//! A word of the language that this version does not offer.

use crate::diagnostic::{Diagnostic, Span};

/// The code.
pub(crate) const CODE: &str = "word-not-offered";

/// The page.
pub(crate) const PAGE: &str = r##"
# A word that this version does not offer

The word belongs to the language of sheets, and so it can name nothing else, but this version of the tool does not read the
statement or the function that it stands for. The line is left out, and the sheet has no result.

```gw
given V = 3.20 m3 "Volume" from "Plate"
answer V
chart V against V
```

```gw cured
given V = 3.20 m3 "Volume" from "Plate"
answer V
```
"##;

/// A statement that begins with `word`.
pub(crate) fn statement(span: Span, word: &str) -> Diagnostic {
    Diagnostic::error(CODE, span, format!("`{word}` is a word of the language that this version does not offer"))
        .label("this statement is not read")
        .help("take the statement out of this sheet")
}

/// The function `word`.
pub(crate) fn function(span: Span, word: &str) -> Diagnostic {
    Diagnostic::error(CODE, span, format!("`{word}` is a function of the language that this version does not offer"))
        .label("this function is not read")
        .help("write the relation without it")
}

/// The word `word` within a statement.
pub(crate) fn word(span: Span, word: &str) -> Diagnostic {
    Diagnostic::error(CODE, span, format!("`{word}` is a word of the language that this version does not offer"))
        .label("not read")
        .help("write the statement without it")
}
