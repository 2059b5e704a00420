//! Water that condenses from humid air.

use crate::diagnostic::{Diagnostic, Span};

/// The code.
pub(crate) const CODE: &str = "water-condenses";

/// The page.
pub(crate) const PAGE: &str = r##"
# Water condenses from the air

Compressed or cooled, air can hold less water. A state of `humid air` that is given more of it by its humidity ratio than it holds at
its temperature and pressure has condensate: the report states how much, per kilogram of dry air. The properties of the state are
those of the saturated air that is left; `W` counts all the water, `RH` is 100 %, and the dew point is that of the air as it came.
Water in compressed air corrodes, freezes in valves and knocks in pipes: it has to be drained.

```gw
gas air = humid air
given p = 8.00 bar abs "Behind the cooler" from "PI-2"
given T = 25.0 degC "Behind the cooler" from "TI-2"
state intake of air at p = 1.00 bar abs, T = 30 degC, RH = 60 %
state cooled of air at p = p, T = T, W = intake.W
answer cooled.rho
```

Describe the air behind the separator with `RH = 100 %`; what condenses is then the difference of both humidity ratios, and can be
calculated with.

```gw cured
gas air = humid air
given p = 8.00 bar abs "Behind the cooler" from "PI-2"
given T = 25.0 degC "Behind the cooler" from "TI-2"
state intake of air at p = 1.00 bar abs, T = 30 degC, RH = 60 %
state cooled of air at p = p, T = T, RH = 100 %
let w = intake.W - cooled.W in g/kg  "Water drained per dry air"
answer cooled.rho, w
```
"##;

/// A state of humid air from which `grams` of water condense per kilogram of dry air.
pub(crate) fn finding(span: Span, state: &str, grams: &str, t_dew: Option<&str>) -> Diagnostic {
    let mut finding = Diagnostic::warning(CODE, span, format!("water condenses at the state `{state}`: {grams} g per kg of dry air"))
        .label("below the dew point of the air that came")
        .fact("the properties of the state are those of the saturated air that is left");
    if let Some(t_dew) = t_dew {
        finding = finding.fact(format!("at this pressure the air that came has its dew point at {t_dew}"));
    }
    finding.help("drain it; to calculate with it, describe the air behind the separator with `RH = 100 %` and take the difference of both `W`")
}
