//! Relations that nothing satisfies.

use crate::diagnostic::{Diagnostic, Span};

/// The code.
pub(crate) const CODE: &str = "no-solution";

/// The page.
pub(crate) const PAGE: &str = r##"
# Relations that nothing satisfies

No value makes all the relations hold, or the only one that does lies outside the bounds of its quantity. Bounds are part of
what the sheet says: an orifice of 90 mm does not fit where `within` allows 20 mm. Either an input is wrong, often by its
unit, or the plant cannot do what is asked of it, and that is the result. A quantity that stands on both sides and drops out
of its relation is found by nothing either.

```gw
given q = 60.0 m3/h "Air through the vent" from "Fan sheet"
given w = 10.0 m/s "Highest velocity" from "Site rule"
unknown d in mm within 5 mm .. 20 mm "Bore of the vent"
q = pi / 4 * d^2 * w
answer d
```

Check the inputs first; widen `within` only where the bound is no limit of the plant.

```gw cured
given q = 60.0 m3/h "Air through the vent" from "Fan sheet"
given w = 10.0 m/s "Highest velocity" from "Site rule"
unknown d in mm within 5 mm .. 80 mm "Bore of the vent"
q = pi / 4 * d^2 * w
answer d
```
"##;

/// No value of `name`, or of several names together, satisfies the relations; `searched` says where it was looked for.
pub(crate) fn finding(span: Span, name: &str, searched: &str) -> Diagnostic {
    Diagnostic::error(CODE, span, format!("the relations have no solution for {name} {searched}"))
        .label("no root found")
        .help("check the relation and its inputs, widen `within`, or give a value close to the one meant with `near`")
}

/// The only root lies outside the bounds.
pub(crate) fn outside_bounds(span: Span, name: &str, value: &str, bounds: &str) -> Diagnostic {
    Diagnostic::error(CODE, span, format!("`{name}` comes out as {value}, outside its bounds {bounds}"))
        .label(format!("must lie within {bounds}"))
        .help("the relations have no solution within these bounds: check the inputs, or widen `within` if the bound is not a limit of the plant")
}

/// A relation from which its unknown drops out.
pub(crate) fn says_nothing(span: Span, name: &str) -> Diagnostic {
    Diagnostic::error(CODE, span, format!("`{name}` drops out of this relation: it is defined by itself"))
        .label("holds for every value, or for none")
        .help("a quantity needs a relation that ties it to others")
}
