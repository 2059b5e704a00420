//! One property of a state given twice.

use crate::diagnostic::{Diagnostic, Span};

/// The code.
pub(crate) const CODE: &str = "property-given-twice";

/// The page.
pub(crate) const PAGE: &str = r##"
# One property given twice in a state

A `state` line lists the properties that fix it, each once. If the pressure stands there twice, nobody can tell whether one of
the two was meant for another state, was to be the temperature, or is an old value that should have gone. Two equal properties
do not make the pair that a state of a gas needs either: the second degree of freedom stays open.

```gw
gas n2 = nitrogen
state full of n2 at p = 9.6 bar abs, p = 7.5 bar abs
```

Keep one of them and give the other property. A second value that ought to agree is a relation on its own line, such as
`full.p = p_check`, and is kept as a check.

```gw cured
gas n2 = nitrogen
state full of n2 at p = 9.6 bar abs, T = 304 K
```
"##;

/// `field` of `state` is fixed twice on its line.
pub(crate) fn finding(span: Span, state: &str, field: &str, first: Span) -> Diagnostic {
    Diagnostic::error(CODE, span, format!("`{field}` of the state `{state}` is given twice"))
        .label("given again here")
        .related(first, "first given here")
        .help("keep one of them, or write the second as a relation of its own to have it checked")
}
