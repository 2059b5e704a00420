//! A head that does not stand at the top.

use crate::diagnostic::{Diagnostic, Span};

/// The code.
pub(crate) const CODE: &str = "head-misplaced";

/// The page.
pub(crate) const PAGE: &str = r##"
# A head that is not at the top of the file

The head stands before everything else, so that a reader and the tool find it at once. A line `---` further down has no meaning;
parts of a sheet are headed by `section`.

```gw
given V = 3.20 m3 "Volume" from "Plate"
---
title: Receiver of the packing hall
---
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

/// A line `---` stands at `span`.
pub(crate) fn finding(span: Span) -> Diagnostic {
    Diagnostic::error(CODE, span, "a line `---` belongs to the head, and the head stands at the top of the file")
        .label("not at the top")
        .help("move the head to the top; `section` heads the parts of a sheet")
}
