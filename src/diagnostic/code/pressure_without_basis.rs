//! A pressure that does not say what it counts from.

use crate::diagnostic::{Diagnostic, Span};

/// The code.
pub(crate) const CODE: &str = "pressure-without-basis";

/// The page.
pub(crate) const PAGE: &str = r##"
# A pressure that does not say what it counts from

`9.6 bar` can be read in three ways: above vacuum, above the air around the gauge, or between two points. The first two differ
by about 1 bar, which at packing line pressures is a tenth of the gas in the vessel, and a result that is wrong by this much
looks entirely plausible. No mistake of gas work is made more often, so the language never guesses. The same word is asked for
where a result is shown in a unit of pressure.

```gw
given p = 9.6 bar "Filling pressure" from "PI-31"
answer p in kPa abs
```

Write `abs`, `gauge` or `diff` behind the unit. Dial gauges show `gauge`, barometers `abs`, differential instruments `diff`.

```gw cured
site altitude = 12 m "Yard level" from "Site survey"
given p = 9.6 bar gauge "Filling pressure" from "PI-31"
answer p in kPa abs
```
"##;

/// A basis in another spelling behind a unit of pressure: `bar g`, `bar(g)`, `bar absolute`. `whole` is the unit with it.
pub(crate) fn otherwise_spelled(span: Span, written: &str, whole: Span, unit: &str, basis: &str) -> Diagnostic {
    Diagnostic::error(CODE, span, format!("`{written}` is not how a pressure says its basis"))
        .label("the basis of this pressure")
        .help(format!("write `{unit} {basis}`"))
        .safe_edit(whole, format!("{unit} {basis}"))
}

/// A negative pressure `text` without a basis: it is no absolute one. `span` is the value up to its unit.
pub(crate) fn negative(span: Span, text: &str) -> Diagnostic {
    Diagnostic::error(CODE, span, format!("the pressure `{text}` does not say gauge or diff"))
        .label("a gauge reading or a difference?")
        .fact("no absolute pressure is negative")
        .help(format!("write `{text} gauge` (below the atmosphere of the site) or `{text} diff` (a difference)"))
        .edit(Span { start: span.end, end: span.end }, " gauge")
}

/// Adds that the value would be a vacuum as an absolute pressure.
pub(crate) fn vacuum(finding: Diagnostic) -> Diagnostic {
    finding.fact("as `abs` it lies below the atmosphere of the site: a vacuum")
}

/// A pressure `text` without a basis, or a unit of pressure in which a value is to be shown; `meanings` says what each basis would
/// make of it.
pub(crate) fn finding(span: Span, text: &str, meanings: Option<[String; 2]>) -> Diagnostic {
    let is_value = text.starts_with(|c: char| c.is_ascii_digit() || "+-−–".contains(c));
    let what = if is_value { "the pressure" } else { "a pressure in" };
    let mut finding = Diagnostic::error(CODE, span, format!("{what} `{text}` does not say abs, gauge or diff"))
        .label("absolute, gauge or a difference?")
        .help(format!(
            "write `{text} abs` (from vacuum), `{text} gauge` (above the atmosphere of the site) or `{text} diff` (a difference)"
        ));
    if let Some([absolute, gauge]) = meanings {
        finding = finding.fact(format!("as `abs` it is {absolute}; as `gauge` it is {gauge}"));
    }
    finding
}
