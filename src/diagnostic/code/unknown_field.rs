//! A field that a state or a gas does not have.

use crate::diagnostic::{Diagnostic, Span};

use super::suggest;

/// The code.
pub(crate) const CODE: &str = "unknown-field";

/// The page.
pub(crate) const PAGE: &str = r##"
# A property that is not there

Behind the dot stands a property of a state, a gas or the site. A state has `p T v rho h u s cp cv k w Z mu
lambda` (and of humid air `RH T_dew W`), a gas `M R T_c p_c` and the functions `p_sat(T)` and `T_sat(p)`, the site `p`. Capital and small letters differ: `v` is the specific volume, `w` the speed of sound, `T` the
temperature, and there is no `t`. The words are short because they are the symbols of the trade. A quantity has no properties
at all: its name stands for its value.

```gw
gas n2 = nitrogen
given T = 31.0 degC "Gas when filled" from "TI-30"
state full of n2 at p = 9.6 bar abs, T = T
answer full.density
```

Take the symbol from the list; what is not in it can be a relation of your own.

```gw cured
gas n2 = nitrogen
given T = 31.0 degC "Gas when filled" from "TI-30"
state full of n2 at p = 9.6 bar abs, T = T
answer full.rho
```
"##;

/// `field` is no field of `owner`, a `what` (state, gas; the site is its own owner), which offers `fields`.
pub(crate) fn finding(span: Span, owner: &str, what: &str, field: &str, near: &[&str], fields: &str) -> Diagnostic {
    let whose = if owner == what { format!("the {what}") } else { format!("the {what} `{owner}`") };
    let finding = Diagnostic::error(CODE, span, format!("{whose} has no `{field}`")).label(format!("no property of a {what}"));
    suggest(finding, span, near, &format!("a {what} offers {fields}"))
}

/// A function behind something that is no gas.
pub(crate) fn no_function(span: Span, owner: &str, what: &str) -> Diagnostic {
    Diagnostic::error(CODE, span, format!("`{owner}` is a {what} and offers no function"))
        .label("only gases offer functions")
        .help("write the name of a gas before the dot: `gas.p_sat(T)`, `gas.T_sat(p)`")
}

/// A field behind a quantity, which has none.
pub(crate) fn of_quantity(span: Span, owner: &str, field: &str) -> Diagnostic {
    Diagnostic::error(CODE, span, format!("`{owner}` is a quantity and has no `{field}`"))
        .label("only states, gases and the site have fields")
        .help("write the name of a state or a gas before the dot")
}
