//! A number in prose that is not the result.

use crate::diagnostic::{Diagnostic, Span};

/// The code.
pub(crate) const CODE: &str = "typed-number-disagrees";

/// The page.
pub(crate) const PAGE: &str = r##"
# A number in the prose that is not the result

The prose names a quantity with a number beside it, and the sheet finds another one. Sentences are written once and inputs are
changed often, so typed numbers go stale, and they are what a hurried reader looks at first. A summary that says 33.3 kg above
a table that says 35.2 kg costs the whole report its credit. The sheet solves; the warning stands at the sentence.

```gw
given V = 3.20 m3 "Volume of the receiver" from "Vessel plate"
given rho = 11.0 kg/m3 "Density when filled" from "Calculation KQ-PH-C-011"
let m = V * rho in kg "Nitrogen held"
> After filling, m = 33.3 kg.
answer m
```

Put the name in braces; the report then prints the value of the sheet.

```gw cured
given V = 3.20 m3 "Volume of the receiver" from "Vessel plate"
given rho = 11.0 kg/m3 "Density when filled" from "Calculation KQ-PH-C-011"
let m = V * rho in kg "Nitrogen held"
> After filling, the receiver holds {m}.
answer m
```
"##;

/// The prose says `typed` beside `name`, which is `value`.
pub(crate) fn finding(span: Span, name: &str, typed: &str, value: &str) -> Diagnostic {
    Diagnostic::warning(CODE, span, format!("the prose says {typed} of `{name}`, which is {value}"))
        .label("a typed number goes stale")
        .help(format!("write `{{{name}}}` in the prose: it prints the value of the sheet"))
}
