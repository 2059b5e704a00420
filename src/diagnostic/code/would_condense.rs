//! A state that is no gas, because it would be liquid or partly so.

use crate::diagnostic::{Diagnostic, Span};

/// The code.
pub(crate) const CODE: &str = "would-condense";

/// The page.
pub(crate) const PAGE: &str = r##"
# A state that would be liquid or wet

A state point is that of one phase, a gas. At this temperature and pressure the substance, or a part of the mixture, is liquid:
above the saturation pressure, below the saturation temperature, or between the two densities of a boiling liquid. The ideal law
would still give a density there, and it would be wrong by a factor of a hundred, so that there is no result at all. The usual
reasons are a gauge reading taken for absolute, a cylinder of liquefied gas, steam that has cooled or expanded into the wet
region, and moist gas below its dew point.

```gw
gas lpg = propane, real
given T = 20.0 degC      "Yard"     from "TI-1"
given p = 10.0 bar abs   "Cylinder" from "PI-1"
state tank of lpg at T = T, p = p  "In the cylinder"
answer tank.rho
```

Correct the pressure or the temperature. Over its liquid a gas stands at the saturation pressure, `lpg.p_sat(T)`, and just
below it is a gas.

```gw cured
gas lpg = propane, real
given T = 20.0 degC      "Yard"     from "TI-1"
let p = 0.99 * lpg.p_sat(T) in bar abs  "Over the liquid, at its saturation pressure"
state tank of lpg at T = T, p = p  "In the cylinder, over the liquid"
answer tank.rho
```
"##;

/// Puts what `state` is called in front: a function in a relation belongs to none.
fn subject(state: &str, gas: &str) -> String {
    if state.is_empty() { gas.to_owned() } else { format!("the state `{state}`") }
}

/// A liquid. `saturation` is the temperature at which the gas condenses at this pressure with how much colder the state is, `p_sat`
/// the pressure at which it condenses at this temperature.
pub(crate) fn liquid(
    span: Span,
    state: &str,
    gas: &str,
    (t, p): (&str, &str),
    saturation: Option<(String, String)>,
    p_sat: Option<String>,
) -> Diagnostic {
    let mut finding = Diagnostic::error(CODE, span, format!("{} would be liquid at {t} and {p}", subject(state, gas))).label("no gas here");
    if let Some((t_sat, colder)) = saturation {
        finding = finding.fact(format!("at this pressure {gas} condenses at {t_sat}: the state is {colder} K colder"));
    }
    if let Some(p_sat) = p_sat {
        finding = finding.fact(format!("at this temperature {gas} is a gas up to its saturation pressure, {p_sat}"));
    }
    finding.help("check temperature and pressure, and whether the pressure is abs or gauge; liquids are not calculated here")
}

/// Liquid and vapour together.
pub(crate) fn wet(span: Span, state: &str, gas: &str, percent: &str, t_sat: &str, p_sat: &str) -> Diagnostic {
    Diagnostic::error(CODE, span, format!("{} would be wet: {percent} % vapour by mass, the rest liquid", subject(state, gas)))
        .label("two-phase, no gas here")
        .fact(format!("{gas} is at saturation here: {t_sat} and {p_sat}"))
        .help("check the properties that fix the state; two-phase states are not calculated here")
}

/// A component of a mixture.
pub(crate) fn component(
    span: Span,
    state: &str,
    component: &str,
    t: &str,
    partial: &str,
    p_sat: Option<String>,
    t_dew: Option<String>,
) -> Diagnostic {
    let mut finding =
        Diagnostic::error(CODE, span, format!("{component} would condense in {} at {t}", subject(state, "the mixture"))).label("below the dew point");
    finding = match p_sat {
        Some(p_sat) => finding.fact(format!("the partial pressure of {component}, {partial}, is above its saturation pressure, {p_sat}")),
        None => finding.fact(format!("the partial pressure of {component} is {partial}; the dew point is that of the Peng-Robinson equation")),
    };
    if let Some(t_dew) = t_dew {
        finding = finding.fact(format!("dew point {t_dew}"));
    }
    finding.help("check temperature, pressure and composition: what condenses has left the gas")
}
