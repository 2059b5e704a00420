//! The ideal gas law at a state where it is too far off.

use crate::diagnostic::{Diagnostic, Span};

/// The code.
pub(crate) const CODE: &str = "ideal-law-fails";

/// The page.
pub(crate) const PAGE: &str = r##"
# The ideal gas law does not hold here

A gas without `, real` is calculated by the ideal gas law, and that is an assumption which is judged at every state: the same
temperature and pressure are put into the reference equation of the gas, and the two densities are compared. Where they differ
by more than the sheet allows (1 %, or `limits: {ideal gas: 3 %}` in the head), the assumption has failed. The sheet is solved
and reported, and its status says that it does not hold. Where a state uses `cp` or `w`, these are held to the same limit.

```gw
gas co2 = carbon dioxide
given T   = 5.0 degC      "Cold store wall" from "TI-1"
given p_h = 20.0 bar abs  "High side"       from "PI-2"
state high of co2 at p = p_h, T = T  "High side"
answer high.rho
```

Write `, real` behind the gas: the states of the sheet then come from the reference equation, and nothing else changes.

```gw cured
gas co2 = carbon dioxide, real
given T   = 5.0 degC      "Cold store wall" from "TI-1"
given p_h = 20.0 bar abs  "High side"       from "PI-2"
state high of co2 at p = p_h, T = T  "High side"
answer high.rho
```
"##;

/// The ideal law misses by `errors` at a state. `model` is where `, real` may be written, or the word that says `ideal`.
pub(crate) fn finding(span: Span, state: &str, gas: &str, errors: &str, limit: &str, model: Span, name: &str) -> Diagnostic {
    let replacement = if model.start == model.end { ", real" } else { "real" };
    Diagnostic::warning(CODE, span, format!("the ideal gas law does not hold at the state `{state}`: it is off by {errors}"))
        .label(format!("more than {limit} %"))
        .fact(format!("judged by the equation of state of {gas} at the same pressure and temperature"))
        .help(format!("write `, real` behind the gas `{name}`, or allow more with `limits: {{ideal gas: …}}` in the head"))
        .edit(model, replacement)
}
