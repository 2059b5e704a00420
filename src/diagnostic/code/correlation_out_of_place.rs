//! A correlation that cannot be one.

use crate::diagnostic::{Diagnostic, Span};

/// The code.
pub(crate) const CODE: &str = "correlation-out-of-place";

/// The page.
pub(crate) const PAGE: &str = r##"
# A correlation that cannot be one

`correlate a, b 0.8` says that two inputs tend to be wrong together, as two pressures are that were read with one gauge. The
coefficient lies between -1 and 1: 0 for readings that have nothing to do with each other, 1 for those that share all of their
error. It ties two different givens, and each pair once, since what is calculated gets its correlation from the inputs.

```gw
given p_1 = 9.60 bar abs ± 0.10 bar "Pressure before the filter" from "Test gauge"
given p_2 = 9.20 bar abs ± 0.10 bar "Pressure behind the filter" from "Test gauge"
correlate p_1, p_2 90
let dp = p_1 - p_2 in bar diff
answer dp
```

Here a percentage was written. Write the number itself.

```gw cured
given p_1 = 9.60 bar abs ± 0.10 bar "Pressure before the filter" from "Test gauge"
given p_2 = 9.20 bar abs ± 0.10 bar "Pressure behind the filter" from "Test gauge"
correlate p_1, p_2 0.90
let dp = p_1 - p_2 in bar diff
answer dp
```
"##;

/// The correlation cannot stand as it is, for the reason `why`.
pub(crate) fn finding(span: Span, why: &str) -> Diagnostic {
    Diagnostic::error(CODE, span, format!("this correlation cannot stand: {why}"))
        .label(why.to_owned())
        .help("`correlate a, b 0.8` ties two givens with a coefficient from -1 to 1")
}
