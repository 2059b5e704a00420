//! A decimal point without a digit on one side.

use crate::diagnostic::{Diagnostic, Span};

/// The code.
pub(crate) const CODE: &str = "missing-digit";

/// The page.
pub(crate) const PAGE: &str = r##"
# A decimal point without a digit beside it

Digits stand on both sides of a decimal point. So `0..5` is a range for sure, and the figures of a number are those that were
meant: `5.` may stand for 5 or for 5.0.

```gw
given x = .5 "Share" from "Analysis"
answer x
```

```gw cured
given x = 0.5 "Share" from "Analysis"
answer x
```
"##;

/// `.5`
pub(crate) fn before_point(span: Span, digits: &str) -> Diagnostic {
    Diagnostic::error(CODE, span, format!("`.{digits}` has no digit before its point"))
        .label("a digit is missing before the point")
        .help(format!("write `0.{digits}`"))
        .safe_edit(span, format!("0.{digits}"))
}

/// `5.`
pub(crate) fn after_point(span: Span, digits: &str) -> Diagnostic {
    Diagnostic::error(CODE, span, format!("`{digits}.` has no digit behind its point"))
        .label("a digit is missing behind the point")
        .help(format!("write `{digits}.0`, or `{digits}` if no more is known"))
        .edit(span, format!("{digits}.0"))
}

/// `1.234.5`
pub(crate) fn second_point(span: Span) -> Diagnostic {
    Diagnostic::error(CODE, span, "this number has two points")
        .label("one point too many")
        .help("the point is the decimal sign; thousands have no sign")
}
