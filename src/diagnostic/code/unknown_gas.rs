//! A gas that the tool does not know.

use crate::diagnostic::{Diagnostic, Span};

use super::suggest;

/// The code.
pub(crate) const CODE: &str = "unknown-gas";

/// The page.
pub(crate) const PAGE: &str = r##"
# A gas that is not known

Behind `gas NAME =` stands a gas by its name, by its formula, or, of a refrigerant, by its number; `gaswright gases` lists all
of them. The molar mass, the critical point and the heat capacity all come with that name, so a near miss is not guessed:
between `ethane` and `ethene` lie two atoms of hydrogen and a different safety data sheet. A formula that several gases share
(`C4H10` is butane and isobutane) is refused for the same reason, and the finding lists the names to choose from.

```gw
gas shield = nitrogn
```

```gw cured
gas shield = nitrogen
```

A mixture that is not in the list is written out with its shares, such as `0.9 argon + 0.1 helium by mole`.
"##;

/// `name` is no species and no named mixture.
pub(crate) fn finding(span: Span, name: &str, near: &[&str]) -> Diagnostic {
    let finding =
        Diagnostic::error(CODE, span, format!("`{name}` is no gas that is known here")).label("no species or mixture of this name");
    suggest(finding, span, near, "`gaswright gases` lists them")
}

/// A formula that several gases share.
pub(crate) fn ambiguous(span: Span, name: &str, which: &str) -> Diagnostic {
    Diagnostic::error(CODE, span, format!("`{name}` is the formula of several gases"))
        .label("which one?")
        .help(format!("write the name: {which}"))
}
