//! A key of the head given twice.

use crate::diagnostic::{Diagnostic, Span};

/// The code.
pub(crate) const CODE: &str = "head-key-twice";

/// The page.
pub(crate) const PAGE: &str = r##"
# A key of the head given twice

Each key stands once in the head. Of two revisions, say, neither would be sure to be the one that was meant.

```gw
---
revision: A
revision: B
---
given V = 3.20 m3 "Volume" from "Plate"
answer V
```

```gw cured
---
revision: B
---
given V = 3.20 m3 "Volume" from "Plate"
answer V
```
"##;

/// The key `key` stands at `span` and already at `first`.
pub(crate) fn finding(span: Span, key: &str, first: Span) -> Diagnostic {
    Diagnostic::error(CODE, span, format!("the key `{key}` is given twice in the head"))
        .label("the second time")
        .related(first, "the first time")
        .help("keep one of the two")
}
