//! A number beyond double precision.

use crate::diagnostic::{Diagnostic, Span};

/// The code.
pub(crate) const CODE: &str = "number-out-of-range";

/// The page.
pub(crate) const PAGE: &str = r##"
# A number beyond the range of numbers

Calculation runs in double precision, which reaches from 2.3e-308 to 1.7e308 in size. No quantity of a plant comes near either
end: all the molecules of the atmosphere are some 1e44. So a number outside this range is a slip in its exponent, mostly a
digit too many. It is refused where it stands, since it would become zero or infinity and pass through the relations
unnoticed.

```gw
given N = 6.0e2500 "Molecules in a cylinder" from "Count from the filling weight"
answer N
```

Correct the exponent, or write the value in a larger or smaller unit.

```gw cured
given N = 6.0e25 "Molecules in a cylinder" from "Count from the filling weight"
answer N
```
"##;

/// A number as written.
pub(crate) fn finding(span: Span, text: &str) -> Diagnostic {
    Diagnostic::error(CODE, span, format!("the number `{text}` is outside the range of numbers (2.3e-308 to 1.7e308)"))
        .label("too large or too small")
        .help("check its exponent")
}
