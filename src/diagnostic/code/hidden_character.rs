//! A character that cannot be seen.

use crate::diagnostic::{Diagnostic, Span};

/// The code.
pub(crate) const CODE: &str = "hidden-character";

/// The page.
pub(crate) const PAGE: &str = concat!(
    r##"
# A character that cannot be seen

The line holds a character that no reader sees, or one that changes the order in which its neighbours are shown: a control
character, a blank of no width, a mark for the direction of writing. A sheet with such characters may say something else
to a checker than to the tool, so none is accepted anywhere, not in texts and comments either. Tabs are fine.

They come in with text that was pasted. Here a blank of no width stands behind `Plate`:

```gw
given V = 3.20 m3 "Volume" from "Plate"##,
    "\u{200B}",
    r##""
answer V
```

Delete the character: the finding says where it stands.

```gw cured
given V = 3.20 m3 "Volume" from "Plate"
answer V
```
"##
);

/// A character that cannot be seen stands at `span`.
pub(crate) fn finding(span: Span, character: char) -> Diagnostic {
    let name = match character {
        '\u{202A}'..='\u{202E}' | '\u{2066}'..='\u{2069}' | '\u{200E}' | '\u{200F}' | '\u{61C}' => "a mark for the direction of writing",
        '\u{200B}' | '\u{2060}' | '\u{FEFF}' => "a blank of no width",
        '\u{AD}' => "a soft hyphen",
        '\u{2028}' | '\u{2029}' => "a line separator",
        '\r' => "a carriage return without a line feed",
        _ => "a control character",
    };
    Diagnostic::error(CODE, span, format!("{name} (U+{:04X}) stands here and cannot be seen", u32::from(character)))
        .label("delete it")
        .help("delete the character; it came in with pasted text")
        .safe_edit(span, "")
}
