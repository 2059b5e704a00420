//! A continuation without its indentation.

use crate::diagnostic::{Diagnostic, Span};

/// The code.
pub(crate) const CODE: &str = "unindented-line";

/// The page.
pub(crate) const PAGE: &str = r##"
# A continuation that is not indented

The line begins with something that goes on with a statement (`from`, `because`, `in`, a text in quotes, an operator), but it
stands at column 1, and there every statement begins anew. A line that continues another starts with a blank.

```gw
given V = 3.20 m3 "Volume"
from "Plate"
answer V
```

```gw cured
given V = 3.20 m3 "Volume"
  from "Plate"
answer V
```
"##;

/// The line begins with `found` and so continues the line above.
pub(crate) fn finding(span: Span, found: &str) -> Diagnostic {
    let found: String = found.chars().take(24).collect();
    let line = Span { start: span.start, end: span.start };
    Diagnostic::error(CODE, span, format!("no statement begins with `{found}`"))
        .label("seems to continue the line above")
        .help("begin the line with a blank, so that it continues the statement above")
        .edit(line, "  ")
}
