//! A source or a reason without quotes.

use crate::diagnostic::{Diagnostic, Span};

/// The code.
pub(crate) const CODE: &str = "text-without-quotes";

/// The page.
pub(crate) const PAGE: &str = r##"
# A text without quotes

The source behind `from` and the reason behind `because` are texts in quotes.

```gw
given V = 3.20 m3 "Volume" from Plate
answer V
```

```gw cured
given V = 3.20 m3 "Volume" from "Plate"
answer V
```
"##;

/// No text in quotes stands behind `word`; `words` is what stands there.
pub(crate) fn finding(span: Span, word: &str, words: Option<Span>) -> Diagnostic {
    let what = if word == "from" { "the source" } else { "the reason" };
    let finding = Diagnostic::error(CODE, words.unwrap_or(span), format!("{what} behind `{word}` is not in quotes"))
        .label("expected a text in quotes")
        .help(format!("put {what} in quotes: `{word} \"…\"`"));
    match words {
        Some(words) if words.start > span.end => finding.related(span, format!("behind this `{word}`")),
        _ => finding,
    }
}
