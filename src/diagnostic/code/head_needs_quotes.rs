//! A text of the head that needs quotes.

use crate::diagnostic::{Diagnostic, Span};

/// The code.
pub(crate) const CODE: &str = "head-needs-quotes";

/// The page.
pub(crate) const PAGE: &str = r##"
# A text of the head that needs quotes

The head is YAML, and there a colon before a blank ends a key. A text that holds one stands in quotes.

```gw
---
title: Receiver: what it holds
---
given V = 3.20 m3 "Volume" from "Plate"
answer V
```

```gw cured
---
title: "Receiver: what it holds"
---
given V = 3.20 m3 "Volume" from "Plate"
answer V
```
"##;

/// The unquoted value `text` of `key` holds `: `.
pub(crate) fn finding(span: Span, key: &str, text: &str) -> Diagnostic {
    let shown: String = text.chars().take(60).collect();
    let quoted = format!("\"{}\"", text.replace('\\', "\\\\").replace('"', "\\\""));
    Diagnostic::error(CODE, span, format!("the text of `{key}` holds a colon and so needs quotes"))
        .label("needs quotes")
        .help(format!("write `{key}: \"{shown}\"`"))
        .safe_edit(span, quoted)
}
