//! A requirement that is decided by figures that the inputs do not have.

use crate::diagnostic::{Diagnostic, Span};

/// The code.
pub(crate) const CODE: &str = "decided-by-missing-figures";

/// The page.
pub(crate) const PAGE: &str = r##"
# A requirement decided by figures that are not there

A value of 9.6 bar stands for anything from 9.55 to 9.65 bar. Carried through the sheet, such half units give a band about
every result, and here the limit of the requirement lies within that band. Met or not met, the verdict rests on figures that
nobody wrote. The sheet says so, because a margin of 10 g on a mass that is known to 30 g would look like a success in the
report.

```gw
given V = 0.520 m3 "Volume of the buffer" from "Vessel plate"
given rho = 11.0 kg/m3 "Density when filled" from "Calculation KQ-PH-C-011"
let m = V * rho in kg "Nitrogen held"
require m >= 5.71 kg "Carries one packing shift"
answer m
```

Read the inputs more closely, state their uncertainty, or leave more margin.

```gw cured
given V = 0.520 m3 "Volume of the buffer" from "Vessel plate"
given rho = 11.0 kg/m3 "Density when filled" from "Calculation KQ-PH-C-011"
let m = V * rho in kg "Nitrogen held"
require m >= 5.00 kg "Carries one packing shift"
answer m
```
"##;

/// The margin is smaller than what the figures of the inputs leave open.
pub(crate) fn finding(span: Span, margin: &str, half_width: &str) -> Diagnostic {
    Diagnostic::warning(CODE, span, format!("the margin of {margin} lies within what the figures of the inputs leave open, {half_width}"))
        .label("decided by figures that are not there")
        .help("take the inputs with more figures or a smaller uncertainty, or leave more margin")
}
