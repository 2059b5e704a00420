//! A function outside its domain, or a number beyond range.

use crate::diagnostic::{Diagnostic, Span};

/// The code.
pub(crate) const CODE: &str = "undefined-value";

/// The page.
pub(crate) const PAGE: &str = r##"
# A function where it has no value

The root of a negative number, the logarithm of zero or less, the arc sine of 1.2: with the values shown, the part of the
relation that is marked has no value, or it grows beyond all numbers. In flow formulas the usual cause is two pressures that
changed places, so that a drop becomes a rise. It can also be true of the plant: no gas flows by itself from the lower
pressure to the higher.

```gw
given p_1 = 2.10 bar abs "Pressure before the filter" from "PI-5"
given p_2 = 2.30 bar abs "Pressure behind the filter" from "PI-6"
given rho = 2.60 kg/m3 "Density of the air" from "Air table"
let w = sqrt(2 * (p_1 - p_2) / rho) in m/s
answer w
```

Look at the values that the finding lists, and at where each was read.

```gw cured
given p_1 = 2.30 bar abs "Pressure before the filter" from "PI-5"
given p_2 = 2.10 bar abs "Pressure behind the filter" from "PI-6"
given rho = 2.60 kg/m3 "Density of the air" from "Air table"
let w = sqrt(2 * (p_1 - p_2) / rho) in m/s
answer w
```
"##;

/// `part` has no value for the reason `why`.
pub(crate) fn finding(span: Span, part: &str, why: &str, values: &str) -> Diagnostic {
    Diagnostic::error(CODE, span, format!("`{part}` has no value here: {why}"))
        .label(why.to_owned())
        .fact(values.to_owned())
        .help("check the inputs that lead to it")
}
