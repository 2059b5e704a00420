//! A key that the head does not have.

use crate::diagnostic::{Diagnostic, Span};

/// The code.
pub(crate) const CODE: &str = "unknown-head-key";

/// The page.
pub(crate) const PAGE: &str = r##"
# A key that the head does not have

The head knows `title document revision purpose edition limits figures strict coverage monte_carlo seed`, and `limits` knows
`ideal gas`. Another key would change nothing, although whoever wrote it meant something by it.

```gw
---
revison: B
---
given V = 3.20 m3 "Volume" from "Plate"
answer V
```

```gw cured
---
revision: B
---
given V = 3.20 m3 "Volume" from "Plate"
answer V
```
"##;

/// `key` is none of `keys`.
pub(crate) fn finding(span: Span, key: &str, keys: &[&'static str]) -> Diagnostic {
    let shown: String = key.chars().take(40).collect();
    let near = crate::diagnostic::nearest(key, keys.iter().copied());
    let finding = Diagnostic::error(CODE, span, format!("`{shown}` is no key of the head"));
    match near.first() {
        Some(near) => finding.label(format!("did you mean `{near}`?")).help(format!("write `{near}`")).safe_edit(span, *near),
        None => finding.label("unknown key").help(format!("the keys are {}", keys.join(", "))),
    }
}
