//! A power beyond what a quantity of the trade can have.

use crate::diagnostic::{Diagnostic, Span};

/// The code.
pub(crate) const CODE: &str = "power-too-high";

/// The page.
pub(crate) const PAGE: &str = r##"
# A power that no quantity has

The digits straight behind a unit are its power: `m3` is a cubic metre. With `m33` a key was struck twice, and a length to the
power of 33 would be a dimension that no quantity of the trade has. The same is told of a relation whose dimension grows
beyond all measure, as when a diameter is raised to an exponent that was meant for a ratio of pressures. Powers up to 24 are
read, which is far more than any formula needs.

```gw
given V = 3.20 m33 "Volume of the receiver" from "Vessel plate"
answer V
```

Correct the exponent. Formulas with large exponents take them of ratios, such as `(p_2 / p_1)^40`.

```gw cured
given V = 3.20 m3 "Volume of the receiver" from "Vessel plate"
answer V
```
"##;

/// A unit raised beyond the limit.
pub(crate) fn unit(span: Span, text: &str) -> Diagnostic {
    Diagnostic::error(CODE, span, format!("`{text}` raises a unit to a power that no quantity has"))
        .label("beyond the limit of powers")
        .help("digits behind a unit are its power; check the exponent")
}

/// An expression whose dimension leaves the limit.
pub(crate) fn expression(span: Span) -> Diagnostic {
    Diagnostic::error(CODE, span, "the dimension of this expression has an exponent that no quantity has")
        .label("beyond the limit of powers")
        .help("check the powers in it")
}
