//! A pressure below full vacuum.

use crate::diagnostic::{Diagnostic, Span};

/// The code.
pub(crate) const CODE: &str = "below-vacuum";

/// The page.
pub(crate) const PAGE: &str = r##"
# A pressure below full vacuum

An absolute pressure ends at zero, and so a reading below the atmosphere ends at minus the pressure of the site, about
-1 bar gauge at the sea and less on a hill. Where a value lies lower, its sign or its unit is wrong, or a difference stands
without its `diff`; where a result does, more pressure is lost on the way than there was. Such a number would still go through
every formula and give a negative density.

```gw
site altitude = 12 m "Yard level" from "Site survey"
given p = -1.20 bar gauge "Suction of the vacuum pump" from "PI-12"
answer p
```

Read the instrument again, with its unit, and write that value.

```gw cured
site altitude = 12 m "Yard level" from "Site survey"
given p = -0.92 bar gauge "Suction of the vacuum pump" from "PI-12"
answer p
```
"##;

/// A pressure as written.
pub(crate) fn literal(span: Span, owner: &str, text: &str, absolute: &str) -> Diagnostic {
    Diagnostic::error(CODE, span, format!("the pressure{owner} of {text} is below full vacuum ({absolute})"))
        .label("less than no pressure")
        .help("check the sign, the unit and the basis; a difference is marked `diff`")
}

/// A pressure that came out of the relations.
pub(crate) fn result(span: Span, name: &str, value: &str) -> Diagnostic {
    Diagnostic::error(CODE, span, format!("`{name}` comes out below full vacuum: {value}"))
        .label("a negative absolute pressure")
        .help("check the signs, the bases and the differences in the lines that lead to it")
}
