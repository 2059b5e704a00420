//! A name that nothing declares.

use crate::diagnostic::{Diagnostic, Span};

use super::suggest;

/// The code.
pub(crate) const CODE: &str = "unknown-name";

/// The page.
pub(crate) const PAGE: &str = r##"
# A name that nothing declares

Every name is declared once, by `given`, `unknown`, `let`, `gas` or `state`; the order of the lines does not matter. A name
that no line declares is mistyped, or its line is still to be written. `T1` and `T_1` are two names, and so are `V` and `v`.
In a spreadsheet such a slip would quietly be an empty cell, that is, zero; here it stops the sheet. A gas or a state standing
where a quantity belongs is told with the same code, as is a state of a gas that has no `gas` line.

```gw
given T_1 = 31.0 degC "Gas when filled" from "TI-30"
let T_2 = T1 - 12 K in degC "Gas after the night"
answer T_2
```

Correct the spelling, or declare the quantity.

```gw cured
given T_1 = 31.0 degC "Gas when filled" from "TI-30"
let T_2 = T_1 - 12 K in degC "Gas after the night"
answer T_2
```
"##;

/// `word` names nothing; `near` are the names most like it.
pub(crate) fn finding(span: Span, word: &str, near: &[&str]) -> Diagnostic {
    let finding =
        Diagnostic::error(CODE, span, format!("`{word}` names nothing in this sheet")).label("no quantity, gas or state of this name");
    let declare = "declare it: `given NAME = VALUE` for an input, `unknown NAME in UNIT` for a quantity to be found";
    let finding = if near.is_empty() { finding } else { finding.fact(declare) };
    suggest(finding, span, near, declare)
}

/// A gas that no line declares, where a gas is expected.
pub(crate) fn gas(span: Span, word: &str, near: &[&str]) -> Diagnostic {
    let finding = Diagnostic::error(CODE, span, format!("`{word}` is no gas of this sheet")).label("no `gas` line declares it");
    suggest(finding, span, near, "name a gas that a `gas` line declares: `gas n2 = nitrogen` declares `n2`")
}

/// A gas, a state or a constant that stands alone where a quantity is expected.
pub(crate) fn not_a_quantity(span: Span, word: &str, what: &str, fields: &str) -> Diagnostic {
    let help = if what == "constant" {
        format!("give it a name of its own: `let x = {word}`")
    } else {
        format!("name one of its quantities: {fields}")
    };
    Diagnostic::error(CODE, span, format!("`{word}` is a {what}, not a quantity of the sheet"))
        .label("a quantity is expected here")
        .help(help)
}

/// A word before a bracket that is no function.
pub(crate) fn function(span: Span, word: &str, near: &[&str]) -> Diagnostic {
    let finding = Diagnostic::error(CODE, span, format!("`{word}` is no function")).label("no function of this name");
    suggest(finding, span, near, "functions are `sqrt cbrt exp ln log10 abs min max sin cos tan asin acos atan`; a product needs `*`")
}
