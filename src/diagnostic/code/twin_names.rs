//! Two names that are nearly the same, each used once.

use crate::diagnostic::{Diagnostic, Span};

/// The code.
pub(crate) const CODE: &str = "twin-names";

/// The page.
pub(crate) const PAGE: &str = r##"
# Two names that look like one

`T_e` and `Te` are two quantities to the tool and one to most readers. Where two people write a sheet, or lines come from two
older ones, the same quantity easily gets both names; the relations then hang together in two halves, each with its own value,
and nothing in the report shows it. If there really are two quantities, a checker will still mistake one for the other. The
sheet solves; this is a warning.

```gw
given T_e = 265 K "Coldest night" from "Site basis"
given Te = 268 K "Coldest night" from "Weather record"
answer T_e, Te
```

Keep one name for one quantity, and names that differ in a word or a number for two.

```gw cured
given T_basis = 265 K "Coldest night" from "Site basis"
given T_record = 268 K "Coldest night" from "Weather record"
answer T_basis, T_record
```
"##;

/// `first` and `second` differ only in underscores or case.
pub(crate) fn finding(span: Span, second: &str, first: &str, place: Span) -> Diagnostic {
    Diagnostic::warning(CODE, span, format!("`{second}` and `{first}` are two names that look like one"))
        .label("is it another quantity?")
        .related(place, format!("`{first}` stands here"))
        .help("use one name for one quantity, and names that can be told apart for two")
}
