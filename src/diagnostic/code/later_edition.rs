//! An edition of the language that is later than the tool knows.

use crate::diagnostic::{Diagnostic, Span};

/// The code.
pub(crate) const CODE: &str = "later-edition";

/// The page.
pub(crate) const PAGE: &str = r##"
# A later edition of the language

`edition` in the head names the edition of the language in which the sheet is written. This version of the tool knows edition 1. A
sheet of a later edition may use words whose meaning it cannot know, so it gives no result.

```gw
---
edition: 2
---
given V = 3.20 m3 "Volume" from "Plate"
answer V
```

```gw cured
---
edition: 1
---
given V = 3.20 m3 "Volume" from "Plate"
answer V
```
"##;

/// The sheet is of edition `found`; this version knows up to `known`.
pub(crate) fn finding(span: Span, found: &str, known: u64) -> Diagnostic {
    Diagnostic::error(CODE, span, format!("the sheet is written in edition {found} of the language; this version knows edition {known}"))
        .label("a later edition")
        .help("use a later version of the tool")
}
