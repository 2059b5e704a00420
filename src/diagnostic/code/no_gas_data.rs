//! Something asked of a gas for which there are no data.

use crate::diagnostic::{Diagnostic, Span};

/// The code.
pub(crate) const CODE: &str = "no-gas-data";

/// The page.
pub(crate) const PAGE: &str = r##"
# No data of the gas for this

Not everything is known of every gas. A saturation line `p_sat(T)` and `T_sat(p)` belongs to a pure gas with a reference equation
and ends at the critical point; a mixture has none, since it condenses over a range. Viscosity and conductivity need a published
correlation, which most mixtures lack. Humidity is a property of `humid air` alone.

```gw
gas m = 0.5 propane + 0.5 n-butane by mole, real
given T = 20.0 degC  "Yard" from "TI-1"
let p = m.p_sat(T) in bar abs  "Over the liquid"
answer p
```

Ask it of a gas that has it, or give the value as an input with its source.

```gw cured
gas c3 = propane, real
given T = 20.0 degC  "Yard" from "TI-1"
let p = c3.p_sat(T) in bar abs  "Over the liquid"
answer p
```
"##;

/// A species without an equation of state.
pub(crate) fn equation(span: Span, species: &str) -> Diagnostic {
    Diagnostic::error(CODE, span, format!("no equation of state of `{species}` is known here"))
        .label("cannot be real")
        .help("leave `, real` out: the gas is then calculated as an ideal gas, and that is left for judgement")
}

/// A gas without a saturation line.
pub(crate) fn saturation(span: Span, gas: &str) -> Diagnostic {
    Diagnostic::error(CODE, span, format!("{gas} has no saturation line here"))
        .label("not known of this gas")
        .fact("a saturation line belongs to a pure gas with a reference equation; a mixture condenses over a range of temperatures")
        .help("give the pressure or temperature as an input with its source")
}

/// Beyond the ends of the saturation line.
pub(crate) fn beyond_saturation(span: Span, gas: &str, value: &str, range: &str) -> Diagnostic {
    Diagnostic::error(CODE, span, format!("{value} is beyond the saturation line of {gas}"))
        .label("no saturation here")
        .fact(format!("the line runs {range}: up to the critical point, above which there is one fluid and no saturation"))
        .help("check the value, and whether it is absolute")
}

/// No correlation of a transport property.
pub(crate) fn transport(span: Span, state: &str, word: &str, gas: &str) -> Diagnostic {
    Diagnostic::error(CODE, span, format!("no published {word} of {gas} is known here, and the sheet asks for that of `{state}`"))
        .label(format!("no {word}"))
        .help("give it as an input with its source")
}

/// A humidity of a gas that is not humid air.
pub(crate) fn moisture(span: Span, state: &str, field: &str, gas: &str) -> Diagnostic {
    Diagnostic::error(CODE, span, format!("`{state}` is a state of {gas} and has no `{field}`"))
        .label("only humid air has a humidity")
        .help("declare the gas as `humid air`: its states are fixed by three properties, one of them `RH`, `T_dew` or `W`")
}
