//! Lines that conflict.

use crate::diagnostic::{Diagnostic, Span};

/// The code.
pub(crate) const CODE: &str = "over-determined";

/// The page.
pub(crate) const PAGE: &str = r##"
# Lines that contradict each other

There is one line more than the unknowns need, and the lines do not agree: together they cannot all be true. The finding shows
the smallest set that conflicts, by how much it does, and how much the uncertainties of the inputs would allow. None of them
is preferred, because the tool cannot know which is wrong: a plate, a drawing and a scale may each be. A surplus line that
agrees is welcome, and is kept as a check.

```gw
given V = 3.20 m3 "Volume of the receiver" from "Vessel plate"
given d = 1.00 m "Inner diameter" from "Drawing"
given h = 5.00 m "Length, ends left out" from "Drawing"
V = h * pi / 4 * d^2
answer V
```

Find the line that is wrong, or leave one out that was never meant to hold.

```gw cured
given V = 3.20 m3 "Volume of the receiver" from "Vessel plate"
given d = 1.00 m "Inner diameter" from "Drawing"
unknown h in m "Length, ends left out"
V = h * pi / 4 * d^2
answer h
```
"##;

/// A relation that was not needed and does not agree: `difference` against `allowed`, both with their unit.
pub(crate) fn conflict(span: Span, what: &str, difference: &str, allowed: &str, lines: usize) -> Diagnostic {
    Diagnostic::error(CODE, span, format!("{what} conflicts with the rest of the sheet by {difference}, where {allowed} is allowed"))
        .label(if lines > 1 {
            format!("one of the {lines} places shown is too many, or wrong")
        } else {
            "does not hold by itself".to_owned()
        })
        .help("leave out or correct the one that is wrong; what agrees within its uncertainty is kept as a check")
}
