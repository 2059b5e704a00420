//! A state that is no gas, because it would be solid.

use crate::diagnostic::{Diagnostic, Span};

/// The code.
pub(crate) const CODE: &str = "would-be-solid";

/// The page.
pub(crate) const PAGE: &str = r##"
# A state that would be solid

Below its triple point a substance goes from gas to solid without a liquid between: carbon dioxide turns to snow, water to frost.
Above the sublimation pressure there is no gas, and above the melting pressure no fluid. A vent that chokes with snow is a hazard
of its own.

```gw
gas co2 = carbon dioxide
given T = -85.0 degC     "Coldest point of the vent" from "Estimate"
given p = 1.50 bar abs   "There"                     from "PI-1"
state cold of co2 at p = p, T = T  "Coldest point"
answer cold.rho
```

Correct the temperature or the pressure.

```gw cured
gas co2 = carbon dioxide
given T = -35.0 degC     "Coldest point of the vent" from "TI-4"
given p = 1.50 bar abs   "There"                     from "PI-1"
state cold of co2 at p = p, T = T  "Coldest point"
answer cold.rho
```
"##;

/// A solid. `border` is the pressure of sublimation or melting at its temperature.
pub(crate) fn finding(span: Span, state: &str, gas: &str, (t, p): (&str, &str), t_triple: &str, border: Option<String>) -> Diagnostic {
    let subject = if state.is_empty() { gas.to_owned() } else { format!("the state `{state}`") };
    let mut finding = Diagnostic::error(CODE, span, format!("{subject} would be solid at {t} and {p}"))
        .label("no gas here")
        .fact(format!("the triple point of {gas} is at {t_triple}"));
    if let Some(border) = border {
        finding = finding.fact(format!("at this temperature the border of the solid (sublimation or melting) is at {border}"));
    }
    finding.help("check temperature and pressure; where they are right, look to what the solid may block")
}
