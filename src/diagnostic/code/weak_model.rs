//! A mixture for which no good model is known.

use crate::diagnostic::{Diagnostic, Span};

/// The code.
pub(crate) const CODE: &str = "weak-model";

/// The page.
pub(crate) const PAGE: &str = r##"
# A weak model

For most mixtures of the trade GERG-2008 is good to a few parts in a thousand. For some it is not: measured data are few, and
published models disagree with one another (mixtures with helium at cylinder pressure; wet gas). And it covers 21 components only;
a mixture with another one is calculated by the Peng-Robinson equation, a cubic equation with no interaction parameters, good to a
few percent. The sheet is solved, and the report says by what.

```gw
gas mix = 0.70 argon + 0.30 helium by mole, real
given T = 20.0 degC     "Cylinder" from "TI-1"
given p = 100 bar abs   "Cylinder" from "PI-1"
state full of mix at T = T, p = p  "Full cylinder"
answer full.rho
```

Nothing can be cured here but the expectation. Where the margin is smaller than the weakness, ask the supplier for a filling table.

```gw cured
gas mix = 0.82 argon + 0.18 oxygen by mole, real
given T = 20.0 degC     "Cylinder" from "TI-1"
given p = 100 bar abs   "Cylinder" from "PI-1"
state full of mix at T = T, p = p  "Full cylinder"
answer full.rho
```
"##;

/// A weakness in one sentence, with how far models are apart in percent where that is known. `cubic`: the Peng-Robinson equation
/// stands in for a better one.
pub(crate) fn finding(span: Span, gas: &str, text: &str, spread: Option<&str>, source: &str, cubic: bool) -> Diagnostic {
    let what = if cubic {
        format!("{gas} is calculated by the Peng-Robinson equation: no better model of it is known here")
    } else {
        format!("the model of {gas} is weak: {text}")
    };
    let mut finding = Diagnostic::warning(CODE, span, what).label(if cubic { "good to a few percent" } else { "models disagree" });
    if let Some(spread) = spread {
        finding = finding.fact(format!("in mixtures like this one densities by two models differ by up to {spread} %"));
    }
    finding.fact(source.to_owned()).help("compare the margin of the result with this weakness")
}
