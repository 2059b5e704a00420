//! An answer that depends on no input.

use crate::diagnostic::{Diagnostic, Span};

/// The code.
pub(crate) const CODE: &str = "answer-without-input";

/// The page.
pub(crate) const PAGE: &str = r##"
# An answer that depends on no input

Whatever the givens are, this answer stays the same: all numbers that lead to it are typed into relations. They have no
description, no source and no uncertainty, no checker is asked about them, and a later case that changes the inputs leaves the
answer where it was. Or the answer was to follow from the inputs, and a relation that should tie it to them names another
quantity.

```gw
let V = 2 * 1.60 m3 "Both receivers"
answer V
```

State as `given` what was read somewhere, and check that the answer hangs on it.

```gw cured
given V_1 = 1.60 m3 "One receiver" from "Vessel plate"
let V = 2 * V_1 "Both receivers"
answer V
```
"##;

/// The answer `name` is the same whatever the inputs are.
pub(crate) fn finding(span: Span, name: &str) -> Diagnostic {
    Diagnostic::warning(CODE, span, format!("the answer `{name}` depends on no input"))
        .label("the same whatever is given")
        .help("check that the relations tie it to the givens")
}
