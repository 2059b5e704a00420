//! A statement without its `=`.

use crate::diagnostic::{Diagnostic, Span};

/// The code.
pub(crate) const CODE: &str = "missing-equals";

/// The page.
pub(crate) const PAGE: &str = r##"
# A statement without its `=`

Between the name and the value of `given`, `let`, `gas` and `site` stands `=`.

```gw
given V 3.20 m3 "Volume" from "Plate"
answer V
```

```gw cured
given V = 3.20 m3 "Volume" from "Plate"
answer V
```
"##;

/// No `=` stands between `name` and what is at `span`.
pub(crate) fn finding(span: Span, name: &str) -> Diagnostic {
    Diagnostic::error(CODE, span, format!("`=` is missing behind `{name}`"))
        .label("expected `=` before this")
        .help(format!("write `{name} = …`"))
        .safe_edit(Span { start: span.start, end: span.start }, "= ")
}
