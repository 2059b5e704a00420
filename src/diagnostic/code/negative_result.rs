//! A quantity that cannot be negative comes out negative.

use crate::diagnostic::{Diagnostic, Span};

use super::a;

/// The code.
pub(crate) const CODE: &str = "negative-result";

/// The page.
pub(crate) const PAGE: &str = r##"
# A negative amount

Masses, volumes, densities and amounts of gas cannot be less than nothing. One that comes out negative shows a sign the wrong
way round, such as what leaves counted as entering, or two inputs that changed places. It can also be the true verdict on the
plant: more is drawn than the vessel holds. A sheet that went on with such a number would find a pressure for it, and the
report would look like any other.

```gw
given m_1 = 5.70 kg "Nitrogen held when full" from "Calculation KQ-PH-C-011"
given m_2 = 1.90 kg "Nitrogen drawn in a shift" from "Meter FQ-7"
let m = m_2 - m_1 in kg "Nitrogen left"
answer m
```

Follow the lines that lead to it, and put the sign right.

```gw cured
given m_1 = 5.70 kg "Nitrogen held when full" from "Calculation KQ-PH-C-011"
given m_2 = 1.90 kg "Nitrogen drawn in a shift" from "Meter FQ-7"
let m = m_1 - m_2 in kg "Nitrogen left"
answer m
```
"##;

/// `name`, a `what`, is negative.
pub(crate) fn finding(span: Span, name: &str, what: &str, value: &str) -> Diagnostic {
    Diagnostic::error(CODE, span, format!("`{name}` comes out negative: {value}"))
        .label(format!("{} cannot be negative", a(what)))
        .help("check the signs in the lines that lead to it: what enters and what leaves, what is larger")
}
