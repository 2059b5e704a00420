//! An uncertainty where none can be stated.

use crate::diagnostic::{Diagnostic, Span};

/// The code.
pub(crate) const CODE: &str = "misplaced-uncertainty";

/// The page.
pub(crate) const PAGE: &str = r##"
# An uncertainty where none can be stated

`±` stands behind the value of `given`, `site altitude` and `site pressure`. What is calculated gets its uncertainty from them.

```gw
given d = 80.0 mm "Bore" from "Drawing"
let r = d / 2 ± 0.5 mm
answer r
```

```gw cured
given d = 80.0 mm ± 1.0 mm "Bore" from "Drawing"
let r = d / 2
answer r
```
"##;

/// `±` stands at `span`.
pub(crate) fn finding(span: Span) -> Diagnostic {
    Diagnostic::error(CODE, span, "an uncertainty can be stated in `given` and `site` only")
        .label("no uncertainty can be stated here")
        .help("give the uncertain value a line of its own: `given NAME = VALUE ± …`")
}
