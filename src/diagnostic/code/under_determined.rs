//! Something is missing.

use crate::diagnostic::{Diagnostic, Span};

/// The code.
pub(crate) const CODE: &str = "under-determined";

/// The page.
pub(crate) const PAGE: &str = r##"
# Something is missing

There are more quantities than relations to find them, so many values would satisfy the sheet. The finding counts what is
missing, in the part of the sheet that hangs together, and names quantities any of which would close it. A state of a gas
needs two independent properties; a vessel of which only the pressure is known may hold any mass, since the temperature is
open. What is missing is often a line that was thought to be obvious: same volume, same temperature, nothing lost.

```gw
gas n2 = nitrogen
state full of n2 at p = 9.6 bar abs
```

Give one of the quantities that are named, or add the relation that you had in mind.

```gw cured
gas n2 = nitrogen
state full of n2 at p = 9.6 bar abs, T = 304 K
```
"##;

/// A part of the sheet with `missing` inputs or relations too few. `names` are quantities any of which would close it.
pub(crate) fn part(span: Span, first: &str, missing: usize, names: &str) -> Diagnostic {
    let inputs = if missing == 1 { "one input or relation".to_owned() } else { format!("{missing} inputs or relations") };
    let help = if missing > 1 {
        format!("give {missing} of {names}, or add {missing} relations between them")
    } else if names.contains(", ") {
        format!("give one of {names}, or add a relation between them")
    } else {
        format!("give {names}, or add a relation that ties it to what is known")
    };
    Diagnostic::error(CODE, span, format!("`{first}` cannot be found: {inputs} too few")).label("not determined").help(help)
}

/// A state that has fewer than two properties. `has` says how many: "no property", "one property, p (pressure)"; `names` would
/// close it.
pub(crate) fn state(span: Span, state: &str, has: &str, (needs, lacks): (usize, usize), names: &str) -> Diagnostic {
    let number = |n: usize| ["no", "one", "two", "three"].get(n).copied().unwrap_or("more");
    let (whose, fact) = match needs {
        3 => ("humid air", "humid air has three degrees of freedom: two as any gas, and its moisture"),
        _ => ("a gas", "a single-phase gas has two degrees of freedom"),
    };
    let label = match (needs, lacks) {
        (2, 1) => "a second independent property is missing".to_owned(),
        (_, 1) => "one more independent property is missing".to_owned(),
        (_, n) => format!("{} independent properties are missing", number(n)),
    };
    Diagnostic::error(CODE, span, format!("the state `{state}` has {has}, and a state of {whose} needs {}", number(needs)))
        .label(label)
        .fact(fact)
        .help(format!("give {} of {names}", number(lacks)))
}
