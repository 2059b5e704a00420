//! A gauge pressure in a sheet that does not say where it stands.

use crate::diagnostic::{Diagnostic, Span};

/// The code.
pub(crate) const CODE: &str = "gauge-without-site";

/// The page.
pub(crate) const PAGE: &str = r##"
# A gauge pressure without a site

A gauge shows how far a pressure lies above the air around it, and that air has some 1013 mbar at the sea and 845 mbar at
1500 m. Gas laws need the absolute pressure, so the sheet has to say where it stands. Taking 1 bar for granted is wrong by a
few percent at low pressures, and by far more for a vacuum. The finding stands at the first gauge pressure of the sheet; one
line cures all of them.

```gw
given p = 9.6 bar gauge "Filling pressure" from "PI-31"
answer p in bar abs
```

Give the altitude, or the pressure that a barometer shows.

```gw cured
site altitude = 12 m "Yard level" from "Site survey"
given p = 9.6 bar gauge "Filling pressure" from "PI-31"
answer p in bar abs
```
"##;

/// The first gauge pressure of a sheet without a `site` line.
pub(crate) fn finding(span: Span) -> Diagnostic {
    Diagnostic::error(CODE, span, "a gauge pressure needs the atmospheric pressure of the site")
        .label("counts from the atmosphere, which this sheet does not give")
        .help("add a line `site altitude = 12 m \"where\" from \"source\"` or `site pressure = 1013 mbar abs \"where\" from \"source\"`")
}
