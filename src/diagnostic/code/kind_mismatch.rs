//! A temperature or pressure where a difference belongs, or the reverse.

use crate::diagnostic::{Diagnostic, Span};

/// The code.
pub(crate) const CODE: &str = "kind-mismatch";

/// The page.
pub(crate) const PAGE: &str = r##"
# A value where a difference belongs, or the reverse

20 degC is a temperature, and 20 degC more than before is a difference; they are 293 K and 20 K. Likewise 3 bar gauge is a
pressure of some 4 bar, and a drop of 3 bar is no pressure at all. Two temperatures, or two gauge readings, have no sum that
means anything, though the units would allow it. Taken one for the other they move a result by 273 K or by one atmosphere,
which can look quite reasonable.

```gw
given T_1 = 31.0 degC "Gas when filled" from "TI-30"
let T_2 = T_1 + 15 degC in degC "Gas after a hot day"
answer T_2
```

Mark the difference with `diff`, or give it in `K`. A mean is half the sum: `(T_1 + T_2) / 2`.

```gw cured
given T_1 = 31.0 degC "Gas when filled" from "TI-30"
let T_2 = T_1 + 15 degC diff in degC "Gas after a hot day"
answer T_2
```
"##;

/// A sum that counts `count` temperatures or pressures.
pub(crate) fn sum(span: Span, what: &str, count: &str) -> Diagnostic {
    let (example, cure) = if what == "temperature" {
        ("a temperature", "write a difference in `K` or with `diff` (`15 degC diff`), or take the mean: `(T_1 + T_2) / 2`")
    } else {
        ("a pressure", "write a difference with `diff`, or take the mean: `(p_1 + p_2) / 2`")
    };
    Diagnostic::error(CODE, span, format!("this sum counts {count} absolute {what}s: it is neither {example} nor a difference"))
        .label(format!("{count} absolute {what}s"))
        .help(cure)
}

/// A difference where an absolute value belongs, or the reverse.
pub(crate) fn sides(span: Span, left: (Span, &str), right: (Span, &str), what: &str) -> Diagnostic {
    Diagnostic::error(CODE, span, format!("a {what} difference and an absolute {what} are not the same kind of quantity"))
        .label(format!("one side is {}, the other {}", left.1, right.1))
        .related(left.0, left.1.to_owned())
        .related(right.0, right.1.to_owned())
        .help(if what == "temperature" {
            "mark a difference with `diff` (`5 degC diff`) or give it in `K`"
        } else {
            "mark a pressure `abs`, `gauge` or `diff` as it is meant"
        })
}

/// A value shown as the other kind. `found` and `shown` say which.
pub(crate) fn shown(span: Span, found: &str, shown: &str, unit: Span) -> Diagnostic {
    Diagnostic::error(CODE, span, format!("this is {found}, but it is to be shown as {shown}"))
        .label(found.to_owned())
        .related(unit, format!("shown as {shown}"))
        .help("a difference is shown with `diff` (or in `K`), an absolute value without")
}

/// A difference where a function takes an absolute value.
pub(crate) fn argument(span: Span, function: &str, what: &str) -> Diagnostic {
    Diagnostic::error(CODE, span, format!("`{function}` takes an absolute {what}, this is a difference"))
        .label("a difference")
        .help(format!("add it to an absolute {what} first"))
}
