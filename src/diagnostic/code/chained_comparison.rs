//! Two comparisons in a row.

use crate::diagnostic::{Diagnostic, Span};

/// The code.
pub(crate) const CODE: &str = "chained-comparison";

/// The page.
pub(crate) const PAGE: &str = r##"
# Two comparisons in a row

A condition compares two sides. A value between two limits is two conditions joined by `and`. Outside of `require`, `assume`
and `caution when` nothing is compared.

```gw
given V = 3.20 m3 "Volume" from "Plate"
require 3.00 m3 <= V <= 4.00 m3 "Fits the bay"
answer V
```

```gw cured
given V = 3.20 m3 "Volume" from "Plate"
require 3.00 m3 <= V and V <= 4.00 m3 "Fits the bay"
answer V
```
"##;

/// The second sign of a chain stands at `span`, the first at `first`; `middle` stands between them.
pub(crate) fn finding(span: Span, middle: &str, first: Span) -> Diagnostic {
    let middle: String = middle.chars().take(24).collect();
    Diagnostic::error(CODE, span, "a condition compares two sides, and this compares a third")
        .label("the second comparison")
        .related(first, "the first comparison")
        .help(format!("join two conditions with `and`: `… {middle} and {middle} …`"))
        .edit(Span { start: span.start, end: span.start }, format!("and {middle} "))
}

/// The comparison `sign` stands where no condition can.
pub(crate) fn no_condition(span: Span, sign: &str) -> Diagnostic {
    Diagnostic::error(CODE, span, format!("nothing is compared here, and `{sign}` compares"))
        .label("no condition can stand here")
        .help("conditions stand in `require`, `assume` and `caution when`; bounds of an unknown are `within LO .. HI`")
}

/// A condition stands in the place of a value.
pub(crate) fn in_place_of_a_value(span: Span) -> Diagnostic {
    Diagnostic::error(CODE, span, "a condition stands here in the place of a value")
        .label("a condition")
        .help("a condition compares two values; conditions are joined by `and` and `or`")
}
