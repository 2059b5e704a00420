//! A decimal comma.

use crate::diagnostic::{Diagnostic, Span};

/// The code.
pub(crate) const CODE: &str = "decimal-comma";

/// The page.
pub(crate) const PAGE: &str = r##"
# A decimal comma

The decimal sign of a sheet is the point: `2.40`. A comma separates the items of a list, and large numbers have no sign between
their thousands.

```gw
given V = 2,40 m3 "Volume" from "Plate"
answer V
```

```gw cured
given V = 2.40 m3 "Volume" from "Plate"
answer V
```
"##;

/// The number at `span` is written `whole,decimals`.
pub(crate) fn finding(span: Span, whole: &str, decimals: &str) -> Diagnostic {
    let point = format!("{whole}.{decimals}");
    let finding = Diagnostic::error(CODE, span, format!("`{whole},{decimals}` has a decimal comma")).label("a comma in a number");
    if decimals.len() == 3 && !whole.contains('.') {
        // Three digits may as well be thousands.
        return finding.help(format!("write `{point}`, or `{whole}{decimals}` if the comma separates thousands")).edit(span, point);
    }
    finding.help(format!("the decimal sign is the point: write `{point}`")).safe_edit(span, point)
}
