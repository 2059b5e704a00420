//! A stated uncertainty that cannot be one.

use crate::diagnostic::{Diagnostic, Span};

/// The code.
pub(crate) const CODE: &str = "uncertainty-out-of-place";

/// The page.
pub(crate) const PAGE: &str = r##"
# An uncertainty that cannot stand

What stands behind `±` is a width on each side of the value: it is not negative, and it has the value's own dimension. A
percentage is taken of the value, and that makes no sense on a scale with a zero of its own: 1 % of 20 degC would be 0.2 K, of
the same temperature in kelvins 2.9 K. The factor `k` and the degrees of freedom `dof` are above zero. A margin that rests on
a width without meaning says nothing.

```gw
given T = 20.0 degC ± 1 % "Cold store before loading" from "TI-7"
answer T
```

Give the limits that the certificate of the instrument states, as an interval.

```gw cured
given T = 20.0 degC ± 0.5 K "Cold store before loading" from "TI-7"
answer T
```
"##;

/// The uncertainty cannot stand as it is, for the reason `why`.
pub(crate) fn finding(span: Span, why: &str, help: &str) -> Diagnostic {
    Diagnostic::error(CODE, span, format!("this uncertainty cannot stand: {why}")).label(why.to_owned()).help(help.to_owned())
}
