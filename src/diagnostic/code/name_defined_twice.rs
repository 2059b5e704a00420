//! One name for two things.

use crate::diagnostic::{Diagnostic, Span};

/// The code.
pub(crate) const CODE: &str = "name-defined-twice";

/// The page.
pub(crate) const PAGE: &str = r##"
# One name for two things

Quantities, gases and states share one set of names, so that a name means one thing on every line. A second line with the same
name often comes from a block that was copied for the next case; with two values of `p`, half the sheet might mean one of them
and half the other. Nothing that uses the name is judged until this is settled. The pressure and the altitude of the site, and
each kind of reference conditions, are likewise stated once.

```gw
given p = 9.60 bar abs "Pressure when filled" from "PI-31"
given p = 7.90 bar abs "Pressure after the night" from "PI-31"
answer p
```

Give each its own name.

```gw cured
given p_1 = 9.60 bar abs "Pressure when filled" from "PI-31"
given p_2 = 7.90 bar abs "Pressure after the night" from "PI-31"
answer p_1, p_2
```
"##;

/// `name` is declared at `first` and again at `span`.
pub(crate) fn finding(span: Span, name: &str, first: Span, what: &str) -> Diagnostic {
    Diagnostic::error(CODE, span, format!("`{name}` is declared twice"))
        .label("declared again here")
        .related(first, format!("first declared here, as a {what}"))
        .help("quantities, gases and states share one set of names: give one of them another name")
}

/// A thing that a sheet has once only.
pub(crate) fn once(span: Span, what: &str, first: Span) -> Diagnostic {
    Diagnostic::error(CODE, span, format!("{what} is stated twice"))
        .label("stated again here")
        .related(first, "first stated here")
        .help("keep one of them")
}
