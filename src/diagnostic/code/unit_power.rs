//! A power behind a number with a unit.

use crate::diagnostic::{Diagnostic, Span};

/// The code.
pub(crate) const CODE: &str = "unit-power";

/// The page.
pub(crate) const PAGE: &str = r##"
# A power behind a unit

The digits in a unit are its power: `2 m2`. A number with its unit is one thing, tighter than `^`, so that `2 m^2` could mean
two square metres or the square of two metres; it has to be said which.

```gw
given A = 2.50 m^2 "Floor" from "Drawing"
answer A
```

```gw cured
given A = 2.50 m2 "Floor" from "Drawing"
answer A
```
"##;

/// `base` is a number with a unit that no bracket holds together.
pub(crate) fn finding(base_span: Span, base: &str, span: Span, exponent: &str) -> Diagnostic {
    let _ = base_span;
    let both = format!("`{base}{exponent}` for a power of the unit, or `({base})^{exponent}` for a power of the quantity");
    Diagnostic::error(CODE, span, format!("`{base}^{exponent}` can be read in two ways"))
        .label("power of the unit, or of the quantity?")
        .help(format!("write {both}"))
}

/// The power of a unit where no expression can stand; `hat` is the sign with the exponent.
pub(crate) fn of_a_unit(span: Span, unit: &str, exponent: &str, hat: Span) -> Diagnostic {
    Diagnostic::error(CODE, span, format!("the power of a unit is written without `^`: `{unit}{exponent}`"))
        .label("a power with `^`")
        .help(format!("write `{unit}{exponent}`"))
        .safe_edit(hat, exponent)
}
