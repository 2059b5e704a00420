//! The inch, whose usual sign is a word of the language.

use crate::diagnostic::{Diagnostic, Span};

/// The code.
pub(crate) const CODE: &str = "inch-word";

/// The page.
pub(crate) const PAGE: &str = r##"
# The inch is `inch`

`in` is a word of the language (`let A = … in m2`), so that the inch has to be called `inch`. `in2`, `in3` and `lbf/in2` are
read as usual.

```gw
given d = 6.00 in "Bore" from "Drawing"
answer d
```

```gw cured
given d = 6.00 inch "Bore" from "Drawing"
answer d
```
"##;

/// `in` at `span` stands behind the number `digits`.
pub(crate) fn finding(digits: &str, span: Span) -> Diagnostic {
    Diagnostic::error(CODE, span, "`in` is a word of the language; the inch is `inch`")
        .label("the inch?")
        .help(format!("write `{digits} inch`"))
        .edit(span, "inch")
}
