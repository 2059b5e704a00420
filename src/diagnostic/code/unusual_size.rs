//! A value outside the usual range of its kind.

use crate::diagnostic::{Diagnostic, Span};

/// The code.
pub(crate) const CODE: &str = "unusual-size";

/// The page.
pub(crate) const PAGE: &str = r##"
# A value of unusual size

The value lies outside what quantities of its kind usually are in gas work; the finding states the range, which is common
practice and has no source. Most such values have a wrong prefix: `mbar` for `bar`, `mm` for `m`, `g` for `kg`, a factor of
1000 that the relations carry on without complaint. Some are right, in vacuum or in cryogenic work for instance, and then the
warning may stand: it changes no result.

```gw
given p = 9.6 mbar abs "Filling pressure" from "PI-31"
answer p
```

Compare the unit with the plate or the instrument, prefix and basis.

```gw cured
given p = 9.6 bar abs "Filling pressure" from "PI-31"
answer p
```
"##;

/// An absolute pressure below the atmosphere of the site that nothing calls a vacuum; `as_gauge` is what the reading of a gauge would be.
pub(crate) fn vacuum(span: Span, name: &str, value: &str, site: &str, as_gauge: &str) -> Diagnostic {
    Diagnostic::warning(CODE, span, format!("`{name}` = {value} is a vacuum: the atmosphere of the site is {site}"))
        .label("less than the atmosphere")
        .fact(format!("read off a gauge it would be {as_gauge}"))
        .help("write `gauge` where a gauge shows it; where it is a vacuum, say so in its description")
}

/// `value` of `name` lies outside the usual range of its kind.
pub(crate) fn finding(span: Span, name: &str, value: &str, kind: &str, range: &str) -> Diagnostic {
    Diagnostic::warning(CODE, span, format!("`{name}` = {value} is an unusual {kind}"))
        .label(format!("usual in gas work: {range}"))
        .fact("the range is common practice, no source")
        .help("check the prefix of its unit (`mbar` or `bar`, `mm` or `m`) and its basis")
}
