//! A gas that is about to condense.

use crate::diagnostic::{Diagnostic, Span};

/// The code.
pub(crate) const CODE: &str = "near-condensation";

/// The page.
pub(crate) const PAGE: &str = r##"
# Close to condensation

The state is a gas, but within 5 K of the temperature at which it, or a part of it, condenses at this pressure. A cold wall, a
pressure drop or the uncertainty of a thermometer may be enough to make liquid, and close to saturation the ideal law is at its
worst.

```gw
gas r = R134a, real
given T = 24.6 degC     "As measured" from "TI-1"
given p = 6.0 bar abs   "As measured" from "PI-1"
state line of r at T = T, p = p  "Suction line"
answer line.rho
```

Nothing is wrong with the sheet. Say in an `assume` line what keeps the gas dry, or design with a margin.

```gw cured
gas r = R134a, real
given T = 35.0 degC     "Superheated" from "TI-1"
given p = 6.0 bar abs   "As measured" from "PI-1"
state line of r at T = T, p = p  "Suction line"
answer line.rho
```
"##;

/// A state `margin` K above the temperature at which `component` condenses.
pub(crate) fn finding(span: Span, state: &str, component: &str, margin: &str, t_condensation: &str) -> Diagnostic {
    Diagnostic::warning(CODE, span, format!("the state `{state}` is {margin} K from condensation"))
        .label("close to saturation")
        .fact(format!("at this pressure {component} condenses at {t_condensation}"))
        .help("a cold spot may make liquid: say in an `assume` line what keeps the gas dry")
}
