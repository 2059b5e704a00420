//! Bounds that cannot hold.

use crate::diagnostic::{Diagnostic, Span};

/// The code.
pub(crate) const CODE: &str = "bounds-out-of-place";

/// The page.
pub(crate) const PAGE: &str = r##"
# Bounds that are not known beforehand

`within` says where a quantity may lie, and `near` which of several values is meant. Both are used before anything is solved,
so they can only be numbers or quantities that are given. A bound that is itself a result would move while the answer is
searched, and the search would end somewhere else each time. A limit between two results is a requirement, not a bound.

```gw
unknown D in mm "Bore of the line"
unknown d in mm within 5 mm .. D "Bore of the orifice"
D = 50 mm
d = D / 4
answer d
```

Give the bound as a value, or state it as `require d <= D` with its text.

```gw cured
given D = 50.0 mm "Bore of the line" from "Line list"
unknown d in mm within 5 mm .. D "Bore of the orifice"
d = D / 4
answer d
```
"##;

/// The bounds of `name` cannot stand, for the reason `why`.
pub(crate) fn finding(span: Span, name: &str, why: &str) -> Diagnostic {
    Diagnostic::error(CODE, span, format!("the bounds of `{name}` cannot stand: {why}"))
        .label(why.to_owned())
        .help("`within LO .. HI` and `near GUESS` take numbers with units, or quantities that are given")
}
