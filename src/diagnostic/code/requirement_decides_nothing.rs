//! A requirement that does not judge the calculation.

use crate::diagnostic::{Diagnostic, Span};

/// The code.
pub(crate) const CODE: &str = "requirement-decides-nothing";

/// The page.
pub(crate) const PAGE: &str = r##"
# A requirement that judges no result

A requirement is there to be met or missed by what the sheet finds. This one compares inputs with inputs, or has sides that no
input moves, so its verdict was known before anything was calculated. In the report it stands among the others with a margin,
and a reader takes it for a proof. Often the wrong name was written: the pressure that was given in place of the one that was
calculated.

```gw
given p_1 = 9.6 bar abs "Pressure when filled" from "PI-31"
given T_1 = 304 K "Temperature when filled" from "TI-30"
given T_2 = 265 K "Coldest night" from "Site basis"
let p_2 = p_1 * T_2 / T_1 in bar abs "Pressure after the night"
require p_1 >= 7.5 bar abs "The packing line runs in the morning"
answer p_2
```

Require something of a result. A condition on the inputs is an `assume` line.

```gw cured
given p_1 = 9.6 bar abs "Pressure when filled" from "PI-31"
given T_1 = 304 K "Temperature when filled" from "TI-30"
given T_2 = 265 K "Coldest night" from "Site basis"
let p_2 = p_1 * T_2 / T_1 in bar abs "Pressure after the night"
require p_2 >= 7.5 bar abs "The packing line runs in the morning"
answer p_2
```
"##;

/// A requirement in which no result stands.
pub(crate) fn no_unknown(span: Span) -> Diagnostic {
    Diagnostic::warning(CODE, span, "this requirement compares inputs only: it judges no result")
        .label("no result stands in it")
        .help("require something of a result, or make it an `assume` about the inputs")
}

/// A requirement that no input moves.
pub(crate) fn no_input(span: Span) -> Diagnostic {
    Diagnostic::warning(CODE, span, "this requirement is met or not whatever the inputs are")
        .label("depends on no input")
        .help("check that its sides depend on the givens")
}
