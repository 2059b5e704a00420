//! Properties that do not count as two.

use crate::diagnostic::{Diagnostic, Span};

/// The code.
pub(crate) const CODE: &str = "dependent-properties";

/// The page.
pub(crate) const PAGE: &str = r##"
# Properties that do not count as two

A state of a single-phase gas is fixed by two properties that can vary independently. Of an ideal gas the enthalpy, the
internal energy and the heat capacities depend on the temperature alone: given one of them, the others follow, and the
pressure may still be anything. Specific volume and density are one thing said twice, and the compressibility factor is 1
everywhere. Such a pair looks complete and leaves the state open.

```gw
gas n2 = nitrogen
state full of n2 at T = 300 K, h = 2.0 kJ/kg
```

Replace one of the two by the pressure or the density.

```gw cured
gas n2 = nitrogen
state full of n2 at T = 300 K, p = 7.5 bar abs
```
"##;

/// The same of humid air, which needs three.
pub(crate) fn of_humid_air(span: Span, state: &str, properties: &str, why: &str) -> Diagnostic {
    Diagnostic::error(CODE, span, format!("{properties} do not fix the state `{state}`: they depend on each other"))
        .label(why.to_owned())
        .fact("humid air has three degrees of freedom: a state needs three properties that vary independently")
        .help("replace one of them: give the pressure, the temperature and one of `RH`, `T_dew`, `W`")
}

/// The properties of `state` do not fix it, for the reason `why`.
pub(crate) fn finding(span: Span, state: &str, pair: &str, why: &str) -> Diagnostic {
    Diagnostic::error(CODE, span, format!("{pair} do not fix the state `{state}`: they depend on each other"))
        .label(why.to_owned())
        .fact("a single-phase gas has two degrees of freedom: a state needs two properties that vary independently")
        .help("replace one of them, for example by the pressure or the density")
}
