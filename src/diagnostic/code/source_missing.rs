//! An input that does not say where it comes from.

use crate::diagnostic::{Diagnostic, Span};

/// The code.
pub(crate) const CODE: &str = "source-missing";

/// The page.
pub(crate) const PAGE: &str = r##"
# An input without a source

A checker cannot agree to a number without knowing where it was read: on a plate, an instrument, a data sheet, in a standard
or a contract. With the source the next engineer finds the value again when the plant has changed, and sees that a measured
value and an estimated one are not of the same weight. The sheet solves and the report carries the warning; with
`strict: true` in the head it is an error.

```gw
given V = 3.20 m3 "Volume of the receiver"
answer V
```

Say behind `from` where it comes from. An estimate is a source as well, if it says whose and on what ground.

```gw cured
given V = 3.20 m3 "Volume of the receiver" from "Vessel plate, year 2014"
answer V
```
"##;

/// The input `name`, or the line of the `site`, has no source; an error where the sheet is strict.
pub(crate) fn finding(span: Span, name: &str, strict: bool) -> Diagnostic {
    let message =
        if name == "site" { "the line of the site has no source".to_owned() } else { format!("the input `{name}` has no source") };
    let finding = if strict { Diagnostic::error(CODE, span, message) } else { Diagnostic::warning(CODE, span, message) };
    finding.label("where does it come from?").help("add `from \"where it was read\"`: a plate, an instrument, a data sheet, a standard")
}
