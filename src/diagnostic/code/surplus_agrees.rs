//! A line too many that agrees.

use crate::diagnostic::{Diagnostic, Span};

/// The code.
pub(crate) const CODE: &str = "surplus-agrees";

/// The page.
pub(crate) const PAGE: &str = r##"
# A line too many that agrees

This is a note, not a fault. The sheet is determined without the line, and the line agrees within what the uncertainties of
the inputs allow, so it is kept as an independent check and listed in the report with its difference. A scale that confirms a
mass calculated from pressure and volume is the best evidence that a sheet can have. If the line was not meant as a check, one
input too many is given, and a later change of it will turn the note into a conflict.

```gw
given V = 10.0 L "Water capacity" from "Cylinder stamp"
given rho = 0.750 kg/L "Filling density" from "Filling sheet"
given m_scale = 7.52 kg "Carbon dioxide in the cylinder" from "Scale"
let m = rho * V in kg
m = m_scale
answer m
```

Keep it; or state what has to hold as a requirement, which then shows its margin.

```gw cured
given V = 10.0 L "Water capacity" from "Cylinder stamp"
given rho = 0.750 kg/L "Filling density" from "Filling sheet"
given m_scale = 7.52 kg "Carbon dioxide in the cylinder" from "Scale"
let m = rho * V in kg
require abs(m - m_scale) <= 0.20 kg "Scale and filling sheet agree"
answer m
```
"##;

/// A relation that was not needed and agrees.
pub(crate) fn finding(span: Span, what: &str, difference: &str, allowed: &str) -> Diagnostic {
    Diagnostic::note(
        CODE,
        span,
        format!("{what} is not needed to solve the sheet and is kept as a check: off by {difference}, {allowed} allowed"),
    )
    .label("kept as an independent check")
}
