//! A division by zero at the solution.

use crate::diagnostic::{Diagnostic, Span};

/// The code.
pub(crate) const CODE: &str = "division-by-zero";

/// The page.
pub(crate) const PAGE: &str = r##"
# A division by zero

The part of the relation that is shown comes to zero with the values beside it, and something is divided by it. Most often two
inputs that should differ are equal: the line of one was copied and not changed, or two instruments show the same because one
of them stands still. The sheet itself may be right; then this case has no answer, as with a flow that is to be found from a
time of zero.

```gw
given m = 12.0 kg "Nitrogen drawn in the shift" from "Scale"
given t_1 = 6.00 h "Begin of the shift" from "Log book"
given t_2 = 6.00 h "End of the shift" from "Log book"
let q = m / (t_2 - t_1) in kg/h
answer q
```

Look at the inputs that are listed, and correct the one that is wrong.

```gw cured
given m = 12.0 kg "Nitrogen drawn in the shift" from "Scale"
given t_1 = 6.00 h "Begin of the shift" from "Log book"
given t_2 = 14.00 h "End of the shift" from "Log book"
let q = m / (t_2 - t_1) in kg/h
answer q
```
"##;

/// `part` is zero with the values `values`.
pub(crate) fn finding(span: Span, part: &str, values: &str) -> Diagnostic {
    Diagnostic::error(CODE, span, format!("division by zero: `{part}` comes to zero at the solution"))
        .label("this is zero")
        .fact(values.to_owned())
        .help("check the inputs that make it vanish")
}
