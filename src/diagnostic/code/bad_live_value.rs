//! Braces in prose without a quantity between them.

use crate::diagnostic::{Diagnostic, Span};

/// The code.
pub(crate) const CODE: &str = "bad-live-value";

/// The page.
pub(crate) const PAGE: &str = r##"
# Braces in prose that hold no quantity

`{m}` or `{cold.p in kPa abs}` in prose prints the solved value of a quantity. A brace that is meant as such is written twice:
`{{`.

```gw
given V = 3.20 m3 "Volume" from "Plate"

> The receiver holds {V / 2} when half full.

answer V
```

```gw cured
given V = 3.20 m3 "Volume" from "Plate"

> The receiver holds {V in L}.

answer V
```
"##;

/// The brace is not closed on its line.
pub(crate) fn unclosed(span: Span) -> Diagnostic {
    Diagnostic::error(CODE, Span { start: span.start, end: span.start + 1 }, "this brace in prose is not closed on its line")
        .label("opened here")
        .help("a live value is `{name}` or `{name in UNIT}`; a brace as such is `{{`")
}

/// What stands between the braces is no quantity.
pub(crate) fn unreadable(span: Span, inner: &str) -> Diagnostic {
    let inner: String = inner.chars().take(40).collect();
    Diagnostic::error(CODE, span, format!("`{inner}` in braces is no quantity of which a value could be printed"))
        .label("no quantity")
        .help("a live value is `{name}` or `{name in UNIT}`; a brace as such is `{{`")
}
