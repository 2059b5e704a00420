//! A given whose value has to be calculated.

use crate::diagnostic::{Diagnostic, Span};

/// The code.
pub(crate) const CODE: &str = "given-expression";

/// The page.
pub(crate) const PAGE: &str = r##"
# A given is a value, not a calculation

`given` states what was read off a plate, an instrument or a drawing: one number with its unit. What is calculated from other
quantities is a `let`, so that the report can show the calculation.

```gw
given a = 2.00 m "Length" from "Drawing"
given b = 2 * a "Width" from "Drawing"
answer b
```

```gw cured
given a = 2.00 m "Length" from "Drawing"
let b = 2 * a "Width" from "Drawing"
answer b
```
"##;

/// The value at `span` is an expression; `word` is the word `given`.
pub(crate) fn finding(span: Span, word: Span) -> Diagnostic {
    Diagnostic::error(CODE, span, "a given is one number with its unit; this has to be calculated")
        .label("an expression")
        .help("write `let` instead of `given`, or give the parts on lines of their own")
        .edit(word, "let")
}
