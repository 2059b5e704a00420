//! A state beside the critical point.

use crate::diagnostic::{Diagnostic, Span};

/// The code.
pub(crate) const CODE: &str = "near-critical";

/// The page.
pub(crate) const PAGE: &str = r##"
# Beside the critical point

Within 1 % of the critical temperature and pressure a fluid is at its most compressible: a hundredth of a bar moves the density by
percents, and no equation of state is accurate. The result is what the reference equation gives; its stated uncertainty does not
hold here.

```gw
gas co2 = carbon dioxide, real
given T = 305.0 K       "As measured" from "TI-1"
given p = 7.4 MPa abs   "As measured" from "PI-1"
state odd of co2 at T = T, p = p  "Storage"
answer odd.rho
```

Keep away from the critical point where a density has to be known.

```gw cured
gas co2 = carbon dioxide, real
given T = 325.0 K       "As measured" from "TI-1"
given p = 7.4 MPa abs   "As measured" from "PI-1"
state odd of co2 at T = T, p = p  "Storage"
answer odd.rho
```
"##;

/// A state within 1 % of the critical point of its gas.
pub(crate) fn finding(span: Span, state: &str, t_c: &str, p_c: &str) -> Diagnostic {
    Diagnostic::warning(CODE, span, format!("the state `{state}` is within 1 % of the critical point, where no equation is accurate"))
        .label("near-critical")
        .fact(format!("critical point: {t_c} and {p_c}"))
        .help("take density and heat capacity here as an order of size, or keep away from the critical point")
}
