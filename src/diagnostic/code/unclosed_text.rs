//! A text in quotes that is not closed.

use crate::diagnostic::{Diagnostic, Span};

/// The code.
pub(crate) const CODE: &str = "unclosed-text";

/// The page.
pub(crate) const PAGE: &str = r##"
# A text in quotes that is not closed

A text begins with `"` and ends with the next `"` on its logical line. Here the second quote is missing. A quote within a
text is written `\"`.

```gw
given V = 3.20 m3 "Volume" from "Plate
answer V
```

```gw cured
given V = 3.20 m3 "Volume" from "Plate"
answer V
```
"##;

/// The text at `span` has no second quote; `end` is where it could stand.
pub(crate) fn finding(span: Span, end: Span) -> Diagnostic {
    Diagnostic::error(CODE, span, "this text in quotes is not closed on its line")
        .label("no second `\"`")
        .help("close the text with `\"`; a quote within a text is written `\\\"`")
        .edit(end, "\"")
}

/// The text at `span` should end before `word`, at `end`.
pub(crate) fn before_word(span: Span, word: &str, end: Span) -> Diagnostic {
    Diagnostic::error(CODE, span, format!("this text in quotes is not closed before `{word}`"))
        .label("no second `\"`")
        .help(format!("close the text with `\"` before `{word}`"))
        .safe_edit(end, "\"")
}
