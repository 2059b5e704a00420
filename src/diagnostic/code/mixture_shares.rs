//! The shares of a mixture are wrong.

use crate::diagnostic::{Diagnostic, Span};

/// The code.
pub(crate) const CODE: &str = "mixture-shares";

/// The page.
pub(crate) const PAGE: &str = r##"
# Shares that make no mixture

The shares of a mixture are numbers from 0 to 1 that sum to 1, or all in percent, and the line says of what they are shares:
`by mole`, `by mass` or `by volume`. Shares by mass and by mole differ as much as the molar masses do: 18 % of carbon dioxide
in argon by mole is 19.5 % by mass, and with hydrogen the two differ many times over. A sum that misses 1 means that a
component was forgotten or mistyped, and nobody can tell which.

```gw
gas weld = 0.82 argon + 0.16 carbon dioxide by mole
```

Complete the composition from the certificate of the gas.

```gw cured
gas weld = 0.82 argon + 0.18 carbon dioxide by mole
```
"##;

/// Shares that sum to something else than 1.
pub(crate) fn sum(span: Span, sum: &str, percent: &str) -> Diagnostic {
    Diagnostic::error(CODE, span, format!("the shares of this mixture sum to {sum} ({percent} %), not to 1"))
        .label(format!("sum {sum}"))
        .help("complete the composition, or correct the share that is mistyped; shares are numbers that sum to 1, or all in %")
}

/// Shares that do not say of what they are.
pub(crate) fn basis(span: Span) -> Diagnostic {
    Diagnostic::error(CODE, span, "this mixture does not say what its shares are shares of")
        .label("by mole, by mass or by volume?")
        .help("add `by mole`, `by mass` or `by volume` (a data sheet of a gas usually means by volume, a weighed filling by mass)")
}

/// Parts of a mixture that have no share: all of them, or some.
pub(crate) fn missing(span: Span, names: &[String], all: bool) -> Diagnostic {
    let message = match names {
        _ if all => "this mixture gives no shares".to_owned(),
        [one] => format!("the share of {one} is missing in this mixture"),
        several => format!("the shares of {} are missing in this mixture", several.join(", ")),
    };
    Diagnostic::error(CODE, span, message)
        .label("no share")
        .help("write a number before each gas: `0.82 argon + 0.18 carbon dioxide by mole`")
}

/// A share that cannot be one, for the reason `why`.
pub(crate) fn share(span: Span, why: &str) -> Diagnostic {
    Diagnostic::error(CODE, span, format!("this share cannot stand: {why}"))
        .label(why.to_owned())
        .help("each gas stands once, and its share is a number from 0 to 1, or all are in %")
}
