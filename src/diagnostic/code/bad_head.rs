//! A head that is no YAML.

use crate::diagnostic::{Diagnostic, Span};

/// The code.
pub(crate) const CODE: &str = "bad-head";

/// The page.
pub(crate) const PAGE: &str = r##"
# A head that cannot be read

The lines between `---` at the top of a file are YAML: a key, a colon, a blank, a value, one on a line. Texts that begin with a
sign such as `[`, `{`, `"`, `*`, `&`, `@`, or that hold `: `, stand in quotes.

```gw
---
title: "Receiver of the packing hall
---
given V = 3.20 m3 "Volume" from "Plate"
answer V
```

```gw cured
---
title: "Receiver of the packing hall"
---
given V = 3.20 m3 "Volume" from "Plate"
answer V
```
"##;

/// The head cannot be read from `span` on, for the reason `why`.
pub(crate) fn finding(span: Span, why: &str) -> Diagnostic {
    Diagnostic::error(CODE, span, format!("the head cannot be read: {why}"))
        .label(why.to_owned())
        .help("a line of the head is `key: value`; a text with signs in it stands in quotes")
}
