//! A reference volume without its reference conditions.

use crate::diagnostic::{Diagnostic, Span};

/// The code.
pub(crate) const CODE: &str = "reference-missing";

/// The page.
pub(crate) const PAGE: &str = r##"
# A reference volume without its conditions

A cubic metre of gas says how much gas it is only with a temperature and a pressure. `Nm3`, `Sm3` and `scf` are volumes at
agreed conditions, that is, amounts of gas; but the agreements differ. One contract counts at 0 degC, another at 15 degC or
60 degF, and 5 % of the gas hangs on it. The sheet therefore states the conditions of its own source, once, and the report
repeats them.

```gw
given q = 120 Nm3/h "Nitrogen to the packing hall" from "Supply contract"
answer q in mol/s
```

Add the conditions that the contract, the meter or the data sheet names.

```gw cured
reference normal at 0 degC, 101.325 kPa abs
given q = 120 Nm3/h "Nitrogen to the packing hall" from "Supply contract"
answer q in mol/s
```
"##;

/// `unit` needs the conditions `which`.
pub(crate) fn finding(span: Span, unit: &str, which: &str) -> Diagnostic {
    Diagnostic::error(
        CODE,
        span,
        format!("`{unit}` is an amount of gas at reference conditions, and this sheet does not state its {which} reference"),
    )
    .label(format!("no `reference {which} at …`"))
    .fact("in use are, among others, 0 degC, 15 degC, 20 degC and 60 degF, at 101.325 kPa or 100 kPa: bodies and countries differ")
    .help(format!(
        "add the conditions of your source, for example `reference {which} at {}, 101.325 kPa abs`",
        if which == "normal" { "0 degC" } else { "15 degC" }
    ))
}
