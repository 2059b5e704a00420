//! An assumption that does not say why.

use crate::diagnostic::{Diagnostic, Span};

/// The code.
pub(crate) const CODE: &str = "assumption-without-reason";

/// The page.
pub(crate) const PAGE: &str = r##"
# An assumption without a reason

Whoever checks a sheet asks of each assumption why it may be made: because of a test, a certificate, a drawing, the way the
plant is run. `because` puts the answer beside it. An assumption without one is taken on trust, and when the plant changes
nobody sees that its ground has gone: a vessel that was tight at its test need not be tight after the next change of a gasket.
The sheet solves all the same; the report carries this as a warning.

```gw
assume "No leakage overnight"
```

Say what the assumption rests on. Where that is nothing but custom, say so; then it is looked at.

```gw cured
assume "No leakage overnight" because "Tightness test of the vessel, same revision"
```
"##;

/// An assumption without `because`.
pub(crate) fn finding(span: Span) -> Diagnostic {
    Diagnostic::warning(CODE, span, "this assumption has no reason").label("why may it be made?").help("add `because \"reason\"`")
}
