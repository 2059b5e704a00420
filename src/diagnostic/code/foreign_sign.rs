//! A sign of another notation.

use crate::diagnostic::{Diagnostic, Span};

/// The code.
pub(crate) const CODE: &str = "foreign-sign";

/// The page.
pub(crate) const PAGE: &str = r##"
# A sign of another notation

Programs and spreadsheets write some signs otherwise. Here they are `=` for two sides that are equal, `^` for a power, `<=` and
`>=`, `and`, `or` and `not` in conditions; one statement stands on a line, without a sign at its end.

```gw
given a = 2.00 m "Length" from "Drawing"
let A == a^2
answer A
```

```gw cured
given a = 2.00 m "Length" from "Drawing"
let A = a^2
answer A
```
"##;

/// `sign` is written `cure` here.
pub(crate) fn finding(span: Span, sign: &str, cure: &str) -> Diagnostic {
    Diagnostic::error(CODE, span, format!("`{sign}` is no sign of this language"))
        .label(format!("expected `{cure}`"))
        .help(format!("write `{cure}`"))
        .safe_edit(span, cure)
}

/// An equality where a condition is expected.
pub(crate) fn equality_in_condition(span: Span, sign: &str) -> Diagnostic {
    Diagnostic::error(CODE, span, format!("a condition compares with `<`, `<=`, `>` or `>=`, not with `{sign}`"))
        .label("no comparison")
        .help("two sides that are equal are a relation, on a line of its own; a tolerance is `abs(a - b) <= …`")
}

/// A sign for "not equal".
pub(crate) fn inequality(span: Span, sign: &str) -> Diagnostic {
    Diagnostic::error(CODE, span, format!("`{sign}` is no sign of this language"))
        .label("no comparison")
        .help("a condition compares with `<`, `<=`, `>` or `>=`")
}

/// The sign of a root.
pub(crate) fn root(span: Span) -> Diagnostic {
    Diagnostic::error(CODE, span, "a root is a function: `sqrt(…)`").label("expected `sqrt(…)`").help("write `sqrt(…)` or `cbrt(…)`")
}

/// A semicolon.
pub(crate) fn semicolon(span: Span) -> Diagnostic {
    Diagnostic::error(CODE, span, "one statement stands on a line, and nothing ends it but the line")
        .label("no sign ends a statement")
        .help("take the `;` away; a second statement begins on a line of its own")
}
