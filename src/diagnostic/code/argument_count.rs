//! A function with too few or too many arguments.

use crate::diagnostic::{Diagnostic, Span};

/// The code.
pub(crate) const CODE: &str = "argument-count";

/// The page.
pub(crate) const PAGE: &str = r##"
# A function with the wrong number of arguments

`min` and `max` take two or more arguments, all other functions one.

```gw
given a = 2.00 m2 "Floor" from "Drawing"
let b = sqrt(a, 2)
answer b
```

```gw cured
given a = 2.00 m2 "Floor" from "Drawing"
let b = sqrt(a)
answer b
```
"##;

/// The function `word` takes `wanted`.
pub(crate) fn finding(span: Span, word: &str, wanted: &str) -> Diagnostic {
    Diagnostic::error(CODE, span, format!("`{word}` takes {wanted}"))
        .label(format!("expected {wanted}"))
        .help("arguments are separated by commas; the decimal sign is the point")
}
