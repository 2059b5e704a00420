//! A unit that the tool does not know.

use crate::diagnostic::{Diagnostic, Span};

use super::suggest;

/// The code.
pub(crate) const CODE: &str = "unknown-unit";

/// The page.
pub(crate) const PAGE: &str = r##"
# A unit that is not known

Units are written as their symbols, with capital and small letters as in the standards: `kg`, `kPa`, `degC`, `L/min`. Some
habits are left out because they name two things: a gallon, a ton and a therm come in several sizes, and `barg` joins a unit
with a basis. For these the finding says what to write. A word straight behind a number is always read as its unit, so a
forgotten `*` before a name ends here too. `gaswright units` lists the units by quantity.

```gw
given m = 12.0 Kgs "Nitrogen drawn in the shift" from "Scale"
answer m
```

Write the unit as the finding proposes.

```gw cured
given m = 12.0 kg "Nitrogen drawn in the shift" from "Scale"
answer m
```
"##;

/// `word` is no unit. `why` is the special help for it, if there is one.
pub(crate) fn finding(span: Span, word: &str, near: &[&str], why: Option<&str>) -> Diagnostic {
    let finding = Diagnostic::error(CODE, span, format!("`{word}` is no unit that is known here")).label("no such unit");
    match why {
        Some(why) => finding.help(why.to_owned()),
        None => suggest(finding, span, near, "`gaswright units` lists the units by quantity"),
    }
}

/// The edit that writes what a habit stands for; a basis that stands behind already is not written again.
pub(crate) fn cured(finding: Diagnostic, span: Span, unit: &str, basis: Option<&str>, certain: bool) -> Diagnostic {
    let written = basis.map_or(unit.to_owned(), |basis| format!("{unit} {basis}"));
    if certain { finding.safe_edit(span, written) } else { finding.edit(span, written) }
}

/// A sign of division or multiplication within a unit that stands twice; `whole` is the unit with both.
pub(crate) fn doubled_sign(span: Span, sign: &str) -> Diagnostic {
    Diagnostic::error(CODE, span, format!("`{sign}{sign}` stands in this unit: one sign is too many"))
        .label("one too many")
        .help(format!("write `{sign}` once"))
        .safe_edit(span, sign)
}

/// A word behind a number that is a name of the sheet: the multiplication sign is missing.
pub(crate) fn missing_multiplication(span: Span, word: &str, number: &str) -> Diagnostic {
    Diagnostic::error(CODE, span, format!("`{word}` stands behind a number like a unit, but is a quantity of this sheet"))
        .label("a word straight after a number is read as its unit")
        .help(format!("there is no multiplication without `*`: write `{number} * {word}`"))
        .edit(Span { start: span.start, end: span.start }, "* ")
}

/// A unit that cannot be read.
pub(crate) fn unreadable(span: Span, text: &str, why: &str) -> Diagnostic {
    Diagnostic::error(CODE, span, format!("the unit `{text}` cannot be read: {why}"))
        .label("in this unit")
        .help("compound units have no blanks inside: `kg/m3`, `kJ/(kg.K)`, `1/K`; digits behind a unit are its power")
}
