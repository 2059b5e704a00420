//! A temperature below absolute zero.

use crate::diagnostic::{Diagnostic, Span};

/// The code.
pub(crate) const CODE: &str = "below-absolute-zero";

/// The page.
pub(crate) const PAGE: &str = r##"
# A temperature below absolute zero

No temperature lies below 0 K, which is -273.15 degC or -459.67 degF. A value that does has the wrong sign, the wrong unit, or
is a difference that is not marked as one. In cold work the unit is the usual slip: tables of liquefied gases come in degrees
Fahrenheit as well as Celsius. Where the temperature is a result, a sign in the lines before it is wrong, or more heat is
taken out than the gas holds.

```gw
given T = -320 degC "Vapour above the liquid nitrogen" from "Supplier's table"
answer T
```

Correct the unit or the sign. A difference is written with `diff`, such as `-320 degC diff`.

```gw cured
given T = -320 degF "Vapour above the liquid nitrogen" from "Supplier's table"
answer T
```
"##;

/// A temperature as written.
pub(crate) fn literal(span: Span, owner: &str, text: &str) -> Diagnostic {
    Diagnostic::error(CODE, span, format!("the temperature{owner} of {text} is below absolute zero"))
        .label("below -273.15 degC, 0 K")
        .help("check the sign and the unit; a difference is marked `diff`")
}

/// A temperature that came out of the relations.
pub(crate) fn result(span: Span, name: &str, value: &str) -> Diagnostic {
    Diagnostic::error(CODE, span, format!("`{name}` comes out below absolute zero: {value}"))
        .label("a temperature below 0 K")
        .help("check the signs and the differences in the lines that lead to it")
}

/// A result in kelvin that may be a temperature or a difference, and is negative.
pub(crate) fn perhaps(span: Span, name: &str, value: &str) -> Diagnostic {
    Diagnostic::warning(CODE, span, format!("`{name}` comes out at {value}: as a temperature it lies below absolute zero"))
        .label("a temperature or a difference?")
        .help("mark a difference with `diff` behind its unit (`K diff`); of a temperature check the signs in the lines that lead to it")
}
