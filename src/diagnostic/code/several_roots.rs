//! More than one value satisfies the relations.

use crate::diagnostic::{Diagnostic, Span};

/// The code.
pub(crate) const CODE: &str = "several-roots";

/// The page.
pub(crate) const PAGE: &str = r##"
# More than one value satisfies the relations

A square, or the area ratio of a nozzle, is satisfied at two values of the same quantity. Which of them is the plant's, the
relations do not say, and the tool never picks one silently: the finding lists all that it found. A velocity that comes from
its square may be forward or backward; a temperature may lie on either side of a maximum. With `near` the finding becomes a
note, and the report tells of the other roots.

```gw
given dp = 250 Pa diff "Velocity pressure in the duct" from "Pitot tube, PDI-4"
given rho = 1.20 kg/m3 "Density of the air" from "Air table"
unknown w in m/s "Velocity in the duct"
dp = rho / 2 * w^2
answer w
```

Bound the quantity with `within`, or say with `near` about how large it is.

```gw cured
given dp = 250 Pa diff "Velocity pressure in the duct" from "Pitot tube, PDI-4"
given rho = 1.20 kg/m3 "Density of the air" from "Air table"
unknown w in m/s within 0 m/s .. "Velocity in the duct"
dp = rho / 2 * w^2
answer w
```
"##;

/// `name` has several values inside its bounds.
pub(crate) fn finding(span: Span, name: &str, roots: &str, how_many: usize, choose: &str) -> Diagnostic {
    Diagnostic::error(CODE, span, format!("`{name}` has {how_many} values that satisfy the relations: {roots}"))
        .label("which one is meant?")
        .help(format!("say which branch is meant: {choose}"))
}

/// `near` chose one of several.
pub(crate) fn chosen(span: Span, name: &str, chosen: &str, others: &str) -> Diagnostic {
    Diagnostic::note(
        CODE,
        span,
        format!("`{name}` = {chosen} is the branch that `near` asks for; {others} would satisfy the relations too"),
    )
    .label("other roots exist")
}
