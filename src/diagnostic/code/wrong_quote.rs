//! Quotes of another kind.

use crate::diagnostic::{Diagnostic, Span};

/// The code.
pub(crate) const CODE: &str = "wrong-quote";

/// The page.
pub(crate) const PAGE: &str = r##"
# Quotes of another kind

Texts stand between the straight quotes `"` of the keyboard. Word processors replace them by curled or angled ones, and some
languages use single quotes.

```gw
given V = 3.20 m3 'Volume' from "Plate"
answer V
```

```gw cured
given V = 3.20 m3 "Volume" from "Plate"
answer V
```
"##;

/// The quote `sign` at `span` is not the one of the language; `second` is its partner.
pub(crate) fn finding(span: Span, sign: &str, second: Option<Span>) -> Diagnostic {
    let finding = Diagnostic::error(CODE, span, format!("a text stands between `\"`, not `{sign}`")).label("expected `\"`");
    let finding = finding.help("write `\"` before and behind the text").edit(span, "\"");
    match second {
        Some(second) => finding.related(second, "and here"),
        None => finding,
    }
}
