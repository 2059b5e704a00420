//! Limits that differ.

use crate::diagnostic::{Diagnostic, Span};

/// The code.
pub(crate) const CODE: &str = "one-sided-uncertainty";

/// The page.
pub(crate) const PAGE: &str = r##"
# Limits that differ

An uncertainty has one width for both sides: `± A`. Where the limits differ, give their middle as the value and half their
distance as the width.

```gw
given d = 80.0 mm + 0.6 mm - 0.2 mm "Bore" from "Drawing"
answer d
```

```gw cured
given d = 80.2 mm ± 0.4 mm "Bore" from "Drawing"
answer d
```
"##;

/// The limits at `span` differ.
pub(crate) fn finding(span: Span) -> Diagnostic {
    Diagnostic::error(CODE, span, "an uncertainty has one width for both sides")
        .label("two widths")
        .help("give the middle of the limits as the value, and half their distance behind `±`")
}
