//! A part of the language that this version does not offer.

use crate::diagnostic::{Diagnostic, Span};

/// The code.
pub(crate) const CODE: &str = "not-offered";

/// The page.
pub(crate) const PAGE: &str = r##"
# A part of the language that this version does not offer

The line is right as the language goes, but this version cannot calculate what it asks for, and it does not put something else
in its place. Reading `, real` and then using the ideal law would print a density under a false name; at 200 bar it would be
off by several percent. So the sheet has no result until the line asks for something that is there.

```gw
gas n2 = nitrogen, real
```

Follow the help of the finding. A gas without `, real` is ideal, and each of its states is judged by the rules of thumb; a
property that is not offered can be a `given` with its source.

```gw cured
gas n2 = nitrogen
```
"##;

/// `what` is part of the language and not offered.
pub(crate) fn finding(span: Span, what: &str, help: &str) -> Diagnostic {
    Diagnostic::error(CODE, span, format!("{what} is not offered by this version")).label("not offered").help(help.to_owned())
}
