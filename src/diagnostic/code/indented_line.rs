//! An indented line that is a statement of its own.

use crate::diagnostic::{Diagnostic, Span};

/// The code.
pub(crate) const CODE: &str = "indented-line";

/// The page.
pub(crate) const PAGE: &str = r##"
# A statement that is indented

A line that starts with blank space continues the statement above it. Here the indented line begins with a statement word,
so it is a statement of its own, and would be lost in the line above. Or nothing stands above it that it could continue.

```gw
given V = 3.20 m3 "Volume" from "Plate"
    given d = 80.0 mm "Bore" from "Drawing"
answer V, d
```

```gw cured
given V = 3.20 m3 "Volume" from "Plate"
given d = 80.0 mm "Bore" from "Drawing"
answer V, d
```
"##;

/// A whole statement stands in an indented line; `blanks` is its indentation.
pub(crate) fn statement(span: Span, word: &str, blanks: Span) -> Diagnostic {
    Diagnostic::error(CODE, span, format!("`{word}` starts a statement, but its line is indented and so continues the line above"))
        .label("begins with blank space")
        .help("take the blanks at the start of the line away")
        .safe_edit(blanks, "")
}

/// An indented line with nothing above it; `blanks` is its indentation.
pub(crate) fn nothing_above(span: Span, blanks: Span) -> Diagnostic {
    let place = if span.start == span.end { blanks } else { span };
    Diagnostic::error(CODE, place, "this line is indented, but no statement stands above it that it could continue")
        .label("begins with blank space")
        .help("take the blanks at the start of the line away")
        .safe_edit(blanks, "")
}
