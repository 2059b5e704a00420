//! One thing stated twice in a statement.

use crate::diagnostic::{Diagnostic, Span};

/// The code.
pub(crate) const CODE: &str = "said-twice";

/// The page.
pub(crate) const PAGE: &str = r##"
# Said twice in one statement

A statement has at most one description, one source (`from`) and one reason (`because`), and each of its other parts once. Two
of them leave open which one counts.

```gw
given V = 3.20 m3 "Volume" "Receiver" from "Plate"
answer V
```

```gw cured
given V = 3.20 m3 "Volume of the receiver" from "Plate"
answer V
```
"##;

/// `what` stands at `span` and already at `first`.
pub(crate) fn finding(span: Span, what: &str, first: Span) -> Diagnostic {
    Diagnostic::error(CODE, span, format!("{what} is given twice in this statement"))
        .label("the second time")
        .related(first, "the first time")
        .help("keep one of the two")
}
