//! A temperature on a scale with an offset as a factor.

use crate::diagnostic::{Diagnostic, Span};

/// The code.
pub(crate) const CODE: &str = "absolute-in-product";

/// The page.
pub(crate) const PAGE: &str = r##"
# An absolute temperature as a factor

`20 degC` is a temperature: as a factor it counts from absolute zero and stands for 293.15 K. In the gas law that is what is
meant. In a heat balance a difference is meant, the 20 K by which the gas is warmed, and the heat then comes out fifteen times
too large. The units agree either way, so only the writer can say which it is; the sheet solves and the report carries the
warning.

```gw
given m = 5.70 kg "Nitrogen in the receiver" from "Calculation KQ-PH-C-011"
given c = 0.743 kJ/(kg.K) "Isochoric heat capacity" from "Gas tables"
let Q = m * c * 20 degC in kJ "Heat taken up on a hot day"
answer Q
```

Write a difference in `K` or with `diff`, and a temperature in `K`.

```gw cured
given m = 5.70 kg "Nitrogen in the receiver" from "Calculation KQ-PH-C-011"
given c = 0.743 kJ/(kg.K) "Isochoric heat capacity" from "Gas tables"
let Q = m * c * 20 K in kJ "Heat taken up on a hot day"
answer Q
```
"##;

/// A literal in degC or degF stands in a product, where it counts from absolute zero.
pub(crate) fn finding(span: Span, text: &str, kelvin: &str, interval: &str) -> Diagnostic {
    Diagnostic::warning(CODE, span, format!("the factor `{text}` is the temperature {kelvin}, counted from absolute zero"))
        .label("an absolute temperature in a product")
        .help(format!("for a temperature difference write `{interval}` or `{text} diff`; for a temperature write it in K"))
}
