//! An input that nothing uses.

use crate::diagnostic::{Diagnostic, Span};

/// The code.
pub(crate) const CODE: &str = "unused-input";

/// The page.
pub(crate) const PAGE: &str = r##"
# A line that leads to nothing

An input stands in no relation and no answer, or a quantity is found that nobody asks for. It may be left from an earlier
version; then it costs the checker a look and nothing more. The dangerous case is the other one: the input was meant to count,
and the relation in which it belongs names something else, such as the outer diameter where the inner one was given. The
result then does not move when the input is changed, and nobody notices.

```gw
given D = 820 mm "Outer diameter" from "Drawing"
given d = 800 mm "Inner diameter" from "Drawing"
let A = pi / 4 * D^2 in m2 "Section of the gas space"
answer A
```

Use the quantity where it belongs, or take its line out.

```gw cured
given d = 800 mm "Inner diameter" from "Drawing"
let A = pi / 4 * d^2 in m2 "Section of the gas space"
answer A
```
"##;

/// The given `name` stands in no relation, requirement or answer.
pub(crate) fn finding(span: Span, name: &str) -> Diagnostic {
    Diagnostic::warning(CODE, span, format!("nothing uses the input `{name}`"))
        .label("stands in no relation and no answer")
        .help("remove the line, or use the quantity where it belongs: a relation may name another one by mistake")
}

/// The quantity `name` is found and asked for by nothing.
pub(crate) fn result(span: Span, name: &str) -> Diagnostic {
    Diagnostic::warning(CODE, span, format!("nothing asks for `{name}`"))
        .label("found, but used by no line and no answer")
        .help("add it to `answer`, or remove it with the line that finds it")
}
