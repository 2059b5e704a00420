//! A number that touches its unit.

use crate::diagnostic::{Diagnostic, Span};

/// The code.
pub(crate) const CODE: &str = "missing-blank";

/// The page.
pub(crate) const PAGE: &str = r##"
# A number that touches its unit

Between a number and its unit stands a blank, except before `%` and `°C`. Otherwise `2e3m` or `2x` would have to be guessed:
a multiplication always has its `*`.

```gw
given d = 80.0mm "Bore" from "Drawing"
answer d
```

```gw cured
given d = 80.0 mm "Bore" from "Drawing"
answer d
```
"##;

/// The number at `number` touches what reads as its unit.
pub(crate) fn finding(number: Span, digits: &str, unit_span: Span, unit: &str) -> Diagnostic {
    Diagnostic::error(CODE, number.to(unit_span), format!("a blank is missing between `{digits}` and `{unit}`"))
        .label("the number touches the word")
        .help(format!("write `{digits} {unit}` if `{unit}` is a unit, `{digits} * {unit}` if it is a quantity"))
        .edit(Span { start: number.end, end: unit_span.start }, " ")
}
