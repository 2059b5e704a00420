//! A line that is no statement and no relation.

use crate::diagnostic::{Diagnostic, Span};

/// The code.
pub(crate) const CODE: &str = "bad-line";

/// The page.
pub(crate) const PAGE: &str = r#"
# A line that cannot be read

Every logical line of a sheet is one statement: it starts with a word of the language (`given`, `let`, `state`, …), or it
is a relation, an expression on each side of one `=`. A line that is neither is never taken for prose, because a mistyped
line would then vanish from the calculation. Prose for the report stands behind `> `.

```gw
given V = 3.20 m3 "Volume" from "Plate"
The receiver is filled in the afternoon.
answer V
```

Put `> ` before a sentence, or complete the statement.

```gw cured
given V = 3.20 m3 "Volume" from "Plate"
> The receiver is filled in the afternoon.
answer V
```
"#;

/// The line could not be read from `span` on; `expected` says what could stand there.
pub(crate) fn finding(span: Span, found: &str, expected: &str) -> Diagnostic {
    Diagnostic::error(CODE, span, format!("this line cannot be read at {found}"))
        .label(format!("expected {expected}"))
        .help("a line is a statement, or a relation with one `=`; prose for the report stands behind `> `")
}

/// The line begins with `word`, which is like no statement word. `start` is where a sign of prose would stand, `behind` the
/// next word.
pub(crate) fn no_statement(span: Span, word: &str, start: Span, behind: &str) -> Diagnostic {
    let finding = Diagnostic::error(CODE, span, format!("`{word}` starts no statement")).label("no word that starts a statement");
    if matches!(behind, "in" | "within" | "near") {
        return finding.help(format!("a quantity to be found is declared with `unknown {word} …`")).edit(start, "unknown ");
    }
    finding.help("prose for the report stands behind `> `; a relation has one `=`, and `*` between its factors").edit(start, "> ")
}

/// A value stands in the place of a condition.
pub(crate) fn no_comparison(span: Span) -> Diagnostic {
    Diagnostic::error(CODE, span, "a condition is expected here, and this compares nothing")
        .label("expected `<`, `<=`, `>` or `>=` behind it")
        .help("a condition compares two values: `require cold.p >= 7.5 bar gauge \"text\"`")
}
