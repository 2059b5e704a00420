//! Properties that no state of the gas has.

use crate::diagnostic::{Diagnostic, Span};

/// The code.
pub(crate) const CODE: &str = "no-such-state";

/// The page.
pub(crate) const PAGE: &str = r##"
# No such state

No state of the gas has the properties that the sheet gives it: a pressure of zero, where there is no gas at all; an enthalpy that
the gas reaches at no temperature of its range; or two properties that two different states share. It also stands where the
equation of the gas was asked and found no answer.

```gw
gas ar = argon, real
given T = 20.0 degC     "Chamber" from "TI-1"
given p = 0 bar abs     "Chamber" from "PI-1"
state chamber of ar at T = T, p = p  "Evacuated"
answer chamber.v
```

Check the properties. An evacuated vessel still holds a little gas: give the pressure that the pump reaches.

```gw cured
gas ar = argon, real
given T = 20.0 degC     "Chamber" from "TI-1"
given p = 0.050 mbar abs  "Chamber" from "PI-1"
state chamber of ar at T = T, p = p  "Evacuated"
answer chamber.v
```
"##;

fn subject(state: &str, gas: &str) -> String {
    if state.is_empty() { gas.to_owned() } else { format!("the state `{state}`") }
}

/// A property that no gas can have.
pub(crate) fn impossible(span: Span, state: &str, quantity: &str, not_positive: bool) -> Diagnostic {
    let size = if not_positive { "zero or less" } else { "no possible size" };
    Diagnostic::error(CODE, span, format!("{} has a {quantity} of {size}, and no gas has that", subject(state, "the gas")))
        .label("no state of a gas")
        .help(format!("check the {quantity}, and whether it counts from zero: a pressure here is absolute, and positive"))
}

/// No state has these two properties.
pub(crate) fn none(span: Span, state: &str, gas: &str, what: &str) -> Diagnostic {
    Diagnostic::error(CODE, span, format!("no state of {gas} has the properties of {}", subject(state, gas)))
        .label("no such state")
        .fact(what.to_owned())
        .help("check the properties that fix the state, their units and what they count from")
}

/// Two states have them.
pub(crate) fn two(span: Span, state: &str, first: &str, second: &str) -> Diagnostic {
    Diagnostic::error(CODE, span, format!("two states have the properties of {}", subject(state, "this gas")))
        .label("not one state")
        .fact(format!("one is at {first}, the other at {second}"))
        .help("fix the state by temperature or pressure and one more property")
}

/// The equation found no answer.
pub(crate) fn not_converged(span: Span, state: &str, gas: &str, what: &str, model: &str, steps: u32) -> Diagnostic {
    Diagnostic::error(CODE, span, format!("the {what} of {} was not found", subject(state, gas)))
        .label("no answer of the equation")
        .fact(format!("{model} was evaluated for {gas} {steps} times without coming to rest"))
        .help("fix the state by other properties, or move it a little: an equation may fail close to its borders")
}
