//! A relation without `=`, or with two.

use crate::diagnostic::{Diagnostic, Span};

/// The code.
pub(crate) const CODE: &str = "wrong-equals";

/// The page.
pub(crate) const PAGE: &str = r##"
# A relation has one `=`

A line that no statement word starts is a relation: an expression, one `=`, an expression. A chain `a = b = c` is two relations
on two lines.

```gw
given a = 2.00 m "Length" from "Drawing"
unknown b in m
a = b = 2.00 m
answer b
```

```gw cured
given a = 2.00 m "Length" from "Drawing"
unknown b in m
a = b
answer b
```
"##;

/// The relation `line` has no `=`; reading stopped at `span`.
pub(crate) fn none(line: Span, span: Span) -> Diagnostic {
    let _ = line;
    Diagnostic::error(CODE, span, "this line is no statement, and as a relation it lacks its `=`")
        .label("no `=` up to here")
        .help("a relation has one `=`: an expression on each side; prose for the report stands behind `> `")
}

/// A second `=` stands at `second`.
pub(crate) fn several(second: Span, first: Span) -> Diagnostic {
    Diagnostic::error(CODE, second, "this statement has two `=`")
        .label("the second `=`")
        .related(first, "the first `=`")
        .help("write two relations on two lines: `a = b` and `b = c`")
}
