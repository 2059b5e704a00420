//! A bracket without its partner.

use crate::diagnostic::{Diagnostic, Span};

/// The code.
pub(crate) const CODE: &str = "unbalanced-bracket";

/// The page.
pub(crate) const PAGE: &str = r##"
# A bracket without its partner

Every bracket that opens is closed by one of the same kind within the same statement. An open bracket goes on over line ends,
until a line at column 1 starts with a statement word.

```gw
given V = 3.20 m3 "Volume" from "Plate"
let A = (V / 2.0 m
answer A
```

```gw cured
given V = 3.20 m3 "Volume" from "Plate"
let A = (V / 2.0 m)
answer A
```
"##;

/// The bracket `sign` at `span` is not closed in the statement `line`.
pub(crate) fn unclosed(span: Span, sign: &str, line: Span) -> Diagnostic {
    let close = partner(sign);
    let finding = Diagnostic::error(CODE, span, format!("the bracket `{sign}` is not closed")).label("opened here");
    finding
        .related(Span { start: line.end.saturating_sub(1).max(span.start), end: line.end }, "the statement ends here")
        .help(format!("close it with `{close}`"))
}

/// The bracket `sign` at `span` closes nothing.
pub(crate) fn unopened(span: Span, sign: &str) -> Diagnostic {
    Diagnostic::error(CODE, span, format!("the bracket `{sign}` closes none that is open"))
        .label("nothing to close")
        .help(format!("take it away, or open it with `{}`", partner(sign)))
        .edit(span, "")
}

/// The bracket at `close` is not of the kind of the one at `open`.
pub(crate) fn mismatched(open: Span, opened: &str, close: Span, closed: &str) -> Diagnostic {
    Diagnostic::error(CODE, close, format!("`{closed}` closes a bracket that `{opened}` opened"))
        .label(format!("expected `{}`", partner(opened)))
        .related(open, "opened here")
        .help("expressions and units have round brackets only")
        .edit(close, partner(opened))
}

fn partner(sign: &str) -> &'static str {
    match sign {
        "(" => ")",
        "[" => "]",
        "{" => "}",
        ")" => "(",
        "]" => "[",
        _ => "{",
    }
}
