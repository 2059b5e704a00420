//! A basis behind something that is no pressure.

use crate::diagnostic::{Diagnostic, Span};

use super::a;

/// The code.
pub(crate) const CODE: &str = "basis-out-of-place";

/// The page.
pub(crate) const PAGE: &str = r##"
# A basis on something that is no pressure

`abs`, `gauge` and `diff` say what a pressure counts from: from vacuum, from the atmosphere of the site, or from another
pressure. Volumes, masses and flows have nothing of the kind, and of a temperature only a difference is marked, with `diff`,
since its unit already says where it begins. The word is often left over from a line that was copied, or the unit is the wrong
one and the line was meant to be a pressure. Which of the two it is, only the writer knows.

```gw
given V = 3.20 m3 abs "Volume of the receiver" from "Plate"
answer V
```

Take the word away, or put the unit right.

```gw cured
given V = 3.20 m3 "Volume of the receiver" from "Plate"
answer V
```
"##;

/// `abs`, `gauge` or `diff` behind a unit of another quantity.
pub(crate) fn finding(span: Span, word: &str, dimension: &str) -> Diagnostic {
    let owner = if word == "diff" { "a pressure or a temperature" } else { "a pressure" };
    Diagnostic::error(CODE, span, format!("`{word}` belongs to {owner}, this is {}", a(dimension)))
        .label("no basis here")
        .help(if word == "diff" {
            "leave it out: `diff` marks a difference of pressures or of temperatures"
        } else {
            "leave it out, or correct the unit"
        })
        .safe_edit(span, "")
}
