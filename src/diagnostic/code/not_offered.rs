//! A part of the language that this version does not offer.

use crate::diagnostic::{Diagnostic, Span};

/// The code.
pub(crate) const CODE: &str = "not-offered";

/// The page.
pub(crate) const PAGE: &str = r##"
# A part of the language that this version does not offer

The line is right as the language goes, but this version cannot calculate what it asks for, and it does not put something else
in its place: a number under a false name would look like a result. So the sheet has no result until the line asks for something
that is there. Humid air, for one, has a single model, in which its density is not that of the ideal law.

```gw
gas air = humid air, ideal
```

Follow the help of the finding. Dry air may be ideal, and each of its states is then judged.

```gw cured
gas air = dry air, ideal
```
"##;

/// `what` is part of the language and not offered.
pub(crate) fn finding(span: Span, what: &str, help: &str) -> Diagnostic {
    Diagnostic::error(CODE, span, format!("{what} is not offered by this version")).label("not offered").help(help.to_owned())
}
