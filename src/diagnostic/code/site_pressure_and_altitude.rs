//! The pressure of the site and its altitude contradict each other.

use crate::diagnostic::{Diagnostic, Span};

/// The code.
pub(crate) const CODE: &str = "site-pressure-and-altitude";

/// The page.
pub(crate) const PAGE: &str = r##"
# Pressure and altitude of the site disagree

Both were given, and the pressure is not what the standard atmosphere has at that altitude. Weather moves a barometer by some
3 %; more than 4 % is told. The usual cause is a barometer reading that was reduced to sea level, as weather stations publish
it, or 1013 mbar written from habit. All gauge readings of the sheet hang on this number: at 1500 m a habit of 1013 mbar adds
some 170 mbar to each of them. The pressure counts, so the sheet solves and this is a warning.

```gw
site altitude = 1500 m "Hill depot" from "Site survey"
site pressure = 1013 mbar abs "Hill depot" from "Handbook"
```

Leave out the pressure, or write what a barometer at the place shows.

```gw cured
site altitude = 1500 m "Hill depot" from "Site survey"
site pressure = 848 mbar abs "Hill depot" from "Barometer in the vessel house"
```
"##;

/// Given pressure against the standard atmosphere.
pub(crate) fn finding(span: Span, given: &str, standard: &str, altitude: Span) -> Diagnostic {
    Diagnostic::warning(
        CODE,
        span,
        format!("the pressure of the site, {given}, is not that of its altitude, {standard} in the standard atmosphere"),
    )
    .label("the pressure counts")
    .related(altitude, "the altitude")
    .fact("weather moves the pressure of a place by some 3 % about its mean (common practice, no source)")
    .help("check both; a site at altitude does not have 1 bar or 1 atm")
}
