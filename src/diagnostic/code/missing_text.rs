//! A statement that says nothing without its text.

use crate::diagnostic::{Diagnostic, Span};

/// The code.
pub(crate) const CODE: &str = "missing-text";

/// The page.
pub(crate) const PAGE: &str = r##"
# A statement without its text

`assume`, `require`, `caution` and `section` stand in the report with their text. Without it a reader would not know what is
assumed, required or to be watched.

```gw
given V = 3.20 m3 "Volume" from "Plate"
require V >= 3.00 m3
answer V
```

```gw cured
given V = 3.20 m3 "Volume" from "Plate"
require V >= 3.00 m3 "Large enough for one shift"
answer V
```
"##;

/// The statement that begins with `word` has no text in quotes.
pub(crate) fn finding(statement: Span, span: Span, word: &str) -> Diagnostic {
    let end = Span { start: statement.end, end: statement.end };
    Diagnostic::error(CODE, span, format!("`{word}` has no text in quotes"))
        .label("the report would say nothing here")
        .help(format!("say in quotes what it is about: `{word} … \"…\"`"))
        .edit(end, " \"\"")
}

/// A section has no title.
pub(crate) fn section(span: Span) -> Diagnostic {
    Diagnostic::error(CODE, span, "`section` has no title")
        .label("expected a title behind it")
        .help("write the title behind it: `section Vessel as filled`")
}
