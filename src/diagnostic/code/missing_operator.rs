//! Two operands without an operator.

use crate::diagnostic::{Diagnostic, Span};

/// The code.
pub(crate) const CODE: &str = "missing-operator";

/// The page.
pub(crate) const PAGE: &str = r##"
# Two operands side by side

Between two operands stands an operator. There is no multiplication without `*`: a word behind a number is its unit, and a
bracket behind a name is a function. A unit of an expression stands behind `in`.

```gw
given a = 2.00 m "Length" from "Drawing"
given b = 3.00 m "Width" from "Drawing"
let A = 2 (a + b)
answer A
```

```gw cured
given a = 2.00 m "Length" from "Drawing"
given b = 3.00 m "Width" from "Drawing"
let A = 2 * (a + b)
answer A
```
"##;

/// `left` and `right` stand side by side.
pub(crate) fn between(left_span: Span, left: &str, right_span: Span, right: &str) -> Diagnostic {
    let short = |text: &str| text.chars().take(24).collect::<String>();
    Diagnostic::error(CODE, left_span.to(right_span), format!("an operator is missing between `{}` and `{}`", short(left), short(right)))
        .label("two operands side by side")
        .help("a multiplication needs `*`; a unit stands straight behind a number, or behind `in`")
        .edit(Span { start: left_span.end, end: right_span.start }, " * ")
}

/// `V (a + b)`: a name, a blank and a bracket.
pub(crate) fn before_bracket(span: Span, name: &str, between: Span) -> Diagnostic {
    Diagnostic::error(CODE, span, format!("an operator is missing between `{name}` and the bracket"))
        .label("two operands side by side")
        .help(format!("a multiplication needs `*`: `{name} * (…)`"))
        .edit(between, " * ")
}

/// `1 013` or `2 3`: two numbers.
pub(crate) fn between_numbers(span: Span, left: &str, right: &str) -> Diagnostic {
    let finding = Diagnostic::error(CODE, span, format!("the numbers `{left}` and `{right}` stand side by side")).label("two numbers");
    let whole = right.split('.').next().unwrap_or(right);
    if whole.len() == 3 && !left.contains('.') {
        return finding.help(format!("no blank stands within a number: write `{left}{right}`")).edit(span, format!("{left}{right}"));
    }
    finding.help("an operator is missing between them, or a comma")
}
