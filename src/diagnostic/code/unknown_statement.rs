//! A first word that starts no statement.

use crate::diagnostic::{Diagnostic, Span};

/// The code.
pub(crate) const CODE: &str = "unknown-statement";

/// The page.
pub(crate) const PAGE: &str = r##"
# A word that starts no statement

A line begins with a word of the language (`given`, `let`, `state`, …) or is a relation. The first word of this line is
followed by another word, a number or a text, so that it cannot be a relation, and it is no word of the language. Such a
line is never taken for prose: a mistyped line would then vanish from the calculation.

```gw
giben V = 3.20 m3 "Volume" from "Plate"
answer V
```

A sentence for the report stands behind `> `.

```gw cured
given V = 3.20 m3 "Volume" from "Plate"
answer V
```
"##;

/// `word` is most like the statement word `near`. The edit is `safe` where the line can be read with it.
pub(crate) fn near(span: Span, word: &str, near: &str, safe: bool) -> Diagnostic {
    let finding = Diagnostic::error(CODE, span, format!("`{word}` starts no statement")).label(format!("did you mean `{near}`?"));
    let finding = finding.help(format!("write `{near}`; prose for the report stands behind `> `"));
    if safe { finding.safe_edit(span, near) } else { finding.edit(span, near) }
}
