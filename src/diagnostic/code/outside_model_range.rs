//! A state outside the range of its model.

use crate::diagnostic::{Diagnostic, Span};

/// The code.
pub(crate) const CODE: &str = "outside-model-range";

/// The page.
pub(crate) const PAGE: &str = r##"
# Outside the range of a model

Heat capacities of gases are fits to data between two temperatures, and the standard atmosphere is defined between two
altitudes. A short way beyond its range a fit may go on, and the report carries a warning; further out it bends away to
anything, and there is no value. Some gases have no heat capacity in the tables at all. Pressure, temperature and density of
an ideal gas do not need it, so only enthalpy, entropy, heat capacities, their ratio and the speed of sound are concerned.

```gw
gas lng = methane
given T = 115 K "Boil-off at the tank" from "TI-51"
state boil_off of lng at p = 1.1 bar abs, T = T
answer boil_off.h
```

Check the temperature. Where it is right, keep to properties that need no heat capacity, or give the value with its source.

```gw cured
gas lng = methane
given T = 115 K "Boil-off at the tank" from "TI-51"
state boil_off of lng at p = 1.1 bar abs, T = T
answer boil_off.rho
```
"##;

/// Beyond the limit: there is no value.
pub(crate) fn beyond(span: Span, state: &str, value: &str, limit: &str, source: &str) -> Diagnostic {
    Diagnostic::error(CODE, span, format!("the state `{state}` is at {value}, and the heat capacity of its gas is only known {limit}"))
        .label("outside the range of the model")
        .fact(source.to_owned())
        .help("keep to properties that do not need the heat capacity (p, T, v, rho), or check the temperature")
}

/// Between the published range and the limit.
pub(crate) fn extrapolated(span: Span, state: &str, value: &str, range: &str, source: &str) -> Diagnostic {
    Diagnostic::warning(CODE, span, format!("the state `{state}` is at {value}, outside the published range of its heat capacity, {range}"))
        .label("extrapolated")
        .fact(source.to_owned())
        .help("take the result with care, or check the temperature")
}

/// Beyond the limits to which an equation of state goes on. `words` are the value, the published range, and how far it goes on (empty
/// where no further).
pub(crate) fn equation(span: Span, state: &str, gas: &str, [value, published, goes_on]: &[String; 3], source: &str) -> Diagnostic {
    let subject = if state.is_empty() { gas.to_owned() } else { format!("the state `{state}`") };
    let mut finding = Diagnostic::error(CODE, span, format!("{subject} has {value}, beyond the range of the model of {gas}"))
        .label("outside the range of the model")
        .fact(format!("published {published}"));
    if !goes_on.is_empty() {
        finding = finding.fact(format!("extrapolated {goes_on}, with a warning"));
    }
    if !source.is_empty() {
        finding = finding.fact(source.to_owned());
    }
    finding.help("check temperature and pressure; no value is offered beyond these limits")
}

/// Between the published range of an equation of state and the limit to which it goes on.
pub(crate) fn unpublished(span: Span, state: &str, gas: &str, value: &str, published: &str, source: &str) -> Diagnostic {
    Diagnostic::warning(CODE, span, format!("the state `{state}` has {value}, outside the published range of the model of {gas}"))
        .label("extrapolated")
        .fact(format!("published {published}"))
        .fact(source.to_owned())
        .help("take the result with care, or check the state")
}

/// A transport property outside the published range of its correlation.
pub(crate) fn correlation(span: Span, state: &str, word: &str, value: &str, published: &str, source: &str) -> Diagnostic {
    Diagnostic::warning(CODE, span, format!("the {word} of the state `{state}` is taken at {value}, outside its published range"))
        .label("extrapolated")
        .fact(format!("published {published}"))
        .fact(source.to_owned())
        .help("take the result with care, or check the state")
}

/// A gas for which the tool has no heat capacity at all.
pub(crate) fn no_data(span: Span, gas: &str, by_equation: bool) -> Diagnostic {
    let finding = Diagnostic::error(CODE, span, format!("no heat capacity of `{gas}` as an ideal gas is known here")).label("needs the heat capacity");
    if by_equation {
        finding.help("write `, real` behind the gas: its reference equation has them")
    } else {
        finding.help("keep to properties that do not need it (p, T, v, rho), or give it as an input")
    }
}

/// The site outside the standard atmosphere.
pub(crate) fn altitude(span: Span, value: &str) -> Diagnostic {
    Diagnostic::error(CODE, span, format!("the standard atmosphere is not offered at {value}"))
        .label("outside ISO 2533 as offered here")
        .help("give the pressure of the site: `site pressure = … abs`")
}
