//! A block of relations that could not be solved.

use crate::diagnostic::{Diagnostic, Span};

/// The code.
pub(crate) const CODE: &str = "not-converged";

/// The page.
pub(crate) const PAGE: &str = r##"
# Relations that do not come to agree

Some relations can only be solved together. They are then searched from many starting values, and here no start led to values
that satisfy all of them. The finding names the relation that was left furthest from holding, and how close the search came.
Three causes are common: two of the relations contradict each other, an input is far from what the rest needs, or the search
began too far away and wants a value with `near`. A result that fails its check is told with this code too; no number comes
out.

```gw
given a = 2.0 Pa.h/m3 "Filter cloth, laminar part" from "Filter sheet"
given b = 1.0 Pa.h2/m6 "Filter cloth, turbulent part" from "Filter sheet"
unknown q_1 in m3/h within 0 m3/h .. "Air through the first filter"
unknown q_2 in m3/h within 0 m3/h .. "Air through the second filter"
a * q_1 + b * q_1^2 + a * q_2 + b * q_2^2 = 900 Pa diff
a * q_1 + b * q_1^2 + a * q_2 + b * q_2^2 = 950 Pa diff
answer q_1, q_2
```

Here the drop over both filters is asked to be 900 Pa and 950 Pa. Put the wrong relation right.

```gw cured
given a = 2.0 Pa.h/m3 "Filter cloth, laminar part" from "Filter sheet"
given b = 1.0 Pa.h2/m6 "Filter cloth, turbulent part" from "Filter sheet"
unknown q_1 in m3/h within 0 m3/h .. "Air through the first filter"
unknown q_2 in m3/h within 0 m3/h .. "Air through the second filter"
a * q_1 + b * q_1^2 + a * q_2 + b * q_2^2 = 900 Pa diff
q_1 = q_2
answer q_1, q_2
```
"##;

/// The block of `names` did not converge.
pub(crate) fn finding(span: Span, names: &str, tried: &str, residual: &str) -> Diagnostic {
    Diagnostic::error(CODE, span, format!("{names} could not be found together: the relations do not come to agree"))
        .label("solved together with the lines shown")
        .fact(tried.to_owned())
        .fact(residual.to_owned())
        .help("give a start value with `near`, or bounds with `within`, to the quantity whose size is best known")
}

/// The re-check of a relation does not hold.
pub(crate) fn residual(span: Span, residual: &str) -> Diagnostic {
    Diagnostic::error(CODE, span, format!("the solution does not satisfy this relation: its scaled residual is {residual}"))
        .label("not satisfied")
        .help("the relation is ill-conditioned at this point: check its inputs")
}
