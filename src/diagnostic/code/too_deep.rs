//! A statement nested too deep.

use crate::diagnostic::{Diagnostic, Span};

/// The code.
pub(crate) const CODE: &str = "too-deep";

/// The page.
pub(crate) const PAGE: &str = r##"
# A statement nested too deep

Brackets may stand 100 deep in a statement, and a statement may have 1000 operators. What goes beyond that is no relation
that a colleague could check by hand, and is refused before it is read.

```gw
given V = 3.20 m3 "Volume" from "Plate"
let W = (((((((((((((((((((((((((((((((((((((((((((((((((((((((((((((((((((((((((((((((((((((((((((((((((((((
    V)))))))))))))))))))))))))))))))))))))))))))))))))))))))))))))))))))))))))))))))))))))))))))))))))))))
answer W
```

Give the inner parts names with `let`.

```gw cured
given V = 3.20 m3 "Volume" from "Plate"
let W = V
answer W
```
"##;

/// The bracket at `span` is nested deeper than `most`.
pub(crate) fn brackets(span: Span, most: usize) -> Diagnostic {
    Diagnostic::error(CODE, span, format!("brackets stand more than {most} deep"))
        .label("one bracket too many")
        .help("give the inner parts names with `let`")
}

/// The operator at `span` is one more than `most`.
pub(crate) fn operators(span: Span, most: usize) -> Diagnostic {
    Diagnostic::error(CODE, span, format!("this statement has more than {most} operators"))
        .label("one operator too many")
        .help("break it into several statements with `let`")
}
