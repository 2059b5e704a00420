//! An exact value with an uncertainty.

use crate::diagnostic::{Diagnostic, Span};

/// The code.
pub(crate) const CODE: &str = "exact-with-uncertainty";

/// The page.
pub(crate) const PAGE: &str = r##"
# An exact value with an uncertainty

`exact` marks counts and definitions, which have no uncertainty; `±` states one. And `of` stands behind a percentage only: `± 1 % of
16 bar` is one percent of an instrument's span.

```gw
given n = 12 exact ± 1 "Cylinders" from "Delivery note"
answer n
```

```gw cured
given n = 12 exact "Cylinders" from "Delivery note"
answer n
```
"##;

/// `exact` stands at `exact`, an uncertainty at `span`.
pub(crate) fn finding(exact: Span, span: Span) -> Diagnostic {
    Diagnostic::error(CODE, span, "an exact value has no uncertainty")
        .label("stated here")
        .related(exact, "exact")
        .help("keep one of the two")
}

/// `of` stands behind a width that is no percentage.
pub(crate) fn of_without_percent(width: Span, of: Span) -> Diagnostic {
    Diagnostic::error(CODE, width, "`of` stands behind a percentage only")
        .label("no percentage")
        .related(of, "the span")
        .help("write `± 1 % of 16 bar`, or the width alone")
}
