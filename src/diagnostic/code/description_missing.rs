//! A line that needs a description and has none.

use crate::diagnostic::{Diagnostic, Span};

/// The code.
pub(crate) const CODE: &str = "description-missing";

/// The page.
pub(crate) const PAGE: &str = r##"
# An input without a description

The report prints each input with its description, and the checker goes through them one by one. `V` alone does not say
whether it is the vessel, the vessel with its pipes, or the gas space above a liquid, and the three differ by more than most
instruments do. So an input has to say what it is; this is an error and not a warning, since nobody but the writer can supply
it.

```gw
given V = 3.20 m3 from "Vessel plate"
answer V
```

Say it in quotes, in the words that stand on the plant.

```gw cured
given V = 3.20 m3 "Gas space of the receiver, pipes left out" from "Vessel plate"
answer V
```
"##;

/// `what` (given `V`) has no description.
pub(crate) fn finding(span: Span, what: &str) -> Diagnostic {
    Diagnostic::error(CODE, span, format!("{what} has no description"))
        .label("what is it?")
        .help("say in quotes behind it what it is: `\"Vessel volume\"`")
}
