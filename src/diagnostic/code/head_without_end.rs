//! A head without its closing line.

use crate::diagnostic::{Diagnostic, Span};

/// The code.
pub(crate) const CODE: &str = "head-without-end";

/// The page.
pub(crate) const PAGE: &str = r##"
# A head without its closing line

A head begins and ends with a line `---`. Without the second one it is not known where the statements begin.

```gw
---
title: Receiver of the packing hall

given V = 3.20 m3 "Volume" from "Plate"
answer V
```

```gw cured
---
title: Receiver of the packing hall
---

given V = 3.20 m3 "Volume" from "Plate"
answer V
```
"##;

/// The head that begins at `span` has no closing line.
pub(crate) fn finding(span: Span) -> Diagnostic {
    Diagnostic::error(CODE, span, "the head is not closed: a second line `---` is missing")
        .label("the head begins here")
        .help("write a line `---` behind the last line of the head")
}
