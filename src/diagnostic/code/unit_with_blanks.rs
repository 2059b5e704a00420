//! A unit with blanks inside.

use crate::diagnostic::{Diagnostic, Span};

/// The code.
pub(crate) const CODE: &str = "unit-with-blanks";

/// The page.
pub(crate) const PAGE: &str = r##"
# A unit with blanks inside

A unit is one word without blanks: `kg/m3`, `kJ/(kg.K)`. With blanks it would have to be guessed whether `/ s2` divides by a
unit or by a quantity of that name.

```gw
given g = 9.81 m / s2 "Acceleration of free fall" from "Standard"
answer g
```

```gw cured
given g = 9.81 m/s2 "Acceleration of free fall" from "Standard"
answer g
```
"##;

/// The unit at `whole` is cut off by blanks at `span`; `joined` is how it is written.
pub(crate) fn finding(span: Span, whole: Span, joined: &str) -> Diagnostic {
    Diagnostic::error(CODE, span, format!("the unit `{joined}` is written with blanks inside"))
        .label("cut off by a blank")
        .help(format!("write the unit without blanks: `{joined}`"))
        .safe_edit(whole, joined)
}
