//! A value of the head of the wrong type.

use crate::diagnostic::{Diagnostic, Span};

/// The code.
pub(crate) const CODE: &str = "head-value";

/// The page.
pub(crate) const PAGE: &str = r##"
# A value of the head that its key cannot take

`title`, `document`, `revision` and `purpose` are texts and stay as written. `figures` is a whole number from 1 to 17, `strict` is
`true` or `false`, `coverage` a percentage such as `99 %`, `monte_carlo` a whole number or `auto`, `seed` a whole number,
`limits` a mapping such as `{ideal gas: 1 %}`.

```gw
---
figures: plenty
---
given V = 3.20 m3 "Volume" from "Plate"
answer V
```

```gw cured
---
figures: 4
---
given V = 3.20 m3 "Volume" from "Plate"
answer V
```
"##;

/// `key` takes `wanted` and has `found`.
pub(crate) fn finding(span: Span, key: &str, wanted: &str, found: &str) -> Diagnostic {
    Diagnostic::error(CODE, span, format!("`{key}` takes {wanted}, not {found}"))
        .label(format!("expected {wanted}"))
        .help(format!("write {wanted} behind `{key}`"))
}
