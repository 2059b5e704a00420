//! A word of the language in the place of a name.

use crate::diagnostic::{Diagnostic, Span};

/// The code.
pub(crate) const CODE: &str = "reserved-name";

/// The page.
pub(crate) const PAGE: &str = r##"
# A word of the language is no name

The words that start a statement, `site`, functions, constants and the words between the parts of statements name no quantity,
gas or state. So every line reads one way, and a sheet stays readable when a later edition gives such a word more to do.

```gw
given answer = 3.90 kg "Nitrogen held" from "Weighing"
```

```gw cured
given m = 3.90 kg "Nitrogen held" from "Weighing"
answer m
```
"##;

/// `word` is to be declared.
pub(crate) fn declared(span: Span, word: &str) -> Diagnostic {
    Diagnostic::error(CODE, span, format!("`{word}` is a reserved word of the language and cannot be a name"))
        .label("reserved")
        .help(format!("choose another name, such as `{word}_1`"))
}

/// Whether a finding is that of a declaration.
pub(crate) fn declares(finding: &Diagnostic) -> bool {
    finding.code == CODE && finding.message.ends_with("cannot be a name")
}

/// `word` stands where a name is used.
pub(crate) fn used(span: Span, word: &str) -> Diagnostic {
    Diagnostic::error(CODE, span, format!("`{word}` is a reserved word of the language and names no quantity"))
        .label("reserved")
        .help("a name is expected here, or the statement ends too early")
}

/// The function `word` has no arguments.
pub(crate) fn function_without_brackets(span: Span, word: &str) -> Diagnostic {
    Diagnostic::error(CODE, span, format!("`{word}` is a function, and its brackets are missing"))
        .label("a function without brackets")
        .help(format!("write `{word}(…)`; `{word}` is reserved and names no quantity"))
}
