//! A constant given by hand that is not that of the gas.

use crate::diagnostic::{Diagnostic, Span};

/// The code.
pub(crate) const CODE: &str = "constant-by-hand";

/// The page.
pub(crate) const PAGE: &str = r##"
# A constant that is not that of the gas

A molar mass, a specific gas constant or a heat capacity ratio is given by hand, and the gas that the sheet names has another
one. Copied from a sheet for another gas, such a number hides well: air in place of nitrogen is 3 % off, which no reader sees
in a result. The heat capacity ratio also falls as the gas gets hotter, so that one value from a table serves one temperature.
A gas of the sheet brings its own: `n2.M`, `n2.R`, and `full.k` at a state.

```gw
gas n2 = nitrogen
given p = 9.6 bar abs "Filling pressure" from "PI-31"
given T = 304 K "Temperature when filled" from "TI-30"
given R_s = 287 J/(kg.K) "Specific gas constant" from "Earlier sheet for compressed air"
let rho = p / (R_s * T) in kg/m3
answer rho
```

Take the value from the gas; keep one given by hand only where the gas on the plant is not the pure one.

```gw cured
gas n2 = nitrogen
given p = 9.6 bar abs "Filling pressure" from "PI-31"
given T = 304 K "Temperature when filled" from "TI-30"
let rho = p / (n2.R * T) in kg/m3
answer rho
```
"##;

/// `name` is given as `value`, and `owner`, a constant of a gas of the sheet or the molar gas constant `R`, is `known`.
pub(crate) fn finding(span: Span, name: &str, value: &str, owner: &str, known: &str, percent: &str) -> Diagnostic {
    let whose = if owner == "R" { "the molar gas constant" } else { "that of the gas" };
    Diagnostic::warning(CODE, span, format!("`{name}` = {value} is not {whose}: `{owner}` is {known}"))
        .label(format!("{percent} % off"))
        .help(format!("write `{owner}` where `{name}` stands, or correct the value"))
}

/// A heat capacity ratio given as a constant.
pub(crate) fn ratio(span: Span, name: &str, value: &str, owner: &str, known: &str, percent: &str) -> Diagnostic {
    Diagnostic::warning(
        CODE,
        span,
        format!("the heat capacity ratio `{name}` = {value} is given by hand, and `{owner}` is {known} at the temperature of that state"),
    )
    .label(format!("{percent} % off, and not constant with temperature"))
    .help(format!("write `{owner}` where `{name}` stands, or give the reason in an `assume` line"))
}
